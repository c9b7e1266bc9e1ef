// A formula as TeX: with its symbols, and with the numbers of one case in their place.
//
// 1. Both lines have the same shape. A fraction bar, a root and an exponent group by themselves; parentheses stand only
//    where the structure needs them, whether or not they were typed.
// 2. A quantity with a unit has parentheses as a factor and as a base; alone in a sum or over a fraction bar it has none.
// 3. Of a choice the symbols show all branches, the numbers the branch taken. Angles in exponents print in rad: the
//    substitution is told where it stands.
// 4. The TeX passes KaTeX at `strict: 'error'`, `trust: false`: user text is escaped (symbols.ts). It is meant for display
//    mode: in text mode fraction bars are small.
// Not here: the result and the relation before it (the record), numbers for calculators (calculator.ts).

import type { Unit } from '../quantity/index.ts';
import {
  isAngleUnit,
  numeralInUnit,
  readNumeral,
  roundSignificant,
  significantDigits,
  texNumeral,
  texQuantity,
  unitOf,
} from '../quantity/index.ts';
import { isE } from './arithmetic.ts';
import type { Expr } from './expr.ts';
import { readLiteral } from './literal.ts';
import { texName, texText } from './symbols.ts';
import type { Taken } from './taken.ts';
import { nothingTaken } from './taken.ts';

/** How the quantities of a sheet show in the lines of one case. */
export interface Substitution {
  /** Numeral with unit as TeX, without parentheses: `1\,235\,\mathrm{N}`, `-5`. */
  tex(name: string, inExponent: boolean): string;
  /** Whether it has a unit or is negative. */
  needsParens(name: string, inExponent: boolean): boolean;
  /** For the calculator line: shortest double in coherent SI, a negative one in parentheses: `0.3012`, `(-5)`. */
  number(name: string, inExponent: boolean): string;
  /** Sign of quoted quantities in the formula and of the print; a point where it is missing. */
  readonly decimalSign?: '.' | ',';
}

// How tightly a piece of TeX holds together, loosest first.
const orLevel = 0;
const andLevel = 1;
const compareLevel = 2;
const sumLevel = 3;
/** A product with a minus in front: it may begin a product, and nothing else. */
const negativeLevel = 4;
/** A number with its unit, and a quotient written with a slash. */
const quantityLevel = 5;
const productLevel = 6;
const powerLevel = 7;
const atomLevel = 8;

interface Setting {
  readonly root: Expr;
  readonly sub: Substitution | undefined;
  readonly taken: Taken;
  readonly decimalSign: '.' | ',';
  /** Level of the piece set last. */
  level: number;
}

/** The right-hand side in symbols. */
export function texSymbols(expr: Expr, style: { readonly decimalSign: '.' | ',' } = { decimalSign: '.' }): string {
  return set(
    { root: outermost(expr), sub: undefined, taken: nothingTaken, decimalSign: style.decimalSign, level: 0 },
    expr,
    false,
  );
}

/** The right-hand side with the numbers of one case. */
export function texSubstituted(expr: Expr, sub: Substitution, taken: Taken): string {
  return set({ root: outermost(expr), sub, taken, decimalSign: sub.decimalSign ?? '.', level: 0 }, expr, false);
}

function outermost(expr: Expr): Expr {
  return expr.kind === 'parens' ? outermost(expr.inner) : expr;
}

