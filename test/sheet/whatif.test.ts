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
});
