// Edits and their undoing: any script of edits taken back gives the document it began with, and done again the one it ended with.

import fc from 'fast-check';
import { describe, expect, it } from 'vitest';
import { caseIdFault, casesOf } from '../../src/sheet/cases.ts';
import type { Cell, GivenCell, Sheet } from '../../src/sheet/document.ts';
import { applyEdit, type Edit, newCellId } from '../../src/sheet/edit.ts';
import { readSheet, writeSheet } from '../../src/sheet/file.ts';
import { emptyHistory, type History, labelOf, perform, redo, undo } from '../../src/sheet/history.ts';
import { nameFault } from '../../src/sheet/rename.ts';
import { aCell, aSheet, seeded } from './any-sheet.ts';

/** A step of a random script: numbers that pick among what the sheet holds when the step is due. */
interface Pick {
  readonly what: number;
  readonly a: number;
  readonly b: number;
  readonly text: string;
  readonly cell: Cell;
  readonly typing: boolean;
}
const aPick: fc.Arbitrary<Pick> = fc.record({
  what: fc.nat(13),
  a: fc.nat(20),
  b: fc.nat(20),
  text: fc.constantFrom('1', 'd_9', 'mu', '2 m', ''),
  cell: aCell(fc.constant('x')),
  typing: fc.boolean(),
});

function editOf(sheet: Sheet, pick: Pick): Edit | undefined {
  const { cells } = sheet;
  const cell = cells[pick.a % Math.max(1, cells.length)];
  const cases = casesOf(sheet);
  const one = cases[pick.a % cases.length]!;
  const names = cells.flatMap((each) => ('name' in each ? [each.name] : []));
  const fresh = (id: string) => (cases.some((known) => known.id === id) ? `${id}-${cases.length}-${pick.a}` : id);
  switch (pick.what) {
    case 0:
    case 1:
      return { kind: 'insert-cell', cell: { ...pick.cell, id: newCellId(sheet, pick.cell.kind) }, at: pick.b };
    case 2:
      return cell && { kind: 'remove-cell', id: cell.id };
    case 3:
      return cell && { kind: 'move-cell', id: cell.id, to: pick.b };
    case 4:
    case 5:
      return (
        cell && { kind: 'set-cell', cell: cell.kind === 'given' ? { ...cell, value: pick.text } : { ...pick.cell, id: cell.id } }
      );
    case 6:
      return { kind: 'set-head', key: 'title', value: pick.text };
    case 7:
      return { kind: 'set-head', key: 'purpose', value: pick.text === '' ? null : pick.text };
    case 8: {
      const id = fresh('case-a');
      return cases.some((known) => known.id === id)
        ? undefined
        : { kind: 'add-case', case: { id, title: pick.text }, at: pick.b, ...(pick.typing ? { like: one.id } : {}) };
    }
    case 9: {
      const id = fresh('case-b');
      return cases.some((known) => known.id === id) ? undefined : { kind: 'change-case', id: one.id, case: { id } };
    }
    case 10:
      return { kind: 'move-case', id: one.id, to: pick.b };
    case 11:
      return { kind: 'remove-case', id: one.id };
    case 12:
      return names.length === 0
        ? undefined
        : { kind: 'rename-quantity', from: names[pick.a % names.length]!, to: pick.text || 'y' };
    default:
      return (
        cell && {
          kind: 'batch',
          edits: [
            { kind: 'set-head', key: 'title', value: 'b' },
            { kind: 'move-cell', id: cell.id, to: 0 },
            { kind: 'remove-cell', id: cell.id },
          ],
        }
      );
  }
}

