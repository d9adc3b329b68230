import { alphaNowPercent } from '@steepfall/shared/figures';
import type { LotFacts } from '@steepfall/shared/stores';
import { formatSignificant } from '@steepfall/shared/units';
import { differenceInCalendarDays } from 'date-fns';
import { localDate } from '#lib/words.ts';

/** What is left of the alpha acids of a lot, in words: by its storage index, else by its age. `null` when neither is known. */
export function alphaTodayWords(hops: NonNullable<LotFacts['hops']>, today: string): string | null {
  const { alphaPercent: harvestPercent, storageIndex, harvestedOn } = hops;
  if (storageIndex !== null) return words(alphaNowPercent({ harvestPercent, storageIndex }), 'by its storage index');
  if (harvestedOn === null) return null;
  const ageDays = Math.max(0, differenceInCalendarDays(localDate(today), localDate(harvestedOn)));
  return words(alphaNowPercent({ harvestPercent, ageDays }), 'by its age');
}

function words({ low, value, high }: { low: number; value: number; high: number }, from: string): string {
  const percent = (part: number) => formatSignificant(part);
  const band = percent(low) === percent(high) ? '' : ` (${percent(low)} to ${percent(high)})`;
  return `${percent(value)} %${band}, ${from}`;
}
