// The inverse questions of the templates: what was sought, put forward again, fulfils its equation; one answer, and mostly there.
//
// 1. Forward: a sheet of its own, in which the value found stands as a given and both sides of the equation as derived lines.
// 2. Answers solved by algebra in the same sheet, or by hand below, must agree.
// Not here: the solver alone (test/study), what else a template must be (harness.ts).

import { describe, expect, test } from 'vitest';
import { canonicalName } from '../../src/formula/index.ts';
import { fromSI, type Unit } from '../../src/quantity/index.ts';
import { type Calculation, type Cell, calculate, type SoughtCell } from '../../src/sheet/index.ts';
import { solver } from '../../src/study/index.ts';
import { sheetOf, templateIds } from './harness.ts';
import { randomFrom, varied } from './vary.ts';

const seed = Number(process.env['TIGHTSIDE_SEED'] ?? 20_261_202);
const variations = 60;
const isSought = (cell: Cell): cell is SoughtCell => cell.kind === 'sought';
const asking = templateIds
  .map((id) => ({ id, questions: sheetOf(id).cells.filter(isSought) }))
  .filter((one) => one.questions.length > 0);

function solutionsOf(calculation: Calculation, cell: SoughtCell) {
  const state = calculation.state(cell.id);
  if (state?.kind !== 'sought') throw new Error(`${cell.id} is not sought`);
  return { unit: state.unit, solutions: state.solutions, problems: state.problems };
}

/** Both sides of the equation in a sheet that has `root` for the unknown and is not solved. */
function sides(calculation: Calculation, cell: SoughtCell, root: number, unit: Unit, index: number): readonly [number, number] {
  const value = `${fromSI(root, unit)}${unit.text === '1' ? '' : ` ${unit.text}`}`;
  const unknown = canonicalName(cell.instead ?? cell.name);
  const [left = '', right = ''] = cell.where.split('=');
  const cells = calculation.sheet.cells.flatMap((other): Cell[] => {
    if (other.kind === 'given' && canonicalName(other.name) === unknown) {
      const { byCase: _, ...rest } = other;
      return [{ ...rest, value }];
    }
    if (other.id === cell.id && cell.instead === undefined)
      return [{ id: cell.id, kind: 'given', name: cell.name, value, unit: unit.text }];
    return other.kind === 'sought' ? [] : [other];
  });
  const forward = calculate({
    ...calculation.sheet,
    cells: [
      ...cells,
      { id: 'left-side', kind: 'derived', name: 'left_side', formula: left },
      { id: 'right-side', kind: 'derived', name: 'right_side', formula: right },
    ],
  });
  const side = (name: string) => forward.named(name)?.si[index] ?? Number.NaN;
  return [side('left_side'), side('right_side')];
}

function expectForward(calculation: Calculation, cell: SoughtCell, where: string): void {
  const { unit, solutions } = solutionsOf(calculation, cell);
  for (const [index, solution] of solutions.entries()) {
    if (solution === undefined || unit === undefined) continue;
    const [left, right] = sides(calculation, cell, solution.root, unit, index);
    const gap = Math.abs(left - right) / Math.max(Math.abs(left), Math.abs(right));
    expect(gap, `${where}: ${cell.name} = ${solution.root}, ${left} against ${right}`).toBeLessThanOrEqual(1e-9);
  }
}

describe.each(asking)('inverse questions of $id', ({ id, questions }) => {
  const sheet = sheetOf(id);

  test('are answered as the template stands, once each, and the answer put forward fulfils the equation to 1e-9', () => {
    const calculation = calculate(sheet, solver);
    for (const cell of questions) {
      const { solutions, problems } = solutionsOf(calculation, cell);
      expect(problems, cell.name).toEqual([]);
      for (const solution of solutions) expect(solution?.roots.length, cell.name).toBe(1);
      expectForward(calculation, cell, id);
    }
  });

  test(`in ${variations} variations (seed ${seed}): never two answers, one in most, each fulfils the equation to 1e-9`, () => {
    const random = randomFrom(seed);
    const answered = new Map(questions.map((cell) => [cell.name, 0]));
    const codes = new Set<string>();
    for (let round = 0; round < variations; round += 1) {
      const calculation = calculate(varied(sheet, random), solver);
      for (const cell of questions) {
        const { solutions, problems } = solutionsOf(calculation, cell);
        for (const { code } of problems) codes.add(code);
        if (solutions.every((solution) => solution !== undefined)) answered.set(cell.name, (answered.get(cell.name) ?? 0) + 1);
        expectForward(calculation, cell, `round ${round}`);
      }
    }
    for (const [name, times] of answered)
      expect(times, `${name} answered; trouble: ${[...codes].join(', ')}`).toBeGreaterThan(variations / 2);
    // A question without an answer says so, or waits for a line that failed; nothing else may go wrong.
    expect([...codes].filter((code) => code !== 'not-bracketed' && code !== 'waits-for')).toEqual([]);
  }, 240_000);
});
