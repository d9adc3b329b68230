import type { ReactNode } from 'react';
import { Banner } from './banner.tsx';
import { Button } from './button.tsx';

/** What stands in for a list before it is known for the first time. Known content is never covered by it. */
export function Waiting({ children }: { children: ReactNode }) {
  return (
    <p role="status" className="py-6 text-lead text-soft">
      {children}
    </p>
  );
}

/** Something could not be fetched: what, and a way to try again. */
export function Failed({ title, children, onRetry }: { title: string; children: ReactNode; onRetry: () => void }) {
  return (
    <Banner tone="act" title={title} action={<Button onClick={onRetry}>Try again</Button>}>
      {children}
    </Banner>
  );
}
