// A browser of our own that can be killed (SIGKILL, all of its processes) and started again with the same profile.

import { type ChildProcess, spawn } from 'node:child_process';
import { mkdtempSync, readFileSync, rmSync } from 'node:fs';
import { tmpdir } from 'node:os';
import { join } from 'node:path';
import { type Browser, chromium, type Page } from 'playwright-core';
// @ts-expect-error plain JavaScript, run by the test step without a compiler
import { findChromium } from './chromium.mjs';

/** Numbers from 0 to 1 that follow from the seed (mulberry32). */
export function random(start: number): () => number {
  let state = start;
  return () => {
    state = (state + 0x6d2b79f5) | 0;
    let mixed = Math.imul(state ^ (state >>> 15), 1 | state);
    mixed = (mixed + Math.imul(mixed ^ (mixed >>> 7), 61 | mixed)) ^ mixed;
    return ((mixed ^ (mixed >>> 14)) >>> 0) / 4_294_967_296;
  };
}

export interface Killable {
  start(): Promise<{ browser: Browser; page: Page }>;
  kill(): Promise<void>;
  /** Kills it and removes its profile. */
  end(): Promise<void>;
}

export function killable(): Killable {
  const found = findChromium() as { path: string; env: Record<string, string> };
  const profile = mkdtempSync(join(tmpdir(), 'store-profile-'));
  let running: ChildProcess | null = null;

  /** In a group of processes that ends together. */
  async function start(): Promise<{ browser: Browser; page: Page }> {
    rmSync(join(profile, 'DevToolsActivePort'), { force: true });
    running = spawn(
      found.path,
      [
        '--headless=new',
        '--no-sandbox',
        '--disable-gpu',
        '--no-first-run',
        '--remote-debugging-port=0',
        `--user-data-dir=${profile}`,
        'about:blank',
      ],
      { env: { ...process.env, ...found.env }, stdio: 'ignore', detached: true },
    );
    const until = Date.now() + 60_000;
    let port = '';
    while (port === '') {
      if (Date.now() > until) throw new Error('the browser does not start');
      await new Promise((done) => setTimeout(done, 50));
      try {
        port = readFileSync(join(profile, 'DevToolsActivePort'), 'utf8').split('\n')[0] ?? '';
      } catch {
        // not written yet
      }
    }
    const browser = await chromium.connectOverCDP(`http://127.0.0.1:${port}`);
    const page = await browser.contexts()[0]!.newPage();
    return { browser, page };
  }

  async function kill(): Promise<void> {
    const child = running;
    running = null;
    if (child === null || child.pid === undefined || child.exitCode !== null) return;
    const ended = new Promise((done) => child.once('exit', done));
    process.kill(-child.pid, 'SIGKILL');
    await ended;
  }

  return {
    start,
    kill,
    async end() {
      await kill();
      rmSync(profile, { recursive: true, force: true, maxRetries: 5 });
    },
  };
}
