// What the page promises everybody: no findings of the accessibility rules, no sideways scrolling on a phone, a print with page numbers,
// a small first screen.

import { readFileSync } from 'node:fs';
import { createRequire } from 'node:module';
import { gzipSync } from 'node:zlib';
import type { Browser, Page } from 'playwright-core';
import { afterAll, beforeAll, describe, expect, inject, it } from 'vitest';
import { type Sheet, writeSheet } from '../../src/sheet/index.ts';
import { connect, drop, open, recordWith } from './open.ts';
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

/** A sheet with a line of every kind in every state: quick to examine, and more than one example shows. */
const everyKind: Sheet = {
  format: 'tightside-sheet/1',
  title: 'Every kind of line',
  purpose: 'Shows **every** kind of line.\n\n- one\n- two',
  method: 'By hand [R1].',
  status: 'for checking',
  references: [{ id: 'R1', document: 'Handbook', edition: '2020', title: 'Chapter 1' }],
  titleBlock: { documentNumber: 'T-1', revision: 'A', organisation: 'Works', date: '2026-12-01' },
  cases: [
    { id: 'run', title: 'Steady running' },
    { id: 'start', title: 'Start-up' },
  ],
  cells: [
    { id: 'h1', kind: 'heading', level: 1, text: 'Givens' },
    { id: 'n1', kind: 'note', text: 'An assumption with `code`.', role: 'assumption' },
    { id: 'n2', kind: 'note', text: 'A caution.', role: 'caution' },
    { id: 'h2', kind: 'heading', level: 2, text: 'Second level' },
    {
      id: 'g1',
      kind: 'given',
      name: 'a',
      title: 'Length',
      value: '2 m',
      unit: 'm',
      basis: 'assumed',
      source: '[R1] table 1',
      toConfirm: 'P-1',
    },
    {
      id: 'g2',
      kind: 'given',
      name: 'b',
      title: 'Width',
      value: '3 m',
      byCase: { start: '4 m' },
      unit: 'm',
      source: 'drawing',
      carriedOver: true,
    },
    { id: 'g3', kind: 'given', name: 'c', title: 'Without a source', value: '1 kg', range: '2 kg to 3 kg' },
    {
      id: 't1',
      kind: 'table',
      name: 'pairs',
      title: 'Pairs',
      columns: [
        { name: 'pair', title: 'Pair' },
        { name: 'mu', title: 'Friction', unit: '1' },
      ],
      rows: Array.from({ length: 20 }, (_, row) => [`pair ${row}`, `0.${10 + row}`]),
      source: '[R1]',
    },
    { id: 'g4', kind: 'given', name: 'pair', title: 'Chosen pair', value: 'pair 3', choices: 'pairs.pair', source: 'drawing' },
    { id: 'h3', kind: 'heading', level: 1, text: 'Derived' },
    { id: 'd1', kind: 'derived', name: 'A', title: 'Area', formula: 'a*b', unit: 'm^2', source: 'rectangle' },
    {
      id: 'd2',
      kind: 'derived',
      name: 'w',
      title: 'Wide',
      formula: '(a + b + a + b)*(a - b)*(a + b)*(a + b)/((a + 2*b)*(a + 3*b)*(a + 4*b)*(a + 5*b))',
      source: 'nowhere',
    },
    { id: 'd3', kind: 'derived', name: 'x', title: 'Wrong', formula: 'a + c', source: 'nowhere' },
    { id: 'd4', kind: 'derived', name: 'y', title: 'Waiting', formula: '2*x', source: 'nowhere' },
    { id: 'd5', kind: 'derived', name: 'z', title: 'Branch', formula: 'a > b ? a : b', source: 'nowhere' },
    { id: 'k1', kind: 'criterion', title: 'Met', left: 'A', relation: '<=', right: '"20 m^2"', source: 'brief' },
    {
      id: 'k2',
      kind: 'criterion',
      title: 'Not met in one case',
      left: 'A',
      relation: '<=',
      right: '"7 m^2"',
      source: 'brief',
      justification: 'agreed',
    },
    { id: 'k3', kind: 'criterion', title: 'Without a verdict', left: 'y', relation: '<=', right: '"7 m"', source: 'brief' },
    { id: 'w1', kind: 'drawing', title: 'Drawing', layout: 'two pulleys, open belt', uses: { driver: 'a' } },
  ],
  conclusion: 'It holds.',
};

describe('accessibility rules', () => {
  it.each([
    ['light', 1440],
    ['dark', 1440],
    ['light', 800],
    ['dark', 320],
  ] as const)(
    'find nothing, %s at %i px, in any kind of line and of typing',
    { timeout: 240_000 },
    async (colorScheme, width) => {
      const { page, close } = await open(browser, { colorScheme, viewport: { width, height: 900 } });
      await drop(page, 'every.sheet.json', writeSheet(everyKind));
      await page.waitForSelector('ts-row[data-cell="k3"]', { state: 'attached' });
      const row = (cell: string) => page.locator(`ts-row[data-cell="${cell}"]`);
      await row('d1').locator('.label').click();
      expect(await findings(page), 'a derived line chosen').toEqual([]);
      await row('g1').locator('.result').first().click();
      await page.locator('.typing').fill('2 metrex');
      await page.waitForSelector('.editor-problems .error');
      expect(await findings(page), 'an error typed').toEqual([]);
      await page.locator('.typing').press('Enter');
      await page.waitForSelector('.unread');
      expect(await findings(page), 'an error kept').toEqual([]);
      await row('g4').locator('.choice').click();
      expect(await findings(page), 'a choice open').toEqual([]);
      await page.locator('.typing').press('Escape');
      await row('g3').locator('.source').click();
      await page.waitForSelector('textarea.typing');
      expect(await findings(page), 'a source open').toEqual([]);
      await close();
    },
  );

  it('find nothing in the whole example', { timeout: 240_000 }, async () => {
    const { page, close } = await open(browser);
    expect(await findings(page)).toEqual([]);
    await close();
  });
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
    const sizes = new Map<string, number>();
    const files: string[] = [];
    const waiting: Promise<void>[] = [];
    page.on('response', (response) => {
      files.push(new URL(response.url()).pathname);
      if (response.request().resourceType() === 'script') {
        waiting.push(
          response.body().then((body) => {
            sizes.set(response.url(), gzipSync(body, { level: 9 }).length);
          }),
        );
      }
    });
    await page.goto(inject('url'), { waitUntil: 'networkidle' });
    await Promise.all(waiting);
    // What was asked for before the first frame was drawn; the editing pieces follow it.
    const first = await page.evaluate(() => {
      const stood = performance.getEntriesByName('first screen')[0]?.startTime ?? Number.POSITIVE_INFINITY;
      return performance.getEntriesByType('resource').flatMap((entry) => (entry.startTime <= stood ? [entry.name] : []));
    });
    await context.close();
    const bytes = first.reduce((sum, name) => sum + (sizes.get(name) ?? 0), 0);
    expect(bytes).toBeGreaterThan(50_000);
    expect(bytes).toBeLessThanOrEqual(250_000);
    const faces = files.filter((file) => /woff|ttf|otf/u.test(file));
    expect(faces.length).toBeGreaterThan(4);
    expect(faces.filter((file) => !file.endsWith('.woff2'))).toEqual([]);
  });
});
