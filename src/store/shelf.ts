// The shelf: the sheets and templates that are kept in this browser, and what is done with a whole sheet.
//
// 1. Every act is one transaction and resolves when it has completed; trouble is thrown as a StoreFault, in words.
// 2. Removing is undone by restoring: sheet, steps to undo and its place among files come back as they were.
// 3. Files come in whole or not at all, each by itself; what is refused is returned with its problems.
// 4. A sheet made from another one is a new job: its givens are carried over until they are confirmed (newFromSheet). Only an exact copy
//    is not, and it says in its title what it is.
// Not here: an open sheet (keeper.ts), files on the disk (files.ts), templates that come with the page (src/view).

import {
  type FileProblem,
  type KeepInfo,
  newFromSheet,
  newFromTemplate,
  readSheet,
  type Sheet,
  templateOf,
  writeSheet,
} from '../sheet/index.ts';
import { type BundledSheet, looksLikeBundle, readBundle, writeBundle } from './bundle.ts';
import { type NewRow, newRow } from './head.ts';
import { StoreFault, storeProblem } from './problem.ts';
import type { SheetHead, TemplateRow, TrashRow } from './rows.ts';
import { keptText } from './sheet-text.ts';
import type { Store } from './store.ts';

/** A file or an entry of a bundle that did not come in. */
export interface Refused {
  readonly name: string;
  readonly message: string;
  readonly problems: readonly FileProblem[];
}
export interface Imported {
  readonly sheets: readonly SheetHead[];
  readonly templates: readonly TemplateRow[];
  /** How many were here already, letter for letter. */
  readonly same: number;
  readonly refused: readonly Refused[];
}

export interface Shelf {
  /** Newest first. `search`: every word must occur in title, number, project, client, template or status. */
  list(search?: string): Promise<readonly SheetHead[]>;
  /** Puts a sheet on the shelf as it is. */
  add(sheet: Sheet): Promise<SheetHead>;
  /** Puts down a sheet that comes with the page: nothing of the user's own is kept by that. Throws where the id is taken. */
  place(id: string, sheet: Sheet): Promise<SheetHead>;
  newFromTemplate(template: Sheet, fingerprint?: string): Promise<SheetHead>;
  /** For a similar job: givens carried over, what belongs to the old job left behind. */
  newFromSheet(id: string, fingerprint?: string): Promise<SheetHead>;
  /** The same sheet once more, status back to 'in preparation'. */
  copy(id: string): Promise<SheetHead>;
  remove(id: string): Promise<TrashRow | undefined>;
  restore(id: string): Promise<SheetHead | undefined>;
  trash(): Promise<readonly TrashRow[]>;
  emptyTrash(): Promise<number>;
  /** The text of a sheet as a file: canonical, or as it is kept where it cannot be read. */
  textOf(id: string): Promise<{ readonly name: string; readonly text: string }>;
  templates(): Promise<readonly TemplateRow[]>;
  /** An own template from a sheet; the same id again is its next version. */
  keepTemplate(sheet: Sheet, info: KeepInfo): Promise<TemplateRow>;
  removeTemplate(id: string): Promise<TemplateRow | undefined>;
  putTemplate(row: TemplateRow): Promise<void>;
  /** Sheet files and bundles, told apart by their content. */
  importFiles(files: readonly { readonly name: string; text(): Promise<string> }[]): Promise<Imported>;
  exportAll(): Promise<{ readonly name: string; readonly text: string }>;
  /** Told when the shelf changed, here or in another tab. */
  subscribe(listener: () => void): () => void;
}

