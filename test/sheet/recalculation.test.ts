// Random days at the desk: after every edit the kept calculation is the one that a fresh reading of the sheet would give,
// and nothing ran that had no reason to.

import fc from 'fast-check';
import { describe, expect, it } from 'vitest';
import { applyEdit, type Calculation, type Cell, calculate, type Edit, type Sheet } from '../../src/sheet/index.ts';
import { cellOf } from './build.ts';

const names = ['a', 'b', 'c', 'd', 'q', 'w', 'x', 'y', 'z'];
const name = fc.constantFrom(...names);
const value = fc.constantFrom(
  '1 m',
  '2 m',
  '2000 mm',
  '0 m',
  '-3 m',
  '4 s',
  '0.5',
  '30 deg',
  '1 500 r/min',
  '12 parsec',
  '',
  '0.3 ± 0.1',
);
const unit = fc.option(fc.constantFrom('m', 'mm', 's', '1', 'N', 'm/s', 'bogus'), { nil: undefined, freq: 3 });
const formula = fc.oneof(
  fc.tuple(name, fc.constantFrom('+', '-', '*', '/'), name).map(([p, o, q]) => `${p} ${o} ${q}`),
  fc.tuple(fc.constantFrom('sqrt', 'abs', 'asin', 'exp', 'ceil', 'sign'), name).map(([f, p]) => `${f}(${p})`),
  fc.tuple(name, name, name).map(([p, q, r]) => `${p} > 0 ? ${q} : ${r}`),
  fc.tuple(name, name).map(([p, q]) => `max(${p}, ${q}, 0)`),
  fc.tuple(name, name).map(([p, q]) => `${p}/(${q} + ${p}`),
  name,
  fc.constant('2*pi'),
  fc.constant('entry(t, len, pick)'),
  name.map((p) => `interpolate(u, len, ${p})`),
);

let serial = 0;
const anyCell: fc.Arbitrary<Cell> = fc
  .oneof(
    { weight: 4, arbitrary: fc.record({ kind: fc.constant('given' as const), name, value, unit }) },
    { weight: 6, arbitrary: fc.record({ kind: fc.constant('derived' as const), name, formula, unit }) },
    {
      weight: 2,
      arbitrary: fc.record({
        kind: fc.constant('criterion' as const),
        left: formula,
        right: formula,
        relation: fc.constantFrom('<' as const, '>=' as const),
      }),
    },
    {
      weight: 1,
      arbitrary: fc.record({
        kind: fc.constant('given' as const),
        name: fc.constant('pick'),
        choices: fc.constant('t.key'),
        value: fc.constantFrom('one', 'two', 'none'),
      }),
    },
    { weight: 1, arbitrary: fc.record({ kind: fc.constant('note' as const), text: name.map((p) => `the value is {${p}}`) }) },
    {
      weight: 1,
      arbitrary: fc.record({
        kind: fc.constant('heading' as const),
        text: fc.constant('Part'),
        level: fc.constantFrom(1 as const, 2 as const),
      }),
    },
    {
      weight: 1,
      arbitrary: fc.record({
        kind: fc.constant('table' as const),
        name: fc.constantFrom('t', 'u'),
        columns: fc.constantFrom(
          [{ name: 'key' }, { name: 'len', unit: 'm' }],
          [
            { name: 'key', unit: 'm' },
            { name: 'len', unit: 'm' },
          ],
        ),
        rows: fc.constantFrom(
          [
            ['one', '1'],
            ['two', '2 m'],
          ],
          [
            ['1', '1'],
            ['2', '4'],
          ],
        ),
      }),
    },
  )
  .map((cell) => {
    serial += 1;
    const { unit: declared, ...rest } = cell as { unit?: string };
    return { id: `r${serial}`, ...rest, ...(declared === undefined ? {} : { unit: declared }) } as Cell;
  });

