// Runs a compiled program over samples, block by block: from columns of inputs to columns of what is wanted.
//
// 1. The memory holds a home column of one block for every slot; behind them lie the wanted columns in full length, and whole
//    blocks of results are computed right there.
// 2. A block with trouble in it, and one that is not full, are computed in the home columns and copied.
// 3. Only the first call for a count allocates columns; the next call writes to them again.
// Not here: what is computed (whatif.ts), what an entry without a value means (Step.settle).

import { finiteFrom, inOrder, makeMemory, type Program, type Range, run, runAt } from '../formula/index.ts';

/** Entries of a block; of a call for a few samples, as a solver makes them. */
const full = 512;
const few = 4;

export interface Sampling {
  readonly program: Program;
  readonly ranges: readonly Range[];
  readonly inputs: readonly number[];
  readonly outputs: readonly number[];
  /** Slots that are looked over: where all of them are finite, every range has a value. */
  readonly checked: readonly number[];
  readonly constants: readonly { readonly slot: number; readonly value: number }[];
  /** Sets right the entries of a range that has just run and is not in order. */
  settle(memory: Float64Array, width: number, range: number, count: number): void;
}

export type Sampler = (samples: readonly Float64Array[], count: number) => readonly Float64Array[];

export function makeSampler(sampling: Sampling): Sampler {
  const { program, ranges, inputs, outputs, checked } = sampling;
  const results = new Set(ranges.map((range) => range.dest));
  // A result wanted twice is computed in the first of its columns and copied to the others.
  const own = outputs.map((slot, at) => results.has(slot) && outputs.indexOf(slot) === at);
  const starts = new Int32Array(program.slots);
  const checkedStarts = new Int32Array(checked.length);
  let width = 0;
  let memory: Float64Array = new Float64Array(0);
  let columns: readonly Float64Array[] = [];
  let capacity = 0;

  const reserve = (count: number): void => {
    width = count <= few ? few : full;
    capacity = count;
    const home = program.slots * width;
    memory = makeMemory(program, width, outputs.length * count);
    for (const { slot, value } of sampling.constants) memory.fill(value, slot * width, (slot + 1) * width);
    columns = outputs.map((_, at) => memory.subarray(home + at * count, home + (at + 1) * count));
  };

  const atHome = (): void => {
    for (let slot = 0; slot < starts.length; slot += 1) starts[slot] = slot * width;
  };

  const atResults = (start: number): void => {
    const home = program.slots * width;
    for (let at = 0; at < outputs.length; at += 1) if (own[at]) starts[outputs[at]!] = home + at * capacity + start;
  };

  const allInOrder = (count: number): boolean => {
    for (let at = 0; at < checked.length; at += 1) checkedStarts[at] = starts[checked[at]!]!;
    return finiteFrom(memory, checkedStarts, count);
  };

  /** Range by range: what comes after one that was settled is computed from its settled entries. */
  const runCarefully = (count: number): void => {
    for (const [at, range] of ranges.entries()) {
      run(program, memory, width, count, range.start, range.end);
      if (!inOrder(memory, width, count, range)) sampling.settle(memory, width, at, count);
    }
  };

  return (samples, count) => {
    if (count > capacity) reserve(count);
    for (let start = 0; start < count; start += width) {
      const size = Math.min(width, count - start);
      for (let input = 0; input < inputs.length; input += 1) {
        memory.set(samples[input]!.subarray(start, start + size), inputs[input]! * width);
      }
      atHome();
      const direct = size === full;
      if (direct) {
        atResults(start);
        runAt(program, memory, starts, size);
      } else run(program, memory, width, size);
      const clean = allInOrder(size);
      if (!clean) {
        atHome();
        runCarefully(size);
      }
      for (let at = 0; at < outputs.length; at += 1) {
        if (direct && clean && own[at]) continue;
        const from = starts[outputs[at]!]!;
        columns[at]!.set(memory.subarray(from, from + size), start);
      }
    }
    return count === capacity ? columns : columns.map((column) => column.subarray(0, count));
  };
}
