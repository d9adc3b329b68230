import type { ReactNode } from 'react';
import { Checkbox, Field, Label } from '@headlessui/react';
import { classNames } from './class-names.ts';

interface TickBoxProps {
  label: ReactNode;
  isLabelHidden?: boolean;
  isTicked: boolean;
  onTick: (isTicked: boolean) => void;
}

/** A box to tick, large enough for a wet finger. On paper it is empty or ticked as it was on the screen. */
export function TickBox({ label, isLabelHidden = false, isTicked, onTick }: TickBoxProps) {
  return (
    <Field className="flex items-center gap-3">
      <Checkbox
        checked={isTicked}
        onChange={onTick}
        className="group grid size-12 shrink-0 cursor-pointer place-items-center rounded-lg"
      >
        <span className="grid size-7 place-items-center rounded border-2 border-edge group-data-checked:border-text group-data-checked:bg-text">
          <svg viewBox="0 0 16 16" aria-hidden="true" className="hidden size-5 text-ground group-data-checked:block">
            <path d="M3 8.500l3.500 3.500L13 4.500" fill="none" stroke="currentColor" strokeWidth="2.500" />
          </svg>
        </span>
      </Checkbox>
      <Label className={classNames('cursor-pointer', isLabelHidden && 'sr-only')}>{label}</Label>
    </Field>
  );
}
