// The shelf on the built page: found, begun, copied, removed and put back; a new sheet from a template as the command line makes it; an own
// template kept and used; files out and in; everything exported and imported elsewhere; accessibility rules on every screen.

import { mkdtempSync, readFileSync, rmSync } from 'node:fs';
import { createRequire } from 'node:module';
import { tmpdir } from 'node:os';
import { join } from 'node:path';
import type { Browser, BrowserContextOptions, Page } from 'playwright-core';
import { afterAll, beforeAll, describe, expect, inject, it } from 'vitest';
import { keepAsTemplate } from '../../src/check/index.ts';
import { nodeIo, run } from '../../src/cli/main.ts';
import { readSheet, type Sheet, writeSheet } from '../../src/sheet/index.ts';
import { connect, drop, type Opened, open, resultsOn } from './open.ts';

let browser: Browser;
beforeAll(async () => {
  browser = await connect();
});
afterAll(() => browser.close());

const templates = new URL('../../templates/', import.meta.url).pathname;
const axeSource = readFileSync(createRequire(import.meta.url).resolve('axe-core/axe.min.js'), 'utf8');

async function atShelf(options: BrowserContextOptions = {}): Promise<Opened> {
  const opened = await open(browser, options);
  await opened.page.getByRole('button', { name: 'Shelf', exact: true }).click();
  await opened.page.waitForSelector('.register [data-id="example"]');
  return opened;
}
const toShelf = async (page: Page) => {
  await page.getByRole('button', { name: 'Shelf', exact: true }).click();
  await page.waitForSelector('.register');
};
const titles = (page: Page) => page.locator('.register tr[data-id]:not(.gone) [data-act="open"]').allTextContents();
const focused = (page: Page) =>
  page.evaluate(() => {
    const { activeElement: on } = document;
    return `${on?.closest('[data-id]')?.getAttribute('data-id') ?? ''} ${on?.getAttribute('data-act') ?? on?.id ?? ''}`.trim();
  });
/** The text of what was downloaded by a click. */
async function downloaded(page: Page, click: () => Promise<unknown>): Promise<{ name: string; text: string }> {
  const [download] = await Promise.all([page.waitForEvent('download'), click()]);
  const folder = mkdtempSync(join(tmpdir(), 'shelf-'));
  await download.saveAs(join(folder, 'file'));
  const text = readFileSync(join(folder, 'file'), 'utf8');
  rmSync(folder, { recursive: true });
  return { name: download.suggestedFilename(), text };
}
function read(text: string): Sheet {
  const done = readSheet(text);
  if (!done.ok) throw new Error(done.problems[0]?.message);
  return done.value;
}
/** What the command line makes and prints. */
async function commandLine(...argv: string[]): Promise<string> {
  let out = '';
  const exit = await run(argv, nodeIo(templates, { out: (text) => (out += text), err: (text) => (out += text) }));
  if (exit > 1) throw new Error(out);
  return out;
}
const begin = async (page: Page, number: string, title: string, project: string) => {
  const row = page.locator('[data-begin="blank"]');
  await row.locator('[data-field="number"]').fill(number);
  await row.locator('[data-field="title"]').fill(title);
  await row.locator('[data-field="project"]').fill(project);
  await row.locator('[data-field="project"]').press('Enter');
  await page.waitForSelector('.title-block');
};

