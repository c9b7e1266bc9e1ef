// Every operation by its number: a column at once and entry by entry give the same bits.

import fc from 'fast-check';
import { describe, expect, it } from 'vitest';
import { op, stride } from '../../src/formula/opcode.ts';
import { finiteFrom, type Program, type ProgramTable } from '../../src/formula/program.ts';
import { run, runAt } from '../../src/formula/run.ts';

const width = 8;
const constantOperand = new Map<number, 'a' | 'b'>([
  [op.addK, 'b'],
  [op.subtractK, 'b'],
  [op.multiplyK, 'b'],
  [op.divideK, 'b'],
  [op.subtractFromK, 'a'],
  [op.divideIntoK, 'a'],
]);
const lookups = new Set<number>([op.interpolate, op.entryOfNumber, op.entryOfText]);
const tables: readonly ProgramTable[] = [
  { keys: Float64Array.of(-2, 0, 1, 3), values: Float64Array.of(5, 7, 2, 9), direction: 1 },
];
const entries = fc.array(
  fc.oneof(
    { weight: 3, arbitrary: fc.double({ min: -4, max: 4 }) },
    fc.double(),
    fc.constantFrom(0, -0, 1, 3, -2, Number.NaN, Number.POSITIVE_INFINITY, Number.NEGATIVE_INFINITY),
  ),
  { minLength: width, maxLength: width },
);

/** One instruction: column 3 from columns 0, 1 and 2; a lookup has its table instead of column 1. */
function single(operation: number): Program {
  const code = Int32Array.of(operation, 3, 0, lookups.has(operation) ? 0 : 1, 2);
  return { code, slots: 4, columns: 4, constants: [], tables };
}

function memoryOf(operation: number, columns: readonly (readonly number[])[]): Float64Array {
  const memory = new Float64Array(4 * width);
  for (const [at, column] of columns.entries()) memory.set(column, at * width);
  const constant = constantOperand.get(operation);
  if (constant !== undefined) {
    const from = constant === 'a' ? 0 : width;
    // Constants of formulas are finite.
    memory.fill(Number.isFinite(memory[from]) ? memory[from]! : 2, from, from + width);
  }
  return memory;
}

describe('an operation', () => {
  for (const [name, operation] of Object.entries(op)) {
    it(`${name} gives the same bits for a column, for each entry alone, and for columns that lie elsewhere`, () => {
      fc.assert(
        fc.property(fc.tuple(entries, entries, entries), (columns) => {
          const program = single(operation);
          const together = memoryOf(operation, columns);
          run(program, together, width, width);
          const alone = memoryOf(operation, columns);
          for (let entry = 0; entry < width; entry += 1) {
            // One entry at a time: the memory seen from that entry on.
            const from = alone.subarray(entry);
            run(program, from, width, 1);
          }
          const elsewhere = new Float64Array(100).fill(-7);
          const starts = Int32Array.of(61, 20, 41, 5);
          const before = memoryOf(operation, columns);
          for (let slot = 0; slot < 3; slot += 1) elsewhere.set(before.subarray(slot * width, (slot + 1) * width), starts[slot]!);
          runAt(program, elsewhere, starts, width);
          const results = together.subarray(3 * width);
          expect([...alone.subarray(3 * width)]).toEqual([...results]);
          expect([...elsewhere.subarray(5, 5 + width)]).toEqual([...results]);
          expect(elsewhere[4]).toBe(-7);
          expect(elsewhere[5 + width]).toBe(-7);
        }),
        { numRuns: 60, seed: operation + 1 },
      );
    });
  }

  it('has a number of its own, from 0 without a gap', () => {
    expect(Object.values(op).sort((a, b) => a - b)).toEqual(Object.values(op).map((_, at) => at));
    expect(stride).toBe(5);
  });
});

describe('looking over columns', () => {
  it('finds one number that is not finite wherever it stands, and nothing else', () => {
    for (const count of [1, 2, 3, 4, 5, 7, 8, 12]) {
      const starts = Int32Array.of(3, 40);
      for (let at = 0; at < 60; at += 1) {
        for (const value of [Number.NaN, Number.POSITIVE_INFINITY, Number.NEGATIVE_INFINITY]) {
          const memory = new Float64Array(60).fill(1e308);
          memory[at] = value;
          const within = starts.some((start) => at >= start && at < start + count);
          expect(finiteFrom(memory, starts, count)).toBe(!within);
        }
      }
    }
  });
});
