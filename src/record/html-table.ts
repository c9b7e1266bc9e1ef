// A table of the sheet in the record: heads with units, the entries as they print, and which row the calculation uses where.
//
// 1. A used row has a bracket at its edge and, in a column of its own, the words: how it is used, in which step, in which cases.
// Not here: which rows are used (table-marks.ts).

import { escapeHtml } from './escape.ts';
import { caseMark, inlineText, noteLines, type Symbols } from './html-text.ts';
import type { Line, RecordModel, TableMark } from './model.ts';
import { marksByRow } from './table-marks.ts';

type TableLine = Extract<Line, { kind: 'table' }>;

export function dataTable(line: TableLine, model: RecordModel, symbols: Symbols): string {
  const numeric = (k: number) => (line.heads[k]?.numeric ? ' class="num"' : '');
  const heads = line.heads.map((head, k) => {
    const unit = head.unit === '' ? '' : ` / ${escapeHtml(head.unit)}`;
    return `<th scope="col"${numeric(k)}>${inlineText(head.title, symbols)}${unit}</th>`;
  });
  const marks = marksByRow(line.marks);
  if (marks.size > 0) heads.push('<th scope="col">Used</th>');
  const rows = line.rows.map((cells, index) => {
    const entries = cells.map((cell, k) => `<td${numeric(k)}>${escapeHtml(cell)}</td>`).join('');
    const own = marks.get(index);
    if (own === undefined) return `<tr>${entries}${marks.size > 0 ? '<td></td>' : ''}</tr>`;
    return `<tr class="used">${entries}<td class="use">${own.map((mark) => useOf(mark, model)).join('; ')}</td></tr>`;
  });
  const title = `<p class="t">${line.title === '' ? 'Table' : inlineText(line.title, symbols)} <code>${escapeHtml(line.name)}</code></p>`;
  return `${title}<div class="scroll" tabindex="0"><table class="data"><thead><tr>${heads.join('')}</tr></thead><tbody>${rows.join('')}</tbody></table></div>${noteLines(line.notes, symbols)}`;
}

function useOf({ how, by, cases }: TableMark, model: RecordModel): string {
  const steps = by.map(({ number }) => `<a href="#step-${escapeHtml(number)}">${escapeHtml(number)}</a>`).join(', ');
  const marks = cases.map((id) =>
    caseMark(
      model.cases.findIndex((one) => one.id === id),
      model.cases.length,
    ),
  );
  return `${how} in ${steps}${marks.length === 0 ? '' : ` <span class="mark">${marks.join(', ')}</span>`}`;
}
