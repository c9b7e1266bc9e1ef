// One case of a formula: values, decisions taken, and every kind of trouble word for word.

import { describe, expect, it } from 'vitest';
import { type Expr, explain, type Lookup, type TableData } from '../../src/formula/index.ts';
import { formulaOf, unitOf } from './scope.ts';

const quantities: ReadonlyMap<string, readonly [si: number, unit: string]> = new Map<string, readonly [number, string]>([
  ['d_1', [0.2, 'mm']],
  ['d_2', [0.2, 'mm']],
  ['C', [5, 'm']],
  ['F_1', [100, 'N']],
  ['F_2', [300, 'N']],
  ['mu', [1.2, '1']],
  ['theta', [Math.PI, 'deg']],
  ['z', [4.2, '1']],
  ['P', [1e300, 'W']],
  ['T_a', [293.15, 'degC']],
  ['T_b', [293.15, 'degC']],
]);
const belts: TableData = {
  name: 'belts',
  columns: [
    { name: 'C', unit: unitOf('m'), numbers: Float64Array.of(0.1, 1, 2), texts: ['0.1', '1', '2'] },
    { name: 'm', unit: unitOf('kg/m'), numbers: Float64Array.of(1, 2, Number.NaN), texts: ['1', '2', ''] },
    { name: 'grade', texts: ['A', 'B', 'B'] },
  ],
  rows: 3,
};
const surfaces: TableData = {
  name: 'surfaces',
  columns: [
    { name: 'surface', texts: ['leather on iron', 'rubber on steel'] },
    { name: 'mu', unit: unitOf('1'), numbers: Float64Array.of(0.3, 0.5), texts: ['0.30', '0.50'] },
  ],
  rows: 2,
};
const falling: TableData = {
  name: 'falling',
  columns: [
    { name: 'x', unit: unitOf('1'), numbers: Float64Array.of(3, 2, 1), texts: [] },
    { name: 'y', unit: unitOf('1'), numbers: Float64Array.of(10, 20, 40), texts: [] },
  ],
  rows: 3,
};
const doubled: TableData = {
  ...falling,
  name: 'doubled',
  columns: [{ ...falling.columns[0]!, numbers: Float64Array.of(1, 1, 2) }, falling.columns[1]!],
};
const tables = new Map([belts, surfaces, falling, doubled].map((table) => [table.name, table]));

const lookup: Lookup = {
  value: (name) => quantities.get(name)?.[0] ?? Number.NaN,
  text: (name) => (name === 'lining' ? 'rubber on steel' : name === 'other' ? 'rubber' : undefined),
  table: (name) => tables.get(name),
  unit: (name) => {
    const found = quantities.get(name);
    return found && unitOf(found[1]);
  },
};
/** Spaces of print (between digits, before units) as plain ones. */
const plain = (text: string): string => text.replaceAll(/[\u00a0\u202f]/g, ' ');
const run = (text: string) => explain(formulaOf(text).expr, lookup);
const value = (text: string): number => {
  const walked = run(text);
  if (!walked.ok) throw new Error(walked.problem.message);
  return walked.value;
};

