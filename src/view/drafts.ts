// What a line that is typed in would do to the sheet: the edit it stands for, and the errors it would bring into other lines.
//
// 1. A text that is no formula yet has a cell all the same, in which it stands as typed: nothing typed is ever lost.
// 2. A new name that can stand is carried to wherever the quantity is used, in what is shown already and in what is kept.
// Not here: what is shown and kept (desk.ts).

import {
  type Calculation,
  type Cell,
  type CellProblem,
  type Edit,
  nameFault,
  type Relation,
  type Sheet,
} from '../sheet/index.ts';
import type { Editing, InPlace, NewLine, Renamed, Typed } from './desk-face.ts';
import { waits } from './waiting.ts';

export const isError = (problem: CellProblem) => problem.severity === 'error';
const placeOf = ({ cell, code, case: id }: CellProblem) => `${cell} ${code} ${id ?? ''}`;

/** Places of the problems that the kept sheet has by itself: found once, however many key strokes follow. */
export function problemPlaces(): (calculation: Calculation, kept: Sheet) => ReadonlySet<string> {
  let of: Sheet | undefined;
  let places: ReadonlySet<string> = new Set();
  return (calculation, kept) => {
    if (of !== kept) {
      calculation.update(kept);
      places = new Set(calculation.problems().map(placeOf));
      of = kept;
    }
    return places;
  };
}

/** Errors that were not there before, told from the line that is typed in. */
export function broughtIn(
  calculation: Calculation,
  before: ReadonlySet<string>,
  cell: string,
  how: string,
): readonly CellProblem[] {
  const brought = calculation.problems().find((problem) => isError(problem) && !waits(problem) && !before.has(placeOf(problem)));
  if (brought === undefined) return [];
  const { at: _at, fixes: _fixes, ...rest } = brought;
  return [{ ...rest, cell, message: `${how}, line ${calculation.numberOf(brought.cell)} fails: ${brought.message}` }];
}

type FormulaCell = Extract<Cell, { kind: 'derived' | 'criterion' | 'sought' }>;
export const hasFormula = (cell: { readonly kind: string }): cell is FormulaCell =>
  cell.kind === 'derived' || cell.kind === 'criterion' || cell.kind === 'sought';

/** What of a line is edited where it stands. */
export function editedAs(cell: Cell | undefined): InPlace['what'] {
  if (cell?.kind === 'heading' || cell?.kind === 'note') return 'text';
  return cell !== undefined && hasFormula(cell) ? 'formula' : 'fields';
}

const relations: ReadonlyMap<string, Relation> = new Map([
  ['<', '<'],
  ['<=', '<='],
  ['≤', '<='],
  ['>', '>'],
  ['>=', '>='],
  ['≥', '>='],
]);

/** What is typed to have this formula. */
export function formulaText(cell: FormulaCell): string {
  if (cell.kind === 'derived') return cell.formula;
  if (cell.kind === 'sought') return cell.where;
  return cell.right === '' ? cell.left : `${cell.left} ${cell.relation} ${cell.right}`;
}

/** The cell in which an unreadable text stands as typed, so that `formulaText` gives it back. */
export function asTyped(cell: FormulaCell, typed: string): FormulaCell {
  const text = typed.trim();
  if (cell.kind === 'derived') return { ...cell, formula: text };
  if (cell.kind === 'sought') return { ...cell, where: text };
  const sign = /[<>]=?|[≤≥]/u.exec(text);
  const right = sign === null ? '' : text.slice(sign.index + sign[0].length).trim();
  if (sign === null || right === '') return { ...cell, left: text, right: '' };
  return { ...cell, left: text.slice(0, sign.index).trim(), relation: relations.get(sign[0]) ?? cell.relation, right };
}

/** True where the new name can be carried to wherever the quantity is used; one that cannot stand is an error of its own line alone. */
export const canRename = (sheet: Sheet, cell: string, renamed: Renamed | undefined): renamed is Renamed =>
  renamed !== undefined && renamed.from !== '' && nameFault(sheet, renamed.to, cell) === undefined;

/** The edit that a draft stands for, and what the step is called where the edit does not say it. */
export function editOf(sheet: Sheet, cell: Cell, renamed: Renamed | undefined): { readonly edit: Edit; readonly label?: string } {
  const set: Edit = { kind: 'set-cell', cell };
  if (!canRename(sheet, cell.id, renamed)) return { edit: set };
  const edits: readonly Edit[] = [{ kind: 'rename-quantity', ...renamed }, set];
  return { edit: { kind: 'batch', edits }, label: `${renamed.from} renamed ${renamed.to}` };
}

/** What is kept of a line that is left: the draft, or the text that could not be read. */
export function keptDraft({ draft, unreadable, text }: InPlace, before: Cell): Cell | null {
  return unreadable && text !== undefined && hasFormula(before) ? asTyped(before, text) : draft;
}

/** What is being typed and is no part of the sheet yet. */
export function typedOf(editing: Editing | null, inPlace: InPlace | null, newLine: NewLine | null): Typed | null {
  if (editing !== null && editing.text !== editing.before) {
    const { cell, field, at, forAll, text } = editing;
    return { kind: 'value', cell, field, at, forAll, text };
  }
  if (inPlace?.what === 'formula' && inPlace.text !== undefined)
    return { kind: 'formula', cell: inPlace.cell, text: inPlace.text };
  if (inPlace !== null && inPlace.what !== 'formula' && inPlace.draft !== null)
    return { kind: inPlace.what, cell: inPlace.cell, draft: inPlace.draft };
  return newLine === null || newLine.text === '' ? null : newLine;
}

/** The lines from one end to the other, in the order of the sheet; none where the chosen one is gone. */
export function runBetween(cells: readonly Cell[], anchor: string | null, chosen: string | null): readonly string[] {
  const to = cells.findIndex(({ id }) => id === chosen);
  if (to < 0) return [];
  const from = cells.findIndex(({ id }) => id === anchor);
  return cells.slice(from < 0 ? to : Math.min(from, to), Math.max(from, to) + 1).map(({ id }) => id);
}
