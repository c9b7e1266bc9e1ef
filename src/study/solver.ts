// The solver of sought cells: every change of sign in the bracket is followed to its root.
//
// 1. The bracket is sampled at evenly spaced points, and at points of even ratio where both ends have one sign and lie far apart;
//    two roots between neighbouring samples, and roots where the function touches zero without crossing it, can be missed.
// 2. Samples in a row at which the two sides are equal are one root, the middle of the stretch; the stretch is told.
// 3. Each change of sign is closed in by `findRoot`; what turns out to be a pole, or a gap without a value, is no root.
// Not here: what is evaluated (src/sheet).

import type { FoundRoot, Search, Solver } from '../sheet/index.ts';
import { findRoot } from './root.ts';

const samples = 512;
const farApart = 20;

export const solver: Solver = (evaluate, low, high): Search => {
  const points = samplePoints(low, high);
  const values = evaluate(points, points.length);
  const roots: FoundRoot[] = [];
  const poles: number[] = [];
  const one = new Float64Array(1);
  const f = (x: number): number => {
    one[0] = x;
    return evaluate(one, 1)[0]!;
  };
  let undefinedTrials = 0;
  for (let i = 0; i < points.length; i += 1) {
    const value = values[i]!;
    if (Number.isNaN(value)) undefinedTrials += 1;
    if (value === 0) {
      let last = i;
      while (values[last + 1] === 0) last += 1;
      const [from, to] = [points[i]!, points[last]!];
      roots.push({ root: from + (to - from) / 2, residual: 0, iterations: 0, ...(last > i ? { stretch: [from, to] } : {}) });
      i = last;
      continue;
    }
    const next = values[i + 1];
    if (next === undefined || Math.sign(value) * Math.sign(next) !== -1) continue;
    const found = findRoot(f, points[i]!, points[i + 1]!);
    if (found.ok) roots.push({ root: found.root, residual: found.residual, iterations: found.iterations });
    else poles.push((found.bracket[0] + found.bracket[1]) / 2);
  }
  return {
    roots,
    poles,
    undefinedTrials,
    method: 'Brent 1973',
    atLow: values[0]!,
    atHigh: values[points.length - 1]!,
  };
};

/** Rising, ends included, each once. */
function samplePoints(low: number, high: number): Float64Array {
  const points = new Set<number>([low, high]);
  for (let i = 1; i < samples; i += 1) points.add(low + ((high - low) * i) / samples);
  if (low > 0 && high / low > farApart) {
    for (let i = 1; i < samples; i += 1) points.add(low * (high / low) ** (i / samples));
  }
  return Float64Array.from(points).sort();
}
