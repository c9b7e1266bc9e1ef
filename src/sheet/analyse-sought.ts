// A sought cell among the others: the type of its unknown first, its equation when everything that it reaches for has a type.
//
// Not here: the way between unknown and equation, solving (sought.ts).

import { inferComparison, nearestNames, typeOfUnit } from '../formula/index.ts';
import { equalD, type Problem, turnsAgainstAngle, withArticle } from '../quantity/index.ts';
import type { SoughtCell } from './document.ts';
import type { Node } from './node.ts';
import { shifted } from './reading.ts';
import { firstBroken, type Report, type Surroundings, scopeOf, waitsFor } from './surroundings.ts';

/**
 * The type of the unknown alone, so that the cells of its own loop can be analysed after it; its equation follows when they
 * are (analyseEquation).
 */
export function analyseSought(node: Node, cell: SoughtCell, around: Surroundings, report: Report): void {
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
    if (other === undefined || (equalD(other.dimension, unit.dimension) && !turnsAgainstAngle(other, unit))) continue;
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
