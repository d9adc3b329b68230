import {
  formatMass,
  formatPressure,
  formatSignificant,
  formatTemp,
  formatVolume,
  type UnitPreferences,
} from '../units/index.js';
import type { Addition, RecipeDocument } from '../sheets/index.js';
import type { DeskWarning, WarningGrade } from './types.js';

/** Values as this person reads them, for the words of a warning. */
export function wordsIn({ temperature, mass, volume, pressure }: UnitPreferences) {
  return {
    temp: (tempC: number) => formatTemp(tempC, { unit: temperature, digits: 0 }),
    mass: (massG: number) => formatMass(massG, { unit: mass }),
    volume: (volumeL: number) => formatVolume(volumeL, { unit: volume }),
    pressure: (pressureKPa: number) => formatPressure(pressureKPa, { unit: pressure }),
    mgPerL: (mgPerL: number) => `${formatSignificant(mgPerL, 2)} mg/L`,
    ph: (ph: number) => ph.toFixed(2),
    span: spanWords,
  };
}

/** "1 h 35 min", "50 min". */
function spanWords(durationS: number): string {
  const minutes = Math.round(durationS / 60);
  const hours = Math.floor(minutes / 60);
  return hours > 0 ? `${hours} h ${minutes % 60} min` : `${minutes} min`;
}

export function warning(
  id: string,
  grade: WarningGrade,
  path: string | null,
  words: Pick<DeskWarning, 'what' | 'why' | 'act'>,
): DeskWarning {
  // A sentence may begin with a name as it was typed.
  const what = words.what.charAt(0).toUpperCase() + words.what.slice(1);
  return { id, grade, path, ...words, what };
}

/** Path of a member of an addition, as the form names it. */
export function pathOf({ additions }: RecipeDocument, addition: Addition | null, member: string): string | null {
  return addition ? `additions.${additions.indexOf(addition)}.${member}` : null;
}

/** Why a line of a food code is named, and that this is not the last word. */
export const CODES_FIRST =
  'Ask your local food authority or a process authority before selling; your local food code comes first.';
