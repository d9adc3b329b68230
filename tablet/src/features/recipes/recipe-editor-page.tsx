import { useState } from 'react';
import { useQuery } from '@tanstack/react-query';
import type { Recipe, Revision } from '@steepfall/shared/contracts';
import { recipeDocumentSchema, type RecipeDocument } from '@steepfall/shared/sheets';
import { useLocation, useParams, useSearchParams } from 'react-router-dom';
import { z } from 'zod';
import { Page } from '#components/page.tsx';
import { Failed, Waiting } from '#components/quiet-state.tsx';
import { HubProblemError } from '#lib/http.ts';
import { recipeQuery } from '#lib/hub-queries.ts';
import { useKnown } from '#lib/session.ts';
import { offerUndo } from '#lib/undo.ts';
import { failureWords } from '#lib/words.ts';
import { DraftChoice } from './draft-choice.tsx';
import { dropDraft, keepDraft, readDraft, type Draft } from './drafts.ts';
import { RecipeEditor } from './recipe-editor.tsx';
import { blankForm, type RecipeForm } from './recipe-form.ts';

/** What another page hands over to be taken into the desk unsaved: a scaled recipe, say. It survives a reload. */
const handedSchema = z.object({ document: recipeDocumentSchema, because: z.string() });

/** `/recipes/new`, with `?copy=` the recipe and `&revision=` the revision to start from; `/recipes/:id/edit`, with `?from=` an older revision. */
export function RecipeEditorPage() {
  const { recipeId } = useParams();
  const [search] = useSearchParams();
  const sourceId = recipeId ?? search.get('copy');
  const source = useQuery({ ...recipeQuery(sourceId ?? ''), enabled: sourceId !== null });
  if (sourceId !== null && !source.data) {
    const isGone = source.error instanceof HubProblemError && source.error.problem.status === 404;
    return (
      <Page title={isGone ? 'No such recipe' : 'Recipe'}>
        {source.error ? (
          <Failed title="The recipe could not be fetched" onRetry={() => void source.refetch()}>
            {failureWords(source.error)}
          </Failed>
        ) : (
          <Waiting>Fetching the recipe.</Waiting>
        )}
      </Page>
    );
  }
  // Another address is another desk: nothing of the one before may stay in the form.
  return (
    <Opened
      key={`${recipeId ?? 'new'}?${search.toString()}`}
      source={source.data ?? null}
      isNew={recipeId === undefined}
    />
  );
}

function newest(recipe: Recipe): Revision | null {
  return recipe.revisions.toSorted((a, b) => b.number - a.number)[0] ?? null;
}

interface Start {
  recipe: Recipe | null;
  base: Revision | null;
  /** What is saved; null for a new one. */
  saved: RecipeForm | null;
  form: RecipeForm;
}

function startOf(
  source: Recipe | null,
  isNew: boolean,
  revisionId: string | null,
  handed: RecipeDocument | null,
): Start {
  if (!source) return { recipe: null, base: null, saved: null, form: blankForm() };
  const base = newest(source);
  const from = source.revisions.find(({ id }) => id === revisionId) ?? base;
  const document = handed ?? from?.document ?? blankForm().document;
  const { name, summary } = source;
  if (isNew) {
    return { recipe: null, base: null, saved: null, form: { name: `${name}, copy`.slice(0, 80), summary, document } };
  }
  return {
    recipe: source,
    base,
    saved: base ? { name, summary, document: base.document } : null,
    form: { name, summary, document },
  };
}

function Opened({ source, isNew }: { source: Recipe | null; isNew: boolean }) {
  const { house, member } = useKnown();
  const { state } = useLocation();
  const [search] = useSearchParams();
  const draftKey = isNew ? 'new' : (source?.id ?? 'new');
  const person = { houseId: house.id, memberId: member.id };
  // Once, when the page opens: what is fetched again later must not reach into what is being typed.
  const [start] = useState(() => {
    const handed = handedSchema.safeParse(state);
    const revisionId = search.get(isNew ? 'revision' : 'from');
    return startOf(source, isNew, revisionId, handed.success ? handed.data.document : null);
  });
  const [draft, setDraft] = useState<Draft | null>(() => readDraft(person, draftKey));
  const [taken, setTaken] = useState<Draft | null>(null);

  if (draft && !taken) {
    return (
      <DraftChoice
        draft={draft}
        name={start.recipe?.name ?? (draft.form.name || 'A new recipe')}
        saved={start.recipe?.revisions.find(({ id }) => id === draft.baseRevisionId)?.document ?? null}
        onGoOn={() => setTaken(draft)}
        onPutAway={() => {
          dropDraft(person, draftKey);
          setDraft(null);
          offerUndo('Put away.', () => {
            keepDraft(person, draftKey, draft);
            setDraft(draft);
            setTaken(null);
            return Promise.resolve();
          });
        }}
      />
    );
  }
  const base = taken
    ? (start.recipe?.revisions.find(({ id }) => id === taken.baseRevisionId) ?? start.base)
    : start.base;
  return (
    <RecipeEditor
      key={taken ? 'draft' : 'start'}
      recipe={start.recipe}
      base={base}
      saved={start.saved && base ? { ...start.saved, document: base.document } : start.saved}
      start={taken?.form ?? start.form}
      draftKey={draftKey}
    />
  );
}
