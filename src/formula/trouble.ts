// What can go wrong while a formula is evaluated, as sentences with the offending numbers and their units.
//
// 1. A number is shown in the unit of its quantity where it is a name, else in the coherent unit of its dimension, to six digits.
// 2. The dimension of a part is found again from the units of the names, only once there is something to say.
// Not here: finding the trouble (explain.ts).

import {
  coherentUnit,
  type Dimension,
  dimensionless,
  divideD,
  equalD,
  multiplyD,
  numeralInUnit,
  numeralOfDouble,
  one,
  type Problem,
  powerD,
  printNumeral,
  printQuantity,
  rational,
  readUnit,
  roundSignificant,
  significantDigits,
  type Unit,
  withoutTrailingZeros,
} from '../quantity/index.ts';
import { childrenOf } from './children.ts';
import type { Lookup } from './explain.ts';
import type { Expr } from './expr.ts';
import { readLiteral } from './literal.ts';
import { rationalOf } from './rational-exponent.ts';
import { plainName } from './symbols.ts';
import { columnOf, nearestText, type TableColumnData, type TableData } from './table.ts';
import { writeExpr } from './wording.ts';

type Call = Extract<Expr, { kind: 'call' }>;
type Table = Extract<Expr, { kind: 'table' }>;
type Binary = Extract<Expr, { kind: 'binary' }>;

const shownDigits = 6;
const jumpDistance = 1e-9;

function error(code: string, message: string, expr: Expr): Problem {
  return { code, severity: 'error', message, at: expr.at };
}

/** A number in its unit, at most six digits. */
function show(lookup: Lookup, si: number, unit: Unit): string {
  const numeral = numeralInUnit(si, unit);
  const short = significantDigits(numeral) > shownDigits ? withoutTrailingZeros(roundSignificant(numeral, shownDigits)) : numeral;
  const style = { decimalSign: lookup.decimalSign ?? '.' };
  return unit.text === '1' ? printNumeral(short, style) : printQuantity(short, unit, style);
}

function showPart(lookup: Lookup, expr: Expr, si: number): string {
  return show(lookup, si, unitOf(lookup, expr));
}

function unitOf(lookup: Lookup, expr: Expr): Unit {
  if (expr.kind === 'parens' || expr.kind === 'minus') return unitOf(lookup, expr.inner);
  if (expr.kind === 'name') return lookup.unit?.(expr.name) ?? one;
  if (expr.kind === 'quoted') {
    const read = readLiteral(expr.text, lookup.decimalSign ?? '.');
    return read.ok ? read.value.unit : one;
  }
  const dimension = dimensionOf(lookup, expr);
  if (expr.kind === 'binary' && (expr.operator === '+' || expr.operator === '-')) {
    const unit = unitOf(lookup, expr.left);
    if (unit.reading === undefined && equalD(unit.dimension, dimension)) return unit;
  }
  if (expr.kind === 'binary' && expr.operator === '^' && expr.right.kind === 'number') {
    const power = readUnit(`${unitOf(lookup, expr.left).text}^${expr.right.text}`);
    if (power.ok && equalD(power.value.dimension, dimension)) return power.value;
  }
  return coherentUnit(dimension);
}

function dimensionOf(lookup: Lookup, expr: Expr): Dimension {
  switch (expr.kind) {
    case 'name':
    case 'quoted':
      return unitOf(lookup, expr).dimension;
    case 'parens':
    case 'minus':
      return dimensionOf(lookup, expr.inner);
    case 'binary': {
      const left = dimensionOf(lookup, expr.left);
      if (expr.operator === '^') {
        const exponent = rationalOf(expr.right);
        return exponent ? powerD(left, exponent) : dimensionless;
      }
      const right = dimensionOf(lookup, expr.right);
      if (expr.operator === '*') return multiplyD(left, right);
      if (expr.operator === '/') return divideD(left, right);
      return isZeroLiteral(expr.left) ? right : left;
    }
    case 'choose':
      return dimensionOf(lookup, isZeroLiteral(expr.then) ? expr.otherwise : expr.then);
    case 'call':
      switch (expr.name) {
        case 'sqrt':
          return powerD(dimensionOf(lookup, expr.args[0]!), rational(1, 2));
        case 'cbrt':
          return powerD(dimensionOf(lookup, expr.args[0]!), rational(1, 3));
        case 'abs':
        case 'hypot':
          return dimensionOf(lookup, expr.args[0]!);
        case 'min':
        case 'max':
          return dimensionOf(lookup, expr.args.find((argument) => !isZeroLiteral(argument)) ?? expr.args[0]!);
        default:
          return dimensionless;
      }
    case 'table': {
      const table = lookup.table(expr.table);
      return (table && columnOf(table, expr.column)?.unit?.dimension) ?? dimensionless;
    }
    default:
      return dimensionless;
  }
}