/** Sets a node and leaves its level in `s.level`. */
function set(s: Setting, e: Expr, inExponent: boolean): string {
  switch (e.kind) {
    case 'number':
      return piece(s, texLiteral(e.text, s.decimalSign), false);
    case 'constant':
      return done(s, atomLevel, e.name === 'pi' ? '\\pi' : '\\mathrm{e}');
    case 'quoted':
      return quoted(s, e.text, inExponent);
    case 'name':
      if (s.sub === undefined) return done(s, atomLevel, texName(e.name));
      return piece(s, s.sub.tex(e.name, inExponent), s.sub.needsParens(e.name, inExponent));
    case 'parens':
      return set(s, e.inner, inExponent);
    case 'minus': {
      const inner = at(s, e.inner, quantityLevel, inExponent);
      return done(s, s.level >= productLevel ? negativeLevel : sumLevel, `-${inner}`);
    }
    case 'not': {
      const inner = at(s, e.inner, atomLevel, inExponent);
      return done(s, compareLevel, `\\text{not }${inner}`);
    }
    case 'binary':
      return binary(s, e, inExponent);
    case 'compare': {
      let tex = at(s, e.sides[0] as Expr, sumLevel, inExponent);
      e.operators.forEach((operator, i) => {
        tex += ` ${relations.get(operator)} ${at(s, e.sides[i + 1] as Expr, sumLevel, inExponent)}`;
      });
      return done(s, compareLevel, tex);
    }
    case 'logic': {
      const level = e.operator === 'and' ? andLevel : orLevel;
      const left = at(s, e.left, level, inExponent);
      const right = at(s, e.right, level + 1, inExponent);
      return done(s, level, `${left} \\text{ ${e.operator} } ${right}`);
    }
    case 'choose':
      return choose(s, e, inExponent);
    case 'call':
      return call(s, e.name, e.args, inExponent);
    case 'table':
      return table(s, e, inExponent);
  }
}

const relations = new Map([
  ['<', '<'],
  ['<=', '\\le'],
  ['>', '>'],
  ['>=', '\\ge'],
  ['==', '='],
  ['!=', '\\ne'],
]);

function done(s: Setting, level: number, tex: string): string {
  s.level = level;
  return tex;
}

/** A numeral, with or without a unit. */
function piece(s: Setting, tex: string, unitOrSign: boolean): string {
  if (/^[-−]/.test(tex)) return done(s, sumLevel, tex);
  return done(s, unitOrSign ? quantityLevel : tex.includes('\\times') ? productLevel : atomLevel, tex);
}

/** Sets a node for a place that wants at least this level, in parentheses where it is looser. */
function at(s: Setting, e: Expr, least: number, inExponent: boolean): string {
  const tex = set(s, e, inExponent);
  return s.level >= least ? tex : parenthesised(s, tex);
}

function parenthesised(s: Setting, tex: string): string {
  return done(s, atomLevel, fenced(tex));
}

function fenced(tex: string): string {
  return /\\(?:frac|sqrt|begin)/.test(tex) ? `\\left(${tex}\\right)` : `(${tex})`;
}

function binary(s: Setting, e: Expr & { kind: 'binary' }, inExponent: boolean): string {
  switch (e.operator) {
    case '+':
    case '-': {
      const left = at(s, e.left, sumLevel, inExponent);
      const right = at(s, e.right, quantityLevel, inExponent);
      return done(s, sumLevel, `${left} ${e.operator} ${right}`);
    }
    case '*':
      return times(s, e.left, e.right, inExponent);
    case '/':
      return quotient(s, e.left, e.right, inExponent);
    case '^': {
      if (isE(e.left)) return power(s, '\\mathrm{e}', e.right);
      const squared = powerOfFunction(s, e.left, e.right, inExponent);
      if (squared !== undefined) return squared;
      return power(s, at(s, e.left, atomLevel, inExponent), e.right);
    }
  }
}

function power(s: Setting, base: string, exponent: Expr): string {
  const tex = `${base}^{${set(s, exponent, true)}}`;
  return done(s, powerLevel, tex);
}

const trigonometric = new Set(['sin', 'cos', 'tan', 'sinh', 'cosh', 'tanh']);

/** `sin(x)^2` as sin²(x). Never with a negative exponent, which would read as the inverse function. */
function powerOfFunction(s: Setting, base: Expr, exponent: Expr, inExponent: boolean): string | undefined {
  if (base.kind !== 'call' || !trigonometric.has(base.name) || exponent.kind !== 'number' || !/^[1-9]$/.test(exponent.text))
    return undefined;
  const argument = set(s, base.args[0] as Expr, inExponent);
  return done(s, powerLevel, `\\${base.name}^{${exponent.text}}${fenced(argument)}`);
}

