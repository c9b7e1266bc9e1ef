// The state of one walk from the grammar's nodes to the syntax tree, and the small steps that every part of it takes.
//
// Not here: the walk itself (walk.ts, calls.ts, products.ts).

import type { Problem } from '../quantity/index.ts';
import type { Expr, Span } from './expr.ts';
import type { Node } from './parser.ts';
import type { Token } from './tokens.ts';

export const nodeBudget = 2000;

export interface Walk {
  /** Reads one node: readNode of walk.ts. */
  readonly read: (node: Node) => Expr;
  readonly source: string;
  readonly tokens: readonly Token[];
  /** Index of the closing bracket for each opening one. */
  readonly closing: ReadonlyMap<number, number>;
  readonly names: Set<string>;
  readonly tables: Set<string>;
  budget: number;
  problem: Problem | undefined;
  /** First and last token of the node walked last. */
  first: number;
  last: number;
}

/** Stands where a refused node would stand; the tree around it is thrown away. */
export const nothing: Expr = { kind: 'number', text: '0', value: 0, at: [0, 0] };
export function refuse(walk: Walk, problem: Problem): Expr {
  walk.problem ??= problem;
  return nothing;
}

export function spanOf(walk: Walk, first: number, last: number): Span {
  return [walk.tokens[first]?.from ?? 0, walk.tokens[last]?.to ?? walk.source.length];
}

/** The token of a placeholder name such as `_12`; undefined where the grammar made up a name. */
export function tokenIndex(node: Node): number | undefined {
  return node.type === 'SymbolNode' && /^_[0-9]+$/.test(node.name) ? Number(node.name.slice(1)) : undefined;
}
