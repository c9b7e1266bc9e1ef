// Rows of tables that the calculation uses are marked: by which line, how, in which cases.

import { expect, it } from 'vitest';
import { makeRecord, markWords, recordHtml } from '../../src/record/index.ts';
import { calculate, type Sheet } from '../../src/sheet/index.ts';

const sheet = (value: string, byCase?: Readonly<Record<string, string>>): Sheet => ({
  format: 'tightside-sheet/1',
  title: 'Marks',
  cases: [
    { id: 'run', title: 'Running' },
    { id: 'start', title: 'Start-up' },
  ],
  cells: [
    {
      id: 't1',
      kind: 'table',
      name: 'surfaces',
      title: 'Friction',
      columns: [{ name: 'surface' }, { name: 'mu', unit: '1' }],
      rows: [
        ['cork', '0.35'],
        ['felt', '0.22'],
        ['steel', '0.15'],
      ],
      source: 's',
    },
    {
      id: 't2',
      kind: 'table',
      name: 'wrap',
      title: 'Arc factor',
      columns: [
        { name: 'theta', unit: 'deg' },
        { name: 'C_a', unit: '1' },
      ],
      rows: [
        ['120', '0.8'],
        ['150', '0.9'],
        ['180', '1.0'],
      ],
      source: 's',
    },
    {
      id: 'g1',
      kind: 'given',
      name: 'surface',
      value,
      choices: 'surfaces.surface',
      ...(byCase === undefined ? {} : { byCase }),
      basis: 'specified',
      source: 's',
    },
    { id: 'g2', kind: 'given', name: 'theta', value: '160 deg', byCase: { start: '180 deg' }, basis: 'specified', source: 's' },
    { id: 'd1', kind: 'derived', name: 'mu', formula: 'entry(surfaces, mu, surface)', source: 's' },
    {
      id: 'd2',
      kind: 'derived',
      name: 'C_a',
      formula: 'theta > 0 ? interpolate(wrap, C_a, theta) : entry(wrap, C_a, "120 deg")',
      source: 's',
    },
  ],
});

function marksOf(name: string, of: Sheet) {
  const model = makeRecord(calculate(of));
  const line = model.lines.find((one) => one.kind === 'table' && one.name === name);
  return line?.kind === 'table' ? line.marks.map((mark) => `${mark.row}: ${markWords(mark, model.cases)}`) : [];
}
const numbers = (of: Sheet) => new Map(makeRecord(calculate(of)).steps.map(({ cell, number }) => [cell, number]));

it('marks the row that a choice takes and an entry reads, once for all cases', () => {
  const of = sheet('felt');
  const number = numbers(of);
  expect(marksOf('surfaces', of)).toEqual([`1: chosen in ${number.get('g1')}`, `1: read in ${number.get('d1')}`]);
});

it('marks other rows in other cases, and names the cases', () => {
  const of = sheet('felt', { start: 'cork' });
  const number = numbers(of);
  expect(marksOf('surfaces', of)).toEqual([
    `0: chosen in ${number.get('g1')}: Start-up`,
    `0: read in ${number.get('d1')}: Start-up`,
    `1: chosen in ${number.get('g1')}: Running`,
    `1: read in ${number.get('d1')}: Running`,
  ]);
});

it('marks both rows that a value lies between, the one row that it meets, and none on a branch that is not taken', () => {
  const of = sheet('felt');
  const number = numbers(of);
  expect(marksOf('wrap', of)).toEqual([
    `1: between in ${number.get('d2')}: Running`,
    `2: read in ${number.get('d2')}: Start-up`,
    `2: between in ${number.get('d2')}: Running`,
  ]);
});

it('marks nothing in a table that nobody uses, and the record without marks has no column for them', () => {
  const of = { ...sheet('felt'), cells: sheet('felt').cells.filter(({ kind }) => kind === 'table') };
  expect(marksOf('surfaces', of)).toEqual([]);
  const assets = { faces: [], formulaStyle: '' };
  expect(recordHtml(makeRecord(calculate(of)), assets)).not.toContain('class="use"');
  const used = recordHtml(makeRecord(calculate(sheet('felt'))), assets);
  expect(used.match(/<tr class="used">/gu)).toHaveLength(3);
  expect(used).toContain('chosen in <a href="#step-');
});
