// Rounding of decimal numerals.
//
// 1. Always on the decimal digits, in one step, never on the binary value: 2.675 to two decimals is 2.68 (practice of
//    ISO 80000-1:2009 Annex B and NIST SP 811 B.7.1, which round what is written).
// 2. Numerals with fewer digits than asked for are padded with zeros: the result always ends at the place asked for.
// 3. A negative numeral that rounds to zero is 0, not −0.
// Not here: how many digits a result deserves.

import type { Numeral } from './numeral.ts';
import { firstPlace, isZeroNumeral, numeralOf } from './numeral.ts';

/**
 * half-even: to the nearest, ties to the even digit (ISO 80000-1 rule A, the default).
 * half-away: to the nearest, ties away from zero (rule B for positive numbers).
 * up: toward +∞. down: toward −∞. away: away from zero.
 */
export type Rounding = 'half-even' | 'half-away' | 'up' | 'down' | 'away';

/** Whether the magnitude grows by one unit of the last kept digit; `rest` is what is cut off, not all zeros. */
function grows(mode: Rounding, negative: boolean, lastKept: number, rest: string): boolean {
  if (mode === 'up') return !negative;
  if (mode === 'down') return negative;
  if (mode === 'away') return true;
  const first = rest.charCodeAt(0) - 48;
  if (first !== 5) return first > 5;
  if (/[1-9]/.test(rest.slice(1))) return true;
  return mode === 'half-away' || lastKept % 2 === 1;
}

/** digits + 1 in the last place; may be one digit longer. */
function increment(digits: string): string {
  let place = digits.length - 1;
  while (place >= 0 && digits[place] === '9') place--;
  const zeros = '0'.repeat(digits.length - 1 - place);
  if (place < 0) return `1${zeros}`;
  return digits.slice(0, place) + String(digits.charCodeAt(place) - 47) + zeros;
}

/** Rounded so that the last digit has the weight 10^exponent. */
export function roundAtPlace(a: Numeral, exponent: number, mode: Rounding = 'half-even'): Numeral {
  if (exponent <= a.exponent) {
    if (isZeroNumeral(a)) return numeralOf(false, '0', exponent);
    return numeralOf(a.negative, a.digits + '0'.repeat(a.exponent - exponent), exponent);
  }
  const keep = a.digits.length - (exponent - a.exponent);
  const kept = keep > 0 ? a.digits.slice(0, keep) : '0';
  const rest = keep >= 0 ? a.digits.slice(keep) : '0'.repeat(Math.min(-keep, 1)) + a.digits;
  const last = kept.charCodeAt(kept.length - 1) - 48;
  const up = /[1-9]/.test(rest) && grows(mode, a.negative, last, rest);
  return numeralOf(a.negative, up ? increment(kept) : kept, exponent);
}

/** Rounded to a number of significant digits, at least 1; zero has no significant digits and stays as it is. */
export function roundSignificant(a: Numeral, digits: number, mode: Rounding = 'half-even'): Numeral {
  if (!Number.isSafeInteger(digits) || digits < 1) throw new RangeError(`no number of significant digits: ${digits}`);
  if (isZeroNumeral(a)) return a;
  const rounded = roundAtPlace(a, firstPlace(a) - digits + 1, mode);
  // 9.9996 to four digits carries to 10.000: one digit too many, and it is a zero.
  if (rounded.digits.length <= digits) return rounded;
  return { negative: rounded.negative, digits: rounded.digits.slice(0, digits), exponent: rounded.exponent + 1 };
}
