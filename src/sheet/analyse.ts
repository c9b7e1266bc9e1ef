// What can be said of a cell before any number is computed: its type, its unit, and every problem of fitting in.
//
// 1. Nodes are analysed in the order of the graph: whatever a cell uses has its type already, or is broken.
// 2. A cell that uses a broken one is broken itself and says which it waits for; the cause is told once, where it lies.
// Not here: numbers (calculation.ts), the rules of dimensions and counts (src/formula).

import {
  type Formula,
  inferComparison,
  inferFormula,
  nearestNames,
  type Scope,
  type TableType,
  type Type,
  typeOfResult,
  typeOfUnit,
} from '../formula/index.ts';
import {
  coherentUnit,
  equalD,
  isDimensionless,
  one,
  type Problem,
  type Unit,
  unitOf,
  type Value,
  withArticle,
} from '../quantity/index.ts';
import type { GivenCell, LoadCase, SoughtCell } from './document.ts';
import type { Names } from './names.ts';
import type { Node } from './node.ts';
import { shifted } from './reading.ts';
import type { CellProblem } from './state.ts';

export interface Surroundings {
  readonly names: Names;
  readonly cases: readonly LoadCase[];
  /** Number of a line for messages: '3.2', or '' where it has none. */
  numberOf(cell: string): string;
  /** The problem of a second definition, by cell id. */
  readonly twice: ReadonlyMap<string, CellProblem>;
  /** The problem of a loop, by cell id. */
  readonly looped: ReadonlyMap<string, CellProblem>;
  readonly decimalSign: '.' | ',';
}

/** Sets type, unit, words, values, texts, table, broken and placed of the node. */
export function analyse(node: Node, around: Surroundings): void {
  node.type = undefined;
  node.unit = undefined;
  node.words = undefined;
  node.inferred = undefined;
  node.values = [];
  node.texts = undefined;
  node.placed = [];
  node.broken = true;
  node.jumps = false;
  node.usesTexts = node.uses.some((used) => used.texts !== undefined);
  const report = (problem: Problem, field?: string, onlyCase?: string) => {
    node.placed.push({
      ...problem,
      cell: node.cell.id,
      ...(field === undefined ? {} : { field }),
      ...(onlyCase === undefined ? {} : { case: onlyCase }),
    });
  };
  const twice = around.twice.get(node.cell.id);
  if (twice) node.placed.push(twice);
  const looped = around.looped.get(node.cell.id);
  if (looped) {
    node.placed.push(looped);
    node.unit = node.reading.unit;
    return;
  }
  switch (node.cell.kind) {
    case 'given':
      analyseGiven(node, node.cell, around, report);
      break;
    case 'derived':
      analyseDerived(node, around, report);
      break;
    case 'criterion':
      analyseCriterion(node, around, report);
      break;
    case 'sought':
      analyseSought(node, node.cell, around, report);
      break;
    case 'note':
    case 'drawing':
    case 'chart':
      for (const live of node.reading.mentions) {
        if (!around.names.quantities.has(live.name)) report(unknownMention(live.text, live.name, around), 'text');
      }
      break;
    default:
      break;
  }
}

/** Warnings of a cell that uses quantities above the lines that define them; asked for when somebody looks. */
export function usedAbove(node: Node, numberOf: (cell: string) => string): CellProblem[] {
  if (node.reading.formulas.length === 0) return [];
  return node.uses
    .filter((used) => used.index > node.index && used.cell.kind !== 'table')
    .map((used) => {
      const number = numberOf(used.cell.id);
      const where = number === '' ? '' : ` (see ${number} below)`;
      return {
        code: 'used-above',
        severity: 'warning',
        message: `${used.name ?? ''} is used here above the line that defines it${where}; move one of the two if the sheet should read downwards`,
        cell: node.cell.id,
      };
    });
}

type Report = (problem: Problem, field?: string, onlyCase?: string) => void;

function unknownMention(text: string, name: string, around: Surroundings): Problem {
  const near = nearestNames(name, around.names.quantities.keys());
  const offer = near.length > 0 ? `; the nearest is ${near[0]}` : '';
  return { code: 'unknown-name', severity: 'warning', message: `no quantity of this sheet is called ${text}${offer}` };
}

