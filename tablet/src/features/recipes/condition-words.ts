import type { Addition, AdditionIn, AdditionOut } from '@steepfall/shared/sheets';
import { formatDuration, type UnitPreferences } from '@steepfall/shared/units';
import { formatLevel } from '#lib/units.ts';

export function inWords(when: AdditionIn, units: UnitPreferences): string {
  switch (when.at) {
    case 'fill':
      return 'in cold, with the water';
    case 'steep':
      return when.afterS > 0 ? `in ${formatDuration(when.afterS)} into the steep` : 'in at the steep';
    case 'falling':
      return `in at ${formatLevel(when.tempC, units)}, falling`;
    case 'transfer':
      return 'into the keg';
  }
}

export function outWords(when: AdditionOut, units: UnitPreferences): string {
  switch (when.at) {
    case 'timer':
      return `out after ${formatDuration(when.durationS)}`;
    case 'falling':
      return `out at ${formatLevel(when.tempC, units)}`;
    case 'transfer':
      return 'out at the transfer';
  }
}

/** "in at 62 °C, falling · out at 30 °C". */
export function conditionWords(addition: Addition, units: UnitPreferences): string {
  const parts = [inWords(addition.in, units)];
  if ('out' in addition && addition.in.at !== 'transfer') parts.push(outWords(addition.out, units));
  return parts.join(' · ');
}
