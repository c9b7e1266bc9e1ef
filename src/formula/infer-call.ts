// What the functions of the language ask of their arguments, and what they give; lookups in tables.
//
// 1. min, max, hypot, atan2 and abs keep kinds together; sqrt and cbrt are powers; all others take a number or an angle.
// 2. floor, ceil and round take bare numbers only: of anything else the result would depend on the unit.
// Not here: arity (the walk of the reader has checked it), numbers (explain.ts, run.ts).

import { either, equalD, type Fix, isAngleUnit, isDimensionless, rational, readUnit } from '../quantity/index.ts';
import { angleCounts, fitsAngle } from './counts.ts';
import type { Expr } from './expr.ts';
import { alike, type Part, powerByRational, quantity, quantityOf, refuseReading, refuseRevolutions } from './infer-rules.ts';
import { needsNumber, roundingNeedsNumber } from './messages.ts';
import { nearestNames } from './nearest.ts';
import { report } from './report.ts';
import { nearestText, type TableData, textsOf } from './table.ts';
import { type Context, number, type QuantityType, type Term } from './term.ts';
import type { ColumnType, TableType } from './type.ts';
import { describe, writeExpr } from './wording.ts';

type Call = Extract<Expr, { kind: 'call' }>;
type Lookup = Extract<Expr, { kind: 'table' }>;

const half = rational(1, 2);
const third = rational(1, 3);
const angle: Term = { type: { ...number, counts: angleCounts } };
const numberTerm: Term = { type: number };

export function callOf(ctx: Context, call: Call, args: readonly Part[]): Term | undefined {
  const first = args[0]!;
  switch (call.name) {
    case 'min':
    case 'max':
      return alike(ctx, call.name, args, call.at);
    case 'hypot':
    case 'atan2': {
      for (const { expr, term } of args) {
        if (term?.type.kind === 'quantity' && term.type.temperature === 'reading')
          return refuseReading(ctx, expr, term.type, call.name);
      }
      const met = alike(ctx, call.name, args, call.at);
      if (met === undefined || call.name === 'atan2') return met && angle;
      const type = met.type as QuantityType;
      return { type: quantity(type.dimension, { ...number.counts, r: type.counts.r, rad: type.counts.rad }) };
    }
    case 'sqrt':
    case 'cbrt': {
      const type = checked(ctx, first, call.name);
      return type && powerByRational(ctx, first, type, call.name === 'sqrt' ? half : third, call.at);
    }
    case 'abs':
      return checked(ctx, first, 'abs') && withoutPlain(first.term!);
    case 'sign':
      return checked(ctx, first, 'sign') && numberTerm;
    case 'floor':
    case 'ceil':
    case 'round':
      return wholeNumber(ctx, call.name, first);
    case 'asin':
    case 'acos':
    case 'atan':
      return argument(ctx, call.name, first) && angle;
    default:
      return argument(ctx, call.name, first) && numberTerm;
  }
}

const withoutPlain = (term: Term): Term => ({ type: term.type, ...(term.shared && { shared: term.shared }) });

function checked(ctx: Context, part: Part, name: string): QuantityType | undefined {
  const type = quantityOf(ctx, part, name);
  return type?.temperature === 'reading' ? refuseReading(ctx, part.expr, type, name) : type;
}

/** A number or an angle. */
function argument(ctx: Context, name: string, part: Part): QuantityType | undefined {
  const type = checked(ctx, part, name);
  if (type === undefined) return undefined;
  if (!isDimensionless(type.dimension)) return report(ctx, 'needs-number', needsNumber(name, part.expr, type), part.expr.at);
  return fitsAngle(type.counts) ? type : refuseRevolutions(ctx, name, part.expr, type);
}

function wholeNumber(ctx: Context, name: string, part: Part): Term | undefined {
  const type = checked(ctx, part, name);
  if (type === undefined) return undefined;
  const declaredAngle = part.term?.plain === true && type.unitText !== undefined && isAngle(type.unitText);
  if (!isDimensionless(type.dimension) || declaredAngle || !fitsAngle(type.counts)) {
    if (isDimensionless(type.dimension) && !declaredAngle) return refuseRevolutions(ctx, name, part.expr, type, true);
    return report(ctx, 'rounding-unit', roundingNeedsNumber(name, part.expr, type), part.expr.at, rounded(ctx, part, type));
  }
  return numberTerm;
}

function isAngle(unitText: string): boolean {
  const unit = readUnit(unitText);
  return unit.ok && isAngleUnit(unit.value);
}

/** Offered for a name: the count in its declared unit. */
function rounded(ctx: Context, part: Part, type: QuantityType): readonly Fix[] {
  if (type.unitText === undefined || part.expr.kind !== 'name') return [];
  const unit = `"1 ${type.unitText}"`;
  const [from, to] = part.expr.at;
  return [{ from, to, text: `${ctx.text.slice(from, to)}/${unit}`, label: `count in ${type.unitText}` }];
}

/** True where the key of the table is text. */
export function textKey(ctx: Context, expr: Lookup): boolean {
  const table = ctx.scope.table(expr.table);
  const key = table?.columns[0];
  return key !== undefined && key.type === undefined;
}

