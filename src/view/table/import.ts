// <ts-table-import>: a text from the clipboard or a file, seen as a table before it is taken.
//
// 1. What was guessed (delimiter, decimal sign, heads, units) stands in fields and can be changed; everything follows at once.
// 2. What will change is said in words; what is wrong, in a sentence each with row and column. Nothing is taken until it is asked for:
//    `table-take` { cell, words } or `table-leave`, bubbling.
// Not here: reading the text (src/sheet), what it changes (changes.ts).

import { html, nothing, type PropertyValues } from 'lit';
import { live } from 'lit/directives/live.js';
import {
  type Calculation,
  type Delimiter,
  type TableCell,
  type TablePreview,
  type TableTextOptions,
  tableFromText,
} from '../../sheet/index.ts';
import { PageElement } from '../element.ts';
import { words } from '../text.ts';
import { changeOf, type Taking } from './changes.ts';

export interface Incoming {
  readonly text: string;
  /** 'the clipboard', or the name of the file. */
  readonly from: string;
}

const delimiters: readonly (readonly [Delimiter, string])[] = [
  ['\t', 'tab'],
  [';', 'semicolon'],
  [',', 'comma'],
  ['|', 'bar'],
];
/** A short row with its gaps. */
const even = (row: readonly string[], length: number): readonly (string | undefined)[] => [
  ...row,
  ...Array.from<undefined>({ length: Math.max(0, length - row.length) }),
];
/** Rows of the preview: the first ones, then those with something wrong. */
const shownRows = 12;
const mostWrong = 12;

export class TableImportElement extends PageElement {
  static override properties = {
    incoming: { attribute: false },
    cell: { attribute: false },
    calculation: { attribute: false },
    options: { state: true },
    preview: { state: true },
    how: { state: true },
  };
  declare incoming: Incoming;
  declare cell: TableCell;
  declare calculation: Calculation;
  declare options: TableTextOptions;
  declare preview: TablePreview | null;
  declare how: Taking;
  #asked = 0;

  constructor() {
    super();
    this.options = {};
    this.preview = null;
    this.how = 'in place';
  }

  protected override willUpdate(changed: PropertyValues<this>) {
    if (changed.has('incoming')) {
      this.options = {};
      this.preview = null;
      this.how = 'in place';
    }
    if (changed.has('incoming') || changed.has('options')) void this.#read();
  }

