import { Description, Field as HeadlessField, Input, Label, Select } from '@headlessui/react';
import { useState, type ComponentPropsWithRef, type ReactNode } from 'react';
import { classNames } from './class-names.ts';

interface FieldDress {
  label: ReactNode;
  hint?: ReactNode;
  /** What is wrong, and what to do. */
  error?: string | undefined;
  /** Written behind the value: a unit. */
  unit?: string;
}

const control =
  'w-full min-h-12 rounded-lg border-2 bg-raised px-4 text-body text-text placeholder:text-soft data-invalid:border-ember';

function Frame({ label, hint, error, children }: FieldDress & { children: ReactNode }) {
  return (
    <HeadlessField className="grid gap-1.5">
      <Label className="text-body font-medium">{label}</Label>
      {hint ? <Description className="text-note text-soft">{hint}</Description> : null}
      {children}
      {error ? (
        <Description role="alert" className="flex gap-2 text-note font-medium text-ember">
          <svg viewBox="0 0 16 16" className="mt-1 size-3 shrink-0" aria-hidden="true">
            <path d="M8 0l8 8-8 8-8-8z" fill="currentColor" />
          </svg>
          {error}
        </Description>
      ) : null}
    </HeadlessField>
  );
}

export function TextField({
  label,
  hint,
  error,
  unit,
  className,
  ...rest
}: FieldDress & Omit<ComponentPropsWithRef<'input'>, 'className'> & { className?: string }) {
  return (
    <Frame label={label} hint={hint} error={error}>
      <span className="relative block">
        <Input
          {...rest}
          invalid={Boolean(error)}
          className={classNames(
            control,
            error ? 'border-ember' : 'border-edge',
            unit && 'pr-16 tabular-nums',
            className,
          )}
        />
        {unit ? (
          <span className="pointer-events-none absolute inset-y-0 right-4 flex items-center text-body text-soft">
            {unit}
          </span>
        ) : null}
      </span>
    </Frame>
  );
}

/** A password, with a way to look at it: wet fingers mistype. */
export function PasswordField({
  label,
  hint,
  error,
  ...rest
}: FieldDress & Omit<ComponentPropsWithRef<'input'>, 'type' | 'className'>) {
  const [isShown, setIsShown] = useState(false);
  return (
    <Frame label={label} hint={hint} error={error}>
      <span className="relative block">
        <Input
          {...rest}
          type={isShown ? 'text' : 'password'}
          invalid={Boolean(error)}
          className={classNames(control, 'pr-24', error ? 'border-ember' : 'border-edge')}
        />
        <button
          type="button"
          aria-pressed={isShown}
          aria-label="Show the password"
          onClick={() => setIsShown(!isShown)}
          className="absolute inset-y-0 right-0 w-20 cursor-pointer rounded-lg text-note font-medium underline decoration-hair decoration-2 underline-offset-4 hover:decoration-text"
        >
          {isShown ? 'Hide' : 'Show'}
        </button>
      </span>
    </Frame>
  );
}

export function SelectField({
  label,
  hint,
  error,
  children,
  ...rest
}: FieldDress & Omit<ComponentPropsWithRef<'select'>, 'className'>) {
  return (
    <Frame label={label} hint={hint} error={error}>
      <span className="relative block">
        <Select
          {...rest}
          invalid={Boolean(error)}
          className={classNames(
            control,
            'cursor-pointer appearance-none pr-12',
            error ? 'border-ember' : 'border-edge',
          )}
        >
          {children}
        </Select>
        <svg
          viewBox="0 0 16 16"
          className="pointer-events-none absolute right-4 top-1/2 size-4 -translate-y-1/2"
          aria-hidden="true"
        >
          <path d="M2 5l6 6 6-6" fill="none" stroke="currentColor" strokeWidth="2" />
        </svg>
      </span>
    </Frame>
  );
}