type Step = (sheet: Sheet) => Edit | undefined;
const place = fc.nat(1000);
const step: fc.Arbitrary<Step> = fc.oneof(
  {
    weight: 5,
    arbitrary: fc.tuple(place, value).map(
      ([at, text]): Step =>
        (sheet) => {
          const givens = sheet.cells.filter((cell) => cell.kind === 'given' && cell.choices === undefined);
          const cell = givens[at % Math.max(1, givens.length)];
          return cell?.kind === 'given' ? { kind: 'set-cell', cell: { ...cell, value: text } } : undefined;
        },
    ),
  },
  {
    weight: 2,
    arbitrary: fc.tuple(place, value).map(
      ([at, text]): Step =>
        (sheet) => {
          const givens = sheet.cells.filter((cell) => cell.kind === 'given' && cell.choices === undefined);
          const cell = givens[at % Math.max(1, givens.length)];
          return cell?.kind === 'given' ? { kind: 'set-cell', cell: { ...cell, byCase: { two: text } } } : undefined;
        },
    ),
  },
  {
    weight: 5,
    arbitrary: fc.tuple(place, formula).map(
      ([at, text]): Step =>
        (sheet) => {
          const derived = sheet.cells.filter((cell) => cell.kind === 'derived');
          const cell = derived[at % Math.max(1, derived.length)];
          return cell?.kind === 'derived' ? { kind: 'set-cell', cell: { ...cell, formula: text } } : undefined;
        },
    ),
  },
  {
    weight: 2,
    arbitrary: fc.tuple(place, name).map(
      ([at, text]): Step =>
        (sheet) => {
          const cell = sheet.cells[at % Math.max(1, sheet.cells.length)];
          return cell?.kind === 'given' || cell?.kind === 'derived'
            ? { kind: 'set-cell', cell: { ...cell, name: text } }
            : undefined;
        },
    ),
  },
  {
    weight: 1,
    arbitrary: place.map(
      (at): Step =>
        (sheet) => {
          const cell = sheet.cells[at % Math.max(1, sheet.cells.length)];
          return cell?.kind === 'given' || cell?.kind === 'derived'
            ? { kind: 'set-cell', cell: { ...cell, title: `title ${at}` } }
            : undefined;
        },
    ),
  },
  {
    weight: 3,
    arbitrary: fc.tuple(anyCell, place).map(
      ([cell, at]): Step =>
        (sheet) => ({ kind: 'insert-cell', cell, at: at % (sheet.cells.length + 1) }),
    ),
  },
  {
    weight: 3,
    arbitrary: place.map(
      (at): Step =>
        (sheet) =>
          sheet.cells.length === 0 ? undefined : { kind: 'remove-cell', id: sheet.cells[at % sheet.cells.length]!.id },
    ),
  },
  {
    weight: 2,
    arbitrary: fc.tuple(place, place).map(
      ([from, to]): Step =>
        (sheet) =>
          sheet.cells.length === 0
            ? undefined
            : { kind: 'move-cell', id: sheet.cells[from % sheet.cells.length]!.id, to: to % sheet.cells.length },
    ),
  },
  {
    weight: 1,
    arbitrary: fc.constantFrom<readonly { id: string }[] | null>(null, [{ id: 'one' }, { id: 'two' }], [{ id: 'two' }]).map(
      (cases): Step =>
        () => ({ kind: 'set-cases', cases }),
    ),
  },
  {
    weight: 1,
    arbitrary: fc.constantFrom('.' as const, ',' as const).map(
      (decimalSign): Step =>
        () => ({ kind: 'set-head', key: 'settings', value: { decimalSign } }),
    ),
  },
);

const start = [
  'a = 1 m',
  'b = 2 m',
  'c := a + b',
  'd [m] := 2*c',
  'q := c*d',
  'w := q/a',
  'w > 0',
  '# Part',
  'x := w',
  'the value is {w}',
];

/** Everything that a reader of the calculation can see. */
function seen(calculation: Calculation): unknown {
  return calculation.sheet.cells.map((cell) => {
    const state = calculation.state(cell.id)!;
    const numbers = state.kind === 'criterion' ? [...state.leftSi, ...state.rightSi] : 'si' in state ? [...state.si] : [];
    return {
      id: cell.id,
      numbers,
      unit: 'unit' in state ? state.unit?.text : undefined,
      type: 'type' in state ? state.type : undefined,
      words: 'words' in state ? state.words : undefined,
      texts: 'texts' in state ? state.texts : undefined,
      met: 'met' in state ? state.met : undefined,
      problems: state.problems,
      origin: calculation.origin(cell.id),
      use: [...calculation.use(cell.id)].sort(),
      number: calculation.numberOf(cell.id),
    };
  });
}

interface Seen {
  readonly id: string;
}

describe('a calculation kept through random edits', () => {
  it('is always that of a fresh reading, and runs only what has a reason', () => {
    fc.assert(
      fc.property(fc.array(step, { minLength: 1, maxLength: 25 }), (steps) => {
        let sheet: Sheet = { format: 'tightside-sheet/1', title: 'Random', cells: start.map(cellOf) };
        const kept = calculate(sheet);
        for (const next of steps) {
          const edit = next(sheet);
          if (edit === undefined) continue;
          const before = new Map((seen(kept) as Seen[]).map((one) => [one.id, JSON.stringify(one)]));
          const cellsBefore = new Map(sheet.cells.map((cell) => [cell.id, cell]));
          const sameWorld = edit.kind !== 'set-cases' && edit.kind !== 'set-head';
          sheet = applyEdit(sheet, edit).sheet;
          const changed = kept.update(sheet);
          const after = seen(kept) as Seen[];
          expect(after).toEqual(seen(calculate(sheet)));
          for (const one of after) {
            if (
              before.get(one.id) !== undefined &&
              before.get(one.id) !== JSON.stringify(one) &&
              !sameExceptPlace(before.get(one.id)!, one)
            ) {
              expect(changed.has(one.id), `the state of ${one.id} moved unsaid`).toBe(true);
            }
          }
          expect(new Set(kept.ran).size).toBe(kept.ran.length);
          if (!sameWorld) continue;
          const now = new Map(after.map((one) => [one.id, JSON.stringify(one)]));
          for (const id of kept.ran) {
            const own = cellsBefore.get(id) !== sheet.cells.find((cell) => cell.id === id);
            const moved = now.get(id) !== before.get(id);
            const fed = kept.origin(id).some((used) => now.get(used) !== before.get(used));
            expect(own || moved || fed, `${id} ran without a reason after ${JSON.stringify(edit)}`).toBe(true);
          }
        }
      }),
      { numRuns: 200, seed: 20261201 },
    );
  }, 300_000);
});

/** Numbers of lines, users and warnings about places move with other rows; they are not part of the cell's own state. */
function sameExceptPlace(before: string, after: Seen): boolean {
  const strip = (text: string) => {
    const { number: _, use: __, origin: ___, problems, ...rest } = JSON.parse(text);
    return JSON.stringify([rest, problems.filter((problem: { code: string }) => problem.code !== 'used-above')]);
  };
  return strip(before) === strip(JSON.stringify(after));
}
