// The page in a real browser: the example as the ruled sheet, a given changed in place, what follows from it, and the way back.
// What the page prints is compared with the record computed here in Node from the same sheet.

import { readdirSync, readFileSync } from 'node:fs';
import type { Browser, Page } from 'playwright-core';
import { afterAll, afterEach, beforeAll, beforeEach, describe, expect, it } from 'vitest';
import { makeRecord } from '../../src/record/index.ts';
import { calculate, readSheet, writeSheet } from '../../src/sheet/index.ts';
import { sheetFileName } from '../../src/store/index.ts';
import { solver } from '../../src/study/index.ts';
import { connect, drop, example, idOf, type Opened, open, recordWith, resultsOf, resultsOn } from './open.ts';

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
  expect(requests, 'requests after load').toEqual([]);
  expect(violations, 'breaches of the policy').toEqual([]);
  expect(faults, 'faults').toEqual([]);
});

const rowOf = (name: string) => page.locator(`ts-row[data-cell="${idOf(name)}"]`);
const field = () => page.locator('.typing');
const status = () => page.locator('[role="status"]').textContent();

async function edit(name: string, text: string, caseIndex = 0) {
  await rowOf(name).locator('.result').nth(caseIndex).click();
  await field().fill(text);
}

describe('the sheet on the screen', () => {
  it('prints every result of the example as the record does, in every case', async () => {
    const wanted = resultsOf(recordWith({}));
    expect(Object.keys(wanted).length).toBeGreaterThan(50);
    expect(await resultsOn(page)).toEqual(wanted);
    expect(await page.title()).toContain('CS-014');
    expect(await page.locator('h1').textContent()).toBe(example.title);
  });

  it('stands complete: sections, criteria with bars, title block, references, formulas that speak', async () => {
    const headings = example.cells.filter((cell) => cell.kind === 'heading' && (cell.level ?? 1) === 1).length;
    expect(await page.locator('.outline .sections li').count()).toBe(headings);
    const criteria = example.cells.filter((cell) => cell.kind === 'criterion').length;
    expect(await page.locator('.outline .bars li').count()).toBe(criteria);
    expect(await page.locator('table.criteria tbody tr').count()).toBe(criteria);
    expect(await page.locator('.references > div').count()).toBe(example.references?.length);
    await rowOf('F_1min').scrollIntoViewIfNeeded();
    await expect.poll(() => rowOf('F_1min').locator('math').count()).toBeGreaterThanOrEqual(3);
    expect(await rowOf('F_1min').locator('.katex-error').count()).toBe(0);
    expect(await page.locator('ts-math code').count()).toBe(0);
  });

  it('shows the numbers of the case that is read in its equations', async () => {
    const row = rowOf('F_u');
    await row.scrollIntoViewIfNeeded();
    await expect.poll(() => row.locator('annotation').last().textContent()).toContain('1.2');
    await page.locator('.case-head').nth(1).click();
    await expect.poll(() => row.locator('annotation').last().textContent()).toContain('1.4');
    expect(await page.locator('.case-head[aria-pressed="true"]').count()).toBe(1);
  });
});

