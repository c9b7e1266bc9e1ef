// What belongs to the sheet as a whole, changed so that the lines go with it: references and their citations, the decimal sign, the
// fields of the title block.
//
// 1. A reference that gets another id is cited by it everywhere; one that goes leaves its citations as they stand.
// 2. With another decimal sign every number of the sheet is written with it: its meaning stays.
// 3. A field that is emptied leaves no key behind.
// Not here: cases (cases.ts), single edits (edit.ts).

import { withCitations, withDecimalSign, withProse } from './block-texts.ts';
import type { Cell, Reference, Settings, Sheet, TitleBlock } from './document.ts';
import type { Edit, SetHead } from './edit.ts';
import { idPattern } from './schema.ts';

/** What keeps an id from being that of a reference, in words; `own`: the one that it has. */
export function referenceIdFault(sheet: Sheet, id: string, own: string): string | undefined {
  if (id === own) return undefined;
  if (!/^[A-Za-z][A-Za-z0-9]{0,7}$/u.test(id) || !idPattern.test(id))
    return `“${id.slice(0, 40)}” cannot be cited: take a letter, then letters and digits, as in R3`;
  return (sheet.references ?? []).some((known) => known.id === id) ? `there is a reference ${id} already` : undefined;
}

/** An id that no reference has: R4. */
export function newReferenceId(sheet: Sheet): string {
  let last = 0;
  for (const { id } of sheet.references ?? []) if (/^R\d{1,6}$/u.test(id)) last = Math.max(last, Number(id.slice(1)));
  return `R${last + 1}`;
}

const references = (list: readonly Reference[]): Edit => ({
  kind: 'set-head',
  key: 'references',
  value: list.length === 0 ? null : list,
});

export function addReference(sheet: Sheet, added: Reference): Edit {
  return references([...(sheet.references ?? []), added]);
}

/** The reference at this place with another text; with another id its citations follow. */
export function changeReference(sheet: Sheet, at: number, next: Reference): Edit {
  const list = sheet.references ?? [];
  const before = list[at];
  if (before === undefined) throw new RangeError(`no reference at ${at}`);
  const set = references(list.with(at, next));
  if (next.id === before.id) return set;
  const ids = new Map([[before.id, next.id]]);
  const heads = (['purpose', 'method', 'conclusion'] as const).flatMap((key): SetHead[] => {
    const text = sheet[key];
    const cited = text === undefined ? undefined : withCitations(text, ids);
    return cited === undefined || cited === text ? [] : [{ kind: 'set-head', key, value: cited }];
  });
  const cells = changedCells(sheet, (cell) => withProse(cell, (text) => withCitations(text, ids)));
  return { kind: 'batch', edits: [set, ...heads, ...(cells.length === 0 ? [] : [{ kind: 'set-cells' as const, cells }])] };
}

export function removeReference(sheet: Sheet, at: number): Edit {
  return references((sheet.references ?? []).toSpliced(at, 1));
}

export function moveReference(sheet: Sheet, at: number, to: number): Edit {
  const list = sheet.references ?? [];
  const moved = list[at];
  return references(moved === undefined ? list : list.toSpliced(at, 1).toSpliced(to, 0, moved));
}

/** One setting; with the decimal sign the numbers of all lines change. */
export function changeSetting<Key extends keyof Settings>(sheet: Sheet, key: Key, value: NonNullable<Settings[Key]>): Edit {
  const set: Edit = { kind: 'set-head', key: 'settings', value: { ...sheet.settings, [key]: value } };
  const [from, to] = [sheet.settings?.decimalSign ?? '.', value];
  if (key !== 'decimalSign' || (to !== '.' && to !== ',')) return set;
  const cells = changedCells(sheet, (cell) => withDecimalSign(cell, from, to));
  return cells.length === 0 ? set : { kind: 'batch', edits: [set, { kind: 'set-cells', cells }] };
}

/** One field of the title block. */
export function changeTitleBlock(sheet: Sheet, key: keyof TitleBlock, text: string): Edit {
  const { [key]: _, ...rest } = sheet.titleBlock ?? {};
  const next: TitleBlock = text.trim() === '' ? rest : { ...sheet.titleBlock, [key]: text.trim() };
  return { kind: 'set-head', key: 'titleBlock', value: Object.keys(next).length === 0 ? null : next };
}

function changedCells(sheet: Sheet, change: (cell: Cell) => Cell): Cell[] {
  return sheet.cells.flatMap((cell) => {
    const next = change(cell);
    return next === cell || JSON.stringify(next) === JSON.stringify(cell) ? [] : [next];
  });
}
