// What the engine knows of each cell: its reading, its type, its values in every case, its problems.
//
// 1. Every numeric array has one entry per case, in coherent SI, NaN where the case has no value.
// 2. A state is a snapshot: it is replaced, never changed, when its cell, a value or a problem moves.
// 3. A problem with a `case` concerns that case alone; without one it concerns the cell.
// Not here: how the states come about (calculation.ts).

import type { Formula, TableData, Type } from '../formula/index.ts';
import type { Problem, Unit, Value } from '../quantity/index.ts';
import type {
  ChartCell,
  CriterionCell,
  DerivedCell,
  DrawingCell,
  FigureCell,
  GivenCell,
  HeadingCell,
  NoteCell,
  SoughtCell,
  TableCell,
} from './document.ts';

/** A problem with its place: `at` is a span in the text of the cell's key `field` ('value', 'byCase.start', 'formula', 'left', …). */
export interface CellProblem extends Problem {
  readonly cell: string;
  readonly case?: string;
  readonly field?: string;
}

interface StateBase {
  /** Position of the cell in the sheet, from 0. */
  readonly index: number;
  readonly problems: readonly CellProblem[];
}

export interface GivenState extends StateBase {
  readonly kind: 'given';
  readonly cell: GivenCell;
  readonly type?: Type;
  readonly unit?: Unit;
  /** The value as typed, per case. */
  readonly values: readonly (Value | undefined)[];
  /** The text of a choice, per case. */
  readonly texts?: readonly (string | undefined)[];
  readonly si: Float64Array;
}

export interface DerivedState extends StateBase {
  readonly kind: 'derived';
  readonly cell: DerivedCell;
  readonly formula?: Formula;
  readonly type?: Type;
  /** Declared unit, else the coherent one of the inferred dimension. */
  readonly unit?: Unit;
  readonly si: Float64Array;
  /** The unit check in words: "force = force + force × number". */
  readonly words?: string;
}

/** How the value of a sought quantity was found, in coherent SI. */
export interface Solution {
  readonly root: number;
  /** Both sides of the equation with the root put back, and their difference. */
  readonly left: number;
  readonly right: number;
  readonly residual: number;
  readonly iterations: number;
  readonly method: string;
  /** Every root found within the bracket, rising; the first of them is the value. */
  readonly roots: readonly number[];
}

export interface SoughtState extends StateBase {
  readonly kind: 'sought';
  readonly cell: SoughtCell;
  readonly left?: Formula;
  readonly right?: Formula;
  readonly type?: Type;
  readonly unit?: Unit;
  readonly si: Float64Array;
  /** Type of both sides of the equation. */
  readonly equationType?: Type;
  /** One entry a case. */
  readonly solutions: readonly (Solution | undefined)[];
}

export interface CriterionState extends StateBase {
  readonly kind: 'criterion';
  readonly cell: CriterionCell;
  readonly left?: Formula;
  readonly right?: Formula;
  readonly type?: Type;
  /** Unit in which both sides are printed. */
  readonly unit?: Unit;
  readonly leftSi: Float64Array;
  readonly rightSi: Float64Array;
  readonly met: readonly (boolean | null)[];
  /** Demand over capacity, null where a side is not positive. */
  readonly utilisation: readonly (number | null)[];
}

export interface TableState extends StateBase {
  readonly kind: 'table';
  readonly cell: TableCell;
  readonly data?: TableData;
}

export interface LiveName {
  readonly text: string;
  readonly name: string;
  readonly from: number;
  readonly to: number;
}

export interface NoteState extends StateBase {
  readonly kind: 'note';
  readonly cell: NoteCell;
  /** The names in braces, in the order of the text; only those that a quantity of the sheet answers to are replaced. */
  readonly live: readonly LiveName[];
}

export interface PlainState extends StateBase {
  readonly kind: 'plain';
  readonly cell: HeadingCell | DrawingCell | ChartCell | FigureCell;
}

export type QuantityState = GivenState | DerivedState | SoughtState;
export type CellState = QuantityState | CriterionState | TableState | NoteState | PlainState;