describe('a given changed in place', () => {
  it('moves every number, equation and criterion that follows from it, and comes back by undo', async () => {
    const before = await resultsOn(page);
    await edit('F_0', '900 N');
    const wanted = resultsOf(recordWith({ F_0: '900 N' }));
    delete wanted[idOf('F_0')];
    await expect
      .poll(async () => {
        const now = await resultsOn(page);
        delete now[idOf('F_0')];
        return now;
      })
      .toEqual(wanted);
    await page.keyboard.press('Enter');
    await expect.poll(() => resultsOn(page)).toEqual(resultsOf(recordWith({ F_0: '900 N' })));
    const moved = Object.keys(before).filter((cell) => JSON.stringify(before[cell]) !== JSON.stringify(wanted[cell]));
    expect(moved.length).toBeGreaterThan(8);
    await expect.poll(() => page.locator('.bar .state').textContent()).toContain('2 criteria not met');
    expect(await page.locator('.bars ts-bar[data-over]').count()).toBe(2);
    expect(await page.locator('.bars .not-met').first().textContent()).toContain('not met');
    expect(await status()).toContain('2 criteria are not met');
    // The equations too: every step that follows shows the numbers of its record.
    const followers = recordWith({ F_0: '900 N' }).steps.filter((step) => step.kind === 'derived' && moved.includes(step.cell));
    for (const step of followers) {
      const substituted = step.cases[0]?.substituted ?? '';
      await expect
        .poll(() => page.locator(`ts-row[data-cell="${step.cell}"] annotation`).allTextContents(), { timeout: 10_000 })
        .toContainEqual(expect.stringContaining(substituted));
    }
    // The number changed: its source spoke of another one.
    expect(await rowOf('F_0').locator('.source').textContent()).toContain('no source');
    await page.keyboard.press('Control+z');
    await expect.poll(() => resultsOn(page)).toEqual(before);
    expect(await rowOf('F_0').locator('.source').textContent()).toContain('R11');
    await page.keyboard.press('Control+y');
    await expect.poll(() => resultsOn(page)).toEqual(resultsOf(recordWith({ F_0: '900 N' })));
  });

  it('is restored by Escape, and the focus stays in its cell', async () => {
    const before = await resultsOn(page);
    await edit('C', '1500 mm');
    await expect.poll(() => rowOf('theta_1').locator('.result').first().textContent()).toContain('166');
    await page.keyboard.press('Escape');
    await expect.poll(() => resultsOn(page)).toEqual(before);
    expect(await page.getByRole('button', { name: 'Undo' }).isDisabled()).toBe(true);
    expect(await page.evaluate(() => document.activeElement?.closest('ts-row')?.getAttribute('data-cell'))).toBe(idOf('C'));
  });

  it('says in one sentence what is wrong with a unit, offers the nearest one, and loses nothing that was typed', async () => {
    const before = await resultsOn(page);
    await edit('P', '8 kWw');
    const problem = page.locator('.editor-problems .problem.error');
    await expect.poll(() => problem.textContent()).toMatch(/kWw/u);
    expect(await field().getAttribute('aria-invalid')).toBe('true');
    const described = await field().getAttribute('aria-describedby');
    expect(await page.locator(`#${described}`).textContent()).toContain('kWw');
    const now = await resultsOn(page);
    delete now[idOf('P')];
    const rest = { ...before };
    delete rest[idOf('P')];
    expect(now).toEqual(rest);
    await problem.locator('button').first().click();
    expect(await field().inputValue()).toBe('8 kW');
    await expect.poll(() => problem.count()).toBe(0);
    await field().press('Enter');
    await expect.poll(() => resultsOn(page)).toEqual(resultsOf(recordWith({ P: '8 kW' })));
  });

  it('stands as typed when it is kept with an error; the lines below say what they wait for', async () => {
    await edit('F_0', '1320 kg');
    await expect.poll(() => page.locator('.editor-problems').textContent()).toMatch(/mass.*force/u);
    await page.keyboard.press('Enter');
    await expect.poll(() => rowOf('F_0').locator('.result').first().textContent()).toContain('1320 kg');
    await expect.poll(() => rowOf('P_0').locator('.problem').textContent()).toContain('F_0');
    expect(await page.locator('.bar .state').textContent()).toMatch(/1 line with an error.*\d+ lines wait/su);
    await page.keyboard.press('Control+z');
    await expect.poll(() => resultsOn(page)).toEqual(resultsOf(recordWith({})));
  });

  it('can hold for one case alone', async () => {
    await rowOf('C').locator('.result').nth(1).click();
    await page.getByLabel('only for').check();
    await field().fill('1000 mm');
    await field().press('Enter');
    await expect.poll(() => rowOf('C').locator('.result').first().textContent()).toContain('950');
    expect(await rowOf('C').locator('.result').nth(1).textContent()).toContain('1');
    const [run, start] = (await resultsOn(page))[idOf('theta_1')] ?? [];
    expect(run).not.toBe(start);
  });

  it('can be chosen from its table, and its source restated', async () => {
    const row = rowOf('pair_1');
    await row.locator('.choice').click();
    await field().selectOption('rubber on cast iron or steel, wet');
    await field().press('Enter');
    await expect.poll(() => row.locator('.choice').textContent()).toContain('wet');
    await expect.poll(() => page.locator('.bars .not-met').count()).toBeGreaterThan(0);
    await row.getByRole('button', { name: 'keep the former source' }).click();
    await expect.poll(() => row.locator('.source').textContent()).toContain('R9');
  });
});

