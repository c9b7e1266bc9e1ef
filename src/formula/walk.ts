// From the grammar's nodes to the syntax tree of a formula: only what is listed here passes.
//
// 1. A node that is not listed is refused; nothing is passed on unread.
// 2. Every tree node gets its span: leaves know their token, inner nodes reach from their first to their last token.
// 3. The first refusal is kept; after it the walk goes on without effect and its tree is thrown away.
// 4. At most `nodeBudget` nodes are walked (walking.ts).
// Not here: the token list (tokens.ts), calls (calls.ts), products without a sign (products.ts), meaning and units.

import { readCall } from './calls.ts';
import type { BinaryOperator, CompareOperator, Expr, Span } from './expr.ts';
import type { Node, OperatorNode, RawNumber } from './parser.ts';
import { checkQuotient, product } from './products.ts';
import { excerpt, refusal, writeInstead } from './refusal.ts';
import type { Walk } from './walking.ts';
import { nothing, refuse, spanOf, tokenIndex } from './walking.ts';

const arithmetic = new Map<string, BinaryOperator>([
  ['add', '+'],
  ['subtract', '-'],
  ['multiply', '*'],
  ['divide', '/'],
  ['pow', '^'],
]);
const comparisons = new Map<string, CompareOperator>([
  ['smaller', '<'],
  ['smallerEq', '<='],
  ['larger', '>'],
  ['largerEq', '>='],
  ['equal', '=='],
  ['unequal', '!='],
]);

/** Reads one node and what hangs on it. `walk.read` is this function. */
export function readNode(walk: Walk, node: Node): Expr {
  if (walk.problem) return nothing;
  if (--walk.budget < 0) {
    return refuse(
      walk,
      refusal('formula-too-long', 'The formula has too many parts: split it into quantities of their own.', [
        0,
        walk.source.length,
      ]),
    );
  }
  switch (node.type) {
    case 'SymbolNode':
      return leafName(walk, node);
    case 'ConstantNode':
      return leafConstant(walk, node.value);
    case 'ParenthesisNode': {
      const inner = walk.read(node.content);
      walk.first--;
      walk.last++;
      return { kind: 'parens', inner, at: spanOf(walk, walk.first, walk.last) };
    }
    case 'OperatorNode':
      return operator(walk, node);
    case 'RelationalNode':
      return compare(walk, node.conditionals, node.params);
    case 'ConditionalNode': {
      const test = walk.read(node.condition);
      const first = walk.first;
      const then = walk.read(node.trueExpr);
      const otherwise = walk.read(node.falseExpr);
      walk.first = first;
      return { kind: 'choose', test, then, otherwise, at: spanOf(walk, first, walk.last) };
    }
    case 'FunctionNode':
      return node.optional ? unlisted(walk, node) : readCall(walk, node.fn, node.args);
    default:
      return unlisted(walk, node);
  }
}

function unlisted(walk: Walk, node: Node): Expr {
  // The one way to reach a range: a colon without its question mark.
  const colon = walk.tokens.find((t) => t.kind === 'operator' && t.text === ':');
  const at: Span = colon ? [colon.from, colon.to] : [0, walk.source.length];
  if (node.type === 'RangeNode') {
    return refuse(walk, refusal('stray-colon', 'A “:” stands only in a choice: write test ? this : that.', at));
  }
  return refuse(
    walk,
    refusal(
      'not-in-formulas',
      `“${excerpt(walk.source)}” says something that is not part of formulas: use + - * / ^, parentheses, comparisons, choices and functions.`,
      at,
    ),
  );
}

function leafName(walk: Walk, node: Node): Expr {
  const index = tokenIndex(node);
  const token = index === undefined ? undefined : walk.tokens[index];
  if (index === undefined || token === undefined) return unlisted(walk, node);
  walk.first = walk.last = index;
  const at: Span = [token.from, token.to];
  if (token.text === 'pi' || token.text === 'e') return { kind: 'constant', name: token.text, at };
  walk.names.add(token.text);
  return { kind: 'name', name: token.text, at };
}

function leafConstant(walk: Walk, value: unknown): Expr {
  const index = typeof value === 'string' ? Number(value) : Number((value as RawNumber).raw);
  const token = walk.tokens[index];
  if (token === undefined) return nothing;
  walk.first = walk.last = index;
  const at: Span = [token.from, token.to];
  if (typeof value === 'string') return { kind: 'quoted', text: token.text, at };
  return { kind: 'number', text: token.text, value: Number(token.text), at };
}

function operator(walk: Walk, node: OperatorNode): Expr {
  const [left, right] = node.args;
  if (left === undefined || node.isPercentage) return unlisted(walk, node);
  if (right === undefined) return prefixed(walk, node, left);
  if (node.implicit) return product(walk, node);
  const compared = comparisons.get(node.fn);
  if (compared !== undefined) return compare(walk, [node.fn], node.args);
  const sign = arithmetic.get(node.fn);
  const logic = node.fn === 'and' || node.fn === 'or' ? node.fn : undefined;
  if (sign === undefined && logic === undefined) return unlisted(walk, node);
  const a = walk.read(left);
  const first = walk.first;
  const b = walk.read(right);
  walk.first = first;
  const at = spanOf(walk, first, walk.last);
  if (logic !== undefined) return { kind: 'logic', operator: logic, left: a, right: b, at };
  if (sign === '/') checkQuotient(walk, a, b, at);
  return { kind: 'binary', operator: sign as BinaryOperator, implicit: false, left: a, right: b, at };
}

function prefixed(walk: Walk, node: OperatorNode, operand: Node): Expr {
  const inner = walk.read(operand);
  walk.first--;
  const at = spanOf(walk, walk.first, walk.last);
  if (node.fn === 'unaryMinus') return { kind: 'minus', inner, at };
  if (node.fn === 'not') return { kind: 'not', inner, at };
  // A plus in front changes nothing and is not kept.
  if (node.fn === 'unaryPlus') return inner;
  return unlisted(walk, node);
}

/** The operand with which a side begins, outside parentheses. */
function leftmost(side: Expr | undefined): Expr | undefined {
  let at = side;
  while (at?.kind === 'binary') at = at.left;
  return at;
}

function compare(walk: Walk, functions: readonly string[], nodes: readonly Node[]): Expr {
  const sides: Expr[] = [];
  let first = 0;
  nodes.forEach((side, i) => {
    sides.push(walk.read(side));
    if (i === 0) first = walk.first;
  });
  walk.first = first;
  const at = spanOf(walk, first, walk.last);
  const head = leftmost(sides[0]);
  if (head?.kind === 'not') {
    const text = walk.source.slice(...at);
    const wide = `not (${walk.source.slice(head.inner.at[0], at[1])})`;
    const narrow = `(${walk.source.slice(...head.at)})${walk.source.slice(head.at[1], at[1])}`;
    return refuse(
      walk,
      refusal(
        'ambiguous-not',
        `“${excerpt(text)}” can be read as ${excerpt(wide)} or as ${excerpt(narrow)}: write the one that is meant.`,
        at,
        [writeInstead(at, wide), writeInstead(at, narrow)],
      ),
    );
  }
  return { kind: 'compare', operators: functions.map((f) => comparisons.get(f) as CompareOperator), sides, at };
}
