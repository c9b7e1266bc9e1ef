// What the store keeps: the rows of its tables, as plain data.
//
// 1. `rev` of a sheet goes up by one with every transaction that changes it; `writer` is the tab that may write it. A write that
//    names another rev or another writer than the row's changes nothing.
// 2. The text of a sheet stands apart from its head, so that the shelf is listed without reading any sheet.
// 3. Steps are the line of everything that can be undone and redone: `n` counts up without a gap, and `position` is the `n` of the last
//    step that is done. Steps up to it can be undone, steps after it redone.
// 4. A sheet in the trash keeps its text and its steps: only its head has moved.
// Not here: how rows are read and written (backend-browser.ts, backend-memory.ts).

import type { HistoryStep, Status } from '../sheet/index.ts';

/** What the shelf shows of a sheet. Times are milliseconds since the epoch. */
export interface SheetHead {
  readonly id: string;
  readonly rev: number;
  readonly writer: string;
  readonly title: string;
  readonly status: Status;
  readonly documentNumber?: string;
  readonly revision?: string;
  readonly project?: string;
  readonly client?: string;
  /** Id of the template that it was made from. */
  readonly template?: string;
  /** Number of cells. */
  readonly cells: number;
  readonly made: number;
  readonly changed: number;
  /** Why the sheet came to be beside another one: 'unsaved changes of another tab'. */
  readonly copyOf?: string;
  /** Why its text cannot be opened; it is kept as it is. */
  readonly unreadable?: string;
}

/** A text that is being typed and is not yet part of the sheet: plain JSON of the page. */
export type Draft = unknown;

export interface TextRow {
  readonly id: string;
  readonly text: string;
  readonly position: number;
  readonly draft?: Draft;
}
export interface StepRow {
  readonly sheet: string;
  readonly n: number;
  /** When it was written. */
  readonly at: number;
  readonly step: HistoryStep;
}
/**
 * What a page that was being closed had not written yet, put down in one request that asks for nothing: a closing page sees no answer.
 * It becomes part of the sheet when the sheet is claimed next.
 */
export interface LeftRow {
  readonly writer: string;
  readonly sheet: string;
  /** The rev that it builds on; null: any of this writer. */
  readonly rev: number | null;
  readonly head: SheetHead;
  readonly text: string;
  readonly position: number;
  readonly draft: Draft | null;
  /** The whole line. */
  readonly steps: readonly StepRow[];
}
export interface TrashRow {
  readonly id: string;
  readonly head: SheetHead;
  readonly deleted: number;
}
export interface TemplateRow {
  readonly id: string;
  readonly version: number;
  readonly title: string;
  readonly job: string;
  readonly changed: number;
  readonly text: string;
}
/** A file on the disk that a sheet is saved in, where the browser can do that. */
export interface FileRow {
  readonly id: string;
  readonly handle: FileSystemFileHandle;
  readonly name: string;
  /** The text as last read or written: another text in the file means that somebody else changed it. */
  readonly text: string;
}
export interface MetaRow {
  readonly key: string;
  readonly value: unknown;
}
