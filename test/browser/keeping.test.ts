// The built page keeps what is written on it: over reloads, between tabs, without a network, and in trouble, told in words with a way out.

import { cpSync, mkdtempSync, readFileSync, rmSync, writeFileSync } from 'node:fs';
import { tmpdir } from 'node:os';
import { join } from 'node:path';
import type { Browser, BrowserContext, Page } from 'playwright-core';
import { afterAll, afterEach, beforeAll, beforeEach, describe, expect, inject, it } from 'vitest';
// @ts-expect-error plain JavaScript, shared with `npm start`
import { serve } from '../../src/cli/serve.mjs';
import { connect, example, idOf } from './open.ts';

let browser: Browser;
let context: BrowserContext;
let faults: string[];

beforeAll(async () => {
  browser = await connect();
});
afterAll(() => browser.close());
beforeEach(async () => {
  context = await browser.newContext({ viewport: { width: 1440, height: 930 }, reducedMotion: 'reduce' });
  faults = [];
});
afterEach(async () => {
  await context.close();
  expect(faults, 'faults').toEqual([]);
});

const stands = (page: Page) => page.waitForSelector('ts-row .result', { state: 'attached' });
async function tab({ url = inject('url'), before }: { url?: string; before?: () => void } = {}): Promise<Page> {
  const page = await context.newPage();
  page.on('pageerror', (fault) => faults.push(fault.message));
  await page.addInitScript(() => {
    Reflect.deleteProperty(globalThis, 'showSaveFilePicker');
    Reflect.deleteProperty(globalThis, 'showOpenFilePicker');
  });
  if (before !== undefined) await page.addInitScript(before);
  await page.goto(url);
  await stands(page);
  return page;
}
const row = (page: Page, name: string) => page.locator(`ts-row[data-cell="${idOf(name)}"]`);
const value = async (page: Page, name: string) =>
  ((await row(page, name).locator('.result .value').first().textContent()) ?? '').trim().replace(/\s/gu, ' ');
async function type(page: Page, name: string, text: string) {
  await row(page, name).locator('.result').first().click();
  await page.locator('.typing').fill(text);
  await page.keyboard.press('Enter');
}
const keptWord = (page: Page) => page.locator('.bar .kept').textContent();
const kept = (page: Page) => expect.poll(() => keptWord(page)).toMatch(/^kept \d\d:\d\d$/u);
const notice = (page: Page) => page.locator('.notices').textContent();
const act = (page: Page, name: string) => page.locator('.notices').getByRole('button', { name }).click();
/** The text of the file that the way out gives. */
async function saved(page: Page): Promise<string> {
  const [download] = await Promise.all([page.waitForEvent('download'), act(page, 'Save as a file')]);
  let text = '';
  for await (const part of await download.createReadStream()) text += String(part);
  return text;
}
const undo = (page: Page) => page.getByRole('button', { name: 'Undo' });

describe('what is written', () => {
  it('is there after a reload, with what can be undone and done again', async () => {
    const page = await tab();
    const first = await value(page, 'F_0');
    await type(page, 'F_0', '1400 N');
    await type(page, 'F_0', '1500 N');
    await undo(page).click();
    await kept(page);
    await page.reload();
    await stands(page);
    expect(await value(page, 'F_0')).toBe('1 400 N');
    await page.getByRole('button', { name: 'Redo' }).click();
    expect(await value(page, 'F_0')).toBe('1 500 N');
    await undo(page).click();
    await undo(page).click();
    expect(await value(page, 'F_0')).toBe(first);
    expect(await undo(page).isDisabled()).toBe(true);
  });

  it('is kept by leaving the page in the very moment', async () => {
    const page = await tab();
    await type(page, 'F_0', '1400 N');
    await page.goto('about:blank');
    const again = await tab();
    expect(await value(again, 'F_0')).toBe('1 400 N');
  });

  it('and not finished stands in its field again: a value, a formula that cannot be read, a new line', async () => {
    const page = await tab();
    await row(page, 'F_0').locator('.result').first().click();
    await page.locator('.typing').fill('14');
    await kept(page);
    await page.reload();
    await stands(page);
    await expect.poll(() => row(page, 'F_0').locator('.typing').inputValue()).toBe('14');
    await page.keyboard.press('Escape');
    expect(await value(page, 'F_0')).not.toContain('14 ');

    await row(page, 'F_u').locator('.formula').click();
    const editor = page.locator('ts-formula-editor .cm-content');
    await editor.waitFor();
    await page.keyboard.press('Control+a');
    await page.keyboard.type('P/(v +');
    await kept(page);
    await page.reload();
    await stands(page);
    await expect.poll(() => editor.textContent()).toBe('P/(v +');
    await page.keyboard.press('Escape');
    expect(await page.locator('ts-formula-editor').count()).toBe(0);

    await page.getByRole('button', { name: 'New line in Duty' }).click();
    await page.locator('ts-entry-line .cm-content').waitFor();
    await page.keyboard.type('F_x = 12');
    await kept(page);
    await page.reload();
    await stands(page);
    await expect.poll(() => page.locator('ts-entry-line .cm-content').textContent()).toBe('F_x = 12');
  });
});

