// A formula as a line of the record: the numbers it prints, and what they come to when a reader works it out.
//
// 1. The line follows the branch of each ?: and the row of each table call that the true values take, and prints nothing else.
// 2. Decisions (tests, floor, ceil, round) are kept apart: a reader with the printed numbers must decide alike.
// 3. "In an exponent" is everywhere right of ^ and within exp( ).
// Not here: what a printed number is (numerals.ts), how the line looks and what it comes to (src/formula).

import { type Expr, evaluateWith, explain, type Lookup, nothingTaken, readLiteral, type Taken } from '../formula/index.ts';
import { type Numeral, numeralInUnit, one, readNumeral, type Unit } from '../quantity/index.ts';

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
  /** The result is a whole number: the outermost operation is floor, ceil or round. */
  readonly whole: boolean;
  /** The whole formula is one name, or one number that stands as it is: a literal, a quoted quantity, an entry of a table. */
  readonly alone?:
    | { readonly kind: 'name'; readonly name: string }
    | { readonly kind: 'number'; readonly numeral: Numeral; readonly unit: Unit };
  value(numbers: Numbers): number;
  /** True where these numbers decide as the true values do. */
  sameWay(numbers: Numbers): boolean;
}

/** Undefined where the formula has no value in this case. */
export function readLine(expr: Expr, lookup: Lookup, decimalSign: '.' | ','): Line | undefined {
  const form = formOf(expr);
  if (form.straight) return straightLine(expr, form.operands, decimalSign);
  const explained = explain(expr, lookup);
  if (!explained.ok) return undefined;
  const { taken } = explained;
  const true_: Numbers = (name) => lookup.value(name);
  const value = (node: Expr, numbers: Numbers) => evaluateWith(node, numbers, taken, decimalSign);
  const operands = noted((numbers) => value(expr, numbers), true_);
  const decisions = decisionsOf(expr, taken).map(({ node, inExponent }) => {
    const outcome = (numbers: Numbers) => {
      const inPlace: Numbers = inExponent ? (name) => numbers(name, true) : numbers;
      return node.kind === 'call' ? value(node, inPlace) : truth(node, (side) => value(side, inPlace));
    };
    return { outcome, true_: outcome(true_) };
  });
  const decisive = noted((numbers) => {
    for (const decision of decisions) decision.outcome(numbers);
  }, true_);
  return {
    taken,
    operands,
    decisive,
    whole: isWhole(expr, taken),
    ...aloneIn(expr, taken, decimalSign),
    value: (numbers) => value(expr, numbers),
    sameWay: (numbers) => decisions.every((decision) => Object.is(decision.outcome(numbers), decision.true_)),
  };
}

/** A formula without choices, tables and jumps: nothing of its line depends on the case. */
function straightLine(expr: Expr, operands: readonly Operand[], decimalSign: '.' | ','): Line {
  return {
    taken: nothingTaken,
    operands,
    decisive: [],
    whole: false,
    ...aloneIn(expr, nothingTaken, decimalSign),
    value: (numbers) => evaluateWith(expr, numbers, nothingTaken, decimalSign),
    sameWay: () => true,
  };
}

interface Form {
  readonly straight: boolean;
  readonly operands: readonly Operand[];
}

const forms = new WeakMap<Expr, Form>();

function formOf(expr: Expr): Form {
  const known = forms.get(expr);
  if (known) return known;
  let straight = true;
  const visit = (node: Expr): void => {
    if (node.kind === 'choose' || node.kind === 'table' || (node.kind === 'call' && jumps.has(node.name))) straight = false;
    if (node.kind === 'parens' || node.kind === 'minus') visit(node.inner);
    else if (node.kind === 'binary') {
      visit(node.left);
      visit(node.right);
    } else if (node.kind === 'call') node.args.forEach(visit);
  };
  visit(expr);
  const operands = straight
    ? noted(
        (numbers) => evaluateWith(expr, numbers, nothingTaken),
        () => 1,
      )
    : [];
  const form = { straight, operands };
  forms.set(expr, form);
  return form;
}

