// What a formula reads whatever happens: trouble in one of these quantities always shows in the result.
//
// 1. Left out is what stands in one branch of a choice or to the right of `and` and `or`: that may have no bearing on the result.
// Not here: how trouble is kept from vanishing (kernels.ts), all names of a formula (parse.ts).

import { childrenOf } from './children.ts';
import type { Expr } from './expr.ts';

/** Names that the result depends on in every entry. */
export function alwaysRead(expr: Expr): ReadonlySet<string> {
  const names = new Set<string>();
  const stack: Expr[] = [expr];
  for (let part = stack.pop(); part !== undefined; part = stack.pop()) {
    if (part.kind === 'name') names.add(part.name);
    else if (part.kind === 'choose') stack.push(part.test);
    else if (part.kind === 'logic') stack.push(part.left);
    else stack.push(...childrenOf(part));
  }
  return names;
}
