// One loop over columns for each operation.
//
// 1. A kernel fills m[d .. d+n) from m[a .. a+n), m[b .. b+n), m[c .. c+n): offsets into the one memory, not slots; n is even.
// 2. d may be the same column as an operand, never half overlapping one.
// 3. Each kernel does exactly what its case in run-one.ts does, entry by entry.
// 4. Trouble never hides: where an infinite operand would give an ordinary result (x/∞, e^−∞, atan ∞, min, comparisons), the
//    operand is subtracted from itself, which is 0 for every finite number and NaN otherwise. So a result is finite exactly
//    where everything that it was computed from is.
// 5. Arithmetic takes two entries a turn, and `| 0` tells the compiler that an index does not overflow: together a third faster.
// Not here: which kernel runs when (run.ts), two steps at once (kernels-fused.ts).

import { roundEven } from './arithmetic.ts';
import { fusedKernels } from './kernels-fused.ts';
import { op, operationCount } from './opcode.ts';
import type { ProgramTable } from './program.ts';
import { interpolateAt, rowOfNumber } from './table.ts';

export type Kernel = (
  m: Float64Array,
  d: number,
  a: number,
  b: number,
  c: number,
  n: number,
  tables: readonly ProgramTable[],
) => void;

/** Only for operations that are slow or rare: an entry costs a call. */
const one =
  (f: (x: number) => number): Kernel =>
  (m, d, a, _b, _c, n) => {
    for (let i = 0; i < n; i++) m[d + i] = f(m[a + i]!);
  };
const two =
  (f: (x: number, y: number) => number): Kernel =>
  (m, d, a, b, _c, n) => {
    for (let i = 0; i < n; i++) m[d + i] = f(m[a + i]!, m[b + i]!);
  };

const list: Kernel[] = new Array(operationCount);
for (const [operation, kernel] of fusedKernels) list[operation] = kernel;

