import { defaultKettle, type KettleSetup } from '@steepfall/probe-sim/kettle';
import type { Equipment } from '@steepfall/shared/contracts';
import { atmosphericPressureKPa, specificHeatJPerKgK } from '@steepfall/shared/figures';
import type { RecipeDocument } from '@steepfall/shared/sheets';

/** The coil that the simulated kettle's own numbers stand for. */
const REFERENCE_COIL_M = 7.6;
/** A stainless coil of that length; a copper one is lighter by the thinness of its wall (common practice). */
const coilMassKg = { stainless: 2.5, copper: 2.2 } as const;

interface SimulatedKit {
  kettle: Pick<Extract<Equipment, { kind: 'kettle' }>, 'facts'>;
  chiller: Pick<Extract<Equipment, { kind: 'chiller' }>, 'facts'> | null;
  document: RecipeDocument;
  altitudeM: number;
  /** The same seed gives the same readings. */
  seed: number;
}

/** The kettle of a house as the simulation knows it: same water, same metal, same power, same coil. */
export function kettleSetupOf({ kettle, chiller, document, altitudeM, seed }: SimulatedKit): KettleSetup {
  const usual = defaultKettle();
  const massOf = (kind: 'tea' | 'hops') =>
    document.additions.filter((addition) => addition.kind === kind).reduce((sum, { massG }) => sum + massG, 0) / 1000;
  const coil = chiller?.facts ?? { metal: 'stainless' as const, lengthM: REFERENCE_COIL_M, coolantC: usual.coolantC };
  const coilRatio = coil.lengthM / REFERENCE_COIL_M;
  return defaultKettle({
    waterMassKg: document.waterL,
    kettleMassKg: kettle.facts.massKg,
    diameterM: kettle.facts.diameterM,
    heaterPowerW: kettle.facts.heaterPowerW,
    heaterEfficiency: kettle.facts.heaterEfficiency,
    pressureKPa: atmosphericPressureKPa(altitudeM),
    coolantC: coil.coolantC,
    coilUAWPerK: usual.coilUAWPerK * coilRatio,
    coilStirredUAWPerK: usual.coilStirredUAWPerK * coilRatio,
    coilMassKg: coilMassKg[coil.metal] * coilRatio,
    coilWaterKg: usual.coilWaterKg * coilRatio,
    coilSpecificHeatJPerKgK: coil.metal === 'copper' ? specificHeatJPerKgK.copper : specificHeatJPerKgK.stainlessSteel,
    teaMassKg: massOf('tea'),
    hopsMassKg: massOf('hops'),
    seed,
  });
}
