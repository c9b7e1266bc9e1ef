// The rows in the database of the browser.
//
// 1. One transaction a call, over all tables concerned, with strict durability for everything a user would miss; it has happened when
//    `done` resolves, and not before.
// 2. Nothing but requests of the transaction is awaited inside it: anything else would end it half-way.
// 3. A connection that was closed under us (data cleared, browser gave it up) is opened again at the next call; what then is missing is 'gone'.
// 4. Closed for a newer page, it stays closed: 'newer'.
// Not here: opening and versions (database.ts).

import type { IDBPTransaction, StoreNames } from 'idb';
import { type Backend, firstKept, isNewer, type KeptWithSteps } from './backend.ts';
import { type Database, type OpenedDatabase, type Opening, openDatabase, type Tables } from './database.ts';
import { problemOf, StoreFault, storeProblem } from './problem.ts';
import type { SheetHead, TextRow } from './rows.ts';

type Name = StoreNames<Tables>;
type Transaction<Mode extends IDBTransactionMode> = IDBPTransaction<Tables, Name[], Mode>;

export interface BrowserBackend extends Backend {
  readonly fresh: boolean;
}

/** Opens the database and gives its rows. Throws a StoreFault: 'newer', 'unavailable'. */
export async function browserBackend(opening: Opening): Promise<BrowserBackend> {
  let opened: OpenedDatabase | null = null;
  let tooOld = false;
  let closed = false;
  const connect = async (): Promise<Database> => {
    if (tooOld) throw new StoreFault(storeProblem('newer'));
    if (closed) throw new StoreFault(storeProblem('not-kept', { cause: 'the store is closed' }));
    opened ??= await openDatabase({
      ...opening,
      onClose(reason) {
        opened = null;
        tooOld ||= reason === 'newer';
        opening.onClose?.(reason);
      },
    });
    return opened.db;
  };

  /** Begins at once where the connection stands: a page that is being closed has no time to wait. */
  async function run<Mode extends IDBTransactionMode, T>(
    names: Name[],
    mode: Mode,
    work: (transaction: Transaction<Mode>) => Promise<T>,
  ): Promise<T> {
    const db = opened === null || tooOld || closed ? await connect() : opened.db;
    let transaction: Transaction<Mode>;
    try {
      transaction = db.transaction(names, mode, mode === 'readwrite' ? { durability: 'strict' } : {});
    } catch (cause) {
      // The connection is closing without having told us: it is opened anew next time.
      opened = null;
      throw new StoreFault(problemOf(cause));
    }
    try {
      const [value] = await Promise.all([work(transaction), transaction.done]);
      return value;
    } catch (cause) {
      transaction.done.catch(() => undefined);
      const problem = problemOf(cause, transaction as unknown as { error: DOMException | null });
      try {
        transaction.abort();
      } catch {
        // It has ended already.
      }
      throw new StoreFault(problem);
    }
  }

  const stepsOf = (id: string, from = 0) => IDBKeyRange.bound([id, from], [id, Number.MAX_SAFE_INTEGER]);
  const textRow = (id: string, { text, position, draft }: Pick<KeptWithSteps, 'text' | 'position' | 'draft'>): TextRow => ({
    id,
    text,
    position,
    ...(draft === null ? {} : { draft }),
  });
  const { fresh } = await connect().then(() => opened!);

  return {
    kind: 'browser',
    fresh,
    heads: () => run(['sheets'], 'readonly', (t) => t.objectStore('sheets').getAll()),
    read: (id) =>
      run(['sheets', 'texts'], 'readonly', async (t) => {
        const [head, row] = await Promise.all([t.objectStore('sheets').get(id), t.objectStore('texts').get(id)]);
        if (head === undefined || row === undefined) return undefined;
        return { head, text: row.text, position: row.position, draft: row.draft ?? null };
      }),
    claim: (id, writer, pruning) =>
      run(['sheets', 'texts', 'steps', 'left'], 'readwrite', async (t) => {
        const steps = t.objectStore('steps');
        const [before, text, line, allLeft] = await Promise.all([
          t.objectStore('sheets').get(id),
          t.objectStore('texts').get(id),
          steps.getAll(stepsOf(id)),
          t.objectStore('left').getAll(),
        ]);
        if (before === undefined || text === undefined) return undefined;
        const behind = allLeft.filter((one) => one.sheet === id);
        const left = behind.find((one) => isNewer(one, before));
        const orphans = behind.filter((one) => one.writer !== before.writer);
        const head: SheetHead = { ...(left?.head ?? before), writer, rev: before.rev + 1 };
        const row = left === undefined ? text : textRow(id, left);
        const rows = left?.steps ?? line;
        if (left !== undefined)
          await Promise.all([t.objectStore('texts').put(row), steps.delete(stepsOf(id)), ...rows.map((one) => steps.put(one))]);
        if (behind.some((one) => one.writer === before.writer)) await t.objectStore('left').delete(before.writer);
        const first = firstKept(rows, row.position, pruning);
        const writes: Promise<unknown>[] = [t.objectStore('sheets').put(head)];
        if (rows[0] !== undefined && rows[0].n < first)
          writes.push(steps.delete(IDBKeyRange.bound([id, 0], [id, first], false, true)));
        await Promise.all(writes);
        return {
          head,
          text: row.text,
          position: row.position,
          draft: row.draft ?? null,
          steps: rows.filter((one) => one.n >= first),
          orphans,
        };
      }),
    leave: (row) =>
      run(['left'], 'readwrite', async (t) => {
        const put = t.objectStore('left').put(row);
        // Left to itself the transaction would end after an answer that a closing page never gets.
        t.commit();
        await put;
      }),
    dropLeft: (writer) => run(['left'], 'readwrite', (t) => t.objectStore('left').delete(writer)),
    create: (kept) =>
      run(['sheets', 'texts', 'steps'], 'readwrite', async (t) => {
        await Promise.all([
          t.objectStore('sheets').add(kept.head),
          t.objectStore('texts').add(textRow(kept.head.id, kept)),
          ...kept.steps.map((row) => t.objectStore('steps').add(row)),
        ]);
      }),
    write: (change) =>
      run(['sheets', 'texts', 'steps', 'left'], 'readwrite', async (t) => {
        const { id, writer } = change.head;
        const there = await t.objectStore('sheets').get(id);
        if (there === undefined) throw new StoreFault(storeProblem('gone'));
        if (there.writer !== writer) throw new StoreFault(storeProblem('overtaken'));
        if (change.expected !== null && there.rev !== change.expected) throw new StoreFault(storeProblem('not-kept'));
        const steps = t.objectStore('steps');
        await Promise.all([
          t.objectStore('sheets').put({ ...change.head, rev: there.rev + 1 }),
          t.objectStore('texts').put(textRow(id, change)),
          ...(change.dropFrom === null ? [] : [steps.delete(stepsOf(id, change.dropFrom))]),
          ...change.put.map((row) => steps.put(row)),
          t.objectStore('left').delete(writer),
        ]);
        return there.rev + 1;
      }),
    setAside: (id, reason) =>
      run(['sheets'], 'readwrite', async (t) => {
        const head = await t.objectStore('sheets').get(id);
        if (head !== undefined) await t.objectStore('sheets').put({ ...head, unreadable: reason });
      }),
    remove: (id, at) =>
      run(['sheets', 'trash'], 'readwrite', async (t) => {
        const head = await t.objectStore('sheets').get(id);
        if (head === undefined) return undefined;
        const row = { id, head, deleted: at };
        await Promise.all([t.objectStore('sheets').delete(id), t.objectStore('trash').put(row)]);
        return row;
      }),
    restore: (id) =>
      run(['sheets', 'trash'], 'readwrite', async (t) => {
        const row = await t.objectStore('trash').get(id);
        if (row === undefined) return undefined;
        const head = { ...row.head, rev: row.head.rev + 1 };
        await Promise.all([t.objectStore('trash').delete(id), t.objectStore('sheets').put(head)]);
        return head;
      }),
    trash: () => run(['trash'], 'readonly', (t) => t.objectStore('trash').getAll()),
    purge: (before) =>
      run(['trash', 'texts', 'steps', 'files'], 'readwrite', async (t) => {
        const old = (await t.objectStore('trash').getAll()).filter((row) => row.deleted < before);
        await Promise.all(
          old.flatMap(({ id }) => [
            t.objectStore('trash').delete(id),
            t.objectStore('texts').delete(id),
            t.objectStore('steps').delete(stepsOf(id)),
            t.objectStore('files').delete(id),
          ]),
        );
        return old.length;
      }),
    templates: () => run(['templates'], 'readonly', (t) => t.objectStore('templates').getAll()),
    putTemplate: (row) => run(['templates'], 'readwrite', async (t) => void (await t.objectStore('templates').put(row))),
    removeTemplate: (id) =>
      run(['templates'], 'readwrite', async (t) => {
        const row = await t.objectStore('templates').get(id);
        await t.objectStore('templates').delete(id);
        return row;
      }),
    file: (id) => run(['files'], 'readonly', (t) => t.objectStore('files').get(id)),
    files: () => run(['files'], 'readonly', (t) => t.objectStore('files').getAll()),
    putFile: (row) => run(['files'], 'readwrite', async (t) => void (await t.objectStore('files').put(row))),
    removeFile: (id) => run(['files'], 'readwrite', (t) => t.objectStore('files').delete(id)),
    meta: (key) => run(['meta'], 'readonly', async (t) => (await t.objectStore('meta').get(key))?.value),
    putMeta: (key, value) => run(['meta'], 'readwrite', async (t) => void (await t.objectStore('meta').put({ key, value }))),
    close() {
      closed = true;
      opened?.db.close();
      opened = null;
    },
  };
}
