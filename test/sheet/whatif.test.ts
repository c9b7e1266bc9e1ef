import { readFileSync } from 'node:fs';
import fc from 'fast-check';
import { describe, expect, it } from 'vitest';
import { calculate, readSheet, type Sheet } from '../../src/sheet/index.ts';
import { sheetOf } from './build.ts';

const belt = (): Sheet => {
  const read = readSheet(readFileSync('templates/flat-belt-open.sheet.json', 'utf8'));
  if (!read.ok) throw new Error('the template cannot be read');
  return read.value;
};

describe('a given varied in a what-if', () => {
  it('gives what the sheet gives when the value is typed in, sample by sample, in each case', () => {
    const sheet = belt();
    const calculation = calculate(sheet);
    const typed = calculate(sheet);
    const want = sheet.cells.flatMap((cell) => (cell.kind === 'derived' ? [cell.name] : []));
    for (const caseIndex of [0, 1]) {
      const study = calculation.whatIf({ vary: ['C', 'mu_1'], want, caseIndex });
      fc.assert(
        fc.property(fc.double({ min: 0.2, max: 5, noNaN: true }), fc.double({ min: 0.1, max: 0.8, noNaN: true }), (C, mu) => {
          const varied = study.run([Float64Array.of(C), Float64Array.of(mu)], 1).map((column) => column[0]);
          const cells = sheet.cells.map((cell) => {
            if (cell.kind === 'given' && cell.name === 'C') return { ...cell, value: `${C} m` };
            return cell.kind === 'given' && cell.name === 'mu_1' ? { ...cell, value: `${mu}` } : cell;
          });
          typed.update({ ...sheet, cells });
          expect(varied).toEqual(want.map((name) => typed.named(name)!.si[caseIndex]));
        }),
        { numRuns: 40, seed: 1 },
      );
    }
  }, 60_000);

  it('leaves the sheet as it is', () => {
    const calculation = calculate(belt());
    const numbers = () =>
      calculation.sheet.cells.map((cell) => {
        const state = calculation.state(cell.id)!;
        return state.kind === 'criterion' ? [...state.leftSi, ...state.rightSi] : 'si' in state ? [...state.si] : [];
      });
    const before = numbers();
    calculation.whatIf({ vary: ['C'], want: ['L', 'S_slip'], caseIndex: 0 }).run([Float64Array.of(1, 2, 3)], 3);
    expect(numbers()).toEqual(before);
  });

  it('computes only what lies between the varied and the wanted', () => {
    const calculation = calculate(sheetOf(['a = 1 m', 'b = 2 m', 'c := a + b', 'd := 2*b', 'w := c + d', 'u := 3*c', 'w <= u']));
    expect(calculation.whatIf({ vary: ['a'], want: ['w'], caseIndex: 0 }).computes).toEqual(['c', 'w']);
    expect(calculation.whatIf({ vary: ['b'], want: ['d'], caseIndex: 0 }).computes).toEqual(['d']);
    expect(calculation.whatIf({ vary: ['a'], want: ['d'], caseIndex: 0 }).computes).toEqual([]);
  });

  it('takes a derived quantity as given', () => {
    const calculation = calculate(sheetOf(['a = 1 m', 'c := 2*a', 'w := c + a']));
    const [w] = calculation.whatIf({ vary: ['c'], want: ['w'], caseIndex: 0 }).run([Float64Array.of(10, 20)], 2);
    expect([...w!]).toEqual([11, 21]);
  });

  it('gives both sides of a criterion', () => {
    const calculation = calculate(sheetOf(['a = 1 m', 'b = 2 m', 'c := 2*a', 'c <= b']));
    const [left, right] = calculation
      .whatIf({ vary: ['a'], want: ['k3 left', 'k3 right'], caseIndex: 0 })
      .run([Float64Array.of(0.5, 3)], 2);
    expect([...left!]).toEqual([1, 6]);
    expect([...right!]).toEqual([2, 2]);
  });

  it('has no number where a sample has none, also where the trouble would vanish on the way', () => {
    const calculation = calculate(sheetOf(['a = 1 m', 'b = 1 m', 'c := b/(b/a)', 'd := asin(a/b)', 'w := a == 0 ? 7 : b/a']));
    const [c, d, w] = calculation
      .whatIf({ vary: ['a'], want: ['c', 'd', 'w'], caseIndex: 0 })
      .run([Float64Array.of(0.5, 0, 2)], 3);
    expect([...c!]).toEqual([0.5, Number.NaN, 2]);
    expect(Number.isNaN(d![2]!)).toBe(true);
    expect([...w!]).toEqual([2, 7, 0.5]);
  });

  it('is the same in blocks as one by one', () => {
    const calculation = calculate(belt());
    const study = calculation.whatIf({ vary: ['C'], want: ['L', 'F_W'], caseIndex: 0 });
    const samples = Float64Array.from({ length: 1000 }, (_, i) => 0.4 + i / 500);
    const together = study.run([samples], 1000).map((column) => [...column]);
    for (const at of [0, 255, 256, 511, 999]) {
      const alone = study.run([samples.subarray(at, at + 1)], 1).map((column) => column[0]);
      expect(alone).toEqual(together.map((column) => column[at]));
    }
  });

  it('finds the one sample without a value in a full block, also where a later cell does not need the failed one', () => {
    const calculation = calculate(
      sheetOf(['a = 1 m', 'b = 1 m', 'c := b/(a - b)', 'safe := a > "2 m" ? 7 : c', 'w := 2*safe', 'unused := sqrt(a/b - 0.5)']),
    );
    const study = calculation.whatIf({ vary: ['a'], want: ['c', 'safe', 'w', 'unused'], caseIndex: 0 });
    const a = Float64Array.from({ length: 2048 }, (_, i) => 3 + i / 100);
    a[700] = 1;
    a[1300] = 0.25;
    const [c, safe, w, unused] = study.run([a], 2048);
    const without = (column: Float64Array) => [...column.keys()].filter((i) => Number.isNaN(column[i]));
    expect(without(c!)).toEqual([700]);
    expect(without(safe!)).toEqual([700]);
    expect(without(w!)).toEqual([700]);
    expect(without(unused!)).toEqual([1300]);
    expect(w![1300]).toBe(2 / (0.25 - 1));
    expect(w![699]).toBe(14);
    expect(c![699]).toBe(1 / (a[699]! - 1));
  });

  it('keeps a part apart from its like in a branch that is not taken', () => {
    const calculation = calculate(
      sheetOf([
        'a = 1 m',
        'b = 1 m',
        'w := a > b ? b/(a - b) : 5',
        'u := a > b ? 1 : 2',
        'v := a > b and b/(a - b) > 2 ? 8 : 9',
        'c := b/(a - b)',
      ]),
    );
    const study = calculation.whatIf({ vary: ['a'], want: ['w', 'u', 'v', 'c'], caseIndex: 0 });
    const a = Float64Array.from({ length: 1024 }, (_, i) => (i % 3) * 0.75 + 0.25);
    const columns = study.run([a], 1024);
    const expected = a.reduce<number[][]>(
      (rows, x) => {
        const quotient = x === 1 ? Number.NaN : 1 / (x - 1);
        rows[0]!.push(x > 1 ? quotient : 5);
        rows[1]!.push(x > 1 ? 1 : 2);
        rows[2]!.push(x > 1 && quotient > 2 ? 8 : 9);
        rows[3]!.push(quotient);
        return rows;
      },
      [[], [], [], []],
    );
    expect(columns.map((column) => [...column])).toEqual(expected);
  });

  it('gives a quantity as often as it is wanted, also a varied one and one that does not move', () => {
    const calculation = calculate(sheetOf(['a = 1 m', 'b = 2 m', 'c := a + b', 'k := 3*b']));
    const study = calculation.whatIf({ vary: ['a'], want: ['c', 'a', 'c', 'k', 'b'], caseIndex: 0 });
    for (const count of [1, 3, 1500, 512, 2]) {
      const a = Float64Array.from({ length: count }, (_, i) => i + 0.5);
      const columns = study.run([a], count).map((column) => [...column]);
      const sums = Array.from(a, (x) => x + 2);
      expect(columns).toEqual([sums, [...a], sums, Array.from(a, () => 6), Array.from(a, () => 2)]);
    }
  });

  it('gives for random cells in full blocks what each sample gives alone', () => {
    const parts = [
      'a',
      'b',
      '(a - b)',
      'b*b/(a - b)',
      'sqrt(a/b - 1)*b',
      '(a > b ? a : b)',
      'k*a',
      'a*exp(k*a/b)',
      'ln(a/b - 0.5)*a',
    ];
    const part = fc.constantFrom(...parts);
    const formula = fc.oneof(
      fc.tuple(part, fc.constantFrom('+', '-'), part).map((words) => words.join(' ')),
      fc.tuple(part, part, part, part).map(([p, q, r, s]) => `${p} > ${q} ? ${r} : ${s}`),
      fc.tuple(part, part, part, part, part).map(([p, q, r, s, t]) => `${p} > ${q} and ${r} < ${s} ? ${t} : ${p}`),
      fc.tuple(part, part).map(([p, q]) => `max(${p}, ${q})`),
      part.map((p) => `2*${p} + c_0`),
      part.map((p) => `c_1 > ${p} ? c_0 : ${p}`),
    );
    fc.assert(
      fc.property(
        fc.array(formula, { minLength: 5, maxLength: 5 }),
        fc.double({ min: 0.3, max: 2, noNaN: true }),
        (formulas, k) => {
          const derived = formulas.map(
            (text, i) =>
              `c_${i} := ${i === 0 ? text.replace('c_0', 'a').replace('c_1', 'b') : i === 1 ? text.replace('c_1', 'b') : text}`,
          );
          const calculation = calculate(sheetOf(['a = 1 m', 'b = 1 m', `k = ${k}`, ...derived]));
          const want = formulas.map((_, i) => `c_${i}`);
          expect(calculation.problems().filter((problem) => problem.case === undefined && problem.severity === 'error')).toEqual(
            [],
          );
          const a = Float64Array.from({ length: 512 }, (_, i) =>
            i % 37 === 0 ? 1 : i % 41 === 0 ? 0 : 1 + (i % 100) / 25 - (i % 7) / 10,
          );
          const together = calculation.whatIf({ vary: ['a'], want, caseIndex: 0 });
          const alone = calculation.whatIf({ vary: ['a'], want, caseIndex: 0 });
          const columns = together.run([a], 512);
          for (const at of [0, 1, 37, 41, 100, 205, 511]) {
            const one = alone.run([a.subarray(at, at + 1)], 1).map((column) => column[0]);
            expect(columns.map((column) => column[at])).toEqual(one);
            calculation.update(sheetOf([`a = ${a[at]} m`, 'b = 1 m', `k = ${k}`, ...derived]));
            expect(one).toEqual(want.map((name) => calculation.named(name)!.si[0]));
          }
        },
      ),
      { numRuns: 60, seed: 7 },
    );
  }, 60_000);
});
