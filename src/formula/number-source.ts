// Bare numbers in formulas: what a checker could not trace is better a given with a source.
//
// 1. Passed without a word: whole numbers up to 12, 0.5, the divisors of section properties and beam deflections, all exponents.
// 2. Everything else is a warning, once a literal.

import { childrenOf } from './children.ts';
import type { Expr } from './expr.ts';
import { report } from './report.ts';
import type { Context } from './term.ts';

/** Divisors of geometry and elasticity: second moments of area (64, 32, 16), deflections of beams (48, 384), 24 of a moment of a third degree. */
const usual: ReadonlySet<number> = new Set([0.5, 16, 24, 32, 48, 64, 384]);
const largestSmall = 12;

export function checkNumbers(ctx: Context, expr: Expr): void {
  switch (expr.kind) {
    case 'number': {
      const small = Number.isInteger(expr.value) && expr.value <= largestSmall;
      if (small || usual.has(expr.value) || ctx.spoken.has(expr)) return;
      report(
        ctx,
        'number-without-source',
        `${expr.text} is a number without a source: make it a given, with its unit and where it comes from`,
        expr.at,
        [],
        'warning',
      );
      return;
    }
    case 'binary':
      checkNumbers(ctx, expr.left);
      if (expr.operator !== '^' || !isLiteral(expr.right)) checkNumbers(ctx, expr.right);
      return;
    default:
      for (const part of childrenOf(expr)) checkNumbers(ctx, part);
  }
}

/** An exponent of nothing but literals. */
function isLiteral(expr: Expr): boolean {
  if (expr.kind === 'parens' || expr.kind === 'minus') return isLiteral(expr.inner);
  if (expr.kind === 'binary') return isLiteral(expr.left) && isLiteral(expr.right);
  return expr.kind === 'number';
}
