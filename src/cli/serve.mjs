// A server of one folder of files on this machine's own address, for `npm start` and the browser tests. Node alone, nothing installed.
//
// 1. Bound to 127.0.0.1: nobody else on the network sees it.
// 2. It reads below its folder only: a path is decoded once, resolved, and must still lie inside; links out of the folder are not followed.
// 3. Every answer carries the policy of the page, so that it holds even where the page's own meta element is changed.
// Not here: installing and building (start.mjs).

import { createReadStream, realpathSync, statSync } from 'node:fs';
import { createServer } from 'node:http';
import { basename, extname, join, resolve, sep } from 'node:path';

const types = new Map([
  ['.html', 'text/html; charset=utf-8'],
  ['.js', 'text/javascript; charset=utf-8'],
  ['.css', 'text/css; charset=utf-8'],
  ['.json', 'application/json; charset=utf-8'],
  ['.svg', 'image/svg+xml'],
  ['.png', 'image/png'],
  ['.woff2', 'font/woff2'],
  ['.webmanifest', 'application/manifest+json'],
  ['.txt', 'text/plain; charset=utf-8'],
]);

const headers = {
  'Content-Security-Policy':
    "default-src 'none'; script-src 'self'; style-src 'self'; font-src 'self'; img-src 'self' data:; manifest-src 'self'; worker-src 'self'; base-uri 'none'; form-action 'none'; frame-ancestors 'none'",
  'X-Content-Type-Options': 'nosniff',
  'Referrer-Policy': 'no-referrer',
  'Cross-Origin-Opener-Policy': 'same-origin',
  'Cross-Origin-Resource-Policy': 'same-origin',
};

/** The worker that keeps the page for use without a network fetches the files of the page, and nothing else. */
const workerPolicy = { 'Content-Security-Policy': "default-src 'none'; connect-src 'self'" };

/** The file a request path means, or null. `folder` must be a real path. */
export function fileOf(folder, requestPath) {
  let path;
  try {
    path = decodeURIComponent(requestPath.split(/[?#]/, 1)[0]);
  } catch {
    return null;
  }
  if (path.includes('\0')) return null;
  const inside = (file) => file === folder || file.startsWith(folder + sep);
  let file = resolve(folder, `.${path.startsWith('/') ? path : `/${path}`}`);
  if (!inside(file)) return null;
  try {
    if (statSync(file).isDirectory()) file = join(file, 'index.html');
    file = realpathSync(file);
    return inside(file) && statSync(file).isFile() ? file : null;
  } catch {
    return null;
  }
}

/**
 * Serves `folder`. With `port` 0 the system chooses; a `port` that is taken is an error unless `orNext`, which tries the following ones.
 * Resolves to `{ url, port, close }`.
 */
export async function serve(folder, { port = 0, orNext = false } = {}) {
  const root = realpathSync(folder);
  const server = createServer((request, response) => {
    const answer = (status, text) => {
      response.writeHead(status, { ...headers, 'Content-Type': 'text/plain; charset=utf-8' });
      response.end(request.method === 'HEAD' ? undefined : `${text}\n`);
    };
    if (request.method !== 'GET' && request.method !== 'HEAD') return answer(405, 'Only reading is possible here.');
    const file = fileOf(root, request.url ?? '/');
    if (file === null) return answer(404, 'There is no such file.');
    response.writeHead(200, {
      ...headers,
      ...(basename(file) === 'offline-worker.js' ? workerPolicy : {}),
      'Content-Type': types.get(extname(file)) ?? 'application/octet-stream',
      'Content-Length': statSync(file).size,
      // Names under assets/ change with their content; everything else may change under its name.
      'Cache-Control': file.includes(`${sep}assets${sep}`) ? 'public, max-age=31536000, immutable' : 'no-cache',
    });
    if (request.method === 'HEAD') return response.end();
    createReadStream(file)
      .on('error', () => response.destroy())
      .pipe(response);
  });
  const listen = (wanted) =>
    new Promise((done, failed) => {
      server.once('error', failed);
      server.listen(wanted, '127.0.0.1', () => {
        server.removeListener('error', failed);
        done(undefined);
      });
    });
  for (let wanted = port; ; wanted += 1) {
    try {
      await listen(wanted);
      break;
    } catch (fault) {
      if (fault.code !== 'EADDRINUSE' || !orNext || wanted >= port + 100) throw fault;
    }
  }
  const { port: taken } = server.address();
  return {
    port: taken,
    url: `http://127.0.0.1:${taken}/`,
    close: () =>
      new Promise((done) => {
        server.close(() => done(undefined));
        server.closeAllConnections();
      }),
  };
}
