// What the page promises everybody: no findings of the accessibility rules, no sideways scrolling on a phone, a print with page numbers,
// a small first screen.

import { readFileSync } from 'node:fs';
import { createRequire } from 'node:module';
import { gzipSync } from 'node:zlib';
import type { Browser, Page } from 'playwright-core';
import { afterAll, beforeAll, describe, expect, inject, it } from 'vitest';
import { connect, idOf, open, recordWith } from './open.ts';
import { readPdf } from './pdf.ts';

let browser: Browser;
beforeAll(async () => {
  browser = await connect();
});
afterAll(() => browser.close());

const axeSource = readFileSync(createRequire(import.meta.url).resolve('axe-core/axe.min.js'), 'utf8');

interface Finding {
  readonly id: string;
  readonly nodes: readonly { readonly target: readonly string[]; readonly failureSummary?: string }[];
}

// The drawn half of a formula is hidden from assistive tools and inherits its ink; the spoken half (MathML) is examined.
async function findings(page: Page): Promise<string[]> {
  await page.evaluate(axeSource);
  const violations = await page.evaluate(async () => {
    const { axe } = globalThis as unknown as {
      axe: { run(context: object, options: object): Promise<{ violations: Finding[]; passes: unknown[] }> };
    };
    const result = await axe.run({ exclude: [['.katex-html']] }, { resultTypes: ['violations'], iframes: false });
    return result.passes.length < 20 ? [{ id: `only ${result.passes.length} rules ran`, nodes: [] }] : result.violations;
  });
  return violations.map(
    ({ id, nodes }) =>
      `${id}: ${nodes
        .slice(0, 3)
        .map((node) => `${node.target.join(' ')} ${node.failureSummary ?? ''}`)
        .join(' | ')}`,
  );
}

const beginTyping = async (page: Page, text: string) => {
  await page
    .locator(`ts-row[data-cell="${idOf('F_0')}"] .result`)
    .first()
    .click();
  await page.locator('.typing').fill(text);
};

describe('accessibility rules', () => {
  it.each([
    ['light', 1440],
    ['dark', 1440],
    ['light', 800],
    ['dark', 320],
  ] as const)(
    'find nothing, %s at %i px, at rest, while typing an error, and with criteria not met',
    { timeout: 240_000 },
    async (colorScheme, width) => {
      const { page, close } = await open(browser, { colorScheme, viewport: { width, height: 900 } });
      expect(await findings(page)).toEqual([]);
      await beginTyping(page, '900 xx');
      expect(await findings(page)).toEqual([]);
      await page.locator('.typing').fill('900 N');
      await page.keyboard.press('Enter');
      await page.waitForSelector('.bar .not-met');
      expect(await findings(page)).toEqual([]);
      await close();
    },
  );
});

describe('the width of the window', () => {
  it('from 320 px to wide holds the sheet without scrolling sideways', async () => {
    const { page, close } = await open(browser, { viewport: { width: 1440, height: 900 } });
    for (const width of [1440, 2200, 1024, 768, 560, 375, 320]) {
      await page.setViewportSize({ width, height: 900 });
      // Every row comes into view first: a formula must not push the page wider.
      await page.evaluate(async () => {
        for (let y = 0; y < document.body.scrollHeight; y += 800) {
          scrollTo(0, y);
          await new Promise((done) => requestAnimationFrame(done));
        }
      });
      const widths = await page.evaluate(() => [document.documentElement.scrollWidth, document.documentElement.clientWidth]);
      expect(widths, `at ${width} px`).toEqual([width, width]);
      const beyond = await page.evaluate(() => {
        const hidden = (element: Element) =>
          element.closest('.scroll, .equation:has([data-over]), svg, .katex-mathml, .unseen, .skip') !== null;
        return [...document.querySelectorAll('.bar *, .paper *, .outline *, .side *')]
          .filter((element) => !hidden(element) && element.getClientRects().length > 0)
          .filter((element) => element.getBoundingClientRect().right > document.documentElement.clientWidth + 1)
          .map((element) => `${element.tagName} ${element.className} in ${element.closest('ts-row')?.id}`);
      });
      expect(beyond, `at ${width} px`).toEqual([]);
    }
    await close();
  });

  it('text spaced as WCAG 1.4.12 asks is not cut off', async () => {
    const { page, close } = await open(browser, { viewport: { width: 1280, height: 900 } });
    await page.evaluate(() => {
      const sheet = new CSSStyleSheet();
      sheet.replaceSync(
        '* { line-height: 1.5 !important; letter-spacing: 0.12em !important; word-spacing: 0.16em !important; } .katex * { letter-spacing: 0 !important; }',
      );
      document.adoptedStyleSheets.push(sheet);
    });
    const cut = await page.evaluate(() =>
      [...document.querySelectorAll<HTMLElement>('.label, .source, .tag, .title-block dd, .sections button, .bars button')]
        .filter((element) => getComputedStyle(element).overflow === 'hidden' && element.scrollHeight > element.clientHeight + 1)
        .map((element) => element.textContent),
    );
    expect(cut).toEqual([]);
    const widths = await page.evaluate(() => [document.documentElement.scrollWidth, document.documentElement.clientWidth]);
    expect(widths[0]).toBe(widths[1]);
    await close();
  });
});

