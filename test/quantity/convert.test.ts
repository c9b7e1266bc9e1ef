// Conversion to and from SI: exact, rounded once, and back to the decimal that was meant.

import fc from 'fast-check';
import { describe, expect, test, vi } from 'vitest';
import {
  exactOfNumeral,
  fromSI,
  numeralInUnit,
  numeralOf,
  numeralOfDouble,
  plainNumeral,
  siOfNumeral,
  toSI,
  unitNames,
  unitOf,
} from '../../src/quantity/index.ts';
import { stepsApart } from './doubles.ts';

// Thousands of random cases: on a busy machine more than the usual five seconds.
vi.setConfig({ testTimeout: 60_000 });

const units = [...unitNames(), 'MPa·m^(1/2)', 'in/°F', '°²', 'rad/°'];
const runs = { seed: 42, numRuns: 1500, verbose: 1 } as const;
const numerals = fc
  .record({
    negative: fc.boolean(),
    digits: fc.oneof(fc.bigInt({ min: 1n, max: 99999n }), fc.bigInt({ min: 1n, max: 10n ** 17n })).map(String),
    exponent: fc.integer({ min: -20, max: 10 }),
  })
  .map(({ negative, digits, exponent }) => numeralOf(negative, digits, exponent));
const magnitudes = fc
  .tuple(fc.double({ min: 1, max: 10, noNaN: true }), fc.integer({ min: -12, max: 12 }), fc.boolean())
  .map(([m, e, minus]) => (minus ? -m : m) * 10 ** e);

/** a·factor (+ zero) in units of 10^-80, π by 60 decimals, cut: an integer computed without the code under test. */
const pi = 3141592653589793238462643383279502884197169399375105820974944n;
const piScale = 10n ** 60n;
function scaled(a: { n: bigint; d: bigint }, unit: ReturnType<typeof unitOf>): bigint {
  const { n, d, pi: power } = unit.factor;
  let [above, below] = [a.n * n, a.d * d];
  for (let k = 0; k < Math.abs(power); k++) {
    above *= power > 0 ? pi : piScale;
    below *= power > 0 ? piScale : pi;
  }
  const zero = unit.reading ?? { n: 0n, d: 1n };
  return ((above * zero.d + zero.n * below) * 10n ** 80n) / (below * zero.d);
}

describe('to SI', () => {
  test('a numeral becomes the nearest double of its exact value', () => {
    fc.assert(
      fc.property(numerals, fc.constantFrom(...units), (a, text) => {
        const unit = unitOf(text);
        expect(siOfNumeral(a, unit)).toBe(Number(`${scaled(exactOfNumeral(a), unit)}e-80`));
      }),
      runs,
    );
  });

  test('a double means its shortest decimal', () => {
    expect(toSI(0.1, unitOf('km'))).toBe(100);
    expect(toSI(0.3, unitOf('in'))).toBe(0.00762);
    expect(toSI(1500, unitOf('r/min'))).toBe(25);
    expect([toSI(Number.NaN, unitOf('mm')), toSI(Number.POSITIVE_INFINITY, unitOf('mm'))]).toEqual([
      Number.NaN,
      Number.POSITIVE_INFINITY,
    ]);
  });
});

describe('from SI', () => {
  test('a numeral of up to 15 digits comes back as it was, in every unit', () => {
    const short = numerals.filter((a) => a.digits.length <= 15);
    fc.assert(
      fc.property(short, fc.constantFrom(...units.filter((text) => unitOf(text).reading === undefined)), (a, text) => {
        const unit = unitOf(text);
        const back = numeralInUnit(siOfNumeral(a, unit), unit);
        expect(Number(plainNumeral(back))).toBe(Number(plainNumeral(a)));
        expect(fromSI(siOfNumeral(a, unit), unit)).toBe(Number(plainNumeral(a)));
      }),
      runs,
    );
  });

  test('any SI value reads back to itself to a step, and the number is within a step of the exact quotient', () => {
    fc.assert(
      fc.property(magnitudes, fc.constantFrom(...units.filter((text) => unitOf(text).reading === undefined)), (si, text) => {
        const unit = unitOf(text);
        const value = fromSI(si, unit);
        expect(stepsApart(toSI(value, unit), si)).toBeLessThanOrEqual(1);
        const { n, d } = exactOfNumeral(numeralOfDouble(si));
        const exact = Number(`${(n * 10n ** 160n) / scaled({ n: d, d: 1n }, unit)}e-80`);
        expect(Math.abs(value / exact - 1)).toBeLessThan(4.5e-16);
      }),
      runs,
    );
  });

  test('a reading comes back to the double nearest in kelvin', () => {
    fc.assert(
      fc.property(fc.double({ min: 0, max: 5000, noNaN: true }), fc.constantFrom('°C', '°F'), (kelvin, text) => {
        const unit = unitOf(text);
        expect(Math.abs(toSI(fromSI(kelvin, unit), unit) - kelvin)).toBeLessThanOrEqual(2 ** -52 * Math.max(kelvin, 273.15));
      }),
      runs,
    );
  });

  test.each([
    [0.0254, 'in', '1'],
    [0.01225, 'mm', '12.25'],
    [298.15, '°C', '25'],
    [310.15, '°F', '98.6'],
    [Math.PI, '°', '180'],
    [Math.PI / 2, '°', '90'],
    [0.3, '1', '0.3'],
    [15000, 'kW', '15'],
    [25, 'r/min', '1500'],
    [0.05, '%', '5'],
    [0, 'kN', '0'],
    [273.15, '°C', '0'],
    [1e-9, 'km', '1e-12'],
    [1234.5, 'kN', '1.2345'],
  ])('%d in %s is %s', (si, unit, text) => {
    expect(plainNumeral(numeralInUnit(si, unitOf(unit)))).toBe(text);
  });

  test('what is no number stays none, and has no numeral', () => {
    for (const x of [Number.NaN, Number.POSITIVE_INFINITY, Number.NEGATIVE_INFINITY]) {
      expect(fromSI(x, unitOf('mm'))).toBe(x);
      expect(fromSI(x, unitOf('°C'))).toBe(x);
      expect(() => numeralInUnit(x, unitOf('mm'))).toThrow(RangeError);
    }
  });
});
