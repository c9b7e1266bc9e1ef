// Editing as steps: plain data that says what changes, applied to a sheet, with the step that takes it back.
//
// 1. A sheet is never changed: an edit makes a new one that shares every cell it did not touch, by identity.
// 2. applyEdit(applyEdit(s, e).sheet, inverse).sheet equals s, key for key.
// 3. Edits are plain JSON, so that they can be kept across a reload and sent to another tab.
// 4. An edit of a cell or case that is not there is a fault of the program and throws; what a user types into a cell never is.
// Not here: cases (cases.ts), renaming (rename.ts), the order of steps (history.ts).

import { addCase, changeCase, moveCase, removeCase } from './cases.ts';
import type { Cell, LoadCase, Sheet } from './document.ts';
import { renamedCells } from './rename.ts';

/** What belongs to the sheet as a whole. */
export type HeadKey = Exclude<keyof Sheet, 'format' | 'cells' | 'cases'>;
/** One key of the head with its new value; null takes the key out. */
export type SetHead = {
  readonly [Key in HeadKey]: { readonly kind: 'set-head'; readonly key: Key; readonly value: NonNullable<Sheet[Key]> | null };
}[HeadKey];

export type Edit =
  /** Puts the cell in the place of the one with its id. */
  | { readonly kind: 'set-cell'; readonly cell: Cell }
  | { readonly kind: 'set-cells'; readonly cells: readonly Cell[] }
  | { readonly kind: 'insert-cell'; readonly cell: Cell; readonly at: number }
  | { readonly kind: 'remove-cell'; readonly id: string }
  /** `to` is the index that the cell has afterwards. */
  | { readonly kind: 'move-cell'; readonly id: string; readonly to: number }
  | SetHead
  /** The list alone; the values by case stay as they are. Null: the sheet has the one case `base`. */
  | { readonly kind: 'set-cases'; readonly cases: readonly LoadCase[] | null }
  /** `like`: values by case are copied from that case. */
  | { readonly kind: 'add-case'; readonly case: LoadCase; readonly at: number; readonly like?: string }
  | { readonly kind: 'change-case'; readonly id: string; readonly case: LoadCase }
  | { readonly kind: 'move-case'; readonly id: string; readonly to: number }
  | { readonly kind: 'remove-case'; readonly id: string }
  /** In every formula, note, drawing and chart as well; names as typed or canonical. */
  | { readonly kind: 'rename-quantity'; readonly from: string; readonly to: string }
  | { readonly kind: 'batch'; readonly edits: readonly Edit[] };

export interface Edited {
  readonly sheet: Sheet;
  readonly inverse: Edit;
}

export function applyEdit(sheet: Sheet, edit: Edit): Edited {
  switch (edit.kind) {
    case 'set-cell':
      return setCells(sheet, [edit.cell]);
    case 'set-cells':
      return setCells(sheet, edit.cells);
    case 'insert-cell': {
      if (sheet.cells.some((cell) => cell.id === edit.cell.id)) throw new RangeError(`a cell ${edit.cell.id} is there already`);
      const at = inside(edit.at, sheet.cells.length);
      return {
        sheet: { ...sheet, cells: sheet.cells.toSpliced(at, 0, edit.cell) },
        inverse: { kind: 'remove-cell', id: edit.cell.id },
      };
    }
    case 'remove-cell': {
      const at = indexOfCell(sheet, edit.id);
      const cell = sheet.cells[at]!;
      return { sheet: { ...sheet, cells: sheet.cells.toSpliced(at, 1) }, inverse: { kind: 'insert-cell', cell, at } };
    }
    case 'move-cell': {
      const from = indexOfCell(sheet, edit.id);
      const to = inside(edit.to, sheet.cells.length - 1);
      const cells = sheet.cells.toSpliced(from, 1).toSpliced(to, 0, sheet.cells[from]!);
      return { sheet: { ...sheet, cells }, inverse: { kind: 'move-cell', id: edit.id, to: from } };
    }
    case 'set-head':
      return setHead(sheet, edit);
    case 'set-cases':
      return setCases(sheet, edit.cases);
    case 'add-case':
      return setCasesAndCells(sheet, addCase(sheet, edit.case, edit.at, edit.like));
    case 'change-case':
      return setCasesAndCells(sheet, changeCase(sheet, edit.id, edit.case));
    case 'move-case':
      return setCases(sheet, moveCase(sheet, edit.id, edit.to));
    case 'remove-case':
      return setCasesAndCells(sheet, removeCase(sheet, edit.id));
    case 'rename-quantity':
      return setCells(sheet, renamedCells(sheet, edit.from, edit.to));
    case 'batch':
      return applyAll(sheet, edit.edits);
  }
}