describe('the register', () => {
  it('begins empty sheets under their number, finds sheets and templates by the words of the trade, and says a number taken', async () => {
    const { page, faults, violations, requests, close } = await atShelf();
    expect(await page.evaluate(() => document.activeElement?.tagName)).toBe('H1');
    await begin(page, 'CS-021', 'Mooring winch', 'Quay 4');
    expect(await page.locator('.title-block h1').textContent()).toBe('Mooring winch');
    await toShelf(page);
    expect(await page.locator('.register tr[data-id] .number').allTextContents()).toEqual(['CS-021', 'CS-014']);
    await page.locator('[data-begin="blank"] [data-field="number"]').fill('CS-021');
    expect(await page.locator('#taken-blank').textContent()).toBe('CS-021 is the number of Mooring winch already.');
    const search = page.locator('#search');
    const found = () =>
      page.locator('.templates [href^="#/template/"].do').evaluateAll((all) => all.map((one) => one.getAttribute('href')));
    // A word of the trade, a name of a result, a kind of job, a word of a sheet alone.
    await search.fill('bollard');
    expect([await titles(page), await found()]).toEqual([[], ['#/template/capstan']]);
    await search.fill('elevator');
    expect(await found()).toEqual(['#/template/traction-sheave']);
    await search.fill('mu_lock');
    expect(await found()).toEqual(['#/template/band-brake-differential']);
    await search.fill('band brakes');
    expect((await found()).length).toBe(5);
    await search.fill('quay 4');
    expect([await titles(page), await found()]).toEqual([['Mooring winch'], []]);
    // Down from the search to the first line, Enter opens it.
    await search.press('ArrowDown');
    await page.keyboard.press('Enter');
    await page.waitForSelector('.title-block');
    expect(await page.locator('.title-block h1').textContent()).toBe('Mooring winch');
    expect([faults, violations, requests]).toEqual([[], [], []]);
    await close();
  });

  it('copies; removes, also what lies on the desk, and puts it back from its line and from the list at the foot; focus follows', async () => {
    const { page, faults, close } = await atShelf();
    await page.locator('[data-id="example"] [data-act="copy"]').click();
    await expect.poll(() => titles(page)).toEqual([expect.stringMatching(/\(copy\)$/u), expect.not.stringMatching(/\(copy\)$/u)]);
    expect(await focused(page)).toMatch(/^\w+ open$/u);
    const copy = (await page.locator('.register tr[data-id]').first().getAttribute('data-id')) ?? '';
    // By the keyboard alone: down to the example, which lies on the desk; Delete removes it, Enter on the word that has the focus puts it back.
    await page.keyboard.press('ArrowDown');
    expect(await focused(page)).toBe('example open');
    await page.keyboard.press('Delete');
    await expect.poll(() => focused(page)).toBe('example put-back');
    expect(await page.locator('[data-id="example"].gone').textContent()).toContain('was removed.');
    expect(await page.locator('.notice.trouble').count()).toBe(0);
    await page.keyboard.press('Enter');
    await expect.poll(() => focused(page)).toBe('example open');
    await page.locator(`[data-id="${copy}"] [data-act="remove"]`).click();
    await page.reload();
    await page.waitForSelector('.trash');
    expect(await titles(page)).toHaveLength(1);
    await page.locator('.trash button').click();
    await expect.poll(() => focused(page)).toBe(`${copy} open`);
    expect(await page.locator('.trash').count()).toBe(0);
    await page.locator(`[data-id="${copy}"] [data-act="remove"]`).click();
    await page.locator('[data-act="empty"]').click();
    await page.locator('[data-act="empty-now"]').click();
    await expect.poll(() => page.locator('.trash, .gone').count()).toBe(0);
    expect(await titles(page)).toHaveLength(1);
    await page.locator('[data-id="example"] [data-act="open"]').click();
    await page.waitForSelector('ts-row .result', { state: 'attached' });
    expect(faults).toEqual([]);
    await close();
  });

  it('begins a sheet for a similar job: givens carried over, under its own number, the old names left behind', async () => {
    const { page, close } = await atShelf();
    await page.locator('[data-id="example"] [data-act="similar"]').click();
    await expect.poll(() => page.evaluate(() => document.activeElement?.getAttribute('data-field'))).toBe('number');
    await page.keyboard.type('CS-030');
    await page.keyboard.press('Enter');
    await page.waitForSelector('.title-block');
    const { text } = await downloaded(page, () => page.getByRole('button', { name: 'Save file' }).click());
    const made = read(text);
    const givens = made.cells.filter((cell) => cell.kind === 'given');
    expect(givens.every((cell) => cell.carriedOver)).toBe(true);
    expect(made.carriedFrom).toMatchObject({ documentNumber: 'CS-014', fingerprint: expect.stringMatching(/^[0-9a-f]{64}$/u) });
    expect(made.titleBlock).toMatchObject({ documentNumber: 'CS-030' });
    expect(made.titleBlock?.project).toBeUndefined();
    await close();
  });
});

