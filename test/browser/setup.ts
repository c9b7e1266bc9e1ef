// One server and one browser for all browser tests: the built page, as `npm start` serves it, in a real Chromium.

import { existsSync } from 'node:fs';
import { chromium } from 'playwright-core';
import type { TestProject } from 'vitest/node';
// @ts-expect-error plain JavaScript, shared with `npm start`
import { serve } from '../../src/cli/serve.mjs';
// @ts-expect-error plain JavaScript, run by the test step without a compiler
import { findChromium } from './chromium.mjs';

declare module 'vitest' {
  export interface ProvidedContext {
    url: string;
    endpoint: string;
  }
}

export default async function setup(project: TestProject) {
  // Another built page can be tested by naming its folder.
  const folder = process.env['TIGHTSIDE_PAGE'] ?? new URL('../../dist/page', import.meta.url).pathname;
  if (!existsSync(folder)) throw new Error('There is no built page: run npm run build first.');
  const server = await serve(folder);
  const found = findChromium();
  const browser = await chromium.launchServer({
    executablePath: found.path,
    env: { ...process.env, ...found.env },
    args: ['--no-sandbox', '--disable-gpu', '--hide-scrollbars'],
  });
  project.provide('url', server.url);
  project.provide('endpoint', browser.wsEndpoint());
  return async () => {
    await browser.close();
    await server.close();
  };
}
