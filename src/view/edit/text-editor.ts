// <ts-text-editor>: the words of a heading or a note, typed where they stand.
//
// 1. The sheet is not touched: `draft` { cell } on every change, `commit` on Enter (of a note: Ctrl+Enter) or by the button, `cancel` on
//    Escape. All bubble.
// 2. Behind an open brace of a note the names of the sheet are offered; what is chosen closes the brace.
// 3. How a note will print is shown by its line, which follows the draft.
// Not here: the other fields of the cell (cell-fields.ts), what the text means (src/record/prose.ts).

import { html, nothing } from 'lit';
import { live } from 'lit/directives/live.js';
import { plainName } from '../../formula/index.ts';
import { type Calculation, type Cell, quantityNames } from '../../sheet/index.ts';
import { PageElement } from '../element.ts';
import { keepKeys } from './keep-keys.ts';

type TextCell = Extract<Cell, { kind: 'heading' | 'note' }>;

export interface TextDetail {
  readonly cell: TextCell;
}

const mostOffered = 8;

export class TextEditorElement extends PageElement {
  static override properties = {
    calculation: { attribute: false },
    cell: { attribute: false },
    draft: { state: true },
    open: { state: true },
  };
  declare calculation: Calculation;
  /** The cell to be edited; another one begins anew. */
  declare cell: TextCell;
  declare draft: TextCell;
  /** What is typed behind an open brace at the caret; null where there is none. */
  declare open: string | null;
  #of: string | undefined;

  constructor() {
    super();
    this.open = null;
    this.addEventListener('keydown', keepKeys);
  }

  protected override willUpdate() {
    if (this.#of === this.cell.id) return;
    this.#of = this.cell.id;
    this.draft = this.cell;
  }

  #field() {
    return this.querySelector<HTMLInputElement | HTMLTextAreaElement>('.field');
  }
  /** The caret behind what stands there. */
  override focus() {
    const field = this.#field();
    field?.focus();
    field?.setSelectionRange(field.value.length, field.value.length);
  }

  protected override render() {
    const { draft } = this;
    return draft.kind === 'heading' ? this.#heading(draft) : this.#note(draft.text);
  }

  #heading(cell: Extract<TextCell, { kind: 'heading' }>) {
    const rank = cell.level ?? 1;
    return html`<div class="text-heading">
        <input class="field" type="text" spellcheck="true" aria-label="Heading" .value=${live(cell.text)} @input=${this.#typed} @keydown=${this.#key} />
        <label>Rank <select @change=${(event: Event) => this.#rank(Number((event.target as HTMLSelectElement).value))} @keydown=${this.#key}>
          ${[1, 2, 3].map((one) => html`<option value=${one} .selected=${one === rank}>${one}</option>`)}</select></label>
      </div>${this.#actions('Enter')}`;
  }

  #note(text: string) {
    const rows = Math.min(16, Math.max(3, text.split('\n').length + 1, Math.ceil(text.length / 80)));
    const names = this.#offered();
    return html`<textarea class="field" rows=${rows} spellcheck="true" aria-label="Note" aria-describedby="text-hint" .value=${live(text)}
        @input=${this.#typed} @keydown=${this.#key} @keyup=${this.#caret} @click=${this.#caret}></textarea>
      ${
        names.length === 0
          ? nothing
          : html`<p class="edit-fixes"><span>Value of</span> ${names.map((name) => html`<button type="button" class="word" @click=${() => this.#take(name)}>${plainName(name)}</button> `)}</p>`
      }
      <p class="field-hint" id="text-hint">**strong**, *emphasis*, lists with - or 1., a value as {${names[0] ?? this.#anyName()}}</p>
      ${this.#actions('Ctrl+Enter')}`;
  }

  #actions(key: string) {
    return html`<div class="cell-actions"><button type="button" title=${key} @click=${this.#commit}>Keep</button> <button type="button" title="Escape" @click=${this.#cancel}>Take back</button></div>`;
  }

  #anyName() {
    for (const name of quantityNames(this.calculation)) return plainName(name);
    return 'F_1';
  }

  #offered(): readonly string[] {
    if (this.open === null) return [];
    const begun = this.open.trim().toLowerCase();
    const names = [...new Set(quantityNames(this.calculation))].filter((name) => name !== '');
    const exact = names.filter((name) => plainName(name).toLowerCase().startsWith(begun));
    const found = exact.length > 0 ? exact : names.filter((name) => plainName(name).toLowerCase().includes(begun));
    return found.slice(0, mostOffered);
  }

  #caret = () => {
    const field = this.#field();
    const before = field?.value.slice(0, field.selectionStart ?? 0) ?? '';
    this.open = /\{([^{}\n]{0,60})$/u.exec(before)?.[1] ?? null;
  };

  #take(name: string) {
    const field = this.#field();
    if (field === null || this.open === null) return;
    const caret = field.selectionStart ?? field.value.length;
    const from = caret - this.open.length;
    const behind = field.value.slice(caret).replace(/^\}/u, '');
    const written = `${field.value.slice(0, from)}${plainName(name)}}`;
    this.open = null;
    this.#set(`${written}${behind}`);
    field.value = `${written}${behind}`;
    field.focus();
    field.setSelectionRange(written.length, written.length);
  }

  #rank(level: number) {
    if (this.draft.kind !== 'heading' || (level !== 1 && level !== 2 && level !== 3)) return;
    this.draft = { ...this.draft, level };
    this.#tell('draft');
  }
  #typed = (event: Event) => {
    this.#set((event.target as HTMLInputElement).value);
    this.#caret();
  };
  #set(text: string) {
    this.draft = { ...this.draft, text };
    this.#tell('draft');
  }
  #commit = () => this.#tell('commit');
  #cancel = () => this.#tell('cancel');

  #key = (event: KeyboardEvent) => {
    if (event.isComposing || event.altKey) return;
    const keeps = event.key === 'Enter' && (this.draft.kind === 'heading' || event.ctrlKey || event.metaKey);
    if (!keeps && event.key !== 'Escape') return;
    event.preventDefault();
    event.stopPropagation();
    this.#tell(keeps ? 'commit' : 'cancel');
  };

  #tell(name: 'draft' | 'commit' | 'cancel') {
    const detail: TextDetail = { cell: name === 'cancel' ? this.cell : this.draft };
    this.dispatchEvent(new CustomEvent(name, { detail, bubbles: true }));
  }
}
