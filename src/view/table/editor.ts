// <ts-table-editor>: the columns and rows of a table as a grid that is typed into; a table from the clipboard or a file; copied as text.
//
// 1. One cell of the grid is in the tab order. Arrows, Enter and Page keys move; the keys of the sheet's lines add, move and remove rows.
// 2. The sheet is not touched: `table-change` { cell } on every change, bubbling; all of it is one step once the line is kept.
// 3. A wrong entry is marked in its cell and told in a sentence under the grid; the sentence leads to the cell.
// Not here: what is done to the table (edits.ts), the preview of a text (import.ts).

import { html, nothing } from 'lit';
import { live } from 'lit/directives/live.js';
import { type Calculation, type TableCell, tableFromText, tableToText } from '../../sheet/index.ts';
import { PageElement } from '../element.ts';
import * as edits from './edits.ts';
import { faultsOf, type TableFault } from './faults.ts';
import type { Incoming } from './import.ts';

/** Rows that are drawn at once. */
const shownRows = 200;
const heads = ['name', 'unit', 'title'] as const;
const headHints = { name: '', unit: 'text', title: '' } as const;

/** Rows of the grid from 0: three of heads, then the rows of the table. */
interface Place {
  readonly line: number;
  readonly column: number;
}

export class TableEditorElement extends PageElement {
  static override properties = {
    cell: { attribute: false },
    calculation: { attribute: false },
    place: { state: true },
    incoming: { state: true },
    told: { state: true },
  };
  declare cell: TableCell;
  declare calculation: Calculation;
  declare place: Place;
  /** A text that was pasted or a file that was chosen, before it is taken. */
  declare incoming: Incoming | null;
  declare told: string;

