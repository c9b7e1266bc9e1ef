// The built page, typed into with real key strokes, while the browser process is killed (SIGKILL, all of its processes) at random moments;
// then started again with the same profile. Five times in `npm test`, fifty times with PROVE=1. The seed is printed; SEED=… repeats a run.

import type { Page } from 'playwright-core';
import { afterAll, beforeAll, describe, expect, inject, it } from 'vitest';
import { killable, random } from './killable.ts';
import { idOf } from './open.ts';

const kills = process.env['PROVE'] === '1' ? 50 : 5;
const seed = Number(process.env['SEED'] ?? Date.now() % 1_000_000);
const next = random(seed);
const own = killable();

beforeAll(() => console.log(`kills: ${kills}, SEED=${seed}`));
afterAll(() => own.end());

async function start() {
  const started = await own.start();
  await started.page.goto(inject('url'));
  await started.page.waitForSelector('ts-row .result', { state: 'attached' });
  return started;
}

/** What is on the screen after so many key strokes: the value that was kept, and the text in its field (null: no field is open). */
interface Stand {
  readonly kept: string;
  readonly typed: string | null;
  /** When the last of the key strokes was answered. */
  at: number;
}
const cell = idOf('F_0');
const row = (page: Page) => page.locator(`ts-row[data-cell="${cell}"]`);
/** As the sheet holds it: digit groups and the kind of space are the printing's. */
const plain = (text: string) => text.replace(/[\u2009\u202f\u00a0]/gu, ' ').replace(/(\d) (?=\d{3})/gu, '$1');

describe('the page, killed while somebody types into it', () => {
  const lost: number[] = [];
  let kept: string | undefined;

  it.each(Array.from({ length: kills }, (_, index) => index + 1))(
    'kill %i: at most the last second of typing is lost, nothing is torn, and every step can be taken back',
    async (round) => {
      const before = await start();
      const { page } = before;
      await expect.poll(() => page.locator('.bar .kept').textContent(), { message: 'this page writes' }).toMatch(/^kept /u);
      await row(page).locator('.result').first().click();
      await page.keyboard.press('Escape');
      const value = await row(page).locator('.result .value').first().textContent();
      kept = plain(value?.trim() ?? '');
      const stands: Stand[] = [{ kept, typed: null, at: 0 }];
      const committed: string[] = [kept];
      // A stand counts from before its key stroke: the kill may come between the stroke and its answer.
      const note = (typed: string | null) => {
        const stand = { kept: committed.at(-1)!, typed, at: Number.POSITIVE_INFINITY };
        stands.push(stand);
        return stand;
      };
      let seen = 0;
      await expect
        .poll(() => page.evaluate((id) => document.activeElement?.closest('ts-row')?.getAttribute('data-cell') === id, cell))
        .toBe(true);
      const until = Date.now() + 900 + next() * 2500;
      let dead = false;
      const typing = (async () => {
        for (let n = 0; !dead; n += 1) {
          const text = `${1000 + round * 100 + (n % 100)} N`;
          for (let end = 1; end <= text.length && !dead; end += 1) {
            const stand = note(text.slice(0, end));
            await page.keyboard.press(text[end - 1] === ' ' ? 'Space' : text[end - 1]!);
            stand.at = Date.now();
            if ((await page.evaluate(() => document.querySelector<HTMLInputElement>('.typing')?.value)) === stand.typed)
              seen += 1;
          }
          committed.push(text);
          const stand = note(null);
          await page.keyboard.press('Enter');
          stand.at = Date.now();
        }
      })().catch(() => undefined);
      await new Promise((done) => setTimeout(done, Math.max(0, until - Date.now())));
      const killed = Date.now();
      await own.kill();
      dead = true;
      await typing;
      await before.browser.close().catch(() => undefined);

      const after = await start();
      const again = after.page;
      const field = row(again).locator('.typing');
      // What was typed and not yet kept stands in its field again.
      const typed = (await field.count()) === 0 ? null : await field.inputValue();
      if (typed !== null) await field.press('Escape');
      const shown = async () => plain((await row(again).locator('.result .value').first().textContent())?.trim() ?? '');
      const now = await shown();
      const undo = again.getByRole('button', { name: 'Undo' });
      const back: string[] = [];
      for (let step = 0; step < 12 && (await undo.isEnabled()); step += 1) {
        await undo.click();
        back.push(await shown());
      }
      for (let step = 0; step < back.length; step += 1) await again.getByRole('button', { name: 'Redo' }).click();
      expect(await shown()).toBe(now);
      await own.kill();
      await after.browser.close().catch(() => undefined);

      expect(seen, 'texts seen in the field before the kill').toBeGreaterThan(3);
      const place = stands.findLastIndex((one) => one.kept === now && (one.typed ?? '') === (typed ?? ''));
      expect(place, `${now} and ${typed} were on the screen once`).toBeGreaterThanOrEqual(0);
      const due = stands.findLastIndex((one) => one.at <= killed - 1000);
      expect(place, 'of what was typed a second before').toBeGreaterThanOrEqual(due);
      const steps = committed.slice(0, committed.lastIndexOf(now)).reverse().slice(0, 12);
      expect(back.slice(0, steps.length)).toEqual(steps.slice(0, back.length));
      const firstLost = stands[place + 1];
      lost.push(firstLost === undefined ? 0 : Math.max(0, killed - Math.min(firstLost.at, killed)));
    },
    120_000,
  );

  it('has lost what was typed in the last moments only', () => {
    console.log(`typing lost, in ms: ${lost.map((time) => time.toFixed(0)).join(', ')}`);
    expect(lost.length).toBe(kills);
    expect(Math.max(...lost)).toBeLessThanOrEqual(1000);
  });
});
