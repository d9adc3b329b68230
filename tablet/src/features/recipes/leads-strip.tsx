import { useState, type ReactNode } from 'react';
import { classNames } from '#components/class-names.ts';
import { Dialog } from '#components/dialog.tsx';
import { Button } from '#components/button.tsx';
import { useUnits } from '#lib/units.ts';
import { figureText } from '#lib/figure-words.ts';
import type { Desk } from './use-desk.ts';

/** What a brewer looks at first, in few letters; a phone has room for three. */
const first = [
  { id: 'acid.ph-still', word: 'pH' },
  { id: 'tea.caffeine', word: 'Caffeine' },
  { id: 'hops.bitterness', word: 'Bitterness' },
  { id: 'yield.keg', word: 'In the keg' },
] as const;

interface LeadsStripProps {
  desk: Desk;
  /** All that stands beside the form on a larger screen; `close` goes back to where one was. */
  children: (close: () => void) => ReactNode;
}

/** Where there is no room beside the form: the leads at the foot, always in sight; a tap opens the rest over it. */
export function LeadsStrip({ desk, children }: LeadsStripProps) {
  const units = useUnits();
  const [isOpen, setIsOpen] = useState(false);
  const { figures, moved, isOld } = desk;
  const leads = first.flatMap(({ id, word }) => {
    const row = figures?.rows.find((each) => each.id === id);
    return row ? [{ row, word }] : [];
  });
  // Before anything goes in, there is nothing to look out for yet.
  const warned = desk.document?.additions.length ? (figures?.warnings.length ?? 0) : 0;
  const close = () => setIsOpen(false);
  return (
    <>
      <div
        data-foot
        className="fixed inset-x-0 bottom-18 z-20 border-t-2 border-text bg-ground pb-[env(safe-area-inset-bottom)] md:bottom-0 md:left-28 xl:hidden"
      >
        <button
          type="button"
          aria-haspopup="dialog"
          onClick={() => setIsOpen(true)}
          className="flex min-h-16 w-full cursor-pointer items-center justify-between gap-4 px-5 text-left"
        >
          <span className={classNames('flex min-w-0 gap-x-6 overflow-hidden', isOld && 'text-soft')}>
            {leads.map(({ row, word }, index) => (
              <span key={row.id} className={classNames('grid min-w-0', index > 2 && 'max-sm:hidden')}>
                <span className="truncate text-note text-soft">{word}</span>
                <span
                  className={classNames(
                    'truncate text-body font-semibold tabular-nums',
                    moved.has(row.id) && 'underline decoration-2 underline-offset-4',
                  )}
                >
                  {figureText(row, units).value}
                </span>
              </span>
            ))}
            {leads.length === 0 ? <span className="text-body">Line and figures</span> : null}
          </span>
          <span className="shrink-0 text-right text-note font-medium">
            <span className="block underline decoration-hair decoration-2 underline-offset-4">All figures</span>
            {warned > 0 ? <span className="block text-soft">{warned} to look at</span> : null}
          </span>
        </button>
      </div>
      {isOpen ? (
        <Dialog isOpen onClose={close} title="Line and figures" size="wide">
          {children(close)}
          <div className="sticky bottom-0 -mx-6 -mb-6 mt-8 border-t-2 border-hair bg-ground px-6 py-3 sm:-mx-8 sm:-mb-8 sm:rounded-b-2xl sm:px-8">
            <Button onClick={close}>Back to the recipe</Button>
          </div>
        </Dialog>
      ) : null}
    </>
  );
}