describe('any script of edits', () => {
  it('undone is the sheet it began with, redone the one it ended with; both keep every key', () => {
    fc.assert(
      fc.property(aSheet, fc.array(aPick, { maxLength: 25 }), (begin, picks) => {
        const before = writeSheet(begin);
        let sheet = begin;
        let history: History = emptyHistory;
        let time = 0;
        for (const pick of picks) {
          const edit = editOf(sheet, pick);
          if (edit === undefined) continue;
          time += pick.typing ? 100 : 10_000;
          ({ sheet, history } = perform(sheet, history, edit, pick.typing ? { key: `${edit.kind}`, time } : { time }));
        }
        const after = writeSheet(sheet);
        expect(writeSheet(begin)).toBe(before); // nothing was changed in place
        // As it comes back from a reload.
        history = JSON.parse(JSON.stringify(history)) as History;
        const steps = history.past.length;
        for (let step = undo(sheet, history); step; step = undo(sheet, history)) ({ sheet, history } = step);
        expect(sheet).toEqual(begin);
        expect(writeSheet(sheet)).toBe(before);
        expect(history.past).toHaveLength(0);
        for (let step = redo(sheet, history); step; step = redo(sheet, history)) ({ sheet, history } = step);
        expect(writeSheet(sheet)).toBe(after);
        expect(history.past).toHaveLength(steps);
        for (let step = undo(sheet, history); step; step = undo(sheet, history)) ({ sheet, history } = step);
        expect(writeSheet(sheet)).toBe(before);
      }),
      seeded,
    );
  }, 60_000);

  it('leaves cells that it does not touch as the very objects they were', () => {
    fc.assert(
      fc.property(aSheet, aPick, (sheet, pick) => {
        const edit = editOf(sheet, { ...pick, what: [0, 3, 6, 10][pick.what % 4]! });
        if (edit === undefined) return;
        const next = applyEdit(sheet, edit).sheet;
        const kept = new Set(next.cells);
        for (const cell of sheet.cells) expect(kept.has(cell)).toBe(true);
      }),
      seeded,
    );
  }, 60_000);

  it('leaves a sheet that can be written and read', () => {
    fc.assert(
      fc.property(aSheet, fc.array(aPick, { maxLength: 12 }), (begin, picks) => {
        let sheet = begin;
        for (const pick of picks) {
          const edit = editOf(sheet, pick);
          if (edit) sheet = applyEdit(sheet, edit).sheet;
        }
        const read = readSheet(writeSheet(sheet));
        expect(read.ok ? read.value : read.problems).toEqual(sheet);
      }),
      seeded,
    );
  }, 60_000);
});

const given = (id: string, name: string, more: Partial<GivenCell> = {}): GivenCell => ({
  id,
  kind: 'given',
  name,
  value: '1',
  ...more,
});
const sheetOf = (...cells: Cell[]): Sheet => ({ format: 'tightside-sheet/1', title: 'T', cells });

describe('renaming a quantity', () => {
  const rename = (from: string, to: string, ...cells: Cell[]) =>
    applyEdit(sheetOf(...cells), { kind: 'rename-quantity', from, to }).sheet.cells;

  it.each([
    // formula, from, to, after
    ['F_1 + F_10 - F_1', 'F_1', 'F_t', 'F_t + F_10 - F_t'],
    ['exp( mu_1 * θ_1 )', 'mu_1', 'mu', 'exp( mu * θ_1 )'],
    ['exp(μ_1·θ_1)', 'mu_1', 'μ_a', 'exp(μ_a·θ_1)'],
    ['exp(mu_1*theta_1)', 'θ_1', 'beta', 'exp(mu_1*beta)'],
    ['F_1 > "10 N" ? F_1 : N', 'N', 'z', 'F_1 > "10 N" ? F_1 : z'],
    ['entry(m, m, m) + m', 'm', 'q', 'entry(m, m, q) + q'],
    ['interpolate(v, v, v*(v + 1)) - v', 'v', 'w', 'interpolate(v, v, w*(w + 1)) - w'],
    ['min(entry(a, b, c), a)', 'a', 'z', 'min(entry(a, b, c), z)'],
    ['2 x', 'x', 'y', '2 y'],
    ['x^2', 'x', 'y_1', 'y_1^2'],
    ['x²', 'x', 'y', 'y²'],
    ['((( x', 'x', 'y', '((( y'],
  ])('%s with %s → %s reads %s', (formula, from, to, after) => {
    const [cell] = rename(from, to, { id: 'd1', kind: 'derived', name: 'q_0', formula });
    expect(cell).toMatchObject({ formula: after });
  });

  it('reaches every place that names it, and only those', () => {
    const cells = rename(
      'v',
      'v_b',
      given('g1', 'v'),
      given('g2', 'v_1'),
      { id: 'k1', kind: 'criterion', left: 'v', relation: '<=', right: 'v_max' },
      { id: 's1', kind: 'sought', name: 'n', instead: 'v', where: 'v = 2*v_1', between: '1 to 2' },
      { id: 'n1', kind: 'note', text: 'runs at {v} and { v }, not v or {v_1}' },
      { id: 'w1', kind: 'drawing', layout: 'l', uses: { speed: 'v', v: 'w' } },
      { id: 'c1', kind: 'chart', vary: 'v', from: '1', to: '2', show: ['w', 'v'] },
      { id: 't1', kind: 'table', name: 'v', columns: [{ name: 'v' }], rows: [['v']] },
    );
    expect(cells).toEqual([
      given('g1', 'v_b'),
      given('g2', 'v_1'),
      { id: 'k1', kind: 'criterion', left: 'v_b', relation: '<=', right: 'v_max' },
      { id: 's1', kind: 'sought', name: 'n', instead: 'v_b', where: 'v_b = 2*v_1', between: '1 to 2' },
      { id: 'n1', kind: 'note', text: 'runs at {v_b} and {v_b}, not v or {v_1}' },
      { id: 'w1', kind: 'drawing', layout: 'l', uses: { speed: 'v_b', v: 'w' } },
      { id: 'c1', kind: 'chart', vary: 'v_b', from: '1', to: '2', show: ['w', 'v_b'] },
      { id: 't1', kind: 'table', name: 'v', columns: [{ name: 'v' }], rows: [['v']] },
    ]);
  });
});

