// Exponents written as plain numbers: 2, -1, 1/3, 0.5, (2/3).
//
// 1. Only literals, signs, parentheses and + - * / between them; everything else is no constant exponent.
// 2. Exact, and small: numerator and denominator of at most 10 000, so four decimals.
// Not here: exponents as doubles (arithmetic.ts).

import { addR, mulR, negR, type Rational, rational, subR } from '../quantity/index.ts';
import type { Expr } from './expr.ts';

const largest = 10000;

export function rationalOf(expr: Expr): Rational | undefined {
  const value = exact(expr);
  return value !== undefined && Math.abs(value.n) <= largest && value.d <= largest ? value : undefined;
}

function exact(expr: Expr): Rational | undefined {
  switch (expr.kind) {
    case 'number':
      return decimal(expr.value);
    case 'parens':
      return exact(expr.inner);
    case 'minus': {
      const inner = exact(expr.inner);
      return inner && negR(inner);
    }
    case 'binary':
      return combined(expr);
    default:
      return undefined;
  }
}

function decimal(value: number): Rational | undefined {
  for (let scale = 1; scale <= largest; scale *= 10) {
    const n = Math.round(value * scale);
    if (n / scale === value) return Math.abs(n) <= largest * scale ? rational(n, scale) : undefined;
  }
  return undefined;
}

function combined(expr: Extract<Expr, { kind: 'binary' }>): Rational | undefined {
  const left = rationalOf(expr.left);
  const right = rationalOf(expr.right);
  if (left === undefined || right === undefined) return undefined;
  switch (expr.operator) {
    case '+':
      return addR(left, right);
    case '-':
      return subR(left, right);
    case '*':
      return mulR(left, right);
    case '/':
      return right.n === 0 ? undefined : mulR(left, rational(right.d * Math.sign(right.n), Math.abs(right.n)));
    case '^':
      return undefined;
  }
}
