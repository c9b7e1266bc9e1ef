// The sheet that lies on the desk: what is shown, what is chosen, what is being typed, and the way back.
//
// 1. `kept` is the sheet as last kept; what is shown may be one key stroke ahead of it, while a value is being typed.
// 2. While a typed value has an error, or brings one into a line that had none, the numbers of the last good one stay; the text that was
//    typed is never lost or changed.
// 3. A number that is changed loses basis and source: they spoke of another number. The old ones are remembered for one-key restoring.
// 4. A key stroke recalculates at once; the lines are laid out anew when somebody asks for them (`model`), so that what is typed is
//    painted first.
// 5. Lines that print alike before and after a change are the same objects, so that only what changed is drawn again.
// 6. A line that is edited in its place is a draft beside the kept cell under the same rules; leaving it keeps the draft as one step.
// Not here: elements of the page; computing (src/sheet) and printing (src/record).

import {
  applyEdit,
  type Cell,
  type CellProblem,
  calculate,
  type Edit,
  emptyHistory,
  type GivenCell,
  type History,
  newCellId,
  perform,
  redo,
  type Sheet,
  undo,
} from '../sheet/index.ts';
import { solver } from '../study/index.ts';
import { comparedRecord } from './compared-record.ts';
import type { Desk, Editing, InPlace, NewLine, Remark, Typed } from './desk-face.ts';
import { broughtIn, canRename, editOf, hasFormula, isError, keptDraft, problemPlaces, runBetween, typedOf } from './drafts.ts';
import { heldValue, type Provenance, provenanceOf, sharesValue, withoutProvenance, withSource, withValue } from './given.ts';
import { provenanceActs } from './provenance.ts';
import { alike, cellsById, shareModel } from './share.ts';
import { verdict } from './verdict.ts';

export type { Desk, Editing, InPlace, NewCell, NewLine, Remark, Typed } from './desk-face.ts';

