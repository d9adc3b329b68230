import { render, screen } from '@testing-library/react';
import userEvent from '@testing-library/user-event';
import { expect, it, vi } from 'vitest';
import { foldRun } from '@steepfall/shared/runs';
import { buildTimerAlert, LogBuilder, RUN_ID, START_MS } from '@steepfall/shared/testing';
import { RunProvider } from '#lib/run-store/run-context.tsx';
import type { RunStore } from '#lib/run-store/run-store.ts';
import { ValueStore } from '#lib/value-store.ts';
import { SheetDialog } from './sheet-dialog.tsx';

function openSheet(log: LogBuilder) {
  const act = vi.fn(async () => ({ ok: true }));
  const live = new ValueStore({ nowMs: START_MS, view: null, newest: { atMs: START_MS, tempC: 61.4 } });
  const snapshot = new ValueStore({ state: foldRun(log.entries) });
  render(
    <RunProvider store={{ runId: RUN_ID, snapshot, live, act } as unknown as RunStore}>
      <SheetDialog isOpen onClose={() => undefined} title="Note">
        <textarea aria-label="Text" />
      </SheetDialog>
    </RunProvider>,
  );
  return act;
}

const steeping = () => new LogBuilder().done('light-heat', 'heat', 'tea-in');

it('says an alert in the panel that lies over it, and takes "heard it" there', async () => {
  const act = openSheet(steeping().add('alert.raised', buildTimerAlert()));
  const dialog = await screen.findByRole('dialog');
  expect(dialog.contains(screen.getByRole('alert'))).toBe(true);
  expect(screen.getByRole('alert').textContent).toContain('Now:');
  expect(screen.getByText(/61\.4/)).toBeTruthy();
  await userEvent.setup().click(screen.getByRole('button', { name: 'Heard it' }));
  expect(act).toHaveBeenCalledWith({ type: 'acknowledgeAlert', key: 'steep', crossing: 1 });
});

it('shows the panel alone while nothing stands', async () => {
  openSheet(steeping());
  expect(await screen.findByRole('dialog')).toBeTruthy();
  expect(screen.queryByRole('alert')).toBeNull();
});
