// What a fresh clone lacks before anything can run: installed packages and a built page. Node alone, nothing installed.
//
// 1. Packages are looked at, not dates: installed is what the lock file names, at its versions.
// 2. The page is built when a source of it is younger than what was built.
// Not here: what is then done with them (start.mjs, test/run.mjs).

import { spawnSync } from 'node:child_process';
import { existsSync, readdirSync, readFileSync, statSync } from 'node:fs';
import { dirname, join } from 'node:path';
import { fileURLToPath } from 'node:url';

export const root = join(dirname(fileURLToPath(import.meta.url)), '../..');

/** Runs a command with its output shown; true when it ended well. */
export function run(command, args, options = {}) {
  const done = spawnSync(command, args, { cwd: root, stdio: 'inherit', shell: process.platform === 'win32', ...options });
  return done.status === 0;
}

/** Whether node_modules holds what package-lock.json names. Packages for other machines may be missing. */
export function isInstalled(folder = root) {
  try {
    const wanted = JSON.parse(readFileSync(join(folder, 'package-lock.json'), 'utf8')).packages;
    const there = new Map(
      Object.entries(JSON.parse(readFileSync(join(folder, 'node_modules/.package-lock.json'), 'utf8')).packages),
    );
    return Object.entries(wanted).every(([path, entry]) => {
      if (path === '') return true;
      const found = there.get(path);
      return found === undefined ? entry.optional === true || entry.peer === true : found.version === entry.version;
    });
  } catch {
    return false;
  }
}

/** Installs by the lock file where something is missing; true when all is there. */
export function install() {
  if (isInstalled()) return true;
  console.log('Installing packages (once; needs the network) …');
  return run('npm', ['ci', '--include=dev', '--no-audit', '--no-fund']);
}

function newest(path) {
  if (!existsSync(path)) return 0;
  const state = statSync(path);
  if (!state.isDirectory()) return state.mtimeMs;
  return Math.max(state.mtimeMs, ...readdirSync(path).map((name) => newest(join(path, name))));
}

/** Whether the built page is at least as young as its sources. */
export function isBuilt() {
  const built = join(root, 'dist/page/index.html');
  if (!existsSync(built)) return false;
  const sources = ['src', 'templates', 'index.html', 'vite.config.ts', 'package-lock.json', 'tsconfig.json'];
  return Math.max(...sources.map((name) => newest(join(root, name)))) <= statSync(built).mtimeMs;
}

/** Builds page and command line. */
export function build() {
  const vite = join(root, 'node_modules/vite/bin/vite.js');
  return (
    run(process.execPath, [vite, 'build', '--logLevel', 'error']) &&
    run(process.execPath, [vite, 'build', '--mode', 'cli', '--logLevel', 'error'])
  );
}
