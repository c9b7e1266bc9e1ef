// A formula that is being typed is judged as the cell that it would become: same types, sentences and numbers, sheet untouched.

import fc from 'fast-check';
import { describe, expect, it } from 'vitest';
import {
  type Cell,
  type CriterionCell,
  calculate,
  checkComparison,
  checkEquation,
  checkFormula,
  type DerivedCell,
} from '../../src/sheet/index.ts';
import { sheetOf, withLine } from './build.ts';

const lines = [
  'd = 200 mm',
  'n = 1450 r/min',
  'F_1 = 900 N',
  'F_2 = 300 N',
  'mu = 0.3',
  'T_a = 20 degC',
  'bad = 12 parsec',
  'v [m/s] := pi*d*n',
  'w := v*F_1',
  'waiting := bad*2',
];
const seeded = { seed: 20261202, numRuns: 250 };
/** Milliseconds, on a busy machine. */
const patience = 60_000;

const atom = fc.oneof(
  { weight: 4, arbitrary: fc.constantFrom('d', 'n', 'F_1', 'F_2', 'mu', 'v', 'w', '2', 'pi', '"10 m/s"') },
  { weight: 1, arbitrary: fc.constantFrom('T_a', 'bad', 'waiting', 'x', '0') },
);
const formula = fc.oneof(
  fc.tuple(atom, fc.constantFrom('+', '-', '*', '/', '^'), atom).map(([a, o, b]) => `${a} ${o} ${b}`),
  fc.tuple(fc.constantFrom('sqrt', 'ln', 'log', 'exp', 'asin'), atom).map(([f, a]) => `${f}(${a})`),
  fc.tuple(atom, atom, atom).map(([a, b, c]) => `${a} > ${b} ? ${b} : ${c}`),
  fc.constantFrom('', '(', 'F_1 +', 'F_1 - F_1)', 'e^(mu*pi)', '1/(F_1 - 3*F_2)'),
);
const unit = fc.option(fc.constantFrom('m/s', 'N', '1', 'kW', 'bogus'), { nil: undefined, freq: 2 });

const told = (problems: readonly { severity: string; code: string; message: string }[]) =>
  problems.map(({ severity, code, message }) => `${severity} ${code} ${message}`).sort();

describe('a formula that is being typed', () => {
  it(
    'has the type, the words, the problems and the numbers of the cell that it becomes (random formulas)',
    () => {
      let good = 0;
      fc.assert(
        fc.property(formula, unit, (text, declared) => {
          const before = sheetOf(lines);
          const cell: DerivedCell = {
            id: 'y',
            kind: 'derived',
            name: 'y',
            formula: text,
            ...(declared ? { unit: declared } : {}),
          };
          const calculation = calculate(before);
          const draft = checkFormula(calculation, text, { name: 'y', ...(declared ? { unit: declared } : {}) });
          expect(calculation.sheet).toBe(before);
          const state = calculate(sheetOf(lines, { more: [cell] })).state('y');
          if (state?.kind !== 'derived') throw new Error('no state');
          const all = [...draft.problems, ...(draft.unitProblem ? [draft.unitProblem] : [])];
          expect(all.some((one) => one.severity === 'error')).toBe(state.problems.some((one) => one.severity === 'error'));
          if (draft.unitProblem !== undefined) return;
          expect(told(draft.problems)).toEqual(told(state.problems));
          if (draft.cases.length === 0) return;
          good += 1;
          expect(draft.words).toBe(state.words);
          expect(draft.type).toEqual(state.type);
          expect(draft.unit).toEqual(state.unit);
          expect(draft.cases.map((one) => one.value)).toEqual([...state.si]);
        }),
        seeded,
      );
      expect(good).toBeGreaterThan(25);
    },
    patience,
  );

  it('gives the value of every case', () => {
    const more: Cell[] = [{ id: 'K', kind: 'given', name: 'K', value: '1', byCase: { start: '1.5' } }];
    const calculation = calculate(sheetOf(lines, { cases: [{ id: 'run' }, { id: 'start' }], more }));
    expect(checkFormula(calculation, 'K*F_1').cases).toMatchObject([
      { case: 'run', value: 900 },
      { case: 'start', value: 1350 },
    ]);
  });

  it('that leads back to its own line is a loop, directly and by way of another line', () => {
    const calculation = calculate(sheetOf(lines));
    expect(checkFormula(calculation, 'v*2', { cell: 'v' }).problems[0]).toMatchObject({ code: 'loop' });
    expect(checkFormula(calculation, 'w/F_1', { cell: 'v' }).problems[0]?.message).toContain(
      'w, step 9 is itself computed from this line',
    );
    expect(checkFormula(calculation, 'x + 1', { name: 'x' }).problems[0]?.message).toContain('x is defined by itself here');
    expect(checkFormula(calculation, 'pi*d*n', { cell: 'v' }).problems).toEqual([]);
  });

  it('keeps a unit that cannot be read apart from its own places', () => {
    const draft = checkFormula(calculate(sheetOf(lines)), 'pi*d*n', { unit: 'm/ss' });
    expect(draft.problems).toEqual([]);
    expect(draft.unitProblem?.code).toBe('unknown-unit');
    expect(draft.cases).toEqual([]);
  });
});

