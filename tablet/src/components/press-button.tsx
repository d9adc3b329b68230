import type { ReactNode } from 'react';
import { usePress, type PressHint } from '#lib/press/use-press.ts';
import { classNames } from './class-names.ts';

const hintWords: Record<Exclude<PressHint, null>, string> = {
  'too-short': 'Too short a touch: press a little longer',
  'too-long': 'Held too long: tap once',
  'several-touches': 'More than one touch: use one finger',
};

interface PressButtonProps {
  onPress: () => void;
  className?: string;
  children: ReactNode;
  /** Under the label; gives way to a hint when a touch did not count. */
  note?: ReactNode;
  /** It stays where the focus is, and does nothing: a button that takes itself away would drop the focus. */
  isDisabled?: boolean;
  /** For something to tick. */
  isChecked?: boolean;
  label?: string;
}

/** A button for wet glass: only a deliberate press counts, and a touch that did not count says why. */
export function PressButton({ onPress, className, children, note, isDisabled, isChecked, label }: PressButtonProps) {
  const { hint, handlers } = usePress(() => {
    if (!isDisabled) onPress();
  });
  return (
    <button
      type="button"
      {...handlers}
      role={isChecked === undefined ? undefined : 'checkbox'}
      aria-checked={isChecked}
      aria-disabled={isDisabled || undefined}
      aria-label={label}
      className={classNames('press-button', className)}
    >
      {children}
      {note || hint ? (
        <span className="press-note" role={hint ? 'status' : undefined}>
          {hint ? hintWords[hint] : note}
        </span>
      ) : null}
    </button>
  );
}
