// <ts-block>: a template put into the sheet as a block: which, where, with which suffix, which of its givens are taken from the sheet; and
// the lines as they would come.
//
// 1. Nothing of the sheet is touched before `block-put` { done }; `block-leave` says that nothing is wanted. Both bubble.
// 2. The lines follow what is chosen and typed after a short pause; what keeps the block from coming is told in sentences.
// Not here: the model (block.ts), the dialog around it (index.ts).

import { html, nothing, type PropertyValues } from 'lit';
import { live } from 'lit/directives/live.js';
import { canonicalName, plainName } from '../../formula/index.ts';
import { type Calculation, calculate, freeSuffix, type GivenCell, type InsertedBlock, type Sheet } from '../../sheet/index.ts';
import { solver } from '../../study/index.ts';
import type { Desk } from '../desk-face.ts';
import { PageElement } from '../element.ts';
import { quantity, words } from '../text.ts';
import { type BlockChoice, type BlockPreview, offersFor, placeFor, placesOf, previewOf } from './block.ts';
import type { Group } from './find.ts';

const pause = 180;

export class BlockElement extends PageElement {
  static override properties = {
    desk: { attribute: false },
    groups: { attribute: false },
    behind: { attribute: false },
    choice: { state: true },
    preview: { state: true },
  };
  declare desk: Desk;
  declare groups: readonly Group[];
  /** The line at which the block was asked for. */
  declare behind: string | null;
  declare choice: BlockChoice | null;
  declare preview: BlockPreview | null;
  #of: { readonly template: Sheet; readonly calculation: Calculation } | null = null;
  #timer: ReturnType<typeof setTimeout> | undefined;

  constructor() {
    super();
    this.choice = null;
    this.preview = null;
  }
  override disconnectedCallback() {
    super.disconnectedCallback();
    clearTimeout(this.#timer);
  }

  protected override willUpdate(changed: PropertyValues<this>) {
    if (!changed.has('choice')) return;
    clearTimeout(this.#timer);
    this.#timer = setTimeout(() => this.#look(), this.preview === null ? 0 : pause);
  }
  #look() {
    const { choice } = this;
    this.preview = choice === null ? null : previewOf(this.desk.kept, choice);
  }

  protected override render() {
    const { choice } = this;
    return html`<form class="block-form" @submit=${this.#put}>
      <h2 id="block-title" tabindex="-1">Put in a template</h2>
      <label class="wide">Template <select data-key="template" @change=${(event: Event) => this.#choose((event.target as HTMLSelectElement).value)}>
        <option value="" .selected=${choice === null}>choose one</option>
        ${this.groups.map(
          ({ title, templates }, group) =>
            html`<optgroup label=${title}>${templates.map((one, at) => html`<option value=${`${group} ${at}`} .selected=${choice?.template === one}>${one.title}</option>`)}</optgroup>`,
        )}</select></label>
      ${choice === null ? html`<p class="quiet">Its lines come into this sheet as a block, every name with a suffix: F_1 becomes F_1_B.</p>` : this.#chosen(choice)}
      <p class="acts"><button class="do" ?disabled=${choice === null}>${choice === null ? 'Put it in' : `Put in block ${choice.suffix}`}</button>
        <button type="button" class="word" @click=${() => this.#say('block-leave', null)}>Leave it</button></p>
    </form>`;
  }

  #chosen(choice: BlockChoice) {
    const { template } = choice;
    const info = template.templateInfo;
    const places = placesOf(this.desk.calculation);
    return html`<p class="job">${info?.job}${info?.job.endsWith('.') ? '' : '.'} <span class="quiet"><code>${info?.id}</code>, version ${info?.version}</span></p>
      ${
        info === undefined || info.limits.length === 0
          ? nothing
          : html`<details><summary>Limits and caution</summary><ul>${info.limits.map((limit) => html`<li>${limit}</li>`)}</ul><p><b>Caution.</b> ${info.caution}</p></details>`
      }
      <div class="fields">
        <label>Suffix on its names <input class="field" data-key="suffix" type="text" size="6" maxlength="20" spellcheck="false" autocomplete="off" .value=${live(choice.suffix)}
          @input=${(event: Event) => this.#set({ suffix: (event.target as HTMLInputElement).value.trim() })} /></label>
        <label>Heading <input class="field" data-key="title" type="text" size="32" autocomplete="off" placeholder=${template.title} .value=${live(choice.title)}
          @input=${(event: Event) => this.#set({ title: (event.target as HTMLInputElement).value })} /></label>
        <label>Comes behind <select data-key="place" @change=${(event: Event) => this.#set({ at: Number((event.target as HTMLSelectElement).value) })}>
          ${places.map(({ words: text, at }) => html`<option value=${at} .selected=${at === choice.at}>${text}</option>`)}</select></label>
      </div>
      ${this.#givens(choice)}
      ${this.#coming()}`;
  }

