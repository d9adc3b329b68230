/**
 * Specific heats, J/(kg K). Water: 4186 is within 0.6 % from 5 to 95 °C (IAPWS-95, computed). Metals: property table of
 * common solids, Engineers Edge; stainless steel: material-properties.org. Dry leaf and hops: 1500 to 1700, from memory.
 */
export const specificHeatJPerKgK = {
  water: 4186,
  copper: 386,
  aluminium: 902,
  mildSteel: 500,
  stainlessSteel: 500,
  brass: 400,
  dryLeaf: 1600,
} as const;

export type HeatedMaterial = keyof typeof specificHeatJPerKgK;