export function createDesk(first: Sheet, firstHistory: History = emptyHistory): Desk {
  const listeners = new Set<() => void>();
  let kept = first;
  let shown = first;
  let calculation = calculate(first, solver);
  const { makeRecord, ...comparing } = comparedRecord(() => {
    stale = true;
    changed();
  });
  const placesIn = problemPlaces();
  let drawn = makeRecord(calculation);
  let stale = false;
  let history: History = firstHistory;
  let chosen: string | null = null;
  /** The other end of the run of lines that is chosen. */
  let anchor: string | null = null;
  let told: Remark | null = null;
  let reading = 0;
  let editing: Editing | null = null;
  let inPlace: InPlace | null = null;
  let newLine: NewLine | null = null;
  let locked: string | null = null;
  let savedSheet = first;
  let announcement = '';
  const former = new Map<string, Provenance>();

  const changed = () => {
    for (const listener of listeners) listener();
  };
  /** True where nothing may be written, and says so. */
  const refused = () => {
    if (locked === null) return false;
    announcement = locked;
    changed();
    return true;
  };
  const fresh = (first?: (cell: string) => boolean) => {
    if (!stale) return drawn;
    drawn = shareModel(drawn, makeRecord(calculation, first === undefined ? {} : { first }));
    stale = first !== undefined;
    return drawn;
  };
  const show = (sheet: Sheet) => {
    if (sheet === shown) return;
    calculation.update(sheet);
    shown = sheet;
    stale = true;
    if (reading >= calculation.cases.length) reading = 0;
  };
  const givenOf = (id: string, sheet: Sheet = kept): GivenCell | undefined => {
    const cell = cellsById(sheet).get(id);
    return cell?.kind === 'given' ? cell : undefined;
  };
  const keepEdit = (edit: Edit, label?: string, typing?: string) => {
    if (locked !== null) return locked;
    const run = typing === undefined ? {} : { key: typing, time: Date.now() };
    const done = perform(kept, history, edit, label === undefined ? run : { label, ...run });
    kept = done.sheet;
    history = done.history;
    told = null;
    show(kept);
    return done.label;
  };
  const keep = (cell: Cell, label?: string) => keepEdit({ kind: 'set-cell', cell }, label);
  const caseId = (index: number) => calculation.cases[index]?.id ?? 'base';

  const problemsOf = (cell: string, at: number): readonly CellProblem[] =>
    (calculation.state(cell)?.problems ?? []).filter((problem) => problem.case === undefined || problem.case === caseId(at));

  const preview = (next: Editing) => {
    editing = next;
    const cell = givenOf(next.cell);
    if (next.field !== 'value' || cell === undefined) return;
    if (next.text === next.before && next.forAll === sharesValue(cell, caseId(next.at))) {
      show(kept);
      editing = { ...next, problems: problemsOf(next.cell, next.at) };
      return;
    }
    const edited = withValue(cell, caseId(next.at), next.text, next.forAll);
    const candidate = applyEdit(kept, { kind: 'set-cell', cell: edited }).sheet;
    const last = shown;
    const before = placesIn(calculation, kept);
    calculation.update(candidate);
    const own = problemsOf(next.cell, next.at);
    const problems = own.some(isError) ? own : [...broughtIn(calculation, before, next.cell, 'with this value'), ...own];
    editing = { ...next, problems };
    if (problems.some(isError)) {
      calculation.update(last);
      return;
    }
    shown = candidate;
    stale = true;
  };

  const finishInPlace = (done: InPlace) => {
    const before = kept.cells.find((one) => one.id === done.cell);
    inPlace = null;
    const draft = before === undefined ? null : keptDraft(done, before);
    if (draft === null || alike(before, draft)) return show(kept);
    const { edit, label } = editOf(kept, draft, done.renamed);
    const name = keepEdit(edit, label);
    announcement = `${name} kept${done.unreadable ? ' as typed, with an error' : ''}; ${verdictWords()}`;
  };

  const verdictWords = () => verdict(fresh());

  const step = (done: ReturnType<typeof undo>, word: string) => {
    if (done === undefined || refused()) return;
    editing = null;
    inPlace = null;
    told = null;
    kept = done.sheet;
    history = done.history;
    if (chosen !== null && !kept.cells.some(({ id }) => id === chosen)) chosen = null;
    show(kept);
    announcement = `${word} ${done.label}; ${verdictWords()}`;
    changed();
  };

  const desk: Desk = {
    get sheet() {
      return shown;
    },
    get kept() {
      return kept;
    },
    get calculation() {
      return calculation;
    },
    get model() {
      return fresh();
    },
    get drawn() {
      return drawn;
    },
    sketch: (first) => fresh(editing === null && inPlace === null ? undefined : first),
    get chosen() {
      return chosen;
    },
    get run() {
      return runBetween(kept.cells, anchor, chosen);
    },
    get told() {
      return told;
    },
    get reading() {
      return reading;
    },
    get editing() {
      return editing;
    },
    get inPlace() {
      return inPlace;
    },
    get undoLabel() {
      return history.past.at(-1)?.label ?? null;
    },
    get redoLabel() {
      return history.future.at(-1)?.label ?? null;
    },
    get unsaved() {
      return kept !== savedSheet;
    },
    get history() {
      return history;
    },
    get typed(): Typed | null {
      return typedOf(editing, inPlace, newLine);
    },
    get newLine() {
      return newLine;
    },
    get locked() {
      return locked;
    },
    get announcement() {
      return announcement;
    },
    subscribe(listener) {
      listeners.add(listener);
      return () => listeners.delete(listener);
    },
    open(sheet, itsHistory = emptyHistory) {
      kept = sheet;
      shown = sheet;
      savedSheet = sheet;
      calculation = calculate(sheet, solver);
      drawn = makeRecord(calculation);
      stale = false;
      history = itsHistory;
      chosen = null;
      anchor = null;
      told = null;
      reading = 0;
      editing = null;
      inPlace = null;
      newLine = null;
      former.clear();
      announcement = `opened ${sheet.title}; ${verdictWords()}`;
      changed();
    },
    follow(sheet, itsHistory = emptyHistory) {
      editing = null;
      inPlace = null;
      kept = sheet;
      history = itsHistory;
      show(sheet);
      if (chosen !== null && !sheet.cells.some((cell) => cell.id === chosen)) chosen = null;
      changed();
    },
    lock(why) {
      locked = why;
      if (why !== null) {
        [editing, inPlace, newLine] = [null, null, null];
        show(kept);
      }
      changed();
    },
    resume(typed) {
      if (typed.kind === 'new') {
        newLine = typed;
        changed();
        return true;
      }
      if (typed.kind === 'value') {
        if (!desk.begin(typed.cell, typed.field, typed.at, typed.text)) return false;
        desk.setForAll(typed.forAll);
        return true;
      }
      if (!desk.beginInPlace(typed.cell, typed.kind) || inPlace === null) return false;
      inPlace = { ...inPlace, resumed: typed };
      if (typed.kind !== 'formula') desk.draftInPlace(typed.draft);
      else changed();
      return true;
    },
    typeNew(section, text) {
      if (newLine?.section === section && newLine.text === text) return;
      newLine = { kind: 'new', section, text };
      changed();
    },
    choose(cell, from) {
      if (cell === chosen && (from ?? cell) === anchor) return;
      chosen = cell;
      anchor = from ?? cell;
      changed();
    },
    extend(cell) {
      if (cell === chosen) return;
      const count = runBetween(kept.cells, anchor, cell).length;
      announcement = count === 1 ? 'one line chosen' : `${count} lines chosen`;
      desk.choose(cell, anchor ?? cell);
    },
    read(caseIndex) {
      if (caseIndex === reading || caseIndex < 0 || caseIndex >= calculation.cases.length) return;
      reading = caseIndex;
      announcement = `numbers of case ${calculation.cases[caseIndex]?.title ?? caseId(caseIndex)}`;
      changed();
    },
    begin(id, field, caseIndex, text) {
      if (refused()) return false;
      desk.finish();
      const cell = givenOf(id);
      if (cell === undefined) return false;
      const forAll = sharesValue(cell, caseId(caseIndex));
      const before = field === 'source' ? (cell.source ?? '') : heldValue(cell, caseId(caseIndex));
      chosen = id;
      preview({ cell: id, field, at: caseIndex, forAll, text: text ?? before, before, problems: [] });
      changed();
      return true;
    },
    type(text) {
      if (editing === null || editing.text === text) return;
      preview({ ...editing, text });
      changed();
    },
    setForAll(forAll) {
      if (editing === null || editing.forAll === forAll) return;
      preview({ ...editing, forAll });
      changed();
    },
    beginInPlace(id, what) {
      if (refused()) return false;
      desk.finish();
      const cell = kept.cells.find((one) => one.id === id);
      if (cell === undefined || !canBeEdited(cell, what)) return false;
      chosen = id;
      inPlace = {
        cell: id,
        what,
        text: undefined,
        resumed: undefined,
        draft: null,
        unreadable: false,
        renamed: undefined,
        problems: [],
      };
      changed();
      return true;
    },
    draftInPlace(cell, renamed, text) {
      if (inPlace === null) return;
      if (text !== undefined) inPlace = { ...inPlace, text };
      if (cell === null) {
        inPlace = { ...inPlace, draft: null, unreadable: true, problems: [] };
        changed();
        return;
      }
      if (inPlace.cell !== cell.id) return;
      const last = shown;
      const before = placesIn(calculation, kept);
      const candidate = applyEdit(kept, editOf(kept, cell, renamed).edit).sheet;
      calculation.update(candidate);
      // Words feed nothing: they show as typed whatever is wrong with them.
      const isProse = cell.kind === 'note' || cell.kind === 'heading';
      const own = !isProse && calculation.state(cell.id)?.problems.some(isError) === true;
      const lost = renamed !== undefined && !canRename(kept, cell.id, renamed);
      const problems = own || lost || isProse ? [] : broughtIn(calculation, before, cell.id, 'as typed here');
      inPlace = { ...inPlace, draft: cell, unreadable: false, renamed, problems };
      if (own || lost || problems.length > 0) calculation.update(last);
      else {
        shown = candidate;
        stale = true;
      }
      changed();
    },
    insert(draft, after) {
      if (refused()) return '';
      desk.finish();
      const cell = { ...draft, id: newCellId(kept, draft.kind) } as Cell;
      const at = after === null ? 0 : kept.cells.findIndex((one) => one.id === after) + 1;
      const label = keepEdit({ kind: 'insert-cell', cell, at });
      announcement = `${label}; ${verdictWords()}`;
      changed();
      return cell.id;
    },
    act(edit, { label, words, beside, typing } = {}) {
      if (refused()) return false;
      desk.finish();
      const done = keepEdit(edit, label, typing);
      if (beside !== undefined) told = beside;
      if (chosen !== null && !kept.cells.some(({ id }) => id === chosen)) chosen = null;
      announcement = `${[words ?? done, beside?.words].filter(Boolean).join('; ')}; ${verdictWords()}`;
      changed();
      return true;
    },
    tell(words, cell) {
      announcement = words;
      told = cell === undefined ? told : { cell, words };
      changed();
    },
    finish() {
      if (inPlace !== null) {
        finishInPlace(inPlace);
        changed();
      }
      if (editing === null) return;
      const done = editing;
      const cell = givenOf(done.cell);
      editing = null;
      if (cell !== undefined && done.field === 'source' && done.text !== done.before) {
        keep(withSource(cell, done.text));
        former.delete(cell.id);
        announcement = `source of ${cell.name} stated`;
      } else if (cell !== undefined && done.field === 'value' && isChange(cell, done, caseId(done.at))) {
        const before = provenanceOf(cell);
        if (before !== undefined) former.set(cell.id, before);
        keep(withoutProvenance(withValue(cell, caseId(done.at), done.text, done.forAll)), `value of ${cell.name}`);
        announcement = `${cell.name} is ${done.text}; ${verdictWords()}`;
      } else show(kept);
      changed();
    },
    cancel() {
      if (editing === null && inPlace === null) return;
      editing = null;
      inPlace = null;
      show(kept);
      changed();
    },
    ...comparing,
    ...provenanceActs({
      givenOf,
      refused,
      former,
      keep(cell, label, words) {
        keep(cell, label);
        if (words !== undefined) announcement = words;
        changed();
      },
    }),
    // What is being typed is kept first: taken back, it is there to be done again.
    undo() {
      desk.finish();
      step(undo(kept, history), 'took back');
    },
    redo() {
      desk.finish();
      step(redo(kept, history), 'did again');
    },
    saved() {
      savedSheet = kept;
      changed();
    },
  };
  return desk;
}

const isChange = (cell: GivenCell, done: Editing, caseId: string) =>
  done.text !== done.before || done.forAll !== sharesValue(cell, caseId);

const canBeEdited = (cell: Cell, what: InPlace['what']) =>
  what === 'fields' || (what === 'formula' ? hasFormula(cell) : cell.kind === 'heading' || cell.kind === 'note');
