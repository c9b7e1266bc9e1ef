// Exact numbers and their one rounding.

import fc from 'fast-check';
import { describe, expect, test, vi } from 'vitest';
import {
  decimalsOfPi,
  exactOfText,
  fractionOfDouble,
  nearestDouble,
  piDigits,
  rationalPowerE,
  rootE,
} from '../../src/quantity/exact.ts';
import { divideE, doubleOf, equalE, exactOf, exactOfDouble, multiplyE, powerE, rational } from '../../src/quantity/index.ts';
import { lastBit, stepsApart } from './doubles.ts';

// Thousands of random cases: on a busy machine more than the usual five seconds.
vi.setConfig({ testTimeout: 60_000 });

const runs = { seed: 20261201, numRuns: 2000, verbose: 1 } as const;
const finite = fc.double({ noNaN: true, noDefaultInfinity: true });

describe('nearestDouble', () => {
  test('equals ECMAScript’s own reading of decimal numerals, which rounds to nearest, ties to even', () => {
    fc.assert(
      fc.property(fc.bigInt({ min: 0n, max: 10n ** 40n }), fc.integer({ min: -370, max: 330 }), (digits, exponent) => {
        const ten = 10n ** BigInt(Math.abs(exponent));
        const value = exponent < 0 ? nearestDouble(digits, ten) : nearestDouble(digits * ten, 1n);
        expect(value).toBe(Number(`${digits}e${exponent}`));
      }),
      runs,
    );
  });

  test('gives every double back from its exact fraction, and from the middle of two the even one', () => {
    fc.assert(
      fc.property(finite, (x) => {
        const { n, d } = fractionOfDouble(x);
        expect(nearestDouble(n, d)).toBe(x === 0 ? 0 : x);
        const next = x * (1 + Number.EPSILON);
        if (!Number.isFinite(next) || stepsApart(x, next) !== 1) return;
        const after = fractionOfDouble(next);
        const [above, below] = [n * after.d + after.n * d, 2n * d * after.d];
        expect(nearestDouble(above, below)).toBe(lastBit(x) === 0 ? x : next);
        // The slightest bit beside the middle decides, however far behind the digits of a double it stands.
        const tiny = 10n ** 40n;
        const outward = above > 0n ? 1n : -1n;
        expect(nearestDouble(above * tiny + outward, below * tiny)).toBe(next);
        expect(nearestDouble(above * tiny - outward, below * tiny)).toBe(x);
      }),
      runs,
    );
  });

  test.each([
    ['5e-324', 5e-324],
    ['2.4703282292062327e-324', 0],
    ['2.4703282292062329e-324', 5e-324],
    ['7.4109846876186982e-324', 1e-323],
    ['2.2250738585072011e-308', 2.225073858507201e-308],
    ['2.2250738585072014e-308', 2.2250738585072014e-308],
    ['1.7976931348623157e308', Number.MAX_VALUE],
    ['1.7976931348623159e308', Number.POSITIVE_INFINITY],
    ['1e400', Number.POSITIVE_INFINITY],
    ['1e-400', 0],
    // 2^53 + 1 lies in the middle: the even neighbour (IEEE 754).
    ['9007199254740993', 9007199254740992],
    ['9007199254740995', 9007199254740996],
  ])('%s becomes %d', (text, value) => {
    expect(doubleOf(exactOfText(text))).toBe(value);
  });
});

describe('powers of π', () => {
  test('π, π/180 and others come out as the nearest doubles', () => {
    expect(doubleOf(exactOfText('pi'))).toBe(Math.PI);
    // 1/π and π² to 30 digits: Abramowitz and Stegun, Table 1.1; π/180: NIST SP 811 B.8.
    expect(doubleOf(exactOfText('1/pi'))).toBe(Number('0.318309886183790671537767526745'));
    expect(doubleOf(exactOfText('pi*pi'))).toBe(Number('9.869604401089358618834490999876'));
    expect(doubleOf(exactOfText('pi/180'))).toBe(Number('0.017453292519943295769'));
  });

  test('the decimals of π agree with Machin’s formula worked out in integers', () => {
    const guard = 20n;
    const one = 10n ** (BigInt(decimalsOfPi) + guard);
    const arctan = (x: bigint): bigint => {
      let [sum, term, k] = [0n, one / x, 0n];
      while (term !== 0n) {
        sum += (k % 2n === 0n ? term : -term) / (2n * k + 1n);
        term /= x * x;
        k += 1n;
      }
      return sum;
    };
    expect(piDigits).toBe((4n * (4n * arctan(5n) - arctan(239n))) / 10n ** guard);
  });
});

describe('algebra', () => {
  const exact = fc
    .record({
      n: fc.bigInt({ min: -(10n ** 30n), max: 10n ** 30n }).filter((n) => n !== 0n),
      d: fc.bigInt({ min: 1n, max: 10n ** 30n }),
      pi: fc.integer({ min: -3, max: 3 }),
    })
    .map(({ n, d, pi }) => ({ ...exactOf(n, d), pi }));

  test('products commute, quotients undo them, powers multiply', () => {
    fc.assert(
      fc.property(exact, exact, fc.integer({ min: -5, max: 5 }), (a, b, k) => {
        expect(multiplyE(a, b)).toEqual(multiplyE(b, a));
        expect(equalE(divideE(multiplyE(a, b), b), a)).toBe(true);
        expect(equalE(powerE(multiplyE(a, b), k), multiplyE(powerE(a, k), powerE(b, k)))).toBe(true);
      }),
      { ...runs, numRuns: 500 },
    );
  });

  test('a root of a power is the number itself, and other roots are right to 80 digits', () => {
    fc.assert(
      fc.property(
        fc.bigInt({ min: 1n, max: 10n ** 20n }),
        fc.bigInt({ min: 1n, max: 10n ** 20n }),
        fc.integer({ min: 2, max: 6 }),
        (n, d, degree) => {
          const a = exactOf(n, d);
          expect(equalE(rootE(powerE(a, degree), degree), a)).toBe(true);
          const ratio = divideE(powerE(rootE(a, degree), degree), a);
          const error = ratio.n - ratio.d;
          expect((error < 0n ? -error : error) * 10n ** 80n < ratio.d).toBe(true);
        },
      ),
      { ...runs, numRuns: 300 },
    );
  });

  test('three halves of a quarter is an eighth', () => {
    expect(rationalPowerE(exactOf(1, 4), rational(3, 2))).toEqual(exactOf(1, 8));
  });

  test('what is no number of a table, and what is not finite, is our own fault', () => {
    for (const text of ['', 'x', '1,5', '1/0', '-3', 'pi^2']) expect(() => exactOfText(text), text).toThrow(RangeError);
    for (const x of [Number.NaN, Number.POSITIVE_INFINITY, Number.NEGATIVE_INFINITY])
      expect(() => exactOfDouble(x)).toThrow(RangeError);
  });
});
