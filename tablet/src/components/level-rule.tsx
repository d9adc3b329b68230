import type { ReactNode } from 'react';

interface LevelRuleProps {
  children: ReactNode;
  /** Heading level; the page's own title is 1. */
  level?: 2 | 3;
  /** At the far end of the line. */
  aside?: ReactNode;
  id?: string;
}

/** A heading on its level: the word, then the dashed line that runs on, with the notch where something has crossed it. */
export function LevelRule({ children, level = 2, aside, id }: LevelRuleProps) {
  const Heading = level === 2 ? 'h2' : 'h3';
  return (
    <div className="flex min-h-12 flex-wrap items-center gap-x-4 gap-y-1">
      <Heading id={id} className="max-w-full text-lead font-semibold">
        {children}
      </Heading>
      <LevelLine />
      {aside ? <div className="max-w-full text-body text-soft">{aside}</div> : null}
    </div>
  );
}

export function LevelLine() {
  return (
    <span aria-hidden="true" className="flex min-w-6 flex-1 items-center">
      <span className="h-0.5 w-4 bg-edge" />
      <svg viewBox="0 0 22 18" className="h-4.5 w-5.5 shrink-0 text-edge" fill="none">
        <path d="M2 1C4.500 8 10 13 20 17" stroke="currentColor" strokeWidth="2" />
      </svg>
      <span className="h-0 flex-1 border-t-2 border-dashed border-hair" />
    </span>
  );
}
