// The operations of formulas on single doubles: what the columns (run.ts) and the exact walk (explain.ts) share.
//
// 1. Both evaluators call these or the same operation of Math, so their results are equal bit for bit.
// 2. Powers by a constant are shortened where that is at least as exact: x^2 = x*x, x^-1 = 1/x, x^0.5 = sqrt(x); the form is
//    chosen from the formula alone, never from a value.
// Not here: problems (explain.ts), columns (kernels.ts).

import type { Expr, FunctionName } from './expr.ts';

/** Nearest whole number, ties to even; keeps what is already whole. */
export function roundEven(x: number): number {
  const floor = Math.floor(x);
  const rest = x - floor;
  if (rest < 0.5) return floor;
  if (rest > 0.5) return floor + 1;
  if (rest !== 0.5) return x;
  return floor % 2 === 0 ? floor : floor + 1;
}

export type PowerForm = 'self' | 'square' | 'cube' | 'fourth' | 'inverse' | 'inverse square' | 'root' | 'general';

export function powerForm(exponent: number | undefined): PowerForm {
  switch (exponent) {
    case 1:
      return 'self';
    case 2:
      return 'square';
    case 3:
      return 'cube';
    case 4:
      return 'fourth';
    case -1:
      return 'inverse';
    case -2:
      return 'inverse square';
    case 0.5:
      return 'root';
    default:
      return 'general';
  }
}

export function power(base: number, exponent: number, form: PowerForm): number {
  switch (form) {
    case 'self':
      return base;
    case 'square':
      return base * base;
    case 'cube':
      return base * base * base;
    case 'fourth': {
      const square = base * base;
      return square * square;
    }
    case 'inverse':
      return 1 / base;
    case 'inverse square':
      return 1 / (base * base);
    case 'root':
      return Math.sqrt(base);
    case 'general':
      return base ** exponent;
  }
}

/** The value of an expression that holds only literals and constants; undefined where anything else is in it. */
export function constantOf(expr: Expr): number | undefined {
  switch (expr.kind) {
    case 'number':
      return expr.value;
    case 'constant':
      return expr.name === 'pi' ? Math.PI : Math.E;
    case 'parens':
      return constantOf(expr.inner);
    case 'minus': {
      const inner = constantOf(expr.inner);
      return inner === undefined ? undefined : -inner;
    }
    case 'binary': {
      const left = constantOf(expr.left);
      if (left === undefined) return undefined;
      const right = constantOf(expr.right);
      if (right === undefined) return undefined;
      return binary(expr.operator, left, right, isE(expr.left));
    }
    default:
      return undefined;
  }
}

/** True for the constant e, through parentheses: `e^x` is computed as exp(x). */
export function isE(expr: Expr): boolean {
  if (expr.kind === 'parens') return isE(expr.inner);
  return expr.kind === 'constant' && expr.name === 'e';
}

function binary(operator: '+' | '-' | '*' | '/' | '^', left: number, right: number, baseIsE: boolean): number {
  switch (operator) {
    case '+':
      return left + right;
    case '-':
      return left - right;
    case '*':
      return left * right;
    case '/':
      return left / right;
    case '^':
      return baseIsE ? Math.exp(right) : power(left, right, powerForm(right));
  }
}

/** Functions of one argument; those of two and more are min, max, atan2 and hypot. */
export function apply(name: FunctionName, x: number): number {
  switch (name) {
    case 'exp':
      return Math.exp(x);
    case 'ln':
      return Math.log(x);
    case 'log10':
      return Math.log10(x);
    case 'sqrt':
      return Math.sqrt(x);
    case 'cbrt':
      return Math.cbrt(x);
    case 'abs':
      return Math.abs(x);
    case 'sign':
      return Math.sign(x);
    case 'sin':
      return Math.sin(x);
    case 'cos':
      return Math.cos(x);
    case 'tan':
      return Math.tan(x);
    case 'asin':
      return Math.asin(x);
    case 'acos':
      return Math.acos(x);
    case 'atan':
      return Math.atan(x);
    case 'sinh':
      return Math.sinh(x);
    case 'cosh':
      return Math.cosh(x);
    case 'tanh':
      return Math.tanh(x);
    case 'floor':
      return Math.floor(x);
    case 'ceil':
      return Math.ceil(x);
    case 'round':
      return roundEven(x);
    case 'min':
    case 'max':
    case 'hypot':
    case 'atan2':
      throw new Error(`${name} is no function of one argument`);
  }
}
