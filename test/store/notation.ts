// Notation of the store's tests: tabs of one browser, sheets of a few cells, and moments.

import { IDBFactory } from 'fake-indexeddb';
import 'fake-indexeddb/auto';
import { afterEach } from 'vitest';
import { emptyHistory, type GivenCell, type History, perform, type Sheet } from '../../src/sheet/index.ts';
import type { Keeper, KeeperEvent } from '../../src/store/keeper.ts';
import { openSheet } from '../../src/store/keeper.ts';
import { openStore, type Store, type StoreOptions } from '../../src/store/store.ts';

const closing: (() => void)[] = [];
afterEach(() => {
  for (const close of closing.splice(0)) close();
});

export const newBrowser = (): void => {
  globalThis.indexedDB = new IDBFactory();
};

/** One more tab of the browser. */
export async function tab(options: StoreOptions = {}): Promise<Store> {
  const store = await openStore(options);
  closing.push(() => store.close());
  return store;
}

export const given = (name: string, value: string): GivenCell => ({ id: `g-${name}`, kind: 'given', name, value });

export const sheet = (title: string, ...cells: Sheet['cells']): Sheet => ({
  format: 'tightside-sheet/1',
  title,
  status: 'in preparation',
  cells,
});

export async function opened(store: Store, id: string, delay = 5): Promise<Keeper> {
  const done = await openSheet(store, id, { delay });
  if (!done.ok) throw new Error(done.problem.message);
  closing.push(() => void done.keeper.close({ anyway: true }));
  return done.keeper;
}

/** Sets a given, as the page does: the edit, its step, both handed over. */
export function set(keeper: Keeper, name: string, value: string, history: History = keeper.history): boolean {
  const done = perform(keeper.sheet, history, { kind: 'set-cell', cell: given(name, value) }, { time: Date.now() });
  return keeper.keep(done.sheet, done.history);
}

export const valueOf = (of: Sheet, name: string): string | undefined => {
  const cell = of.cells.find((one) => one.id === `g-${name}`);
  return cell?.kind === 'given' ? cell.value : undefined;
};

/** The next event of a kind. */
export const next = <Kind extends KeeperEvent['kind']>(
  keeper: Keeper,
  kind: Kind,
  within = 5000,
): Promise<Extract<KeeperEvent, { kind: Kind }>> =>
  new Promise((done, failed) => {
    const late = setTimeout(() => failed(new Error(`no ${kind} within ${within} ms`)), within);
    const stop = keeper.subscribe((event) => {
      if (event.kind !== kind) return;
      clearTimeout(late);
      stop();
      done(event as Extract<KeeperEvent, { kind: Kind }>);
    });
  });

export { emptyHistory };

/** Locks as the browser gives them to its tabs: one holder, a queue, stealing. A stand-in for Node; the real ones are used in test/browser. */
export function fakeLocks(): Pick<LockManager, 'request'> {
  interface Waiting {
    readonly start: () => void;
  }
  const held = new Map<string, { readonly lose: (reason: unknown) => void }>();
  const queues = new Map<string, Waiting[]>();
  const request = (name: string, options: LockOptions, work: (lock: Lock | null) => unknown): Promise<unknown> =>
    new Promise((done, failed) => {
      const start = () => {
        const mine = { lose: failed };
        held.set(name, mine);
        Promise.resolve(work({ name, mode: 'exclusive' })).then((value) => {
          done(value);
          if (held.get(name) !== mine) return;
          held.delete(name);
          queues.get(name)?.shift()?.start();
        }, failed);
      };
      if (options.steal === true) {
        held.get(name)?.lose(new DOMException('stolen', 'AbortError'));
        start();
      } else if (!held.has(name)) start();
      else if (options.ifAvailable === true) Promise.resolve(work(null)).then(done, failed);
      else {
        const waiting = { start };
        queues.set(name, [...(queues.get(name) ?? []), waiting]);
        options.signal?.addEventListener('abort', () => {
          queues.set(
            name,
            (queues.get(name) ?? []).filter((one) => one !== waiting),
          );
          failed(new DOMException('given up', 'AbortError'));
        });
      }
    });
  return { request: request as LockManager['request'] };
}