export function openShelf(store: Store): Shelf {
  const { backend, hub } = store;
  const listeners = new Set<() => void>();
  const changed = () => {
    for (const listener of [...listeners]) listener();
  };
  const tell = () => {
    hub.post({ kind: 'shelf' });
    changed();
  };
  hub.subscribe(({ kind }) => {
    if (kind !== 'ask' && kind !== 'handed') changed();
  });
  const put = async (sheet: Sheet, options: NewRow = {}): Promise<SheetHead> => {
    const row = newRow(sheet, options);
    await backend.create(row);
    store.keptOwn();
    tell();
    return row.head;
  };
  const sheetOf = async (id: string): Promise<Sheet> => {
    const kept = await backend.read(id);
    if (kept === undefined) throw new StoreFault(storeProblem('not-here'));
    const read = readSheet(kept.text);
    if (read.ok) return read.value;
    throw new StoreFault(storeProblem('unreadable', { detail: read.problems[0]?.message ?? '' }));
  };
  const putTemplate = async (row: TemplateRow) => {
    await backend.putTemplate(row);
    tell();
  };
  const templateRow = (sheet: Sheet, at: number): TemplateRow => {
    const info = sheet.templateInfo;
    if (info === undefined) throw new RangeError('the sheet is no template');
    return { id: info.id, version: info.version, title: sheet.title, job: info.job, changed: at, text: keptText(sheet) };
  };

  /** Takes in what a bundle holds; nothing that is here is changed. */
  const importBundle = async (name: string, text: string, into: Taken): Promise<void> => {
    const read = readBundle(text);
    if (!read.ok) return void into.refused.push({ name, message: `${name}: ${read.message}`, problems: [] });
    const inTrash = new Set((await backend.trash()).map((row) => row.id));
    for (const one of read.value.sheets) {
      const there = await backend.read(one.id);
      if (there !== undefined && fileText(there.text) === fileText(one.text)) {
        into.same += 1;
        continue;
      }
      const sheet = readSheet(one.text);
      if (!sheet.ok) {
        into.refused.push(refusal(`${name}, sheet ${one.id}`, sheet.problems));
        continue;
      }
      const free = there === undefined && !inTrash.has(one.id);
      const { made, changed: at } = one;
      into.sheets.push(await put(sheet.value, { made, changed: at, ...(free ? { id: one.id } : {}) }));
    }
    const own = new Map((await backend.templates()).map((row) => [row.id, row]));
    for (const one of read.value.templates) {
      const there = own.get(one.id);
      if (there !== undefined && fileText(there.text) === fileText(one.text)) {
        into.same += 1;
        continue;
      }
      const sheet = readSheet(one.text);
      if (!sheet.ok || sheet.value.templateInfo === undefined) {
        const problems = sheet.ok ? [] : sheet.problems;
        into.refused.push(refusal(`${name}, template ${one.id}`, problems, 'it is no template'));
        continue;
      }
      into.templates.push(await takeTemplate(sheet.value, one.changed, own));
    }
  };
  /** An own template beside those that are here: another text under the same id gets an id of its own. */
  const takeTemplate = async (sheet: Sheet, at: number, own: Map<string, TemplateRow>): Promise<TemplateRow> => {
    const info = sheet.templateInfo!;
    let { id } = info;
    for (let count = 2; own.has(id); count += 1) id = `${info.id.slice(0, 58)}-${count}`;
    const row = templateRow(id === info.id ? sheet : { ...sheet, templateInfo: { ...info, id } }, at);
    own.set(id, row);
    await putTemplate(row);
    return row;
  };

  return {
    async list(search = '') {
      const words = search.toLocaleLowerCase().split(/\s+/u).filter(Boolean);
      const found = (await backend.heads()).filter((head) => {
        const { title, documentNumber, revision, project, client, template, status } = head;
        const text = [title, documentNumber, revision, project, client, template, status].join(' ').toLocaleLowerCase();
        return words.every((word) => text.includes(word));
      });
      return found.sort((one, other) => other.changed - one.changed || (one.id < other.id ? -1 : 1));
    },
    add: (sheet) => put(sheet),
    async place(id, sheet) {
      const row = newRow(sheet, { id });
      await backend.create(row);
      tell();
      return row.head;
    },
    newFromTemplate: (template, fingerprint) => put(newFromTemplate(template, fingerprint)),
    newFromSheet: async (id, fingerprint) => put(newFromSheet(await sheetOf(id), fingerprint)),
    async copy(id) {
      const sheet = await sheetOf(id);
      return put({ ...sheet, title: `${sheet.title} (copy)`, status: 'in preparation' });
    },
    async remove(id) {
      const row = await backend.remove(id, Date.now());
      hub.post({ kind: 'removed', sheet: id });
      changed();
      return row;
    },
    async restore(id) {
      const head = await backend.restore(id);
      hub.post({ kind: 'restored', sheet: id });
      changed();
      return head;
    },
    trash: async () => [...(await backend.trash())].sort((one, other) => other.deleted - one.deleted),
    async emptyTrash() {
      const count = await backend.purge(Number.POSITIVE_INFINITY);
      tell();
      return count;
    },
    async textOf(id) {
      const kept = await backend.read(id);
      if (kept === undefined) throw new StoreFault(storeProblem('not-here'));
      const read = readSheet(kept.text);
      const name = read.ok ? sheetFileName(read.value) : `${fileWords(kept.head.title)} (cannot be read).json`;
      return { name, text: fileText(kept.text) };
    },
    templates: async () => [...(await backend.templates())].sort((one, other) => one.title.localeCompare(other.title)),
    async keepTemplate(sheet, info) {
      const before = (await backend.templates()).find((row) => row.id === info.id);
      const row = templateRow(templateOf(sheet, { ...info, version: (before?.version ?? 0) + 1 }), Date.now());
      await putTemplate(row);
      return row;
    },
    async removeTemplate(id) {
      const row = await backend.removeTemplate(id);
      tell();
      return row;
    },
    putTemplate,
    async importFiles(files) {
      const into: Taken = { sheets: [], templates: [], same: 0, refused: [] };
      for (const file of files) {
        const text = await file.text();
        if (looksLikeBundle(text)) {
          await importBundle(file.name, text, into);
          continue;
        }
        const read = readSheet(text);
        if (!read.ok) into.refused.push(refusal(file.name, read.problems));
        else if (read.value.templateInfo === undefined) into.sheets.push(await put(read.value));
        else {
          const own = new Map((await backend.templates()).map((row) => [row.id, row]));
          if ([...own.values()].some((row) => fileText(row.text) === writeSheet(read.value))) into.same += 1;
          else into.templates.push(await takeTemplate(read.value, Date.now(), own));
        }
      }
      return into;
    },
    async exportAll() {
      const sheets: BundledSheet[] = [];
      for (const { id, made } of await backend.heads()) {
        const kept = await backend.read(id);
        if (kept !== undefined) sheets.push({ id, made, changed: kept.head.changed, text: fileText(kept.text) });
      }
      const templates = (await backend.templates()).map((row) => ({ ...row, text: fileText(row.text) }));
      const day = new Date().toISOString().slice(0, 10);
      return { name: `Tightside, all sheets, ${day}.json`, text: writeBundle(sheets, templates) };
    },
    subscribe(listener) {
      listeners.add(listener);
      return () => listeners.delete(listener);
    },
  };
}

