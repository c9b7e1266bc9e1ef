// Loops over columns for two arithmetic steps at once: half the traffic of two kernels, the same two roundings.
//
// As in kernels.ts: m[d .. d+n) from columns at the offsets a, b, c; a divisor is subtracted from itself, so that an infinite
// one gives NaN.
// Not here: which formulas become such pairs (compile.ts).

import type { Kernel } from './kernels.ts';
import { op } from './opcode.ts';

export const fusedKernels: readonly (readonly [operation: number, kernel: Kernel])[] = [
  [op.addAdd, (m, d, a, b, c, n) => {
    for (let i = 0; i < n; i++) m[(d + i) | 0] = m[(a + i) | 0]! + m[(b + i) | 0]! + m[(c + i) | 0]!;
  }],
  [op.addSubtract, (m, d, a, b, c, n) => {
    for (let i = 0; i < n; i++) m[(d + i) | 0] = m[(a + i) | 0]! + m[(b + i) | 0]! - m[(c + i) | 0]!;
  }],
  [op.addMultiply, (m, d, a, b, c, n) => {
    for (let i = 0; i < n; i++) m[(d + i) | 0] = (m[(a + i) | 0]! + m[(b + i) | 0]!) * m[(c + i) | 0]!;
  }],
  [op.addDivide, (m, d, a, b, c, n) => {
    for (let i = 0; i < n; i++) {
      const z = m[(c + i) | 0]!;
      m[(d + i) | 0] = (m[(a + i) | 0]! + m[(b + i) | 0]!) / z - (z - z);
    }
  }],
  [op.subtractAdd, (m, d, a, b, c, n) => {
    for (let i = 0; i < n; i++) m[(d + i) | 0] = m[(a + i) | 0]! - m[(b + i) | 0]! + m[(c + i) | 0]!;
  }],
  [op.subtractSubtract, (m, d, a, b, c, n) => {
    for (let i = 0; i < n; i++) m[(d + i) | 0] = m[(a + i) | 0]! - m[(b + i) | 0]! - m[(c + i) | 0]!;
  }],
  [op.subtractMultiply, (m, d, a, b, c, n) => {
    for (let i = 0; i < n; i++) m[(d + i) | 0] = (m[(a + i) | 0]! - m[(b + i) | 0]!) * m[(c + i) | 0]!;
  }],
  [op.subtractDivide, (m, d, a, b, c, n) => {
    for (let i = 0; i < n; i++) {
      const z = m[(c + i) | 0]!;
      m[(d + i) | 0] = (m[(a + i) | 0]! - m[(b + i) | 0]!) / z - (z - z);
    }
  }],
  [op.multiplyAdd, (m, d, a, b, c, n) => {
    for (let i = 0; i < n; i++) m[(d + i) | 0] = m[(a + i) | 0]! * m[(b + i) | 0]! + m[(c + i) | 0]!;
  }],
  [op.multiplySubtract, (m, d, a, b, c, n) => {
    for (let i = 0; i < n; i++) m[(d + i) | 0] = m[(a + i) | 0]! * m[(b + i) | 0]! - m[(c + i) | 0]!;
  }],
  [op.multiplyMultiply, (m, d, a, b, c, n) => {
    for (let i = 0; i < n; i++) m[(d + i) | 0] = m[(a + i) | 0]! * m[(b + i) | 0]! * m[(c + i) | 0]!;
  }],
  [op.multiplyDivide, (m, d, a, b, c, n) => {
    for (let i = 0; i < n; i++) {
      const z = m[(c + i) | 0]!;
      m[(d + i) | 0] = m[(a + i) | 0]! * m[(b + i) | 0]! / z - (z - z);
    }
  }],
  [op.divideAdd, (m, d, a, b, c, n) => {
    for (let i = 0; i < n; i++) {
      const y = m[(b + i) | 0]!;
      m[(d + i) | 0] = m[(a + i) | 0]! / y + m[(c + i) | 0]! - (y - y);
    }
  }],
  [op.divideSubtract, (m, d, a, b, c, n) => {
    for (let i = 0; i < n; i++) {
      const y = m[(b + i) | 0]!;
      m[(d + i) | 0] = m[(a + i) | 0]! / y - m[(c + i) | 0]! - (y - y);
    }
  }],
  [op.divideMultiply, (m, d, a, b, c, n) => {
    for (let i = 0; i < n; i++) {
      const y = m[(b + i) | 0]!;
      m[(d + i) | 0] = m[(a + i) | 0]! / y * m[(c + i) | 0]! - (y - y);
    }
  }],
  [op.divideDivide, (m, d, a, b, c, n) => {
    for (let i = 0; i < n; i++) {
      const y = m[(b + i) | 0]!;
      const z = m[(c + i) | 0]!;
      m[(d + i) | 0] = m[(a + i) | 0]! / y / z - (y - y) - (z - z);
    }
  }],
  [op.subtractByAdd, (m, d, a, b, c, n) => {
    for (let i = 0; i < n; i++) m[(d + i) | 0] = m[(c + i) | 0]! - (m[(a + i) | 0]! + m[(b + i) | 0]!);
  }],
  [op.subtractBySubtract, (m, d, a, b, c, n) => {
    for (let i = 0; i < n; i++) m[(d + i) | 0] = m[(c + i) | 0]! - (m[(a + i) | 0]! - m[(b + i) | 0]!);
  }],
  [op.subtractByMultiply, (m, d, a, b, c, n) => {
    for (let i = 0; i < n; i++) m[(d + i) | 0] = m[(c + i) | 0]! - m[(a + i) | 0]! * m[(b + i) | 0]!;
  }],
  [op.subtractByDivide, (m, d, a, b, c, n) => {
    for (let i = 0; i < n; i++) {
      const y = m[(b + i) | 0]!;
      m[(d + i) | 0] = m[(c + i) | 0]! - m[(a + i) | 0]! / y - (y - y);
    }
  }],
  [op.divideByAdd, (m, d, a, b, c, n) => {
    for (let i = 0; i < n; i++) {
      const divisor = m[(a + i) | 0]! + m[(b + i) | 0]!;
      m[(d + i) | 0] = m[(c + i) | 0]! / divisor - (divisor - divisor);
    }
  }],
  [op.divideBySubtract, (m, d, a, b, c, n) => {
    for (let i = 0; i < n; i++) {
      const divisor = m[(a + i) | 0]! - m[(b + i) | 0]!;
      m[(d + i) | 0] = m[(c + i) | 0]! / divisor - (divisor - divisor);
    }
  }],
  [op.divideByMultiply, (m, d, a, b, c, n) => {
    for (let i = 0; i < n; i++) {
      const divisor = m[(a + i) | 0]! * m[(b + i) | 0]!;
      m[(d + i) | 0] = m[(c + i) | 0]! / divisor - (divisor - divisor);
    }
  }],
  [op.divideByDivide, (m, d, a, b, c, n) => {
    for (let i = 0; i < n; i++) {
      const y = m[(b + i) | 0]!;
      const divisor = m[(a + i) | 0]! / y - (y - y);
      m[(d + i) | 0] = m[(c + i) | 0]! / divisor - (divisor - divisor);
    }
  }],
];
