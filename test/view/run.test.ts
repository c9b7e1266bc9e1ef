// What is done with a run of lines on the desk: each act one step, told in words, and taken back whole. Pasted text is only ever text.

import { describe, expect, it } from 'vitest';
import { type Sheet, writeSheet } from '../../src/sheet/index.ts';
import { createDesk } from '../../src/view/desk.ts';
import { copyRun, duplicateRun, moveRun, pasteText, removeRun } from '../../src/view/run.ts';

const small: Sheet = {
  format: 'tightside-sheet/1',
  title: 'Area',
  cells: [
    { id: 'h1', kind: 'heading', level: 1, text: 'Plate' },
    { id: 'g1', kind: 'given', name: 'a', title: 'Length', value: '2 m', source: 'tape' },
    { id: 'g2', kind: 'given', name: 'b', title: 'Width', value: '3 m', source: 'tape' },
    { id: 'd1', kind: 'derived', name: 'A', formula: 'a*b' },
    { id: 'd2', kind: 'derived', name: 'V', formula: 'A*"1 m"' },
  ],
};
const deskWith = (from: string, to: string, sheet = small) => {
  const desk = createDesk(sheet);
  desk.choose(from);
  desk.extend(to);
  return desk;
};
type Desk = ReturnType<typeof createDesk>;
const ids = (desk: Desk) => desk.kept.cells.map(({ id }) => id);
const names = (desk: Desk) => desk.kept.cells.flatMap((cell) => ('name' in cell ? [cell.name] : []));
const comesBack = (desk: Desk) => {
  desk.undo();
  expect(writeSheet(desk.kept)).toBe(writeSheet(small));
  expect(desk.undoLabel).toBeNull();
};

describe('a run of lines', () => {
  it('reaches from the first chosen line to the last, whichever comes first, and shrinks again', () => {
    const desk = deskWith('d1', 'g1');
    expect(desk.run).toEqual(['g1', 'g2', 'd1']);
    desk.extend('d2');
    expect(desk.run).toEqual(['d1', 'd2']);
    expect(desk.announcement).toBe('2 lines chosen');
    desk.choose('g2');
    expect(desk.run).toEqual(['g2']);
  });

  it('is removed in one step', () => {
    const desk = deskWith('g1', 'd1');
    removeRun(desk);
    expect(ids(desk)).toEqual(['h1', 'd2']);
    expect(desk.undoLabel).toBe('removal of 3 lines');
    expect(desk.announcement).toContain('3 lines removed');
    expect(desk.run).toEqual([]);
    comesBack(desk);
  });

  it.each([
    ['down', 1, ['h1', 'd1', 'g1', 'g2', 'd2']],
    ['up', -1, ['g1', 'g2', 'h1', 'd1', 'd2']],
  ] as const)('moves %s as a whole, stays chosen, and comes back in one step', (_way, step, order) => {
    const desk = deskWith('g1', 'g2');
    expect(moveRun(desk, step)).toBe(true);
    expect(ids(desk)).toEqual(order);
    expect(desk.run).toEqual(['g1', 'g2']);
    expect(desk.undoLabel).toBe('move of 2 lines');
    comesBack(desk);
  });

  it('does not move beyond the sheet, and says so', () => {
    const desk = deskWith('d1', 'd2');
    expect(moveRun(desk, 1)).toBe(false);
    expect(desk.announcement).toContain('cannot go down');
    expect(desk.undoLabel).toBeNull();
  });

  it('stands once more below itself under free names that are told, with equal numbers', () => {
    const desk = deskWith('g1', 'd1');
    duplicateRun(desk);
    expect(names(desk)).toEqual(['a', 'b', 'A', 'a_B', 'b_B', 'A_B', 'V']);
    expect([...(desk.calculation.named('A_B')?.si ?? [])]).toEqual([6]);
    expect(desk.run).toHaveLength(3);
    expect(desk.told?.words).toContain('A is taken here and became A_B');
    expect(desk.announcement).toContain('A_B');
    expect(desk.undoLabel).toBe('3 lines copied');
    comesBack(desk);
    expect(desk.told).toBeNull();
  });

  it('copied, removed and pasted elsewhere is what it was', async () => {
    const desk = deskWith('g1', 'g2');
    const text = copyRun(desk);
    removeRun(desk, desk.run, 'cut');
    expect(desk.undoLabel).toBe('cut of 2 lines');
    desk.choose('d2');
    expect(await pasteText(desk, text)).toBe(true);
    expect(names(desk)).toEqual(['A', 'V', 'a', 'b']);
    expect(desk.kept.cells.slice(-2)).toEqual(small.cells.slice(1, 3));
    expect(desk.told).toBeNull();
  });
});

