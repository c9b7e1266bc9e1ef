// <ts-entry-line>: the one empty line at the foot of a section. It takes anything and says in one quiet line what it will become.
//
// 1. `entry` { draft, text, entry } on Enter, bubbling: the host inserts the cell and the line is empty again. A line with an error is
//    kept all the same, as every line of a sheet; an empty one tells nothing.
// 2. `entry-draft` (the text) on every change, so that the host can keep what is typed.
// 3. `cancel` on Escape in an empty line; Escape in a written one empties it.
// Not here: the forms of lines (entry.ts).

import { html, type PropertyValues } from 'lit';
import type { Fix } from '../../quantity/index.ts';
import type { Calculation } from '../../sheet/index.ts';
import { PageElement } from '../element.ts';
import { proposeInEntry } from './assist.ts';
import { type CellDraft, type Entry, readEntry } from './entry.ts';
import { type EntryHelp, entryScope, helpEntry } from './entry-help.ts';
import type { LineEditorElement } from './line-editor.ts';
import { marksOfEntry } from './marks.ts';
import { focusFixes, problemLine } from './problem-line.ts';

export interface EntryDetail {
  readonly draft: CellDraft;
  readonly text: string;
  readonly entry: Entry;
}

export class EntryLineElement extends PageElement {
  static override properties = { calculation: { attribute: false }, text: { attribute: false }, label: { attribute: false } };
  declare calculation: Calculation;
  declare text: string;
  declare label: string;
  #help: EntryHelp | undefined;

  constructor() {
    super();
    this.text = '';
    this.label = 'New line';
  }

  get help(): EntryHelp {
    this.#help ??= helpEntry(this.text, this.calculation);
    return this.#help;
  }

  override focus() {
    this.#line()?.focus();
  }

  #line() {
    return this.querySelector<LineEditorElement>('ts-line-editor');
  }

  protected override willUpdate() {
    this.#help = undefined;
  }

  protected override render() {
    const { problems, hint } = this.help;
    return html`<div class="edit-line">
        <ts-line-editor .text=${this.text} .label=${this.label} .problems=${problems} .marks=${this.#marks} .propose=${this.#propose}
          @line-draft=${this.#draft} @line-commit=${this.#commit} @line-cancel=${this.#cancel} @line-below=${this.#below}></ts-line-editor>
      </div>
      <p class="edit-becomes">${hint}</p>
      ${problemLine({ problems, good: '', apply: this.#apply, back: this.#back })}`;
  }

  protected override updated(changed: PropertyValues<this>) {
    const line = this.#line();
    if (line === null) return;
    line.describedBy = this.querySelector<HTMLElement>(problemsOf(this) ? '.edit-words' : '.edit-becomes');
    if (changed.has('calculation')) line.refresh();
  }

  #marks = (text: string) => {
    const scope = entryScope(this.calculation);
    return marksOfEntry(readEntry(text, scope), scope.knows);
  };
  #propose = (text: string, caret: number, asked: boolean) =>
    proposeInEntry(readEntry(text, entryScope(this.calculation)), caret, { calculation: this.calculation, asked });
  #back = () => this.#line()?.focus();
  #apply = (fix: Fix) => this.#line()?.applyFix(fix);

  #draft(event: CustomEvent<{ text: string }>) {
    event.stopPropagation();
    this.text = event.detail.text;
    this.#help = undefined;
    this.#tell();
  }
  #commit(event: Event) {
    event.stopPropagation();
    const { entry } = this.help;
    if (entry.draft === undefined) return;
    const detail: EntryDetail = { draft: entry.draft, text: this.text, entry };
    this.text = '';
    this.#tell();
    this.dispatchEvent(new CustomEvent('entry', { detail, bubbles: true }));
  }
  #cancel(event: Event) {
    event.stopPropagation();
    if (this.text === '') this.dispatchEvent(new CustomEvent('cancel', { bubbles: true }));
    this.text = '';
    this.#tell();
  }
  #tell() {
    this.dispatchEvent(new CustomEvent('entry-draft', { detail: this.text, bubbles: true }));
  }
  #below(event: Event) {
    event.stopPropagation();
    if (focusFixes(this)) event.preventDefault();
  }
}

const problemsOf = (element: EntryLineElement) => element.help.problems.length > 0;