describe('trouble', () => {
  it.each([
    [
      'C/(d_2 - d_1)',
      'division-by-zero',
      'division by zero: d_2 - d_1 is 0 mm (d_2 = 200 mm, d_1 = 200 mm) in C/(d_2 - d_1); check what makes it vanish',
    ],
    [
      '(F_1 - F_1)/0',
      'division-by-zero',
      'division by zero: the divisor is written as 0 in (F_1 - F_1)/0; check what makes it vanish',
    ],
    [
      '(d_1 - d_2)^(-1)',
      'division-by-zero',
      'division by zero: d_1 - d_2 is 0 and has a negative exponent; check what makes it vanish',
    ],
    ['asin(mu)', 'beyond-one', 'asin(1.2): no angle has a sine beyond 1; μ must lie between −1 and 1'],
    ['acos(-mu)', 'beyond-one', 'acos(−1.2): no angle has a cosine below −1; -μ must lie between −1 and 1'],
    [
      'sqrt(F_1 - F_2)',
      'root-of-negative',
      'root of a negative number: F_1 - F_2 is −200 N in sqrt(F_1 - F_2); a root needs 0 or more',
    ],
    [
      '(F_1^2 - F_2^2)^0.5',
      'root-of-negative',
      'root of a negative number: F_1^2 - F_2^2 is −80 000 N² in (F_1^2 - F_2^2)^0.5; a root needs 0 or more',
    ],
    [
      '(F_1/F_2 - 2)^1.5',
      'root-of-negative',
      'root of a negative number: F_1/F_2 - 2 is −1.666 67 in (F_1/F_2 - 2)^1.5; a root needs 0 or more',
    ],
    ['ln(F_1/F_2 - F_1/F_2)', 'logarithm', 'ln of zero: F_1/F_2 - F_1/F_2 is 0; a logarithm needs a number above 0'],
    ['log10(-mu)', 'logarithm', 'log10 of a negative number: -μ is −1.2; a logarithm needs a number above 0'],
    ['exp(z*1000)', 'overflow', 'exp(z·1000) is too large for a number (beyond 1.8e308) with z = 4.2; check the values'],
    ['P*P*z', 'overflow', 'P·P is too large for a number (beyond 1.8e308) with P = 1 × 10³⁰⁰ W; check the values'],
    [
      'interpolate(belts, m, C)',
      'beyond-table',
      'C = 5 m lies beyond the table `belts` (0.1 m to 2 m); extend the table with a source, or change the value',
    ],
    [
      'interpolate(belts, m, d_1/4)',
      'beyond-table',
      'd_1/4 = 0.05 m lies beyond the table `belts` (0.1 m to 2 m); extend the table with a source, or change the value',
    ],
    ['interpolate(belts, m, "1.5 m")', 'no-value', 'the table belts has no number there in its column m; fill the entry'],
    [
      'interpolate(doubled, y, 1.5)',
      'unordered-table',
      'cannot interpolate in doubled: its keys (x) must rise or fall from row to row; sort the rows and remove doubles',
    ],
    [
      'entry(belts, m, "1.5 m")',
      'no-row',
      'no row 1.5 m in table belts; nearest: 1 m; entry wants the exact key, interpolate reads between rows',
    ],
    ['entry(surfaces, mu, other)', 'no-row', 'no row `rubber` in table surfaces; nearest: `rubber on steel`'],
    ['entry(surfaces, mu, "x")', 'no-row', 'no row `x` in table surfaces; its rows: `leather on iron`, `rubber on steel`'],
    ['F_9 + F_1', 'no-value', 'F_9 has no value here; give it one first'],
  ])('%s', (text, code, message) => {
    const walked = run(text);
    if (walked.ok) throw new Error(`${text} gives ${walked.value}`);
    expect(plain(walked.problem.message)).toBe(message);
    expect(walked.problem).toMatchObject({ code, severity: 'error' });
  });

  it('points at the operation, not at the whole formula', () => {
    const text = '3*F_1 + C/(d_2 - d_1)';
    const walked = run(text);
    expect(!walked.ok && text.slice(...walked.problem.at!)).toBe('C/(d_2 - d_1)');
  });

  it('shows at most six digits', () => {
    const walked = run('sqrt(F_1/F_2 - 1)');
    expect(!walked.ok && plain(walked.problem.message)).toContain('is −0.666 667 in');
  });
});

describe('lazy parts', () => {
  it.each([
    ['d_1 > C ? 1/0 : 3', 3],
    ['d_1 < C ? 3 : ln(0)', 3],
    ['(d_1 > C and 1/0 > 1) ? 1 : 2', 2],
    ['(d_1 < C or 1/0 > 1) ? 1 : 2', 1],
    ['(not (d_1 > C)) ? 1 : 2', 1],
  ])('%s is %d, whatever is wrong with what it does not reach', (text, expected) => {
    expect(value(text)).toBe(expected);
  });

  it('fails where the branch taken fails', () => {
    expect(run('d_1 < C ? 1/0 : 3').ok).toBe(false);
    expect(run('(d_1 < C and 1/0 > 1) ? 1 : 2').ok).toBe(false);
  });

  it('tells the branch of each choice that was reached, and of no other', () => {
    const { expr } = formulaOf('d_1 > C ? (F_1 > F_2 ? 1 : 2) : (F_1 < F_2 ? 3 : 4)');
    const walked = explain(expr, lookup);
    if (!walked.ok || expr.kind !== 'choose') throw new Error('no choice');
    const inside = (branch: Expr): Expr => (branch.kind === 'parens' ? inside(branch.inner) : branch);
    expect(walked.value).toBe(3);
    expect(walked.taken.branch(expr)).toBe(false);
    expect(walked.taken.branch(inside(expr.then))).toBeUndefined();
    expect(walked.taken.branch(inside(expr.otherwise))).toBe(true);
  });
});