describe('a new sheet from a template', () => {
  it('is the one that the command line makes with the same values; a wrong value is told at its field and put right by its correction', async () => {
    const { page, faults, violations, requests, close } = await atShelf();
    await page.locator('[data-template="capstan"] a.do').click();
    await page.waitForSelector('.given-line');
    // It begins at its head, though the list was far down.
    await expect.poll(() => page.evaluate(() => [scrollY, document.activeElement?.tagName])).toEqual([0, 'H1']);
    expect(await page.locator('.caution').textContent()).toContain('licensed or appointed persons');
    const field = (key: string) => page.locator(`[data-key="${key}"]`);
    await page.locator('#name-title').fill('Winch head, bow');
    await page.locator('#name-number').fill('CS-040');
    const keyOf = (name: string) =>
      read(readFileSync(`${templates}capstan.sheet.json`, 'utf8')).cells.find((cell) => 'name' in cell && cell.name === name)!.id;
    const [load, hand, mu] = [keyOf('F_load'), keyOf('F_hand'), keyOf('mu')];
    await field(load).fill('8');
    const note = page.locator(`[id="note-${load}"]`);
    await expect.poll(() => note.textContent()).toContain('give a value in N');
    await field(hand).fill('250 Nn');
    await field(hand).press('Control+Enter');
    // Nothing is made; the focus is on the first value that is wrong.
    await expect.poll(() => page.evaluate(() => document.activeElement?.getAttribute('data-key'))).toBe(load);
    await note.getByRole('button', { name: 'write 8 kN' }).click();
    expect(await field(load).inputValue()).toBe('8 kN');
    await field(hand).fill('250');
    await field(hand).press('Alt+Enter');
    expect(await field(hand).inputValue()).toBe('250 N');
    await field(`${mu}/high`).fill('0.35');
    // Left and found again, it says so.
    await page.getByRole('button', { name: 'Back to the shelf' }).click();
    await page.waitForSelector('.register');
    await page.goBack();
    await page.waitForSelector('.found');
    expect(await field(load).inputValue()).toBe('8 kN');
    // Enter moves on, field by field, to the button at the end.
    await field(load).press('Enter');
    expect(await page.evaluate(() => document.activeElement?.getAttribute('data-key'))).toBe(hand);
    const given = page.locator('.fill-foot .about');
    await expect.poll(() => given.textContent()).toContain('3 of ');
    await field(hand).press('Control+Enter');
    await page.waitForSelector('ts-row .result', { state: 'attached' });
    const { name, text } = await downloaded(page, () => page.getByRole('button', { name: 'Save file' }).click());
    expect(name).toBe('CS-040 Winch head, bow.sheet.json');

    const args = ['--set', 'F_load=8 kN', '--set', 'F_hand=250 N', '--case', 'high:mu=0.35'];
    const there = read(await commandLine('new', 'capstan', '-o', '-', ...args));
    expect(read(text)).toEqual({
      ...there,
      title: 'Winch head, bow',
      titleBlock: { ...there.titleBlock, documentNumber: 'CS-040' },
    });
    const cellOf = (sheet: Sheet, wanted: string) => sheet.cells.find((cell) => cell.id === wanted);
    expect(cellOf(read(text), load)).toMatchObject({ value: '8 kN' });
    expect(cellOf(read(text), load)).not.toHaveProperty('carriedOver');
    expect(cellOf(read(text), load)).not.toHaveProperty('source');
    expect(cellOf(read(text), mu)).toMatchObject({ carriedOver: true, byCase: { high: '0.35' } });
    // The same numbers: what the command line calculates from its own file stands on the page.
    const folder = mkdtempSync(join(tmpdir(), 'shelf-'));
    await commandLine('new', 'capstan', '-o', join(folder, 'a.sheet.json'), ...args);
    const calculated = JSON.parse(await commandLine('calc', join(folder, 'a.sheet.json'), '--json'));
    rmSync(folder, { recursive: true });
    expect((await resultsOn(page))[keyOf('F_hold')]).toEqual(calculated.quantities.F_hold.printed);
    expect([faults, violations, requests]).toEqual([[], [], []]);
    await close();
  });
});