describe('a second tab', () => {
  it('follows what the first keeps, refuses to write, takes over with everything that can be undone', async () => {
    const one = await tab();
    await kept(one);
    const two = await tab();
    await expect.poll(() => keptWord(two)).toBe('read only');
    expect(await notice(two)).toContain('Another tab writes this sheet');
    const first = await value(one, 'F_0');
    await type(one, 'F_0', '1400 N');
    await expect.poll(() => value(two, 'F_0')).toBe('1 400 N');
    // Nothing can be typed here, and it says why.
    await row(two, 'F_0').locator('.result').first().click();
    expect(await two.locator('.typing').count()).toBe(0);
    expect(await two.locator('p[role="status"]').textContent()).toContain('written in another tab');
    expect(await two.getByRole('button', { name: /^New line/u }).count()).toBe(0);

    // What is being typed in the first goes along.
    await row(one, 'F_0').locator('.result').first().click();
    await one.locator('.typing').fill('1450');
    await act(two, 'Take over writing');
    await expect.poll(() => notice(two)).toContain('You write this sheet now');
    await expect.poll(() => two.locator('.typing').inputValue()).toBe('1450');
    await two.keyboard.press('Escape');
    await expect.poll(() => notice(one)).toContain('Another tab has taken over this sheet');
    expect(await one.locator('.typing').count()).toBe(0);
    const inGrid = (page: Page) => page.evaluate(() => document.activeElement?.closest('[role="grid"]') != null);
    await expect.poll(() => inGrid(one)).toBe(true);
    await one.keyboard.press('Alt+Enter');
    await one.waitForTimeout(300);
    expect(await one.locator('ts-entry-line').count()).toBe(0);
    await type(two, 'F_0', '1500 N');
    await expect.poll(() => value(one, 'F_0')).toBe('1 500 N');
    await undo(two).click();
    await undo(two).click();
    expect(await value(two, 'F_0')).toBe(first);
    // The writer goes: the other one writes by itself.
    await kept(two);
    await two.close();
    await expect.poll(() => notice(one)).toContain('you can write here now');
    await type(one, 'F_0', '1600 N');
    await kept(one);
  });
});

describe('trouble', () => {
  it('no room: the work stays on the screen, and is kept once there is room', async () => {
    const page = await tab();
    await kept(page);
    // The limit itself is tried at the store; here every write is told that there is no room.
    await page.evaluate(() => {
      const global = globalThis as unknown as { put: typeof IDBObjectStore.prototype.put };
      global.put = IDBObjectStore.prototype.put;
      IDBObjectStore.prototype.put = () => {
        throw new DOMException('no room', 'QuotaExceededError');
      };
    });
    await type(page, 'F_0', '1400 N');
    await expect.poll(() => keptWord(page)).toBe('not kept');
    expect(await notice(page)).toContain('The browser has no more room for this sheet: the last changes are on the screen only.');
    expect(await saved(page)).toContain('"1400 N"');
    await type(page, 'F_0', '1500 N');
    await act(page, 'Try again');
    await expect.poll(() => keptWord(page)).toBe('not kept');
    // Once there is room, it is tried again by itself.
    await page.evaluate(() => {
      IDBObjectStore.prototype.put = (globalThis as unknown as { put: typeof IDBObjectStore.prototype.put }).put;
    });
    await kept(page);
    await page.reload();
    await stands(page);
    expect(await value(page, 'F_0')).toBe('1 500 N');
  });

  it('the data cleared under the page: the sheet stays and can be kept as a new one, with its undo', async () => {
    const page = await tab();
    await type(page, 'F_0', '1400 N');
    await kept(page);
    await page.evaluate(() =>
      new Promise((done, failed) => {
        const asking = indexedDB.deleteDatabase('tightside');
        asking.onsuccess = done;
        asking.onblocked = () => failed(new Error('blocked'));
      }).then(() => undefined),
    );
    await type(page, 'F_0', '1500 N');
    await expect.poll(() => notice(page)).toContain('This sheet is no longer among those kept in this browser');
    expect(await value(page, 'F_0')).toBe('1 500 N');
    await act(page, 'Keep as a new sheet');
    await kept(page);
    await page.reload();
    await stands(page);
    expect(await value(page, 'F_0')).toBe('1 500 N');
    await undo(page).click();
    expect(await value(page, 'F_0')).toBe('1 400 N');
  });

  it('a browser that keeps nothing: it says so, the work goes on, and the file has it', async () => {
    const page = await tab({ before: () => Object.defineProperty(globalThis, 'indexedDB', { value: undefined }) });
    expect(await keptWord(page)).toBe('not kept');
    expect(await notice(page)).toContain('This browser keeps nothing for this page');
    await type(page, 'F_0', '1400 N');
    expect(await saved(page)).toContain('"1400 N"');
  });

  it('a browser that does not answer: after a while one may go on without it', async () => {
    const page = await context.newPage();
    page.on('pageerror', (fault) => faults.push(fault.message));
    await page.addInitScript(() => {
      IDBFactory.prototype.open = () => Object.setPrototypeOf(new EventTarget(), IDBOpenDBRequest.prototype);
    });
    await page.goto(inject('url'));
    await expect.poll(() => notice(page)).toContain('The browser does not answer when asked for the sheets');
    await act(page, 'Go on without keeping');
    await stands(page);
    await type(page, 'F_0', '1400 N');
    expect(await value(page, 'F_0')).toBe('1 400 N');
  });

  it('a later version elsewhere: the page says so and overwrites nothing', async () => {
    const page = await tab();
    await type(page, 'F_0', '1400 N');
    await kept(page);
    const later = await context.newPage();
    await later.goto(inject('url').replace(/\/$/u, '/offline-worker.js'));
    await later.evaluate(
      () =>
        new Promise((done, failed) => {
          const asking = indexedDB.open('tightside', 99);
          asking.onsuccess = () => {
            asking.result.close();
            done(undefined);
          };
          asking.onerror = () => failed(asking.error);
        }),
    );
    await expect.poll(() => notice(page)).toContain('A later version of this page has been in use in this browser');
    await type(page, 'F_0', '1500 N');
    await expect.poll(() => keptWord(page)).toBe('not kept');
    expect(await value(page, 'F_0')).toBe('1 500 N');
  });
});

