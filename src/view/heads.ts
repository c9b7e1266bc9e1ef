// What frames the rows on the paper: purpose and method, cases and settings, the criteria at a glance; at the foot the conclusion and
// the references. Passages are typed where they stand.
//
// Not here: the title block (title-block.ts), the rows (row.ts), the outline on the desk (outline.ts).

import { html, nothing } from 'lit';
import type { CriterionSummary, RecordModel } from '../record/index.ts';
import { differences } from './beside-template.ts';
import { casesPart } from './cases-part.ts';
import type { Desk } from './desk.ts';
import { hereField } from './here-field.ts';
import { referencesPart } from './references-part.ts';
import { prose, quantity } from './text.ts';
import { moreFields } from './title-block.ts';

const part = (name: string, content: unknown) =>
  html`<div class="part"><h2>${name}</h2><div class="prose">${content}</div></div>`;

/** A passage of the head or the foot; on the screen it is typed where it stands. */
function passage(desk: Desk, printing: boolean, key: 'purpose' | 'method' | 'conclusion', label: string, hint: string) {
  const blocks = desk.drawn[key];
  if (blocks.length === 0 && printing) return nothing;
  if (printing) return part(label, prose(blocks));
  return part(
    label,
    hereField({
      desk,
      label,
      value: desk.kept[key] ?? '',
      shown: prose(blocks),
      step: key,
      lines: 4,
      hint,
      edit: (text) => ({ kind: 'set-head', key, value: text.trim() === '' ? null : text }),
    }),
  );
}

export function head(desk: Desk, printing: boolean) {
  const { drawn: model } = desk;
  return html`<section class="head" aria-label="Head of the sheet">
    ${passage(desk, printing, 'purpose', 'Purpose', 'what is calculated, and what the result is used for')}
    ${passage(desk, printing, 'method', 'Method', 'how it is calculated, and after which rules')}
    ${model.origin === '' ? nothing : part('Made from', html`<p>${model.origin}</p>${differences(model)}`)}
    ${model.limits.length === 0 ? nothing : part('Limits', html`<ul>${model.limits.map((one) => html`<li>${one}</li>`)}</ul>`)}
    ${model.caution === '' ? nothing : part('Caution', html`<p>${model.caution}</p>`)}
    ${printing ? nothing : html`${casesPart(desk)}${part('Settings', moreFields(desk))}`}
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

export function foot(desk: Desk, printing: boolean) {
  return html`<footer class="foot">
    ${passage(desk, printing, 'conclusion', 'Conclusion', 'what follows from the results')}
    ${referencesPart(desk, printing)}
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
