// Lines of a sheet taken out as a small sheet of their own, and put into the same or another sheet.
//
// 1. What is taken along is a sheet: the lines, the references they cite, the cases they have values for, the decimal sign. So the reader
//    of files is its guard, and a sheet file can be pasted as well.
// 2. A name that the sheet has already gets a free suffix, in the lines that came with it and nowhere else; what the lines use and did
//    not bring along means the quantity of that name in the sheet.
// 3. Lines of another sheet come without what tracked or excused them there, and their givens are carried over until confirmed.
// Not here: blocks with one suffix for all names (insert-block.ts), the clipboard (src/view).

import { canonicalName, plainName } from '../formula/index.ts';
import { mergeReferences, renameInProse, withCitations, withDecimalSign, withProse } from './block-texts.ts';
import { casesOf } from './cases.ts';
import { type Cell, currentFormat, type Sheet } from './document.ts';
import { type Edit, newCellId } from './edit.ts';
import { citedReferences, onlyCases } from './insert-block.ts';
import { renamedCell } from './rename.ts';
import { withoutJob } from './template.ts';

/** The lines as a sheet of their own. */
export function takeLines(sheet: Sheet, ids: readonly string[]): Sheet {
  const wanted = new Set(ids);
  const cells = sheet.cells.filter(({ id }) => wanted.has(id));
  const references = citedReferences({ ...sheet, method: '', cells });
  const byCase = cells.some((cell) => cell.kind === 'given' && cell.byCase !== undefined);
  const sign = sheet.settings?.decimalSign;
  return {
    format: currentFormat,
    title: sheet.title,
    ...(references.length === 0 ? {} : { references }),
    ...(sign === undefined ? {} : { settings: { decimalSign: sign } }),
    ...(byCase && sheet.cases !== undefined ? { cases: sheet.cases } : {}),
    cells,
  };
}

export interface PastedLines {
  readonly edit: Edit;
  /** What was put in, in words: '3 lines', 'F_1_B'. */
  readonly what: string;
  /** Ids of the new cells, in order. */
  readonly cells: readonly string[];
  /** From a plain name in the lines to the plain name that it got. */
  readonly renamed: ReadonlyMap<string, string>;
  /** What did not come along, in sentences. */
  readonly notes: readonly string[];
}

/** The step that puts the lines in, the first at index `at`; `foreign`: they come from another sheet. */
export function pasteLines(sheet: Sheet, lines: Sheet, at: number, foreign: boolean): PastedLines {
  const quantities = freeNames(sheet, lines, isQuantity, canonicalName);
  const tables = freeNames(
    sheet,
    lines,
    (cell) => cell.kind === 'table',
    (name) => name,
  );
  const quantity = (name: string) => quantities.get(name);
  const { references, ids } = mergeReferences(sheet.references ?? [], citedReferences({ ...lines, method: '' }));
  const known = new Set(casesOf(sheet).map(({ id }) => id));
  const [from, to] = [lines, sheet].map(({ settings }) => settings?.decimalSign ?? '.');
  const cells = lines.cells.map((cell) => {
    const own = withDecimalSign(onlyCases(foreign ? withoutJob(cell) : cell, known), from ?? '.', to ?? '.');
    const named = renamedCell(own, { quantity, table: (name) => tables.get(name) });
    return withProse(named, (text) => renameInProse(withCitations(text, ids), quantity));
  });
  const placed = withFreeIds(sheet, cells);
  const inserts = placed.map((cell, i): Edit => ({ kind: 'insert-cell', cell, at: at + i }));
  const grown = references.length > (sheet.references ?? []).length;
  const [only] = placed;
  return {
    edit: {
      kind: 'batch',
      edits: grown ? [{ kind: 'set-head', key: 'references', value: references }, ...inserts] : inserts,
    },
    what: placed.length === 1 && only !== undefined ? wordFor(only) : `${placed.length} lines`,
    cells: placed.map(({ id }) => id),
    renamed: new Map([...quantities, ...tables].map(([name, next]) => [plainName(name), plainName(next)])),
    notes: leftOut(lines, known),
  };
}

const isQuantity = (cell: Cell) => cell.kind === 'given' || cell.kind === 'derived' || cell.kind === 'sought';
const wordFor = (cell: Cell) => ('name' in cell && cell.name !== '' ? plainName(cell.name) : cell.kind);

/** New names for those of the lines that the sheet has already. */
function freeNames(sheet: Sheet, lines: Sheet, of: (cell: Cell) => boolean, form: (name: string) => string): Map<string, string> {
  const named = ({ cells }: Sheet) => cells.flatMap((cell) => (of(cell) && 'name' in cell ? [form(cell.name)] : []));
  const here = new Set(named(sheet));
  const taken = new Set([...here, ...named(lines)]);
  const names = new Map<string, string>();
  for (const name of named(lines)) {
    if (name === '' || !here.has(name) || names.has(name)) continue;
    const next = freeName(name, taken);
    names.set(name, next);
    taken.add(next);
  }
  return names;
}

/** F_1 makes F_1_B; F_1_B, beside F_1, makes F_1_C. */
function freeName(name: string, taken: ReadonlySet<string>): string {
  const cut = /^(.+)_(?:[B-Z]|[2-9]|[1-9]\d+)$/u.exec(name)?.[1];
  const stem = cut !== undefined && taken.has(cut) ? cut : name;
  for (const letter of 'BCDEFGHIJKLMNOPQRSTUVWXYZ') if (!taken.has(`${stem}_${letter}`)) return `${stem}_${letter}`;
  let number = 2;
  while (taken.has(`${stem}_${number}`)) number += 1;
  return `${stem}_${number}`;
}

function withFreeIds(sheet: Sheet, cells: readonly Cell[]): readonly Cell[] {
  const taken = new Set(sheet.cells.map(({ id }) => id));
  const added: Cell[] = [];
  for (const cell of cells) {
    const id = taken.has(cell.id) ? newCellId({ ...sheet, cells: [...sheet.cells, ...cells, ...added] }, cell.kind) : cell.id;
    taken.add(id);
    added.push({ ...cell, id });
  }
  return added;
}

function leftOut(lines: Sheet, known: ReadonlySet<string>): readonly string[] {
  const without = new Map<string, string[]>();
  for (const cell of lines.cells) {
    if (cell.kind !== 'given') continue;
    for (const id of Object.keys(cell.byCase ?? {}))
      if (!known.has(id)) without.set(id, [...(without.get(id) ?? []), plainName(cell.name)]);
  }
  return [...without].map(
    ([id, names]) =>
      `the sheet has no case ${id}: the ${names.length === 1 ? 'value' : 'values'} of ${names.slice(0, 4).join(', ')} there ${names.length === 1 ? 'was' : 'were'} left out`,
  );
}