/** The smallest sheet that can be a template but for what `keep` asks. */
const small: Sheet = {
  format: 'tightside-sheet/1',
  title: 'Rope on a post',
  titleBlock: { documentNumber: 'CS-050', project: 'Quay 4' },
  cells: [
    { id: 'mu', kind: 'given', name: 'mu', title: 'Friction', value: '0.25', basis: 'assumed', range: '0.1 to 0.5' },
    {
      id: 'theta',
      kind: 'given',
      name: 'theta',
      title: 'Wrap',
      value: '540 deg',
      unit: 'deg',
      basis: 'specified',
      source: 'layout',
    },
    { id: 'S', kind: 'given', name: 'S', title: 'Pull', value: '2 kN', unit: 'N', basis: 'specified' },
    { id: 'F', kind: 'derived', name: 'F', title: 'Force that holds', formula: 'S/e^(mu*theta)', unit: 'N', source: 'Euler' },
    { id: 'k', kind: 'criterion', title: 'One hand holds it', left: 'F', relation: '<=', right: 'F_hand', source: 'brief' },
    {
      id: 'h',
      kind: 'given',
      name: 'F_hand',
      title: 'One hand',
      value: '250 N',
      unit: 'N',
      basis: 'assumed',
      source: 'common practice',
    },
  ],
};

describe('an own template', () => {
  it('is kept from the open sheet once nothing is missing, stands on the shelf, goes out and in as a file, and gives sheets', async () => {
    const { page, faults, close } = await atShelf();
    await drop(page, 'post.sheet.json', writeSheet(small));
    await page.waitForSelector('ts-row[data-cell="k"]', { state: 'attached' });
    await page.getByRole('button', { name: 'Keep as template' }).click();
    await page.waitForSelector('.missing');
    const missing = page.locator('.missing');
    const saying = () => missing.textContent();
    expect(await saying()).toContain('has neither source nor range');
    await page.locator('#keep-id').fill('post');
    await page.locator('#keep-job').fill('A rope round a fixed post');
    await page.locator('#keep-caution').fill('Friction varies; the site decides.');
    await page.locator('#keep-limits').fill('dry rope\nround post');
    await page.locator('#keep-limits').press('Control+Enter');
    await expect.poll(saying).toContain('1 point is missing');
    // To the line that lacks its source, where it is given one; and back, with everything that was typed.
    await missing.getByRole('button', { name: 'Pull' }).click();
    await page.waitForSelector('ts-row[data-cell="S"].chosen');
    await page.locator('ts-row[data-cell="S"] .source').click();
    await page.locator('textarea.typing').fill('weight of the barge');
    await page.locator('ts-row[data-cell="F"] .label').click();
    await page.getByRole('button', { name: 'Keep as template' }).click();
    await expect.poll(saying).toContain('Nothing is missing');
    expect(await page.locator('#keep-job').inputValue()).toBe('A rope round a fixed post');
    await page.getByRole('button', { name: 'Keep as template' }).click();
    await page.waitForSelector('text=Kept as a template');
    const { name, text } = await downloaded(page, () => page.getByRole('button', { name: 'Save as file' }).click());
    expect(name).toBe('post.sheet.json');
    const info = {
      id: 'post',
      job: 'A rope round a fixed post',
      limits: ['dry rope', 'round post'],
      caution: 'Friction varies; the site decides.',
    };
    const whole = {
      ...small,
      cells: small.cells.map((cell) => (cell.id === 'S' ? { ...cell, source: 'weight of the barge' } : cell)),
    };
    const there = keepAsTemplate(whole as Sheet, info);
    if (!there.ok) throw new Error(there.problems[0]?.message);
    expect(read(text)).toEqual(read(writeSheet(there.value)));

    await page.getByRole('button', { name: 'To the shelf' }).click();
    const own = page.locator('[data-template="own:post"]');
    await own.locator('[data-act="remove"]').click();
    await own.locator('[data-act="put-back"]').click();
    await own.locator('[data-act="remove"]').click();
    await page.waitForSelector('[data-template="own:post"].gone');
    // The file brings it back: a template file is a template, not a sheet.
    await page.locator('[data-import]').setInputFiles({ name, mimeType: 'application/json', buffer: Buffer.from(text) });
    await page.waitForSelector('[data-template="own:post"] a.do');
    await own.locator('a.do').click();
    await page.locator('[data-key="mu"]').fill('0.3');
    await page.locator('[data-key="mu"]').press('Control+Enter');
    await page.waitForSelector('ts-row .result', { state: 'attached' });
    const made = read((await downloaded(page, () => page.getByRole('button', { name: 'Save file' }).click())).text);
    expect(made.template).toMatchObject({ id: 'post', version: 1 });
    const values = made.cells.flatMap((cell) => (cell.kind === 'given' ? [[cell.value, cell.carriedOver ?? false]] : []));
    expect(values).toEqual([
      ['0.3', false],
      ['540 deg', true],
      ['2 kN', true],
      ['250 N', true],
    ]);
    expect(faults).toEqual([]);
    await close();
  });
});

