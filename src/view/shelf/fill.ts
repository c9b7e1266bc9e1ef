// <ts-fill>: a new sheet from a template before it is made: the job, its limits and caution, then the givens to fill.
//
// 1. A value that is filled in is confirmed and loses the template's basis and source; one that is left stays carried over.
// 2. Nothing is made while a value is wrong: the focus goes to it. Enter moves on, Ctrl+Enter makes the sheet.
// 3. What is typed is kept in this browser until the sheet is made; found again, it says from when it is and can be emptied at once.
// 4. The criteria beside the form are those of the sheet as it would be made now.
// Not here: what a filled text means (fill-values.ts), one line of the form (fill-rows.ts).

import { html, nothing, type PropertyValues } from 'lit';
import { live } from 'lit/directives/live.js';
import { fingerprints } from '../../check/index.ts';
import type { Fix, Problem } from '../../quantity/index.ts';
import { makeRecord, type RecordModel } from '../../record/index.ts';
import {
  type Calculation,
  calculate,
  casesOf,
  type GivenCell,
  newFromTemplate,
  readSheet,
  type Sheet,
  setValues,
} from '../../sheet/index.ts';
import type { SheetHead } from '../../store/index.ts';
import { solver } from '../../study/index.ts';
import { PageElement } from '../element.ts';
import type { Session } from '../session.ts';
import { words } from '../text.ts';
import { attempt, day, focusOn, time } from './acts.ts';
import { type Names, named, taken, takenWords } from './begin.ts';
import { builtIns } from './built-in.ts';
import { criteriaNow } from './criteria-now.ts';
import { fillGrid } from './fill-rows.ts';
import { assignmentsOf, checkPlace, type Filled, type Place, placesOf } from './fill-values.ts';
import { limitsAndCaution } from './template-list.ts';

/** What is kept of a form that is not done. */
interface Kept {
  readonly at: number;
  readonly names: Names;
  readonly filled: readonly (readonly [string, string])[];
  readonly split: readonly string[];
}
const metaKey = (template: string) => `filling ${template}`;
const pause = 250;

export class FillElement extends PageElement {
  static override properties = {
    session: { attribute: false },
    template: { attribute: false },
    names: { state: true },
    filled: { state: true },
    split: { state: true },
    missing: { state: true },
    heads: { state: true },
    found: { state: true },
    model: { state: true },
    said: { state: true },
  };
  declare session: Session;
  /** Id of a built-in template, or the address of an own one. */
  declare template: string;
  declare names: Names;
  declare filled: Filled;
  declare split: ReadonlySet<string>;
  /** Why there is no form; '' where there is one. */
  declare missing: string;
  declare heads: readonly SheetHead[];
  /** When what stands in the form was typed, where it was in an earlier visit. */
  declare found: number | null;
  declare model: RecordModel | null;
  declare said: string;
  #begun: Sheet | null = null;
  #from: Sheet | null = null;
  #calculation: Calculation | null = null;
  #problems = new Map<string, { readonly text: string; readonly problems: readonly Problem[] }>();
  #timer: ReturnType<typeof setTimeout> | undefined;
  #made = false;

  constructor() {
    super();
    this.names = { number: '', title: '', project: '' };
    this.filled = new Map();
    this.split = new Set();
    this.missing = '';
    this.heads = [];
    this.found = null;
    this.model = null;
    this.said = '';
  }

  override connectedCallback() {
    super.connectedCallback();
    addEventListener('pagehide', this.#keep);
    void attempt(this.session, async ({ shelf, store }) => {
      const from = await this.#read();
      if (from === null) return;
      this.#from = from;
      this.#begun = newFromTemplate(from, fingerprints(calculate(from, solver)).sheet);
      this.#calculation = calculate(this.#begun, solver);
      this.names = { number: '', title: from.title, project: '' };
      this.heads = await shelf.list();
      const kept = (await store.backend.meta(metaKey(this.template))) as Kept | null | undefined;
      if (kept != null) {
        this.names = kept.names;
        this.filled = new Map(kept.filled);
        this.split = new Set(kept.split);
        this.found = kept.at;
      }
      this.#calculate();
    }).then(() => focusOn(this, 'h1'));
  }
  override disconnectedCallback() {
    super.disconnectedCallback();
    removeEventListener('pagehide', this.#keep);
    this.#keep();
  }

  async #read(): Promise<Sheet | null> {
    const own = /^own:(.*)$/u.exec(this.template)?.[1];
    const row = own === undefined ? undefined : (await this.session.house!.shelf.templates()).find((one) => one.id === own);
    if (row === undefined) {
      const known = own === undefined ? builtIns().get(this.template) : undefined;
      if (known === undefined) this.missing = `There is no template ${own ?? this.template} on the shelf.`;
      return known?.sheet ?? null;
    }
    const read = readSheet(row.text);
    if (read.ok && read.value.templateInfo !== undefined) return read.value;
    this.missing = `The template ${row.title} cannot be read: ${read.ok ? 'it is no template' : read.problems[0]?.message}. Its text is kept; save it as a file from the shelf.`;
    return null;
  }

  #places(): readonly (readonly Place[])[] {
    const begun = this.#begun!;
    const cases = casesOf(begun);
    return begun.cells.flatMap((cell) => (cell.kind === 'given' ? [placesOf(cell, cases, this.split)] : []));
  }
  #wrong(place: Place): readonly Problem[] {
    const text = this.filled.get(place.key) ?? '';
    const known = this.#problems.get(place.key);
    if (known?.text === text) return known.problems;
    const problems = checkPlace(this.#begun!, place, text);
    this.#problems.set(place.key, { text, problems });
    return problems;
  }
  readonly #isWrong = (place: Place) => this.#wrong(place).some(({ severity }) => severity === 'error');

