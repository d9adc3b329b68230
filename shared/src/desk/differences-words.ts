import type { Addition, AdditionIn, AdditionOut } from '../sheets/index.js';
import {
  formatDuration,
  formatMass,
  formatSignificant,
  formatTemp,
  formatVolume,
  inUnit,
  NO_BREAK_SPACE,
  type UnitPreferences,
} from '../units/index.js';

/**
 * A value in words, the usual first, then ever more exact: what differs must not read alike only because it is rounded. The last resort,
 * the bare value, is added where two values are compared.
 */
export type Texts = readonly string[];

const withUnit = (number: number | string, unit: string) => `${number}${NO_BREAK_SPACE}${unit}`;
const isWhole = (value: number) => Math.abs(value - Math.round(value)) < 0.05;

/** "calciumChlorideDihydrate", "g-per-l" and "tea-in" as words. */
export const inWords = (key: string) =>
  key.replace(/[A-Z]/g, (capital) => ` ${capital.toLowerCase()}`).replaceAll('-', ' ');

/** "3 min", "40 s", "3:30 min", "12 h". */
function durationText(durationS: number): string {
  if (durationS < 60) return withUnit(Math.round(durationS), 's');
  if (durationS % 3600 === 0) return withUnit(durationS / 3600, 'h');
  if (durationS % 60 === 0 && durationS < 2 * 3600) return withUnit(durationS / 60, 'min');
  return withUnit(formatDuration(durationS), durationS < 3600 ? 'min' : 'h');
}

/** How everything is said in one person's units. */
export interface Words {
  temp: (tempC: number) => Texts;
  mass: (massG: number) => Texts;
  /** Grams per litre of water. */
  dose: (gPerL: number) => Texts;
  volume: (volumeL: number) => Texts;
  duration: (durationS: number) => Texts;
  plain: (value: number | string, unit?: string) => Texts;
  in: (condition: AdditionIn) => Texts;
  out: (condition: AdditionOut) => Texts;
  /** An addition in one line. */
  addition: (addition: Addition) => string;
}

export function wordsIn(units: UnitPreferences): Words {
  const temp = (tempC: number): Texts => {
    const shown = inUnit('temperature', tempC, units.temperature);
    const text = formatTemp(tempC, { unit: units.temperature, digits: isWhole(shown) ? 0 : 1 });
    return [text, withUnit(shown, `°${units.temperature}`)];
  };
  const mass = (massG: number): Texts => [
    formatMass(massG, { unit: units.mass }),
    withUnit(inUnit('mass', massG, units.mass), units.mass),
  ];
  // A concentration, like mg/L: the same for everybody.
  const dose = (gPerL: number): Texts => [withUnit(formatSignificant(gPerL, 3), 'g/L'), withUnit(gPerL, 'g/L')];
  const volume = (volumeL: number): Texts => [
    formatVolume(volumeL, { unit: units.volume }),
    withUnit(inUnit('volume', volumeL, units.volume), units.volume),
  ];
  const duration = (durationS: number): Texts => [durationText(durationS), withUnit(durationS, 's')];
  const plain = (value: number | string, unit?: string): Texts => [unit ? withUnit(value, unit) : `${value}`];
  const goesIn = (condition: AdditionIn): Texts => inTexts(condition, { temp, duration });
  const comesOut = (condition: AdditionOut): Texts => outTexts(condition, { temp, duration });
  const addition = (one: Addition): string =>
    [
      mass(one.massG)[0],
      `in ${goesIn(one.in)[0] ?? ''}`,
      ...('out' in one ? [`out ${comesOut(one.out)[0] ?? ''}`] : []),
    ].join(', ');
  return { temp, mass, dose, volume, duration, plain, in: goesIn, out: comesOut, addition };
}

type Quantities = Pick<Words, 'temp' | 'duration'>;

function inTexts(condition: AdditionIn, { temp, duration }: Quantities): Texts {
  switch (condition.at) {
    case 'fill':
      return ['with the cold water'];
    case 'steep':
      return condition.afterS === 0
        ? ['with the steep']
        : duration(condition.afterS).map((text) => `${text} into the steep`);
    case 'falling':
      return temp(condition.tempC).map((text) => `at ${text}`);
    case 'transfer':
      return ['in the keg'];
  }
}

function outTexts(condition: AdditionOut, { temp, duration }: Quantities): Texts {
  switch (condition.at) {
    case 'timer':
      return duration(condition.durationS).map((text) => `after ${text}`);
    case 'falling':
      return temp(condition.tempC).map((text) => `at ${text}`);
    case 'transfer':
      return ['at the transfer'];
  }
}

/** The first way of saying the two that tells them apart. */
export function apart(from: Texts, to: Texts): [string, string] {
  const at = (texts: Texts, level: number) => texts[Math.min(level, texts.length - 1)] ?? '';
  const levels = Math.max(from.length, to.length);
  for (let level = 0; level < levels; level += 1) {
    if (at(from, level) !== at(to, level)) return [at(from, level), at(to, level)];
  }
  return [at(from, levels), at(to, levels)];
}
