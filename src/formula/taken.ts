// What was decided while a formula was evaluated for one case: the branch of each `?:`, the row of each table call.
//
// Nodes are keyed by identity: the record belongs to one tree and one case. Numbers are in coherent SI.
// Not here: how it is found (explain.ts), how it is printed (typeset.ts, calculator.ts).

import type { Unit } from '../quantity/index.ts';
import type { Expr } from './expr.ts';

export type TakenRow =
  | {
      readonly kind: 'entry';
      readonly value: number;
      readonly unit?: Unit;
      /** Index of the row that was read. */
      readonly row?: number;
    }
  | {
      readonly kind: 'interpolate';
      /** Index of the first of the two rows that were read. */
      readonly row?: number;
      readonly x0: number;
      readonly x1: number;
      readonly y0: number;
      readonly y1: number;
      /** Units of the key column and of the column read, as declared: with them the numbers can be printed. */
      readonly xUnit?: Unit;
      readonly yUnit?: Unit;
    };

export interface Taken {
  /** True: the branch before the colon. Undefined: never reached. */
  branch(node: Expr): boolean | undefined;
  table(node: Expr): TakenRow | undefined;
}

/** For formulas without `?:` and tables. */
export const nothingTaken: Taken = { branch: () => undefined, table: () => undefined };
