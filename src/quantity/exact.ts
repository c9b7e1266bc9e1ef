// Exact numbers for conversion: a rational number of big integers times a whole power of π.
//
// 1. d > 0, lowest terms, zero is 0/1 with π⁰: equal numbers of the same power of π have equal fields.
// 2. A result is rounded once, at the very end, to the nearest double, ties to even, subnormal range included.
// 3. π stands by 100 decimals. A double would come out wrong only if the exact value lay within 1e-98 of the middle of two
//    doubles; the same holds for the roots that rootE cannot take exactly.
// Not here: decimal numerals (numeral.ts), which factor a unit has (units.*.ts).

import type { Rational } from './rational.ts';

export interface Exact {
  readonly n: bigint;
  readonly d: bigint;
  readonly pi: number;
}

/** π times 10^decimalsOfPi, cut. */
export const decimalsOfPi = 100;
export const piDigits = 31415926535897932384626433832795028841971693993751058209749445923078164062862089986280348253421170679n;
const piScale = 10n ** BigInt(decimalsOfPi);

const absBig = (a: bigint): bigint => (a < 0n ? -a : a);

function gcd(a: bigint, b: bigint): bigint {
  let [x, y] = [absBig(a), absBig(b)];
  while (y !== 0n) [x, y] = [y, x % y];
  return x;
}

function lowest(n: bigint, d: bigint, pi: number): Exact {
  if (d === 0n) throw new RangeError('division by zero in an exact number');
  if (n === 0n) return { n: 0n, d: 1n, pi: 0 };
  if (d === 1n) return { n, d, pi };
  const common = gcd(n, d) * (d < 0n ? -1n : 1n);
  return { n: n / common, d: d / common, pi };
}

/** n/d. Throws RangeError for d = 0 and for numbers that are not integers. */
export const exactOf = (n: bigint | number, d: bigint | number = 1): Exact => lowest(BigInt(n), BigInt(d), 0);
export const oneE: Exact = exactOf(1);
export const multiplyE = (a: Exact, b: Exact): Exact => lowest(a.n * b.n, a.d * b.d, a.pi + b.pi);
export const divideE = (a: Exact, b: Exact): Exact => lowest(a.n * b.d, a.d * b.n, a.pi - b.pi);
export const equalE = (a: Exact, b: Exact): boolean => a.n === b.n && a.d === b.d && a.pi === b.pi;

/** a to a whole power, negative ones included. */
export function powerE(a: Exact, exponent: number): Exact {
  const times = BigInt(Math.abs(exponent));
  return exponent >= 0
    ? lowest(a.n ** times, a.d ** times, a.pi * exponent)
    : lowest(a.d ** times, a.n ** times, a.pi * exponent);
}

/** Greatest whole r with r^degree ≤ a, by Newton's iteration from above. */
function wholeRoot(a: bigint, degree: bigint): bigint {
  if (a < 2n) return a;
  let root = 1n << BigInt(Math.ceil(a.toString(2).length / Number(degree)) + 1);
  for (;;) {
    const next = ((degree - 1n) * root + a / root ** (degree - 1n)) / degree;
    if (next >= root) return root;
    root = next;
  }
}

/** The root of a positive number: exact where it is rational, else to 90 digits. */
export function rootE(a: Exact, degree: number): Exact {
  if (degree === 1) return a;
  const power = BigInt(degree);
  if (a.pi % degree === 0) {
    const [n, d] = [wholeRoot(a.n, power), wholeRoot(a.d, power)];
    if (n ** power === a.n && d ** power === a.d) return lowest(n, d, a.pi / degree);
  }
  const { n, d } = withoutPi(a);
  // 10^(90 + half the difference in size) keeps 90 digits for small numbers too.
  const places = BigInt(90 + Math.max(0, d.toString().length - n.toString().length));
  return lowest(wholeRoot((n * 10n ** (places * power)) / d, power), 10n ** places, 0);
}

export const rationalPowerE = (a: Exact, exponent: Rational): Exact => rootE(powerE(a, exponent.n), exponent.d);

/** The same number with π replaced by its 100 decimals. */
function withoutPi(a: Exact): { n: bigint; d: bigint } {
  if (a.pi === 0) return a;
  const power = BigInt(Math.abs(a.pi));
  const [up, down] = a.pi > 0 ? [piDigits, piScale] : [piScale, piDigits];
  return { n: a.n * up ** power, d: a.d * down ** power };
}

const wholeDoubles = 2 ** 53;

/** The double nearest to the number; ±Infinity beyond the greatest. */
export function doubleOf(a: Exact): number {
  if (a.pi !== 0) {
    const plain = withoutPi(a);
    return nearestDouble(plain.n, plain.d);
  }
  return nearestDouble(a.n, a.d);
}

