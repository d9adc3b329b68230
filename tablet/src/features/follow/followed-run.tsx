import { useEffect } from 'react';
import type { FollowedAlert, FollowedRun, FollowedStep } from '@steepfall/shared/contracts';
import type { StepAmount } from '@steepfall/shared/sheets';
import { formatDuration, formatMass, formatRate, formatTemp, type UnitPreferences } from '@steepfall/shared/units';
import { directionDress } from '#components/direction-dress.ts';
import { Button } from '#components/button.tsx';
import { ShapeGlyph } from '#components/shapes.tsx';
import { StatusChip } from '#components/status-chip.tsx';
import { formatLevel } from '#lib/units.ts';
import { keepAwake } from '#lib/wake-lock/wake-lock.ts';
import { spanWords } from '#lib/words.ts';
import { holdRunLock } from '#lib/wake-lock/run-lock.ts';
import type { FollowStore } from './follow-store.ts';
import { PhonePart } from './phone-part.tsx';
import { stageDress } from './stage-dress.ts';
import { useCall } from './use-call.ts';
import { useTidyNotifications } from './use-push.ts';
import { useTicked } from './use-ticked.ts';

interface FollowedProps {
  store: FollowStore;
  token: string;
  run: FollowedRun;
  isAway: boolean;
}

/** The verb, the number, the temperature: large enough for a glance at a phone that leans against a jar. */
export function FollowedRunView({ store, token, run, isAway }: FollowedProps) {
  const isEnded = run.status === 'ended';
  const alert = isEnded ? null : (run.alerts[0] ?? null);
  const { isQuiet, beQuiet } = useCall(alert);
  useTidyNotifications(run.alerts.map(({ tag }) => tag).join('\n'));
  useEffect(() => {
    if (isEnded) return undefined;
    const stops = [keepAwake(), holdRunLock()];
    return () => {
      for (const stop of stops) stop();
    };
  }, [isEnded]);
  const isCall = alert?.stage === 'now' || alert?.stage === 'missed';
  return (
    <main className="follow" data-alert={isCall || undefined}>
      <header className="flex flex-wrap items-baseline justify-between gap-x-4 gap-y-1 text-body">
        <p className="min-w-0 font-medium">{run.title}</p>
        {isEnded ? null : <Contact store={store} isAway={isAway} />}
      </header>
      {isEnded ? <Ended outcome={run.outcome} /> : <Live store={store} run={run} />}
      {isEnded ? null : alert ? (
        <Call key={`${alert.tag}/${alert.stage}`} store={store} alert={alert} units={run.units} />
      ) : (
        <StepNow store={store} run={run} />
      )}
      {alert && !isQuiet && alert.stage !== 'coming-up' ? (
        <Button size="sheet" onClick={beQuiet}>
          Quiet on this phone
        </Button>
      ) : null}
      {isEnded ? null : <Rest store={store} run={run} alert={alert} />}
      {isEnded ? null : <PhonePart token={token} pushKey={run.pushKey} />}
    </main>
  );
}

function Contact({ store, isAway }: { store: FollowStore; isAway: boolean }) {
  const text = useTicked(() =>
    isAway ? `no contact for ${formatDuration(Math.floor((store.silentMs() ?? 0) / 1000))}` : 'live',
  );
  return (
    <div>
      <p role="status" className="sr-only">
        {isAway ? 'No contact with the hub.' : ''}
      </p>
      <StatusChip shape={isAway ? 'ring' : 'dot'} className="tabular-nums">
        {text}
      </StatusChip>
    </div>
  );
}

function Ended({ outcome }: { outcome: FollowedRun['outcome'] }) {
  return (
    <section className="grid gap-3">
      <h1 className="follow-verb">{outcome === 'abandoned' ? 'Given up' : 'Finished'}</h1>
      <p role="status" className="text-lead text-soft">
        The run is over. This page has nothing more to say.
      </p>
    </section>
  );
}

/** Wall time without a word of the hub; the liquid has moved on meanwhile. */
const OLD_AFTER_MS = 15_000;

