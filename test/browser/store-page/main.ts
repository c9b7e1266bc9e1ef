// The page of the store's tests: the store by itself, with its calls at hand.

import { applyEdit, type GivenCell, perform, redo, type Sheet, undo, writeSheet } from '../../../src/sheet/index.ts';
import {
  goOffline,
  type Keeper,
  type KeeperOptions,
  memoryStore,
  type Offline,
  openFiles,
  openSheet,
  openShelf,
  openStore,
  type Shelf,
  type Store,
  type StoreOptions,
} from '../../../src/store/index.ts';

interface Now {
  store: Store;
  shelf: Shelf;
  keeper: Keeper;
  events: string[];
  offline: Offline;
}
const now = {} as Now;

const given = (name: string, value: string): GivenCell => ({ id: `g-${name}`, kind: 'given', name, value });
const sheet = (title: string, ...cells: Sheet['cells']): Sheet => ({ format: 'tightside-sheet/1', title, cells });

/** Opens the store and a sheet in it: the one with this id, or a new one. Returns the id. */
async function begin(id?: string, options: KeeperOptions & StoreOptions = {}): Promise<string> {
  now.store ??= await openStore(options);
  now.shelf ??= openShelf(now.store);
  const which = id ?? (await now.shelf.add(sheet('Drive', given('F_0', '0 N'), given('d', '200 mm')))).id;
  const opened = await openSheet(now.store, which, options);
  if (!opened.ok) throw new Error(opened.problem.code);
  now.keeper = opened.keeper;
  now.events = [];
  opened.keeper.subscribe((event) => {
    if (event.kind !== 'state') now.events.push('message' in event ? `${event.kind}: ${event.message}` : event.kind);
  });
  return which;
}

function set(name: string, value: string): boolean {
  const { keeper } = now;
  const done = perform(keeper.sheet, keeper.history, { kind: 'set-cell', cell: given(name, value) }, { time: Date.now() });
  return keeper.keep(done.sheet, done.history);
}

const value = (name: string, of: Sheet = now.keeper.sheet): string | null => {
  const cell = of.cells.find((one) => one.id === `g-${name}`);
  return cell?.kind === 'given' ? cell.value : null;
};

/** Takes back everything; the values of `name` on the way, the present one first. */
function undone(name: string): (string | null)[] {
  let { sheet: here, history } = now.keeper;
  const found = [value(name, here)];
  for (let back = undo(here, history); back !== undefined; back = undo(here, history)) {
    here = back.sheet;
    history = back.history;
    found.push(value(name, here));
  }
  return found;
}

declare const __MARK__: string;

const all = {
  /** Which build this is. */
  mark: __MARK__,
  now,
  begin,
  set,
  value,
  undone,
  sheet,
  given,
  applyEdit,
  writeSheet,
  undo,
  redo,
  openStore,
  memoryStore,
  openShelf,
  openSheet,
  openFiles,
  goOffline,
};
export type Kit = typeof all;
declare global {
  var kit: Kit;
}
globalThis.kit = all;
