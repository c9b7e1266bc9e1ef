// The printed number of a quantity in one case, for any count of digits, and the double that a reader makes of it.
//
// 1. A typed number prints as typed; its digits never change.
// 2. A computed number is its true value in its unit, rounded half-even on the shortest decimal. A whole one (the result of
//    floor, ceil or round) prints whole; zero prints 0.
// 3. What enters a line is the numeral converted exactly: si(digits) is the nearest double of numeral × factor.
// Not here: how many digits (closing.ts), TeX and units around the numeral (quantity).

import {
  isZeroNumeral,
  lastPlace,
  type Numeral,
  numeralInUnit,
  numeralOfDouble,
  type Rounding,
  roundAtPlace,
  roundSignificant,
  significantDigits,
  siOfNumeral,
  type Unit,
} from '../quantity/index.ts';
import type { ClosingItem } from './closing.ts';

export interface Printed {
  readonly numeral: Numeral;
  readonly unit: Unit;
  /** Coherent SI of the numeral, as it enters a line. */
  readonly si: number;
}

export interface PrintedNumber extends ClosingItem {
  readonly unit: Unit;
  readonly numeral: (digits: number) => Numeral;
  /** Coherent SI of the printed numeral. */
  readonly si: (digits: number) => number;
  /** Both, the same object for the same digits. */
  readonly printed: (digits: number) => Printed;
}

export function typedNumber(numeral: Numeral, unit: Unit): PrintedNumber {
  const si = siOfNumeral(numeral, unit);
  const printed = { numeral, unit, si };
  return { unit, numeral: () => numeral, si: () => si, printed: () => printed, exactAt: () => true };
}

/** `value` in coherent SI, finite. */
export function computedNumber(value: number, unit: Unit, whole = false, rounding: Rounding = 'half-even'): PrintedNumber {
  const full = numeralInUnit(value, unit);
  if (isZeroNumeral(full)) return typedNumber(full, unit);
  // A whole number in its unit: three quarters in percent are 75, and 300 turns out of 3 revolutions stay whole.
  if (whole && lastPlace(full) >= 0) return typedNumber(roundAtPlace(full, 0), unit);
  const fullDigits = full.digits.replace(/0+$/u, '').length;
  const numerals: (Numeral | undefined)[] = [];
  const doubles: (number | undefined)[] = [];
  const numeral = (digits: number) => (numerals[digits] ??= roundSignificant(full, digits, rounding));
  const si = (digits: number) => (doubles[digits] ??= siOfNumeral(numeral(digits), unit));
  const all: (Printed | undefined)[] = [];
  const printed = (digits: number) => (all[digits] ??= { numeral: numeral(digits), unit, si: si(digits) });
  return { unit, numeral, si, printed, exactAt: (digits) => digits >= fullDigits };
}

/**
 * The result of a calculator line: the true value in coherent SI at the printed number of digits. A reading of temperature
 * keeps its last place instead: 20.1 °C is 293.2 K.
 */
export function calculatorNumeral(value: number, printed: Numeral, unit: Unit, rounding: Rounding = 'half-even'): Numeral {
  const full = numeralOfDouble(value);
  if (isZeroNumeral(full)) return full;
  if (unit.reading !== undefined) return roundAtPlace(full, lastPlace(printed), rounding);
  return roundSignificant(full, significantDigits(printed), rounding);
}
