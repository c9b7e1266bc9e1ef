// The editing pieces in a real browser under the page's own policy: typed with the keyboard, with problems, corrections and proposals.

import { mkdtempSync, readFileSync, rmSync } from 'node:fs';
import { createRequire } from 'node:module';
import { tmpdir } from 'node:os';
import { join } from 'node:path';
import { fileURLToPath } from 'node:url';
import type { Browser, BrowserContext, BrowserContextOptions, Page } from 'playwright-core';
import { build } from 'vite';
import { afterAll, afterEach, beforeAll, beforeEach, describe, expect, it } from 'vitest';
// @ts-expect-error plain JavaScript, shared with `npm start`
import { serve } from '../../src/cli/serve.mjs';
import { connect } from './open.ts';

let browser: Browser;
let context: BrowserContext;
let page: Page;
let server: { url: string; close(): Promise<void> };
let folder = '';
let faults: string[] = [];
let violations: string[] = [];

beforeAll(async () => {
  folder = mkdtempSync(join(tmpdir(), 'editing-'));
  const mode = process.env['NODE_ENV'];
  process.env['NODE_ENV'] = 'production';
  await build({
    root: fileURLToPath(new URL('./editing', import.meta.url)),
    configFile: false,
    base: './',
    logLevel: 'error',
    build: { outDir: folder, emptyOutDir: true, target: 'es2022', assetsInlineLimit: 0, modulePreload: { polyfill: false } },
  });
  process.env['NODE_ENV'] = mode;
  server = await serve(folder);
  browser = await connect();
});
afterAll(async () => {
  await browser.close();
  await server.close();
  rmSync(folder, { recursive: true, force: true });
});

async function open(options: BrowserContextOptions = {}) {
  context = await browser.newContext({ viewport: { width: 1200, height: 900 }, reducedMotion: 'reduce', ...options });
  page = await context.newPage();
  faults = [];
  violations = [];
  page.on('pageerror', (fault) => faults.push(fault.message));
  page.on('console', (message) => {
    if (message.type() === 'error' || message.type() === 'warning')
      (/Content Security Policy/u.test(message.text()) ? violations : faults).push(message.text());
  });
  await page.exposeFunction('tellViolation', (text: string) => violations.push(text));
  await page.addInitScript(() => {
    addEventListener('securitypolicyviolation', (event) => {
      (globalThis as unknown as { tellViolation(text: string): void }).tellViolation(
        `${event.effectiveDirective} ${event.blockedURI}`,
      );
    });
  });
  await page.goto(server.url, { waitUntil: 'networkidle' });
  await page.waitForSelector('ts-formula-editor .cm-content');
}
beforeEach(() => open());
afterEach(async () => {
  await context.close();
  expect(violations, 'breaches of the policy').toEqual([]);
  expect(faults, 'faults').toEqual([]);
});

const part = (label: string) => page.locator(`section[aria-label="${label}"]`);
const line = (label: string) => part(label).locator('.cm-content');
const words = (label: string) => part(label).locator('.edit-words').textContent();
interface Told {
  readonly name: string;
  readonly detail: Record<string, unknown>;
}
const told = (name: string): Promise<Told[]> =>
  page.evaluate((wanted) => (globalThis as unknown as { told: Told[] }).told.filter((one) => one.name === wanted), name);
const textOf = (label: string) => line(label).evaluate((element) => element.textContent);

async function retype(label: string, text: string) {
  await line(label).click();
  await page.keyboard.press('Control+a');
  await page.keyboard.press('Delete');
  await page.keyboard.type(text);
}