const isZeroLiteral = (expr: Expr): boolean =>
  expr.kind === 'number' ? expr.value === 0 : expr.kind === 'parens' && isZeroLiteral(expr.inner);

const isLiteral = (expr: Expr): boolean =>
  expr.kind === 'number' || expr.kind === 'quoted' || (expr.kind === 'minus' && isLiteral(expr.inner));
const unwrapped = (expr: Expr): Expr => (expr.kind === 'parens' ? unwrapped(expr.inner) : expr);
const written = (expr: Expr): string => writeExpr(unwrapped(expr));

function noValue(expr: Extract<Expr, { kind: 'name' }>): Problem {
  return error('no-value', `${plainName(expr.name)} has no value here; give it one first`, expr);
}

function divisionByZero(lookup: Lookup, expr: Binary): Problem {
  if (expr.operator === '^') {
    return error(
      'division-by-zero',
      `division by zero: ${written(expr.left)} is 0 and has a negative exponent; check what makes it vanish`,
      expr,
    );
  }
  const right = unwrapped(expr.right);
  const zero =
    right.kind === 'number' ? `the divisor is written as ${right.text}` : `${written(right)} is ${showPart(lookup, right, 0)}`;
  const parts = partsOfZero(lookup, right);
  return error('division-by-zero', `division by zero: ${zero}${parts} in ${writeExpr(expr)}; check what makes it vanish`, expr);
}

/** ' (d_2 = 200 mm, d_1 = 200 mm)': the operands of a difference that came out as 0. */
function partsOfZero(lookup: Lookup, expr: Expr): string {
  if (expr.kind !== 'binary' || (expr.operator !== '-' && expr.operator !== '+')) return '';
  const names = new Set([expr.left, expr.right].map(unwrapped).flatMap((side) => (side.kind === 'name' ? [side.name] : [])));
  if (names.size === 0) return '';
  return ` (${[...names].map((name) => `${plainName(name)} = ${show(lookup, lookup.value(name), lookup.unit?.(name) ?? one)}`).join(', ')})`;
}

function rootOfNegative(lookup: Lookup, expr: Expr, radicand: Expr, value: number): Problem {
  const of = unwrapped(radicand);
  const is = isLiteral(of) ? '' : `${written(of)} is `;
  return error(
    'root-of-negative',
    `root of a negative number: ${is}${showPart(lookup, of, value)} in ${writeExpr(expr)}; a root needs 0 or more`,
    expr,
  );
}

function ofCall(lookup: Lookup, expr: Call, x: number): Problem | undefined {
  const argument = expr.args[0]!;
  const is = (isLiteral(unwrapped(argument)) ? '' : `${written(argument)} is `) + showPart(lookup, argument, x);
  switch (expr.name) {
    case 'sqrt':
      return x < 0 ? rootOfNegative(lookup, expr, argument, x) : undefined;
    case 'ln':
    case 'log10':
      if (x > 0) return undefined;
      return error(
        'logarithm',
        `${expr.name} of ${x === 0 ? 'zero' : 'a negative number'}: ${is}; a logarithm needs a number above 0`,
        expr,
      );
    case 'asin':
    case 'acos': {
      if (Math.abs(x) <= 1) return undefined;
      const what = expr.name === 'asin' ? 'sine' : 'cosine';
      return error(
        'beyond-one',
        `${expr.name}(${show(lookup, x, one)}): no angle has a ${what} ${x > 0 ? 'beyond 1' : 'below −1'}; ${written(argument)} must lie between −1 and 1`,
        expr,
      );
    }
    default:
      return undefined;
  }
}

