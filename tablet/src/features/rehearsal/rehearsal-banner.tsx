import { Segmented } from '#components/segmented.tsx';
import { hubClock } from '#lib/clock/hub-clock.ts';
import { useRunState, useRunStore } from '#lib/run-store/run-context.tsx';

const RATES = [1, 10, 30, 60];

/** Says all the time that this is practice, and how fast its clock goes. */
export function RehearsalBanner() {
  const store = useRunStore();
  const { isRehearsal, clock, status } = useRunState();
  if (!isRehearsal || !clock) return null;
  const rates = RATES.includes(clock.rate) ? RATES : [...RATES, clock.rate].sort((a, b) => a - b);
  return (
    <section className="rehearsal" aria-label="Rehearsal">
      <p>
        <strong>Rehearsal</strong> — simulated kettle<span className="rehearsal-rate">, clock ×{clock.rate}</span>
      </p>
      {status === 'running' ? (
        <Segmented
          label="How fast the clock goes"
          isLabelHidden
          value={clock.rate}
          onChange={(rate) => void store.act({ type: 'changeRate', rate, wallMs: hubClock.nowMs() })}
          segments={rates.map((rate) => ({ value: rate, label: `×${rate}` }))}
        />
      ) : null}
    </section>
  );
}
