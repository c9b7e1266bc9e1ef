// The load cases of the sheet, in its head: added, named, put in order, removed, each by a word and each one step.
//
// 1. A sheet of one case shows nothing but the way to a second one.
// 2. What a case has of its own goes with it, and is named when it goes.
// 3. After each act the focus stands where one goes on: in the name of a new case, on the same word of a moved one.
// Not here: values of one case (editor.ts), the columns (paper.ts), what an edit does to the sheet (src/sheet/cases.ts).

import { html, nothing } from 'lit';
import { repeat } from 'lit/directives/repeat.js';
import { caseIdFault, casesOf, type LoadCase } from '../sheet/index.ts';
import { addCaseEdit, ownValues, removeCaseWords, titleOf } from './case-acts.ts';
import type { Desk } from './desk-face.ts';
import { HereElement } from './here.ts';
import { hereField } from './here-field.ts';

export function casesPart(desk: Desk) {
  const { kept } = desk;
  const cases = casesOf(kept);
  const add = (event: Event, like?: string) => {
    const { edit, id } = addCaseEdit(kept, like);
    const words =
      like === undefined ? 'new case' : `new case like ${titleOf(cases.find((one) => one.id === like) ?? { id: like })}`;
    if (desk.act(edit, { label: words, words })) void follow(event, `[data-case="${id}"] ts-here`, true);
  };
  const move = (event: Event, id: string, to: number) => {
    const title = titleOf(cases.find((one) => one.id === id) ?? { id });
    const word = (event.currentTarget as HTMLElement).dataset['act'] ?? '';
    if (desk.act({ kind: 'move-case', id, to }, { words: `case ${title} is now number ${to + 1}` }))
      void follow(event, `[data-case="${id}"] [data-act="${word}"]`, false);
  };
  const remove = (event: Event, id: string, at: number) => {
    const next = cases[at + 1] ?? cases[at - 1];
    const label = `removal of case ${titleOf(cases[at] ?? { id })}`;
    if (desk.act({ kind: 'remove-case', id }, { label, words: removeCaseWords(kept, id) }))
      void follow(event, `[data-case="${next?.id ?? ''}"] [data-act="remove"]`, false);
  };
  const button = (word: string, act: string, title: string, disabled: boolean, does: (event: Event) => void) =>
    html`<button type="button" class="word" data-act=${act} aria-label=${`${word}: ${title}`} ?disabled=${disabled} @click=${does}>${word}</button> `;
  const row = (one: LoadCase, at: number) => {
    const title = titleOf(one);
    const own = ownValues(kept, one.id);
    return html`<li data-case=${one.id}><span class="number">${at + 1}</span>
      <span class="case-title">${hereField({
        desk,
        label: `Title of case ${at + 1}`,
        value: one.title ?? '',
        hint: one.id,
        step: `title of case ${one.id}`,
        edit: (text) => ({
          kind: 'change-case',
          id: one.id,
          case: { id: one.id, ...(text.trim() === '' ? {} : { title: text.trim() }) },
        }),
      })}</span>
      <span class="case-id">${hereField({
        desk,
        label: `Id of case ${at + 1}`,
        value: one.id,
        step: `id of case ${one.id}`,
        late: true,
        check: (text) => (text.trim() === one.id ? undefined : caseIdFault(desk.kept, text.trim())),
        edit: (text) => ({ kind: 'change-case', id: one.id, case: { ...one, id: text.trim() } }),
      })}</span>
      <span class="own">${own.length === 0 ? 'no values of its own' : `own values: ${own.slice(0, 5).join(', ')}${own.length > 5 ? ` and ${own.length - 5} more` : ''}`}</span>
      <span class="acts">${button('Up', 'up', title, at === 0, (event) => move(event, one.id, at - 1))}${button('Down', 'down', title, at === cases.length - 1, (event) => move(event, one.id, at + 1))}${button('One like it', 'like', title, false, (event) => add(event, one.id))}${button('Remove', 'remove', title, cases.length < 2, (event) => remove(event, one.id, at))}</span></li>`;
  };
  return html`<div class="part cases-part"><h2>Cases</h2><div class="prose">
    ${
      kept.cases === undefined
        ? html`<p class="quiet">One case. With a second one each line has a result column a case, and a given may have a value for each.</p>`
        : html`<ol class="cases">${repeat(cases, (one) => one.id, row)}</ol>${cases.length < 2 ? nothing : html`<p class="quiet">A given holds for all cases until it is typed “only for” one: choose so under its field.</p>`}`
    }
    <p><button type="button" class="word" data-act="add" @click=${(event: Event) => add(event)}>Add a case</button></p></div></div>`;
}

/** The focus to where one goes on, once it is drawn. */
async function follow(event: Event, target: string, edit: boolean) {
  const part =
    (event.currentTarget as Element | null)?.closest('.cases-part') ?? (event.target as Element).closest('.cases-part');
  const paper = part?.closest('ts-paper') as (HTMLElement & { updateComplete: Promise<unknown> }) | null;
  await (paper?.closest('ts-page') as { updateComplete?: Promise<unknown> } | null)?.updateComplete;
  await paper?.updateComplete;
  const found = part?.querySelector<HTMLElement>(target) ?? part?.querySelector<HTMLElement>('[data-act="add"]');
  if (edit && found instanceof HereElement) await found.edit();
  else if (found instanceof HTMLButtonElement && found.disabled)
    found.parentElement?.querySelector<HTMLElement>('button:not([disabled])')?.focus();
  else found?.focus();
}
