// The criteria of a sheet that is not made yet, as its values stand now.
//
// Not here: the outline of an open sheet (outline.ts).

import { html, nothing } from 'lit';
import type { CriterionSummary, RecordModel } from '../../record/index.ts';
import { quantity } from '../text.ts';

export function criteriaNow({ summary, cases }: RecordModel) {
  if (summary.length === 0) return nothing;
  return html`<section aria-labelledby="criteria-now"><h2 id="criteria-now">Criteria with these values</h2>
    <ul class="bars">${summary.map((one) => html`<li>${criterion(one, cases)}</li>`)}</ul></section>`;
}

function criterion(one: CriterionSummary, cases: RecordModel['cases']) {
  const worst = one.cases.find((each) => each.case === one.governing) ?? one.cases[0];
  const met = worst?.met ?? null;
  const where = met === false ? (cases.find(({ id }) => id === worst?.case)?.title ?? '') : '';
  const used = worst?.utilisation ?? null;
  return html`<p class="criterion"><span class="title">${one.title}</span>
    <span class="verdict ${met === false ? 'not-met' : ''}">${met === null ? 'no verdict' : html`${quantity(worst?.printed ?? '')}${met ? html`<span class="unseen"> met</span>` : ' not met'}`}</span>
    ${where === '' ? nothing : html`<span class="where">${where}</span>`}
    ${used === null ? nothing : html`<ts-bar aria-hidden="true" .used=${used} .over=${met === false}></ts-bar>`}</p>`;
}
