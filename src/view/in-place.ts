// What is edited where it stands on the paper: the formula of a line, all of a line as a form, the new line at the foot of a section.
//
// 1. The editing pieces arrive after the first screen stands; nothing is mounted before they are there.
// 2. Every draft and every kept line goes through the desk.
// Not here: the pieces themselves (edit/), values and sources (editor.ts), which line is edited (desk.ts).

import { html, nothing, type TemplateResult } from 'lit';
import { live } from 'lit/directives/live.js';
import type { Cell } from '../sheet/index.ts';
import type { Desk, InPlace } from './desk.ts';
import { formulaText, hasFormula } from './drafts.ts';
import type { CellDetail, EntryDetail, FormulaDetail, TextDetail } from './edit/index.ts';

let loading: Promise<void> | undefined;

/** Resolves when the editing pieces are defined. */
export function loadEditing(): Promise<void> {
  // With the editor of formulas and the reader of tables, so that nothing is asked of the network when typing begins.
  loading ??= Promise.all([import('./edit/index.ts'), import('./edit/code-mirror.ts'), import('papaparse')]).then(
    ([{ defineEditing }]) => defineEditing(),
    (fault) => {
      // Tried again with the next line that is edited.
      loading = undefined;
      throw fault;
    },
  );
  return loading;
}

const forms = { derived: 'formula', criterion: 'comparison', sought: 'equation' } as const;

/** The cell as last kept: the text of before, while the shown sheet has the draft. */
const keptCell = (desk: Desk, id: string) => desk.kept.cells.find((one) => one.id === id);

export function formulaInPlace(desk: Desk, place: InPlace): TemplateResult | typeof nothing {
  const cell = keptCell(desk, place.cell);
  if (cell === undefined || !hasFormula(cell)) return nothing;
  const name = cell.kind === 'criterion' ? '' : cell.name;
  const draft = ({ detail }: CustomEvent<FormulaDetail>) =>
    desk.draftInPlace(detail.keys === undefined ? null : ({ ...cell, ...detail.keys } as Cell), undefined, detail.text);
  return html`<ts-formula-editor class="in-place" .calculation=${desk.calculation} .form=${forms[cell.kind]} .text=${place.resumed?.kind === 'formula' ? place.resumed.text : formulaText(cell)} .name=${name}
    .unit=${cell.unit ?? ''} .cell=${cell.id} .reading=${desk.reading} .label=${`Formula of ${name === '' ? (cell.title ?? 'the criterion') : name}`}
    @draft=${draft}></ts-formula-editor>`;
}

export function fieldsInPlace(desk: Desk, place: InPlace): TemplateResult | typeof nothing {
  const cell = keptCell(desk, place.cell);
  if (cell === undefined) return nothing;
  const draft = ({ detail }: CustomEvent<CellDetail>) => desk.draftInPlace(detail.cell, detail.renamed);
  const begun = place.resumed?.kind === 'fields' ? place.resumed.draft : cell;
  return html`<ts-cell-fields class="in-place" .calculation=${desk.calculation} .cell=${begun} @draft=${draft}></ts-cell-fields>`;
}

/** The words of a heading or a note. */
export function textInPlace(desk: Desk, place: InPlace): TemplateResult | typeof nothing {
  const cell = keptCell(desk, place.cell);
  if (cell === undefined) return nothing;
  const begun = place.resumed?.kind === 'text' ? place.resumed.draft : cell;
  return html`<ts-text-editor class="in-place" .calculation=${desk.calculation} .cell=${begun}
    @draft=${({ detail }: CustomEvent<TextDetail>) => desk.draftInPlace(detail.cell)}></ts-text-editor>`;
}

/** The focus into what is edited in this row. */
export async function focusInPlace(row: HTMLElement) {
  const piece = row.querySelector<HTMLElement & { updateComplete?: Promise<unknown>; focusOn?(): void }>('.in-place');
  await piece?.updateComplete;
  if (piece?.focusOn !== undefined) piece.focusOn();
  else piece?.focus();
}

/** A place where a new line is typed: a word until somebody wants it, then the line. `text`: what is typed so far; undefined: closed. */
export function entryRow(
  desk: Desk,
  key: string,
  label: string,
  text: string | undefined,
  heard: { begin(): void; draft(text: string): void; entry(detail: EntryDetail): void; leave(): void; putIn(): void },
): TemplateResult {
  return html`<div role="row" class="row entry" data-entry=${key}><div role="gridcell" class="source"></div>
    <div role="gridcell" class="calculation across">${
      text === undefined
        ? html`<button type="button" class="word" aria-label=${label} @click=${heard.begin}>New line</button>
            <button type="button" class="word put-in" @click=${heard.putIn}>Put in a template …</button>`
        : html`<ts-entry-line .calculation=${desk.calculation} .label=${label} .text=${live(text)} @cancel=${heard.leave}
            @entry-draft=${(event: CustomEvent<string>) => heard.draft(event.detail)}
            @entry=${(event: CustomEvent<EntryDetail>) => heard.entry(event.detail)}></ts-entry-line>`
    }</div></div>`;
}