function analyseGiven(node: Node, cell: GivenCell, around: Surroundings, report: Report): void {
  for (const id of Object.keys(cell.byCase ?? {})) {
    if (!around.cases.some((known) => known.id === id)) {
      report(
        {
          code: 'unknown-case',
          severity: 'warning',
          message: `the value for case “${id}” is kept but not used: the sheet has no such case (it has ${around.cases.map((known) => known.id).join(', ')})`,
        },
        `byCase.${id}`,
      );
    }
  }
  if (node.reading.choices) {
    analyseChoice(node, cell, node.reading.choices, around, report);
    return;
  }
  const base = node.reading.value;
  const values = around.cases.map((known) =>
    cell.byCase && Object.hasOwn(cell.byCase, known.id) ? node.reading.byCase?.get(known.id) : base,
  );
  const first = base ?? values.find((value) => value !== undefined);
  const unit = node.reading.unit ?? first?.unit;
  if (unit === undefined || (cell.unit !== undefined && node.reading.unit === undefined)) return;
  node.unit = unit;
  node.values = values.map((value, index) => {
    if (value === undefined) return undefined;
    const problem = unlikeValue(value, unit);
    if (problem === undefined) return value;
    const id = around.cases[index]!.id;
    const own = cell.byCase !== undefined && Object.hasOwn(cell.byCase, id);
    if (own) report(problem, `byCase.${id}`, id);
    else if (!node.placed.some((known) => known.code === problem.code && known.case === undefined)) report(problem, 'value');
    return undefined;
  });
  if (node.values.every((value) => value === undefined)) return;
  node.type = typeOfUnit(unit);
  node.broken = node.name === undefined && around.twice.has(cell.id);
  if (isPlainRate(unit)) {
    report(
      {
        code: 'plain-rate',
        severity: 'warning',
        message: `${unit.text} does not say what is counted; write ${unit.text === '1/s' ? 'r/s or Hz' : 'r/min'} if these are revolutions`,
      },
      cell.unit === undefined ? 'value' : 'unit',
    );
  }
  checkRange(node, cell, around, report);
}

/** 1/s, 1/min and the like, without r, rad or Hz. */
function isPlainRate(unit: Unit): boolean {
  return (
    unit.parts.length === 1 &&
    (unit.parts[0]!.symbol === 's' || unit.parts[0]!.symbol === 'min') &&
    unit.parts[0]!.exponent.n === -1
  );
}

function unlikeValue(value: Value, unit: Unit): Problem | undefined {
  if (!equalD(value.unit.dimension, unit.dimension)) {
    return {
      code: 'unlike-value',
      severity: 'error',
      message: `${value.text} is ${withArticle(value.unit)}, this quantity is ${withArticle(unit)}; change one of the two`,
    };
  }
  if ((value.unit.reading === undefined) !== (unit.reading === undefined)) {
    return {
      code: 'unlike-value',
      severity: 'error',
      message: `${value.text} and the unit ${unit.text} mix a temperature reading with a difference; use one of the two throughout`,
    };
  }
  return undefined;
}

function checkRange(node: Node, cell: GivenCell, around: Surroundings, report: Report): void {
  const range = node.reading.range;
  if (range === undefined || node.unit === undefined) return;
  if (!equalD(range.from.unit.dimension, node.unit.dimension) || !equalD(range.to.unit.dimension, node.unit.dimension)) {
    report(
      {
        code: 'bad-range',
        severity: 'warning',
        message: `the range “${cell.range}” is not one of ${withArticle(node.unit)} and is not checked`,
      },
      'range',
    );
    return;
  }
  const told = new Set<string>();
  for (const [index, value] of node.values.entries()) {
    if (value === undefined || told.has(value.text)) continue;
    if (value.si >= range.from.si && value.si <= range.to.si) continue;
    told.add(value.text);
    const id = around.cases[index]!.id;
    const own = cell.byCase !== undefined && Object.hasOwn(cell.byCase, id);
    report(
      {
        code: 'outside-range',
        severity: 'warning',
        message: `${value.text} lies outside the range ${cell.range} that this sheet is made for`,
      },
      own ? `byCase.${id}` : 'value',
      own ? id : undefined,
    );
  }
}

function analyseChoice(
  node: Node,
  cell: GivenCell,
  choices: { readonly table: string; readonly column: string },
  around: Surroundings,
  report: Report,
): void {
  const table = around.names.tables.get(choices.table);
  if (table === undefined) {
    report(
      {
        code: 'unknown-table',
        severity: 'error',
        message: `no table of this sheet is called ${choices.table}; the choices of ${cell.name} come from it`,
      },
      'choices',
    );
    return;
  }
  const column = table.table?.columns.find((known) => known.name === choices.column);
  if (column === undefined) {
    report(
      table.table
        ? {
            code: 'unknown-column',
            severity: 'error',
            message: `table ${choices.table} has no column ${choices.column}; it has ${table.table.columns.map((known) => known.name).join(', ')}`,
          }
        : waitsFor(table, around),
      'choices',
    );
    return;
  }
  node.texts = around.cases.map((known) => {
    const own = cell.byCase && Object.hasOwn(cell.byCase, known.id);
    const text = own ? cell.byCase![known.id]! : cell.value;
    if (column.texts.includes(text)) return text;
    const near = nearestNames(text, column.texts);
    report(
      {
        code: 'unknown-choice',
        severity: 'error',
        message: `“${text}” is not in column ${choices.column} of table ${choices.table}${near.length > 0 ? `; the nearest is “${near[0]}”` : ''}`,
      },
      own ? `byCase.${known.id}` : 'value',
      own ? known.id : undefined,
    );
    return undefined;
  });
  if (node.texts.every((text) => text === undefined)) return;
  node.type = { kind: 'text', table: choices.table, column: choices.column };
  node.broken = false;
}

