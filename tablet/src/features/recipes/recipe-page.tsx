import { useMemo, useState } from 'react';
import { useQuery } from '@tanstack/react-query';
import type { Recipe } from '@steepfall/shared/contracts';
import { Link, useNavigate, useParams, useSearchParams } from 'react-router-dom';
import { Banner } from '#components/banner.tsx';
import { Button, ButtonLink } from '#components/button.tsx';
import { EmptyState } from '#components/empty-state.tsx';
import { Menu } from '#components/menu.tsx';
import { Page } from '#components/page.tsx';
import { Failed, Waiting } from '#components/quiet-state.tsx';
import { HubProblemError } from '#lib/http.ts';
import { recipeQuery } from '#lib/hub-queries.ts';
import { useKnown, useMay } from '#lib/session.ts';
import { failureWords } from '#lib/words.ts';
import { useDeskKit } from './desk-kit.tsx';
import { readDraft } from './drafts.ts';
import { History } from './history.tsx';
import { PlanBatchDialog } from './plan-batch-dialog.tsx';
import { RevisionView } from './revision-view.tsx';
import { ScaleDialog, type ScaleWay } from './scale-dialog.tsx';
import { sinceWords } from './since-words.ts';
import { useArchive } from './use-archive.ts';

export function RecipePage() {
  const { recipeId = '' } = useParams();
  const recipe = useQuery(recipeQuery(recipeId));
  if (!recipe.data) {
    const isGone = recipe.error instanceof HubProblemError && recipe.error.problem.status === 404;
    return (
      <Page title={isGone ? 'No such recipe' : 'Recipe'}>
        {recipe.error ? (
          <Failed title="The recipe could not be fetched" onRetry={() => void recipe.refetch()}>
            {failureWords(recipe.error)}
          </Failed>
        ) : (
          <Waiting>Fetching the recipe.</Waiting>
        )}
      </Page>
    );
  }
  return <RecipeView recipe={recipe.data} />;
}

function RecipeView({ recipe }: { recipe: Recipe }) {
  const navigate = useNavigate();
  const may = useMay();
  const mayEdit = may('recipes:manage');
  const revisions = useMemo(() => recipe.revisions.toSorted((a, b) => b.number - a.number), [recipe]);
  const [search, setSearch] = useSearchParams();
  const [isPlanning, setIsPlanning] = useState(false);
  const [scaleTo, setScaleTo] = useState<ScaleWay | null>(null);
  const { kettles, resolutionG } = useDeskKit();
  const archive = useArchive();
  const revision = revisions.find(({ number }) => String(number) === search.get('revision')) ?? revisions[0];
  if (!revision) {
    return (
      <Page title={recipe.name} lead={recipe.summary}>
        <EmptyState>This recipe has no revision yet.</EmptyState>
      </Page>
    );
  }
  const isNewest = revision === revisions[0];
  const editPath = `/recipes/${recipe.id}/edit${isNewest ? '' : `?from=${revision.id}`}`;
  const show = (revisionId: string) => {
    const shown = revisions.find(({ id }) => id === revisionId);
    setSearch(shown && shown !== revisions[0] ? { revision: String(shown.number) } : {});
    window.scrollTo({ top: 0 });
  };
  return (
    <Page
      title={recipe.name}
      above={
        <>
          <Link
            to="/recipes"
            className="underline decoration-hair decoration-2 underline-offset-4 hover:decoration-text"
          >
            Recipes
          </Link>
          , revision {revision.number} of {revisions.length}
          {recipe.isArchived ? ', archived' : ''}
        </>
      }
      lead={recipe.summary}
      action={
        <div className="flex flex-wrap items-center gap-2">
          {may('batches:manage') ? (
            <Button look="primary" onClick={() => setIsPlanning(true)}>
              Plan a batch
            </Button>
          ) : null}
          {mayEdit ? (
            <>
              <ButtonLink to={editPath}>{isNewest ? 'Change' : 'Go back to this one'}</ButtonLink>
              <Menu
                label="More"
                choices={[
                  { label: 'Scale', onChoose: () => setScaleTo('volume') },
                  {
                    label: 'Copy',
                    onChoose: () => void navigate(`/recipes/new?copy=${recipe.id}&revision=${revision.id}`),
                  },
                  {
                    label: recipe.isArchived ? 'Bring back' : 'Archive',
                    onChoose: () =>
                      archive.mutate({ id: recipe.id, name: recipe.name, isArchived: !recipe.isArchived }),
                  },
                ]}
              />
            </>
          ) : null}
        </div>
      }
    >
      {archive.isError ? (
        <Banner tone="act" title="It was not archived">
          {failureWords(archive.error)}
        </Banner>
      ) : null}
      {mayEdit ? <DraftNote recipeId={recipe.id} /> : null}
      <RevisionView key={revision.id} revision={revision} />
      <History recipeId={recipe.id} revisions={revisions} shownId={revision.id} onShow={show} mayEdit={mayEdit} />
      <PlanBatchDialog
        revision={revision}
        recipeName={recipe.name}
        isOpen={isPlanning}
        onClose={() => setIsPlanning(false)}
        onScale={
          mayEdit
            ? () => {
                setIsPlanning(false);
                setScaleTo('stores');
              }
            : null
        }
      />
      {scaleTo ? (
        <ScaleDialog
          firstWay={scaleTo}
          document={revision.document}
          kettles={kettles}
          resolutionG={resolutionG}
          onTake={(document) => void navigate(`/recipes/${recipe.id}/edit`, { state: { document, because: 'scaled' } })}
          onClose={() => setScaleTo(null)}
        />
      ) : null}
    </Page>
  );
}

/** What was typed here and never saved. */
function DraftNote({ recipeId }: { recipeId: string }) {
  const { house, member } = useKnown();
  const [since] = useState(() => {
    const draft = readDraft({ houseId: house.id, memberId: member.id }, recipeId);
    return draft && sinceWords(draft.savedAtMs, Date.now());
  });
  if (since === null) return null;
  return (
    <Banner
      title={`You changed this ${since} and did not save`}
      action={<ButtonLink to={`/recipes/${recipeId}/edit`}>Look at it</ButtonLink>}
    >
      It is kept on this device.
    </Banner>
  );
}
