import { useState } from 'react';
import {
  fahrenheitDegreesToKelvin,
  formatMass,
  formatPressure,
  formatTemp,
  formatVolume,
  fromUnit,
  inUnit,
  kelvinToFahrenheitDegrees,
  metricPreferences,
  MINUS,
  NO_BREAK_SPACE,
  type UnitPreferences,
} from '@steepfall/shared/units';
import { useSession } from './session.ts';

/** What the person at this station reads and types; metric before anybody has signed in. */
export function useUnits(): UnitPreferences {
  return useSession().known?.member.units ?? metricPreferences;
}

/** What a field can ask for: `kelvin` is a difference of temperatures, `kilograms` a mass kept in kg. */
export type QuantityKind = keyof UnitPreferences | 'kelvin' | 'kilograms';

export interface Quantity {
  /** Written behind the value: "°F". */
  symbol: string;
  /** °C, g, L, kPa (K, kg) to the number a person reads, not rounded. */
  fromInside: (inside: number) => number;
  toInside: (shown: number) => number;
}

/** A number that everybody types the same way: watts, seconds. */
export function plainQuantity(symbol: string): Quantity {
  return { symbol, fromInside: (inside) => inside, toInside: (shown) => shown };
}

const POUNDS_PER_KILOGRAM = 1 / 0.45359237;

/** How one quantity is read and typed by a person with these units. */
export function quantityOf(kind: QuantityKind, units: UnitPreferences): Quantity {
  if (kind === 'kelvin') {
    const isF = units.temperature === 'F';
    return {
      symbol: isF ? '°F' : '°C',
      fromInside: (inside) => (isF ? kelvinToFahrenheitDegrees(inside) : inside),
      toInside: (shown) => (isF ? fahrenheitDegreesToKelvin(shown) : shown),
    };
  }
  if (kind === 'kilograms') {
    const isPounds = units.mass === 'oz';
    return {
      symbol: isPounds ? 'lb' : 'kg',
      fromInside: (inside) => (isPounds ? inside * POUNDS_PER_KILOGRAM : inside),
      toInside: (shown) => (isPounds ? shown / POUNDS_PER_KILOGRAM : shown),
    };
  }
  const unit = units[kind];
  return {
    symbol: kind === 'temperature' ? `°${unit}` : unit,
    fromInside: (inside) => inUnit(kind, inside, unit),
    toInside: (shown) => fromUnit(kind, shown, unit),
  };
}

/** Four decimals are more than anybody types: what has no more was typed so, and is shown whole. */
const TYPED_DECIMALS = 4;
const TIDY_DECIMALS = 2;

function toTypedText(shown: number): string {
  // The last digits of a double are dust of the way there and back.
  const clean = Number(shown.toPrecision(12));
  const typed = Number(clean.toFixed(TYPED_DECIMALS));
  if (typed === clean) return String(typed);
  const tidy = Number(clean.toFixed(TIDY_DECIMALS));
  return String(tidy === 0 ? Number(clean.toPrecision(2)) : tidy);
}

/** A number as people type it: a decimal comma and a true minus are fine. `undefined` when empty, NaN when it is no number. */
export function typedNumber(text: string): number | undefined {
  const plain = text.trim().replace(',', '.').replace(MINUS, '-');
  if (plain === '') return undefined;
  return /^[-+]?(\d+\.?\d*|\.\d+)(e[-+]?\d+)?$/i.test(plain) ? Number(plain) : Number.NaN;
}

/** The text of a field for a number from inside; empty when there is none. */
export function quantityText(inside: number | null | undefined, { fromInside }: Quantity): string {
  return typeof inside === 'number' && Number.isFinite(inside) ? toTypedText(fromInside(inside)) : '';
}

/** What was typed, taken inside. `undefined` when empty, NaN when it is no number. */
export function quantityInside(text: string, { toInside }: Quantity): number | undefined {
  const shown = typedNumber(text);
  return shown === undefined ? undefined : toInside(shown);
}

/**
 * A field that holds a number of the inside and shows it in the person's unit. What is being typed stays as it is typed, and a number
 * that nobody touches is not rounded by having been shown. Emptied, it gives `null`: for `undefined` a form would bring its first value
 * back. For `QuantityField`, or a field of your own.
 */
export function useQuantity(
  kind: QuantityKind | Quantity,
  value: number | null | undefined,
  onChange: (inside: number | null) => void,
): { symbol: string; text: string; onText: (text: string) => void } {
  const units = useUnits();
  const quantity = typeof kind === 'string' ? quantityOf(kind, units) : kind;
  const [typed, setTyped] = useState<{ text: string; symbol: string } | null>(null);
  const isStillTyped =
    typed?.symbol === quantity.symbol && Object.is(quantityInside(typed.text, quantity), value ?? undefined);
  return {
    symbol: quantity.symbol,
    text: isStillTyped ? typed.text : quantityText(value, quantity),
    onText: (text) => {
      setTyped({ text, symbol: quantity.symbol });
      onChange(quantityInside(text, quantity) ?? null);
    },
  };
}

const QUANTITY = new RegExp(`(${MINUS}|-)?(\\d+(?:\\.\\d+)?)[ ${NO_BREAK_SPACE}](°C|kPa|kg|L|g)(?![\\w/])`, 'g');

/** Words of the hub or of a contract, which speak metric, in the person's units: "At most 40 °C." is "At most 104 °F.". */
export function inPersonsWords(text: string, units: UnitPreferences): string {
  return text.replace(QUANTITY, (whole, sign: string | undefined, digits: string, symbol: string) => {
    const value = Number(digits) * (sign ? -1 : 1);
    switch (symbol) {
      case '°C':
        return units.temperature === 'C' ? whole : formatLevel(value, units);
      case 'kPa':
        return units.pressure === 'kPa' ? whole : formatPressure(value, { unit: units.pressure });
      case 'L':
        return units.volume === 'L' ? whole : formatVolume(value, { unit: units.volume });
      default:
        return units.mass === 'g' ? whole : formatMass(symbol === 'kg' ? value * 1000 : value, { unit: units.mass });
    }
  });
}

/** A temperature that somebody chose, without false digits: "62 °C", "143.6 °F". */
export function formatLevel(tempC: number, { temperature }: UnitPreferences, showUnit = true): string {
  const shown = Number(inUnit('temperature', tempC, temperature).toFixed(1));
  return formatTemp(tempC, { unit: temperature, digits: Number.isInteger(shown) ? 0 : 1, showUnit });
}