  #givens({ template, suffix, taken }: BlockChoice) {
    const givens = template.cells.filter((cell): cell is GivenCell => cell.kind === 'given');
    return html`<div class="part"><h3 id="block-givens">Givens of the block</h3>
      <p class="quiet">Each comes with the template’s value, carried over until it is confirmed; or it is taken from this sheet by a name or a formula, as in n_2.</p>
      <div class="scroll" tabindex="0" role="region" aria-label="Givens of the block"><table class="givens">
        <thead><tr><th scope="col">Name</th><th scope="col">Given</th><th scope="col" class="number">Template</th><th scope="col">Taken from this sheet</th></tr></thead>
        <tbody>${givens.map((given) => {
          const name = canonicalName(given.name);
          const list = `offers-${name}`;
          const offers = given.choices === undefined ? this.#offers(template, given) : [];
          return html`<tr><th scope="row"><code>${plainName(`${name}_${suffix}`)}</code></th><td>${given.title}</td><td class="value">${given.value}</td><td>${
            given.choices === undefined
              ? html`<input class="field" type="text" data-taken=${name} list=${list} spellcheck="false" autocomplete="off" autocapitalize="off"
                  aria-label=${`${given.title ?? name}: taken from this sheet`} .value=${live(taken.get(name) ?? '')}
                  @input=${(event: Event) => this.#set({ taken: new Map([...taken, [name, (event.target as HTMLInputElement).value]]) })} />
                <datalist id=${list}>${offers.slice(0, 40).map((offer) => html`<option value=${offer.name}>${offer.title}</option>`)}</datalist>`
              : html`<span class="quiet">a choice</span>`
          }</td></tr>`;
        })}</tbody></table></div></div>`;
  }

  #offers(template: Sheet, given: GivenCell) {
    if (this.#of?.template !== template) this.#of = { template, calculation: calculate(template, solver) };
    return offersFor(given, this.#of.calculation, this.desk.calculation);
  }

  /** The lines as they would come, or why they cannot. */
  #coming() {
    const { preview } = this;
    if (preview === null) return nothing;
    const { done, model, cells } = preview;
    if (!done.ok || model === null)
      return html`<div class="part"><h3 id="block-lines">It cannot come yet</h3><div role="alert"><ul class="table-faults">${
        done.ok
          ? nothing
          : done.problems.slice(0, 8).map(({ message }) => html`<li class="problem error"><b>Error</b>: ${message}</li>`)
      }</ul></div></div>`;
    const steps = model.steps.filter(({ cell }) => cells.has(cell));
    const count = (kind: string) => steps.filter((step) => step.kind === kind).length;
    const errors = model.problems.filter(
      ({ cell, severity, code }) => severity === 'error' && code !== 'waits-for' && cells.has(cell),
    );
    const unmet = steps.filter((step) => step.cases.some(({ met }) => met === false));
    return html`<div class="part"><h3 id="block-lines">The lines as they come</h3>
      <p aria-live="polite">${words(count('given'), 'given', 'givens')}, ${words(count('derived') + count('sought'), 'formula', 'formulas')}, ${words(count('criterion'), 'criterion', 'criteria')}${unmet.length === 0 ? nothing : html`, <b class="not-met">${unmet.length} not met</b>`}${errors.length === 0 ? nothing : html`, <b class="not-met">${words(errors.length, 'line', 'lines')} with an error</b>`}.</p>
      ${done.notes.map(({ message }) => html`<p class="problem warning"><b>Warning</b>: ${message}</p>`)}
      ${errors.slice(0, 4).map(({ message }) => html`<p class="problem error"><b>Error</b>: ${message}</p>`)}
      <div class="scroll lines" tabindex="0" role="region" aria-label="The lines as they come"><table>
        <thead><tr><th scope="col">No.</th><th scope="col">Line</th><th scope="col">Name</th>${model.cases.map(({ title }) => html`<th scope="col" class="number">${title === '' ? 'Result' : title}</th>`)}</tr></thead>
        <tbody>${steps.map(
          (step) =>
            html`<tr><td>${step.number}</td><th scope="row">${step.title}</th><td><code>${step.name === undefined ? '' : plainName(step.name)}</code></td>${step.cases.map(
              ({ result, met }) =>
                html`<td class="number">${result === null ? html`<span class="quiet">no value</span>` : step.numeric ? quantity(result) : result}${met === undefined || met === null ? nothing : html` <b class=${met ? 'met' : 'not-met'}>${met ? 'met' : 'not met'}</b>`}</td>`,
            )}</tr>`,
        )}</tbody></table></div></div>`;
  }

  #choose(key: string) {
    const [group, at] = key.split(' ').map(Number);
    const template = key === '' ? undefined : this.groups[group ?? -1]?.templates[at ?? -1];
    this.preview = null;
    this.choice =
      template === undefined
        ? null
        : {
            template,
            suffix: freeSuffix(this.desk.kept, template),
            title: '',
            at: this.choice?.at ?? placeFor(this.desk.calculation, this.behind),
            taken: new Map(),
          };
  }
  #set(change: Partial<BlockChoice>) {
    if (this.choice !== null) this.choice = { ...this.choice, ...change };
  }

  #put = (event: Event) => {
    event.preventDefault();
    clearTimeout(this.#timer);
    this.#look();
    const done = this.preview?.done;
    if (done?.ok === true) this.#say('block-put', done);
    else void this.updateComplete.then(() => this.querySelector('#block-lines')?.scrollIntoView({ block: 'nearest' }));
  };
  #say(name: string, done: InsertedBlock | null) {
    this.dispatchEvent(new CustomEvent(name, { detail: done, bubbles: true }));
  }
}
