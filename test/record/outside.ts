// A program that is not ours reads calculator lines: the full mathjs library, given the line as text.
//
// It is told `ln` (its own name for it is log) and real cube roots, and its floor, ceil and round are replaced: they take numbers
// that lie within 1e-12 of a whole one for that one, and ties away from zero.

import { all, create } from 'mathjs';

const math = create(all ?? {});
const scope = {
  ln: (x: number) => Math.log(x),
  cbrt: (x: number) => Math.cbrt(x),
  floor: (x: number) => Math.floor(x),
  ceil: (x: number) => Math.ceil(x),
  round: (x: number) => (Math.abs(x % 1) === 0.5 && Math.round(x) % 2 !== 0 ? Math.round(x) - 1 : Math.round(x)),
};

export function evaluateOutside(line: string): number {
  return Number(math.evaluate(line, { ...scope }));
}

/** Value and weight of the last digit of a plain number: '1.376e+4' has 10. */
export function plainNumber(text: string): { readonly value: number; readonly last: number; readonly digits: number } {
  const match = /^-?(\d+)(?:\.(\d+))?(?:e([+-]?\d+))?$/.exec(text);
  if (!match) throw new Error(`“${text}” is no plain number`);
  const decimals = match[2] ?? '';
  return {
    value: Number(text),
    last: 10 ** (Number(match[3] ?? 0) - decimals.length),
    digits: `${match[1]}${decimals}`.replace(/^0+(?=\d)/, '').length,
  };
}
