import { render, screen } from '@testing-library/react';
import userEvent from '@testing-library/user-event';
import { expect, it, vi } from 'vitest';
import { foldRun } from '@steepfall/shared/runs';
import { LogBuilder, RUN_ID, START_MS } from '@steepfall/shared/testing';
import { RunProvider } from '#lib/run-store/run-context.tsx';
import type { RunStore } from '#lib/run-store/run-store.ts';
import { ValueStore } from '#lib/value-store.ts';
import { AlertStrips } from './alert-strips.tsx';
import { AlertTakeOver } from './alert-take-over.tsx';

function storeOf(stage: 'stand-by' | 'now'): RunStore {
  const log = new LogBuilder().done('light-heat', 'heat', 'tea-in').add('alert.raised', {
    key: 'steep',
    crossing: 1,
    rule: 'timer',
    stage,
    stepId: 'steep',
    actStepId: 'tea-out',
    tempC: null,
    targetC: null,
    direction: null,
    dueAtMs: START_MS + 180_000,
  });
  const live = new ValueStore({ nowMs: START_MS, view: null, newest: null });
  const snapshot = new ValueStore({ state: foldRun(log.entries), isJoined: true });
  return { runId: RUN_ID, snapshot, live, act: vi.fn() } as unknown as RunStore;
}

it('says why an act was refused, and that nobody hears the alert', async () => {
  const onAct = vi.fn();
  const { rerender } = render(
    <RunProvider store={storeOf('now')}>
      <AlertTakeOver onComplete={vi.fn()} onAct={onAct} refusal={null} />
    </RunProvider>,
  );
  expect(screen.getByText(/sound is off/i)).toBeTruthy();
  await userEvent.setup().click(screen.getByRole('button', { name: /Heard it/ }));
  expect(onAct).toHaveBeenCalledWith({ type: 'acknowledgeAlert', key: 'steep', crossing: 1 });
  rerender(
    <RunProvider store={storeOf('now')}>
      <AlertTakeOver onComplete={vi.fn()} onAct={onAct} refusal="Another step comes first." />
    </RunProvider>,
  );
  expect(screen.getByText('Another step comes first.').getAttribute('role')).toBe('alert');
});

it('says on the strip of a coming alert that sound is off', () => {
  render(
    <RunProvider store={storeOf('stand-by')}>
      <AlertStrips />
    </RunProvider>,
  );
  expect(screen.getByText(/Sound is off/)).toBeTruthy();
});