describe('a formula in edit', () => {
  it('shows the line as it will print, its units in words and that it closes', async () => {
    await expect.poll(() => words('formula')).toContain('force = force − force, units agree · closes with the printed digits');
    expect(await part('formula').locator('annotation').textContent()).toContain('900');
    expect(await line('formula').getAttribute('aria-label')).toBe('Formula of F_u');
    expect(await line('formula').getAttribute('aria-multiline')).toBe('false');
    expect(await line('formula').getAttribute('aria-invalid')).toBe('false');
  });

  it('follows every key stroke, tells the host, and leaves the sheet alone', async () => {
    await retype('formula', 'F_1/2');
    await expect.poll(() => part('formula').locator('annotation').textContent()).toContain('450');
    const drafts = await told('formula draft');
    expect(drafts.at(-1)?.detail).toMatchObject({
      text: 'F_1/2',
      keys: { formula: 'F_1/2' },
      results: ['450.0\u00a0N', '675.0\u00a0N'],
    });
    expect(drafts.length).toBeGreaterThanOrEqual(5);
  });

  it('underlines a problem at its place, says it in a sentence, and a key applies the correction', async () => {
    await retype('formula', 'F_1 - F_22');
    await expect.poll(() => words('formula')).toMatch(/Error.*F_22/u);
    expect(await part('formula').locator('.cm-lintRange-error').textContent()).toBe('F_22');
    expect(await line('formula').getAttribute('aria-invalid')).toBe('true');
    const described = await line('formula').evaluate((element) =>
      (element as unknown as { ariaDescribedByElements: Element[] | null }).ariaDescribedByElements
        ?.map((one) => one.textContent)
        .join(' '),
    );
    expect(described).toContain('F_22');
    await page.keyboard.press('Alt+Enter');
    expect(await textOf('formula')).toBe('F_1 - F_2');
    await expect.poll(() => words('formula')).toContain('units agree');
    await page.keyboard.press('Control+z');
    expect(await textOf('formula')).toBe('F_1 - F_22');
  });

  it('leads by the arrow down to the corrections under the line, and back', async () => {
    await retype('formula', 'log(F_1/F_2)*F_1');
    await expect
      .poll(() => part('formula').locator('.edit-fixes button').allTextContents())
      .toEqual(['write ln(F_1/F_2)', 'write log10(F_1/F_2)']);
    await page.keyboard.press('ArrowDown');
    await page.keyboard.press('ArrowRight');
    expect(await page.evaluate(() => document.activeElement?.textContent)).toBe('write log10(F_1/F_2)');
    await page.keyboard.press('ArrowUp');
    expect(await page.evaluate(() => document.activeElement?.tagName)).toBe('TS-LINE-EDITOR');
    await page.keyboard.press('ArrowDown');
    await page.keyboard.press('Enter');
    expect(await textOf('formula')).toBe('ln(F_1/F_2)*F_1');
  });

  it('offers names by their beginning and by their title, and takes one where it was chosen', async () => {
    await retype('formula', 'F_1*fric');
    const options = part('formula').locator('[role="option"]');
    await expect.poll(() => options.allTextContents()).toEqual([expect.stringContaining('mu_1')]);
    expect(await options.first().textContent()).toContain('Coefficient of friction · 0.30');
    await page.keyboard.press('ArrowDown');
    await expect.poll(() => line('formula').getAttribute('aria-activedescendant')).not.toBeNull();
    await page.keyboard.press('Enter');
    expect(await textOf('formula')).toBe('F_1*mu_1');
    expect(await told('formula commit')).toEqual([]);
  });

  it('hangs its list above everything, beyond the section that the line stands in', async () => {
    await retype('entry', 'x = F');
    const list = part('entry').locator('.cm-tooltip-autocomplete');
    await expect.poll(() => list.count()).toBe(1);
    await expect.poll(() => list.evaluate((element) => element.getBoundingClientRect().height)).toBeGreaterThan(40);
    const seen = await list.evaluate((element) => {
      const box = element.getBoundingClientRect();
      const section =
        element.getRootNode() instanceof ShadowRoot ? (element.getRootNode() as ShadowRoot).host.closest('section') : null;
      const bottom = section?.getBoundingClientRect().bottom ?? Number.NaN;
      const hit = document.elementFromPoint(box.left + 20, box.bottom - 8);
      return { beyond: box.bottom > bottom, hit: hit?.tagName };
    });
    expect(seen).toEqual({ beyond: true, hit: 'TS-LINE-EDITOR' });
  });

  it('keeps on Enter what was typed, although a list stands open', async () => {
    await retype('formula', 'mu_1*F');
    await expect.poll(() => part('formula').locator('[role="option"]').count()).toBeGreaterThan(0);
    await page.keyboard.press('Enter');
    expect((await told('formula commit')).at(-1)?.detail).toMatchObject({ keys: { formula: 'mu_1*F' } });
  });

  it('offers units inside quotation marks, tables and columns inside a lookup', async () => {
    await retype('formula', 'F_1 + "3 k');
    await expect.poll(() => part('formula').locator('[role="option"]').allTextContents()).toContain('kNforce');
    await retype('formula', 'F_1*entry(');
    await page.keyboard.press('Control+Space');
    await expect.poll(() => part('formula').locator('.cm-completionLabel').allTextContents()).toEqual(['surfaces']);
    await page.keyboard.press('ArrowDown');
    await page.keyboard.press('Enter');
    await expect.poll(() => part('formula').locator('.cm-completionLabel').allTextContents()).toEqual(['surface', 'mu_dry']);
  });

  it('is one line: a break that is pasted is a space', async () => {
    await line('formula').click();
    await page.keyboard.press('Control+a');
    await line('formula').evaluate((element) => {
      const data = new DataTransfer();
      data.setData('text/plain', 'F_1 -\n  F_2\r\n- F_2');
      element.dispatchEvent(new ClipboardEvent('paste', { clipboardData: data, bubbles: true, cancelable: true }));
    });
    expect(await textOf('formula')).toBe('F_1 - F_2 - F_2');
    expect(await part('formula').locator('.cm-line').count()).toBe(1);
  });

  it('is taken back by Escape to what stood there', async () => {
    await retype('formula', 'F_1*2 ');
    await page.keyboard.press('Escape');
    await expect.poll(() => textOf('formula')).toBe('F_1 - F_2');
    expect((await told('formula cancel')).at(-1)?.detail).toMatchObject({ text: 'F_1 - F_2' });
  });

  it('is left by Tab, without a change', async () => {
    await line('formula').click();
    await page.keyboard.press('Tab');
    expect(await page.evaluate(() => document.activeElement?.closest('section')?.getAttribute('aria-label'))).not.toBe('formula');
    expect(await told('formula draft')).toEqual([]);
  });

  it('that would go round in a loop says so', async () => {
    await retype('formula', 'F_u + F_1 ');
    await expect.poll(() => words('formula')).toContain('defined by itself');
  });

  it('of a criterion has two sides', async () => {
    await retype('criterion', 'F_u + F_2 >= mu_1');
    await expect.poll(() => words('criterion')).toMatch(/Error.*force.*number/u);
    await retype('criterion', 'F_u >= F_1/2 ');
    await expect.poll(() => words('criterion')).toContain('met');
    await page.keyboard.press('Enter');
    expect((await told('criterion commit')).at(-1)?.detail).toMatchObject({
      keys: { left: 'F_u', relation: '>=', right: 'F_1/2' },
    });
  });
});

