// A table as it is typed: rows and columns, blocks laid over them, what an import would change, what is wrong and where.

import { describe, expect, it } from 'vitest';
import { readTable, type Sheet, type TableCell, tableFromText, tableToText } from '../../src/sheet/index.ts';
import { changeOf, type Taking } from '../../src/view/table/changes.ts';
import * as edits from '../../src/view/table/edits.ts';
import { faultsOf, readersOf } from '../../src/view/table/faults.ts';

const cell: TableCell = {
  id: 't1',
  kind: 'table',
  name: 'belts',
  columns: [{ name: 'type' }, { name: 't', title: 'Thickness', unit: 'mm' }, { name: 'mu', unit: '1' }],
  rows: [
    ['A', '4', '0.3'],
    ['B', '5', '0.4'],
  ],
};
const sheetWith = (table: TableCell, ...formulas: readonly string[]): Sheet => ({
  format: 'tightside-sheet/1',
  title: 'T',
  cells: [table, ...formulas.map((formula, at) => ({ id: `d${at}`, kind: 'derived' as const, name: `x_${at}`, formula }))],
});

describe('rows and columns', () => {
  it.each<readonly [string, TableCell, readonly (readonly string[])[]]>([
    [
      'a row is added',
      edits.withRow(cell, 1),
      [
        ['A', '4', '0.3'],
        ['', '', ''],
        ['B', '5', '0.4'],
      ],
    ],
    ['a row is removed', edits.withoutRow(cell, 0), [['B', '5', '0.4']]],
    [
      'a row is moved',
      edits.withRowMoved(cell, 0, 1),
      [
        ['B', '5', '0.4'],
        ['A', '4', '0.3'],
      ],
    ],
    ['a row stays in the table', edits.withRowMoved(cell, 1, 1), cell.rows],
    [
      'a column is added',
      edits.withColumn(cell, 1),
      [
        ['A', '', '4', '0.3'],
        ['B', '', '5', '0.4'],
      ],
    ],
    [
      'a column is removed',
      edits.withoutColumn(cell, 1),
      [
        ['A', '0.3'],
        ['B', '0.4'],
      ],
    ],
    [
      'a column is moved',
      edits.withColumnMoved(cell, 2, -1),
      [
        ['A', '0.3', '4'],
        ['B', '0.4', '5'],
      ],
    ],
    [
      'an entry is set',
      edits.withEntry(cell, 1, 2, '0.5'),
      [
        ['A', '4', '0.3'],
        ['B', '5', '0.5'],
      ],
    ],
    ['a ragged row is fitted', edits.evenRow({ ...cell, rows: [['A'], ['B', '1', '2', '3']] }, 1), [['A'], ['B', '1', '2']]],
  ])('%s', (_, next, rows) => {
    expect(next.rows).toEqual(rows);
  });

  it('columns keep their entries below them, and a new one has a free name', () => {
    expect(edits.withColumnMoved(cell, 2, -1).columns.map(({ name }) => name)).toEqual(['type', 'mu', 't']);
    const twice = edits.withColumn(edits.withColumn(cell, 3), 3);
    expect(new Set(twice.columns.map(({ name }) => name)).size).toBe(5);
    expect(edits.withColumnKey(cell, 1, 'unit', ' ').columns[1]).toEqual({ name: 't', title: 'Thickness' });
  });

  it('a block adds rows as it needs them and tells what it leaves out', () => {
    const laid = edits.withBlock(cell, 1, 1, [
      ['6', '0.5', 'x'],
      ['7', '0.6'],
    ]);
    expect(laid.cell.rows).toEqual([
      ['A', '4', '0.3'],
      ['B', '6', '0.5'],
      ['', '7', '0.6'],
    ]);
    expect(laid.left).toBe('left out: 1 entry stands beyond the last column');
  });

  it('copied as text, a table is pasted as the same table', async () => {
    const preview = await tableFromText(await tableToText(cell, 'tab'));
    expect(changeOf(cell, preview, 'in place', sheetWith(cell), String)).toEqual({ cell, words: ['2 rows in place of 2'] });
  });
});

