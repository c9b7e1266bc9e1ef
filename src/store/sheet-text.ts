// The text that a sheet is kept as, made anew many times a minute, and a sheet read back without losing what did not change.
//
// 1. It is JSON that readSheet reads; not the layout of a file, which is for people and for version control (writeSheet).
// 2. Each cell is written once: a cell object never changes, so its text is remembered with it.
// 3. What could not be read back is replaced on the way in, as in a file: half a surrogate pair and control characters become U+FFFD.

import { badCharacters, type Cell, type Sheet } from '../sheet/index.ts';

const textOfCell = new WeakMap<Cell, string>();
const clean = (_key: string, value: unknown) => (typeof value === 'string' ? value.replace(badCharacters, '\uFFFD') : value);

export function keptText(sheet: Sheet): string {
  const { cells, ...head } = sheet;
  const written = cells.map((cell) => {
    const known = textOfCell.get(cell);
    if (known !== undefined) return known;
    const text = JSON.stringify(cell, clean);
    textOfCell.set(cell, text);
    return text;
  });
  const rest = JSON.stringify(head, clean);
  return `${rest.slice(0, -1)},"cells":[\n${written.join(',\n')}\n]}`;
}

/** `next` with the cell objects of `before` wherever they say the same: identity means "unchanged". */
export function sharing(before: Sheet, next: Sheet): Sheet {
  const known = new Map(before.cells.map((cell) => [JSON.stringify(cell), cell]));
  return { ...next, cells: next.cells.map((cell) => known.get(JSON.stringify(cell)) ?? cell) };
}
