import type { BatchPlan, UpdateBatchSheet } from '@steepfall/shared/contracts';
import { problem } from '@steepfall/shared/problems';
import { compileSheet } from '@steepfall/shared/sheets';
import { buildDocument } from '@steepfall/shared/testing';
import { act, screen, within } from '@testing-library/react';
import userEvent from '@testing-library/user-event';
import { afterEach, beforeEach, describe, expect, it, vi } from 'vitest';
import { newId } from '#lib/ids.ts';
import { undoable } from '#lib/undo.ts';
import { DeskHub, renderAt } from '../../testing/desk-hub.tsx';
import { SheetEditor } from './sheet-editor.tsx';

const batchId = newId();
const patch = `PATCH batches/${batchId}/sheet`;
let plan: BatchPlan;
let hub: DeskHub;
vi.setConfig({ testTimeout: 20_000 });

beforeEach(async () => {
  const sheet = compileSheet(buildDocument(), { altitudeM: 120, reachS: 10 });
  plan = { batchId, sheet, sheetVersion: 1, weighOut: [] };
  hub = new DeskHub({
    [`GET batches/${batchId}/plan`]: () => plan,
    [patch]: ({ sheet: sent, sheetVersion }: UpdateBatchSheet) => {
      if (sheetVersion !== plan.sheetVersion) return problem('changed-meanwhile', 'Load it again.');
      plan = { ...plan, sheet: sent, sheetVersion: sheetVersion + 1 };
      return plan;
    },
  });
  await hub.signIn();
});
afterEach(async () => {
  act(() => undoable.set(null));
  await hub.signOut();
});

const button = (name: string) => screen.getByLabelText<HTMLButtonElement>(name, { selector: 'button' });
const press = (name: string) => userEvent.click(screen.getByText(name, { selector: 'button' }));
const titles = () => plan.sheet.steps.map(({ title }) => title);

describe(SheetEditor, () => {
  it('moves a step, keeps the focus on it, keeps the sheet, and takes it back', async () => {
    const before = titles();
    const onClose = vi.fn();
    renderAt(<SheetEditor plan={plan} onClose={onClose} />);
    await userEvent.click(button('Move down: Check the kit'));
    expect(document.activeElement).toBe(button('Move down: Check the kit'));
    expect(screen.getByText(`Check the kit is now step 2 of ${before.length}.`)).toBeTruthy();
    await press('Keep the sheet');
    await vi.waitFor(() => expect(onClose).toHaveBeenCalledOnce());
    expect(titles().slice(0, 2)).toEqual(['Fill the kettle', 'Check the kit']);
    await act(() => undoable.get()!.undo());
    expect(titles()).toEqual(before);
  });

  it('says at the step what would go wrong on the day, and stays shut until it is mended', async () => {
    renderAt(<SheetEditor plan={plan} onClose={vi.fn()} />);
    await userEvent.click(button('Move down: Tea in'));
    await userEvent.click(button('Move down: Tea in'));
    expect(screen.getAllByRole('alert').length).toBeGreaterThan(0);
    const keep = screen.getByText<HTMLButtonElement>('Keep the sheet', { selector: 'button' });
    expect(keep.disabled).toBe(true);
    await press('Undo');
    await press('Undo');
    expect(screen.queryAllByRole('alert')).toEqual([]);
  });

  it('loses nothing when somebody else changed the sheet meanwhile', async () => {
    const onClose = vi.fn();
    renderAt(<SheetEditor plan={plan} onClose={onClose} />);
    plan = { ...plan, sheetVersion: 2 };
    await userEvent.click(button('Move down: Check the kit'));
    await press('Keep the sheet');
    expect((await screen.findByRole('alert')).textContent).toContain('Somebody else changed this sheet');
    expect(onClose).not.toHaveBeenCalled();
    await press('Keep mine instead');
    await vi.waitFor(() => expect(onClose).toHaveBeenCalledOnce());
    expect(hub.bodiesOf(patch)).toMatchObject([{ sheetVersion: 1 }, { sheetVersion: 2 }]);
    expect(titles()[1]).toBe('Check the kit');
  });

  it('asks before changes are lost by going elsewhere', async () => {
    const router = renderAt(<SheetEditor plan={plan} onClose={vi.fn()} />);
    await userEvent.click(button('Move down: Check the kit'));
    await act(() => router.navigate('/recipes'));
    const question = await screen.findByRole('alertdialog');
    expect(question.textContent).toContain('not kept yet');
    await userEvent.click(within(question).getByText('Stay here'));
    expect(screen.getByText('Keep the sheet')).toBeTruthy();
  });
});
