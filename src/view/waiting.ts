// Lines that have no value only because a line above has none: told apart, so that one mistake reads as one.

import type { CellProblem } from '../sheet/index.ts';

export const waits = (problem: CellProblem) => problem.code === 'waits-for';

/** The lines with an error of their own, and those that wait for them. */
export function countLines(problems: readonly CellProblem[]): { readonly wrong: readonly string[]; readonly waiting: number } {
  const errors = problems.filter((problem) => problem.severity === 'error');
  const wrong = new Set(errors.filter((problem) => !waits(problem)).map((problem) => problem.cell));
  const waiting = new Set(errors.filter((problem) => waits(problem) && !wrong.has(problem.cell)).map((problem) => problem.cell));
  return { wrong: [...wrong], waiting: waiting.size };
}
