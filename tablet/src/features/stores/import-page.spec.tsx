import type { ImportPreview } from '@steepfall/shared/contracts';
import { screen, within } from '@testing-library/react';
import userEvent from '@testing-library/user-event';
import { afterEach, beforeEach, describe, expect, it, vi } from 'vitest';
import { DeskHub, renderAt } from '../../testing/desk-hub.tsx';
import { ImportPage } from './import-page.tsx';

const row = (number: number, problems: ImportPreview['rows'][number]['problems'] = []) => ({
  row: number,
  ingredient: 'sencha',
  kind: 'tea',
  lot: `L-${number}`,
  massG: problems.length > 0 ? null : 100,
  does: 'new-lot',
  problems,
});
const bad = row(3, [{ column: 'mass', detail: '"lots" is no number: write digits, such as 2.5.' }]);
let rows = [row(2), bad, row(4)];
let hub: DeskHub;
// Dialogs in jsdom are slow on a machine that has other work.
vi.setConfig({ testTimeout: 20_000 });

beforeEach(async () => {
  rows = [row(2), bad, row(4)];
  hub = new DeskHub({
    'POST stores/import/preview': () => ({
      rows,
      badCount: rows.filter(({ problems }) => problems.length > 0).length,
      goodCount: rows.filter(({ problems }) => problems.length === 0).length,
    }),
    'POST stores/import': ({ skipRows }: { skipRows: number[] }) => ({
      ingredientCount: 0,
      lotCount: 2,
      skippedCount: skipRows.length,
    }),
  });
  await hub.signIn();
});
afterEach(() => hub.signOut());

async function choose(text = 'kind,name\ntea,sencha') {
  const file = new File([text], 'list.csv');
  // jsdom cannot read a file as bytes.
  const bytes = new TextEncoder().encode(text);
  file.slice = () => Object.assign(new Blob(), { arrayBuffer: () => Promise.resolve(bytes) });
  await userEvent.upload(screen.getByLabelText('List of the stores, as CSV'), file);
}
const bringIn = () => screen.findByRole<HTMLButtonElement>('button', { name: /^Bring in \d/ });

describe(ImportPage, () => {
  it('names the bad row and its column, and stays shut until it is left out on purpose', async () => {
    renderAt(<ImportPage />);
    await choose();
    const problemAt = (await screen.findByText('mass:')).closest('tr')!;
    expect(within(problemAt).getByText('3')).toBeTruthy();
    expect(problemAt.textContent).toContain('write digits, such as 2.5.');
    expect((await bringIn()).disabled).toBe(true);
    await userEvent.click(within(problemAt).getByRole('checkbox', { name: 'Leave out row 3' }));
    expect((await bringIn()).disabled).toBe(false);
    await userEvent.click(await bringIn());
    expect(await screen.findByText('2 lots came in. 1 row was left out on purpose.')).toBeTruthy();
    expect(hub.bodiesOf('POST stores/import')).toMatchObject([{ skipRows: [3] }]);
  });

  it('opens when the file was mended', async () => {
    renderAt(<ImportPage />);
    await choose();
    expect((await bringIn()).disabled).toBe(true);
    rows = [row(2), row(3), row(4)];
    await choose();
    expect(await screen.findByText('Every row is right.')).toBeTruthy();
    expect((await bringIn()).textContent).toBe('Bring in 3 rows');
    expect((await bringIn()).disabled).toBe(false);
  });

  it('says of an empty file what is the matter, without a hub', async () => {
    renderAt(<ImportPage />);
    await choose('');
    expect(await screen.findByText('The file is empty.')).toBeTruthy();
    expect(hub.asked.map(({ what }) => what)).not.toContain('POST stores/import/preview');
  });
});
