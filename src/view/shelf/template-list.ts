// The templates on the shelf: what each is for, with limits and caution to be read before use; own ones with their version.
//
// Not here: which are found (built-in.ts), what the acts do (register.ts).

import { html, nothing } from 'lit';
import { repeat } from 'lit/directives/repeat.js';
import { casesOf, readSheet, type Sheet, type TemplateInfo } from '../../sheet/index.ts';
import type { TemplateRow } from '../../store/index.ts';
import { hashOf } from '../route.ts';
import { words } from '../text.ts';
import { day, stamp } from './acts.ts';
import type { Kind } from './built-in.ts';

/** The address of an own template stands apart from those that come with the page. */
export const ownAddress = (id: string) => `own:${id}`;

export function kindOfJob({ title, templates }: Kind, at: number) {
  const id = `kind-${at}`;
  return html`<section class="kind-of-job" aria-labelledby=${id}><h3 id=${id} tabindex="-1">${title}</h3><ul class="templates">
    ${repeat(
      templates,
      (one) => one.id,
      ({ id: template, sheet, info }) =>
        html`<li data-template=${template}>
          <p class="id"><code>${template}</code></p>
          <div class="what"><h4><a href=${hashOf({ screen: 'template', id: template })}>${sheet.title}</a></h4>
            <p>${info.job}.</p>${limits(sheet, info)}</div>
          <p class="acts"><a class="do" aria-label=${`New sheet: ${sheet.title}`} href=${hashOf({ screen: 'template', id: template })}>New sheet</a></p>
        </li>`,
    )}</ul></section>`;
}

const limits = (sheet: Sheet, info: TemplateInfo) =>
  html`<details><summary>Limits and caution<span class="unseen"> of ${sheet.title}</span></summary>${limitsAndCaution(info)}
    <p class="about">${words(
      sheet.cells.filter((cell) => cell.kind === 'given').length,
      'given',
      'givens',
    )}; ${words(sheet.cells.filter((cell) => cell.kind === 'criterion').length, 'criterion', 'criteria')}; ${
      sheet.cases === undefined
        ? 'one case'
        : `cases: ${casesOf(sheet)
            .map((one) => one.title ?? one.id)
            .join(', ')}`
    }</p></details>`;

export const limitsAndCaution = ({ limits: all, caution }: TemplateInfo) =>
  html`${all.length === 0 ? nothing : html`<p class="lead">Holds within these limits:</p><ul class="limits">${all.map((limit) => html`<li>${limit}</li>`)}</ul>`}
    ${caution === '' ? nothing : html`<p class="caution"><b>Caution.</b> ${caution}</p>`}`;

export interface OwnActs {
  save(row: TemplateRow): void;
  remove(row: TemplateRow): void;
  putBack(row: TemplateRow): void;
}

export function ownTemplates(rows: readonly TemplateRow[], removed: ReadonlyMap<string, TemplateRow>, acts: OwnActs) {
  const act = (row: TemplateRow, name: string, text: string, does: () => void) =>
    html`<button type="button" class="word" data-act=${name} aria-label=${`${text}: ${row.title}`} @click=${does}>${text}</button>`;
  return html`<ul class="templates own">${repeat(
    rows,
    (row) => row.id,
    (row) => {
      if (removed.has(row.id))
        return html`<li data-template=${ownAddress(row.id)} class="gone"><p class="id"><code>${row.id}</code></p>
          <div class="what"><p><span class="was">${row.title}</span> was removed. ${act(row, 'put-back', 'Put it back', () => acts.putBack(row))}</p></div></li>`;
      const read = readSheet(row.text);
      const info = read.ok ? read.value.templateInfo : undefined;
      const address = hashOf({ screen: 'template', id: ownAddress(row.id) });
      return html`<li data-template=${ownAddress(row.id)}>
        <p class="id"><code>${row.id}</code><span class="about">version ${row.version}, <time datetime=${stamp(row.changed)}>${day(row.changed)}</time></span></p>
        <div class="what"><h4>${info === undefined ? row.title : html`<a href=${address}>${row.title}</a>`}</h4>
          ${
            read.ok && info !== undefined
              ? html`<p>${row.job}</p>${limits(read.value, info)}`
              : html`<p><b class="not-met">cannot be read</b>: ${read.ok ? 'it is no template' : read.problems[0]?.message}. The text is kept as it is.</p>`
          }</div>
        <p class="acts">${info === undefined ? nothing : html`<a class="do" data-act="open" aria-label=${`New sheet: ${row.title}`} href=${address}>New sheet</a> `}
          ${act(row, 'save', 'Save as file', () => acts.save(row))} ${act(row, 'remove', 'Remove', () => acts.remove(row))}</p>
      </li>`;
    },
  )}</ul>`;
}
