// Rounding of decimal numerals against published tables.

import fc from 'fast-check';
import { describe, expect, test, vi } from 'vitest';
import {
  doubleOfNumeral,
  numeralOfDouble,
  plainNumeral,
  type Rounding,
  readNumeral,
  roundAtPlace,
  roundSignificant,
} from '../../src/quantity/index.ts';

// Thousands of random cases: on a busy machine more than the usual five seconds.
vi.setConfig({ testTimeout: 60_000 });

const numeral = (text: string) => {
  const read = readNumeral(text, '.');
  if (!read.ok) throw new Error(read.problem.message);
  return read.value;
};
/** As written in the tables: 1.23e+3 is 1230. */
const written = (text: string) => (text.includes('e') ? String(Number(text)) : text);

// ISO 80000-1:2009, Annex B, rules A (even multiple) and B (higher multiple), and the same ties with a minus sign; the rows
// from 2.675 on are numbers whose binary value lies on the other side of the tie (worked out with exact decimals).
const atPlace: readonly [string, number, string, string][] = [
  ['12.223', -1, '12.2', '12.2'],
  ['12.251', -1, '12.3', '12.3'],
  ['12.275', -1, '12.3', '12.3'],
  ['12.25', -1, '12.2', '12.3'],
  ['12.35', -1, '12.4', '12.4'],
  ['12.254', -1, '12.3', '12.3'],
  ['-12.25', -1, '-12.2', '-12.3'],
  ['-12.35', -1, '-12.4', '-12.4'],
  ['1222.3', 1, '1220', '1220'],
  ['1225.1', 1, '1230', '1230'],
  ['1227.5', 1, '1230', '1230'],
  ['1225.0', 1, '1220', '1230'],
  ['1235.0', 1, '1240', '1240'],
  ['2.675', -2, '2.68', '2.68'],
  ['1.005', -2, '1.00', '1.01'],
  ['8.345', -2, '8.34', '8.35'],
  ['1.125', -2, '1.12', '1.13'],
  ['0.285', -2, '0.28', '0.29'],
  ['1.115', -2, '1.12', '1.12'],
  ['0.5', 0, '0', '1'],
  ['1.5', 0, '2', '2'],
  ['2.5', 0, '2', '3'],
  ['3.5', 0, '4', '4'],
  // Half of the first negative one goes to zero: it is 0, not −0.
  ['-0.5', 0, '0', '-1'],
  ['-1.5', 0, '-2', '-2'],
  ['-2.5', 0, '-2', '-3'],
];

describe('rounding at a place', () => {
  test.each(atPlace)('%s at 10^%d is %s to the even digit, %s away from zero', (text, place, even, away) => {
    expect(written(plainNumeral(roundAtPlace(numeral(text), place)))).toBe(even);
    expect(written(plainNumeral(roundAtPlace(numeral(text), place, 'half-away')))).toBe(away);
  });

  test('the same from doubles: the shortest decimal is rounded, not the binary value', () => {
    for (const [text, place, even] of atPlace) {
      expect(written(plainNumeral(roundAtPlace(numeralOfDouble(Number(text)), place))), text).toBe(even);
    }
  });

  test('two steps are not one: 12.254 is 12.3, by way of 12.25 it would be 12.2 (ISO 80000-1:2009, B.4)', () => {
    const once = roundAtPlace(numeral('12.254'), -1);
    const twice = roundAtPlace(roundAtPlace(numeral('12.254'), -2), -1);
    expect([plainNumeral(once), plainNumeral(twice)]).toEqual(['12.3', '12.2']);
  });

  // IS 2:1960, examples of rounding to the even digit.
  test.each([
    ['4.36', 0, '4'],
    ['2.355', 0, '2'],
    ['9.625', 0, '10'],
    ['15.205', -1, '15.2'],
    ['2.651', -1, '2.7'],
    ['0.3552', -2, '0.36'],
    ['12.545001', -2, '12.55'],
  ])('%s at 10^%d is %s', (text, place, rounded) => {
    expect(plainNumeral(roundAtPlace(numeral(text), place))).toBe(rounded);
  });

  // toFixed, toPrecision and Math.round give 1.00, 2.67, 8.35, 1.4, 1.3, 12.3, 3, -3, -2 and 3e+1 (measured, ECMAScript).
  test.each([
    ['1.005', -2, '1.00', '1.01'],
    ['2.675', -2, '2.68', '2.68'],
    ['8.345', -2, '8.34', '8.35'],
    ['1.45', -1, '1.4', '1.5'],
    ['1.25', -1, '1.2', '1.3'],
    ['12.35', -1, '12.4', '12.4'],
    ['2.5', 0, '2', '3'],
    ['-2.5', 0, '-2', '-3'],
    ['25', 1, '20', '30'],
    ['434.99999999999994', -2, '435.00', '435.00'],
  ])('%s at 10^%d is %s (to even) and %s (away), whatever the binary value', (text, place, even, away) => {
    expect(written(plainNumeral(roundAtPlace(numeralOfDouble(Number(text)), place)))).toBe(even);
    expect(written(plainNumeral(roundAtPlace(numeralOfDouble(Number(text)), place, 'half-away')))).toBe(away);
  });
});

