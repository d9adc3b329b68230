import type { ReactNode } from 'react';

/** Nothing here yet: one sentence that teaches, one action. */
export function EmptyState({ children, action }: { children: ReactNode; action?: ReactNode }) {
  return (
    <div className="flex flex-col items-start gap-5 border-2 border-dashed border-hair px-6 py-8">
      <p className="max-w-prose text-lead text-soft">{children}</p>
      {action}
    </div>
  );
}