list[op.copy] = (m, d, a, _b, _c, n) => {
  for (const end = d + n; d < end; d = (d + 2) | 0) {
    m[d] = m[a]!;
    m[(d + 1) | 0] = m[(a + 1) | 0]!;
    a = (a + 2) | 0;
  }
};
list[op.minus] = (m, d, a, _b, _c, n) => {
  for (const end = d + n; d < end; d = (d + 2) | 0) {
    m[d] = -m[a]!;
    m[(d + 1) | 0] = -m[(a + 1) | 0]!;
    a = (a + 2) | 0;
  }
};
list[op.add] = (m, d, a, b, _c, n) => {
  for (const end = d + n; d < end; d = (d + 2) | 0) {
    m[d] = m[a]! + m[b]!;
    m[(d + 1) | 0] = m[(a + 1) | 0]! + m[(b + 1) | 0]!;
    a = (a + 2) | 0;
    b = (b + 2) | 0;
  }
};
list[op.subtract] = (m, d, a, b, _c, n) => {
  for (const end = d + n; d < end; d = (d + 2) | 0) {
    m[d] = m[a]! - m[b]!;
    m[(d + 1) | 0] = m[(a + 1) | 0]! - m[(b + 1) | 0]!;
    a = (a + 2) | 0;
    b = (b + 2) | 0;
  }
};
list[op.multiply] = (m, d, a, b, _c, n) => {
  for (const end = d + n; d < end; d = (d + 2) | 0) {
    m[d] = m[a]! * m[b]!;
    m[(d + 1) | 0] = m[(a + 1) | 0]! * m[(b + 1) | 0]!;
    a = (a + 2) | 0;
    b = (b + 2) | 0;
  }
};
list[op.divide] = (m, d, a, b, _c, n) => {
  for (const end = d + n; d < end; d = (d + 2) | 0) {
    const y = m[b]!;
    m[d] = m[a]! / y - (y - y);
    const y1 = m[(b + 1) | 0]!;
    m[(d + 1) | 0] = m[(a + 1) | 0]! / y1 - (y1 - y1);
    a = (a + 2) | 0;
    b = (b + 2) | 0;
  }
};
list[op.addK] = (m, d, a, b, _c, n) => {
  const k = m[b]!;
  for (const end = d + n; d < end; d = (d + 2) | 0) {
    m[d] = m[a]! + k;
    m[(d + 1) | 0] = m[(a + 1) | 0]! + k;
    a = (a + 2) | 0;
  }
};
list[op.subtractK] = (m, d, a, b, _c, n) => {
  const k = m[b]!;
  for (const end = d + n; d < end; d = (d + 2) | 0) {
    m[d] = m[a]! - k;
    m[(d + 1) | 0] = m[(a + 1) | 0]! - k;
    a = (a + 2) | 0;
  }
};
list[op.multiplyK] = (m, d, a, b, _c, n) => {
  const k = m[b]!;
  for (const end = d + n; d < end; d = (d + 2) | 0) {
    m[d] = m[a]! * k;
    m[(d + 1) | 0] = m[(a + 1) | 0]! * k;
    a = (a + 2) | 0;
  }
};
list[op.divideK] = (m, d, a, b, _c, n) => {
  const k = m[b]!;
  for (const end = d + n; d < end; d = (d + 2) | 0) {
    m[d] = m[a]! / k;
    m[(d + 1) | 0] = m[(a + 1) | 0]! / k;
    a = (a + 2) | 0;
  }
};
list[op.subtractFromK] = (m, d, a, b, _c, n) => {
  const k = m[a]!;
  for (const end = d + n; d < end; d = (d + 2) | 0) {
    m[d] = k - m[b]!;
    m[(d + 1) | 0] = k - m[(b + 1) | 0]!;
    b = (b + 2) | 0;
  }
};
list[op.divideIntoK] = (m, d, a, b, _c, n) => {
  const k = m[a]!;
  for (const end = d + n; d < end; d = (d + 2) | 0) {
    const y = m[b]!;
    m[d] = k / y - (y - y);
    const y1 = m[(b + 1) | 0]!;
    m[(d + 1) | 0] = k / y1 - (y1 - y1);
    b = (b + 2) | 0;
  }
};
list[op.square] = (m, d, a, _b, _c, n) => {
  for (const end = d + n; d < end; d = (d + 2) | 0) {
    const x = m[a]!;
    m[d] = x * x;
    const x1 = m[(a + 1) | 0]!;
    m[(d + 1) | 0] = x1 * x1;
    a = (a + 2) | 0;
  }
};
list[op.cube] = (m, d, a, _b, _c, n) => {
  for (let i = 0; i < n; i++) {
    const x = m[(a + i) | 0]!;
    m[(d + i) | 0] = x * x * x;
  }
};
list[op.fourth] = (m, d, a, _b, _c, n) => {
  for (let i = 0; i < n; i++) {
    const x = m[(a + i) | 0]!;
    const square = x * x;
    m[(d + i) | 0] = square * square;
  }
};
list[op.inverse] = (m, d, a, _b, _c, n) => {
  for (let i = 0; i < n; i++) {
    const x = m[(a + i) | 0]!;
    m[(d + i) | 0] = 1 / x - (x - x);
  }
};
list[op.inverseSquare] = (m, d, a, _b, _c, n) => {
  for (let i = 0; i < n; i++) {
    const x = m[(a + i) | 0]!;
    m[(d + i) | 0] = 1 / (x * x) - (x - x);
  }
};
list[op.power] = (m, d, a, b, _c, n) => {
  for (let i = 0; i < n; i++) {
    const x = m[(a + i) | 0]!;
    const y = m[(b + i) | 0]!;
    m[(d + i) | 0] = x ** y - (x - x) - (y - y);
  }
};
list[op.exp] = (m, d, a, _b, _c, n) => {
  for (let i = 0; i < n; i++) {
    const x = m[(a + i) | 0]!;
    m[(d + i) | 0] = Math.exp(x) - (x - x);
  }
};
list[op.ln] = (m, d, a, _b, _c, n) => {
  for (let i = 0; i < n; i++) m[(d + i) | 0] = Math.log(m[(a + i) | 0]!);
};
list[op.sqrt] = (m, d, a, _b, _c, n) => {
  for (let i = 0; i < n; i++) m[(d + i) | 0] = Math.sqrt(m[(a + i) | 0]!);
};
list[op.abs] = (m, d, a, _b, _c, n) => {
  for (let i = 0; i < n; i++) m[(d + i) | 0] = Math.abs(m[(a + i) | 0]!);
};
list[op.sin] = (m, d, a, _b, _c, n) => {
  for (let i = 0; i < n; i++) m[(d + i) | 0] = Math.sin(m[(a + i) | 0]!);
};
list[op.cos] = (m, d, a, _b, _c, n) => {
  for (let i = 0; i < n; i++) m[(d + i) | 0] = Math.cos(m[(a + i) | 0]!);
};
list[op.asin] = (m, d, a, _b, _c, n) => {
  for (let i = 0; i < n; i++) m[(d + i) | 0] = Math.asin(m[(a + i) | 0]!);
};
list[op.acos] = (m, d, a, _b, _c, n) => {
  for (let i = 0; i < n; i++) m[(d + i) | 0] = Math.acos(m[(a + i) | 0]!);
};
list[op.tan] = (m, d, a, _b, _c, n) => {
  for (let i = 0; i < n; i++) m[(d + i) | 0] = Math.tan(m[(a + i) | 0]!);
};
list[op.floor] = (m, d, a, _b, _c, n) => {
  for (let i = 0; i < n; i++) m[(d + i) | 0] = Math.floor(m[(a + i) | 0]!);
};
list[op.ceil] = (m, d, a, _b, _c, n) => {
  for (let i = 0; i < n; i++) m[(d + i) | 0] = Math.ceil(m[(a + i) | 0]!);
};
list[op.log10] = one(Math.log10);
list[op.cbrt] = one(Math.cbrt);
list[op.sinh] = one(Math.sinh);
list[op.cosh] = one(Math.cosh);
list[op.round] = one(roundEven);
list[op.sign] = one((x) => Math.sign(x) - (x - x));
list[op.atan] = one((x) => Math.atan(x) - (x - x));
list[op.tanh] = one((x) => Math.tanh(x) - (x - x));
list[op.hypot] = two((x, y) => Math.hypot(x, y));
list[op.atan2] = two((x, y) => Math.atan2(x, y) - (x - x) - (y - y));
list[op.hypot3] = (m, d, a, b, c, n) => {
  for (let i = 0; i < n; i++) m[(d + i) | 0] = Math.hypot(m[(a + i) | 0]!, m[(b + i) | 0]!, m[(c + i) | 0]!);
};
list[op.min] = (m, d, a, b, _c, n) => {
  for (let i = 0; i < n; i++) {
    const x = m[(a + i) | 0]!;
    const y = m[(b + i) | 0]!;
    m[(d + i) | 0] = Math.min(x, y) - (x - x) - (y - y);
  }
};
list[op.max] = (m, d, a, b, _c, n) => {
  for (let i = 0; i < n; i++) {
    const x = m[(a + i) | 0]!;
    const y = m[(b + i) | 0]!;
    m[(d + i) | 0] = Math.max(x, y) - (x - x) - (y - y);
  }
};
list[op.less] = (m, d, a, b, _c, n) => {
  for (let i = 0; i < n; i++) {
    const x = m[(a + i) | 0]!;
    const y = m[(b + i) | 0]!;
    m[(d + i) | 0] = (x < y ? 1 : 0) - (x - x) - (y - y);
  }
};
list[op.lessEqual] = (m, d, a, b, _c, n) => {
  for (let i = 0; i < n; i++) {
    const x = m[(a + i) | 0]!;
    const y = m[(b + i) | 0]!;
    m[(d + i) | 0] = (x <= y ? 1 : 0) - (x - x) - (y - y);
  }
};
list[op.greater] = (m, d, a, b, _c, n) => {
  for (let i = 0; i < n; i++) {
    const x = m[(a + i) | 0]!;
    const y = m[(b + i) | 0]!;
    m[(d + i) | 0] = (x > y ? 1 : 0) - (x - x) - (y - y);
  }
};
list[op.greaterEqual] = (m, d, a, b, _c, n) => {
  for (let i = 0; i < n; i++) {
    const x = m[(a + i) | 0]!;
    const y = m[(b + i) | 0]!;
    m[(d + i) | 0] = (x >= y ? 1 : 0) - (x - x) - (y - y);
  }
};
list[op.equal] = (m, d, a, b, _c, n) => {
  for (let i = 0; i < n; i++) {
    const x = m[(a + i) | 0]!;
    const y = m[(b + i) | 0]!;
    m[(d + i) | 0] = (x === y ? 1 : 0) - (x - x) - (y - y);
  }
};
list[op.unequal] = (m, d, a, b, _c, n) => {
  for (let i = 0; i < n; i++) {
    const x = m[(a + i) | 0]!;
    const y = m[(b + i) | 0]!;
    m[(d + i) | 0] = (x !== y ? 1 : 0) - (x - x) - (y - y);
  }
};
list[op.and] = (m, d, a, b, _c, n) => {
  for (let i = 0; i < n; i++) {
    const x = m[(a + i) | 0]!;
    m[(d + i) | 0] = x === 0 ? 0 : m[(b + i) | 0]! - (x - x);
  }
};
list[op.or] = (m, d, a, b, _c, n) => {
  for (let i = 0; i < n; i++) {
    const x = m[(a + i) | 0]!;
    m[(d + i) | 0] = x === 0 ? m[(b + i) | 0]! : x;
  }
};
list[op.not] = (m, d, a, _b, _c, n) => {
  for (let i = 0; i < n; i++) m[(d + i) | 0] = 1 - m[(a + i) | 0]!;
};
list[op.choose] = (m, d, a, b, c, n) => {
  for (let i = 0; i < n; i++) {
    const t = m[(a + i) | 0]!;
    m[(d + i) | 0] = t === 0 ? m[(c + i) | 0]! : m[(b + i) | 0]! - (t - t);
  }
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
