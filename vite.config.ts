// How the page, the command line and the tests are put together.
//
// 1. `vite build` writes the page to dist/page, `vite build --mode cli` the command line to dist/cli/main.js, with nothing left to install.
// 2. The policy of the page stands in index.html: no inline script, no inline style, no eval. So no font or style is inlined here.
// 3. Fonts are shipped as woff2 alone, and only the faces that formulas of a sheet use; every browser that runs the page reads it.
// 4. The script of the first screen has a limit, and the build fails beyond it.
// Not here: the linter (.biome.jsonc) and the order of the steps of a full test (test/run.mjs).

import { readFileSync } from 'node:fs';
import { gzipSync } from 'node:zlib';
import type { Plugin } from 'vite';
import { defineConfig } from 'vitest/config';
import { offlineFiles } from './src/store/offline-files.ts';

/** kB = 1000 bytes, gzip level 9: the script that must arrive before the first screen stands. */
const firstScreenLimit = 250;

/** Faces of the formula style that no formula of a sheet uses. */
const unusedFaces =
  /@font-face\s*\{[^}]*KaTeX_(?:AMS|Caligraphic|Fraktur|SansSerif|Script|Typewriter|(?:Main|Math)-Bold)[^}]*\}/g;
const olderFormats = /,\s*url\([^)]*\.(?:woff|ttf)\)\s*format\(["'](?:woff|truetype)["']\)/g;
const woff2Only: Plugin = {
  name: 'woff2-only',
  enforce: 'pre',
  transform(code, id) {
    if (!/\.css($|\?)/.test(id) || !code.includes('woff')) return null;
    return { code: code.replace(unusedFaces, '').replace(olderFormats, ''), map: null };
  },
};

/** The same faces in the typesetter's table of sizes, and the example without its white space. */
const unusedSizes = /"(?:AMS|Caligraphic|Fraktur|SansSerif|Script|Typewriter|(?:Main|Math)-Bold)\w*(?:-\w+)?": \{[^}]*\}/g;
const lessText: Plugin = {
  name: 'less-text',
  enforce: 'pre',
  transform(code, id) {
    if (!/katex\.mjs$/.test(id)) return null;
    // The sign of a diameter, the one of these faces that a name can hold, keeps its size.
    const used = (face: string) => /"8709": \[[^\]]*\]/.exec(face)?.[0] ?? '';
    return { code: code.replace(unusedSizes, (face) => face.replace(/\{[^}]*\}/, () => `{${used(face)}}`)), map: null };
  },
  load(id) {
    const file = id.replace(/\?raw$/, '');
    if (!id.endsWith('.sheet.json?raw')) return null;
    this.addWatchFile(file);
    return `export default ${JSON.stringify(JSON.stringify(JSON.parse(readFileSync(file, 'utf8'))))};`;
  },
};

const firstScreenSize: Plugin = {
  name: 'first-screen-size',
  generateBundle(_options, bundle) {
    const seen = new Set<string>();
    const visit = (file: string): number => {
      const chunk = bundle[file];
      if (seen.has(file) || chunk?.type !== 'chunk') return 0;
      seen.add(file);
      return chunk.imports.reduce((sum, next) => sum + visit(next), gzipSync(chunk.code, { level: 9 }).length);
    };
    const bytes = Object.values(bundle)
      .filter((part) => part.type === 'chunk' && part.isEntry)
      .reduce((sum, entry) => sum + visit(entry.fileName), 0);
    const size = (bytes / 1000).toFixed(1);
    if (bytes > firstScreenLimit * 1000)
      this.error(`the first screen's script is ${size} kB compressed, more than ${firstScreenLimit} kB`);
    this.info(`first screen's script: ${size} kB compressed, ${firstScreenLimit} kB allowed`);
  },
};

export default defineConfig(({ mode }) => ({
  base: './',
  resolve: { tsconfigPaths: false },
  plugins: [woff2Only, ...(mode === 'cli' ? [] : [lessText, firstScreenSize, offlineFiles()])],
  build:
    mode === 'cli'
      ? {
          ssr: 'src/cli/main.ts',
          outDir: 'dist/cli',
          target: 'node20',
          emptyOutDir: true,
          minify: false,
          rolldownOptions: { output: { entryFileNames: 'main.js' } },
        }
      : {
          outDir: 'dist/page',
          target: 'es2022',
          emptyOutDir: true,
          assetsInlineLimit: 0,
          modulePreload: false,
          chunkSizeWarningLimit: 1000,
          // No file of ours does anything when it is merely imported, but for the beginnings of the page and of its worker.
          rolldownOptions: {
            treeshake: {
              moduleSideEffects: [{ test: /\/src\/(?!view\/main\.ts|store\/offline-worker).*\.ts$/u, sideEffects: false }],
            },
          },
        },
  ssr: { noExternal: true as const },
  test: {
    projects: [
      {
        extends: true,
        test: { name: 'node', include: ['test/**/*.test.ts'], exclude: ['test/browser/**'], testTimeout: 60_000 },
      },
      {
        extends: true,
        test: {
          name: 'browser',
          include: ['test/browser/**/*.test.ts'],
          globalSetup: ['test/browser/setup.ts'],
          fileParallelism: false,
          testTimeout: 60_000,
          hookTimeout: 120_000,
          // A state is waited for as long as a busy machine may need; what is waited for is as strict as ever.
          expect: { poll: { timeout: 15_000 } },
        },
      },
    ],
  },
}));
