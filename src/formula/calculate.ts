// Evaluates a calculator line: an evaluator of its own, which knows nothing of the tree that the line was written from.
//
// 1. It reads what calculator.ts writes, and refuses where calculators differ: a minus as sign stands only in
//    parentheses with its one value, and no tower of powers. So a line that it reads means the same everywhere.
// 2. What is no such line is NaN. Nothing is ever executed.
// Not here: writing the line (calculator.ts).

import { callNumber } from './calculator.ts';
import { arity, isFunctionName } from './functions.ts';

interface Reader {
  readonly text: string;
  at: number;
  failed: boolean;
  depth: number;
}

const deepest = 400;

/** The value of a calculator line; NaN where the text is none. */
export function calculate(line: string): number {
  const r: Reader = { text: line, at: 0, failed: false, depth: 0 };
  const value = sum(r);
  skip(r);
  return r.failed || r.at < line.length ? Number.NaN : value;
}

function fail(r: Reader): number {
  r.failed = true;
  r.at = r.text.length;
  return Number.NaN;
}

function skip(r: Reader): void {
  while (r.text.charCodeAt(r.at) === 32) r.at++;
}

function next(r: Reader): string {
  skip(r);
  return r.text[r.at] ?? '';
}

function sum(r: Reader): number {
  if (++r.depth > deepest) return fail(r);
  let value = product(r);
  for (;;) {
    const sign = next(r);
    if (sign !== '+' && sign !== '-') break;
    r.at++;
    const right = product(r);
    value = sign === '+' ? value + right : value - right;
  }
  r.depth--;
  return value;
}

function product(r: Reader): number {
  let value = power(r);
  for (;;) {
    const sign = next(r);
    if (sign !== '*' && sign !== '/') return value;
    r.at++;
    const right = power(r);
    value = sign === '*' ? value * right : value / right;
  }
}

function power(r: Reader): number {
  const base = atom(r);
  if (next(r) !== '^') return base;
  r.at++;
  const exponent = atom(r);
  // A second exponent would be read from the left by one calculator and from the right by another.
  return next(r) === '^' ? fail(r) : base ** exponent;
}

const numberPattern = /[0-9]+(?:\.[0-9]+)?(?:e[+-]?[0-9]+)?/y;
const namePattern = /[a-z]+[0-9]*/y;

function atom(r: Reader): number {
  const sign = next(r);
  if (sign === '(') {
    r.at++;
    const negative = next(r) === '-';
    if (negative) r.at++;
    const value = negative ? -atom(r) : sum(r);
    return close(r) ? value : fail(r);
  }
  if (sign >= '0' && sign <= '9') {
    numberPattern.lastIndex = r.at;
    const text = numberPattern.exec(r.text)?.[0] ?? '';
    r.at += text.length;
    return Number(text);
  }
  namePattern.lastIndex = r.at;
  const name = namePattern.exec(r.text)?.[0] ?? '';
  r.at += name.length;
  if (name === 'pi') return Math.PI;
  if (!isFunctionName(name) || r.text[r.at] !== '(') return fail(r);
  r.at++;
  const args = [sum(r)];
  while (next(r) === ',') {
    r.at++;
    args.push(sum(r));
  }
  const [least, greatest] = arity.get(name) as readonly [number, number];
  if (!close(r) || args.length < least || args.length > greatest) return fail(r);
  return callNumber(name, args);
}

function close(r: Reader): boolean {
  if (next(r) !== ')') return false;
  r.at++;
  return true;
}
