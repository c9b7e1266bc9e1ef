// Dimensions: the exponents of the seven base quantities of the SI, in the order L M T I Θ N J (ISQ, ISO 80000-1).
//
// 1. Seven rational exponents, always; the order never changes, keys and files may rely on it.
// 2. Plane angle, revolutions and plain numbers all have the dimension one; what tells them apart is counted by the unit.
// Not here: names of kinds of quantity (kind.ts), units (unit.ts).

import type { Rational } from './rational.ts';
import { addR, equalR, isZeroR, mulR, rational, rationalOfText, subR, textR, zeroR } from './rational.ts';

export type Dimension = readonly Rational[];

const baseLetters: readonly string[] = ['L', 'M', 'T', 'I', 'Θ', 'N', 'J'];
/** Coherent SI units of the base quantities, same order. */
export const baseSymbols: readonly string[] = ['m', 'kg', 's', 'A', 'K', 'mol', 'cd'];

export const dimensionless: Dimension = baseLetters.map(() => zeroR);

const combine = (a: Dimension, b: Dimension, join: (x: Rational, y: Rational) => Rational): Dimension =>
  a.map((exponent, place) => join(exponent, b[place] ?? zeroR));

export const multiplyD = (a: Dimension, b: Dimension): Dimension =>
  a === dimensionless ? b : b === dimensionless ? a : combine(a, b, addR);
export const divideD = (a: Dimension, b: Dimension): Dimension => (b === dimensionless ? a : combine(a, b, subR));
export const powerD = (a: Dimension, exponent: Rational): Dimension => a.map((each) => mulR(each, exponent));
export const isDimensionless = (a: Dimension): boolean => a.every(isZeroR);

export function equalD(a: Dimension, b: Dimension): boolean {
  for (let place = 0; place < baseLetters.length; place++) {
    if (!equalR(a[place] ?? zeroR, b[place] ?? zeroR)) return false;
  }
  return true;
}

/** One text per dimension, such as "L1 M1 T-2"; "1" for the dimension one. */
export function dimensionKey(a: Dimension): string {
  let key = '';
  for (let place = 0; place < baseLetters.length; place++) {
    const exponent = a[place] ?? zeroR;
    if (exponent.n !== 0) key += `${key === '' ? '' : ' '}${baseLetters[place]}${textR(exponent)}`;
  }
  return key === '' ? '1' : key;
}

/** The dimension of a key such as "L M T-2" or "L1 M1 T-2"; "1" is the dimension one. Throws RangeError for any other text. */
export function dimensionOf(key: string): Dimension {
  const exponents: Rational[] = [...dimensionless];
  for (const word of key === '1' ? [] : key.split(' ')) {
    const place = baseLetters.indexOf(word.slice(0, 1));
    const exponent = word.length === 1 ? rational(1) : rationalOfText(word.slice(1));
    if (place < 0 || exponent === undefined) throw new RangeError(`no dimension: ${key}`);
    exponents[place] = exponent;
  }
  return exponents;
}
