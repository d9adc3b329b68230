import { act, render, screen } from '@testing-library/react';
import userEvent from '@testing-library/user-event';
import type { ReactNode } from 'react';
import { v7 as uuidv7 } from 'uuid';
import { describe, expect, it, vi } from 'vitest';
import { compileSheet } from '@steepfall/shared/sheets';
import { buildDocument, buildTea, LogBuilder, MEMBER_ID, RUN_ID, START_MS } from '@steepfall/shared/testing';
import { MemoryEventStore } from '#lib/event-store/memory-event-store.ts';
import { Outbox } from '#lib/run-store/outbox.ts';
import { RunProvider } from '#lib/run-store/run-context.tsx';
import { RunStore } from '#lib/run-store/run-store.ts';
import { ValueStore } from '#lib/value-store.ts';
import { FakeHub } from '../../testing/fake-hub.ts';
import { BagsPanel } from './bags.tsx';
import { ReadingsKept } from './live-figures-follow.ts';
import { FiguresPanel } from './live-figures-panel.tsx';
import { LiveFigures } from './live-figures.tsx';
import { MeasureSheet } from './measure-sheet.tsx';

const document = buildDocument({
  additions: [
    ...buildDocument().additions.filter(({ kind }) => kind === 'acid'),
    buildTea(),
    buildTea({ id: 'herbs', name: 'chamomile', tea: 'herbal', bag: 'bag 3', massG: 20 }),
  ],
  targets: { waterPh: { min: 3, max: 3.3 } },
});
const kit = { altitudeM: 0, kettle: null, chiller: null };

function logOf(of = document): LogBuilder {
  return new LogBuilder(compileSheet(of, { altitudeM: 0, reachS: 8 }), { document: of, kit });
}

/** A run whose liquid stands at one temperature from its start on. */
async function openStore(log: LogBuilder, { tempC, nowS }: { tempC: number | null; nowS: number }) {
  const hub = new FakeHub(RUN_ID, log.stored);
  const link = hub.connect();
  const store = new MemoryEventStore();
  const time = { nowMs: START_MS + nowS * 1000 };
  if (tempC !== null) {
    const fromS = Math.max(0, nowS - 600);
    hub.readings.push(
      ...Array.from({ length: nowS - fromS }, (_, s) => ({ atMs: START_MS + (fromS + s) * 1000, tempC })),
    );
  }
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
  return { run, time };
}

async function show(run: RunStore, children: ReactNode) {
  const view = render(<RunProvider store={run}>{children}</RunProvider>);
  await act(async () => Promise.resolve());
  return view;
}

const steeping = () =>
  logOf().done('check-kit', 'fill', 'light-heat', 'acid', 'ph', 'coil-in').wait(10).done('heat', 'tea-in');

describe('the figures of the step', () => {
  it('say how far each tea has steeped, and within what it must come out', async () => {
    const { run } = await openStore(steeping(), { tempC: 80, nowS: 190 });
    await show(run, <LiveFigures />);
    expect(screen.getByText('steep of sencha')).toBeTruthy();
    expect(screen.getByText('of 2.5–8').parentElement?.textContent).toBe('3.0 of 2.5–8');
    expect(screen.getByText(/^good, pull within 5:0/)).toBeTruthy();
    expect(screen.getByText('herbs have no window')).toBeTruthy();
  });

  it('say "pull now" by word and shape, without an alarm', async () => {
    const { run } = await openStore(steeping(), { tempC: 95, nowS: 420 });
    await show(run, <LiveFigures />);
    expect(screen.getByText('pull now').closest('[data-due]')).toBeTruthy();
    expect(screen.queryByRole('alert')).toBeNull();
  });

  it('say that no temperature is known, and nothing at all of a run of an older build', async () => {
    const { run } = await openStore(steeping(), { tempC: null, nowS: 100 });
    await show(run, <LiveFigures />);
    expect(screen.getAllByText('no temperature known').length).toBeGreaterThan(0);
    const older = await openStore(new LogBuilder().done('light-heat'), { tempC: 20, nowS: 60 });
    const { container } = await show(older.run, <LiveFigures />);
    expect(container.textContent).toBe('');
    await show(older.run, <FiguresPanel />);
    expect(await screen.findByText(/started by an older build/)).toBeTruthy();
  });
});

describe('a measured pH', () => {
  it('gives grams at once, and what went in is written down with the acid', async () => {
    const { run } = await openStore(logOf().done('check-kit', 'fill', 'light-heat', 'acid'), { tempC: 18, nowS: 60 });
    const onClose = vi.fn();
    const user = userEvent.setup();
    await show(
      run,
      <MeasureSheet
        quantity="pH"
        stepId="ph"
        done={null}
        tempC={() => null}
        onRecord={(command) => run.act(command)}
        onClose={onClose}
      />,
    );
    await user.type(screen.getByRole('textbox'), '3.7');
    expect(screen.getByText(/^Add \d.* citric acid\.$/)).toBeTruthy();
    await user.click(screen.getByRole('button', { name: 'Keep it' }));
    await user.click(await screen.findByRole('button', { name: /g is in$/ }));
    await vi.waitFor(() => expect(onClose).toHaveBeenCalledOnce());
    const [ph, acid] = run.snapshot.get().state.measurements;
    expect(ph).toMatchObject({ quantity: 'pH', value: 3.7, stepId: 'ph' });
    expect(acid).toMatchObject({ quantity: 'massG', stepId: 'acid' });
    expect(acid?.value).toBeGreaterThan(0);
  });

  it('says not to add acid where it is too low already', async () => {
    const { run } = await openStore(logOf().done('check-kit', 'fill', 'light-heat', 'acid'), { tempC: 18, nowS: 60 });
    const user = userEvent.setup();
    const record = { onRecord: run.act.bind(run), onClose: vi.fn(), tempC: () => null };
    await show(run, <MeasureSheet quantity="pH" stepId="ph" done={null} {...record} />);
    await user.type(screen.getByRole('textbox'), '2.7');
    await user.click(screen.getByRole('button', { name: 'Keep it' }));
    expect(await screen.findByText('Too low already: do not add acid')).toBeTruthy();
    expect(screen.queryByRole('button', { name: /is in$/ })).toBeNull();
  });
});

describe('the bags', () => {
  it('say what is in which, without the hub and without a batch', async () => {
    const { run } = await openStore(steeping(), { tempC: 80, nowS: 60 });
    await show(run, <BagsPanel />);
    expect(screen.getAllByRole('heading').map(({ textContent }) => textContent)).toEqual([
      'bag 1',
      'bag 3',
      'In no bag',
    ]);
    expect(screen.getByText('sencha')).toBeTruthy();
  });
});

describe(ReadingsKept, () => {
  const at = (...seconds: number[]) => seconds.map((s) => ({ atMs: s * 1000, tempC: s }));

  it('keeps what falls out of the newest minutes, and takes in what the hub has from before', () => {
    const kept = new ReadingsKept();
    kept.follow(at(100, 101, 102));
    kept.follow(at(102, 103));
    expect(kept.all).toEqual(at(100, 101, 102, 103));
    expect(kept.isHoled(0)).toBe(false);
    expect(new ReadingsKept().isHoled(0)).toBe(false);
    kept.fillIn(at(1, 50, 101));
    expect(kept.all).toEqual(at(1, 50, 100, 101, 102, 103));
  });

  it('knows that something is missing before them', () => {
    const kept = new ReadingsKept();
    kept.follow(at(500, 501));
    expect(kept.isHoled(0)).toBe(true);
    expect(kept.isHoled(450_000)).toBe(false);
  });
});
