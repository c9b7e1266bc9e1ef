// <ts-register>: the shelf as an office keeps it: the register of sheets, the templates by kind of job, own templates, what was removed.
//
// 1. It shows what is kept, here and by other tabs, as soon as it changes; what was just removed keeps its line until the screen is left.
// 2. Before a sheet is copied, removed or exported, what is being typed in it is handed in and kept.
// 3. The focus follows every act: to the new line, to the word that puts a removed one back, to what was put back.
// 4. Thousands of sheets are listed a piece at a time.
// Not here: one sheet before it is made from a template (fill.ts).

import { html, nothing, type PropertyValues } from 'lit';
import { live } from 'lit/directives/live.js';
import { fingerprints } from '../../check/index.ts';
import { calculate, currentFormat, newFromSheet, readSheet, type Sheet, writeSheet } from '../../sheet/index.ts';
import type { Persistence, SheetHead, TemplateRow, TrashRow } from '../../store/index.ts';
import { solver } from '../../study/index.ts';
import { PageElement } from '../element.ts';
import exampleText from '../example.sheet.json?raw';
import type { Session } from '../session.ts';
import { words } from '../text.ts';
import { attempt, focusOn, nameOf, saveText } from './acts.ts';
import { beginRow, type Names, named, noNames } from './begin.ts';
import { builtIns, isFound, kindsFound, searchWords } from './built-in.ts';
import { keepingLine, trashList } from './register-foot.ts';
import { sheetTable } from './sheet-rows.ts';
import { kindOfJob, ownAddress, ownTemplates } from './template-list.ts';

const piece = 200;
const exampleId = 'example';
const row = (id: string, act: string) => `[data-id="${CSS.escape(id)}"] [data-act="${act}"]`;
const ownRow = (id: string, act: string) => `[data-template="${CSS.escape(ownAddress(id))}"] [data-act="${act}"]`;

/** The search of this tab stays while one looks at a sheet and comes back. */
let lastSearch = '';

export class RegisterElement extends PageElement {
  static override properties = {
    session: { attribute: false },
    onDesk: { attribute: false },
    offline: { attribute: false },
    heads: { state: true },
    own: { state: true },
    trash: { state: true },
    persistence: { state: true },
    search: { state: true },
    shown: { state: true },
    blank: { state: true },
    similar: { state: true },
    asked: { state: true },
    said: { state: true },
  };
  declare session: Session;
  declare onDesk: string | null;
  declare offline: Session['offline']['state'];
  /** Null until they are read. */
  declare heads: readonly SheetHead[] | null;
  declare own: readonly TemplateRow[];
  declare trash: readonly TrashRow[];
  declare persistence: Persistence | null;
  declare search: string;
  /** So many lines at most. */
  declare shown: number;
  /** What stands in the line for an empty sheet. */
  declare blank: Names;
  declare similar: { readonly head: SheetHead; readonly names: Names } | null;
  /** The trash is about to be emptied. */
  declare asked: boolean;
  declare said: string;
  #removed = new Map<string, SheetHead>();
  #removedOwn = new Map<string, TemplateRow>();
  #leave: (() => void) | undefined;
  #reading = 0;

  constructor() {
    super();
    this.heads = null;
    this.own = [];
    this.trash = [];
    this.persistence = null;
    this.search = lastSearch;
    this.shown = piece;
    this.blank = noNames;
    this.similar = null;
    this.asked = false;
    this.said = '';
  }

  override connectedCallback() {
    super.connectedCallback();
    this.#removed.clear();
    this.#removedOwn.clear();
    this.#leave = this.session.house?.shelf.subscribe(() => void this.#read());
    void this.#read().then(() => focusOn(this, 'h1'));
  }
  override disconnectedCallback() {
    super.disconnectedCallback();
    this.#leave?.();
  }

