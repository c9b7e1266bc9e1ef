// <ts-page>: the whole page: the bar, the desk with outline and side, the paper on it; print, walking, the way back.
//
// 1. It draws again whenever the desk has changed; rows and formulas decide for themselves whether they changed.
// 2. One polite voice tells what a change did; nothing else speaks.
// 3. Which screen it shows, and what is told above it, is the session's.
// 4. Before print everything is typeset and every case has its numbers; after it the screen is as before.
// 5. A note that is put away with the focus in it leaves the focus to the sheet or the shelf.
// Not here: moving in the rows (paper.ts), the bar itself (bar.ts).

import { html, nothing, type PropertyValues } from 'lit';
import { guard } from 'lit/directives/guard.js';
import { keyed } from 'lit/directives/keyed.js';
import { bar, shelfBar } from './bar.ts';
import { besideTemplate } from './beside-template.ts';
import type { Desk } from './desk.ts';
import { PageElement } from './element.ts';
import { fitAll } from './fit.ts';
import { keyDialog, showKeys } from './key-list.ts';
import { commandOf } from './keys.ts';
import { typesetAll } from './math.ts';
import { notices } from './notices.ts';
import { outline } from './outline.ts';
import type { PaperElement } from './paper.ts';
import { inPause } from './pause.ts';
import { preparePrint } from './print.ts';
import type { RowElement } from './row.ts';
import type { Session } from './session.ts';
import { alike, cellOf } from './share.ts';
import { droppedFiles, shelfScreen } from './shelf-load.ts';
import { openPoints, originAndUse } from './side.ts';
import { askForBlock, compareWithOrigin } from './template-load.ts';

/** Milliseconds without a key stroke after which the lines that nobody looks at follow. */
const restBeforeRest = 150;

export class PageElementRoot extends PageElement {
  static override properties = {
    session: { attribute: false },
    version: { state: true },
    printing: { state: true },
    section: { state: true },
    dropping: { state: true },
    unfolded: { state: true },
    narrow: { state: true },
  };
  declare session: Session | undefined;
  declare version: number;
  declare printing: boolean;
  declare section: string | null;
  declare narrow: boolean;
  /** In a narrow window: origin and use stand under the chosen row. */
  declare unfolded: boolean;
  /** Files are held over the page. */
  declare dropping: boolean;
  /** The desk that is drawn. */
  #desk: Desk | null = null;
  #trail: string[] = [];
  #drawing = false;
  #telling = false;
  #told: Session['told'] = null;
  /** What the desk showed at the last change. */
  #seen: Partial<Pick<Desk, 'editing' | 'drawn' | 'chosen'>> = {};
  #completing: ReturnType<typeof setTimeout> | undefined;
  #leave: (() => void) | undefined;
  #leaveSession: (() => void) | undefined;
  #watch: IntersectionObserver | undefined;
  /** Sections under watch; one more or less begins it anew. */
  #watched: readonly string[] = [];
  /** Another screen, or another sheet, stands where the sheet was. */
  #away = false;
  #jumpTo: string | null = null;
  /** The focus was in a note when the page began to draw. */
  #inNotice = false;
  #width = matchMedia('(max-width: 70rem)');

  constructor() {
    super();
    this.version = 0;
    this.printing = false;
    this.section = null;
    this.dropping = false;
    this.unfolded = false;
    this.narrow = this.#width.matches;
  }

