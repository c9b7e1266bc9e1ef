// A formula as it is read aloud: for screen readers, and for the alternative text of formulas on paper.
//
// 1. Grouping is heard: what a bar, a root or raised type groups for the eye has its end spoken where it is longer than
//    one word; parentheses are spoken where the structure needs them, and only there.
// 2. Names by their words (speakName), signs by theirs; no sign is left to the voice.
// Not here: how it looks (typeset.ts).

import { isE } from './arithmetic.ts';
import type { Expr } from './expr.ts';
import { speakName } from './symbols.ts';

const sumLevel = 1;
const productLevel = 2;
const atomLevel = 3;

interface Speech {
  readonly say: (name: string) => string;
  level: number;
}

/** The right-hand side in words; `say` may put values in the place of names. */
export function speakFormula(expr: Expr, say: (name: string) => string = speakName): string {
  return speak({ say, level: 0 }, expr).replace(/\s+/g, ' ').trim();
}

const signs = new Map([
  ['+', 'plus'],
  ['-', 'minus'],
  ['*', 'times'],
]);
const relations = new Map([
  ['<', 'is less than'],
  ['<=', 'is at most'],
  ['>', 'is greater than'],
  ['>=', 'is at least'],
  ['==', 'equals'],
  ['!=', 'is not equal to'],
]);
const called = new Map([
  ['ln', 'natural logarithm'],
  ['log10', 'logarithm to base 10'],
  ['abs', 'absolute value'],
  ['sign', 'sign'],
  ['min', 'the smallest'],
  ['max', 'the largest'],
  ['sin', 'sine'],
  ['cos', 'cosine'],
  ['tan', 'tangent'],
  ['asin', 'arc sine'],
  ['acos', 'arc cosine'],
  ['atan', 'arc tangent'],
  ['atan2', 'arc tangent by coordinates'],
  ['sinh', 'hyperbolic sine'],
  ['cosh', 'hyperbolic cosine'],
  ['tanh', 'hyperbolic tangent'],
  ['floor', 'next whole number down'],
  ['ceil', 'next whole number up'],
  ['round', 'nearest whole number'],
  ['hypot', 'hypotenuse'],
]);

function speak(s: Speech, e: Expr): string {
  switch (e.kind) {
    case 'number':
      return done(s, atomLevel, e.text);
    case 'constant':
      return done(s, atomLevel, e.name);
    case 'quoted':
      return done(s, atomLevel, e.text);
    case 'name':
      return done(s, atomLevel, s.say(e.name));
    case 'parens':
      return speak(s, e.inner);
    case 'minus':
      return done(s, sumLevel, `minus ${at(s, e.inner, productLevel)}`);
    case 'not':
      return done(s, sumLevel, `not ${at(s, e.inner, atomLevel)}`);
    case 'binary':
      return binary(s, e);
    case 'compare': {
      let text = at(s, e.sides[0] as Expr, sumLevel);
      e.operators.forEach((operator, i) => {
        text += ` ${relations.get(operator)} ${at(s, e.sides[i + 1] as Expr, sumLevel)}`;
      });
      return done(s, 0, text);
    }
    case 'logic':
      return done(s, 0, `${inner(s, e.left)} ${e.operator} ${inner(s, e.right)}`);
    case 'choose':
      return done(s, 0, `if ${speak(s, e.test)}, ${speak(s, e.then)}, otherwise, ${speak(s, e.otherwise)}, end of choice`);
    case 'call':
      if (e.name === 'exp') return grouped(s, 'e to the power', e.args[0] as Expr, 'end of power', productLevel);
      if (e.name === 'sqrt') return grouped(s, 'square root of', e.args[0] as Expr, 'end of root', atomLevel);
      if (e.name === 'cbrt') return grouped(s, 'cube root of', e.args[0] as Expr, 'end of root', atomLevel);
      if (e.args.length === 1)
        return grouped(s, `${called.get(e.name)} of`, e.args[0] as Expr, `end of ${called.get(e.name)}`, atomLevel);
      return done(s, atomLevel, `${called.get(e.name)} of ${e.args.map((a) => speak(s, a)).join(', ')}, end of list`);
    case 'table': {
      const key = speak(s, e.key);
      const what = e.name === 'entry' ? 'entry' : 'interpolated entry';
      return done(s, atomLevel, `${what} of table ${e.table}, column ${e.column}, at ${key}, end of lookup`);
    }
  }
}

function done(s: Speech, level: number, text: string): string {
  s.level = level;
  return text;
}

function at(s: Speech, e: Expr, least: number): string {
  const text = speak(s, e);
  return s.level >= least ? text : done(s, atomLevel, `open parenthesis ${text} close parenthesis`);
}

/** A condition inside a condition: spoken with its parentheses where it is itself made of two. */
function inner(s: Speech, e: Expr): string {
  const bare = e.kind === 'parens' ? e.inner : e;
  const text = speak(s, e);
  return bare.kind === 'logic' ? `open parenthesis ${text} close parenthesis` : text;
}

/** One word stands alone; anything longer has its end spoken. */
function grouped(s: Speech, before: string, e: Expr, end: string, level: number): string {
  const text = speak(s, e);
  return done(s, level, s.level === atomLevel && isWord(e) ? `${before} ${text}` : `${before} ${text}, ${end}`);
}

function isWord(e: Expr): boolean {
  if (e.kind === 'parens') return isWord(e.inner);
  return e.kind === 'number' || e.kind === 'name' || e.kind === 'constant' || e.kind === 'quoted';
}

function binary(s: Speech, e: Expr & { kind: 'binary' }): string {
  switch (e.operator) {
    case '+':
    case '-': {
      const left = at(s, e.left, sumLevel);
      return done(s, sumLevel, `${left} ${signs.get(e.operator)} ${at(s, e.right, productLevel)}`);
    }
    case '*': {
      const left = at(s, e.left, productLevel);
      return done(s, productLevel, `${left} times ${at(s, e.right, productLevel)}`);
    }
    case '/': {
      const over = speak(s, e.left);
      const under = speak(s, e.right);
      if (isWord(e.left) && isWord(e.right)) return done(s, productLevel, `${over} over ${under}`);
      return done(s, atomLevel, `fraction ${over}, over ${under}, end of fraction`);
    }
    case '^': {
      if (isE(e.left)) return grouped(s, 'e to the power', e.right, 'end of power', productLevel);
      const base = at(s, e.left, atomLevel);
      const exponent = e.right.kind === 'number' ? e.right.text : '';
      if (exponent === '2') return done(s, productLevel, `${base} squared`);
      if (exponent === '3') return done(s, productLevel, `${base} cubed`);
      return grouped(s, `${base} to the power`, e.right, 'end of power', productLevel);
    }
  }
}
