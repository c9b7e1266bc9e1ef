// The check of the rooms, checked: every form of import is seeded against the direction of the house and must be found.

import { execFileSync } from 'node:child_process';
import { mkdirSync, mkdtempSync, readFileSync, rmSync, writeFileSync } from 'node:fs';
import { tmpdir } from 'node:os';
import { join } from 'node:path';
import { afterAll, describe, expect, it } from 'vitest';
// @ts-expect-error plain JavaScript, run by the lint step without a compiler
import { allowed, breachesOf, checkTree, rooms } from '../rooms.mjs';

const root = new URL('../..', import.meta.url).pathname;

describe('rooms', () => {
  it('reads the whole house and finds nothing', () => {
    const { visited, breaches } = checkTree(root);
    expect(breaches).toEqual([]);
    expect(visited).toBeGreaterThan(30);
  });

  it.each([
    ['import', `import { a } from '../record/index.ts';`],
    ['import for its effect', `import '../record/index.ts';`],
    ['import of a type', `import type { A } from '../record/index.ts';`],
    ['type by import()', `type A = import('../record/index.ts').A;`],
    ['import()', `const load = () => import('../record/index.ts');`],
    ['import() of a plain template', 'const load = () => import(`../record/index.ts`);'],
    ['export from', `export { a } from '../record/index.ts';`],
    ['export all', `export * from '../record/index.ts';`],
    ['export of a type', `export type { A } from '../record/index.ts';`],
    ['new URL', `const a = new URL('../record/index.ts', import.meta.url);`],
    ['a worker', `const a = new Worker(new URL('../record/index.ts', import.meta.url), { type: 'module' });`],
    ['glob', `const a = import.meta.glob('../record/*.ts');`],
    ['globs', `const a = import.meta.glob(['./x.ts', '../record/*.ts']);`],
    ['resolve', `const a = import.meta.resolve('../record/index.ts');`],
    ['import =', `import a = require('../record/index.ts');`],
    ['require', `const a = require('../record/index.ts');`],
    ['path reference', `/// <reference path="../record/index.ts" />`],
    ['way round', `import { a } from './deep/../../record/index.ts';`],
  ])('finds %s against the direction', (_form, text) => {
    expect(breachesOf('src/sheet/seed.ts', text)).toHaveLength(1);
    expect(breachesOf('src/sheet/seed.ts', text)[0]).toContain('src/sheet may not name src/record');
    // the same text is in order one floor up
    expect(breachesOf('src/check/seed.ts', text).filter((breach: string) => breach.includes('may not name'))).toEqual([]);
  });

  it('is not fooled by comments and strings, and accepts the direction of the house', () => {
    const text = `// import '../record/index.ts'\nimport { a } from '../quantity/index.ts';\nimport './near.ts';\nimport 'lit';\nexport const s = "import '../view/index.ts'";`;
    expect(breachesOf('src/sheet/seed.ts', text)).toEqual([]);
  });

  it('wants the index of another room, a known room, a name written out and a file that can be read', () => {
    expect(breachesOf('src/sheet/seed.ts', `import { a } from '../quantity/unit.ts';`)[0]).toContain('index.ts');
    expect(breachesOf('src/attic/seed.ts', '')[0]).toContain('no room');
    expect(breachesOf('src/seed.ts', '')[0]).toContain('no room');
    expect(breachesOf('src/view/seed.ts', 'const load = (n: string) => import(`./$' + '{n}.ts`);')[0]).toContain('computed');
    expect(breachesOf('src/view/seed.ts', 'const = ;')[0]).toContain('cannot be read');
  });

  it('lets the command line name neither page nor store, and nobody the command line', () => {
    expect([...allowed('cli')]).toEqual(['quantity', 'formula', 'sheet', 'study', 'record', 'check', 'cli']);
    for (const room of rooms.filter((name: string) => name !== 'cli')) expect(allowed(room).has('cli')).toBe(false);
  });
});

describe('the linter', () => {
  const seed = mkdtempSync(join(tmpdir(), 'rooms-'));
  afterAll(() => rmSync(seed, { recursive: true }));

  it('finds imports against the direction, cycles, the page in a plain room and text that is run', () => {
    // A copy of the configuration over a small house: the real tree is never written to by a test.
    const configuration = readFileSync(join(root, '.biome.jsonc'), 'utf8');
    writeFileSync(
      join(seed, '.biome.jsonc'),
      configuration
        .replace('"useIgnoreFile": true', '"useIgnoreFile": false')
        .replace('"enabled": true, "clientKind"', '"enabled": false, "clientKind"'),
    );
    const put = (path: string, text: string) => {
      mkdirSync(join(seed, path, '..'), { recursive: true });
      writeFileSync(join(seed, path), text);
    };
    put('src/view/page.ts', `export const page = 1;\n`);
    put('src/quantity/up.ts', `import { page } from '../view/page.ts';\n\nexport const up = page;\n`);
    put('src/cli/sideways.ts', `import { page } from '../view/page.ts';\n\nexport const sideways = page;\n`);
    put('src/sheet/node.ts', `import { readFileSync } from 'node:fs';\n\nexport const node = readFileSync;\n`);
    put('src/formula/dom.ts', `export const title = () => document.title;\n`);
    put('src/store/run.ts', `export const run = (text: string) => new Function(text);\n`);
    put('src/record/a.ts', `import { b } from './b.ts';\n\nexport const a = (): number => b();\n`);
    put('src/record/b.ts', `import { a } from './a.ts';\n\nexport const b = (): number => a();\n`);
    put('src/record/fine.ts', `import { up } from '../quantity/up.ts';\n\nexport const fine = up;\n`);
    let report = '';
    try {
      execFileSync(join(root, 'node_modules/.bin/biome'), ['lint', '--reporter=github', '--max-diagnostics=none', '.'], {
        cwd: seed,
        encoding: 'utf8',
        stdio: 'pipe',
      });
    } catch (fault) {
      report = (fault as { stdout: string }).stdout;
    }
    const found = (rule: string, path: string) => report.split('\n').some((line) => line.includes(rule) && line.includes(path));
    expect(found('noRestrictedImports', 'src/quantity/up.ts')).toBe(true);
    expect(found('noRestrictedImports', 'src/cli/sideways.ts')).toBe(true);
    expect(found('noRestrictedImports', 'src/sheet/node.ts')).toBe(true);
    expect(found('noRestrictedGlobals', 'src/formula/dom.ts')).toBe(true);
    expect(found('noRestrictedGlobals', 'src/store/run.ts')).toBe(true);
    expect(found('noImportCycles', 'src/record/a.ts')).toBe(true);
    expect(report).not.toContain('src/record/fine.ts');
    expect(report).not.toContain('src/view/page.ts');
  });
});
