// What is known of a value before any number is computed.
//
// `counts` carries the revolutions of the rule in DEVELOPERS.md ("Counted revolutions"): r, hz and pi are the exponents of
// the unit r, of the unit Hz and of the literal pi; rad is that of rad or deg. A term may stand as r + a − j revolutions,
// whole a in 0..hz, whole j in 0..pi.
// `temperature`: a reading (°C, °F alone), a difference of two readings, or none (kelvin and everything else).

import type { Dimension, Rational } from '../quantity/index.ts';

export interface FormulaCounts {
  readonly r: Rational;
  readonly hz: Rational;
  readonly pi: Rational;
  readonly rad: Rational;
}

export type Type =
  | {
      readonly kind: 'quantity';
      readonly dimension: Dimension;
      readonly counts: FormulaCounts;
      readonly temperature: 'none' | 'reading' | 'difference';
      /** Unit text as declared, for words and messages: tells N·m from J. */
      readonly unitText?: string;
      /** True for the literal 0 (and only it): it fits any dimension. */
      readonly zero?: boolean;
    }
  | { readonly kind: 'truth' }
  | { readonly kind: 'text'; readonly table: string; readonly column: string };

export interface ColumnType {
  readonly name: string;
  /** No type: a text column. */
  readonly type?: Type;
}

export interface TableType {
  readonly name: string;
  readonly columns: readonly ColumnType[];
}
