// The shape of a sheet: which cells there are, who answers to a name, who uses whom, in which order, with which numbers.
//
// 1. A node keeps its identity while its cell id and kind stand in the sheet.
// 2. Each step says what it makes stale: cells that are new or read anew, cells whose names lead elsewhere, cells in or out of loops.
// Not here: types and units (analyse.ts), numbers (runner.ts).

import type { Sheet } from './document.ts';
import { buildGraph, type Graph } from './graph.ts';
import { interpolatedTables, type Names, resolveNames, usedNodes } from './names.ts';
import { type Node, newNode } from './node.ts';
import { lineNumbers } from './numbering.ts';
import { type DecimalSign, liveNames, readCell } from './reading.ts';
import { linkSought } from './sought.ts';
import type { CellProblem } from './state.ts';
import { readTable } from './table.ts';

export class Structure {
  nodes: Node[] = [];
  byId = new Map<string, Node>();
  names: Names = { quantities: new Map(), tables: new Map() };
  twice: ReadonlyMap<string, CellProblem> = new Map();
  looped: ReadonlyMap<string, CellProblem> = new Map();
  graph: Graph = buildGraph([]);
  private numbers: ReadonlyMap<string, string> = new Map();

  numberOf(cell: string): string {
    return this.numbers.get(cell) ?? '';
  }

  /** Matches nodes with the cells of the next sheet and reads what is new. */
  takeCells(next: Sheet, decimalSign: DecimalSign, sameReading: boolean, retyped: ReadonlySet<Node>) {
    const fresh = new Set<Node>(retyped);
    const restyled: Node[] = [];
    const nodes: Node[] = [];
    const byId = new Map<string, Node>();
    let named = false;
    let headings = false;
    for (const [index, cell] of next.cells.entries()) {
      const old = this.byId.get(cell.id);
      let node = old;
      if (node === undefined || byId.has(cell.id) || node.cell.kind !== cell.kind) {
        node = newNode(cell, readCell(cell, decimalSign), index);
        fresh.add(node);
        named = true;
      } else if (node.cell !== cell || !sameReading) {
        const alike = sameReading && cell.kind !== 'given' && sameMeaningBesidesNumbers(node.cell, cell);
        const oldName = definedName(node);
        if (cell.kind === 'heading') headings = true;
        node.cell = cell;
        node.reading = readCell(cell, decimalSign);
        node.snapshot = undefined;
        if (alike) restyled.push(node);
        else fresh.add(node);
        if (definedName(node) !== oldName) named = true;
      }
      if (cell.kind === 'table' && fresh.has(node)) node.table = readTable(cell, decimalSign).data;
      if (node.index !== index) node.snapshot = undefined;
      node.index = index;
      nodes.push(node);
      byId.set(cell.id, node);
    }
    const removed = [...this.byId.values()].filter((node) => byId.get(node.cell.id) !== node);
    this.nodes = nodes;
    this.byId = byId;
    return { fresh, restyled, removed, named, headings };
  }

  /** Lines got other numbers: sentences that name them are made anew; returns the failed cells, to be told again after the run. */
  renumber(next: Sheet, stale: Set<Node>): readonly Node[] {
    const before = this.numbers;
    this.numbers = lineNumbers(next);
    if (sameNumbers(before, this.numbers)) return [];
    for (const node of this.nodes) {
      node.snapshot = undefined;
      if (node.placed.some((problem) => namesLines.has(problem.code))) stale.add(node);
    }
    return this.nodes.filter((node) => node.failed.length > 0);
  }

  /** Names were given, taken or moved: returns those that another cell answers to now, and all of them where one was misspelt. */
  resolve(stale: Set<Node>): Set<string> {
    const before = this.names;
    const twiceBefore = this.twice;
    const resolved = resolveNames(this.nodes, (cell) => this.numberOf(cell));
    this.names = resolved;
    this.twice = resolved.twice;
    for (const node of this.nodes) {
      if (twiceBefore.get(node.cell.id)?.message !== this.twice.get(node.cell.id)?.message || misspelt(node, resolved))
        stale.add(node);
    }
    const changed = new Set<string>();
    for (const [old, now] of [
      [before.quantities, resolved.quantities],
      [before.tables, resolved.tables],
    ] as const) {
      for (const [name, node] of now) if (old.get(name) !== node) changed.add(name);
      for (const name of old.keys()) if (!now.has(name)) changed.add(name);
    }
    return changed;
  }

  /** Who uses whom, and in which order. */
  relink(stale: Set<Node>, names: ReadonlySet<string>, sameRows: boolean): void {
    let linksMoved = !sameRows;
    for (const node of this.nodes) {
      if (!stale.has(node) && !(names.size > 0 && reachesFor(node, names))) continue;
      const used = usedNodes(node, this.names);
      if (node.cell.kind === 'sought') {
        // Its way through the sheet is looked up below, when all others know theirs.
        if (!sameNodes(used, node.direct)) linksMoved = true;
        node.direct = used;
        continue;
      }
      if (sameNodes(used, node.uses)) continue;
      node.uses = used;
      stale.add(node);
      linksMoved = true;
    }
    const soughts = this.nodes.filter((node) => node.cell.kind === 'sought');
    if (!linksMoved && !soughts.some((node) => stale.has(node))) return;
    for (const node of soughts) {
      const used = linkSought(node, node.direct, this.names);
      if (sameNodes(used, node.uses)) continue;
      node.uses = used;
      stale.add(node);
    }
    const before = this.looped;
    this.graph = buildGraph(this.nodes.map((node) => node.uses.map((used) => used.index)));
    this.looped = this.describeLoops();
    if (before.size === 0 && this.looped.size === 0) return;
    for (const node of this.nodes) {
      if (before.get(node.cell.id)?.message !== this.looped.get(node.cell.id)?.message) stale.add(node);
    }
  }

