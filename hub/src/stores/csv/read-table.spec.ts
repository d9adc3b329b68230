import { describe, expect, it } from 'vitest';
import { readTable } from './read-table.js';

const problemOf = (csv: string): string => {
  try {
    readTable(csv);
  } catch (error) {
    return (error as { extras: { errors: { pointer: string; detail: string }[] } }).extras.errors
      .map(({ pointer, detail }) => `${pointer} ${detail}`)
      .join('\n');
  }
  return '';
};

describe(readTable, () => {
  it('counts rows as a spreadsheet does: the head is row 1, empty rows and breaks in a cell are no stumbling block', () => {
    const csv = '\uFEFFkind,name,note\r\nother,"a ""b"", c",x\r\n,,\r\n\r\nother,"two\nlines",\r\nother,last\r\n';
    expect(readTable(csv)).toEqual([
      { row: 2, record: { kind: 'other', name: 'a "b", c', note: 'x' }, hasMoreCells: false },
      { row: 5, record: { kind: 'other', name: 'two\nlines', note: '' }, hasMoreCells: false },
      { row: 6, record: { kind: 'other', name: 'last', note: '' }, hasMoreCells: false },
    ]);
  });

  it.each([',', ';', '\t'])('finds the separator %j', (separator) => {
    const csv = ['kind|name|price per kg|', 'other|Peel|1.5||'].join('\n').replaceAll('|', separator);
    expect(readTable(csv)).toEqual([
      { row: 2, record: { kind: 'other', name: 'Peel', 'price per kg': '1.5' }, hasMoreCells: false },
    ]);
  });

  it('takes quotation marks within a cell as they are', () => {
    expect(readTable('kind,name\nother,peel 5" long')[0]?.record).toEqual({ kind: 'other', name: 'peel 5" long' });
  });

  it('marks a row with more cells than heads', () => {
    expect(readTable('kind,name,price per kg\nother,Peel,1,5')[0]).toMatchObject({ hasMoreCells: true });
  });

  it('says what is wrong with the whole file', () => {
    expect(problemOf('name,colour\nx,y')).toContain('/csv Add a column with the head "kind".');
    expect(problemOf('name,colour\nx,y')).toContain('No column is called "colour"');
    expect(problemOf('kind,name')).toContain('nothing below the head');
    expect(problemOf(' ')).toContain('Add a column');
    expect(problemOf('kind,name\nother,ok\nother,"never closed')).toContain('opens in row 3');
    expect(problemOf(`kind,name\n${'other,x\n'.repeat(5001)}`)).toContain('5001 rows');
    expect(problemOf('\u0089PNG\r\n\u0000\u0001'.repeat(5000))).toContain('Add a column');
    expect(problemOf('x'.repeat(100_000)).length).toBeLessThan(2000);
  });
});
