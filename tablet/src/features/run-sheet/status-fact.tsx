import type { ReactNode } from 'react';

/** One line of how this tablet stands: a name, a word, and why. */
export function Fact({ name, word, children }: { name: string; word: string; children: ReactNode }) {
  return (
    <div className="grid gap-1">
      <dt className="text-lead font-semibold">
        {name}: <span className="tabular-nums">{word}</span>
      </dt>
      <dd className="text-body text-soft">{children}</dd>
    </div>
  );
}
