// Holds the direction of imports between the rooms of src/, for every form in which a file can name another one.
//
// 1. The order of the rooms is the order of `rooms`: a room may name itself and the rooms before it. The command line may not name
//    the store or the page.
// 2. Read from the syntax tree, so neither a comment nor a string can hide or fake an import. What the tree holds and the linter
//    does not look into: `import('x').T` types, `new URL('x', import.meta.url)`, `import.meta.glob`, path references.
// 3. A file that cannot be read, a computed import and a folder that is no room are breaches: silence would be a green check of nothing.
// 4. One room reads another through its index only, so that what a room offers stands in one place.
// Not here: cycles between files and globals of the page (.biome.jsonc).

import { readdirSync, readFileSync } from 'node:fs';
import { dirname, join, normalize, relative, sep } from 'node:path';
import { fileURLToPath } from 'node:url';
import { parseSync } from 'vite';

export const rooms = ['quantity', 'formula', 'sheet', 'study', 'record', 'check', 'store', 'view', 'cli'];

/** Rooms that `room` may name. */
export function allowed(room) {
  const upTo = rooms.slice(0, rooms.indexOf(room) + 1);
  return new Set(room === 'cli' ? upTo.filter((name) => name !== 'store' && name !== 'view') : upTo);
}

const readable = /\.(ts|tsx|mts|js|mjs|jsx)$/;

/** Every place where a source text names another module: `{ specifier, line, form }`; `specifier` null where it is computed. */
export function readImports(path, text) {
  const lang = /\.tsx$/.test(path) ? 'tsx' : /\.m?ts$/.test(path) ? 'ts' : 'js';
  const { program, errors } = parseSync(path, text, { lang, sourceType: 'module' });
  if (errors.length > 0) throw new Error(errors[0].message);
  const found = [];
  const add = (node, source, form) => {
    const literal = source?.type === 'Literal' && typeof source.value === 'string' ? source.value : plainTemplate(source);
    found.push({ specifier: literal, form, line: text.slice(0, node.start).split('\n').length });
  };
  const visit = (node) => {
    if (Array.isArray(node)) return node.forEach(visit);
    if (node === null || typeof node !== 'object') return;
    if (node.type === 'ImportDeclaration') add(node, node.source, 'import');
    if ((node.type === 'ExportNamedDeclaration' || node.type === 'ExportAllDeclaration') && node.source)
      add(node, node.source, 'export from');
    if (node.type === 'ImportExpression') add(node, node.source, 'import()');
    if (node.type === 'TSImportType') add(node, node.source ?? node.argument?.literal ?? node.argument, 'import type');
    if (node.type === 'TSExternalModuleReference') add(node, node.expression, 'import =');
    if (node.type === 'TSModuleDeclaration' && node.id?.type === 'Literal' && node.id.value.startsWith('.'))
      add(node, node.id, 'declare module');
    if (node.type === 'NewExpression' && node.callee?.name === 'URL' && isMeta(node.arguments[1], 'url'))
      add(node, node.arguments[0], 'new URL');
    if (node.type === 'CallExpression') {
      if (node.callee?.name === 'require') add(node, node.arguments[0], 'require');
      if (isMeta(node.callee, 'glob')) {
        const first = node.arguments[0];
        for (const one of first?.type === 'ArrayExpression' ? first.elements : [first]) add(node, one, 'import.meta.glob');
      }
      if (isMeta(node.callee, 'resolve')) add(node, node.arguments[0], 'import.meta.resolve');
    }
    for (const key of Object.keys(node)) if (key !== 'type') visit(node[key]);
  };
  visit(program);
  for (const match of text.matchAll(/^\/\/\/\s*<reference\s+path\s*=\s*["']([^"']+)["']/gm)) {
    found.push({ specifier: match[1], form: 'reference', line: text.slice(0, match.index).split('\n').length });
  }
  return found;
}

const isMeta = (node, name) =>
  node?.type === 'MemberExpression' && node.object?.type === 'MetaProperty' && node.property?.name === name;
const plainTemplate = (node) =>
  node?.type === 'TemplateLiteral' && node.expressions.length === 0 ? node.quasis[0].value.cooked : null;

/** Breaches in one file. `path` is relative to the root, with `/`. */
export function breachesOf(path, text) {
  const [, room, ...rest] = path.split('/');
  const where = (line) => `${path}:${line}`;
  if (!rooms.includes(room) || rest.length === 0) return [`${where(1)} lies in no room of the house (${rooms.join(', ')})`];
  let imports;
  try {
    imports = readImports(path, text);
  } catch (fault) {
    return [`${where(1)} cannot be read: ${fault.message}`];
  }
  const may = allowed(room);
  const breaches = [];
  for (const { specifier, form, line } of imports) {
    if (specifier === null) {
      // A path on disk built from parts is the command line's business; the page and the plain rooms name what they load.
      if (room !== 'cli') breaches.push(`${where(line)} ${form} of a computed name: write the name out`);
      continue;
    }
    if (!specifier.startsWith('.') && !specifier.startsWith('/')) continue;
    const target = normalize(specifier.startsWith('/') ? specifier.slice(1) : join(dirname(path), specifier)).replaceAll(
      sep,
      '/',
    );
    const [top, other, ...inner] = target.split('/');
    if (top !== 'src' || other === room) continue;
    if (!may.has(other)) breaches.push(`${where(line)} ${form} '${specifier}': src/${room} may not name src/${other}`);
    else if (inner.join('/') !== 'index.ts') {
      breaches.push(`${where(line)} ${form} '${specifier}': another room is read through its index.ts`);
    }
  }
  return breaches;
}

/** All breaches of a tree, and how many files were read. */
export function checkTree(root) {
  const files = readdirSync(join(root, 'src'), { recursive: true, withFileTypes: true })
    .filter((entry) => entry.isFile() && readable.test(entry.name))
    .map((entry) => relative(root, join(entry.parentPath ?? entry.path, entry.name)).replaceAll(sep, '/'))
    .sort();
  return { visited: files.length, breaches: files.flatMap((path) => breachesOf(path, readFileSync(join(root, path), 'utf8'))) };
}

if (process.argv[1] === fileURLToPath(import.meta.url)) {
  const { visited, breaches } = checkTree(join(dirname(fileURLToPath(import.meta.url)), '..'));
  for (const breach of breaches) console.error(breach);
  if (visited < 30) console.error(`only ${visited} files were read: this is not the whole house`);
  console.log(`rooms: ${visited} files read, ${breaches.length} breaches`);
  process.exitCode = breaches.length === 0 && visited >= 30 ? 0 : 1;
}
