import { useEffect, useMemo, useRef, useState } from 'react';
import { checkSheet, type OwnStep, type RecipeDocument, type Step } from '@steepfall/shared/sheets';
import { useFormContext } from 'react-hook-form';
import { Button } from '#components/button.tsx';
import { LevelRule } from '#components/level-rule.tsx';
import { Menu } from '#components/menu.tsx';
import { SheetSteps } from '#components/sheet-steps.tsx';
import { useKnown } from '#lib/session.ts';
import { offerUndo } from '#lib/undo.ts';
import { inPersonsWords, useUnits } from '#lib/units.ts';
import { compiledSheet } from './compiled-sheet.ts';
import { OwnStepDialog } from './own-step-dialog.tsx';
import type { RecipeForm } from './recipe-form.ts';
import { usePart } from './use-part.ts';

/** The steps that follow from the recipe, with the brewer's own among them, in the order that the brewer wants. */
export function SheetSection({ document }: { document: RecipeDocument | null }) {
  const { house } = useKnown();
  const units = useUnits();
  const { getValues } = useFormContext<RecipeForm>();
  const { value: steps, change } = usePart('steps');
  const [edited, setEdited] = useState<{ step: OwnStep | null } | null>(null);
  const { moved, noteMove } = useMoveFocus();
  const sheet = useMemo(
    () => (document ? compiledSheet({ ...document, steps }, house.altitudeM) : null),
    [document, steps, house.altitudeM],
  );
  const problems = useMemo(() => (sheet && typeof sheet !== 'string' ? checkSheet(sheet) : []), [sheet]);
  const list = sheet && typeof sheet !== 'string' ? sheet.steps : [];

  const move = (step: Step, index: number, by: 1 | -1) => {
    const ids = list.map(({ id }) => id);
    const other = ids[index + by];
    if (other === undefined) return;
    change({ ...steps, order: ids.with(index, other).with(index + by, step.id) });
    noteMove({ id: step.id, by, words: `${step.title}, now ${index + by + 1} of ${ids.length}` });
  };
  const take = (step: OwnStep) => {
    change({ ...steps, own: steps.own.filter(({ id }) => id !== step.id) });
    offerUndo(`${step.title} taken out.`, () => {
      // Into the steps as they are by then.
      const now = getValues('document').steps;
      change({ ...now, own: [...now.own, step] });
      return Promise.resolve();
    });
  };
  const keep = (step: OwnStep) => {
    const isKnown = steps.own.some(({ id }) => id === step.id);
    change({
      ...steps,
      own: isKnown ? steps.own.map((each) => (each.id === step.id ? step : each)) : [...steps.own, step],
    });
    setEdited(null);
  };

  return (
    <section aria-labelledby="sheet" className="grid min-w-0 gap-5">
      <LevelRule id="sheet" aside={list.length > 0 ? `${list.length} steps` : null}>
        The run sheet it gives
      </LevelRule>
      {problems.length > 0 ? (
        <ul role="alert" className="grid gap-1 text-body font-medium text-ember">
          {problems.map(({ stepId, detail }) => (
            <li key={`${stepId}${detail}`}>{inPersonsWords(detail, units)}</li>
          ))}
        </ul>
      ) : null}
      {typeof sheet === 'string' ? <p className="text-lead text-ember">{inPersonsWords(sheet, units)}</p> : null}
      {list.length > 0 && sheet && typeof sheet !== 'string' ? (
        <SheetSteps
          sheet={sheet}
          acts={(step, index) => {
            const own = steps.own.find(({ id }) => id === step.id);
            return (
              <>
                <MoveButton step={step} by={-1} isDisabled={index === 0} onMove={() => move(step, index, -1)} />
                <MoveButton
                  step={step}
                  by={1}
                  isDisabled={index === list.length - 1}
                  onMove={() => move(step, index, 1)}
                />
                {own ? (
                  <Menu
                    label={
                      <>
                        <span aria-hidden="true">⋯</span>
                        <span className="sr-only">More for {step.title}</span>
                      </>
                    }
                    choices={[
                      { label: 'Change', onChoose: () => setEdited({ step: own }) },
                      { label: 'Take out', onChoose: () => take(own), isDanger: true },
                    ]}
                  />
                ) : null}
              </>
            );
          }}
        />
      ) : null}
      <p role="status" className="sr-only">
        {moved}
      </p>
      <div className="flex flex-wrap gap-3">
        <Button onClick={() => setEdited({ step: null })}>Add a step of your own</Button>
        {steps.order ? (
          <Button
            look="quiet"
            onClick={() => {
              const { order: _order, ...rest } = steps;
              change(rest);
            }}
          >
            Back to the usual order
          </Button>
        ) : null}
      </div>
      {edited ? <OwnStepDialog step={edited.step} sheet={list} onKeep={keep} onClose={() => setEdited(null)} /> : null}
    </section>
  );
}

interface MoveButtonProps {
  step: Step;
  by: 1 | -1;
  isDisabled: boolean;
  onMove: () => void;
}

function MoveButton({ step, by, isDisabled, onMove }: MoveButtonProps) {
  return (
    <button
      type="button"
      data-move={`${step.id}:${by}`}
      disabled={isDisabled}
      onClick={onMove}
      aria-label={`Move ${step.title} ${by < 0 ? 'up' : 'down'}`}
      className="grid size-12 cursor-pointer place-items-center rounded-lg text-soft hover:text-text disabled:cursor-default disabled:opacity-30"
    >
      <svg
        viewBox="0 0 20 20"
        className="size-5"
        fill="none"
        stroke="currentColor"
        strokeWidth="2.25"
        aria-hidden="true"
      >
        {by < 0 ? <path d="M3 13l7-8 7 8" /> : <path d="M3 7l7 8 7-8" />}
      </svg>
    </button>
  );
}

interface Move {
  id: string;
  by: 1 | -1;
  words: string;
}

/** A step that moves takes its button along: the focus must not stay behind on the neighbour, or be lost. */
function useMoveFocus() {
  const [move, setMove] = useState<Move | null>(null);
  const done = useRef<Move | null>(null);
  useEffect(() => {
    if (!move || done.current === move) return;
    done.current = move;
    const buttons = [...document.querySelectorAll<HTMLButtonElement>('[data-move]:not(:disabled)')];
    const button = (by: number) => buttons.find(({ dataset }) => dataset['move'] === `${move.id}:${by}`);
    (button(move.by) ?? button(-move.by))?.focus();
  }, [move]);
  return { moved: move?.words ?? '', noteMove: setMove };
}
