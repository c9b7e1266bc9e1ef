// A formula as a line of the record: the numbers it prints, and what they come to when a reader works it out.
//
// 1. The line follows the branch of each ?: and the row of each table call that the true values take, and prints nothing else.
// 2. Decisions (tests, floor, ceil, round) are kept apart: a reader with the printed numbers must decide alike.
// 3. "In an exponent" is everywhere right of ^ and within exp( ).
// Not here: what a printed number is (numerals.ts), how the line looks (src/formula).

import { type Expr, explain, type Lookup, type Taken } from '../formula/index.ts';
import { readValue, type Value } from '../quantity/index.ts';

/** Coherent SI of a quantity as it stands at this place of a line. */
export type Numbers = (name: string, inExponent: boolean) => number;

export interface Operand {
  readonly name: string;
  readonly inExponent: boolean;
}

export interface Line {
  readonly taken: Taken;
  /** What the line prints; what its decisions look at. */
  readonly operands: readonly Operand[];
  readonly decisive: readonly Operand[];
  /** The outermost operation is floor, ceil or round. */
  readonly whole: boolean;
  /** The whole formula is one name or one quoted quantity. */
  readonly alone?: { readonly kind: 'name'; readonly name: string } | { readonly kind: 'quoted'; readonly value: Value };
  value(numbers: Numbers): number;
  /** True where these numbers decide as the true values do. */
  sameWay(numbers: Numbers): boolean;
}

interface Walk {
  readonly numbers: Numbers;
  readonly texts: (name: string) => string;
  readonly taken: Taken;
  readonly decimalSign: '.' | ',';
  /** Told of every decision on the way. */
  readonly decided?: (node: Expr, outcome: number, inExponent: boolean) => void;
}

/** Undefined where the formula has no value in this case. */
export function readLine(expr: Expr, lookup: Lookup, decimalSign: '.' | ','): Line | undefined {
  const explained = explain(expr, lookup);
  if ('problem' in explained) return undefined;
  const { taken } = explained;
  const walk = (numbers: Numbers, decided?: Walk['decided']): Walk => ({
    numbers,
    texts: (name) => lookup.text(name),
    taken,
    decimalSign,
    ...(decided === undefined ? {} : { decided }),
  });
  const operands = new Map<string, Operand>();
  const decisive = new Map<string, Operand>();
  const decisions: { readonly node: Expr; readonly outcome: number; readonly inExponent: boolean }[] = [];
  const noting = (into: Map<string, Operand>): Numbers => (name, inExponent) => {
    into.set(inExponent ? `^${name}` : name, { name, inExponent });
    return lookup.value(name);
  };
  valueOf(expr, walk(noting(operands), (node, outcome, inExponent) => decisions.push({ node, outcome, inExponent })), false);
  for (const { node, inExponent } of decisions) valueOf(node, walk(noting(decisive)), inExponent);
  const alone = aloneIn(expr, decimalSign);
  return {
    taken,
    operands: [...operands.values()],
    decisive: [...decisive.values()],
    whole: isWhole(expr, taken),
    ...(alone === undefined ? {} : { alone }),
    value: (numbers) => valueOf(expr, walk(numbers), false),
    sameWay: (numbers) => decisions.every(({ node, outcome, inExponent }) => valueOf(node, walk(numbers), inExponent) === outcome),
  };
}

function valueOf(expr: Expr, walk: Walk, inExponent: boolean): number {
  switch (expr.kind) {
    case 'number':
      return expr.value;
    case 'constant':
      return expr.name === 'pi' ? Math.PI : Math.E;
    case 'quoted':
      return quoted(expr.text, walk.decimalSign)?.si ?? Number.NaN;
    case 'name':
      return walk.numbers(expr.name, inExponent);
    case 'parens':
      return valueOf(expr.inner, walk, inExponent);
    case 'minus':
      return -valueOf(expr.inner, walk, inExponent);
    case 'not':
      return valueOf(expr.inner, walk, inExponent) === 0 ? 1 : 0;
    case 'binary':
      return binary(expr, walk, inExponent);
    case 'compare':
      return compare(expr, walk, inExponent);
    case 'logic': {
      const left = valueOf(expr.left, walk, inExponent) !== 0;
      if (left === (expr.operator === 'or')) return left ? 1 : 0;
      return valueOf(expr.right, walk, inExponent) !== 0 ? 1 : 0;
    }
    case 'choose': {
      const branch = walk.taken.branch(expr);
      if (walk.decided) walk.decided(expr.test, branch === true ? 1 : 0, inExponent);
      return valueOf(branch === false ? expr.otherwise : expr.then, walk, inExponent);
    }
    case 'call':
      return call(expr, walk, inExponent);
    case 'table':
      return lookUp(expr, walk, inExponent);
  }
}

