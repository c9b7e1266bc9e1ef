// Opens the built page as a user's browser does, and listens to what a page must not do: ask the network after it has loaded, break its
// own policy, throw.

import { readFileSync } from 'node:fs';
import { type Browser, type BrowserContextOptions, chromium, type Page } from 'playwright-core';
import { inject } from 'vitest';
import { makeRecord, type RecordModel } from '../../src/record/index.ts';
import { calculate, readSheet, type Sheet } from '../../src/sheet/index.ts';
import { solver } from '../../src/study/index.ts';

export interface Opened {
  readonly page: Page;
  /** Requests since the page stood complete. */
  readonly requests: readonly string[];
  readonly violations: readonly string[];
  readonly faults: readonly string[];
  close(): Promise<void>;
}

export const connect = (): Promise<Browser> => chromium.connect(inject('endpoint'));

export async function open(browser: Browser, options: BrowserContextOptions = {}): Promise<Opened> {
  const context = await browser.newContext({ viewport: { width: 1440, height: 930 }, reducedMotion: 'reduce', ...options });
  const page = await context.newPage();
  const requests: string[] = [];
  const violations: string[] = [];
  const faults: string[] = [];
  page.on('pageerror', (fault) => faults.push(fault.message));
  page.on('console', (message) => {
    if (message.type() === 'error' || message.type() === 'warning')
      (/Content Security Policy/u.test(message.text()) ? violations : faults).push(message.text());
  });
  await page.exposeFunction('tellViolation', (text: string) => violations.push(text));
  await page.addInitScript(() => {
    // The dialogs of the system cannot be worked from here: files are saved as downloads, as in browsers without them.
    Reflect.deleteProperty(globalThis, 'showSaveFilePicker');
    Reflect.deleteProperty(globalThis, 'showOpenFilePicker');
    addEventListener('securitypolicyviolation', (event) => {
      const tell = (globalThis as unknown as { tellViolation(text: string): void }).tellViolation;
      tell(`${event.effectiveDirective} ${event.blockedURI} ${event.sample}`);
    });
  });
  await page.goto(inject('url'), { waitUntil: 'networkidle' });
  // Rows beyond the window are there without being drawn yet.
  await page.waitForSelector('ts-row .result', { state: 'attached' });
  await page.evaluate(() => document.fonts.ready.then(() => undefined));
  page.on('request', (request) => requests.push(request.url()));
  return { page, requests, violations, faults, close: () => context.close() };
}

/** Drops a file on the page, as a user does who has no dialog. */
export const drop = (page: Page, name: string, text: string): Promise<void> =>
  page.evaluate(
    ([which, what]) => {
      const data = new DataTransfer();
      data.items.add(new File([what], which, { type: 'application/json' }));
      dispatchEvent(new DragEvent('drop', { dataTransfer: data, bubbles: true, cancelable: true }));
    },
    [name, text] as const,
  );

const read = readSheet(readFileSync(new URL('../../src/view/example.sheet.json', import.meta.url), 'utf8'));
if (!read.ok) throw new Error('the example cannot be read');
export const example: Sheet = read.value;

/** The record of the example with values changed, computed here in Node. */
export function recordWith(values: Readonly<Record<string, string>>): RecordModel {
  const changed = new Map(Object.entries(values));
  const cells = example.cells.map((cell) => {
    if (cell.kind !== 'given' || !changed.has(cell.name)) return cell;
    const {
      basis: _basis,
      source: _source,
      toConfirm: _toConfirm,
      distribution: _distribution,
      carriedOver: _carriedOver,
      ...rest
    } = cell;
    return { ...rest, value: changed.get(cell.name) ?? '' };
  });
  return makeRecord(calculate({ ...example, cells }, solver));
}

export const idOf = (name: string): string => {
  const cell = example.cells.find((one) => 'name' in one && one.name === name);
  if (cell === undefined) throw new Error(`the example has no ${name}`);
  return cell.id;
};

/** The printed results of every numeric line on the page, by cell. */
export const resultsOn = (page: Page): Promise<Record<string, string[]>> =>
  page.evaluate(() => {
    const superscript = new Map([...'0123456789−+'].map((sign, index) => [sign, [...'⁰¹²³⁴⁵⁶⁷⁸⁹⁻⁺'][index] ?? '']));
    const text = (node: Node): string => {
      if (node.nodeName === 'SUP') return [...(node.textContent ?? '')].map((sign) => superscript.get(sign) ?? sign).join('');
      return node.nodeType === Node.TEXT_NODE ? (node.nodeValue ?? '') : [...node.childNodes].map(text).join('');
    };
    const found: Record<string, string[]> = {};
    for (const row of document.querySelectorAll<HTMLElement>('ts-row.step')) {
      const cells = [...row.querySelectorAll('.result .value')];
      if (cells.length > 0)
        found[row.dataset['cell'] ?? ''] = cells.map((cell) =>
          text(cell)
            .replace(/[ \n]+/gu, ' ')
            .trim(),
        );
    }
    return found;
  });

/** What the page should print for a record. */
export function resultsOf(model: RecordModel): Record<string, string[]> {
  const found: Record<string, string[]> = {};
  for (const step of model.steps) {
    const cell = example.cells.find((one) => one.id === step.cell);
    if (cell?.kind === 'given' && cell.choices !== undefined) continue;
    found[step.cell] = step.cases.map((each) => {
      if (each.result === null) return cell?.kind === 'given' ? cell.value : 'no value';
      if (step.kind !== 'criterion') return each.result;
      return `${each.met ? 'met' : 'not met'} ${each.result}`;
    });
  }
  return found;
}