  constructor() {
    super();
    this.place = { line: heads.length, column: 0 };
    this.incoming = null;
    this.told = '';
    this.addEventListener('table-take', (event) =>
      this.#take((event as CustomEvent<Incoming & { cell: TableCell; words: string }>).detail),
    );
    this.addEventListener('table-leave', () => this.#leaveIncoming());
  }

  protected override render() {
    const { cell } = this;
    const faults = faultsOf(cell, this.calculation.sheet);
    const { line, column } = this.#inside(this.place);
    const first = Math.floor(Math.max(0, line - heads.length) / shownRows) * shownRows;
    const rows = cell.rows.slice(first, first + shownRows);
    return html`<div class="table-fields" @keydown=${this.#key} @focusin=${this.#focused} @copy=${this.#copied}>
      <p class="table-acts">
        <button type="button" class="word" title="Tab-separated text from the clipboard" @click=${() => void this.#pasteTable()}>Paste a table</button>
        <button type="button" class="word" @click=${() => this.querySelector<HTMLInputElement>('input[type=file]')?.click()}>Import a CSV file …</button>
        <input type="file" hidden accept=".csv,.tsv,.tab,.txt,text/csv,text/tab-separated-values,text/plain" @change=${(event: Event) => void this.#chosen(event)} />
        <button type="button" class="word" title="Tab-separated, with heads" @click=${() => void this.#copyTable()}>Copy as text</button>
        <span class="told" role="status">${this.told}</span></p>
      ${
        this.incoming === null
          ? nothing
          : html`<ts-table-import .incoming=${this.incoming} .cell=${cell} .calculation=${this.calculation}></ts-table-import>`
      }
      <div class="scroll"><table role="grid" aria-label="Columns and rows" aria-rowcount=${cell.rows.length + heads.length} aria-colcount=${cell.columns.length + 1}>
        <thead>${heads.map(
          (key, at) =>
            html`<tr role="row" aria-rowindex=${at + 1}><th role="rowheader" scope="row">${key}</th>${cell.columns.map(
              (one, index) =>
                this.#field({ line: at, column: index }, `${key} of ${this.#nameOf(index)}`, one[key] ?? '', {
                  wrong: key !== 'title' && faults.some((fault) => fault.row === undefined && fault.column === index),
                  hint: headHints[key],
                  set: (typed) => edits.withColumnKey(cell, index, key, typed),
                }),
            )}</tr>`,
        )}</thead>
        <tbody>${rows.map((row, index) => this.#row(row, first + index, faults))}</tbody>
      </table></div>
      ${this.#pages(first)}
      ${this.#acts(line - heads.length, column)}
      ${this.#faults(faults)}
      <p class="field-hint">Arrow keys and Enter move, Enter in the last row begins the next. Alt+Enter: a row below; Alt+↑, Alt+↓: move the row; Ctrl+Delete: remove it; Ctrl+Enter keeps the table.</p>
    </div>`;
  }

  #nameOf(at: number): string {
    return this.cell.columns[at]?.name || `column ${at + 1}`;
  }

  /** Signs that a field of the column has room for. */
  #size(column: number): number {
    const one = this.cell.columns[column];
    const longest = this.cell.rows
      .slice(0, shownRows)
      .reduce((most, row) => Math.max(most, row[column]?.length ?? 0), Math.max(one?.name.length ?? 0, one?.title?.length ?? 0));
    return Math.min(Math.max(longest, 8), 36);
  }

  #row(row: readonly string[], index: number, faults: readonly TableFault[]) {
    const own = faults.filter((fault) => fault.row === index);
    const ragged = own.some((fault) => fault.ragged);
    return html`<tr role="row" aria-rowindex=${index + heads.length + 1} class=${ragged ? 'ragged' : nothing}><th role="rowheader" scope="row">${index + 1}</th>${this.cell.columns.map(
      (_, at) =>
        this.#field({ line: index + heads.length, column: at }, `${this.#nameOf(at)}, row ${index + 1}`, row[at] ?? '', {
          wrong: own.some((fault) => fault.severity === 'error' && (fault.column === at || (ragged && row[at] === undefined))),
          hint: '',
          numeric: this.cell.columns[at]?.unit !== undefined,
          set: (typed) => edits.withEntry(this.cell, index, at, typed),
        }),
    )}</tr>`;
  }

  #field(
    { line, column }: Place,
    label: string,
    text: string,
    how: { readonly wrong: boolean; readonly hint: string; readonly numeric?: boolean; set(typed: string): TableCell },
  ) {
    const here = this.#inside(this.place);
    return html`<td role="gridcell"><input class="field ${how.numeric ? 'number' : ''}" type="text" size=${this.#size(column)} spellcheck="false" autocomplete="off" autocapitalize="off"
      tabindex=${here.line === line && here.column === column ? 0 : -1} data-line=${line} data-column=${column} aria-label=${label} placeholder=${how.hint || nothing}
      aria-invalid=${how.wrong ? 'true' : nothing} aria-describedby=${how.wrong ? 'table-faults' : nothing} .value=${live(text)}
      @input=${(event: Event) => this.#change(how.set((event.target as HTMLInputElement).value))}
      @paste=${(event: ClipboardEvent) => void this.#pasted(event, line, column)} /></td>`;
  }

  #pages(first: number) {
    const { length } = this.cell.rows;
    if (length <= shownRows) return nothing;
    const to = (row: number) => () => this.#goTo({ line: heads.length + row, column: 0 });
    return html`<p class="table-acts">Rows ${first + 1} to ${Math.min(first + shownRows, length)} of ${length}
      ${first === 0 ? nothing : html`<button type="button" class="word" @click=${to(first - shownRows)}>the ${shownRows} before</button>`}
      ${first + shownRows >= length ? nothing : html`<button type="button" class="word" @click=${to(first + shownRows)}>the next</button>`}</p>`;
  }

  /** What can be done with the row and the column of the place. */
  #acts(row: number, column: number) {
    const { cell } = this;
    const act = (word: string, label: string, does: () => void) =>
      html`<button type="button" class="word" aria-label=${label} @click=${does}>${word}</button> `;
    const name = this.#nameOf(column);
    const onRow = row >= 0 && row < cell.rows.length;
    return html`<div class="table-acts places">
      <p><span>${onRow ? `Row ${row + 1}` : 'Rows'}:</span> ${
        onRow
          ? html`${act('add above', `add above row ${row + 1}`, () => this.#do(edits.withRow(cell, row), row))}${act('add below', `add below row ${row + 1}`, () => this.#do(edits.withRow(cell, row + 1), row + 1))}${
              row === 0
                ? nothing
                : act('up', `move row ${row + 1} up`, () => this.#do(edits.withRowMoved(cell, row, -1), row - 1))
            }${row === cell.rows.length - 1 ? nothing : act('down', `move row ${row + 1} down`, () => this.#do(edits.withRowMoved(cell, row, 1), row + 1))}${act('remove', `remove row ${row + 1}`, () => this.#do(edits.withoutRow(cell, row), row))}`
          : act('add a row', 'add a row', () => this.#do(edits.withRow(cell, cell.rows.length), cell.rows.length))
      }</p>
      <p><span>${cell.columns.length === 0 ? 'Columns' : html`Column <code>${name}</code>`}:</span> ${
        cell.columns.length === 0
          ? act('add a column', 'add a column', () => this.#do(edits.withColumn(cell, 0), undefined, 0))
          : html`${act('add before', `add before ${name}`, () => this.#do(edits.withColumn(cell, column), undefined, column))}${act('add behind', `add behind ${name}`, () => this.#do(edits.withColumn(cell, column + 1), undefined, column + 1))}${
              column === 0
                ? nothing
                : act('left', `move ${name} left`, () => this.#do(edits.withColumnMoved(cell, column, -1), row, column - 1))
            }${column === cell.columns.length - 1 ? nothing : act('right', `move ${name} right`, () => this.#do(edits.withColumnMoved(cell, column, 1), row, column + 1))}${act('remove', `remove ${name}`, () => this.#do(edits.withoutColumn(cell, column), row, column))}`
      }</p></div>`;
  }

  #faults(faults: readonly TableFault[]) {
    const most = 8;
    return html`<ul id="table-faults" class="table-faults" aria-live="polite">${faults.slice(0, most).map(
      (fault) =>
        html`<li class="problem ${fault.severity}"><b>${fault.severity === 'error' ? 'Error' : 'Warning'}</b>: ${fault.message}
          ${
            fault.row === undefined && fault.column === undefined
              ? nothing
              : html`<button type="button" class="word" aria-label=${`to it: ${fault.message}`} @click=${() =>
                  this.#goTo({
                    line: fault.row === undefined ? 0 : fault.row + heads.length,
                    column: fault.column ?? 0,
                  })}>to it</button>`
          }${
            fault.ragged && fault.row !== undefined
              ? html` <button type="button" class="word" @click=${() => this.#change(edits.evenRow(this.cell, fault.row ?? 0))}>fit row ${fault.row + 1} to the columns</button>`
              : nothing
          }</li>`,
    )}${faults.length > most ? html`<li>and ${faults.length - most} more</li>` : nothing}</ul>`;
  }

  #inside({ line, column }: Place): Place {
    return {
      line: Math.max(0, Math.min(line, heads.length + this.cell.rows.length - 1)),
      column: Math.max(0, Math.min(column, this.cell.columns.length - 1)),
    };
  }

  #change(cell: TableCell) {
    this.cell = cell;
    this.told = '';
    this.dispatchEvent(new CustomEvent('table-change', { detail: { cell }, bubbles: true }));
  }
  /** A change by a command; the focus goes to the row, or to the name of the column. */
  #do(cell: TableCell, row: number | undefined, column = this.place.column) {
    this.#change(cell);
    this.#goTo({ line: row === undefined ? 0 : row + heads.length, column });
  }

  #goTo(to: Place) {
    this.place = this.#inside(to);
    const { line, column } = this.place;
    void this.updateComplete.then(() => {
      const field = this.querySelector<HTMLInputElement>(`input[data-line="${line}"][data-column="${column}"]`);
      field?.focus();
      field?.select();
      field?.scrollIntoView({ block: 'nearest', inline: 'nearest' });
    });
  }
  #focused = ({ target }: FocusEvent) => {
    if (!(target instanceof HTMLInputElement) || target.dataset['line'] === undefined) return;
    const place = { line: Number(target.dataset['line']), column: Number(target.dataset['column']) };
    if (place.line !== this.place.line || place.column !== this.place.column) this.place = place;
  };

  #key = (event: KeyboardEvent) => {
    const field = event.target;
    if (!(field instanceof HTMLInputElement) || field.dataset['line'] === undefined || event.isComposing) return;
    if (this.#does(event, field)) event.preventDefault();
  };
  /** True where the key is one of the grid. */
  #does(event: KeyboardEvent, field: HTMLInputElement): boolean {
    const { cell } = this;
    const { line, column } = this.#inside(this.place);
    const row = line - heads.length;
    const mod = event.ctrlKey || event.metaKey;
    const move = (lines: number, columns = 0) => {
      this.#goTo({ line: line + lines, column: column + columns });
      return true;
    };
    const all = field.selectionStart === 0 && field.selectionEnd === field.value.length;
    switch (event.key) {
      case 'ArrowUp':
      case 'ArrowDown': {
        const step = event.key === 'ArrowUp' ? -1 : 1;
        if (mod || event.shiftKey) return false;
        if (!event.altKey) return move(step);
        if (row >= 0) this.#do(edits.withRowMoved(cell, row, step), Math.max(0, Math.min(row + step, cell.rows.length - 1)));
        return true;
      }
      case 'ArrowLeft':
        return !mod && !event.altKey && !event.shiftKey && (all || field.selectionEnd === 0) && column > 0 && move(0, -1);
      case 'ArrowRight':
        return (
          !mod &&
          !event.altKey &&
          !event.shiftKey &&
          (all || field.selectionStart === field.value.length) &&
          column < cell.columns.length - 1 &&
          move(0, 1)
        );
      case 'PageUp':
        return move(-10);
      case 'PageDown':
        return move(10);
      case 'Home':
        return mod && move(-line, -column);
      case 'End':
        return mod && move(cell.rows.length + heads.length, cell.columns.length);
      case 'Enter':
        if (mod) {
          this.closest('form')?.requestSubmit();
          return true;
        }
        if (event.altKey) {
          this.#do(edits.withRow(cell, Math.max(0, row + 1)), Math.max(0, row + 1));
          return true;
        }
        if (event.shiftKey) return move(-1);
        if (row === cell.rows.length - 1 && (cell.rows[row] ?? ['']).some((entry) => entry !== ''))
          this.#do(edits.withRow(cell, row + 1), row + 1, 0);
        else move(1);
        return true;
      case 'Delete':
        if (!mod || row < 0) return false;
        this.#do(edits.withoutRow(cell, row), row);
        return true;
      default:
        return false;
    }
  }

  async #pasted(event: ClipboardEvent, line: number, column: number) {
    const text = event.clipboardData?.getData('text/plain') ?? '';
    if (!/[\t\n]/u.test(text.trim()) || line < heads.length) return;
    event.preventDefault();
    const into = this.calculation.sheet.settings?.decimalSign ?? '.';
    const preview = await tableFromText(text, { into });
    // A table with heads of its own is looked at first; rows alone go where they are pasted.
    if (preview.heads || preview.problems.some(({ code }) => code === 'ambiguous-sign' || code === 'too-large')) {
      this.incoming = { text, from: 'the clipboard' };
      return;
    }
    const { cell, left } = edits.withBlock(this.cell, line - heads.length, column, preview.rows);
    this.#change(cell);
    this.told = [`${preview.rows.length === 1 ? '1 row' : `${preview.rows.length} rows`} pasted`, left]
      .filter(Boolean)
      .join('; ');
  }

  async #pasteTable() {
    const text = await navigator.clipboard?.readText?.().catch(() => '');
    if (text === undefined || text.trim() === '') {
      this.told = 'Nothing could be read from the clipboard: choose an entry and paste there with Ctrl+V.';
      return;
    }
    this.incoming = { text, from: 'the clipboard' };
  }
  async #chosen(event: Event) {
    const input = event.target as HTMLInputElement;
    const file = input.files?.[0];
    input.value = '';
    if (file !== undefined) this.incoming = { text: await file.text(), from: file.name };
  }

  async #copyTable() {
    const text = await this.#text();
    const done = await navigator.clipboard?.writeText(text).then(
      () => true,
      () => false,
    );
    this.told =
      done === true
        ? `${this.cell.rows.length} rows copied, with heads`
        : 'The browser does not let the page write the clipboard.';
  }
  #text() {
    return tableToText(this.cell, 'tab');
  }
  /** With nothing selected in the field, all of the table is meant. */
  #copied = (event: ClipboardEvent) => {
    const field = event.target;
    if (!(field instanceof HTMLInputElement) || field.selectionStart !== field.selectionEnd) return;
    event.preventDefault();
    void this.#copyTable();
  };

  #take({ cell, words }: { readonly cell: TableCell; readonly words: string }) {
    this.incoming = null;
    this.#change(cell);
    this.told = `taken: ${words}`;
    this.#goTo({ line: heads.length, column: 0 });
  }
  #leaveIncoming() {
    this.incoming = null;
    this.#goTo(this.place);
  }
}