function binary(expr: Extract<Expr, { kind: 'binary' }>, walk: Walk, inExponent: boolean): number {
  const left = valueOf(expr.left, walk, inExponent);
  const right = valueOf(expr.right, walk, inExponent || expr.operator === '^');
  switch (expr.operator) {
    case '+':
      return left + right;
    case '-':
      return left - right;
    case '*':
      return left * right;
    case '/':
      return left / right;
    case '^':
      return left === Math.E ? Math.exp(right) : left ** right;
  }
}

function compare(expr: Extract<Expr, { kind: 'compare' }>, walk: Walk, inExponent: boolean): number {
  // Texts are compared as they stand; they have no printed digits that could differ.
  const texts = expr.sides.map((side) => (side.kind === 'name' ? walk.texts(side.name) : side.kind === 'quoted' ? side.text : ''));
  const numbers = expr.sides.map((side) => valueOf(side, walk, inExponent));
  return expr.operators.every((operator, k) => {
    const [a, b] = [numbers[k] ?? Number.NaN, numbers[k + 1] ?? Number.NaN];
    if (operator === '==') return Number.isNaN(a) || Number.isNaN(b) ? texts[k] === texts[k + 1] : a === b;
    if (operator === '!=') return Number.isNaN(a) || Number.isNaN(b) ? texts[k] !== texts[k + 1] : a !== b;
    if (operator === '<') return a < b;
    if (operator === '<=') return a <= b;
    if (operator === '>') return a > b;
    return a >= b;
  })
    ? 1
    : 0;
}

function call(expr: Extract<Expr, { kind: 'call' }>, walk: Walk, inExponent: boolean): number {
  const args = expr.args.map((arg) => valueOf(arg, walk, inExponent || expr.name === 'exp'));
  const x = args[0] ?? Number.NaN;
  switch (expr.name) {
    case 'ln':
      return Math.log(x);
    case 'atan2':
      return Math.atan2(x, args[1] ?? Number.NaN);
    case 'min':
    case 'max':
    case 'hypot':
      return Math[expr.name](...args);
    case 'floor':
    case 'ceil':
    case 'round': {
      const whole = expr.name === 'round' ? roundEven(x) : Math[expr.name](x);
      walk.decided?.(expr, whole, inExponent);
      return whole;
    }
    default:
      return Math[expr.name](x);
  }
}

function roundEven(x: number): number {
  const below = Math.floor(x);
  const rest = x - below;
  if (rest !== 0.5) return rest < 0.5 ? below : below + 1;
  return below % 2 === 0 ? below : below + 1;
}

function lookUp(expr: Extract<Expr, { kind: 'table' }>, walk: Walk, inExponent: boolean): number {
  const row = walk.taken.table(expr);
  if (row === undefined) return Number.NaN;
  if (row.kind === 'entry') return row.value;
  const x = valueOf(expr.key, walk, inExponent);
  return row.y0 + ((x - row.x0) * (row.y1 - row.y0)) / (row.x1 - row.x0);
}

function isWhole(expr: Expr, taken: Taken): boolean {
  if (expr.kind === 'parens') return isWhole(expr.inner, taken);
  if (expr.kind === 'choose') return isWhole(taken.branch(expr) === false ? expr.otherwise : expr.then, taken);
  return expr.kind === 'call' && (expr.name === 'floor' || expr.name === 'ceil' || expr.name === 'round');
}

function aloneIn(expr: Expr, decimalSign: '.' | ','): Line['alone'] {
  if (expr.kind === 'parens') return aloneIn(expr.inner, decimalSign);
  if (expr.kind === 'name') return { kind: 'name', name: expr.name };
  if (expr.kind !== 'quoted') return undefined;
  const value = quoted(expr.text, decimalSign);
  return value && { kind: 'quoted', value };
}

function quoted(text: string, decimalSign: '.' | ','): Value | undefined {
  const read = readValue(text, { decimalSign });
  return read.ok ? read.value : undefined;
}
