// What this tab works with: the store, the sheet on its desk and how far it is kept, the screen that is shown, and what is to be told.
//
// 1. The address names the screen (route.ts); the back button of the browser walks through them.
// 2. Every change of the desk goes to the keeper at once, and so does what is being typed; a sheet that another tab writes is shown as it
//    is kept there, and the desk is locked.
// 3. Trouble never takes the sheet off the screen: it is told with its ways out.
// 4. The example is put on the shelf once in a browser; removed, it stays removed.
// Not here: how things are kept (src/store), how they look (page.ts, notices.ts, shelf/).

import type { Sheet } from '../sheet/index.ts';
import {
  type DroppedFile,
  type Files,
  goOffline,
  type Imported,
  type Keeper,
  type KeptState,
  memoryStore,
  type Offline,
  type OpenedFile,
  openFiles,
  openSheet,
  openShelf,
  openStore,
  type SavedFile,
  type SaveOptions,
  type Shelf,
  type Store,
  StoreFault,
  type StoreProblem,
  type WayOut,
} from '../store/index.ts';
import { createDesk, type Desk, type Typed } from './desk.ts';
import { createRoute, type Route } from './route.ts';

export interface Told {
  readonly message: string;
  /** What a file was refused for. */
  readonly problems: readonly string[];
  readonly wayOut: readonly WayOut[];
  readonly trouble: boolean;
}
export type Keeping = KeptState | { readonly kind: 'opening' } | { readonly kind: 'nothing' };

export interface Session {
  readonly route: Route;
  /** Null until the store is open. */
  readonly house: House | null;
  readonly desk: Desk | null;
  /** Id of the sheet on the desk, null where none is. */
  readonly id: string | null;
  readonly keeping: Keeping;
  /** True while another tab writes the sheet. */
  readonly following: boolean;
  readonly offline: Offline;
  /** Trouble that lasts, worst first. */
  readonly troubles: readonly StoreProblem[];
  /** What happened last, until it is dismissed. */
  readonly told: Told | null;
  /** Name of the file of the sheet, where it has one on the disk. */
  readonly fileName: string | null;
  tell(told: Partial<Told> & { readonly message: string }): void;
  dismiss(): void;
  go(route: Route): void;
  takeOver(): Promise<void>;
  openFile(): Promise<void>;
  /** Files dropped on the page: one sheet is opened, several come on the shelf. */
  takeFiles(files: readonly DroppedFile[]): Promise<void>;
  saveFile(options?: SaveOptions): Promise<void>;
  act(way: WayOut): void;
  /** Everything typed is handed in and kept as far as it can be. */
  settle(): Promise<void>;
  /** Takes the sheet off the desk where it lies there, kept first. False where it could not be kept, and stays. */
  putAway(id: string): Promise<boolean>;
  subscribe(listener: () => void): () => void;
}
/** What a kept browser has. */
export interface House {
  readonly store: Store;
  readonly shelf: Shelf;
  readonly files: Files;
}

const exampleId = 'example';
const follower = 'This sheet is written in another tab. Take over writing to change it here.';

