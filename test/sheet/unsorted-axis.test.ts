// A table that a formula interpolates over says itself that its rows are out of order, before anybody looks at the formula.

import { expect, it } from 'vitest';
import { type Cell, calculate, type Sheet } from '../../src/sheet/index.ts';
import { cellOf, sheetOf } from './build.ts';

const table = (...keys: string[]): Cell => ({
  id: 't',
  kind: 'table',
  name: 'curve',
  columns: [
    { name: 'x', unit: 'mm' },
    { name: 'y', unit: '1' },
  ],
  rows: keys.map((key, i) => [key, String(i)]),
  source: 's',
});
const sheet = (formula: string, ...keys: string[]): Sheet => sheetOf([`q := ${formula}`], { more: [table(...keys)] });
const reads = 'interpolate(curve, y, "5 mm")';
const said = (calculation: ReturnType<typeof calculate>) =>
  calculation.problems().flatMap(({ cell, code, message }) => (cell === 't' ? [`${code}: ${message}`] : []));

it.each<[string, string, string[], string[]]>([
  [
    'out of order',
    reads,
    ['1', '9', '4'],
    [
      'unsorted-axis: column x neither rises nor falls throughout: row 3 (4) follows row 2 (9); a formula interpolates over it, sort the rows',
    ],
  ],
  [
    'equal keys',
    reads,
    ['1', '1', '9'],
    [
      'key-twice: the key “1” stands in more than one row; a lookup takes the first',
      'unsorted-axis: column x neither rises nor falls throughout: row 2 (1) follows row 1 (1); a formula interpolates over it, sort the rows',
    ],
  ],
  ['rising', reads, ['1', '4', '9'], []],
  ['falling', reads, ['9', '4', '1'], []],
  ['in units of their own', reads, ['1', '4', '0.9 cm'], []],
  ['one row', reads, ['5'], []],
  ['looked up exactly', 'entry(curve, y, "9 mm")', ['1', '9', '4'], []],
])('rows %s', (_what, formula, keys, expected) => {
  expect(said(calculate(sheet(formula, ...keys)))).toEqual(expected);
});

it('a key that is no number is its own trouble', () => {
  expect(said(calculate(sheet(reads, '1', 'nine', '4'))).map((text) => text.split(':')[0])).toEqual(['bad-entry']);
});

it('the warning comes and goes with the formula and the rows, and the table is told as changed', () => {
  const calculation = calculate(sheet('1', '1', '9', '4'));
  expect(said(calculation)).toEqual([]);
  const steps: [Sheet, number][] = [
    [sheet(reads, '1', '9', '4'), 1],
    [sheet('entry(curve, y, "9 mm")', '1', '9', '4'), 0],
    [sheet(reads, '1', '9', '4'), 1],
    [sheet(reads, '1', '4', '9'), 0],
    [sheet(reads, '1', '9', '4'), 1],
    [{ ...sheet(reads, '1', '9', '4'), cells: [table('1', '9', '4')] }, 0],
    [{ ...sheet(reads, '1', '9', '4'), cells: [table('1', '9', '4'), cellOf(`k := ${reads}`, 0)] }, 1],
  ];
  for (const [next, count] of steps) {
    const changed = calculation.update(next);
    expect(said(calculation)).toHaveLength(count);
    expect(changed.has('t')).toBe(true);
    expect(said(calculation)).toEqual(said(calculate(next)));
  }
});
