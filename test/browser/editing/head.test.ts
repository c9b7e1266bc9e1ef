// The head of the sheet and its words on the page: cases, title block, settings, references, headings, notes. Kept as the file has it.

import type { Browser, Page } from 'playwright-core';
import { afterAll, afterEach, beforeAll, beforeEach, expect, it } from 'vitest';
import { connect, example, type Opened, open } from '../open.ts';
import { focusedRow, rowOn, said, toLine, undoButton } from './page-kit.ts';

let browser: Browser;
let opened: Opened;
let page: Page;

beforeAll(async () => {
  browser = await connect();
});
afterAll(() => browser.close());
beforeEach(async () => {
  opened = await open(browser);
  page = opened.page;
});
afterEach(async () => {
  const { requests, violations, faults } = opened;
  await opened.close();
  expect([requests, violations, faults]).toEqual([[], [], []]);
});

const heads = () => page.locator('.columns .result').allTextContents();
const part = () => page.locator('.cases-part');
const titles = () => part().locator('.case-title').allTextContents();
const own = (example.cases ?? []).map(({ title }) => title ?? '');
const plain = (texts: readonly string[]) => texts.map((text) => text.trim());

it('cases are added, named, put in order, renamed and removed; columns and undo follow', async () => {
  await part().getByRole('button', { name: 'Add a case' }).click();
  await expect.poll(() => page.evaluate(() => document.activeElement?.getAttribute('aria-label'))).toBe('Title of case 3');
  await page.keyboard.type('Emergency stop');
  await page.keyboard.press('Enter');
  await expect.poll(async () => plain(await heads())).toEqual([...own, 'Emergency stop']);
  await part().getByRole('button', { name: 'Up: Emergency stop' }).click();
  await expect.poll(async () => plain(await titles())).toEqual([own[0], 'Emergency stop', own[1]]);
  await expect.poll(() => page.evaluate(() => document.activeElement?.getAttribute('aria-label'))).toBe('Up: Emergency stop');

  await part()
    .getByRole('button', { name: /^Id of case 2/u })
    .click();
  await page.keyboard.type('no id');
  await expect.poll(() => part().locator('.here-fault').first().textContent()).toContain('cannot be the id of a case');
  await page.keyboard.press('Control+a');
  await page.keyboard.type('stop');
  await page.keyboard.press('Enter');
  await expect.poll(() => part().locator('[data-case="stop"]').count()).toBe(1);

  await part()
    .getByRole('button', { name: `Remove: ${own[1]}` })
    .click();
  await expect.poll(() => said(page)).toContain('undo brings them back');
  await expect.poll(async () => plain(await heads())).toEqual([own[0], 'Emergency stop']);
  expect(await page.evaluate(() => document.activeElement?.closest('.cases-part') !== null)).toBe(true);
  for (let i = 0; i < 10 && (await undoButton(page).isEnabled()); i += 1) await undoButton(page).click();
  await expect.poll(async () => plain(await heads())).toEqual(own);
});

it('the title block is typed where it stands, kept at once, printed as typed, and Escape puts back', async () => {
  const document_ = page.locator('.title-block').getByRole('button', { name: /^Document:/u });
  await document_.click();
  await page.keyboard.type('CS-<b>99</b>');
  await page.keyboard.press('Enter');
  await expect.poll(() => document_.textContent()).toBe('CS-<b>99</b>');
  expect(await page.evaluate(() => document.activeElement?.getAttribute('aria-label'))).toContain('Document: CS-<b>99</b>');
  expect(await page.locator('.title-block b').count()).toBe(0);
  expect(await undoButton(page).getAttribute('title')).toBe('Undo: document number');
  const client = page.locator('.title-block').getByRole('button', { name: /^Client:/u });
  await client.click();
  await page.keyboard.type('Harbour office');
  await expect.poll(() => said(page)).toContain('client kept');
  await page.keyboard.press('Escape');
  await expect.poll(() => client.textContent()).toBe('–');
  await page
    .locator('.title-block')
    .getByRole('button', { name: /^Status:/u })
    .click();
  await page.locator('.title-block select').selectOption('in preparation');
  await expect.poll(() => page.locator('.bar .document').textContent()).toContain('in preparation');
  await page.evaluate(() => dispatchEvent(new Event('beforeprint')));
  await expect.poll(() => page.locator('.title-block').textContent()).toContain('CS-<b>99</b>');
  expect(await page.locator('.title-block button, .cases-part, .references-part button').count()).toBe(0);
  await page.evaluate(() => dispatchEvent(new Event('afterprint')));
});

