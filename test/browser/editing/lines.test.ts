// Whole lines on the page, with the keyboard and with the words at the line: after each command the focus is in the grid.

import type { Browser, Page } from 'playwright-core';
import { afterAll, afterEach, beforeAll, beforeEach, describe, expect, it } from 'vitest';
import { readSheet } from '../../../src/sheet/index.ts';
import { connect, example, idOf, type Opened, open } from '../open.ts';
import { focusedRow, focusInGrid, linesOn, rowOn, said, toLine, undoButton } from './page-kit.ts';

let browser: Browser;
let opened: Opened;
let page: Page;
const order = example.cells.map(({ id }) => id);
const first = idOf('n_2');
const at = order.indexOf(first);
const run = order.slice(at, at + 3);

beforeAll(async () => {
  browser = await connect();
});
afterAll(() => browser.close());
beforeEach(async () => {
  opened = await open(browser, { permissions: ['clipboard-read', 'clipboard-write'] });
  page = opened.page;
});
afterEach(async () => {
  const { requests, violations, faults } = opened;
  await opened.close();
  expect([requests, violations, faults]).toEqual([[], [], []]);
});

async function chooseRun() {
  await toLine(page, first);
  await page.keyboard.press('Shift+ArrowDown');
  await page.keyboard.press('Shift+ArrowDown');
  await expect.poll(() => said(page)).toBe('3 lines chosen');
  expect(await page.locator('ts-row[aria-selected="true"]').count()).toBe(3);
}
const takeBack = async (times = 1) => {
  for (let i = 0; i < times; i += 1) await page.keyboard.press('Control+z');
  await expect.poll(() => linesOn(page)).toEqual(order);
  await expect.poll(() => undoButton(page).isEnabled()).toBe(false);
  await expect.poll(() => focusInGrid(page)).toBe(true);
};

describe('a run of lines', () => {
  it('is moved, taken once more, removed, each one step, with the focus in the grid', async () => {
    await chooseRun();
    await page.keyboard.press('Alt+ArrowUp');
    await expect.poll(() => linesOn(page)).toEqual(order.toSpliced(at, 3).toSpliced(at - 1, 0, ...run));
    await expect.poll(() => focusedRow(page)).toBe(run[2]);
    await page.keyboard.press('Alt+ArrowDown');
    await expect.poll(() => linesOn(page)).toEqual(order);
    await page.keyboard.press('Control+Shift+Enter');
    await expect.poll(async () => (await linesOn(page)).length).toBe(order.length + 3);
    await expect.poll(() => said(page)).toContain('n_2 is taken here and became n_2_B');
    expect(await page.locator('.row.told').textContent()).toContain('n_2_B');
    await expect.poll(() => focusInGrid(page)).toBe(true);
    await page.keyboard.press('Control+Delete');
    await expect.poll(() => linesOn(page)).toEqual(order);
    expect(await focusedRow(page)).toBe(order[at + 3]);
    await takeBack(4);
  });

  it('goes through the clipboard as a sheet file and comes back under free names; cut lines come back as they were', async () => {
    await chooseRun();
    await page.keyboard.press('Control+c');
    const copied = await page.evaluate(() => navigator.clipboard.readText());
    const read = readSheet(copied);
    expect(read.ok && read.value.cells.map(({ id }) => id)).toEqual(run);
    await page.keyboard.press('Control+v');
    await expect.poll(async () => (await linesOn(page)).length).toBe(order.length + 3);
    await expect.poll(() => focusInGrid(page)).toBe(true);
    await page.keyboard.press('Control+z');
    await expect.poll(() => linesOn(page)).toEqual(order);

    await chooseRun();
    await page.keyboard.press('Control+x');
    await expect.poll(() => linesOn(page)).toEqual(order.toSpliced(at, 3));
    expect(await focusedRow(page)).toBe(order[at + 3]);
    await page.keyboard.press('Control+v');
    await expect.poll(() => linesOn(page)).toEqual(order.toSpliced(at, 3).toSpliced(at + 1, 0, ...run));
    await expect.poll(() => focusedRow(page)).toBe(run[2]);
    await takeBack(2);
  });

  it('does not take selected text out of the hands of the browser', async () => {
    await toLine(page, first);
    await page.evaluate((id) => {
      const title = document.querySelector(`ts-row[data-cell="${id}"] .title`);
      if (title !== null) getSelection()?.selectAllChildren(title);
    }, first);
    await page.keyboard.press('Control+c');
    const title = await rowOn(page, first).locator('.title').textContent();
    expect(await page.evaluate(() => navigator.clipboard.readText())).toBe(title);
  });

  it('pasted from plain text makes a line each; hostile text is text', async () => {
    await toLine(page, first);
    await page.evaluate(() => navigator.clipboard.writeText('t_9 = 5 mm\nU_9 = 2*t_9\n<img src=x onerror=alert(1)>'));
    await page.keyboard.press('Control+v');
    await expect.poll(async () => (await linesOn(page)).length).toBe(order.length + 3);
    const [given, derived, note] = (await linesOn(page)).slice(at + 1, at + 4);
    await expect
      .poll(() =>
        rowOn(page, derived ?? '')
          .locator('.result')
          .first()
          .textContent(),
      )
      .toMatch(/10/u);
    expect(await rowOn(page, given ?? '').getAttribute('class')).toContain('given');
    expect(
      await rowOn(page, note ?? '')
        .locator('.prose')
        .textContent(),
    ).toContain('<img src=x onerror=alert(1)>');
    expect(
      await rowOn(page, note ?? '')
        .locator('img')
        .count(),
    ).toBe(0);
    await page.evaluate(() => navigator.clipboard.writeText('{"format":"tightside-sheet/1","title":"","cells":[],"x":1}'));
    await page.keyboard.press('Control+v');
    await expect.poll(() => said(page)).toMatch(/^not pasted: /u);
    await takeBack();
  });
});

