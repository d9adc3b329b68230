import { useEffect, type ReactNode } from 'react';

interface PageProps {
  title: ReactNode;
  /** In the tab and for screen readers; the title itself when it is a text. */
  tabTitle?: string;
  /** A short line above the title: where this is. */
  above?: ReactNode;
  /** Under the title. */
  lead?: ReactNode;
  /** The one main action of the page. */
  action?: ReactNode;
  children: ReactNode;
}

/** The frame of every page at the desk. */
export function Page({ title, tabTitle, above, lead, action, children }: PageProps) {
  useTabTitle(tabTitle ?? (typeof title === 'string' ? title : null));
  return (
    <div className="mx-auto w-full max-w-[84rem] px-5 pb-16 pt-6 sm:px-8 lg:px-12 lg:pt-9">
      <header className="flex flex-wrap items-end justify-between gap-x-8 gap-y-5">
        <div className="min-w-0 flex-1 basis-80">
          {above ? <div className="mb-2 text-body text-soft">{above}</div> : null}
          <h1 tabIndex={-1} className="text-display text-balance break-words">
            {title}
          </h1>
          {lead ? <div className="mt-3 max-w-prose text-lead text-soft">{lead}</div> : null}
        </div>
        {action ? <div className="max-w-full">{action}</div> : null}
      </header>
      <div className="mt-9 grid gap-12">{children}</div>
    </div>
  );
}

export function useTabTitle(title: string | null): void {
  useEffect(() => {
    document.title = title ? `${title} · Steepfall` : 'Steepfall';
  }, [title]);
}
