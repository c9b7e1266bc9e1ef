// What a text that was read as a table would make of the table at hand, and what that changes, in words, before anything is taken.
//
// 1. Columns are matched by name where the text has heads, by place where it has none: then those of the table keep their names.
// 2. Where the text names no unit and the table has one for the column, the unit of the table holds, and the words say so.
// Not here: reading the text (src/sheet), the preview on the page (import.ts).

import type { Sheet, TableCell, TableColumn, TablePreview } from '../../sheet/index.ts';
import { readersOf } from './faults.ts';

export type Taking = 'in place' | 'behind';

export interface Change {
  readonly cell: TableCell;
  readonly words: readonly string[];
}

/** `numberOf`: the number of a line, for the lines that read a column that goes. */
export function changeOf(
  cell: TableCell,
  preview: TablePreview,
  how: Taking,
  sheet: Sheet,
  numberOf: (cell: string) => string,
): Change {
  const columns = preview.columns.map((column, at) => columnLike(column, partner(cell, preview, column, at), preview.heads));
  const words: string[] = [];
  const count = (n: number) => (n === 1 ? '1 row' : `${n} rows`);
  if (how === 'behind') {
    const to = preview.columns.map((column, at) => indexOf(cell, preview, column, at));
    const rows = preview.rows.map((row) =>
      cell.columns.map((_, at) => {
        const from = to.indexOf(at);
        return from < 0 ? '' : (row[from] ?? '');
      }),
    );
    words.push(`${count(rows.length)} behind the ${cell.rows.length} that are there`);
    const lost = preview.columns.filter((_, at) => (to[at] ?? -1) < 0).map(({ name }) => name);
    if (lost.length > 0) words.push(`left out, as the table has no such column: ${lost.join(', ')}`);
    const blank = cell.columns.filter((_, at) => !to.includes(at)).map(({ name }) => name);
    if (blank.length > 0) words.push(`left empty: ${blank.join(', ')}`);
    return { cell: { ...cell, rows: [...cell.rows, ...rows] }, words };
  }
  words.push(
    cell.rows.length === 0 ? count(preview.rows.length) : `${count(preview.rows.length)} in place of ${cell.rows.length}`,
  );
  const now = new Set(columns.map(({ name }) => name));
  const before = new Map(cell.columns.map((column) => [column.name, column]));
  const fresh = columns.filter(({ name }) => !before.has(name)).map(({ name }) => name);
  if (fresh.length > 0) words.push(`new ${fresh.length === 1 ? 'column' : 'columns'}: ${fresh.join(', ')}`);
  for (const { name } of cell.columns) {
    if (now.has(name)) continue;
    const readers = readersOf(cell.name, name, sheet.cells).map(numberOf);
    words.push(
      `column ${name} goes${readers.length === 0 ? '' : `, though ${readers.join(', ')} ${readers.length === 1 ? 'reads' : 'read'} it`}`,
    );
  }
  for (const [at, { name, unit }] of columns.entries()) {
    const old = before.get(name);
    if (old !== undefined && (old.unit ?? '') !== (unit ?? ''))
      words.push(`unit of ${name}: ${unit ?? 'text'}, was ${old.unit ?? 'text'}`);
    else if (old?.unit !== undefined && unit !== preview.columns[at]?.unit)
      words.push(`unit of ${name}: ${unit} as before, the text names none`);
  }
  return { cell: { ...cell, columns, rows: preview.rows }, words };
}

function indexOf(cell: TableCell, preview: TablePreview, { name }: TableColumn, at: number): number {
  return preview.heads ? cell.columns.findIndex((column) => column.name === name) : at < cell.columns.length ? at : -1;
}

const partner = (cell: TableCell, preview: TablePreview, column: TableColumn, at: number) =>
  cell.columns[indexOf(cell, preview, column, at)];

function columnLike(column: TableColumn, old: TableColumn | undefined, heads: boolean): TableColumn {
  if (old === undefined) return column;
  const { unit: _, title: _1, ...rest } = column;
  const title = column.title ?? old.title;
  const unit = column.unit === '1' && old.unit !== undefined ? old.unit : column.unit;
  return {
    ...rest,
    ...(heads ? {} : { name: old.name }),
    ...(title === undefined ? {} : { title }),
    ...(unit === undefined ? {} : { unit }),
  };
}
