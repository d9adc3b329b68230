import { useState, type ReactNode } from 'react';
import { TextField } from '#components/field.tsx';
import { inPersonsWords, quantityInside, quantityText, useUnits } from '#lib/units.ts';

/** How a number of the inside is shown and typed. */
export interface Scale {
  symbol: string;
  fromInside: (inside: number) => number;
  toInside: (shown: number) => number;
}

export const plainScale = (symbol = ''): Scale => ({
  symbol,
  fromInside: (inside) => inside,
  toInside: (shown) => shown,
});

export const minutesScale: Scale = { symbol: 'min', fromInside: (s) => s / 60, toInside: (min) => min * 60 };

interface NumberFieldProps {
  label: ReactNode;
  hint?: ReactNode;
  error?: string | undefined;
  scale: Scale;
  /** Path in the document: how warnings and errors find the field. */
  path: string;
  value: number | undefined;
  /** `undefined` only where the field is optional; NaN for anything that is no number, so that the schema can say so. */
  onChange: (value: number | undefined) => void;
  isOptional?: boolean;
  /** Shown while the field is empty: what is taken then. */
  placeholder?: string;
}

/** A number as it is typed: the text stays as the person wrote it for as long as it stands for the same number. */
export function NumberField({ scale, path, value, onChange, isOptional, error, label, ...rest }: NumberFieldProps) {
  const units = useUnits();
  const [typed, setTyped] = useState<{ text: string; value: number | undefined; symbol: string } | null>(null);
  const isStillTyped = typed !== null && typed.symbol === scale.symbol && Object.is(typed.value, value);
  return (
    <TextField
      {...rest}
      label={<SmallLabel>{label}</SmallLabel>}
      name={path}
      unit={scale.symbol}
      inputMode="decimal"
      autoComplete="off"
      value={isStillTyped ? typed.text : quantityText(value, scale)}
      onChange={({ target: { value: text } }) => {
        const inside = quantityInside(text, scale) ?? (isOptional ? undefined : Number.NaN);
        setTyped({ text, value: inside, symbol: scale.symbol });
        onChange(inside);
      }}
      error={error && inPersonsWords(error, units)}
    />
  );
}

/** Labels of a long form: quieter than the numbers under them. */
export function SmallLabel({ children }: { children: ReactNode }) {
  return <span className="text-note font-medium text-soft">{children}</span>;
}