describe('cases', () => {
  const sheet: Sheet = {
    ...sheetOf(given('g1', 'K', { byCase: { run: '1', start: '1.5' } }), given('g2', 'd')),
    cases: [{ id: 'run' }, { id: 'start' }],
  };
  const byCase = (edit: Edit) => (applyEdit(sheet, edit).sheet.cells[0] as GivenCell).byCase;

  it('a renamed case keeps its values', () => {
    expect(byCase({ kind: 'change-case', id: 'start', case: { id: 'begin' } })).toEqual({ run: '1', begin: '1.5' });
  });
  it('a removed case takes its values along, the last one the list too', () => {
    expect(byCase({ kind: 'remove-case', id: 'start' })).toEqual({ run: '1' });
    const none = applyEdit(sheet, {
      kind: 'batch',
      edits: [
        { kind: 'remove-case', id: 'start' },
        { kind: 'remove-case', id: 'run' },
      ],
    }).sheet;
    expect(none.cases).toBeUndefined();
    expect(none.cells[0]).toEqual(given('g1', 'K'));
  });
  it('a case made like another starts with its values', () => {
    expect(byCase({ kind: 'add-case', case: { id: 'stop' }, at: 2, like: 'start' })).toEqual({
      run: '1',
      start: '1.5',
      stop: '1.5',
    });
  });
  it('a second case makes the first one of the list: base', () => {
    expect(applyEdit(sheetOf(), { kind: 'add-case', case: { id: 'start' }, at: 1 }).sheet.cases).toEqual([
      { id: 'base' },
      { id: 'start' },
    ]);
  });
});

describe('what an author may type', () => {
  const sheet: Sheet = { ...sheetOf(given('g1', 'μ_1'), given('g2', 'constructor')), cases: [{ id: 'run' }] };
  it.each([
    ['F_1', undefined],
    ['mu_1', 'mu_1 is already defined; names are unique in a sheet'],
    ['constructor', 'constructor is already defined; names are unique in a sheet'],
    ['toString', undefined],
    ['e', '“e” has a fixed meaning in formulas; take another name, as in e_1'],
    ['2 x', '“2 x” is no name; a name is a letter, then letters, digits or _, as in F_1'],
    ['', '“” is no name; a name is a letter, then letters, digits or _, as in F_1'],
  ])('as a name: %s', (name, fault) => {
    expect(nameFault(sheet, name)).toBe(fault);
  });
  it('a cell may keep its own name, typed in another alphabet too', () => {
    expect(nameFault(sheet, 'mu_1', 'g1')).toBeUndefined();
  });
  it.each([
    ['start-up', undefined],
    ['run', 'there is a case run already'],
    ['a b', '“a b” cannot be the id of a case; take Latin letters, digits, . _ or -, as in start-up'],
    ['constructor', '“constructor” cannot be the id of a case; take Latin letters, digits, . _ or -, as in start-up'],
  ])('as the id of a case: %s', (id, fault) => {
    expect(caseIdFault(sheet, id)).toBe(fault);
  });
});

