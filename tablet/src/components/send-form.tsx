import type { FormEventHandler, ReactNode } from 'react';
import { failureWords } from '#lib/words.ts';
import { Banner } from './banner.tsx';
import { Button } from './button.tsx';

interface SendFormProps {
  onSubmit: FormEventHandler<HTMLFormElement>;
  onClose: () => void;
  /** On the button: "Add". */
  act: string;
  /** On the button while it is on its way: "Adding". */
  busyLabel: string;
  isBusy: boolean;
  /** What did not happen: "The probe was not added". */
  failedTitle: string;
  /** What the fields do not say themselves; `null` when there is nothing. */
  error: Error | null;
  children: ReactNode;
}

/** The form of a dialog: its fields, what went wrong, and the two ways out. */
export function SendForm({ onSubmit, onClose, act, busyLabel, isBusy, failedTitle, error, children }: SendFormProps) {
  return (
    <form noValidate className="grid gap-5" onSubmit={onSubmit}>
      {children}
      {error ? (
        <Banner tone="act" title={failedTitle}>
          {failureWords(error)}
        </Banner>
      ) : null}
      <div className="flex flex-wrap gap-3">
        <Button look="primary" type="submit" isBusy={isBusy} busyLabel={busyLabel}>
          {act}
        </Button>
        <Button onClick={onClose}>Close</Button>
      </div>
    </form>
  );
}
