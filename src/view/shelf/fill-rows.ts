// The lines of the form: section by section each given with its basis and source, name and meaning, unit and range, the value that is
// carried over, and the field for this job.
//
// 1. What is wrong stands under the field, with its corrections; a warning where there is no error.
// Not here: what a text means (fill-values.ts), moving from field to field (fill.ts).

import { html, nothing, type TemplateResult } from 'lit';
import { live } from 'lit/directives/live.js';
import type { Fix, Problem } from '../../quantity/index.ts';
import type { RecordModel, Step } from '../../record/index.ts';
import type { GivenCell } from '../../sheet/index.ts';
import { problemLine } from '../edit/problem-line.ts';
import { source } from '../text.ts';
import type { Filled, Place } from './fill-values.ts';

export interface FillGrid {
  readonly model: RecordModel;
  readonly places: readonly (readonly Place[])[];
  readonly filled: Filled;
  choices(cell: GivenCell): readonly string[] | undefined;
  problems(place: Place): readonly Problem[];
  type(key: string, text: string): void;
  /** One value for all cases, or one each. */
  splitUp(cell: GivenCell): void;
}

export function fillGrid(grid: FillGrid) {
  const byCell = new Map(grid.places.map((places) => [places[0]?.cell.id, places]));
  let heading: TemplateResult | typeof nothing = nothing;
  const rows: unknown[] = [];
  for (const line of grid.model.lines) {
    if (line.kind === 'heading' && line.level === 1)
      heading = html`<h3><span class="number">${line.number}</span> ${line.text}</h3>`;
    const places = line.kind === 'step' ? byCell.get(line.step.cell) : undefined;
    if (line.kind !== 'step' || places === undefined) continue;
    if (heading !== nothing) rows.push(heading);
    heading = nothing;
    rows.push(given(line.step, places, grid));
  }
  return html`<div class="givens"><div class="heads" aria-hidden="true"><span>Source</span><span>Given</span><span>Carried over</span><span>This job</span></div>${rows}</div>`;
}

function given(step: Step, places: readonly Place[], grid: FillGrid) {
  const [first] = places;
  if (first === undefined) return nothing;
  const { cell } = first;
  const id = `given-${cell.id}`;
  const several = grid.model.cases.length > 1;
  const isFilled = places.some(({ key }) => (grid.filled.get(key) ?? '').trim() !== '');
  const holds = [
    cell.unit === undefined || cell.unit === '1' ? '' : `in ${cell.unit}`,
    cell.range === undefined ? '' : `made for ${cell.range}`,
  ].filter(Boolean);
  const choices = grid.choices(cell);
  return html`<div class="given-line ${isFilled ? 'filled' : ''}" role="group" aria-labelledby=${id} data-given=${cell.id}>
    <div class="source">${isFilled ? html`<span class="about">no source yet</span>` : html`${source(cell.source ?? '')} <span class="basis">${cell.basis ?? nothing}</span>`}</div>
    <div class="meaning"><p id=${id}><span class="number">${step.number}</span> ${step.title}</p>
      <p class="symbol">${step.symbol === undefined ? nothing : html`<ts-math .tex=${step.symbol}></ts-math>`} <span class="about">${holds.join('; ')}</span>
        ${!several || cell.byCase !== undefined || choices !== undefined ? nothing : html`<button type="button" class="word about" @click=${() => grid.splitUp(cell)}>${places.length > 1 ? 'One value for all cases' : 'One value a case'}</button>`}</p></div>
    <div class="places">${places.map((place) => field(place, step, choices, grid))}</div>
  </div>`;
}

function field(place: Place, step: Step, choices: readonly string[] | undefined, grid: FillGrid) {
  const { key, carried } = place;
  const text = grid.filled.get(key) ?? '';
  const problems = choices === undefined ? grid.problems(place) : [];
  const wrong = problems.some(({ severity }) => severity === 'error');
  const title = place.case === null ? '' : (place.case.title ?? place.case.id);
  const label = `${step.title}${title === '' ? '' : `, ${title}`}, for this job`;
  const noteId = `note-${key}`;
  const back = () => document.getElementById(`field-${key}`)?.focus();
  const typed = (event: Event) => grid.type(key, (event.target as HTMLInputElement).value);
  const apply = (fix: Fix) => {
    // The field takes the focus first: the button goes with the error.
    document.getElementById(`field-${key}`)?.focus();
    grid.type(key, text.slice(0, fix.from) + fix.text + text.slice(fix.to));
  };
  return html`<div class="place">
    ${title === '' ? nothing : html`<p class="case">${title}</p>`}
    <p class="carried" id="carried-${key}"><span class="unseen">carried over: </span><span class=${text.trim() === '' ? '' : 'was'}>${carried}</span></p>
    ${
      choices === undefined
        ? html`<input id="field-${key}" class="line" type="text" data-enter data-key=${key} spellcheck="false" autocomplete="off" autocapitalize="off"
          aria-label=${label} aria-describedby="carried-${key} ${noteId}" aria-invalid=${String(wrong)} .value=${live(text)} @input=${typed} />`
        : html`<select id="field-${key}" class="line" data-enter data-key=${key} aria-label=${label} aria-describedby="carried-${key}" @change=${typed}>
          <option value="" ?selected=${text === ''}>leave carried over</option>
          ${choices.map((choice) => html`<option value=${choice} ?selected=${choice === text}>${choice}</option>`)}</select>`
    }
    ${choices === undefined ? problemLine({ problems, good: '', apply, back, id: noteId }) : nothing}
  </div>`;
}