describe('the empty line', () => {
  const becomes = () => part('entry').locator('.edit-becomes').textContent();

  it('says what it will become, and writes a section with the keyboard alone', async () => {
    await line('entry').click();
    const write = async (text: string, says: RegExp) => {
      await page.keyboard.type(text);
      await expect.poll(becomes).toMatch(says);
      await page.keyboard.press('Enter');
      await expect.poll(becomes).toContain('or a note');
    };
    await write('# Speed ', /becomes a heading/u);
    await write('d_3 = 400 mm ; Idler ', /becomes a given: a length \(mm\), 400/u);
    await write('v [m/s] = pi*d_3*n_1 ; Belt speed ', /derived quantity: speed = .*units agree · 30\.37/u);
    await write('v <= "40 m/s" ; Belt speed ', /criterion: speed.* · met/u);
    await write('The belt runs at {v}. ', /becomes a note/u);
    const kinds = await page.evaluate(() =>
      (globalThis as unknown as { sheetNow(): { cells: { kind: string }[] } })
        .sheetNow()
        .cells.slice(-5)
        .map((cell) => cell.kind),
    );
    expect(kinds).toEqual(['heading', 'given', 'derived', 'criterion', 'note']);
  });

  it('corrects a unit by a key', async () => {
    await retype('entry', 'P_3 = 5 kWw ');
    await expect.poll(() => words('entry')).toMatch(/Error.*kWw/u);
    await page.keyboard.press('Alt+Enter');
    expect(await textOf('entry')).toMatch(/^P_3 = 5 kW\s*$/u);
  });
});

