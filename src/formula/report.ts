// Leaving a problem while inferring.

import type { Fix, Problem } from '../quantity/index.ts';
import type { Span } from './expr.ts';
import type { Context } from './term.ts';

/** Leaves the problem and gives undefined, so that a rule can end with it. */
export function report(
  ctx: Context,
  code: string,
  message: string,
  at: Span | undefined,
  fixes: readonly Fix[] = [],
  severity: 'error' | 'warning' = 'error',
): undefined {
  const problem: Problem = {
    code,
    severity,
    message,
    ...(at !== undefined && { at }),
    ...(fixes.length > 0 && { fixes }),
  };
  ctx.problems.push(problem);
  return undefined;
}
