// The calculator line: a step as an expression of plain numbers, to type into any calculator; and the same in doubles.
//
// 1. The line holds numbers, `+ - * / ^ ( )`, function names of the formula language and `pi`: no names, no quotation
//    marks, no comparison, no product without a sign. Values are in coherent SI, angles in rad.
// 2. Calculators differ in -a^2, a^-b and a^b^c: parentheses leave no such choice. `e^x` is exp(x), bare e is exp(1).
// 3. Of a choice the branch taken is written, of `entry` its value, of `interpolate` its arithmetic.
// 4. evaluateWith takes the same operations in the same order on the same doubles as the line.
// Not here: reading such a line (calculate.ts), which digits a value shows (the record).

import { apply, isE, roundEven } from './arithmetic.ts';
import type { Expr, FunctionName } from './expr.ts';
import { readLiteral } from './literal.ts';
import type { Taken } from './taken.ts';
import type { Substitution } from './typeset.ts';

const sumLevel = 1;
const productLevel = 2;
const powerLevel = 3;
const atomLevel = 4;

interface Line {
  readonly sub: Pick<Substitution, 'number' | 'decimalSign'>;
  readonly taken: Taken;
  level: number;
  /** False once a part has no number: a branch never reached, a text. */
  complete: boolean;
}

/** The line of one case; '' where a part of it has no number. */
export function calculatorLine(expr: Expr, sub: Pick<Substitution, 'number' | 'decimalSign'>, taken: Taken): string {
  const line: Line = { sub, taken, level: 0, complete: true };
  const text = write(line, expr, false);
  return line.complete ? text : '';
}

function done(line: Line, level: number, text: string): string {
  line.level = level;
  return text;
}

function none(line: Line): string {
  line.complete = false;
  return done(line, atomLevel, '0');
}

/** A double as it is typed: shortest form, a negative one in parentheses. */
export function lineNumber(value: number): string {
  return value < 0 || Object.is(value, -0) ? `(${value === 0 ? '-0' : value})` : String(value);
}

function number(line: Line, value: number): string {
  return Number.isFinite(value) ? done(line, atomLevel, lineNumber(value)) : none(line);
}

function at(line: Line, e: Expr, least: number, inExponent: boolean): string {
  const text = write(line, e, inExponent);
  return line.level >= least ? text : done(line, atomLevel, `(${text})`);
}

