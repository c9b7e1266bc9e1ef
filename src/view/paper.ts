// <ts-paper>: the ruled sheet: title block, head, the numbered rows in sections, references; and how one moves in it.
//
// 1. The rows are a grid with one cell in the tab order; its keys are those of keys.ts.
// 2. The cell that has the focus makes its row the chosen one.
// 3. Leaving a field keeps what was typed; focus then stays where it was.
// 4. A line that goes, or a field that is closed from elsewhere, leaves the focus to the line that stands in its place.
// Not here: a single row (row.ts), what lies beside the paper (page.ts).

import { html, nothing, type TemplateResult } from 'lit';
import { repeat } from 'lit/directives/repeat.js';
import type { Line } from '../record/index.ts';
import type { CellProblem } from '../sheet/index.ts';
import type { Desk, Editing, InPlace } from './desk.ts';
import { editedAs } from './drafts.ts';
import { isField, PageElement } from './element.ts';
import { provenanceText } from './given.ts';
import { columnHeads, foot, head } from './heads.ts';
import { loadEditing } from './in-place.ts';
import { commandOf, isWriting } from './keys.ts';
import { toldRow } from './line-actions.ts';
import { type LineCommand, LineCommands } from './line-commands.ts';
import { NewLines } from './new-lines.ts';
import type { PaperHost } from './paper-host.ts';
import { type Place, stillThere } from './place.ts';
import type { RowElement } from './row.ts';
import { type Section, sectionsOf, titleOf } from './sections.ts';
import { cellOf } from './share.ts';
import { type Stretch, Stretches } from './stretches.ts';
import { titleBlock } from './title-block.ts';
import { noLineProblems, problemsByLine } from './waiting.ts';

interface PlacedCell extends Place {
  readonly element: HTMLElement;
  readonly row: HTMLElement;
}

const noProblems: readonly CellProblem[] = [];
const pageStep = 8;

