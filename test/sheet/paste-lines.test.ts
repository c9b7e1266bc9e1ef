// Lines taken out of a sheet and put into the same or another one: names, references, cases, signs, and that the way back is whole.

import fc from 'fast-check';
import { describe, expect, it } from 'vitest';
import { applyEdit, calculate, pasteLines, readSheet, type Sheet, takeLines, writeSheet } from '../../src/sheet/index.ts';

const sheet: Sheet = {
  format: 'tightside-sheet/1',
  title: 'Area',
  references: [
    { id: 'R1', document: 'Drawing 7' },
    { id: 'R2', document: 'Brief' },
  ],
  cases: [{ id: 'run' }, { id: 'rest' }],
  cells: [
    { id: 'g1', kind: 'given', name: 'a', value: '2 m', source: '[R1] view A', toConfirm: 'P-1' },
    { id: 'g2', kind: 'given', name: 'b', value: '3 m', byCase: { rest: '4 m' } },
    { id: 'd1', kind: 'derived', name: 'A', title: 'Area, of which b_1 is no part', formula: 'a*b', unit: 'm^2' },
    { id: 'n1', kind: 'note', text: 'The area is {A}, see [R2].' },
    { id: 't1', kind: 'table', name: 'steel', columns: [{ name: 'kind' }, { name: 'f', unit: 'MPa' }], rows: [['S235', '235']] },
    { id: 'k1', kind: 'criterion', left: 'A', relation: '<=', right: '"20 m^2"', justification: 'agreed' },
  ],
};
const other: Sheet = {
  format: 'tightside-sheet/1',
  title: 'Other',
  references: [{ id: 'R1', document: 'Another paper' }],
  settings: { decimalSign: ',' },
  cells: [{ id: 'g1', kind: 'given', name: 'a', value: '9,5 m' }],
};
const put = (into: Sheet, lines: Sheet, at: number, foreign: boolean) => {
  const pasted = pasteLines(into, lines, at, foreign);
  return { ...pasted, sheet: applyEdit(into, pasted.edit).sheet };
};

describe('lines put into their own sheet', () => {
  it('get free names among themselves, and keep meaning what they did not bring along', () => {
    const { sheet: now, renamed, cells } = put(sheet, takeLines(sheet, ['g1', 'd1', 'n1']), 6, false);
    expect([...renamed]).toEqual([
      ['a', 'a_B'],
      ['A', 'A_B'],
    ]);
    expect(cells).toHaveLength(3);
    const [given, derived, note] = now.cells.slice(6);
    expect(given).toMatchObject({ name: 'a_B', value: '2 m', source: '[R1] view A', toConfirm: 'P-1' });
    expect(derived).toMatchObject({ name: 'A_B', formula: 'a_B*b', title: 'Area, of which b_1 is no part' });
    expect(note).toMatchObject({ text: 'The area is {A_B}, see [R2].' });
    expect(calculate(now).problems()).toEqual([]);
    expect(now.references).toBe(sheet.references);
  });

  it('a copy of a copy takes the next letter, not a second one', () => {
    const once = put(sheet, takeLines(sheet, ['g1']), 6, false).sheet;
    const last = once.cells.at(-1);
    expect(put(once, takeLines(once, [last?.id ?? '']), 7, false).renamed.get('a_B')).toBe('a_C');
  });

  it('that were taken out before come back as they were', () => {
    const lines = takeLines(sheet, ['g1', 'd1']);
    const without = { ...sheet, cells: sheet.cells.filter(({ id }) => id !== 'g1' && id !== 'd1') };
    const { sheet: back, renamed } = put(without, lines, 0, false);
    expect(renamed.size).toBe(0);
    expect(back.cells.slice(0, 2)).toEqual(lines.cells);
  });

  it('a table gets a free name of its own, which what came with it looks up', () => {
    const withLookup: Sheet = {
      ...sheet,
      cells: [...sheet.cells, { id: 'g3', kind: 'given', name: 'S', value: 'S235', choices: 'steel.kind' }],
    };
    const { sheet: now } = put(withLookup, takeLines(withLookup, ['t1', 'g3']), 7, false);
    expect(now.cells.slice(7)).toMatchObject([{ name: 'steel_B' }, { name: 'S_B', choices: 'steel_B.kind' }]);
  });
});

describe('lines put into another sheet', () => {
  const { sheet: now, notes } = put(other, takeLines(sheet, ['g1', 'g2', 'n1', 'k1']), 1, true);

  it('are carried over, without what tracked or excused them', () => {
    expect(now.cells[1]).toMatchObject({ name: 'a_B', carriedOver: true });
    expect(now.cells[1]).not.toHaveProperty('toConfirm');
    expect(now.cells[4]).not.toHaveProperty('justification');
  });

  it('bring the references they cite under free ids, and leave out values of cases that are not there, with a word', () => {
    expect(now.references).toEqual([
      { id: 'R1', document: 'Another paper' },
      { id: 'R2', document: 'Drawing 7' },
      { id: 'R3', document: 'Brief' },
    ]);
    expect(now.cells[1]).toMatchObject({ source: '[R2] view A' });
    expect(now.cells[3]).toMatchObject({ text: 'The area is {A}, see [R3].' });
    expect(now.cells[2]).not.toHaveProperty('byCase');
    expect(notes).toHaveLength(1);
    expect(notes[0]).toContain('no case rest');
    expect(notes[0]).toContain('b');
  });

  it('write their numbers with its decimal sign', () => {
    const cells: Sheet['cells'] = [{ id: 'x', kind: 'derived', name: 'y', formula: '2*"1.5 m"' }];
    expect(put(other, { ...sheet, cells }, 1, true).sheet.cells[1]).toMatchObject({ formula: '2*"1,5 m"' });
  });
});

it('any run of any length goes in and comes out again, and what goes to the clipboard is a file that is read', () => {
  const seed = 20261201;
  fc.assert(
    fc.property(fc.subarray(sheet.cells.map(({ id }) => id)), fc.nat(6), fc.boolean(), (ids, at, foreign) => {
      const lines = takeLines(sheet, ids);
      const read = readSheet(writeSheet(lines));
      expect(read).toMatchObject({ ok: true });
      const pasted = pasteLines(sheet, lines, at, foreign);
      const done = applyEdit(sheet, pasted.edit);
      expect(new Set(done.sheet.cells.map(({ id }) => id)).size).toBe(sheet.cells.length + ids.length);
      expect(readSheet(writeSheet(done.sheet))).toMatchObject({ ok: true });
      expect(applyEdit(done.sheet, done.inverse).sheet).toEqual(sheet);
      expect(
        calculate(done.sheet)
          .problems()
          .filter(({ code }) => code === 'name-twice'),
      ).toEqual([]);
    }),
    { seed, numRuns: 60 },
  );
});
