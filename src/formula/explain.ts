// One case of a formula, slowly and exactly: its value and the decisions on the way, or what went wrong where.
//
// 1. The arithmetic is that of run.ts, bit for bit; only the order of looking differs: of a choice the branch taken alone,
//    of `and` and `or` the right side only where it matters.
// 2. A problem names the operation, its place, and the offending numbers with their units.
// 3. floor, ceil and round within 1e-9 of a jump give a warning: the printed numbers could fall on the other side.
// Not here: many entries at once (run.ts), sentences (trouble.ts).

import type { Problem, Unit } from '../quantity/index.ts';
import { apply, constantOf, isE, power, powerForm } from './arithmetic.ts';
import type { CompareOperator, Expr, FunctionName } from './expr.ts';
import { readLiteral } from './literal.ts';
import { columnOf, directionOf, rowBelow, rowOfNumber, type TableColumnData, type TableData } from './table.ts';
import type { Taken, TakenRow } from './taken.ts';
import { troubles } from './trouble.ts';

export interface Lookup {
  /** Coherent SI; NaN where the quantity has no value in this case. */
  value(name: string): number;
  /** The text of a choice; undefined for everything else. */
  text(name: string): string | undefined;
  table(name: string): TableData | undefined;
  /** For messages: the unit in which a quantity is printed. */
  unit?(name: string): Unit | undefined;
  readonly decimalSign?: '.' | ',';
}

export type Explained =
  | { readonly ok: true; readonly value: number; readonly taken: Taken; readonly warnings: readonly Problem[] }
  | { readonly ok: false; readonly problem: Problem; readonly warnings: readonly Problem[] };

/** Truth values are 1 and 0. */
export function explain(expr: Expr, lookup: Lookup): Explained {
  const branches = new Map<Expr, boolean>();
  const rows = new Map<Expr, TakenRow>();
  const walk: Walk = { lookup, branches, rows, warnings: [], problem: undefined };
  const value = evaluate(walk, expr);
  if (walk.problem) return { ok: false, problem: walk.problem, warnings: walk.warnings };
  return {
    ok: true,
    value,
    taken: { branch: (node) => branches.get(node), table: (node) => rows.get(node) },
    warnings: walk.warnings,
  };
}

interface Walk {
  readonly lookup: Lookup;
  readonly branches: Map<Expr, boolean>;
  readonly rows: Map<Expr, TakenRow>;
  readonly warnings: Problem[];
  problem: Problem | undefined;
}

const none = Number.NaN;

/** The first problem stays; what comes after it is not looked at. */
function stop(walk: Walk, problem: Problem): number {
  walk.problem ??= problem;
  return none;
}

function evaluate(walk: Walk, expr: Expr): number {
  if (walk.problem) return none;
  switch (expr.kind) {
    case 'number':
      return expr.value;
    case 'constant':
      return expr.name === 'pi' ? Math.PI : Math.E;
    case 'quoted': {
      const read = readLiteral(expr.text, walk.lookup.decimalSign ?? '.');
      return read.ok ? read.value.si : stop(walk, { ...read.problem, at: expr.at });
    }
    case 'name': {
      const value = walk.lookup.value(expr.name);
      return Number.isFinite(value) ? value : stop(walk, troubles.noValue(expr));
    }
    case 'parens':
      return evaluate(walk, expr.inner);
    case 'minus':
      return -evaluate(walk, expr.inner);
    case 'not':
      return 1 - evaluate(walk, expr.inner);
    case 'logic': {
      const left = evaluate(walk, expr.left);
      if (expr.operator === 'and' ? left === 0 : left !== 0) return left;
      return evaluate(walk, expr.right);
    }
    case 'choose': {
      const test = evaluate(walk, expr.test);
      if (walk.problem) return none;
      walk.branches.set(expr, test !== 0);
      return evaluate(walk, test !== 0 ? expr.then : expr.otherwise);
    }
    case 'binary':
      return binary(walk, expr);
    case 'compare':
      return compare(walk, expr);
    case 'call':
      return call(walk, expr);
    case 'table': {
      const row = lookUp(walk, expr);
      return row === undefined ? none : valueOfRow(walk, expr, row);
    }
  }
}

