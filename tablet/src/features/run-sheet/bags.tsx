import { useEffect, useState } from 'react';
import { batchPlanSchema, type WeighOutLine } from '@steepfall/shared/contracts';
import type { RunState } from '@steepfall/shared/runs';
import { additionSteps, type StepAmount } from '@steepfall/shared/sheets';
import { formatMass } from '@steepfall/shared/units';
import { batchPlanQuery } from '#lib/hub-queries.ts';
import { keepValue, readKeptAs } from '#lib/kept.ts';
import { queryClient } from '#lib/query-client.ts';
import { useRunState } from '#lib/run-store/run-context.tsx';
import { useUnits } from '#lib/units.ts';

const keyOf = (batchId: string) => `steepfall.bags.${batchId}`;
const weighOutSchema = batchPlanSchema.shape.weighOut;

/** What was weighed for this run and from which lots: kept on this tablet, so that it is there without the hub. */
export function useWeighed(): readonly WeighOutLine[] {
  const state = useRunState();
  const { batchId } = state;
  const [fetched, setFetched] = useState<readonly WeighOutLine[] | null>(() =>
    batchId ? readKeptAs(weighOutSchema, keyOf(batchId)) : null,
  );
  useEffect(() => {
    if (batchId === null) return undefined;
    let isCurrent = true;
    queryClient
      .fetchQuery({ ...batchPlanQuery(batchId), staleTime: 60_000, retry: false })
      .then(({ weighOut }) => {
        keepValue(keyOf(batchId), weighOut);
        if (isCurrent) setFetched(weighOut);
      })
      .catch(() => undefined);
    return () => {
      isCurrent = false;
    };
  }, [batchId]);
  return fetched ?? linesOf(state);
}

/** Without a batch, or without the hub: as the recipe says, from no lot. */
function linesOf({ document }: RunState): WeighOutLine[] {
  return (document?.additions ?? []).map(({ id, kind, name, massG, bag }) => ({
    ...{ additionId: id, kind, name, massG, bag: bag ?? null, lots: [] },
  }));
}

function lotWords({ lots }: WeighOutLine): string {
  return lots.map(({ code }) => `lot ${code}`).join(', ');
}

/** Where an amount of a step was weighed from: "lot S-104"; empty when nobody knows. */
export function lotsOf(
  { name }: StepAmount,
  stepId: string,
  { document }: RunState,
  lines: readonly WeighOutLine[],
): string {
  if (!document) return '';
  const steps = additionSteps(document);
  const own = lines.filter((line) => line.name === name && steps.get(line.additionId)?.inStepId === stepId);
  return own.map(lotWords).filter(Boolean).join(', ');
}

/** Which bag holds what, and when it goes in. */
export function BagsPanel() {
  const state = useRunState();
  const lines = useWeighed();
  const { mass: unit } = useUnits();
  if (lines.length === 0) return <p className="text-lead text-soft">Nothing is weighed out on this sheet.</p>;
  const steps = state.document ? additionSteps(state.document) : new Map<string, { inStepId: string }>();
  const names = [...new Set(lines.map(({ bag }) => bag ?? ''))].sort((a, b) => Number(a === '') - Number(b === ''));
  return (
    <div className="grid gap-6">
      {names.map((bag) => (
        <section key={bag} className="grid gap-1">
          <h3 className="text-lead font-semibold">{bag || 'In no bag'}</h3>
          <ul>
            {lines
              .filter((line) => (line.bag ?? '') === bag)
              .map((line) => {
                const step = state.steps.find((one) => one.step.id === steps.get(line.additionId)?.inStepId);
                return (
                  <li key={line.additionId} className="border-b-2 border-dashed border-hair py-2">
                    <span className="text-title font-semibold tabular-nums">{formatMass(line.massG, { unit })}</span>{' '}
                    <span className="text-lead">{line.name}</span>
                    <span className="block text-body text-soft">
                      {[lotWords(line), step ? (step.status === 'done' ? 'in' : `at “${step.step.title}”`) : '']
                        .filter(Boolean)
                        .join(' · ')}
                    </span>
                  </li>
                );
              })}
          </ul>
        </section>
      ))}
    </div>
  );
}
