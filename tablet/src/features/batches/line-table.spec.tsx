import { render, screen, within } from '@testing-library/react';
import userEvent from '@testing-library/user-event';
import { describe, expect, it } from 'vitest';
import { LineTable } from './line-table.tsx';

const startedAtMs = new Date(2025, 10, 20, 9, 0, 0).getTime();
const line = Array.from({ length: 100 }, (_, i) => ({ atMs: startedAtMs + i * 30_000, tempC: 80 - i * 0.5 }));
const flags = [
  { id: 'a', number: 12, title: 'Chiller on', atMs: startedAtMs + 40_000, isVital: false },
  { id: 'b', number: 13, title: 'Hops in', atMs: startedAtMs + 1_081_000, isVital: true },
];

const bodyRows = () => within(screen.getByRole('table')).getAllByRole('row').slice(1);
const cellsOf = (row: HTMLElement) =>
  within(row)
    .getAllByRole('cell')
    .map(({ textContent }) => textContent);

describe(LineTable, () => {
  it('names itself and its columns', () => {
    render(<LineTable line={line} flags={flags} startedAtMs={startedAtMs} />);
    const table = screen.getByRole('table', { name: 'The recorded temperature, and what happened' });
    expect(
      within(table)
        .getAllByRole('columnheader')
        .map(({ textContent }) => textContent),
    ).toEqual(['Clock', 'Into the run', 'Liquid', 'What happened']);
  });

  it('puts what happened between the readings, with its number and the temperature then', () => {
    render(<LineTable line={line} flags={flags} startedAtMs={startedAtMs} />);
    const rows = bodyRows().map(cellsOf);
    expect(rows[1]?.[1]).toContain('0:30');
    expect(rows[2]).toEqual(['Clock09:00', 'Into the run0:40', 'Liquid79.5\u00a0°C', 'What happened12. Chiller on']);
    expect(rows[3]?.[1]).toContain('1:00');
  });

  it('shows twenty rows a page, and says where it is', async () => {
    render(<LineTable line={line} flags={flags} startedAtMs={startedAtMs} />);
    expect(bodyRows()).toHaveLength(20);
    expect(screen.getByRole('status').textContent).toBe('1 to 20 of 102 rows');
    await userEvent.click(screen.getByRole('button', { name: 'Page on' }));
    expect(screen.getByRole('status').textContent).toBe('21 to 40 of 102 rows');
    expect(screen.getByText('13. Hops in')).toBeTruthy();
  });

  it('thins a long record, and keeps its last reading', async () => {
    const long = Array.from({ length: 5000 }, (_, i) => ({ atMs: startedAtMs + i * 1000, tempC: 20 + i * 0.001 }));
    render(<LineTable line={long} flags={[]} startedAtMs={startedAtMs} />);
    const total = Number(/of (\d+) rows/.exec(screen.getByRole('status').textContent ?? '')?.[1]);
    expect(total).toBeLessThanOrEqual(241);
    const on = screen.getByRole<HTMLButtonElement>('button', { name: 'Page on' });
    while (!on.disabled) await userEvent.click(on);
    expect(cellsOf(bodyRows().at(-1)!)[1]).toContain('1:23:19');
  });
});
