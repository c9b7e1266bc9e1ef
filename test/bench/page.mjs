// Speed of the page in a real browser, beside a plain page in the same browser that does the least that can be done.
//
//   page-key-paint-1000     a sign typed into a given that hundreds of cells follow from, until it is painted; against a plain field
//                           that writes what is typed into the line beside it
//   page-key-rows-1000      the same sign, until the last row in the window that follows from it shows its new number; against the same
//   page-open-1000          a file of 1 000 cells dropped on the page, until its rows are painted and the next event is heard; against
//                           a file of 10 cells
//   …-10000                 the same for 10 000 cells
//
// Times are taken in the page, from the event to the task after the frame that shows it. Signs are typed one by one, the two pages in
// turn, each in a window of its own, so that a slow moment of the machine strikes both and none is ever hidden. Beside each ratio of medians stand milliseconds at p50 and p95.
// Not here: the engine alone (main.ts).

import { mkdtempSync, rmSync } from 'node:fs';
import { tmpdir } from 'node:os';
import { dirname, join } from 'node:path';
import { fileURLToPath } from 'node:url';
import { chromium } from 'playwright-core';
import { build, runnerImport } from 'vite';
import { serve } from '../../src/cli/serve.mjs';
import { findChromium } from '../browser/chromium.mjs';

const root = join(dirname(fileURLToPath(import.meta.url)), '..', '..');
const folder = mkdtempSync(join(tmpdir(), 'tightside-bench-page-'));
const { module } = await runnerImport(join(root, 'test/bench/large-sheet.ts'), { root, configFile: false });
await build({ root, configFile: join(root, 'vite.config.ts'), logLevel: 'error', build: { outDir: folder, emptyOutDir: true } });
const server = await serve(folder);
const found = findChromium();
const browser = await chromium.launch({
  executablePath: found.path,
  env: { ...process.env, ...found.env },
  args: ['--no-sandbox', '--disable-gpu'],
});

const at = (values, part) => [...values].sort((a, b) => a - b)[Math.min(values.length - 1, Math.floor(part * values.length))];
const tell = (name, values) =>
  console.log(`${name}: p50 ${at(values, 0.5).toFixed(1)} ms, p95 ${at(values, 0.95).toFixed(1)} ms, ${values.length} times`);
const ratio = (name, ours, reference) => console.log(`ratio ${name} ${(at(ours, 0.5) / at(reference, 0.5)).toPrecision(3)}`);

/** Runs in a page: notes for each sign typed when it was painted, and when the rows in the window had changed for the last time. */
function listen() {
  const afterFrame = (heard) =>
    requestAnimationFrame(() => {
      const { port1, port2 } = new MessageChannel();
      port1.onmessage = () => heard(performance.now());
      port2.postMessage(0);
    });
  globalThis.signs = [];
  globalThis.afterFrame = afterFrame;
  let sign = {};
  const observer = new MutationObserver((changes) => {
    const now = sign;
    now.rows += new Set(changes.map(({ target }) => (target.parentElement ?? target).closest('ts-row'))).size;
    afterFrame((time) => {
      now.last = time - now.since;
    });
  });
  // What is in the window is looked up between two signs: asking for it lays out the page, which is not the page's own work.
  globalThis.prepare = () => {
    observer.disconnect();
    for (const row of document.querySelectorAll('ts-row')) {
      const { top, bottom } = row.getBoundingClientRect();
      if (bottom <= 0 || top >= innerHeight || row.contains(document.activeElement)) continue;
      for (const result of row.querySelectorAll('.result'))
        observer.observe(result, { subtree: true, childList: true, characterData: true });
    }
  };
  addEventListener(
    'input',
    ({ timeStamp }) => {
      sign = { since: timeStamp, rows: 0 };
      const now = sign;
      globalThis.signs.push(now);
      afterFrame((time) => {
        now.paint = time - timeStamp;
      });
    },
    true,
  );
}

/** Runs in a page: the last sign is painted, the rows follow it, and what is done in pauses is done. */
async function settled(rows) {
  const end = performance.now() + 5000;
  const pause = (time) => new Promise((resolve) => setTimeout(resolve, time));
  while (performance.now() < end && (rows ? globalThis.signs.at(-1)?.last : globalThis.signs.at(-1)?.paint) === undefined)
    await pause(20);
  await pause(200);
  await new Promise((resolve) => requestIdleCallback(resolve, { timeout: 2000 }));
  globalThis.prepare();
  await pause(50);
}

