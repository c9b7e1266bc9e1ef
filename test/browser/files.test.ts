// Files on the disk and the page without a network, in a real browser. The dialogs of the system are stood in for by files of the
// browser's own file system: real handles, real writes; downloads are real.

import { mkdtempSync, readFileSync, rmSync } from 'node:fs';
import { tmpdir } from 'node:os';
import { join } from 'node:path';
import { type Browser, type BrowserContext, chromium, type Page } from 'playwright-core';
import { afterAll, afterEach, beforeAll, beforeEach, describe, expect, inject, it } from 'vitest';
// @ts-expect-error plain JavaScript, shared with `npm start`
import { serve } from '../../src/cli/serve.mjs';
import { readSheet } from '../../src/sheet/index.ts';
import { buildStorePage, type StorePage, serveStorePage } from './store-kit.ts';
import type {} from './store-page/main.ts';

let browser: Browser;
let served: StorePage;
let context: BrowserContext;
let faults: string[];

beforeAll(async () => {
  [browser, served] = await Promise.all([chromium.connect(inject('endpoint')), serveStorePage()]);
});
afterAll(async () => {
  await browser.close();
  await served.close();
});
beforeEach(async () => {
  context = await browser.newContext();
  faults = [];
});
afterEach(async () => {
  await context.close();
  expect(faults).toEqual([]);
});

const ready = (page: Page) => page.waitForFunction(() => 'kit' in globalThis);
async function tab(before?: () => void, url = served.url): Promise<Page> {
  const page = await context.newPage();
  page.on('pageerror', (fault) => faults.push(fault.message));
  if (before !== undefined) await page.addInitScript(before);
  await page.goto(url);
  await ready(page);
  return page;
}

/** Puts files of the browser's own file system in the place of the dialogs. */
const dialogs = () => {
  const global = globalThis as unknown as Record<string, unknown>;
  global['picked'] = 'a.sheet.json';
  const handle = async (create: boolean) => {
    if (global['picked'] === null) throw new DOMException('the user does not want to', 'AbortError');
    return (await navigator.storage.getDirectory()).getFileHandle(global['picked'] as string, { create });
  };
  global['showSaveFilePicker'] = () => handle(true);
  global['showOpenFilePicker'] = async () => [await handle(false)];
};
const pick = (page: Page, name: string | null) =>
  page.evaluate((which) => {
    (globalThis as unknown as Record<string, unknown>)['picked'] = which;
  }, name);
const onDisk = (page: Page, name: string) =>
  page.evaluate(
    async (which) => (await (await (await navigator.storage.getDirectory()).getFileHandle(which)).getFile()).text(),
    name,
  );
const putOnDisk = (page: Page, name: string, text: string) =>
  page.evaluate(
    async ([which, what]) => {
      const handle = await (await navigator.storage.getDirectory()).getFileHandle(which, { create: true });
      const stream = await handle.createWritable();
      await stream.write(what);
      await stream.close();
    },
    [name, text] as const,
  );
const save = (page: Page, options: { as?: boolean; overwrite?: boolean } = {}) =>
  page.evaluate(async (how) => {
    const { kit } = globalThis;
    const done = await kit.openFiles(kit.now.store).save(kit.now.keeper.id, kit.now.keeper.sheet, how);
    return done.kind === 'trouble' ? { kind: done.problem.code, message: done.problem.message } : { message: '', ...done };
  }, options);
const openFile = (page: Page) =>
  page.evaluate(async () => {
    const { kit } = globalThis;
    const done = await kit.openFiles(kit.now.store).open();
    if (done.kind === 'opened') return { kind: done.kind, id: done.head.id, again: done.again, message: done.message };
    return { kind: done.kind, id: '', again: false, message: 'message' in done ? done.message : '' };
  });
const begin = (page: Page, id?: string) => page.evaluate((which) => globalThis.kit.begin(which ?? undefined), id ?? null);
const set = (page: Page, value: string) => page.evaluate((v) => globalThis.kit.set('F_0', v), value);

