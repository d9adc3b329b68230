import { useState, type FormEvent } from 'react';
import type { Decision, RunCommand } from '@steepfall/shared/runs';
import { Button } from '#components/button.tsx';

interface NoteSheetProps {
  stepId: string | null;
  onRecord: (command: RunCommand) => Promise<Decision>;
  onClose: () => void;
}

/** A few words about this step, for the record. */
export function NoteSheet({ stepId, onRecord, onClose }: NoteSheetProps) {
  const [text, setText] = useState('');
  const [error, setError] = useState<string | null>(null);
  const record = async (event: FormEvent) => {
    event.preventDefault();
    const decision = await onRecord({ type: 'addNote', text, stepId });
    if (decision.ok) onClose();
    else setError(decision.problem.detail);
  };
  return (
    <form className="grid gap-5" onSubmit={(event) => void record(event)}>
      <label className="grid gap-2 text-lead">
        What is worth knowing next time?
        <textarea
          value={text}
          onChange={({ target }) => setText(target.value)}
          autoFocus
          rows={4}
          maxLength={2000}
          className="w-full rounded-xl border-2 border-edge bg-raised p-5 text-lead text-text"
        />
      </label>
      {error ? (
        <p role="alert" className="text-lead text-ember">
          {error}
        </p>
      ) : null}
      <Button type="submit" look="primary" size="sheet">
        Keep the note
      </Button>
    </form>
  );
}
