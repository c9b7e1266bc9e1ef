// Running a program: the same instructions for one case, several cases or a million samples.
//
// 1. Nothing is allocated while running.
// 2. Up to `few` entries are computed entry by entry, which spares the loop of each kernel; more by one kernel an instruction.
// 3. Both branches of a choice are computed and one is selected. A result that is not finite means that the formula has no value
//    there; why, tells explain.ts. What an infinite operand could hide is made NaN as kernels.ts says.

import { kernels } from './kernels.ts';
import { op, stride } from './opcode.ts';
import type { Program, ProgramTable } from './program.ts';
import { runOne } from './run-one.ts';

const few = 4;

/** Computes the first `count` entries (at most `width`) of the destinations of the instructions [start, end). */
export function run(
  program: Program,
  memory: Float64Array,
  width: number,
  count: number,
  start = 0,
  end = program.code.length,
): void {
  // Kernels take two entries a turn: an odd one is left.
  const even = count <= few ? 0 : count - (count % 2);
  if (even > 0) runMany(program.code, program.tables, memory, width, even, start, end);
  for (let entry = even; entry < count; entry++) runOne(program.code, program.tables, memory, width, entry, start, end);
}

/**
 * Computes `count` entries, an even number, of the whole program, the column of each slot lying anywhere in the memory:
 * from starts[slot] on. So results can be written where they are wanted.
 */
export function runAt(program: Program, memory: Float64Array, starts: Int32Array, count: number): void {
  const { code, tables } = program;
  for (let at = 0; at < code.length; at += stride) {
    const operation = code[at]!;
    const b = code[at + 3]!;
    kernels[operation]!(
      memory,
      starts[code[at + 1]!]!,
      starts[code[at + 2]!]!,
      isLookup(operation) ? b : starts[b]!,
      starts[code[at + 4]!]!,
      count,
      tables,
    );
  }
}

function isLookup(operation: number): boolean {
  return operation >= op.interpolate && operation <= op.entryOfText;
}

function runMany(
  code: Int32Array,
  tables: readonly ProgramTable[],
  m: Float64Array,
  width: number,
  count: number,
  start: number,
  end: number,
): void {
  for (let at = start; at < end; at += stride) {
    const operation = code[at]!;
    const b = code[at + 3]!;
    kernels[operation]!(
      m,
      code[at + 1]! * width,
      code[at + 2]! * width,
      isLookup(operation) ? b : b * width,
      code[at + 4]! * width,
      count,
      tables,
    );
  }
}