describe('what an import would change', () => {
  const of = async (text: string, how: Taking = 'in place', table = cell) => {
    const sheet = sheetWith(table, 'entry(belts, mu, "A")');
    return changeOf(table, await tableFromText(text), how, sheet, (id) => `line ${id}`);
  };
  it('is told column by column, with the lines that read a column that goes', async () => {
    const { words, cell: next } = await of('type,t (in),width [mm]\nC,0.25,40\n');
    expect(words).toEqual([
      '1 row in place of 2',
      'new column: width',
      'column mu goes, though line d0 reads it',
      'unit of t: in, was mm',
    ]);
    expect(next.columns).toEqual([
      { name: 'type' },
      { name: 't', title: 'Thickness', unit: 'in' },
      { name: 'width', unit: 'mm' },
    ]);
  });
  it('keeps the unit of the table where the text names none, and says so', async () => {
    const { words, cell: next } = await of('type,t,mu\nC,6,0.5\n');
    expect(words).toContain('unit of t: mm as before, the text names none');
    expect(next.columns[1]).toMatchObject({ name: 't', unit: 'mm' });
  });
  it('puts rows without heads under the columns that are there', async () => {
    const { cell: next } = await of('C,6,0.5\nD,7,0.6\n');
    expect(next.columns.map(({ name, unit }) => [name, unit])).toEqual([
      ['type', undefined],
      ['t', 'mm'],
      ['mu', '1'],
    ]);
    expect(next.rows).toEqual([
      ['C', '6', '0.5'],
      ['D', '7', '0.6'],
    ]);
  });
  it('puts rows behind those that are there, by the names of the columns', async () => {
    const { words, cell: next } = await of('mu,type,colour\n0.5,C,red\n', 'behind');
    expect(next.rows.at(-1)).toEqual(['C', '', '0.5']);
    expect(next.columns).toEqual(cell.columns);
    expect(words).toEqual([
      '1 row behind the 2 that are there',
      'left out, as the table has no such column: colour',
      'left empty: t',
    ]);
  });
});

describe('what is wrong', () => {
  const faults = (rows: readonly (readonly string[])[], ...formulas: readonly string[]) => {
    const table: TableCell = {
      ...cell,
      columns: [
        { name: 'theta', unit: 'deg' },
        { name: 'c', unit: '1' },
      ],
      rows,
    };
    return faultsOf(table, sheetWith(table, ...formulas));
  };
  it('is one sentence with its place', () => {
    expect(
      faults([
        ['120', '0.8'],
        ['150', 'much'],
      ]),
    ).toEqual([{ severity: 'error', message: expect.stringMatching(/^row 2, column c: /u), row: 1, column: 1, ragged: false }]);
    expect(faults([['120', '0.8'], ['150']])).toMatchObject([{ severity: 'error', row: 1, ragged: true }]);
  });
  it('an axis out of order is wrong only where a formula interpolates over it', () => {
    const rows = [
      ['120', '0.8'],
      ['100', '0.7'],
      ['150', '0.9'],
    ];
    expect(faults(rows)).toEqual([]);
    expect(faults(rows, '2*interpolate(belts, c, "130 deg")')).toMatchObject([{ severity: 'warning', row: 2, column: 0 }]);
    expect(faults(rows, 'entry(belts, c, "120 deg")')).toEqual([]);
  });
  it('knows who reads a column', () => {
    const sheet = sheetWith(cell, 'entry(belts, mu, "A")', 'entry( belts , t, "A")', 'entry(other, mu, "A")');
    expect(readersOf('belts', 'mu', sheet.cells)).toEqual(['d0']);
    expect(readersOf('belts', 't', sheet.cells)).toEqual(['d1']);
    expect(readTable(cell, '.').problems).toEqual([]);
  });
});
