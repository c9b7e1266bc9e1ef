// Published examples set into built-in templates, and the comparison with what stands in print.
//
// 1. An example names its source and how it was seen; its givens replace those of the template in all cases.
// 2. `recomputed` is a value computed by other means than this program: it must agree to 1e-6, or to half a unit of its last
//    digit where it is written with fewer digits. `printed` must agree at the printed digits.
// 3. `wrong` is a printed value that does not follow from the givens: the test holds that the program does not reproduce it.
// Not here: the examples.

import { readFileSync } from 'node:fs';
import { expect, test } from 'vitest';
import { readUnit } from '../../src/quantity/index.ts';
import { type Calculation, calculate, readSheet, type Sheet } from '../../src/sheet/index.ts';
import { solver } from '../../src/study/index.ts';

/** How an example is known: with its printed result, with givens and method only, from memory, or derived from first principles. */
export type Tag = 'print seen' | 'givens seen' | 'from memory' | 'derived';

export interface Check {
  readonly name: string;
  readonly unit?: string;
  /** Id of the load case; the first one where it is left out. */
  readonly case?: string;
  readonly recomputed?: string;
  readonly printed?: string;
  readonly wrong?: { readonly printed: string; readonly because: string };
}

export interface Example {
  readonly id: string;
  readonly source: string;
  readonly tag: Tag;
  readonly template: string;
  readonly givens: Readonly<Record<string, string>>;
  readonly checks: readonly Check[];
}

const folder = new URL('../../templates/', import.meta.url);

export function templateSheet(id: string): Sheet {
  const read = readSheet(readFileSync(new URL(`${id}.sheet.json`, folder), 'utf8'));
  if (!read.ok) throw new Error(read.problems.map((problem) => problem.message).join('\n'));
  return read.value;
}

/** The sheet with values of givens replaced in all cases. Throws for a name that is no given of the sheet. */
export function withGivens(sheet: Sheet, values: Readonly<Record<string, string>>): Sheet {
  const left = new Map(Object.entries(values));
  const cells = sheet.cells.map((cell) => {
    if (cell.kind !== 'given') return cell;
    const value = left.get(cell.name);
    if (value === undefined) return cell;
    left.delete(cell.name);
    const { byCase: _, ...rest } = cell;
    return { ...rest, value };
  });
  if (left.size > 0) throw new Error(`not givens of “${sheet.title}”: ${[...left.keys()].join(', ')}`);
  return { ...sheet, cells };
}

export function solve(template: string, givens: Readonly<Record<string, string>>): Calculation {
  return calculate(withGivens(templateSheet(template), givens), solver);
}

/** The value of a quantity in a unit. Throws where the sheet has none. */
export function valueOf(calculation: Calculation, name: string, unit = '1', loadCase?: string): number {
  const state = calculation.named(name);
  const read = readUnit(unit);
  if (!state || !read.ok) throw new Error(`no quantity ${name}, or no unit ${unit}`);
  const index = loadCase === undefined ? 0 : calculation.cases.findIndex((one) => one.id === loadCase);
  const si = state.si[index];
  if (si === undefined || Number.isNaN(si)) {
    throw new Error(
      `${name} has no value: ${calculation
        .problems()
        .map((problem) => `${problem.cell}: ${problem.message}`)
        .join('; ')}`,
    );
  }
  return si / read.value.si;
}

/** Half a unit of the last digit of a numeral such as 1235, 0.3290 or 1.5e4. */
export function halfUnit(numeral: string): number {
  const [mantissa = '', exponent = '0'] = numeral.toLowerCase().split('e');
  const decimals = mantissa.includes('.') ? mantissa.length - mantissa.indexOf('.') - 1 : 0;
  return 0.5 * 10 ** (Number(exponent) - decimals);
}

function expectWithin(actual: number, expected: number, tolerance: number, what: string): void {
  expect(Math.abs(actual - expected), `${what}: ${actual} against ${expected}`).toBeLessThanOrEqual(tolerance);
}

export function check(calculation: Calculation, one: Check): void {
  const actual = valueOf(calculation, one.name, one.unit, one.case);
  if (one.recomputed !== undefined) {
    const expected = Number(one.recomputed);
    expectWithin(actual, expected, Math.max(Math.abs(expected) * 1e-6, halfUnit(one.recomputed)), `${one.name} recomputed`);
  }
  if (one.printed !== undefined) {
    const slack = 1e-9 * Math.abs(actual);
    expectWithin(actual, Number(one.printed), halfUnit(one.printed) + slack, `${one.name} in print`);
  }
  if (one.wrong !== undefined) {
    const gap = Math.abs(actual - Number(one.wrong.printed));
    expect(gap, `${one.name} must not come to ${one.wrong.printed}: ${one.wrong.because}`).toBeGreaterThan(
      halfUnit(one.wrong.printed),
    );
  }
}

export function testExamples(examples: readonly Example[]): void {
  for (const example of examples) {
    test(`${example.id}, ${example.template} (${example.tag}): ${example.source}`, () => {
      const calculation = solve(example.template, example.givens);
      const errors = calculation.problems().filter((problem) => problem.severity === 'error');
      expect(errors.map((problem) => `${problem.cell}: ${problem.message}`)).toEqual([]);
      for (const one of example.checks) check(calculation, one);
    });
  }
}

/** Speed of a pulley of diameter `d` (m) in r/min whose rim runs at `v` (m/s), to 17 digits. */
export function speedFor(v: number, d: number): string {
  return `${(v / (Math.PI * d)) * 60} r/min`;
}

/** Two pulleys `C` (m) apart whose open belt wraps the first, of diameter `d` (m), by `degrees`. */
export function wrapped(degrees: number, d = 0.1, C = 1): Readonly<Record<string, string>> {
  return { d_1: `${d} m`, d_2: `${d + 2 * C * Math.sin(((180 - degrees) * Math.PI) / 360)} m`, C: `${C} m` };
}
