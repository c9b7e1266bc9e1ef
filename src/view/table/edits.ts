// What is done to a table while it is typed: entries, rows and columns set, added, moved, removed; a block of text laid over the rows.
//
// 1. Plain functions from a table to a table; whatever is touched has one entry a column afterwards.
// Not here: the grid (editor.ts), reading of a text with heads (import.ts).

import type { TableCell, TableColumn } from '../../sheet/index.ts';

export const mostRows = 20_000;

const even = (cell: TableCell, row: readonly string[]): readonly string[] => cell.columns.map((_, at) => row[at] ?? '');

/** A key of a column; an empty one is taken out, but for the name. */
export function withColumnKey(cell: TableCell, at: number, key: keyof TableColumn, typed: string): TableCell {
  const columns = cell.columns.map((column, index) => {
    if (index !== at) return column;
    const { [key]: _, ...rest } = column;
    return (key === 'name' || typed.trim() !== '' ? { ...rest, [key]: typed } : rest) as TableColumn;
  });
  return { ...cell, columns };
}

export function withEntry(cell: TableCell, row: number, column: number, typed: string): TableCell {
  return {
    ...cell,
    rows: cell.rows.map((one, index) =>
      index === row ? even(cell, one).map((entry, at) => (at === column ? typed : entry)) : one,
    ),
  };
}

export const evenRow = (cell: TableCell, row: number): TableCell => ({
  ...cell,
  rows: cell.rows.map((one, index) => (index === row ? even(cell, one) : one)),
});

export const withRow = (cell: TableCell, at: number): TableCell => ({
  ...cell,
  rows: cell.rows.toSpliced(at, 0, even(cell, [])),
});

export const withoutRow = (cell: TableCell, at: number): TableCell => ({ ...cell, rows: cell.rows.toSpliced(at, 1) });

/** The same table where the row would leave it. */
export function withRowMoved(cell: TableCell, at: number, step: -1 | 1): TableCell {
  const row = cell.rows[at];
  if (row === undefined || cell.rows[at + step] === undefined) return cell;
  return { ...cell, rows: cell.rows.toSpliced(at, 1).toSpliced(at + step, 0, row) };
}

export function withColumn(cell: TableCell, at: number): TableCell {
  const taken = new Set(cell.columns.map(({ name }) => name));
  let next = cell.columns.length + 1;
  while (taken.has(`column_${next}`)) next += 1;
  return {
    ...cell,
    columns: cell.columns.toSpliced(at, 0, { name: `column_${next}` }),
    rows: cell.rows.map((row) => [...even(cell, row)].toSpliced(at, 0, '')),
  };
}

export const withoutColumn = (cell: TableCell, at: number): TableCell => ({
  ...cell,
  columns: cell.columns.toSpliced(at, 1),
  rows: cell.rows.map((row) => row.toSpliced(at, 1)),
});

export function withColumnMoved(cell: TableCell, at: number, step: -1 | 1): TableCell {
  const column = cell.columns[at];
  if (column === undefined || cell.columns[at + step] === undefined) return cell;
  const moved = <Item>(list: readonly Item[], item: Item) => list.toSpliced(at, 1).toSpliced(at + step, 0, item);
  return {
    ...cell,
    columns: moved(cell.columns, column),
    rows: cell.rows.map((row) => moved(even(cell, row), row[at] ?? '')),
  };
}

export interface Laid {
  readonly cell: TableCell;
  /** What was left out, in words; '' where nothing was. */
  readonly left: string;
}

/** Rows laid over the table from this entry on; rows are added as needed, what would stand beyond the last column is left out and told. */
export function withBlock(cell: TableCell, row: number, column: number, block: readonly (readonly string[])[]): Laid {
  const rows = cell.rows.map((one) => [...even(cell, one)]);
  const room = mostRows - row;
  let beyond = 0;
  for (const [index, entries] of block.slice(0, room).entries()) {
    const target = rows[row + index] ?? cell.columns.map(() => '');
    rows[row + index] = target;
    for (const [at, entry] of entries.entries()) {
      if (column + at < cell.columns.length) target[column + at] = entry.trim();
      else beyond += 1;
    }
  }
  const left = [
    ...(beyond === 0 ? [] : [`${beyond === 1 ? '1 entry stands' : `${beyond} entries stand`} beyond the last column`]),
    ...(block.length > room ? [`${block.length - room} rows are more than a table should hold`] : []),
  ];
  return { cell: { ...cell, rows }, left: left.length === 0 ? '' : `left out: ${left.join('; ')}` };
}