  async #read() {
    this.#reading += 1;
    const mine = this.#reading;
    await attempt(this.session, async ({ shelf, store }) => {
      const [heads, own, trash, persistence] = await Promise.all([
        shelf.list(),
        shelf.templates(),
        shelf.trash(),
        store.persistence(),
      ]);
      if (mine !== this.#reading) return;
      for (const head of heads) this.#removed.delete(head.id);
      for (const one of own) this.#removedOwn.delete(one.id);
      [this.heads, this.own, this.trash, this.persistence] = [heads, own, trash, persistence];
    });
  }

  /** The lines of the register: what is found, and what has just been removed in its place. */
  #found(): readonly SheetHead[] {
    const search = searchWords(this.search);
    const all = [...(this.heads ?? []), ...this.#removed.values()].sort((one, other) => other.changed - one.changed);
    return all.filter((head) => {
      const { title, documentNumber, revision, project, client, template, status } = head;
      return isFound([title, documentNumber, revision, project, client, template, status].join(' ').toLocaleLowerCase(), search);
    });
  }
  #foundOwn(): readonly TemplateRow[] {
    const search = searchWords(this.search);
    const all = [...this.own, ...this.#removedOwn.values()].sort((one, other) => one.title.localeCompare(other.title));
    return all.filter((one) => isFound(`${one.id} ${one.title} ${one.job}`.toLocaleLowerCase(), search));
  }

  protected override willUpdate(changed: PropertyValues<this>) {
    if (changed.has('search')) {
      lastSearch = this.search;
      this.shown = piece;
    }
  }