describe('a comparison that is being typed', () => {
  it(
    'has the problems and the verdict of the criterion that it becomes (random sides)',
    () => {
      let judged = 0;
      fc.assert(
        fc.property(
          fc.oneof(atom, formula),
          fc.oneof(atom, formula),
          fc.constantFrom('<', '<=', '>', '>=' as const),
          (left, right, relation) => {
            const calculation = calculate(sheetOf(lines));
            const draft = checkComparison(calculation, { left, right, rightAt: left.length + 4 }, relation);
            const cell: CriterionCell = { id: 'k', kind: 'criterion', left, relation, right };
            const state = calculate(sheetOf(lines, { more: [cell] })).state('k');
            if (state?.kind !== 'criterion') throw new Error('no state');
            const first = (problems: readonly { code: string; severity: string }[]) =>
              [...new Set(problems.filter((one) => one.severity === 'error').map((one) => one.code))].sort();
            expect(first(draft.problems)).toEqual(first(state.problems));
            if (draft.cases.length === 0) return;
            judged += 1;
            expect(draft.cases.map((one) => one.met)).toEqual(state.met);
            expect(draft.cases.map((one) => one.utilisation)).toEqual(state.utilisation);
          },
        ),
        seeded,
      );
      expect(judged).toBeGreaterThan(10);
    },
    patience,
  );

  it('has the places of the right side in the whole text', () => {
    const text = 'F_1 <= F_22';
    const draft = checkComparison(calculate(sheetOf(lines)), { left: 'F_1', right: 'F_22', rightAt: 7 }, '<=');
    expect(draft.problems[0]?.at).toEqual([7, 11]);
    expect(text.slice(7, 11)).toBe('F_22');
  });

  it('of an equation may name the unknown', () => {
    const calculation = calculate(sheetOf(lines));
    expect(checkEquation(calculation, { left: 'F_0*mu', right: 'F_1', rightAt: 9 }, { name: 'F_0', unit: 'N' }).problems).toEqual(
      [],
    );
    expect(
      checkEquation(calculation, { left: 'F_0*mu', right: 'F_1', rightAt: 9 }, { name: 'F_x', unit: 'N' }).problems[0]?.code,
    ).toBe('unknown-name');
  });

  it('leaves the sheet as it is while a line is rewritten', () => {
    const sheet = sheetOf(lines);
    const calculation = calculate(sheet);
    const values = checkFormula(calculation, 'pi*d*n/2', { cell: 'v', unit: 'm/s' }).cases;
    const rewritten = calculate(withLine(sheet, 'v', 'v [m/s] := pi*d*n/2')).state('v');
    expect(rewritten?.kind === 'derived' ? [...rewritten.si] : []).toEqual(values.map((one) => one.value));
  });
});
