// A table of the sheet as it stands on the paper: heads with units, entries as they print, which rows are used where, which entries are wrong.
//
// 1. A used row has a bracket at its edge and, in a column of its own, the words: chosen, read or between, in which steps and cases.
// 2. A wrong entry is struck with a wave, has the word in its cell, and its sentence stands under the table.
// Not here: editing (editor.ts), the marks themselves (src/record).

import { html, nothing } from 'lit';
import { type Line, marksByRow, markWords, type RecordCase } from '../../record/index.ts';
import type { CellProblem } from '../../sheet/index.ts';

/** Rows of a table that stand open on the screen; a taller one scrolls in its place. */
const tallest = 14;

export function tableOf(line: Extract<Line, { kind: 'table' }>, problems: readonly CellProblem[], cases: readonly RecordCase[]) {
  const kind = (index: number) => (line.heads[index]?.numeric ? 'number' : '');
  const marks = marksByRow(line.marks);
  const wrong = new Set(problems.map(({ field }) => field ?? ''));
  const tall = line.rows.length > tallest;
  const entry = (row: number, column: number, text: string) => {
    const bad = wrong.has(`rows.${row}.${column}`);
    const shown = bad
      ? html`<span class="bad-entry">${text === '' ? 'empty' : text}</span><span class="unseen"> (wrong)</span>`
      : text;
    if (column === 0) return html`<th scope="row">${shown}</th>`;
    return html`<td class=${kind(column)}>${shown}</td>`;
  };
  const row = (cells: readonly string[], index: number) => {
    const own = marks.get(index);
    const words = own?.map((mark) => markWords(mark, cases)).join('; ');
    return html`<tr class=${own === undefined ? nothing : 'used'}>${cells.map((text, column) => entry(index, column, text))}${
      marks.size === 0
        ? nothing
        : html`<td class="use">${words === undefined ? nothing : html`<span aria-hidden="true">◂ </span>${words}`}</td>`
    }</tr>`;
  };
  return html`<div class="scroll ${tall ? 'tall' : ''}" tabindex=${tall ? '0' : nothing} role=${tall ? 'region' : nothing} aria-label=${tall ? line.title : nothing}><table class="data">
    <caption>${line.title} <code>${line.name}</code></caption>
    <thead><tr>${line.heads.map((head, index) => html`<th scope="col" class=${kind(index)}>${head.title}${head.unit === '' ? nothing : html` / ${head.unit}`}</th>`)}${
      marks.size === 0 ? nothing : html`<th scope="col" class="use">Used</th>`
    }</tr></thead>
    <tbody>${line.rows.map(row)}</tbody>
  </table></div>`;
}