function tooLarge(lookup: Lookup, expr: Expr): Problem {
  const names = namesIn(expr)
    .filter((name) => Number.isFinite(lookup.value(name)))
    .slice(0, 4)
    .map((name) => `${plainName(name)} = ${show(lookup, lookup.value(name), lookup.unit?.(name) ?? one)}`);
  const where = names.length === 0 ? '' : ` with ${names.join(', ')}`;
  return error('overflow', `${writeExpr(expr)} is too large for a number (beyond 1.8e308)${where}; check the values`, expr);
}

function namesIn(expr: Expr): string[] {
  const found = new Set<string>();
  const visit = (node: Expr): void => {
    if (node.kind === 'name') found.add(node.name);
    for (const part of childrenOf(node)) visit(part);
  };
  visit(expr);
  return [...found];
}

/** A warning where the argument lies within 1e-9 (relative, from 1 upwards) of a place where the result jumps. */
function nearJump(expr: Call, name: 'floor' | 'ceil' | 'round', x: number): Problem | undefined {
  const jump = name === 'round' ? Math.floor(x) + 0.5 : Math.round(x);
  if (Math.abs(x - jump) > jumpDistance * Math.max(1, Math.abs(x))) return undefined;
  const shown = printNumeral(numeralOfDouble(jump), { decimalSign: '.' });
  return {
    code: 'near-jump',
    severity: 'warning',
    message: `${writeExpr(expr)} stands on an edge: ${written(expr.args[0]!)} is within 1e-9 of ${shown}, where ${name} jumps; the printed numbers may fall on either side, say which is meant`,
    at: expr.at,
  };
}

function outside(lookup: Lookup, expr: Table, table: TableData, keys: TableColumnData, x: number): Problem {
  const unit = keys.unit ?? one;
  const numbers = [...(keys.numbers ?? [])];
  const range = `${show(lookup, Math.min(...numbers), unit)} to ${show(lookup, Math.max(...numbers), unit)}`;
  const key = unwrapped(expr.key);
  const what =
    key.kind === 'quoted' || key.kind === 'number'
      ? show(lookup, x, unit)
      : `${written(key)} = ${show(lookup, x, key.kind === 'name' ? unitOf(lookup, key) : unit)}`;
  return error(
    'beyond-table',
    `${what} lies beyond the table \`${table.name}\` (${range}); extend the table with a source, or change the value`,
    expr,
  );
}

function noRow(expr: Table, table: TableData, text: string): Problem {
  const keys = table.columns[0]?.texts ?? [];
  const nearest = nearestText(text, keys);
  const then =
    nearest !== undefined
      ? `nearest: \`${nearest}\``
      : `its rows: ${keys
          .slice(0, 5)
          .map((key) => `\`${key}\``)
          .join(', ')}`;
  return error('no-row', `no row \`${text}\` in table ${table.name}; ${then}`, expr);
}

function noRowOfNumber(lookup: Lookup, expr: Table, table: TableData, keys: TableColumnData, x: number): Problem {
  const unit = keys.unit ?? one;
  let nearest: number | undefined;
  for (const key of keys.numbers ?? []) {
    if (!Number.isNaN(key) && (nearest === undefined || Math.abs(key - x) < Math.abs(nearest - x))) nearest = key;
  }
  const then = nearest === undefined ? 'the table is empty' : `nearest: ${show(lookup, nearest, unit)}`;
  return error(
    'no-row',
    `no row ${show(lookup, x, unit)} in table ${table.name}; ${then}; entry wants the exact key, interpolate reads between rows`,
    expr,
  );
}

const noTable = (expr: Table): Problem =>
  error('no-table', `the table ${expr.table} has no column ${expr.column} to read; check the table`, expr);

const unordered = (expr: Table, keys: TableColumnData): Problem =>
  error(
    'unordered-table',
    `cannot interpolate in ${expr.table}: its keys (${keys.name}) must rise or fall from row to row; sort the rows and remove doubles`,
    expr,
  );

const emptyEntry = (expr: Table): Problem =>
  error('no-value', `the table ${expr.table} has no number there in its column ${expr.column}; fill the entry`, expr);

const noText = (expr: Expr): Problem => error('no-value', `${writeExpr(expr)} is no text; compare it with a number`, expr);

export const troubles = {
  noValue,
  divisionByZero,
  rootOfNegative,
  ofCall,
  tooLarge,
  nearJump,
  outside,
  noRow,
  noRowOfNumber,
  noTable,
  unordered,
  emptyEntry,
  noText,
};
