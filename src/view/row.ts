// <ts-row>: one line of the sheet as a row of the ruled sheet: source, calculation, one result a case.
//
// 1. A row is drawn again only when its line, its problems, the case that is read or its own state of editing changed.
// 2. Cells are numbered from the left: 0 source, 1 calculation, 2… results. One cell of the whole sheet is in the tab order.
// 3. It writes nothing but through the desk.
// Not here: moving between cells (paper.ts), the field that is typed into (editor.ts), other kinds of lines (lines.ts).

import { html, nothing, type PropertyValues, type TemplateResult } from 'lit';
import type { Line, RecordCase, Step, StepCase } from '../record/index.ts';
import type { CellProblem } from '../sheet/index.ts';
import type { Desk, Editing, InPlace } from './desk.ts';
import { choicesOf, editorField, editorNotes, focusField, sourceEditor } from './editor.ts';
import { PageElement } from './element.ts';
import { equation } from './equation.ts';
import { heldValue } from './given.ts';
import { fieldsInPlace, focusInPlace, formulaInPlace, textInPlace } from './in-place.ts';
import { lineActions, lineWords } from './line-actions.ts';
import { otherLine } from './lines.ts';
import { quantity, source } from './text.ts';
import { waits } from './waiting.ts';

export class RowElement extends PageElement {
  static override properties = {
    desk: { attribute: false },
    line: { attribute: false },
    cases: { attribute: false },
    problems: { attribute: false },
    reading: { attribute: false },
    column: { attribute: false },
    chosen: { attribute: false },
    inRun: { attribute: false },
    menu: { attribute: false },
    editing: { attribute: false },
    inPlace: { attribute: false },
    printing: { attribute: false },
    former: { attribute: false },
    beside: { attribute: false },
    foldable: { attribute: false },
  };
  declare desk: Desk;
  declare line: Line;
  declare cases: readonly RecordCase[];
  declare problems: readonly CellProblem[];
  declare reading: number;
  /** The cell of this row that is in the tab order; -1: none. */
  declare column: number;
  declare chosen: boolean;
  /** One of the chosen lines. */
  declare inRun: boolean;
  /** The commands of the line are unfolded. */
  declare menu: boolean;
  declare editing: Editing | null;
  declare inPlace: InPlace | null;
  declare printing: boolean;
  /** A source that stood beside the number before the last one, and could be kept. */
  declare former: string;
  /** What stands under the row in a narrow window. */
  declare beside: TemplateResult | null;
  declare foldable: boolean;

  /** What is due is drawn before this returns. */
  drawNow() {
    if (this.isUpdatePending) this.performUpdate();
  }

  protected override render() {
    const { line } = this;
    if (line.kind !== 'step')
      return otherLine(
        line,
        (column) => (this.column === column ? 0 : -1),
        this.problems,
        this.cases,
        html`${this.#words()}${this.#actions()}${this.#all()}`,
        this.inPlace?.what === 'text' ? textInPlace(this.desk, this.inPlace) : nothing,
      );
    return this.#step(line.step);
  }

  protected override updated(changed: PropertyValues<this>) {
    const { line, chosen } = this;
    const choices = line.kind === 'step' && this.querySelector('.across') !== null;
    this.className = `row ${line.kind}${choices ? ' choices' : ''}${line.kind === 'step' ? ` ${line.step.kind}` : ''}${chosen ? ' chosen' : ''}${this.inRun ? ' in-run' : ''}`;
    this.setAttribute('aria-selected', String(this.inRun));
    if (changed.has('editing') && this.editing !== null && changed.get('editing')?.field !== this.editing.field) focusField(this);
    if (changed.has('inPlace') && this.inPlace !== null && changed.get('inPlace')?.what !== this.inPlace.what)
      void focusInPlace(this);
  }

