import type { ReactNode } from 'react';
import { classNames } from './class-names.ts';
import { ShapeGlyph } from './shapes.tsx';

/** What happened, what it means, what to do. `act` interrupts a screen reader, `note` does not. */
export function Banner({
  tone = 'note',
  title,
  children,
  action,
}: {
  tone?: 'note' | 'act';
  title: ReactNode;
  children?: ReactNode;
  action?: ReactNode;
}) {
  return (
    <div
      role={tone === 'act' ? 'alert' : 'status'}
      className={classNames(
        'flex flex-wrap items-center gap-x-6 gap-y-3 border-l-8 bg-raised px-5 py-4',
        tone === 'act' ? 'border-ember-line' : 'border-text',
      )}
    >
      <div className="min-w-60 flex-1">
        <p
          className={classNames('flex items-baseline gap-2.5 text-body font-semibold', tone === 'act' && 'text-ember')}
        >
          {tone === 'act' ? <ShapeGlyph shape="diamond" className="size-3.5 shrink-0" /> : null}
          {title}
        </p>
        {children ? <div className="mt-1 text-body">{children}</div> : null}
      </div>
      {action}
    </div>
  );
}
