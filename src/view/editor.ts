// The field in which a given is typed, on its line: value or choice, for which cases, and what is wrong with it as it stands.
//
// 1. Enter keeps, Escape takes back; leaving the row keeps. What was typed is kept even where it is wrong: the line then says why.
// 2. An error is told in one sentence under the field, and named by it for those who do not see it.
// Not here: reading the value (src/sheet), which cell is typed into (desk.ts).

import { html, nothing } from 'lit';
import { live } from 'lit/directives/live.js';
import type { Fix } from '../quantity/index.ts';
import type { RecordCase, Step } from '../record/index.ts';
import type { Basis, CellProblem } from '../sheet/index.ts';
import type { Desk, Editing } from './desk.ts';
import { sharesValue } from './given.ts';

/** The texts that a given may choose from; undefined where it is typed freely. */
export function choicesOf(desk: Desk, cell: string): readonly string[] | undefined {
  const state = desk.calculation.state(cell);
  if (state?.kind !== 'given' || state.cell.choices === undefined) return undefined;
  const [table, column] = state.cell.choices.split('.');
  return desk.calculation.table(table ?? '')?.data?.columns.find((one) => one.name === column)?.texts ?? [];
}

/** Takes the focus when typing begins: a value about to be replaced is selected, one begun by a key stroke goes on behind it. */
export function focusField(row: HTMLElement) {
  const field = row.querySelector<HTMLElement>('.typing');
  field?.focus();
  if (!(field instanceof HTMLInputElement)) return;
  if (field.dataset['fresh'] === 'true') field.select();
  else field.setSelectionRange(field.value.length, field.value.length);
}

export const noteId = (cell: string) => `editor-${cell}`;

export function editorField(desk: Desk, editing: Editing, step: Step, cases: readonly RecordCase[], choices?: readonly string[]) {
  const title = cases[editing.at]?.title ?? '';
  const label = `Value of ${step.title}${title === '' ? '' : `, ${title}`}`;
  const wrong = editing.problems.some((problem) => problem.severity === 'error');
  if (choices !== undefined) {
    return html`<select class="typing" aria-label=${label} aria-describedby=${noteId(step.cell)}
      @change=${(event: Event) => desk.type((event.target as HTMLSelectElement).value)}>
      ${choices.includes(editing.text) ? nothing : html`<option value=${editing.text} selected>${editing.text}</option>`}
      ${choices.map((text) => html`<option value=${text} ?selected=${text === editing.text}>${text}</option>`)}
    </select>`;
  }
  return html`<input class="typing" type="text" spellcheck="false" autocomplete="off" autocapitalize="off" aria-label=${label}
    aria-invalid=${wrong ? 'true' : 'false'} aria-describedby=${noteId(step.cell)} data-fresh=${editing.text === editing.before}
    .value=${live(editing.text)} @input=${(event: Event) => desk.type((event.target as HTMLInputElement).value)} />`;
}

/** Under the field: what is wrong, then for which cases it holds. */
export function editorNotes(desk: Desk, editing: Editing, step: Step, cases: readonly RecordCase[]) {
  const errors = editing.problems.filter((problem) => problem.severity === 'error');
  const warnings = editing.problems.filter((problem) => problem.severity === 'warning');
  const fixes = (problem: CellProblem) =>
    (problem.fixes ?? []).map(
      (fix) =>
        html`<button type="button" class="word" @click=${(event: Event) => applyFix(desk, editing, fix, event)}>${fix.label}</button> `,
    );
  return html`<div class="editor-notes">
    <div id=${noteId(step.cell)} class="editor-problems" aria-live="polite">
      ${errors
        .slice(0, 1)
        .map((problem) => html`<p class="problem error"><b>Error</b>: ${problem.message} ${fixes(problem)}</p>`)}
      ${errors.length > 0 ? nothing : warnings.map((problem) => html`<p class="problem warning"><b>Warning</b>: ${problem.message} ${fixes(problem)}</p>`)}
    </div>
    ${cases.length < 2 ? nothing : scope(desk, editing, step, cases)}
    <p class="remark">Enter keeps it, Escape restores ${editing.before === '' ? 'the empty field' : editing.before}</p>
  </div>`;
}

function applyFix(desk: Desk, editing: Editing, fix: Fix, event: Event) {
  // The field takes the focus first: the button goes with the error.
  (event.target as Element).closest('ts-row')?.querySelector<HTMLElement>('.typing')?.focus();
  desk.type(editing.text.slice(0, fix.from) + fix.text + editing.text.slice(fix.to));
}

function scope(desk: Desk, editing: Editing, step: Step, cases: readonly RecordCase[]) {
  const state = desk.calculation.state(step.cell);
  const own =
    state?.kind === 'given' ? cases.filter((one, index) => index !== editing.at && !sharesValue(state.cell, one.id)) : [];
  const name = `scope-${step.cell}`;
  const choice = (
    forAll: boolean,
    text: string,
  ) => html`<label><input type="radio" name=${name} .checked=${live(editing.forAll === forAll)}
    @change=${() => desk.setForAll(forAll)} /> ${text}</label>`;
  return html`<div class="scope" role="radiogroup" aria-label="Holds for">
    ${choice(true, own.length === 0 ? 'for all cases' : `for all cases but ${own.map((one) => one.title).join(', ')}`)}
    ${choice(false, `only for ${cases[editing.at]?.title ?? ''}`)}
  </div>`;
}

const bases: readonly Basis[] = ['specified', 'measured', 'tabulated', 'assumed'];

export function sourceEditor(desk: Desk, editing: Editing, step: Step) {
  return html`<textarea class="typing" rows="4" spellcheck="true" aria-label=${`Source of ${step.title}`} .value=${live(editing.text)}
      @input=${(event: Event) => desk.type((event.target as HTMLTextAreaElement).value)}></textarea>
    <label class="basis-choice">basis <select @change=${(event: Event) => {
      const value = (event.target as HTMLSelectElement).value;
      desk.setBasis(step.cell, bases.find((one) => one === value) ?? null);
    }}>
      <option value="" ?selected=${step.basis === undefined}>not stated</option>
      ${bases.map((one) => html`<option value=${one} ?selected=${one === step.basis}>${one}</option>`)}
    </select></label>`;
}
