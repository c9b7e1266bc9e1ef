// Printing of values with ±: 63.2 m ± 0.1 m, (5 ± 1) %, 15 kW ± 5 % (NIST SP 811, 7.7: units are not dropped).
//
// The digits are those that were typed. What is printed reads back as the same value.
// Not here: quantities without ± (print.ts, print-tex.ts).

import type { Numeral } from './numeral.ts';
import type { Style } from './print.ts';
import { printNumeral, printQuantity, wideSpace } from './print.ts';
import { texNumeral, texQuantity, texUnit } from './print-tex.ts';
import type { Unit } from './unit.ts';
import { isRatioUnit } from './unit.ts';
import type { Value } from './value.ts';

interface Printer {
  readonly number: (a: Numeral, style: Style) => string;
  readonly quantity: (a: Numeral, unit: Unit, style: Style) => string;
  readonly unit: (unit: Unit) => string;
  readonly plusMinus: string;
  readonly beforeUnit: string;
}

const plain: Printer = {
  number: printNumeral,
  quantity: printQuantity,
  unit: (unit) => unit.text,
  plusMinus: `${wideSpace}±${wideSpace}`,
  beforeUnit: wideSpace,
};
const tex: Printer = { number: texNumeral, quantity: texQuantity, unit: texUnit, plusMinus: '\\pm ', beforeUnit: '\\,' };

function print({ numeral, unit, tolerance }: Value, style: Style, with_: Printer): string {
  const quantity = with_.quantity(numeral, unit, style);
  if (!tolerance) return quantity;
  // In % a bare ± 1 % could be a share of the value: the parentheses say that it is not.
  if (!tolerance.relative && isRatioUnit(unit)) {
    const both = `${with_.number(numeral, style)}${with_.plusMinus}${with_.number(tolerance.numeral, style)}`;
    return `(${both})${with_.beforeUnit}${with_.unit(unit)}`;
  }
  return `${quantity}${with_.plusMinus}${with_.quantity(tolerance.numeral, tolerance.unit, style)}`;
}

export const printValue = (value: Value, style: Style): string => print(value, style, plain);
export const texValue = (value: Value, style: Style): string => print(value, style, tex);
