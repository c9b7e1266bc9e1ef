// What is done with the chosen line, or the chosen run of lines: remove, move, duplicate, copy, cut, paste. Each is one step of undo.
//
// 1. The clipboard holds a sheet file of the lines alone, as plain text: another sheet, another tab, a file or a mail can take it.
// 2. What is pasted is read like a file, with the same limits and refusals; any other text becomes lines as if each were typed into the
//    new line of the section. Text is only ever text.
// 3. Every act says what it did, in words; names that had to give way are named.
// Not here: names and ids of what is pasted (src/sheet/paste-lines.ts), focus (paper.ts).

import { canonicalName } from '../formula/index.ts';
import {
  badCharacters,
  type Cell,
  currentFormat,
  type Edit,
  newCellId,
  pasteLines,
  readSheet,
  type Sheet,
  takeLines,
  writeSheet,
} from '../sheet/index.ts';
import type { Desk } from './desk-face.ts';

/** More would hang the page for longer than anybody waits, and no sheet has so many lines. */
const mostLines = 5000;
const longestText = 8_000_000;

const lines = (count: number) => (count === 1 ? 'line' : `${count} lines`);

/** Takes lines out; `cut`: they went to the clipboard. */
export function removeRun(desk: Desk, run: readonly string[] = desk.run, how: 'removal' | 'cut' = 'removal') {
  const [only] = run;
  if (only === undefined) return;
  const edits = run.map((id): Edit => ({ kind: 'remove-cell', id }));
  const what = run.length === 1 ? wordFor(desk.kept.cells.find(({ id }) => id === only)) : lines(run.length);
  const [edit] = edits;
  desk.act(run.length === 1 && edit !== undefined ? edit : { kind: 'batch', edits }, {
    label: how === 'cut' ? `cut of ${what}` : `removal of ${what}`,
    words: how === 'cut' ? `${what} cut` : `${what} removed`,
  });
}

/** The chosen lines one place up or down; false at the end of the sheet. */
export function moveRun(desk: Desk, step: -1 | 1): boolean {
  desk.finish();
  const { run } = desk;
  const { cells } = desk.kept;
  const first = cells.findIndex(({ id }) => id === run[0]);
  const last = first + run.length - 1;
  const passed = cells[step < 0 ? first - 1 : last + 1];
  const [only] = run;
  if (only === undefined || first < 0) return false;
  if (passed === undefined) {
    desk.tell(step < 0 ? 'the first line of the sheet cannot go up' : 'the last line of the sheet cannot go down');
    return false;
  }
  const edit: Edit =
    run.length === 1
      ? { kind: 'move-cell', id: only, to: first + step }
      : { kind: 'move-cell', id: passed.id, to: step < 0 ? last : first };
  const label = run.length === 1 ? undefined : `move of ${lines(run.length)}`;
  const to = cells.findIndex(({ id }) => id === passed.id);
  const where = `${label ?? 'moved'} ${step < 0 ? 'up' : 'down'}, now ${step < 0 ? 'before' : 'behind'} ${wordFor(cells[to])}`;
  return desk.act(edit, { ...(label === undefined ? {} : { label }), words: where });
}

function wordFor(cell: Cell | undefined): string {
  if (cell === undefined) return 'it';
  if ('name' in cell && cell.name !== '') return cell.name;
  const title = 'text' in cell ? cell.text : 'title' in cell ? (cell.title ?? cell.kind) : cell.kind;
  return `“${[...title.replace(/\s+/gu, ' ')].slice(0, 40).join('')}”`;
}

/** The same lines once more, below the chosen ones, under free names. */
export function duplicateRun(desk: Desk) {
  const { run } = desk;
  if (run.length === 0) return;
  desk.finish();
  putIn(desk, takeLines(desk.kept, run), 'copied', false);
}

/** The text of the chosen lines for the clipboard; '' where none is chosen. */
export function copyRun(desk: Desk): string {
  const { run } = desk;
  if (run.length === 0) return '';
  desk.finish();
  const text = writeSheet(takeLines(desk.kept, run));
  taken.set(desk, text);
  desk.tell(run.length === 1 ? 'line copied' : `${lines(run.length)} copied`);
  return text;
}

