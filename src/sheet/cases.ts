// Load cases of a sheet: what adding, renaming, moving or removing one does to the list and to the values by case.
//
// 1. A value by case goes with its case: renamed with it, dropped with it, copied where a case is made like another.
// 2. A sheet without a list has the one case `base`; the list is made with it when a second case comes.
// 3. Only cells that change are returned.
// Not here: values of a case (reading.ts), undo (edit.ts).

import type { Cell, GivenCell, LoadCase, Sheet } from './document.ts';
import { idPattern } from './schema.ts';

const baseCase: LoadCase = { id: 'base' };

/** The cases that the columns of a sheet stand for, at least one. */
export function casesOf(sheet: Sheet): readonly LoadCase[] {
  return sheet.cases === undefined || sheet.cases.length === 0 ? [baseCase] : sheet.cases;
}

export interface CasesAndCells {
  readonly cases: readonly LoadCase[] | null;
  readonly cells: readonly Cell[];
}

/** What keeps an id from being that of a new case, in words; undefined where nothing does. */
export function caseIdFault(sheet: Sheet, id: string): string | undefined {
  if (!idPattern.test(id) || id === 'constructor' || id === 'prototype') {
    return `“${id.slice(0, 60)}” cannot be the id of a case; take Latin letters, digits, . _ or -, as in start-up`;
  }
  return casesOf(sheet).some((known) => known.id === id) ? `there is a case ${id} already` : undefined;
}

export function addCase(sheet: Sheet, added: LoadCase, at: number, like?: string): CasesAndCells {
  const before = sheet.cases === undefined && added.id === baseCase.id ? [] : casesOf(sheet);
  if (before.some((known) => known.id === added.id)) throw new RangeError(`a case ${added.id} is there already`);
  const place = Math.min(Math.max(Math.trunc(at), 0), before.length);
  const cells = like === undefined ? [] : changed(sheet, (byCase) => copied(byCase, like, added.id));
  return { cases: before.toSpliced(place, 0, added), cells };
}

export function changeCase(sheet: Sheet, id: string, next: LoadCase): CasesAndCells {
  const cases = casesOf(sheet);
  const at = indexOfCase(cases, id);
  if (next.id !== id && cases.some((known) => known.id === next.id)) throw new RangeError(`a case ${next.id} is there already`);
  return { cases: cases.with(at, next), cells: next.id === id ? [] : changed(sheet, (byCase) => renamed(byCase, id, next.id)) };
}

export function moveCase(sheet: Sheet, id: string, to: number): readonly LoadCase[] {
  const cases = casesOf(sheet);
  const from = indexOfCase(cases, id);
  return cases.toSpliced(from, 1).toSpliced(Math.min(Math.max(Math.trunc(to), 0), cases.length - 1), 0, cases[from]!);
}

export function removeCase(sheet: Sheet, id: string): CasesAndCells {
  const cases = casesOf(sheet);
  const left = cases.toSpliced(indexOfCase(cases, id), 1);
  return { cases: left.length === 0 ? null : left, cells: changed(sheet, (byCase) => without(byCase, id)) };
}

function indexOfCase(cases: readonly LoadCase[], id: string): number {
  const at = cases.findIndex((known) => known.id === id);
  if (at < 0) throw new RangeError(`no case ${id}`);
  return at;
}

type ByCase = Readonly<Record<string, string>>;

/** Givens whose values by case `change` makes other; it returns its argument where nothing changes. */
function changed(sheet: Sheet, change: (byCase: ByCase) => ByCase): GivenCell[] {
  const cells: GivenCell[] = [];
  for (const cell of sheet.cells) {
    if (cell.kind !== 'given' || cell.byCase === undefined) continue;
    const next = change(cell.byCase);
    if (next === cell.byCase) continue;
    const { byCase: _, ...rest } = cell;
    cells.push(Object.keys(next).length === 0 ? rest : { ...rest, byCase: next });
  }
  return cells;
}

function copied(byCase: ByCase, from: string, to: string): ByCase {
  return Object.hasOwn(byCase, from) ? { ...byCase, [to]: byCase[from]! } : byCase;
}

function renamed(byCase: ByCase, from: string, to: string): ByCase {
  if (!Object.hasOwn(byCase, from)) return byCase;
  return Object.fromEntries(Object.entries(byCase).map(([id, value]) => [id === from ? to : id, value]));
}

function without(byCase: ByCase, id: string): ByCase {
  if (!Object.hasOwn(byCase, id)) return byCase;
  return Object.fromEntries(Object.entries(byCase).filter(([known]) => known !== id));
}
