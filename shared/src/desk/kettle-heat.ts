import { specificHeatJPerKgK, waterDensityKgPerM3, type HeatedMaterial } from '../figures/index.js';
import type { ChillerFacts, KettleFacts } from '../sheets/index.js';

/** What the metals of the kit are to the sums; enamel counts as the steel under it. */
export const metalOf: Record<NonNullable<KettleFacts['metal']> | ChillerFacts['metal'], HeatedMaterial> = {
  stainless: 'stainlessSteel',
  aluminium: 'aluminium',
  copper: 'copper',
  'enamelled-steel': 'mildSteel',
};

/**
 * Heat that warms a kettle and the water in it by one kelvin, J/K.
 *
 * @param waterL 0 or more, L at 20 °C.
 * @see specific-heat.ts, water-density.ts.
 */
export function filledKettleJPerK(waterL: number, { massKg, metal = 'stainless' }: KettleFacts): number {
  return (
    waterL * (waterDensityKgPerM3(20) / 1000) * specificHeatJPerKgK.water + massKg * specificHeatJPerKgK[metalOf[metal]]
  );
}
