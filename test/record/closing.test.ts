// Closing on hand-computed cases, with small fakes for numbers and steps: decimals of pi, sums, differences, jumps.
// Expected digits are worked out by hand beside each case.

import { describe, expect, test } from 'vitest';
import { type ClosingItem, type ClosingStep, closeSteps, type Verdict } from '../../src/record/closing.ts';

/** A quantity whose true value prints with toPrecision; exact when the digits suffice. */
function item(value: number): ClosingItem & { printed: (digits: number) => number } {
  return {
    exactAt: (digits) => Number(value.toPrecision(digits)) === value,
    printed: (digits) => Number(value.toPrecision(digits)),
  };
}

function unitOfLastDigit(value: number, digits: number): number {
  return 10 ** (Math.floor(Math.log10(Math.abs(value))) - digits + 1);
}

/** A step `result = f(operands)`, closed when the printed operands give the printed result within one unit of its last digit. */
function step(
  items: readonly (ReturnType<typeof item> & { value?: number })[],
  values: readonly number[],
  operands: readonly number[],
  result: number,
  f: (...x: number[]) => number,
  openAs: 'cancellation' | 'jump' = 'cancellation',
): ClosingStep {
  return {
    operands,
    result,
    judge: (digits): Verdict => {
      const line = f(...operands.map((k) => items[k]!.printed(digits[k]!)));
      const d = digits[result] ?? 4;
      const printed = items[result]!.printed(d);
      return Math.abs(line - printed) <= unitOfLastDigit(values[result]!, d) * 1.0000001 ? 'closed' : openAs;
    },
  };
}

