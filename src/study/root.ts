// A root of one equation in one unknown, within a bracket.
//
// Method: R. P. Brent, Algorithms for Minimization without Derivatives, Prentice-Hall 1973, chapter 4 (procedure `zero`):
// inverse quadratic interpolation and the secant, kept safe by bisection. The bracket shrinks at every step.
// 1. A root is reported only where the function changes sign and its value has shrunk on the way there: a change of sign at a
//    pole is refused by name.
// 2. The routine ends: at most `mostIterations` evaluations, and the reason is returned.
// Not here: what the function means, units, how many roots a bracket holds (roots.ts).

export type RootFailure = 'no-sign-change' | 'not-finite' | 'pole' | 'did-not-settle';

export type Root =
  | {
      readonly ok: true;
      readonly root: number;
      /** Value of the function at the root. */
      readonly residual: number;
      readonly iterations: number;
      readonly bracket: readonly [number, number];
    }
  | {
      readonly ok: false;
      readonly failure: RootFailure;
      readonly iterations: number;
      readonly bracket: readonly [number, number];
    };

const mostIterations = 500;
const epsilon = 2 ** -52;

/** `low` and `high` are finite; the function is evaluated within them only. */
export function findRoot(f: (x: number) => number, low: number, high: number): Root {
  let a = low;
  let b = high;
  let fa = f(a);
  let fb = f(b);
  const start = Math.max(Math.abs(fa), Math.abs(fb));
  const failed = (failure: RootFailure, iterations: number): Root => ({
    ok: false,
    failure,
    iterations,
    bracket: [Math.min(a, b), Math.max(a, b)],
  });
  const found = (root: number, residual: number, iterations: number): Root => ({
    ok: true,
    root,
    residual,
    iterations,
    bracket: [Math.min(a, b), Math.max(a, b)],
  });
  if (!Number.isFinite(fa) || !Number.isFinite(fb)) return failed('not-finite', 0);
  if (fa === 0) return found(a, 0, 0);
  if (fb === 0) return found(b, 0, 0);
  if (fa > 0 === fb > 0) return failed('no-sign-change', 0);
  let c = a;
  let fc = fa;
  let step = b - a;
  let previousStep = step;
  for (let iteration = 1; iteration <= mostIterations; iteration += 1) {
    if (fb > 0 === fc > 0) {
      c = a;
      fc = fa;
      step = b - a;
      previousStep = step;
    }
    if (Math.abs(fc) < Math.abs(fb)) {
      a = b;
      b = c;
      c = a;
      fa = fb;
      fb = fc;
      fc = fa;
    }
    const tolerance = 2 * epsilon * Math.abs(b) + Number.MIN_VALUE;
    const half = (c - b) / 2;
    if (fb === 0) return found(b, 0, iteration);
    if (Math.abs(half) <= tolerance) {
      a = c;
      return Math.max(Math.abs(fb), Math.abs(fc)) > start ? failed('pole', iteration) : found(b, fb, iteration);
    }
    if (Math.abs(previousStep) < tolerance || Math.abs(fa) <= Math.abs(fb)) {
      step = half;
      previousStep = half;
    } else {
      const s = fb / fa;
      let p: number;
      let q: number;
      if (a === c) {
        p = 2 * half * s;
        q = 1 - s;
      } else {
        const t = fa / fc;
        const r = fb / fc;
        p = s * (2 * half * t * (t - r) - (b - a) * (r - 1));
        q = (t - 1) * (r - 1) * (s - 1);
      }
      if (p > 0) q = -q;
      else p = -p;
      if (2 * p < Math.min(3 * half * q - Math.abs(tolerance * q), Math.abs(previousStep * q))) {
        previousStep = step;
        step = p / q;
      } else {
        step = half;
        previousStep = half;
      }
    }
    a = b;
    fa = fb;
    b += Math.abs(step) > tolerance ? step : half > 0 ? tolerance : -tolerance;
    fb = f(b);
    if (!Number.isFinite(fb)) return failed(Math.abs(fb) === Infinity || Math.abs(fa) > start ? 'pole' : 'not-finite', iteration);
  }
  return failed('did-not-settle', mostIterations);
}
