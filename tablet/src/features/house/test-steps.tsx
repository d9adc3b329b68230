import type { ReactNode } from 'react';
import { classNames } from '#components/class-names.ts';

/** What to do, in order; the one that is due is written plainly, the others softly. */
export function TestSteps({ children }: { children: ReactNode }) {
  return <ol className="grid gap-1.5">{children}</ol>;
}

export function TestStep({
  number,
  state,
  children,
}: {
  number: number;
  state: 'done' | 'now' | 'later';
  children: ReactNode;
}) {
  return (
    <li
      aria-current={state === 'now' ? 'step' : undefined}
      className={classNames('flex gap-4 text-body', state === 'now' ? 'font-medium' : 'text-soft')}
    >
      <span aria-hidden="true" className="w-5 shrink-0 text-right tabular-nums">
        {state === 'done' ? '✓' : number}
      </span>
      <span>
        {state === 'done' ? <span className="sr-only">Done: </span> : null}
        {children}
      </span>
    </li>
  );
}
