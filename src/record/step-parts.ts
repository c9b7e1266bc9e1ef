// What every kind of numbered line has in common: its head, its symbols, its result, and how it shows a failure.
//
// Not here: the kinds themselves (steps.ts, sought-step.ts).

import { canonicalName, type Expr, texName, texSymbols } from '../formula/index.ts';
import { type Numeral, printQuantity, texQuantity, type Unit } from '../quantity/index.ts';
import type { Calculation, CellProblem, CriterionState, QuantityState } from '../sheet/index.ts';
import type { StepCase } from './model.ts';

export const nameOf = (state: QuantityState): string => canonicalName(state.cell.name);

const saidOtherwise = new Set(['used-above', 'not-solved', 'not-met']);

const keptSymbols = new WeakMap<Expr, { readonly decimalSign: string; readonly tex: string }>();
export function symbolsOf(expr: Expr, calculation: Calculation): string {
  const { decimalSign } = calculation.style;
  const known = keptSymbols.get(expr);
  if (known?.decimalSign === decimalSign) return known.tex;
  const tex = texSymbols(expr, calculation.style);
  keptSymbols.set(expr, { decimalSign, tex });
  return tex;
}

export function problemIn(problems: readonly CellProblem[], caseId: string): CellProblem | undefined {
  return problems.find((problem) => problem.severity === 'error' && (problem.case === undefined || problem.case === caseId));
}

export function failed(caseId: string, problems: readonly CellProblem[]): StepCase {
  const problem = problemIn(problems, caseId);
  return {
    case: caseId,
    substituted: '',
    result: null,
    resultTex: null,
    calculatorLine: null,
    calculatorResult: null,
    closes: false,
    ...(problem === undefined ? {} : { problem }),
  };
}

export function head(calculation: Calculation, state: QuantityState | CriterionState) {
  const { cell } = state;
  return {
    number: calculation.numberOf(cell.id),
    cell: cell.id,
    ...(state.kind === 'criterion' ? {} : { name: nameOf(state), symbol: texName(nameOf(state)) }),
    title: cell.title ?? '',
    source: cell.source ?? '',
    unit: state.unit?.text ?? cell.unit ?? '',
  };
}

export function resultOf(calculation: Calculation, numeral: Numeral, unit: Unit) {
  return { result: printQuantity(numeral, unit, calculation.style), resultTex: texQuantity(numeral, unit, calculation.style) };
}

export function warnings(problems: readonly CellProblem[]): readonly string[] {
  return [
    ...new Set(
      problems
        .filter((problem) => problem.severity === 'warning' && !saidOtherwise.has(problem.code))
        .map((problem) => problem.message),
    ),
  ];
}