  async #read() {
    this.#asked += 1;
    const mine = this.#asked;
    const first = this.preview === null;
    const preview = await tableFromText(this.incoming.text, { ...this.options, into: this.#into });
    if (mine !== this.#asked) return;
    this.preview = preview;
    if (!first) return;
    await this.updateComplete;
    this.querySelector<HTMLElement>('.title')?.focus();
    this.scrollIntoView({ block: 'nearest' });
  }

  get #into() {
    return this.calculation.sheet.settings?.decimalSign ?? '.';
  }

  protected override render() {
    const { preview, cell } = this;
    if (preview === null) return html`<p class="quiet">Reading …</p>`;
    const change = changeOf(cell, preview, this.how, this.calculation.sheet, (id) => this.calculation.numberOf(id));
    const errors = preview.problems.filter(({ severity }) => severity === 'error');
    const empty = preview.rows.length === 0;
    return html`<section class="table-import" aria-labelledby="import-title" @keydown=${this.#key}>
      <p class="title" id="import-title" tabindex="-1">A table from ${this.incoming.from}</p>
      <div class="options">
        ${this.#choice('Columns are parted by', preview.delimiter, delimiters, (delimiter) => this.#set({ delimiter }))}
        ${this.#choice(
          'Decimal sign',
          preview.decimalSign,
          [
            ['.', 'point'],
            [',', 'comma'],
          ] as const,
          (decimalSign) => this.#set({ decimalSign }),
        )}
        <label class="check"><input type="checkbox" .checked=${live(preview.heads)} @change=${(event: Event) =>
          this.#set({ heads: (event.target as HTMLInputElement).checked, units: [] })} /> the first row holds the heads</label>
        ${preview.unitsRow ? html`<span class="quiet">the second row holds the units</span>` : nothing}
      </div>
      ${empty ? nothing : this.#table(preview)}
      ${
        preview.problems.length === 0
          ? nothing
          : html`<ul class="table-faults" aria-label="What is wrong in it">${preview.problems
              .slice(0, mostWrong)
              .map(
                ({ severity, message }) =>
                  html`<li class="problem ${severity}"><b>${severity === 'error' ? 'Error' : 'Warning'}</b>: ${message}</li>`,
              )}${preview.problems.length > mostWrong ? html`<li>and ${preview.problems.length - mostWrong} more</li>` : nothing}</ul>`
      }
      ${
        empty
          ? nothing
          : html`${cell.rows.length === 0 ? nothing : this.#taking()}
            <p class="will" aria-live="polite">${change.words.join('; ')}.${errors.length === 0 ? nothing : html` ${words(errors.length, 'entry or row is', 'entries or rows are')} wrong; they are taken as they stand, and the table says so until they are put right.`}</p>`
      }
      <p class="acts">${empty ? nothing : html`<button type="button" class="do" @click=${() => this.#say('table-take', { cell: change.cell, words: change.words.join('; ') })}>Take the ${words(preview.rows.length, 'row', 'rows')}</button> `}
        <button type="button" class="word" @click=${() => this.#say('table-leave', {})}>Leave it</button></p>
    </section>`;
  }

  #choice<Value extends string>(
    label: string,
    value: Value,
    options: readonly (readonly [Value, string])[],
    set: (value: Value) => void,
  ) {
    return html`<label>${label} <select @change=${(event: Event) => {
      const chosen = options.find(([one]) => one === (event.target as HTMLSelectElement).value);
      if (chosen !== undefined) set(chosen[0]);
    }}>${options.map(([one, word]) => html`<option value=${one} .selected=${one === value}>${word}</option>`)}</select></label>`;
  }

  #taking() {
    const choice = (how: Taking, text: string) =>
      html`<label class="check"><input type="radio" name="taking" .checked=${live(this.how === how)} @change=${() => {
        this.how = how;
      }} /> ${text}</label>`;
    return html`<div class="options" role="radiogroup" aria-label="Where the rows go">${choice('in place', 'in place of the rows that are there')}${choice('behind', 'behind them')}</div>`;
  }

  #table({ columns, rows, problems }: TablePreview) {
    const wrongRows = new Set(problems.flatMap(({ row }) => (row === undefined ? [] : [row])));
    const wrong = new Set(
      problems.flatMap(({ row, column }) => (row === undefined || column === undefined ? [] : [`${row} ${column}`])),
    );
    const shown = rows
      .map((_, index) => index)
      .filter((index) => index < shownRows || wrongRows.has(index))
      .slice(0, shownRows + mostWrong);
    return html`<div class="scroll" tabindex="0" role="region" aria-label="The rows as they would come"><table class="data">
      <thead><tr><td></td>${columns.map(({ name, title }) => html`<th scope="col">${title ?? name}${title === undefined ? nothing : html` <code>${name}</code>`}</th>`)}</tr>
        <tr><th scope="row">unit</th>${columns.map(
          (
            { name, unit },
            at,
          ) => html`<td><input class="field" type="text" spellcheck="false" placeholder="text" aria-label=${`unit of ${name}`} .value=${live(unit ?? '')}
          @change=${(event: Event) => this.#setUnit(at, (event.target as HTMLInputElement).value)} /></td>`,
        )}</tr></thead>
      <tbody>${shown.map(
        (index) =>
          html`<tr class=${wrongRows.has(index) ? 'wrong' : nothing}><th scope="row">${index + 1}</th>${even(
            rows[index] ?? [],
            columns.length,
          ).map((entry, at) =>
            entry === undefined
              ? html`<td class="missing">missing</td>`
              : wrong.has(`${index} ${at}`)
                ? html`<td><span class="bad-entry">${entry === '' ? 'empty' : entry}</span><span class="unseen"> (wrong)</span></td>`
                : html`<td class=${columns[at]?.unit === undefined ? '' : 'number'}>${entry}</td>`,
          )}</tr>`,
      )}</tbody></table>${shown.length < rows.length ? html`<p class="quiet">${rows.length - shown.length} more rows</p>` : nothing}</div>`;
  }

  #set(options: Partial<TableTextOptions>) {
    this.options = { ...this.options, ...options };
  }
  #setUnit(at: number, typed: string) {
    const units = [...(this.options.units ?? [])];
    units[at] = typed.trim() === '' ? null : typed.trim();
    this.#set({ units: Array.from(units) });
  }
  #say(name: string, detail: object) {
    this.dispatchEvent(new CustomEvent(name, { detail, bubbles: true }));
  }
  /** Escape leaves the preview alone, not the whole line; Enter in a field of it keeps nothing. */
  #key = (event: KeyboardEvent) => {
    if (event.key === 'Escape') this.#say('table-leave', {});
    else if (event.key !== 'Enter' || event.target instanceof HTMLButtonElement) return;
    else (event.target as HTMLElement).dispatchEvent(new Event('change', { bubbles: true }));
    event.preventDefault();
    event.stopPropagation();
  };
}
