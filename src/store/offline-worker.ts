// The page without a network: a worker of the browser that answers from the files it kept when this version was first loaded.
//
// 1. A version is complete or not there at all: it is installed when every file of its list has arrived.
// 2. A new version waits. It takes over when the page says so, after the user has said so; never by itself while a page is in use.
// 3. A page that is still open in the old version keeps its files: they go when no other page is open.
// 4. It asks the network only while it installs a version, and for what is in no list; nothing is ever sent.
// The list and the version are put in when the page is built (offline-files.ts). Nothing may be imported: this is one plain script.

interface Event {
  waitUntil(work: Promise<unknown>): void;
}
interface Asked extends Event {
  readonly request: Request;
  respondWith(answer: Promise<Response>): void;
}
interface Worker {
  readonly registration: { readonly scope: string; readonly waiting: unknown; readonly installing: unknown };
  readonly clients: { matchAll(options: object): Promise<readonly unknown[]>; claim(): Promise<void> };
  skipWaiting(): Promise<void>;
  addEventListener(kind: 'install' | 'activate', listener: (event: Event) => void): void;
  addEventListener(kind: 'fetch', listener: (event: Asked) => void): void;
  addEventListener(kind: 'message', listener: (event: Event & { readonly data: unknown }) => void): void;
}

const worker = globalThis as unknown as Worker;
const version = '__VERSION__';
const files: readonly string[] = JSON.parse('__FILES__');
const family = 'tightside page ';
const mine = `${family}${version}`;
const { scope } = worker.registration;

worker.addEventListener('install', (event) => {
  event.waitUntil(
    caches
      .open(mine)
      .then((cache) => cache.addAll(files.map((file) => new Request(new URL(file, scope), { cache: 'no-cache' })))),
  );
});

worker.addEventListener('activate', (event) => event.waitUntil(worker.clients.claim()));

worker.addEventListener('message', (event) => {
  if (event.data === 'take over') event.waitUntil(worker.skipWaiting());
});

worker.addEventListener('fetch', (event) => {
  const { request } = event;
  if (request.method !== 'GET' || !request.url.startsWith(scope)) return;
  const { origin, pathname } = new URL(request.url);
  const isPage = [scope, new URL('index.html', scope).href].includes(origin + pathname);
  if (request.mode === 'navigate' && isPage) {
    event.respondWith(page(request));
    event.waitUntil(tidy());
  } else event.respondWith(kept(request));
});

async function page(request: Request): Promise<Response> {
  const cache = await caches.open(mine);
  return (await cache.match(new URL('index.html', scope).href)) ?? fetch(request);
}

/** From this version first, then from the one that a page may still run in. */
async function kept(request: Request): Promise<Response> {
  const cache = await caches.open(mine);
  return (await cache.match(request)) ?? (await caches.match(request)) ?? fetch(request);
}

async function tidy(): Promise<void> {
  const windows = await worker.clients.matchAll({ type: 'window', includeUncontrolled: true });
  if (windows.length > 1) return;
  // A later version that waits, or is on its way, has its files already.
  const { waiting, installing } = worker.registration;
  if (waiting !== null || installing !== null) return;
  for (const name of await caches.keys()) if (name.startsWith(family) && name !== mine) await caches.delete(name);
}
