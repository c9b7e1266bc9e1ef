// Part of the build: gives the offline worker the list of everything that was built, and a version that changes when any file does.
//
// The worker is one plain script beside index.html, so that it may serve the whole page; its name never changes.

import { createHash } from 'node:crypto';
import { readFileSync } from 'node:fs';
import { fileURLToPath } from 'node:url';
import { type Plugin, transformWithOxc } from 'vite';

export const workerFile = 'offline-worker.js';

export function offlineFiles(): Plugin {
  return {
    name: 'offline-files',
    apply: 'build',
    enforce: 'post',
    generateBundle: {
      order: 'post',
      async handler(_options, bundle) {
        const path = fileURLToPath(new URL('offline-worker.ts', import.meta.url));
        const { code } = await transformWithOxc(readFileSync(path, 'utf8'), path, { target: 'es2022' });
        const digest = createHash('sha256').update(code);
        const files = Object.keys(bundle).sort();
        for (const file of files) {
          const part = bundle[file]!;
          digest.update(file).update(part.type === 'chunk' ? part.code : part.source);
        }
        if (!files.includes('index.html')) this.error('there is no index.html to be served without a network');
        const version = digest.digest('hex').slice(0, 16);
        const list = JSON.stringify(JSON.stringify(files));
        const source = code.replace('__VERSION__', version).replace(/(["'`])__FILES__\1/u, () => list);
        if (source.includes('__')) this.error('the list of files could not be put into the offline worker');
        this.emitFile({ type: 'asset', fileName: workerFile, source });
      },
    },
  };
}
