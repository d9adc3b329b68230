import type { Revision } from '@steepfall/shared/contracts';
import { combineRevisions, revisionDifferences } from '@steepfall/shared/desk';
import type { RecipeDocument } from '@steepfall/shared/sheets';
import { Banner } from '#components/banner.tsx';
import { Button } from '#components/button.tsx';
import { Dialog } from '#components/dialog.tsx';
import { useUnits } from '#lib/units.ts';
import { failureWords } from '#lib/words.ts';
import { DifferenceList } from './difference-list.tsx';

export interface Conflict {
  base: Revision;
  theirs: Revision;
  mine: RecipeDocument;
  note: string;
}

export type Way = 'join' | 'on-top' | 'own-recipe';

interface ConflictDialogProps {
  conflict: Conflict;
  /** `document` is what is to be saved. */
  onChoose: (way: Way, document: RecipeDocument) => void;
  onGoOn: () => void;
  isBusy: boolean;
  error: Error | null;
}

/** Somebody saved meanwhile. Nothing is lost in any of the ways out, and each says what becomes of both. */
export function ConflictDialog({ conflict, onChoose, onGoOn, isBusy, error }: ConflictDialogProps) {
  const units = useUnits();
  const { base, theirs, mine } = conflict;
  const combined = combineRevisions(base.document, mine, theirs.document, units);
  return (
    <Dialog
      isOpen
      onClose={onGoOn}
      role="alertdialog"
      size="wide"
      title={`${theirs.createdBy} saved revision ${theirs.number} while you were at it`}
    >
      <div className="grid gap-7">
        <div className="grid gap-x-10 gap-y-6 sm:grid-cols-2">
          <Changes title={`${theirs.createdBy} changed`} note={theirs.note}>
            <DifferenceList differences={revisionDifferences(base.document, theirs.document, units)} />
          </Changes>
          <Changes title="You changed" note={conflict.note}>
            <DifferenceList differences={revisionDifferences(base.document, mine, units)} />
          </Changes>
        </div>
        {combined.kind === 'collides' ? (
          <section aria-label="What collides" className="border-l-8 border-ember-line bg-raised px-5 py-4">
            <p className="font-semibold text-ember">Both of you changed the same:</p>
            <ul className="mt-2 grid gap-1">
              {combined.at.map(({ what, mine: yours, theirs: others }) => (
                <li key={what}>
                  <span className="font-medium">{what}</span>: you {yours}, {theirs.createdBy} {others}
                </li>
              ))}
            </ul>
          </section>
        ) : null}
        {error ? (
          <Banner tone="act" title="It was not saved">
            {failureWords(error)}
          </Banner>
        ) : null}
        <ul className="grid">
          {combined.kind === 'combined' ? (
            <Choice
              act="Join both"
              isMain
              isBusy={isBusy}
              onChoose={() => onChoose('join', combined.document)}
              words="Nothing collides: the new revision has their changes and yours."
            />
          ) : null}
          <Choice
            act="Save mine on top"
            isBusy={isBusy}
            onChoose={() => onChoose('on-top', mine)}
            words={`Your version becomes the newest. Revision ${theirs.number} stays in the history.`}
          />
          <Choice
            act="Keep mine as a recipe of its own"
            isBusy={isBusy}
            onChoose={() => onChoose('own-recipe', mine)}
            words="Theirs stays the newest here; yours gets a name of its own beside it."
          />
          <Choice
            act="Go on editing"
            isBusy={isBusy}
            onChoose={onGoOn}
            words="Nothing is saved yet. Your changes stay on this device."
          />
        </ul>
      </div>
    </Dialog>
  );
}

function Changes({ title, note, children }: { title: string; note: string; children: React.ReactNode }) {
  return (
    <section aria-label={title}>
      <h3 className="text-lead font-semibold">{title}</h3>
      {note ? <p className="mt-1 text-note text-soft">“{note}”</p> : null}
      <div className="mt-2">{children}</div>
    </section>
  );
}

interface ChoiceProps {
  act: string;
  words: string;
  onChoose: () => void;
  isBusy: boolean;
  isMain?: boolean;
}

function Choice({ act, words, onChoose, isBusy, isMain = false }: ChoiceProps) {
  return (
    <li className="grid items-center gap-x-6 gap-y-2 border-t border-hair py-3 sm:grid-cols-[15rem_1fr]">
      <Button look={isMain ? 'primary' : 'plain'} onClick={onChoose} disabled={isBusy}>
        {act}
      </Button>
      <p className="text-body text-soft">{words}</p>
    </li>
  );
}
