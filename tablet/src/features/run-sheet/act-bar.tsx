import type { RunCommand } from '@steepfall/shared/runs';
import type { MeasuredQuantity } from '@steepfall/shared/sheets';
import { PressButton } from '#components/press-button.tsx';
import { useRunState } from '#lib/run-store/run-context.tsx';
import { useUnits } from '#lib/units.ts';
import { primaryAct } from './primary-act.ts';
import { quantityNames } from './quantities.ts';
import { selfDoneText } from './sheet-words.ts';

export type ExtraSheet = 'note' | 'measure' | 'timer';

interface ActBarProps {
  onAct: (command: RunCommand) => void;
  onComplete: (stepId: string) => void;
  onMeasure: (quantity: MeasuredQuantity) => void;
  onExtra: (sheet: ExtraSheet) => void;
  /** On a phone, where the foot is a swipe away. */
  onAllSteps: () => void;
}

/** The lower third: one big act, back at its left, what can be written down at its right. */
export function ActBar({ onAct, onComplete, onMeasure, onExtra, onAllSteps }: ActBarProps) {
  const state = useRunState();
  const canGoBack = state.doneOrder.length > 0;
  return (
    <section className="act-bar" aria-label="Act">
      <PressButton className="act-side act-back" onPress={() => onAct({ type: 'goBack' })} isDisabled={!canGoBack}>
        <BackGlyph />
        Back one
      </PressButton>
      <Primary onAct={onAct} onComplete={onComplete} onMeasure={onMeasure} />
      <div className="act-extras">
        <PressButton className="act-side" onPress={() => onExtra('note')}>
          Note
        </PressButton>
        <PressButton className="act-side" onPress={() => onExtra('measure')}>
          Measure
        </PressButton>
        <PressButton className="act-side act-steps" onPress={onAllSteps}>
          All steps
        </PressButton>
      </div>
    </section>
  );
}

function Primary({ onAct, onComplete, onMeasure }: Pick<ActBarProps, 'onAct' | 'onComplete' | 'onMeasure'>) {
  const state = useRunState();
  const units = useUnits();
  const act = primaryAct(state);
  switch (act.kind) {
    case 'finish':
      return (
        <PressButton
          className="act-main"
          onPress={() => onAct({ type: 'endRun', outcome: 'finished' })}
          note="the record is complete then"
        >
          Finish the run
        </PressButton>
      );
    case 'measure':
      return (
        <div className="act-pair">
          <PressButton className="act-main" onPress={() => onMeasure(act.quantity)} note="opens the number pad">
            Type the {quantityNames[act.quantity]}
          </PressButton>
          <PressButton
            className="act-main act-quiet"
            onPress={() => onComplete(act.progress.step.id)}
            note="without a number"
          >
            Done
          </PressButton>
        </div>
      );
    case 'complete': {
      const byItself = selfDoneText(act.progress.step, units);
      return (
        <PressButton
          className={byItself ? 'act-main act-quiet' : 'act-main'}
          onPress={() => onComplete(act.progress.step.id)}
          note={byItself ?? 'space · pedal'}
        >
          Done
        </PressButton>
      );
    }
    case 'none':
      return null;
  }
}

function BackGlyph() {
  return (
    <svg viewBox="0 0 32 24" aria-hidden="true" className="h-7 w-9" fill="none" stroke="currentColor" strokeWidth="3">
      <path d="M11 3 3 11l8 8M3 11h18c5 0 8 3.500 8 10" />
    </svg>
  );
}
