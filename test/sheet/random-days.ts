// Random days at the desk: cells of most kinds, right and wrong, and edits of every sort, for properties that hold through all of them.

import fc from 'fast-check';
import type { Cell, Edit, Sheet } from '../../src/sheet/index.ts';

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

export type Step = (sheet: Sheet) => Edit | undefined;
const place = fc.nat(1000);
export const step: fc.Arbitrary<Step> = fc.oneof(
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

export const start = [
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
