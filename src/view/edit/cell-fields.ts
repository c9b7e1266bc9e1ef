// <ts-cell-fields>: everything of one cell as a form beside or under its line, whatever its kind.
//
// 1. The sheet is not touched: `draft` { cell } on every change, `commit` { cell, before, renamed } on Enter or by the button, `cancel`
//    { cell } on Escape with the cell of before. All bubble.
// 2. `renamed` { from, to } says that the quantity got another name, so that the host can rename it wherever it is used.
// 3. A field says what is wrong with its own text; a cell with an error can be kept, as every line of a sheet.
// Not here: which fields a kind has (cell-forms.ts), tables row by row (../table/).

import { html, nothing, type TemplateResult } from 'lit';
import { live } from 'lit/directives/live.js';
import { canonicalName } from '../../formula/index.ts';
import { readProse } from '../../record/index.ts';
import type { Calculation, Cell } from '../../sheet/index.ts';
import { PageElement } from '../element.ts';
import { prose } from '../text.ts';
import { describeValues } from './assist.ts';
import { type CellField, fieldsOf, fieldText, withFieldText } from './cell-forms.ts';
import { checkField, proposeInField } from './field-checks.ts';
import { keepKeys } from './keep-keys.ts';

export interface CellDetail {
  readonly cell: Cell;
  readonly before: Cell;
  readonly renamed: { readonly from: string; readonly to: string } | undefined;
}

const kindWords: Readonly<Record<Cell['kind'], string>> = {
  heading: 'Heading',
  note: 'Note',
  given: 'Given',
  derived: 'Derived quantity',
  criterion: 'Criterion',
  sought: 'Sought quantity',
  table: 'Table',
  drawing: 'Drawing',
  chart: 'Chart',
  figure: 'Figure',
};

let count = 0;
const nextId = (stem: string) => {
  count += 1;
  return `${stem}-${count}`;
};

export class CellFieldsElement extends PageElement {
  static override properties = { calculation: { attribute: false }, cell: { attribute: false }, draft: { state: true } };
  declare calculation: Calculation;
  /** The cell to be edited; another one begins anew. */
  declare cell: Cell;
  declare draft: Cell;
  #of: Cell | undefined;
  readonly #id = nextId('cell-fields');

  constructor() {
    super();
    this.addEventListener('keydown', keepKeys);
  }

  /** Puts the focus on the field of this key, else on the first. */
  focusOn(key?: string) {
    const field = key === undefined ? null : this.querySelector<HTMLElement>(`[data-key="${CSS.escape(key)}"]`);
    (field ?? this.querySelector<HTMLElement>('[data-key]'))?.focus();
  }

  protected override willUpdate() {
    if (this.#of !== undefined && this.#of.id === this.cell.id) return;
    this.#of = this.cell;
    this.draft = this.cell;
  }

  protected override render() {
    const fields = fieldsOf(this.draft, this.calculation);
    return html`<form class="cell-fields" aria-label="${kindWords[this.draft.kind]}: all fields" @submit=${this.#submit} @keydown=${this.#key}>
      ${fields.map((field) => html`<div class="cell-field ${field.input}">${this.#field(field)}</div>`)}
      ${this.draft.kind === 'table' ? html`<ts-table-editor .cell=${this.draft} .calculation=${this.calculation} @table-change=${(event: CustomEvent<{ cell: Cell }>) => this.#change(event.detail.cell)}></ts-table-editor>` : nothing}
      <div class="cell-actions"><button type="submit">Keep</button> <button type="button" @click=${this.#cancel}>Take back</button></div>
    </form>`;
  }

  #field(field: CellField): TemplateResult {
    const text = fieldText(this.draft, field.key);
    const change = (typed: string) => this.#change(withFieldText(this.draft, field, typed));
    const id = `${this.#id}-${field.key.replace(/[^\w-]/gu, '-')}`;
    if (field.input === 'choice') return choice(id, field, text, change);
    if (field.input === 'check')
      return html`<label class="check"><input type="checkbox" data-key=${field.key} .checked=${live(text === 'true')}
        @change=${(event: Event) => change(String((event.target as HTMLInputElement).checked))} /> ${field.label}</label>`;
    const { problems, good } = checkField(this.draft, field, this.calculation);
    const lines = field.input === 'prose' ? 6 : field.input === 'area' ? 2 : 1;
    return html`<ts-value-field data-key=${field.key} .label=${field.label} .value=${text} .problems=${problems} .good=${good}
        .hint=${field.hint ?? ''} .lines=${lines}
        .propose=${(typed: string, caret: number) => proposeInField(this.draft, field, typed, caret, this.calculation)}
        @field-draft=${(event: CustomEvent<{ value: string }>) => change(event.detail.value)}
        @field-commit=${this.#commit} @field-cancel=${this.#cancel}></ts-value-field>
      ${field.input === 'prose' ? this.#preview(text) : nothing}`;
  }

  /** As the record prints it, with the values of now. */
  #preview(text: string) {
    const withValues = text.replace(/\{([^{}\n]{1,100})\}/gu, (whole, named: string) => {
      const state = this.calculation.named(canonicalName(named.trim()));
      return state === undefined ? whole : describeValues(state, this.calculation) || whole;
    });
    return html`<div class="preview" role="group" aria-label="As it will print"><div class="prose">${prose(readProse(withValues))}</div></div>`;
  }

  #change(cell: Cell) {
    this.draft = cell;
    this.#tell('draft', cell);
  }
  #submit(event: Event) {
    event.preventDefault();
    this.#commit();
  }
  #commit = () => this.#tell('commit', this.draft);
  #cancel = () => {
    this.draft = this.cell;
    this.#tell('cancel', this.cell);
  };
  #key(event: KeyboardEvent) {
    if (event.key !== 'Escape' || event.defaultPrevented) return;
    event.preventDefault();
    this.#cancel();
  }
  #tell(name: 'draft' | 'commit' | 'cancel', cell: Cell) {
    const before = this.#of ?? this.cell;
    const isQuantity = cell.kind === 'given' || cell.kind === 'derived' || cell.kind === 'sought';
    const from = isQuantity && 'name' in before ? canonicalName(before.name) : '';
    const to = isQuantity ? canonicalName(cell.name) : '';
    const detail: CellDetail = { cell, before, renamed: from === to ? undefined : { from, to } };
    this.dispatchEvent(new CustomEvent(name, { detail, bubbles: true }));
  }
}

function choice(id: string, field: CellField, text: string, change: (typed: string) => void): TemplateResult {
  const options = field.options ?? [];
  const known = options.some((one) => one.value === text);
  return html`<label for=${id}>${field.label}</label><select id=${id} data-key=${field.key}
      @change=${(event: Event) => change((event.target as HTMLSelectElement).value)}>
      ${known || text === '' ? nothing : html`<option value=${text} selected>${text}</option>`}
      ${options.map(({ value, label }) => html`<option value=${value} .selected=${value === text}>${label}</option>`)}
    </select>`;
}
