// Exponents written as plain numbers: 2, -1, 1/3, 0.5, (2/3).
//
// 1. Only literals, signs, parentheses and + - * / between them; everything else is no constant exponent.
// 2. Exact, and small: numerator and denominator of at most four digits.

import { addR, mulR, negR, type Rational, rational, rationalOfText, subR } from '../quantity/index.ts';
import type { Expr } from './expr.ts';

const largest = 9999;

export function rationalOf(expr: Expr): Rational | undefined {
  const value = exact(expr);
  return value !== undefined && Math.abs(value.n) <= largest && value.d <= largest ? value : undefined;
}

function exact(expr: Expr): Rational | undefined {
  switch (expr.kind) {
    case 'number':
      if (Number.isInteger(expr.value)) return expr.value <= largest ? rational(expr.value) : undefined;
      return rationalOfText(expr.text.replace(',', '.').replace(/^\./, '0.'));
    case 'parens':
      return exact(expr.inner);
    case 'minus': {
      const inner = exact(expr.inner);
      return inner && negR(inner);
    }
    case 'binary': {
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
    default:
      return undefined;
  }
}
