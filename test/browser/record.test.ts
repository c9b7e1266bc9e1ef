// The record: what the page shows and prints against what the command line makes of the file that the page saved.

import { mkdtempSync, rmSync, writeFileSync } from 'node:fs';
import { tmpdir } from 'node:os';
import { join } from 'node:path';
import { fileURLToPath } from 'node:url';
import type { Browser } from 'playwright-core';
import { afterAll, beforeAll, describe, expect, it } from 'vitest';
import { nodeIo, run } from '../../src/cli/main.ts';
import { writeSheet } from '../../src/sheet/index.ts';
import { connect, drop, example, idOf, type Opened, open, resultsOn } from './open.ts';
import { readPdf } from './pdf.ts';

interface JsonRecord {
  readonly steps: readonly {
    readonly number: string;
    readonly cell: string;
    readonly kind: string;
    readonly title: string;
    readonly symbols: string;
    readonly cases: readonly { readonly substituted: string; readonly result: string | null; readonly met?: boolean | null }[];
  }[];
}

const folder = mkdtempSync(join(tmpdir(), 'page-record-'));
let browser: Browser;
beforeAll(async () => {
  browser = await connect();
});
afterAll(async () => {
  await browser.close();
  rmSync(folder, { recursive: true, force: true });
});

async function tightside(...argv: string[]): Promise<{ exit: number; out: string }> {
  let out = '';
  const templates = fileURLToPath(new URL('../../templates/', import.meta.url));
  const exit = await run(argv, nodeIo(templates, { out: (text) => (out += text), err: () => undefined }));
  return { exit, out };
}

/** What the page changed in the example, and the record that the command line makes of the saved file. */
async function changedAndSaved({ page }: Opened): Promise<JsonRecord> {
  await page
    .locator(`ts-row[data-cell="${idOf('F_0')}"] .result`)
    .first()
    .click();
  await page.locator('.typing').fill('1.31 kN');
  await page.keyboard.press('Enter');
  const [download] = await Promise.all([page.waitForEvent('download'), page.getByRole('button', { name: 'Save file' }).click()]);
  let text = '';
  for await (const part of await download.createReadStream()) text += String(part);
  const file = join(folder, 'saved.sheet.json');
  writeFileSync(file, text);
  const { exit, out } = await tightside('record', file, '--to', 'json');
  expect([0, 1]).toContain(exit);
  return JSON.parse(out) as JsonRecord;
}

describe('the record of the page', () => {
  it('has the steps, symbols, numbers and results of the command line', async () => {
    const opened = await open(browser);
    const { page } = opened;
    const record = await changedAndSaved(opened);
    expect(record.steps.length).toBeGreaterThan(50);
    const results = await resultsOn(page);
    for (const step of record.steps.filter((one) => one.kind !== 'given')) {
      const wanted = step.cases.map((each) =>
        each.result === null ? 'no value' : `${step.kind === 'criterion' ? (each.met ? 'met ' : 'not met ') : ''}${each.result}`,
      );
      expect(results[step.cell], step.number).toEqual(wanted);
    }
    // Every formula is asked for by coming near: what the elements hold is compared, drawn or not.
    const shown = await page.evaluate(() =>
      Object.fromEntries(
        [...document.querySelectorAll<HTMLElement>('ts-row.step')].map((row) => [
          row.dataset['cell'] ?? '',
          {
            number: row.querySelector('.number')?.textContent ?? '',
            title: row.querySelector('.title')?.textContent ?? '',
            tex: [...row.querySelectorAll('.formula ts-math')]
              .map((one) => (one as unknown as { tex: string }).tex)
              .join(' ')
              .replace(/\\nobreak|[{}\s]/gu, ''),
          },
        ]),
      ),
    );
    for (const step of record.steps) {
      const here = shown[step.cell];
      expect(here, step.number).toMatchObject({ number: step.number, title: step.title });
      const plain = (tex: string) => tex.replace(/\\nobreak|[{}\s]/gu, '');
      expect(here?.tex, step.number).toContain(plain(step.symbols));
      const [first] = step.cases;
      if (step.kind === 'derived' && first !== undefined) expect(here?.tex, step.number).toContain(plain(first.substituted));
    }
    await opened.close();
  });

  it.each([
    ['A4', [595, 842]],
    ['Letter', [612, 792]],
  ] as const)('on %s has numbered pages, its name on each, every step whole on one page', async (paper, size) => {
    const opened = await open(browser, { colorScheme: 'dark' });
    const { page } = opened;
    await drop(page, 'example.sheet.json', writeSheet({ ...example, settings: { ...example.settings, paper } }));
    await expect.poll(() => page.url()).not.toContain('/sheet/example');
    const record = await changedAndSaved(opened);
    const text = readPdf(await page.pdf({ preferCSSPageSize: true }));
    await opened.close();
    expect(text.size).toEqual(size);
    expect(text.pages).toBeGreaterThan(5);
    const plain = (words: string) => words.replace(/[\s\u202f]+/gu, '');
    text.of.forEach((one, index) => {
      expect(one).toContain(`page ${index + 1} of ${text.pages}`);
      for (const named of ['CS-014 rev P1', example.title, 'for checking']) expect(plain(one)).toContain(plain(named));
    });
    const pages = text.of.map(plain);
    for (const step of record.steps.filter((one) => one.kind === 'derived')) {
      const on = pages.filter((one) => one.includes(plain(`${step.number}${step.title}`)));
      expect(on.length, `${step.number} ${step.title}`).toBe(1);
      for (const each of step.cases) expect(on[0]).toContain(plain(each.result ?? '').replace(/[⁰¹²³⁴⁵⁶⁷⁸⁹⁻]/gu, ''));
    }
  });
});
