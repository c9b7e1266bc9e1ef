// What frames the rows on the paper: the title block as on a drawing, purpose and method, the criteria at a glance; at the foot the
// conclusion and the references.
//
// Not here: the rows (row.ts), the outline on the desk (outline.ts).

import { html, nothing } from 'lit';
import type { CriterionSummary, RecordModel } from '../record/index.ts';
import type { Desk } from './desk.ts';
import { prose, quantity } from './text.ts';

const field = (name: string, value: string | undefined, kind = '') =>
  html`<div class="field ${kind}"><dt>${name}</dt><dd>${value === undefined || value === '' ? html`<span class="blank">–</span>` : value}</dd></div>`;

/** The data fields of ISO 7200. */
export function titleBlock({ title, titleBlock: block, status }: RecordModel) {
  return html`<header class="title-block">
    <div class="name">
      <p>${block.documentType ?? 'Calculation sheet'}</p>
      <h1>${title.split(/(?<=\s)/u).map((word) => (word.length < 24 && word.includes('-') ? html`<span>${word}</span>` : word))}</h1>
      ${block.supplementaryTitle ? html`<p>${block.supplementaryTitle}</p>` : nothing}
    </div>
    <dl>
      ${field('Document', block.documentNumber, 'strong')}${field('Revision', block.revision, 'strong')}${field('Date', block.date)}${field('Status', status)}
      ${field('Organisation', [block.organisation, block.department].filter(Boolean).join(', '), 'wide')}${field('Project', block.project, 'wide')}
      ${field('Prepared', block.preparedBy)}${field('Checked', block.checkedBy)}${field('Approved', block.approvedBy, 'wide')}
    </dl>
  </header>`;
}

const part = (name: string, content: unknown) =>
  html`<div class="part"><h2>${name}</h2><div class="prose">${content}</div></div>`;

export function head(desk: Desk) {
  const { drawn: model } = desk;
  return html`<section class="head" aria-label="Head of the sheet">
    ${model.purpose.length === 0 ? nothing : part('Purpose', prose(model.purpose))}
    ${model.method.length === 0 ? nothing : part('Method', prose(model.method))}
    ${model.origin === '' ? nothing : part('Made from', html`<p>${model.origin}</p>`)}
    ${model.limits.length === 0 ? nothing : part('Limits', html`<ul>${model.limits.map((one) => html`<li>${one}</li>`)}</ul>`)}
    ${model.caution === '' ? nothing : part('Caution', html`<p>${model.caution}</p>`)}
    ${model.summary.length === 0 ? nothing : part('Criteria', criteria(model))}
  </section>`;
}

function criteria({ summary, cases }: RecordModel) {
  const heads = cases.map((one) => html`<th scope="col" class="number">${one.title === '' ? 'Utilisation' : one.title}</th>`);
  const rows = summary.map(
    (one) =>
      html`<tr><td>${one.number}</td><th scope="row">${one.title}</th>${one.cases.map((each, index) => verdict(one, each, cases[index]?.title ?? ''))}</tr>`,
  );
  return html`<div class="scroll"><table class="criteria">
    <thead><tr><th scope="col">No.</th><th scope="col">Criterion</th>${heads}</tr></thead>
    <tbody>${rows}</tbody>
  </table></div>`;
}

function verdict(one: CriterionSummary, each: CriterionSummary['cases'][number], title: string) {
  if (each.met === null) return html`<td class="number" data-case=${title}>no verdict</td>`;
  const governs = one.governing === each.case && one.cases.some((other) => other.printed !== each.printed);
  return html`<td class="number" data-case=${title}>${governs ? html`<span class="governs">governs</span> ` : nothing}${quantity(each.printed ?? '')}
    <span class=${each.met ? 'met' : 'not-met'}>${each.met ? 'met' : 'not met'}</span></td>`;
}

export function foot(model: RecordModel) {
  return html`<footer class="foot">
    ${model.conclusion.length === 0 ? nothing : part('Conclusion', prose(model.conclusion))}
    ${
      model.references.length === 0
        ? nothing
        : part(
            'References',
            html`<dl class="references">${model.references.map(
              (one) =>
                html`<div id=${`ref-${one.id}`} tabindex="-1"><dt>[${one.id}]</dt><dd>${one.document}${one.edition === '' ? nothing : `, ${one.edition}`}${one.title === '' ? nothing : `. ${one.title}`}${
                  one.citedBy.length === 0 ? nothing : html` <span class="cited">cited in ${one.citedBy.join(', ')}</span>`
                }</dd></div>`,
            )}</dl>`,
          )
    }
  </footer>`;
}

/** The heads of the columns: source, calculation, one a case. */
export function columnHeads(desk: Desk, heads: readonly string[]) {
  return html`<div role="row" class="row columns">
      <div role="columnheader" class="source">Source</div>
      <div role="columnheader" class="calculation">Calculation</div>
      ${heads.map((title, index) => columnHead(desk, title, index, heads.length))}
    </div>`;
}

function columnHead(desk: Desk, title: string, index: number, count: number) {
  if (count === 1) return html`<div role="columnheader" class="result">${title}</div>`;
  const read = desk.reading === index;
  return html`<div role="columnheader" class="result">
      <button type="button" class="case-head" aria-pressed=${read} title="Show the numbers of this case in the equations" @click=${() => desk.read(index)}>${title}</button>
    </div>`;
}
