// <ts-math>: one formula, typeset when it comes near the window, or all at once for print.
//
// 1. A formula is typeset once; every further place gets a copy of what was drawn.
// 2. Set through the document's own interface, never as a text of markup: the policy of the page forbids styles in markup.
// 3. Nothing in a formula can link, load or grow beyond a line. A formula that cannot be set shows its text.
// Not here: what stands in a formula (src/formula).

import katex from 'katex';
import { unwatchFit, watchFit } from './fit.ts';
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

/** Elements that wait for the window to come near. */
const waiting = new Set<MathElement>();
const near = new IntersectionObserver(
  (entries) => {
    for (const entry of entries) if (entry.isIntersecting) (entry.target as MathElement).typeset();
  },
  { rootMargin: '800px 0px' },
);

let idle = false;
// What is not in view is typeset in the pauses, a little at a time, so that find and print meet a complete sheet.
function typesetInPauses() {
  if (idle || waiting.size === 0 || waiting.size > 1500) return;
  idle = true;
  const later =
    globalThis.requestIdleCallback ??
    ((work: (until: { timeRemaining(): number }) => void) => setTimeout(() => work({ timeRemaining: () => 5 }), 50));
  later((until) => {
    idle = false;
    for (const element of waiting) {
      if (until.timeRemaining() < 2) break;
      element.typeset();
    }
    typesetInPauses();
  });
}

/** Typesets everything that still waits: before print. */
export function typesetAll() {
  for (const element of [...waiting]) element.typeset();
}

export class MathElement extends HTMLElement {
  #tex = '';

  get tex(): string {
    return this.#tex;
  }
  set tex(tex: string) {
    if (tex === this.#tex) return;
    const was = this.#tex;
    this.#tex = tex;
    // What is on the screen changes at once; what is not yet there waits for its turn.
    if (was !== '' && !waiting.has(this)) this.#put();
    else if (this.isConnected) this.#wait();
  }

  connectedCallback() {
    if (this.#tex !== '' && this.firstChild === null) this.#wait();
  }
  disconnectedCallback() {
    waiting.delete(this);
    near.unobserve(this);
    unwatchFit(this);
  }

  typeset() {
    waiting.delete(this);
    near.unobserve(this);
    this.#put();
  }

  #wait() {
    waiting.add(this);
    near.observe(this);
    typesetInPauses();
  }
  #put() {
    this.replaceChildren(draw(this.#tex).cloneNode(true));
    if (this.parentElement?.classList.contains('relation')) watchFit(this);
  }
}
