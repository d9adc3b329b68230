import { useState } from 'react';
import { createRevisionSchema } from '@steepfall/shared/contracts';
import { differenceWords, type Difference } from '@steepfall/shared/desk';
import { Description, Field, Label, Textarea } from '@headlessui/react';
import { Dialog } from '#components/dialog.tsx';
import { SendForm } from '#components/send-form.tsx';
import { DifferenceList } from './difference-list.tsx';

const MOST_LETTERS = 400;
const noteSchema = createRevisionSchema.shape.note;

/** The note as it is proposed: the differences in a row, as many as fit. */
export function proposedNote(differences: readonly Difference[]): string {
  const words = differences.map(differenceWords);
  while (words.length > 1 && `${words.join('; ')}.`.length > MOST_LETTERS) words.pop();
  return words.length > 0 ? `${words.join('; ')}.`.slice(0, MOST_LETTERS) : '';
}

interface SaveDialogProps {
  onClose: () => void;
  onSave: (note: string) => void;
  isNew: boolean;
  differences: readonly Difference[];
  isBusy: boolean;
  error: Error | null;
}

/** What was changed and why: the reader of the history is the brewer in a year. */
export function SaveDialog({ onClose, onSave, isNew, differences, isBusy, error }: SaveDialogProps) {
  const [note, setNote] = useState(() => (isNew ? 'First version.' : proposedNote(differences)));
  const checked = noteSchema.safeParse(note);
  const message = checked.success ? undefined : checked.error.issues[0]?.message;
  return (
    <Dialog isOpen onClose={onClose} title={isNew ? 'Save the recipe' : 'Save as a new revision'} size="wide">
      <SendForm
        onSubmit={(event) => {
          event.preventDefault();
          if (checked.success) onSave(checked.data);
        }}
        onClose={onClose}
        act="Save"
        busyLabel="Saving"
        isBusy={isBusy}
        failedTitle="The recipe was not saved"
        error={error}
      >
        {differences.length > 0 ? <DifferenceList differences={differences} /> : null}
        <Field className="grid gap-1.5">
          <Label className="text-body font-medium">What did you change, and why?</Label>
          <Description className="text-note text-soft">It stands in the history beside the revision.</Description>
          <Textarea
            rows={4}
            value={note}
            invalid={message !== undefined}
            onChange={({ target }) => setNote(target.value)}
            className="w-full rounded-lg border-2 border-edge bg-raised px-4 py-3 text-body data-invalid:border-ember"
          />
          {message ? (
            <Description role="alert" className="text-note font-medium text-ember">
              {message} {note.length} now.
            </Description>
          ) : null}
        </Field>
      </SendForm>
    </Dialog>
  );
}