describe('by keyboard alone', () => {
  it('one walks the rows, types a value, goes to origin and use and back', async () => {
    await page.keyboard.press('Tab');
    expect(await page.evaluate(() => document.activeElement?.textContent)).toContain('To the sheet');
    await page.keyboard.press('Enter');
    const at = () =>
      page.evaluate(() => [
        document.activeElement?.closest('ts-row')?.getAttribute('data-cell'),
        document.activeElement?.getAttribute('data-column'),
      ]);
    await page.keyboard.press('Control+Home');
    expect((await at())[0]).toBe(example.cells[0]?.id);
    await page.keyboard.press('Control+End');
    const rows = example.cells.map((cell) => cell.id);
    expect((await at())[0]).toBe(rows[rows.length - 1]);
    await page.keyboard.press('Control+Home');
    const down = rows.indexOf(idOf('d_1'));
    for (let step = 0; step < down; step += 1) await page.keyboard.press('ArrowDown');
    await page.keyboard.press('End');
    expect(await at()).toEqual([idOf('d_1'), '3']);
    await page.keyboard.press('Home');
    expect(await at()).toEqual([idOf('d_1'), '0']);
    await page.keyboard.press('ArrowRight');
    await page.keyboard.press('ArrowRight');
    await page.keyboard.type('200 mm');
    expect(await field().inputValue()).toBe('200 mm');
    await page.keyboard.press('Enter');
    await expect.poll(() => resultsOn(page)).toEqual(resultsOf(recordWith({ d_1: '200 mm' })));
    expect(await at()).toEqual([idOf('d_1'), '2']);
    // To what it feeds, there to where that comes from, and back.
    await page.keyboard.press('>');
    expect(await page.evaluate(() => document.activeElement?.closest('section')?.id)).toBe('use');
    // The drawing uses it first, then the speed of the driven pulley.
    const uses = calculate(example, solver).use(idOf('d_1'));
    for (let step = 0; step < uses.indexOf(idOf('n_2')); step += 1) await page.keyboard.press('ArrowDown');
    await page.keyboard.press('Enter');
    await expect.poll(async () => (await at())[0]).toBe(idOf('n_2'));
    await page.keyboard.press('<');
    expect(await page.evaluate(() => document.activeElement?.closest('section')?.id)).toBe('origin');
    const origins = calculate(example, solver).origin(idOf('n_2'));
    for (let step = 0; step < origins.indexOf(idOf('d_1')); step += 1) await page.keyboard.press('ArrowDown');
    await page.keyboard.press('Enter');
    await expect.poll(async () => (await at())[0]).toBe(idOf('d_1'));
    await page.keyboard.press('Backspace');
    await expect.poll(async () => (await at())[0]).toBe(idOf('n_2'));
  });

  it('one field does not hold the focus: Tab leaves it and keeps what was typed', async () => {
    await edit('C', '1000 mm');
    for (let step = 0; step < 6; step += 1) await page.keyboard.press('Tab');
    await expect.poll(() => field().count()).toBe(0);
    await expect.poll(() => resultsOn(page)).toEqual(resultsOf(recordWith({ C: '1000 mm' })));
  });
});

