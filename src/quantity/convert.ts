// Conversion of numbers between a unit and coherent SI.
//
// 1. Exact until one final rounding to the nearest double, ties to even.
// 2. A double that is handed in for a quantity in a unit means its shortest decimal: toSI(0.1, km) is 100 m.
// 3. From SI back, the number is the decimal that reads back as the same SI value, where there is one of at most 17 digits:
//    25 °C comes back as 25, not as 24.999999999999977. It is never further from the exact quotient than the doubles around
//    the SI value tell apart.
// 4. A reading takes its zero along; a difference (differenceUnit) does not.
// Not here: rounding for display.

import type { Exact } from './exact.ts';
import { doubleOf, fractionOfDouble, nearestDouble } from './exact.ts';
import type { Numeral } from './numeral.ts';
import { doubleOfNumeral, numeralOfDouble, withoutTrailingZeros } from './numeral.ts';
import { roundAtPlace } from './rounding.ts';
import type { Unit } from './unit.ts';

const wholeDoubles = 2 ** 53;
/** Powers of ten up to 10^22 are exact doubles. */
const exactTens = Array.from({ length: 23 }, (_, power) => Number(`1e${power}`));

const isOne = (factor: Exact): boolean => factor.n === 1n && factor.d === 1n && factor.pi === 0;

/** SI value of a numeral in a unit: exact conversion, one rounding. */
export function siOfNumeral(a: Numeral, unit: Unit): number {
  const { factor, reading } = unit;
  if (reading) return siOfReading(a, factor, reading);
  if (isOne(factor)) return doubleOfNumeral(a);
  const quick = a.digits.length <= 15 && factor.pi === 0 ? quickProduct(a, Number(factor.n), Number(factor.d)) : undefined;
  if (quick !== undefined) return quick;
  const digits = BigInt(a.negative ? `-${a.digits}` : a.digits);
  const ten = 10n ** BigInt(Math.abs(a.exponent));
  return doubleOf({
    n: digits * factor.n * (a.exponent > 0 ? ten : 1n),
    d: factor.d * (a.exponent < 0 ? ten : 1n),
    pi: factor.pi,
  });
}

/** Numerator and denominator as doubles, where both are exact: then one division rounds once. */
function quickProduct(a: Numeral, up: number, down: number): number | undefined {
  const places = Math.abs(a.exponent);
  if (places > 22) return undefined;
  const ten = exactTens[places] ?? 1;
  const above = Number(a.digits) * up * (a.exponent > 0 ? ten : 1);
  const below = a.exponent < 0 ? down * ten : down;
  // Products up to 2^53 of whole numbers are exact; a power of ten alone is so up to 10^22.
  if (above > wholeDoubles || (below > wholeDoubles && down !== 1)) return undefined;
  return a.negative ? -(above / below) : above / below;
}

function siOfReading(a: Numeral, factor: Exact, zero: Exact): number {
  const digits = BigInt(a.negative ? `-${a.digits}` : a.digits);
  const ten = 10n ** BigInt(Math.abs(a.exponent));
  const n = digits * factor.n * (a.exponent > 0 ? ten : 1n);
  const d = factor.d * (a.exponent < 0 ? ten : 1n);
  return nearestDouble(n * zero.d + zero.n * d, d * zero.d);
}

/** SI value of a double in a unit; NaN and infinities stay what they are. */
export function toSI(value: number, unit: Unit): number {
  if (!Number.isFinite(value) || (isOne(unit.factor) && !unit.reading)) return value;
  return siOfNumeral(numeralOfDouble(value), unit);
}

/** (si − zero)/factor, rounded once. */
function quotient(si: number, { factor, reading }: Unit): number {
  if (!reading && factor.pi === 0) {
    const [up, down] = [Number(factor.n), Number(factor.d)];
    if (up === 1 && down <= wholeDoubles) return si * down;
    if (down === 1 && up <= wholeDoubles) return si / up;
  }
  const { n, d } = fractionOfDouble(si);
  const above = reading ? n * reading.d - reading.n * d : n;
  const below = reading ? d * reading.d : d;
  return doubleOf({ n: above * factor.d, d: below * factor.n, pi: -factor.pi });
}

/** The numeral of an SI value in a unit; see 3 above. Throws RangeError for NaN and infinities. */
export function numeralInUnit(si: number, unit: Unit): Numeral {
  if (isOne(unit.factor) && !unit.reading) return numeralOfDouble(si);
  const value = quotient(si, unit);
  const nearest = numeralOfDouble(value);
  if (nearest.digits.length <= 15 && !unit.reading) return nearest;
  if (value === 0 || !Number.isFinite(value)) return nearest;
  // The SI value and the quotient are each off by at most 2^-53 of the greater of the two: decimals that far apart are told
  // apart, and of those at this place the one that was meant is the nearest.
  const size = Math.max(Math.abs(si) / unit.si, Math.abs(value));
  const apart = Math.ceil(Math.log10(size * 2 ** -51));
  for (const place of [apart, apart - 1]) {
    if (place <= nearest.exponent) break;
    const shorter = roundAtPlace(nearest, place);
    if (siOfNumeral(shorter, unit) === si) return written(shorter);
  }
  return nearest;
}

/** As numeralOfDouble writes it: no zeros after the last decimal, whole numbers written out. */
function written(a: Numeral): Numeral {
  const short = withoutTrailingZeros(a);
  return short.exponent > 0 ? numeralOfDouble(doubleOfNumeral(short)) : short;
}

/** The number of an SI value in a unit: the double of numeralInUnit. NaN and infinities stay what they are. */
export function fromSI(si: number, unit: Unit): number {
  if (isOne(unit.factor) && !unit.reading) return si;
  return Number.isFinite(si) ? doubleOfNumeral(numeralInUnit(si, unit)) : si;
}
