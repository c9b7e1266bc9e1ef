// The store of this browser: opened once a page, used by the shelf, by every open sheet and by files.
//
// 1. Opening always gives a store to work with: where the browser keeps nothing it is the memory of the tab, and `problem` says so.
// 2. That sheets were kept is also noted outside the database: where they are gone, the page says so instead of showing a fresh start.
// 3. What lies in the trash longer than thirty days goes when the store is opened.
// Not here: sheets (keeper.ts), the list of them (shelf.ts).

import type { Backend } from './backend.ts';
import { browserBackend } from './backend-browser.ts';
import { memoryBackend } from './backend-memory.ts';
import type { Upgrade } from './database.ts';
import { type Locks, locksOf } from './holder.ts';
import { type Hub, openHub } from './hub.ts';
import { askToPersist, type Persistence, readPersistence } from './persistence.ts';
import { problemOf, StoreFault, type StoreProblem, storeProblem } from './problem.ts';

export interface StoreOptions {
  readonly name?: string;
  /** Told while opening waits for another tab or for the browser; null when it goes on. */
  readonly onWait?: (problem: StoreProblem | null) => void;
  readonly patience?: number;
  /** For tests of upgrades. */
  readonly upgrades?: readonly Upgrade[];
}
export interface Store {
  readonly name: string;
  readonly backend: Backend;
  readonly hub: Hub;
  readonly locks: Locks;
  /** This tab, among the others. */
  readonly tab: string;
  /** Why nothing is kept, or what was lost; null where all is well. */
  readonly problem: StoreProblem | null;
  /** Told when the connection is closed under the page: 'newer' asks for a reload. */
  onTrouble(listener: (problem: StoreProblem) => void): () => void;
  persistence(): Promise<Persistence>;
  /** To be called when a sheet of the user's own was kept: notes that there are sheets, asks the browser once to keep them. */
  keptOwn(): void;
  close(): void;
}

const daysInTrash = 30;
const day = 24 * 60 * 60 * 1000;

export async function openStore(options: StoreOptions = {}): Promise<Store> {
  const name = options.name ?? 'tightside';
  const troubled = new Set<(problem: StoreProblem) => void>();
  let problem: StoreProblem | null = null;
  let backend: Backend;
  try {
    if (typeof indexedDB === 'undefined' || indexedDB === null) throw new StoreFault(storeProblem('unavailable'));
    const opened = await browserBackend({
      name,
      ...(options.onWait === undefined ? {} : { onWait: options.onWait }),
      ...(options.patience === undefined ? {} : { patience: options.patience }),
      ...(options.upgrades === undefined ? {} : { upgrades: options.upgrades }),
      onClose(reason) {
        if (reason === 'newer') for (const listener of troubled) listener(storeProblem('newer'));
      },
    });
    backend = opened;
    if (opened.fresh && witness(name) !== null) problem = storeProblem('lost');
    if (opened.fresh) setWitness(name, null);
  } catch (cause) {
    const known = problemOf(cause);
    problem = known.code === 'not-kept' ? storeProblem('unavailable', { cause }) : known;
    backend = memoryBackend();
  }
  const store = storeOn(name, backend, problem, troubled);
  backend.purge(Date.now() - daysInTrash * day).catch(() => undefined);
  return store;
}

/** A store in the memory of the tab, for going on without keeping. */
export function memoryStore(problem: StoreProblem | null = storeProblem('unavailable')): Store {
  return storeOn('memory', memoryBackend(), problem, new Set());
}

function storeOn(
  name: string,
  backend: Backend,
  problem: StoreProblem | null,
  troubled: Set<(problem: StoreProblem) => void>,
): Store {
  const kept = backend.kind === 'browser';
  // What lies in the memory of one tab concerns no other.
  const hub = openHub(kept ? name : `${name} ${newId()}`);
  const storage = typeof navigator === 'undefined' ? undefined : navigator.storage;
  const locks = kept && typeof navigator !== 'undefined' ? navigator.locks : undefined;
  let asked = !kept;
  return {
    name,
    backend,
    hub,
    locks: locksOf(locks),
    tab: newId(),
    problem,
    onTrouble(listener) {
      troubled.add(listener);
      return () => troubled.delete(listener);
    },
    persistence: () => readPersistence(storage),
    keptOwn() {
      if (asked) return;
      asked = true;
      setWitness(name, new Date().toISOString());
      void (async () => {
        try {
          if ((await backend.meta('asked to persist')) !== undefined) return;
          await backend.putMeta('asked to persist', Date.now());
          await askToPersist(storage);
        } catch {
          // The sheet itself is kept; the browser is asked another time.
          asked = false;
        }
      })();
    },
    close() {
      hub.close();
      backend.close();
    },
  };
}

/** A name that no other tab or sheet has. */
export function newId(): string {
  return Array.from(crypto.getRandomValues(new Uint8Array(10)), (byte) => byte.toString(36).padStart(2, '0')).join('');
}

const witnessKey = (name: string) => `${name} sheets kept`;

function witness(name: string): string | null {
  try {
    return localStorage.getItem(witnessKey(name));
  } catch {
    return null;
  }
}

function setWitness(name: string, value: string | null): void {
  try {
    if (value === null) localStorage.removeItem(witnessKey(name));
    else localStorage.setItem(witnessKey(name), value);
  } catch {
    // A browser that has no such place keeps no witness.
  }
}