describe('origin and use', () => {
  it('are those of the calculation, with the values of the case that is read', async () => {
    await rowOf('F_1min').locator('.label').click();
    const names = await page
      .locator('#origin li button')
      .evaluateAll((buttons) =>
        buttons.map((button) =>
          [...button.querySelectorAll('.unseen, .value, .number')].map((part) => part.textContent?.trim()).join(' '),
        ),
      );
    const record = recordWith({});
    for (const name of ['F_c', 'F_u', 'k']) {
      const step = record.steps.find((one) => one.name === name);
      expect(names).toContainEqual(`${step?.title} ${step?.cases[0]?.result} ${step?.number}`);
    }
    expect(await page.locator('#use li').count()).toBe(calculate(example, solver).use(idOf('F_1min')).length);
  });
});

describe('a value carried over', () => {
  it('says from where, is confirmed on its line, and is counted', async () => {
    const row = rowOf('E_b');
    expect(await row.textContent()).toContain('carried over from CS-009');
    const open = () => page.locator('.bar .state').textContent();
    const before = Number(/(\d+) to confirm/u.exec((await open()) ?? '')?.[1]);
    expect(before).toBeGreaterThan(0);
    await row.locator('.label').click();
    await row.getByRole('button', { name: 'confirm the value' }).click();
    await expect.poll(() => row.textContent()).not.toContain('carried over');
    await expect.poll(open).toContain(`${before - 1} to confirm`);
    await page.keyboard.press('Control+z');
    await expect.poll(() => row.textContent()).toContain('carried over from CS-009');
  });
});

describe('a narrow window', () => {
  it('shows origin and use under the chosen line, and lets one walk on from there', async () => {
    await page.setViewportSize({ width: 800, height: 1000 });
    await rowOf('F_1min').locator('.label').click();
    await rowOf('F_1min').getByRole('button', { name: 'origin and use' }).click();
    const origin = calculate(example, solver).origin(idOf('F_1min'));
    await expect.poll(() => rowOf('F_1min').locator('#origin li').count()).toBe(origin.length);
    await rowOf('F_1min').locator('#origin li button').first().click();
    await expect.poll(() => page.locator('ts-row.chosen').getAttribute('data-cell')).toBe(origin[0]);
    await page.keyboard.press('>');
    await expect.poll(() => page.evaluate(() => document.activeElement?.closest('section')?.id)).toBe('use');
    // A press on another line folds it up, and still hits that line.
    await rowOf('F_0').locator('.result').first().click();
    await expect.poll(() => page.locator('.beside').count()).toBe(0);
    expect(await field().count()).toBe(1);
    await page.keyboard.press('Escape');
  });
});

/** The cells of a template as a plain sheet: a template that is dropped goes among the templates. */
function asSheet(template: string): string {
  const read = readSheet(template);
  if (!read.ok) throw new Error('the template cannot be read');
  const { templateInfo: _, ...sheet } = read.value;
  return writeSheet(sheet);
}