it('another decimal sign writes every number anew and changes no result', async () => {
  const results = () => page.locator('ts-row.derived .result .value').allTextContents();
  const before = await results();
  await page.locator('.settings summary').click();
  await page.getByRole('button', { name: /^Decimal sign:/u }).click();
  await page.locator('.settings select').selectOption(',');
  await expect.poll(async () => (await results()).join('\n')).toBe(before.join('\n').replaceAll('.', ','));
  expect(await page.locator('ts-row .problem.error').count()).toBe(0);
});

it('references are added, renamed with their citations, and removed', async () => {
  const refs = page.locator('.references-part');
  const cited = await page.locator('a.reference', { hasText: '[R5]' }).count();
  expect(cited).toBeGreaterThan(0);
  await refs.getByRole('button', { name: /^Id of reference 5:/u }).click();
  await page.keyboard.type('B5');
  await page.keyboard.press('Enter');
  await expect.poll(() => page.locator('a.reference', { hasText: '[B5]' }).count()).toBe(cited);
  expect(await page.locator('a.reference', { hasText: '[R5]' }).count()).toBe(0);
  await refs.getByRole('button', { name: 'Add a reference' }).click();
  await expect.poll(() => page.evaluate(() => document.activeElement?.getAttribute('aria-label'))).toBe('Document of R13');
  await page.keyboard.type('Site notes 7');
  await page.keyboard.press('Enter');
  await expect.poll(() => refs.locator('#ref-R13').textContent()).toContain('Site notes 7');
  await refs.getByRole('button', { name: 'Remove: B5' }).click();
  await expect.poll(() => said(page)).toContain('B5 removed; it is still cited in');
  expect(await page.evaluate(() => document.activeElement?.closest('.references-part') !== null)).toBe(true);
});

it('a note is typed with a live value behind a brace; markup in it stays text', async () => {
  const note = example.cells.find((cell) => cell.kind === 'note')?.id ?? '';
  await toLine(page, note);
  await page.keyboard.press('Enter');
  await rowOn(page, note).locator('textarea').waitFor();
  await page.keyboard.press('Control+a');
  await page.keyboard.type('Hoop {C');
  await rowOn(page, note).locator('.edit-fixes').getByRole('button', { name: 'C', exact: true }).click();
  await page.keyboard.type(' <img src=x onerror=alert(1)> **strong**\n\n- one\n  - below');
  const preview = rowOn(page, note).locator('.preview');
  await expect.poll(() => preview.textContent()).toMatch(/Hoop 950\smm <img src=x onerror=alert\(1\)> strong/u);
  await expect.poll(() => preview.locator('li li').textContent()).toBe('below');
  expect(await preview.locator('img').count()).toBe(0);
  await page.keyboard.press('Control+Enter');
  await expect.poll(() => focusedRow(page)).toBe(note);
  await expect.poll(() => rowOn(page, note).locator('.prose strong').textContent()).toBe('strong');
  expect(await rowOn(page, note).locator('textarea').count()).toBe(0);
  await page.keyboard.press('Control+z');
  await expect.poll(() => undoButton(page).isEnabled()).toBe(false);
});

it('a heading is typed where it stands, with its rank', async () => {
  const heading = example.cells.filter((cell) => cell.kind === 'heading')[2]?.id ?? '';
  await toLine(page, heading);
  await page.keyboard.press('Enter');
  await rowOn(page, heading).locator('input').waitFor();
  await page.keyboard.press('Control+a');
  await page.keyboard.type('Lengths');
  await page.keyboard.press('Enter');
  await expect.poll(() => focusedRow(page)).toBe(heading);
  await expect.poll(() => rowOn(page, heading).locator('h2').textContent()).toContain('Lengths');
  await expect.poll(() => page.locator('.outline').textContent()).toContain('Lengths');
});
