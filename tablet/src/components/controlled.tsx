import type { ReactNode } from 'react';
import { useController, type Control, type FieldPath, type FieldValues } from 'react-hook-form';
import type { QuantityKind } from '#lib/units.ts';
import { NumberField } from './number-field.tsx';
import { QuantityField } from './quantity-field.tsx';

interface ControlledProps<Values extends FieldValues> {
  control: Control<Values>;
  name: FieldPath<Values>;
  label: ReactNode;
  hint?: ReactNode;
}

/** A number of a form with its unit; empty is null. */
export function ControlledNumber<Values extends FieldValues>({
  control,
  name,
  ...rest
}: ControlledProps<Values> & { unit?: string; factor?: number }) {
  const { field, fieldState } = useController({ control, name });
  return <NumberField {...rest} {...field} error={fieldState.error?.message} />;
}

/** A quantity of a form, in the person's unit; empty is null. */
export function ControlledQuantity<Values extends FieldValues>({
  control,
  name,
  ...rest
}: ControlledProps<Values> & { kind: QuantityKind }) {
  const { field, fieldState } = useController({ control, name });
  return <QuantityField {...rest} {...field} error={fieldState.error?.message} />;
}
