// <ts-line-editor>: one line that is typed into. A plain field at once; the editor of formulas takes its place as soon as it is loaded.
//
// 1. What is typed before the editor is there is kept, with the caret and the focus.
// 2. Events, composed and bubbling: `line-draft` { text } on every change, `line-commit` on Enter, `line-cancel` on Escape,
//    `line-below` on the arrow down where no list is open (cancelable: prevented where somebody took the focus).
// 3. Named by `label`; what is wrong is told by `describedBy`, an element outside.
// Not here: what the text means; the editor itself (code-mirror.ts).

import type { Fix, Problem } from '../../quantity/index.ts';
import type { Proposals } from './assist.ts';
import type { LineView } from './code-mirror.ts';
import { keepKeys } from './keep-keys.ts';
import { lineSheet } from './line-style.ts';
import type { Mark } from './marks.ts';

let sheet: CSSStyleSheet | undefined;

function sharedSheet(): CSSStyleSheet {
  if (sheet === undefined) {
    sheet = new CSSStyleSheet();
    sheet.replaceSync(lineSheet);
  }
  return sheet;
}

export class LineEditorElement extends HTMLElement {
  marks: (text: string) => readonly Mark[] = () => [];
  propose: (text: string, caret: number, asked: boolean) => Proposals | undefined = () => undefined;
  #text = '';
  #label = '';
  #problems: readonly Problem[] = [];
  #describedBy: HTMLElement | null = null;
  #placeholder = '';
  #root = this.attachShadow({ mode: 'open', delegatesFocus: true });
  #input: HTMLInputElement | null = null;
  #view: LineView | null = null;
  /** Resolves when the editor stands in the place of the plain field. */
  ready: Promise<void> = Promise.resolve();

  constructor() {
    super();
    this.#root.adoptedStyleSheets = [sharedSheet()];
    this.addEventListener('keydown', keepKeys);
  }

  get text(): string {
    return this.#text;
  }
  set text(text: string) {
    if (text === this.#text) return;
    this.#text = text;
    if (this.#input) this.#input.value = text;
    this.#view?.setText(text);
  }
  get label(): string {
    return this.#label;
  }
  set label(label: string) {
    this.#label = label;
    this.#attributes();
  }
  set placeholder(text: string) {
    this.#placeholder = text;
    this.#attributes();
  }
  set problems(problems: readonly Problem[]) {
    this.#problems = problems;
    this.#view?.setProblems(problems);
    this.#attributes();
  }
  set describedBy(element: HTMLElement | null) {
    this.#describedBy = element;
    this.#attributes();
  }

  connectedCallback() {
    if (this.#input !== null || this.#view !== null) return;
    const input = document.createElement('input');
    input.type = 'text';
    input.spellcheck = false;
    input.autocomplete = 'off';
    input.setAttribute('autocapitalize', 'off');
    input.value = this.#text;
    input.addEventListener('input', () => this.#typed(input.value));
    input.addEventListener('keydown', (event) => this.#key(event));
    this.#root.replaceChildren(input);
    this.#input = input;
    this.#attributes();
    this.ready = this.#load();
  }
  disconnectedCallback() {
    this.#view?.destroy();
    this.#view = null;
    this.#input = null;
    this.#root.replaceChildren();
  }

  override focus() {
    if (this.#view) this.#view.focus();
    else this.#input?.focus();
  }
  /** The caret to the end, or all selected. */
  select(all: boolean) {
    this.#input?.setSelectionRange(all ? 0 : this.#text.length, this.#text.length);
  }
  applyFix(fix: Fix) {
    if (this.#view) this.#view.applyFix(fix);
    else {
      this.text = this.#text.slice(0, fix.from) + fix.text + this.#text.slice(fix.to);
      this.#say('line-draft');
      this.focus();
    }
  }
  /** The sheet has moved: names may be known now that were not. */
  refresh() {
    this.#view?.refresh();
  }

  async #load() {
    const { createLineView } = await import('./code-mirror.ts');
    const input = this.#input;
    if (input === null || !this.isConnected || this.#view !== null) return;
    const focused = this.#root.activeElement === input;
    const holder = document.createElement('div');
    holder.className = 'view';
    input.after(holder);
    this.#view = createLineView({
      root: this.#root,
      parent: holder,
      text: this.#text,
      selection: [input.selectionStart ?? this.#text.length, input.selectionEnd ?? this.#text.length],
      marks: (text) => this.marks(text),
      propose: (text, caret, asked) => this.propose(text, caret, asked),
      typed: (text) => this.#typed(text),
      commit: () => this.#say('line-commit'),
      cancel: () => this.#say('line-cancel'),
      below: () => !this.#say('line-below'),
    });
    this.#view.setProblems(this.#problems);
    this.#attributes();
    if (focused) this.#view.focus();
    this.#input = null;
    input.remove();
  }

  #typed(text: string) {
    if (text === this.#text) return;
    this.#text = text;
    this.#say('line-draft');
  }
  #say(name: string) {
    return this.dispatchEvent(
      new CustomEvent(name, { detail: { text: this.#text }, bubbles: true, composed: true, cancelable: true }),
    );
  }
  #key(event: KeyboardEvent) {
    if (event.isComposing || event.ctrlKey || event.metaKey) return;
    const [fix] = this.#problems.flatMap((problem) => problem.fixes ?? []);
    if (event.key === 'Enter' && event.altKey && fix) this.applyFix(fix);
    else if (event.altKey) return;
    else if (event.key === 'Enter') this.#say('line-commit');
    else if (event.key === 'Escape') this.#say('line-cancel');
    else if (event.key !== 'ArrowDown' || this.#say('line-below')) return;
    event.preventDefault();
    event.stopPropagation();
  }

  #attributes() {
    const wrong = this.#problems.some((problem) => problem.severity === 'error');
    const attributes: Record<string, string> = {
      'aria-label': this.#label,
      'aria-multiline': 'false',
      'aria-invalid': String(wrong),
      spellcheck: 'false',
      autocapitalize: 'off',
      autocorrect: 'off',
      ...(this.#placeholder === '' ? {} : { 'aria-placeholder': this.#placeholder }),
      ...(this.#problems.some((problem) => (problem.fixes ?? []).length > 0) ? { 'aria-keyshortcuts': 'Alt+Enter' } : {}),
    };
    this.#view?.setAttributes(attributes);
    const { 'aria-multiline': _, 'aria-placeholder': _placeholder, ...plain } = attributes;
    for (const [key, value] of Object.entries(plain)) this.#input?.setAttribute(key, value);
    const target = this.#view?.content ?? this.#input;
    // The sentence stands outside the shadow root: only the reflected form of the attribute reaches it.
    if (target && 'ariaDescribedByElements' in target)
      (target as { ariaDescribedByElements: readonly Element[] | null }).ariaDescribedByElements = this.#describedBy
        ? [this.#describedBy]
        : null;
  }
}
