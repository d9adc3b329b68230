import type { FigureGroup, FigureQuantity, FigureRow } from '@steepfall/shared/desk';
import { showBand, showPhBand, type Band } from '@steepfall/shared/figures';
import { inUnit, litersToUsFluidOunces, type UnitPreferences } from '@steepfall/shared/units';
import { formatLevel } from './units.ts';
import { spanWords } from './words.ts';

export const groupWords: Record<FigureGroup, string> = {
  day: 'The day',
  water: 'Water',
  acid: 'Acid',
  tea: 'Tea',
  hops: 'Hops',
  yield: 'Yield',
  gas: 'Gas',
};

export interface FigureText {
  /** "140", or only the range when that is all that can be said. */
  value: string;
  /** "86–190"; empty when the number is sure, or when it is the range already. */
  range: string;
  unit: string;
  /** All of it, for reading aloud and for telling whether it moved. */
  whole: string;
}

const fixedUnits: Partial<Record<FigureQuantity, string>> = {
  mgPerL: 'mg/L',
  meqPerL: 'meq/L',
  molPerL: 'mol/L',
  uSPerCm: 'µS/cm',
  gPerL: 'g/L',
  percent: '%',
  mg: 'mg',
  steepMin: 'min at 80 °C',
  volumes: 'vol',
};

/** The number of a row as a person reads it: in their units, two figures, with its band. */
export function figureText(
  { quantity, band }: Pick<FigureRow, 'quantity' | 'band'>,
  units: UnitPreferences,
): FigureText {
  const { text, unit } = numberText(quantity, band, units);
  const [, value = text, range = ''] = /^(.*?) \((.*)\)$/.exec(text) ?? [];
  return { value, range, unit, whole: unit === '' ? text : `${text} ${unit}` };
}

function numberText(quantity: FigureQuantity, band: Band, units: UnitPreferences): { text: string; unit: string } {
  const converted = (to: (inside: number) => number): Band => ({
    ...band,
    low: to(band.low),
    value: to(band.value),
    high: to(band.high),
  });
  switch (quantity) {
    case 'pH':
      return { text: showPhBand(band), unit: '' };
    case 'massG':
      return { text: showBand(converted((massG) => inUnit('mass', massG, units.mass))), unit: units.mass };
    case 'volumeL':
      return {
        text: spelled(
          converted((volumeL) => inUnit('volume', volumeL, units.volume)),
          1,
        ),
        unit: units.volume,
      };
    case 'volumeMl':
      if (units.volume === 'L') return { text: showBand(band), unit: 'mL' };
      return { text: showBand(converted((ml) => litersToUsFluidOunces(ml / 1000))), unit: 'fl oz' };
    case 'pressureKPa': {
      const decimals = { kPa: 0, bar: 2, psi: 1 }[units.pressure];
      return {
        text: spelled(
          converted((kPa) => inUnit('pressure', kPa, units.pressure)),
          decimals,
        ),
        unit: units.pressure,
      };
    }
    case 'tempC':
      return { text: degrees(band, units), unit: `°${units.temperature}` };
    case 'durationS':
      return { text: between(band, spanWords), unit: '' };
    case 'steepMin':
      return { text: showBand(band), unit: `min at ${formatLevel(80, units)}` };
    default:
      return { text: showBand(band), unit: fixedUnits[quantity] ?? '' };
  }
}

/** Two figures of a temperature or of a volume would say less than the instrument shows: fixed decimals in their place. */
function spelled(band: Band, decimals: number): string {
  return between(band, (value) => value.toFixed(decimals).replace('-', '−'));
}

function degrees(band: Band, units: UnitPreferences): string {
  return between(band, (tempC) => formatLevel(tempC, units, false));
}

function between({ low, value, high }: Band, words: (value: number) => string): string {
  const [from, middle, to] = [words(low), words(value), words(high)];
  return from === to ? middle : `${middle} (${from}–${to})`;
}