function binary(walk: Walk, expr: Extract<Expr, { kind: 'binary' }>): number {
  const left = evaluate(walk, expr.left);
  const right = evaluate(walk, expr.right);
  if (walk.problem) return none;
  let value: number;
  switch (expr.operator) {
    case '+':
      value = left + right;
      break;
    case '-':
      value = left - right;
      break;
    case '*':
      value = left * right;
      break;
    case '/':
      if (right === 0) return stop(walk, troubles.divisionByZero(walk.lookup, expr));
      value = left / right;
      break;
    case '^':
      if (isE(expr.left)) {
        value = Math.exp(right);
        break;
      }
      value = power(left, right, powerForm(constantOf(expr.right)));
      if (left === 0 && right < 0) return stop(walk, troubles.divisionByZero(walk.lookup, expr));
      if (Number.isNaN(value)) return stop(walk, troubles.rootOfNegative(walk.lookup, expr, expr.left, left));
      break;
  }
  return Number.isFinite(value) ? value : stop(walk, troubles.tooLarge(walk.lookup, expr));
}

function call(walk: Walk, expr: Extract<Expr, { kind: 'call' }>): number {
  const args: number[] = [];
  for (const argument of expr.args) {
    args.push(evaluate(walk, argument));
    if (walk.problem) return none;
  }
  const x = args[0]!;
  const problem = troubles.ofCall(walk.lookup, expr, x);
  if (problem) return stop(walk, problem);
  if (expr.name === 'floor' || expr.name === 'ceil' || expr.name === 'round') {
    const warning = troubles.nearJump(expr, expr.name, x);
    if (warning) walk.warnings.push(warning);
  }
  const value = callValue(expr.name, args);
  return Number.isFinite(value) ? value : stop(walk, troubles.tooLarge(walk.lookup, expr));
}

/** In the order of the compiled form: two by two, the first three of hypot together. */
function callValue(name: FunctionName, args: readonly number[]): number {
  switch (name) {
    case 'min':
      return args.reduce((a, b) => Math.min(a, b));
    case 'max':
      return args.reduce((a, b) => Math.max(a, b));
    case 'atan2':
      return Math.atan2(args[0]!, args[1]!);
    case 'hypot':
      if (args.length === 2) return Math.hypot(args[0]!, args[1]!);
      return args.slice(3).reduce((a, b) => Math.hypot(a, b), Math.hypot(args[0]!, args[1]!, args[2]!));
    default:
      return apply(name, args[0]!);
  }
}

function compare(walk: Walk, expr: Extract<Expr, { kind: 'compare' }>): number {
  const texts = expr.sides.some((side) => isText(walk, side));
  const sides = expr.sides.map((side) => (texts ? textOf(walk, side) : evaluate(walk, side)));
  if (walk.problem) return none;
  return expr.operators.every((operator, index) => holds(operator, sides[index]!, sides[index + 1]!)) ? 1 : 0;
}

function holds(operator: CompareOperator, a: number | string, b: number | string): boolean {
  switch (operator) {
    case '<':
      return a < b;
    case '<=':
      return a <= b;
    case '>':
      return a > b;
    case '>=':
      return a >= b;
    case '==':
      return a === b;
    case '!=':
      return a !== b;
  }
}

function isText(walk: Walk, expr: Expr): boolean {
  switch (expr.kind) {
    case 'parens':
      return isText(walk, expr.inner);
    case 'name':
      return walk.lookup.text(expr.name) !== undefined;
    case 'table': {
      const table = walk.lookup.table(expr.table);
      const column = table && columnOf(table, expr.column);
      return column !== undefined && column.numbers === undefined;
    }
    default:
      return false;
  }
}

