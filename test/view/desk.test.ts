// The desk: what typing shows, keeps and takes back, compared with a fresh calculation of the sheet it stands for.

import { readFileSync } from 'node:fs';
import { describe, expect, it } from 'vitest';
import { makeRecord } from '../../src/record/index.ts';
import { calculate, readSheet, type Sheet, writeSheet } from '../../src/sheet/index.ts';
import { solver } from '../../src/study/index.ts';
import { createDesk } from '../../src/view/desk.ts';
import { cellOf } from '../../src/view/share.ts';
import { countLines } from '../../src/view/waiting.ts';

const read = readSheet(readFileSync(new URL('../../src/view/example.sheet.json', import.meta.url), 'utf8'));
if (!read.ok) throw new Error('the example cannot be read');
const example: Sheet = read.value;

/** A small sheet whose numbers can be checked in the head: A = a·b, at most 10 m². */
const small: Sheet = {
  format: 'tightside-sheet/1',
  title: 'Area',
  cases: [
    { id: 'run', title: 'Running' },
    { id: 'rest', title: 'At rest' },
  ],
  cells: [
    { id: 'g1', kind: 'given', name: 'a', title: 'Length', value: '2 m', basis: 'measured', source: 'tape', toConfirm: 'P-1' },
    {
      id: 'g2',
      kind: 'given',
      name: 'b',
      title: 'Width',
      value: '3 m',
      byCase: { rest: '4 m' },
      source: 'drawing',
      carriedOver: true,
    },
    { id: 'd1', kind: 'derived', name: 'A', title: 'Area', formula: 'a*b', unit: 'm^2', source: 'rectangle' },
    { id: 'k1', kind: 'criterion', title: 'Small enough', left: 'A', relation: '<=', right: '"10 m^2"', source: 'brief' },
    { id: 'g3', kind: 'given', name: 'c', title: 'Not used', value: '1 kg', source: 'scale' },
  ],
};

const area = (desk: ReturnType<typeof createDesk>) => [...(desk.calculation.named('A')?.si ?? [])];
const given = (desk: ReturnType<typeof createDesk>, id: string) => {
  const cell = desk.sheet.cells.find((one) => one.id === id);
  if (cell?.kind !== 'given') throw new Error(`no given ${id}`);
  return cell;
};

