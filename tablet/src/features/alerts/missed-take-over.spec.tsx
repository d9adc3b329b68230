import { act, render, screen } from '@testing-library/react';
import userEvent from '@testing-library/user-event';
import { describe, expect, it, vi } from 'vitest';
import { decide, foldRun, type Decision, type RunCommand } from '@steepfall/shared/runs';
import { buildAlert, buildSheet, buildStep, LogBuilder, MEMBER_ID, RUN_ID, START_MS } from '@steepfall/shared/testing';
import { RunProvider } from '#lib/run-store/run-context.tsx';
import type { LiveState, RunStore } from '#lib/run-store/run-store.ts';
import { takeOverAlert, takeOverPress } from '#lib/run-store/take-over.ts';
import { ValueStore } from '#lib/value-store.ts';
import { v7 as uuidv7 } from 'uuid';
import { AlertStrips } from './alert-strips.tsx';
import { AlertTakeOver } from './alert-take-over.tsx';

const kettle = { volumeL: 30, diameterM: 0.34, massKg: 4, heaterPowerW: 3000, heaterEfficiency: 0.9 };
const chiller = { metal: 'stainless', lengthM: 7.6, coolantC: 15 } as const;

function sheet() {
  const { steps } = buildSheet();
  const hopsOut = buildStep({
    id: 'hops-out',
    kind: 'remove',
    title: 'Hops out',
    start: { by: 'temperature', direction: 'falling', tempC: 30 },
    acts: ['hops-out'],
  });
  return buildSheet(steps.flatMap((step) => (step.id === 'transfer' ? [hopsOut, step] : [step])));
}

/** A sheet whose catch at 62 °C was missed: the liquid is at 48 °C and falls. Chiller on was done, and maybe not ticked. */
function scene({ isChillTicked = true } = {}) {
  const document = { waterL: 20 } as never;
  const log = new LogBuilder(sheet(), { document, kit: { altitudeM: 0, kettle, chiller } })
    .done('light-heat', 'heat', 'tea-in', 'steep', 'tea-out', ...(isChillTicked ? ['chill'] : []))
    .add('alert.raised', buildAlert({ stage: 'missed' }));
  const estimate = { status: 'live', tempC: 48, rateCPerMin: -7.33 };
  const live = new ValueStore<LiveState>({ nowMs: START_MS, view: { estimate } as never, newest: null });
  const shot = () => ({ state: foldRun(log.entries), entries: log.entries, summary: null, isJoined: true });
  const snapshot = new ValueStore(shot());
  const store = {
    runId: RUN_ID,
    snapshot,
    live,
    act: (command: RunCommand): Promise<Decision> => {
      const context = { nowMs: START_MS + 1000, by: MEMBER_ID, station: 'tablet', newId: uuidv7 };
      const decision = decide(foldRun(log.entries), command, context);
      if (!decision.ok) throw new Error(decision.problem.detail);
      log.entries.push(...decision.events);
      act(() => snapshot.set(shot()));
      return Promise.resolve(decision);
    },
  } as unknown as RunStore;
  const complete = (stepId: string) => void store.act({ type: 'completeStep', stepId, tempC: 48 });
  function Page() {
    const isTaken = takeOverAlert(snapshot.get().state) !== null;
    return isTaken ? (
      <AlertTakeOver onComplete={(ids) => ids.forEach(complete)} onAct={(one) => void store.act(one)} refusal={null} />
    ) : (
      <AlertStrips />
    );
  }
  const page = () => (
    <RunProvider store={store}>
      <Page />
    </RunProvider>
  );
  const { rerender } = render(page());
  const press = async (name: RegExp) => {
    await userEvent.setup().click(screen.getByRole('button', { name }));
    rerender(page());
  };
  const showLog = () => {
    act(() => snapshot.set(shot()));
    rerender(page());
  };
  const state = () => foldRun(log.entries);
  const hopsIn = () => state().steps.find(({ step }) => step.id === 'hops-in');
  return { press, state, hopsIn, log, rerender: showLog };
}

