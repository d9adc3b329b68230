import { useMutation, useQuery, useQueryClient } from '@tanstack/react-query';
import { recipeSchema, type Recipe, type RunSummary } from '@steepfall/shared/contracts';
import { withLearnedBase, type LearnedBase } from '@steepfall/shared/runs';
import { Banner } from '#components/banner.tsx';
import { Button, ButtonLink } from '#components/button.tsx';
import { callHubFor } from '#lib/api-client.ts';
import { batchQuery, recipeQuery } from '#lib/hub-queries.ts';
import { useMay } from '#lib/session.ts';
import { failureWords } from '#lib/words.ts';

interface LeafBaseProposalProps {
  learned: LearnedBase;
  run: RunSummary;
}

/** Nobody's meter tells one leaf from another by less. */
const SAME_WITHIN = 0.03;

/** What a measured pH taught of this leaf, offered for the next revision: nothing changes until somebody takes it. */
export function LeafBaseProposal({ learned, run }: LeafBaseProposalProps) {
  const may = useMay();
  const client = useQueryClient();
  const batch = useQuery({ ...batchQuery(run.batchId ?? ''), enabled: run.batchId !== null });
  const recipeId = batch.data?.recipeId ?? '';
  const recipe = useQuery({ ...recipeQuery(recipeId), enabled: recipeId !== '' && may('recipes:read') });
  const save = useMutation({
    mutationFn: ({ revisions }: Recipe) => {
      const newest = revisions.reduce((best, one) => (one.number > best.number ? one : best));
      const note = `${what} ${ratio} times the usual base, from pH ${learned.measuredPh} of batch ${run.batchNumber ?? ''}.`;
      const body = { baseRevisionId: newest.id, note, document: withLearnedBase(newest.document, learned) };
      return callHubFor(recipeSchema, `recipes/${recipeId}/revisions`, { method: 'POST', body });
    },
    onSuccess: (saved) => {
      client.setQueryData(recipeQuery(saved.id).queryKey, saved);
      return client.invalidateQueries({ queryKey: ['recipes'] });
    },
  });
  const ratio = learned.ratio.toFixed(2);
  const what =
    learned.of.length === 2
      ? 'This tea and these hops bring'
      : learned.of[0] === 'tea'
        ? 'This tea brings'
        : 'These hops bring';
  const newest = recipe.data?.revisions.reduce((best, one) => (one.number > best.number ? one : best));
  const known =
    newest && (learned.of.includes('tea') ? newest.document.assume.teaBaseRatio : newest.document.assume.hopBaseRatio);
  const isKnown = known !== undefined && Math.abs(known - learned.ratio) <= SAME_WITHIN * learned.ratio;
  return (
    <section aria-label="A proposal" className="grid max-w-prose gap-3 border-l-4 border-edge pl-5">
      <p className="text-lead">
        Measured pH {learned.measuredPh}: {what.toLowerCase()} {ratio} times the base that is usual. With that in the
        recipe, the next pH is good to about 0.1.
      </p>
      {save.data ? (
        <div className="flex flex-wrap items-center gap-4">
          <p role="status" className="text-body">
            Saved as a revision of its own.
          </p>
          <ButtonLink to={`/recipes/${recipeId}`}>Look at it</ButtonLink>
        </div>
      ) : isKnown ? (
        <p className="text-body text-soft">The newest revision has that already.</p>
      ) : recipe.data && may('recipes:manage') ? (
        <Button isBusy={save.isPending} busyLabel="Saving it" onClick={() => save.mutate(recipe.data)}>
          Take it into the next revision
        </Button>
      ) : null}
      {save.error ? (
        <Banner tone="act" title="The recipe is as it was">
          {failureWords(save.error)}
        </Banner>
      ) : null}
    </section>
  );
}
