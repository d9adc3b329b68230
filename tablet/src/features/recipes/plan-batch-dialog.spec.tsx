import type { Revision } from '@steepfall/shared/contracts';
import { problem } from '@steepfall/shared/problems';
import { buildDocument, buildHops } from '@steepfall/shared/testing';
import { screen } from '@testing-library/react';
import userEvent from '@testing-library/user-event';
import { afterEach, beforeEach, describe, expect, it, vi } from 'vitest';
import { newId } from '#lib/ids.ts';
import { DeskHub, renderAt } from '../../testing/desk-hub.tsx';
import { buildIngredient, buildLot, hopFacts } from '../../testing/stores-builders.ts';
import { PlanBatchDialog } from './plan-batch-dialog.tsx';

const kettleFacts = { volumeL: 30, diameterM: 0.34, massKg: 3, heaterPowerW: 3000, heaterEfficiency: 0.9 };
const equipment = [
  { id: newId(), version: 1, kind: 'kettle', name: 'Kettle', facts: kettleFacts },
  { id: newId(), version: 1, kind: 'keg', name: 'Keg', facts: { volumeL: 19, tareG: 4200, ratedKPa: 900 } },
];
const old = buildLot({ code: 'old', stockG: 20, bestBefore: '2027-01-01', pricePerKg: 40 });
const fresh = buildLot({ code: 'fresh', stockG: 500, bestBefore: '2028-01-01', pricePerKg: 50 });
const revision: Revision = {
  id: newId(),
  recipeId: newId(),
  number: 1,
  note: '',
  createdAtMs: 1,
  createdBy: 'Brewer',
  document: buildDocument({ additions: [buildHops({ massG: 60 })], volumeL: 20 }),
};
let hub: DeskHub;
let lots = [old, fresh];
const onScale = vi.fn();
vi.setConfig({ testTimeout: 20_000 });

beforeEach(async () => {
  lots = [old, fresh];
  hub = new DeskHub({
    'GET equipment': () => equipment,
    'GET probes': () => [],
    'GET stores': () => [buildIngredient(hopFacts, lots)],
    'POST batches': ({ mayGoBelowZero, reserve }: { mayGoBelowZero: boolean; reserve: { massG: number }[] }) =>
      reserve.some(({ massG }) => massG > 500) && !mayGoBelowZero
        ? problem('not-enough-stock', 'No.', {
            errors: [{ pointer: '/reserve/1/massG', detail: 'Lot fresh has 500 g free.' }],
          })
        : {},
  });
  await hub.signIn();
  renderAt(<PlanBatchDialog revision={revision} recipeName="Cascade" isOpen onClose={vi.fn()} onScale={onScale} />);
  await screen.findByText('From the stores');
});
afterEach(() => hub.signOut());

const amounts = () => screen.getAllByLabelText<HTMLInputElement>('How much of it for Cascade');
const press = (name: string) => userEvent.click(screen.getByText(name, { selector: 'button' }));

describe(PlanBatchDialog, () => {
  it('proposes the lot that must be used first, then the next, and says what it costs', async () => {
    expect(amounts().map(({ value }) => value)).toEqual(['20', '40']);
    // 20 g at 40 and 40 g at 50 a kilogram.
    expect(screen.getByText(/2\.80/)).toBeTruthy();
    await press('Plan it');
    await vi.waitFor(() =>
      expect(hub.bodiesOf('POST batches')).toMatchObject([
        {
          reserve: [
            { additionId: 'cascade', lotId: old.id, massG: 20 },
            { additionId: 'cascade', lotId: fresh.id, massG: 40 },
          ],
          mayGoBelowZero: false,
        },
      ]),
    );
  });

  it('says what is not set aside in full, and leaves the choice', async () => {
    await userEvent.clear(amounts()[1]!);
    await userEvent.type(amounts()[1]!, '30');
    expect(screen.getByText(/10\sg short/)).toBeTruthy();
    expect(screen.getByText('Plan it all the same')).toBeTruthy();
    await press('Scale the recipe');
    expect(onScale).toHaveBeenCalledOnce();
  });

  it('puts a refusal at its lot, and goes below zero only on purpose', async () => {
    await userEvent.clear(amounts()[1]!);
    await userEvent.type(amounts()[1]!, '900');
    await press('Plan it');
    expect(await screen.findByText('Lot fresh has 500 g free.')).toBeTruthy();
    await press('Set it aside all the same');
    await vi.waitFor(() =>
      expect(hub.bodiesOf('POST batches')).toMatchObject([{ mayGoBelowZero: false }, { mayGoBelowZero: true }]),
    );
  });
});
