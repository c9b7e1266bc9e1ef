// The rows in the memory of the tab, for browsers that keep nothing for the page: the same calls, gone when the tab closes.

import { type Backend, firstKept, type KeptWithSteps } from './backend.ts';
import { StoreFault, storeProblem } from './problem.ts';
import type { FileRow, SheetHead, StepRow, TemplateRow, TextRow, TrashRow } from './rows.ts';

export function memoryBackend(): Backend {
  const sheets = new Map<string, SheetHead>();
  const texts = new Map<string, TextRow>();
  const steps = new Map<string, StepRow[]>();
  const trash = new Map<string, TrashRow>();
  const templates = new Map<string, TemplateRow>();
  const files = new Map<string, FileRow>();
  const metas = new Map<string, unknown>();

  const kept = (id: string): KeptWithSteps | undefined => {
    const head = sheets.get(id);
    const text = texts.get(id);
    if (head === undefined || text === undefined) return undefined;
    return { head, text: text.text, position: text.position, draft: text.draft ?? null, steps: steps.get(id) ?? [] };
  };
  const putText = (id: string, { text, position, draft }: Pick<KeptWithSteps, 'text' | 'position' | 'draft'>) =>
    texts.set(id, { id, text, position, ...(draft === null ? {} : { draft }) });

  return {
    kind: 'memory',
    heads: async () => [...sheets.values()],
    read: async (id) => kept(id),
    async claim(id, writer, pruning) {
      const head = sheets.get(id);
      if (head === undefined) return undefined;
      const line = steps.get(id) ?? [];
      const first = firstKept(line, texts.get(id)?.position ?? 0, pruning);
      steps.set(
        id,
        line.filter((row) => row.n >= first),
      );
      sheets.set(id, { ...head, writer, rev: head.rev + 1 });
      return { ...kept(id)!, orphans: [] };
    },
    // The memory goes with the page: nothing can be left in it.
    async leave() {},
    async dropLeft() {},
    async create(row) {
      if (sheets.has(row.head.id) || trash.has(row.head.id)) throw new RangeError(`there is a sheet ${row.head.id} already`);
      sheets.set(row.head.id, row.head);
      putText(row.head.id, row);
      steps.set(row.head.id, [...row.steps]);
    },
    async write(change) {
      const { id, writer } = change.head;
      const there = sheets.get(id);
      if (there === undefined) throw new StoreFault(storeProblem('gone'));
      if (there.writer !== writer) throw new StoreFault(storeProblem('overtaken'));
      if (change.expected !== null && there.rev !== change.expected) throw new StoreFault(storeProblem('not-kept'));
      const { dropFrom } = change;
      const line = steps.get(id) ?? [];
      sheets.set(id, { ...change.head, rev: there.rev + 1 });
      putText(id, change);
      steps.set(id, [...(dropFrom === null ? line : line.filter((row) => row.n < dropFrom)), ...change.put]);
      return there.rev + 1;
    },
    async setAside(id, reason) {
      const head = sheets.get(id);
      if (head !== undefined) sheets.set(id, { ...head, unreadable: reason });
    },
    async remove(id, at) {
      const head = sheets.get(id);
      if (head === undefined) return undefined;
      const row = { id, head, deleted: at };
      sheets.delete(id);
      trash.set(id, row);
      return row;
    },
    async restore(id) {
      const row = trash.get(id);
      if (row === undefined) return undefined;
      trash.delete(id);
      const head = { ...row.head, rev: row.head.rev + 1 };
      sheets.set(id, head);
      return head;
    },
    trash: async () => [...trash.values()],
    async purge(before) {
      const old = [...trash.values()].filter((row) => row.deleted < before);
      for (const { id } of old) for (const map of [trash, texts, steps, files]) map.delete(id);
      return old.length;
    },
    templates: async () => [...templates.values()],
    async putTemplate(row) {
      templates.set(row.id, row);
    },
    async removeTemplate(id) {
      const row = templates.get(id);
      templates.delete(id);
      return row;
    },
    file: async (id) => files.get(id),
    files: async () => [...files.values()],
    async putFile(row) {
      files.set(row.id, row);
    },
    async removeFile(id) {
      files.delete(id);
    },
    meta: async (key) => metas.get(key),
    async putMeta(key, value) {
      metas.set(key, value);
    },
    close() {},
  };
}
