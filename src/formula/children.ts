// The parts of a node, in the order of the text.

import type { Expr } from './expr.ts';

export function childrenOf(expr: Expr): readonly Expr[] {
  switch (expr.kind) {
    case 'parens':
    case 'minus':
    case 'not':
      return [expr.inner];
    case 'binary':
    case 'logic':
      return [expr.left, expr.right];
    case 'compare':
      return expr.sides;
    case 'choose':
      return [expr.test, expr.then, expr.otherwise];
    case 'call':
      return expr.args;
    case 'table':
      return [expr.key];
    default:
      return [];
  }
}
