// One sheet that is open in this tab: kept as it is edited, or followed while another tab writes it.
//
// 1. One tab writes, the others follow: they show what is durable, within a moment of its being so.
// 2. A tab that takes over asks first: the writer hands in what is being typed, keeps everything, and stops. A writer that does not answer
//    loses the lock all the same; what it had not kept becomes a sheet of its own, beside this one, and nothing is overwritten.
// 3. When the writer's tab closes, a follower becomes the writer by itself.
// 4. Hiding or leaving the page hands in what is being typed and writes at once.
// 5. Trouble never empties the screen: `sheet` stays what it was, and the problem names the ways out.
// Not here: when the next write starts (queue.ts), the list of sheets (shelf.ts), what is drawn (src/view).

import { emptyHistory, type History, readSheet, type Sheet } from '../sheet/index.ts';
import type { Claimed, KeptWithSteps } from './backend.ts';
import { newRow } from './head.ts';
import type { Lock } from './holder.ts';
import { problemOf, type StoreProblem, storeProblem } from './problem.ts';
import { type Queue, startQueue } from './queue.ts';
import type { Draft, LeftRow, SheetHead } from './rows.ts';
import { sharing } from './sheet-text.ts';
import { historyOf } from './steps.ts';
import { newId, type Store } from './store.ts';

export type Role = 'writer' | 'follower';
export type KeptState =
  /** Everything handed over is durable; `at` is when the last change became so. */
  | { readonly kind: 'kept'; readonly at: number }
  | { readonly kind: 'keeping' }
  /** The tab only shows what another one writes. */
  | { readonly kind: 'following' }
  | { readonly kind: 'trouble'; readonly problem: StoreProblem };

export type KeeperEvent =
  /** `state` is another one. */
  | { readonly kind: 'state' }
  /** Hand in what is being typed, now: the page is hidden or closed, or another tab takes over. */
  | { readonly kind: 'hand-in' }
  /** Another tab has changed the sheet: `sheet` is the new one, sharing the cells that did not change. */
  | { readonly kind: 'followed' }
  /** This tab writes from now on; `sheet`, `history` and `draft` are as kept. */
  | { readonly kind: 'writer'; readonly message: string }
  /** This tab follows from now on. `copy`: where its unsaved changes are. */
  | { readonly kind: 'follower'; readonly message: string; readonly copy?: SheetHead };

export interface Keeper {
  readonly id: string;
  readonly sheet: Sheet;
  readonly history: History;
  readonly draft: Draft | null;
  readonly head: SheetHead;
  readonly role: Role;
  readonly state: KeptState;
  /** After every edit, undo and redo. False where this tab does not write: nothing is taken. */
  keep(sheet: Sheet, history: History): boolean;
  /** What is being typed and not yet in the sheet; null when nothing is. */
  keepDraft(draft: Draft | null): boolean;
  /** True when all that was handed over is durable; false when it could not be kept: see `state`. */
  kept(): Promise<boolean>;
  tryAgain(): void;
  takeOver(): Promise<boolean>;
  /** What is on the screen as a sheet of its own, for a sheet that is gone. Open it by its id. */
  keepAsNew(title?: string): Promise<SheetHead>;
  subscribe(listener: (event: KeeperEvent) => void): () => void;
  /** Keeps everything, then lets another tab write. False, and still open, where something could not be kept; `anyway` closes all the same. */
  close(options?: { readonly anyway?: boolean }): Promise<boolean>;
}
export type OpenedSheet =
  | { readonly ok: true; readonly keeper: Keeper; readonly note: string | null }
  | { readonly ok: false; readonly problem: StoreProblem; readonly text?: string; readonly title?: string };

export interface KeeperOptions {
  /** Milliseconds from a change to the start of its write. */
  readonly delay?: number;
}

const twoDays = 48 * 60 * 60 * 1000;
const leastSteps = 200;
const mostSteps = 5000;
const longestAnswer = 1000;

