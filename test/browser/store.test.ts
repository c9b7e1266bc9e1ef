// The store in a real browser: real transactions, real locks, real tabs, and every trouble as the browser makes it.

import { type Browser, type BrowserContext, chromium, type Page } from 'playwright-core';
import { afterAll, afterEach, beforeAll, beforeEach, describe, expect, inject, it } from 'vitest';
import { type StorePage, serveStorePage } from './store-kit.ts';
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

async function tab(before?: () => void): Promise<Page> {
  const page = await context.newPage();
  page.on('pageerror', (fault) => faults.push(fault.message));
  if (before !== undefined) await page.addInitScript(before);
  await page.goto(served.url);
  await page.waitForFunction(() => 'kit' in globalThis);
  return page;
}

const begin = (page: Page, id?: string, delay?: number) =>
  page.evaluate(([which, after]) => globalThis.kit.begin(which ?? undefined, after === null ? {} : { delay: after }), [
    id ?? null,
    delay ?? null,
  ] as const);
const set = (page: Page, name: string, value: string) =>
  page.evaluate(([n, v]) => globalThis.kit.set(n, v), [name, value] as const);
const value = (page: Page, name: string) => page.evaluate((n) => globalThis.kit.value(n), name);
const kept = (page: Page) => page.evaluate(() => globalThis.kit.now.keeper.kept());
const state = (page: Page) =>
  page.evaluate(() => {
    const { state: now } = globalThis.kit.now.keeper;
    return now.kind === 'trouble' ? now.problem : { code: now.kind, message: '', wayOut: [] };
  });
const code = async (page: Page) => (await state(page)).code;
const role = (page: Page) => page.evaluate(() => globalThis.kit.now.keeper.role);
const events = (page: Page) => page.evaluate(() => globalThis.kit.now.events);

describe('an edit', () => {
  it('is there with its undo after a reload, and within a second without anybody asking', async () => {
    const page = await tab();
    const id = await begin(page);
    for (const force of ['1 N', '2 N', '3 N']) await set(page, 'F_0', force);
    await expect.poll(() => code(page), { timeout: 1000, interval: 20 }).toBe('kept');
    await page.reload();
    await page.waitForFunction(() => 'kit' in globalThis);
    await begin(page, id);
    expect(await page.evaluate(() => globalThis.kit.undone('F_0'))).toEqual(['3 N', '2 N', '1 N', '0 N']);
  });

  it('survives leaving the page at once, while the clock of its write still runs', async () => {
    const page = await tab();
    const id = await begin(page, undefined, 60_000);
    await set(page, 'F_0', '7 N');
    await page.goto('about:blank');
    const again = await tab();
    await begin(again, id);
    expect(await value(again, 'F_0')).toBe('7 N');
  });

  it('what is being typed is asked for when the page is hidden', async () => {
    const page = await tab();
    const id = await begin(page, undefined, 60_000);
    await page.evaluate(() => {
      globalThis.kit.now.keeper.subscribe((event) => {
        if (event.kind === 'hand-in') globalThis.kit.now.keeper.keepDraft({ text: '12.5' });
      });
    });
    await page.goto('about:blank');
    const again = await tab();
    await begin(again, id);
    expect(await again.evaluate(() => globalThis.kit.now.keeper.draft)).toEqual({ text: '12.5' });
  });
});