describe('closing', () => {
  test('a step of exact numbers closes at the digits of the sheet', () => {
    const values = [0.3012];
    const items = values.map(item);
    const { digits, open } = closeSteps(items, [{ operands: [], result: 0, judge: () => 'closed' }], 4);
    expect([...digits]).toEqual([4]);
    expect(open.size).toBe(0);
  });

  test('a product that loses a unit in the fourth digit gets its operand raised by one digit', () => {
    // 1.0005 prints 1.000 (half to even), times 9.995 is 9.995; true 9.9999975 prints 10.00, unit 0.01: |9.995 - 10.00| = 0.005, closed.
    // 8 x 1.23456 = 9.87648 prints 9.876; 8 x 1.235 = 9.88: off by 4 units; 8 x 1.2346 = 9.8768: within one unit.
    const values = [1.23456, 8 * 1.23456];
    const items = values.map(item);
    const steps = [step(items, values, [], 0, () => 1.23456), step(items, values, [0], 1, (x) => 8 * x)];
    const { digits, open } = closeSteps(items, steps, 4);
    expect([...digits]).toEqual([5, 4]);
    expect(open.size).toBe(0);
  });

  test('raising an operand opens its own step again, further up the chain', () => {
    // a = 1.23456, b = 8a = 9.87648, c = 100·(b − 9.87) = 0.648 prints 0.6480.
    // c needs b to 1e-6: 9.87648 (6 digits, exact). Then b = 8·a needs 8·|a − printed| <= 1e-5: 1.23456 (6 digits, exact).
    const a = 1.23456;
    const b = 9.87648;
    const c = 0.648;
    const values = [a, b, c];
    const items = values.map(item);
    const steps = [
      step(items, values, [], 0, () => a),
      step(items, values, [0], 1, (x) => 8 * x),
      step(items, values, [1], 2, (x) => 100 * (x - 9.87)),
    ];
    const { digits, open } = closeSteps(items, steps, 4);
    expect([...digits]).toEqual([6, 6, 4]);
    expect(open.size).toBe(0);
  });

  test('a step that cannot close is named, and what was raised for it alone goes back', () => {
    const values = [1.2345678901234567, 1e-17];
    const items = values.map(item);
    const never: ClosingStep = { operands: [0], result: 1, judge: () => 'cancellation' };
    const { digits, open } = closeSteps(items, [step(items, values, [], 0, () => values[0]!), never], 4);
    expect([...digits]).toEqual([4, 4]);
    expect([...open]).toEqual([[1, 'cancellation']]);
  });

  test('what another step needs stays raised when one is given up', () => {
    const values = [1.23456, 9.87648, 5];
    const items = values.map(item);
    const steps: ClosingStep[] = [
      step(items, values, [], 0, () => 1.23456),
      step(items, values, [0], 1, (x) => 8 * x),
      { operands: [0], result: 2, judge: () => 'jump' },
    ];
    const { digits, open } = closeSteps(items, steps, 4);
    expect([...digits]).toEqual([5, 4, 4]);
    expect([...open]).toEqual([[2, 'jump']]);
  });

  test('a step that closed first and is given up in a later pass takes its digits back', () => {
    // Step 1 closes with items 0 and 1 at 5 digits, and never once item 1 has 6; step 0, judged after it, wants 6 of item 1.
    const free: ClosingItem = { exactAt: () => false };
    const steps: ClosingStep[] = [
      { operands: [1], result: -1, judge: (d) => (d[1]! >= 6 ? 'closed' : 'cancellation') },
      { operands: [0, 1], result: 2, judge: (d) => (d[1]! < 6 && d[0]! >= 5 ? 'closed' : 'cancellation') },
    ];
    const { digits, open } = closeSteps([free, free, free], steps, 4);
    expect([...open]).toEqual([[1, 'cancellation']]);
    expect([...digits]).toEqual([4, 6, 4]);
  });

  test('where a step cannot serve the digits asked of its result, the one that asked is given up', () => {
    // Step 1 wants 15 digits of item 1. Step 0 can give item 1 no more than 10, and needs item 0 at 5 for 4 of them.
    const free: ClosingItem = { exactAt: () => false };
    const steps: ClosingStep[] = [
      { operands: [0], result: 1, judge: (d) => (d[1]! <= 10 && d[0]! > d[1]! ? 'closed' : 'cancellation') },
      { operands: [1], result: 2, judge: (d) => (d[1]! >= 15 ? 'closed' : 'cancellation') },
      { operands: [1], result: 3, judge: (d) => (d[1]! >= 6 ? 'closed' : 'cancellation') },
    ];
    const { digits, open } = closeSteps([free, free, free, free], steps, 4);
    expect([...open]).toEqual([[1, 'cancellation']]);
    expect([...digits]).toEqual([7, 6, 4, 4]);
  });

  test('a number whose rounding cannot be seen in the result is not raised along with one that can', () => {
    // c = a + b with a = 70 615.0533, b = 0.074 222 888: c = 70 615.1275 to the unit of 0.0001 needs a to 9 digits, b to 3 at most.
    const a = 70615.0533;
    const b = 0.074222888;
    const values = [a, b, a + b];
    const items = values.map(item);
    const printed = (d: ArrayLike<number>) => items[0]!.printed(d[0]!) + items[1]!.printed(d[1]!);
    const sum: ClosingStep = {
      operands: [0, 1],
      result: -1,
      judge: (d) => (Math.abs(printed(d) - 70615.1275) <= 1e-4 ? 'closed' : 'cancellation'),
      scaled: (d) => printed(d) / 1e-4,
    };
    expect([...closeSteps(items.slice(0, 2), [sum], 4).digits]).toEqual([9, 4]);
  });

  test('an exact operand is not padded with zeros, and the cap holds', () => {
    const tried: number[] = [];
    const exact: ClosingItem = { exactAt: () => true };
    const endless: ClosingItem = { exactAt: () => false };
    const open: ClosingStep = {
      operands: [0, 1],
      result: -1,
      judge: (digits) => {
        tried.push(digits[0]!, digits[1]!);
        return 'cancellation';
      },
    };
    closeSteps([exact, endless], [open], 4);
    expect(tried.filter((_, k) => k % 2 === 0).every((digits) => digits === 4)).toBe(true);
    expect(Math.max(...tried)).toBe(15);
  });

  test('ten thousand steps in a chain, each needing one digit more of the one before, end at the cap in linear time', () => {
    const n = 10_000;
    let judged = 0;
    const items: ClosingItem[] = Array.from({ length: n }, () => ({ exactAt: () => false }));
    const steps: ClosingStep[] = items.map((_, i) => ({
      operands: i === 0 ? [] : [i - 1],
      result: i,
      judge: (digits): Verdict => {
        judged++;
        return i === 0 || digits[i - 1]! >= Math.min(15, digits[i]! + 1) ? 'closed' : 'cancellation';
      },
    }));
    const { digits, open } = closeSteps(items, steps, 4);
    expect(open.size).toBe(0);
    expect(digits[n - 1]).toBe(4);
    expect(digits[n - 2]).toBe(5);
    expect(digits[0]).toBe(15);
    // One judgement for each count of digits from 4 to 15, and one more after the step's own digits moved.
    expect(judged).toBeLessThanOrEqual(13 * n);
  });
});
