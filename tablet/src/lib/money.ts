import { GRAMS_PER_OUNCE, type UnitPreferences } from '@steepfall/shared/units';
import { useKnown } from './session.ts';

/** Money in the currency of the house, as this device writes it. */
export function useMoney(): (amount: number) => string {
  const { house } = useKnown();
  return (amount) => formatMoney(amount, house.currency);
}

function formatMoney(amount: number, currency: string): string {
  try {
    return new Intl.NumberFormat(undefined, { style: 'currency', currency }).format(amount);
  } catch {
    // Three letters that this browser does not take for a currency.
    return `${amount.toFixed(2)} ${currency}`;
  }
}

/** Goods are priced by the kilogram, or by the pound where ounces are read. */
export const priceMass: Record<UnitPreferences['mass'], { word: string; massKg: number }> = {
  g: { word: 'kg', massKg: 1 },
  oz: { word: 'lb', massKg: (GRAMS_PER_OUNCE * 16) / 1000 },
};
