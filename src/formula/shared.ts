// Which parts of formulas stand more than once: equal parts have equal numbers.
//
// 1. Parts are equal when they are written alike, parentheses aside: nothing is rearranged.
// 2. Names, literals and their signs are no parts: reading a column costs nothing.

import { childrenOf } from './children.ts';
import type { Expr } from './expr.ts';

export class Shared {
  readonly #numbers = new Map<string, number>();
  readonly #numberOf = new Map<Expr, number>();
  readonly #times: number[] = [];

  /** Takes in a formula. One that stands `alone` and is too small to hold anything twice is passed over. */
  count(expr: Expr, alone = false): void {
    if (!alone || weight(expr, 0) > 2) this.#number(expr);
  }

  /** The number of a part that stands more than once; undefined for all others. */
  repeated(expr: Expr): number | undefined {
    if (expr.kind === 'parens') return this.repeated(expr.inner);
    const number = this.#numberOf.get(expr);
    return number !== undefined && this.#times[number]! > 1 && !isLeaf(expr) ? number : undefined;
  }

  #number(expr: Expr): number {
    if (expr.kind === 'parens') return this.#number(expr.inner);
    const key = this.#key(expr);
    let number = this.#numbers.get(key);
    if (number === undefined) {
      number = this.#times.length;
      this.#numbers.set(key, number);
      this.#times.push(0);
    }
    this.#times[number]! += 1;
    this.#numberOf.set(expr, number);
    return number;
  }

  #key(expr: Exclude<Expr, { kind: 'parens' }>): string {
    switch (expr.kind) {
      case 'number':
        return `n${expr.value}`;
      case 'constant':
        return `c${expr.name}`;
      case 'quoted':
        return `q${expr.text}`;
      case 'name':
        return `i${expr.name}`;
      case 'minus':
      case 'not':
        return `${expr.kind} ${this.#number(expr.inner)}`;
      case 'binary':
      case 'logic':
        return `${expr.operator} ${this.#number(expr.left)} ${this.#number(expr.right)}`;
      case 'compare':
        return `${expr.operators.join(' ')} ${this.#list(expr.sides)}`;
      case 'choose':
        return `? ${this.#list([expr.test, expr.then, expr.otherwise])}`;
      case 'call':
        return `${expr.name} ${this.#list(expr.args)}`;
      case 'table':
        return `${expr.name} ${JSON.stringify([expr.table, expr.column])} ${this.#number(expr.key)}`;
    }
  }

  #list(exprs: readonly Expr[]): string {
    return exprs.map((expr) => this.#number(expr)).join(' ');
  }
}

/** Number of parts that are no leaves, up to 3: two equal ones need a third around them. */
function weight(expr: Expr, counted: number): number {
  if (isLeaf(expr)) return counted;
  let sum = expr.kind === 'parens' || expr.kind === 'minus' ? counted : counted + 1;
  for (const part of childrenOf(expr)) {
    if (sum > 2) return sum;
    sum = weight(part, sum);
  }
  return sum;
}

function isLeaf(expr: Expr): boolean {
  switch (expr.kind) {
    case 'number':
    case 'constant':
    case 'quoted':
    case 'name':
      return true;
    case 'parens':
    case 'minus':
      return isLeaf(expr.inner);
    default:
      return false;
  }
}