/** `key` is undefined where it is a quoted text for a column of texts. */
export function lookUp(ctx: Context, expr: Lookup, key: Part | undefined): Term | undefined {
  const table = ctx.scope.table(expr.table);
  if (table === undefined) {
    const names = [...ctx.scope.tableNames()];
    // A table that is there and has no columns to read has had its say at its own cell.
    return names.includes(expr.table) ? undefined : unknown(ctx, expr, 'table', expr.table, names);
  }
  const keys = table.columns[0];
  const column = table.columns.find((each) => each.name === expr.column);
  if (column === undefined || keys === undefined) {
    return unknown(
      ctx,
      expr,
      'column',
      expr.column,
      table.columns.map((each) => each.name),
    );
  }
  const fits = keys.type === undefined ? fitsTextKey(ctx, expr, table, keys, key) : fitsNumericKey(ctx, expr, keys, key);
  if (expr.name === 'interpolate' && column.type === undefined) {
    return report(
      ctx,
      'text-use',
      `interpolate needs numbers, the column ${table.name}.${column.name} holds texts; use entry`,
      expr.at,
    );
  }
  if (!fits) return undefined;
  return { type: column.type ?? { kind: 'text', table: table.name, column: column.name } };
}

function unknown(ctx: Context, expr: Lookup, what: 'table' | 'column', name: string, candidates: Iterable<string>): undefined {
  const all = [...candidates];
  const nearest = nearestNames(name, all);
  const known = all.slice(0, 6).join(', ');
  const where = what === 'column' ? `the table ${expr.table} has no column ${name}` : `there is no table ${name}`;
  const then =
    nearest.length > 0 ? `did you mean ${either(nearest)}` : known === '' ? 'the sheet has no tables yet' : `there are ${known}`;
  const at = wordAt(ctx, expr, what);
  const fixes = nearest.map((text) => ({ from: at[0], to: at[1], text, label: `write ${text}` }));
  return report(ctx, `unknown-${what}`, `${where}; ${then}`, at, at === expr.at ? [] : fixes);
}

/** Place of the table's or the column's word in the call: the tree keeps only the call's own span. */
function wordAt(ctx: Context, expr: Lookup, what: 'table' | 'column'): readonly [number, number] {
  const call = ctx.text.slice(...expr.at);
  const match = /^[^(]*\(\s*([^,\s]+)\s*,\s*([^,\s]+)/u.exec(call);
  const word = match?.[what === 'table' ? 1 : 2];
  if (match === null || word === undefined) return expr.at;
  const from = expr.at[0] + (what === 'table' ? match[0].indexOf(word, match[0].indexOf('(')) : match[0].lastIndexOf(word));
  return [from, from + word.length];
}

function fitsTextKey(ctx: Context, expr: Lookup, table: TableType | TableData, keys: ColumnType, key: Part | undefined): boolean {
  if (expr.name === 'interpolate') {
    report(
      ctx,
      'text-use',
      `interpolate needs numeric keys, the first column ${table.name}.${keys.name} holds texts; use entry`,
      expr.at,
    );
    return false;
  }
  if (key !== undefined) {
    if (key.term === undefined) return false;
    if (key.term.type.kind === 'text') return true;
    report(
      ctx,
      'text-use',
      `the rows of ${table.name} are found by text, ${writeExpr(key.expr)} is ${describe(key.term.type)}; give a choice or a text in quotes`,
      key.expr.at,
    );
    return false;
  }
  const texts = textsOf(table, keys.name);
  const quoted = innermost(expr.key);
  if (texts === undefined || quoted.kind !== 'quoted' || texts.includes(quoted.text)) return true;
  const near = nearestText(quoted.text, texts);
  const nearest = near === undefined ? [] : [near];
  const then =
    near !== undefined
      ? `did you mean "${near}"`
      : `its rows are ${texts
          .slice(0, 5)
          .map((text) => `"${text}"`)
          .join(', ')}`;
  const fixes = nearest.map((text) => ({ from: quoted.at[0], to: quoted.at[1], text: `"${text}"`, label: `write "${text}"` }));
  report(ctx, 'unknown-text', `the table ${table.name} has no row "${quoted.text}"; ${then}`, quoted.at, fixes);
  return false;
}

const innermost = (expr: Expr): Expr => (expr.kind === 'parens' ? innermost(expr.inner) : expr);

function fitsNumericKey(ctx: Context, expr: Lookup, keys: ColumnType, key: Part | undefined): boolean {
  if (key === undefined || keys.type?.kind !== 'quantity') return false;
  const type = quantityOf(ctx, key, `the key of ${expr.table}`);
  if (type === undefined) return false;
  if (!type.zero && !equalD(type.dimension, keys.type.dimension)) {
    report(
      ctx,
      'unlike-key',
      `the rows of ${expr.table} are found by ${describe(keys.type)}, ${writeExpr(key.expr)} is ${describe(type)}; give a key of that kind`,
      key.expr.at,
    );
    return false;
  }
  const column: Part = { expr: { kind: 'name', name: keys.name, at: expr.at }, term: { type: keys.type } };
  return alike(ctx, `the key of ${expr.table}`, [key, column], key.expr.at) !== undefined;
}
