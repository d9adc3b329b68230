import type { MeasuredQuantity } from '@steepfall/shared/sheets';
import type { Measurement } from '@steepfall/shared/runs';
import { formatMass, formatPressure, formatTemp, formatVolume } from '@steepfall/shared/units';

interface QuantityWords {
  /** "pH", "temperature". */
  name: string;
  unit: string;
  digits: number;
}

export const quantityWords: Record<MeasuredQuantity, QuantityWords> = {
  pH: { name: 'pH', unit: '', digits: 2 },
  tempC: { name: 'temperature', unit: '°C', digits: 1 },
  volumeL: { name: 'volume', unit: 'L', digits: 1 },
  massG: { name: 'weight', unit: 'g', digits: 1 },
  pressureKPa: { name: 'pressure', unit: 'kPa', digits: 0 },
  tasteScore: { name: 'taste, 1 to 9', unit: '', digits: 0 },
};

/** A measured or set value in words: "pH 5.4", "96 kPa". */
export function quantityText(quantity: MeasuredQuantity, value: number): string {
  switch (quantity) {
    case 'pH':
      return `pH ${value}`;
    case 'tempC':
      return formatTemp(value, { unit: 'C', digits: Number.isInteger(value) ? 0 : 1 });
    case 'volumeL':
      return formatVolume(value, { unit: 'L' });
    case 'massG':
      return formatMass(value, { unit: 'g' });
    case 'pressureKPa':
      return formatPressure(value, { unit: 'kPa' });
    case 'tasteScore':
      return `${value} of 9`;
  }
}

export function measurementText({ quantity, value }: Measurement): string {
  return quantityText(quantity, value);
}
