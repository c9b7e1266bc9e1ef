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

export interface LineProblems {
  readonly all: readonly CellProblem[];
  readonly of: ReadonlyMap<string, readonly CellProblem[]>;
}
export const noLineProblems: LineProblems = { all: [], of: new Map() };

/** Problems by their line. A line whose problems stay alike keeps its list, and is not drawn again. */
export function problemsByLine(all: readonly CellProblem[], before: LineProblems): LineProblems {
  if (all === before.all) return before;
  const of = new Map<string, CellProblem[]>();
  for (const problem of all) {
    const known = of.get(problem.cell);
    if (known === undefined) of.set(problem.cell, [problem]);
    else known.push(problem);
  }
  const kept = new Map<string, readonly CellProblem[]>(of);
  for (const [cell, list] of of) {
    const old = before.of.get(cell);
    if (old !== undefined && JSON.stringify(old) === JSON.stringify(list)) kept.set(cell, old);
  }
  return { all, of: kept };
}
