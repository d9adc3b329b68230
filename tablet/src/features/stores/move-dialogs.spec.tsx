import { problem } from '@steepfall/shared/problems';
import { screen } from '@testing-library/react';
import userEvent from '@testing-library/user-event';
import { afterEach, beforeEach, describe, expect, it, vi } from 'vitest';
import { DeskHub, renderAt } from '../../testing/desk-hub.tsx';
import { buildIngredient, buildLot, hopFacts } from '../../testing/stores-builders.ts';
import { CountLotDialog, UseLotDialog } from './move-dialogs.tsx';

const lot = buildLot({ code: 'C-24', stockG: 34, reservedG: 10 });
const moves = `POST stores/lots/${lot.id}/moves`;
let hub: DeskHub;
// Dialogs in jsdom are slow on a machine that has other work.
vi.setConfig({ testTimeout: 20_000 });

beforeEach(async () => {
  hub = new DeskHub({
    [moves]: ({ kind, massG, mayGoBelowZero }: { kind: string; massG: number; mayGoBelowZero: boolean }) =>
      kind === 'used' && massG > 34 && !mayGoBelowZero
        ? problem('not-enough-stock', 'Send mayGoBelowZero.')
        : buildIngredient(hopFacts, [lot]),
  });
  await hub.signIn();
});
afterEach(() => hub.signOut());

const press = (name: string) => userEvent.click(screen.getByRole('button', { name }));

describe(UseLotDialog, () => {
  it('says how much there is, and goes below zero only when asked once more', async () => {
    const onClose = vi.fn();
    renderAt(<UseLotDialog lot={lot} onClose={onClose} />);
    expect(screen.getByText(/of which 10/)).toBeTruthy();
    await userEvent.type(screen.getByLabelText('How much'), '50');
    await press('Take it out');
    const refusal = await screen.findByRole('alert');
    expect(refusal.textContent).toContain('It holds 34');
    expect(refusal.textContent).not.toContain('mayGoBelowZero');
    expect(onClose).not.toHaveBeenCalled();
    expect(screen.getByLabelText<HTMLInputElement>('How much').value).toBe('50');
    await press('Take it all the same');
    await vi.waitFor(() => expect(onClose).toHaveBeenCalledOnce());
    expect(hub.bodiesOf(moves)).toMatchObject([
      { massG: 50, mayGoBelowZero: false },
      { massG: 50, mayGoBelowZero: true },
    ]);
  });

  it.each([
    ['', 'Type a number.'],
    ['twelve', 'Type a number.'],
    ['-3', 'A mass above 0 g.'],
    ['1e9', 'At most 1000 kg.'],
  ])('says of "%s" what to do, and asks the hub nothing', async (text, words) => {
    renderAt(<UseLotDialog lot={lot} onClose={vi.fn()} />);
    if (text) await userEvent.type(screen.getByLabelText('How much'), text);
    await press('Take it out');
    expect(await screen.findByText(words)).toBeTruthy();
    expect(hub.bodiesOf(moves)).toEqual([]);
  });
});

describe(CountLotDialog, () => {
  it('says what the count changes before it is written down', async () => {
    renderAt(<CountLotDialog lot={lot} onClose={vi.fn()} />);
    await userEvent.type(screen.getByLabelText('Weighed'), '30');
    expect(screen.getByRole('status').textContent).toBe('4\u00a0g less than the book has.');
    await press('Write it down');
    await vi.waitFor(() => expect(hub.bodiesOf(moves)).toEqual([{ kind: 'counted', toG: 30, reason: '' }]));
  });
});
