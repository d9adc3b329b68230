import { useEffect, useRef } from 'react';
import { cautionWords, type Caution, type StepAmount } from '@steepfall/shared/sheets';
import { currentStep } from '@steepfall/shared/runs';
import { formatMass, type UnitPreferences } from '@steepfall/shared/units';
import { CautionMark } from '#components/caution-mark.tsx';
import { useRunState } from '#lib/run-store/run-context.tsx';
import { useUnits } from '#lib/units.ts';
import { lotsOf, useWeighed } from './bags.tsx';
import { Waiting } from './countdown.tsx';
import { LiveFigures } from './live-figures.tsx';
import { measurementText, quantityText } from './quantities.ts';

export function amountText(
  { name, massG, bag }: StepAmount,
  { mass }: UnitPreferences,
): { what: string; where: string | null } {
  return { what: `${formatMass(massG, { unit: mass })} ${name}`, where: bag ?? null };
}

/** The one thing to do, verb first. */
export function StepArea({ onStopTimer }: { onStopTimer: (timerId: string) => void }) {
  const state = useRunState();
  const units = useUnits();
  const weighed = useWeighed();
  const progress = currentStep(state);
  const heading = useRef<HTMLHeadingElement>(null);
  const stepId = progress?.step.id ?? null;
  const shownStepId = useRef(stepId);

  useEffect(() => {
    if (shownStepId.current === stepId) return;
    shownStepId.current = stepId;
    // A dialog keeps its focus; it gives it back to the heading when it closes.
    if (!document.querySelector('[role="dialog"]')) heading.current?.focus({ preventScroll: true });
  }, [stepId]);

  if (!progress) {
    return (
      <section className="step" aria-label="Step">
        <h1 ref={heading} tabIndex={-1} id="step-heading" className="step-title">
          All steps done
        </h1>
        <p className="step-detail">Finish the run, and its record is complete.</p>
      </section>
    );
  }
  const { step } = progress;
  const measured = state.measurements.filter((one) => one.stepId === step.id);
  return (
    <section className="step" aria-label="Step">
      <div className="step-words" key={step.id} data-title-length={step.title.length > 15 ? 'long' : undefined}>
        <h1 ref={heading} tabIndex={-1} id="step-heading" className="step-title">
          {step.title}
        </h1>
        {step.amounts.length > 0 ? (
          <ul className="step-amounts" data-many={step.amounts.length > 2 || undefined}>
            {step.amounts.map((amount) => {
              const { what, where } = amountText(amount, units);
              const lots = lotsOf(amount, step.id, state, weighed);
              return (
                <li key={amount.name}>
                  {what}
                  {where ? <span className="step-bag">{where}</span> : null}
                  {lots ? <span className="step-lot">{lots}</span> : null}
                </li>
              );
            })}
          </ul>
        ) : null}
        {step.settings.length > 0 ? (
          <p className="step-amounts step-settings">
            {step.settings
              .map(({ label, quantity, value }) => `${label} ${quantityText(quantity, value, units)}`)
              .join(' · ')}
          </p>
        ) : null}
        {step.detail ? <p className="step-detail">{step.detail}</p> : null}
        {measured.length > 0 ? (
          <p className="step-detail">Measured: {measured.map((one) => measurementText(one, units)).join(', ')}</p>
        ) : null}
      </div>
      <LiveFigures />
      <Waiting onStop={onStopTimer} />
      <Cautions cautions={step.cautions} />
    </section>
  );
}

function Cautions({ cautions }: { cautions: readonly Caution[] }) {
  if (cautions.length === 0) return null;
  return (
    <ul className="step-cautions" aria-label="Cautions">
      {cautions.map((caution) => {
        const { mark, text } = cautionWords[caution];
        return (
          <li key={caution}>
            <CautionMark mark={mark}>{text}</CautionMark>
          </li>
        );
      })}
    </ul>
  );
}
