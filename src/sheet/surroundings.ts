// What a cell is analysed against: names, cases, numbers of lines, and what the cells around it are known to be.
//
// Not here: the analysis itself (analyse.ts and its neighbours).

import type { Formula, Scope, TableType, Type } from '../formula/index.ts';
import type { Problem } from '../quantity/index.ts';
import type { LoadCase } from './document.ts';
import type { Names } from './names.ts';
import type { Node } from './node.ts';
import type { CellProblem } from './state.ts';

export interface Surroundings {
  readonly names: Names;
  readonly cases: readonly LoadCase[];
  /** Number of a line for messages: '3.2', or '' where it has none. */
  numberOf(cell: string): string;
  /** The problem of a second definition, by cell id. */
  readonly twice: ReadonlyMap<string, CellProblem>;
  /** The problem of a loop, by cell id. */
  readonly looped: ReadonlyMap<string, CellProblem>;
  readonly decimalSign: '.' | ',';
}

export type Report = (problem: Problem, field?: string, onlyCase?: string) => void;

/** Types of the cells around, as src/formula asks for them. */
export function scopeOf(around: Surroundings): Scope {
  return {
    typeOf(name: string): Type | 'unknown-name' | 'failed' {
      const node = around.names.quantities.get(name);
      if (node === undefined) return 'unknown-name';
      return node.broken || node.type === undefined ? 'failed' : node.type;
    },
    table(name: string): TableType | undefined {
      return around.names.tables.get(name)?.table;
    },
    names: () => around.names.quantities.keys(),
    tableNames: () => around.names.tables.keys(),
    decimalSign: around.decimalSign,
  };
}

export function waitsFor(used: Node, around: Pick<Surroundings, 'numberOf'>): Problem {
  const number = around.numberOf(used.cell.id);
  const name = used.name ?? used.reading.name ?? '';
  const where = number === '' ? '' : `, step ${number}`;
  return {
    code: 'waits-for',
    severity: 'error',
    message: `waits for ${used.cell.kind === 'table' ? 'table ' : ''}${used.cell.kind === 'table' ? used.cell.name : name}${where}, which has no value yet`,
  };
}

export function firstBroken(node: Node, formulas: readonly (Formula | undefined)[], around: Surroundings): Node | undefined {
  for (const formula of formulas) {
    for (const name of formula?.names ?? []) {
      const used = around.names.quantities.get(name);
      if (used !== undefined && used !== node && used.broken) return used;
    }
    for (const name of formula?.tables ?? []) {
      const used = around.names.tables.get(name);
      if (used !== undefined && used.table === undefined) return used;
    }
  }
  return undefined;
}
