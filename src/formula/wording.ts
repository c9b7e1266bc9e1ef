// Formulas and types in words, for sentences: `μ·L is a length (m)`.
//
// 1. An expression is written on one line, at most 60 characters; longer ones are cut in the middle.
// 2. A kind of quantity is named by the unit it was declared in where there is one (N·m is a torque, J an energy).
// Not here: TeX (typeset.ts), the unit check in words (unit-words.ts).

import { coherentUnit, isDimensionless, kindName, withArticle } from '../quantity/index.ts';
import type { BinaryOperator, Expr } from './expr.ts';
import { plainName } from './symbols.ts';
import type { Type } from './type.ts';

const longest = 60;

/** The expression as a reader would write it, at most 60 characters. */
export function writeExpr(expr: Expr): string {
  const text = write(expr, longest * 4);
  return text.length <= longest ? text : `${text.slice(0, longest / 2 - 1)} … ${text.slice(-(longest / 2 - 2))}`;
}

const loose: ReadonlySet<BinaryOperator> = new Set(['+', '-']);

/** `room` bounds the work on a huge formula: what lies beyond it is written as an ellipsis. */
function write(expr: Expr, room: number): string {
  if (room <= 0) return '…';
  switch (expr.kind) {
    case 'number':
      return expr.text;
    case 'constant':
      return expr.name === 'pi' ? 'π' : 'e';
    case 'quoted':
      return `"${expr.text}"`;
    case 'name':
      return plainName(expr.name);
    case 'parens':
      return `(${write(expr.inner, room - 2)})`;
    case 'minus':
      return `-${write(expr.inner, room - 1)}`;
    case 'not':
      return `not ${write(expr.inner, room - 4)}`;
    case 'binary': {
      const left = write(expr.left, room - 1);
      const right = write(expr.right, room - left.length - 1);
      if (expr.operator === '*') return `${left}·${right}`;
      return loose.has(expr.operator) ? `${left} ${expr.operator} ${right}` : `${left}${expr.operator}${right}`;
    }
    case 'compare': {
      let text = write(expr.sides[0]!, room);
      for (const [index, operator] of expr.operators.entries()) {
        text += ` ${operator} ${write(expr.sides[index + 1]!, room - text.length)}`;
      }
      return text;
    }
    case 'logic': {
      const left = write(expr.left, room - 4);
      return `${left} ${expr.operator} ${write(expr.right, room - left.length - 4)}`;
    }
    case 'choose': {
      const test = write(expr.test, room - 6);
      const then = write(expr.then, room - test.length - 6);
      return `${test} ? ${then} : ${write(expr.otherwise, room - test.length - then.length - 6)}`;
    }
    case 'call': {
      const parts: string[] = [];
      let left = room - expr.name.length - 2;
      for (const argument of expr.args) {
        const part = write(argument, left);
        parts.push(part);
        left -= part.length + 2;
      }
      return `${expr.name}(${parts.join(', ')})`;
    }
    case 'table':
      return `${expr.name}(${expr.table}, ${expr.column}, ${write(expr.key, room - 10 - expr.table.length - expr.column.length)})`;
  }
}

// Types of names live as long as their cells and are asked for by every formula that uses them.
const kinds = new WeakMap<Type, string>();

/** 'force', 'number', 'text', 'truth value'. */
export function kindOf(type: Type): string {
  const known = kinds.get(type);
  if (known !== undefined) return known;
  const kind = kindAnew(type);
  kinds.set(type, kind);
  return kind;
}

function kindAnew(type: Type): string {
  if (type.kind === 'truth') return 'truth value';
  if (type.kind === 'text') return 'text';
  if (type.temperature === 'reading') return 'temperature reading';
  if (type.temperature === 'difference') return 'temperature difference';
  return kindName(type.dimension, type.unitText);
}

/** 'a force (N)', 'an energy (J)', 'a number', 'a text', 'a temperature reading (°C)'. */
export function describe(type: Type): string {
  const kind = kindOf(type);
  const unit = unitOfType(type);
  return unit === '' || kind.endsWith(unit) ? withArticle(kind) : `${withArticle(kind)} (${unit})`;
}

/** The unit to show beside the kind; '' for numbers, texts and truth values. */
export function unitOfType(type: Type): string {
  if (type.kind !== 'quantity') return '';
  if (type.unitText !== undefined && type.unitText !== '1') return printUnit(type.unitText);
  if (type.temperature === 'reading') return '°C';
  return isDimensionless(type.dimension) ? '' : coherentUnit(type.dimension).text;
}

/** A unit as prose shows it: readings by their sign. */
export function printUnit(text: string): string {
  if (text === 'degC') return '°C';
  if (text === 'degF') return '°F';
  return text === 'deg' ? '°' : text;
}
