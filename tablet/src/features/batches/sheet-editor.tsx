import { useEffect, useMemo, useReducer, useRef, useState } from 'react';
import { useMutation, useQueryClient } from '@tanstack/react-query';
import { batchPlanSchema, type BatchPlan } from '@steepfall/shared/contracts';
import { checkSheet, type RunSheet, type Step } from '@steepfall/shared/sheets';
import { useBlocker } from 'react-router-dom';
import { Banner } from '#components/banner.tsx';
import { Button } from '#components/button.tsx';
import { Dialog } from '#components/dialog.tsx';
import { Menu } from '#components/menu.tsx';
import { ShapeGlyph } from '#components/shapes.tsx';
import { SheetSteps } from '#components/sheet-steps.tsx';
import { callHubFor } from '#lib/api-client.ts';
import { HubProblemError } from '#lib/http.ts';
import { batchPlanQuery } from '#lib/hub-queries.ts';
import { offerUndo } from '#lib/undo.ts';
import { inPersonsWords, useUnits } from '#lib/units.ts';
import { failureWords, fieldProblems } from '#lib/words.ts';
import { changeDraft, ownStep } from './sheet-draft.ts';
import { SheetEditorStep } from './sheet-editor-step.tsx';

interface SheetEditorProps {
  plan: BatchPlan;
  onClose: () => void;
}

type Opened = { step: Step; afterStepId: string | null } | { step: Step };

/** The sheet of one batch before its run: moved, changed, added to. The recipe stays as it is. */
export function SheetEditor({ plan, onClose }: SheetEditorProps) {
  const [draft, change] = useReducer(changeDraft, { sheet: plan.sheet, past: [] });
  const [opened, setOpened] = useState<Opened | null>(null);
  const [said, setSaid] = useState('');
  const [list, focusOn] = useMovedFocus();
  const save = useSaveSheet(plan, onClose);
  const { sheet, past } = draft;
  const isChanged = past.length > 0;
  const problems = useMemo(() => checkSheet(sheet), [sheet]);
  const leaving = useKeepFromLeaving(isChanged && !save.isSuccess);
  const isConflict = save.error instanceof HubProblemError && save.error.type === 'changed-meanwhile';

  const move = (step: Step, index: number, by: -1 | 1) => {
    change({ act: 'move', stepId: step.id, by });
    setSaid(`${step.title} is now step ${index + 1 + by} of ${sheet.steps.length}.`);
    focusOn(step.id, by);
  };
  return (
    <div className="grid gap-6">
      <p className="max-w-prose text-body text-soft">
        Only this batch changes; the recipe stays as it is. Nothing is kept until you keep it.
      </p>
      <div ref={list}>
        <SheetSteps
          sheet={sheet}
          isOneColumn
          below={({ id }) => (
            <Problems details={[...problemsOf(id, problems), ...hubProblems(save.error, sheet, id)]} />
          )}
          acts={(step, index) => (
            <StepActs
              step={step}
              isFirst={index === 0}
              isLast={index === sheet.steps.length - 1}
              onMove={(by) => move(step, index, by)}
              onChange={() => setOpened({ step })}
              onAdd={() => setOpened({ step: ownStep(sheet), afterStepId: step.id })}
              onTakeOut={() => {
                change({ act: 'take-out', stepId: step.id });
                setSaid(`${step.title} taken out.`);
              }}
            />
          )}
        />
      </div>
      <p role="status" className="sr-only">
        {said}
      </p>
      <div className="sticky bottom-[calc(4.6rem+env(safe-area-inset-bottom))] z-20 grid gap-4 border-t-2 border-text bg-ground py-4 md:bottom-0">
        {isConflict ? (
          <Conflict plan={plan} sheet={sheet} save={save} onClose={onClose} />
        ) : save.error ? (
          <Banner tone="act" title="The sheet was not kept">
            {failureWords(save.error)}
          </Banner>
        ) : null}
        <div className="flex flex-wrap items-center gap-3">
          <Button
            look="primary"
            disabled={!isChanged || problems.length > 0}
            isBusy={save.isPending}
            busyLabel="Keeping it"
            onClick={() => save.mutate({ sheet, sheetVersion: plan.sheetVersion })}
          >
            Keep the sheet
          </Button>
          <Button disabled={!isChanged} onClick={() => change({ act: 'undo' })}>
            Undo
          </Button>
          <Button look="quiet" onClick={onClose}>
            {isChanged ? 'Drop the changes' : 'Close'}
          </Button>
          {problems.length > 0 ? (
            <p role="status" className="min-w-48 flex-1 font-medium text-ember">
              {problems.length === 1 ? 'One step does' : `${problems.length} steps do`} not fit yet; it says there why.
            </p>
          ) : null}
        </div>
      </div>
      {leaving}
      {opened ? (
        <SheetEditorStep
          step={opened.step}
          isNew={'afterStepId' in opened}
          onClose={() => setOpened(null)}
          onSave={(step) => {
            change(
              'afterStepId' in opened
                ? { act: 'insert', step, afterStepId: opened.afterStepId }
                : { act: 'replace', step },
            );
            setOpened(null);
          }}
        />
      ) : null}
    </div>
  );
}

interface SheetChange {
  sheet: RunSheet;
  sheetVersion: number;
}

function useSaveSheet({ batchId, sheet: before }: BatchPlan, onSaved: () => void) {
  const client = useQueryClient();
  const send = async (body: SheetChange) => {
    const plan = await callHubFor(batchPlanSchema, `batches/${batchId}/sheet`, { method: 'PATCH', body });
    client.setQueryData(batchPlanQuery(batchId).queryKey, plan);
    return plan;
  };
  return useMutation({
    mutationFn: send,
    onSuccess: ({ sheetVersion }) => {
      offerUndo('Run sheet changed.', () => send({ sheet: before, sheetVersion }));
      onSaved();
    },
  });
}