/** Types of the cells around, as src/formula asks for them. */
function scopeOf(around: Surroundings): Scope {
  return {
    typeOf(name: string): Type | 'unknown-name' | 'failed' {
      const node = around.names.quantities.get(name);
      if (node === undefined) return 'unknown-name';
      return node.broken || node.type === undefined ? 'failed' : node.type;
    },
    table(name: string): TableType | undefined {
      return around.names.tables.get(name)?.table;
    },
    names: () => around.names.quantities.keys(),
    tableNames: () => around.names.tables.keys(),
    decimalSign: around.decimalSign,
  };
}

export function waitsFor(used: Node, around: Pick<Surroundings, 'numberOf'>): Problem {
  const number = around.numberOf(used.cell.id);
  const name = used.name ?? used.reading.name ?? '';
  const where = number === '' ? '' : `, step ${number}`;
  return {
    code: 'waits-for',
    severity: 'error',
    message: `waits for ${used.cell.kind === 'table' ? 'table ' : ''}${used.cell.kind === 'table' ? used.cell.name : name}${where}, which has no value yet`,
  };
}

function analyseDerived(node: Node, around: Surroundings, report: Report): void {
  const formula = node.reading.formulas[0];
  node.unit = node.reading.unit;
  if (formula === undefined || node.cell.kind !== 'derived') return;
  if (node.cell.unit !== undefined && node.reading.unit === undefined) return;
  const inferred = inferFormula(formula, scopeOf(around), node.reading.unit);
  node.inferred = inferred;
  node.words = inferred.words;
  for (const problem of inferred.problems) report(problem, 'formula');
  const waiting = firstBroken(node, [formula], around);
  if (waiting) report(waitsFor(waiting, around), 'formula');
  if (waiting || inferred.type === undefined || inferred.problems.some((problem) => problem.severity === 'error')) return;
  node.type = typeOfResult(inferred, node.reading.unit);
  if (node.type.kind !== 'quantity') return;
  node.unit = node.reading.unit ?? printUnitOf(node.type);
  node.jumps = hasJump(formula);
  node.broken = around.twice.has(node.cell.id);
}

/** What a quantity without a declared unit is printed in; a temperature reading stays a reading. */
function printUnitOf(type: Type): Unit {
  if (type.kind !== 'quantity') return one;
  return type.temperature === 'reading' ? celsius : coherentUnit(type.dimension, type.counts.r);
}

const celsius = unitOf('degC');

/**
 * The type of the unknown alone, so that the cells of its own loop can be analysed after it; its equation follows when they
 * are (analyseEquation).
 */
function analyseSought(node: Node, cell: SoughtCell, around: Surroundings, report: Report): void {
  const { between, instead, unit: declared } = node.reading;
  if (between === undefined || (cell.unit !== undefined && declared === undefined)) return;
  const varied = instead === undefined ? undefined : around.names.quantities.get(instead);
  if (instead !== undefined && varied?.cell.kind !== 'given') {
    const near = nearestNames(instead, givenNames(around));
    const what = varied === undefined ? `no quantity of this sheet is called ${cell.instead}` : `${cell.instead} is not a given`;
    report(
      {
        code: 'bad-instead',
        severity: 'error',
        message: `${what}, and only a given can be varied${near.length > 0 ? `; the nearest is ${near[0]}` : ''}`,
      },
      'instead',
    );
    return;
  }
  if (varied?.broken) {
    report(waitsFor(varied, around), 'instead');
    return;
  }
  const unit = declared ?? varied?.unit ?? between.to.unit;
  for (const [other, whose, field] of [
    [between.to.unit, 'the range to look in', 'between'],
    [varied?.unit, `the given ${cell.instead} varied for it`, 'instead'],
  ] as const) {
    if (other === undefined || equalD(other.dimension, unit.dimension)) continue;
    report(
      {
        code: 'unlike-unit',
        severity: 'error',
        message: `${cell.name} is ${withArticle(unit)}, ${whose} is ${withArticle(other)}; give both one kind`,
      },
      field,
    );
    return;
  }
  node.unit = unit;
  node.type = typeOfUnit(unit);
  node.broken = around.twice.has(cell.id) || node.reading.formulas.length !== 2 || node.reading.formulas.includes(undefined);
}

