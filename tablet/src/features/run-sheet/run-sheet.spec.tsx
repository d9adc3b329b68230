import { act, render, screen } from '@testing-library/react';
import userEvent from '@testing-library/user-event';
import { Profiler, type ReactNode } from 'react';
import { MemoryRouter, Route, Routes } from 'react-router-dom';
import { v7 as uuidv7 } from 'uuid';
import { beforeEach, describe, expect, it, vi } from 'vitest';
import { LogBuilder, MEMBER_ID, RUN_ID, START_MS } from '@steepfall/shared/testing';
import { currentStep, type RunCommand } from '@steepfall/shared/runs';
import { MemoryEventStore } from '#lib/event-store/memory-event-store.ts';
import { Outbox } from '#lib/run-store/outbox.ts';
import { RunProvider } from '#lib/run-store/run-context.tsx';
import { RunStore } from '#lib/run-store/run-store.ts';
import { ValueStore } from '#lib/value-store.ts';
import { FakeHub } from '../../testing/fake-hub.ts';
import { ActBar } from './act-bar.tsx';
import { AllSteps } from './all-steps.tsx';
import { Foot } from './foot.tsx';
import { LiveTemperature } from './live-temperature.tsx';
import { StepArea } from './step-area.tsx';

async function openStore(log: LogBuilder) {
  const hub = new FakeHub(RUN_ID, log.stored);
  const link = hub.connect();
  const store = new MemoryEventStore();
  const time = { nowMs: START_MS };
  const run = new RunStore({
    runId: RUN_ID,
    link,
    store,
    outbox: new Outbox(link, store),
    clock: { nowMs: () => time.nowMs, isSettled: new ValueStore(true), look: () => undefined },
    station: 'tablet',
    memberId: () => MEMBER_ID,
    newId: uuidv7,
    schedule: (work) => work(),
  });
  await run.open();
  await vi.waitFor(() => expect(run.snapshot.get().isJoined).toBe(true));
  const read = (tempC: number, seconds: number) => {
    time.nowMs = START_MS + seconds * 1000;
    hub.broadcast('run.readings', {
      runId: RUN_ID,
      probeId: RUN_ID,
      readings: [{ atMs: time.nowMs, tempC }],
      acceptedMs: 0,
    });
  };
  return { run, hub, time, read };
}

function Around({ run, children }: { run: RunStore; children: ReactNode }) {
  return (
    <MemoryRouter>
      <Routes>
        <Route path="/" element={<RunProvider store={run}>{children}</RunProvider>} />
      </Routes>
    </MemoryRouter>
  );
}

beforeEach(() => {
  vi.stubGlobal('matchMedia', () => ({ matches: false, addEventListener: () => undefined }));
});

describe('a reading a second', () => {
  it('commits the number, and nothing of the step', async () => {
    const { run, read } = await openStore(new LogBuilder().done('light-heat'));
    let stepCommits = 0;
    render(
      <Around run={run}>
        <LiveTemperature />
        <Profiler id="step" onRender={() => (stepCommits += 1)}>
          <ActBar onAct={vi.fn()} onComplete={vi.fn()} onMeasure={vi.fn()} onExtra={vi.fn()} onAllSteps={vi.fn()} />
        </Profiler>
      </Around>,
    );
    const atFirst = stepCommits;
    for (let s = 1; s <= 60; s += 1) act(() => read(20 + s * 0.05, s));
    expect(stepCommits).toBe(atFirst);
    expect(screen.getByText(/^23\.\d$/)).toBeTruthy();
  });
});

describe('the step', () => {
  it('names what to do and takes the focus when it changes', async () => {
    const { run } = await openStore(new LogBuilder().done('light-heat', 'heat'));
    render(
      <Around run={run}>
        <StepArea onStopTimer={vi.fn()} />
      </Around>,
    );
    expect(screen.getByRole('heading', { name: 'Tea in' })).toBeTruthy();
    expect(
      screen.getByText('120 g sencha', { exact: false, normalizer: (text) => text.replace(/\s/g, ' ') }),
    ).toBeTruthy();
    expect(screen.getByText('bag 1')).toBeTruthy();
    await act(async () => {
      await run.act({ type: 'completeStep', stepId: 'tea-in', tempC: 76 });
    });
    expect(document.activeElement).toBe(screen.getByRole('heading', { name: 'Steep' }));
  });

  it('is done by one click, and taken back by another', async () => {
    const { run } = await openStore(new LogBuilder());
    const user = userEvent.setup();
    render(
      <Around run={run}>
        <ActBar
          onAct={(command) => void run.act(command)}
          onComplete={(stepId) => void run.act({ type: 'completeStep', stepId, tempC: null })}
          onMeasure={vi.fn()}
          onExtra={vi.fn()}
          onAllSteps={vi.fn()}
        />
      </Around>,
    );
    await user.click(screen.getByRole('button', { name: /^Done/ }));
    await vi.waitFor(() => expect(currentStep(run.snapshot.get().state)?.step.id).toBe('heat'));
    await user.click(screen.getByRole('button', { name: 'Back one' }));
    await vi.waitFor(() => expect(currentStep(run.snapshot.get().state)?.step.id).toBe('light-heat'));
    const back = screen.getByRole('button', { name: 'Back one' });
    await vi.waitFor(() => expect(back.getAttribute('aria-disabled')).toBe('true'));
    expect(document.activeElement).toBe(back);
  });
});

describe('what can be done meanwhile', () => {
  it('is ticked once and keeps the focus', async () => {
    const { run } = await openStore(new LogBuilder().done('light-heat', 'heat', 'tea-in'));
    const onAct = vi.fn((command: RunCommand) => void run.act(command));
    const user = userEvent.setup();
    render(
      <Around run={run}>
        <Foot onAct={onAct} onTimer={vi.fn()} onAllSteps={vi.fn()} onWipe={vi.fn()} />
      </Around>,
    );
    const task = screen.getByRole('checkbox', { name: 'weigh the hops' });
    await user.click(task);
    await vi.waitFor(() => expect(task.getAttribute('aria-checked')).toBe('true'));
    expect(document.activeElement).toBe(task);
    await new Promise((resolve) => setTimeout(resolve, 420));
    await user.click(task);
    expect(onAct).toHaveBeenCalledOnce();
  });
});

describe('the whole sheet', () => {
  it('takes back a note, a measurement and a ticked task', async () => {
    const log = new LogBuilder()
      .done('light-heat', 'heat', 'tea-in')
      .add('note.added', { stepId: null, text: 'smells of hay' })
      .add('measurement.recorded', { stepId: null, quantity: 'pH', value: 5.4 })
      .add('task.ticked', { stepId: 'steep', taskId: 'weigh-hops' });
    const { run } = await openStore(log);
    const user = userEvent.setup();
    render(
      <Around run={run}>
        <AllSteps onAct={(command) => void run.act(command)} onClose={vi.fn()} />
      </Around>,
    );
    for (const what of ['smells of hay', 'pH 5.4', 'weigh the hops'])
      await user.click(screen.getByRole('button', { name: `Take it back: ${what}` }));
    await vi.waitFor(() => expect(screen.queryByRole('button', { name: /^Take it back/ })).toBeNull());
    const { notes, measurements, steps } = run.snapshot.get().state;
    expect([notes, measurements, steps.flatMap(({ tickedTaskIds }) => tickedTaskIds)]).toEqual([[], [], []]);
  });
});