  /** Notes which tables are interpolated over; returns those of which that moved. */
  noteInterpolated(): readonly Node[] {
    if (this.names.tables.size === 0) return [];
    const tables = new Set<string>();
    for (const { reading } of this.nodes)
      for (const formula of reading.formulas) if (formula) for (const name of interpolatedTables(formula)) tables.add(name);
    const moved: Node[] = [];
    for (const [name, node] of this.names.tables) {
      if (node.interpolated === tables.has(name)) continue;
      node.interpolated = !node.interpolated;
      node.snapshot = undefined;
      moved.push(node);
    }
    return moved;
  }

  private describeLoops(): ReadonlyMap<string, CellProblem> {
    const problems = new Map<string, CellProblem>();
    const told = new Map<number, string>();
    for (const [index, node] of this.nodes.entries()) {
      const number = this.graph.loopOf[index]!;
      const loop = this.graph.loops[number];
      if (loop === undefined) continue;
      // The whole way round is told at the first cell of the sheet that lies in it; the others point there.
      const where = told.get(number);
      const message = where === undefined ? this.loopMessage(loop) : `is part of the loop told at ${where}`;
      if (where === undefined) told.set(number, this.numberOf(node.cell.id) || (node.name ?? node.cell.id));
      problems.set(node.cell.id, { code: 'loop', severity: 'error', message, cell: node.cell.id, field: 'formula' });
    }
    return problems;
  }

  private loopMessage(loop: readonly number[]): string {
    const shown = loop.slice(0, 8).map((member) => {
      const { cell, name } = this.nodes[member]!;
      const number = this.numberOf(cell.id);
      return `${name ?? cell.id}${number === '' ? '' : ` (${number})`}`;
    });
    if (loop.length === 1) {
      return `${shown[0]} is defined by itself; make it a sought cell with an equation, or name the value on the right differently`;
    }
    const rest = loop.length > 8 ? ` → … ${loop.length - 8} more` : '';
    const first = this.nodes[loop[0]!]!;
    return `${shown.join(' → ')}${rest} → ${first.name ?? first.cell.id} use each other in a loop; break it, or make one of them a sought cell with an equation`;
  }
}

function definedName(node: Node): string | undefined {
  return node.cell.kind === 'table' ? node.cell.name : node.reading.name;
}

function reachesFor(node: Node, names: ReadonlySet<string>): boolean {
  const { formulas, mentions, choices } = node.reading;
  return (
    formulas.some(
      (formula) => formula?.names.some((name) => names.has(name)) || formula?.tables.some((name) => names.has(name)),
    ) ||
    mentions.some((live) => names.has(live.name)) ||
    (choices !== undefined && names.has(choices.table))
  );
}

/** Problems whose sentence names the number of another line. */
const namesLines: ReadonlySet<string> = new Set(['waits-for', 'name-twice', 'loop']);

function sameNumbers(a: ReadonlyMap<string, string>, b: ReadonlyMap<string, string>): boolean {
  if (a.size !== b.size) return false;
  for (const [cell, number] of b) if (a.get(cell) !== number) return false;
  return true;
}

function sameNodes(a: readonly Node[], b: readonly Node[]): boolean {
  return a.length === b.length && a.every((node, index) => node === b[index]);
}

/** Reaches for a name that nobody answers to: its message proposes the nearest, which any change of names may move. */
function misspelt(node: Node, names: Names): boolean {
  return (
    node.reading.formulas.some(
      (formula) =>
        formula?.names.some((name) => !names.quantities.has(name)) || formula?.tables.some((name) => !names.tables.has(name)),
    ) ||
    node.reading.mentions.some((live) => !names.quantities.has(live.name)) ||
    (node.reading.choices !== undefined && !names.tables.has(node.reading.choices.table))
  );
}

/** Cells that differ in values, titles, sources … but not in names, formulas, units or rows. */
export function sameMeaningBesidesNumbers(a: Node['cell'], b: Node['cell']): boolean {
  if (a.kind === 'given' && b.kind === 'given') return a.name === b.name && a.unit === b.unit && a.choices === b.choices;
  if (a.kind === 'derived' && b.kind === 'derived') return a.name === b.name && a.unit === b.unit && a.formula === b.formula;
  if (a.kind === 'criterion' && b.kind === 'criterion') {
    return a.left === b.left && a.relation === b.relation && a.right === b.right && a.unit === b.unit;
  }
  if (a.kind === 'sought' && b.kind === 'sought') {
    return a.name === b.name && a.unit === b.unit && a.instead === b.instead && a.where === b.where && a.between === b.between;
  }
  if (a.kind === 'heading' && b.kind === 'heading') return (a.level ?? 1) === (b.level ?? 1);
  if (a.kind === 'note' && b.kind === 'note') {
    const before = liveNames(a);
    const after = liveNames(b);
    return before.length === after.length && before.every((live, index) => live.text === after[index]!.text);
  }
  return a.kind === 'figure' && b.kind === 'figure';
}
