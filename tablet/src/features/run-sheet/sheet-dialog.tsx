import { Dialog, DialogBackdrop, DialogPanel, DialogTitle } from '@headlessui/react';
import { useEffect, useRef, type ReactNode } from 'react';

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
