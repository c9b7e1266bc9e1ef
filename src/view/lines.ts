// Lines of the sheet that are no steps: headings, notes, tables, and the places of drawings, charts and figures.
//
// Not here: steps (row.ts), tables (table/), prose as markup (text.ts).

import { html, nothing, type TemplateResult } from 'lit';
import type { Line, RecordCase } from '../record/index.ts';
import type { CellProblem } from '../sheet/index.ts';
import { tableOf } from './table/shown.ts';
import { prose, source } from './text.ts';

type Other = Exclude<Line, { kind: 'step' }>;
type Tab = (column: number) => 0 | -1;

/** `editor`: what its words are typed in; nothing where they are not. */
export function otherLine(
  line: Other,
  tab: Tab,
  problems: readonly CellProblem[],
  cases: readonly RecordCase[],
  below: unknown,
  editor: unknown,
): TemplateResult {
  const trouble = problems.map(
    (problem) =>
      html`<p class="problem ${problem.severity}"><b>${problem.severity === 'error' ? 'Error' : 'Warning'}</b>: ${problem.message}</p>`,
  );
  if (line.kind === 'heading') {
    return html`<div role="gridcell" class="calculation whole" data-column="1" tabindex=${tab(1)}>${editor === nothing ? heading(line) : editor}${trouble}${below}</div>`;
  }
  const left =
    line.kind === 'note' && line.role !== undefined
      ? html`<span class="role">${roles[line.role]}</span> ${source(line.source)}`
      : source(line.source);
  return html`<div role="gridcell" class="source" data-column="0" tabindex=${tab(0)}>${left}</div>
    <div role="gridcell" class="calculation across" data-column="1" tabindex=${tab(1)}>${editor === nothing ? body(line, problems, cases) : html`${editor}<div class="preview" role="group" aria-label="As it will print">${body(line, problems, cases)}</div>`}${notesOf(line).map((note) => html`<p class="remark">${note}</p>`)}${trouble}${below}</div>`;
}

const roles = { assumption: 'Assumption', limit: 'Limit', caution: 'Caution' } as const;

function heading({ number, level, text }: Extract<Line, { kind: 'heading' }>) {
  const words = html`${number === '' ? nothing : html`<span class="number">${number}</span> `}${text}`;
  if (level === 1) return html`<h2>${words}</h2>`;
  return level === 2 ? html`<h3>${words}</h3>` : html`<h4>${words}</h4>`;
}

function body(line: Exclude<Other, { kind: 'heading' }>, problems: readonly CellProblem[], cases: readonly RecordCase[]) {
  if (line.kind === 'note') return html`<div class="prose">${prose(line.blocks)}</div>`;
  if (line.kind === 'table') return tableOf(line, problems, cases);
  const picture =
    line.image !== undefined && /^data:image\/(png|jpeg);base64,/u.test(line.image)
      ? html`<img src=${line.image} alt=${line.title === '' ? 'figure without a title' : line.title} />`
      : html`<p class="absent">${line.text}</p>`;
  return html`<figure>${line.title === '' ? nothing : html`<figcaption>${line.title}</figcaption>`}${picture}</figure>`;
}

const notesOf = (line: Exclude<Other, { kind: 'heading' }>) => (line.kind === 'other' ? [] : line.notes);
