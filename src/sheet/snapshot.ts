// The public state of a node, made when somebody looks.
//
// Problems stand in the order: of the cell by itself, of its place among others, of calculation, warnings of calculation.
// Not here: how they came about (reading.ts, analyse.ts, calculation.ts).

import { usedAbove } from './analyse.ts';
import type { Columns } from './columns.ts';
import { judge } from './criterion.ts';
import type { CriterionCell } from './document.ts';
import type { Node } from './node.ts';
import type { CellProblem, CellState } from './state.ts';
import { readTable, unsortedAxis } from './table.ts';

export function snapshotOf(
  node: Node,
  columns: Columns,
  numberOf: (cell: string) => string,
  caseId: (index: number) => string,
): CellState {
  const { cell, index, reading } = node;
  const own = cell.kind === 'table' ? readTable(cell, reading.decimalSign).problems : reading.problems;
  const problems: CellProblem[] = [
    ...own.map((problem) => ({ ...problem, cell: cell.id })),
    ...node.placed,
    ...node.equation,
    ...usedAbove(node, numberOf),
    ...node.failed.filter((problem) => problem !== undefined),
    ...node.warned,
    ...(cell.kind === 'table' && node.interpolated ? unsortedAxis(cell, node.table) : []),
  ];
  const type = node.type === undefined ? {} : { type: node.type };
  const unit = node.unit === undefined ? {} : { unit: node.unit };
  switch (cell.kind) {
    case 'given':
      return {
        kind: 'given',
        cell,
        index,
        problems,
        ...type,
        ...unit,
        values: node.values,
        ...(node.texts === undefined ? {} : { texts: node.texts }),
        si: node.texts === undefined ? columns.copy(node, 0) : columns.empty(),
      };
    case 'derived': {
      const formula = reading.formulas[0];
      return {
        kind: 'derived',
        cell,
        index,
        problems,
        ...type,
        ...unit,
        ...(formula === undefined ? {} : { formula }),
        si: columns.copy(node, 0),
        ...(node.words === undefined ? {} : { words: node.words }),
      };
    }
    case 'sought': {
      const [left, right] = reading.formulas;
      return {
        kind: 'sought',
        cell,
        index,
        problems,
        ...type,
        ...unit,
        ...(left === undefined ? {} : { left }),
        ...(right === undefined ? {} : { right }),
        si: columns.copy(node, 0),
        ...(node.equationType === undefined ? {} : { equationType: node.equationType }),
        solutions: node.solutions,
      };
    }
    case 'criterion': {
      const [left, right] = reading.formulas;
      const leftSi = columns.copy(node, 0);
      const rightSi = columns.copy(node, 1);
      const isReading = node.type?.kind === 'quantity' && node.type.temperature === 'reading';
      const verdicts = Array.from(leftSi, (value, at) => judge(value, cell.relation, rightSi[at]!));
      return {
        kind: 'criterion',
        cell,
        index,
        problems: [
          ...problems,
          ...consequences(
            cell,
            verdicts.map((verdict) => verdict.met),
            caseId,
          ),
        ],
        ...type,
        ...unit,
        ...(left === undefined ? {} : { left }),
        ...(right === undefined ? {} : { right }),
        leftSi,
        rightSi,
        met: verdicts.map((verdict) => verdict.met),
        // The zero of a temperature scale is no zero of demand or capacity: readings have no utilisation.
        utilisation: verdicts.map((verdict) => (isReading ? null : verdict.utilisation)),
      };
    }
    case 'table':
      return { kind: 'table', cell, index, problems, ...(node.table === undefined ? {} : { data: node.table }) };
    case 'note':
      return { kind: 'note', cell, index, problems, live: reading.mentions };
    default:
      return { kind: 'plain', cell, index, problems };
  }
}

/** What follows for the sheet where the criterion is not met, as its author wrote it: a warning in each case concerned. */
function consequences(
  cell: CriterionCell,
  met: readonly (boolean | null)[],
  caseId: (index: number) => string,
): readonly CellProblem[] {
  const text = cell.ifNotMet?.trim() ?? '';
  if (text === '') return [];
  return met.flatMap((each, index) =>
    each === false ? [{ code: 'not-met', severity: 'warning', message: text, cell: cell.id, case: caseId(index) }] : [],
  );
}
