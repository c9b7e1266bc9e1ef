// What the page sees of the desk: what it shows and what can be done on it.
//
// Not here: how it does so (desk.ts).

import type { RecordModel } from '../record/index.ts';
import type { Basis, Calculation, Cell, CellProblem, Sheet } from '../sheet/index.ts';
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
  readonly what: 'formula' | 'fields';
  /** The cell as typed; null until something is typed. */
  readonly draft: Cell | null;
  /** True where what is typed is no cell yet: it cannot be kept. */
  readonly unreadable: boolean;
  readonly renamed: Renamed | undefined;
  /** Errors that the draft would bring into other lines. */
  readonly problems: readonly CellProblem[];
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
  readonly chosen: string | null;
  /** Index of the case whose numbers stand in the equations. */
  readonly reading: number;
  readonly editing: Editing | null;
  readonly inPlace: InPlace | null;
  readonly undoLabel: string | null;
  readonly redoLabel: string | null;
  /** True where there are changes that no file has. */
  readonly unsaved: boolean;
  /** What happened last, in words, for those who do not see it. */
  readonly announcement: string;
  subscribe(listener: () => void): () => void;
  open(sheet: Sheet): void;
  choose(cell: string | null): void;
  read(caseIndex: number): void;
  /** Begins typing. `text` replaces what stands there. False where the cell cannot be typed into. */
  begin(cell: string, field: Field, caseIndex: number, text?: string): boolean;
  type(text: string): void;
  setForAll(forAll: boolean): void;
  /** Begins to edit a line in its place. False where it has nothing of the kind. */
  beginInPlace(cell: string, what: InPlace['what']): boolean;
  /** Null: what is typed is no cell yet. */
  draftInPlace(cell: Cell | null, renamed?: Renamed): void;
  /** Puts a new cell behind another, null: at the beginning; its id. */
  insert(cell: NewCell, after: string | null): string;
  remove(cell: string): void;
  /** One place up (-1) or down (1). False at the end. */
  move(cell: string, step: -1 | 1): boolean;
  finish(): void;
  cancel(): void;
  /** A value that was carried over holds for this sheet as well. */
  confirm(cell: string): void;
  setBasis(cell: string, basis: Basis | null): void;
  /** Basis and source that stood beside the number before the last one. */
  formerProvenance(cell: string): Provenance | undefined;
  restoreProvenance(cell: string): void;
  undo(): void;
  redo(): void;
  saved(): void;
}
