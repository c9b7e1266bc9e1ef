// Files, standard streams and the folder of templates: all that the command line touches outside itself.
//
// 1. A file is written whole or not at all: into a new file beside it, then put in its place.
// 2. A place that cannot be read or written is a FileTrouble with a sentence; nothing else is caught here.
// 3. `-` is standard input where a file is read and standard output where one is written.
// Not here: what a sheet file holds (src/sheet).

import { randomBytes } from 'node:crypto';
import { link, open, readdir, readFile, realpath, rename, stat, unlink } from 'node:fs/promises';
import { basename, dirname, join, resolve } from 'node:path';

export class FileTrouble extends Error {}

export interface Io {
  /** UTF-8 text of a file, or of standard input for `-`. */
  read(path: string): Promise<string>;
  /** `replace: false` refuses where a file is there already. */
  write(path: string, text: string, options: { readonly replace: boolean }): Promise<void>;
  exists(path: string): Promise<boolean>;
  /** True where both paths lead to one file. */
  same(one: string, other: string): Promise<boolean>;
  out(text: string): void;
  err(text: string): void;
  /** Paths of the sheet files in a folder. */
  sheetFiles(folder: string): Promise<readonly string[]>;
  /** Names of the files in the folder of templates, and the text of one. */
  templateFiles(): Promise<readonly string[]>;
  templateText(file: string): Promise<string>;
}

export function nodeIo(
  templates: string,
  streams: { readonly out: (text: string) => void; readonly err: (text: string) => void },
): Io {
  return {
    read: async (path) => utf8(path, path === '-' ? await standardInput() : await attempt('read', path, () => readFile(path))),
    write: async (path, text, options) => {
      if (path === '-') streams.out(text);
      else await attempt('written', path, () => writeWhole(path, text, options.replace));
    },
    exists: async (path) => (await stat(path).catch(() => undefined)) !== undefined,
    same: async (one, other) => {
      if (one === '-' || other === '-') return false;
      const [a, b] = await Promise.all([one, other].map((path) => realpath(path).catch(() => resolve(path))));
      return a === b;
    },
    out: streams.out,
    err: streams.err,
    sheetFiles: async (path) => (await sheetNames(path)).map((file) => join(path, file)),
    templateFiles: () => sheetNames(templates),
    templateText: async (file) => utf8(file, await attempt('read', file, () => readFile(join(templates, file)))),
  };
}

async function sheetNames(folder: string): Promise<string[]> {
  return (await attempt('read', folder, () => readdir(folder))).filter((file) => file.endsWith('.sheet.json')).sort();
}

const reasons: ReadonlyMap<string, string> = new Map([
  ['ENOENT', 'there is no such file or folder'],
  ['ENOTDIR', 'part of the path is not a folder'],
  ['EISDIR', 'it is a folder'],
  ['EACCES', 'permission is denied'],
  ['EPERM', 'permission is denied'],
  ['EROFS', 'the disk is read-only'],
  ['ENOSPC', 'the disk is full'],
  ['EEXIST', 'there is such a file already'],
  ['ENAMETOOLONG', 'the name is too long'],
  ['ERR_FS_FILE_TOO_LARGE', 'it is too large'],
  ['ERR_INVALID_ARG_VALUE', 'this is no path'],
]);

async function attempt<T>(what: 'read' | 'written', path: string, act: () => Promise<T>): Promise<T> {
  try {
    return await act();
  } catch (thrown) {
    if (thrown instanceof FileTrouble) throw thrown;
    const code = typeof thrown === 'object' && thrown !== null && 'code' in thrown ? String(thrown.code) : '';
    if (code === '') throw thrown;
    throw new FileTrouble(`${path.replace(/\p{Cc}/gu, ' ')}: cannot be ${what}: ${reasons.get(code) ?? code}`);
  }
}

function utf8(path: string, bytes: Uint8Array): string {
  try {
    return new TextDecoder('utf-8', { fatal: true, ignoreBOM: true }).decode(bytes);
  } catch {
    throw new FileTrouble(`${path}: cannot be read: it is not UTF-8 text`);
  }
}

async function standardInput(): Promise<Uint8Array> {
  const chunks: Uint8Array[] = [];
  for await (const chunk of process.stdin)
    chunks.push(typeof chunk === 'string' ? new TextEncoder().encode(chunk) : (chunk as Uint8Array));
  return Buffer.concat(chunks);
}

async function writeWhole(path: string, text: string, replace: boolean): Promise<void> {
  const known = await stat(path).catch(() => undefined);
  if (known !== undefined && !replace)
    throw new FileTrouble(`${path}: there is such a file already; choose another name, or add --force to replace it`);
  if (known !== undefined && !known.isFile()) {
    // A device or a pipe is written to, never replaced; a folder says that it is one.
    const device = await open(path, 'w');
    await device.writeFile(text).finally(() => device.close());
    return;
  }
  const target = known === undefined ? path : await realpath(path);
  const beside = join(dirname(target), `.${basename(target)}.${randomBytes(6).toString('hex')}`);
  const file = await open(beside, 'wx', known?.mode ?? 0o666);
  try {
    await file.writeFile(text);
    await file.sync();
    await file.close();
    if (replace) await rename(beside, target);
    else await linkInPlace(beside, target);
  } catch (thrown) {
    await file.close().catch(() => undefined);
    await unlink(beside).catch(() => undefined);
    throw thrown;
  }
}

/** Unlike a rename, a link fails where another program has put a file meanwhile. */
async function linkInPlace(beside: string, target: string): Promise<void> {
  try {
    await link(beside, target);
  } catch (thrown) {
    if ((thrown as { code?: string }).code === 'EEXIST') throw thrown;
    // A disk without links.
    await rename(beside, target);
    return;
  }
  await unlink(beside);
}