describe('rounding to significant digits', () => {
  // NIST SP 811 B.7.1; the last two: JCGM 100:2008, 7.2.6, and a tie worked out by hand.
  test.each([
    ['6.9749515', 3, '6.97', '6.97'],
    ['6.9749515', 4, '6.975', '6.975'],
    ['6.9749515', 5, '6.9750', '6.9750'],
    ['6.9749515', 7, '6.974952', '6.974952'],
    ['6.9749505', 7, '6.974950', '6.974951'],
    ['10.05762', 5, '10.058', '10.058'],
    ['0.145', 2, '0.14', '0.15'],
  ])('%s to %d digits is %s (to even) and %s (away)', (text, digits, even, away) => {
    expect(plainNumeral(roundSignificant(numeral(text), digits))).toBe(even);
    expect(plainNumeral(roundSignificant(numeral(text), digits, 'half-away'))).toBe(away);
  });

  test('an uncertainty may be rounded up: 10.47 to 11, 28.05 to 28 (JCGM 100:2008, 7.2.6)', () => {
    expect(plainNumeral(roundSignificant(numeral('10.47'), 2, 'up'))).toBe('11');
    expect(plainNumeral(roundSignificant(numeral('28.05'), 2))).toBe('28');
  });

  test.each([
    ['9.9996', 4, '10.00'],
    ['999.95', 4, '1000'],
    ['0.099996', 4, '0.1000'],
    ['9.99', 1, '1e+1'],
    ['1500', 4, '1500'],
    ['15', 4, '15.00'],
    ['13760', 4, '1.376e+4'],
    ['0', 4, '0'],
  ])('%s to %d digits is %s', (text, digits, rounded) => {
    expect(plainNumeral(roundSignificant(numeral(text), digits))).toBe(rounded);
  });

  test('fewer than one digit is our own fault', () => {
    for (const digits of [0, -1, 1.5, Number.NaN]) expect(() => roundSignificant(numeral('1'), digits)).toThrow(RangeError);
  });
});

describe('every mode, on random numerals', () => {
  const runs = { seed: 7, numRuns: 2000, verbose: 1 } as const;
  const random = fc.record({
    negative: fc.boolean(),
    digits: fc.bigInt({ min: 1n, max: 10n ** 18n }),
    exponent: fc.integer({ min: -25, max: 5 }),
    place: fc.integer({ min: -25, max: 8 }),
  });

  /** The same by integer division: the number in units of 10^-30. */
  const scaled = (a: { negative: boolean; digits: string; exponent: number }): bigint =>
    BigInt(`${a.negative ? '-' : ''}${a.digits}`) * 10n ** BigInt(a.exponent + 30);

  test('the result ends at the place asked for and is the neighbour that the mode names', () => {
    fc.assert(
      fc.property(
        random,
        fc.constantFrom<Rounding>('half-even', 'half-away', 'up', 'down', 'away'),
        ({ negative, digits, exponent, place }, mode) => {
          const a = { negative, digits: String(digits), exponent };
          const rounded = roundAtPlace(a, place, mode);
          const [value, result, unit] = [scaled(a), scaled(rounded), 10n ** BigInt(place + 30)];
          expect(result % unit).toBe(0n);
          const error = result - value;
          const size = error < 0n ? -error : error;
          expect(size < unit).toBe(true);
          if (mode === 'up') expect(error >= 0n).toBe(true);
          if (mode === 'down') expect(error <= 0n).toBe(true);
          if (mode === 'away') expect(error === 0n || error < 0n === value < 0n).toBe(true);
          if (mode.startsWith('half')) expect(2n * size <= unit).toBe(true);
          if (2n * size === unit && mode === 'half-even') expect((result / unit) % 2n).toBe(0n);
          if (2n * size === unit && mode === 'half-away') expect(error < 0n).toBe(value < 0n);
          expect(Object.is(doubleOfNumeral(rounded), -0)).toBe(false);
          if (rounded.digits !== '0') expect(rounded.exponent).toBe(place);
        },
      ),
      runs,
    );
  });
});
