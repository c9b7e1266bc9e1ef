// <ts-formula-editor>: the formula of one line, edited where it stands: what is typed, below it the line as it will print, below that
// one quiet sentence about units and closing, or what is wrong and its correction.
//
// 1. The sheet is not touched: every change is told (`draft`), and the host decides. `commit` comes on Enter, `cancel` on Escape with
//    the text of before.
// 2. While the text cannot be read, the last line that could be stands there, marked as that.
// 3. Events bubble: CustomEvent `draft`, `commit`, `cancel`, each with detail { text, keys, problems, results }. A commit has keys.
// Not here: the typed line (line-editor.ts), what it means (live.ts).

import { html, nothing, type PropertyValues } from 'lit';
import type { Fix, Problem } from '../../quantity/index.ts';
import type { Calculation } from '../../sheet/index.ts';
import { PageElement } from '../element.ts';
import { proposeInFormula } from './assist.ts';
import type { LineEditorElement } from './line-editor.ts';
import { type LineForm, type LineKeys, type Live, live } from './live.ts';
import { marksOfFormula } from './marks.ts';
import { focusFixes, problemLine } from './problem-line.ts';

export interface FormulaDetail {
  readonly text: string;
  readonly keys: LineKeys | undefined;
  readonly problems: readonly Problem[];
  readonly results: readonly string[];
}

export class FormulaEditorElement extends PageElement {
  static override properties = {
    calculation: { attribute: false },
    form: { attribute: false },
    text: { attribute: false },
    name: { attribute: false },
    unit: { attribute: false },
    cell: { attribute: false },
    reading: { attribute: false },
    label: { attribute: false },
  };
  declare calculation: Calculation;
  declare form: LineForm;
  /** What is typed; set by the host when editing begins. */
  declare text: string;
  /** The quantity that the line defines, '' for a criterion. */
  declare name: string;
  declare unit: string;
  /** Id of the cell; '' for one that is not there yet. */
  declare cell: string;
  declare reading: number;
  declare label: string;
  #before: string | undefined;
  #lastTex = '';
  #live: Live | undefined;

  constructor() {
    super();
    this.form = 'formula';
    this.text = '';
    this.name = '';
    this.unit = '';
    this.cell = '';
    this.reading = 0;
    this.label = 'Formula';
  }

  /** What the typed text is now. */
  get live(): Live {
    const place = {
      reading: this.reading,
      ...(this.cell === '' ? {} : { cell: this.cell }),
      ...(this.name === '' ? {} : { name: this.name }),
      ...(this.unit === '' ? {} : { unit: this.unit }),
    };
    this.#live ??= live(this.form, this.text, this.calculation, place);
    return this.#live;
  }

  override focus() {
    this.#line()?.focus();
  }

  #line() {
    return this.querySelector<LineEditorElement>('ts-line-editor');
  }

  protected override willUpdate() {
    this.#before ??= this.text;
    this.#live = undefined;
  }

  protected override render() {
    const now = this.live;
    if (now.tex !== '') this.#lastTex = now.tex;
    const shown = now.tex === '' ? this.#lastTex : now.tex;
    const problems = [...now.problems, ...(now.unitProblem ? [unitNote(now.unitProblem)] : [])];
    return html`<div class="edit-line">
        ${this.name === '' || this.form === 'equation' ? nothing : html`<span class="edit-head" aria-hidden="true">${this.name} =</span>`}
        <ts-line-editor .text=${this.text} .label=${this.label} .problems=${now.problems}
          .marks=${this.#marks} .propose=${this.#propose}
          @line-draft=${this.#draft} @line-commit=${this.#commit} @line-cancel=${this.#cancel} @line-below=${this.#below}></ts-line-editor>
      </div>
      <div class="edit-typeset ${now.tex === '' ? 'stale' : ''}">${shown === '' ? nothing : html`<ts-math .tex=${shown}></ts-math>`}</div>
      ${problemLine({ problems, good: now.words, apply: this.#apply, back: this.#back })}`;
  }

  protected override updated(changed: PropertyValues<this>) {
    const line = this.#line();
    if (line === null) return;
    line.describedBy = this.querySelector<HTMLElement>('.edit-words');
    if (changed.has('calculation')) line.refresh();
  }

  #marks = (text: string) => marksOfFormula(text, (name) => this.calculation.named(name) !== undefined || name === this.name);
  #propose = (text: string, caret: number, asked: boolean) =>
    proposeInFormula(text, caret, { calculation: this.calculation, asked, ...(this.name === '' ? {} : { own: this.name }) });
  #back = () => this.#line()?.focus();
  #apply = (fix: Fix) => this.#line()?.applyFix(fix);

  #draft(event: CustomEvent<{ text: string }>) {
    event.stopPropagation();
    this.#before ??= this.text;
    this.text = event.detail.text;
    this.#live = undefined;
    this.#tell('draft');
  }
  #commit(event: Event) {
    event.stopPropagation();
    if (this.live.keys === undefined) return;
    this.#tell('commit');
  }
  #cancel(event: Event) {
    event.stopPropagation();
    this.text = this.#before ?? this.text;
    this.#live = undefined;
    this.#tell('cancel');
  }
  #below(event: Event) {
    event.stopPropagation();
    if (focusFixes(this)) event.preventDefault();
  }
  #tell(name: 'draft' | 'commit' | 'cancel') {
    const { keys, problems, results } = this.live;
    const detail: FormulaDetail = { text: this.text, keys, problems, results };
    this.dispatchEvent(new CustomEvent(name, { detail, bubbles: true }));
  }
}

/** About the unit, which is typed in its own field: no place and no correction in this text. */
const unitNote = ({ at: _at, fixes: _fixes, message, ...rest }: Problem): Problem => ({
  ...rest,
  message: `the unit: ${message}`,
});
