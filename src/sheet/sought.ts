// A sought quantity: which cells lie between the unknown and its equation, and the value that makes the two sides equal.
//
// 1. The unknown is the cell itself, or the given named in `instead`; trials run in a what-if, the sheet stays untouched.
// 2. Cells between the unknown and the equation are computed anew in every trial; everything else is a constant of the case.
// 3. A cell that is sought itself may run in a circle with the cells between: the equation closes it.
// Not here: the search for roots (handed in as a Solver), the check of the equation's units (analyse.ts).

import type { Problem } from '../quantity/index.ts';
import { numeralInUnit, printQuantity, roundSignificant, type Unit } from '../quantity/index.ts';
import type { Names } from './names.ts';
import type { Node } from './node.ts';
import type { Solution } from './state.ts';
import { prepareWhatIf, type Surface } from './whatif.ts';

export interface FoundRoot {
  readonly root: number;
  readonly residual: number;
  readonly iterations: number;
  /** First and last of the trials in a row at which both sides are equal: no single value is the root. */
  readonly stretch?: readonly [number, number];
}

export interface Search {
  /** Rising. */
  readonly roots: readonly FoundRoot[];
  readonly method: string;
  /** Changes of sign that turned out to be poles, and trials that had no value. */
  readonly poles: readonly number[];
  readonly undefinedTrials: number;
  readonly atLow: number;
  readonly atHigh: number;
}

/** Finds the roots of a function given by columns: `evaluate(samples, count)` returns its values in the same order. */
export type Solver = (evaluate: (samples: Float64Array, count: number) => Float64Array, low: number, high: number) => Search;

/** Sets `direct`, `between` and `uses` of a sought node; the uses of all other nodes are known. */
export function linkSought(node: Node, direct: readonly Node[], names: Names): Node[] {
  node.direct = [...direct];
  const instead = node.reading.instead;
  const unknown = instead === undefined ? node : names.quantities.get(instead);
  node.between = unknown === undefined ? [] : cellsBetween(unknown, direct);
  const between = new Set(node.between);
  const uses = new Set<Node>();
  for (const used of direct) uses.add(used);
  for (const cell of node.between) for (const used of cell.uses) uses.add(used);
  for (const cell of instead === undefined ? between : []) uses.delete(cell);
  uses.delete(node);
  if (unknown !== undefined && unknown !== node) uses.add(unknown);
  return [...uses];
}

/** Cells that depend on `unknown` and that one of `ends` depends on, the ends included. */
function cellsBetween(unknown: Node, ends: readonly Node[]): Node[] {
  const reaches = new Map<Node, boolean>();
  const visiting = new Set<Node>();
  for (const end of ends) {
    const path: Node[] = [end];
    while (path.length > 0) {
      const node = path[path.length - 1]!;
      if (reaches.has(node) || node === unknown) {
        path.pop();
        continue;
      }
      if (!visiting.has(node)) {
        visiting.add(node);
        for (const used of linksOf(node)) if (!visiting.has(used) && used !== unknown) path.push(used);
        continue;
      }
      path.pop();
      reaches.set(
        node,
        linksOf(node).some((used) => used === unknown || reaches.get(used) === true),
      );
    }
  }
  return [...reaches].flatMap(([node, does]) => (does ? [node] : []));
}

const linksOf = (node: Node): readonly Node[] => (node.cell.kind === 'sought' ? node.direct : node.uses);

export type Solved =
  | { readonly ok: true; readonly solution: Solution; readonly warnings: readonly Problem[] }
  | { readonly ok: false; readonly problem: Problem };

export function solveSought(node: Node, caseIndex: number, sheet: Surface, solver: Solver, digits: number): Solved {
  const [left, right] = node.reading.formulas;
  const between = node.reading.between;
  if (left === undefined || right === undefined || between === undefined || node.unit === undefined)
    throw new Error('a broken cell was solved');
  const unknown = node.reading.instead ?? node.name!;
  const trial = prepareWhatIf(
    {
      vary: [unknown],
      want: ['left side', 'right side'],
      caseIndex,
      formulas: [
        { key: 'left side', formula: left },
        { key: 'right side', formula: right },
      ],
      between: node.between,
    },
    sheet,
  );
  const difference = (samples: Float64Array, count: number): Float64Array => {
    const [a, b] = trial.run([samples], count);
    return Float64Array.from({ length: count }, (_, i) => a![i]! - b![i]!);
  };
  const search = solver(difference, between.from.si, between.to.si);
  const first = search.roots[0];
  const shown = (si: number) => printIn(si, node.unit!, digits, sheet.style);
  const where = node.cell.kind === 'sought' ? node.cell.where.trim() : '';
  if (first === undefined) return { ok: false, problem: noRoot(search, unknown, where, between.text) };
  const [a, b] = trial.run([Float64Array.of(first.root)], 1).map((column) => column[0]!);
  const roots = search.roots.map((found) => found.root);
  const warnings: Problem[] = [];
  if (roots.length > 1) {
    const list = `${roots.slice(0, 5).map(shown).join('; ')}${roots.length > 5 ? ' …' : ''}`;
    warnings.push({
      code: 'several-roots',
      severity: 'warning',
      message: `${roots.length} values from ${between.text} fulfil ${where}: ${list}; the lowest is taken, narrow the range to take another`,
    });
  }
  if (first.stretch !== undefined) {
    const [from, to] = first.stretch.map(shown);
    warnings.push({
      code: 'equal-throughout',
      severity: 'warning',
      message: `every value tried from ${from} to ${to} fulfils ${where} within the precision of numbers; the middle is taken, and no value there is better than another`,
    });
  }
  return {
    ok: true,
    solution: {
      root: first.root,
      left: a!,
      right: b!,
      residual: a! - b!,
      iterations: first.iterations,
      method: search.method,
      roots,
    },
    warnings,
  };
}

function noRoot(search: Search, unknown: string, where: string, range: string): Problem {
  const error = (code: string, message: string): Problem => ({ code, severity: 'error', message });
  if (search.poles.length > 0) {
    return error(
      'pole',
      `from ${range} the two sides of ${where} jump past each other without meeting (a pole or a gap); choose a range on one side of the jump`,
    );
  }
  if (Number.isNaN(search.atLow) && Number.isNaN(search.atHigh) && search.undefinedTrials > 0) {
    return error(
      'not-bracketed',
      `no value of ${unknown} from ${range} gives both sides of ${where} a value at its ends; choose a range in which the formulas have one`,
    );
  }
  const side = search.atLow > 0 || search.atHigh > 0 ? 'greater' : 'less';
  return error(
    'not-bracketed',
    `no value of ${unknown} from ${range} fulfils ${where}: the left side stays ${side} than the right side throughout; widen the range, or check the equation`,
  );
}

function printIn(si: number, unit: Unit, digits: number, style: { readonly decimalSign: '.' | ',' }): string {
  return printQuantity(roundSignificant(numeralInUnit(si, unit), digits), unit, style);
}