  /** All of the line as a form, where it is edited so. */
  #all() {
    const { inPlace } = this;
    return inPlace?.what === 'fields'
      ? html`<div class="below">${fieldsInPlace(this.desk, inPlace)}${this.#brought()}</div>`
      : nothing;
  }

  /** What can be done with the line, in words at the line. */
  get #isQuiet() {
    return this.chosen && !this.printing && this.desk.locked === null && this.inPlace === null && this.editing === null;
  }
  #words() {
    return this.#isQuiet ? lineWords(this.menu) : nothing;
  }
  #actions() {
    return this.#isQuiet && this.menu ? lineActions(this.desk.run.length) : nothing;
  }

  #brought() {
    return this.inPlace?.problems.slice(0, 1).map((problem) => problemNote(problem, this.cases)) ?? nothing;
  }

  #tab(column: number) {
    return this.column === column ? 0 : -1;
  }

  #step(step: Step): TemplateResult {
    const choices = step.kind === 'given' ? choicesOf(this.desk, step.cell) : undefined;
    const state = step.notes.filter(isState);
    const remarks = step.notes.filter((note) => !isState(note));
    const editingSource = this.editing?.field === 'source' ? this.editing : null;
    const editingValue = this.editing?.field === 'value' ? this.editing : null;
    return html`
      <div role="gridcell" class="source" data-column="0" tabindex=${this.#tab(0)} aria-readonly=${step.kind === 'given' ? nothing : 'true'}>
        ${
          editingSource === null
            ? html`${source(step.source)}${step.basis === undefined || isStateWord(step.basis) ? nothing : html` <span class="basis">${step.basis}</span>`}`
            : sourceEditor(this.desk, editingSource, step)
        }
        ${state.filter((note) => !isLong(note)).map(tag)}
      </div>
      <div role="gridcell" class="calculation ${choices === undefined ? '' : 'across'}" data-column="1" tabindex=${this.#tab(1)}
        aria-readonly=${choices === undefined && step.kind === 'given' ? 'true' : nothing}>
        <div class="label"><span class="number">${step.number}</span> <span class="title">${step.title}</span>${state.filter(isLong).map(tag)}${this.foldable ? this.#fold() : nothing}${this.#words()}</div>
        <div class="formula">
          ${this.inPlace?.what === 'formula' ? html`${formulaInPlace(this.desk, this.inPlace)}${this.#brought()}` : equation(step, this.reading, this.cases, this.printing)}
          ${choices === undefined ? nothing : this.#choice(step, editingValue, choices)}
        </div>
        ${this.#below(step, remarks, editingValue)}
        ${this.#actions()}
        ${this.#all()}
      </div>
      ${choices === undefined ? step.cases.map((each, index) => this.#result(step, each, index, editingValue)) : nothing}
    `;
  }

  #fold() {
    const fold = () => this.dispatchEvent(new CustomEvent('walk', { detail: 'fold', bubbles: true }));
    return html`<button type="button" class="word fold" aria-expanded=${this.beside !== null} @click=${fold}>origin and use</button>`;
  }

  #choice(step: Step, editing: Editing | null, choices: readonly string[]) {
    if (editing !== null) return editorField(this.desk, editing, step, this.cases, choices);
    const same = step.cases.every((each) => each.result === step.cases[0]?.result);
    const shown = same ? step.cases.slice(0, 1) : step.cases;
    return shown.map(
      (each, index) =>
        html`<span class="choice">${same ? nothing : html`<span class="case">${this.cases[index]?.title}</span> `}<span class="written">${each.result ?? 'no value'}</span></span>`,
    );
  }

  #result(step: Step, each: StepCase, index: number, editing: Editing | null) {
    const typed = editing !== null && editing.at === index ? editing : null;
    const title = this.cases[index]?.title ?? '';
    return html`<div role="gridcell" class="result" data-column=${2 + index} data-case=${title} tabindex=${this.#tab(2 + index)}
      aria-readonly=${step.kind === 'given' ? nothing : 'true'}>
      <div class="value">${typed === null ? result(step, each, this.#typedText(step, index)) : editorField(this.desk, typed, step, this.cases)}</div>
      ${this.#governs(step, each) ? html`<div class="governs">governs</div>` : nothing}
    </div>`;
  }

  /** True for the case that a criterion is decided in, where the cases differ. */
  #governs(step: Step, each: StepCase) {
    if (step.kind !== 'criterion' || step.cases.every((other) => other.result === each.result)) return false;
    return this.desk.drawn.summary.find((one) => one.cell === step.cell)?.governing === each.case;
  }

  /** What stands in the sheet where it could not be read. */
  #typedText(step: Step, index: number) {
    const state = step.kind === 'given' ? this.desk.calculation.state(step.cell) : undefined;
    return state?.kind === 'given' ? heldValue(state.cell, this.cases[index]?.id ?? '') : '';
  }

  #below(step: Step, remarks: readonly string[], editing: Editing | null) {
    const problems = editing === null && this.inPlace === null ? this.problems : [];
    const texts = [
      ...remarks.map((note) => html`<p class="remark">${note}</p>`),
      ...(step.justification === undefined ? [] : [html`<p class="remark">Justification: ${step.justification}</p>`]),
      ...problems.map((problem) => problemNote(problem, this.cases)),
    ];
    const offer =
      editing === null && this.former !== ''
        ? html`<p class="remark"><button type="button" class="word" @click=${() => this.desk.restoreProvenance(step.cell)}>keep the former source</button>
            <span class="former">${this.former}</span></p>`
        : nothing;
    const confirm =
      this.chosen && editing === null && step.kind === 'given' && step.notes.some((note) => note.startsWith('carried over'))
        ? html`<p class="remark"><button type="button" class="word" @click=${() => this.desk.confirm(step.cell)}>confirm the value for this sheet</button></p>`
        : nothing;
    if (editing === null && texts.length === 0 && offer === nothing && confirm === nothing && this.beside === null)
      return nothing;
    return html`<div class="below">${editing === null ? nothing : editorNotes(this.desk, editing, step, this.cases)}${texts}${confirm}${offer}
      ${this.beside === null ? nothing : html`<div class="beside">${this.beside}</div>`}</div>`;
  }
}

export function problemNote(problem: CellProblem, cases: readonly RecordCase[]) {
  const where = problem.case === undefined ? '' : (cases.find((one) => one.id === problem.case)?.title ?? '');
  const word = waits(problem) ? '' : problem.severity === 'error' ? 'Error' : 'Warning';
  return html`<p class="problem ${waits(problem) ? 'waits' : problem.severity}">${word === '' ? nothing : html`<b>${word}</b>`}${where === '' ? nothing : `${word === '' ? '' : ', '}${where}`}${word === '' && where === '' ? '' : ': '}${problem.message}</p>`;
}

function result(step: Step, each: StepCase, typed: string) {
  if (each.result === null && typed !== '') return html`<span class="written unread">${typed}</span>`;
  if (each.result === null) return html`<span class="none">no value</span>`;
  if (step.kind !== 'criterion')
    return html`<span class=${step.kind === 'given' ? 'written' : ''}>${quantity(each.result)}</span>`;
  if (each.met === null || each.met === undefined) return html`<span class="none">no verdict</span>`;
  return html`<b class=${each.met ? 'met' : 'not-met'}>${each.met ? 'met' : 'not met'}</b> <span class="utilisation">${quantity(each.result)}</span>`;
}

const tag = (note: string) => html`<span class="tag ${isOpen(note) ? 'open' : ''}">${note}</span>`;
/** Notes that need the width of the calculation. */
const isLong = (note: string) => isOpen(note) && note !== noSource;
const noSource = 'no source';
const isStateWord = (text: string) => text === 'assumed' || text === 'measured';
const isOpen = (note: string) => note.startsWith('carried over') || note.startsWith('to be confirmed') || note === noSource;
const isState = (note: string) => isStateWord(note) || isOpen(note);
