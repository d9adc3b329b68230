import { useState, type ReactNode, type Ref } from 'react';
import { typedNumber } from '#lib/units.ts';
import { TextField } from './field.tsx';

interface NumberFieldProps {
  label: ReactNode;
  hint?: ReactNode;
  error?: string | undefined;
  unit?: string;
  value: number | null | undefined;
  /** `null` when it was emptied, NaN when it is no number: the schema of the form says what to do. */
  onChange: (value: number | null) => void;
  /** What the value is multiplied with to be shown: for a price by another mass. */
  factor?: number;
  onBlur?: () => void;
  name?: string;
  ref?: Ref<HTMLInputElement>;
}

const shownText = (value: number | null | undefined, factor: number) =>
  typeof value === 'number' && Number.isFinite(value) ? String(Number((value * factor).toFixed(4))) : '';

/** A number in one unit for everybody: percent, a price. What is being typed stays as it is typed. */
export function NumberField({ value, onChange, factor = 1, ...rest }: NumberFieldProps) {
  const [typed, setTyped] = useState<{ text: string; value: number | null } | null>(null);
  const text = typed && Object.is(typed.value, value ?? null) ? typed.text : shownText(value, factor);
  const take = (next: string) => {
    const number = typedNumber(next);
    const inside = number === undefined ? null : number / factor;
    setTyped({ text: next, value: inside });
    onChange(inside);
  };
  return (
    <TextField
      {...rest}
      inputMode="decimal"
      autoComplete="off"
      value={text}
      onChange={({ target }) => take(target.value)}
    />
  );
}
