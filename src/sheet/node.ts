// A cell as the engine holds it: its reading, its place among the others, its type, and where its numbers lie.
//
// 1. A node lives as long as its cell id stands in the sheet; the kernel (calculation.ts) is the only one that writes to it.
// 2. `broken` means: no number in any case, for a reason known before calculation.
// 3. Problems come in three layers, each replaced as a whole: of the cell by itself (reading), of its place among others
//    (`placed`), of a calculation (`failed`, one per case).

import type { Formula, Inferred, TableData, Type } from '../formula/index.ts';
import { dimensionKey, type Unit, type Value } from '../quantity/index.ts';
import type { Cell } from './document.ts';
import type { Reading } from './reading.ts';
import type { CellProblem, CellState, Solution } from './state.ts';

export interface Node {
  cell: Cell;
  reading: Reading;
  /** Position in the sheet. */
  index: number;
  /** The name that other cells reach it by; none for the second cell of a name. */
  name: string | undefined;
  uses: Node[];
  /** Sought: what its text names, and the cells between the unknown and the equation, which are computed anew for every trial. */
  direct: Node[];
  between: Node[];
  equation: CellProblem[];
  equationType: Type | undefined;
  solutions: (Solution | undefined)[];
  broken: boolean;
  type: Type | undefined;
  unit: Unit | undefined;
  words: string | undefined;
  inferred: Inferred | undefined;
  /** Values as typed, per case; texts of a choice likewise. */
  values: (Value | undefined)[];
  texts: (string | undefined)[] | undefined;
  table: TableData | undefined;
  /** Table: some formula interpolates over it. */
  interpolated: boolean;
  placed: CellProblem[];
  failed: (CellProblem | undefined)[];
  warned: CellProblem[];
  /** A formula with floor, ceil or round: checked for a jump after each calculation. */
  jumps: boolean;
  /** A choice is among the cells it uses. */
  usesTexts: boolean;
  snapshot: CellState | undefined;
}

export function newNode(cell: Cell, reading: Reading, index: number): Node {
  return {
    cell,
    reading,
    index,
    name: undefined,
    uses: [],
    direct: [],
    between: [],
    equation: [],
    equationType: undefined,
    solutions: [],
    broken: true,
    type: undefined,
    unit: undefined,
    words: undefined,
    inferred: undefined,
    values: [],
    texts: undefined,
    table: undefined,
    interpolated: false,
    placed: [],
    failed: [],
    warned: [],
    jumps: false,
    usesTexts: false,
    snapshot: undefined,
  };
}

/** Formulas that the engine computes: one of a derived cell, two of a criterion. */
export function computedFormulas(node: Node): readonly (Formula | undefined)[] {
  return node.cell.kind === 'derived' || node.cell.kind === 'criterion' ? node.reading.formulas : [];
}

/** Equal keys: whoever uses the node need not be looked at again. */
export function typeKey(node: Node): string {
  const type = node.type;
  if (node.broken || type === undefined) return node.table ? 'table' : 'broken';
  if (type.kind === 'truth') return 'truth';
  if (type.kind === 'text') return `text ${type.table}.${type.column}`;
  const { r, hz, pi, rad } = type.counts;
  const counts = [r, hz, pi, rad].map((count) => `${count.n}/${count.d}`).join(' ');
  return `${dimensionKey(type.dimension)} ${counts} ${type.temperature} ${type.unitText ?? ''}`;
}
