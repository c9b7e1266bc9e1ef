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

import { makeRecord } from '../record/index.ts';
import {
  type Cell,
  type CellProblem,
  calculate,
  type Edit,
  emptyHistory,
  type GivenCell,
  type History,
  nameFault,
  newCellId,
  perform,
  redo,
  type Sheet,
  undo,
} from '../sheet/index.ts';
import { solver } from '../study/index.ts';
import type { Desk, Editing, InPlace, NewLine, Typed } from './desk-face.ts';
import {
  heldValue,
  type Provenance,
  provenanceOf,
  sharesValue,
  withBasis,
  withoutProvenance,
  withSource,
  withValue,
} from './given.ts';
import { alike, shareModel } from './share.ts';
import { countLines, waits } from './waiting.ts';

export type { Desk, Editing, InPlace, NewCell, NewLine, Typed } from './desk-face.ts';

export function createDesk(first: Sheet, firstHistory: History = emptyHistory): Desk {
  const listeners = new Set<() => void>();
  let kept = first;
  let shown = first;
  let calculation = calculate(first, solver);
  let drawn = makeRecord(calculation);
  let stale = false;
  let history: History = firstHistory;
  let chosen: string | null = null;
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
  const fresh = () => {
    if (!stale) return drawn;
    drawn = shareModel(drawn, makeRecord(calculation));
    stale = false;
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
    const cell = sheet.cells.find((one) => one.id === id);
    return cell?.kind === 'given' ? cell : undefined;
  };
  const keepEdit = (edit: Edit, label?: string) => {
    if (locked !== null) return locked;
    const done = perform(kept, history, edit, label === undefined ? {} : { label });
    kept = done.sheet;
    history = done.history;
    show(kept);
    return done.label;
  };
  const keep = (cell: Cell, label?: string) => keepEdit({ kind: 'set-cell', cell }, label);
  const caseId = (index: number) => calculation.cases[index]?.id ?? 'base';

  const problemsOf = (cell: string, at: number): readonly CellProblem[] =>
    (calculation.state(cell)?.problems ?? []).filter((problem) => problem.case === undefined || problem.case === caseId(at));

  /** Errors that the sheet on the desk did not have before, told from the line that is typed in. */
  const broughtIn = (before: ReadonlySet<string>, cell: string, how: string): readonly CellProblem[] => {
    const brought = calculation
      .problems()
      .find((problem) => problem.severity === 'error' && !waits(problem) && !before.has(placeOf(problem)));
    if (brought === undefined) return [];
    const { at: _at, fixes: _fixes, ...rest } = brought;
    return [{ ...rest, cell, message: `${how}, line ${calculation.numberOf(brought.cell)} fails: ${brought.message}` }];
  };

  const preview = (next: Editing) => {
    editing = next;
    const cell = givenOf(next.cell);
    if (next.field !== 'value' || cell === undefined) return;
    if (next.text === next.before && next.forAll === sharesValue(cell, caseId(next.at))) {
      show(kept);
      editing = { ...next, problems: problemsOf(next.cell, next.at) };
      return;
    }
    const candidate = replaceCell(kept, withValue(cell, caseId(next.at), next.text, next.forAll));
    const last = shown;
    calculation.update(kept);
    const before = new Set(calculation.problems().map(placeOf));
    calculation.update(candidate);
    const own = problemsOf(next.cell, next.at);
    const problems = own.some(isError) ? own : [...broughtIn(before, next.cell, 'with this value'), ...own];
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
    if (before === undefined || done.draft === null || alike(before, done.draft)) return show(kept);
    const set: Edit = { kind: 'set-cell', cell: done.draft };
    const { renamed } = done;
    // A name that cannot stand, or stands already, is an error of its own line alone.
    const renames = renamed !== undefined && renamed.from !== '' && nameFault(kept, renamed.to, done.cell) === undefined;
    const label =
      renames && renamed !== undefined
        ? keepEdit(
            { kind: 'batch', edits: [{ kind: 'rename-quantity', ...renamed }, set] },
            `${renamed.from} renamed ${renamed.to}`,
          )
        : keepEdit(set);
    announcement = `${label} kept; ${verdictWords()}`;
  };

  const verdictWords = () => {
    const model = fresh();
    const failed = model.summary.filter((one) => one.cases.some((each) => each.met === false)).length;
    const { wrong, waiting } = countLines(model.problems);
    const criteria = failed === 0 ? 'no criterion fails' : `${failed} ${failed === 1 ? 'criterion is' : 'criteria are'} not met`;
    if (wrong.length === 0) return criteria;
    const lines = `${wrong.length} ${wrong.length === 1 ? 'line has an error' : 'lines have errors'}`;
    return waiting === 0 ? `${lines}; ${criteria}` : `${lines}, ${waiting} wait; ${criteria}`;
  };

  const step = (done: ReturnType<typeof undo>, word: string) => {
    if (done === undefined || refused()) return;
    editing = null;
    inPlace = null;
    kept = done.sheet;
    history = done.history;
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
    get chosen() {
      return chosen;
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
      if (editing !== null && editing.text !== editing.before) {
        const { cell, field, at, forAll, text } = editing;
        return { kind: 'value', cell, field, at, forAll, text };
      }
      if (inPlace?.what === 'formula' && inPlace.text !== undefined)
        return { kind: 'formula', cell: inPlace.cell, text: inPlace.text };
      if (inPlace?.what === 'fields' && inPlace.draft !== null)
        return { kind: 'fields', cell: inPlace.cell, draft: inPlace.draft };
      return newLine === null || newLine.text === '' ? null : newLine;
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
        editing = null;
        inPlace = null;
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
      if (typed.kind === 'fields') desk.draftInPlace(typed.draft);
      else changed();
      return true;
    },
    typeNew(section, text) {
      if (newLine?.section === section && newLine.text === text) return;
      newLine = { kind: 'new', section, text };
      changed();
    },
    tell(words) {
      announcement = words;
      changed();
    },
    choose(cell) {
      if (cell === chosen) return;
      chosen = cell;
      changed();
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
      if (cell === undefined || (what === 'formula' && !hasFormula(cell))) return false;
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
      calculation.update(kept);
      const before = new Set(calculation.problems().map(placeOf));
      const candidate = replaceCell(kept, cell);
      calculation.update(candidate);
      const own = calculation.state(cell.id)?.problems.some(isError) === true;
      // A new name is carried into the other lines when it is kept; until then they would only say that the old one is gone.
      const problems = own || renamed !== undefined ? [] : broughtIn(before, cell.id, 'as typed here');
      inPlace = { ...inPlace, draft: cell, unreadable: false, renamed, problems };
      if (own || renamed !== undefined || problems.length > 0) calculation.update(last);
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
    remove(id) {
      if (refused()) return;
      desk.finish();
      const label = keepEdit({ kind: 'remove-cell', id });
      if (chosen === id) chosen = null;
      announcement = `${label}; ${verdictWords()}`;
      changed();
    },
    move(id, by) {
      if (refused()) return false;
      desk.finish();
      const to = kept.cells.findIndex((one) => one.id === id) + by;
      if (to < 0 || to >= kept.cells.length) return false;
      announcement = keepEdit({ kind: 'move-cell', id, to });
      void fresh();
      changed();
      return true;
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
    confirm(id) {
      const cell = givenOf(id);
      if (cell?.carriedOver === undefined || refused()) return;
      const { carriedOver: _, ...rest } = cell;
      keep(rest, `confirmation of ${cell.name}`);
      announcement = `${cell.name} is confirmed`;
      changed();
    },
    setBasis(id, basis) {
      const cell = givenOf(id);
      if (cell === undefined || refused()) return;
      keep(withBasis(cell, basis));
      changed();
    },
    formerProvenance(id) {
      const cell = givenOf(id);
      return cell !== undefined && provenanceOf(cell) === undefined ? former.get(id) : undefined;
    },
    restoreProvenance(id) {
      const cell = givenOf(id);
      const before = former.get(id);
      if (cell === undefined || before === undefined || refused()) return;
      former.delete(id);
      keep({ ...cell, ...before }, `source of ${cell.name}`);
      announcement = `source of ${cell.name} kept`;
      changed();
    },
    undo: () => step(undo(kept, history), 'took back'),
    redo: () => step(redo(kept, history), 'did again'),
    saved() {
      savedSheet = kept;
      changed();
    },
  };
  return desk;
}

const isError = (problem: CellProblem) => problem.severity === 'error';
const placeOf = ({ cell, code, case: id }: CellProblem) => `${cell} ${code} ${id ?? ''}`;

const isChange = (cell: GivenCell, done: Editing, caseId: string) =>
  done.text !== done.before || done.forAll !== sharesValue(cell, caseId);

const hasFormula = ({ kind }: Cell) => kind === 'derived' || kind === 'criterion' || kind === 'sought';

const replaceCell = (sheet: Sheet, cell: Cell): Sheet => ({
  ...sheet,
  cells: sheet.cells.map((one) => (one.id === cell.id ? cell : one)),
});
