// Printing of numerals, units and quantities by the SI Brochure (9th ed., 5.4) and ISO 80000-1.
//
// 1. Digits in groups of three by U+202F: the whole part from four digits on, the decimals from five on. U+2212 for minus.
// 2. × 10ⁿ where the last digit stands left of the units digit, and below 0.001.
// 3. U+00A0 before the unit, also before °C and %; none before °, ′, ″ of angles; the unit one is not written.
// 4. What is printed reads back as the same numeral and unit (tested for the whole catalogue).
// Not here: TeX (print-tex.ts), machine text (plainNumeral in numeral.ts), values with ± (print-value.ts).

import type { Numeral } from './numeral.ts';
import { firstPlace, isZeroNumeral, partsOf, scientificPartsOf } from './numeral.ts';
import type { DecimalSign } from './numeral-text.ts';
import type { Unit } from './unit.ts';
import { superscript } from './unit.ts';

export interface Style {
  readonly decimalSign: DecimalSign;
}

const thinSpace = '\u202F';
export const wideSpace = '\u00A0';

/** Whether it is printed with a power of ten. */
export const isScientific = (a: Numeral): boolean => !isZeroNumeral(a) && (a.exponent > 0 || firstPlace(a) < -3);

/** Groups of three from the decimal sign outwards, joined by `between`. */
export function groupWhole(digits: string, between: string): string {
  return digits.length < 4 ? digits : digits.replace(/\B(?=(?:\d{3})+$)/g, between);
}
export function groupDecimals(digits: string, between: string): string {
  return digits.length < 5 ? digits : digits.replace(/(\d{3})(?=\d)/g, `$1${between}`);
}

export function printNumeral(a: Numeral, style: Style): string {
  const scientific = isScientific(a);
  const { whole, decimals } = scientific
    ? scientificPartsOf(a)
    : partsOf(isZeroNumeral(a) && a.exponent > 0 ? { ...a, exponent: 0 } : a);
  const sign = a.negative ? '−' : '';
  const fraction = decimals === '' ? '' : style.decimalSign + groupDecimals(decimals, thinSpace);
  const text = `${sign}${groupWhole(whole, thinSpace)}${fraction}`;
  return scientific ? `${text}${wideSpace}×${wideSpace}10${superscript(firstPlace(a))}` : text;
}

/** Whether the unit follows the number without a space: ° of angle, ′, ″. */
export const standsClose = (unit: Unit): boolean => /^(?:°(?![CFR])|[′″])/.test(unit.text);

export function printQuantity(a: Numeral, unit: Unit, style: Style): string {
  const number = printNumeral(a, style);
  if (unit.text === '1') return number;
  return `${number}${standsClose(unit) ? '' : wideSpace}${unit.text}`;
}
