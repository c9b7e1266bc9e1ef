// The instructions of a compiled formula: what the numbers in a program mean.
//
// 1. An instruction is five integers: operation, destination slot, operand slots a, b, c (unused ones are 0).
// 2. The list is closed: kernels.ts has one kernel and run.ts one case for each operation.
// 3. For lookups b is the number of a table of the program, not a slot.
// 4. `addK` and the like compute what `add` does; their operand K is a constant, read once for a whole column.
// Not here: which instructions a formula becomes (compile.ts).

import type { CompareOperator, FunctionName } from './expr.ts';

export const stride = 5;

export const op = {
  copy: 0,
  minus: 1,
  add: 2,
  subtract: 3,
  multiply: 4,
  divide: 5,
  power: 6,
  square: 7,
  cube: 8,
  fourth: 9,
  inverse: 10,
  inverseSquare: 11,
  exp: 12,
  ln: 13,
  log10: 14,
  sqrt: 15,
  cbrt: 16,
  abs: 17,
  sign: 18,
  sin: 19,
  cos: 20,
  tan: 21,
  asin: 22,
  acos: 23,
  atan: 24,
  sinh: 25,
  cosh: 26,
  tanh: 27,
  floor: 28,
  ceil: 29,
  round: 30,
  min: 31,
  max: 32,
  hypot: 33,
  hypot3: 34,
  atan2: 35,
  less: 36,
  lessEqual: 37,
  greater: 38,
  greaterEqual: 39,
  equal: 40,
  unequal: 41,
  and: 42,
  or: 43,
  not: 44,
  choose: 45,
  interpolate: 46,
  entryOfNumber: 47,
  entryOfText: 48,
  addK: 49,
  subtractK: 50,
  multiplyK: 51,
  divideK: 52,
  subtractFromK: 53,
  divideIntoK: 54,
} as const;

export const operationCount = Object.keys(op).length;

type OneArgument = Exclude<FunctionName, 'min' | 'max' | 'hypot' | 'atan2'>;

export const functionOp: { readonly [name in OneArgument]: number } = {
  exp: op.exp, ln: op.ln, log10: op.log10, sqrt: op.sqrt, cbrt: op.cbrt, abs: op.abs, sign: op.sign,
  sin: op.sin, cos: op.cos, tan: op.tan, asin: op.asin, acos: op.acos, atan: op.atan,
  sinh: op.sinh, cosh: op.cosh, tanh: op.tanh, floor: op.floor, ceil: op.ceil, round: op.round,
};

export const compareOp: { readonly [operator in CompareOperator]: number } = {
  '<': op.less, '<=': op.lessEqual, '>': op.greater, '>=': op.greaterEqual, '==': op.equal, '!=': op.unequal,
};

/**
 * Operands that can hide trouble, as bits (1 for a, 2 for b): an operand that is not finite may still give a finite result
 * (x/∞ = 0, atan ∞, min, comparisons, NaN^0). Everywhere else ∞ and NaN show in the result.
 */
export const hiding: ReadonlyMap<number, number> = new Map([
  [op.divide, 2], [op.power, 3], [op.inverse, 1], [op.inverseSquare, 1], [op.exp, 1], [op.sign, 1], [op.atan, 1], [op.tanh, 1],
  [op.min, 3], [op.max, 3], [op.atan2, 3],
  [op.less, 3], [op.lessEqual, 3], [op.greater, 3], [op.greaterEqual, 3], [op.equal, 3], [op.unequal, 3],
  [op.divideIntoK, 2],
]);
