import { act, renderHook } from '@testing-library/react';
import { createColumnHelper } from '@tanstack/react-table';
import { describe, expect, it } from 'vitest';
import { useListTable } from './use-list-table.ts';

interface Row {
  name: string;
  kind: 'tea' | 'hops';
}
const column = createColumnHelper<Row>();
const columns = [column.accessor('name', {}), column.accessor('kind', { filterFn: 'equalsString' })];
const rowsOf = (count: number): Row[] =>
  Array.from({ length: count }, (_, i) => ({ name: `row ${i}`, kind: i % 2 === 0 ? 'tea' : 'hops' }));

function listOf(count: number) {
  const start: { data: Row[]; kind: Row['kind'] | null } = { data: rowsOf(count), kind: null };
  const { result, rerender } = renderHook(
    ({ data, kind }) =>
      useListTable({
        data,
        columns,
        orderAtFirst: [{ id: 'name', desc: false }],
        only: kind && { id: 'kind', value: kind },
      }),
    { initialProps: start },
  );
  // What the library does with new rows it does a moment later.
  const show = (props: typeof start) => act(async () => rerender(props));
  const page = () => result.current.table.getState().pagination.pageIndex;
  const turn = () => act(() => result.current.table.nextPage());
  return { result, show, page, turn, start };
}

describe(useListTable, () => {
  it('stays on its page when the rows are asked for anew, and leaves a page that is gone', async () => {
    const { show, page, turn, start } = listOf(60);
    await show(start);
    turn();
    turn();
    await show({ ...start, data: rowsOf(60) });
    expect(page()).toBe(2);
    await show({ ...start, data: rowsOf(30) });
    expect(page()).toBe(1);
  });

  it('begins at the first page with other words, and with another filter', async () => {
    const { result, show, page, turn, start } = listOf(60);
    turn();
    act(() => result.current.setWords('row'));
    expect(page()).toBe(0);
    turn();
    await show({ ...start, kind: 'tea' });
    expect([page(), result.current.table.getFilteredRowModel().rows.length]).toEqual([0, 30]);
  });
});
