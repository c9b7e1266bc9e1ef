// Finds a real browser for the tests: CHROME_PATH, one that is installed, or else the one that an npm package carries.
//
// 1. The packed one is unpacked into a folder of our own: it would otherwise take any file of its name in the temporary folder.
// 2. It brings its libraries for machines that have none of a desktop's; they are used only where the browser does not start without.
// 3. Its own list of switches weakens the web's rules (one process, no origin checks) and is not used.
// Not here: starting pages (setup.ts).

import { spawnSync } from 'node:child_process';
import { accessSync, constants, existsSync, mkdirSync } from 'node:fs';
import { delimiter, join } from 'node:path';
import { fileURLToPath } from 'node:url';

const names = ['chromium', 'chromium-browser', 'google-chrome', 'google-chrome-stable', 'chrome'];

function onPath(name) {
  for (const folder of (process.env.PATH ?? '').split(delimiter)) {
    const file = join(folder, name);
    try {
      accessSync(file, constants.X_OK);
      return file;
    } catch {
      // not in this folder
    }
  }
  return null;
}

const starts = (file, env = {}) => {
  const done = spawnSync(file, ['--version'], { env: { ...process.env, ...env }, encoding: 'utf8', timeout: 60_000 });
  return done.status === 0 ? done.stdout.trim() : null;
};

/** `{ path, version, env, from }` of a browser that starts. Throws where there is none. */
export function findChromium() {
  const given = process.env.CHROME_PATH;
  if (given !== undefined && given !== '') {
    const version = starts(given);
    if (version === null) throw new Error(`CHROME_PATH is ${given}, and no browser starts from there.`);
    return { path: given, version, env: {}, from: 'CHROME_PATH' };
  }
  if (process.env.TIGHTSIDE_PACKED_BROWSER !== '1') {
    for (const name of names) {
      const path = onPath(name);
      const version = path === null ? null : starts(path);
      if (version !== null) return { path, version, env: {}, from: 'installed' };
    }
  }
  return packed();
}

function packed() {
  const folder = fileURLToPath(new URL('../../.cache/browser', import.meta.url));
  mkdirSync(folder, { recursive: true });
  // The variable makes the package unpack its libraries too.
  const env = { ...process.env, TMPDIR: folder, AWS_LAMBDA_JS_RUNTIME: 'nodejs20.x' };
  const code = "import c from '@sparticuz/chromium'; console.log(await c.executablePath());";
  const done = spawnSync(process.execPath, ['--input-type=module', '-e', code], {
    cwd: fileURLToPath(new URL('../..', import.meta.url)),
    env,
    encoding: 'utf8',
    timeout: 300_000,
  });
  const path = join(folder, 'chromium');
  if (!existsSync(path)) throw new Error(`No browser is installed, and the packed one could not be unpacked: ${done.stderr}`);
  const libraries = [join(folder, 'al2023/lib'), process.env.LD_LIBRARY_PATH].filter(Boolean).join(':');
  for (const extra of [
    {},
    { LD_LIBRARY_PATH: libraries },
    { LD_LIBRARY_PATH: libraries, FONTCONFIG_PATH: join(folder, 'fonts') },
  ]) {
    const version = starts(path, extra);
    if (version !== null) return { path, version, env: extra, from: 'npm package' };
  }
  throw new Error('No browser is installed, and the packed one does not start on this machine.');
}
