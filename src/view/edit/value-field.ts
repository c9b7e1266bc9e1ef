// <ts-value-field>: one labelled field for a value, a unit, a formula or a text: a plain input, the quiet line under it, and proposals
// from the browser's own list.
//
// 1. Events bubble: `field-draft` { value } on every change, `field-commit` on Enter, `field-cancel` on Escape.
// 2. What is typed is never changed unasked; a correction is applied by its button or Alt+Enter.
// Not here: what is wrong with the text (field-checks.ts).

import { html, nothing } from 'lit';
import { live } from 'lit/directives/live.js';
import type { Fix, Problem } from '../../quantity/index.ts';
import { PageElement } from '../element.ts';
import type { Proposals } from './assist.ts';
import { keepKeys } from './keep-keys.ts';
import { focusFixes, problemLine } from './problem-line.ts';

let count = 0;
const nextId = (stem: string) => {
  count += 1;
  return `${stem}-${count}`;
};

export class ValueFieldElement extends PageElement {
  static override properties = {
    label: { attribute: false },
    value: { attribute: false },
    problems: { attribute: false },
    good: { attribute: false },
    hint: { attribute: false },
    lines: { attribute: false },
    propose: { attribute: false },
  };
  declare label: string;
  declare value: string;
  declare problems: readonly Problem[];
  /** What the text means, where nothing is wrong with it. */
  declare good: string;
  declare hint: string;
  /** More than one: a text of several lines, in which Enter begins the next. */
  declare lines: number;
  declare propose: ((text: string, caret: number) => Proposals | undefined) | null;
  readonly #id = nextId('field');

  constructor() {
    super();
    this.label = '';
    this.value = '';
    this.problems = [];
    this.good = '';
    this.hint = '';
    this.lines = 1;
    this.propose = null;
    this.addEventListener('keydown', keepKeys);
  }

  #field() {
    return this.querySelector<HTMLInputElement | HTMLTextAreaElement>('input, textarea');
  }
  override focus() {
    this.#field()?.focus();
  }
  select() {
    this.#field()?.select();
  }

  protected override render() {
    const wrong = this.problems.some((problem) => problem.severity === 'error');
    const described = `${this.#id}-note ${this.hint === '' ? '' : `${this.#id}-hint`}`.trim();
    const list = this.#options();
    const field =
      this.lines > 1
        ? html`<textarea id=${this.#id} class="field" rows=${this.lines} spellcheck="true" aria-describedby=${described}
            aria-invalid=${String(wrong)} .value=${live(this.value)} @input=${this.#typed} @keydown=${this.#key}></textarea>`
        : html`<input id=${this.#id} class="field" type="text" spellcheck="false" autocomplete="off" autocapitalize="off"
            list=${list.length === 0 ? nothing : `${this.#id}-list`} aria-describedby=${described} aria-invalid=${String(wrong)}
            .value=${live(this.value)} @input=${this.#typed} @keydown=${this.#key} />`;
    return html`<label for=${this.#id}>${this.label}</label>${field}
      ${list.length === 0 ? nothing : html`<datalist id="${this.#id}-list">${list.map(({ value, detail }) => html`<option value=${value}>${detail}</option>`)}</datalist>`}
      ${this.hint === '' ? nothing : html`<p class="field-hint" id="${this.#id}-hint">${this.hint}</p>`}
      ${problemLine({ problems: this.problems, good: this.good, apply: this.#apply, back: () => this.focus(), id: `${this.#id}-note` })}`;
  }

  /** Whole texts, as the browser's list replaces the whole field. */
  #options(): readonly { readonly value: string; readonly detail: string }[] {
    const caret = this.#field()?.selectionStart ?? this.value.length;
    const found = this.lines > 1 ? undefined : this.propose?.(this.value, caret);
    if (found === undefined) return [];
    return found.list.slice(0, 24).map(({ label, write, detail }) => ({
      value: this.value.slice(0, found.from) + (write ?? label) + this.value.slice(found.to),
      detail: [label, detail].filter((part) => part !== '').join(' · '),
    }));
  }

  #apply = (fix: Fix) => {
    this.focus();
    this.#set(this.value.slice(0, fix.from) + fix.text + this.value.slice(fix.to));
  };
  #typed(event: Event) {
    this.#set((event.target as HTMLInputElement).value);
  }
  #set(value: string) {
    this.value = value;
    this.#say('field-draft');
  }
  #say(name: string) {
    this.dispatchEvent(new CustomEvent(name, { detail: { value: this.value }, bubbles: true }));
  }
  #key(event: KeyboardEvent) {
    if (event.isComposing || event.ctrlKey || event.metaKey) return;
    const [fix] = this.problems.flatMap((problem) => problem.fixes ?? []);
    if (event.key === 'Enter' && event.altKey) {
      if (fix) this.#apply(fix);
    } else if (event.key === 'Enter' && this.lines === 1) this.#say('field-commit');
    else if (event.key === 'Escape') this.#say('field-cancel');
    else if (event.key !== 'ArrowDown' || event.altKey || this.lines > 1 || !focusFixes(this)) return;
    event.preventDefault();
  }
}