/** What was copied last from the sheet that lies here: such lines stay its own, any other are carried over. */
const taken = new WeakMap<Desk, string>();

/**
 * Puts text of the clipboard below the chosen lines, or at the end of the sheet. False where nothing was put in; the desk has then told
 * why.
 */
export async function pasteText(desk: Desk, text: string): Promise<boolean> {
  desk.finish();
  const read = await readLines(desk, text);
  if (typeof read === 'string') {
    desk.tell(`not pasted: ${read}`, desk.chosen ?? undefined);
    return false;
  }
  if (read.cells.length === 0) {
    desk.tell('there is nothing to paste');
    return false;
  }
  return putIn(desk, read, 'pasted', isSheetText(text) && plain(taken.get(desk) ?? '') !== plain(text));
}

/** Clipboards may write line ends of their own. */
const plain = (text: string) => text.replace(/\r\n/gu, '\n').trim();
const isSheetText = (text: string) => /^\s*\{\s*"/u.test(text);

/** The lines as a sheet, or why they cannot be had. */
async function readLines(desk: Desk, text: string): Promise<Sheet | string> {
  if (text.length > longestText) return 'the text is too long for lines of a sheet';
  if (isSheetText(text)) {
    const read = readSheet(text);
    if (!read.ok) return `the text cannot be read as lines of a sheet: ${read.problems[0]?.message ?? ''}`;
    return read.value.cells.length > mostLines ? tooMany(read.value.cells.length) : read.value;
  }
  return typedLines(desk, text);
}

const tooMany = (count: number) => `${count} lines are more than the ${mostLines} that can be pasted at once`;

/** Each line as the new line of a section reads it; names of lines above it are known to it. */
async function typedLines(desk: Desk, text: string): Promise<Sheet | string> {
  const { readEntry } = await import('./edit/entry.ts');
  const typed = text.split(/\r\n|[\n\r\u2028\u2029]/u).filter((line) => line.trim() !== '');
  if (typed.length > mostLines) return tooMany(typed.length);
  const known = new Set<string>();
  const tables = new Set<string>();
  const { calculation, kept } = desk;
  const scope = {
    decimalSign: calculation.style.decimalSign,
    knows: (name: string) => known.has(name) || calculation.named(name) !== undefined,
    hasTable: (name: string) => tables.has(name) || calculation.table(name) !== undefined,
  };
  const cells: Cell[] = [];
  for (const line of typed) {
    const { draft } = readEntry(line.replace(badCharacters, ''), scope);
    if (draft === undefined) continue;
    if (draft.kind === 'table') tables.add(draft.name);
    else if ('name' in draft) known.add(canonicalName(draft.name));
    cells.push({ ...draft, id: newCellId({ ...kept, cells }, draft.kind) } as Cell);
  }
  return { format: currentFormat, title: '', settings: { decimalSign: scope.decimalSign }, cells };
}

function putIn(desk: Desk, lines: Sheet, how: 'pasted' | 'copied', foreign: boolean): boolean {
  const { kept, run } = desk;
  const last = run.at(-1);
  const at = last === undefined ? kept.cells.length : kept.cells.findIndex(({ id }) => id === last) + 1;
  const pasted = pasteLines(kept, lines, at, foreign);
  const [first] = pasted.cells;
  const end = pasted.cells.at(-1);
  if (first === undefined || end === undefined) return false;
  const gaveWay = [...pasted.renamed].map(([name, next]) => `${name} is taken here and became ${next}`);
  const shown = gaveWay.length > 6 ? [...gaveWay.slice(0, 5), `${gaveWay.length - 5} more names gave way`] : gaveWay;
  const carried = foreign && lines.cells.some(({ kind }) => kind === 'given');
  const notes = [
    ...shown,
    ...pasted.notes,
    ...(carried ? ['the givens are carried over from another sheet until they are confirmed'] : []),
  ];
  const label = `${pasted.what} ${how}`;
  const done = desk.act(pasted.edit, {
    label,
    words: label,
    ...(notes.length === 0 ? {} : { beside: { cell: end, words: notes.join('; ') } }),
  });
  if (done) desk.choose(end, first);
  return done;
}
