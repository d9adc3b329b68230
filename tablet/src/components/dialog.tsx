import { Dialog as HeadlessDialog, DialogBackdrop, DialogPanel, DialogTitle } from '@headlessui/react';
import type { ReactNode } from 'react';
import { classNames } from './class-names.ts';

interface DialogProps {
  isOpen: boolean;
  onClose: () => void;
  title: ReactNode;
  children: ReactNode;
  /** The actions, the main one first. */
  actions?: ReactNode;
  /** `alertdialog` when it interrupts. */
  role?: 'dialog' | 'alertdialog';
  size?: 'narrow' | 'wide';
}

export function Dialog({ isOpen, onClose, title, children, actions, role = 'dialog', size = 'narrow' }: DialogProps) {
  return (
    <HeadlessDialog open={isOpen} onClose={onClose} role={role} className="relative z-40">
      <DialogBackdrop className="fixed inset-0 bg-[#0c1714]/70" />
      <div className="fixed inset-0 overflow-y-auto">
        <div className="flex min-h-full items-end justify-center sm:items-center sm:p-6">
          <DialogPanel
            className={classNames(
              'w-full border-t-4 border-text bg-ground p-6 text-text sm:rounded-b-2xl sm:p-8',
              size === 'wide' ? 'sm:max-w-3xl' : 'sm:max-w-lg',
            )}
          >
            <DialogTitle className="text-title text-balance">{title}</DialogTitle>
            <div className="mt-4 text-body">{children}</div>
            {actions ? <div className="mt-8 flex flex-wrap gap-3">{actions}</div> : null}
          </DialogPanel>
        </div>
      </div>
    </HeadlessDialog>
  );
}