describe('without a network', () => {
  it('the page opens and keeps what is written; a later version replaces it only when asked', { timeout: 120_000 }, async () => {
    const folder = mkdtempSync(join(tmpdir(), 'page-offline-'));
    cpSync(process.env['TIGHTSIDE_PAGE'] ?? new URL('../../dist/page', import.meta.url).pathname, folder, { recursive: true });
    let server = (await serve(folder)) as { url: string; port: number; close(): Promise<void> };
    const { url, port } = server;
    const page = await tab({ url });
    await page.evaluate(() => navigator.serviceWorker.ready.then(() => undefined));
    await server.close();
    await page.reload();
    await stands(page);
    await type(page, 'F_0', '1400 N');
    await kept(page);
    // Everything that a visit may need is here: the editor, the shelf.
    await page.getByRole('button', { name: 'Shelf' }).click();
    await expect.poll(() => page.locator('#shelf h1').count()).toBe(1);
    await page.goBack();
    await stands(page);
    await row(page, 'F_u').locator('.formula').click();
    await page.locator('ts-formula-editor .cm-content').waitFor();
    await page.keyboard.press('Escape');

    // A later version: the same page under another title, and a worker that knows it.
    const worker = readFileSync(join(folder, 'offline-worker.js'), 'utf8');
    const version = /version = ["']([0-9a-f]{16})["']/u.exec(worker)?.[1];
    expect(version).toBeDefined();
    writeFileSync(join(folder, 'offline-worker.js'), worker.replace(version!, '0123456789abcdef'));
    const index = readFileSync(join(folder, 'index.html'), 'utf8');
    writeFileSync(join(folder, 'index.html'), index.replace('<body>', '<body data-later="yes">'));
    server = (await serve(folder, { port })) as typeof server;
    await page.reload();
    await stands(page);
    await expect.poll(() => notice(page)).toContain('A later version of this page is ready.');
    expect(await page.locator('body[data-later]').count()).toBe(0);
    await row(page, 'F_0').locator('.result').first().click();
    await page.locator('.typing').fill('1500 N');
    const loaded = page.waitForEvent('load');
    await act(page, 'Change to it now');
    await loaded;
    await stands(page);
    expect(await page.locator('body[data-later]').count()).toBe(1);
    expect(await value(page, 'F_0')).toBe('1 500 N');
    await server.close();
    rmSync(folder, { recursive: true, force: true });
  });
});

it('the example comes once in a browser, and every tab of it opens the sheet of last time', async () => {
  const page = await tab();
  expect(page.url()).toMatch(/#\/sheet\/example$/u);
  expect(await page.locator('h1').textContent()).toBe(example.title);
  await type(page, 'F_0', '1400 N');
  await kept(page);
  await page.close();
  const again = await tab();
  expect(await value(again, 'F_0')).toBe('1 400 N');
});
