// The room of quantities: dimensions, units, exact conversion, reading and printing. Imports from no other room.

export { coherentUnit } from './coherent.ts';
export { fromSI, numeralInUnit, siOfNumeral, toSI } from './convert.ts';
export {
  baseSymbols,
  type Dimension,
  dimensionKey,
  dimensionless,
  dimensionOf,
  divideD,
  equalD,
  isDimensionless,
  multiplyD,
  powerD,
} from './dimension.ts';
export { divideE, doubleOf, type Exact, equalE, exactOf, exactOfDouble, multiplyE, powerE } from './exact.ts';
export { describeUnit, forceHint, kindName, withArticle } from './kind.ts';
export {
  doubleOfNumeral,
  exactOfNumeral,
  firstPlace,
  isZeroNumeral,
  lastPlace,
  type Numeral,
  numeralOf,
  numeralOfDouble,
  plainNumeral,
  significantDigits,
  withoutTrailingZeros,
} from './numeral.ts';
export { type DecimalSign, readNumeral } from './numeral-text.ts';
export { printNumeral, printQuantity, type Style } from './print.ts';
export { texNumeral, texQuantity, texUnit } from './print-tex.ts';
export { printValue, texValue } from './print-value.ts';
export { either, type Fix, type Problem, type Result } from './problem.ts';
export {
  addR,
  compareR,
  equalR,
  isZeroR,
  mulR,
  negR,
  oneR,
  type Rational,
  rational,
  rationalOfText,
  signR,
  subR,
  textR,
  zeroR,
} from './rational.ts';
export { type Rounding, roundAtPlace, roundSignificant } from './rounding.ts';
export {
  type Counts,
  differenceUnit,
  isAngleUnit,
  isRatioUnit,
  one,
  turnsAgainstAngle,
  type Unit,
  type UnitPart,
} from './unit.ts';
export { nearestUnits } from './unit-nearest.ts';
export { readUnit, unitNames, unitOf } from './unit-text.ts';
export { readValue, type Tolerance, type Value } from './value.ts';
export { readRange, type ValueRange } from './value-range.ts';
