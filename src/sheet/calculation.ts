// The engine: keeps every cell of a sheet calculated while the sheet is edited.
//
// 1. After `update` the states are those that a fresh calculation of the same sheet would give.
// 2. A cell is computed when its own text, its type or the number of a cell that it uses has moved, and only then;
//    a result that comes out the same, bit for bit, stops there.
// 3. Cells are visited in the order of the graph, so each is computed at most once; no recursion anywhere.
// 4. A problem is a value of its cell: the rest of the sheet goes on.
//
// An update goes through four steps: read what changed; if the shape moved (names, formulas, order), resolve names and
// order anew and analyse what that touches; compile what was analysed; run what is stale. A change of numbers alone skips
// to the last step. Not here: single cells (reading.ts, analyse.ts), columns (columns.ts), snapshots (snapshot.ts).

import { explain, type Lookup, run } from '../formula/index.ts';
import type { Problem } from '../quantity/index.ts';
import { analyse, type Surroundings, waitsFor } from './analyse.ts';
import { Columns } from './columns.ts';
import type { LoadCase, Sheet } from './document.ts';
import { buildGraph, type Graph } from './graph.ts';
import { type Names, resolveNames, usedNodes } from './names.ts';
import { computedFormulas, newNode, type Node, typeKey } from './node.ts';
import { lineNumbers } from './numbering.ts';
import { makePlan, mode, type Plan } from './plan.ts';
import { liveNames, readCell } from './reading.ts';
import { snapshotOf } from './snapshot.ts';
import type { CellProblem, CellState, QuantityState, TableState } from './state.ts';
import { readTable } from './table.ts';
import { prepareWhatIf, type WhatIf, type WhatIfRequest } from './whatif.ts';

export interface Changed extends Iterable<string> {
  readonly size: number;
  has(cell: string): boolean;
}

export interface Calculation {
  readonly sheet: Sheet;
  /** The load cases; one case `base` where the sheet has none. */
  readonly cases: readonly LoadCase[];
  readonly style: { readonly decimalSign: '.' | ',' };
  readonly digits: number;
  state(cell: string): CellState | undefined;
  named(name: string): QuantityState | undefined;
  table(name: string): TableState | undefined;
  /** Number of a section or a line: '3.2'. */
  numberOf(cell: string): string;
  /** Cells that this one uses, and cells that use it: direct neighbours, by id. */
  origin(cell: string): readonly string[];
  use(cell: string): readonly string[];
  /** In the order of the sheet. */
  problems(): readonly CellProblem[];
  /** Values of one case, for explaining and typesetting a formula. */
  lookup(caseIndex: number): Lookup;
  /** Takes the next state of the sheet; returns the cells whose state moved. */
  update(next: Sheet): Changed;
  /** Cells computed by the last update, in order: what the tests of recalculation look at. */
  readonly ran: readonly string[];
  /** Givens varied over samples, the sheet untouched. */
  whatIf(request: WhatIfRequest): WhatIf;
}

/** Most cells run as one stretch. */
const stretch = 256;

const defaultCases: readonly LoadCase[] = [{ id: 'base' }];

/** Reads and calculates a sheet. Never throws for what a sheet says. */
export function calculate(sheet: Sheet): Calculation {
  return new Engine(sheet);
}

class Engine implements Calculation {
  sheet: Sheet;
  cases: readonly LoadCase[] = defaultCases;
  style: { readonly decimalSign: '.' | ',' } = { decimalSign: '.' };

  private nodes: Node[] = [];
  private byId = new Map<string, Node>();
  private names: Names = { quantities: new Map(), tables: new Map() };
  private twice: ReadonlyMap<string, CellProblem> = new Map();
  private looped: ReadonlyMap<string, CellProblem> = new Map();
  private numbers: ReadonlyMap<string, string> = new Map();
  private graph: Graph = buildGraph([]);
  private columns: Columns;
  private lookups: Lookup[] = [];
  private listed: readonly CellProblem[] | undefined;

