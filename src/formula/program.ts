// A compiled program: instructions over columns of one memory.
//
// 1. Slot s is the column memory[s*width .. s*width + width). Slots are given out once and stay: first come quantities and
//    constants in the order of need, last the scratch that every cell uses anew.
// 2. Constants are columns filled once (fillConstants); their first entry is what the K-operations read.
// 3. `watched` scratch holds, after a cell's range has run, the operands in which an infinity or NaN could have vanished:
//    the cell is in order exactly where its destination and its watched columns are finite.
// Not here: compiling (compile.ts), running (run.ts).

export interface ProgramTable {
  readonly keys: Float64Array;
  readonly values: Float64Array;
  /** +1 rising, −1 falling keys; 0 where there is nothing to interpolate between. */
  readonly direction: 1 | -1 | 0;
}

/** The instructions of one formula: [start, end) in `code`, and how many watched columns it leaves. */
export interface Range {
  readonly start: number;
  readonly end: number;
  readonly dest: number;
  readonly watched: number;
}

export interface Program {
  readonly code: Int32Array;
  readonly slots: number;
  /** First watched slot; the watched columns of a range are watchBase .. watchBase + range.watched. */
  readonly watchBase: number;
  readonly constants: readonly { readonly slot: number; readonly value: number }[];
  readonly tables: readonly ProgramTable[];
}

/** Memory for `width` entries a column, constants filled in. */
export function makeMemory(program: Program, width: number): Float64Array {
  const memory = new Float64Array(program.slots * width);
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

/** Whether a range that has just run is in order in all of the first `count` entries. */
export function inOrder(program: Program, memory: Float64Array, width: number, count: number, range: Range): boolean {
  return (
    allFinite(memory, width, count, range.dest, range.dest + 1) &&
    (range.watched === 0 || allFinite(memory, width, count, program.watchBase, program.watchBase + range.watched))
  );
}

/**
 * Marks with 1 the entries in which a range that has just run is not in order; entries already marked stay.
 * `flags` has at least `count` entries.
 */
export function markTrouble(program: Program, memory: Float64Array, width: number, count: number, range: Range, flags: Uint8Array): void {
  if (inOrder(program, memory, width, count, range)) return;
  for (let i = 0; i < count; i++) {
    let trouble = memory[range.dest * width + i]! * 0;
    for (let k = 0; k < range.watched; k++) trouble += memory[(program.watchBase + k) * width + i]! * 0;
    if (trouble !== 0) flags[i] = 1;
  }
}
