// The columns and rows of a table as fields: a name, a unit and a title a column, a text an entry.
//
// 1. Rows always have one entry a column. Adding and removing go by buttons that name what they do.
// 2. A block copied from elsewhere, cells apart by tabs, fills the entries from the one it is pasted into, adding rows as needed.
// Not here: reading of the entries (src/sheet/table.ts).

import { html, type TemplateResult } from 'lit';
import { live } from 'lit/directives/live.js';
import type { TableCell, TableColumn } from '../../sheet/index.ts';

const mostRows = 5000;

export function tableFields(cell: TableCell, change: (cell: TableCell) => void): TemplateResult {
  const set = (at: number, key: keyof TableColumn, typed: string) =>
    change({ ...cell, columns: cell.columns.map((column, index) => (index === at ? withKey(column, key, typed) : column)) });
  const columnName = (at: number) => cell.columns[at]?.name || `column ${at + 1}`;
  return html`<div class="table-fields"><table>
      <caption>Columns and rows</caption>
      <thead>
        ${(['name', 'unit', 'title'] as const).map(
          (key) =>
            html`<tr><th scope="row">${key}</th>${cell.columns.map(
              (
                column,
                at,
              ) => html`<td><input class="field" aria-label="${key} of ${columnName(at)}" .value=${live(column[key] ?? '')}
              @input=${(event: Event) => set(at, key, (event.target as HTMLInputElement).value)} /></td>`,
            )}<td></td></tr>`,
        )}
      </thead>
      <tbody>
        ${cell.rows.map(
          (row, index) =>
            html`<tr><th scope="row">${index + 1}</th>${cell.columns.map(
              (
                _,
                at,
              ) => html`<td><input class="field" aria-label="${columnName(at)}, row ${index + 1}" .value=${live(row[at] ?? '')}
              @input=${(event: Event) => change(withEntry(cell, index, at, (event.target as HTMLInputElement).value))}
              @paste=${(event: ClipboardEvent) => paste(event, cell, index, at, change)} /></td>`,
            )}<td><button type="button" class="word" aria-label="remove row ${index + 1}" @click=${() => change({ ...cell, rows: cell.rows.toSpliced(index, 1) })}>remove</button></td></tr>`,
        )}
      </tbody>
      <tfoot><tr><td></td>${cell.columns.map(
        (_, at) =>
          html`<td><button type="button" class="word" aria-label="remove ${columnName(at)}" @click=${() => change(withoutColumn(cell, at))}>remove</button></td>`,
      )}<td></td></tr></tfoot>
    </table>
    <p><button type="button" class="word" @click=${() => change({ ...cell, rows: [...cell.rows, cell.columns.map(() => '')] })}>add a row</button>
      <button type="button" class="word" @click=${() => change(withColumn(cell))}>add a column</button></p></div>`;
}

function withKey(column: TableColumn, key: keyof TableColumn, typed: string): TableColumn {
  const { [key]: _, ...rest } = column;
  return (key === 'name' || typed.trim() !== '' ? { ...rest, [key]: typed } : rest) as TableColumn;
}

export function withEntry(cell: TableCell, row: number, column: number, typed: string): TableCell {
  return {
    ...cell,
    rows: cell.rows.map((one, index) =>
      index === row ? cell.columns.map((_, at) => (at === column ? typed : (one[at] ?? ''))) : one,
    ),
  };
}

export function withColumn(cell: TableCell): TableCell {
  let next = cell.columns.length + 1;
  while (cell.columns.some((column) => column.name === `column_${next}`)) next += 1;
  return { ...cell, columns: [...cell.columns, { name: `column_${next}` }], rows: cell.rows.map((row) => [...row, '']) };
}

export function withoutColumn(cell: TableCell, at: number): TableCell {
  return { ...cell, columns: cell.columns.toSpliced(at, 1), rows: cell.rows.map((row) => row.toSpliced(at, 1)) };
}

/** The block laid over the rows from this entry on; what would stand beyond the last column is left out. */
export function withBlock(cell: TableCell, row: number, column: number, block: string): TableCell {
  const lines = block
    .replace(/\r\n?/gu, '\n')
    .replace(/\n$/u, '')
    .split('\n')
    .slice(0, mostRows - row);
  const rows = cell.rows.map((one) => [...one]);
  lines.forEach((line, index) => {
    const target = rows[row + index] ?? cell.columns.map(() => '');
    rows[row + index] = target;
    line.split('\t').forEach((entry, at) => {
      if (column + at < cell.columns.length) target[column + at] = entry.trim();
    });
  });
  return { ...cell, rows };
}

function paste(event: ClipboardEvent, cell: TableCell, row: number, column: number, change: (cell: TableCell) => void) {
  const block = event.clipboardData?.getData('text/plain') ?? '';
  if (!/[\t\n]/u.test(block.trim())) return;
  event.preventDefault();
  change(withBlock(cell, row, column, block));
}
