import { Dialog, DialogBackdrop, DialogPanel, DialogTitle } from '@headlessui/react';
import { useEffect, useRef, type ReactNode } from 'react';
import { alertWords, isFault } from '@steepfall/shared/runs';
import { PressButton } from '#components/press-button.tsx';
import { ShapeGlyph } from '#components/shapes.tsx';
import { useRunState, useRunStore } from '#lib/run-store/run-context.tsx';
import { heardCommands, takeOverAlert } from '#lib/run-store/take-over.ts';
import { useUnits } from '#lib/units.ts';
import { LiveFigure } from './live-temperature.tsx';

interface SheetDialogProps {
  isOpen: boolean;
  onClose: () => void;
  title: ReactNode;
  children: ReactNode;
  /** From the side, over the full height: for lists. */
  isSide?: boolean;
}

/** A panel over the run sheet. The live temperature stays in sight above it, and focus goes back to the step. */
export function SheetDialog({ isOpen, onClose, title, children, isSide = false }: SheetDialogProps) {
  const wasOpen = useRef(false);
  useEffect(() => {
    if (isOpen) {
      wasOpen.current = true;
      return undefined;
    }
    if (!wasOpen.current) return undefined;
    wasOpen.current = false;
    // The dialog hands the focus to the button it came from: the next pedal press must not meet it there.
    const timer = setTimeout(() => document.getElementById('step-heading')?.focus({ preventScroll: true }), 60);
    return () => clearTimeout(timer);
  }, [isOpen]);
  return (
    <Dialog open={isOpen} onClose={onClose} className="relative z-40">
      <DialogBackdrop className="fixed inset-0 bg-[#0c1714]/60" />
      <div className="fixed inset-0 flex">
        <DialogPanel className={isSide ? 'sheet-panel sheet-panel-side' : 'sheet-panel'}>
          <AlertRow />
          <div className="flex items-center justify-between gap-4">
            <DialogTitle className="text-title">{title}</DialogTitle>
            <button
              type="button"
              onClick={onClose}
              className="min-h-18 min-w-24 cursor-pointer rounded-xl border-2 border-edge px-6 text-lead font-medium"
            >
              Close
            </button>
          </div>
          {children}
        </DialogPanel>
      </div>
    </Dialog>
  );
}

/** An alert takes the screen, and a panel lies over that: it is said, shown and answered in the panel too. */
function AlertRow() {
  const state = useRunState();
  const store = useRunStore();
  const { temperature } = useUnits();
  const alert = takeOverAlert(state);
  if (!alert) return null;
  return (
    <div className="strip sticky top-0 z-10 mr-0! h-auto! min-h-18" data-stage={alert.stage}>
      <ShapeGlyph shape={isFault(alert) ? 'broken' : 'diamond'} className="size-7 shrink-0" />
      <p className="strip-text" role="alert">
        <strong>{isFault(alert) ? 'Fault:' : alert.stage === 'missed' ? 'Late:' : 'Now:'}</strong>{' '}
        {alertWords(state, alert).verb}
      </p>
      {/* Outside what is announced: it changes every second. */}
      <span className="shrink-0 text-lead font-semibold tabular-nums">
        <LiveFigure /> °{temperature}
      </span>
      <PressButton
        className="strip-act"
        onPress={() => {
          for (const command of heardCommands(alert)) void store.act(command);
        }}
      >
        Heard it
      </PressButton>
    </div>
  );
}