describe('text that is pasted', () => {
  it('of another sheet is taken with its givens carried over, and says so', async () => {
    const text = copyRun(deskWith('g1', 'd1')).replace(/\n/gu, '\r\n');
    const desk = createDesk(small);
    desk.choose('d2');
    expect(await pasteText(desk, text)).toBe(true);
    expect(desk.kept.cells.slice(-3)).toMatchObject([{ carriedOver: true }, { carriedOver: true }, { formula: 'a_B*b_B' }]);
    expect(desk.told?.words).toContain('carried over');
    comesBack(desk);
  });

  it('of plain lines makes a line each, as the new line does; later lines know the names of earlier ones', async () => {
    const desk = createDesk(small);
    desk.choose('h1');
    await pasteText(desk, '# Rim\n\nt = 5 mm ; Thickness ; tape\r\nU = 2*(a + b)\nU <= a ; Short enough\n  words of the trade  ');
    expect(desk.kept.cells.slice(1, 6)).toMatchObject([
      { kind: 'heading', text: 'Rim' },
      { kind: 'given', name: 't', value: '5 mm', title: 'Thickness', source: 'tape' },
      { kind: 'derived', name: 'U', formula: '2*(a + b)' },
      { kind: 'criterion', left: 'U', relation: '<=', right: 'a', title: 'Short enough' },
      { kind: 'note', text: 'words of the trade' },
    ]);
    expect(desk.undoLabel).toBe('5 lines pasted');
    comesBack(desk);
  });

  it('with names that the sheet has gets free ones', async () => {
    const desk = createDesk(small);
    desk.choose('d2');
    await pasteText(desk, 'a = 7 m\nB = 2*a');
    expect(desk.kept.cells.slice(-2)).toMatchObject([
      { name: 'a_B', value: '7 m' },
      { name: 'B', formula: '2*a_B' },
    ]);
    expect(desk.told?.words).toBe('a is taken here and became a_B');
  });

  it.each([
    ['a key that no sheet has', `{"format":"tightside-sheet/1","title":"","cells":[],"onload":"x"}`],
    ['a prototype', `{"format":"tightside-sheet/1","title":"","cells":[],"__proto__":{"a":1}}`],
    ['a newer format', `{"format":"tightside-sheet/99","title":"","cells":[]}`],
    ['another kind of JSON', `{"a":1}`],
    ['JSON that ends too early', `{"format":"tightside-sheet/1","title":"`],
    [
      'a picture that is no picture',
      `{"format":"tightside-sheet/1","title":"","cells":[{"id":"p","kind":"figure","image":"javascript:1"}]}`,
    ],
    ['a depth without end', `{"format":${'['.repeat(5000)}`],
  ])('with %s is refused in one sentence and changes nothing', async (_what, text) => {
    const desk = deskWith('g1', 'g1');
    expect(await pasteText(desk, text)).toBe(false);
    expect(desk.kept).toBe(small);
    expect(desk.announcement).toMatch(/^not pasted: /u);
    expect(desk.told).toEqual({ cell: 'g1', words: desk.announcement });
  });

  it('with markup is text', async () => {
    const desk = createDesk(small);
    await pasteText(desk, '<img src=x onerror=alert(1)>\u0000');
    expect(desk.kept.cells.at(-1)).toMatchObject({ kind: 'note', text: '<img src=x onerror=alert(1)>' });
  });

  it('of more lines than anybody pastes is refused', async () => {
    const desk = createDesk(small);
    expect(await pasteText(desk, 'x\n'.repeat(5001))).toBe(false);
    expect(desk.kept).toBe(small);
  });
});

describe('a desk that may not be written', () => {
  it('takes no act, and says why', async () => {
    const desk = deskWith('g1', 'g2');
    desk.lock('written elsewhere');
    removeRun(desk);
    duplicateRun(desk);
    expect(moveRun(desk, 1)).toBe(false);
    expect(await pasteText(desk, 'x = 2 m')).toBe(false);
    expect(desk.kept).toBe(small);
    expect(desk.announcement).toBe('written elsewhere');
  });
});
