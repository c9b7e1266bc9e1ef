// One numbered line of the record: symbols = numbers = result in every case, its calculator line, and what must be known of it.
//
// 1. Numbers come from the printed numerals of the case (case-print.ts), never from the true values beside them.
// 2. A given prints as typed; a criterion gives its utilisation, or the room that is left where there is none.
// 3. What has no value is null and carries its problem.
// Not here: the digits, the lists at the head.

import {
  calculatorLine,
  type Expr,
  type Formula,
  lineNumber,
  nothingTaken,
  type Substitution,
  type Taken,
  texName,
  texSubstituted,
  texText,
} from '../formula/index.ts';
import { one, plainNumeral, printQuantity, printValue, texQuantity, texValue } from '../quantity/index.ts';
import type { Calculation, CriterionState, DerivedState, GivenState, QuantityState } from '../sheet/index.ts';
import type { CasePrint } from './case-print.ts';
import type { PrintedVerdict } from './criterion-numbers.ts';
import type { Step, StepCase } from './model.ts';
import { calculatorNumeral, type Printed } from './numerals.ts';
import { soughtStep } from './sought-step.ts';
import { failed, head, nameOf, problemIn, resultOf, symbolsOf, warnings } from './step-parts.ts';
import { demandIsLeft, texRelation, texUnmet } from './verdict.ts';
import { citationNotes, givenNotes, isBlank, noSource } from './words.ts';

export function makeStep(calculation: Calculation, state: QuantityState | CriterionState, prints: readonly CasePrint[]): Step {
  switch (state.kind) {
    case 'given':
      return givenStep(calculation, state);
    case 'derived':
      return derivedStep(calculation, state, prints);
    case 'criterion':
      return criterionStep(calculation, state, prints);
    case 'sought':
      return soughtStep(calculation, state, prints);
  }
}

/** The printed value of a quantity in one case, for a text that names it; null where it has none. */
export function printedValue(calculation: Calculation, state: QuantityState, print: CasePrint): string | null {
  if (state.kind === 'given') return givenText(calculation, state, print.index);
  const printed = print.printed(nameOf(state));
  return printed === undefined ? null : printQuantity(printed.numeral, printed.unit, calculation.style);
}

function givenText(calculation: Calculation, state: GivenState, index: number): string | null {
  if (state.texts !== undefined) return state.texts[index] ?? null;
  const value = state.values[index];
  return value === undefined ? null : printValue(value, calculation.style);
}

const substitutions = new WeakMap<CasePrint, Substitution>();

/** How names show in the substituted and the calculator line of one case. */
function substitution(calculation: Calculation, print: CasePrint): Substitution {
  const known = substitutions.get(print);
  if (known) return known;
  const made: Substitution = {
    tex: (name, inExponent) => {
      const printed = print.printed(name, inExponent);
      if (printed) return texQuantity(printed.numeral, printed.unit, calculation.style);
      const state = calculation.named(name);
      const text = state?.kind === 'given' ? state.texts?.[print.index] : undefined;
      return text === undefined ? texName(name) : `\\text{“}${texText(text)}\\text{”}`;
    },
    needsParens: (name, inExponent) => {
      const printed = print.printed(name, inExponent);
      return printed !== undefined && (printed.numeral.negative || printed.unit.text !== one.text);
    },
    number: (name, inExponent) => {
      return lineNumber(print.printed(name, inExponent)?.si ?? Number.NaN);
    },
    decimalSign: calculation.style.decimalSign,
  };
  substitutions.set(print, made);
  return made;
}

