// <ts-math>: one formula, typeset when its part of the page comes near the window, or all at once for print.
//
// 1. A formula is typeset once; every further place gets a copy of what was drawn.
// 2. Set through the document's own interface, never as a text of markup: the policy of the page forbids styles in markup.
// 3. Nothing in a formula can link, load or grow beyond a line. A formula that cannot be set shows its text.
// Not here: what stands in a formula (src/formula), which part is near (stretches.ts).

import katex from 'katex';
import { unwatchFit, watchFit } from './fit.ts';
import { inPause } from './pause.ts';
import { allowTallSigns } from './tall-signs.ts';

allowTallSigns();

const drawn = new Map<string, DocumentFragment>();
const mostDrawn = 5000;
const longest = 5000;

function draw(tex: string): DocumentFragment {
  const known = drawn.get(tex);
  if (known !== undefined) return known;
  const holder = document.createElement('span');
  try {
    if (tex.length > longest) throw new RangeError('too long to be typeset');
    katex.render(`\\displaystyle ${tex}`, holder, {
      output: 'htmlAndMathml',
      strict: 'ignore',
      trust: false,
      maxSize: 20,
      maxExpand: 100,
      throwOnError: true,
    });
  } catch {
    const code = document.createElement('code');
    code.textContent = tex;
    holder.replaceChildren(code);
  }
  const fragment = document.createDocumentFragment();
  fragment.append(...holder.childNodes);
  if (drawn.size >= mostDrawn) drawn.clear();
  drawn.set(tex, fragment);
  return fragment;
}

/** Elements that wait: those near the window for the next frames, the others for a pause. */
const waiting = new Set<MathElement>();
const soon = new Set<MathElement>();
/** Elements with a formula in them. */
let standing = 0;
/** So many are typeset without being near the window; a larger sheet would only be slower for it. */
const mostStanding = 600;
const sliceInFrame = 8;
/** Formulas that changed far from the window wait for the end of typing. */
const restBeforePause = 700;

let framed = false;
function typesetInFrames() {
  if (framed || soon.size === 0) return;
  framed = true;
  requestAnimationFrame(() => {
    framed = false;
    const end = performance.now() + sliceInFrame;
    for (const element of soon) {
      element.typeset();
      if (performance.now() > end) break;
    }
    typesetInFrames();
  });
}

let rest: ReturnType<typeof setTimeout> | undefined;
/** What is far from the window is typeset in the pauses, a little at a time, so that find and print meet a complete sheet. */
function typesetInPauses() {
  clearTimeout(rest);
  if (waiting.size === 0 || standing >= mostStanding) return;
  rest = setTimeout(() => inPause(typesetSome), restBeforePause);
}
function typesetSome(remaining: number) {
  const end = performance.now() + Math.min(remaining, 20) - 2;
  for (const element of waiting) {
    if (standing >= mostStanding || performance.now() > end) break;
    element.typeset();
  }
  if (waiting.size > 0 && standing < mostStanding) inPause(typesetSome);
}

/** The window comes near: what waits in this part of the page is typeset, at once or within the next frames. */
export function typesetIn(part: Element, atOnce: boolean) {
  for (const element of part.querySelectorAll<MathElement>('ts-math')) {
    if (!waiting.has(element)) continue;
    if (atOnce) element.typeset();
    else soon.add(element);
  }
  typesetInFrames();
}

/** Typesets everything that still waits: before print. */
export function typesetAll() {
  for (const element of [...waiting]) element.typeset();
}

export class MathElement extends HTMLElement {
  #tex = '';
  /** What stands in the element is its formula. */
  #stands = false;

  get tex(): string {
    return this.#tex;
  }
  set tex(tex: string) {
    if (tex === this.#tex) return;
    const first = this.#tex === '';
    this.#tex = tex;
    if (this.isConnected) this.#change(first);
    else this.#stands = false;
  }

  connectedCallback() {
    if (this.#stands) {
      standing += 1;
      this.#fit();
    } else if (this.#tex !== '') this.#change(true);
  }
  disconnectedCallback() {
    waiting.delete(this);
    soon.delete(this);
    unwatchFit(this);
    if (this.#stands) standing -= 1;
  }

  typeset() {
    waiting.delete(this);
    soon.delete(this);
    this.replaceChildren(draw(this.#tex).cloneNode(true));
    if (!this.#stands) standing += 1;
    this.#stands = true;
    this.#fit();
  }

  /** What is read changes at once; elsewhere a formula goes, and waits for its turn: no number of before is ever met. */
  #change(first: boolean) {
    const far = this.closest('[data-far]') !== null;
    if (!far && !first) return this.typeset();
    if (this.#stands) standing -= 1;
    this.#stands = false;
    this.replaceChildren();
    waiting.add(this);
    if (far) typesetInPauses();
    else {
      soon.add(this);
      typesetInFrames();
    }
  }
  #fit() {
    if (this.parentElement?.classList.contains('relation')) watchFit(this);
  }
}