describe('a file', () => {
  it('is saved in place again and again, over reloads, and says what it did', async () => {
    const page = await tab(dialogs);
    const id = await begin(page);
    expect(await save(page)).toEqual({ kind: 'saved', name: 'a.sheet.json', message: 'Saved in a.sheet.json.' });
    await set(page, '5 N');
    await page.evaluate(() => globalThis.kit.now.keeper.close());
    await page.reload();
    await ready(page);
    // A dialog now would be one too many.
    await pick(page, null);
    await begin(page, id);
    const before = await page.evaluate(() => {
      const { kit } = globalThis;
      return kit.openFiles(kit.now.store).fileOf(kit.now.keeper.id, kit.now.keeper.sheet);
    });
    expect(before).toEqual({ name: 'a.sheet.json', current: false });
    expect((await save(page)).kind).toBe('saved');
    const read = readSheet(await onDisk(page, 'a.sheet.json'));
    expect(read.ok && read.value.cells[0]).toMatchObject({ name: 'F_0', value: '5 N' });
    expect(await save(page, { as: true })).toMatchObject({ kind: 'cancelled' });
  });

  it('that somebody else changed is not overwritten, unless the user says so', async () => {
    const page = await tab(dialogs);
    await begin(page);
    await save(page);
    const theirs = (await onDisk(page, 'a.sheet.json')).replace('"0 N"', '"77 N"');
    await putOnDisk(page, 'a.sheet.json', theirs);
    await set(page, '5 N');
    const refused = await save(page);
    expect(refused.kind).toBe('changed-file');
    expect(refused.message).toContain('has been changed by somebody else since it was last opened or saved here');
    expect(await onDisk(page, 'a.sheet.json')).toBe(theirs);
    expect((await save(page, { overwrite: true })).kind).toBe('saved');
    expect(await onDisk(page, 'a.sheet.json')).toContain('"5 N"');
  });

  it('of a later format is never overwritten, not even knowingly', async () => {
    const page = await tab(dialogs);
    await begin(page);
    await save(page);
    const later = '{"format":"tightside-sheet/2","title":"later","cells":[]}';
    await putOnDisk(page, 'a.sheet.json', later);
    for (const overwrite of [false, true]) {
      const refused = await save(page, { overwrite });
      expect(refused.kind).toBe('newer-file');
      expect(refused.message).toContain('written by a later version of this page, so it was not overwritten');
    }
    expect(await onDisk(page, 'a.sheet.json')).toBe(later);
  });

  it('that is gone or may not be written is told', async () => {
    const page = await tab(dialogs);
    await begin(page);
    await save(page);
    await page.evaluate(() => {
      FileSystemFileHandle.prototype.createWritable = async () => {
        throw new DOMException('no', 'NotAllowedError');
      };
    });
    expect(await save(page)).toMatchObject({
      kind: 'refused-file',
      message: expect.stringContaining('was not allowed to write the file'),
    });
    await page.evaluate(async () => (await navigator.storage.getDirectory()).removeEntry('a.sheet.json'));
    expect(await save(page)).toMatchObject({ kind: 'no-file', message: expect.stringContaining('no longer where it was') });
  });

  it('is opened onto the shelf once; the same file again is the same sheet, a bad one is refused with its reason', async () => {
    const page = await tab(dialogs);
    await begin(page);
    await save(page);
    await putOnDisk(page, 'b.sheet.json', await onDisk(page, 'a.sheet.json'));
    await putOnDisk(page, 'bad.json', '{"format":');
    await pick(page, 'b.sheet.json');
    const first = await openFile(page);
    expect(first).toMatchObject({ kind: 'opened', again: false, message: 'Opened b.sheet.json; it is on the shelf now.' });
    expect(await openFile(page)).toMatchObject({ kind: 'opened', again: true, id: first.id });
    await begin(page, first.id);
    await set(page, '9 N');
    expect(await save(page)).toMatchObject({ kind: 'saved', name: 'b.sheet.json' });
    expect(await onDisk(page, 'b.sheet.json')).toContain('"9 N"');
    expect(await onDisk(page, 'a.sheet.json')).toContain('"0 N"');
    await pick(page, 'bad.json');
    expect((await openFile(page)).message).toContain('bad.json: line 1');
    await pick(page, null);
    expect((await openFile(page)).kind).toBe('cancelled');
  });

  it('is downloaded where the browser cannot save in place, and the words say so', async () => {
    const page = await tab(() => {
      for (const name of ['showSaveFilePicker', 'showOpenFilePicker']) Reflect.deleteProperty(globalThis, name);
    });
    await begin(page);
    const [download, done] = await Promise.all([page.waitForEvent('download'), save(page)]);
    expect(done).toEqual({
      kind: 'downloaded',
      name: 'Drive.sheet.json',
      message:
        'Downloaded as Drive.sheet.json. This browser cannot save in place: each save is a new file in the folder of downloads.',
    });
    expect(download.suggestedFilename()).toBe('Drive.sheet.json');
    const copy = join(tmpdir(), `download-${process.pid}.json`);
    await download.saveAs(copy);
    const text = readFileSync(copy, 'utf8');
    rmSync(copy);
    expect(text).toBe(await page.evaluate(() => globalThis.kit.writeSheet(globalThis.kit.now.keeper.sheet)));
    expect(readSheet(text).ok).toBe(true);
  });
});

