import { useMemo, useState } from 'react';
import type { Probe } from '@steepfall/shared/contracts';
import { lagTest, LEAST_STEP_K, type LagRefusal, type LagTest } from '@steepfall/shared/readings';
import { formatTemp, kelvinToFahrenheitDegrees, type UnitPreferences } from '@steepfall/shared/units';
import { Banner } from '#components/banner.tsx';
import { Button } from '#components/button.tsx';
import { CautionMark } from '#components/caution-mark.tsx';
import { Dialog } from '#components/dialog.tsx';
import { Segmented } from '#components/segmented.tsx';
import { useUnits } from '#lib/units.ts';
import { failureWords } from '#lib/words.ts';
import { ProbeLiveView } from './probe-live-view.tsx';
import { useProbeLive } from './probe-readings.ts';
import { TestStep, TestSteps } from './test-steps.tsx';
import { useSaveProbe } from './use-save-probe.ts';

type Way = 'into-warm' | 'into-ice';

const ways: { value: Way; label: string }[] = [
  { value: 'into-warm', label: 'Ice to warm' },
  { value: 'into-ice', label: 'Warm to ice' },
];

function refusalWords(reason: LagRefusal, unit: UnitPreferences['temperature']): string {
  const leastStep = unit === 'F' ? Math.round(kelvinToFahrenheitDegrees(LEAST_STEP_K)) : LEAST_STEP_K;
  const words: Record<LagRefusal, string> = {
    'not-steady': 'It was still moving when you pressed. Leave it in the first water until it says steady.',
    'moved-early': 'It had moved before you pressed. Press at the moment it goes in.',
    'small-step': `The two waters were too much alike. Take two that are ${leastStep} °${unit} or more apart.`,
    'too-few':
      'It moved faster than it is read: only a few readings fell into the move. Let it send more often, or keep the lag its maker tells.',
    gap: 'Readings went missing in the middle. See that it reaches the hub well, and try again.',
    'not-one-move':
      'It did not move in one sweep. Go in quickly, stir all the time, and keep it off the wall and the ice.',
    'never-steady': 'It never came to rest in the second water. Take more water, and stir.',
  };
  return words[reason];
}

/** A probe goes from one water into another, and the curve tells how late it is. */
export function LagTestDialog({ probe, onClose }: { probe: Probe; onClose: () => void }) {
  const [way, setWay] = useState<Way>('into-warm');
  const [plungedAtMs, setPlungedAtMs] = useState<number | null>(null);
  const [verdict, setVerdict] = useState<Exclude<LagTest, { kind: 'moving' }> | null>(null);
  const live = useProbeLive(probe);
  const { temperature: unit } = useUnits();
  const save = useSaveProbe(probe);

  const test = useMemo(
    () => (plungedAtMs === null ? null : lagTest(live.readings, plungedAtMs, probe)),
    [live.readings, plungedAtMs, probe],
  );
  // What was found stays, although readings go on.
  if (verdict === null && test !== null && test.kind !== 'moving') setVerdict(test);

  const again = () => {
    setPlungedAtMs(null);
    setVerdict(null);
    save.reset();
  };
  const [first, second] = way === 'into-warm' ? ['ice water', 'warm water'] : ['warm water', 'ice water'];
  const isMoving = plungedAtMs !== null && verdict === null;
  return (
    <Dialog
      isOpen
      // A stray touch outside must not end a test that is under way.
      onClose={() => (isMoving ? undefined : onClose())}
      size="wide"
      title={`How late is ${probe.name}?`}
    >
      <div className="grid gap-6">
        <p className="max-w-prose text-soft">
          Every probe shows the past. Moved from one water into another, its curve tells by how much.
        </p>
        {plungedAtMs === null ? (
          <>
            <Segmented label="Which way?" value={way} onChange={setWay} segments={ways} />
            <CautionMark mark="Warm, not hot">
              Water from the warm tap is enough, no hotter than a hand bears. Hot water scalds and makes the test no
              better.
            </CautionMark>
          </>
        ) : null}
        <ProbeLiveView live={live} fromMs={plungedAtMs === null ? undefined : plungedAtMs - 15_000} />
        {live.error ? (
          <Banner tone="act" title="The readings cannot be fetched">
            {failureWords(live.error)}
          </Banner>
        ) : null}
        <TestSteps>
          <TestStep number={1} state={plungedAtMs === null && !live.steady.isSteady ? 'now' : 'done'}>
            Stand the probe in {first}, and stir until it says steady.
          </TestStep>
          <TestStep number={2} state={plungedAtMs === null ? (live.steady.isSteady ? 'now' : 'later') : 'done'}>
            Press, and plunge it into {second} at the same moment.
          </TestStep>
          <TestStep number={3} state={isMoving ? 'now' : verdict ? 'done' : 'later'}>
            Keep stirring until it has come to rest. The result appears by itself.
          </TestStep>
        </TestSteps>
        {verdict ? <Verdict verdict={verdict} probe={probe} unit={unit} /> : null}
        {save.isError ? (
          <Banner tone="act" title="The lag was not saved">
            {failureWords(save.error)}
          </Banner>
        ) : null}
        <div className="flex flex-wrap gap-3">
          {plungedAtMs === null ? (
            <Button look="primary" size="sheet" onClick={() => setPlungedAtMs(live.nowMs())} disabled={live.isSilent}>
              It goes in now
            </Button>
          ) : null}
          {verdict?.kind === 'found' ? (
            <Button
              look="primary"
              onClick={() => save.mutate({ lagS: Math.round(verdict.lagS * 10) / 10 }, { onSuccess: onClose })}
              isBusy={save.isPending}
              busyLabel="Saving"
            >
              Save {seconds(verdict.lagS)}
            </Button>
          ) : null}
          {plungedAtMs === null ? null : <Button onClick={again}>{isMoving ? 'Stop' : 'Test again'}</Button>}
          {isMoving ? null : <Button onClick={onClose}>Close</Button>}
        </div>
      </div>
    </Dialog>
  );
}

const seconds = (durationS: number) => `${durationS.toFixed(1)} s`;

function Verdict({
  verdict,
  probe,
  unit,
}: {
  verdict: Exclude<LagTest, { kind: 'moving' }>;
  probe: Probe;
  unit: UnitPreferences['temperature'];
}) {
  if (verdict.kind === 'refused') {
    return (
      <Banner tone="act" title="This test says nothing">
        {refusalWords(verdict.reason, unit)}
      </Banner>
    );
  }
  const { lagS, uncertaintyS, tauS, deadTimeS, fromC, toC } = verdict;
  return (
    <div role="status" className="border-l-8 border-text bg-raised px-5 py-4">
      <p className="text-title tabular-nums">
        {seconds(lagS)} late, give or take {seconds(2 * uncertaintyS)}
      </p>
      <p className="mt-1 tabular-nums text-soft">
        It stands still for {seconds(deadTimeS)}, then follows with a time constant of {seconds(tauS)}. From{' '}
        {formatTemp(fromC, { unit })} to {formatTemp(toC, { unit })}. So far {seconds(probe.lagS)} was counted with.
      </p>
    </div>
  );
}
