// What keeps the rows: one interface, met by the database of the browser and by the memory of the tab.
//
// 1. Each call is one transaction: all of it happens or none of it. A call that writes resolves when the transaction has completed.
// 2. Trouble is thrown as a StoreFault: the caller turns it into words where it can be told.
// 3. `write` changes a sheet only for the writer that claimed it last ('overtaken' for others), and at the rev that it expects ('not-kept'
//    where an earlier write of its own has failed).
// Not here: when and what is written (keeper.ts, shelf.ts).

import type { Draft, FileRow, LeftRow, SheetHead, StepRow, TemplateRow, TrashRow } from './rows.ts';

/** A sheet as it is kept. */
export interface KeptSheet {
  readonly head: SheetHead;
  readonly text: string;
  readonly position: number;
  readonly draft: Draft | null;
}
export interface KeptWithSteps extends KeptSheet {
  readonly steps: readonly StepRow[];
}
export interface Claimed extends KeptWithSteps {
  /** Left behind by writers that had been replaced already: not part of the sheet. */
  readonly orphans: readonly LeftRow[];
}
/** One write: the head, the text, and what changed in the line of steps. */
export interface SheetWrite {
  readonly head: SheetHead;
  /** The rev that the row is expected to have; null: any, because the whole line of steps is written anew. */
  readonly expected: number | null;
  readonly text: string;
  readonly position: number;
  readonly draft: Draft | null;
  /** Steps from this `n` on are dropped before `put`; null: none. */
  readonly dropFrom: number | null;
  readonly put: readonly StepRow[];
}
export interface Pruning {
  /** Steps written before this time may go … */
  readonly before: number;
  /** … but so many are always kept … */
  readonly least: number;
  /** … and never more than so many. */
  readonly most: number;
}

export interface Backend {
  readonly kind: 'browser' | 'memory';
  heads(): Promise<readonly SheetHead[]>;
  /** Undefined where there is no such sheet on the shelf. */
  read(id: string): Promise<KeptSheet | undefined>;
  /** Makes `writer` the tab that may write, takes in what the last one left behind, prunes old steps, and reads the sheet. */
  claim(id: string, writer: string, pruning: Pruning): Promise<Claimed | undefined>;
  /** A new sheet; throws where its id is taken. */
  create(kept: KeptWithSteps): Promise<void>;
  /** Resolves to the new rev. Faults: 'gone', 'overtaken', 'full', 'not-kept'. */
  write(change: SheetWrite): Promise<number>;
  /** Puts down what a closing page has not written yet. */
  leave(row: LeftRow): Promise<void>;
  dropLeft(writer: string): Promise<void>;
  /** Marks a text that cannot be read; the rest of the row stays. */
  setAside(id: string, reason: string): Promise<void>;
  remove(id: string, at: number): Promise<TrashRow | undefined>;
  restore(id: string): Promise<SheetHead | undefined>;
  trash(): Promise<readonly TrashRow[]>;
  /** Empties the trash of what was deleted before the time; returns how many. */
  purge(before: number): Promise<number>;
  templates(): Promise<readonly TemplateRow[]>;
  putTemplate(row: TemplateRow): Promise<void>;
  removeTemplate(id: string): Promise<TemplateRow | undefined>;
  file(id: string): Promise<FileRow | undefined>;
  files(): Promise<readonly FileRow[]>;
  putFile(row: FileRow): Promise<void>;
  removeFile(id: string): Promise<void>;
  meta(key: string): Promise<unknown>;
  putMeta(key: string, value: unknown): Promise<void>;
  close(): void;
}

/** Whether what was left behind is newer than the row: of the same writer, and not written in the ordinary way after all. */
export const isNewer = (left: LeftRow, head: SheetHead): boolean =>
  left.writer === head.writer && (left.rev === null || left.rev >= head.rev);

/** The first `n` that stays. `rows` in order of `n`; steps that can be redone always stay. */
export function firstKept(rows: readonly StepRow[], position: number, { before, least, most }: Pruning): number {
  const done = rows.filter((row) => row.n <= position);
  const young = done.findIndex((row) => row.at >= before);
  const keep = Math.min(Math.max(young < 0 ? 0 : done.length - young, least), most, done.length);
  return done[done.length - keep]?.n ?? position + 1;
}