/** The liquid and what it does. A number that is old is not shown as if it were now. */
function Live({ store, run: { liquid, units } }: { store: FollowStore; run: FollowedRun }) {
  const silence = useTicked(() =>
    liquid?.lastHeardAtMs == null
      ? 'no reading yet'
      : `no signal for ${formatDuration(Math.max(0, Math.floor((store.nowMs() - liquid.lastHeardAtMs) / 1000)))}`,
  );
  const isOld = useTicked(() => ((store.silentMs() ?? 0) > OLD_AFTER_MS ? 'old' : null)) !== null;
  if (!liquid) return null;
  const isShown = !isOld && liquid.tempC !== null && (liquid.status === 'live' || liquid.status === 'starting');
  if (!isShown)
    return (
      <p className="text-lead">
        <StatusChip shape="ring" tone="soft" className="tabular-nums">
          {silence}
        </StatusChip>
      </p>
    );
  const { word, shape, tone } = directionDress[liquid.mode];
  return (
    <section aria-label="Temperature" className="follow-live">
      <p className="follow-temp">
        {formatTemp(liquid.tempC, { unit: units.temperature, showUnit: false })}
        <span className="follow-unit">°{units.temperature}</span>
      </p>
      <p className="text-body">
        {liquid.status === 'starting' ? (
          <StatusChip shape="dash">settling</StatusChip>
        ) : (
          <StatusChip shape={shape} tone={tone} className="tabular-nums">
            <span>
              {word}
              {liquid.mode === 'holding' || liquid.rateCPerMin === null ? null : (
                <span className="block font-normal">{formatRate(liquid.rateCPerMin, { unit: units.temperature })}</span>
              )}
            </span>
          </StatusChip>
        )}
      </p>
    </section>
  );
}

/** Seconds of an estimate that is this far off would be false digits. */
const ROUGH_ABOVE_S = 300;

interface CountdownProps {
  store: FollowStore;
  atMs: number;
  label: string;
  past: string;
  isEstimate?: boolean;
}

/** "0:42" to go, or how long it is past; never a minus. */
function Countdown({ store, atMs, label, past, isEstimate = false }: CountdownProps) {
  const leftText = useTicked(() => {
    const leftS = Math.max(0, Math.ceil((atMs - store.nowMs()) / 1000));
    return isEstimate && leftS > ROUGH_ABOVE_S ? spanWords(leftS) : formatDuration(leftS);
  });
  const pastText = useTicked(() => {
    const agoS = Math.floor((store.nowMs() - atMs) / 1000);
    return agoS < 1 ? null : formatDuration(agoS);
  });
  return (
    <div role="timer" aria-label={pastText === null ? label : past} className="follow-count">
      <p className="text-lead">{pastText === null ? label : past}</p>
      <p className="follow-number">{pastText ?? leftText}</p>
    </div>
  );
}

function Amounts({ amounts, units }: { amounts: readonly StepAmount[]; units: UnitPreferences }) {
  if (amounts.length === 0) return null;
  return (
    <ul className="follow-amounts">
      {amounts.map(({ name, massG, bag }) => (
        <li key={name}>
          {formatMass(massG, { unit: units.mass })} {name}
          {bag ? <span className="font-normal text-soft"> {bag}</span> : null}
        </li>
      ))}
    </ul>
  );
}

function Call({ store, alert, units }: { store: FollowStore; alert: FollowedAlert; units: UnitPreferences }) {
  const { word, shape } = stageDress[alert.stage];
  const isFault = alert.rule !== 'temperature' && alert.rule !== 'timer';
  const level = alert.targetC === null ? null : formatLevel(alert.targetC, units);
  return (
    <section aria-label="Alert" className="follow-call" data-stage={alert.stage}>
      <p role="alert" className="sr-only">
        {alert.sentence}
      </p>
      <p className="flex items-center gap-3 text-title font-semibold">
        <span className="follow-mark">
          <ShapeGlyph shape={shape} className="size-full" />
        </span>
        {word}
      </p>
      <h1 className="follow-verb">{alert.verb}</h1>
      {level ? <p className="follow-level">at {level}</p> : null}
      {isFault ? <p className="text-lead">{alert.sentence.replace(`${alert.verb}. `, '')}</p> : null}
      <Amounts amounts={alert.amounts} units={units} />
      {alert.dueAtMs === null ? null : <Countdown store={store} atMs={alert.dueAtMs} label="in" past="past by" />}
    </section>
  );
}