describe('two tabs', () => {
  it('one writes, the other follows live, takes over when asked, and nothing is lost', async () => {
    const one = await tab();
    const id = await begin(one);
    const other = await tab();
    await begin(other, id);
    expect([await role(one), await role(other)]).toEqual(['writer', 'follower']);
    await set(one, 'F_0', '5 N');
    await expect.poll(() => value(other, 'F_0'), { timeout: 2000 }).toBe('5 N');
    expect(await set(other, 'F_0', '6 N')).toBe(false);
    await set(one, 'd', '250 mm');
    expect(await other.evaluate(() => globalThis.kit.now.keeper.takeOver())).toBe(true);
    expect([await role(one), await role(other)]).toEqual(['follower', 'writer']);
    expect(await events(one)).toContain('follower: Another tab has taken over this sheet. Everything you wrote is in it.');
    expect(await value(other, 'd')).toBe('250 mm');
    await set(other, 'F_0', '8 N');
    await expect.poll(() => value(one, 'F_0'), { timeout: 2000 }).toBe('8 N');
    expect(await other.evaluate(() => globalThis.kit.undone('F_0'))).toEqual(['8 N', '5 N', '5 N', '0 N']);
    expect(await one.evaluate(async () => (await globalThis.kit.now.shelf.list()).length)).toBe(1);
  });

  it('a writer that hangs loses the lock; what it had not kept is a sheet of its own', async () => {
    const one = await tab();
    const id = await begin(one, undefined, 600_000);
    const other = await tab();
    await begin(other, id);
    await set(one, 'F_0', '5 N');
    // The tab is busy: it answers nobody, like one whose script hangs.
    const busy = one.evaluate(() => {
      const until = Date.now() + 4000;
      while (Date.now() < until);
    });
    expect(await other.evaluate(() => globalThis.kit.now.keeper.takeOver())).toBe(true);
    await set(other, 'F_0', '6 N');
    expect(await kept(other)).toBe(true);
    await busy;
    await expect.poll(() => role(one)).toBe('follower');
    await expect.poll(() => value(one, 'F_0')).toBe('6 N');
    const shelf = await other.evaluate(async () =>
      (await globalThis.kit.now.shelf.list()).map((head) => [head.title, head.copyOf ?? null, head.id]),
    );
    expect(shelf.length).toBe(2);
    const copy = shelf.find(([, of]) => of === id)!;
    expect(copy[0]).toBe('Drive (changes not kept)');
    await begin(other, copy[2]!);
    expect(await value(other, 'F_0')).toBe('5 N');
  });

  it('the follower writes once the writer is closed', async () => {
    const one = await tab();
    const id = await begin(one);
    const other = await tab();
    await begin(other, id);
    await set(one, 'F_0', '5 N');
    await kept(one);
    await one.close();
    await expect.poll(() => role(other), { timeout: 5000 }).toBe('writer');
    expect(await set(other, 'F_0', '6 N')).toBe(true);
    expect(await kept(other)).toBe(true);
    expect(await other.evaluate(() => globalThis.kit.undone('F_0'))).toEqual(['6 N', '5 N', '0 N']);
  });

  it('that edit and take over in turn, fast, never lose an edit', async () => {
    const [one, other] = [await tab(), await tab()];
    const id = await begin(one);
    await begin(other, id);
    const pages = [one, other];
    for (let n = 1; n <= 8; n += 1) {
      const page = pages[n % 2]!;
      expect(await page.evaluate(() => globalThis.kit.now.keeper.takeOver())).toBe(true);
      for (let k = 0; k < 3; k += 1) expect(await set(page, 'F_0', `${n * 10 + k} N`)).toBe(true);
    }
    expect(await kept(one)).toBe(true);
    const writer = (await role(one)) === 'writer' ? one : other;
    const all = Array.from({ length: 8 }, (_, n) => [0, 1, 2].map((k) => `${(n + 1) * 10 + k} N`)).flat();
    expect(await writer.evaluate(() => globalThis.kit.undone('F_0'))).toEqual(['0 N', ...all].reverse());
  });
});

