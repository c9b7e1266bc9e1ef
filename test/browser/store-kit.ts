// Builds the page of the store's tests and serves it as `npm start` serves the real one.

import { mkdtempSync, rmSync } from 'node:fs';
import { tmpdir } from 'node:os';
import { join } from 'node:path';
import { build } from 'vite';
// @ts-expect-error plain JavaScript, shared with `npm start`
import { serve } from '../../src/cli/serve.mjs';
import { offlineFiles } from '../../src/store/offline-files.ts';

export interface StorePage {
  readonly url: string;
  readonly folder: string;
  close(): Promise<void>;
}

/** Builds into `folder`; `mark` makes one build differ from another. */
export async function buildStorePage(folder: string, mark = ''): Promise<void> {
  await build({
    configFile: false,
    logLevel: 'warn',
    root: new URL('store-page', import.meta.url).pathname,
    base: './',
    plugins: [offlineFiles()],
    define: { __MARK__: JSON.stringify(mark) },
    build: { outDir: folder, emptyOutDir: true, target: 'es2022', minify: false, modulePreload: { polyfill: false } },
  });
}

export async function serveStorePage(): Promise<StorePage> {
  const folder = mkdtempSync(join(tmpdir(), 'store-page-'));
  await buildStorePage(folder);
  const server = (await serve(folder)) as { url: string; close(): Promise<void> };
  return {
    url: server.url,
    folder,
    async close() {
      await server.close();
      rmSync(folder, { recursive: true, force: true });
    },
  };
}
