// A draft as it would print: its symbols, the numbers of one case put in, the result, and whether a reader's arithmetic agrees.
//
// 1. Numbers print as the record prints them: a given as typed, the rest with the sheet's digits; angles in exponents in rad.
// 2. Digits of computed operands rise by one until the printed line comes to the printed result, as in the record. A record may still
//    raise them further, where another line needs it.
// Not here: the record (src/record), checking (src/sheet).

import {
  evaluateWith,
  type Formula,
  type Substitution,
  type Taken,
  texName,
  texSubstituted,
  texSymbols,
} from '../../formula/index.ts';
import {
  doubleOfNumeral,
  fromSI,
  isAngleUnit,
  lastPlace,
  type Numeral,
  numeralInUnit,
  one,
  type Problem,
  printQuantity,
  roundSignificant,
  siOfNumeral,
  texQuantity,
  type Unit,
  unitOf,
} from '../../quantity/index.ts';
import type { Calculation, DraftCase } from '../../sheet/index.ts';

/** The same problem in a longer text in which its own begins at `by`; without a place of its own it is about `whole`. */
export function moved(problem: Problem, by: number, whole?: readonly [number, number]): Problem {
  const at = problem.at === undefined ? whole : ([problem.at[0] + by, problem.at[1] + by] as const);
  return {
    ...problem,
    ...(at === undefined ? {} : { at }),
    ...(problem.fixes ? { fixes: problem.fixes.map((fix) => ({ ...fix, from: fix.from + by, to: fix.to + by })) } : {}),
  };
}

/** '15.18 m/s' with the digits of the sheet; '' where there is no value. */
export function printSi(si: number, unit: Unit | undefined, calculation: Calculation): string {
  if (!Number.isFinite(si)) return '';
  const shown = unit ?? one;
  return printQuantity(roundSignificant(numeralInUnit(si, shown), calculation.digits), shown, calculation.style);
}

export interface LiveLine {
  /** TeX of the right-hand side in symbols, and with the numbers of the case. */
  readonly symbols: string;
  readonly substituted: string;
  readonly result: string;
  readonly resultTex: string;
  /** Whether the printed numbers give the printed result; undefined where there is no value. */
  readonly closes?: boolean;
}

const radian = unitOf('rad');
const mostDigits = 15;

export function liveLine(
  calculation: Calculation,
  formula: Formula,
  unit: Unit | undefined,
  each: DraftCase | undefined,
  caseIndex: number,
): LiveLine {
  const { style, digits } = calculation;
  const symbols = texSymbols(formula.expr, style);
  const nothing = { symbols, substituted: '', result: '', resultTex: '' };
  if (each?.taken === undefined || !Number.isFinite(each.value)) return nothing;
  const { taken, value } = each;
  const shown = unit ?? one;
  const printed = roundSignificant(numeralInUnit(value, shown), digits);
  const result = { result: printQuantity(printed, shown, style), resultTex: texQuantity(printed, shown, style) };
  const isPlain = formula.expr.kind === 'quoted' || formula.expr.kind === 'number';
  for (let more = digits; more <= mostDigits; more += 1) {
    const numbers = numbersOf(calculation, caseIndex, more);
    const printedLine = evaluateWith(formula.expr, numbers.si, taken, style.decimalSign);
    if (!agrees(printedLine, printed, shown)) continue;
    return { symbols, substituted: isPlain ? '' : substitute(formula, numbers, taken, style), ...result, closes: true };
  }
  const numbers = numbersOf(calculation, caseIndex, digits);
  return { symbols, substituted: isPlain ? '' : substitute(formula, numbers, taken, style), ...result, closes: false };
}

function agrees(value: number, printed: Numeral, unit: Unit): boolean {
  if (!Number.isFinite(value)) return false;
  return Math.abs(fromSI(value, unit) - doubleOfNumeral(printed)) <= 1.000001 * 10 ** lastPlace(printed);
}

interface Numbers {
  readonly printed: (name: string, inExponent: boolean) => { readonly numeral: Numeral; readonly unit: Unit } | undefined;
  readonly si: (name: string, inExponent: boolean) => number;
}

function numbersOf(calculation: Calculation, caseIndex: number, digits: number): Numbers {
  const printed: Numbers['printed'] = (name, inExponent) => {
    const state = calculation.named(name);
    const si = state?.si[caseIndex];
    if (state === undefined || si === undefined || !Number.isFinite(si)) return undefined;
    const unit = state.unit ?? one;
    const inRadians = inExponent && isAngleUnit(unit) && unit.text !== radian.text;
    const typed = state.kind === 'given' ? state.values[caseIndex] : undefined;
    if (typed !== undefined && !inRadians) return { numeral: typed.numeral, unit: typed.unit };
    const shown = inRadians ? radian : unit;
    return { numeral: roundSignificant(numeralInUnit(si, shown), digits), unit: shown };
  };
  return {
    printed,
    si: (name, inExponent) => {
      const found = printed(name, inExponent);
      return found === undefined ? Number.NaN : siOfNumeral(found.numeral, found.unit);
    },
  };
}

function substitute(formula: Formula, numbers: Numbers, taken: Taken, style: Calculation['style']): string {
  const sub: Substitution = {
    tex: (name, inExponent) => {
      const found = numbers.printed(name, inExponent);
      return found === undefined ? texName(name) : texQuantity(found.numeral, found.unit, style);
    },
    needsParens: (name, inExponent) => {
      const found = numbers.printed(name, inExponent);
      return found !== undefined && (found.unit.text !== '1' || found.numeral.negative);
    },
    number: () => '',
    decimalSign: style.decimalSign,
  };
  return texSubstituted(formula.expr, sub, taken);
}