export async function openSheet(store: Store, id: string, options: KeeperOptions = {}): Promise<OpenedSheet> {
  const { backend, hub, locks } = store;
  const me = newId();
  const lockName = `${store.name} sheet ${id}`;
  const listeners = new Set<(event: KeeperEvent) => void>();
  const emit = (event: KeeperEvent) => {
    for (const listener of [...listeners]) listener(event);
  };
  const lose = () => void lostLock();
  const claim = () => backend.claim(id, me, { before: Date.now() - twoDays, least: leastSteps, most: mostSteps });

  let lock: Lock | null = await locks.take(lockName, { lost: lose });
  let row: KeptWithSteps | undefined;
  let orphans: readonly LeftRow[] = [];
  try {
    const read = lock === null ? await backend.read(id) : await claim();
    row = read === undefined ? undefined : { steps: [], ...read };
    if (read !== undefined && 'orphans' in read) orphans = (read as Claimed).orphans;
  } catch (cause) {
    lock?.release();
    return { ok: false, problem: problemOf(cause) };
  }
  if (row === undefined) {
    lock?.release();
    return { ok: false, problem: storeProblem('not-here') };
  }
  const rescued = await rescue(store, orphans);
  const first = readSheet(row.text);
  if (!first.ok) {
    lock?.release();
    const newer = first.problems[0]?.code === 'newer-format';
    const detail = first.problems[0]?.message ?? '';
    if (!newer) await backend.setAside(id, detail).catch(() => undefined);
    const problem = newer
      ? storeProblem('newer-sheet')
      : storeProblem('unreadable', { detail: `The trouble begins at ${detail}.` });
    return { ok: false, problem, text: row.text, title: row.head.title };
  }
  const noSteps = lock !== null && historyOf(row.steps, row.position) === undefined;
  const notes = [
    ...(noSteps ? ['The steps to undo of this sheet could not be read; the sheet itself is complete.'] : []),
    ...rescued.map((one) => `What a closed tab had not kept yet is now the sheet “${one.title}”.`),
  ];

  let role: Role = lock === null ? 'follower' : 'writer';
  let handedTo: string | null = null;
  let closed = false;
  let turn: AbortController | null = null;
  let reading = false;
  let readAgain = false;
  let lastKept = row.head.changed;

  const queueOf = (sheet: Sheet, kept: KeptWithSteps): Queue =>
    startQueue({
      backend,
      sheet,
      row: kept,
      delay: options.delay ?? 100,
      onChange: () => emit({ kind: 'state' }),
      onKept(rev) {
        lastKept = Date.now();
        hub.post({ kind: 'kept', sheet: id, rev });
        store.keptOwn();
      },
      onFail(problem) {
        if (problem.code === 'overtaken') void lostLock();
      },
    });
  let queue = queueOf(first.value, row);

  /** Puts on the screen what is kept; cells that say the same stay the same objects. */
  const show = (kept: KeptWithSteps): boolean => {
    const read = readSheet(kept.text);
    if (!read.ok) return false;
    queue = queueOf(sharing(queue.work.sheet, read.value), kept);
    lastKept = kept.head.changed;
    return true;
  };
  const follow = async (): Promise<void> => {
    if (reading) {
      readAgain = true;
      return;
    }
    reading = true;
    do {
      readAgain = false;
      try {
        const kept = await backend.read(id);
        if (closed || role !== 'follower') break;
        if (kept === undefined) queue.fail(storeProblem('gone'));
        else if (kept.head.rev === queue.head.rev && queue.problem === null && !queue.behind) continue;
        else if (show({ ...kept, steps: [] })) emit({ kind: 'followed' });
      } catch (cause) {
        queue.fail(problemOf(cause));
      }
    } while (readAgain);
    reading = false;
  };
  const queueForTurn = () => {
    turn?.abort();
    const mine = new AbortController();
    turn = mine;
    void locks.wait(lockName, mine.signal, lose).then((got) => {
      if (got === null) return;
      if (closed || turn !== mine) return got.release();
      void becomeWriter(got, 'The tab that wrote this sheet has let go of it: you can write here now.');
    });
  };
  const becomeWriter = async (got: Lock, message: string): Promise<boolean> => {
    lock = got;
    handedTo = null;
    try {
      const kept = await claim();
      if (kept === undefined) {
        queue.fail(storeProblem('gone'));
        return false;
      }
      if (!show(kept)) {
        got.release();
        lock = null;
        queue.fail(storeProblem('unreadable'));
        return false;
      }
      role = 'writer';
      // Those who follow show the new state; a former writer without locks learns that it is one no more.
      hub.post({ kind: 'kept', sheet: id, rev: kept.head.rev });
      emit({ kind: 'writer', message });
      return true;
    } catch (cause) {
      queue.fail(problemOf(cause));
      return false;
    }
  };
  /** The lock went to another tab, or the row has another writer. */
  const lostLock = async (): Promise<void> => {
    if (closed) return;
    lock?.release();
    lock = null;
    if (role === 'follower') return queueForTurn();
    emit({ kind: 'hand-in' });
    role = 'follower';
    const { work } = queue;
    await queue.stop();
    let copy: SheetHead | undefined;
    if (queue.behind) {
      try {
        copy = await copyOf(`${work.sheet.title} (changes not kept)`, id);
      } catch (cause) {
        queue.fail(problemOf(cause));
        emit({
          kind: 'follower',
          message: 'Another tab has taken over this sheet. What is on the screen here is not kept: save it as a file.',
        });
        return;
      }
    }
    await follow();
    queueForTurn();
    const kept =
      copy === undefined ? 'Everything you wrote is in it.' : `What this tab had not kept yet is now the sheet “${copy.title}”.`;
    emit({
      kind: 'follower',
      message: `Another tab has taken over this sheet. ${kept}`,
      ...(copy === undefined ? {} : { copy }),
    });
  };
  const copyOf = async (title: string, of?: string): Promise<SheetHead> => {
    const { sheet, history, draft } = queue.work;
    const kept = newRow({ ...sheet, title }, { history, draft, ...(of === undefined ? {} : { copyOf: of }) });
    await backend.create(kept);
    hub.post({ kind: 'shelf' });
    return kept.head;
  };
  const handOver = async (tab: string): Promise<void> => {
    if (role !== 'writer' || handedTo !== null) return;
    handedTo = tab;
    emit({ kind: 'hand-in' });
    while (queue.behind) {
      if (await queue.kept()) continue;
      handedTo = null;
      return;
    }
    role = 'follower';
    await queue.stop();
    hub.post({ kind: 'handed', sheet: id, to: tab });
    emit({ kind: 'follower', message: 'Another tab has taken over this sheet. Everything you wrote is in it.' });
    // The other tab may have closed before it took the lock: then this one goes on.
    setTimeout(() => {
      if (!closed && lock !== null && handedTo === tab && role === 'follower')
        void becomeWriter(lock, 'The other tab did not take the sheet: you can go on writing here.');
    }, 3 * longestAnswer);
  };

  const unsubscribe = hub.subscribe((message) => {
    if (!('sheet' in message) || message.sheet !== id || closed) return;
    if (message.kind === 'ask') void handOver(message.tab);
    if (message.kind === 'kept' && role === 'follower') void follow();
    // Another writer without our leave: only where the browser has no locks.
    else if (message.kind === 'kept' && message.rev > queue.head.rev) void lostLock();
    if (message.kind === 'removed') queue.fail(storeProblem('gone'));
    if (message.kind === 'restored') {
      if (role === 'writer') queue.tryAgain();
      else void follow();
    }
  });
  const leaving = () => {
    if (role !== 'writer' || closed) return;
    emit({ kind: 'hand-in' });
    queue.hurry();
  };
  const hidden = () => {
    if (document.visibilityState === 'hidden') leaving();
  };
  const page = typeof document === 'undefined' ? null : document;
  page?.addEventListener('visibilitychange', hidden);
  page?.addEventListener('freeze', leaving);
  if (page !== null) addEventListener('pagehide', leaving);
  if (role === 'follower') {
    queueForTurn();
    // Something may have been kept between the reading above and the listening.
    void follow();
  } else hub.post({ kind: 'kept', sheet: id, rev: row.head.rev });

  const keeper: Keeper = {
    id,
    get sheet() {
      return queue.work.sheet;
    },
    get history() {
      return queue.work.history;
    },
    get draft() {
      return queue.work.draft;
    },
    get head() {
      return queue.head;
    },
    get role() {
      return role;
    },
    get state(): KeptState {
      if (queue.problem !== null) return { kind: 'trouble', problem: queue.problem };
      if (role === 'follower') return { kind: 'following' };
      return queue.behind ? { kind: 'keeping' } : { kind: 'kept', at: lastKept };
    },
    keep(sheet, history) {
      if (closed || role !== 'writer') return false;
      queue.put({ ...queue.work, sheet, history });
      return true;
    },
    keepDraft(draft) {
      if (closed || role !== 'writer') return false;
      if (draft !== null || queue.work.draft !== null) queue.put({ ...queue.work, draft });
      return true;
    },
    kept: () => queue.kept(),
    tryAgain: () => queue.tryAgain(),
    async takeOver() {
      if (closed || role === 'writer') return role === 'writer';
      turn?.abort();
      turn = null;
      await answered();
      const got = await locks.take(lockName, { steal: true, lost: lose });
      if (got !== null && (await becomeWriter(got, 'You write this sheet now; the other tab follows.'))) return true;
      if (lock === null) queueForTurn();
      return false;
    },
    keepAsNew: (title) => copyOf(title ?? queue.work.sheet.title),
    subscribe(listener) {
      listeners.add(listener);
      return () => listeners.delete(listener);
    },
    async close({ anyway = false } = {}) {
      if (closed) return true;
      let kept = true;
      while (kept && role === 'writer' && queue.behind) kept = await queue.kept();
      if (!kept && !anyway) return false;
      closed = true;
      await queue.stop();
      unsubscribe();
      turn?.abort();
      page?.removeEventListener('visibilitychange', hidden);
      page?.removeEventListener('freeze', leaving);
      if (page !== null) removeEventListener('pagehide', leaving);
      lock?.release();
      listeners.clear();
      return kept;
    },
  };

  /** Ends when the writer has handed the sheet over, or does not answer. */
  const answered = () =>
    new Promise<void>((done) => {
      const end = () => {
        clearTimeout(patience);
        stopListening();
        done();
      };
      const patience = setTimeout(end, longestAnswer);
      const stopListening = hub.subscribe((message) => {
        if (message.kind === 'handed' && message.sheet === id && message.to === me) end();
      });
      hub.post({ kind: 'ask', sheet: id, tab: me });
    });

  return { ok: true, keeper, note: notes.length === 0 ? null : notes.join(' ') };
}

/** What closed tabs left behind for a sheet that another tab had taken over already becomes sheets of their own. */
async function rescue(store: Store, orphans: readonly LeftRow[]): Promise<readonly SheetHead[]> {
  const made: SheetHead[] = [];
  for (const { writer, sheet, text, steps, position, draft } of orphans) {
    const read = readSheet(text);
    if (!read.ok) continue;
    const title = `${read.value.title} (changes not kept)`;
    const history = historyOf(steps, position)?.history ?? emptyHistory;
    const row = newRow({ ...read.value, title }, { history, draft, copyOf: sheet });
    try {
      await store.backend.create(row);
      await store.backend.dropLeft(writer);
      made.push(row.head);
    } catch {
      // It stays where it is until there is room for it.
    }
  }
  return made;
}
