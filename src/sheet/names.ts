// Who answers to a name: quantities and tables of a sheet, each name once.
//
// 1. Of several cells with one name the first in the sheet answers; the others carry the problem `name-twice`.
// 2. Tables have a name space of their own.
// 3. Names are looked up in Maps only: a quantity may be called `constructor`.

import { type Formula, tokenize } from '../formula/index.ts';
import type { Node } from './node.ts';
import type { CellProblem } from './state.ts';

export interface Names {
  readonly quantities: ReadonlyMap<string, Node>;
  readonly tables: ReadonlyMap<string, Node>;
}

/** Sets `name` of every node and returns the two name spaces with the problems of repeated names. */
export function resolveNames(
  nodes: readonly Node[],
  numberOf: (cell: string) => string,
): Names & { readonly twice: ReadonlyMap<string, CellProblem> } {
  const quantities = new Map<string, Node>();
  const tables = new Map<string, Node>();
  const twice = new Map<string, CellProblem>();
  for (const node of nodes) {
    node.name = undefined;
    const isTable = node.cell.kind === 'table';
    const name = node.cell.kind === 'table' ? node.cell.name : node.reading.name;
    if (name === undefined) continue;
    const space = isTable ? tables : quantities;
    const first = space.get(name);
    if (first === undefined) {
      space.set(name, node);
      node.name = name;
      continue;
    }
    const where = numberOf(first.cell.id);
    twice.set(node.cell.id, {
      code: 'name-twice',
      severity: 'error',
      message: `the ${isTable ? 'table' : 'quantity'} ${name} is already defined${where === '' ? '' : ` at ${where}`}; rename one of the two`,
      cell: node.cell.id,
      field: 'name',
    });
  }
  return { quantities, tables, twice };
}

/** Nodes that a node reaches for, each once, in the order of its text; names that nobody answers to are left out. */
export function usedNodes(node: Node, names: Names): Node[] {
  const found = new Set<Node>();
  const add = (used: Node | undefined) => {
    if (used !== undefined) found.add(used);
  };
  for (const formula of node.reading.formulas) {
    for (const name of formula?.names ?? []) add(names.quantities.get(name));
    for (const table of formula?.tables ?? []) add(names.tables.get(table));
  }
  if (node.reading.choices) add(names.tables.get(node.reading.choices.table));
  for (const live of node.reading.mentions) add(names.quantities.get(live.name));
  if (node.cell.kind === 'sought') found.delete(node);
  return [...found];
}

const nothing: ReadonlySet<string> = new Set();
const keptTables = new WeakMap<Formula, ReadonlySet<string>>();

/** Tables between whose rows the formula interpolates. */
export function interpolatedTables(formula: Formula): ReadonlySet<string> {
  if (formula.tables.length === 0) return nothing;
  let found = keptTables.get(formula);
  if (found === undefined) {
    const tokens = tokenize(formula.text);
    found = new Set(
      tokens.flatMap((token, at) => {
        const table = tokens[at + 2];
        const calls = token.kind === 'name' && token.text === 'interpolate' && tokens[at + 1]?.kind === 'open';
        return calls && table?.kind === 'name' ? [table.text] : [];
      }),
    );
    keptTables.set(formula, found);
  }
  return found;
}