/** A kept text as it stands in a file; one that cannot be read stays as it is. */
function fileText(text: string): string {
  const read = readSheet(text);
  return read.ok ? writeSheet(read.value) : text;
}

interface Taken {
  readonly sheets: SheetHead[];
  readonly templates: TemplateRow[];
  same: number;
  readonly refused: Refused[];
}

function refusal(name: string, problems: readonly FileProblem[], otherwise = 'it cannot be read'): Refused {
  const [first] = problems;
  const more = problems.length > 1 ? ` (and ${problems.length - 1} more)` : '';
  return { name, message: `${name}: ${first?.message ?? otherwise}${more}`, problems };
}

const fileWords = (text: string): string => {
  // The signs that some file system refuses, and controls.
  const words = text
    .replace(/[\p{Cc}\p{Cf}/\\:*?"<>|]+/gu, ' ')
    .replace(/\s+/gu, ' ')
    .trim()
    .replace(/[. ]+$/u, '');
  return [...words].slice(0, 100).join('') || 'sheet';
};

/** `CS-014 Mixer drive.sheet.json` */
export function sheetFileName(sheet: Sheet): string {
  const number = sheet.titleBlock?.documentNumber ?? '';
  return `${fileWords(`${number} ${sheet.title}`)}.sheet.json`;
}