  /** The sheet as it would be made now; what is wrong is left out. */
  #sheet(): Sheet {
    const good = this.#places().flatMap((places) => (places.some(this.#isWrong) ? [] : assignmentsOf(places, this.filled)));
    const assigned = setValues(this.#begun!, good);
    return named(assigned.ok ? assigned.value : this.#begun!, this.names);
  }
  #calculate() {
    this.#calculation?.update(this.#sheet());
    this.model = this.#calculation === null ? null : makeRecord(this.#calculation);
  }

  #changed() {
    clearTimeout(this.#timer);
    this.#timer = setTimeout(() => {
      this.#calculate();
      this.#keep();
    }, pause);
  }
  #keep = () => {
    clearTimeout(this.#timer);
    const { house } = this.session;
    if (house === null || this.#begun === null || this.#made) return;
    const filled = [...this.filled].filter(([, text]) => text.trim() !== '');
    const blank =
      filled.length === 0 && this.names.number === '' && this.names.project === '' && this.names.title === this.#from?.title;
    const kept: Kept | null = blank ? null : { at: Date.now(), names: this.names, filled, split: [...this.split] };
    void house.store.backend.putMeta(metaKey(this.template), kept).catch(() => undefined);
  };

  protected override willUpdate(changed: PropertyValues<this>) {
    if (!changed.has('filled') || changed.get('filled') === undefined) return;
    this.#changed();
  }

  protected override render() {
    const from = this.#from;
    const info = from?.templateInfo;
    if (this.missing !== '')
      return html`<div class="fill one"><div class="paper"><h1 tabindex="-1">New sheet</h1><p class="remark-line" role="alert">${this.missing}</p>${this.#back()}</div></div>`;
    const { model } = this;
    if (from === null || info === undefined || model === null) return html`<p class="loading">Opening the template …</p>`;
    const places = this.#places();
    const set = places.filter((all) => assignmentsOf(all, this.filled).length > 0 && !all.some(this.#isWrong)).length;
    const failed = model.summary.filter((one) => one.cases.some((each) => each.met === false)).length;
    return html`<div class="fill" @keydown=${this.#keys}>
      <aside class="outline" aria-label="Criteria" tabindex="0">${criteriaNow(model)}</aside>
      <div class="paper">
        <header class="fill-head"><p>New sheet from template <code>${info.id}</code>, version ${info.version}</p><h1 tabindex="-1">${from.title}</h1></header>
        <div class="part"><h2>Job</h2><div class="prose"><p>${info.job}.</p></div></div>
        <div class="part"><h2>Limits</h2><div class="prose">${limitsAndCaution(info)}</div></div>
        ${
          this.found === null
            ? nothing
            : html`<p class="found">What was filled in on ${day(this.found)} at ${time(this.found)} stands here again.
              <button type="button" class="word" @click=${this.#empty}>Empty the form</button></p>`
        }
        <section class="names" aria-labelledby="names-title"><h2 id="names-title">The new sheet</h2>
          ${this.#name('title', 'Title')}${this.#name('number', 'Document number')}${this.#name('project', 'Project')}
          ${takenWords(taken(this.heads, this.names.number), 'taken-fill')}</section>
        <section aria-labelledby="givens-title"><h2 id="givens-title">Givens</h2>
          <p class="how">Fill what this job gives: that is confirmed, and the template's source goes with its value. What is left empty stays carried over until it is confirmed in the sheet.</p>
          ${fillGrid({
            model,
            places,
            filled: this.filled,
            choices: (cell) => this.#choices(cell),
            problems: (place) => this.#wrong(place),
            type: this.#type,
            splitUp: this.#splitUp,
          })}</section>
        <footer class="fill-foot"><p class="about">${set} of ${words(places.length, 'given', 'givens')} filled, ${places.length - set} carried over${failed === 0 ? nothing : html`; <span class="not-met">${words(failed, 'criterion', 'criteria')} not met</span>`}</p>
          <p class="acts"><button type="button" class="do main" @click=${this.#make}>Make the sheet</button> <kbd>Ctrl+Enter</kbd> ${this.#back()}</p></footer>
      </div>
      <p class="unseen" role="status">${this.said}</p>
    </div>`;
  }

  #back() {
    return html`<button type="button" class="word" @click=${() => this.session.go({ screen: 'shelf' })}>Back to the shelf</button>`;
  }
  #name(name: keyof Names, label: string) {
    const id = `name-${name}`;
    return html`<div class="name ${name}"><label for=${id}>${label}</label>
      <input id=${id} class="line" type="text" autocomplete="off" data-enter aria-describedby=${name === 'number' ? 'taken-fill' : nothing}
        .value=${live(this.names[name])} @input=${(event: Event) => {
          this.names = { ...this.names, [name]: (event.target as HTMLInputElement).value };
          this.#changed();
        }} /></div>`;
  }

  #choices(cell: GivenCell): readonly string[] | undefined {
    if (cell.choices === undefined) return undefined;
    const [table, column] = cell.choices.split('.');
    return this.#calculation?.table(table ?? '')?.data?.columns.find((one) => one.name === column)?.texts ?? [];
  }
  readonly #type = (key: string, text: string) => {
    this.filled = new Map(this.filled).set(key, text);
  };
  readonly #splitUp = (cell: GivenCell) => {
    const split = new Set(this.split);
    const filled = new Map(this.filled);
    const cases = casesOf(this.#begun!);
    if (split.delete(cell.id)) {
      filled.set(cell.id, filled.get(`${cell.id}/${cases[0]?.id}`) ?? '');
      for (const each of cases) filled.delete(`${cell.id}/${each.id}`);
    } else {
      split.add(cell.id);
      for (const each of cases) filled.set(`${cell.id}/${each.id}`, filled.get(cell.id) ?? '');
      filled.delete(cell.id);
    }
    [this.split, this.filled] = [split, filled];
    void focusOn(this, `[data-given="${CSS.escape(cell.id)}"] [data-enter]`);
  };
  #empty = () => {
    this.filled = new Map();
    this.split = new Set();
    this.names = { number: '', title: this.#from?.title ?? '', project: '' };
    this.found = null;
    this.said = 'The form is empty';
    void focusOn(this, '#name-title');
  };

  #keys = (event: KeyboardEvent) => {
    const field = event.target as HTMLInputElement;
    if (event.isComposing) return;
    if (event.key === 'Enter' && (event.ctrlKey || event.metaKey)) void this.#make();
    else if (!field.matches('[data-enter]')) return;
    else if (event.key === 'Enter' && event.altKey) this.#fixFirst(field);
    else if (event.key === 'Enter') {
      const all = [...this.querySelectorAll<HTMLElement>('[data-enter], .do.main')];
      all[all.indexOf(field) + (event.shiftKey ? -1 : 1)]?.focus();
    } else if (event.key === 'Escape' && field.dataset['key'] !== undefined) this.#type(field.dataset['key'], '');
    else return;
    event.preventDefault();
  };
  #fixFirst(field: HTMLInputElement) {
    const { key } = field.dataset;
    const place = this.#places()
      .flat()
      .find((one) => one.key === key);
    const fix: Fix | undefined = place && this.#wrong(place).flatMap((problem) => problem.fixes ?? [])[0];
    if (key !== undefined && fix) this.#type(key, field.value.slice(0, fix.from) + fix.text + field.value.slice(fix.to));
  }

  #make = async () => {
    const wrong = this.#places().flat().find(this.#isWrong);
    if (wrong !== undefined) {
      this.said = 'Nothing was made: a value is wrong';
      await focusOn(this, `[data-key="${CSS.escape(wrong.key)}"]`);
      return;
    }
    if (this.#made) return;
    this.#made = true;
    clearTimeout(this.#timer);
    const done = await attempt(this.session, async ({ shelf, store }) => {
      const head = await shelf.add(this.#sheet());
      await store.backend.putMeta(metaKey(this.template), null);
      this.session.go({ screen: 'sheet', id: head.id });
    });
    this.#made = done;
  };
}