describe('print', () => {
  it('gives numbered pages with the name of the sheet at the head, every case with its numbers, and no desk', async () => {
    const { page, close } = await open(browser, { colorScheme: 'dark' });
    // The page is printed as it is when a user asks for it, from the middle of the sheet.
    await page.evaluate(() => scrollTo(0, 4000));
    const pdf = await page.pdf({ preferCSSPageSize: true, printBackground: true });
    await close();
    const text = readPdf(pdf);
    expect(text.pages).toBeGreaterThan(5);
    for (let number = 1; number <= text.pages; number += 1)
      expect(text.of[number - 1]).toContain(`page ${number} of ${text.pages}`);
    for (const one of text.of) {
      expect(one).toContain('CS-014 rev P1');
      expect(one).toContain('for checking');
      expect(one).not.toContain('Open points');
      expect(one).not.toContain('To the sheet');
    }
    // A4: 595 by 842 points.
    expect(text.size).toEqual([595, 842]);
    // No step is split: its title and its results stand on one page, and it is there once.
    const plain = (words: string) => words.replace(/[\s\u202f]+/gu, '');
    const pages = text.of.map(plain);
    for (const step of recordWith({}).steps.filter((one) => one.numeric)) {
      const on = pages.filter((one) => one.includes(plain(`${step.number}${step.title}`)));
      // A criterion stands in the list at the head as well.
      expect(on.length, `${step.number} ${step.title}`).toBe(step.kind === 'criterion' && on.length === 2 ? 2 : 1);
      for (const each of step.cases) expect(on.at(-1)).toContain(plain(each.result ?? '').replace(/[⁰¹²³⁴⁵⁶⁷⁸⁹⁻]/gu, ''));
    }
    // What goes into 6.2 differs between the cases: both lines of numbers are printed.
    const pull = recordWith({}).steps.find((step) => step.name === 'F_u');
    const least = pages.find((one) => one.includes(plain('Least tight-side force'))) ?? '';
    expect(pull?.cases[0]?.result).not.toBe(pull?.cases[1]?.result);
    for (const each of pull?.cases ?? []) expect(least).toContain(`(${plain(each.result ?? '')})×`);
  });
});

describe('the first screen', () => {
  it('needs at most 250 kB of compressed script, and formulas their faces as woff2 alone', async () => {
    const context = await browser.newContext();
    const page = await context.newPage();
    let bytes = 0;
    const files: string[] = [];
    const waiting: Promise<void>[] = [];
    page.on('response', (response) => {
      files.push(new URL(response.url()).pathname);
      if (response.request().resourceType() === 'script') {
        waiting.push(
          response.body().then((body) => {
            bytes += gzipSync(body, { level: 9 }).length;
          }),
        );
      }
    });
    await page.goto(inject('url'), { waitUntil: 'networkidle' });
    await Promise.all(waiting);
    await context.close();
    expect(bytes).toBeGreaterThan(50_000);
    expect(bytes).toBeLessThanOrEqual(250_000);
    const faces = files.filter((file) => /woff|ttf|otf/u.test(file));
    expect(faces.length).toBeGreaterThan(4);
    expect(faces.filter((file) => !file.endsWith('.woff2'))).toEqual([]);
  });
});
