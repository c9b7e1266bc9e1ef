// How a calculated sheet stands: the errors to tell and the exit to end with.

import type { Calculation } from '../sheet/index.ts';
import type { Io } from './io.ts';
import { problemLine, tellOnce } from './report.ts';
import { exits } from './usage.ts';

/** 2 where the sheet has an error, else 1 where a criterion is not met, else 0. */
export function stateExit(calculation: Calculation): number {
  if (calculation.problems().some((problem) => problem.severity === 'error')) return exits.sheetErrors;
  const notMet = calculation.sheet.cells.some((cell) => {
    const state = calculation.state(cell.id);
    return state?.kind === 'criterion' && state.met.includes(false);
  });
  return notMet ? exits.notMet : exits.fine;
}

/** Errors to standard error, one line each. */
export function writeProblems(io: Io, path: string, calculation: Calculation): void {
  const cells = new Map(calculation.sheet.cells.map((cell) => [cell.id, cell]));
  const lines = tellOnce(calculation)
    .filter((problem) => problem.severity === 'error')
    .map((problem) => `${problemLine(path, calculation, cells, problem)}\n`);
  if (lines.length > 0) io.err(lines.join(''));
}
