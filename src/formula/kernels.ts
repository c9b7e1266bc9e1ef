// One loop over columns for each operation.
//
// 1. A kernel fills m[d .. d+n) from m[a .. a+n), m[b .. b+n), m[c .. c+n): offsets into the one memory, not slots.
// 2. d may be the same column as an operand, never half overlapping one.
// 3. Each kernel does exactly what its case in run.ts does, entry by entry.
// Not here: which kernel runs when (run.ts).

import { roundEven } from './arithmetic.ts';
import { op, operationCount } from './opcode.ts';
import type { ProgramTable } from './program.ts';
import { interpolateAt, rowOfNumber } from './table.ts';

export type Kernel = (m: Float64Array, d: number, a: number, b: number, c: number, n: number, tables: readonly ProgramTable[]) => void;

const one = (f: (x: number) => number): Kernel => {
  // Only for operations that are slow by themselves: the call is paid once an entry.
  return (m, d, a, _b, _c, n) => {
    for (let i = 0; i < n; i++) m[d + i] = f(m[a + i]!);
  };
};

const list: Kernel[] = new Array(operationCount);

list[op.copy] = (m, d, a, _b, _c, n) => {
  for (let i = 0; i < n; i++) m[d + i] = m[a + i]!;
};
list[op.minus] = (m, d, a, _b, _c, n) => {
  for (let i = 0; i < n; i++) m[d + i] = -m[a + i]!;
};
list[op.add] = (m, d, a, b, _c, n) => {
  for (let i = 0; i < n; i++) m[d + i] = m[a + i]! + m[b + i]!;
};
list[op.subtract] = (m, d, a, b, _c, n) => {
  for (let i = 0; i < n; i++) m[d + i] = m[a + i]! - m[b + i]!;
};
list[op.multiply] = (m, d, a, b, _c, n) => {
  for (let i = 0; i < n; i++) m[d + i] = m[a + i]! * m[b + i]!;
};
list[op.divide] = (m, d, a, b, _c, n) => {
  for (let i = 0; i < n; i++) m[d + i] = m[a + i]! / m[b + i]!;
};
list[op.addK] = (m, d, a, b, _c, n) => {
  const k = m[b]!;
  for (let i = 0; i < n; i++) m[d + i] = m[a + i]! + k;
};
list[op.subtractK] = (m, d, a, b, _c, n) => {
  const k = m[b]!;
  for (let i = 0; i < n; i++) m[d + i] = m[a + i]! - k;
};
list[op.multiplyK] = (m, d, a, b, _c, n) => {
  const k = m[b]!;
  for (let i = 0; i < n; i++) m[d + i] = m[a + i]! * k;
};
list[op.divideK] = (m, d, a, b, _c, n) => {
  const k = m[b]!;
  for (let i = 0; i < n; i++) m[d + i] = m[a + i]! / k;
};
list[op.subtractFromK] = (m, d, a, b, _c, n) => {
  const k = m[a]!;
  for (let i = 0; i < n; i++) m[d + i] = k - m[b + i]!;
};
list[op.divideIntoK] = (m, d, a, b, _c, n) => {
  const k = m[a]!;
  for (let i = 0; i < n; i++) m[d + i] = k / m[b + i]!;
};
list[op.power] = (m, d, a, b, _c, n) => {
  for (let i = 0; i < n; i++) m[d + i] = m[a + i]! ** m[b + i]!;
};
list[op.square] = (m, d, a, _b, _c, n) => {
  for (let i = 0; i < n; i++) {
    const x = m[a + i]!;
    m[d + i] = x * x;
  }
};
list[op.cube] = (m, d, a, _b, _c, n) => {
  for (let i = 0; i < n; i++) {
    const x = m[a + i]!;
    m[d + i] = x * x * x;
  }
};
list[op.fourth] = (m, d, a, _b, _c, n) => {
  for (let i = 0; i < n; i++) {
    const x = m[a + i]!;
    const square = x * x;
    m[d + i] = square * square;
  }
};
list[op.inverse] = (m, d, a, _b, _c, n) => {
  for (let i = 0; i < n; i++) m[d + i] = 1 / m[a + i]!;
};
list[op.inverseSquare] = (m, d, a, _b, _c, n) => {
  for (let i = 0; i < n; i++) {
    const x = m[a + i]!;
    m[d + i] = 1 / (x * x);
  }
};
list[op.exp] = (m, d, a, _b, _c, n) => {
  for (let i = 0; i < n; i++) m[d + i] = Math.exp(m[a + i]!);
};
list[op.ln] = (m, d, a, _b, _c, n) => {
  for (let i = 0; i < n; i++) m[d + i] = Math.log(m[a + i]!);
};
list[op.sqrt] = (m, d, a, _b, _c, n) => {
  for (let i = 0; i < n; i++) m[d + i] = Math.sqrt(m[a + i]!);
};
list[op.abs] = (m, d, a, _b, _c, n) => {
  for (let i = 0; i < n; i++) m[d + i] = Math.abs(m[a + i]!);
};
list[op.sin] = (m, d, a, _b, _c, n) => {
  for (let i = 0; i < n; i++) m[d + i] = Math.sin(m[a + i]!);
};
list[op.cos] = (m, d, a, _b, _c, n) => {
  for (let i = 0; i < n; i++) m[d + i] = Math.cos(m[a + i]!);
};
list[op.asin] = (m, d, a, _b, _c, n) => {
  for (let i = 0; i < n; i++) m[d + i] = Math.asin(m[a + i]!);
};
list[op.floor] = (m, d, a, _b, _c, n) => {
  for (let i = 0; i < n; i++) m[d + i] = Math.floor(m[a + i]!);
};
list[op.ceil] = (m, d, a, _b, _c, n) => {
  for (let i = 0; i < n; i++) m[d + i] = Math.ceil(m[a + i]!);
};
list[op.log10] = one(Math.log10);
list[op.cbrt] = one(Math.cbrt);
list[op.sign] = one(Math.sign);
list[op.tan] = one(Math.tan);
list[op.acos] = one(Math.acos);
list[op.atan] = one(Math.atan);
list[op.sinh] = one(Math.sinh);
list[op.cosh] = one(Math.cosh);
list[op.tanh] = one(Math.tanh);
list[op.round] = one(roundEven);
list[op.min] = (m, d, a, b, _c, n) => {
  for (let i = 0; i < n; i++) m[d + i] = Math.min(m[a + i]!, m[b + i]!);
};
list[op.max] = (m, d, a, b, _c, n) => {
  for (let i = 0; i < n; i++) m[d + i] = Math.max(m[a + i]!, m[b + i]!);
};
list[op.hypot] = (m, d, a, b, _c, n) => {
  for (let i = 0; i < n; i++) m[d + i] = Math.hypot(m[a + i]!, m[b + i]!);
};
list[op.hypot3] = (m, d, a, b, c, n) => {
  for (let i = 0; i < n; i++) m[d + i] = Math.hypot(m[a + i]!, m[b + i]!, m[c + i]!);
};
list[op.atan2] = (m, d, a, b, _c, n) => {
  for (let i = 0; i < n; i++) m[d + i] = Math.atan2(m[a + i]!, m[b + i]!);
};
list[op.less] = (m, d, a, b, _c, n) => {
  for (let i = 0; i < n; i++) m[d + i] = m[a + i]! < m[b + i]! ? 1 : 0;
};
list[op.lessEqual] = (m, d, a, b, _c, n) => {
  for (let i = 0; i < n; i++) m[d + i] = m[a + i]! <= m[b + i]! ? 1 : 0;
};
list[op.greater] = (m, d, a, b, _c, n) => {
  for (let i = 0; i < n; i++) m[d + i] = m[a + i]! > m[b + i]! ? 1 : 0;
};
list[op.greaterEqual] = (m, d, a, b, _c, n) => {
  for (let i = 0; i < n; i++) m[d + i] = m[a + i]! >= m[b + i]! ? 1 : 0;
};
list[op.equal] = (m, d, a, b, _c, n) => {
  for (let i = 0; i < n; i++) m[d + i] = m[a + i]! === m[b + i]! ? 1 : 0;
};
list[op.unequal] = (m, d, a, b, _c, n) => {
  for (let i = 0; i < n; i++) m[d + i] = m[a + i]! !== m[b + i]! ? 1 : 0;
};
list[op.and] = (m, d, a, b, _c, n) => {
  for (let i = 0; i < n; i++) m[d + i] = m[a + i]! * m[b + i]!;
};
list[op.or] = (m, d, a, b, _c, n) => {
  for (let i = 0; i < n; i++) m[d + i] = Math.max(m[a + i]!, m[b + i]!);
};
list[op.not] = (m, d, a, _b, _c, n) => {
  for (let i = 0; i < n; i++) m[d + i] = 1 - m[a + i]!;
};
list[op.choose] = (m, d, a, b, c, n) => {
  for (let i = 0; i < n; i++) m[d + i] = m[a + i] !== 0 ? m[b + i]! : m[c + i]!;
};
list[op.interpolate] = (m, d, a, b, _c, n, tables) => {
  const { keys, values, direction } = tables[b]!;
  for (let i = 0; i < n; i++) m[d + i] = direction === 0 ? Number.NaN : interpolateAt(keys, values, direction, m[a + i]!);
};
list[op.entryOfNumber] = (m, d, a, b, _c, n, tables) => {
  const { keys, values } = tables[b]!;
  for (let i = 0; i < n; i++) {
    const row = rowOfNumber(keys, m[a + i]!);
    m[d + i] = row < 0 ? Number.NaN : values[row]!;
  }
};
list[op.entryOfText] = (m, d, a, b, _c, n, tables) => {
  const { values } = tables[b]!;
  for (let i = 0; i < n; i++) m[d + i] = entryOfText(values, m[a + i]!);
};

/** `values` is indexed by the number of a text; NaN where the table has no such row. */
export function entryOfText(values: Float64Array, text: number): number {
  return values[text] ?? Number.NaN;
}

export const kernels: readonly Kernel[] = list;
