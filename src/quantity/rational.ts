// Small rational numbers, for the exponents of units and dimensions.
//
// 1. Always in lowest terms with d > 0; zero is 0/1.
// 2. n and d stay far below 2^53: who reads a text limits the exponents (unit-grammar.ts).
// Not here: exact conversion factors, which need big integers (exact.ts).

export interface Rational {
  readonly n: number;
  readonly d: number;
}

function gcd(a: number, b: number): number {
  let [x, y] = [Math.abs(a), Math.abs(b)];
  while (y !== 0) [x, y] = [y, x % y];
  return x;
}

export const zeroR: Rational = { n: 0, d: 1 };
export const oneR: Rational = { n: 1, d: 1 };
/** Exponents are mostly these: one object each. */
const smallest = -8;
const small: readonly Rational[] = Array.from({ length: 17 }, (_, at) =>
  at + smallest === 0 ? zeroR : at + smallest === 1 ? oneR : { n: at + smallest, d: 1 },
);

/** n/d in lowest terms. Throws RangeError unless both are safe integers and d is not 0. */
export function rational(n: number, d = 1): Rational {
  if (!Number.isSafeInteger(n) || !Number.isSafeInteger(d) || d === 0) throw new RangeError(`no rational number: ${n}/${d}`);
  if (n === 0) return zeroR;
  if (d === 1) return small[n - smallest] ?? { n, d };
  const common = gcd(n, d) * Math.sign(d);
  return { n: n / common, d: d / common };
}

export const addR = (a: Rational, b: Rational): Rational => rational(a.n * b.d + b.n * a.d, a.d * b.d);
export const subR = (a: Rational, b: Rational): Rational => rational(a.n * b.d - b.n * a.d, a.d * b.d);
export const mulR = (a: Rational, b: Rational): Rational => rational(a.n * b.n, a.d * b.d);
export const negR = (a: Rational): Rational => (a.n === 0 ? a : { n: -a.n, d: a.d });
export const equalR = (a: Rational, b: Rational): boolean => a.n === b.n && a.d === b.d;
export const isZeroR = (a: Rational): boolean => a.n === 0;
export const signR = (a: Rational): number => Math.sign(a.n);
/** Below, at or above 0 as a is less than, equal to or greater than b. */
export const compareR = (a: Rational, b: Rational): number => Math.sign(a.n * b.d - b.n * a.d);

/** "-1", "3/2". */
export const textR = (a: Rational): string => (a.d === 1 ? String(a.n) : `${a.n}/${a.d}`);

/** Reads "2", "-1/2", "0.5"; undefined for anything else, also for more than nine digits. */
export function rationalOfText(text: string): Rational | undefined {
  const match = /^\s*([+\-−]?)(\d{1,6})(?:\s*\/\s*(\d{1,6})|\.(\d{1,3}))?\s*$/.exec(text);
  if (!match) return undefined;
  const sign = match[1] === '-' || match[1] === '−' ? -1 : 1;
  const whole = Number(match[2]);
  if (match[3] !== undefined) return Number(match[3]) === 0 ? undefined : rational(sign * whole, Number(match[3]));
  if (match[4] === undefined) return rational(sign * whole);
  const scale = 10 ** match[4].length;
  return rational(sign * (whole * scale + Number(match[4])), scale);
}
