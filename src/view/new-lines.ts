// Places where a new line is typed: at the foot of every section, and directly below any line.
//
// 1. What was begun in such a place stays, whatever else is done, until it is kept or taken back there: the text lives here, not in the
//    element, and moves to the last section if its own place goes.
// 2. A line that was kept is followed by the next: the place moves down behind it.
// 3. Where another tab writes nothing is open: what was begun went to that tab with the rest.
// Not here: what is typed (edit/entry-line.ts), where the rows are (paper.ts).

import type { TemplateResult } from 'lit';
import type { EntryDetail } from './edit/index.ts';
import { entryRow, loadEditing } from './in-place.ts';
import type { PaperHost } from './paper-host.ts';

/** The key of the place below a line; a section's place has the section's key. */
const below = (cell: string) => `below ${cell}`;

export class NewLines {
  readonly #host: PaperHost;
  /** Text typed so far, by the key of the open place. */
  readonly #open = new Map<string, string>();

  constructor(host: PaperHost) {
    this.#host = host;
  }

  /** Texts whose place is gone go on at the foot of the last section. */
  settle(sections: readonly string[], cells: ReadonlySet<string>) {
    if (this.#host.desk().locked !== null) this.#open.clear();
    const last = sections.at(-1) ?? '';
    for (const [key, text] of [...this.#open]) {
      const cell = key.startsWith('below ') ? key.slice('below '.length) : undefined;
      if (cell === undefined ? sections.includes(key) : cells.has(cell)) continue;
      this.#open.delete(key);
      if (text.trim() === '') continue;
      const there = this.#open.get(last)?.trim() ?? '';
      this.#open.set(last, there === '' ? text : `${there} ${text.trim()}`);
    }
  }

  foot(key: string, title: string, last: string | null): TemplateResult {
    return this.#row(key, title === '' ? 'New line' : `New line in ${title}`, last, (id) => this.#behindFoot(key, id));
  }

  isOpenBelow(cell: string): boolean {
    // Asked for every row of a large sheet: most of the time nothing is open at all.
    if (this.#open.size === 0 && this.#host.desk().newLine === null) return false;
    return this.#textOf(below(cell)) !== undefined;
  }

  below(cell: string, title: string): TemplateResult {
    const key = below(cell);
    return this.#row(key, `New line below ${title}`, cell, (id) => this.#behind(key, id));
  }

  /** `after`: the line that the new one stands behind; `goOn`: where the next one is typed. */
  #row(key: string, label: string, after: string | null, goOn: (id: string) => Promise<void>): TemplateResult {
    const desk = this.#host.desk();
    return entryRow(desk, key, label, this.#textOf(key), {
      begin: () => void this.enter(key),
      draft: (text) => {
        this.#open.set(key, text);
        desk.typeNew(key, text);
      },
      entry: ({ draft }: EntryDetail) => {
        const id = desk.insert(draft, after);
        // A line that could not be kept stays where it was typed.
        if (id === '') return this.#host.redraw();
        this.#open.set(key, '');
        desk.typeNew(key, '');
        void goOn(id);
      },
      putIn: () => this.#host.element.dispatchEvent(new CustomEvent('put-in', { detail: after, bubbles: true })),
      leave: () => {
        this.#open.delete(key);
        const place = key.startsWith('below ') ? null : this.#host.place();
        // The row takes the focus before the place goes, so that it is never lost.
        this.#host.focus(place?.cell ?? after ?? '', place?.column ?? 1);
        this.#host.redraw();
      },
    });
  }

  /** What was typed before the page was loaded anew, or in another tab, opens its place again. */
  #textOf(key: string): string | undefined {
    const { newLine } = this.#host.desk();
    if (!this.#open.get(key) && newLine?.section === key && newLine.text !== '') this.#open.set(key, newLine.text);
    return this.#open.get(key);
  }

  /** Opens the place at the foot of a section and puts the focus into it. */
  async enter(key: string) {
    const desk = this.#host.desk();
    if (desk.locked !== null) return desk.tell(desk.locked);
    await loadEditing();
    if (!this.#open.has(key)) this.#open.set(key, '');
    this.#host.redraw();
    await this.#host.drawn();
    const row = this.#host.element.querySelector(`[data-entry="${CSS.escape(key)}"]`);
    const line = row?.querySelector<HTMLElement & { updateComplete?: Promise<unknown> }>('ts-entry-line');
    await line?.updateComplete;
    line?.scrollIntoView({ block: 'nearest' });
    line?.focus();
  }

  enterBelow(cell: string) {
    return this.enter(below(cell));
  }

  async #behindFoot(key: string, id: string) {
    await this.#host.drawn();
    // What follows a new section belongs to it.
    if (this.#host.element.querySelector(`[data-section="${CSS.escape(id)}"]`) !== null) {
      this.#open.delete(key);
      await this.enter(id);
    }
    const row = this.#host.element.querySelector(`ts-row[data-cell="${CSS.escape(id)}"]`);
    row?.closest('.section')?.querySelector('ts-entry-line')?.scrollIntoView({ block: 'nearest' });
  }

  #behind(key: string, id: string) {
    this.#open.delete(key);
    return this.enterBelow(id);
  }
}
