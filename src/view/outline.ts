// What lies at the left of the paper: the sections, and the criteria with how much of each limit is used.
//
// 1. A bar ends at its limit line; past the limit it is full and hatched, and the word says so. A bar never speaks alone.
// Not here: where the jumps lead (page.ts).

import { html, nothing } from 'lit';
import type { CriterionSummary, RecordModel } from '../record/index.ts';
import type { GoTo } from './side.ts';
import { quantity } from './text.ts';

export function outline(model: RecordModel, current: string | null, goTo: GoTo) {
  const headings = model.lines.flatMap((line) => (line.kind === 'heading' && line.level === 1 ? [line] : []));
  return html`
    ${
      headings.length === 0
        ? nothing
        : html`<nav aria-labelledby="sections-title"><h2 id="sections-title">Sections</h2><ol class="sections">
            ${headings.map(
              (
                line,
              ) => html`<li><button type="button" aria-current=${line.cell === current ? 'location' : nothing} @click=${() => goTo(line.cell)}>
                <span class="number">${line.number}</span> ${line.text}</button></li>`,
            )}</ol></nav>`
    }
    ${
      model.summary.length === 0
        ? nothing
        : html`<section aria-labelledby="criteria-title"><h2 id="criteria-title">Criteria</h2><ul class="bars">
            ${model.summary.map((one) => html`<li>${bar(one, model, goTo)}</li>`)}</ul></section>`
    }`;
}

function bar(one: CriterionSummary, { cases }: RecordModel, goTo: GoTo) {
  const governing = one.cases.find((each) => each.case === one.governing) ?? one.cases[0];
  const met = governing?.met ?? null;
  const worst = cases.find((each) => each.id === governing?.case)?.title ?? '';
  const where = met === false && one.cases.some((each) => each.met !== false) ? `, ${worst}` : '';
  const used = governing?.utilisation ?? null;
  return html`<button type="button" @click=${() => goTo(one.cell)}>
    <span class="title">${one.title}</span>
    <span class="verdict ${met === false ? 'not-met' : ''}">${met === null ? 'no verdict' : html`${quantity(governing?.printed ?? '')}${met ? html`<span class="unseen"> met</span>` : ' not met'}`}</span>
    ${where === '' ? nothing : html`<span class="where">${where.slice(2)}</span>`}
    ${used === null ? nothing : html`<ts-bar aria-hidden="true" .used=${used} .over=${met === false}></ts-bar>`}
  </button>`;
}

/** <ts-bar>: how much of a limit is used. */
export class BarElement extends HTMLElement {
  set used(used: number) {
    this.style.setProperty('--used', `${(Math.min(1, Math.max(0, used)) * 100).toFixed(1)}%`);
  }
  set over(over: boolean) {
    this.toggleAttribute('data-over', over);
  }
}
