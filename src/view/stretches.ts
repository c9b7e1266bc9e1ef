// The rows of a large sheet in stretches: what is near the window is drawn at once, the rest in the pauses.
//
// 1. Every row is drawn in the end, so that the browser's own search, a screen reader and print meet a complete sheet.
// 2. A stretch that is far from the window may lag behind the desk for some pauses; it is drawn before it comes into the window.
// 3. A stretch keeps its rows while rows come and go around it: an element that has the focus is not made anew.
// 4. A sheet of a few screens is always drawn whole.
// Not here: the rows (row.ts), what a stretch is drawn from (paper.ts), formulas (math.ts).

import { nothing } from 'lit';
import { guard } from 'lit/directives/guard.js';
import type { Line } from '../record/index.ts';
import { typesetIn } from './math.ts';
import { inPause } from './pause.ts';
import type { RowElement } from './row.ts';
import { alikeList, cellOf } from './share.ts';

export interface Stretch {
  readonly key: string;
  readonly lines: readonly Line[];
}

/** Rows of a new stretch, and how far it may grow. */
const usual = 20;
const most = 40;
/** A sheet of so many rows is drawn whole; of a larger one, these are drawn before anybody knows what is near. */
const small = 120;
const first = 60;
const margin = '1200px 0px';

const nothingDrawn: unknown[] = [];
const noRows = () => nothing;

