// Products without a sign: where `a b` is a product, and where it is refused because it can be read in two ways.
//
// 1. Never beside a `/`: `a/b c` and `1/2 x` have two readings; `a b/c` has one and is refused by the same rule.
// 2. Never after an exponent that is a name: `e^mu theta` has two readings, `x^2 y` has one.
// Not here: all other operators (walk.ts).

import type { Expr, Span } from './expr.ts';
import type { Node, OperatorNode } from './parser.ts';
import { excerpt, refusal, writeInstead } from './refusal.ts';
import type { Walk } from './walking.ts';
import { refuse, spanOf } from './walking.ts';

/** Reads a whole chain of factors without signs, from the left. */
export function product(walk: Walk, node: OperatorNode): Expr {
  const nodes: Node[] = [];
  let head: Node = node;
  while (head.type === 'OperatorNode' && head.implicit) {
    const [left, right]: readonly Node[] = head.args;
    nodes.unshift(right as Node);
    head = left as Node;
    walk.budget--;
  }
  let tree = walk.read(head);
  const first = walk.first;
  const factors: Expr[] = [tree];
  for (const factor of nodes) {
    const right = walk.read(factor);
    factors.push(right);
    tree = { kind: 'binary', operator: '*', implicit: true, left: tree, right, at: spanOf(walk, first, walk.last) };
  }
  walk.first = first;
  checkQuotientInFront(walk, factors, tree.at);
  checkPowers(walk, factors, tree.at);
  return tree;
}

/** `1/2 x`: the grammar takes a quotient of two numbers before the product. */
function checkQuotientInFront(walk: Walk, factors: readonly Expr[], at: Span): void {
  const head = factors[0];
  if (head?.kind !== 'binary' || head.operator !== '/') return;
  const rest = factors.slice(1).map((f) => textOf(walk, f));
  const numerator = textOf(walk, head.left);
  const narrow = [textOf(walk, head), ...rest].join('*');
  const wide = `${numerator}/(${[textOf(walk, head.right), ...rest].join('*')})`;
  twoReadings(walk, at, wide, narrow);
}

/** `e^mu theta`: the eye takes theta into the exponent, the grammar does not. */
function checkPowers(walk: Walk, factors: readonly Expr[], at: Span): void {
  const index = factors.findIndex((factor, i) => i < factors.length - 1 && endsInBareExponent(factor));
  if (index < 0) return;
  const texts = factors.map((f) => textOf(walk, f));
  const power = factors[index] as Expr;
  const exponent = lastExponent(power) as Expr;
  const base = walk.source.slice(power.at[0], exponent.at[0]);
  const inside = [walk.source.slice(exponent.at[0], power.at[1]), ...texts.slice(index + 1)].join('*');
  const wide = [...texts.slice(0, index), `${base}(${inside})`].join('*');
  twoReadings(walk, at, wide, texts.join('*'));
}

function endsInBareExponent(factor: Expr): boolean {
  const exponent = lastExponent(factor);
  const bare = exponent?.kind === 'minus' ? exponent.inner : exponent;
  return bare?.kind === 'name' || bare?.kind === 'constant';
}

/** The exponent with which a factor ends, innermost of a tower. */
function lastExponent(factor: Expr): Expr | undefined {
  let at = factor;
  let exponent: Expr | undefined;
  for (;;) {
    if (at.kind === 'minus') {
      if (exponent === at && at.inner.kind !== 'binary') return exponent;
      at = at.inner;
    } else if (at.kind === 'binary' && at.operator === '^') {
      exponent = at.right;
      at = at.right;
    } else {
      return exponent;
    }
  }
}

/** Refuses a quotient beside which a product has no sign. */
export function checkQuotient(walk: Walk, left: Expr, right: Expr, at: Span): void {
  if (isImplicit(right)) {
    const factors = explicit(walk, right);
    const numerator = walk.source.slice(at[0], right.at[0]);
    twoReadings(walk, at, `${numerator}(${factors})`, `${numerator}${factors}`);
    return;
  }
  const beside = left.kind === 'binary' && left.operator === '*' && !left.implicit ? left.right : left;
  if (!isImplicit(beside)) return;
  const span: Span = [beside.at[0], at[1]];
  const instead = `${explicit(walk, beside)}${walk.source.slice(beside.at[1], at[1])}`;
  refuse(
    walk,
    refusal(
      'ambiguous-product',
      `“${excerpt(walk.source.slice(...span))}”: beside a / no * is left out; write ${excerpt(instead)}.`,
      span,
      [writeInstead(span, instead)],
    ),
  );
}

function twoReadings(walk: Walk, at: Span, one: string, two: string): void {
  const typed = excerpt(walk.source.slice(...at));
  refuse(
    walk,
    refusal(
      'ambiguous-product',
      `“${typed}” can be read as ${excerpt(one)} or as ${excerpt(two)}: write the one that is meant.`,
      at,
      [writeInstead(at, one), writeInstead(at, two)],
    ),
  );
}

function isImplicit(expr: Expr): expr is Expr & { kind: 'binary' } {
  return expr.kind === 'binary' && expr.operator === '*' && expr.implicit;
}

/** A product as typed, with its signs. */
function explicit(walk: Walk, expr: Expr): string {
  return isImplicit(expr) ? `${explicit(walk, expr.left)}*${textOf(walk, expr.right)}` : textOf(walk, expr);
}

function textOf(walk: Walk, expr: Expr): string {
  return walk.source.slice(...expr.at);
}
