// The browser process killed (SIGKILL, all of its processes) at random moments of fast writing by the store alone, and started again with
// the same profile. Twice in `npm test`, fifty times with PROVE=1. The seed is printed; SEED=… repeats a run.

import type { Page } from 'playwright-core';
import { afterAll, beforeAll, describe, expect, it } from 'vitest';
import { killable, random } from './killable.ts';
import { type StorePage, serveStorePage } from './store-kit.ts';
import type {} from './store-page/main.ts';

const kills = process.env['PROVE'] === '1' ? 50 : 2;
const seed = Number(process.env['SEED'] ?? Date.now() % 1_000_000);
const next = random(seed);
const own = killable();
let served: StorePage;

beforeAll(async () => {
  served = await serveStorePage();
  console.log(`kills: ${kills}, SEED=${seed}`);
});
afterAll(async () => {
  await own.end();
  await served.close();
});

async function start(): Promise<Awaited<ReturnType<typeof own.start>> & { page: Page }> {
  const started = await own.start();
  await started.page.goto(served.url);
  await started.page.waitForFunction(() => 'kit' in globalThis);
  return started;
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
      await own.kill();
      await before.browser.close().catch(() => undefined);

      const after = await start();
      // Opening reads the text as strictly as a file: a torn one would be refused here.
      await after.page.evaluate((which) => globalThis.kit.begin(which), id);
      const values = await after.page.evaluate(() => globalThis.kit.undone('F_0'));
      const length = await after.page.evaluate(() => globalThis.kit.value('d')?.length);
      await own.kill();
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
