// The database in the browser: its tables, its versions, and how it is opened and given up.
//
// 1. The version is the number of upgrades. Each upgrade takes a database from the version before it; together they run in one
//    transaction, and one that fails leaves the database as it was.
// 2. A tab never stands in the way of a newer one: asked to make room, it closes its connection at once and says so.
// 3. An older page never opens a newer database: 'newer'.
// 4. Opening always ends in words: 'blocked' while an older tab holds on, 'slow' where the browser does not answer in time.
// Not here: reading and writing rows (backend-browser.ts).

import { type DBSchema, type IDBPDatabase, type IDBPTransaction, openDB, type StoreNames } from 'idb';
import { problemOf, StoreFault, type StoreProblem, storeProblem } from './problem.ts';
import type { FileRow, LeftRow, MetaRow, SheetHead, StepRow, TemplateRow, TextRow, TrashRow } from './rows.ts';
import { to1 } from './upgrade/to1.ts';

export interface Tables extends DBSchema {
  sheets: { key: string; value: SheetHead };
  texts: { key: string; value: TextRow };
  steps: { key: [string, number]; value: StepRow };
  trash: { key: string; value: TrashRow };
  templates: { key: string; value: TemplateRow };
  left: { key: string; value: LeftRow };
  files: { key: string; value: FileRow };
  meta: { key: string; value: MetaRow };
}
export type Database = IDBPDatabase<Tables>;
export type Upgrade = (
  db: Database,
  transaction: IDBPTransaction<Tables, StoreNames<Tables>[], 'versionchange'>,
) => void | Promise<void>;

export const upgrades: readonly Upgrade[] = [to1];

export interface Opening {
  readonly name: string;
  readonly upgrades?: readonly Upgrade[];
  /** Told while opening waits; `null` when it goes on. */
  readonly onWait?: (problem: StoreProblem | null) => void;
  /** The connection is closed: a newer page wants in, the database was deleted, or the browser gave it up. */
  readonly onClose?: (reason: 'newer' | 'deleted' | 'given up') => void;
  /** Milliseconds until an opening without an answer is called slow. */
  readonly patience?: number;
}
export interface OpenedDatabase {
  readonly db: Database;
  /** True where there was none before. */
  readonly fresh: boolean;
}

/** Opens the database. Throws a StoreFault: 'newer', 'not-upgraded', or 'unavailable' where the browser has none for us. */
export async function openDatabase(opening: Opening): Promise<OpenedDatabase> {
  const steps = opening.upgrades ?? upgrades;
  let fresh = false;
  let waiting = false;
  let upgradeFault: unknown;
  const wait = (problem: StoreProblem): void => {
    waiting = true;
    opening.onWait?.(problem);
  };
  const slow = setTimeout(() => {
    if (!waiting) wait(storeProblem('slow'));
  }, opening.patience ?? 5000);
  try {
    const db = await openDB<Tables>(opening.name, steps.length, {
      async upgrade(database, before, _after, transaction) {
        fresh = before === 0;
        try {
          for (const step of steps.slice(before)) await step(database, transaction);
        } catch (cause) {
          upgradeFault = cause;
          transaction.done.catch(() => undefined);
          transaction.abort();
        }
      },
      blocked: () => wait(storeProblem('blocked')),
      blocking(_current, next, event) {
        (event.target as IDBDatabase).close();
        opening.onClose?.(next === null ? 'deleted' : 'newer');
      },
      terminated: () => opening.onClose?.('given up'),
    });
    return { db, fresh };
  } catch (cause) {
    if (upgradeFault !== undefined) throw new StoreFault(storeProblem('not-upgraded', { cause: upgradeFault }));
    const problem = problemOf(cause);
    throw new StoreFault(problem.code === 'not-kept' ? storeProblem('unavailable', { cause }) : problem);
  } finally {
    clearTimeout(slow);
    if (waiting) opening.onWait?.(null);
  }
}
