// What was done to a sheet and what was taken back: undo and redo.
//
// 1. A history is plain JSON and belongs to one sheet: kept with it, it lives across reloads.
// 2. `past` and `future` are stacks; the last entry is the next to undo or redo. A new step empties the future.
// 3. Typing in one place becomes one step: steps with the same `key`, none later than `typingPause` after the one before, are joined.
// Not here: what an edit does (edit.ts), where the history is kept (src/store).

import type { Cell, Sheet } from './document.ts';
import { applyEdit, type Edit } from './edit.ts';

export interface HistoryStep {
  /** What was changed, in words: 'value of d_1'. */
  readonly label: string;
  readonly edit: Edit;
  readonly inverse: Edit;
  readonly key?: string;
  /** Milliseconds since the epoch. */
  readonly time?: number;
}
export interface History {
  readonly past: readonly HistoryStep[];
  readonly future: readonly HistoryStep[];
}
export interface Performed {
  readonly sheet: Sheet;
  readonly history: History;
  readonly label: string;
}

export const emptyHistory: History = { past: [], future: [] };
/** Longest pause within one run of typing, in milliseconds. */
const typingPause = 2000;

/** Applies an edit and notes it. `key` marks typing in one place, `time` is the moment of the key stroke. */
export function perform(
  sheet: Sheet,
  history: History,
  edit: Edit,
  options: { readonly label?: string; readonly key?: string; readonly time?: number } = {},
): Performed {
  const edited = applyEdit(sheet, edit);
  const step: HistoryStep = { ...options, label: options.label ?? labelOf(sheet, edit), edit, inverse: edited.inverse };
  return { sheet: edited.sheet, history: note(history, step), label: step.label };
}

function note(history: History, step: HistoryStep): History {
  const last = history.past.at(-1);
  if (last && history.future.length === 0 && continues(last, step))
    return { past: [...history.past.slice(0, -1), joined(last, step)], future: [] };
  return { past: [...history.past, step], future: [] };
}

function continues(last: HistoryStep, step: HistoryStep): boolean {
  if (step.key === undefined || last.key !== step.key || step.time === undefined || last.time === undefined) return false;
  return step.time - last.time <= typingPause && step.time >= last.time;
}

function joined(last: HistoryStep, step: HistoryStep): HistoryStep {
  const overwrites = placeOf(last.edit) !== undefined && placeOf(last.edit) === placeOf(step.edit);
  if (overwrites) return { ...step, inverse: last.inverse };
  return {
    ...step,
    edit: { kind: 'batch', edits: [last.edit, step.edit] },
    inverse: { kind: 'batch', edits: [step.inverse, last.inverse] },
  };
}

/** What an edit replaces as a whole, so that the later of two makes the earlier one void. */
function placeOf(edit: Edit): string | undefined {
  if (edit.kind === 'set-cell') return `cell ${edit.cell.id}`;
  return edit.kind === 'set-head' ? `head ${edit.key}` : undefined;
}

export function undo(sheet: Sheet, history: History): Performed | undefined {
  const step = history.past.at(-1);
  if (!step) return undefined;
  return {
    sheet: applyEdit(sheet, step.inverse).sheet,
    history: { past: history.past.slice(0, -1), future: [...history.future, step] },
    label: step.label,
  };
}

export function redo(sheet: Sheet, history: History): Performed | undefined {
  const step = history.future.at(-1);
  if (!step) return undefined;
  // The step taken back and done again begins no run of typing: `key` is dropped.
  const { key: _, ...done } = step;
  return {
    sheet: applyEdit(sheet, step.edit).sheet,
    history: { past: [...history.past, done], future: history.future.slice(0, -1) },
    label: step.label,
  };
}

const headWords: ReadonlyMap<string, string> = new Map([
  ['titleBlock', 'title block'],
  ['templateInfo', 'template data'],
  ['carriedFrom', 'earlier sheet'],
]);

/** What an edit changes, in words that stand after "undo". */
export function labelOf(sheet: Sheet, edit: Edit): string {
  const cellOf = (id: string): Cell | undefined => sheet.cells.find((cell) => cell.id === id);
  switch (edit.kind) {
    case 'set-cell': {
      const before = cellOf(edit.cell.id);
      return before ? changeLabel(before, edit.cell) : nameOf(edit.cell);
    }
    case 'set-cells':
      return edit.cells.length === 1 ? labelOf(sheet, { kind: 'set-cell', cell: edit.cells[0]! }) : `${edit.cells.length} cells`;
    case 'insert-cell':
      return `new ${nameOf(edit.cell)}`;
    case 'remove-cell':
      return `removal of ${nameOf(cellOf(edit.id))}`;
    case 'move-cell':
      return `move of ${nameOf(cellOf(edit.id))}`;
    case 'set-head':
      return headWords.get(edit.key) ?? edit.key;
    case 'set-cases':
      return 'cases';
    case 'add-case':
      return `new case ${edit.case.id}`;
    case 'change-case':
      return edit.case.id === edit.id ? `title of case ${edit.id}` : `case ${edit.id} renamed ${edit.case.id}`;
    case 'move-case':
      return `move of case ${edit.id}`;
    case 'remove-case':
      return `removal of case ${edit.id}`;
    case 'rename-quantity':
      return `${edit.from} renamed ${edit.to}`;
    case 'batch':
      return edit.edits.length === 1 ? labelOf(sheet, edit.edits[0]!) : `${edit.edits.length} changes`;
  }
}

/** `value of d_1`, `value of K_A in case start`, `d_1` where several keys changed. */
function changeLabel(before: Cell, after: Cell): string {
  const was = new Map<string, unknown>(Object.entries(before));
  const is = new Map<string, unknown>(Object.entries(after));
  const keys = [...new Set([...was.keys(), ...is.keys()])].filter((key) => was.get(key) !== is.get(key));
  const [key] = keys;
  if (keys.length !== 1 || key === undefined) return nameOf(after);
  if (key !== 'byCase') return `${key} of ${nameOf(before)}`;
  const one = { ...(was.get(key) as object | undefined) } as Record<string, string>;
  const other = { ...(is.get(key) as object | undefined) } as Record<string, string>;
  const ids = [...new Set([...Object.keys(one), ...Object.keys(other)])].filter((id) => one[id] !== other[id]);
  return `value of ${nameOf(before)} in ${ids.length === 1 ? `case ${ids[0]}` : 'some cases'}`;
}

function nameOf(cell: Cell | undefined): string {
  if (cell === undefined) return 'a cell';
  switch (cell.kind) {
    case 'given':
    case 'derived':
    case 'sought':
    case 'table':
      return cell.name === '' ? cell.kind : cell.name;
    case 'heading':
    case 'note': {
      const text = cell.text.replace(/\s+/gu, ' ').trim();
      return text === '' ? cell.kind : `${cell.kind} “${[...text].slice(0, 30).join('')}${[...text].length > 30 ? '…' : ''}”`;
    }
    default:
      return cell.title === undefined || cell.title === '' ? cell.kind : `${cell.kind} “${cell.title}”`;
  }
}