describe('everything as one file', () => {
  it('goes out and comes in elsewhere, beside what is there; what was here already and what is refused is counted', async () => {
    const here = await atShelf();
    await begin(here.page, 'CS-060', 'Kept elsewhere', '');
    await toShelf(here.page);
    const bundle = await downloaded(here.page, () => here.page.getByRole('button', { name: 'Export everything' }).click());
    await here.close();
    const there = await atShelf();
    const { page } = there;
    const file = (name: string, text: string) => ({ name, mimeType: 'application/json', buffer: Buffer.from(text) });
    await page.locator('[data-import]').setInputFiles([file(bundle.name, bundle.text), file('bad.json', '{"format":')]);
    await expect
      .poll(() => page.locator('.notice').textContent())
      .toContain('1 sheet came on the shelf; 1 was here already; 1 was refused.');
    expect((await titles(page)).sort()).toEqual(['Kept elsewhere', 'Mixer drive M-14, open flat belt']);
    expect(there.faults).toEqual([]);
    await there.close();
  });
});

async function findings(page: Page): Promise<string[]> {
  await page.evaluate(axeSource);
  return page.evaluate(async () => {
    type Finding = { id: string; nodes: { target: string[]; failureSummary?: string }[] };
    const { axe } = globalThis as unknown as {
      axe: { run(context: object, options: object): Promise<{ violations: Finding[]; passes: unknown[] }> };
    };
    const { violations, passes } = await axe.run({ exclude: [['.katex-html']] }, { resultTypes: ['violations'], iframes: false });
    if (passes.length < 15) return [`only ${passes.length} rules ran`];
    return violations.map(
      ({ id, nodes }) =>
        `${id}: ${nodes
          .slice(0, 3)
          .map((node) => `${node.target.join(' ')} ${node.failureSummary ?? ''}`)
          .join(' | ')}`,
    );
  });
}

describe('every screen of the shelf', () => {
  it.each([
    ['light', 1440],
    ['dark', 768],
    ['light', 320],
    ['dark', 1440],
  ] as const)(
    'breaks no rule of accessibility and needs no sideways scrolling, %s at %i px',
    { timeout: 240_000 },
    async (colorScheme, width) => {
      const { page, close } = await atShelf({ colorScheme, viewport: { width, height: 900 } });
      const look = async (what: string) => {
        expect(await findings(page), what).toEqual([]);
        expect(await page.evaluate(() => document.documentElement.scrollWidth), what).toBe(width);
      };
      await page.locator('[data-id="example"] [data-act="copy"]').click();
      await expect.poll(() => titles(page)).toHaveLength(2);
      await page.locator('[data-id="example"] [data-act="remove"]').click();
      await page.waitForSelector('.trash');
      await page.locator('[data-act="similar"]').click();
      const address = await page.locator('.register [data-act="open"]').first().getAttribute('href');
      await page.locator('[data-template="capstan"] summary').click();
      await page.locator('[data-begin="blank"] [data-field="number"]').fill('CS-014');
      await look('the register with a line begun, one removed, a template unfolded');
      await page.locator('[data-template="v-belt"] a.do').click();
      await page.waitForSelector('.given-line');
      await page.locator('[data-key="P"]').fill('11');
      await page.waitForSelector('.edit-fixes button');
      await look('a form with a wrong value');
      const copy = (address ?? '').replace('#/sheet/', '');
      await page.goto(`${inject('url')}#/keep/${copy}`);
      await page.waitForSelector('.missing li');
      await look('a sheet to be kept as a template');
      await page.goto(`${inject('url')}#/keep/example`);
      await page.waitForSelector('.fill.one [role="alert"]');
      await look('a sheet that is not here');
      await close();
    },
  );
});