export function startSession(example: Sheet): Session {
  const listeners = new Set<() => void>();
  const offline = goOffline();
  let house: House | null = null;
  let desk: Desk | null = null;
  let keeper: Keeper | null = null;
  let leaveDesk: (() => void) | undefined;
  let waiting: StoreProblem | null = null;
  let lasting: StoreProblem | null = null;
  let unopened: (StoreProblem & { readonly text?: string; readonly title?: string }) | null = null;
  let told: Told | null = null;
  let fileName: string | null = null;
  let opening = 0;

  const changed = () => {
    for (const listener of [...listeners]) listener();
  };
  const tell: Session['tell'] = (what) => {
    told = { problems: [], wayOut: [], trouble: false, ...what };
    changed();
  };
  const tellTrouble = (cause: unknown) => {
    if (!(cause instanceof StoreFault)) throw cause;
    tell({ message: cause.problem.message, wayOut: cause.problem.wayOut, trouble: true });
  };

  /** Every change of the desk goes to the keeper; what the keeper shows instead comes to the desk. */
  const mount = (next: Desk, by: Keeper) => {
    leaveDesk?.();
    let sheet = by.sheet;
    let history = by.history;
    let typed: Typed | null = (by.draft as Typed | null) ?? null;
    const hand = () => {
      if (next.kept !== sheet || next.history !== history) {
        sheet = next.kept;
        history = next.history;
        by.keep(sheet, history);
      }
      const now = next.typed;
      if (JSON.stringify(now) !== JSON.stringify(typed)) {
        typed = now;
        by.keepDraft(now);
      }
    };
    const offDesk = next.subscribe(hand);
    const offKeeper = by.subscribe((event) => {
      if (event.kind === 'hand-in') hand();
      if (event.kind === 'followed' || event.kind === 'writer') {
        sheet = by.sheet;
        history = by.history;
        typed = null;
        next.follow(sheet, history);
      }
      if (event.kind === 'writer') {
        next.lock(null);
        if (by.draft !== null) next.resume(by.draft as Typed);
        tell({ message: event.message });
      }
      if (event.kind === 'follower') {
        sheet = by.sheet;
        history = by.history;
        next.lock(follower);
        tell({ message: event.message });
      }
      changed();
    });
    if (by.role === 'follower') next.lock(follower);
    leaveDesk = () => {
      offDesk();
      offKeeper();
    };
  };

  const readFileName = async () => {
    const { id } = keeper ?? {};
    const found = id === undefined || desk === null ? null : await house!.files.fileOf(id, desk.kept).catch(() => null);
    if (keeper?.id !== id) return;
    fileName = found?.name ?? null;
    changed();
  };

  /** Puts a sheet of the shelf on the desk; the one before it is kept first. */
  const openKept = async (id: string, anyway = false): Promise<void> => {
    if (house === null || keeper?.id === id) return changed();
    opening += 1;
    const mine = opening;
    try {
      if (keeper !== null) {
        desk?.finish();
        const elsewhere = anyway || desk?.unsaved === false;
        if (!(await keeper.close({ anyway: elsewhere }))) {
          tell({
            message: 'The other sheet was not opened: changes of this one are neither kept nor in a file yet.',
            wayOut: ['save as a file', 'try again'],
            trouble: true,
          });
          return go({ screen: 'sheet', id: keeper.id }, true);
        }
      }
      if (mine !== opening) return;
      const opened = await openSheet(house.store, id);
      if (mine !== opening) {
        if (opened.ok) await opened.keeper.close({ anyway: true });
        return;
      }
      told = null;
      if (!opened.ok) {
        leaveDesk?.();
        keeper = null;
        desk = null;
        const { problem, text, title } = opened;
        unopened = { ...problem, ...(text === undefined ? {} : { text }), ...(title === undefined ? {} : { title }) };
        return changed();
      }
      unopened = null;
      keeper = opened.keeper;
      const { sheet, history: steps, draft } = keeper;
      // A new desk a sheet: nothing of the one before stays in the page.
      desk = createDesk(sheet, steps);
      mount(desk, keeper);
      if (opened.note !== null) tell({ message: opened.note });
      if (draft !== null && keeper.role === 'writer') desk.resume(draft as Typed);
      void house.store.backend.putMeta('last sheet', id).catch(() => undefined);
      void readFileName();
      changed();
    } catch (cause) {
      tellTrouble(cause);
    }
  };

  const { route, go } = createRoute((now) => {
    if (now.screen === 'sheet' && house !== null) void (now.id === null ? openFirst() : openKept(now.id));
    else desk?.finish();
    changed();
  });

  /** The sheet of last time, or the example on the first; the shelf where neither is. */
  const openFirst = async () => {
    const { shelf, store } = house!;
    const heads = await shelf.list();
    const last = await store.backend.meta('last sheet');
    const there = heads.find((head) => head.id === last) ?? heads[0];
    if (there !== undefined) return go({ screen: 'sheet', id: there.id }, true);
    if (store.backend.kind === 'browser' && (await store.backend.meta('example placed')) !== undefined)
      return go({ screen: 'shelf' }, true);
    await store.backend.putMeta('example placed', true);
    // Two tabs may do this at once: the id is taken then, and the sheet is there.
    await shelf.place(exampleId, example).catch(() => undefined);
    go({ screen: 'sheet', id: exampleId }, true);
  };

  const begin = async (store: Store) => {
    house = { store, shelf: openShelf(store), files: openFiles(store) };
    lasting = store.problem;
    store.onTrouble((problem) => {
      lasting = problem;
      changed();
    });
    house.shelf.subscribe(changed);
    const now = route();
    if (now.screen !== 'sheet') return changed();
    try {
      await (now.id === null ? openFirst() : openKept(now.id));
    } catch (cause) {
      tellTrouble(cause);
    }
  };
  void openStore({
    onWait(problem) {
      waiting = problem;
      changed();
    },
  }).then(async (store) => {
    // Somebody has gone on without it.
    if (house !== null) return store.close();
    await begin(store);
  });

  const takeIn = async (files: readonly Pick<DroppedFile, 'name' | 'text'>[], whole: OpenedFile | null) => {
    try {
      const came = await house!.shelf.importFiles(files);
      // A single file that is no sheet may be a bundle; where it is neither, the sheet's own words say more.
      const nothing = came.sheets.length + came.templates.length + came.same === 0;
      if (whole?.kind === 'refused' && nothing && came.refused.length === 1) return opened(whole);
      tell(toldOf(came));
    } catch (cause) {
      tellTrouble(cause);
    }
  };
  const opened = (file: OpenedFile) => {
    if (file.kind === 'cancelled') return;
    if (file.kind === 'trouble') return tell({ message: file.problem.message, wayOut: file.problem.wayOut, trouble: true });
    if (file.kind === 'template') return void takeIn([{ name: file.name, text: async () => file.text }], null);
    if (file.kind === 'refused')
      return tell({
        message: `${file.name} was not opened; nothing here was changed by it.`,
        problems: file.problems.map((problem) => problem.message),
        trouble: true,
      });
    go({ screen: 'sheet', id: file.head.id });
    void openKept(file.head.id).then(() => tell({ message: file.message }));
  };
  const saved = (file: SavedFile) => {
    if (file.kind === 'cancelled') return;
    if (file.kind === 'trouble') return tell({ message: file.problem.message, wayOut: file.problem.wayOut, trouble: true });
    tell({ message: file.message });
  };
  const saveFile = async (options: SaveOptions = {}) => {
    if (house === null || keeper === null || desk === null) return;
    desk.finish();
    const { kept } = desk;
    const file = await house.files.save(keeper.id, kept, options);
    if ((file.kind === 'saved' || file.kind === 'downloaded') && desk.kept === kept) desk.saved();
    saved(file);
    void readFileName();
  };
  const exportAll = async () => {
    if (house === null) return;
    const { name, text } = await house.shelf.exportAll();
    saved(await house.files.saveText(name, text));
  };

  const session: Session = {
    get route() {
      return route();
    },
    get house() {
      return house;
    },
    get desk() {
      return desk;
    },
    get id() {
      return keeper?.id ?? null;
    },
    get keeping(): Keeping {
      if (keeper !== null) return keeper.state;
      return house === null ? { kind: 'opening' } : { kind: 'nothing' };
    },
    get following() {
      return keeper?.role === 'follower';
    },
    offline,
    get troubles() {
      const state = keeper?.state;
      return [waiting, state?.kind === 'trouble' ? state.problem : null, unopened, lasting].filter((one) => one !== null);
    },
    get told() {
      return told;
    },
    get fileName() {
      return fileName;
    },
    tell,
    dismiss() {
      told = null;
      changed();
    },
    go,
    async takeOver() {
      if (!(await keeper?.takeOver())) changed();
    },
    async openFile() {
      if (house !== null) opened(await house.files.open());
    },
    async takeFiles(files) {
      if (house === null || files.length === 0) return;
      const [only] = files;
      const whole = files.length === 1 && only !== undefined ? await house.files.take(only) : null;
      if (whole !== null && whole.kind !== 'refused') return opened(whole);
      await takeIn(files, whole);
    },
    saveFile,
    act(way) {
      const acts: Readonly<Record<WayOut, () => unknown>> = {
        'save as a file': () => saveFile({ as: true }),
        'try again': () => (keeper?.state.kind === 'trouble' ? keeper.tryAgain() : saveFile()),
        reload: () => location.reload(),
        'close the other tabs': () => undefined,
        'keep as a new sheet': async () => {
          const head = await keeper?.keepAsNew();
          if (head === undefined) return;
          await openKept(head.id, true);
          go({ screen: 'sheet', id: head.id }, true);
        },
        'download the text': async () => {
          if (house !== null && unopened?.text !== undefined)
            saved(await house.files.saveText(`${unopened.title ?? 'sheet'}.json`, unopened.text));
        },
        'export everything': exportAll,
        'save under another name': () => saveFile({ as: true }),
        'overwrite the file': () => saveFile({ overwrite: true }),
        'go on without keeping': () => {
          waiting = null;
          return begin(memoryStore());
        },
      };
      Promise.resolve(acts[way]()).catch(tellTrouble);
    },
    async settle() {
      desk?.finish();
      await keeper?.kept();
    },
    async putAway(id) {
      if (keeper?.id !== id) return true;
      desk?.finish();
      if (!(await keeper.close())) return false;
      leaveDesk?.();
      keeper = null;
      desk = null;
      fileName = null;
      changed();
      return true;
    },
    subscribe(listener) {
      listeners.add(listener);
      return () => listeners.delete(listener);
    },
  };
  offline.subscribe(changed);
  return session;
}

function toldOf({ sheets, templates, same, refused }: Imported): Partial<Told> & { readonly message: string } {
  const count = (n: number, one: string, many: string) => (n === 0 ? [] : [`${n} ${n === 1 ? one : many}`]);
  const came = [...count(sheets.length, 'sheet', 'sheets'), ...count(templates.length, 'template', 'templates')];
  const words = [
    came.length === 0 ? 'Nothing new came in' : `${came.join(' and ')} came on the shelf`,
    ...count(same, 'was here already', 'were here already'),
    ...count(refused.length, 'was refused', 'were refused'),
  ];
  return {
    message: `${words.join('; ')}.`,
    problems: refused.flatMap((one) => [one.message, ...one.problems.slice(1).map((problem) => problem.message)]),
    trouble: refused.length > 0,
  };
}