/** What is asked for while the numbers are used, each place once. */
function noted(use: (numbers: Numbers) => unknown, numbers: Numbers): readonly Operand[] {
  const found = new Map<string, Operand>();
  use((name, inExponent) => {
    found.set(inExponent ? `^${name}` : name, { name, inExponent });
    return numbers(name, inExponent);
  });
  return [...found.values()];
}

interface Decision {
  readonly node: Expr;
  readonly inExponent: boolean;
}

/** Tests and jumps on the way that the true values take. */
function decisionsOf(expr: Expr, taken: Taken): readonly Decision[] {
  const found: Decision[] = [];
  const visit = (node: Expr, inExponent: boolean): void => {
    switch (node.kind) {
      case 'parens':
      case 'minus':
        visit(node.inner, inExponent);
        break;
      case 'binary':
        visit(node.left, inExponent);
        visit(node.right, inExponent || node.operator === '^');
        break;
      case 'choose':
        found.push({ node: node.test, inExponent });
        visit(taken.branch(node) === false ? node.otherwise : node.then, inExponent);
        break;
      case 'call':
        if (jumps.has(node.name)) found.push({ node, inExponent });
        for (const arg of node.args) visit(arg, inExponent || node.name === 'exp');
        break;
      case 'table':
        if (node.name === 'interpolate') visit(node.key, inExponent);
        break;
      default:
        break;
    }
  };
  visit(expr, false);
  return found;
}

const jumps: ReadonlySet<string> = new Set(['floor', 'ceil', 'round']);

/** Undefined where texts are compared: they have no printed digits that could differ. */
function truth(node: Expr, value: (side: Expr) => number): boolean | undefined {
  switch (node.kind) {
    case 'parens':
      return truth(node.inner, value);
    case 'not': {
      const inner = truth(node.inner, value);
      return inner === undefined ? undefined : !inner;
    }
    case 'logic': {
      const left = truth(node.left, value);
      const right = truth(node.right, value);
      // Both sides are looked at, so that every number that decides is known.
      if (node.operator === 'and') return left === undefined ? right : right === undefined ? left : left && right;
      return left === undefined ? right : right === undefined ? left : left || right;
    }
    case 'compare': {
      const sides = node.sides.map(value);
      if (sides.some((side) => Number.isNaN(side))) return undefined;
      return node.operators.every((operator, k) => compare(operator, sides[k] ?? 0, sides[k + 1] ?? 0));
    }
    default:
      return undefined;
  }
}

function compare(operator: string, a: number, b: number): boolean {
  if (operator === '<') return a < b;
  if (operator === '<=') return a <= b;
  if (operator === '>') return a > b;
  if (operator === '>=') return a >= b;
  return operator === '==' ? a === b : a !== b;
}

/** Floor, ceil, round, or a whole number as typed that a choice gives. */
function isWhole(expr: Expr, taken: Taken): boolean {
  if (expr.kind === 'parens') return isWhole(expr.inner, taken);
  if (expr.kind === 'choose') {
    const branch = taken.branch(expr) === false ? expr.otherwise : expr.then;
    return (branch.kind === 'number' && Number.isInteger(branch.value)) || isWhole(branch, taken);
  }
  return expr.kind === 'call' && jumps.has(expr.name);
}

/** What a formula is that is nothing but a name, a literal, a quoted quantity or an entry of a table. */
function aloneIn(expr: Expr, taken: Taken, decimalSign: '.' | ','): Pick<Line, 'alone'> {
  if (expr.kind === 'parens') return aloneIn(expr.inner, taken, decimalSign);
  if (expr.kind === 'name') return { alone: { kind: 'name', name: expr.name } };
  if (expr.kind === 'number') {
    const read = readNumeral(expr.text, '.');
    return read.ok ? { alone: { kind: 'number', numeral: read.value, unit: one } } : {};
  }
  if (expr.kind === 'quoted') {
    const read = readLiteral(expr.text, decimalSign);
    return read.ok ? { alone: { kind: 'number', numeral: read.value.numeral, unit: read.value.unit } } : {};
  }
  const row = expr.kind === 'table' ? taken.table(expr) : undefined;
  if (row?.kind !== 'entry' || row.unit === undefined) return {};
  return { alone: { kind: 'number', numeral: numeralInUnit(row.value, row.unit), unit: row.unit } };
}
