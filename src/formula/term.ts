// What the inference carries up the tree beside the type, and how types meet declared units.
//
// Not here: the walk (infer.ts).

import { dimensionless, isDimensionless, isZeroR, type Problem, type Unit } from '../quantity/index.ts';
import { common, countsOfUnit, equalTriples, nearestZero, noCounts, type Standing, settled, standing } from './counts.ts';
import type { Expr } from './expr.ts';
import type { TableData } from './table.ts';
import type { FormulaCounts, TableType, Type } from './type.ts';

export type QuantityType = Extract<Type, { kind: 'quantity' }>;

export interface Scope {
  /** Type of a quantity of the sheet; 'failed' when that cell has an error of its own. */
  typeOf(name: string): Type | 'unknown-name' | 'failed';
  /** With the data at hand (TableData), quoted keys are looked up as well. */
  table(name: string): TableType | TableData | undefined;
  /** For proposals. */
  names(): Iterable<string>;
  tableNames(): Iterable<string>;
  /** How numerals in quoted quantities are written; '.' where absent. */
  readonly decimalSign?: '.' | ',';
}

export interface Term {
  readonly type: Type;
  /** A name, or a sum of names: what carries its unit text unchanged. */
  readonly plain?: boolean;
  /** A sum: what its addends have in common, so that the order of adding does not matter. */
  readonly shared?: Shared;
}

export interface Shared {
  readonly standing: Standing;
  /** The counts of every addend, where they are all the same. */
  readonly same?: FormulaCounts;
}

export interface Context {
  readonly scope: Scope;
  /** The text that spans point into. */
  readonly text: string;
  /** The declared unit, for the proofs of proposals. */
  readonly target: Unit | undefined;
  readonly problems: Problem[];
  readonly failed: Set<string>;
  /** Literals that an error already speaks of. */
  readonly spoken: Set<Expr>;
  /** False while an offer is being tried out: nothing is offered in turn. */
  readonly propose: boolean;
  /** Whether a changed text, or a changed scope, would leave no trouble with revolutions. */
  readonly prove?: (text: string, scope: Scope) => boolean;
  /** The same for another declared unit. */
  readonly proveTarget?: (unit: string) => boolean;
}

export const number: QuantityType = { kind: 'quantity', dimension: dimensionless, counts: noCounts, temperature: 'none' };
export const truth: Type = { kind: 'truth' };

/** The type of a quantity given in a unit. */
export function typeOfUnit(unit: Unit): QuantityType {
  return {
    kind: 'quantity',
    dimension: unit.dimension,
    counts: countsOfUnit(unit),
    temperature: unit.reading === undefined ? 'none' : 'reading',
    unitText: unit.text,
  };
}

/** What a derived cell passes on: its declared unit's type alone; without one, the inferred type with its counts settled. */
export function typeOfResult(inferred: { readonly type?: Type }, declared?: Unit): Type {
  if (declared !== undefined) return typeOfUnit(declared);
  const type = inferred.type ?? number;
  if (type.kind !== 'quantity') return type;
  const { zero: _, ...rest } = type;
  return { ...rest, counts: settled(type.counts) };
}

/** Dimensionless and without counts: a factor that leaves the other factor's kind as it is. */
export function isPlainNumber(type: QuantityType): boolean {
  const { r, hz, pi, rad } = type.counts;
  return isDimensionless(type.dimension) && isZeroR(r) && isZeroR(hz) && isZeroR(pi) && isZeroR(rad);
}

export function sharedOf(term: Term): Shared {
  if (term.shared) return term.shared;
  const counts = (term.type as QuantityType).counts;
  return { standing: standing(counts), same: counts };
}

/** What several operands have in common; undefined where nothing. */
export function meet(parts: readonly Shared[]): Shared | undefined {
  let met: Shared | undefined;
  for (const part of parts) {
    if (met === undefined) {
      met = part;
      continue;
    }
    if (met.same && part.same && equalTriples(met.same, part.same)) {
      met = { standing: met.standing, same: meetRad(met.same, part.same) };
      continue;
    }
    const both = common(met.standing, part.standing);
    if (both === undefined) return undefined;
    met = { standing: both };
  }
  return met;
}

/** Equal triples stay; otherwise the common value nearest 0 stands alone. */
export function countsOfShared(shared: Shared): FormulaCounts {
  return shared.same ?? { ...noCounts, r: nearestZero(shared.standing) };
}

/** Radians that differ are no radians any more: `2*pi - theta` is judged by its revolutions alone. */
function meetRad(a: FormulaCounts, b: FormulaCounts): FormulaCounts {
  return a.rad.n === b.rad.n && a.rad.d === b.rad.d ? a : { ...a, rad: noCounts.rad };
}
