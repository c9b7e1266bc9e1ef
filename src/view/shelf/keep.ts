// <ts-keep>: a sheet kept as an own template: its id, job, limits and caution, and what it still lacks to be one.
//
// 1. What is missing is told as it stands now, with a way to each line; nothing is kept before all of it is there.
// 2. What is typed stays while one goes to a line and comes back.
// 3. The sheet itself is not touched. Kept again under its own id, a template is one version on.
// Not here: what makes a template (src/check), what is left behind of the job (src/sheet).

import { html, nothing } from 'lit';
import { live } from 'lit/directives/live.js';
import { keepAsTemplate, type TemplateFault } from '../../check/index.ts';
import { makeRecord } from '../../record/index.ts';
import { calculate, type KeepInfo, readSheet, type Sheet, templateOf, writeSheet } from '../../sheet/index.ts';
import type { TemplateRow } from '../../store/index.ts';
import { PageElement } from '../element.ts';
import type { Jump } from '../page.ts';
import type { Session } from '../session.ts';
import { words } from '../text.ts';
import { attempt, focusOn, saveText } from './acts.ts';
import { builtIns } from './built-in.ts';
import { ownAddress } from './template-list.ts';

interface Said {
  readonly id: string;
  readonly title: string;
  readonly job: string;
  /** One a line. */
  readonly limits: string;
  readonly caution: string;
}
/** What is typed, by the id of the sheet, while this page stands. */
const drafts = new Map<string, Said>();
const pause = 300;
/** The field in which a fault of the whole is put right. */
const fieldOf: ReadonlyMap<string, keyof Said> = new Map([
  ['bad-id', 'id'],
  ['id-taken', 'id'],
  ['no-title', 'title'],
  ['no-job', 'job'],
  ['no-limits', 'limits'],
  ['no-caution', 'caution'],
]);

export class KeepElement extends PageElement {
  static override properties = {
    session: { attribute: false },
    sheet: { attribute: false },
    said: { state: true },
    faults: { state: true },
    asked: { state: true },
    kept: { state: true },
    own: { state: true },
    missing: { state: true },
  };
  declare session: Session;
  /** Id of the sheet. */
  declare sheet: string;
  declare said: Said;
  declare faults: readonly TemplateFault[];
  /** It was to be kept, and something was missing. */
  declare asked: boolean;
  declare kept: TemplateRow | null;
  declare own: readonly TemplateRow[];
  declare missing: string;
  #sheet: Sheet | null = null;
  /** Number and title of each line. */
  #lines = new Map<string, string>();
  #timer: ReturnType<typeof setTimeout> | undefined;

  constructor() {
    super();
    this.said = { id: '', title: '', job: '', limits: '', caution: '' };
    this.faults = [];
    this.asked = false;
    this.kept = null;
    this.own = [];
    this.missing = '';
  }