function givenStep(calculation: Calculation, state: GivenState): Step {
  const { cell } = state;
  const cases = calculation.cases.map((each, index): StepCase => {
    if (state.texts !== undefined) {
      const text = state.texts[index];
      if (text === undefined) return failed(each.id, state.problems);
      return {
        case: each.id,
        substituted: '',
        result: text,
        resultTex: null,
        calculatorLine: null,
        calculatorResult: null,
        closes: true,
      };
    }
    const value = state.values[index];
    if (value === undefined) return failed(each.id, state.problems);
    return {
      case: each.id,
      substituted: '',
      result: printValue(value, calculation.style),
      resultTex: texValue(value, calculation.style),
      calculatorLine: String(value.si),
      calculatorResult: plainNumeral(calculatorNumeral(value.si, value.numeral, value.unit)),
      closes: true,
    };
  });
  return {
    ...head(calculation, state),
    kind: 'given',
    symbols: texName(nameOf(state)),
    ...(cell.basis === undefined ? {} : { basis: cell.basis }),
    notes: [
      ...givenNotes(cell, calculation.sheet),
      ...citationNotes(cell.source, calculation.sheet),
      ...warnings(state.problems),
    ],
    numeric: state.texts === undefined && cell.choices === undefined,
    cases,
  };
}

function derivedStep(calculation: Calculation, state: DerivedState, prints: readonly CasePrint[]): Step {
  const { cell, formula, type } = state;
  const notes: string[] = isBlank(cell.source) ? [noSource] : [];
  if (formula) notes.push(...seeBelow(calculation, state.index, [formula]));
  const cases = calculation.cases.map((each, index): StepCase => {
    const print = prints[index];
    const si = state.si[index] ?? Number.NaN;
    if (print === undefined || formula === undefined || Number.isNaN(si) || problemIn(state.problems, each.id))
      return failed(each.id, state.problems);
    const values = substitution(calculation, print);
    const taken = print.taken(formula) ?? nothingTaken;
    const substituted = texSubstituted(formula.expr, values, taken);
    if (type?.kind === 'truth') {
      const word = si === 0 ? 'no' : 'yes';
      return {
        case: each.id,
        substituted,
        result: word,
        resultTex: null,
        calculatorLine: null,
        calculatorResult: null,
        closes: true,
      };
    }
    const printed = print.printed(nameOf(state));
    if (printed === undefined) return failed(each.id, state.problems);
    return {
      case: each.id,
      substituted,
      ...resultOf(calculation, printed.numeral, printed.unit),
      calculatorLine: calculatorLine(formula.expr, values, taken) || null,
      calculatorResult: plainNumeral(calculatorNumeral(si, printed.numeral, printed.unit)),
      ...closingOf(print, cell.id),
    };
  });
  const symbol = texName(nameOf(state));
  return {
    ...head(calculation, state),
    kind: 'derived',
    symbols: formula === undefined ? symbol : `${symbol} = ${symbolsOf(formula.expr, calculation)}`,
    notes: [...notes, ...citationNotes(cell.source, calculation.sheet), ...closingNotes(cases), ...warnings(state.problems)],
    numeric: type?.kind !== 'truth',
    cases,
  };
}

function criterionStep(calculation: Calculation, state: CriterionState, prints: readonly CasePrint[]): Step {
  const { cell, left, right } = state;
  const notes: string[] = isBlank(cell.source) ? [noSource] : [];
  if (left && right) notes.push(...seeBelow(calculation, state.index, [left, right]));
  let unmet = false;
  let tooClose = false;
  const cases = calculation.cases.map((each, index): StepCase => {
    const print = prints[index];
    const verdict = print?.verdict(cell.id);
    const met = state.met[index] ?? null;
    if (print === undefined || verdict === undefined || left === undefined || right === undefined) {
      return { ...failed(each.id, state.problems), met: null, utilisation: null };
    }
    unmet ||= met === false;
    tooClose ||= verdict.tooClose;
    const values = substitution(calculation, print);
    const side = (formula: Formula, printed: Printed): Side => ({
      expr: formula.expr,
      taken: print.taken(formula) ?? nothingTaken,
      printed: quantityTex(calculation, printed),
    });
    const sides = [side(left, verdict.sides[0]), side(right, verdict.sides[1])] as const;
    const [demand, capacity] = demandIsLeft(cell.relation) ? sides : ([sides[1], sides[0]] as const);
    return {
      case: each.id,
      substituted: verdict.isUtilisation
        ? `\\frac{${texOf(demand, values)}}{${texOf(capacity, values)}}`
        : `${grouped(capacity, texOf(capacity, values))} - ${parenthesised(demand, texOf(demand, values))}`,
      ...resultOf(calculation, verdict.result.numeral, verdict.result.unit),
      calculatorLine: verdict.isUtilisation
        ? `(${lineOf(demand, values)})/(${lineOf(capacity, values)})`
        : `(${lineOf(capacity, values)}) - (${lineOf(demand, values)})`,
      calculatorResult: plainNumeral(verdict.calculator),
      ...closingOf(print, cell.id),
      met,
      utilisation: verdict.isUtilisation ? (state.utilisation[index] ?? null) : null,
      sides: sidesTex(calculation, state, verdict),
    };
  });
  if (tooClose) notes.push('the sides are closer than printed digits can show; they are compared unrounded');
  if (unmet && !isBlank(cell.ifNotMet)) notes.push(cell.ifNotMet ?? '');
  const symbols =
    left && right
      ? `${symbolsOf(left.expr, calculation)} ${texRelation[cell.relation]} ${symbolsOf(right.expr, calculation)}`
      : texText(`${cell.left} ${cell.relation} ${cell.right}`);
  return {
    ...head(calculation, state),
    kind: 'criterion',
    symbols,
    relation: cell.relation,
    ...(unmet && !isBlank(cell.justification) ? { justification: cell.justification ?? '' } : {}),
    notes: [...notes, ...citationNotes(cell.source, calculation.sheet), ...closingNotes(cases), ...warnings(state.problems)],
    numeric: true,
    cases,
  };
}