function write(line: Line, e: Expr, inExponent: boolean): string {
  switch (e.kind) {
    case 'number':
      return number(line, e.value);
    case 'constant':
      return done(line, atomLevel, e.name === 'pi' ? 'pi' : 'exp(1)');
    case 'quoted': {
      const value = readLiteral(e.text, line.sub.decimalSign ?? '.');
      return value.ok ? number(line, value.value.si) : none(line);
    }
    case 'name': {
      const text = line.sub.number(e.name, inExponent);
      if (!/^\(?-?[0-9]/.test(text)) return none(line);
      return done(line, atomLevel, text.startsWith('-') ? `(${text})` : text);
    }
    case 'parens':
      return write(line, e.inner, inExponent);
    case 'minus':
      return done(line, atomLevel, `(-${at(line, e.inner, atomLevel, inExponent)})`);
    case 'binary':
      return binary(line, e, inExponent);
    case 'choose': {
      const branch = line.taken.branch(e);
      return branch === undefined ? none(line) : write(line, branch ? e.then : e.otherwise, inExponent);
    }
    case 'call': {
      const inside = inExponent || e.name === 'exp';
      const args = e.args.map((a) => write(line, a, inside)).join(', ');
      return done(line, atomLevel, `${e.name}(${args})`);
    }
    case 'table': {
      const row = line.taken.table(e);
      if (row === undefined) return none(line);
      if (row.kind === 'entry') return number(line, row.value);
      const [x0, x1, y0, y1] = [lineNumber(row.x0), lineNumber(row.x1), lineNumber(row.y0), lineNumber(row.y1)];
      const x = at(line, e.key, sumLevel, inExponent);
      return done(line, sumLevel, `${y0} + (${y1} - ${y0})*(${x} - ${x0})/(${x1} - ${x0})`);
    }
    case 'compare':
    case 'logic':
    case 'not':
      return none(line);
  }
}

function binary(line: Line, e: Expr & { kind: 'binary' }, inExponent: boolean): string {
  switch (e.operator) {
    case '+':
    case '-': {
      const left = at(line, e.left, sumLevel, inExponent);
      const right = at(line, e.right, productLevel, inExponent);
      return done(line, sumLevel, `${left} ${e.operator} ${right}`);
    }
    case '*':
    case '/': {
      const left = at(line, e.left, productLevel, inExponent);
      const right = at(line, e.right, powerLevel, inExponent);
      return done(line, productLevel, `${left}${e.operator}${right}`);
    }
    case '^': {
      if (isE(e.left)) return done(line, atomLevel, `exp(${write(line, e.right, true)})`);
      const plain = at(line, e.left, atomLevel, inExponent);
      const base = /^[0-9.]+e/.test(plain) ? `(${plain})` : plain;
      const exponent = at(line, e.right, atomLevel, true);
      return done(line, powerLevel, `${base}^${exponent}`);
    }
  }
}

/** The number that the calculator line gives, without writing it; NaN where there is no line. */
export function evaluateWith(
  expr: Expr,
  numberOf: (name: string, inExponent: boolean) => number,
  taken: Taken,
  decimalSign: '.' | ',' = '.',
): number {
  const value = (e: Expr, inExponent: boolean): number => {
    switch (e.kind) {
      case 'number':
        return e.value;
      case 'constant':
        return e.name === 'pi' ? Math.PI : Math.E;
      case 'quoted': {
        const literal = readLiteral(e.text, decimalSign);
        return literal.ok ? literal.value.si : Number.NaN;
      }
      case 'name':
        return numberOf(e.name, inExponent);
      case 'parens':
        return value(e.inner, inExponent);
      case 'minus':
        return -value(e.inner, inExponent);
      case 'binary':
        if (e.operator === '^')
          return isE(e.left) ? Math.exp(value(e.right, true)) : value(e.left, inExponent) ** value(e.right, true);
        return operate(e.operator, value(e.left, inExponent), value(e.right, inExponent));
      case 'choose': {
        const branch = taken.branch(e);
        return branch === undefined ? Number.NaN : value(branch ? e.then : e.otherwise, inExponent);
      }
      case 'call': {
        const inside = inExponent || e.name === 'exp';
        return callNumber(
          e.name,
          e.args.map((a) => value(a, inside)),
        );
      }
      case 'table': {
        const row = taken.table(e);
        if (row === undefined) return Number.NaN;
        return row.kind === 'entry'
          ? row.value
          : row.y0 + ((row.y1 - row.y0) * (value(e.key, inExponent) - row.x0)) / (row.x1 - row.x0);
      }
      case 'compare':
      case 'logic':
      case 'not':
        return Number.NaN;
    }
  };
  return value(expr, false);
}

function operate(operator: '+' | '-' | '*' | '/', a: number, b: number): number {
  switch (operator) {
    case '+':
      return a + b;
    case '-':
      return a - b;
    case '*':
      return a * b;
    case '/':
      return a / b;
  }
}

/** A function of the formula language on doubles; `round` takes ties to even. */
export function callNumber(name: FunctionName, args: readonly number[]): number {
  switch (name) {
    case 'min':
      return Math.min(...args);
    case 'max':
      return Math.max(...args);
    case 'hypot':
      return Math.hypot(...args);
    case 'atan2':
      return Math.atan2(args[0] ?? Number.NaN, args[1] ?? Number.NaN);
    case 'round':
      return roundEven(args[0] ?? Number.NaN);
    default:
      return apply(name, args[0] ?? Number.NaN);
  }
}