describe('without a network', () => {
  it('the page opens after one load, works, and changes to a later version only when told to', async () => {
    const folder = mkdtempSync(join(tmpdir(), 'store-offline-'));
    await buildStorePage(folder, 'first');
    let server = (await serve(folder)) as { url: string; port: number; close(): Promise<void> };
    const { url, port } = server;
    const offline = (page: Page) =>
      page.evaluate(() => {
        const { kit } = globalThis;
        kit.now.offline ??= kit.goOffline();
        return [kit.now.offline.state, kit.now.offline.laterVersion] as const;
      });
    const mark = (page: Page) => page.evaluate(() => globalThis.kit.mark);
    const page = await tab(undefined, url);
    await expect.poll(() => offline(page)).toEqual(['ready', false]);
    expect(await mark(page)).toBe('first');

    await server.close();
    await page.reload();
    await ready(page);
    const id = await begin(page);
    await set(page, '5 N');
    expect(await page.evaluate(() => globalThis.kit.now.keeper.kept())).toBe(true);
    const cold = await tab(undefined, url);
    expect(await mark(cold)).toBe('first');

    await buildStorePage(folder, 'second');
    server = await serve(folder, { port });
    await page.reload();
    await ready(page);
    await expect.poll(() => offline(page), { timeout: 10_000 }).toEqual(['ready', true]);
    // Neither of the open pages is replaced, not by waiting and not by loading anew.
    await page.reload();
    await ready(page);
    expect(await mark(page)).toBe('first');
    await expect.poll(() => offline(page)).toEqual(['ready', true]);
    await begin(page, id);
    const loaded = page.waitForEvent('load');
    await page.evaluate(() => globalThis.kit.now.offline.change());
    await loaded;
    await ready(page);
    expect(await mark(page)).toBe('second');
    expect(await mark(cold)).toBe('first');
    const names = () => page.evaluate(async () => (await caches.keys()).length);
    expect(await names()).toBe(2);
    await cold.close();
    await server.close();
    await page.reload();
    await ready(page);
    expect(await mark(page)).toBe('second');
    await expect.poll(names).toBe(1);
    await begin(page, id);
    expect(await page.evaluate(() => globalThis.kit.value('F_0'))).toBe('5 N');
    rmSync(folder, { recursive: true, force: true });
  });
});
