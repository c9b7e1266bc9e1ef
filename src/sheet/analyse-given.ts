// A given among the others: its value in every case against its unit and its range, or its text against the column it is chosen from.
//
// Not here: reading of the values (reading.ts).

import { nearestNames, typeOfUnit } from '../formula/index.ts';
import { equalD, isAngleUnit, type Problem, turnsAgainstAngle, type Unit, type Value, withArticle } from '../quantity/index.ts';
import type { GivenCell } from './document.ts';
import type { Node } from './node.ts';
import { type Report, type Surroundings, waitsFor } from './surroundings.ts';

export function analyseGiven(node: Node, cell: GivenCell, around: Surroundings, report: Report): void {
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
  checkBareAngle(node, cell, around, report);
  checkRange(node, cell, around, report);
}

/** A bare number is an angle in radians: right as it stands, and seldom meant where the unit or the range speaks of degrees. */
function checkBareAngle(node: Node, cell: GivenCell, around: Surroundings, report: Report): void {
  const unit = [node.reading.unit, node.reading.range?.from.unit, node.reading.range?.to.unit].find(
    (one) => one !== undefined && one.parts.length > 0 && isAngleUnit(one),
  );
  if (unit === undefined || unit.text === 'rad') return;
  const told = new Set<string>();
  for (const [index, value] of node.values.entries()) {
    if (value === undefined || value.unit.parts.length > 0 || value.si === 0 || told.has(value.text)) continue;
    told.add(value.text);
    const id = around.cases[index]!.id;
    const own = cell.byCase !== undefined && Object.hasOwn(cell.byCase, id);
    const written = /^[°′″]$/u.test(unit.text) ? `${value.text}${unit.text}` : `${value.text} ${unit.text}`;
    report(
      {
        code: 'bare-angle',
        severity: 'warning',
        message: `${value.text} without a unit is an angle in rad; write ${written} or ${value.text} rad`,
        fixes: [
          { from: 0, to: value.text.length, text: written, label: `write ${written}` },
          { from: 0, to: value.text.length, text: `${value.text} rad`, label: `write ${value.text} rad` },
        ],
      },
      own ? `byCase.${id}` : 'value',
      own ? id : undefined,
    );
  }
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
  if (turnsAgainstAngle(value.unit, unit)) {
    return {
      code: 'unlike-value',
      severity: 'error',
      message: `${value.text} is ${withArticle(value.unit)}, this quantity is ${withArticle(unit)}, and one revolution is 2π rad; give the value in ${unit.text}`,
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
  const { unit } = node;
  if ([range.from.unit, range.to.unit].some((end) => !equalD(end.dimension, unit.dimension) || turnsAgainstAngle(end, unit))) {
    report(
      {
        code: 'bad-range',
        severity: 'warning',
        message: `the range “${cell.range}” is not one of ${withArticle(unit)} and is not checked`,
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
