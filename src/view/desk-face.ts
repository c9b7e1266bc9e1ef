// What the page sees of the desk: what it shows and what can be done on it.
//
// Not here: how it does so (desk.ts).

import type { RecordModel } from '../record/index.ts';
import type { Basis, Calculation, Cell, CellProblem, Edit, History, Sheet } from '../sheet/index.ts';
import type { Provenance } from './given.ts';

export type Field = 'value' | 'source';

export interface Editing {
  readonly cell: string;
  readonly field: Field;
  /** Index of the case whose value is edited. */
  readonly at: number;
  /** True: the value holds for every case that has none of its own. */
  readonly forAll: boolean;
  readonly text: string;
  readonly before: string;
  /** Errors and warnings of the text as typed; empty where it reads well. */
  readonly problems: readonly CellProblem[];
}

export type Renamed = { readonly from: string; readonly to: string };
/** A cell that is not in the sheet yet. */
export type NewCell = WithoutId<Cell>;
type WithoutId<C> = C extends Cell ? Omit<C, 'id'> : never;

/** A line whose formula, or all of it, is edited where it stands. */
export interface InPlace {
  readonly cell: string;
  /** `text`: the words of a heading or a note. */
  readonly what: 'formula' | 'fields' | 'text';
  /** The formula as typed, readable or not; undefined until something is typed. */
  readonly text: string | undefined;
  /** What stood in the field when the page was left, taken up again: begins with this instead of the kept cell. */
  readonly resumed: Typed | undefined;
  /** The cell as typed; null until something is typed. */
  readonly draft: Cell | null;
  /** True where what is typed is no cell yet: it cannot be kept. */
  readonly unreadable: boolean;
  readonly renamed: Renamed | undefined;
  /** Errors that the draft would bring into other lines. */
  readonly problems: readonly CellProblem[];
}

/** What is being typed and is no part of the sheet yet: plain JSON, kept so that nothing typed is lost with the page. */
export type Typed =
  | {
      readonly kind: 'value';
      readonly cell: string;
      readonly field: Field;
      readonly at: number;
      readonly forAll: boolean;
      readonly text: string;
    }
  | { readonly kind: 'formula'; readonly cell: string; readonly text: string }
  | { readonly kind: 'fields' | 'text'; readonly cell: string; readonly draft: Cell }
  | NewLine;
/** The new line at the foot of a section, by the key of the section. */
export interface NewLine {
  readonly kind: 'new';
  readonly section: string;
  readonly text: string;
}

/** Words about what was done, that stay under a line until something else is done. */
export interface Remark {
  readonly cell: string;
  readonly words: string;
}

/** How an act is called; each is made up from the edit where it is left out. */
export interface ActWords {
  /** What stands behind 'undo'. */
  readonly label?: string;
  /** What is said at once. */
  readonly words?: string;
  readonly beside?: Remark;
  /** The place that is typed in: what follows there without a pause is one step. */
  readonly typing?: string;
}

export interface Desk {
  readonly sheet: Sheet;
  /** The sheet without what is being typed. */
  readonly kept: Sheet;
  readonly calculation: Calculation;
  /** The lines as they are now. */
  readonly model: RecordModel;
  /** The lines as last asked for: what stands on the screen while the next ones are made. */
  readonly drawn: RecordModel;
  /**
   * While something is typed: the lines of `first` as the sheet now stands, the others perhaps as they were; `model` completes it.
   * At all other times the same as `model`.
   */
  sketch(first: (cell: string) => boolean): RecordModel;
  readonly chosen: string | null;
  /** The chosen lines in the order of the sheet: one, or a run of them. */
  readonly run: readonly string[];
  readonly told: Remark | null;
  /** Index of the case whose numbers stand in the equations. */
  readonly reading: number;
  readonly editing: Editing | null;
  readonly inPlace: InPlace | null;
  readonly undoLabel: string | null;
  readonly redoLabel: string | null;
  /** True where there are changes that no file has. */
  readonly unsaved: boolean;
  readonly history: History;
  /** What is being typed, to be kept beside the sheet; null when nothing is. */
  readonly typed: Typed | null;
  readonly newLine: NewLine | null;
  /** Why nothing can be written here now; null where it can. */
  readonly locked: string | null;
  /** What happened last, in words, for those who do not see it. */
  readonly announcement: string;
  subscribe(listener: () => void): () => void;
  open(sheet: Sheet, history?: History): void;
  /** Shows the sheet as another tab has made it; the chosen line stays. */
  follow(sheet: Sheet, history?: History): void;
  /** Nothing can be written, and every attempt says why; null: it can again. */
  lock(why: string | null): void;
  /** Goes on with what was being typed. False where its place is gone. */
  resume(typed: Typed): boolean;
  /** What stands in the new line of a section. */
  typeNew(section: string, text: string): void;
  /** `from`: the other end of a run. */
  choose(cell: string | null, from?: string): void;
  /** The run that is chosen reaches to this line. */
  extend(cell: string): void;
  read(caseIndex: number): void;
  /** Begins typing. `text` replaces what stands there. False where the cell cannot be typed into. */
  begin(cell: string, field: Field, caseIndex: number, text?: string): boolean;
  type(text: string): void;
  setForAll(forAll: boolean): void;
  /** Begins to edit a line in its place. False where it has nothing of the kind. */
  beginInPlace(cell: string, what: InPlace['what']): boolean;
  /** Null: what is typed is no cell yet. */
  draftInPlace(cell: Cell | null, renamed?: Renamed, text?: string): void;
  /** Puts a new cell behind another, null: at the beginning; its id. */
  insert(cell: NewCell, after: string | null): string;
  /** One step of editing; what is being typed is kept first. False where nothing can be written. */
  act(edit: Edit, how?: ActWords): boolean;
  /** Says something that changes nothing; with a line it stays there to be read. */
  tell(words: string, cell?: string): void;
  finish(): void;
  cancel(): void;
  /** A value that was carried over holds for this sheet as well. */
  confirm(cell: string): void;
  setBasis(cell: string, basis: Basis | null): void;
  /** Basis and source that stood beside the number before the last one. */
  formerProvenance(cell: string): Provenance | undefined;
  restoreProvenance(cell: string): void;
  /** The sheet is read beside the template that it came from; null: it was looked for and is not at hand. */
  compareWith(template: Sheet | null): void;
  undo(): void;
  redo(): void;
  saved(): void;
}
