// Random days at the desk: after every edit the kept calculation is the one that a fresh reading of the sheet would give,
// and nothing ran that had no reason to.

import fc from 'fast-check';
import { describe, expect, it } from 'vitest';
import { applyEdit, type Calculation, calculate, type Sheet } from '../../src/sheet/index.ts';
import { cellOf } from './build.ts';
import { start, step } from './random-days.ts';

/** Everything that a reader of the calculation can see. */
function seen(calculation: Calculation): unknown {
  return calculation.sheet.cells.map((cell) => {
    const state = calculation.state(cell.id)!;
    const numbers = state.kind === 'criterion' ? [...state.leftSi, ...state.rightSi] : 'si' in state ? [...state.si] : [];
    return {
      id: cell.id,
      numbers,
      unit: 'unit' in state ? state.unit?.text : undefined,
      type: 'type' in state ? state.type : undefined,
      words: 'words' in state ? state.words : undefined,
      texts: 'texts' in state ? state.texts : undefined,
      met: 'met' in state ? state.met : undefined,
      problems: state.problems,
      origin: calculation.origin(cell.id),
      use: [...calculation.use(cell.id)].sort(),
      number: calculation.numberOf(cell.id),
    };
  });
}

interface Seen {
  readonly id: string;
}

describe('a calculation kept through random edits', () => {
  it('is always that of a fresh reading, and runs only what has a reason', () => {
    fc.assert(
      fc.property(fc.array(step, { minLength: 1, maxLength: 25 }), (steps) => {
        let sheet: Sheet = { format: 'tightside-sheet/1', title: 'Random', cells: start.map(cellOf) };
        const kept = calculate(sheet);
        for (const next of steps) {
          const edit = next(sheet);
          if (edit === undefined) continue;
          const before = new Map((seen(kept) as Seen[]).map((one) => [one.id, JSON.stringify(one)]));
          const cellsBefore = new Map(sheet.cells.map((cell) => [cell.id, cell]));
          const sameWorld = edit.kind !== 'set-cases' && edit.kind !== 'set-head';
          sheet = applyEdit(sheet, edit).sheet;
          const changed = kept.update(sheet);
          const after = seen(kept) as Seen[];
          expect(after).toEqual(seen(calculate(sheet)));
          for (const one of after) {
            if (
              before.get(one.id) !== undefined &&
              before.get(one.id) !== JSON.stringify(one) &&
              !sameExceptPlace(before.get(one.id)!, one)
            ) {
              expect(changed.has(one.id), `the state of ${one.id} moved unsaid`).toBe(true);
            }
          }
          expect(new Set(kept.ran).size).toBe(kept.ran.length);
          if (!sameWorld) continue;
          const now = new Map(after.map((one) => [one.id, JSON.stringify(one)]));
          for (const id of kept.ran) {
            const own = cellsBefore.get(id) !== sheet.cells.find((cell) => cell.id === id);
            const moved = now.get(id) !== before.get(id);
            const fed = kept.origin(id).some((used) => now.get(used) !== before.get(used));
            expect(own || moved || fed, `${id} ran without a reason after ${JSON.stringify(edit)}`).toBe(true);
          }
        }
      }),
      { numRuns: 200, seed: 20261201 },
    );
  }, 300_000);
});

/** Numbers of lines, users and warnings about places move with other rows; they are not part of the cell's own state. */
function sameExceptPlace(before: string, after: Seen): boolean {
  const strip = (text: string) => {
    const { number: _, use: __, origin: ___, problems, ...rest } = JSON.parse(text);
    return JSON.stringify([rest, problems.filter((problem: { code: string }) => problem.code !== 'used-above')]);
  };
  return strip(before) === strip(JSON.stringify(after));
}
