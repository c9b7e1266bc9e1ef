// The formulas of the sheet beside those of the template that it came from: at the head of the sheet what was and what is now; at its side
// the lines to go to.
//
// 1. The word says what happened to a line: changed, added, left out. Formulas stand as typed; typeset they stand at their line.
// 2. A long list is folded up.
// Not here: the comparison (src/record, src/sheet).

import { html, nothing } from 'lit';
import type { RecordModel, TemplateDifference } from '../record/index.ts';
import type { GoTo } from './side.ts';
import { words } from './text.ts';

/** So many stand open. */
const open = 6;
const mostAtSide = 40;

/** Under 'Made from …'. */
export function differences({ beside }: RecordModel) {
  if (beside === null) return nothing;
  const { differences: all } = beside;
  if (all.length === 0) return html`<p>${beside.words}</p>`;
  const list = html`<dl class="differences">${all.map(difference)}</dl>`;
  if (all.length <= open) return html`<p>${beside.words}</p>${list}`;
  return html`<p>${beside.words}</p><details class="differences"><summary>${words(all.length, 'line', 'lines')}</summary>${list}</details>`;
}

function difference({ what, number, cell, name, title, was, now }: TemplateDifference) {
  const go = (event: Event) =>
    (event.target as Element).closest<HTMLElement & { goTo(cell: string): unknown }>('ts-paper')?.goTo(cell);
  const label = html`${number === '' ? nothing : html`<span class="number">${number}</span> `}${title === '' ? html`<code>${name}</code>` : title}`;
  return html`<div><dt><b>${what}</b> ${cell === '' ? label : html`<button type="button" class="word" @click=${go}>${label}</button>`}</dt>
    ${was === '' ? nothing : html`<dd><span class="quiet">was</span> <code>${was}</code></dd>`}
    ${now === '' ? nothing : html`<dd>${was === '' ? nothing : html`<span class="quiet">now</span> `}<code>${now}</code></dd>`}</div>`;
}

/** At the side: the count, and the lines that are not the template's. */
export function besideTemplate({ beside }: RecordModel, goTo: GoTo) {
  if (beside === null) return nothing;
  const here = beside.differences.filter(({ cell }) => cell !== '');
  const gone = beside.differences.length - here.length;
  return html`<section id="beside-template" aria-labelledby="beside-title"><h2 id="beside-title">Beside the template</h2>
    <p class="quiet">${beside.words}</p>
    ${
      here.length === 0
        ? nothing
        : html`<ul class="open">${here
            .slice(0, mostAtSide)
            .map(
              ({ what, number, cell, name, title }) =>
                html`<li><button type="button" class="plain" @click=${() => goTo(cell)}><span class="kind">${number} ${what}</span> <span class="name">${title === '' ? name : title}</span></button></li>`,
            )}</ul>${here.length > mostAtSide ? html`<p class="quiet">${here.length - mostAtSide} more at the head of the sheet</p>` : nothing}`
    }${gone === 0 ? nothing : html`<p class="quiet">left out: ${words(gone, 'line', 'lines')}, named at the head of the sheet</p>`}</section>`;
}
