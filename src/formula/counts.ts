// Counted revolutions: exponents of r, Hz, literal pi and rad that a term carries, and which revolutions it may stand for.
//
// 1. Products add counts, powers multiply them.
// 2. A term stands as r + a − j revolutions, whole a in 0..hz, whole j in 0..pi (hz..0, pi..0 where negative): a run of values
//    one apart. Hz may mean revolutions or not; each 2*pi may have turned a revolution into radians.
// 3. Operands that must be alike need a common value; it is the one nearest 0, the positive one of two.
// Not here: which operands must be alike (infer.ts), sentences (messages.ts).

import {
  addR,
  type Dimension,
  dimensionless,
  divideD,
  equalD,
  equalR,
  isZeroR,
  mulR,
  type Rational,
  rational,
  subR,
  type Unit,
} from '../quantity/index.ts';
import type { FormulaCounts } from './type.ts';

const zero = rational(0);
export const noCounts: FormulaCounts = { r: zero, hz: zero, pi: zero, rad: zero };
export const piCounts: FormulaCounts = { ...noCounts, pi: rational(1) };
export const angleCounts: FormulaCounts = { ...noCounts, rad: rational(1) };

export function countsOfUnit(unit: Unit): FormulaCounts {
  return { r: unit.counts.r, hz: unit.counts.hz, pi: zero, rad: unit.counts.rad };
}

export function multiplyCounts(a: FormulaCounts, b: FormulaCounts): FormulaCounts {
  if (a === noCounts) return b;
  if (b === noCounts) return a;
  return { r: addR(a.r, b.r), hz: addR(a.hz, b.hz), pi: addR(a.pi, b.pi), rad: addR(a.rad, b.rad) };
}

export function divideCounts(a: FormulaCounts, b: FormulaCounts): FormulaCounts {
  if (b === noCounts) return a;
  return { r: subR(a.r, b.r), hz: subR(a.hz, b.hz), pi: subR(a.pi, b.pi), rad: subR(a.rad, b.rad) };
}

export function powerCounts(a: FormulaCounts, exponent: Rational): FormulaCounts {
  if (a === noCounts) return a;
  return { r: mulR(a.r, exponent), hz: mulR(a.hz, exponent), pi: mulR(a.pi, exponent), rad: mulR(a.rad, exponent) };
}

/** Revolutions a term may stand for: base + k, whole k in low..high. */
export interface Standing {
  readonly base: Rational;
  readonly low: number;
  readonly high: number;
}

export function standing(counts: FormulaCounts): Standing {
  const hz = whole(counts.hz);
  const pi = whole(counts.pi);
  return { base: counts.r, low: Math.min(0, hz) - Math.max(0, pi), high: Math.max(0, hz) - Math.min(0, pi) };
}

/** Towards zero: the last whole number that still lies between 0 and x. */
function whole(x: Rational): number {
  return Math.trunc(x.n / x.d);
}

export function common(a: Standing, b: Standing): Standing | undefined {
  const shift = subR(b.base, a.base);
  if (shift.d !== 1) return undefined;
  const low = Math.max(a.low, b.low + shift.n);
  const high = Math.min(a.high, b.high + shift.n);
  return low <= high ? { base: a.base, low, high } : undefined;
}

export function nearestZero(s: Standing): Rational {
  const wished = Math.round(-s.base.n / s.base.d) || 0;
  return addR(s.base, rational(Math.min(s.high, Math.max(s.low, wished))));
}

export function stands(s: Standing, value: Rational): boolean {
  const shift = subR(value, s.base);
  return shift.d === 1 && shift.n >= s.low && shift.n <= s.high;
}

/** Only r, hz and pi: rad never keeps operands apart. */
export function equalTriples(a: FormulaCounts, b: FormulaCounts): boolean {
  return equalR(a.r, b.r) && equalR(a.hz, b.hz) && equalR(a.pi, b.pi);
}

/** Some j with r + hz − j = 0: the term may be an angle, or no count at all. */
export function fitsAngle(counts: FormulaCounts, value: Rational = zero): boolean {
  const j = subR(addR(counts.r, counts.hz), value);
  const pi = whole(counts.pi);
  return j.d === 1 && j.n >= Math.min(0, pi) && j.n <= Math.max(0, pi);
}

const one = rational(1);
const minusOne = rational(-1);
const time: Dimension = [zero, zero, one, zero, zero, zero, zero];
const perTime: Dimension = divideD(dimensionless, time);

export type CountVerdict = 'fits' | 'revolutions' | 'radians';

/** Whether a term with these counts, of the target's dimension, may be given in the target unit. */
export function countsAgainst(counts: FormulaCounts, target: Unit): CountVerdict {
  const wanted = target.counts.r;
  if (!isZeroR(target.counts.rad)) return fitsAngle(counts, wanted) ? 'fits' : 'revolutions';
  if (!isZeroR(target.counts.hz) && !isZeroR(counts.rad) && isZeroR(counts.pi)) return 'radians';
  const s = standing(counts);
  if (stands(s, wanted)) return 'fits';
  if (isZeroR(wanted)) {
    if (equalD(target.dimension, perTime) && stands(s, one)) return 'fits';
    if (equalD(target.dimension, time) && stands(s, minusOne)) return 'fits';
  }
  return 'revolutions';
}

/** What a quantity without a declared unit passes on: the revolutions nearest 0, and its radians where no pi may have eaten them. */
export function settled(counts: FormulaCounts): FormulaCounts {
  const r = nearestZero(standing(counts));
  const rad = isZeroR(counts.pi) ? counts.rad : zero;
  return isZeroR(r) && isZeroR(rad) ? noCounts : { r, hz: zero, pi: zero, rad };
}
