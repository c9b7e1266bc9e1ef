// What the commands of a line do on the paper: the desk acts, the focus follows, and never falls out of the rows.
//
// 1. The row that will have the focus takes it before the old one goes.
// 2. While text is selected, or the focus is in a field, the clipboard is the browser's.
// Not here: the acts themselves (run.ts), the buttons (line-actions.ts), keys (keys.ts).

import type { Command } from './keys.ts';
import type { PaperHost } from './paper-host.ts';
import { copyRun, duplicateRun, moveRun, pasteText, removeRun } from './run.ts';

/** What a button at the line may ask for. */
export type LineCommand = Command | 'copy' | 'cut' | 'paste';

export class LineCommands {
  readonly #host: PaperHost;
  /** What was copied last, for a browser that lets a page write the clipboard but not read it. */
  #copied = '';

  constructor(host: PaperHost) {
    this.#host = host;
  }

  /** False where it is no command of a line. */
  do(command: LineCommand, column: number): boolean {
    const desk = this.#host.desk();
    switch (command) {
      case 'remove':
        this.#takeOut(column, 'removal');
        return true;
      case 'move-up':
      case 'move-down':
        if (moveRun(desk, command === 'move-up' ? -1 : 1)) void this.#focusChosen(column);
        return true;
      case 'duplicate':
        duplicateRun(desk);
        void this.#focusChosen(column);
        return true;
      case 'extend-up':
      case 'extend-down':
        this.#extend(command === 'extend-up' ? -1 : 1, column);
        return true;
      case 'copy':
        void this.#write(copyRun(desk), () => undefined);
        return true;
      case 'cut':
        void this.#write(copyRun(desk), () => this.#takeOut(column, 'cut'));
        return true;
      case 'put-in':
        this.#host.element.dispatchEvent(new CustomEvent('put-in', { detail: desk.chosen, bubbles: true }));
        return true;
      case 'paste':
        void this.#read(column);
        return true;
      default:
        return false;
    }
  }

  onClipboard(event: ClipboardEvent) {
    if (event.defaultPrevented || this.#isBrowsers(event) || event.clipboardData === null) return;
    const column = this.#host.place()?.column ?? 1;
    if (event.type === 'paste') {
      event.preventDefault();
      void this.#paste(event.clipboardData.getData('text/plain'), column);
      return;
    }
    const text = copyRun(this.#host.desk());
    if (text === '') return;
    this.#copied = text;
    event.clipboardData.setData('text/plain', text);
    event.preventDefault();
    if (event.type === 'cut') this.#takeOut(column, 'cut');
  }

  #isBrowsers({ target, type }: ClipboardEvent): boolean {
    if (!(target instanceof Element) || target.closest('ts-row') === null) return true;
    if (target.closest('input, textarea, select, .in-place, ts-line-editor') !== null) return true;
    return type !== 'paste' && getSelection()?.isCollapsed === false;
  }

  #extend(step: -1 | 1, column: number) {
    const desk = this.#host.desk();
    const at = desk.kept.cells.findIndex(({ id }) => id === desk.chosen);
    const next = at < 0 ? undefined : desk.kept.cells[at + step];
    if (next === undefined) return;
    desk.extend(next.id);
    this.#host.focus(next.id, column);
  }

  #takeOut(column: number, how: 'removal' | 'cut') {
    const desk = this.#host.desk();
    desk.finish();
    const { run } = desk;
    const last = run.at(-1);
    if (last === undefined) return;
    const { cells } = desk.kept;
    const end = cells.findIndex(({ id }) => id === last);
    const next = cells[end + 1] ?? cells[end - run.length];
    if (next !== undefined) this.#host.focus(next.id, column);
    removeRun(desk, run, how);
    if (next === undefined) void this.#focusFirst();
    else void this.#focusChosen(column);
  }

  /** The clipboard is written from a button; where it cannot be, what was copied can still be pasted here. */
  async #write(text: string, then: () => void) {
    if (text === '') return;
    this.#copied = text;
    await navigator.clipboard?.writeText(text).catch(() => undefined);
    then();
  }

  async #read(column: number) {
    const text = await navigator.clipboard?.readText?.().catch(() => undefined);
    const found = text === undefined || text === '' ? this.#copied : text;
    if (found !== '') return this.#paste(found, column);
    const desk = this.#host.desk();
    desk.tell('the browser does not let the page read the clipboard: paste with Ctrl+V', desk.chosen ?? undefined);
  }

  async #paste(text: string, column: number) {
    await pasteText(this.#host.desk(), text);
    await this.#focusChosen(column);
  }

  async #focusChosen(column: number) {
    await this.#host.drawn();
    const { chosen } = this.#host.desk();
    if (chosen === null || !this.#host.focus(chosen, column)) return;
    document.activeElement?.closest('ts-row')?.scrollIntoView({ block: 'nearest' });
    this.#host.element.querySelector('.row.told')?.scrollIntoView({ block: 'nearest' });
  }

  /** No line is left: the place of the first one. */
  async #focusFirst() {
    await this.#host.drawn();
    this.#host.element.querySelector<HTMLElement>('.entry button')?.focus();
  }
}
