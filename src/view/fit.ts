// Makes a long formula fit its column: broken into lines at its outermost signs where it can be, else a little smaller, else running on
// under the results, whose own line is above.
//
// 1. Not below `smallInColumn` in the column, not below `smallest` across the row; what is still too wide scrolls in its own box,
//    by keyboard too.
// 2. One observer for all; sizes are read together and written together, so that a screenful costs one layout.
// Not here: where a line may break (KaTeX, at signs outside of fractions and brackets).

const smallInColumn = 0.84;
const smallest = 0.7;

interface Fitting {
  readonly part: HTMLElement;
  readonly box: HTMLElement;
  readonly scale: number;
  readonly extra: number;
  readonly over: boolean;
}

function measure(part: HTMLElement): Fitting | null {
  const box = part.closest<HTMLElement>('.equation');
  const relation = part.parentElement;
  const row = part.closest<HTMLElement>('ts-row');
  if (box === null || relation === null || row === null || !part.isConnected) return null;
  const scale = Number(part.dataset['scale'] ?? '1');
  // The widest piece that cannot be broken, at full size.
  const pieces = [...part.querySelectorAll('.katex-html > .katex-base')].map((base) => base.getBoundingClientRect().width);
  const widest = Math.max(0, ...pieces) / scale;
  const left = relation.getBoundingClientRect().left;
  // What goes on below a line is set in.
  const inset = pieces.length > 1 ? Number.parseFloat(getComputedStyle(part).paddingLeft) || 0 : 0;
  const room = box.getBoundingClientRect().right - left - inset;
  if (widest === 0 || room <= 0) return null;
  if (widest * smallInColumn <= room) return { part, box, scale: Math.min(1, rounded(room / widest)), extra: 0, over: false };
  const across = row.getBoundingClientRect().right - left - 12;
  const scaled = Math.min(1, rounded(across / widest));
  // A line that goes across the results must be a line of its own.
  const last =
    relation.lastElementChild === part &&
    (relation.childElementCount > 1 || relation.previousElementSibling?.className === 'case');
  if (last && across > room + 60 && scaled >= smallest) return { part, box, scale: scaled, extra: across - room, over: false };
  return { part, box, scale: Math.max(smallest, Math.min(1, rounded(room / widest))), extra: 0, over: widest * smallest > room };
}

const rounded = (ratio: number) => Math.floor(ratio * 100) / 100;

function write(found: readonly (Fitting | null)[]) {
  for (const fitting of found) {
    if (fitting === null) continue;
    const { part, box, scale, extra, over } = fitting;
    const key = `${scale} ${Math.round(extra)} ${over}`;
    if (part.dataset['fitting'] === key) continue;
    part.dataset['fitting'] = key;
    part.dataset['scale'] = String(scale);
    part.style.setProperty('--scale', String(scale));
    part.style.setProperty('--extra', `${Math.round(extra)}px`);
    part.toggleAttribute('data-across', extra > 0);
    part.toggleAttribute('data-over', over);
    if (box.querySelector('[data-over]') === null) box.removeAttribute('tabindex');
    else box.tabIndex = 0;
  }
}

const observer = new ResizeObserver((entries) => write(entries.map(({ target }) => measure(target as HTMLElement))));

export const watchFit = (part: HTMLElement) => observer.observe(part);
export const unwatchFit = (part: HTMLElement) => observer.unobserve(part);

/** Measures and fits everything at once, for a layout that will not be observed: print. */
export function fitAll(root: ParentNode) {
  write([...root.querySelectorAll<HTMLElement>('.relation > ts-math')].map(measure));
}
