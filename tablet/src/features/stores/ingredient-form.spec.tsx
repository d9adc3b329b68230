import { problem } from '@steepfall/shared/problems';
import { screen } from '@testing-library/react';
import userEvent from '@testing-library/user-event';
import { afterEach, beforeEach, describe, expect, it, vi } from 'vitest';
import { DeskHub, renderAt } from '../../testing/desk-hub.tsx';
import { buildIngredient, teaFacts } from '../../testing/stores-builders.ts';
import { AddIngredientDialog, EditIngredientDialog } from './ingredient-form.tsx';

const sencha = buildIngredient(teaFacts);
const patch = `PATCH stores/ingredients/${sencha.id}`;
let hub: DeskHub;
// Dialogs in jsdom are slow on a machine that has other work.
vi.setConfig({ testTimeout: 20_000 });
let isChangedMeanwhile = false;

beforeEach(async () => {
  isChangedMeanwhile = false;
  hub = new DeskHub({
    'POST stores/ingredients': ({ facts }: { facts: { name: string } }) =>
      facts.name === 'gypsum'
        ? problem('not-valid', 'No.', { errors: [{ pointer: '/facts/name', detail: 'There is a gypsum already.' }] })
        : sencha,
    'GET stores': () => [isChangedMeanwhile ? { ...sencha, version: sencha.version + 1 } : sencha],
    [patch]: ({ version }: { version: number }) =>
      isChangedMeanwhile && version === sencha.version ? problem('changed-meanwhile', 'Look again.') : sencha,
  });
  await hub.signIn({ temperature: 'C', mass: 'oz', volume: 'L', pressure: 'kPa' });
});
afterEach(() => hub.signOut());

const press = (name: string) => userEvent.click(screen.getByRole('button', { name }));

describe(AddIngredientDialog, () => {
  it('asks in plain words which calcium chloride is in the jar, and takes ounces', async () => {
    renderAt(<AddIngredientDialog onClose={vi.fn()} />);
    await userEvent.click(screen.getByRole('radio', { name: 'Salt' }));
    await userEvent.type(screen.getByLabelText('Name'), 'calcium chloride');
    expect(screen.getByRole('radio', { name: /dihydrate/ }).getAttribute('aria-checked')).toBe('true');
    await userEvent.click(screen.getByRole('radio', { name: /anhydrous/ }));
    await userEvent.type(screen.getByLabelText('Low when there is less than'), '2');
    await press('Add it');
    await vi.waitFor(() =>
      expect(hub.bodiesOf('POST stores/ingredients')).toEqual([
        {
          facts: {
            kind: 'salt',
            name: 'calcium chloride',
            salt: 'calciumChlorideAnhydrous',
            assayPercent: 100,
            lowStockG: expect.closeTo(56.7, 1) as number,
            allergens: '',
          },
        },
      ]),
    );
  });

  it('puts what the hub says at its field, and keeps what was typed', async () => {
    renderAt(<AddIngredientDialog onClose={vi.fn()} />);
    await userEvent.type(screen.getByLabelText('Name'), 'gypsum');
    await userEvent.type(screen.getByLabelText('Caffeine'), '1o');
    await press('Add it');
    expect(await screen.findByText('Type a number.')).toBeTruthy();
    await userEvent.clear(screen.getByLabelText('Caffeine'));
    await press('Add it');
    expect(await screen.findByText('There is a gypsum already.')).toBeTruthy();
    expect(screen.getByLabelText<HTMLInputElement>('Name').value).toBe('gypsum');
  });
});

describe(EditIngredientDialog, () => {
  it('lets the second of two people choose', async () => {
    isChangedMeanwhile = true;
    const onClose = vi.fn();
    renderAt(<EditIngredientDialog ingredient={sencha} onClose={onClose} />);
    await userEvent.type(screen.getByLabelText('Name'), ' first flush');
    await press('Save');
    expect((await screen.findByRole('alert')).textContent).toContain('What you typed still stands here');
    await press('Save mine over theirs');
    await vi.waitFor(() => expect(onClose).toHaveBeenCalledOnce());
    expect(hub.bodiesOf(patch)).toMatchObject([
      { facts: { name: 'sencha first flush' }, version: sencha.version },
      { facts: { name: 'sencha first flush' }, version: sencha.version + 1 },
    ]);
  });
});
