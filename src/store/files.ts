// Sheets as files on the disk: opened, and saved in place where the browser can, else by download.
//
// 1. What is saved is read back and compared before anybody is told that it is saved.
// 2. In place, a file is overwritten only while it holds what was last read from it or written to it here: not one that somebody else has
//    changed, unless the user says so, and never one of a later format.
// 3. Every act says what it did, with the name of the file; trouble is returned in words, the user's "cancel" is none.
// 4. The browser asks the user before a page may write a file, so saving begins in an act of the user.
// Not here: what a file holds (src/sheet), several files at once (shelf.ts, importFiles).

import { fileOpen, fileSave, supported } from 'browser-fs-access';
import { type FileProblem, readSheet, type Sheet, writeSheet } from '../sheet/index.ts';
import { newRow } from './head.ts';
import { problemOf, StoreFault, type StoreProblem, storeProblem } from './problem.ts';
import type { FileRow, SheetHead } from './rows.ts';
import { sheetFileName } from './shelf.ts';
import type { Store } from './store.ts';

export type OpenedFile =
  /** On the shelf now; `again`: it was there already, from this very file and unchanged. */
  | { readonly kind: 'opened'; readonly head: SheetHead; readonly again: boolean; readonly message: string }
  /** A template is no sheet to be filled in: it is for the shelf to take in (importFiles). */
  | { readonly kind: 'template'; readonly name: string; readonly text: string }
  | { readonly kind: 'refused'; readonly name: string; readonly message: string; readonly problems: readonly FileProblem[] }
  | { readonly kind: 'cancelled' }
  | { readonly kind: 'trouble'; readonly problem: StoreProblem };
export type SavedFile =
  | { readonly kind: 'saved'; readonly name: string; readonly message: string }
  | { readonly kind: 'downloaded'; readonly name: string; readonly message: string }
  | { readonly kind: 'cancelled' }
  | { readonly kind: 'trouble'; readonly problem: StoreProblem };

export interface SaveOptions {
  /** Asks for another name even where the sheet has a file. */
  readonly as?: boolean;
  /** Overwrites a file that somebody else has changed. */
  readonly overwrite?: boolean;
}
export interface Files {
  /** True where the browser can save in place. */
  readonly inPlace: boolean;
  /** Asks the user for a sheet file and puts it on the shelf. */
  open(): Promise<OpenedFile>;
  /** A file that was dropped on the page. */
  take(file: DroppedFile): Promise<OpenedFile>;
  save(id: string, sheet: Sheet, options?: SaveOptions): Promise<SavedFile>;
  /** Any text, by a dialog or as a download: an export, a text that cannot be read. */
  saveText(name: string, text: string): Promise<SavedFile>;
  /** The file of a sheet, and whether it holds this very sheet as far as we know; null where it has none. */
  fileOf(id: string, sheet: Sheet): Promise<{ readonly name: string; readonly current: boolean } | null>;
  forget(id: string): Promise<void>;
}
/** A file of the page; `handle` where the browser gave one. */
export interface DroppedFile {
  readonly name: string;
  readonly handle?: FileSystemFileHandle;
  text(): Promise<string>;
}

/** What the type library does not know yet. */
interface Permitted {
  queryPermission?(options: { readonly mode: 'readwrite' }): Promise<PermissionState>;
  requestPermission?(options: { readonly mode: 'readwrite' }): Promise<PermissionState>;
}

const kindOfFile = { description: 'Calculation sheet', extensions: ['.json'], mimeTypes: ['application/json'], id: 'sheets' };
const named = (cause: unknown, name: string) => cause instanceof DOMException && cause.name === name;
const asBlob = (text: string) => new Blob([text], { type: 'application/json' });