function StepNow({ store, run }: { store: FollowStore; run: FollowedRun }) {
  const { step, position, timers, crossing, units } = run;
  const [timer] = timers;
  if (!step)
    return (
      <section className="grid gap-3">
        <h1 className="follow-verb">All steps done</h1>
      </section>
    );
  return (
    <section aria-label="Step" className="grid gap-3">
      <p className="text-body text-soft">
        {position.number} of {position.count}
      </p>
      <h1 className="follow-verb">{step.title}</h1>
      <Level step={step} units={units} />
      <Amounts amounts={step.amounts} units={units} />
      {timer ? (
        <Countdown
          store={store}
          atMs={timer.endsAtMs}
          label={`${timer.label}, left`}
          past={`${timer.label}, over by`}
        />
      ) : crossing?.atMs != null ? (
        <Countdown
          store={store}
          atMs={crossing.atMs}
          label={`${crossing.title}, in about`}
          past={`${crossing.title}, past by`}
          isEstimate
        />
      ) : null}
    </section>
  );
}

function Level({ step: { level }, units }: { step: FollowedStep; units: UnitPreferences }) {
  if (!level) return null;
  return (
    <p className="follow-level">
      at {formatLevel(level.tempC, units)}, {level.direction}
    </p>
  );
}

/** What else stands, runs and comes. */
function Rest({ store, run, alert }: { store: FollowStore; run: FollowedRun; alert: FollowedAlert | null }) {
  const others = run.alerts.filter((other) => other !== alert);
  const timers = alert ? run.timers.filter(({ id }) => alert.tag !== `timer:${id}/1`) : run.timers.slice(1);
  return (
    <section aria-label="Meanwhile" className="follow-rest">
      {others.length > 0 ? (
        <ul className="grid gap-1">
          {others.map((other) => (
            <li key={other.tag}>
              <StatusChip shape={stageDress[other.stage].shape}>
                {stageDress[other.stage].word}: {other.verb}
              </StatusChip>
            </li>
          ))}
        </ul>
      ) : null}
      {timers.map(({ id, label, endsAtMs }) => (
        <TimerLine key={id} store={store} label={label} endsAtMs={endsAtMs} />
      ))}
      {alert && run.step && run.step.title !== alert.verb ? <p>on the sheet: {run.step.title}</p> : null}
      {run.next.length > 0 ? (
        <p>
          <span className="text-soft">next: </span>
          {run.next
            .map(({ title, level }) => (level ? `${title} at ${formatLevel(level.tempC, run.units)}` : title))
            .join(' · ')}
        </p>
      ) : null}
      <RunClock store={store} startedAtMs={run.startedAtMs} />
    </section>
  );
}

function TimerLine({ store, label, endsAtMs }: { store: FollowStore; label: string; endsAtMs: number }) {
  const left = useTicked(() => formatDuration(Math.max(0, Math.ceil((endsAtMs - store.nowMs()) / 1000))));
  return (
    <p className="flex justify-between gap-4">
      <span>{label}</span>
      <span className="font-medium tabular-nums">{left}</span>
    </p>
  );
}

function RunClock({ store, startedAtMs }: { store: FollowStore; startedAtMs: number }) {
  const text = useTicked(() => formatDuration(Math.max(0, Math.floor((store.nowMs() - startedAtMs) / 1000))));
  return (
    <p className="text-soft tabular-nums">
      on its way for <span>{text}</span>
    </p>
  );
}