function textOf(walk: Walk, expr: Expr): string {
  switch (expr.kind) {
    case 'parens':
      return textOf(walk, expr.inner);
    case 'quoted':
      return expr.text;
    case 'name': {
      const text = walk.lookup.text(expr.name);
      if (text === undefined) stop(walk, troubles.noValue(expr));
      return text ?? '';
    }
    case 'table': {
      const found = rowOf(walk, expr);
      return found === undefined ? '' : (found.column.texts[found.row] ?? '');
    }
    default:
      stop(walk, troubles.noText(expr));
      return '';
  }
}

interface Found {
  readonly column: TableColumnData;
  readonly row: number;
}

/** The row of an entry. */
function rowOf(walk: Walk, expr: Extract<Expr, { kind: 'table' }>): Found | undefined {
  const parts = partsOf(walk, expr);
  if (parts === undefined) return undefined;
  const { table, keys, column } = parts;
  if (keys.numbers === undefined) {
    const text = textOf(walk, expr.key);
    if (walk.problem) return undefined;
    const row = keys.texts.indexOf(text);
    if (row >= 0) return { column, row };
    stop(walk, troubles.noRow(expr, table, text));
    return undefined;
  }
  const x = evaluate(walk, expr.key);
  if (walk.problem) return undefined;
  const row = rowOfNumber(keys.numbers, x);
  if (row >= 0) return { column, row };
  stop(walk, troubles.noRowOfNumber(walk.lookup, expr, table, keys, x));
  return undefined;
}

function partsOf(walk: Walk, expr: Extract<Expr, { kind: 'table' }>) {
  const table = walk.lookup.table(expr.table);
  const keys = table?.columns[0];
  const column = table && columnOf(table, expr.column);
  if (table !== undefined && keys !== undefined && column !== undefined) return { table, keys, column };
  stop(walk, troubles.noTable(expr));
  return undefined;
}

function lookUp(walk: Walk, expr: Extract<Expr, { kind: 'table' }>): TakenRow | undefined {
  if (expr.name === 'entry') {
    const found = rowOf(walk, expr);
    return found && entryOf(found.column, found.row);
  }
  const parts = partsOf(walk, expr);
  if (parts === undefined) return undefined;
  const { table, keys, column } = parts;
  const x = evaluate(walk, expr.key);
  if (walk.problem) return undefined;
  if (keys.numbers === undefined || column.numbers === undefined) {
    stop(walk, troubles.noTable(expr));
    return undefined;
  }
  const direction = directionOf(keys.numbers);
  if (direction === 0) {
    stop(walk, troubles.unordered(expr, keys));
    return undefined;
  }
  const row = rowBelow(keys.numbers, direction, x);
  if (row < 0) {
    stop(walk, troubles.outside(walk.lookup, expr, table, keys, x));
    return undefined;
  }
  const x0 = keys.numbers[row]!;
  if (x === x0) return entryOf(column, row);
  return {
    kind: 'interpolate',
    row,
    x0,
    x1: keys.numbers[row + 1]!,
    y0: column.numbers[row]!,
    y1: column.numbers[row + 1]!,
    ...(keys.unit && { xUnit: keys.unit }),
    ...(column.unit && { yUnit: column.unit }),
  };
}

function entryOf(column: TableColumnData, row: number): TakenRow {
  return { kind: 'entry', value: column.numbers?.[row] ?? none, ...(column.unit && { unit: column.unit }), row };
}

function valueOfRow(walk: Walk, expr: Extract<Expr, { kind: 'table' }>, row: TakenRow): number {
  walk.rows.set(expr, row);
  let value: number;
  if (row.kind === 'entry') value = row.value;
  else {
    const x = evaluate(walk, expr.key);
    value = row.y0 + ((x - row.x0) * (row.y1 - row.y0)) / (row.x1 - row.x0);
  }
  return Number.isFinite(value) ? value : stop(walk, troubles.emptyEntry(expr));
}

/** The plain value of the whole tree, both branches of each choice computed: NaN or infinite where something is wrong. */
export function evaluateTree(expr: Expr, lookup: Lookup): number {
  const explained = explain(expr, lookup);
  return explained.ok ? explained.value : none;
}
