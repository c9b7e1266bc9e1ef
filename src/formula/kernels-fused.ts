// Loops over columns for two arithmetic steps at once: half the traffic of two kernels, the same two roundings.
//
// As in kernels.ts: two entries a turn, n even, and a divisor is subtracted from itself, so that an infinite one gives NaN.
// Not here: which formulas become such pairs (compile.ts).

import type { Kernel } from './kernels.ts';
import { op } from './opcode.ts';

export const fusedKernels: readonly (readonly [operation: number, kernel: Kernel])[] = [
  [
    op.addAdd,
    (m, d, a, b, c, n) => {
      for (const end = d + n; d < end; d = (d + 2) | 0) {
        m[d] = m[a]! + m[b]! + m[c]!;
        m[(d + 1) | 0] = m[(a + 1) | 0]! + m[(b + 1) | 0]! + m[(c + 1) | 0]!;
        a = (a + 2) | 0;
        b = (b + 2) | 0;
        c = (c + 2) | 0;
      }
    },
  ],
  [
    op.addSubtract,
    (m, d, a, b, c, n) => {
      for (const end = d + n; d < end; d = (d + 2) | 0) {
        m[d] = m[a]! + m[b]! - m[c]!;
        m[(d + 1) | 0] = m[(a + 1) | 0]! + m[(b + 1) | 0]! - m[(c + 1) | 0]!;
        a = (a + 2) | 0;
        b = (b + 2) | 0;
        c = (c + 2) | 0;
      }
    },
  ],
  [
    op.addMultiply,
    (m, d, a, b, c, n) => {
      for (const end = d + n; d < end; d = (d + 2) | 0) {
        m[d] = (m[a]! + m[b]!) * m[c]!;
        m[(d + 1) | 0] = (m[(a + 1) | 0]! + m[(b + 1) | 0]!) * m[(c + 1) | 0]!;
        a = (a + 2) | 0;
        b = (b + 2) | 0;
        c = (c + 2) | 0;
      }
    },
  ],
  [
    op.addDivide,
    (m, d, a, b, c, n) => {
      for (const end = d + n; d < end; d = (d + 2) | 0) {
        const z = m[c]!;
        m[d] = (m[a]! + m[b]!) / z - (z - z);
        const z1 = m[(c + 1) | 0]!;
        m[(d + 1) | 0] = (m[(a + 1) | 0]! + m[(b + 1) | 0]!) / z1 - (z1 - z1);
        a = (a + 2) | 0;
        b = (b + 2) | 0;
        c = (c + 2) | 0;
      }
    },
  ],
  [
    op.subtractAdd,
    (m, d, a, b, c, n) => {
      for (const end = d + n; d < end; d = (d + 2) | 0) {
        m[d] = m[a]! - m[b]! + m[c]!;
        m[(d + 1) | 0] = m[(a + 1) | 0]! - m[(b + 1) | 0]! + m[(c + 1) | 0]!;
        a = (a + 2) | 0;
        b = (b + 2) | 0;
        c = (c + 2) | 0;
      }
    },
  ],
  [
    op.subtractSubtract,
    (m, d, a, b, c, n) => {
      for (const end = d + n; d < end; d = (d + 2) | 0) {
        m[d] = m[a]! - m[b]! - m[c]!;
        m[(d + 1) | 0] = m[(a + 1) | 0]! - m[(b + 1) | 0]! - m[(c + 1) | 0]!;
        a = (a + 2) | 0;
        b = (b + 2) | 0;
        c = (c + 2) | 0;
      }
    },
  ],
  [
    op.subtractMultiply,
    (m, d, a, b, c, n) => {
      for (const end = d + n; d < end; d = (d + 2) | 0) {
        m[d] = (m[a]! - m[b]!) * m[c]!;
        m[(d + 1) | 0] = (m[(a + 1) | 0]! - m[(b + 1) | 0]!) * m[(c + 1) | 0]!;
        a = (a + 2) | 0;
        b = (b + 2) | 0;
        c = (c + 2) | 0;
      }
    },
  ],
  [
    op.subtractDivide,
    (m, d, a, b, c, n) => {
      for (const end = d + n; d < end; d = (d + 2) | 0) {
        const z = m[c]!;
        m[d] = (m[a]! - m[b]!) / z - (z - z);
        const z1 = m[(c + 1) | 0]!;
        m[(d + 1) | 0] = (m[(a + 1) | 0]! - m[(b + 1) | 0]!) / z1 - (z1 - z1);
        a = (a + 2) | 0;
        b = (b + 2) | 0;
        c = (c + 2) | 0;
      }
    },
  ],
  [
    op.multiplyAdd,
    (m, d, a, b, c, n) => {
      for (const end = d + n; d < end; d = (d + 2) | 0) {
        m[d] = m[a]! * m[b]! + m[c]!;
        m[(d + 1) | 0] = m[(a + 1) | 0]! * m[(b + 1) | 0]! + m[(c + 1) | 0]!;
        a = (a + 2) | 0;
        b = (b + 2) | 0;
        c = (c + 2) | 0;
      }
    },
  ],
  [
    op.multiplySubtract,
    (m, d, a, b, c, n) => {
      for (const end = d + n; d < end; d = (d + 2) | 0) {
        m[d] = m[a]! * m[b]! - m[c]!;
        m[(d + 1) | 0] = m[(a + 1) | 0]! * m[(b + 1) | 0]! - m[(c + 1) | 0]!;
        a = (a + 2) | 0;
        b = (b + 2) | 0;
        c = (c + 2) | 0;
      }
    },
  ],
  [
    op.multiplyMultiply,
    (m, d, a, b, c, n) => {
      for (const end = d + n; d < end; d = (d + 2) | 0) {
        m[d] = m[a]! * m[b]! * m[c]!;
        m[(d + 1) | 0] = m[(a + 1) | 0]! * m[(b + 1) | 0]! * m[(c + 1) | 0]!;
        a = (a + 2) | 0;
        b = (b + 2) | 0;
        c = (c + 2) | 0;
      }
    },
  ],
  [
    op.multiplyDivide,
    (m, d, a, b, c, n) => {
      for (const end = d + n; d < end; d = (d + 2) | 0) {
        const z = m[c]!;
        m[d] = (m[a]! * m[b]!) / z - (z - z);
        const z1 = m[(c + 1) | 0]!;
        m[(d + 1) | 0] = (m[(a + 1) | 0]! * m[(b + 1) | 0]!) / z1 - (z1 - z1);
        a = (a + 2) | 0;
        b = (b + 2) | 0;
        c = (c + 2) | 0;
      }
    },
  ],
  [
    op.divideAdd,
    (m, d, a, b, c, n) => {
      for (const end = d + n; d < end; d = (d + 2) | 0) {
        const y = m[b]!;
        m[d] = m[a]! / y + m[c]! - (y - y);
        const y1 = m[(b + 1) | 0]!;
        m[(d + 1) | 0] = m[(a + 1) | 0]! / y1 + m[(c + 1) | 0]! - (y1 - y1);
        a = (a + 2) | 0;
        b = (b + 2) | 0;
        c = (c + 2) | 0;
      }
    },
  ],
  [
    op.divideSubtract,
    (m, d, a, b, c, n) => {
      for (const end = d + n; d < end; d = (d + 2) | 0) {
        const y = m[b]!;
        m[d] = m[a]! / y - m[c]! - (y - y);
        const y1 = m[(b + 1) | 0]!;
        m[(d + 1) | 0] = m[(a + 1) | 0]! / y1 - m[(c + 1) | 0]! - (y1 - y1);
        a = (a + 2) | 0;
        b = (b + 2) | 0;
        c = (c + 2) | 0;
      }
    },
  ],
  [
    op.divideMultiply,
    (m, d, a, b, c, n) => {
      for (const end = d + n; d < end; d = (d + 2) | 0) {
        const y = m[b]!;
        m[d] = (m[a]! / y) * m[c]! - (y - y);
        const y1 = m[(b + 1) | 0]!;
        m[(d + 1) | 0] = (m[(a + 1) | 0]! / y1) * m[(c + 1) | 0]! - (y1 - y1);
        a = (a + 2) | 0;
        b = (b + 2) | 0;
        c = (c + 2) | 0;
      }
    },
  ],
  [
    op.divideDivide,
    (m, d, a, b, c, n) => {
      for (const end = d + n; d < end; d = (d + 2) | 0) {
        const y = m[b]!;
        const z = m[c]!;
        m[d] = m[a]! / y / z - (y - y) - (z - z);
        const y1 = m[(b + 1) | 0]!;
        const z1 = m[(c + 1) | 0]!;
        m[(d + 1) | 0] = m[(a + 1) | 0]! / y1 / z1 - (y1 - y1) - (z1 - z1);
        a = (a + 2) | 0;
        b = (b + 2) | 0;
        c = (c + 2) | 0;
      }
    },
  ],
  [
    op.subtractByAdd,
    (m, d, a, b, c, n) => {
      for (const end = d + n; d < end; d = (d + 2) | 0) {
        m[d] = m[c]! - (m[a]! + m[b]!);
        m[(d + 1) | 0] = m[(c + 1) | 0]! - (m[(a + 1) | 0]! + m[(b + 1) | 0]!);
        a = (a + 2) | 0;
        b = (b + 2) | 0;
        c = (c + 2) | 0;
      }
    },
  ],
  [
    op.subtractBySubtract,
    (m, d, a, b, c, n) => {
      for (const end = d + n; d < end; d = (d + 2) | 0) {
        m[d] = m[c]! - (m[a]! - m[b]!);
        m[(d + 1) | 0] = m[(c + 1) | 0]! - (m[(a + 1) | 0]! - m[(b + 1) | 0]!);
        a = (a + 2) | 0;
        b = (b + 2) | 0;
        c = (c + 2) | 0;
      }
    },
  ],
  [
    op.subtractByMultiply,
    (m, d, a, b, c, n) => {
      for (const end = d + n; d < end; d = (d + 2) | 0) {
        m[d] = m[c]! - m[a]! * m[b]!;
        m[(d + 1) | 0] = m[(c + 1) | 0]! - m[(a + 1) | 0]! * m[(b + 1) | 0]!;
        a = (a + 2) | 0;
        b = (b + 2) | 0;
        c = (c + 2) | 0;
      }
    },
  ],
  [
    op.subtractByDivide,
    (m, d, a, b, c, n) => {
      for (const end = d + n; d < end; d = (d + 2) | 0) {
        const y = m[b]!;
        m[d] = m[c]! - m[a]! / y - (y - y);
        const y1 = m[(b + 1) | 0]!;
        m[(d + 1) | 0] = m[(c + 1) | 0]! - m[(a + 1) | 0]! / y1 - (y1 - y1);
        a = (a + 2) | 0;
        b = (b + 2) | 0;
        c = (c + 2) | 0;
      }
    },
  ],
  [
    op.divideByAdd,
    (m, d, a, b, c, n) => {
      for (const end = d + n; d < end; d = (d + 2) | 0) {
        const divisor = m[a]! + m[b]!;
        m[d] = m[c]! / divisor - (divisor - divisor);
        const divisor1 = m[(a + 1) | 0]! + m[(b + 1) | 0]!;
        m[(d + 1) | 0] = m[(c + 1) | 0]! / divisor1 - (divisor1 - divisor1);
        a = (a + 2) | 0;
        b = (b + 2) | 0;
        c = (c + 2) | 0;
      }
    },
  ],
  [
    op.divideBySubtract,
    (m, d, a, b, c, n) => {
      for (const end = d + n; d < end; d = (d + 2) | 0) {
        const divisor = m[a]! - m[b]!;
        m[d] = m[c]! / divisor - (divisor - divisor);
        const divisor1 = m[(a + 1) | 0]! - m[(b + 1) | 0]!;
        m[(d + 1) | 0] = m[(c + 1) | 0]! / divisor1 - (divisor1 - divisor1);
        a = (a + 2) | 0;
        b = (b + 2) | 0;
        c = (c + 2) | 0;
      }
    },
  ],
  [
    op.divideByMultiply,
    (m, d, a, b, c, n) => {
      for (const end = d + n; d < end; d = (d + 2) | 0) {
        const divisor = m[a]! * m[b]!;
        m[d] = m[c]! / divisor - (divisor - divisor);
        const divisor1 = m[(a + 1) | 0]! * m[(b + 1) | 0]!;
        m[(d + 1) | 0] = m[(c + 1) | 0]! / divisor1 - (divisor1 - divisor1);
        a = (a + 2) | 0;
        b = (b + 2) | 0;
        c = (c + 2) | 0;
      }
    },
  ],
  [
    op.divideByDivide,
    (m, d, a, b, c, n) => {
      for (const end = d + n; d < end; d = (d + 2) | 0) {
        const y = m[b]!;
        const divisor = m[a]! / y - (y - y);
        m[d] = m[c]! / divisor - (divisor - divisor);
        const y1 = m[(b + 1) | 0]!;
        const divisor1 = m[(a + 1) | 0]! / y1 - (y1 - y1);
        m[(d + 1) | 0] = m[(c + 1) | 0]! / divisor1 - (divisor1 - divisor1);
        a = (a + 2) | 0;
        b = (b + 2) | 0;
        c = (c + 2) | 0;
      }
    },
  ],
];
