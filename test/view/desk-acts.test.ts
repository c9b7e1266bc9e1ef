// The desk where whole lines, the head and the cases are changed: what is typed is shown ahead, kept as one step, and never lost.

import { describe, expect, it } from 'vitest';
import { type Cell, changeTitleBlock, type Sheet, writeSheet } from '../../src/sheet/index.ts';
import { addCaseEdit, removeCaseWords } from '../../src/view/case-acts.ts';
import { createDesk } from '../../src/view/desk.ts';
import { asTyped, formulaText } from '../../src/view/drafts.ts';

const small: Sheet = {
  format: 'tightside-sheet/1',
  title: 'Area',
  cells: [
    { id: 'h1', kind: 'heading', level: 1, text: 'Plate' },
    { id: 'n1', kind: 'note', text: 'The area is {A}.' },
    { id: 'g1', kind: 'given', name: 'a', value: '2 m', source: 'tape' },
    { id: 'g2', kind: 'given', name: 'b', value: '3 m', source: 'tape' },
    { id: 'd1', kind: 'derived', name: 'A', formula: 'a*b' },
    { id: 'k1', kind: 'criterion', left: 'A', relation: '<=', right: '"10 m^2"' },
    { id: 's1', kind: 'sought', name: 'x', unit: 'm', where: 'x*b = A', between: '1 m to 9 m' },
  ],
};
const cellOf = (desk: ReturnType<typeof createDesk>, id: string) => desk.kept.cells.find((one) => one.id === id);
const si = (desk: ReturnType<typeof createDesk>, name: string) => [...(desk.calculation.named(name)?.si ?? [])];

describe('a text that is no formula', () => {
  it.each([
    ['k1', '2*(A)'],
    ['k1', 'A < b < a'],
    ['k1', '<= "10 m^2"'],
    ['k1', 'A >'],
    ['s1', 'x*b'],
    ['d1', 'a*(b'],
  ])('of %s stays as typed, %j, when something else is begun', (id, text) => {
    const desk = createDesk(small);
    desk.beginInPlace(id, 'formula');
    desk.draftInPlace(null, undefined, text);
    expect(desk.inPlace?.unreadable).toBe(true);
    expect(si(desk, 'A')).toEqual([6]);
    desk.begin('g1', 'value', 0);
    const cell = cellOf(desk, id);
    if (cell?.kind !== 'criterion' && cell?.kind !== 'sought' && cell?.kind !== 'derived') throw new Error('the cell is gone');
    expect(formulaText(cell).replace(/\s+/gu, '')).toBe(text.replace(/\s+/gu, ''));
    expect(desk.announcement).toContain('as typed, with an error');
    expect(desk.model.problems.some((problem) => problem.cell === id && problem.severity === 'error')).toBe(true);
    desk.cancel();
    desk.undo();
    expect(writeSheet(desk.kept)).toBe(writeSheet(small));
  });

  it('is given back as it was typed for any text', () => {
    const cell = { id: 'k', kind: 'criterion', left: 'A', relation: '<=', right: 'B' } as const;
    for (const text of ['', 'A', 'A < B', 'A<=B', 'A >= B <= C', '< B', 'A <', 'A ≤ B'])
      expect(formulaText(asTyped(cell, text)).replace(/\s|=/gu, '').replace('≤', '<')).toBe(
        text.replace(/\s|=/gu, '').replace('≤', '<'),
      );
  });
});

describe('what is typed when another thing is asked for', () => {
  it('is kept by undo, and taken back by it; redo brings it again', () => {
    const desk = createDesk(small);
    desk.begin('g1', 'value', 0);
    desk.type('5 m');
    desk.undo();
    expect(writeSheet(desk.kept)).toBe(writeSheet(small));
    expect(desk.redoLabel).toBe('value of a');
    desk.redo();
    expect(si(desk, 'A')).toEqual([15]);
  });
});

