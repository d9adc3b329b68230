import type { FormEventHandler, ReactNode } from 'react';
import { isOvertaken } from '#lib/save-at-version.ts';
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

/**
 * The form of a dialog: its fields, what went wrong, and the two ways out. When somebody else was faster, what was typed stays, and a
 * second press is meant: forms that change something use `useVersion`.
 */
export function SendForm({ onSubmit, onClose, act, busyLabel, isBusy, failedTitle, error, children }: SendFormProps) {
  const isSecond = isOvertaken(error);
  return (
    <form noValidate className="grid gap-5" onSubmit={onSubmit}>
      {children}
      {error ? (
        <Banner tone="act" title={failedTitle}>
          {isSecond
            ? 'Somebody else changed it while you were at it. What you typed still stands here: save it over theirs, or close and look at theirs first.'
            : failureWords(error)}
        </Banner>
      ) : null}
      <div className="flex flex-wrap gap-3">
        <Button look="primary" type="submit" isBusy={isBusy} busyLabel={busyLabel}>
          {isSecond ? 'Save mine over theirs' : act}
        </Button>
        <Button onClick={onClose}>Close</Button>
      </div>
    </form>
  );
}
