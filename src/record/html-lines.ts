// The lines of the record as one ruled table: source | calculation | one result column a case.
//
// Steps are groups of rows that stay on one page (html-step.ts); notes, tables and pictures take the width of all columns.

import { escapeHtml, safeImage } from './escape.ts';
import { mostColumns, stepBody } from './html-step.ts';
import { dataTable } from './html-table.ts';
import { caseHead, inlineText, noteLines, prose, type Symbols } from './html-text.ts';
import type { Line, RecordModel } from './model.ts';

export function stepsTable(model: RecordModel, symbols: Symbols): string {
  const wide = model.cases.length <= mostColumns;
  const heads = wide && model.cases.length > 1 ? model.cases.map((_, k) => caseHead(model, k)) : ['Result'];
  const result = heads.length === 1 ? 17 : heads.length === 2 ? 15 : 13.5;
  const columns = `<colgroup><col style="width:16%"><col>${heads.map(() => `<col style="width:${result}%">`).join('')}</colgroup>`;
  const head = `<thead><tr><th scope="col">Source</th><th scope="col">Calculation</th>${heads
    .map((title) => `<th scope="col" class="res">${title}</th>`)
    .join('')}</tr></thead>`;
  const bodies = model.lines.map((line) => body(line, model, heads.length + 2, symbols)).join('\n');
  const legend = wide ? '' : `<p class="legend">${model.cases.map((_, k) => `<span>${caseHead(model, k)}</span>`).join(' ')}</p>`;
  return `${legend}<table class="steps">${columns}${head}\n${bodies}\n</table>`;
}

function body(line: Line, model: RecordModel, span: number, symbols: Symbols): string {
  switch (line.kind) {
    case 'heading': {
      const tag = `h${line.level + 1}`;
      const number = line.number === '' ? '' : `${escapeHtml(line.number)}&ensp;`;
      return `<tbody class="section"><tr><th scope="rowgroup" colspan="${span}"><${tag}>${number}${inlineText(line.text, symbols)}</${tag}></th></tr></tbody>`;
    }
    case 'step':
      return stepBody(line.step, model, symbols);
    case 'note': {
      const role = line.role === undefined ? '' : `<p class="role">${line.role.charAt(0).toUpperCase()}${line.role.slice(1)}</p>`;
      const kind = line.role === 'limit' || line.role === 'caution' ? ' barred' : '';
      return beside(
        line.source,
        `<div class="prose${kind}">${role}${prose(line.blocks, symbols)}${noteLines(line.notes, symbols)}</div>`,
        span,
        symbols,
      );
    }
    case 'table':
      return beside(line.source, dataTable(line, model, symbols), span, symbols, line.rows.length > longTable ? ' long' : '');
    case 'other':
      return beside(line.source, picture(line, symbols), span, symbols);
  }
}

/** A table of more rows may run over to the next page. */
const longTable = 12;

function beside(source: string, markup: string, span: number, symbols: Symbols, more = ''): string {
  return `<tbody class="text${more}"><tr><td class="src">${inlineText(source, symbols)}</td><td class="wide" colspan="${span - 1}">${markup}</td></tr></tbody>`;
}

function picture(line: Extract<Line, { kind: 'other' }>, symbols: Symbols): string {
  const image = line.image === undefined ? undefined : safeImage(line.image);
  const caption = line.title === '' ? '' : `<figcaption class="t">${inlineText(line.title, symbols)}</figcaption>`;
  if (image === undefined) return `<figure>${caption}<p class="absent">${inlineText(line.text, symbols)}</p></figure>`;
  return `<figure>${caption}<img src="${image}" alt="${escapeHtml(line.title === '' ? 'figure without a title' : line.title)}"></figure>`;
}
