// The type of a formula before any number: dimensions, counted revolutions, kinds of temperature, texts and truth values.
//
// 1. Every problem names both sides and what to do; `at` points into the text of the formula, and is absent where the
//    problem is about the formula as a whole.
// 2. A cell that has failed is listed, never blamed again: what is built on it has no type and no problem of its own.
// Not here: the rules (infer-rules.ts, infer-call.ts, counts.ts, temperature.ts), numbers (compile.ts, explain.ts).

import { type Problem, readUnit, type Unit } from '../quantity/index.ts';
import { infer } from './infer-node.ts';
import { alike } from './infer-rules.ts';
import { checkTarget } from './infer-target.ts';
import { checkNumbers } from './number-source.ts';
import { type Formula, parseFormula } from './parse.ts';
import { report } from './report.ts';
import { type Context, type Scope, type Term, typeOfResult } from './term.ts';
import type { Type } from './type.ts';
import { unitCheck } from './unit-words.ts';
import { writeExpr } from './wording.ts';

export interface Inferred {
  /** What the formula gives; absent where it could not be inferred. Its counts are those before the declared unit. */
  readonly type?: Type;
  readonly problems: readonly Problem[];
  /** The unit check in words; absent where something does not fit. */
  readonly words?: string;
  /** Names of cells that failed before this one, in the order of the formula. */
  readonly failedNames: readonly string[];
}

export interface ComparedTypes extends Inferred {
  /** The problems of each side, with places in its text; those about both sides together have no place and stand on the left. */
  readonly leftProblems: readonly Problem[];
  readonly rightProblems: readonly Problem[];
}

/** The type of a derived quantity's formula, checked against its declared unit. */
export function inferFormula(formula: Formula, scope: Scope, target?: Unit): Inferred {
  return inferred(formula, scope, target, true);
}

function inferred(formula: Formula, scope: Scope, target: Unit | undefined, propose: boolean): Inferred {
  const ctx = contextOf(formula, scope, target, propose);
  const term = infer(ctx, formula.expr);
  const value = term && asValue(ctx, formula, term);
  const fits = value !== undefined && (target === undefined || checkTarget(ctx, formula.expr, value, target));
  checkNumbers(ctx, formula.expr);
  const failedNames = formula.names.filter((name) => ctx.failed.has(name));
  if (value === undefined) return { problems: ctx.problems, failedNames };
  const type = value.type;
  if (!fits || !propose) return { type, problems: ctx.problems, failedNames };
  return { type, problems: ctx.problems, failedNames, words: unitCheck(ctx, formula.expr, typeOfResult({ type }, target)) };
}

/** A derived quantity has a value: neither a text nor a truth value. */
function asValue(ctx: Context, formula: Formula, term: Term): Term | undefined {
  if (term.type.kind === 'quantity') return term;
  const what = writeExpr(formula.expr);
  return term.type.kind === 'truth'
    ? report(
        ctx,
        'truth-use',
        `${what} is true or false, a quantity needs a value; write ${what} ? 1 : 0, or make it a criterion`,
        undefined,
      )
    : report(
        ctx,
        'text-use',
        `${what} is a text, a quantity needs a value; look one up with entry, or compare the text with ==`,
        undefined,
      );
}

function contextOf(formula: Formula, scope: Scope, target: Unit | undefined, propose: boolean): Context {
  const { text } = formula;
  const problems: Problem[] = [];
  const failed = new Set<string>();
  const spoken = new Set<never>();
  if (!propose) return { scope, text, target, problems, failed, spoken, propose };
  return {
    scope,
    text,
    target,
    problems,
    failed,
    spoken,
    propose,
    prove: (other, changed) => {
      const read = parseFormula(other);
      return read.ok && holds(inferred(read.value, changed, target, false));
    },
    proveTarget: (unit) => {
      const read = readUnit(unit);
      return read.ok && holds(inferred(formula, scope, read.value, false));
    },
  };
}

const holds = (tried: Inferred): boolean =>
  !tried.problems.some(
    (problem) => problem.severity === 'error' && (problem.code === 'revolutions' || problem.code === 'conversion-number'),
  );

/**
 * Both sides of a criterion, or of the equation of a sought cell: one kind of quantity, one count of revolutions.
 * With `target`, the unit in which both are printed, each side must fit it as well.
 */
export function inferComparison(left: Formula, right: Formula, scope: Scope, target?: Unit): ComparedTypes {
  const contexts = [left, right].map((formula) => contextOf(formula, scope, target, true));
  const parts = [left, right].map((formula, index) => {
    const ctx = contexts[index]!;
    const term = infer(ctx, formula.expr);
    checkNumbers(ctx, formula.expr);
    return { expr: formula.expr, term: term && asValue(ctx, formula, term) };
  });
  const both = contextOf({ ...left, text: '' }, scope, undefined, false);
  const known = parts.every((part) => part.term !== undefined);
  const met = known ? alike(both, 'comparison', parts, [0, 0]) : undefined;
  if (met !== undefined && target !== undefined) {
    for (const [index, part] of parts.entries()) checkTarget(contexts[index]!, part.expr, part.term!, target);
  }
  const leftProblems = [...contexts[0]!.problems, ...both.problems.map(({ at: _, ...problem }) => problem)];
  const rightProblems = contexts[1]!.problems;
  const names = [...new Set([...left.names, ...right.names])];
  const failedNames = names.filter((name) => contexts.some((ctx) => ctx.failed.has(name)));
  const found = { problems: [...leftProblems, ...rightProblems], leftProblems, rightProblems, failedNames };
  if (met === undefined) return found;
  return { ...found, type: met.type, words: unitCheck(contexts[0]!, left.expr, met.type) };
}
