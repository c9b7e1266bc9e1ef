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

import type { Lookup } from '../formula/index.ts';
import type { Problem } from '../quantity/index.ts';
import { analyse } from './analyse.ts';
import { analyseEquation } from './analyse-sought.ts';
import { casesOf } from './cases.ts';
import type { Cell, LoadCase, Sheet } from './document.ts';
import { type Node, typeKey } from './node.ts';
import { type DecimalSign, readCell } from './reading.ts';
import { Runner } from './runner.ts';
import { snapshotOf } from './snapshot.ts';
import { type Solver, solveSought } from './sought.ts';
import type { CellProblem, CellState, QuantityState, TableState } from './state.ts';
import { Structure, sameMeaningBesidesNumbers } from './structure.ts';
import type { Surroundings } from './surroundings.ts';
import { prepareWhatIf, type Surface, type WhatIf, type WhatIfRequest } from './whatif.ts';

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

/** Reads and calculates a sheet; sought cells want a solver (src/study) and stay without a value where there is none. Never throws for what a sheet says. */
export function calculate(sheet: Sheet, solver?: Solver): Calculation {
  return new Engine(sheet, solver);
}

class Engine implements Calculation {
  sheet: Sheet;
  cases: readonly LoadCase[];
  style: { readonly decimalSign: DecimalSign };
  private readonly shape = new Structure();
  private readonly runner: Runner;
  private lookups: readonly Lookup[];
  private listed: readonly CellProblem[] | undefined;
  /** Nodes that took their new cell already when the shape turned out to move: the next step takes them as changed. */
  private readonly pending = new Set<Node>();

  constructor(sheet: Sheet, solver: Solver | undefined) {
    const empty: Sheet = { format: sheet.format, title: '', cells: [] };
    this.sheet = empty;
    this.cases = casesOf(empty);
    this.style = { decimalSign: '.' };
    this.lookups = [this.makeLookup(0)];
    this.runner = new Runner({
      numberOf: (cell) => this.numberOf(cell),
      caseId: (index) => this.cases[index]!.id,
      lookup: (index) => this.lookups[index]!,
      solve: (node, index) =>
        solver === undefined ? { ok: false, problem: noSolver } : solveSought(node, index, this.surface(), solver, this.digits),
    });
    this.update(sheet);
  }

  get digits(): number {
    return this.sheet.settings?.digits ?? 4;
  }

  get ran(): readonly string[] {
    return this.runner.ran;
  }

  update(next: Sheet): Changed {
    const decimalSign = next.settings?.decimalSign ?? '.';
    const cases = casesOf(next);
    const sameReading =
      decimalSign === this.style.decimalSign &&
      cases.length === this.cases.length &&
      cases.every((one, index) => one.id === this.cases[index]!.id);
    const changed = sameReading ? changedRows(this.sheet.cells, next.cells) : undefined;
    const sameRows = changed !== undefined;
    this.sheet = next;
    this.cases = cases;
    this.style = { decimalSign };
    this.listed = undefined;
    this.runner.begin();
    if (!(sameRows && this.updateNumbers(next, changed))) this.updateShape(next, sameReading, sameRows);
    return this.changed();
  }

  /** True when every change was one of numbers, titles or sources; false leaves the rest to updateShape. */
  private updateNumbers(next: Sheet, changed: readonly number[]): boolean {
    const { nodes, graph } = this.shape;
    const touched = changed.map((index) => nodes[index]!);
    if (!touched.every((node) => sameMeaningBesidesNumbers(node.cell, next.cells[node.index]!))) return false;
    const keys: string[] = [];
    for (const node of touched) {
      const cell = next.cells[node.index]!;
      keys.push(typeKey(node));
      node.cell = cell;
      node.reading = readCell(cell, this.style.decimalSign);
      node.snapshot = undefined;
      this.runner.moved[node.index] = 1;
      if (cell.kind === 'given') analyse(node, this.around());
    }
    if (touched.some((node, at) => typeKey(node) !== keys[at])) {
      for (const node of touched) this.pending.add(node);
      return false;
    }
    for (const node of touched) if (node.cell.kind === 'given') this.runner.stale[graph.place[node.index]!] = 1;
    this.runner.run();
    return true;
  }

  private updateShape(next: Sheet, sameReading: boolean, sameRows: boolean): void {
    const { shape, runner } = this;
    const retyped = new Set(this.pending);
    this.pending.clear();
    // The marks are laid anew with the rows; what they said of states that nobody has looked at since is kept.
    if (!sameRows) for (const node of shape.nodes) if (runner.outdated[node.index] === 1) node.snapshot = undefined;
    const taken = shape.takeCells(next, this.style.decimalSign, sameReading, retyped);
    const stale = taken.fresh;
    const retold = !sameRows || taken.headings ? shape.renumber(next, stale) : [];
    const names = !sameRows || taken.named ? shape.resolve(stale) : new Set<string>();
    shape.relink(stale, names, sameRows);
    if (!sameRows) runner.resize(shape.nodes.length);
    for (const node of taken.restyled) runner.moved[node.index] = 1;
    for (const node of shape.noteInterpolated()) runner.moved[node.index] = 1;
    if (!sameReading || runner.columns.wasteful) {
      runner.startOver(this.cases.length);
      for (const node of shape.nodes) stale.add(node);
      this.lookups = this.cases.map((_, index) => this.makeLookup(index));
    }
    for (const node of taken.removed) runner.columns.forget(node);
    this.analyseStale(stale, retyped);
    this.checkEquations(stale);
    runner.prepare(shape.nodes, shape.graph);
    runner.run();
    for (const node of retold) if (shape.byId.get(node.cell.id) === node && node.failed.length > 0) runner.explainCases(node);
  }