export class PaperElement extends PageElement {
  static override properties = {
    desk: { attribute: false },
    version: { attribute: false },
    printing: { attribute: false },
    beside: { attribute: false },
    foldable: { attribute: false },
    menu: { state: true },
  };
  declare desk: Desk;
  /** Raised by the page whenever the desk has changed. */
  declare version: number;
  declare printing: boolean;
  /** Origin and use of the chosen row, where the window has no room for them at the side. */
  declare beside: TemplateResult | null;
  declare foldable: boolean;
  /** The commands of the chosen line are unfolded. */
  declare menu: boolean;
  #place: Place | null = null;
  #pressed: PlacedCell | null = null;
  /** The press was on the row that was the chosen one already. */
  #pressedAgain = false;
  readonly #host: PaperHost = {
    element: this,
    desk: () => this.desk,
    place: () => this.#place,
    focus: (cell, column) => this.#focus(cell, column),
    redraw: () => this.requestUpdate(),
    drawn: () => this.#drawn(),
  };
  readonly #newLines = new NewLines(this.#host);
  readonly #commands = new LineCommands(this.#host);
  readonly stretches = new Stretches(() => this.requestUpdate());
  #lines: readonly Line[] = [];
  #run: ReadonlySet<string> = new Set();
  #problems = noLineProblems;

  protected override render() {
    const { desk } = this;
    const { drawn: model } = desk;
    const sections = sectionsOf(model.lines);
    const heads = model.cases.length === 1 && model.cases[0]?.title === '' ? ['Result'] : model.cases.map((one) => one.title);
    this.#problems = problemsByLine(model.problems, this.#problems);
    this.#run = new Set(desk.run);
    this.#newLines.settle(
      sections.map(({ key }) => key),
      new Set(model.lines.map(cellOf)),
    );
    this.stretches.begin(model.lines.length, this.printing);
    const place = this.#place ?? { cell: model.lines[0] ? cellOf(model.lines[0]) : '', column: 1 };
    return html`${titleBlock(desk, this.printing)}${head(desk, this.printing)}
      <div role="grid" class="grid" aria-label="Calculation" aria-colcount=${2 + heads.length} aria-multiselectable="true" @keydown=${this.#onKey} @focusin=${this.#onFocus}
        @focusout=${this.#onLeave} @pointerdown=${this.#onPress} @click=${this.#onClick} @commit=${this.#onCommit} @cancel=${this.#onCancel} @line-command=${this.#onLineCommand}
        @copy=${this.#onClipboard} @cut=${this.#onClipboard} @paste=${this.#onClipboard} @mousedown=${this.#onMouse}>
        <div role="rowgroup" class="heads">${columnHeads(desk, heads)}</div>
        ${repeat(
          sections,
          (section) => section.key,
          (section) => html`<div role="rowgroup" class="section" id=${`section-${section.key}`} data-section=${section.key}>
            ${repeat(
              this.stretches.split(section.lines),
              ({ key }) => key,
              (stretch, index) =>
                html`<div class="stretch" data-far data-stretch=${stretch.key}>${this.#stretch(stretch, place, this.printing && index === 0 ? heads : null)}</div>`,
            )}
            ${this.printing || desk.locked !== null ? nothing : this.#entryRow(section)}
          </div>`,
        )}
      </div>
      ${foot(desk, this.printing)}`;
  }

  protected override willUpdate() {
    const { lines } = this.desk.drawn;
    if (lines !== this.#lines) this.#place = stillThere(this.#place, this.#lines.map(cellOf), lines.map(cellOf));
    this.#lines = lines;
    const active = document.activeElement?.closest('.grid > *');
    if (active != null && this.contains(active)) void this.#holdFocus();
  }

  /** Taken back, followed from another tab, printed: whatever went with the focus in it. */
  async #holdFocus() {
    await this.#drawn();
    await this.querySelector<RowElement>('ts-row.chosen')?.updateComplete;
    if (document.activeElement === document.body) this.enter();
  }

  /** The focus into the grid: the cell that is in the tab order, or the place of the first line. */
  enter(how: FocusOptions = {}) {
    const first =
      this.querySelector<HTMLElement>('[data-column][tabindex="0"]') ?? this.querySelector<HTMLElement>('.grid .entry button');
    first?.focus(how);
  }

  protected override updated() {
    this.style.setProperty('--results', String(Math.max(1, this.desk.drawn.cases.length)));
    this.stretches.settle(this);
  }

  override disconnectedCallback() {
    super.disconnectedCallback();
    this.stretches.stop();
  }

  /** `heads`: titles of the columns, where they stand in the section. */
  #stretch(stretch: Stretch, place: Place, heads: readonly string[] | null) {
    const { desk } = this;
    const { lines } = stretch;
    const cells = lines.map(cellOf);
    const holds = (cell: string | null | undefined) => this.stretches.holds(stretch, cell);
    const problems = cells.map((cell) => this.#problems.of.get(cell));
    const from = [...lines, ...problems, desk.drawn.cases, desk.reading, desk.locked, this.printing];
    const here: unknown[] = cells.filter((cell) => this.#run.has(cell));
    if (holds(place.cell)) here.push(place.cell, place.column);
    if (holds(desk.chosen)) here.push(desk.chosen, this.menu, this.beside, this.foldable);
    for (const one of [desk.editing, desk.inPlace, desk.told]) if (holds(one?.cell)) here.push(one);
    // What is typed in a new line is not in the desk's lines: drawn every time.
    if (cells.some((cell) => this.#newLines.isOpenBelow(cell))) here.push({});
    return this.stretches.draw(stretch, from, here, () =>
      repeat(
        lines,
        cellOf,
        (line, index) =>
          html`${this.#row(line, place)}${this.#below(line)}${heads !== null && index === 0 ? columnHeads(desk, heads) : nothing}`,
      ),
    );
  }

  /** The text of the open field has changed: its row alone is drawn. False where there is no such row. */
  typed(editing: Editing): boolean {
    const row = this.#rowOf(editing.cell) as RowElement | null;
    if (row === null || this.printing) return false;
    row.editing = editing;
    return true;
  }

  #row(line: Line, place: Place) {
    const { desk } = this;
    const cell = cellOf(line);
    const editing = desk.editing?.cell === cell ? desk.editing : null;
    const inPlace = desk.inPlace?.cell === cell ? desk.inPlace : null;
    const former = line.kind === 'step' && line.step.kind === 'given' ? provenanceText(desk.formerProvenance(cell)) : '';
    return html`<ts-row role="row" id=${`row-${cell}`} data-cell=${cell} .desk=${desk} .line=${line} .cases=${desk.drawn.cases}
      .problems=${this.#problems.of.get(cell) ?? noProblems} .reading=${desk.reading} .column=${place.cell === cell ? place.column : -1}
      .chosen=${desk.chosen === cell} .inRun=${this.#run.has(cell)} .menu=${this.menu && desk.chosen === cell} .editing=${editing} .inPlace=${inPlace} .printing=${this.printing} .former=${former}
      .beside=${desk.chosen === cell && !this.printing ? this.beside : null}
      .foldable=${this.foldable && desk.chosen === cell && !this.printing}></ts-row>`;
  }

  #entryRow({ key, lines }: Section) {
    const [first] = lines;
    const last = lines.at(-1);
    return this.#newLines.foot(key, first?.kind === 'heading' ? first.text : '', last === undefined ? null : cellOf(last));
  }

  /** What stands under a row for a while: a new line, words about what was done. */
  #below(line: Line) {
    const cell = cellOf(line);
    if (this.printing) return nothing;
    const { told } = this.desk;
    return html`${told?.cell === cell ? toldRow(told.words) : nothing}${this.#newLines.isOpenBelow(cell) ? this.#newLines.below(cell, titleOf(line)) : nothing}`;
  }

  /** What the desk has now stands on the paper. */
  async #drawn() {
    await (this.closest('ts-page') as PageElement | null)?.updateComplete;
    await this.updateComplete;
  }

  #onLineCommand = (event: CustomEvent<LineCommand>) => {
    const at = this.#cellAt(event.target);
    if (at === null) return;
    // The button of a given means its number.
    if (event.detail === 'edit' && at.row.classList.contains('given')) this.desk.begin(at.cell, 'value', this.desk.reading);
    else this.#does(event.detail, at);
  };
  #onClipboard = (event: ClipboardEvent) => this.#commands.onClipboard(event);

  /** With Shift a press makes the run of chosen lines reach to its row. */
  #onMouse = (event: MouseEvent) => {
    const at = event.shiftKey ? this.#cellAt(event.target) : null;
    if (at === null || this.desk.editing !== null || this.desk.inPlace !== null || isField(event.target)) return;
    event.preventDefault();
    this.desk.extend(at.cell);
    this.#focus(at.cell, at.column);
  };

  /** Puts the focus on a row, in the middle of the window. */
  async goTo(cell: string, column = 1) {
    this.#place = { cell, column };
    this.desk.choose(cell);
    await this.updateComplete;
    const row = this.#rowOf(cell);
    row?.scrollIntoView({ block: 'center' });
    this.#focus(cell, column);
  }

  /** The row with what the desk has now, whether or not it was drawn before. */
  #rowOf(cell: string): HTMLElement | null {
    const find = () => this.querySelector<HTMLElement>(`ts-row[data-cell="${CSS.escape(cell)}"]`);
    if (!this.stretches.want(cell)) return find();
    this.requestUpdate();
    this.performUpdate();
    this.stretches.complete(find());
    return find();
  }

  #focus(cell: string, column: number): boolean {
    const cells = [...(this.#rowOf(cell)?.querySelectorAll<HTMLElement>('[data-column]') ?? [])];
    const target = cells.find((one) => Number(one.dataset['column']) === column) ?? cells[cells.length - 1];
    target?.focus();
    return target !== undefined;
  }

  #cellAt(target: EventTarget | null): PlacedCell | null {
    if (!(target instanceof Element)) return null;
    const row = target.closest<HTMLElement>('ts-row');
    const element = target.closest<HTMLElement>('[data-column]') ?? row?.querySelector<HTMLElement>('[data-column]') ?? null;
    if (row === null || element === null) return null;
    return { cell: row.dataset['cell'] ?? '', column: Number(element.dataset['column']), element, row };
  }

  #onFocus = (event: FocusEvent) => {
    const at = this.#cellAt(event.target);
    if (at === null) return;
    if (this.#place?.cell !== at.cell || this.#place.column !== at.column) {
      this.#place = { cell: at.cell, column: at.column };
      this.requestUpdate();
    }
    if (this.desk.chosen === at.cell) return;
    this.menu = false;
    const top = at.row.getBoundingClientRect().top;
    if (this.beside !== null) this.dispatchEvent(new CustomEvent('walk', { detail: 'leave', bubbles: true }));
    this.desk.choose(at.cell);
    // What folds up above must not move the row away from under the pointer.
    void this.updateComplete.then(() => scrollBy(0, at.row.getBoundingClientRect().top - top));
  };

  #onLeave = (event: FocusEvent) => {
    const { editing, inPlace } = this.desk;
    if (inPlace !== null) {
      const to = event.relatedTarget;
      // A click beside the fields of the line takes the focus nowhere, and ends nothing.
      if (!inPlace.unreadable && to instanceof Node && !this.#rowOf(inPlace.cell)?.contains(to)) this.desk.finish();
      return;
    }
    if (editing === null) return;
    const row = this.#rowOf(editing.cell);
    const to = event.relatedTarget;
    const leavesRow = row?.contains(event.target as Node) && !(to instanceof Node && row.contains(to));
    const toCell = to instanceof HTMLElement && to.dataset['column'] !== undefined;
    if (leavesRow || toCell) this.desk.finish();
  };

  #onPress = (event: PointerEvent) => {
    this.#pressed = this.#cellAt(event.target);
    this.#pressedAgain = this.#pressed !== null && this.#pressed.cell === this.desk.chosen;
  };

  #onClick = (event: MouseEvent) => {
    const hit = this.#cellAt(event.target);
    // A press makes its row the chosen one, and the row may grow before the pointer is lifted: what was pressed counts.
    const at = this.#pressed !== null && this.#pressed.row === hit?.row ? this.#pressed : hit;
    if (at === null || event.shiftKey || isField(event.target) || (event.target as Element).closest('a, button, label')) return;
    if (this.desk.run.length > 1) this.desk.choose(at.cell);
    const target = event.target as Element;
    if (target.closest('.in-place')) return;
    const onFormula = target.closest('.formula') !== null && this.#editedAs(at.cell) === 'formula';
    // Words are read more often than changed: the first press only chooses them.
    const onWords = this.#pressedAgain && this.#editedAs(at.cell) === 'text';
    if (!onFormula && !onWords && !isWritable(at.element)) return;
    // Text that is being selected is being read, not typed into.
    if (getSelection()?.isCollapsed === false) return;
    if (onFormula || onWords) void this.#inPlace(at.cell, this.#editedAs(at.cell));
    else this.#edit(at);
  };

  #edit(at: Place & { readonly element: HTMLElement }, text?: string) {
    const field = at.column === 0 ? 'source' : 'value';
    const caseIndex = at.column >= 2 ? at.column - 2 : this.desk.reading;
    if (isWritable(at.element)) this.desk.begin(at.cell, field, caseIndex, text);
  }

  #editedAs(cell: string): InPlace['what'] {
    return editedAs(this.desk.kept.cells.find((one) => one.id === cell));
  }

  async #inPlace(cell: string, what: InPlace['what']) {
    await loadEditing();
    this.desk.beginInPlace(cell, what);
  }

  #onCommit = () => {
    const place = this.desk.inPlace;
    if (place === null || place.unreadable) return;
    this.#backTo(place.cell);
    this.desk.finish();
  };
  #onCancel = () => {
    const place = this.desk.inPlace;
    if (place === null) return;
    this.desk.cancel();
    this.#backTo(place.cell);
  };
  /** The cell takes the focus before the piece goes, so that it is never lost. */
  #backTo(cell: string) {
    this.#focus(cell, this.#place?.column ?? 1);
  }

  async #stop(keep: boolean) {
    const { editing } = this.desk;
    if (editing === null) return;
    const place = this.#place;
    // The cell takes the focus before the field goes, so that it is never lost.
    if (place !== null) this.#focus(place.cell, place.column);
    if (this.desk.editing !== null) {
      if (keep) this.desk.finish();
      else this.desk.cancel();
    }
    await this.updateComplete;
    if (place !== null) this.#focus(place.cell, place.column);
  }

  #onKey = (event: KeyboardEvent) => {
    const at = this.#cellAt(event.target);
    if (at === null || event.isComposing) return;
    if (this.desk.inPlace !== null && event.target !== at.element) return;
    if (this.desk.editing !== null && event.target instanceof HTMLElement && event.target !== at.element) {
      if (event.key === 'Enter' && !(event.target instanceof HTMLTextAreaElement && event.shiftKey)) {
        if (event.target instanceof HTMLButtonElement) return;
        event.preventDefault();
        void this.#stop(true);
      } else if (event.key === 'Escape') {
        event.preventDefault();
        this.desk.cancel();
        void this.updateComplete.then(() => this.#focus(at.cell, at.column));
      }
      return;
    }
    if (event.target instanceof HTMLButtonElement || event.target instanceof HTMLAnchorElement) {
      if (event.key === 'Enter' || event.key === ' ') return;
    }
    if (event.key === 'Escape' && (this.menu || this.desk.run.length > 1)) {
      this.menu = false;
      this.desk.choose(at.cell);
      this.#focus(at.cell, at.column);
      return;
    }
    const command = commandOf(event);
    if (command !== undefined && this.#does(command, at)) {
      event.preventDefault();
      return;
    }
    if (command === undefined && isWriting(event) && isWritable(at.element) && at.column !== 0) {
      event.preventDefault();
      this.#edit(at, at.element.classList.contains('across') ? undefined : event.key);
    }
  };

  #does(command: LineCommand, at: PlacedCell): boolean {
    if (this.#commands.do(command, at.column)) return true;
    const cells = () => this.desk.drawn.lines.map(cellOf);
    const columns = [...at.row.querySelectorAll<HTMLElement>('[data-column]')].map((one) => Number(one.dataset['column']));
    const toRow = (index: number) => {
      const all = cells();
      const cell = all[Math.min(Math.max(index, 0), all.length - 1)];
      if (cell === undefined) return;
      this.#focus(cell, at.column);
      this.#rowOf(cell)?.scrollIntoView({ block: 'nearest' });
    };
    const toColumn = (step: number) => {
      const next = columns[columns.indexOf(at.column) + step];
      if (next !== undefined) this.#focus(at.cell, next);
    };
    const index = () => cells().indexOf(at.cell);
    switch (command) {
      case 'left':
        toColumn(-1);
        return true;
      case 'right':
        toColumn(1);
        return true;
      case 'up':
        toRow(index() - 1);
        return true;
      case 'down':
        toRow(index() + 1);
        return true;
      case 'row-start':
        this.#focus(at.cell, columns[0] ?? 0);
        return true;
      case 'row-end':
        this.#focus(at.cell, columns[columns.length - 1] ?? 0);
        return true;
      case 'sheet-start':
        toRow(0);
        return true;
      case 'sheet-end':
        toRow(Number.MAX_SAFE_INTEGER);
        return true;
      case 'page-up':
        toRow(index() - pageStep);
        return true;
      case 'page-down':
        toRow(index() + pageStep);
        return true;
      case 'edit':
        if (isWritable(at.element)) this.#edit(at);
        else void this.#inPlace(at.cell, this.#editedAs(at.cell));
        return true;
      case 'edit-all':
        void this.#inPlace(at.cell, 'fields');
        return true;
      case 'new-line':
        void this.#newLines.enter(at.row.closest<HTMLElement>('[data-section]')?.dataset['section'] ?? '');
        return true;
      case 'line-below':
        void this.#newLines.enterBelow(at.cell);
        return true;
      case 'line-menu':
        this.menu = !this.menu;
        void this.#drawn().then(() =>
          this.menu ? at.row.querySelector<HTMLElement>('.line-actions button')?.focus() : this.#focus(at.cell, at.column),
        );
        return true;
      case 'keys':
        this.dispatchEvent(new CustomEvent('show-keys', { bubbles: true }));
        return true;
      case 'origin':
      case 'use':
      case 'back':
        this.dispatchEvent(new CustomEvent('walk', { detail: command, bubbles: true }));
        return true;
      default:
        return false;
    }
  }
}

const isWritable = (cell: HTMLElement) => cell.getAttribute('aria-readonly') !== 'true' && cell.closest('ts-row.given') !== null;
