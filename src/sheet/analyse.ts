// What can be said of a cell before any number is computed: its type, its unit, and every problem of fitting in.
//
// 1. Nodes are analysed in the order of the graph: whatever a cell uses has its type already, or is broken.
// 2. A cell that uses a broken one is broken itself and says which it waits for; the cause is told once, where it lies.
// Not here: numbers (calculation.ts), the rules of dimensions and counts (src/formula).

import { type Formula, inferComparison, inferFormula, nearestNames, type Type, typeOfResult } from '../formula/index.ts';
import { coherentUnit, isDimensionless, one, type Problem, type Unit, unitOf } from '../quantity/index.ts';
import { analyseGiven } from './analyse-given.ts';
import { analyseSought } from './analyse-sought.ts';
import type { Node } from './node.ts';
import type { CellProblem } from './state.ts';
import { firstBroken, type Report, type Surroundings, scopeOf, waitsFor } from './surroundings.ts';

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

function unknownMention(text: string, name: string, around: Surroundings): Problem {
  const near = nearestNames(name, around.names.quantities.keys());
  const offer = near.length > 0 ? `; the nearest is ${near[0]}` : '';
  return { code: 'unknown-name', severity: 'warning', message: `no quantity of this sheet is called ${text}${offer}` };
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