describe('the choices of a missed catch', () => {
  it('stand with their figures, the surest first', () => {
    scene();
    const choices = [...screen.getByRole('group').querySelectorAll('button')].map(({ textContent }) => textContent);
    expect(choices).toEqual([
      expect.stringMatching(
        /^Add now, hold 1.min.40.s at 48.°Cstop the chiller · contact as planned, bitterness 0\.\d of it$/,
      ),
      expect.stringMatching(/^Add \d+.g more\d+.g in all, now · contact as planned, bitterness 0\.\d of it$/),
      expect.stringMatching(
        /^Reheat, about \d+.minchiller off, heat to 65.°C · gloves, lid away from you · all as planned$/,
      ),
      expect.stringMatching(/^Add now and acceptcontact 0\.\d, bitterness 0\.\d of the plan$/),
    ]);
  });

  it.each([
    [/^Add now, hold/, 'hold'],
    [/^Add \d+.g more/, 'more'],
    [/^Add now and accept/, 'accept'],
  ] as const)('%s: chosen and in with one press, and taken back with one', async (name, choice) => {
    const { press, state, hopsIn } = scene();
    await press(name);
    expect(state().choices).toMatchObject([{ choice, stepId: 'hops-in', key: 'hops-in', crossing: 1 }]);
    expect(hopsIn()).toMatchObject({ status: 'done', tempC: 48 });
    expect(state().timers.map(({ label }) => label)).toEqual(choice === 'hold' ? ['Hold'] : []);
    if (choice === 'more') expect(hopsIn()?.step.amounts[0]?.massG).toBeGreaterThan(60);
    await press(/Take back/);
    expect([state().choices, state().timers, hopsIn()?.status]).toEqual([[], [], 'current']);
    expect(hopsIn()?.step.amounts[0]?.massG).toBe(60);
    expect(screen.getByRole('group', { name: 'What to do about it' })).toBeTruthy();
  });

  it('reheat leaves the step open and the tablet silent, says what to do, and is taken back', async () => {
    const { press, state, hopsIn } = scene();
    await press(/^Reheat/);
    expect([state().choices[0]?.choice, hopsIn()?.status]).toEqual(['reheat', 'current']);
    expect(screen.getByText(/Reheating, about .*chiller off, heat to 65.°C.*calls again at 62.°C/)).toBeTruthy();
    await press(/Take back/);
    expect(state().choices).toEqual([]);
    expect(screen.getByRole('button', { name: /^Reheat/ })).toBeTruthy();
  });

  it('are not held up by a step that was not ticked: it is ticked with it', async () => {
    const { press, state } = scene({ isChillTicked: false });
    expect(screen.getByText(/ticked with it: Chiller on/)).toBeTruthy();
    await press(/^Add now and accept/);
    expect(state().doneOrder.slice(-2)).toEqual(['chill', 'hops-in']);
  });

  it('stay one press away when the alert was only heard', async () => {
    const { press, state } = scene();
    await press(/Heard it/);
    expect(state().choices).toEqual([]);
    await press(/What now/);
    await press(/^Add now and accept/);
    expect(state().choices).toMatchObject([{ choice: 'accept' }]);
  });

  it('the pedal takes the first, once they have been seen', () => {
    vi.useFakeTimers();
    const { state } = scene();
    expect(takeOverPress.get()).toBeNull();
    vi.advanceTimersByTime(1_500);
    takeOverPress.get()?.();
    vi.useRealTimers();
    expect(state().choices).toMatchObject([{ choice: 'hold' }]);
  });
});

describe('what does not work', () => {
  const fault = (rule: 'hub' | 'signal', key: string) =>
    buildAlert({ key, rule, stage: 'now', stepId: null, actStepId: null, targetC: null, direction: null });

  it('is kept apart: a word, a reason, the first on top; put aside with a reason it is in a list with its end', async () => {
    const { log, press, rerender, state } = scene();
    await press(/^Add now and accept/);
    log.done('hops-out').add('alert.raised', fault('hub', 'hub:another'));
    log
      .add('alert.raised', fault('signal', 'signal'))
      .add('alert.raised', { ...fault('signal', 'x'), rule: 'station', key: 'station:x' });
    rerender();
    expect(takeOverAlert(state())).toMatchObject({ rule: 'signal' });
    expect(screen.getByRole('region', { name: 'Fault' })).toBeTruthy();
    expect(screen.getByText(/and 1 more/)).toBeTruthy();
    await press(/Quiet for 2 min/);
    expect(state().alerts.find(({ key }) => key === 'signal')).toMatchObject({ shelvedReason: 'quiet for 2 min' });
    expect(screen.getByText('Fault:')).toBeTruthy();
    await press(/More/);
    expect(screen.getByText('2 faults, 1 put aside')).toBeTruthy();
    await press(/Put aside/);
    await press(/Watched by hand/);
    expect(state().alerts.find(({ key }) => key === 'station:x')).toMatchObject({
      shelvedReason: 'Watched by hand',
      shelvedUntilMs: START_MS + 601_000,
    });
    expect(screen.getByText('2 faults, 2 put aside')).toBeTruthy();
  });
});
