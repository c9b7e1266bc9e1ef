// The unit check in words, one quiet line: `force = force + force × number, units agree`.
//
// 1. Numbers beside a quantity are drawn together: F·k/(k − 1) is force × number.
// 2. What would be longer than a line is only named.

import type { Expr } from './expr.ts';
import { readLiteral } from './literal.ts';
import { type Context, typeOfUnit } from './term.ts';
import type { Type } from './type.ts';
import { kindOf } from './wording.ts';

const longest = 100;
const numberWord = 'number';

export function unitCheck(ctx: Context, expr: Expr, result: Type): string {
  const kind = kindOf(result);
  const words = say(ctx, expr, 0);
  if (words === kind) return `${kind}, units agree`;
  return words.length <= longest ? `${kind} = ${words}, units agree` : `${kind}, units agree`;
}

/** `binding`: 1 inside a product, 2 inside a power. */
function say(ctx: Context, expr: Expr, binding: 0 | 1 | 2): string {
  switch (expr.kind) {
    case 'number':
    case 'constant':
      return numberWord;
    case 'quoted': {
      const read = readLiteral(expr.text, ctx.scope.decimalSign ?? '.');
      return read.ok ? kindOf(typeOfUnit(read.value.unit)) : 'text';
    }
    case 'name': {
      const type = ctx.scope.typeOf(expr.name);
      return typeof type === 'object' ? kindOf(type) : '?';
    }
    case 'parens':
      return say(ctx, expr.inner, binding);
    case 'minus': {
      const inner = say(ctx, expr.inner, 1);
      return inner === numberWord ? inner : bound(`-${inner}`, binding > 0);
    }
    case 'binary':
      return binary(ctx, expr, binding);
    case 'choose': {
      if (isZero(expr.then)) return say(ctx, expr.otherwise, binding);
      if (isZero(expr.otherwise)) return say(ctx, expr.then, binding);
      const then = say(ctx, expr.then, 0);
      const otherwise = say(ctx, expr.otherwise, 0);
      return then === otherwise ? then : bound(`${then} or ${otherwise}`, binding > 0);
    }
    case 'call':
      return call(ctx, expr);
    case 'table': {
      const column = ctx.scope.table(expr.table)?.columns.find((each) => each.name === expr.column);
      return column?.type ? kindOf(column.type) : 'text';
    }
    default:
      return 'truth value';
  }
}

const isZero = (expr: Expr): boolean =>
  expr.kind === 'parens' ? isZero(expr.inner) : expr.kind === 'number' && expr.value === 0;

const bound = (text: string, needed: boolean): string => (needed ? `(${text})` : text);

function binary(ctx: Context, expr: Extract<Expr, { kind: 'binary' }>, binding: 0 | 1 | 2): string {
  if (expr.operator === '^') {
    const base = say(ctx, expr.left, 2);
    return base === numberWord || base === 'angle' ? numberWord : `${base}${raised(expr.right)}`;
  }
  if (expr.operator === '+' || expr.operator === '-') {
    const left = say(ctx, expr.left, 0);
    const right = say(ctx, expr.right, 1);
    return left === numberWord && right === numberWord
      ? numberWord
      : bound(`${left} ${expr.operator === '+' ? '+' : '−'} ${right}`, binding > 0);
  }
  const above: string[] = [];
  const below: string[] = [];
  factors(ctx, expr, false, above, below);
  const numbers = [...above, ...below].some((word) => word === numberWord);
  const counted = above.filter((word) => word !== numberWord);
  const divided = below.filter((word) => word !== numberWord);
  if (counted.length + divided.length === 0) return numberWord;
  const top = [...counted, ...(numbers || counted.length === 0 ? [numberWord] : [])].join(' × ');
  const bottom = divided.length > 1 ? `(${divided.join(' × ')})` : divided.join('');
  return bound(bottom === '' ? top : `${top} / ${bottom}`, binding === 2);
}

function factors(ctx: Context, expr: Expr, inverse: boolean, above: string[], below: string[]): void {
  if (expr.kind === 'parens' || expr.kind === 'minus') {
    factors(ctx, expr.inner, inverse, above, below);
  } else if (expr.kind === 'binary' && (expr.operator === '*' || expr.operator === '/')) {
    factors(ctx, expr.left, inverse, above, below);
    factors(ctx, expr.right, expr.operator === '/' ? !inverse : inverse, above, below);
  } else {
    (inverse ? below : above).push(say(ctx, expr, 1));
  }
}

const superscripts: ReadonlyMap<string, string> = new Map([
  ['2', '²'],
  ['3', '³'],
  ['4', '⁴'],
]);

function raised(exponent: Expr): string {
  if (exponent.kind === 'parens') return raised(exponent.inner);
  if (exponent.kind === 'number') return superscripts.get(exponent.text) ?? `^${exponent.text}`;
  if (exponent.kind === 'minus' && exponent.inner.kind === 'number') return `^-${exponent.inner.text}`;
  return '^(…)';
}

function call(ctx: Context, expr: Extract<Expr, { kind: 'call' }>): string {
  const solid = expr.args.filter((argument) => !isZero(argument));
  const args = (solid.length > 0 ? solid : expr.args).map((argument) => say(ctx, argument, 0));
  switch (expr.name) {
    case 'asin':
    case 'acos':
    case 'atan':
    case 'atan2':
      return 'angle';
    case 'min':
    case 'max':
    case 'hypot':
    case 'sqrt':
    case 'cbrt':
      if (args.every((word) => word === numberWord)) return numberWord;
      return expr.name === 'sqrt' ? `√(${args[0]})` : `${expr.name}(${args.join(', ')})`;
    case 'abs':
      return args[0]!;
    default:
      return numberWord;
  }
}