function times(s: Setting, leftNode: Expr, rightNode: Expr, inExponent: boolean): string {
  let left = set(s, leftNode, inExponent);
  const negative = s.level === negativeLevel;
  if (s.level < productLevel && !negative) left = parenthesised(s, left);
  const right = at(s, rightNode, inExponent ? quantityLevel : productLevel, inExponent);
  const level = negative ? negativeLevel : s.level === quantityLevel ? quantityLevel : productLevel;
  const cross = s.sub !== undefined || /^(?:[0-9]|\(-|\\left\(-)/.test(right) || beginsQuoted(rightNode);
  return done(s, level, `${left}${cross ? ' \\times ' : '\\,'}${right}`);
}

/** Whether a factor begins with a quoted quantity: a number, not a symbol. */
function beginsQuoted(e: Expr): boolean {
  if (e.kind === 'quoted') return true;
  if (e.kind === 'parens') return beginsQuoted(e.inner);
  return e.kind === 'binary' && (e.operator === '^' || e.operator === '*') && beginsQuoted(e.left);
}

function quotient(s: Setting, left: Expr, right: Expr, inExponent: boolean): string {
  if (!inExponent) {
    const tex = `\\frac{${set(s, left, false)}}{${set(s, right, false)}}`;
    return done(s, productLevel, tex);
  }
  // In an exponent a slash is easier to read than a second fraction bar.
  let over = set(s, left, true);
  const negative = s.level === negativeLevel;
  if (s.level < quantityLevel && !negative) over = parenthesised(s, over);
  const under = at(s, right, powerLevel, true);
  return done(s, negative ? sumLevel : quantityLevel, `${over}/${under}`);
}

function choose(s: Setting, e: Expr & { kind: 'choose' }, inExponent: boolean): string {
  const branch = s.sub === undefined ? undefined : s.taken.branch(e);
  if (branch !== undefined) return set(s, branch ? e.then : e.otherwise, inExponent);
  const rows: string[] = [];
  let rest: Expr = e;
  while (rest.kind === 'choose') {
    rows.push(`${set(s, rest.then, inExponent)} & \\text{if } ${set(s, rest.test, inExponent)}`);
    rest = outermost(rest.otherwise);
  }
  rows.push(`${set(s, rest, inExponent)} & \\text{otherwise}`);
  return done(s, sumLevel, `\\begin{cases} ${rows.join(' \\\\ ')} \\end{cases}`);
}

const named = new Map([
  ['ln', '\\ln'],
  ['log10', '\\log_{10}'],
  ['min', '\\min'],
  ['max', '\\max'],
  ['sin', '\\sin'],
  ['cos', '\\cos'],
  ['tan', '\\tan'],
  ['asin', '\\arcsin'],
  ['acos', '\\arccos'],
  ['atan', '\\arctan'],
  ['sinh', '\\sinh'],
  ['cosh', '\\cosh'],
  ['tanh', '\\tanh'],
]);

function call(s: Setting, name: string, args: readonly Expr[], inExponent: boolean): string {
  const first = args[0] as Expr;
  switch (name) {
    case 'exp':
      return power(s, '\\mathrm{e}', first);
    case 'sqrt':
      return around(s, '\\sqrt{', first, '}', inExponent);
    case 'cbrt':
      return around(s, '\\sqrt[3]{', first, '}', inExponent);
    case 'abs':
      return around(s, '\\left|', first, '\\right|', inExponent);
    case 'floor':
      return around(s, '\\left\\lfloor ', first, '\\right\\rfloor ', inExponent);
    case 'ceil':
      return around(s, '\\left\\lceil ', first, '\\right\\rceil ', inExponent);
    case 'hypot': {
      // What it computes, as it stands on paper.
      const squares = args.map((a) => `${at(s, a, atomLevel, inExponent)}^{2}`);
      return done(s, atomLevel, `\\sqrt{${squares.join(' + ')}}`);
    }
    default: {
      const inner = args.map((a) => set(s, a, inExponent)).join(',\\ ');
      return done(s, powerLevel, `${named.get(name) ?? `\\operatorname{${name}}`}${fenced(inner)}`);
    }
  }
}

function around(s: Setting, open: string, inner: Expr, close: string, inExponent: boolean): string {
  const tex = `${open}${set(s, inner, inExponent)}${close}`;
  return done(s, atomLevel, tex);
}

function table(s: Setting, e: Expr & { kind: 'table' }, inExponent: boolean): string {
  const row = s.sub === undefined ? undefined : s.taken.table(e);
  if (row?.kind === 'entry' && row.unit !== undefined && e !== s.root) return quantity(s, row.value, row.unit);
  if (row?.kind === 'interpolate' && row.xUnit !== undefined && row.yUnit !== undefined) {
    const { x0, x1, y0, y1, xUnit, yUnit } = row;
    const term = (value: number, unit: Unit, least: number): string => {
      const tex = quantity(s, value, unit);
      return s.level >= least ? tex : fenced(tex);
    };
    const x = `${at(s, e.key, sumLevel, inExponent)} - ${term(x0, xUnit, quantityLevel)}`;
    const slope = `\\frac{${x}}{${term(x1, xUnit, sumLevel)} - ${term(x0, xUnit, quantityLevel)}}`;
    const rise = `(${term(y1, yUnit, sumLevel)} - ${term(y0, yUnit, quantityLevel)})`;
    return done(s, sumLevel, `${term(y0, yUnit, sumLevel)} + ${rise} \\times ${slope}`);
  }
  const key = set(s, e.key, inExponent);
  return done(s, powerLevel, `\\operatorname{${e.name}}${fenced(`${texText(e.table)},\\ ${texText(e.column)},\\ ${key}`)}`);
}

/** A value of a table in the unit of its column. */
function quantity(s: Setting, si: number, unit: Unit): string {
  return piece(s, texQuantity(numeralInUnit(si, unit), unit, s), unit.text !== '1');
}

const anglePlaces = 6;
let radian: Unit | undefined;

function quoted(s: Setting, text: string, inExponent: boolean): string {
  const value = readLiteral(text, s.decimalSign);
  if (!value.ok) return done(s, atomLevel, texText(`“${text}”`));
  const { numeral, unit, si } = value.value;
  if (s.sub !== undefined && inExponent && unit.text !== 'rad' && isAngleUnit(unit)) {
    radian ??= unitOf('rad');
    const exact = numeralInUnit(si, radian);
    const shown = significantDigits(exact) > anglePlaces ? roundSignificant(exact, anglePlaces) : exact;
    return piece(s, texQuantity(shown, radian, s), true);
  }
  return piece(s, texQuantity(numeral, unit, s), unit.text !== '1');
}

const literals: Readonly<Record<'.' | ',', Map<string, string>>> = { '.': new Map(), ',': new Map() };
const mostLiterals = 2000;

/** A number of the formula, as typed, in the print of the sheet. */
function texLiteral(text: string, decimalSign: '.' | ','): string {
  const cache = literals[decimalSign];
  const known = cache.get(text);
  if (known !== undefined) return known;
  const whole = text.replace(/^\./, '0.').replace(/\.(?![0-9])/, '');
  const numeral = readNumeral(whole, '.');
  // A numeral of thousands of digits is beyond print: its double says as much as is computed with.
  const tex =
    numeral.ok && whole.length <= 40
      ? texNumeral(numeral.value, { decimalSign })
      : String(Number(text)).replace(/e\+?(-?\d+)$/, '\\times 10^{$1}');
  if (cache.size >= mostLiterals) cache.clear();
  cache.set(text, tex);
  return tex;
}
