// The line of a sought quantity: its equation, the value found, both sides with the value put back, and how it was found.
//
// 1. The value is printed like any computed one; its calculator line is the value itself, since no pocket calculator solves it.
// 2. The check is the equation: both sides are printed as they come out with the unrounded value.
// Not here: the search (src/study), the digits (case-print.ts).

import { canonicalName, plainName, texName } from '../formula/index.ts';
import {
  coherentUnit,
  lastPlace,
  numeralInUnit,
  numeralOfDouble,
  one,
  plainNumeral,
  printNumeral,
  printQuantity,
  roundAtPlace,
  roundSignificant,
  texQuantity,
  type Unit,
} from '../quantity/index.ts';
import type { Calculation, Solution, SoughtState } from '../sheet/index.ts';
import type { CasePrint } from './case-print.ts';
import type { Step, StepCase } from './model.ts';
import { calculatorNumeral } from './numerals.ts';
import { failed, head, nameOf, resultOf, symbolsOf, warnings } from './step-parts.ts';
import { citationNotes, isBlank, noSource } from './words.ts';

export function soughtStep(calculation: Calculation, state: SoughtState, prints: readonly CasePrint[]): Step {
  const { cell, left, right } = state;
  const symbol = texName(nameOf(state));
  const equation =
    left && right ? `${symbol}:\\; ${symbolsOf(left.expr, calculation)} = ${symbolsOf(right.expr, calculation)}` : symbol;
  const cases = calculation.cases.map((each, index): StepCase => {
    const solution = state.solutions[index];
    const printed = prints[index]?.printed(nameOf(state));
    if (solution === undefined || printed === undefined) return failed(each.id, state.problems);
    return {
      case: each.id,
      substituted: sidesTex(calculation, state, solution),
      ...resultOf(calculation, printed.numeral, printed.unit),
      calculatorLine: String(printed.si),
      calculatorResult: plainNumeral(calculatorNumeral(solution.root, printed.numeral, printed.unit)),
      closes: true,
    };
  });
  return {
    ...head(calculation, state),
    kind: 'sought',
    symbols: equation,
    notes: [
      ...(isBlank(cell.source) ? [noSource] : []),
      ...citationNotes(cell.source, calculation.sheet),
      ...foundNotes(calculation, state),
      ...warnings(state.problems),
    ],
    numeric: true,
    cases,
  };
}

/** "1.250 = 1.250": both sides with the value put back, in the unit of the first side that is a quantity by itself. */
function sidesTex(calculation: Calculation, state: SoughtState, solution: Solution): string {
  const unit = sideUnit(calculation, state);
  const left = roundSignificant(numeralInUnit(solution.left, unit), calculation.digits);
  // A right side of 0 leaves a rest that has no digits worth printing: it is shown to the last place of the left one.
  const right =
    solution.right === 0 ? roundAtPlace(numeralInUnit(0, unit), lastPlace(left)) : numeralInUnit(solution.right, unit);
  const shown = solution.right === 0 ? right : roundSignificant(right, calculation.digits);
  return `${texQuantity(left, unit, calculation.style)} = ${texQuantity(shown, unit, calculation.style)}`;
}

function sideUnit(calculation: Calculation, state: SoughtState): Unit {
  for (const side of [state.left, state.right]) {
    if (side?.expr.kind !== 'name') continue;
    const unit = calculation.named(side.expr.name)?.unit;
    if (unit !== undefined) return unit;
  }
  return state.equationType?.kind === 'quantity' ? coherentUnit(state.equationType.dimension, state.equationType.counts.r) : one;
}

function foundNotes(calculation: Calculation, state: SoughtState): readonly string[] {
  const { cell } = state;
  const varied =
    cell.instead === undefined ? '' : `${plainName(canonicalName(cell.instead))} varied, the sheet itself keeps its value; `;
  const solved = state.solutions.flatMap((solution, index) => (solution === undefined ? [] : [{ solution, index }]));
  const [first] = solved;
  if (first === undefined) return [];
  const unit = sideUnit(calculation, state);
  const shown = unit.text === one.text ? one : coherent(unit);
  const counts = new Set(solved.map(({ solution }) => solution.roots.length));
  const common = counts.size === 1 ? `${rootsText(first.solution, calculation)}, ` : '';
  const each = solved.map(({ solution, index }) => {
    const residual = printQuantity(roundSignificant(numeralOfDouble(solution.residual), 2), shown, calculation.style);
    const own = counts.size === 1 ? '' : `${rootsText(solution, calculation)}, `;
    const which = calculation.cases.length > 1 ? ` (${calculation.cases[index]?.title ?? calculation.cases[index]?.id})` : '';
    return `${own}${solution.iterations} iterations, residual ${residual}${which}`;
  });
  return [`${varied}${common}sought from ${rangeText(cell.between)} after ${first.solution.method}: ${each.join('; ')}`];
}

function rootsText(solution: Solution, calculation: Calculation): string {
  const count = solution.roots.length;
  return count === 1 ? 'one root' : `${printNumeral(numeralOfDouble(count), calculation.style)} roots, the lowest taken`;
}

/** The range as typed, a hyphen before a number set as the minus that it stands for. */
const rangeText = (between: string): string => between.trim().replace(/(^|\s)-(?=[\d.,])/gu, '$1\u2212');

const coherent = (unit: Unit): Unit => coherentUnit(unit.dimension, unit.counts.r);