describe('a line that is taken back with the focus in it', () => {
  it('leaves the focus to the line in its place, and the way back in the bar keeps its own', async () => {
    await toLine(page, first);
    await page.keyboard.press('Control+Shift+Enter');
    await expect.poll(() => focusedRow(page)).not.toBe(first);
    await takeBack();
    await expect.poll(() => focusedRow(page)).toBe(order[at + 1]);
    await page.keyboard.press('Control+y');
    await undoButton(page).focus();
    await page.keyboard.press('Enter');
    await expect.poll(() => linesOn(page)).toEqual(order);
    expect(await page.evaluate(() => document.activeElement?.textContent)).toBe('Undo');
    // The grid is still entered by Tab: one cell of it is in the order.
    expect(await page.locator('[data-column][tabindex="0"]').count()).toBe(1);
  });
});

describe('words at the line', () => {
  it('do what the keys do, one after the other, and the focus stays in the grid', async () => {
    const word = async (name: string) => {
      if ((await page.locator('.line-actions').count()) === 0) await page.keyboard.press('Shift+F10');
      await page.locator('.line-actions').getByRole('button', { name, exact: true }).click();
      await page.waitForTimeout(150);
      expect(await focusInGrid(page), name).toBe(true);
    };
    await toLine(page, first);
    await word('Move down');
    await expect.poll(() => linesOn(page)).toEqual(order.toSpliced(at, 1).toSpliced(at + 1, 0, first));
    await word('Move up');
    await word('Once more');
    await word('Remove');
    await expect.poll(() => linesOn(page)).toEqual(order);
    await toLine(page, first);
    await word('Choose the line below too');
    await word('Copy');
    await word('Cut');
    await expect.poll(() => linesOn(page)).toEqual(order.toSpliced(at, 2));
    await word('Paste below');
    await expect.poll(async () => (await linesOn(page)).length).toBe(order.length);
    await word('New line below');
    expect(await page.evaluate(() => document.activeElement?.closest('ts-entry-line') !== null)).toBe(true);
    await page.keyboard.press('Escape');
    await word('All fields');
    await page.keyboard.press('Escape');
    await expect.poll(() => focusInGrid(page)).toBe(true);
    await word('Edit');
    await page.keyboard.press('Escape');
    await expect.poll(() => focusInGrid(page)).toBe(true);
  });
});

describe('a new line', () => {
  it('directly below a line stands there, is followed by the next, and leads back by Escape', async () => {
    await toLine(page, first);
    await page.keyboard.press('Alt+Enter');
    await page.locator('ts-entry-line .cm-content').waitFor();
    await page.keyboard.type('x_9 = 2 m');
    await page.keyboard.press('Enter');
    await expect.poll(async () => (await linesOn(page)).length).toBe(order.length + 1);
    await page.keyboard.type('y_9 = 2*x_9');
    await page.keyboard.press('Enter');
    await expect.poll(async () => (await linesOn(page)).length).toBe(order.length + 2);
    const now = await linesOn(page);
    expect(now.toSpliced(at + 1, 2)).toEqual(order);
    await page.keyboard.press('Escape');
    await expect.poll(() => focusedRow(page)).toBe(now[at + 2]);
    await takeBack(2);
  });

  it('that is begun and left stays begun: nothing typed is lost by other work, print or save', async () => {
    await toLine(page, first);
    await page.keyboard.press('Alt+Enter');
    await page.locator('ts-entry-line .cm-content').waitFor();
    await page.keyboard.type('half a thou');
    await toLine(page, order[at + 5] ?? '');
    await page.keyboard.press('Alt+ArrowUp');
    await page.evaluate(() => dispatchEvent(new Event('beforeprint')));
    await page.waitForTimeout(100);
    expect(await page.locator('ts-entry-line').count()).toBe(0);
    await page.evaluate(() => dispatchEvent(new Event('afterprint')));
    await expect.poll(() => page.locator('ts-entry-line .cm-content').textContent()).toBe('half a thou');
  });
});

