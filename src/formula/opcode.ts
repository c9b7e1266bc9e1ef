// The instructions of a compiled formula: what the numbers in a program mean.
//
// 1. An instruction is five integers: operation, destination slot, operand slots a, b, c (unused ones are 0).
// 2. The list is closed: there is one kernel (kernels.ts, kernels-fused.ts) and one case in run-one.ts for each operation.
// 3. For lookups b is the number of a table of the program, not a slot.
// 4. `addK` and the like compute what `add` does; their operand K is a constant, read once for a whole column.
// 5. Two steps in one: `multiplyAdd` is (a*b) + c, `subtractByMultiply` is c − (a*b). Each step rounds by itself.
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
  addAdd: 55,
  addSubtract: 56,
  addMultiply: 57,
  addDivide: 58,
  subtractAdd: 59,
  subtractSubtract: 60,
  subtractMultiply: 61,
  subtractDivide: 62,
  multiplyAdd: 63,
  multiplySubtract: 64,
  multiplyMultiply: 65,
  multiplyDivide: 66,
  divideAdd: 67,
  divideSubtract: 68,
  divideMultiply: 69,
  divideDivide: 70,
  subtractByAdd: 71,
  subtractBySubtract: 72,
  subtractByMultiply: 73,
  subtractByDivide: 74,
  divideByAdd: 75,
  divideBySubtract: 76,
  divideByMultiply: 77,
  divideByDivide: 78,
} as const;

export const operationCount = Object.keys(op).length;

type OneArgument = Exclude<FunctionName, 'min' | 'max' | 'hypot' | 'atan2'>;

export const functionOp: { readonly [name in OneArgument]: number } = {
  exp: op.exp,
  ln: op.ln,
  log10: op.log10,
  sqrt: op.sqrt,
  cbrt: op.cbrt,
  abs: op.abs,
  sign: op.sign,
  sin: op.sin,
  cos: op.cos,
  tan: op.tan,
  asin: op.asin,
  acos: op.acos,
  atan: op.atan,
  sinh: op.sinh,
  cosh: op.cosh,
  tanh: op.tanh,
  floor: op.floor,
  ceil: op.ceil,
  round: op.round,
};

export const compareOp: { readonly [operator in CompareOperator]: number } = {
  '<': op.less,
  '<=': op.lessEqual,
  '>': op.greater,
  '>=': op.greaterEqual,
  '==': op.equal,
  '!=': op.unequal,
};

type Basic = '+' | '-' | '*' | '/';
type Pairs = { readonly [inner in Basic]: { readonly [outer in Basic]: number } };

/** (a inner b) outer c. */
export const innerFirst: Pairs = {
  '+': { '+': op.addAdd, '-': op.addSubtract, '*': op.addMultiply, '/': op.addDivide },
  '-': { '+': op.subtractAdd, '-': op.subtractSubtract, '*': op.subtractMultiply, '/': op.subtractDivide },
  '*': { '+': op.multiplyAdd, '-': op.multiplySubtract, '*': op.multiplyMultiply, '/': op.multiplyDivide },
  '/': { '+': op.divideAdd, '-': op.divideSubtract, '*': op.divideMultiply, '/': op.divideDivide },
};

/** c outer (a inner b); sums and products are the same either way round. */
export const innerLast: Pairs = {
  '+': { '+': op.addAdd, '-': op.subtractByAdd, '*': op.addMultiply, '/': op.divideByAdd },
  '-': { '+': op.subtractAdd, '-': op.subtractBySubtract, '*': op.subtractMultiply, '/': op.divideBySubtract },
  '*': { '+': op.multiplyAdd, '-': op.subtractByMultiply, '*': op.multiplyMultiply, '/': op.divideByMultiply },
  '/': { '+': op.divideAdd, '-': op.subtractByDivide, '*': op.divideMultiply, '/': op.divideByDivide },
};