describe('a new name', () => {
  it('is shown wherever it is used while it is typed, and kept as one step', () => {
    const desk = createDesk(small);
    desk.beginInPlace('g1', 'fields');
    desk.draftInPlace({ ...small.cells[2], name: 'L' } as Cell, { from: 'a', to: 'L' });
    expect(desk.sheet.cells[4]).toMatchObject({ formula: 'L*b' });
    expect(si(desk, 'A')).toEqual([6]);
    expect(desk.model.problems).toEqual(createDesk(small).model.problems);
    expect(desk.kept).toBe(small);
    desk.finish();
    expect(desk.undoLabel).toBe('a renamed L');
    expect(cellOf(desk, 'd1')).toMatchObject({ formula: 'L*b' });
    desk.undo();
    expect(writeSheet(desk.kept)).toBe(writeSheet(small));
  });

  it('that is taken is not carried anywhere', () => {
    const desk = createDesk(small);
    desk.beginInPlace('g1', 'fields');
    desk.draftInPlace({ ...small.cells[2], name: 'b' } as Cell, { from: 'a', to: 'b' });
    expect(desk.sheet).toBe(small);
    expect(si(desk, 'A')).toEqual([6]);
  });
});

describe('a note and a heading', () => {
  it('show what is typed, even where a name in braces is unknown', () => {
    const desk = createDesk(small);
    expect(desk.beginInPlace('n1', 'text')).toBe(true);
    desk.draftInPlace({ id: 'n1', kind: 'note', text: 'Now {A} and {nothing}.' });
    const line = desk.model.lines.find((one) => one.kind === 'note');
    expect(line).toMatchObject({ text: expect.stringMatching(/^Now 6(?:\.000)?\sm²\sand /u) });
    expect(desk.kept).toBe(small);
    expect(desk.typed).toMatchObject({ kind: 'text', cell: 'n1' });
    desk.finish();
    expect(desk.undoLabel).toContain('text of note');
    expect(desk.beginInPlace('g1', 'text')).toBe(false);
  });
});

describe('the head', () => {
  it('typed without a pause is one step, with one label', () => {
    const desk = createDesk(small);
    for (const text of ['H', 'Ha', 'Harbour'])
      desk.act(changeTitleBlock(desk.kept, 'client', text), { label: 'client', typing: 'head client' });
    expect(desk.kept.titleBlock).toEqual({ client: 'Harbour' });
    expect(desk.undoLabel).toBe('client');
    desk.undo();
    expect(writeSheet(desk.kept)).toBe(writeSheet(small));
    expect(desk.undoLabel).toBeNull();
  });
});

describe('cases', () => {
  it('a second one is one step, names both, and doubles the columns', () => {
    const desk = createDesk(small);
    const { edit, id } = addCaseEdit(desk.kept);
    desk.act(edit, { label: 'new case' });
    expect(desk.kept.cases).toEqual([
      { id: 'base', title: 'Case 1' },
      { id, title: 'Case 2' },
    ]);
    expect(si(desk, 'A')).toEqual([6, 6]);
    desk.begin('g1', 'value', 1);
    desk.setForAll(false);
    desk.type('4 m');
    desk.finish();
    expect(si(desk, 'A')).toEqual([6, 12]);
    expect(removeCaseWords(desk.kept, id)).toContain('values of a');
    desk.act({ kind: 'remove-case', id });
    expect(si(desk, 'A')).toEqual([6]);
    desk.undo();
    expect(si(desk, 'A')).toEqual([6, 12]);
  });

  it('one like another has its values, beside it; one value for all again is undone with the others back', () => {
    const desk = createDesk(small);
    desk.act(addCaseEdit(desk.kept).edit);
    desk.begin('g1', 'value', 1);
    desk.setForAll(false);
    desk.type('4 m');
    desk.finish();
    desk.act(addCaseEdit(desk.kept, 'case-2').edit);
    expect(si(desk, 'A')).toEqual([6, 12, 12]);
    desk.begin('g1', 'value', 1);
    desk.setForAll(true);
    desk.type('1 m');
    desk.finish();
    expect(si(desk, 'A')).toEqual([3, 3, 12]);
    desk.undo();
    expect(si(desk, 'A')).toEqual([6, 12, 12]);
  });
});