describe('a formula that cannot be read', () => {
  it('is kept as typed when something else is begun, with its error; undo brings the one before', async () => {
    const criterion = example.cells.find((cell) => cell.kind === 'criterion');
    if (criterion?.kind !== 'criterion') throw new Error('the example has no criterion');
    await toLine(page, criterion.id);
    await page.keyboard.press('Enter');
    await rowOn(page, criterion.id).locator('ts-formula-editor .cm-content').waitFor();
    await page.keyboard.press('Control+a');
    await page.keyboard.type(`2*(${criterion.left})`);
    await rowOn(page, criterion.id).locator('.problem.error').waitFor();
    await rowOn(page, idOf('d_1')).locator('.result').first().click();
    await expect.poll(() => rowOn(page, criterion.id).locator('ts-formula-editor').count()).toBe(0);
    await expect.poll(() => rowOn(page, criterion.id).locator('.problem.error').count()).toBe(1);
    await page.keyboard.press('Escape');
    await toLine(page, criterion.id);
    await page.keyboard.press('Enter');
    await expect.poll(() => rowOn(page, criterion.id).locator('.cm-content').textContent()).toBe(`2*(${criterion.left})`);
    await page.keyboard.press('Escape');
    await expect.poll(() => focusedRow(page)).toBe(criterion.id);
    await takeBack();
  });
});

it('a section is written from the empty line with the keyboard alone', async () => {
  await toLine(page, order.at(-1) ?? '');
  await page.keyboard.press('Control+Enter');
  await page.locator('ts-entry-line .cm-content').waitFor();
  const typed = [
    '# Trial',
    'a_9 = 2 m ; Length ; tape',
    'b_9 = 3 m ; Width ; tape',
    'A_9 [m^2] = a_9*b_9 ; Area',
    'A_9 <= "10 m^2" ; Small enough',
  ];
  let count = order.length;
  for (const line of typed) {
    await expect.poll(() => page.evaluate(() => document.activeElement?.closest('ts-entry-line') !== null)).toBe(true);
    await page.keyboard.type(line);
    await page.keyboard.press('Enter');
    count += 1;
    await expect.poll(async () => (await linesOn(page)).length).toBe(count);
  }
  await page.keyboard.press('Escape');
  await expect.poll(() => focusInGrid(page)).toBe(true);
  const last = page.locator('.section').last();
  expect(await last.locator('h2').textContent()).toContain('Trial');
  // 2 m · 3 m = 6 m² of at most 10 m²: 0.60.
  await expect.poll(() => last.locator('ts-row.derived .result .value').first().textContent()).toMatch(/^\s*6(?:\.000)?\s*m/u);
  await expect.poll(() => last.locator('ts-row.criterion .result .value').first().textContent()).toMatch(/met\s*0\.60/u);
});

it('a formula with an error is put right by the correction that is offered', async () => {
  const cell = example.cells.find((one) => one.id === idOf('F_u'));
  if (cell?.kind !== 'derived') throw new Error('F_u is not derived');
  await toLine(page, cell.id);
  await page.keyboard.press('Enter');
  await rowOn(page, cell.id).locator('ts-formula-editor .cm-content').waitFor();
  await page.keyboard.press('End');
  await page.keyboard.type(' + log(1)*"1 N"');
  await rowOn(page, cell.id).locator('.edit-fixes button').first().waitFor();
  await page.keyboard.press('Alt+Enter');
  await expect.poll(() => rowOn(page, cell.id).locator('.problem.error').count()).toBe(0);
  await page.keyboard.press('Enter');
  await expect.poll(() => undoButton(page).isEnabled()).toBe(true);
  expect(await focusedRow(page)).toBe(cell.id);
});

it('the list of keys is reached by a key and by a button, and gives the focus back', async () => {
  await toLine(page, first);
  await page.keyboard.press('?');
  const dialog = page.getByRole('dialog', { name: 'Keys' });
  await dialog.waitFor();
  expect(await dialog.textContent()).toContain('once more below');
  await page.keyboard.press('Escape');
  await expect.poll(() => focusedRow(page)).toBe(first);
  await page.setViewportSize({ width: 320, height: 700 });
  await page.getByRole('button', { name: 'Keys' }).click();
  await dialog.waitFor();
  expect(await page.evaluate(() => document.documentElement.scrollWidth)).toBeLessThanOrEqual(320);
});
