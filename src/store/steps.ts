// The steps of a history as a line of numbered rows, and what changed in it since it was last kept.
//
// 1. The line is what can be undone, then what can be redone, in the order in which it was done: undoing and redoing only move the
//    position in it.
// 2. Steps are the same when they are the same object: a history shares every step it did not touch.
// 3. What is read back must be a line without gaps with its position inside; anything else is no history.
// Not here: what a step does (src/sheet).

import { emptyHistory, type History, type HistoryStep } from '../sheet/index.ts';
import type { StepRow } from './rows.ts';

/** What is kept of a history: its line, and the `n` of the first step in it. */
export interface KeptLine {
  readonly first: number;
  readonly steps: readonly HistoryStep[];
}
export interface LineChange {
  readonly dropFrom: number | null;
  readonly put: readonly StepRow[];
  readonly position: number;
  readonly line: KeptLine;
}

export function lineChange(sheet: string, before: KeptLine, history: History, at: number): LineChange {
  const steps = [...history.past, ...history.future.toReversed()];
  let same = 0;
  while (same < steps.length && steps[same] === before.steps[same]) same += 1;
  const { first } = before;
  return {
    dropFrom: same < before.steps.length ? first + same : null,
    put: steps.slice(same).map((step, index) => ({ sheet, n: first + same + index, at, step })),
    position: first + history.past.length - 1,
    line: { first, steps },
  };
}

/** The history of rows in order of `n`. Undefined where they are no line, or the position is outside it. */
export function historyOf(
  rows: readonly StepRow[],
  position: number,
): { readonly history: History; readonly line: KeptLine } | undefined {
  const first = rows[0]?.n ?? position + 1;
  if (rows.some((row, index) => row.n !== first + index)) return undefined;
  const done = position - first + 1;
  if (done < 0 || done > rows.length) return undefined;
  const steps = rows.map((row) => row.step);
  return {
    history: { past: steps.slice(0, done), future: steps.slice(done).reverse() },
    line: { first, steps },
  };
}

export const noLine = (after: number): { readonly history: History; readonly line: KeptLine } => ({
  history: emptyHistory,
  line: { first: after + 1, steps: [] },
});
