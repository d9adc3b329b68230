import { Button as HeadlessButton } from '@headlessui/react';
import type { ComponentPropsWithRef, ReactNode } from 'react';
import { Link, type LinkProps } from 'react-router-dom';
import { classNames } from './class-names.ts';

/** `onText`: on a strip that has the colour of the text. */
export type ButtonLook = 'primary' | 'plain' | 'quiet' | 'danger' | 'onText';
/** `desk` 48 px, `sheet` 72 px, for a wet hand. */
export type ButtonSize = 'desk' | 'sheet';

const looks: Record<ButtonLook, string> = {
  primary: 'bg-text text-ground border-text hover:opacity-90',
  plain: 'bg-transparent text-text border-edge hover:border-text',
  quiet:
    'bg-transparent text-text border-transparent underline decoration-hair decoration-2 underline-offset-4 hover:decoration-text',
  danger: 'bg-transparent text-ember border-ember hover:bg-ember-fill hover:border-ember-fill hover:text-on-fill',
  onText: 'bg-transparent text-ground border-transparent underline decoration-2 underline-offset-4 hover:border-ground',
};
const sizes: Record<ButtonSize, string> = {
  desk: 'min-h-12 px-5 text-body rounded-lg',
  sheet: 'min-h-18 px-7 text-lead rounded-xl',
};

export function buttonClass(look: ButtonLook = 'plain', size: ButtonSize = 'desk', className?: string): string {
  return classNames(
    'inline-flex items-center justify-center gap-2.5 border-2 font-medium text-center select-none',
    'disabled:opacity-50 disabled:cursor-not-allowed cursor-pointer',
    looks[look],
    sizes[size],
    className,
  );
}

interface Dress {
  look?: ButtonLook;
  size?: ButtonSize;
}

export interface ButtonProps extends Omit<ComponentPropsWithRef<'button'>, 'className'>, Dress {
  className?: string;
  /** What it is doing now; shown in place of the label, and no second press counts. */
  busyLabel?: ReactNode;
  isBusy?: boolean;
}

export function Button({
  look,
  size,
  className,
  isBusy,
  busyLabel,
  children,
  disabled,
  type = 'button',
  ...rest
}: ButtonProps) {
  return (
    <HeadlessButton
      {...rest}
      type={type}
      disabled={disabled || isBusy}
      aria-busy={isBusy || undefined}
      className={buttonClass(look, size, className)}
    >
      {isBusy && busyLabel ? busyLabel : children}
    </HeadlessButton>
  );
}

/** Looks like a button, goes somewhere. */
export function ButtonLink({ look, size, className, ...rest }: LinkProps & Dress & { className?: string }) {
  return <Link {...rest} className={buttonClass(look, size, className)} />;
}