const plain = await (await browser.newContext()).newPage();
await plain.setContent('<input aria-label="plain"><p id="beside"></p>');
await plain.evaluate(() => {
  const field = document.querySelector('input');
  field.addEventListener('input', () => {
    document.querySelector('#beside').textContent = field.value;
  });
});
await plain.evaluate(listen);

async function openPage() {
  const context = await browser.newContext({ viewport: { width: 1440, height: 930 } });
  const page = await context.newPage();
  await page.goto(server.url, { waitUntil: 'networkidle' });
  await page.waitForSelector('ts-row .result', { state: 'attached' });
  await page.evaluate(listen);
  return page;
}

/** Milliseconds from the drop of the file until its rows are painted and another event could be heard. */
const drop = (page, text, title) =>
  page.evaluate(
    ([content, heading]) =>
      new Promise((resolve) => {
        const dataTransfer = new DataTransfer();
        dataTransfer.items.add(new File([content], 'large.sheet.json', { type: 'application/json' }));
        const start = performance.now();
        dispatchEvent(new DragEvent('drop', { dataTransfer, bubbles: true, cancelable: true }));
        const look = () => {
          if (document.querySelector('h1')?.textContent !== heading || document.querySelector('ts-row .result') === null)
            requestAnimationFrame(look);
          else globalThis.afterFrame((now) => setTimeout(() => resolve(now - start)));
        };
        look();
      }),
    [text, title],
  );

async function opening(count, times) {
  const files = [10, count].map((size) => {
    const sheet = module.largeSheet(size);
    return (turn) => [JSON.stringify({ ...sheet, title: `${sheet.title}, ${turn}` }), `${sheet.title}, ${turn}`];
  });
  const taken = [[], []];
  for (let turn = 0; turn < times; turn += 1) {
    for (const which of turn % 2 === 0 ? [0, 1] : [1, 0]) {
      const page = await openPage();
      taken[which].push(await drop(page, ...files[which](turn)));
      await page.context().close();
    }
  }
  tell(`opening ${count} cells to first input`, taken[1]);
  ratio(`page-open-${count}`, taken[1], taken[0]);
}

async function typing(count, signs) {
  const page = await openPage();
  const sheet = module.largeSheet(count);
  await drop(page, JSON.stringify(sheet), sheet.title);
  await page.waitForTimeout(3000);
  await page.click('ts-row[data-cell="P"] .result[data-column="2"]');
  await page.waitForSelector('ts-row[data-cell="P"] input');
  // Below the bar and the heads of the columns, with the rows that follow from it under it.
  await page.evaluate(() => {
    document.querySelector('ts-row[data-cell="P"]').scrollIntoView({ block: 'start' });
    scrollBy(0, -150);
  });
  await plain.focus('input');
  for (const each of [page, plain]) await each.evaluate(() => void globalThis.signs.splice(0));
  const keys = ['1', '2', 'Backspace', '3', 'Backspace', 'Backspace', '9', '8', 'Backspace', 'Backspace'];
  await page.keyboard.press('Home');
  await page.evaluate(() => globalThis.prepare());
  for (let turn = 0; turn < signs; turn += keys.length) {
    for (const each of [plain, page]) {
      for (const key of keys) {
        await each.keyboard.press(key);
        await each.evaluate(settled, each === page);
      }
    }
  }
  const [ours, reference] = await Promise.all([page, plain].map((each) => each.evaluate(() => globalThis.signs)));
  const followed = ours.filter(({ rows }) => rows >= 2);
  if (followed.length < ours.length / 2) throw new Error('the rows in the window did not follow what was typed');
  const paints = (list) => list.map(({ paint }) => paint);
  tell('a plain field, sign to paint', paints(reference));
  tell(`${count} cells, sign to paint of the edited cell`, paints(ours));
  tell(
    `${count} cells, sign to the new numbers of all rows in the window`,
    followed.map(({ last }) => last),
  );
  ratio(`page-key-paint-${count}`, paints(ours), paints(reference));
  ratio(
    `page-key-rows-${count}`,
    followed.map(({ last }) => last),
    paints(reference),
  );
  await page.context().close();
}

try {
  await opening(1_000, 5);
  await typing(1_000, 40);
  await opening(10_000, 3);
  await typing(10_000, 10);
} finally {
  await browser.close();
  await server.close();
  rmSync(folder, { recursive: true, force: true });
}
