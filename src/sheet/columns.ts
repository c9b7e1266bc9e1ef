// The numbers of a calculation: one column a quantity, two a criterion, one entry a case, in one memory.
//
// 1. A cell keeps its column as long as it stands in the sheet; columns of cells that went are given back when the program
//    is made anew, which happens when more than half of it has become waste.
// 2. A value that does not exist is NaN.
// 3. Texts of choices are numbered by the program; the column of a choice holds the number of its text.
// Not here: when to compute what (calculation.ts).

import { inOrder, makeMemory, type Program, ProgramBuilder, type Range, run } from '../formula/index.ts';
import type { Names } from './names.ts';
import { computedFormulas, type Node } from './node.ts';

const empty: Program = { code: new Int32Array(0), slots: 0, columns: 0, constants: [], tables: [] };

export class Columns {
  readonly width: number;
  memory: Float64Array = new Float64Array(0);
  private builder = new ProgramBuilder();
  program: Program = empty;
  private ranges = new Map<Node, readonly Range[]>();
  private slots = new Map<Node, number>();
  private filled = 0;
  private waste = 0;
  private serial = 0;

  constructor(cases: number) {
    this.width = cases;
  }

  /** Number of neighbouring columns of the node: its quantity, or the two sides of a criterion. */
  slotsOf(node: Node): number {
    switch (node.cell.kind) {
      case 'criterion':
        return 2;
      case 'given':
      case 'derived':
      case 'sought':
        return 1;
      default:
        return 0;
    }
  }

  /** First column of the node. */
  slotOf(node: Node): number {
    return this.slots.get(node) ?? 0;
  }

  /** Gives the node its columns and compiles its formulas, after it was analysed. */
  place(node: Node, names: Names): void {
    if (!this.slots.has(node) && this.slotsOf(node) > 0) {
      this.serial += 1;
      this.slots.set(node, this.builder.slotOf(`${this.serial} left`));
      if (this.slotsOf(node) === 2) this.builder.slotOf(`${this.serial} right`);
    }
    const old = this.ranges.get(node);
    if (old) for (const range of old) this.waste += range.end - range.start;
    this.ranges.delete(node);
    const formulas = computedFormulas(node);
    if (node.broken || formulas.length === 0) return;
    this.ranges.set(
      node,
      formulas.map((formula, side) =>
        this.builder.add(formula!.expr, this.slotOf(node) + side, {
          slot: (name) => this.slotOf(names.quantities.get(name)!),
          isText: (name) => names.quantities.get(name)?.texts !== undefined,
          table: (name) => names.tables.get(name)?.table,
          decimalSign: node.reading.decimalSign,
        }),
      ),
    );
  }

  /** Ranges of code of the node's formulas; none while it is broken. */
  rangesOf(node: Node): readonly Range[] | undefined {
    return this.ranges.get(node);
  }

  forget(node: Node): void {
    for (const range of this.ranges.get(node) ?? []) this.waste += range.end - range.start;
    if (this.slots.delete(node)) this.waste += 10;
    this.ranges.delete(node);
  }

  /** True when the program should be made anew: start over with new Columns. */
  get wasteful(): boolean {
    return this.waste > 20_000 && this.waste > this.program.code.length / 2;
  }

  /** Takes up what was placed since the last time: values keep, new columns hold NaN. */
  build(): void {
    this.program = this.builder.build();
    const memory = makeMemory(this.program, this.width);
    const kept = this.filled * this.width;
    const constants = new Set(this.program.constants.map((constant) => constant.slot));
    for (let slot = this.filled; slot < this.program.columns; slot += 1) {
      if (!constants.has(slot)) memory.fill(Number.NaN, slot * this.width, (slot + 1) * this.width);
    }
    memory.set(this.memory.subarray(0, kept));
    this.memory = memory;
    this.filled = this.program.columns;
  }

  /** Runs the formulas of the node; true when every entry is in order. */
  run(node: Node): boolean {
    const ranges = this.ranges.get(node);
    if (ranges === undefined) return false;
    let clean = true;
    for (const range of ranges) {
      run(this.program, this.memory, this.width, this.width, range.start, range.end);
      if (!inOrder(this.memory, this.width, this.width, range)) clean = false;
    }
    return clean;
  }

  writeGiven(node: Node): void {
    const first = this.slotOf(node) * this.width;
    for (let entry = 0; entry < this.width; entry += 1) {
      const text = node.texts?.[entry];
      const value =
        node.texts === undefined ? node.values[entry]?.si : text === undefined ? undefined : this.builder.textNumber(text);
      this.memory[first + entry] = node.broken ? Number.NaN : (value ?? Number.NaN);
    }
  }

  clear(node: Node): void {
    const first = this.slotOf(node) * this.width;
    this.memory.fill(Number.NaN, first, first + this.slotsOf(node) * this.width);
  }

  read(node: Node, side: number, entry: number): number {
    return this.slots.has(node) ? this.memory[(this.slotOf(node) + side) * this.width + entry]! : Number.NaN;
  }

  write(node: Node, side: number, entry: number, value: number): void {
    this.memory[(this.slotOf(node) + side) * this.width + entry] = value;
  }

  copy(node: Node, side: number): Float64Array {
    if (!this.slots.has(node)) return this.empty();
    const first = (this.slotOf(node) + side) * this.width;
    return this.memory.slice(first, first + this.width);
  }

  empty(): Float64Array {
    return new Float64Array(this.width).fill(Number.NaN);
  }
}