  override connectedCallback() {
    super.connectedCallback();
    this.#width.addEventListener('change', this.#onWidth);
    addEventListener('beforeprint', this.#beforePrint);
    addEventListener('afterprint', this.#afterPrint);
    addEventListener('beforeunload', this.#beforeUnload);
    addEventListener('keydown', this.#onKey);
    addEventListener('dragover', this.#onDrag);
    addEventListener('dragleave', this.#onDrag);
    addEventListener('drop', this.#onDrop);
    this.addEventListener('show-keys', () => showKeys(this));
    this.addEventListener('put-in', (event) => this.#putIn((event as CustomEvent<string | null>).detail));
    this.addEventListener('walk', (event) => void this.#onWalk(event as CustomEvent<Walk>));
    this.addEventListener('jump', this.#onJump);
  }

  override disconnectedCallback() {
    super.disconnectedCallback();
    this.#leave?.();
    this.#leaveSession?.();
    this.#watch?.disconnect();
    this.#width.removeEventListener('change', this.#onWidth);
    removeEventListener('beforeprint', this.#beforePrint);
    removeEventListener('afterprint', this.#afterPrint);
    removeEventListener('beforeunload', this.#beforeUnload);
    removeEventListener('keydown', this.#onKey);
    removeEventListener('dragover', this.#onDrag);
    removeEventListener('dragleave', this.#onDrag);
    removeEventListener('drop', this.#onDrop);
  }

  protected override willUpdate(changed: PropertyValues<this>) {
    if (changed.has('session')) {
      this.#leaveSession?.();
      this.#leaveSession = this.session?.subscribe(this.#onSession);
    }
    this.#inNotice = document.activeElement?.closest('.notices') != null;
    const desk = this.session?.desk ?? null;
    if (desk === this.#desk) return;
    // Another sheet after one that lay here: the focus goes with the old one.
    if (this.#desk !== null) this.#away = true;
    this.#desk = desk;
    if (desk !== null && this.session !== undefined) void compareWithOrigin(this.session, desk);
    this.#trail = [];
    this.#watch?.disconnect();
    this.#watch = undefined;
    this.#leave?.();
    this.#leave = desk?.subscribe(() => {
      if (!this.#onlyTyped(desk)) this.version += 1;
      this.#drawLater();
    });
  }

  /** True where nothing but the text of the open field has changed: its row is drawn alone, the rest with what follows from it. */
  #onlyTyped(desk: Desk): boolean {
    const { editing, drawn, chosen } = desk;
    const before = this.#seen;
    this.#seen = { editing, drawn, chosen };
    if (editing === null || before.editing?.cell !== editing.cell || before.editing.field !== editing.field) return false;
    if (before.editing.at !== editing.at || before.drawn !== drawn || before.chosen !== chosen) return false;
    return this.#paper?.typed(editing) ?? false;
  }

  /** How far the sheet is kept may be told a frame later than what was typed is painted. */
  #onSession = () => {
    const { session } = this;
    if (session === undefined || session.desk !== this.#desk || session.route.screen !== 'sheet' || session.told !== this.#told) {
      this.#told = session?.told ?? null;
      this.requestUpdate();
      return;
    }
    if (this.#telling) return;
    this.#telling = true;
    requestAnimationFrame(() =>
      setTimeout(() => {
        this.#telling = false;
        this.requestUpdate();
      }),
    );
  };

  get desk(): Desk | null {
    return this.session?.desk ?? null;
  }

  protected override render() {
    const { session, desk } = this;
    if (session === undefined) return nothing;
    const told = notices(session);
    if (session.route.screen !== 'sheet')
      return html`${shelfBar(session)}<main id="shelf" class="shelf-desk">${told}${this.#shelf(session)}</main>
        <p class="unseen" role="status">${session.told?.trouble === false ? session.told.message : ''}</p>`;
    if (desk === null)
      return html`${shelfBar(session)}<main class="shelf-desk"><h1 class="unseen">Sheet</h1>${told}${session.keeping.kind === 'opening' ? html`<p class="loading">Opening the sheet …</p>` : nothing}</main>`;
    const { drawn: model } = desk;
    const goTo = (cell: string) => this.#goTo(cell);
    // These change with the lines or with what is chosen, not with every sign that is typed.
    const beside = () => originAndUse(desk, goTo, this.narrow ? 1 : 2);
    const sections = guard([desk, model, this.section], () => outline(model, this.section, goTo));
    const points = guard([desk, model], () => html`${besideTemplate(model, goTo)}${openPoints(desk, goTo)}`);
    return html`
      <a class="skip" href="#paper" @click=${this.#skip}>To the sheet</a>
      ${bar(session, desk, { goTo, toOpenPoints: this.#toOpenPoints, showKeys: () => showKeys(this) })}
      <div class="desk ${this.dropping ? 'dropping' : ''}">
        ${
          this.narrow
            ? html`<details class="outline"><summary>Sections and criteria</summary>${sections}</details>`
            : html`<aside class="outline" aria-label="Outline">${sections}</aside>`
        }
        <main id="paper">${told}${keyed(
          desk,
          html`<ts-paper class="paper" .desk=${desk} .version=${this.version} .printing=${this.printing}
            .foldable=${this.narrow} .beside=${this.narrow && this.unfolded ? beside() : null}></ts-paper>`,
        )}</main>
        <aside class="side" aria-label="Origin, use and open points" @keydown=${this.#sideKey}>${this.narrow ? nothing : guard([desk, model, desk.chosen, desk.reading], beside)}${points}</aside>
      </div>
      ${keyDialog()}
      <p class="unseen" role="status">${desk.announcement}</p>`;
  }

  #shelf(session: Session) {
    return session.house === null
      ? html`<p class="loading">Opening the shelf …</p>`
      : shelfScreen(session, () => this.requestUpdate());
  }

  /** What was typed is painted first; then what is looked at, once for all key strokes until then; the rest of a large sheet in a pause. */
  #drawLater() {
    if (this.#drawing) return;
    this.#drawing = true;
    requestAnimationFrame(() =>
      setTimeout(() => {
        this.#drawing = false;
        const { desk } = this;
        const stretches = this.#paper?.stretches;
        if (desk === null) return;
        const before = desk.drawn;
        if (before !== (stretches === undefined ? desk.model : desk.sketch((cell) => stretches.isLookedAt(cell))))
          this.version += 1;
        clearTimeout(this.#completing);
        this.#completing = setTimeout(() => inPause(() => this.#drawRest(desk)), restBeforeRest);
      }),
    );
  }

  #drawRest(desk: Desk) {
    if (desk === this.desk && desk.drawn !== desk.model) this.version += 1;
  }

  protected override updated() {
    const { session, desk } = this;
    if (this.#inNotice && document.activeElement === document.body) void this.#leaveNotice();
    if (session !== undefined && session.route.screen !== 'sheet')
      document.title = `${screenNames[session.route.screen]}, Tightside`;
    if (session?.route.screen !== 'sheet') this.#away = true;
    if (session?.route.screen !== 'sheet' || desk === null) return;
    if (this.#away || this.#jumpTo !== null) void this.#arrive();
    const { titleBlock, title, status } = desk.drawn;
    document.title = `${[titleBlock.documentNumber, title].filter(Boolean).join(' ')}, ${status}`;
    preparePrint(desk.drawn);
    const sections = desk.drawn.lines.filter((line) => line.kind === 'heading' && line.level === 1).map(cellOf);
    if (this.#watch === undefined || !alike(sections, this.#watched)) void this.#watchSections(sections);
  }

  async #watchSections(sections: readonly string[]) {
    this.#watched = sections;
    await this.#paper?.updateComplete;
    this.#watch?.disconnect();
    const seen = new Set<string>();
    this.#watch = new IntersectionObserver(
      (entries) => {
        for (const { target, isIntersecting } of entries) {
          const key = (target as HTMLElement).dataset['section'] ?? '';
          if (isIntersecting) seen.add(key);
          else seen.delete(key);
        }
        const order = [...this.querySelectorAll<HTMLElement>('[data-section]')].map((one) => one.dataset['section'] ?? '');
        this.section = order.find((key) => seen.has(key)) ?? null;
      },
      { rootMargin: '-120px 0px -60% 0px' },
    );
    for (const section of this.querySelectorAll('[data-section]')) this.#watch.observe(section);
  }

  get #paper(): PaperElement | null {
    return this.querySelector('ts-paper');
  }

  /** From another screen: to the line that was asked for, or where the focus would be lost, to the sheet. */
  async #arrive() {
    const cell = this.#jumpTo;
    this.#away = false;
    this.#jumpTo = null;
    await this.#complete();
    if (cell !== null) return this.#goTo(cell);
    if (document.activeElement === document.body) this.#paper?.enter({ preventScroll: true });
  }
  async #leaveNotice() {
    await this.#complete();
    if (document.activeElement !== document.body) return;
    if (this.#paper !== null) this.#paper.enter({ preventScroll: true });
    else this.querySelector<HTMLElement>('main [tabindex="-1"], .tools button')?.focus();
  }
  #onJump = (event: Event) => {
    const { sheet, cell } = (event as CustomEvent<Jump>).detail;
    this.#jumpTo = cell;
    this.session?.go({ screen: 'sheet', id: sheet });
  };

  #goTo(cell: string) {
    const from = this.desk?.chosen;
    if (from != null && from !== cell) this.#trail.push(from);
    void this.#paper?.goTo(cell);
  }

  #putIn(behind: string | null) {
    const { session, desk } = this;
    if (session !== undefined && desk !== null) void askForBlock(session, desk, behind, (cell) => this.#goTo(cell));
  }

  #onWidth = () => {
    this.narrow = this.#width.matches;
  };

  #onWalk = async (event: CustomEvent<Walk>) => {
    if (event.detail === 'fold' || event.detail === 'leave') {
      this.unfolded = event.detail === 'fold' && !this.unfolded;
      return;
    }
    if (event.detail === 'back') {
      const cell = this.#trail.pop();
      if (cell !== undefined) void this.#paper?.goTo(cell);
      return;
    }
    if (this.narrow && !this.unfolded) {
      this.unfolded = true;
      await this.#complete();
    }
    const target =
      this.querySelector<HTMLElement>(`#${event.detail} button`) ?? this.querySelector<HTMLElement>(`#${event.detail}`);
    target?.focus();
  };

  #sideKey = (event: KeyboardEvent) => {
    if (event.key === 'Escape' && this.desk?.chosen != null) {
      void this.#paper?.goTo(this.desk.chosen);
      return;
    }
    if (event.key !== 'ArrowDown' && event.key !== 'ArrowUp') return;
    const buttons = [...this.querySelectorAll<HTMLElement>('.side button')];
    const next = buttons[buttons.indexOf(event.target as HTMLElement) + (event.key === 'ArrowDown' ? 1 : -1)];
    if (next === undefined) return;
    event.preventDefault();
    next.focus();
  };

  #toOpenPoints = () => {
    const section = this.querySelector<HTMLElement>('#open-points');
    section?.scrollIntoView({ block: 'nearest' });
    section?.querySelector('button')?.focus();
  };

  #skip = (event: Event) => {
    event.preventDefault();
    this.#paper?.enter();
  };

  #onKey = (event: KeyboardEvent) => {
    const target = event.target;
    if (target instanceof HTMLInputElement || target instanceof HTMLTextAreaElement) return;
    const command = commandOf(event);
    if (command !== 'undo' && command !== 'redo') return;
    event.preventDefault();
    if (command === 'undo') this.desk?.undo();
    else this.desk?.redo();
  };

  #onDrag = (event: DragEvent) => {
    if (event.dataTransfer?.types.includes('Files') !== true) return;
    event.preventDefault();
    this.dropping = event.type === 'dragover';
  };
  #onDrop = async (event: DragEvent) => {
    this.dropping = false;
    const { session } = this;
    if (event.dataTransfer === null || event.dataTransfer.files.length === 0 || session === undefined) return;
    event.preventDefault();
    await session.takeFiles(await droppedFiles(event.dataTransfer));
  };

  #beforePrint = () => {
    this.desk?.finish();
    void this.desk?.model;
    this.printing = true;
    document.documentElement.toggleAttribute('data-print', true);
    // The rows draw what print adds before the print goes on: all of it happens in the pause after this handler.
    queueMicrotask(async () => {
      await this.#complete();
      typesetAll();
      fitAll(this);
    });
  };
  /** Page, paper and rows are drawn. */
  async #complete() {
    await this.updateComplete;
    await this.#paper?.updateComplete;
    await Promise.all([...this.querySelectorAll('ts-row')].map((row) => (row as RowElement).updateComplete));
  }

  #afterPrint = () => {
    this.printing = false;
    document.documentElement.toggleAttribute('data-print', false);
  };

  #beforeUnload = (event: BeforeUnloadEvent) => {
    const { session } = this;
    if (session === undefined) return;
    // Only what no other place has is asked about: the browser keeps everything else.
    const lost =
      session.keeping.kind === 'trouble' || (session.house?.store.backend.kind === 'memory' && this.desk?.unsaved === true);
    if (lost) event.preventDefault();
  };
}

/** A line of a sheet that another screen leads to: the detail of its `jump` event. */
export interface Jump {
  readonly sheet: string;
  readonly cell: string;
}
const screenNames = { shelf: 'Shelf', template: 'New sheet from a template', keep: 'Keep as a template' } as const;

/** Where a row asks to go, or that what is unfolded under it be folded. */
type Walk = 'origin' | 'use' | 'back' | 'fold' | 'leave';
