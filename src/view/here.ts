// <ts-here>: a short text or a passage of the sheet's head, shown as it prints and typed where it stands.
//
// 1. What is typed is kept while it is typed, at the first pause, and when the field is left; Escape puts back what stood there.
// 2. A text that cannot be kept stays in its open field, with the reason under it.
// 3. Shown, it is a button named by its label; the focus comes back to it.
// Not here: what the text belongs to (heads.ts, cases-part.ts, references-part.ts).

import { html, nothing, type PropertyValues, type TemplateResult } from 'lit';
import { live } from 'lit/directives/live.js';
import { PageElement } from './element.ts';

export interface HereOption {
  readonly value: string;
  readonly label: string;
}

/** Milliseconds without a key stroke after which the text is kept. */
const pause = 400;
let count = 0;

export class HereElement extends PageElement {
  static override properties = {
    label: { attribute: false },
    value: { attribute: false },
    shown: { attribute: false },
    options: { attribute: false },
    lines: { attribute: false },
    hint: { attribute: false },
    open: { state: true },
    text: { state: true },
  };
  declare label: string;
  declare value: string;
  /** How it prints, where that is not the text itself. */
  declare shown: TemplateResult | readonly TemplateResult[] | null;
  declare options: readonly HereOption[] | null;
  /** More than one: a passage, in which Enter begins a line. */
  declare lines: number;
  declare hint: string;
  declare open: boolean;
  declare text: string;
  /** Keeps the text; false where it could not be. */
  keep: (text: string) => boolean = () => true;
  /** Other texts hang on it: it is kept when it is finished, not at every pause. */
  late = false;
  /** What is wrong with the text, in words. */
  check: (text: string) => string | undefined = () => undefined;
  /** May it be typed now? False where the reason was told. */
  may: () => boolean = () => true;
  #before = '';
  #kept = '';
  #timer: ReturnType<typeof setTimeout> | undefined;
  readonly #id: string;

  constructor() {
    super();
    count += 1;
    this.#id = `here-${count}`;
    this.label = '';
    this.value = '';
    this.shown = null;
    this.options = null;
    this.lines = 1;
    this.hint = '';
    this.open = false;
    this.text = '';
    this.addEventListener('focusout', this.#onLeave);
  }

  override disconnectedCallback() {
    super.disconnectedCallback();
    if (this.open) this.#keep();
    clearTimeout(this.#timer);
  }

  /** Opens the field and selects what stands in it. */
  async edit() {
    if (!this.may()) return;
    this.#before = this.value;
    this.#kept = this.value;
    this.text = this.value;
    this.open = true;
    await this.updateComplete;
    const field = this.#field();
    field?.focus();
    if (field instanceof HTMLInputElement) field.select();
  }

  override focus() {
    const field = this.#field() ?? this.querySelector('button');
    field?.focus();
  }

  #field() {
    return this.querySelector<HTMLInputElement | HTMLTextAreaElement | HTMLSelectElement>('.field');
  }

  protected override willUpdate(changed: PropertyValues<this>) {
    // Taken back while it is typed, or changed in another tab.
    if (this.open && changed.has('value') && this.value !== this.#kept && this.text === this.#kept) {
      this.text = this.value;
      this.#kept = this.value;
    }
  }

  protected override render() {
    return this.open ? this.#typing() : this.#shown();
  }

  #shown() {
    const empty = this.value.trim() === '';
    const edit = () => void this.edit();
    if (this.lines > 1)
      return html`${this.shown ?? this.value}<p class="here-edit"><button type="button" class="word" aria-label=${`${empty ? 'Write' : 'Edit'}: ${this.label}`} @click=${edit}>${empty ? `Write ${this.label.toLowerCase()}` : 'Edit'}</button></p>`;
    // What is seen is part of what is said.
    const seen = empty ? (this.hint === '' ? '–' : this.hint) : this.#optionLabel(this.value);
    return html`<button type="button" class="here ${empty ? 'blank' : ''}" title="Edit" aria-label=${`${this.label}: ${seen}, ${empty ? 'empty' : 'edit'}`} @click=${edit}>${empty ? seen : (this.shown ?? seen)}</button>`;
  }

  #optionLabel(value: string) {
    return this.options?.find((one) => one.value === value)?.label ?? value;
  }

  #typing() {
    const fault = this.check(this.text);
    const note = html`<p class="here-fault" id=${this.#id} role="alert">${fault ?? nothing}</p>`;
    if (this.options !== null) {
      const options = this.options.some((one) => one.value === this.text)
        ? this.options
        : [{ value: this.text, label: this.text }, ...this.options];
      return html`<select class="field" aria-label=${this.label} @keydown=${this.#key} @change=${this.#typed}>
        ${options.map(({ value, label }) => html`<option value=${value} .selected=${value === this.text}>${label}</option>`)}</select>`;
    }
    if (this.lines > 1)
      return html`<textarea class="field" rows=${Math.min(18, Math.max(this.lines, Math.ceil(this.text.length / 72) + 1))} spellcheck="true" aria-label=${this.label}
          .value=${live(this.text)} @input=${this.#typed} @keydown=${this.#key}></textarea>
        <p class="field-hint">${this.hint}</p>
        <div class="cell-actions"><button type="button" title="Ctrl+Enter" @click=${() => this.#close(true)}>Keep</button> <button type="button" title="Escape" @click=${() => this.#close(false)}>Take back</button></div>`;
    return html`<input class="field" type="text" autocomplete="off" spellcheck="false" aria-label=${this.label} aria-invalid=${String(fault !== undefined)}
        aria-describedby=${this.#id} .value=${live(this.text)} @input=${this.#typed} @keydown=${this.#key} />${note}`;
  }

  #typed = (event: Event) => {
    this.text = (event.target as HTMLInputElement).value;
    clearTimeout(this.#timer);
    if (!this.late) this.#timer = setTimeout(() => this.#keep(), this.options === null ? pause : 0);
  };

  /** False where the text cannot be kept. */
  #keep(): boolean {
    clearTimeout(this.#timer);
    if (this.text === this.#kept) return true;
    if (this.check(this.text) !== undefined || !this.keep(this.text)) return false;
    this.#kept = this.text;
    return true;
  }

  #close(keep: boolean) {
    if (!keep) this.text = this.#before;
    if (!this.#keep()) return;
    this.open = false;
    void this.updateComplete.then(() => this.focus());
  }

  #key = (event: KeyboardEvent) => {
    if (event.isComposing) return;
    const keeps = event.key === 'Enter' && (this.lines === 1 || event.ctrlKey || event.metaKey);
    if (keeps || event.key === 'Escape') {
      event.preventDefault();
      this.#close(keeps);
    }
    event.stopPropagation();
  };

  #onLeave = (event: FocusEvent) => {
    // The button that gave way to the field leaves, too.
    const fromButton = event.target instanceof Element && event.target.matches('.here, .here-edit *');
    if (!this.open || fromButton || (event.relatedTarget instanceof Node && this.contains(event.relatedTarget))) return;
    if (this.#keep()) this.open = false;
  };
}
