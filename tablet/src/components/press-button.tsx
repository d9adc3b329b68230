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
  isDisabled?: boolean;
  label?: string;
}

/** A button for wet glass: only a deliberate press counts, and a touch that did not count says why. */
export function PressButton({ onPress, className, children, note, isDisabled, label }: PressButtonProps) {
  const { hint, handlers } = usePress(onPress);
  return (
    <button
      type="button"
      {...handlers}
      disabled={isDisabled}
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
