// The walk of the inference: what each node of a formula is, from the names upwards.
//
// 1. One pass, no numbers computed; a part that cannot be typed is undefined and silences what is built on it.
// 2. Beside a text, a quoted literal is a text; everywhere else it is a quantity.
// Not here: the rules of combination (infer-rules.ts, infer-call.ts), the declared unit (infer-target.ts).

import { either } from '../quantity/index.ts';
import { piCounts } from './counts.ts';
import type { Expr } from './expr.ts';
import { callOf, lookUp, textKey } from './infer-call.ts';
import { alike, type Factor, type Part, powerOf, productOf, quantityOf, refuseReading, sumOf } from './infer-rules.ts';
import { readLiteral } from './literal.ts';
import { notATruth } from './messages.ts';
import { nearestNames } from './nearest.ts';
import { report } from './report.ts';
import { nearestText, textsOf } from './table.ts';
import { type Context, number, type Term, truth, typeOfUnit } from './term.ts';
import { writeExpr } from './wording.ts';

const truthTerm: Term = { type: truth };
const numberTerm: Term = { type: number };
const zeroTerm: Term = { type: { ...number, zero: true } };
const piTerm: Term = { type: { ...number, counts: piCounts } };

export function infer(ctx: Context, expr: Expr): Term | undefined {
  switch (expr.kind) {
    case 'number':
      return expr.value === 0 ? zeroTerm : numberTerm;
    case 'constant':
      return expr.name === 'pi' ? piTerm : numberTerm;
    case 'quoted':
      return literal(ctx, expr);
    case 'name':
      return named(ctx, expr);
    case 'parens':
      return infer(ctx, expr.inner);
    case 'minus':
      return negative(ctx, expr.inner);
    case 'not':
      return test(ctx, expr.inner, 'not') ? truthTerm : undefined;
    case 'logic': {
      const left = test(ctx, expr.left, expr.operator);
      const right = test(ctx, expr.right, expr.operator);
      return left && right ? truthTerm : undefined;
    }
    case 'binary':
      return binary(ctx, expr);
    case 'compare':
      return compare(ctx, expr);
    case 'choose': {
      test(ctx, expr.test, '?:');
      const then = part(ctx, expr.then);
      const otherwise = part(ctx, expr.otherwise);
      return alike(ctx, '?:', [then, otherwise], expr.at);
    }
    case 'call':
      return callOf(
        ctx,
        expr,
        expr.args.map((argument) => part(ctx, argument)),
      );
    case 'table': {
      const text = textKey(ctx, expr);
      const key = text && textLiteral(expr.key) ? undefined : part(ctx, expr.key);
      return lookUp(ctx, expr, key);
    }
  }
}

function part(ctx: Context, expr: Expr): Part {
  return { expr, term: infer(ctx, expr) };
}

function named(ctx: Context, expr: Extract<Expr, { kind: 'name' }>): Term | undefined {
  const type = ctx.scope.typeOf(expr.name);
  if (type === 'failed') {
    ctx.failed.add(expr.name);
    return undefined;
  }
  if (type === 'unknown-name') {
    const nearest = nearestNames(expr.name, ctx.scope.names());
    const typed = ctx.text.slice(...expr.at) || expr.name;
    const what = nearest.length > 0 ? `did you mean ${either(nearest)}` : 'define it in a cell of its own, or correct the name';
    const fixes = nearest.map((text) => ({ from: expr.at[0], to: expr.at[1], text, label: `write ${text}` }));
    return report(ctx, 'unknown-name', `no quantity is called ${typed}; ${what}`, expr.at, fixes);
  }
  return { type, plain: true };
}

function literal(ctx: Context, expr: Extract<Expr, { kind: 'quoted' }>): Term | undefined {
  const read = readLiteral(expr.text, ctx.scope.decimalSign ?? '.');
  if (!read.ok) {
    const by = expr.at[0] + 1;
    const at = read.problem.at ? ([read.problem.at[0] + by, read.problem.at[1] + by] as const) : expr.at;
    const fixes = read.problem.fixes?.map((fix) => ({ ...fix, from: fix.from + by, to: fix.to + by }));
    return report(ctx, read.problem.code, `"${expr.text}" is no quantity: ${read.problem.message}`, at, fixes);
  }
  if (read.value.tolerance !== undefined) {
    return report(
      ctx,
      'literal-tolerance',
      `"${expr.text}" has a tolerance, which a formula cannot carry; make it a given`,
      expr.at,
    );
  }
  return { type: typeOfUnit(read.value.unit) };
}

function negative(ctx: Context, inner: Expr): Term | undefined {
  const operand = part(ctx, inner);
  const type = quantityOf(ctx, operand, 'a minus sign');
  if (type === undefined) return undefined;
  return type.temperature === 'reading' ? refuseReading(ctx, inner, type, 'a minus sign') : operand.term;
}