describe('the fields of a cell', () => {
  it('change every key of a given, with problems and corrections beside the field', async () => {
    const fields = part('fields g3');
    await fields.getByLabel('Value for all cases').fill('900 newtons');
    await expect.poll(() => fields.locator('[data-key="value"] .edit-words').textContent()).toMatch(/Error.*newtons/u);
    await fields.getByLabel('Value for all cases').press('Alt+Enter');
    await expect.poll(() => fields.getByLabel('Value for all cases').inputValue()).toMatch(/^900 N/u);
    await fields.getByLabel('Value for all cases').fill('950 N');
    await fields.getByLabel('Only for Start-up').fill('');
    await fields.getByLabel('Basis').selectOption('measured');
    await fields.getByLabel('Source').fill('Trial 07');
    await fields.getByLabel('Title').press('Enter');
    const detail = (await told('fields g3 commit')).at(-1)?.detail as { cell: unknown; renamed?: unknown };
    expect(detail.cell).toEqual({
      id: 'g3',
      kind: 'given',
      name: 'F_1',
      title: 'Tight side',
      value: '950 N',
      basis: 'measured',
      source: 'Trial 07',
    });
    expect(detail.renamed).toBeUndefined();
    await fields.getByLabel('Name').fill('F_2');
    await expect.poll(() => fields.locator('[data-key="name"] .edit-words').textContent()).toContain('already defined');
    await fields.getByLabel('Name').fill('F_t');
    await fields.getByRole('button', { name: 'Keep' }).click();
    expect((await told('fields g3 commit')).at(-1)?.detail['renamed']).toEqual({ from: 'F_1', to: 'F_t' });
  });

  it('show a note as it prints, with live values, and never as markup', async () => {
    const fields = part('fields n1');
    await expect.poll(() => fields.locator('.preview strong').textContent()).toContain('600');
    await fields.getByLabel('Text').fill('<img src=x onerror="told.push(1)"> *{mu_1}*');
    await expect.poll(() => fields.locator('.preview em').textContent()).toBe('0.30');
    expect(await fields.locator('.preview img').count()).toBe(0);
    await fields.getByLabel('Text').press('Escape');
    await expect.poll(() => fields.getByLabel('Text').inputValue()).toContain('{F_u}');
  });

  it('fill a table from a block that is pasted', async () => {
    const fields = part('fields t1');
    await fields.getByLabel('surface, row 2').evaluate((element) => {
      const data = new DataTransfer();
      data.setData('text/plain', 'felt\t0.22\r\ncork\t0.35\r\n');
      element.dispatchEvent(new ClipboardEvent('paste', { clipboardData: data, bubbles: true, cancelable: true }));
    });
    await expect.poll(() => fields.getByLabel('mu_dry, row 3').inputValue()).toBe('0.35');
    await fields.getByLabel('remove row 1').click();
    const cell = (await told('fields t1 draft')).at(-1)?.detail['cell'] as { rows: unknown } | undefined;
    expect(cell?.rows).toEqual([
      ['felt', '0.22'],
      ['cork', '0.35'],
    ]);
  });
});

describe('for everybody', () => {
  const axeSource = readFileSync(createRequire(import.meta.url).resolve('axe-core/axe.min.js'), 'utf8');

  it.each([
    ['light', 1200],
    ['dark', 320],
  ] as const)(
    'no findings of the accessibility rules, %s at %i px, with problems and a list open',
    async (colorScheme, width) => {
      await context.close();
      await open({ colorScheme, viewport: { width, height: 900 } });
      await retype('criterion', 'F_u <= F_3 ');
      await part('fields g3').getByLabel('Value for all cases').fill('900 newtons');
      await retype('formula', 'log(F_1) + F');
      await expect.poll(() => part('formula').locator('[role="option"]').count()).toBeGreaterThan(0);
      await page.evaluate(axeSource);
      const found = await page.evaluate(async () => {
        const { axe } = globalThis as unknown as {
          axe: {
            run(
              root: Document,
              options: object,
            ): Promise<{ violations: { id: string; nodes: { html: string; failureSummary: string }[] }[]; passes: unknown[] }>;
          };
        };
        const result = await axe.run(document, { rules: { 'page-has-heading-one': { enabled: false } } });
        return result.passes.length < 15
          ? [`only ${result.passes.length} rules ran`]
          : result.violations.map(
              ({ id, nodes }) => `${id}: ${nodes.map((node) => `${node.html} ${node.failureSummary}`).join(' | ')}`,
            );
      });
      expect(found).toEqual([]);
      const widths = await page.evaluate(() => [document.documentElement.scrollWidth, document.documentElement.clientWidth]);
      expect(widths[0]).toBe(widths[1]);
    },
  );
});