  protected override render() {
    if (this.heads === null) return html`<p class="loading">Opening the shelf …</p>`;
    const found = this.#found();
    const kinds = kindsFound(this.search);
    const own = this.#foundOwn();
    const count = kinds.reduce((sum, kind) => sum + kind.templates.length, 0);
    const searching = searchWords(this.search).length > 0;
    const of = (some: number, all: number) => (searching ? `${some} of ${all}` : String(all));
    return html`<div class="shelf">
      ${this.#contents(found.length, kinds, count, own.length)}
      <div class="paper">
        <header class="shelf-head">
          <h1 tabindex="-1">Shelf</h1>
          <p class="find"><label for="search">Search</label>
            <input id="search" class="line" type="search" autocomplete="off" spellcheck="false" aria-describedby="found"
              .value=${live(this.search)} @input=${this.#onSearch} @keydown=${this.#searchKey} />
            <span id="found" class="about" role="status">${searching ? `${words(found.length, 'sheet', 'sheets')}, ${words(count + own.length, 'template', 'templates')}` : 'number, title, project; words of the trade'}</span></p>
          <p class="acts" role="group" aria-label="Files">
            <button type="button" class="word" @click=${this.#import}>Import files</button>
            <button type="button" class="word" @click=${this.#exportAll}>Export everything</button>
            <button type="button" class="word" @click=${this.#placeExample}>Place the example</button></p>
          <input class="unseen" type="file" multiple accept=".json,application/json" tabindex="-1" aria-label="Files to import" data-import @change=${this.#onFiles} />
        </header>
        <section aria-labelledby="sheets-title"><h2 id="sheets-title" tabindex="-1">Sheets <span class="count">${of(found.length, this.heads.length)}</span></h2>
          ${sheetTable({
            heads: found.slice(0, this.shown),
            removed: this.#removed,
            onDesk: this.onDesk,
            begin: this.#blankRow(),
            similar: this.#similarRow(),
            acts: {
              similar: this.#beginSimilar,
              copy: this.#copy,
              remove: this.#remove,
              putBack: this.#putBack,
              download: (head) => void saveText(this.session, () => this.session.house!.shelf.textOf(head.id)),
            },
          })}
          ${found.length === 0 ? html`<p class="remark-line">${searching ? 'No sheet has all these words.' : 'No sheet is here yet. Begin an empty one above, take a template below, or open a file.'}</p>` : nothing}
          ${found.length <= this.shown ? nothing : html`<p class="remark-line"><button type="button" class="word" @click=${this.#more}>Show the next of ${found.length - this.shown} more</button></p>`}
        </section>
        <section aria-labelledby="own-title"><h2 id="own-title" tabindex="-1">Own templates <span class="count">${of(own.length, this.own.length)}</span></h2>
          ${own.length > 0 ? ownTemplates(own, this.#removedOwn, { save: this.#saveOwn, remove: this.#removeOwn, putBack: this.#putBackOwn }) : html`<p class="remark-line">${searching && this.own.length > 0 ? 'No own template has all these words.' : 'None yet. An open sheet becomes one by “Keep as template”, a template file by import.'}</p>`}
        </section>
        <section aria-labelledby="templates-title"><h2 id="templates-title" tabindex="-1">Templates <span class="count">${of(count, builtIns().size)}</span></h2>
          ${kinds.map((kind, at) => kindOfJob(kind, at))}
          ${count === 0 ? html`<p class="remark-line">No template has all these words.</p>` : nothing}
        </section>
        ${trashList(this.trash, this.asked, { putBack: this.#putBack, ask: this.#ask, empty: this.#empty })}
        ${keepingLine(this.persistence, this.offline)}
      </div>
      <p class="unseen" role="status">${this.said}</p>
    </div>`;
  }

  #contents(sheets: number, kinds: ReturnType<typeof kindsFound>, count: number, own: number) {
    const go = (id: string) => () => {
      const title = this.querySelector<HTMLElement>(`#${id}`);
      title?.scrollIntoView({ block: 'start' });
      title?.focus({ preventScroll: true });
    };
    const entry = (id: string, text: string, n: number, deep = false) =>
      html`<li class=${deep ? 'deep' : ''}><button type="button" @click=${go(id)}><span>${text}</span> <span class="count">${n}</span></button></li>`;
    return html`<nav class="contents" aria-label="On the shelf"><ul>
      ${entry('sheets-title', 'Sheets', sheets)}${entry('own-title', 'Own templates', own)}${entry('templates-title', 'Templates', count)}
      ${kinds.map((kind, at) => entry(`kind-${at}`, kind.title, kind.templates.length, true))}
      ${this.trash.length === 0 ? nothing : entry('trash-title', 'Removed', this.trash.length)}</ul></nav>`;
  }

  #blankRow() {
    return beginRow({
      key: 'blank',
      about: 'new empty sheet',
      does: 'Begin an empty sheet',
      names: this.blank,
      heads: this.heads ?? [],
      change: (names) => {
        this.blank = names;
      },
      begin: () => {
        const title = this.blank.title.trim() === '' ? 'Untitled calculation' : this.blank.title;
        void this.#make(async () => named({ format: currentFormat, title, status: 'in preparation', cells: [] }, this.blank));
      },
    });
  }
  #similarRow() {
    const { similar } = this;
    if (similar === null) return null;
    const { head, names } = similar;
    return {
      id: head.id,
      row: beginRow({
        key: 'similar',
        about: `new sheet for a job like ${nameOf(head)}`,
        does: 'Begin, givens carried over',
        names,
        heads: this.heads ?? [],
        change: (next) => {
          this.similar = { head, names: next };
        },
        leave: () => {
          this.similar = null;
          void focusOn(this, row(head.id, 'similar'));
        },
        begin: () => void this.#make(async () => named(await this.#similarTo(head.id), names)),
      }),
    };
  }

  async #similarTo(id: string): Promise<Sheet> {
    await this.session.settle();
    const read = readSheet((await this.session.house!.shelf.textOf(id)).text);
    if (!read.ok) throw new Error(read.problems[0]?.message);
    return newFromSheet(read.value, fingerprints(calculate(read.value, solver)).sheet);
  }
  #make(sheet: () => Promise<Sheet>) {
    return attempt(this.session, async ({ shelf }) => {
      const head = await shelf.add(await sheet());
      this.session.go({ screen: 'sheet', id: head.id });
    });
  }

  #beginSimilar = (head: SheetHead) => {
    this.similar = { head, names: { number: '', title: head.title, project: '' } };
    void focusOn(this, '[data-begin="similar"] [data-field="number"]');
  };
  #copy = (head: SheetHead) =>
    void attempt(this.session, async ({ shelf }) => {
      await this.session.settle();
      const made = await shelf.copy(head.id);
      await this.#read();
      this.said = `Copied as ${made.title}`;
      await focusOn(this, row(made.id, 'open'));
    });
  #remove = (head: SheetHead) =>
    void attempt(this.session, async ({ shelf }) => {
      // What is on the desk is kept first; a sheet that cannot be kept is not removed either.
      if (!(await this.session.putAway(head.id))) return;
      const gone = await shelf.remove(head.id);
      this.#removed.set(head.id, gone?.head ?? head);
      await this.#read();
      this.said = `${head.title} was removed`;
      await focusOn(this, row(head.id, 'put-back'));
    });
  #putBack = (head: SheetHead) =>
    void attempt(this.session, async ({ shelf }) => {
      await shelf.restore(head.id);
      this.#removed.delete(head.id);
      this.asked = false;
      await this.#read();
      this.said = `${head.title} is back`;
      await focusOn(this, row(head.id, 'open'));
    });
  #ask = (asked: boolean) => {
    this.asked = asked;
    void focusOn(this, asked ? '[data-act="keep-removed"]' : '[data-act="empty"]');
  };
  #empty = () =>
    void attempt(this.session, async ({ shelf }) => {
      const count = await shelf.emptyTrash();
      this.#removed.clear();
      this.asked = false;
      await this.#read();
      this.said = `${words(count, 'sheet', 'sheets')} gone for good`;
      await focusOn(this, '#sheets-title');
    });
  #more = () => {
    const next = this.#found()[this.shown]?.id;
    this.shown += piece;
    if (next !== undefined) void focusOn(this, row(next, 'open'));
  };

  #saveOwn = (one: TemplateRow) =>
    void saveText(this.session, async () => {
      const read = readSheet(one.text);
      return { name: `${one.id}.sheet.json`, text: read.ok ? writeSheet(read.value) : one.text };
    });
  #removeOwn = (one: TemplateRow) =>
    void attempt(this.session, async ({ shelf }) => {
      const gone = await shelf.removeTemplate(one.id);
      this.#removedOwn.set(one.id, gone ?? one);
      await this.#read();
      this.said = `Template ${one.title} was removed`;
      await focusOn(this, ownRow(one.id, 'put-back'));
    });
  #putBackOwn = (one: TemplateRow) =>
    void attempt(this.session, async ({ shelf }) => {
      await shelf.putTemplate(one);
      await this.#read();
      this.said = `Template ${one.title} is back`;
      await focusOn(this, ownRow(one.id, 'open'));
    });

  #onSearch = (event: Event) => {
    this.search = (event.target as HTMLInputElement).value;
  };
  #searchKey = (event: KeyboardEvent) => {
    if (event.isComposing || event.ctrlKey || event.metaKey || event.altKey) return;
    if (event.key === 'Escape' && this.search !== '') this.search = '';
    else if (event.key === 'ArrowDown' || event.key === 'Enter') {
      // To the first that was found, whatever it is.
      const first = this.querySelector<HTMLElement>('tr[data-id] [data-act], .templates a');
      if (first === null) return;
      first.focus();
    } else return;
    event.preventDefault();
  };
  #import = () => this.querySelector<HTMLInputElement>('[data-import]')?.click();
  #onFiles = async (event: Event) => {
    const input = event.target as HTMLInputElement;
    const files = [...(input.files ?? [])];
    input.value = '';
    await this.session.takeFiles(files);
  };
  #exportAll = async () => {
    await this.session.settle();
    this.session.act('export everything');
  };
  #placeExample = () =>
    void attempt(this.session, async ({ shelf }) => {
      const read = readSheet(exampleText);
      if (!read.ok) throw new Error('the example cannot be read');
      const there = [...(this.heads ?? []), ...this.trash].some((one) => one.id === exampleId);
      const head = there ? await shelf.add(read.value) : await shelf.place(exampleId, read.value);
      this.search = '';
      await this.#read();
      this.said = 'The example is on the shelf';
      await focusOn(this, row(head.id, 'open'));
    });
}