export class Stretches {
  readonly #redraw: () => void;
  /** Stretch of each row, by cell; those of the render that is going on. */
  #home: ReadonlyMap<string, string> = new Map();
  #next = new Map<string, string>();
  readonly #used = new Set<string>();
  readonly #counts = new Map<string, number>();
  #serial = 0;
  #rows = 0;
  #all = false;
  /** What each stretch was last drawn from. */
  readonly #drawn = new Map<string, unknown[]>();
  readonly #behind = new Set<string>();
  readonly #near = new Set<string>();
  readonly #wanted = new Set<string>();
  /** Stretches that were last drawn with something chosen, edited or told in them. */
  readonly #lively = new Set<string>();
  #watching = false;
  #waits = false;
  readonly #elements = new Map<string, HTMLElement>();
  readonly #observer = new IntersectionObserver(
    (entries) => {
      this.#watching = true;
      let late = false;
      for (const { target, isIntersecting } of entries) {
        const key = (target as HTMLElement).dataset['stretch'] ?? '';
        target.toggleAttribute('data-far', !isIntersecting);
        if (isIntersecting) {
          this.#near.add(key);
          typesetIn(target, isInWindow(target));
        } else this.#near.delete(key);
        late ||= isIntersecting && this.#behind.has(key);
      }
      if (late) this.#redraw();
    },
    { rootMargin: margin },
  );

  constructor(redraw: () => void) {
    this.#redraw = redraw;
  }

  /** A render begins. `rows`: of the whole sheet; `all`: nothing is left for later. */
  begin(rows: number, all: boolean) {
    this.#all = all || rows <= small;
    this.#rows = 0;
    this.#next = new Map();
    this.#used.clear();
    this.#behind.clear();
  }

  /** The lines of one section in stretches. */
  split(lines: readonly Line[]): readonly Stretch[] {
    const stretches: { key: string; lines: Line[] }[] = [];
    let last: { key: string; lines: Line[] } | undefined;
    for (const line of lines) {
      const cell = cellOf(line);
      const home = this.#home.get(cell);
      const free = home !== undefined && !this.#used.has(home);
      const size = last?.lines.length ?? 0;
      if (last === undefined || (free && home !== last.key) || size >= most || (home === undefined && size >= usual)) {
        last = { key: free ? home : this.#newKey(), lines: [] };
        this.#used.add(last.key);
        stretches.push(last);
      }
      last.lines.push(line);
      this.#next.set(cell, last.key);
    }
    return stretches;
  }

  #newKey(): string {
    this.#serial += 1;
    return String(this.#serial);
  }

  holds({ key }: Stretch, cell: string | null | undefined): boolean {
    return cell != null && this.#next.get(cell) === key;
  }

  /**
   * The rows of a stretch, drawn anew only where what they are drawn from is something else than last time: `from`, and `here`, what is
   * chosen, edited or told in it, which is never left for later.
   */
  draw({ key, lines }: Stretch, from: readonly unknown[], here: readonly unknown[], rows: () => unknown) {
    const now = here.length > 0 || this.#lively.has(key);
    if (here.length > 0) this.#lively.add(key);
    else this.#lively.delete(key);
    return this.#draw(key, lines.length, [...from, ...here], now, rows);
  }

  #draw(key: string, count: number, from: unknown[], now: boolean, rows: () => unknown) {
    const before = this.#drawn.get(key);
    const early = !this.#watching && this.#rows < first;
    this.#rows += count;
    this.#counts.set(key, count);
    if (before !== undefined && alikeList(before, from)) return guard(before, rows);
    if (now || early || this.#all || this.#near.has(key) || this.#wanted.has(key)) {
      this.#drawn.set(key, from);
      return guard(from, rows);
    }
    this.#behind.add(key);
    return before === undefined ? guard(nothingDrawn, noRows) : guard(before, rows);
  }

  /** The render stands in the page: new stretches are watched, what is behind waits for a pause. */
  settle(root: ParentNode) {
    this.#home = this.#next;
    this.#wanted.clear();
    for (const [key, element] of this.#elements) if (!this.#used.has(key) || !element.isConnected) this.#forget(key);
    if (this.#elements.size < this.#used.size) {
      for (const element of root.querySelectorAll<HTMLElement>('[data-stretch]')) {
        const key = element.dataset['stretch'] ?? '';
        const known = this.#elements.get(key);
        if (known === element) continue;
        if (known !== undefined) this.#observer.unobserve(known);
        this.#elements.set(key, element);
        this.#observer.observe(element);
        // Its height until it is drawn.
        element.style.setProperty('--rows', String(this.#counts.get(key) ?? usual));
      }
    }
    this.#later();
  }

  #forget(key: string) {
    const element = this.#elements.get(key);
    if (element !== undefined) this.#observer.unobserve(element);
    this.#elements.delete(key);
    this.#near.delete(key);
    if (this.#used.has(key)) return;
    this.#drawn.delete(key);
    this.#lively.delete(key);
    this.#counts.delete(key);
  }

  /** True where the row of this cell may be in the window, or something is done in it. */
  isLookedAt(cell: string): boolean {
    const key = this.#home.get(cell);
    return key === undefined || this.#all || !this.#watching || this.#near.has(key) || this.#lively.has(key);
  }

  /** True where the row of this cell was left for later: the next render draws it. */
  want(cell: string): boolean {
    const key = this.#home.get(cell);
    if (key === undefined || !this.#behind.has(key)) return false;
    this.#wanted.add(key);
    return true;
  }

  /** The rows around `row` stand complete, with their formulas, before this returns. */
  complete(row: HTMLElement | null) {
    const stretch = row?.closest('[data-stretch]');
    for (const each of stretch?.querySelectorAll<RowElement>('ts-row') ?? []) each.drawNow();
    if (stretch) typesetIn(stretch, true);
  }

  /** Nothing waits any more: the paper is gone. */
  stop() {
    this.#observer.disconnect();
    this.#elements.clear();
    this.#behind.clear();
  }

  #later() {
    if (this.#waits || this.#behind.size === 0) return;
    this.#waits = true;
    inPause((remaining) => {
      this.#waits = false;
      let room = remaining > 20 ? 3 : 1;
      for (const key of this.#behind) {
        if (room === 0) break;
        room -= 1;
        this.#wanted.add(key);
      }
      if (this.#wanted.size > 0) this.#redraw();
    });
  }
}

function isInWindow(element: Element): boolean {
  const { top, bottom } = element.getBoundingClientRect();
  return bottom > 0 && top < innerHeight;
}
