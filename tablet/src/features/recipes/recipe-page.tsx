import { useMemo, useState } from 'react';
import { useQuery } from '@tanstack/react-query';
import type { Recipe, Revision } from '@steepfall/shared/contracts';
import { compileSheet, type RecipeDocument, type RunSheet } from '@steepfall/shared/sheets';
import { formatDuration, formatMass, formatTemp, formatVolume } from '@steepfall/shared/units';
import { format } from 'date-fns';
import { useParams } from 'react-router-dom';
import { Button } from '#components/button.tsx';
import { EmptyState } from '#components/empty-state.tsx';
import { SelectField } from '#components/field.tsx';
import { LevelRule } from '#components/level-rule.tsx';
import { Page } from '#components/page.tsx';
import { Failed, Waiting } from '#components/quiet-state.tsx';
import { recipeQuery } from '#lib/hub-queries.ts';
import { HubProblemError } from '#lib/http.ts';
import { useKnown, useMay } from '#lib/session.ts';
import { failureWords } from '#lib/words.ts';
import { PlanBatchDialog } from './plan-batch-dialog.tsx';
import { levelsOf, PlannedLine } from './planned-line.tsx';
import { SheetSteps } from './sheet-steps.tsx';

/** What the sheet is compiled for when nobody in particular reads it. */
const USUAL_REACH_S = 10;
const unit = 'C' as const;

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
  const may = useMay();
  const revisions = useMemo(() => recipe.revisions.toSorted((a, b) => b.number - a.number), [recipe]);
  const [chosenId, setChosenId] = useState<string | null>(null);
  const [isPlanning, setIsPlanning] = useState(false);
  const revision = revisions.find(({ id }) => id === chosenId) ?? revisions[0];
  if (!revision) {
    return (
      <Page title={recipe.name} lead={recipe.summary}>
        <EmptyState>This recipe has no revision yet.</EmptyState>
      </Page>
    );
  }
  return (
    <Page
      title={recipe.name}
      above={`revision ${revision.number} of ${revisions.length}`}
      lead={recipe.summary}
      action={
        may('batches:manage') ? (
          <Button look="primary" size="sheet" onClick={() => setIsPlanning(true)}>
            Plan a batch
          </Button>
        ) : null
      }
    >
      {revisions.length > 1 ? (
        <div className="max-w-md">
          <SelectField label="Revision" value={revision.id} onChange={(event) => setChosenId(event.target.value)}>
            {revisions.map(({ id, number, createdAtMs }) => (
              <option key={id} value={id}>
                {number}, {format(createdAtMs, 'd MMMM yyyy')}
              </option>
            ))}
          </SelectField>
        </div>
      ) : null}
      <RevisionView revision={revision} />
      <PlanBatchDialog
        revision={revision}
        recipeName={recipe.name}
        isOpen={isPlanning}
        onClose={() => setIsPlanning(false)}
      />
    </Page>
  );
}

function compiled(document: RecipeDocument, altitudeM: number): RunSheet | string {
  try {
    return compileSheet(document, { altitudeM, reachS: USUAL_REACH_S });
  } catch (error) {
    return error instanceof RangeError ? error.message : 'This revision gives no run sheet.';
  }
}

function RevisionView({ revision }: { revision: Revision }) {
  const { house } = useKnown();
  const { document, note, createdBy, createdAtMs } = revision;
  const sheet = useMemo(() => compiled(document, house.altitudeM), [document, house.altitudeM]);
  return (
    <>
      {note ? (
        <p className="max-w-prose border-l-4 border-edge pl-5 text-lead">
          {note}
          <span className="mt-1 block text-body text-soft">
            {createdBy}, {format(createdAtMs, 'd MMMM yyyy')}
          </span>
        </p>
      ) : null}
      <div className="grid gap-x-14 gap-y-12 xl:grid-cols-[1fr_1.35fr]">
        <WhatGoesIn document={document} />
        <section aria-labelledby="levels" className="grid min-w-0 content-start gap-5">
          <LevelRule id="levels">The levels of the day</LevelRule>
          <PlannedLine document={document} />
          <Targets document={document} />
        </section>
      </div>
      <section aria-labelledby="sheet" className="grid min-w-0 gap-5">
        <LevelRule id="sheet" aside={typeof sheet === 'string' ? null : `${sheet.steps.length} steps`}>
          The run sheet it gives
        </LevelRule>
        {typeof sheet === 'string' ? <p className="text-lead text-ember">{sheet}</p> : <SheetSteps sheet={sheet} />}
      </section>
    </>
  );
}

const kindWords = { salt: 'salt', acid: 'acid', tea: 'tea', hops: 'hops', other: '' } as const;

function WhatGoesIn({ document }: { document: RecipeDocument }) {
  return (
    <section aria-labelledby="goes-in" className="grid min-w-0 content-start gap-5">
      <LevelRule id="goes-in">What goes in</LevelRule>
      <ul>
        <Ingredient
          mass={formatVolume(document.waterL, { unit: 'L' })}
          name={document.waters.map(({ name }) => name).join(', ')}
          note={`for ${formatVolume(document.volumeL, { unit: 'L' })} of drink`}
        />
        {document.additions.map(({ id, kind, name, massG, bag }) => (
          <Ingredient
            key={id}
            mass={formatMass(massG, { unit: 'g' })}
            name={name}
            note={[kindWords[kind], bag].filter(Boolean).join(', ')}
          />
        ))}
      </ul>
    </section>
  );
}

function Ingredient({ mass, name, note }: { mass: string; name: string; note: string }) {
  return (
    <li className="grid grid-cols-[6.5rem_1fr] items-baseline gap-x-5 border-b border-hair py-3">
      <span className="text-right text-lead font-semibold tabular-nums">{mass}</span>
      <span className="text-lead">
        {name} <span className="text-body text-soft">{note}</span>
      </span>
    </li>
  );
}

function Targets({ document }: { document: RecipeDocument }) {
  const { targets, gas, transferC } = document;
  const { steep, hops } = levelsOf(document);
  const rows: [string, string][] = [
    ['pH before the heat', `${targets.waterPh.min} to ${targets.waterPh.max}`],
    ['Steep', `${formatDuration(steep.durationS)} from ${formatTemp(steep.tempC, { unit })}`],
    ['Hops', `from ${formatTemp(hops.inC, { unit })} to ${formatTemp(hops.outC, { unit })}`],
    ['Into the keg', `at ${formatTemp(transferC, { unit })}`],
    ['Gas', `${gas.volumes} volumes at ${formatTemp(gas.tempC, { unit })}`],
  ];
  return (
    <dl className="grid gap-x-10 sm:grid-cols-2">
      {rows.map(([term, words]) => (
        <div key={term} className="flex items-baseline justify-between gap-4 border-b border-hair py-2.5 text-body">
          <dt className="text-soft">{term}</dt>
          <dd className="text-right font-medium tabular-nums">{words}</dd>
        </div>
      ))}
    </dl>
  );
}