const bitLength = (a: bigint): number => {
  const hex = a.toString(16);
  return 4 * hex.length - Math.clz32(Number.parseInt(hex[0] ?? '0', 16)) + 28;
};

/** The double nearest to n/d, d > 0, ties to even. */
export function nearestDouble(n: bigint, d: bigint): number {
  const [up, down] = [Number(n), Number(d)];
  // Both are exact doubles: one division is one rounding.
  if (Math.abs(up) <= wholeDoubles && down <= wholeDoubles) return up / down;
  if (n < 0n) return -nearestDouble(-n, d);
  const size = bitLength(n) - bitLength(d);
  if (size > 1025) return Number.POSITIVE_INFINITY;
  if (size < -1080) return 0;
  // 2^-1074 is the smallest step of a double: a finer quotient would be rounded twice.
  const shift = Math.min(66 - size, 1074);
  const scaled = shift >= 0 ? n << BigInt(shift) : n;
  const divisor = shift >= 0 ? d : d << BigInt(-shift);
  let quotient = scaled / divisor;
  const rest = scaled - quotient * divisor;
  let bits = shift;
  if (shift === 1074 && bitLength(quotient) <= 53) {
    // Subnormal or nearly: the unit of the quotient is the unit of the double.
    const twice = 2n * rest;
    if (twice > divisor || (twice === divisor && (quotient & 1n) === 1n)) quotient += 1n;
  } else {
    // A last bit that says "something follows" keeps a tie from being taken for one.
    quotient = (quotient << 1n) | (rest === 0n ? 0n : 1n);
    bits += 1;
  }
  // Number(bigint) rounds to nearest, ties to even (ECMAScript); the two factors keep 2^-bits from underflowing.
  const half = Math.trunc(bits / 2);
  return Number(quotient) * 2 ** -half * 2 ** -(bits - half);
}

const float = new Float64Array(1);
const floatBits = new BigUint64Array(float.buffer);

/** The exact binary value of a finite double. Throws RangeError for the others. */
export function exactOfDouble(x: number): Exact {
  const { n, d } = fractionOfDouble(x);
  return { n, d, pi: 0 };
}

/** n/d of a finite double in lowest terms, d a power of two. */
export function fractionOfDouble(x: number): { n: bigint; d: bigint } {
  if (!Number.isFinite(x)) throw new RangeError(`no exact value: ${x}`);
  if (Number.isSafeInteger(x)) return { n: BigInt(x), d: 1n };
  float[0] = x;
  const bits = floatBits[0] ?? 0n;
  const power = Number((bits >> 52n) & 0x7ffn);
  let mantissa = bits & 0xfffffffffffffn;
  if (power > 0) mantissa |= 0x10000000000000n;
  let exponent = Math.max(power, 1) - 1075;
  const zeros = trailingZeros(mantissa);
  mantissa >>= BigInt(zeros);
  exponent += zeros;
  if (x < 0) mantissa = -mantissa;
  return exponent >= 0 ? { n: mantissa << BigInt(exponent), d: 1n } : { n: mantissa, d: 1n << BigInt(-exponent) };
}

function trailingZeros(a: bigint): number {
  const low = Number(a & 0xffffffffn);
  if (low !== 0) return 31 - Math.clz32(low & -low);
  const high = Number(a >> 32n);
  return high === 0 ? 0 : 63 - Math.clz32(high & -high);
}

const numberWord = /^(\d+)(?:\.(\d+))?(?:e(-?\d+))?(?:\^(\d+))?$/;

/**
 * Reads a factor of a unit table: decimal numerals and `pi` joined by * and /, from left to right, such as
 * "0.45359237*9.80665/0.0254^2" or "pi/180". Throws RangeError for any other text.
 */
export function exactOfText(text: string): Exact {
  let result = oneE;
  for (const [, sign, word] of `*${text}`.matchAll(/([*/])([^*/]*)/g)) {
    const factor = word === 'pi' ? { n: 1n, d: 1n, pi: 1 } : exactOfWord(word ?? '', text);
    result = sign === '*' ? multiplyE(result, factor) : divideE(result, factor);
  }
  return result;
}

function exactOfWord(word: string, text: string): Exact {
  const match = numberWord.exec(word);
  if (!match) throw new RangeError(`no exact factor: ${text}`);
  const decimals = match[2] ?? '';
  const digits = exactOf(BigInt(`${match[1]}${decimals}`));
  const scaled = multiplyE(digits, powerE(exactOf(10), Number(match[3] ?? 0) - decimals.length));
  return powerE(scaled, Number(match[4] ?? 1));
}
