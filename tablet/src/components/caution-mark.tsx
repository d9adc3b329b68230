import type { ReactNode } from 'react';

/** A danger to a person: a short mark, and what to do about it. */
export function CautionMark({ mark, children }: { mark: ReactNode; children?: ReactNode }) {
  return (
    <div className="flex gap-3">
      <svg viewBox="0 0 24 24" className="mt-0.5 size-6 shrink-0 text-ember" aria-hidden="true">
        <path d="M3 3h18v12l-9 7-9-7z" fill="none" stroke="currentColor" strokeWidth="2.5" strokeLinejoin="miter" />
        <path d="M12 6.500v6" stroke="currentColor" strokeWidth="2.75" />
        <path d="M10.600 14.800h2.800v2.800h-2.800z" fill="currentColor" />
      </svg>
      <div>
        <p className="text-body font-semibold">
          <span className="sr-only">Caution: </span>
          {mark}
        </p>
        {children ? <p className="text-body text-soft">{children}</p> : null}
      </div>
    </div>
  );
}
