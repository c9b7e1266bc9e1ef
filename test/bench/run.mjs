// `npm run bench`: bundles test/bench/main.ts for Node and runs it, then the page in a real browser (page.mjs). Builds what it needs.
import { spawnSync } from 'node:child_process';
import { mkdtempSync, rmSync } from 'node:fs';
import { tmpdir } from 'node:os';
import { dirname, join } from 'node:path';
import { fileURLToPath } from 'node:url';
import { build } from 'vite';

const root = join(dirname(fileURLToPath(import.meta.url)), '..', '..');
const out = mkdtempSync(join(tmpdir(), 'tightside-bench-'));
await build({
  root,
  configFile: false,
  logLevel: 'error',
  build: {
    ssr: join(root, 'test/bench/main.ts'),
    outDir: out,
    emptyOutDir: true,
    target: 'node20',
    minify: false,
    rollupOptions: { output: { entryFileNames: 'bench.mjs' } },
  },
  ssr: { noExternal: true },
});
const ran = spawnSync(process.execPath, [join(out, 'bench.mjs')], { stdio: 'inherit' });
rmSync(out, { recursive: true, force: true });
if (ran.status === 0) await import('./page.mjs');
else process.exitCode = ran.status ?? 1;