  /** In order; whoever uses a cell whose type moved follows. `retyped`: analysed already, their users follow in any case. */
  private analyseStale(stale: Set<Node>, retyped: ReadonlySet<Node>): void {
    const { nodes, names } = this.shape;
    const { order, userStart, userList } = this.shape.graph;
    const around = this.around();
    for (let place = 0; place < order.length; place += 1) {
      const node = nodes[order[place]!]!;
      if (!stale.has(node)) continue;
      const key = typeKey(node);
      analyse(node, around);
      node.failed = [];
      node.warned = [];
      node.snapshot = undefined;
      this.runner.moved[node.index] = 1;
      this.runner.columns.place(node, names);
      this.runner.stale[place] = 1;
      if (typeKey(node) === key && node.cell.kind !== 'table' && !retyped.has(node)) continue;
      for (let edge = userStart[node.index]!; edge < userStart[node.index + 1]!; edge += 1) stale.add(nodes[userList[edge]!]!);
    }
  }

  /** Equations of sought cells, now that every cell that they reach for has its type. */
  private checkEquations(stale: ReadonlySet<Node>): void {
    for (const node of this.shape.nodes) {
      if (node.cell.kind !== 'sought' || ![node, ...node.direct, ...node.between].some((other) => stale.has(other))) continue;
      analyseEquation(node, this.around());
      node.snapshot = undefined;
      this.runner.moved[node.index] = 1;
      this.runner.stale[this.shape.graph.place[node.index]!] = 1;
    }
  }

  private around(): Surroundings {
    const { names, twice, looped } = this.shape;
    return {
      names,
      cases: this.cases,
      numberOf: (cell) => this.numberOf(cell),
      twice,
      looped,
      decimalSign: this.style.decimalSign,
    };
  }

  private changed(): Changed {
    const { nodes, byId } = this.shape;
    const { moved } = this.runner;
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
    const node = this.shape.byId.get(cell);
    return node && this.snapshot(node);
  }

  private snapshot(node: Node): CellState {
    if (this.runner.outdated[node.index] === 1) {
      node.snapshot = undefined;
      this.runner.outdated[node.index] = 0;
    }
    node.snapshot ??= snapshotOf(
      node,
      this.runner.columns,
      (cell) => this.numberOf(cell),
      (index) => this.cases[index]!.id,
    );
    return node.snapshot;
  }

  named(name: string): QuantityState | undefined {
    const node = this.shape.names.quantities.get(name);
    const state = node && this.snapshot(node);
    return state?.kind === 'given' || state?.kind === 'derived' || state?.kind === 'sought' ? state : undefined;
  }

  table(name: string): TableState | undefined {
    const node = this.shape.names.tables.get(name);
    const state = node && this.snapshot(node);
    return state?.kind === 'table' ? state : undefined;
  }

  numberOf(cell: string): string {
    return this.shape.numberOf(cell);
  }

  origin(cell: string): readonly string[] {
    const node = this.shape.byId.get(cell);
    return (node?.cell.kind === 'sought' ? node.direct : node?.uses)?.map((used) => used.cell.id) ?? [];
  }

  use(cell: string): readonly string[] {
    const node = this.shape.byId.get(cell);
    if (node === undefined) return [];
    const { userStart, userList } = this.shape.graph;
    return Array.from(
      userList.subarray(userStart[node.index]!, userStart[node.index + 1]!),
      (user) => this.shape.nodes[user]!.cell.id,
    );
  }

  problems(): readonly CellProblem[] {
    this.listed ??= this.shape.nodes.flatMap((node) => this.snapshot(node).problems);
    return this.listed;
  }

  lookup(caseIndex: number): Lookup {
    return this.lookups[caseIndex]!;
  }

  private makeLookup(caseIndex: number): Lookup {
    return {
      value: (name) => {
        const node = this.shape.names.quantities.get(name);
        return node === undefined || node.texts !== undefined ? Number.NaN : this.runner.columns.read(node, 0, caseIndex);
      },
      text: (name) => this.shape.names.quantities.get(name)?.texts?.[caseIndex],
      table: (name) => this.shape.names.tables.get(name)?.table,
      unit: (name) => this.shape.names.quantities.get(name)?.unit,
      decimalSign: this.style.decimalSign,
    };
  }

  whatIf(request: WhatIfRequest): WhatIf {
    return prepareWhatIf(request, this.surface());
  }

  private surface(): Surface {
    const { nodes, names, graph, byId } = this.shape;
    return {
      nodes,
      names,
      graph,
      byId,
      columns: this.runner.columns,
      style: this.style,
      lookup: (index) => this.lookups[index]!,
    };
  }
}

/** Rows whose cell is another object than before; undefined where rows came, went or moved. Looks at no cell that stayed. */
function changedRows(before: readonly Cell[], after: readonly Cell[]): readonly number[] | undefined {
  if (before.length !== after.length) return undefined;
  const changed: number[] = [];
  for (let index = 0; index < after.length; index += 1) {
    if (after[index] === before[index]) continue;
    if (after[index]!.id !== before[index]!.id) return undefined;
    changed.push(index);
  }
  return changed;
}

const noSolver: Problem = {
  code: 'not-solved',
  severity: 'warning',
  message: 'this value is kept and shown, but not solved for here',
};