function applyAll(sheet: Sheet, edits: readonly Edit[]): Edited {
  let now = sheet;
  const inverses: Edit[] = [];
  for (const edit of edits) {
    const edited = applyEdit(now, edit);
    now = edited.sheet;
    inverses.push(edited.inverse);
  }
  return { sheet: now, inverse: { kind: 'batch', edits: inverses.reverse() } };
}

function setCells(sheet: Sheet, cells: readonly Cell[]): Edited {
  const next = new Map(cells.map((cell) => [cell.id, cell]));
  const before: Cell[] = [];
  const all = sheet.cells.map((cell) => {
    const put = next.get(cell.id);
    if (put === undefined) return cell;
    before.push(cell);
    return put;
  });
  if (before.length < next.size) {
    const known = new Set(before.map((cell) => cell.id));
    throw new RangeError(`no cell ${[...next.keys()].find((id) => !known.has(id))}`);
  }
  const [only] = before;
  const inverse: Edit = before.length === 1 && only ? { kind: 'set-cell', cell: only } : { kind: 'set-cells', cells: before };
  return { sheet: before.length === 0 ? sheet : { ...sheet, cells: all }, inverse };
}

function setHead(sheet: Sheet, edit: SetHead): Edited {
  const before = sheet[edit.key];
  const inverse = { kind: 'set-head', key: edit.key, value: before ?? null } as SetHead;
  return { sheet: withKey(sheet, edit.key, edit.value), inverse };
}

function setCases(sheet: Sheet, cases: readonly LoadCase[] | null): Edited {
  return { sheet: withKey(sheet, 'cases', cases), inverse: { kind: 'set-cases', cases: sheet.cases ?? null } };
}

function withKey(sheet: Sheet, key: keyof Sheet, value: unknown): Sheet {
  const { [key]: _, ...rest } = sheet;
  return (value === null ? rest : { ...rest, [key]: value }) as Sheet;
}

function setCasesAndCells(
  sheet: Sheet,
  next: { readonly cases: readonly LoadCase[] | null; readonly cells: readonly Cell[] },
): Edited {
  const cases = setCases(sheet, next.cases);
  if (next.cells.length === 0) return cases;
  const cells = setCells(cases.sheet, next.cells);
  return { sheet: cells.sheet, inverse: { kind: 'batch', edits: [cells.inverse, cases.inverse] } };
}

function indexOfCell(sheet: Sheet, id: string): number {
  const at = sheet.cells.findIndex((cell) => cell.id === id);
  if (at < 0) throw new RangeError(`no cell ${id}`);
  return at;
}

function inside(at: number, most: number): number {
  return Math.min(Math.max(Math.trunc(at), 0), most);
}

const idLetters: Readonly<Record<Cell['kind'], string>> = {
  heading: 'h',
  note: 'n',
  given: 'g',
  derived: 'd',
  criterion: 'k',
  sought: 's',
  table: 't',
  drawing: 'w',
  chart: 'c',
  figure: 'p',
};

/** An id that no cell of the sheet has, told by the letter of its kind: `g12`. */
export function newCellId(sheet: Sheet, kind: Cell['kind']): string {
  const letter = idLetters[kind];
  let last = 0;
  for (const { id } of sheet.cells) {
    if (id.startsWith(letter) && /^\d{1,9}$/.test(id.slice(1))) last = Math.max(last, Number(id.slice(1)));
  }
  return `${letter}${last + 1}`;
}