describe('history', () => {
  it('joins typing in one place into one step, and nothing else', () => {
    const begin = sheetOf(given('g1', 'd_1', { value: '' }));
    let sheet: Sheet = begin;
    let history: History = emptyHistory;
    const type = (value: string, time: number, key = 'g1/value') =>
      ({ sheet, history } = perform(sheet, history, { kind: 'set-cell', cell: given('g1', 'd_1', { value }) }, { key, time }));
    type('2', 0);
    type('20', 300);
    type('200', 700);
    type('200 ', 900);
    expect(history.past.map(({ label }) => label)).toEqual(['value of d_1']);
    type('200 m', 5000);
    expect(history.past).toHaveLength(2);
    type('200 mm', 5100, 'g1/title');
    expect(history.past).toHaveLength(3);
    const step = undo(sheet, history)!;
    expect((step.sheet.cells[0] as GivenCell).value).toBe('200 m');
    const first = undo(step.sheet, undo(sheet, history)!.history)!;
    expect((undo(first.sheet, first.history)!.sheet.cells[0] as GivenCell).value).toBe('');
  });
  it('a new edit after an undo ends what could be redone', () => {
    const begin = sheetOf(given('g1', 'd_1'));
    const one = perform(begin, emptyHistory, { kind: 'set-head', key: 'title', value: 'A' }, { key: 'title', time: 0 });
    const back = undo(one.sheet, one.history)!;
    const two = perform(back.sheet, back.history, { kind: 'set-head', key: 'title', value: 'B' }, { key: 'title', time: 1 });
    expect(two.history).toMatchObject({ past: [{ label: 'title' }], future: [] });
    expect(redo(two.sheet, two.history)).toBeUndefined();
    expect(undo(two.sheet, two.history)!.sheet).toEqual(begin);
  });
  it.each([
    ['value of d_1', { kind: 'set-cell', cell: given('g1', 'd_1', { value: '3 m' }) }],
    ['value of d_1 in case run', { kind: 'set-cell', cell: given('g1', 'd_1', { byCase: { run: '2 m' } }) }],
    ['source of d_1', { kind: 'set-cell', cell: given('g1', 'd_1', { source: 'S' }) }],
    ['new d_2', { kind: 'insert-cell', cell: given('g2', 'd_2'), at: 0 }],
    ['removal of d_1', { kind: 'remove-cell', id: 'g1' }],
    ['new heading “Geometry”', { kind: 'insert-cell', cell: { id: 'h1', kind: 'heading', text: 'Geometry' }, at: 0 }],
    ['title block', { kind: 'set-head', key: 'titleBlock', value: {} }],
    ['d_1 renamed d_a', { kind: 'rename-quantity', from: 'd_1', to: 'd_a' }],
    [
      '2 changes',
      {
        kind: 'batch',
        edits: [
          { kind: 'remove-cell', id: 'g1' },
          { kind: 'set-head', key: 'title', value: '' },
        ],
      },
    ],
  ] as const)('is told in words: %s', (label, edit) => {
    expect(labelOf(sheetOf(given('g1', 'd_1')), edit)).toBe(label);
  });
  it('an edit of what is not there is a fault of the program', () => {
    expect(() => applyEdit(sheetOf(), { kind: 'remove-cell', id: 'g9' })).toThrow(RangeError);
    expect(() => applyEdit(sheetOf(), { kind: 'set-cells', cells: [given('g9', 'x')] })).toThrow('no cell g9');
    expect(() => applyEdit(sheetOf(given('g1', 'a')), { kind: 'insert-cell', cell: given('g1', 'b'), at: 0 })).toThrow(
      RangeError,
    );
  });
});
