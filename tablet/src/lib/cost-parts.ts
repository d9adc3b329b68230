import type { Cost } from '@steepfall/shared/desk';
import { LITERS_PER_US_GALLON, type UnitPreferences } from '@steepfall/shared/units';

const volumes = {
  L: { word: 'litre', volumeL: 1 },
  gal: { word: 'gallon', volumeL: LITERS_PER_US_GALLON },
} as const;

/** A cost by what it is shared out to, in the person's own volume; null where it is not known. */
export function costParts(
  { total, perL, perServing }: Cost,
  unit: UnitPreferences['volume'],
): { label: string; amount: number | null }[] {
  const { word, volumeL } = volumes[unit];
  return [
    { label: 'the batch', amount: total },
    { label: `a ${word}`, amount: perL === null ? null : perL * volumeL },
    { label: 'a serving', amount: perServing },
  ];
}
