import { useEffect, useState } from 'react';
import { endUndo, undoable, type Undoable } from '#lib/undo.ts';
import { useStored } from '#lib/value-store.ts';
import { failureWords } from '#lib/words.ts';
import { Button } from './button.tsx';

/** Long enough to read it, think, and get there with a keyboard; it waits while somebody is at it. */
const STAYS_MS = 20_000;

/** "Keg B removed. Undo": mounted once, so that a screen reader hears what appears in it. Filled by `offerUndo`. It stands above what a page has at its foot. */
export function UndoStrip() {
  const offer = useStored(undoable);
  return (
    <div
      role="status"
      className="pointer-events-none fixed inset-x-0 bottom-22 z-30 grid justify-items-center px-4 md:bottom-6 max-xl:[body:has([data-foot])_&]:bottom-38 md:max-xl:[body:has([data-foot])_&]:bottom-20"
    >
      {offer ? <Offer key={offer.key} offer={offer} /> : null}
    </div>
  );
}

function Offer({ offer: { key, words, undo } }: { offer: Undoable }) {
  const [isHeld, setIsHeld] = useState(false);
  const [isUndoing, setIsUndoing] = useState(false);
  const [failure, setFailure] = useState<string | null>(null);
  const stays = isHeld || isUndoing || failure !== null;
  useEffect(() => {
    if (stays) return;
    const timer = setTimeout(() => endUndo(key), STAYS_MS);
    return () => clearTimeout(timer);
  }, [key, stays]);

  const held = {
    onFocus: () => setIsHeld(true),
    onBlur: () => setIsHeld(false),
    onPointerEnter: () => setIsHeld(true),
    onPointerLeave: () => setIsHeld(false),
  };
  const takeBack = async () => {
    setIsUndoing(true);
    setFailure(null);
    try {
      await undo();
      endUndo(key);
    } catch (error) {
      setFailure(failureWords(error));
      setIsUndoing(false);
    }
  };

  return (
    <div className="pointer-events-auto flex max-w-xl flex-wrap items-center gap-x-4 gap-y-1 rounded-lg bg-text py-1.5 pl-5 pr-1.5 text-body text-ground">
      <span className="min-w-0 flex-1 py-2 break-words">{failure === null ? words : `Not taken back. ${failure}`}</span>
      <span className="flex">
        <Button look="onText" {...held} onClick={() => void takeBack()} isBusy={isUndoing} busyLabel="Undoing">
          {failure === null ? 'Undo' : 'Try again'}
        </Button>
        <Button look="onText" {...held} onClick={() => endUndo(key)}>
          Close
        </Button>
      </span>
    </div>
  );
}
