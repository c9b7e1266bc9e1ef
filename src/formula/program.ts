// A compiled program: instructions over columns of one memory.
//
// 1. Slot s is the column memory[s*width .. s*width + width). Slots are given out once and stay: first come quantities and
//    constants in the order of need, from `columns` on what each range uses for itself.
// 2. Constants are columns filled once (fillConstants); their first entry is what the K-operations read.
// 3. A range has no value in an entry exactly where its destination is not finite: the operations let no trouble vanish.
// Not here: compiling (compile.ts), running (run.ts).

export interface ProgramTable {
  readonly keys: Float64Array;
  readonly values: Float64Array;
  /** +1 rising, −1 falling keys; 0 where there is nothing to interpolate between. */
  readonly direction: 1 | -1 | 0;
}

/** The instructions of one formula: [start, end) in `code`, and the slot of its result. */
export interface Range {
  readonly start: number;
  readonly end: number;
  readonly dest: number;
}

export interface Program {
  readonly code: Int32Array;
  readonly slots: number;
  /** How many of the slots, the first ones, are columns of keys and constants. */
  readonly columns: number;
  readonly constants: readonly { readonly slot: number; readonly value: number }[];
  readonly tables: readonly ProgramTable[];
}

/** Memory for `width` entries a column, constants filled in; `more` entries are left behind the last column. */
export function makeMemory(program: Program, width: number, more = 0): Float64Array {
  const memory = new Float64Array(program.slots * width + more);
  fillConstants(program, memory, width);
  return memory;
}

export function fillConstants(program: Program, memory: Float64Array, width: number): void {
  for (const { slot, value } of program.constants) memory.fill(value, slot * width, (slot + 1) * width);
}

/** Whether the first `count` entries of the columns [fromSlot, toSlot) are all finite. */
export function allFinite(memory: Float64Array, width: number, count: number, fromSlot: number, toSlot: number): boolean {
  // One NaN makes the sum NaN: x·0 is 0 for finite x and NaN for all others.
  let trouble = 0;
  for (let slot = fromSlot; slot < toSlot; slot++) {
    const from = slot * width;
    for (let i = from; i < from + count; i++) trouble += memory[i]! * 0;
  }
  return trouble === 0;
}

/** Whether the first `count` entries of the columns that begin at `starts` are all finite. */
export function finiteFrom(memory: Float64Array, starts: Int32Array, count: number): boolean {
  // Four sums side by side: one alone would wait for itself at every entry.
  let one = 0;
  let two = 0;
  let three = 0;
  let four = 0;
  for (const start of starts) {
    let at = start;
    const end = at + count;
    for (const last = end - 3; at < last; at = (at + 4) | 0) {
      one += memory[at]! * 0;
      two += memory[(at + 1) | 0]! * 0;
      three += memory[(at + 2) | 0]! * 0;
      four += memory[(at + 3) | 0]! * 0;
    }
    for (; at < end; at = (at + 1) | 0) one += memory[at]! * 0;
  }
  return one + two + three + four === 0;
}

/** Whether a range that has just run has a value in each of the first `count` entries. */
export function inOrder(memory: Float64Array, width: number, count: number, range: Range): boolean {
  return allFinite(memory, width, count, range.dest, range.dest + 1);
}

/** Marks with 1 the entries in which a range that has just run has no value; entries already marked stay. */
export function markTrouble(memory: Float64Array, width: number, count: number, range: Range, flags: Uint8Array): void {
  const from = range.dest * width;
  for (let i = 0; i < count; i++) if (memory[from + i]! * 0 !== 0) flags[i] = 1;
}