describe('trouble in words', () => {
  it('full: the work stays on the screen and is kept once there is room', async () => {
    const page = await tab();
    // Before the first write: the browser remembers for a while how much room there was.
    const session = await context.newCDPSession(page);
    const { origin } = new URL(served.url);
    await session.send('Storage.overrideQuotaForOrigin', { origin, quotaSize: 1_000_000 });
    const id = await begin(page);
    await set(page, 'F_0', '1 N');
    expect(await kept(page)).toBe(true);
    // Text that cannot be pressed together.
    const length = await page.evaluate(() => {
      const bytes = crypto.getRandomValues(new Uint8Array(60_000));
      const part = Array.from(bytes, (byte) => String.fromCharCode(33 + (byte % 90))).join('');
      globalThis.kit.set('d', Array.from({ length: 60 }, (_, n) => `${n}${part.slice(n * 7)}${part.slice(0, n * 7)}`).join(''));
      return globalThis.kit.value('d')?.length;
    });
    expect(length).toBeGreaterThan(3_000_000);
    expect(await kept(page)).toBe(false);
    const problem = await state(page);
    expect(problem.code).toBe('full');
    expect(problem.message).toContain('The browser has no more room for this sheet: the last changes are on the screen only.');
    expect(problem.wayOut).toEqual(['save as a file', 'export everything', 'try again']);
    await set(page, 'F_0', '2 N');
    await session.send('Storage.overrideQuotaForOrigin', { origin });
    await page.evaluate(() => globalThis.kit.now.keeper.tryAgain());
    await expect.poll(() => code(page)).toBe('kept');
    const again = await tab();
    await page.close();
    await begin(again, id);
    // The closed tab may hold its lock for a moment longer; a tab that follows has nothing to take back.
    await expect.poll(() => role(again)).toBe('writer');
    expect(await again.evaluate(() => globalThis.kit.undone('F_0'))).toEqual(['2 N', '1 N', '1 N', '0 N']);
  });

  it('blocked: an older tab that holds on is named, and the page goes on by itself when it is closed', async () => {
    const old = await tab();
    await begin(old);
    const name = 'held';
    await old.evaluate(
      (which) =>
        new Promise((done) => {
          const asking = indexedDB.open(which, 1);
          asking.onupgradeneeded = () => asking.result.createObjectStore('sheets', { keyPath: 'id' });
          asking.onsuccess = () => done(undefined);
        }),
      name,
    );
    const page = await tab();
    const told = page.evaluate(
      (which) =>
        new Promise<(string | null)[]>((done) => {
          const said: (string | null)[] = [];
          const next = () => undefined;
          void globalThis.kit
            .openStore({ name: which, upgrades: [next, next], onWait: (problem) => said.push(problem?.message ?? null) })
            .then((store) => done([...said, store.backend.kind]));
        }),
      name,
    );
    await page.waitForTimeout(500);
    await old.close();
    expect(await told).toEqual([
      'Another tab still runs an earlier version of this page and holds the sheets. Close the other tabs of this page; this one goes on by itself.',
      null,
      'browser',
    ]);
  });

  it('newer: an older page makes room for a newer one and is told; opened again, it does not touch the newer sheets', async () => {
    const old = await tab();
    await begin(old);
    await old.evaluate(() => {
      globalThis.kit.now.store.onTrouble((problem) => globalThis.kit.now.events.push(problem.code));
    });
    const fresh = await tab();
    const wait = await fresh.evaluate(async () => {
      const said: unknown[] = [];
      const since = performance.now();
      const step = () => undefined;
      const first = (db: unknown) => void db;
      const store = await globalThis.kit.openStore({ upgrades: [first, step], onWait: (problem) => said.push(problem) });
      return { kind: store.backend.kind, said, time: performance.now() - since };
    });
    expect(wait.kind).toBe('browser');
    expect(wait.said.filter((one) => one !== null)).toEqual([]);
    expect(await events(old)).toContain('newer');
    await set(old, 'F_0', '5 N');
    expect(await kept(old)).toBe(false);
    const problem = await state(old);
    expect(problem.code).toBe('newer');
    expect(problem.message).toContain('Reload the page to get the later version.');
    const again = await tab();
    const opened = await again.evaluate(async () => {
      const store = await globalThis.kit.openStore();
      return [store.backend.kind, store.problem?.code];
    });
    expect(opened).toEqual(['memory', 'newer']);
  });

  it('gone: the data cleared under the page leave the sheet on the screen, to be kept as a new one with its undo', async () => {
    const page = await tab();
    await begin(page);
    await set(page, 'F_0', '5 N');
    await kept(page);
    const other = await tab();
    await other.evaluate(() =>
      new Promise((done, failed) => {
        const asking = indexedDB.deleteDatabase('tightside');
        asking.onsuccess = done;
        asking.onblocked = () => failed(new Error('blocked'));
      }).then(() => undefined),
    );
    await set(page, 'F_0', '6 N');
    expect(await kept(page)).toBe(false);
    expect(await code(page)).toBe('gone');
    expect(await value(page, 'F_0')).toBe('6 N');
    const fresh = await page.evaluate(async () => (await globalThis.kit.now.keeper.keepAsNew()).id);
    await page.reload();
    await page.waitForFunction(() => 'kit' in globalThis);
    await begin(page, fresh);
    expect(await page.evaluate(() => globalThis.kit.undone('F_0'))).toEqual(['6 N', '5 N', '0 N']);
  });

  it('lost: sheets that were here and are gone are not shown as a fresh start', async () => {
    const page = await tab();
    expect(await page.evaluate(async () => (await globalThis.kit.openStore()).problem)).toBeNull();
    await begin(page);
    await set(page, 'F_0', '5 N');
    await kept(page);
    await page.goto(`${served.url}index.html`);
    await page.waitForFunction(() => 'kit' in globalThis);
    await page.evaluate(() =>
      new Promise((done) => (indexedDB.deleteDatabase('tightside').onsuccess = done)).then(() => undefined),
    );
    const problem = await page.evaluate(async () => (await globalThis.kit.openStore()).problem);
    expect(problem?.code).toBe('lost');
    expect(problem?.message).toContain('There were sheets in this browser, and they are gone');
    await page.reload();
    await page.waitForFunction(() => 'kit' in globalThis);
    expect(await page.evaluate(async () => (await globalThis.kit.openStore()).problem)).toBeNull();
  });

  it.each([
    ['there is none', () => Object.defineProperty(globalThis, 'indexedDB', { value: undefined })],
    [
      'opening is forbidden',
      () => {
        IDBFactory.prototype.open = () => {
          throw new DOMException('not in this window', 'SecurityError');
        };
      },
    ],
  ] as const)('unavailable, %s: work goes on in memory and the words say what that means', async (_why, before) => {
    const page = await tab(before);
    await begin(page);
    await set(page, 'F_0', '5 N');
    expect(await kept(page)).toBe(true);
    const [kind, problem] = await page.evaluate(
      () => [globalThis.kit.now.store.backend.kind, globalThis.kit.now.store.problem] as const,
    );
    expect(kind).toBe('memory');
    expect(problem?.code).toBe('unavailable');
    expect(problem?.message).toContain('everything is gone when the tab closes: save the sheet as a file');
  });

  it('slow: a browser that does not answer is said so after a while', async () => {
    const page = await tab(() => {
      const { open } = IDBFactory.prototype;
      IDBFactory.prototype.open = function (name, version) {
        const request = open.call(this, name, version);
        for (const kind of ['success', 'error', 'upgradeneeded', 'blocked'])
          request.addEventListener(kind, (event) => event.stopImmediatePropagation());
        return request;
      };
    });
    const said = await page.evaluate(
      () =>
        new Promise<string | undefined>((done) => {
          void globalThis.kit.openStore({ patience: 50, onWait: (problem) => done(problem?.code) });
        }),
    );
    expect(said).toBe('slow');
  });

  it('not-upgraded: an upgrade that fails leaves every sheet as it was', async () => {
    const page = await tab();
    const id = await begin(page);
    await set(page, 'F_0', '5 N');
    await kept(page);
    await page.reload();
    await page.waitForFunction(() => 'kit' in globalThis);
    const problem = await page.evaluate(async () => {
      const fail = (db: { deleteObjectStore(name: 'sheets'): void }) => {
        db.deleteObjectStore('sheets');
        throw new Error('half-way');
      };
      const store = await globalThis.kit.openStore({ upgrades: [() => undefined, fail as never] });
      return store.problem;
    });
    expect(problem).toMatchObject({ code: 'not-upgraded', cause: 'Error: half-way' });
    await begin(page, id);
    expect(await value(page, 'F_0')).toBe('5 N');
  });
});

describe('the promise of the browser', () => {
  it('is asked for once, after the first own sheet, and its answer can be read', async () => {
    const page = await tab(() => {
      const counter = globalThis as unknown as { asked: number };
      counter.asked = 0;
      StorageManager.prototype.persist = async () => {
        counter.asked += 1;
        return false;
      };
    });
    const asked = () => page.evaluate(() => (globalThis as unknown as { asked: number }).asked);
    await page.evaluate(async () => {
      globalThis.kit.now.store = await globalThis.kit.openStore();
    });
    expect(await asked()).toBe(0);
    await begin(page);
    await expect.poll(asked).toBe(1);
    await page.reload();
    await page.waitForFunction(() => 'kit' in globalThis);
    await begin(page);
    await set(page, 'F_0', '5 N');
    await kept(page);
    await page.waitForTimeout(200);
    expect(await asked()).toBe(0);
    const persistence = await page.evaluate(() => globalThis.kit.now.store.persistence());
    expect(persistence.state).toBe('while there is room');
    expect(persistence.message).toContain('as long as it has room');
    expect(persistence.used).toBeGreaterThan(0);
    expect(persistence.allowed).toBeGreaterThan(persistence.used!);
  });
});