interface ConflictProps {
  plan: BatchPlan;
  sheet: RunSheet;
  save: ReturnType<typeof useSaveSheet>;
  onClose: () => void;
}

/** Two people changed one sheet: the second chooses, and nothing is lost before. */
function Conflict({ plan, sheet, save, onClose }: ConflictProps) {
  const client = useQueryClient();
  const newest = () => client.fetchQuery({ ...batchPlanQuery(plan.batchId), staleTime: 0 });
  return (
    <Banner
      tone="act"
      title="Somebody else changed this sheet meanwhile"
      action={
        <div className="flex flex-wrap gap-3">
          <Button onClick={() => void newest().then(({ sheetVersion }) => save.mutate({ sheet, sheetVersion }))}>
            Keep mine instead
          </Button>
          <Button onClick={() => void newest().then(onClose)}>Take theirs</Button>
        </div>
      }
    >
      Your changes are still here. Take theirs, and yours are dropped; keep yours, and theirs are replaced.
    </Banner>
  );
}

const problemsOf = (stepId: string, problems: ReturnType<typeof checkSheet>) =>
  problems.filter((problem) => problem.stepId === stepId).map(({ detail }) => detail);

/** What the hub says of a step, by its place in the sheet that was sent. */
function hubProblems(error: Error | null, sheet: RunSheet, stepId: string): string[] {
  return fieldProblems(error).flatMap(({ field, detail }) => {
    const index = /^sheet\.steps\.(\d+)/.exec(field)?.[1];
    return index !== undefined && sheet.steps[Number(index)]?.id === stepId ? [detail] : [];
  });
}

function Problems({ details }: { details: readonly string[] }) {
  const units = useUnits();
  return details.map((detail) => (
    <p key={detail} role="alert" className="mt-1 flex gap-2.5 text-body font-medium text-ember">
      <ShapeGlyph shape="diamond" className="mt-1.5 size-3.5 shrink-0" />
      {inPersonsWords(detail, units)}
    </p>
  ));
}

interface StepActsProps {
  step: Step;
  isFirst: boolean;
  isLast: boolean;
  onMove: (by: -1 | 1) => void;
  onChange: () => void;
  onAdd: () => void;
  onTakeOut: () => void;
}

function StepActs({ step: { id, title }, isFirst, isLast, onMove, onChange, onAdd, onTakeOut }: StepActsProps) {
  const moves = [
    { by: -1, word: 'Move up', isOff: isFirst, path: 'M3 11l5-6 5 6' },
    { by: 1, word: 'Move down', isOff: isLast, path: 'M3 5l5 6 5-6' },
  ] as const;
  return (
    <span className="flex flex-wrap items-center gap-1">
      {moves.map(({ by, word, isOff, path }) => (
        <Button
          key={by}
          look="quiet"
          data-step={id}
          data-by={by}
          aria-label={`${word}: ${title}`}
          disabled={isOff}
          onClick={() => onMove(by)}
        >
          <svg
            viewBox="0 0 16 16"
            aria-hidden="true"
            className="size-5"
            fill="none"
            stroke="currentColor"
            strokeWidth="2.5"
          >
            <path d={path} />
          </svg>
        </Button>
      ))}
      <Menu
        label={
          <>
            Change<span className="sr-only"> {title}</span>
          </>
        }
        choices={[
          { label: 'Change this step', onChoose: onChange },
          { label: 'Add a step after it', onChoose: onAdd },
          { label: 'Take this step out', isDanger: true, onChoose: onTakeOut },
        ]}
      />
    </span>
  );
}

/** A step that moved keeps the focus on the arrow that moved it, or on the other one at the end of the list. */
function useMovedFocus() {
  const ref = useRef<HTMLDivElement>(null);
  const [wanted, setWanted] = useState<{ stepId: string; by: -1 | 1 } | null>(null);
  useEffect(() => {
    if (!wanted) return;
    const arrows = [...(ref.current?.querySelectorAll<HTMLButtonElement>('button[data-step]') ?? [])].filter(
      ({ dataset, disabled }) => dataset['step'] === wanted.stepId && !disabled,
    );
    (arrows.find(({ dataset }) => dataset['by'] === String(wanted.by)) ?? arrows[0])?.focus();
  }, [wanted]);
  return [ref, (stepId: string, by: -1 | 1) => setWanted({ stepId, by })] as const;
}

/** Asks before changes are lost by going elsewhere. */
function useKeepFromLeaving(isHeld: boolean) {
  const blocker = useBlocker(isHeld);
  useEffect(() => {
    if (!isHeld) return;
    const ask = (event: BeforeUnloadEvent) => event.preventDefault();
    addEventListener('beforeunload', ask);
    return () => removeEventListener('beforeunload', ask);
  }, [isHeld]);
  if (blocker.state !== 'blocked') return null;
  return (
    <Dialog
      isOpen
      role="alertdialog"
      onClose={() => blocker.reset()}
      title="The sheet is not kept yet"
      actions={
        <>
          <Button look="primary" onClick={() => blocker.reset()}>
            Stay here
          </Button>
          <Button look="danger" onClick={() => blocker.proceed()}>
            Drop the changes
          </Button>
        </>
      }
    >
      <p>What you changed is lost when you leave now.</p>
    </Dialog>
  );
}
