// `npm start`: from a fresh clone to the sheet on the screen. Installs and builds what is missing, serves the page on this machine only.
//
//   PORT=8080 npm start          that port, or an error
//   npm start -- --no-open       does not open a browser window
//
// Node alone: this file runs before anything is installed.

import { spawn } from 'node:child_process';
import { join } from 'node:path';
import { serve } from './serve.mjs';
import { build, install, isBuilt, root } from './setup.mjs';

const options = process.argv.slice(2);
const unknown = options.find((option) => option !== '--no-open');
if (unknown !== undefined) end(4, `npm start knows the option --no-open; ${unknown} is not known.`);
const fixed = process.env.PORT;
const port = fixed === undefined || fixed === '' ? 4173 : Number(fixed);
if (!Number.isInteger(port) || port < 0 || port > 65535) end(4, `PORT is ${fixed}; write a port number from 0 to 65535.`);

if (!install()) end(1, 'The packages could not be installed: see above. Check the network connection, then run npm start again.');
if (!isBuilt()) {
  console.log('Building the page …');
  if (!build()) end(1, 'The page could not be built: see above.');
}

try {
  const server = await serve(join(root, 'dist/page'), { port, orNext: fixed === undefined || fixed === '' });
  console.log(`\n  Tightside is at ${server.url}\n  Ctrl+C ends it.\n`);
  for (const signal of ['SIGINT', 'SIGTERM']) {
    process.once(signal, () => {
      server.close().then(() => process.exit(0));
    });
  }
  if (!options.includes('--no-open') && process.stdout.isTTY && !process.env.CI) open(server.url);
} catch (fault) {
  if (fault.code === 'EADDRINUSE') end(1, `Port ${port} is taken: choose another one, for example PORT=${port + 1} npm start.`);
  if (fault.code === 'EACCES') end(1, `Port ${port} may not be used by this account: choose one above 1023.`);
  throw fault;
}

function open(url) {
  const [command, ...args] =
    process.platform === 'darwin'
      ? ['open', url]
      : process.platform === 'win32'
        ? ['cmd', '/c', 'start', '', url]
        : ['xdg-open', url];
  // A machine without a desktop has no opener: the address is printed above.
  spawn(command, args, { stdio: 'ignore', detached: true })
    .on('error', () => {})
    .unref();
}

function end(code, text) {
  console.error(text);
  process.exit(code);
}