  /** Nodes to run, marked at their place in the order; those that ran last; those whose state moved. */
  private stale = new Uint8Array(0);
  private ranNodes = new Int32Array(0);
  private ranCount = 0;
  private moved = new Uint8Array(0);
  private before = new Float64Array(stretch);
  private outdated = new Uint8Array(0);
  private plan: Plan = makePlan([], buildGraph([]), new Columns(1));

  constructor(sheet: Sheet) {
    this.sheet = { ...sheet, cells: [] };
    this.columns = new Columns(1);
    this.lookups = [this.makeLookup(0)];
    this.update(sheet);
  }

  get digits(): number {
    return this.sheet.settings?.digits ?? 4;
  }

  get ran(): readonly string[] {
    return Array.from(this.ranNodes.subarray(0, this.ranCount), (index) => this.nodes[index]!.cell.id);
  }

  update(next: Sheet): Changed {
    const previous = this.sheet;
    this.sheet = next;
    this.listed = undefined;
    this.ranCount = 0;
    const decimalSign = next.settings?.decimalSign ?? '.';
    const cases = next.cases !== undefined && next.cases.length > 0 ? next.cases : defaultCases;
    const sameCases = cases.length === this.cases.length && cases.every((one, index) => one.id === this.cases[index]!.id);
    const sameSign = decimalSign === this.style.decimalSign;
    const sameRows =
      sameCases && sameSign && next.cells.length === previous.cells.length && next.cells.every((cell, index) => cell.id === this.nodes[index]?.cell.id);
    this.cases = cases;
    this.style = { decimalSign };
    this.moved.fill(0);
    if (sameRows && this.updateNumbersOnly(next)) return this.changed();
    this.updateShape(next, sameCases && sameSign, sameRows);
    return this.changed();
  }

  // ---- numbers only ----

  /** True when every change was one of numbers, titles or sources; false leaves the nodes that were read marked as changed. */
  private updateNumbersOnly(next: Sheet): boolean {
    const touched: Node[] = [];
    for (let index = 0; index < this.nodes.length; index += 1) {
      const node = this.nodes[index]!;
      const cell = next.cells[index]!;
      if (cell === node.cell) continue;
      if (!sameMeaningBesidesNumbers(node.cell, cell)) return false;
      touched.push(node);
    }
    const keys: string[] = [];
    for (const node of touched) {
      const cell = next.cells[node.index]!;
      keys.push(typeKey(node));
      node.cell = cell;
      node.reading = readCell(cell, this.style.decimalSign);
      node.snapshot = undefined;
      this.moved[node.index] = 1;
      if (cell.kind === 'given') analyse(node, this.around());
    }
    if (touched.some((node, at) => typeKey(node) !== keys[at])) {
      for (const node of touched) this.pending.add(node);
      return false;
    }
    for (const node of touched) if (node.cell.kind === 'given') this.stale[this.graph.place[node.index]!] = 1;
    this.run();
    return true;
  }

  /** Nodes that took their new cell already when the shape turned out to move: the next step takes them as changed. */
  private readonly pending = new Set<Node>();

  // ---- shape ----

  private updateShape(next: Sheet, sameReading: boolean, sameRows: boolean): void {
    const retyped = new Set(this.pending);
    this.pending.clear();
    const taken = this.takeCells(next, sameReading, retyped);
    const stale = taken.fresh;
    const renumbered = !sameRows || taken.headings;
    const retold = renumbered ? this.renumber(next, stale) : [];
    const names = !sameRows || taken.named ? this.resolve(stale) : new Set<string>();
    this.relink(stale, names, sameRows);
    if (!sameRows) {
      this.stale = new Uint8Array(this.nodes.length);
      this.moved = new Uint8Array(this.nodes.length);
      this.ranNodes = new Int32Array(this.nodes.length);
      this.outdated = new Uint8Array(this.nodes.length);
    }
    for (const node of taken.restyled) this.moved[node.index] = 1;
    if (!sameReading || this.columns.wasteful) {
      this.columns = new Columns(this.cases.length);
      for (const node of this.nodes) stale.add(node);
      this.lookups = this.cases.map((_, index) => this.makeLookup(index));
      this.before = new Float64Array(stretch * this.cases.length);
    }
    for (const node of taken.removed) this.columns.forget(node);
    this.analyseStale(stale, retyped);
    this.columns.build();
    this.plan = makePlan(this.nodes, this.graph, this.columns);
    this.run();
    for (const node of retold) if (this.byId.get(node.cell.id) === node && node.failed.length > 0) this.explainCases(node);
  }