  override connectedCallback() {
    super.connectedCallback();
    void attempt(this.session, async ({ shelf }) => {
      await this.session.settle();
      const { session, sheet: id } = this;
      const read = readSheet(
        session.id === id && session.desk !== null ? writeSheet(session.desk.kept) : (await shelf.textOf(id)).text,
      );
      if (!read.ok) {
        this.missing = `The sheet cannot be read: ${read.problems[0]?.message}.`;
        return;
      }
      this.own = await shelf.templates();
      const sheet = read.value;
      const { title, templateInfo: info } = templateOf(sheet, { id: sheet.templateInfo?.id ?? '' });
      this.said = drafts.get(id) ?? {
        id: info?.id ?? '',
        title,
        job: info?.job ?? '',
        limits: info?.limits.join('\n') ?? '',
        caution: info?.caution ?? '',
      };
      for (const line of makeRecord(calculate(sheet)).lines) {
        if (line.kind === 'step') this.#lines.set(line.step.cell, [line.step.number, line.step.title].filter(Boolean).join(' '));
        else if (line.kind === 'heading') this.#lines.set(line.cell, [line.number, line.text].join(' '));
        else if (line.kind === 'table' || line.kind === 'other') this.#lines.set(line.cell, line.title);
      }
      this.#sheet = sheet;
      this.#look();
    }).then((done) => {
      if (!done) this.missing = 'The sheet is not here.';
      return focusOn(this, '#keep-id');
    });
  }
  override disconnectedCallback() {
    super.disconnectedCallback();
    clearTimeout(this.#timer);
  }

  #info(): KeepInfo {
    const { id, title, job, limits, caution } = this.said;
    const before = this.own.find((row) => row.id === id.trim());
    return { id: id.trim(), version: (before?.version ?? 0) + 1, title, job, limits: limits.split('\n'), caution };
  }
  #look() {
    clearTimeout(this.#timer);
    if (this.#sheet === null) return;
    const tried = keepAsTemplate(this.#sheet, this.#info(), { taken: builtIns().keys() });
    if (tried.ok || !['bad-id', 'id-taken'].includes(tried.problems[0]?.code ?? '')) {
      this.faults = tried.ok ? [] : tried.problems;
      return;
    }
    // An id that cannot be hides the rest: all of it is told at once.
    const rest = keepAsTemplate(this.#sheet, { ...this.#info(), id: 'x' });
    this.faults = [...tried.problems, ...(rest.ok ? [] : rest.problems)];
  }

  protected override render() {
    if (this.missing !== '')
      return html`<div class="fill one"><div class="paper"><h1 tabindex="-1">Keep as a template</h1><p class="remark-line" role="alert">${this.missing}</p></div></div>`;
    if (this.#sheet === null) return html`<p class="loading">Reading the sheet …</p>`;
    const { kept } = this;
    if (kept !== null) return this.#done(kept);
    const version = this.#info().version ?? 1;
    return html`<div class="fill one keep" @keydown=${this.#keys}><div class="paper">
      <header class="fill-head"><p>Keep as a template</p><h1 tabindex="-1">${this.#sheet.title}</h1></header>
      <p class="how">A template has the lines and sample values of the sheet and nothing of the job: no names, numbers, dates, marks, conclusion. The sheet stays as it is.</p>
      <section class="names" aria-label="The template">
        ${this.#field('id', 'Id', 'letters, digits, . _ -, as in mixer-drive')}${this.#field('title', 'Title', '')}
        ${version > 1 ? html`<p class="taken">There is an own template of this id; this becomes its version ${version}.</p>` : nothing}
        ${this.#field('job', 'Job', 'what it is for, in one sentence')}
        ${this.#field('limits', 'Limits of validity', 'one a line', 4)}
        ${this.#field('caution', 'Caution', 'what the template cannot answer for, and who decides where people may come to harm', 5)}
      </section>
      ${this.#missing()}
      <footer class="fill-foot"><p class="acts"><button type="button" class="do main" @click=${this.#keep}>Keep as template</button> <kbd>Ctrl+Enter</kbd>
        <button type="button" class="word" @click=${() => this.session.go({ screen: 'sheet', id: this.sheet })}>Back to the sheet</button></p></footer>
    </div></div>`;
  }

  #missing() {
    const { faults } = this;
    return html`<section class="missing" aria-labelledby="missing-title">
      <h2 id="missing-title" tabindex="-1">${faults.length === 0 ? 'Nothing is missing' : `${words(faults.length, 'point is', 'points are')} missing`}</h2>
      ${this.asked && faults.length > 0 ? html`<p role="alert" class="not-met">Not kept yet: the points below come first.</p>` : nothing}
      <ol>${faults.map((fault) => {
        const field = fieldOf.get(fault.code);
        const where = fault.cell === undefined ? '' : (this.#lines.get(fault.cell) ?? '');
        if (fault.cell !== undefined)
          return html`<li><button type="button" class="word" @click=${() => this.#jump(fault.cell!)}>${where === '' ? 'To the line' : where}</button> <span>${fault.message}</span></li>`;
        return html`<li>${field === undefined ? html`<span>The whole</span>` : html`<button type="button" class="word" @click=${() => void focusOn(this, `#keep-${field}`)}>${names[field]}</button>`} <span>${fault.message}</span></li>`;
      })}</ol></section>`;
  }

  #done(kept: TemplateRow) {
    return html`<div class="fill one keep"><div class="paper">
      <header class="fill-head"><p>Kept as a template</p><h1 tabindex="-1">${kept.title}</h1></header>
      <p class="how">It stands on the shelf as <code>${kept.id}</code>, version ${kept.version}.</p>
      <footer class="fill-foot"><p class="acts">
        <button type="button" class="do" @click=${() => this.session.go({ screen: 'template', id: ownAddress(kept.id) })}>New sheet from it</button>
        <button type="button" class="word" @click=${() => void saveText(this.session, async () => ({ name: `${kept.id}.sheet.json`, text: fileText(kept.text) }))}>Save as file</button>
        <button type="button" class="word" @click=${() => this.session.go({ screen: 'shelf' })}>To the shelf</button>
        <button type="button" class="word" @click=${() => this.session.go({ screen: 'sheet', id: this.sheet })}>Back to the sheet</button></p></footer>
    </div></div>`;
  }

  #field(name: keyof Said, label: string, hint: string, lines = 1) {
    const id = `keep-${name}`;
    const typed = (event: Event) => {
      this.said = { ...this.said, [name]: (event.target as HTMLInputElement).value };
      drafts.set(this.sheet, this.said);
      clearTimeout(this.#timer);
      this.#timer = setTimeout(() => this.#look(), pause);
    };
    const wrong = this.asked && this.faults.some((fault) => fieldOf.get(fault.code) === name);
    const described = hint === '' ? nothing : `${id}-hint`;
    return html`<div class="name ${name}"><label for=${id}>${label}</label>
      ${
        lines > 1
          ? html`<textarea id=${id} class="line" rows=${lines} aria-describedby=${described} aria-invalid=${String(wrong)} .value=${live(this.said[name])} @input=${typed}></textarea>`
          : html`<input id=${id} class="line" type="text" autocomplete="off" data-enter spellcheck=${name !== 'id'} aria-describedby=${described} aria-invalid=${String(wrong)} .value=${live(this.said[name])} @input=${typed} />`
      }
      ${hint === '' ? nothing : html`<p class="about" id="${id}-hint">${hint}</p>`}</div>`;
  }

  #jump(cell: string) {
    const detail: Jump = { sheet: this.sheet, cell };
    this.dispatchEvent(new CustomEvent('jump', { detail, bubbles: true }));
  }
  #keys = (event: KeyboardEvent) => {
    if (event.isComposing || event.key !== 'Enter') return;
    const field = event.target as HTMLElement;
    if (event.ctrlKey || event.metaKey) void this.#keep();
    else if (field.matches('[data-enter]')) {
      const all = [...this.querySelectorAll<HTMLElement>('input, textarea')];
      all[all.indexOf(field) + (event.shiftKey ? -1 : 1)]?.focus();
    } else return;
    event.preventDefault();
  };
  #keep = async () => {
    this.#look();
    if (this.faults.length > 0) {
      this.asked = true;
      await focusOn(this, '#missing-title');
      return;
    }
    await attempt(this.session, async ({ shelf }) => {
      this.kept = await shelf.keepTemplate(this.#sheet!, this.#info());
      drafts.delete(this.sheet);
      await focusOn(this, 'h1');
    });
  };
}

const names: Readonly<Record<keyof Said, string>> = {
  id: 'Id',
  title: 'Title',
  job: 'Job',
  limits: 'Limits',
  caution: 'Caution',
};
/** A kept text as it stands in a file. */
function fileText(text: string): string {
  const read = readSheet(text);
  return read.ok ? writeSheet(read.value) : text;
}