export function openFiles(store: Store): Files {
  const { backend } = store;

  const known = async (handle: FileSystemFileHandle): Promise<FileRow | undefined> => {
    for (const row of await backend.files()) if (await row.handle.isSameEntry(handle)) return row;
    return undefined;
  };
  const take = async (file: DroppedFile): Promise<OpenedFile> => {
    try {
      const text = await file.text();
      const read = readSheet(text);
      if (!read.ok) {
        const [first] = read.problems;
        return {
          kind: 'refused',
          name: file.name,
          message: `${file.name}: ${first?.message ?? 'cannot be read'}`,
          problems: read.problems,
        };
      }
      if (read.value.templateInfo !== undefined) return { kind: 'template', name: file.name, text };
      const { handle } = file;
      const row = handle === undefined ? undefined : await known(handle);
      const there = row === undefined || row.text !== text ? undefined : await backend.read(row.id);
      if (there !== undefined)
        return { kind: 'opened', head: there.head, again: true, message: `${file.name} is open from here already.` };
      const fresh = newRow(read.value);
      await backend.create(fresh);
      if (handle !== undefined) await backend.putFile({ id: fresh.head.id, handle, name: handle.name, text });
      store.hub.post({ kind: 'shelf' });
      store.keptOwn();
      return { kind: 'opened', head: fresh.head, again: false, message: `Opened ${file.name}; it is on the shelf now.` };
    } catch (cause) {
      return { kind: 'trouble', problem: named(cause, 'NotFoundError') ? storeProblem('no-file', { cause }) : problemOf(cause) };
    }
  };
  const pick = async (name: string, text: string): Promise<FileSystemFileHandle | null> =>
    fileSave(asBlob(text), { ...kindOfFile, fileName: name }, null, true);

  /** Throws a StoreFault where the file must not or cannot be written. */
  const saveInPlace = async (row: FileRow, text: string, overwrite: boolean): Promise<void> => {
    const { handle } = row;
    const permitted = handle as unknown as Permitted;
    let state = (await permitted.queryPermission?.({ mode: 'readwrite' })) ?? 'granted';
    if (state === 'prompt') state = (await permitted.requestPermission?.({ mode: 'readwrite' })) ?? 'granted';
    if (state === 'denied') throw new StoreFault(storeProblem('refused-file'));
    const there = await (await handle.getFile()).text();
    if (isNewer(there)) throw new StoreFault(storeProblem('newer-file'));
    if (there !== row.text && there !== text && !overwrite) throw new StoreFault(storeProblem('changed-file'));
    const stream = await handle.createWritable();
    await stream.write(asBlob(text));
    await stream.close();
  };
  const isThere = async (handle: FileSystemFileHandle, text: string): Promise<boolean> =>
    (await (await handle.getFile()).text()) === text;

  return {
    inPlace: supported,
    async open() {
      try {
        return await take(await fileOpen(kindOfFile));
      } catch (cause) {
        return named(cause, 'AbortError') ? { kind: 'cancelled' } : { kind: 'trouble', problem: problemOf(cause) };
      }
    },
    take,
    async save(id, sheet, { as = false, overwrite = false } = {}) {
      const text = writeSheet(sheet);
      try {
        const row = as ? undefined : await backend.file(id);
        if (row !== undefined) {
          await saveInPlace(row, text, overwrite);
          if (!(await isThere(row.handle, text))) throw new StoreFault(storeProblem('refused-file'));
          await backend.putFile({ ...row, text });
          return { kind: 'saved', name: row.name, message: `Saved in ${row.name}.` };
        }
        const name = sheetFileName(sheet);
        const handle = await pick(name, text);
        if (handle === null) return downloaded(name);
        if (!(await isThere(handle, text))) throw new StoreFault(storeProblem('refused-file'));
        await backend.putFile({ id, handle, name: handle.name, text });
        return { kind: 'saved', name: handle.name, message: `Saved in ${handle.name}.` };
      } catch (cause) {
        return fileTrouble(cause);
      }
    },
    async saveText(name, text) {
      try {
        const handle = await pick(name, text);
        if (handle === null) return downloaded(name);
        if (!(await isThere(handle, text))) throw new StoreFault(storeProblem('refused-file'));
        return { kind: 'saved', name: handle.name, message: `Saved in ${handle.name}.` };
      } catch (cause) {
        return fileTrouble(cause);
      }
    },
    async fileOf(id, sheet) {
      const row = await backend.file(id);
      return row === undefined ? null : { name: row.name, current: row.text === writeSheet(sheet) };
    },
    forget: (id) => backend.removeFile(id),
  };
}

const downloaded = (name: string): SavedFile => ({
  kind: 'downloaded',
  name,
  message: `Downloaded as ${name}. This browser cannot save in place: each save is a new file in the folder of downloads.`,
});

function fileTrouble(cause: unknown): SavedFile {
  if (named(cause, 'AbortError')) return { kind: 'cancelled' };
  if (cause instanceof StoreFault) return { kind: 'trouble', problem: cause.problem };
  return { kind: 'trouble', problem: storeProblem(named(cause, 'NotFoundError') ? 'no-file' : 'refused-file', { cause }) };
}

function isNewer(text: string): boolean {
  const read = readSheet(text);
  return !read.ok && read.problems.some((problem) => problem.code === 'newer-format');
}