describe('the desk', () => {
  it('shows the numbers of every key stroke and keeps them as one step', () => {
    const desk = createDesk(small);
    expect(area(desk)).toEqual([6, 8]);
    expect(desk.begin('g1', 'value', 0)).toBe(true);
    desk.type('2.5 m');
    expect(area(desk)).toEqual([7.5, 10]);
    expect(desk.undoLabel).toBeNull();
    desk.finish();
    expect(area(desk)).toEqual([7.5, 10]);
    expect(desk.undoLabel).toBe('value of a');
    desk.undo();
    expect(area(desk)).toEqual([6, 8]);
    expect(writeSheet(desk.sheet)).toBe(writeSheet(small));
    desk.redo();
    expect(area(desk)).toEqual([7.5, 10]);
  });

  it('recalculates on a key stroke, and lays the lines out when they are asked for', () => {
    const desk = createDesk(small);
    const before = desk.drawn;
    desk.begin('g1', 'value', 0);
    desk.type('2.5 m');
    expect(desk.drawn).toBe(before);
    expect(area(desk)).toEqual([7.5, 10]);
    expect(desk.model.summary[0]?.cases.map((one) => one.printed)).toEqual(['0.75', '1.00']);
    expect(desk.drawn).toBe(desk.model);
  });

  it('takes back what was typed, whole', () => {
    const desk = createDesk(small);
    desk.begin('g1', 'value', 0);
    desk.type('9 m');
    desk.cancel();
    expect(area(desk)).toEqual([6, 8]);
    expect(desk.sheet).toBe(small);
    expect(desk.undoLabel).toBeNull();
    expect(desk.unsaved).toBe(false);
  });

  it.each(['', '2', '2 kg', '2 mm mm', '2 N', 'two metres', '2 mx'])(
    'keeps the last good numbers while “%s” stands there, and says why',
    (text) => {
      const desk = createDesk(small);
      desk.begin('g1', 'value', 0);
      desk.type('5 m');
      desk.type(text);
      expect(area(desk)).toEqual([15, 20]);
      expect(desk.editing?.text).toBe(text);
      expect(desk.editing?.problems.filter((problem) => problem.severity === 'error')).toHaveLength(1);
      expect(desk.editing?.problems[0]?.message.length).toBeGreaterThan(10);
      desk.type('1 m');
      expect(desk.editing?.problems).toEqual([]);
      expect(area(desk)).toEqual([3, 4]);
    },
  );

  it('keeps a text that cannot be read as it was typed, and lets what uses it wait', () => {
    const desk = createDesk(small);
    desk.begin('g1', 'value', 0);
    desk.type('2 kg');
    desk.finish();
    expect(given(desk, 'g1').value).toBe('2 kg');
    expect(area(desk)).toEqual([Number.NaN, Number.NaN]);
    expect(countLines(desk.model.problems)).toEqual({ wrong: ['d1'], waiting: 1 });
    desk.undo();
    expect(area(desk)).toEqual([6, 8]);
  });

  it('changes the value of one case alone, and gives it back to the common one', () => {
    const desk = createDesk(small);
    desk.begin('g1', 'value', 1);
    expect(desk.editing?.forAll).toBe(true);
    desk.type('3 m');
    expect(area(desk)).toEqual([9, 12]);
    desk.setForAll(false);
    expect(area(desk)).toEqual([6, 12]);
    desk.finish();
    expect(given(desk, 'g1')).toMatchObject({ value: '2 m', byCase: { rest: '3 m' } });
    desk.begin('g1', 'value', 1);
    expect(desk.editing).toMatchObject({ forAll: false, before: '3 m' });
    desk.setForAll(true);
    desk.finish();
    expect(given(desk, 'g1')).toMatchObject({ value: '3 m' });
    expect(given(desk, 'g1').byCase).toBeUndefined();
    expect(area(desk)).toEqual([9, 12]);
  });

  it('takes basis, source and tracking number from a number that is changed, and gives them back on request', () => {
    const desk = createDesk(small);
    desk.begin('g1', 'value', 0);
    desk.type('2.2 m');
    desk.finish();
    expect(given(desk, 'g1')).toEqual({ id: 'g1', kind: 'given', name: 'a', title: 'Length', value: '2.2 m' });
    expect(desk.formerProvenance('g1')).toEqual({ basis: 'measured', source: 'tape', toConfirm: 'P-1' });
    desk.restoreProvenance('g1');
    expect(given(desk, 'g1')).toMatchObject({ value: '2.2 m', basis: 'measured', source: 'tape', toConfirm: 'P-1' });
    expect(desk.formerProvenance('g1')).toBeUndefined();
    desk.undo();
    desk.undo();
    expect(writeSheet(desk.sheet)).toBe(writeSheet(small));
  });

  it('confirms a carried-over value only when no case still holds one', () => {
    const desk = createDesk(small);
    desk.begin('g2', 'value', 0);
    desk.type('5 m');
    desk.finish();
    expect(given(desk, 'g2').carriedOver).toBe(true);
    desk.begin('g2', 'value', 1);
    desk.setForAll(true);
    desk.type('6 m');
    desk.finish();
    expect(given(desk, 'g2').carriedOver).toBeUndefined();
  });

  it('confirms a carried-over value as it stands, and takes that back', () => {
    const desk = createDesk(small);
    desk.confirm('g2');
    expect(given(desk, 'g2')).toMatchObject({ value: '3 m', source: 'drawing' });
    expect(given(desk, 'g2').carriedOver).toBeUndefined();
    expect(desk.undoLabel).toBe('confirmation of b');
    desk.undo();
    expect(given(desk, 'g2').carriedOver).toBe(true);
    desk.confirm('g1');
    expect(desk.undoLabel).toBeNull();
  });

  it('states a source without touching the number', () => {
    const desk = createDesk(small);
    desk.begin('g3', 'source', 0);
    desk.type(' certificate 12 ');
    expect(area(desk)).toEqual([6, 8]);
    desk.finish();
    expect(given(desk, 'g3')).toMatchObject({ value: '1 kg', source: 'certificate 12' });
    desk.setBasis('g3', 'measured');
    expect(given(desk, 'g3').basis).toBe('measured');
  });

  it('types into givens alone', () => {
    const desk = createDesk(small);
    expect(desk.begin('d1', 'value', 0)).toBe(false);
    expect(desk.begin('nothing', 'value', 0)).toBe(false);
    expect(desk.editing).toBeNull();
  });

  it('keeps what was typed in one place when typing begins in another', () => {
    const desk = createDesk(small);
    desk.begin('g1', 'value', 0);
    desk.type('1 m');
    desk.begin('g3', 'value', 0);
    expect(given(desk, 'g1').value).toBe('1 m');
    expect(desk.editing?.cell).toBe('g3');
  });

  it('draws again only the lines that print otherwise', () => {
    const desk = createDesk(small);
    const before = new Map(desk.model.lines.map((line) => [cellOf(line), line]));
    desk.begin('g1', 'value', 0);
    desk.type('2.5 m');
    const changed = desk.model.lines.filter((line) => before.get(cellOf(line)) !== line).map(cellOf);
    expect(changed).toEqual(['g1', 'd1', 'k1']);
  });

  it('shows for every given of the example what a fresh calculation of the changed sheet shows', { timeout: 120_000 }, () => {
    const desk = createDesk(example);
    let tried = 0;
    for (const cell of example.cells) {
      if (cell.kind !== 'given' || cell.choices !== undefined) continue;
      const text = cell.value.replace(/\d+(\.\d+)?/u, (number) => (Number(number) * 1.05).toPrecision(3));
      desk.begin(cell.id, 'value', 0);
      desk.type(text);
      desk.finish();
      const fresh = makeRecord(calculate(desk.sheet, solver));
      expect(desk.model.lines, `after ${cell.name} = ${text}`).toEqual(fresh.lines);
      expect(desk.model.summary).toEqual(fresh.summary);
      tried += 1;
    }
    expect(tried).toBeGreaterThan(20);
    while (desk.undoLabel !== null) desk.undo();
    // Of the template nothing is said before it has been looked for.
    expect(desk.model.beside).toBeNull();
    desk.compareWith(null);
    expect(desk.model).toEqual(makeRecord(calculate(example, solver)));
  });
});
