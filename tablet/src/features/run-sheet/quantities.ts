import type { MeasuredQuantity } from '@steepfall/shared/sheets';
import type { Measurement } from '@steepfall/shared/runs';
import { formatMass, formatPressure, formatVolume, type UnitPreferences } from '@steepfall/shared/units';
import { formatLevel, quantityOf, type QuantityKind } from '#lib/units.ts';

/** "pH", "temperature". */
export const quantityNames: Record<MeasuredQuantity, string> = {
  pH: 'pH',
  tempC: 'temperature',
  volumeL: 'volume',
  massG: 'weight',
  pressureKPa: 'pressure',
  tasteScore: 'taste, 1 to 9',
};

const kindOf: Partial<Record<MeasuredQuantity, QuantityKind>> = {
  tempC: 'temperature',
  volumeL: 'volume',
  massG: 'mass',
  pressureKPa: 'pressure',
};

const asItIs = { symbol: '', fromInside: (inside: number) => inside, toInside: (shown: number) => shown };

/** How a person with these units types it. */
export function typedQuantity(quantity: MeasuredQuantity, units: UnitPreferences): ReturnType<typeof quantityOf> {
  const kind = kindOf[quantity];
  return kind ? quantityOf(kind, units) : asItIs;
}

/** A measured or set value in words: "pH 5.4", "96 kPa". */
export function quantityText(quantity: MeasuredQuantity, value: number, units: UnitPreferences): string {
  switch (quantity) {
    case 'pH':
      return `pH ${value}`;
    case 'tempC':
      return formatLevel(value, units);
    case 'volumeL':
      return formatVolume(value, { unit: units.volume });
    case 'massG':
      return formatMass(value, { unit: units.mass });
    case 'pressureKPa':
      return formatPressure(value, { unit: units.pressure });
    case 'tasteScore':
      return `${value} of 9`;
  }
}

export function measurementText({ quantity, value }: Measurement, units: UnitPreferences): string {
  return quantityText(quantity, value, units);
}
