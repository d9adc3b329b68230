import type { ReactNode } from 'react';
import { useHold } from '#lib/press/use-hold.ts';
import { classNames } from './class-names.ts';

/** For what ends things: press and hold while the bar fills. Space and Enter are held in the same way. */
export function HoldButton({
  onHeld,
  children,
  className,
}: {
  onHeld: () => void;
  children: ReactNode;
  className?: string;
}) {
  const { isHolding, handlers } = useHold(onHeld);
  return (
    <button
      type="button"
      {...handlers}
      data-holding={isHolding || undefined}
      className={classNames(
        'relative min-h-18 cursor-pointer touch-none overflow-hidden rounded-xl border-2 border-ember px-7 text-lead font-medium text-ember select-none',
        className,
      )}
    >
      <span
        aria-hidden="true"
        className={classNames(
          'absolute inset-y-0 left-0 bg-ember-fill',
          isHolding ? 'w-full transition-[width] duration-700 ease-linear' : 'w-0',
        )}
      />
      <span className={classNames('relative', isHolding && 'text-on-fill')}>{children}</span>
    </button>
  );
}