describe('tables', () => {
  it('interpolates on the straight line between rows', () => {
    expect(value('interpolate(belts, m, "0.55 m")')).toBe(1.5);
    expect(value('interpolate(falling, y, 1.5)')).toBe(30);
    expect(value('interpolate(falling, y, 2.25)')).toBe(17.5);
  });

  it('gives the entry itself at a row, first and last included', () => {
    expect(value('interpolate(belts, m, "0.1 m")')).toBe(1);
    expect(value('interpolate(belts, m, "1 m")')).toBe(2);
    expect(value('interpolate(falling, y, 3)')).toBe(10);
    expect(value('interpolate(falling, y, 1)')).toBe(40);
  });

  it('finds rows by number and by text, from a choice or in quotes', () => {
    expect(value('entry(belts, m, "1000 mm")')).toBe(2);
    expect(value('entry(surfaces, mu, lining)')).toBe(0.5);
    expect(value('entry(surfaces, mu, "leather on iron")')).toBe(0.3);
  });

  it('compares texts', () => {
    expect(value('lining == "rubber on steel" ? 1 : 2')).toBe(1);
    expect(value('"leather on iron" != lining ? 1 : 2')).toBe(1);
    expect(value('entry(belts, grade, "2 m") == "B" ? 1 : 2')).toBe(1);
  });

  it('tells the rows used, with the units to print them in', () => {
    const between = formulaOf('interpolate(belts, m, "0.55 m")').expr;
    const at = formulaOf('interpolate(belts, m, "1 m")').expr;
    const walked = explain(between, lookup);
    expect(walked.ok && walked.taken.table(between)).toEqual({
      kind: 'interpolate',
      row: 0,
      x0: 0.1,
      x1: 1,
      y0: 1,
      y1: 2,
      xUnit: unitOf('m'),
      yUnit: unitOf('kg/m'),
    });
    const row = explain(at, lookup);
    expect(row.ok && row.taken.table(at)).toEqual({ kind: 'entry', value: 2, unit: unitOf('kg/m'), row: 1 });
  });
});

describe('jumps', () => {
  it.each([
    ['ceil(3.0000000001)', 4, true],
    ['ceil(2.9999999999)', 3, true],
    ['ceil(3.00000001)', 4, false],
    ['floor(0.1*3*10)', 3, true],
    ['round(2.5)', 2, true],
    ['round(3.5)', 4, true],
    ['round(2.50000001)', 3, false],
    ['floor(3000000.001)', 3000000, true],
    ['floor(3000000.1)', 3000000, false],
    ['round(3)', 3, false],
    ['ceil(z)', 5, false],
  ])('%s is %d; warned of: %s', (text, whole, warned) => {
    const walked = run(text);
    expect(walked.ok && walked.value).toBe(whole);
    expect(walked.warnings.map((warning) => warning.code)).toEqual(warned ? ['near-jump'] : []);
  });

  it('says what stands on the edge', () => {
    expect(run('ceil(z*0 + 3)').warnings[0]!.message).toBe(
      'ceil(z·0 + 3) stands on an edge: z·0 + 3 is within 1e-9 of 3, where ceil jumps; the printed numbers may fall on either side, say which is meant',
    );
  });
});

describe('quoted quantities', () => {
  it('are read in coherent SI, with the decimal sign of the sheet', () => {
    expect(value('"250 mm" + d_1')).toBe(0.45);
    expect(explain(formulaOf('"2,5 m"').expr, { ...lookup, decimalSign: ',' })).toMatchObject({ ok: true, value: 2.5 });
    expect(value('T_a - "-273.15 degC"')).toBe(293.15);
  });
});
