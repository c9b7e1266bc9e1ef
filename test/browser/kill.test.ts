// The browser process killed (SIGKILL, all of its processes) at random moments of typing, and started again with the same profile.
// Five times in `npm test`, fifty times with PROVE=1. The seed is printed; SEED=… repeats a run.

import { type ChildProcess, spawn } from 'node:child_process';
import { mkdtempSync, readFileSync, rmSync } from 'node:fs';
import { tmpdir } from 'node:os';
import { join } from 'node:path';
import { type Browser, chromium, type Page } from 'playwright-core';
import { afterAll, beforeAll, describe, expect, it } from 'vitest';
// @ts-expect-error plain JavaScript, run by the test step without a compiler
import { findChromium } from './chromium.mjs';
import { type StorePage, serveStorePage } from './store-kit.ts';
import type {} from './store-page/main.ts';

const kills = process.env['PROVE'] === '1' ? 50 : 5;
const seed = Number(process.env['SEED'] ?? Date.now() % 1_000_000);

/** Numbers from 0 to 1 that follow from the seed (mulberry32). */
function random(start: number): () => number {
  let state = start;
  return () => {
    state = (state + 0x6d2b79f5) | 0;
    let mixed = Math.imul(state ^ (state >>> 15), 1 | state);
    mixed = (mixed + Math.imul(mixed ^ (mixed >>> 7), 61 | mixed)) ^ mixed;
    return ((mixed ^ (mixed >>> 14)) >>> 0) / 4_294_967_296;
  };
}

const found = findChromium() as { path: string; env: Record<string, string> };
let served: StorePage;
let profile: string;
let running: ChildProcess | null = null;
const next = random(seed);

beforeAll(async () => {
  served = await serveStorePage();
  profile = mkdtempSync(join(tmpdir(), 'store-profile-'));
  console.log(`kills: ${kills}, SEED=${seed}`);
});
afterAll(async () => {
  await kill();
  await served.close();
  rmSync(profile, { recursive: true, force: true, maxRetries: 5 });
});

/** A browser of our own, in a group of processes that ends together. */
async function start(): Promise<{ browser: Browser; page: Page }> {
  rmSync(join(profile, 'DevToolsActivePort'), { force: true });
  running = spawn(
    found.path,
    [
      '--headless=new',
      '--no-sandbox',
      '--disable-gpu',
      '--no-first-run',
      '--remote-debugging-port=0',
      `--user-data-dir=${profile}`,
      'about:blank',
    ],
    { env: { ...process.env, ...found.env }, stdio: 'ignore', detached: true },
  );
  const until = Date.now() + 60_000;
  let port = '';
  while (port === '') {
    if (Date.now() > until) throw new Error('the browser does not start');
    await new Promise((done) => setTimeout(done, 50));
    try {
      port = readFileSync(join(profile, 'DevToolsActivePort'), 'utf8').split('\n')[0] ?? '';
    } catch {
      // not written yet
    }
  }
  const browser = await chromium.connectOverCDP(`http://127.0.0.1:${port}`);
  const page = await browser.contexts()[0]!.newPage();
  await page.goto(served.url);
  await page.waitForFunction(() => 'kit' in globalThis);
  return { browser, page };
}

async function kill(): Promise<void> {
  const child = running;
  running = null;
  if (child === null || child.pid === undefined || child.exitCode !== null) return;
  const ended = new Promise((done) => child.once('exit', done));
  process.kill(-child.pid, 'SIGKILL');
  await ended;
}

interface Typed {
  readonly n: number;
  readonly at: number;
}

describe('a browser that is killed while somebody types', () => {
  const lost: number[] = [];
  it.each(Array.from({ length: kills }, (_, index) => index + 1))(
    'kill %i: at most the last second is lost, nothing is torn, and every step can be taken back',
    async () => {
      const before = await start();
      const id = await before.page.evaluate(() => globalThis.kit.begin());
      const typed: Typed[] = [];
      const acknowledged: Typed[] = [];
      await before.page.exposeFunction('tellTyped', (n: number, at: number) => typed.push({ n, at }));
      await before.page.exposeFunction('tellKept', (n: number, at: number) => acknowledged.push({ n, at }));
      const pause = 5 + next() * 60;
      const size = Math.floor(next() * 20_000);
      await before.page.evaluate(
        ([wait, length]) => {
          const tell = globalThis as unknown as Record<'tellTyped' | 'tellKept', (n: number, at: number) => Promise<void>>;
          const { kit } = globalThis;
          kit.set('d', 'x'.repeat(length));
          let n = 0;
          const type = () => {
            n += 1;
            const mine = n;
            kit.set('F_0', `${mine} N`);
            void tell.tellTyped(mine, Date.now());
            if (mine % 7 === 0) void kit.now.keeper.kept().then((kept) => (kept ? tell.tellKept(mine, Date.now()) : undefined));
            setTimeout(type, wait);
          };
          type();
        },
        [pause, size] as const,
      );
      await new Promise((done) => setTimeout(done, 800 + next() * 2500));
      const killed = Date.now();
      await kill();
      await before.browser.close().catch(() => undefined);

      const after = await start();
      // Opening reads the text as strictly as a file: a torn one would be refused here.
      await after.page.evaluate((which) => globalThis.kit.begin(which), id);
      const values = await after.page.evaluate(() => globalThis.kit.undone('F_0'));
      const length = await after.page.evaluate(() => globalThis.kit.value('d')?.length);
      await kill();
      await after.browser.close().catch(() => undefined);

      const last = Number(values[0]?.replace(' N', ''));
      expect(typed.length, 'edits before the kill').toBeGreaterThan(5);
      const due = typed.filter((one) => one.at <= killed - 1000).at(-1)?.n ?? 0;
      expect(last, 'of what was typed a second before').toBeGreaterThanOrEqual(due);
      expect(last, 'of what was said to be kept').toBeGreaterThanOrEqual(acknowledged.at(-1)?.n ?? 0);
      // The first step set `d`; each later one a force, one after the other, without a gap.
      expect(values).toEqual([...Array.from({ length: last }, (_, index) => `${last - index} N`), '0 N', '0 N']);
      expect(length).toBe(size);
      const firstLost = typed.find((one) => one.n > last);
      lost.push(firstLost === undefined ? 0 : killed - firstLost.at);
    },
    120_000,
  );

  it('has lost what was typed in the last moments only', () => {
    console.log(`typing lost, in ms: ${lost.map((time) => time.toFixed(0)).join(', ')}`);
    expect(lost.length).toBe(kills);
    expect(Math.max(...lost)).toBeLessThanOrEqual(1000);
  });
});
