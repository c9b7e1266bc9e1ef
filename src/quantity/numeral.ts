// A decimal numeral as it stands on paper: sign, digits and the place of the last digit.
//
// 1. value = ± digits × 10^exponent. No leading zeros in `digits`, except that zero is "0".
// 2. Trailing zeros are kept: 0.30 is not 0.3. They say how far the numeral was rounded or read.
// 3. Zero is never negative: nothing prints −0.
// Not here: reading (numeral-text.ts), rounding (rounding.ts), printing for people (print.ts).

import type { Exact } from './exact.ts';
import { exactOf, multiplyE, powerE } from './exact.ts';

export interface Numeral {
  readonly negative: boolean;
  readonly digits: string;
  readonly exponent: number;
}

/** Up to this many digits a whole number is written out: 1500, not 15 × 10². All of them are exact doubles. */
const wholeDigits = 15;

/** Brings digits with leading zeros and a sign into the form above. */
export function numeralOf(negative: boolean, digits: string, exponent: number): Numeral {
  let first = 0;
  while (first < digits.length - 1 && digits.charCodeAt(first) === 48) first++;
  const kept = first === 0 ? digits : digits.slice(first);
  if (kept === '0') return { negative: false, digits: kept, exponent: Math.min(exponent, 0) };
  return { negative, digits: kept, exponent };
}

/** The shortest decimal that reads back as the same double; whole numbers are written out. Throws RangeError for NaN and ±Infinity. */
export function numeralOfDouble(x: number): Numeral {
  if (!Number.isFinite(x)) throw new RangeError(`no numeral: ${x}`);
  if (x === 0) return { negative: false, digits: '0', exponent: 0 };
  // ECMAScript: toExponential without argument gives as many digits as are needed to tell the double from its neighbours.
  const text = Math.abs(x).toExponential();
  const e = text.indexOf('e');
  const digits = e === 1 ? text.slice(0, 1) : text[0] + text.slice(2, e);
  const exponent = Number(text.slice(e + 1)) - digits.length + 1;
  if (exponent > 0 && digits.length + exponent <= wholeDigits) {
    return { negative: x < 0, digits: digits + '0'.repeat(exponent), exponent: 0 };
  }
  return { negative: x < 0, digits, exponent };
}

/** The double nearest to the numeral. */
export const doubleOfNumeral = (a: Numeral): number => Number(`${a.negative ? '-' : ''}${a.digits}e${a.exponent}`);

export function exactOfNumeral(a: Numeral): Exact {
  const digits = BigInt(a.digits);
  return multiplyE(exactOf(a.negative ? -digits : digits), powerE(exactOf(10), a.exponent));
}

export const isZeroNumeral = (a: Numeral): boolean => /^0+$/.test(a.digits);
export const significantDigits = (a: Numeral): number => a.digits.length;
/** p where 10^p is the weight of the last digit. */
export const lastPlace = (a: Numeral): number => a.exponent;
/** p where 10^p is the weight of the first digit. */
export const firstPlace = (a: Numeral): number => a.exponent + a.digits.length - 1;

/** The same value without zeros at the end of the decimals. */
export function withoutTrailingZeros(a: Numeral): Numeral {
  let { digits, exponent } = a;
  while (exponent < 0 && digits.length > 1 && digits.endsWith('0')) {
    digits = digits.slice(0, -1);
    exponent++;
  }
  return numeralOf(a.negative, digits, digits === '0' ? 0 : exponent);
}

/** Digits of the whole part and of the decimals, for a numeral whose last digit is a unit or a decimal. */
export function partsOf(a: Numeral): { readonly whole: string; readonly decimals: string } {
  if (a.exponent >= 0) return { whole: a.digits + '0'.repeat(a.exponent), decimals: '' };
  const places = -a.exponent;
  const padded = a.digits.padStart(places + 1, '0');
  return { whole: padded.slice(0, -places), decimals: padded.slice(-places) };
}

/** Digits as d.ddd and the exponent that goes with them. */
export function scientificPartsOf(a: Numeral): { readonly whole: string; readonly decimals: string; readonly exponent: number } {
  return { whole: a.digits[0] ?? '0', decimals: a.digits.slice(1), exponent: firstPlace(a) };
}

/**
 * Machine text: decimal point, no groups. '1526', '0.3012', '1.376e+4': an exponent wherever the last digit is neither the
 * units digit nor a decimal, and below 1e-6. Number(plainNumeral(a)) is doubleOfNumeral(a).
 */
export function plainNumeral(a: Numeral): string {
  const sign = a.negative ? '-' : '';
  const scientific = a.exponent > 0 || (firstPlace(a) < -6 && !isZeroNumeral(a));
  const { whole, decimals } = scientific ? scientificPartsOf(a) : partsOf(a);
  const text = `${sign}${whole}${decimals === '' ? '' : `.${decimals}`}`;
  if (!scientific) return text;
  const power = firstPlace(a);
  return `${text}e${power < 0 ? '-' : '+'}${Math.abs(power)}`;
}
