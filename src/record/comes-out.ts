// Whether a line that was worked out with the printed numbers comes to the printed result.
//
// The comparison is the one a reader makes: a difference of at most one unit of the last digit, in the declared unit against the
// printed numeral and in coherent SI against the calculator result. A whole result has to come out exactly. A printed 0 has no
// digits to count: there the line may be off by what the last of the sheet's digits would be, were it 0.000.

import { doubleOfNumeral, fromSI, isZeroNumeral, lastPlace, type Numeral, type Unit } from '../quantity/index.ts';

/** `value`: the line in coherent SI; `digits`: the digits of the sheet. */
export function comesOut(
  value: number,
  printed: Numeral,
  calculator: Numeral,
  unit: Unit,
  whole: boolean,
  digits: number,
): boolean {
  if (!Number.isFinite(value)) return false;
  const inUnit = unit.reading === undefined ? value / unit.si : fromSI(value, unit);
  if (whole) return Math.abs(inUnit - doubleOfNumeral(printed)) < 1e-6;
  if (isZeroNumeral(printed)) {
    const off = 10 ** (1 - digits);
    return Math.abs(inUnit) <= off && Math.abs(value - doubleOfNumeral(calculator)) <= off;
  }
  return within(inUnit, printed) && within(value, calculator);
}

function within(value: number, numeral: Numeral): boolean {
  return Math.abs(value - doubleOfNumeral(numeral)) <= lastUnit(numeral);
}

/** Weight of the last digit. */
export function lastUnit(numeral: Numeral): number {
  return Number(`1e${lastPlace(numeral)}`);
}