/** True where the part is a truth value. */
function test(ctx: Context, expr: Expr, place: string): boolean {
  const term = infer(ctx, expr);
  if (term === undefined) return false;
  if (term.type.kind === 'truth') return true;
  report(ctx, 'truth-use', notATruth(term.type, expr, place), expr.at);
  return false;
}

function binary(ctx: Context, expr: Extract<Expr, { kind: 'binary' }>): Term | undefined {
  switch (expr.operator) {
    case '+':
    case '-': {
      const left = part(ctx, expr.left);
      return sumOf(ctx, expr.operator, left, part(ctx, expr.right), expr.at);
    }
    case '*':
    case '/': {
      const factors: Factor[] = [];
      collect(ctx, expr, false, factors);
      return productOf(ctx, factors, expr.at);
    }
    case '^': {
      const base = part(ctx, expr.left);
      return powerOf(ctx, base, part(ctx, expr.right), expr.at);
    }
  }
}

/** The factors of a chain of products and quotients, through parentheses and signs, in the order of the text. */
function collect(ctx: Context, expr: Expr, inverse: boolean, factors: Factor[]): void {
  if (expr.kind === 'binary' && (expr.operator === '*' || expr.operator === '/')) {
    collect(ctx, expr.left, inverse, factors);
    collect(ctx, expr.right, expr.operator === '/' ? !inverse : inverse, factors);
  } else if (expr.kind === 'parens' || expr.kind === 'minus') {
    collect(ctx, expr.inner, inverse, factors);
  } else {
    factors.push({ expr, term: infer(ctx, expr), inverse });
  }
}

function textLiteral(expr: Expr): Extract<Expr, { kind: 'quoted' }> | undefined {
  if (expr.kind === 'parens') return textLiteral(expr.inner);
  return expr.kind === 'quoted' ? expr : undefined;
}

function compare(ctx: Context, expr: Extract<Expr, { kind: 'compare' }>): Term | undefined {
  const before = ctx.problems.length;
  const others = expr.sides.map((side) => (textLiteral(side) ? undefined : part(ctx, side)));
  const text = others.find((side) => side?.term?.type.kind === 'text');
  if (text === undefined) {
    // A side that is not known may be a text: quoted literals beside it are not read as quantities.
    if (others.some((side) => side !== undefined && side.term === undefined)) return undefined;
    const parts = expr.sides.map((side, index) => others[index] ?? part(ctx, side));
    const met = alike(ctx, 'comparison', parts, expr.at);
    return met !== undefined && ctx.problems.length === before ? truthTerm : undefined;
  }
  const order = expr.operators.find((operator) => operator !== '==' && operator !== '!=');
  if (order !== undefined) {
    return report(
      ctx,
      'text-use',
      `${writeExpr(text.expr)} is a text, and texts have no order: ${order} does not apply; use == or !=`,
      expr.at,
    );
  }
  for (const [index, side] of expr.sides.entries()) {
    const other = others[index];
    const quoted = textLiteral(side);
    if (quoted) checkText(ctx, quoted, text);
    else if (other?.term && other.term.type.kind !== 'text') {
      return report(
        ctx,
        'text-use',
        `cannot compare a text with a quantity: ${writeExpr(text.expr)} is a text, ${writeExpr(side)} is not; put the text in quotes`,
        side.at,
      );
    }
  }
  return ctx.problems.length === before &&
    others.every((side, index) => side?.term !== undefined || textLiteral(expr.sides[index]!))
    ? truthTerm
    : undefined;
}

/** A text compared with a choice must be one of the texts of its column. */
function checkText(ctx: Context, quoted: Extract<Expr, { kind: 'quoted' }>, beside: Part): void {
  const type = beside.term?.type;
  if (type?.kind !== 'text') return;
  const table = ctx.scope.table(type.table);
  const texts = table && textsOf(table, type.column);
  if (texts === undefined || texts.includes(quoted.text)) return;
  const near = nearestText(quoted.text, texts);
  const nearest = near === undefined ? [] : [near];
  const offered =
    near !== undefined
      ? `did you mean "${near}"`
      : `its texts are ${[...new Set(texts)]
          .slice(0, 5)
          .map((text) => `"${text}"`)
          .join(', ')}`;
  const fixes = nearest.map((text) => ({ from: quoted.at[0], to: quoted.at[1], text: `"${text}"`, label: `write "${text}"` }));
  report(
    ctx,
    'unknown-text',
    `"${quoted.text}" is no text of ${type.table}.${type.column}, so ${writeExpr(beside.expr)} can never equal it; ${offered}`,
    quoted.at,
    fixes,
  );
}