function* givenNames(around: Surroundings): Iterable<string> {
  for (const [name, node] of around.names.quantities) if (node.cell.kind === 'given') yield name;
}

/** The equation of a sought cell, once all that it reaches for has its type; what is wrong leaves the cell without a value. */
export function analyseEquation(node: Node, around: Surroundings): void {
  const [left, right] = node.reading.formulas;
  node.equation = [];
  node.equationType = undefined;
  if (node.broken || left === undefined || right === undefined || node.cell.kind !== 'sought') return;
  const report = (problem: Problem, offset?: number) =>
    node.equation.push({ ...(offset === undefined ? problem : shifted(problem, offset)), cell: node.cell.id, field: 'where' });
  const compared = inferComparison(left, right, scopeOf(around));
  node.equationType = compared.type;
  for (const problem of compared.leftProblems) report(problem, 0);
  for (const problem of compared.rightProblems) report(problem, node.cell.where.length - right.text.length);
  const waiting = firstBroken(node, [left, right], around);
  if (waiting) report(waitsFor(waiting, around));
  const other = node.between.find((between) => between.cell.kind === 'sought');
  if (other) {
    const number = around.numberOf(other.cell.id);
    report({
      code: 'sought-twice',
      severity: 'error',
      message: `${other.name ?? 'another sought cell'}${number === '' ? '' : ` (${number})`} is itself sought on the way from ${node.cell.instead ?? node.cell.name} to this equation; solve one of the two, or state one as a given`,
    });
  }
  const unknown = node.reading.instead === undefined ? node : around.names.quantities.get(node.reading.instead);
  if (
    unknown !== undefined &&
    node.between.length === 0 &&
    !left.names.includes(unknown.name ?? '') &&
    !right.names.includes(unknown.name ?? '')
  ) {
    report({
      code: 'not-in-equation',
      severity: 'error',
      message: `${node.cell.where.trim()} does not depend on ${node.cell.instead ?? node.cell.name}, so no value of it can make the two sides equal`,
    });
  }
}

function firstBroken(node: Node, formulas: readonly (Formula | undefined)[], around: Surroundings): Node | undefined {
  for (const formula of formulas) {
    for (const name of formula?.names ?? []) {
      const used = around.names.quantities.get(name);
      if (used !== undefined && used !== node && used.broken) return used;
    }
    for (const name of formula?.tables ?? []) {
      const used = around.names.tables.get(name);
      if (used !== undefined && used.table === undefined) return used;
    }
  }
  return undefined;
}

function analyseCriterion(node: Node, around: Surroundings, report: Report): void {
  const [left, right] = node.reading.formulas;
  node.unit = node.reading.unit;
  if (left === undefined || right === undefined || node.cell.kind !== 'criterion') return;
  if (node.cell.unit !== undefined && node.reading.unit === undefined) return;
  const inferred = inferComparison(left, right, scopeOf(around), node.reading.unit);
  node.inferred = inferred;
  node.words = inferred.words;
  for (const problem of inferred.leftProblems) report(problem, 'left');
  for (const problem of inferred.rightProblems) report(problem, 'right');
  const waiting = firstBroken(node, [left, right], around);
  if (waiting) report(waitsFor(waiting, around));
  if (waiting || inferred.type === undefined || inferred.type.kind !== 'quantity') return;
  if (inferred.problems.some((problem) => problem.severity === 'error')) return;
  node.type = inferred.type;
  node.unit = node.reading.unit ?? sideUnit([left, right], around) ?? printUnitOf(inferred.type);
  node.jumps = hasJump(left) || hasJump(right);
  node.broken = false;
}

/** The unit of the first side that is a quantity by itself. */
function sideUnit(sides: readonly Formula[], around: Surroundings): Unit | undefined {
  for (const side of sides) {
    if (side.expr.kind !== 'name') continue;
    const unit = around.names.quantities.get(side.expr.name)?.unit;
    if (unit !== undefined && !(isDimensionless(unit.dimension) && unit.text === '')) return unit;
  }
  return undefined;
}

const jumping = /\b(?:floor|ceil|round)\b/u;

function hasJump(formula: Formula): boolean {
  return jumping.test(formula.text);
}
