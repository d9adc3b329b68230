import { useState } from 'react';
import { revisionDifferences } from '@steepfall/shared/desk';
import { recipeDocumentSchema, type RecipeDocument } from '@steepfall/shared/sheets';
import { Button } from '#components/button.tsx';
import { Page } from '#components/page.tsx';
import { useUnits } from '#lib/units.ts';
import { DifferenceList } from './difference-list.tsx';
import type { Draft } from './drafts.ts';
import { sinceWords } from './since-words.ts';

interface DraftChoiceProps {
  draft: Draft;
  name: string;
  /** The revision that it started from; null for a new recipe. */
  saved: RecipeDocument | null;
  onGoOn: () => void;
  onPutAway: () => void;
}

/** What was typed and never saved is offered before anything else can be typed over it. */
export function DraftChoice({ draft, name, saved, onGoOn, onPutAway }: DraftChoiceProps) {
  const units = useUnits();
  const [since] = useState(() => sinceWords(draft.savedAtMs, Date.now()));
  const typed = recipeDocumentSchema.safeParse(draft.form.document);
  const differences = saved && typed.success ? revisionDifferences(saved, typed.data, units) : [];
  return (
    <Page title={name} above="not saved">
      <section aria-label="What was not saved" className="grid max-w-2xl gap-6">
        <p className="text-lead">You changed this {since} and did not save. It is kept on this device.</p>
        {differences.length > 0 ? <DifferenceList differences={differences} /> : null}
        {typed.success ? null : <p className="text-body text-soft">One of its fields still needs another look.</p>}
        <div className="flex flex-wrap gap-3">
          <Button look="primary" onClick={onGoOn}>
            Go on with it
          </Button>
          <Button onClick={onPutAway}>Put it away</Button>
        </div>
      </section>
    </Page>
  );
}
