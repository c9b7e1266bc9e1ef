// What is wrong with a table as it is typed, with its place in the grid: the sentences that the line will have once it is kept.
//
// Not here: reading (src/sheet), the grid (editor.ts).

import { type Cell, type DecimalSign, readTable, type Sheet, type TableCell, unsortedAxis } from '../../sheet/index.ts';

export interface TableFault {
  readonly severity: 'error' | 'warning';
  readonly message: string;
  /** From 0; undefined where the fault is that of all of a column, or a row. */
  readonly row?: number;
  readonly column?: number;
  /** The row has more or fewer entries than the table has columns. */
  readonly ragged: boolean;
}

export function faultsOf(cell: TableCell, sheet: Sheet): readonly TableFault[] {
  const sign: DecimalSign = sheet.settings?.decimalSign ?? '.';
  const read = readTable(cell, sign);
  const axis = isInterpolated(cell.name, sheet.cells) ? unsortedAxis(cell, read.data) : [];
  return [...read.problems, ...axis].map(({ severity, message, field, code }) => {
    const [, kind, first, second] = /^(rows|columns)\.(\d+)(?:\.(\d+))?$/u.exec(field ?? '') ?? [];
    const row = kind === 'rows' ? { row: Number(first) } : {};
    const column = kind === 'columns' ? { column: Number(first) } : second === undefined ? {} : { column: Number(second) };
    return { severity, message, ...row, ...column, ragged: code === 'ragged-table' };
  });
}

/** True where a formula of the sheet interpolates over the table. */
function isInterpolated(name: string, cells: readonly Cell[]): boolean {
  return cells.some((cell) =>
    formulasOf(cell).some((text) => callsOf(text).some(([call, table]) => call === 'interpolate' && table === name)),
  );
}

/** The lines that look something up in this column. */
export function readersOf(table: string, column: string, cells: readonly Cell[]): readonly string[] {
  return cells
    .filter((cell) =>
      cell.kind === 'given'
        ? cell.choices === `${table}.${column}`
        : formulasOf(cell).some((text) => callsOf(text).some(([, where, which]) => where === table && which === column)),
    )
    .map(({ id }) => id);
}

function formulasOf(cell: Cell): readonly string[] {
  if (cell.kind === 'derived') return [cell.formula];
  if (cell.kind === 'criterion') return [cell.left, cell.right];
  return cell.kind === 'sought' ? [cell.where] : [];
}

const callsOf = (text: string): readonly (readonly [string, string, string])[] =>
  [...text.matchAll(/\b(interpolate|entry)\s*\(\s*([\p{L}\p{N}_]+)\s*,\s*([\p{L}\p{N}_]+)/gu)].map(
    ([, call = '', table = '', column = '']) => [call, table, column] as const,
  );