describe('the file', () => {
  it('that is opened takes the place of the sheet; one that cannot be read changes nothing and says why', async () => {
    const template = readFileSync(new URL('../../templates/capstan.sheet.json', import.meta.url), 'utf8');
    await drop(page, 'damaged.sheet.json', template.slice(0, 200));
    await expect.poll(() => page.locator('.notice').textContent()).toContain('damaged.sheet.json was not opened');
    expect(await page.locator('h1').textContent()).toBe(example.title);
    await drop(page, 'newer.sheet.json', template.replace('tightside-sheet/1', 'tightside-sheet/99'));
    await expect.poll(() => page.locator('.notice').textContent()).toContain('99');
    await edit('F_0', '1400 N');
    await page.keyboard.press('Enter');
    const text = asSheet(template);
    const read = readSheet(text);
    if (!read.ok) throw new Error('the template cannot be read');
    await drop(page, 'capstan.sheet.json', text);
    await expect.poll(() => page.locator('h1').textContent()).toBe(read.value.title);
    const record = makeRecord(calculate(read.value, solver));
    await expect.poll(() => page.locator('ts-row.step').count()).toBe(record.steps.length);
    const printed = await resultsOn(page);
    for (const step of record.steps.filter((one) => one.kind === 'derived')) {
      expect(printed[step.cell]).toEqual(step.cases.map((each) => each.result ?? 'no value'));
    }
  });

  it('of every template opens with every formula set and every result as in its record', { timeout: 240_000 }, async () => {
    const folder = new URL('../../templates/', import.meta.url);
    const files = readdirSync(folder).filter((name) => name.endsWith('.sheet.json'));
    expect(files.length).toBeGreaterThanOrEqual(3);
    for (const name of files) {
      const text = asSheet(readFileSync(new URL(name, folder), 'utf8'));
      const read = readSheet(text);
      if (!read.ok) throw new Error(`${name} cannot be read`);
      await drop(page, name, text);
      await expect.poll(() => page.locator('h1').textContent()).toBe(read.value.title);
      // Nothing waits to be typeset any more, and nothing fell back to its text.
      await expect
        .poll(
          () =>
            page.evaluate(() => [...document.querySelectorAll('.paper ts-math')].filter((one) => one.firstChild === null).length),
          { timeout: 30_000 },
        )
        .toBe(0);
      expect(await page.locator('.paper ts-math code').count(), name).toBe(0);
      const printed = await resultsOn(page);
      const record = makeRecord(calculate(read.value, solver));
      for (const step of record.steps.filter((one) => one.kind === 'derived')) {
        expect(printed[step.cell], `${name} ${step.number}`).toEqual(step.cases.map((each) => each.result ?? 'no value'));
      }
      expect(opened.violations, name).toEqual([]);
    }
  });

  it('with markup in its texts shows them as texts', async () => {
    const hostile = '<img src=x onerror="document.title=1"><script>document.title=2</script>';
    const sheet = {
      format: 'tightside-sheet/1',
      title: hostile,
      purpose: `**${hostile}** [R1] javascript:alert(1)`,
      titleBlock: { organisation: hostile, documentNumber: '"; } body { display: none } "' },
      references: [{ id: 'R1', document: hostile }],
      cells: [
        { id: 'n1', kind: 'note', text: `${hostile} [a](javascript:alert(1)) {a}` },
        { id: 'g1', kind: 'given', name: 'a', title: hostile, value: '2 m', source: hostile },
        { id: 't1', kind: 'table', name: 't', title: hostile, columns: [{ name: 'key', title: hostile }], rows: [[hostile]] },
        { id: 'f1', kind: 'figure', title: hostile, image: 'data:image/png;base64,AAAA' },
        { id: 'd1', kind: 'derived', name: 'b', title: '$\\href{javascript:alert(1)}{x}$', formula: 'a*2' },
      ],
    };
    await drop(page, 'hostile.sheet.json', JSON.stringify(sheet));
    await expect.poll(() => page.locator('h1').textContent()).toBe(hostile);
    expect(await page.locator('.paper script, .paper img[src="x"], .paper a[href^="javascript"]').count()).toBe(0);
    expect(await page.title()).toContain('<img');
    expect(await page.locator('ts-row.step').count()).toBe(2);
    expect(await page.evaluate(() => getComputedStyle(document.body).display)).toBe('block');
    expect(await resultsOn(page)).toMatchObject({ d1: ['4.000\u00a0m'] });
  });

  it('that is saved holds the sheet as it stands', async () => {
    await edit('F_0', '1400 N');
    await page.keyboard.press('Enter');
    const [download] = await Promise.all([
      page.waitForEvent('download'),
      page.getByRole('button', { name: 'Save file' }).click(),
    ]);
    expect(download.suggestedFilename()).toBe(sheetFileName(example));
    const stream = await download.createReadStream();
    let text = '';
    for await (const part of stream) text += String(part);
    const cell = (JSON.parse(text) as typeof example).cells.find((one) => one.id === idOf('F_0'));
    expect(cell).toMatchObject({ value: '1400 N' });
    expect(cell).not.toHaveProperty('source');
  });
});