interface Side {
  readonly expr: Expr;
  readonly taken: Taken;
  /** TeX of its value as printed. */
  readonly printed: string;
}

/** An entry of a table stands as its number; alone, it would print as the call. */
const texOf = (side: Side, values: Substitution) =>
  isEntry(side.expr) ? side.printed : texSubstituted(side.expr, values, side.taken);
const lineOf = (side: Side, values: Substitution) => calculatorLine(side.expr, values, side.taken);

/** A choice between branches stands in parentheses before anything is taken from it. */
function grouped(side: Side, tex: string): string {
  return side.expr.kind === 'choose' ? `\\left(${tex}\\right)` : tex;
}
/** So does a sum that is taken away. */
function parenthesised(side: Side, tex: string): string {
  const { expr } = side;
  const sum =
    expr.kind === 'minus' ||
    expr.kind === 'choose' ||
    (expr.kind === 'binary' && (expr.operator === '+' || expr.operator === '-'));
  return sum || tex.startsWith('-') ? `\\left(${tex}\\right)` : tex;
}

function isEntry(expr: Expr): boolean {
  return expr.kind === 'parens' ? isEntry(expr.inner) : expr.kind === 'table' && expr.name === 'entry';
}

function quantityTex(calculation: Calculation, printed: Printed): string {
  return texQuantity(printed.numeral, printed.unit, calculation.style);
}

function sidesTex(calculation: Calculation, state: CriterionState, verdict: PrintedVerdict): string {
  const relation = verdict.met ? texRelation[state.cell.relation] : texUnmet[state.cell.relation];
  return `${quantityTex(calculation, verdict.sides[0])} ${relation} ${quantityTex(calculation, verdict.sides[1])}`;
}

function closingOf(print: CasePrint, cell: string) {
  const reason = print.open(cell);
  return reason === undefined ? { closes: true } : { closes: false, reason };
}

function closingNotes(cases: readonly StepCase[]): readonly string[] {
  const reasons = new Set(cases.flatMap((each) => (each.reason === undefined ? [] : [each.reason])));
  return [...reasons].map((reason) =>
    reason === 'jump'
      ? 'does not close: the printed numbers fall on the other side of a jump (floor, ceil, round, a comparison)'
      : 'does not close: nearly equal numbers cancel, more digits than 15 would be needed',
  );
}

/** 'see 3.2 below' for what is defined further down. */
function seeBelow(calculation: Calculation, index: number, formulas: readonly Formula[]): readonly string[] {
  const numbers = new Set<string>();
  for (const formula of formulas) {
    for (const name of formula.names) {
      const used = calculation.named(name);
      if (used !== undefined && used.index > index) numbers.add(calculation.numberOf(used.cell.id));
    }
  }
  return [...numbers].map((number) => `see ${number} below`);
}
