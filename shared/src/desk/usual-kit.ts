import { atmosphericPressureKPa } from '../figures/index.js';
import type { ChillerFacts, KettleFacts, RecipeDocument } from '../sheets/index.js';
import type { DeskKit } from './types.js';

/** What the desk takes when nobody said better. Common practice, no source, unless a line says where it is from. */
export const usual = {
  fillC: 15,
  roomC: 20,
  coolantC: 15,
  /** A can of 12 fl oz. */
  servingMl: 355,
  /** Coolant through a coil, kg/s. */
  coolantKgPerS: 0.1,
  /** Where a gently stirred coil takes as much as a still one, °C: 240 W/K for 7.6 m, half of a well stirred one. */
  coilAtC: 60,
  coilOuterMm: 9.5,
  /** 2.2 kg for 7.6 m of copper with its ends; stainless tube is thinner (computed). */
  coilKgPerM: { copper: 2.2 / 7.6, stainless: 0.16 },
  coilBoreMm: 7.9,
  /** Heat per litre of water, W. */
  heaterWPerL: 175,
  heaterEfficiency: 0.77,
} as const;

/** A lidded steel pot that the water fills to four fifths, three quarters as deep as wide; its heat grows with it. */
function usualKettle(waterL: number): KettleFacts {
  const volumeL = waterL / 0.8;
  return {
    volumeL,
    diameterM: Math.cbrt((4 * volumeL) / 1000 / (Math.PI * 0.75)),
    massKg: 0.2 * volumeL,
    heaterPowerW: usual.heaterWPerL * waterL,
    heaterEfficiency: usual.heaterEfficiency,
    metal: 'stainless',
    hasLid: true,
  };
}

/** Highest altitude that the sums hold for, and lowest, m. */
const altitudeRangeM = { from: -430, to: 6000 } as const;

export function altitudeOf({ altitudeM }: Pick<DeskKit, 'altitudeM'>): number {
  return Math.min(altitudeRangeM.to, Math.max(altitudeRangeM.from, altitudeM));
}

export interface DayKit {
  kettle: KettleFacts;
  chiller: ChillerFacts | null;
  isLidOn: boolean;
  fillC: number;
  roomC: number;
  /** Air pressure here. */
  stationKPa: number;
}

/** The kit of the day with what is usual where nothing is known. */
export function dayKit({ waterL, assume }: RecipeDocument, kit: DeskKit): DayKit {
  const kettle = kit.kettle ?? usualKettle(waterL);
  return {
    kettle,
    chiller: kit.chiller,
    isLidOn: assume.lidOn ?? kettle.hasLid ?? true,
    fillC: assume.fillC ?? usual.fillC,
    roomC: assume.roomC ?? usual.roomC,
    stationKPa: atmosphericPressureKPa(altitudeOf(kit)),
  };
}
