import type { ReactNode } from 'react';
import { inPersonsWords, useQuantity, useUnits, type Quantity, type QuantityKind } from '#lib/units.ts';
import { TextField } from './field.tsx';

interface QuantityFieldProps {
  kind: QuantityKind | Quantity;
  label: ReactNode;
  hint?: ReactNode;
  /** As the contract or the hub says it: metric numbers in it are turned into the person's. */
  error?: string | undefined;
  /** °C, g, L, kPa (K, kg). */
  value: number | null | undefined;
  /** `null` when it was emptied, NaN when it is no number: the schema of the form says what to do. */
  onChange: (inside: number | null) => void;
  onBlur?: () => void;
  name?: string;
  ref?: React.Ref<HTMLInputElement>;
}

/** A number with a unit: kept in the unit of the inside, shown and typed in that of the person. */
export function QuantityField({ kind, value, onChange, error, ...rest }: QuantityFieldProps) {
  const units = useUnits();
  const { symbol, text, onText } = useQuantity(kind, value, onChange);
  return (
    <TextField
      {...rest}
      unit={symbol}
      inputMode="decimal"
      autoComplete="off"
      value={text}
      onChange={({ target }) => onText(target.value)}
      error={error && inPersonsWords(error, units)}
    />
  );
}
