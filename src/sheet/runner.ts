// Runs what is stale, in order: numbers first, and the exact walk where a number is out of order.
//
// 1. A place is run at most once; a result that comes out the same, bit for bit, makes nobody else stale.
// 2. A cell that fails in a case has NaN there and says why; the other cases stand.
// 3. Formulas that stand side by side run as one stretch; a stretch with trouble in it is taken apart cell by cell.
// Not here: what becomes stale by an edit (calculation.ts), the columns themselves (columns.ts).

import { canonicalName, explain, type Formula, type Lookup, run } from '../formula/index.ts';
import type { Problem } from '../quantity/index.ts';
import { Columns } from './columns.ts';
import { buildGraph, type Graph } from './graph.ts';
import { computedFormulas, type Node } from './node.ts';
import { makePlan, mode, type Plan } from './plan.ts';
import type { Solved } from './sought.ts';
import type { CellProblem } from './state.ts';
import { waitsFor } from './surroundings.ts';

export interface World {
  numberOf(cell: string): string;
  caseId(index: number): string;
  lookup(index: number): Lookup;
  solve(node: Node, index: number): Solved;
}

/** Most cells run as one stretch. */
const stretch = 256;

export class Runner {
  columns = new Columns(1);
  /** Nodes to run, marked at their place in the order. */
  stale = new Uint8Array(0);
  /** Nodes whose state moved since the last update began, and those whose snapshot is out of date, by index. */
  moved = new Uint8Array(0);
  outdated = new Uint8Array(0);
  private readonly world: World;
  private nodes: readonly Node[] = [];
  private graph: Graph = buildGraph([]);
  private plan: Plan = makePlan([], this.graph, this.columns);
  private ranNodes = new Int32Array(0);
  private ranCount = 0;
  private before = new Float64Array(stretch);

  constructor(world: World) {
    this.world = world;
  }

  get ran(): readonly string[] {
    return Array.from(this.ranNodes.subarray(0, this.ranCount), (index) => this.nodes[index]!.cell.id);
  }

  begin(): void {
    this.ranCount = 0;
    this.moved.fill(0);
  }

  /** Other rows: marks are laid anew. */
  resize(count: number): void {
    this.stale = new Uint8Array(count);
    this.moved = new Uint8Array(count);
    this.outdated = new Uint8Array(count);
    this.ranNodes = new Int32Array(count);
  }

  /** Other cases, or too much waste: columns from nothing, all of them to be placed again. */
  startOver(cases: number): void {
    this.columns = new Columns(cases);
    this.before = new Float64Array(stretch * cases);
  }

  /** Takes up new code, slots and order. */
  prepare(nodes: readonly Node[], graph: Graph): void {
    this.nodes = nodes;
    this.graph = graph;
    this.columns.build();
    this.plan = makePlan(nodes, graph, this.columns);
  }

  /** Runs the stale nodes in order, and whoever uses a number that moved. */
  run(): void {
    const { plan, stale } = this;
    const places = stale.length;
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
    const most = Math.min(stale.length, at + stretch);
    while (
      last + 1 < most &&
      stale[last + 1] === 1 &&
      plan.mode[last + 1] === mode.formula &&
      plan.start[last + 1] === plan.end[last]
    ) {
      last += 1;
    }
    for (let place = at; place <= last; place += 1) {
      const from = plan.slot[place]! * width;
      const keep = (place - at) * width;
      for (let entry = 0; entry < width; entry += 1) before[keep + entry] = memory[from + entry]!;
    }
    run(program, memory, width, width, plan.start[at], plan.end[last]);
    let trouble = 0;
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
    if (node.broken) {
      this.columns.clear(node);
      node.solutions = [];
      return;
    }
    if (node.cell.kind === 'sought') {
      this.solveCases(node);
      return;
    }
    const clean = this.columns.run(node);
    if (clean && node.failed.length === 0 && !node.jumps && !lacksText(node)) return;
    this.explainCases(node);
  }

  /** Case by case, in doubles: what failed and why, or the value where only an untaken branch failed. */
  explainCases(node: Node): void {
    const failed: (CellProblem | undefined)[] = [];
    const warned: CellProblem[] = [];
    for (let index = 0; index < this.columns.width; index += 1) {
      const lookup = this.world.lookup(index);
      for (const [side, formula] of computedFormulas(node).entries()) {
        if (formula === undefined) continue;
        const field = node.cell.kind === 'criterion' ? (side === 0 ? 'left' : 'right') : 'formula';
        const locate = (problem: Problem): CellProblem => ({
          ...problem,
          cell: node.cell.id,
          case: this.world.caseId(index),
          field,
        });
        const result = explain(formula.expr, lookup);
        const value = result.ok ? result.value : Number.NaN;
        if (!result.ok) {
          const missing = this.missingAt(node, formula, result.problem, index);
          failed[index] ??= locate(missing === undefined ? result.problem : waitsFor(missing, this.world));
        }
        this.columns.write(node, side, index, value);
        for (const warning of result.warnings) {
          if (!warned.some((known) => known.message === warning.message && known.field === field))
            warned.push({ ...warning, cell: node.cell.id, field });
        }
      }
    }
    node.failed = failed;
    node.warned = warned;
    node.snapshot = undefined;
    this.moved[node.index] = 1;
  }

  private solveCases(node: Node): void {
    node.failed = [];
    node.warned = [];
    node.solutions = [];
    const hindered = node.equation.some((problem) => problem.severity === 'error');
    for (let index = 0; index < this.columns.width; index += 1) {
      const solved = hindered ? undefined : this.world.solve(node, index);
      this.columns.write(node, 0, index, solved?.ok ? solved.solution.root : Number.NaN);
      node.solutions[index] = solved?.ok ? solved.solution : undefined;
      const place = { cell: node.cell.id, case: this.world.caseId(index) };
      if (solved?.ok) for (const warning of solved.warnings) node.warned.push({ ...warning, ...place });
      else if (solved) {
        const missing = node.uses.find((used) => !node.between.includes(used) && !isTable(used) && !this.hasValue(used, index));
        node.failed[index] = {
          ...(missing === undefined ? solved.problem : waitsFor(missing, this.world)),
          ...place,
          field: 'where',
        };
      }
    }
    node.snapshot = undefined;
    this.moved[node.index] = 1;
  }

  /** The cell whose missing value the problem is about. */
  private missingAt(node: Node, formula: Formula, problem: Problem, caseIndex: number): Node | undefined {
    if (problem.code !== 'no-value' || problem.at === undefined) return undefined;
    const name = canonicalName(formula.text.slice(problem.at[0], problem.at[1]));
    return node.uses.find((used) => used.name === name && !isTable(used) && !this.hasValue(used, caseIndex));
  }

  private hasValue(node: Node, caseIndex: number): boolean {
    return node.texts !== undefined ? node.texts[caseIndex] !== undefined : !Number.isNaN(this.columns.read(node, 0, caseIndex));
  }
}

const isTable = (node: Node): boolean => node.cell.kind === 'table';

/** A choice without a text compares as a number would: only the exact walk tells. */
function lacksText(node: Node): boolean {
  return node.usesTexts && node.uses.some((used) => used.texts?.includes(undefined));
}