  /** Matches nodes with the cells of the next sheet and reads what is new. */
  private takeCells(next: Sheet, sameReading: boolean, retyped: ReadonlySet<Node>) {
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
        node = newNode(cell, readCell(cell, this.style.decimalSign), index);
        fresh.add(node);
        named = true;
      } else if (node.cell !== cell || !sameReading) {
        const alike = sameReading && cell.kind !== 'given' && sameMeaningBesidesNumbers(node.cell, cell);
        const oldName = definedName(node);
        if (cell.kind === 'heading') headings = true;
        node.cell = cell;
        node.reading = readCell(cell, this.style.decimalSign);
        node.snapshot = undefined;
        if (alike) restyled.push(node);
        else fresh.add(node);
        if (definedName(node) !== oldName) named = true;
      }
      if (cell.kind === 'table' && fresh.has(node)) node.table = readTable(cell, this.style.decimalSign).data;
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
  private renumber(next: Sheet, stale: Set<Node>): readonly Node[] {
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
  private resolve(stale: Set<Node>): Set<string> {
    const before = this.names;
    const twiceBefore = this.twice;
    const resolved = resolveNames(this.nodes, (cell) => this.numberOf(cell));
    this.names = resolved;
    this.twice = resolved.twice;
    for (const node of this.nodes) {
      if (twiceBefore.get(node.cell.id)?.message !== this.twice.get(node.cell.id)?.message || misspelt(node, resolved)) stale.add(node);
    }
    const changed = new Set<string>();
    for (const [old, now] of [[before.quantities, resolved.quantities], [before.tables, resolved.tables]] as const) {
      for (const [name, node] of now) if (old.get(name) !== node) changed.add(name);
      for (const name of old.keys()) if (!now.has(name)) changed.add(name);
    }
    return changed;
  }

  /** Who uses whom, and in which order. */
  private relink(stale: Set<Node>, names: ReadonlySet<string>, sameRows: boolean): void {
    let linksMoved = !sameRows;
    for (const node of this.nodes) {
      if (!stale.has(node) && !(names.size > 0 && reachesFor(node, names))) continue;
      const used = usedNodes(node, this.names);
      if (sameNodes(used, node.uses)) continue;
      node.uses = used;
      stale.add(node);
      linksMoved = true;
    }
    if (!linksMoved) return;
    const before = this.looped;
    this.graph = buildGraph(this.nodes.map((node) => node.uses.map((used) => used.index)));
    this.looped = this.describeLoops();
    if (before.size === 0 && this.looped.size === 0) return;
    for (const node of this.nodes) {
      if (before.get(node.cell.id)?.message !== this.looped.get(node.cell.id)?.message) stale.add(node);
    }
  }

  /** `retyped`: analysed already by the step before, so that whoever uses them must follow in any case. */
  private analyseStale(stale: Set<Node>, retyped: ReadonlySet<Node>): void {
    const around = this.around();
    const { order, userStart, userList } = this.graph;
    for (let place = 0; place < order.length; place += 1) {
      const node = this.nodes[order[place]!]!;
      if (!stale.has(node)) continue;
      const key = typeKey(node);
      analyse(node, around);
      node.failed = [];
      node.warned = [];
      node.snapshot = undefined;
      this.moved[node.index] = 1;
      this.columns.place(node, this.names);
      this.stale[place] = 1;
      if (typeKey(node) === key && node.cell.kind !== 'table' && !retyped.has(node)) continue;
      for (let edge = userStart[node.index]!; edge < userStart[node.index + 1]!; edge += 1) stale.add(this.nodes[userList[edge]!]!);
    }
  }

  private around(): Surroundings {
    return {
      names: this.names,
      cases: this.cases,
      numberOf: (cell) => this.numbers.get(cell) ?? '',
      twice: this.twice,
      looped: this.looped,
      decimalSign: this.style.decimalSign,
    };
  }

  private describeLoops(): ReadonlyMap<string, CellProblem> {
    const problems = new Map<string, CellProblem>();
    for (let index = 0; index < this.nodes.length; index += 1) {
      const loop = this.graph.loopOf[index]!;
      if (loop < 0) continue;
      const node = this.nodes[index]!;
      const path = this.graph.loops[loop]!.map((member) => this.nodes[member]!);
      const shown = path.slice(0, 8).map((member) => {
        const number = this.numbers.get(member.cell.id);
        return `${member.name ?? member.cell.id}${number === undefined ? '' : ` (${number})`}`;
      });
      const rest = path.length > 8 ? ` → … ${path.length - 8} more` : '';
      const message =
        path.length === 1
          ? `${shown[0]} is defined by itself; make it a sought cell with an equation, or name the value on the right differently`
          : `${shown.join(' → ')}${rest} → ${path[0]!.name ?? path[0]!.cell.id} use each other in a loop; break it, or make one of them a sought cell with an equation`;
      problems.set(node.cell.id, { code: 'loop', severity: 'error', message, cell: node.cell.id, field: 'formula' });
    }
    return problems;
  }

  // ---- running ----

  /** Runs the stale nodes in order, and whoever uses a number that moved. */
  private run(): void {
    const { order } = this.graph;
    const { plan, stale } = this;
    const places = order.length;
    for (let at = 0; at < places; at += 1) {
      if (stale[at] === 0) continue;
      if (plan.mode[at] === mode.formula) {
        at = this.runStretch(at);
        continue;
      }
      stale[at] = 0;
      if (plan.mode[at] === mode.careful) this.runCarefully(at);
    }
  }

  /** Runs stale formulas from place `at` on, as many as stand side by side in the code; returns the last place run. */
  private runStretch(at: number): number {
    const { plan, stale, columns, before } = this;
    const width = columns.width;
    const { memory, program } = columns;
    let last = at;
    if (plan.watched[at] === 0) {
      const most = Math.min(stale.length, at + stretch);
      while (last + 1 < most && stale[last + 1] === 1 && plan.mode[last + 1] === mode.formula && plan.watched[last + 1] === 0 && plan.start[last + 1] === plan.end[last]) {
        last += 1;
      }
    }
    for (let place = at; place <= last; place += 1) {
      const from = plan.slot[place]! * width;
      const keep = (place - at) * width;
      for (let entry = 0; entry < width; entry += 1) before[keep + entry] = memory[from + entry]!;
    }
    run(program, memory, width, width, plan.start[at], plan.end[last]);
    let trouble = 0;
    for (let k = 0; k < plan.watched[at]! * width; k += 1) trouble += memory[program.watchBase * width + k]! * 0;
    for (let place = at; place <= last; place += 1) {
      stale[place] = 0;
      const from = plan.slot[place]! * width;
      const keep = (place - at) * width;
      let moved = false;
      for (let entry = 0; entry < width; entry += 1) {
        const is = memory[from + entry]!;
        trouble += is * 0;
        if (is !== before[keep + entry]) moved = true;
      }
      if (trouble !== 0) {
        // Back to what stood there, so that the careful way sees what moved; the rest of the stretch runs again after it.
        for (let later = place; later <= last; later += 1) {
          stale[later] = 1;
          const slot = plan.slot[later]! * width;
          for (let entry = 0; entry < width; entry += 1) memory[slot + entry] = before[(later - at) * width + entry]!;
        }
        stale[place] = 0;
        this.runCarefully(place);
        return place;
      }
      this.ranNodes[this.ranCount] = this.graph.order[place]!;
      this.ranCount += 1;
      if (moved) this.spread(place);
    }
    return last;
  }

  private runCarefully(at: number): void {
    const { columns, before } = this;
    const index = this.graph.order[at]!;
    const node = this.nodes[index]!;
    const entries = columns.slotsOf(node) * columns.width;
    const first = this.plan.slot[at]! * columns.width;
    for (let entry = 0; entry < entries; entry += 1) before[entry] = columns.memory[first + entry]!;
    this.compute(node);
    if (node.failed.length > 0) this.plan.mode[at] = mode.careful;
    if (!node.broken) {
      this.ranNodes[this.ranCount] = index;
      this.ranCount += 1;
    }
    for (let entry = 0; entry < entries; entry += 1) {
      const was = before[entry]!;
      const is = columns.memory[first + entry]!;
      if (was !== is && !(Number.isNaN(was) && Number.isNaN(is))) {
        this.spread(at);
        return;
      }
    }
  }

  /** The number at a place moved: its state is out of date, and whoever uses it is stale. */
  private spread(at: number): void {
    const { order, place, userStart, userList } = this.graph;
    const index = order[at]!;
    this.moved[index] = 1;
    this.outdated[index] = 1;
    for (let edge = userStart[index]!; edge < userStart[index + 1]!; edge += 1) {
      const user = place[userList[edge]!]!;
      if (user > at) this.stale[user] = 1; // within a loop nothing runs anyway
    }
  }

  private compute(node: Node): void {
    if (node.cell.kind === 'given') {
      this.columns.writeGiven(node);
      return;
    }
    if (computedFormulas(node).length === 0) return;
    if (node.broken) {
      this.columns.clear(node);
      return;
    }
    const clean = this.columns.run(node);
    if (clean && node.failed.length === 0 && !node.jumps && !lacksText(node)) return;
    this.explainCases(node);
  }

  /** Case by case, in doubles: what failed and why, or the value where only an untaken branch failed. */
  private explainCases(node: Node): void {
    const failed: (CellProblem | undefined)[] = [];
    const warned: CellProblem[] = [];
    for (let index = 0; index < this.cases.length; index += 1) {
      const lookup = this.lookups[index]!;
      for (const [side, formula] of computedFormulas(node).entries()) {
        if (formula === undefined) continue;
        const field = node.cell.kind === 'criterion' ? (side === 0 ? 'left' : 'right') : 'formula';
        const locate = (problem: Problem): CellProblem => ({ ...problem, cell: node.cell.id, case: this.cases[index]!.id, field });
        const result = explain(formula.expr, lookup);
        const value = result.ok ? result.value : Number.NaN;
        if (!result.ok) {
          const missing = node.uses.find((used) => formula.names.includes(used.name ?? '') && !this.hasValue(used, index));
          const waits = missing !== undefined && (result.problem.code === 'no-value' || result.problem.code === 'no-text');
          failed[index] ??= locate(waits ? waitsFor(missing, this.around()) : result.problem);
        }
        this.columns.write(node, side, index, value);
        for (const warning of result.warnings) {
          if (!warned.some((known) => known.message === warning.message && known.field === field)) warned.push({ ...warning, cell: node.cell.id, field });
        }
      }
    }
    node.failed = failed;
    node.warned = warned;
    node.snapshot = undefined;
    this.moved[node.index] = 1;
  }

  private hasValue(node: Node, caseIndex: number): boolean {
    if (node.cell.kind === 'table') return node.table !== undefined;
    return node.texts !== undefined ? node.texts[caseIndex] !== undefined : !Number.isNaN(this.columns.read(node, 0, caseIndex));
  }

  // ---- looking ----

  private changed(): Changed {
    const { moved, nodes, byId } = this;
    return {
      get size() {
        let count = 0;
        for (const mark of moved) count += mark;
        return count;
      },
      has: (cell) => {
        const node = byId.get(cell);
        return node !== undefined && moved[node.index] === 1;
      },
      *[Symbol.iterator]() {
        for (const node of nodes) if (moved[node.index] === 1) yield node.cell.id;
      },
    };
  }

  state(cell: string): CellState | undefined {
    const node = this.byId.get(cell);
    return node && this.snapshot(node);
  }

  private snapshot(node: Node): CellState {
    if (this.outdated[node.index] === 1) {
      node.snapshot = undefined;
      this.outdated[node.index] = 0;
    }
    node.snapshot ??= snapshotOf(node, this.columns, (cell) => this.numberOf(cell));
    return node.snapshot;
  }

  named(name: string): QuantityState | undefined {
    const node = this.names.quantities.get(name);
    const state = node && this.snapshot(node);
    return state?.kind === 'given' || state?.kind === 'derived' || state?.kind === 'sought' ? state : undefined;
  }

  table(name: string): TableState | undefined {
    const node = this.names.tables.get(name);
    const state = node && this.snapshot(node);
    return state?.kind === 'table' ? state : undefined;
  }

  numberOf(cell: string): string {
    return this.numbers.get(cell) ?? '';
  }

  origin(cell: string): readonly string[] {
    return this.byId.get(cell)?.uses.map((used) => used.cell.id) ?? [];
  }

  use(cell: string): readonly string[] {
    const node = this.byId.get(cell);
    if (node === undefined) return [];
    const { userStart, userList } = this.graph;
    return Array.from(userList.subarray(userStart[node.index]!, userStart[node.index + 1]!), (user) => this.nodes[user]!.cell.id);
  }

  problems(): readonly CellProblem[] {
    this.listed ??= this.nodes.flatMap((node) => this.snapshot(node).problems);
    return this.listed;
  }

  lookup(caseIndex: number): Lookup {
    return this.lookups[caseIndex]!;
  }

  private makeLookup(caseIndex: number): Lookup {
    return {
      value: (name) => {
        const node = this.names.quantities.get(name);
        return node === undefined || node.texts !== undefined ? Number.NaN : this.columns.read(node, 0, caseIndex);
      },
      text: (name) => this.names.quantities.get(name)?.texts?.[caseIndex],
      table: (name) => this.names.tables.get(name)?.table,
      unit: (name) => this.names.quantities.get(name)?.unit,
      decimalSign: this.style.decimalSign,
    };
  }

  whatIf(request: WhatIfRequest): WhatIf {
    return prepareWhatIf(request, { nodes: this.nodes, names: this.names, graph: this.graph, columns: this.columns, byId: this.byId, cases: this.cases, lookup: (index) => this.lookups[index]! });
  }
}

function definedName(node: Node): string | undefined {
  return node.cell.kind === 'table' ? node.cell.name : node.reading.name;
}

function reachesFor(node: Node, names: ReadonlySet<string>): boolean {
  const { formulas, mentions, choices } = node.reading;
  return (
    formulas.some((formula) => formula?.names.some((name) => names.has(name)) || formula?.tables.some((name) => names.has(name))) ||
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
    node.reading.formulas.some((formula) => formula?.names.some((name) => !names.quantities.has(name)) || formula?.tables.some((name) => !names.tables.has(name))) ||
    node.reading.mentions.some((live) => !names.quantities.has(live.name)) ||
    (node.reading.choices !== undefined && !names.tables.has(node.reading.choices.table))
  );
}

/** A choice without a text compares as a number would: only the exact walk tells. */
function lacksText(node: Node): boolean {
  return node.usesTexts && node.uses.some((used) => used.texts?.includes(undefined));
}

/** Cells that differ in values, titles, sources … but not in names, formulas, units or rows. */
function sameMeaningBesidesNumbers(a: Node['cell'], b: Node['cell']): boolean {
  if (a.kind === 'given' && b.kind === 'given') return a.name === b.name && a.unit === b.unit && a.choices === b.choices;
  if (a.kind === 'derived' && b.kind === 'derived') return a.name === b.name && a.unit === b.unit && a.formula === b.formula;
  if (a.kind === 'criterion' && b.kind === 'criterion') {
    return a.left === b.left && a.relation === b.relation && a.right === b.right && a.unit === b.unit;
  }
  if (a.kind === 'heading' && b.kind === 'heading') return (a.level ?? 1) === (b.level ?? 1);
  if (a.kind === 'note' && b.kind === 'note') {
    const before = liveNames(a);
    const after = liveNames(b);
    return before.length === after.length && before.every((live, index) => live.text === after[index]!.text);
  }
  return a.kind === 'figure' && b.kind === 'figure';
}
