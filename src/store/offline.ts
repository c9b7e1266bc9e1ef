// The page's side of working without a network: registers the worker, says when a later version is ready, and changes to it when asked.
//
// 1. Nothing changes by itself: a later version waits until `change` is called, and then this page is loaded anew.
// 2. Other tabs stay as they are until they are loaded anew; their files are kept for them.
// Not here: what is kept (offline-worker.ts).

export interface Offline {
  /** `ready`: the page works without a network. `unavailable`: the browser has no such workers here, or storing failed. */
  readonly state: 'preparing' | 'ready' | 'unavailable';
  /** True when a later version waits for `change`. */
  readonly laterVersion: boolean;
  subscribe(listener: () => void): () => void;
  /** Changes to the later version and loads the page anew; keep everything first. */
  change(): void;
}

export interface OfflineOptions {
  readonly file?: string;
  readonly reload?: () => void;
}

export function goOffline({ file = './offline-worker.js', reload = () => location.reload() }: OfflineOptions = {}): Offline {
  const listeners = new Set<() => void>();
  let state: Offline['state'] = 'preparing';
  let waiting: ServiceWorker | null = null;
  let changing = false;
  const set = (next: Offline['state'], later: ServiceWorker | null = waiting) => {
    if (next === state && later === waiting) return;
    state = next;
    waiting = later;
    for (const listener of [...listeners]) listener();
  };
  const workers = typeof navigator === 'undefined' ? undefined : navigator.serviceWorker;
  const watch = (registration: ServiceWorkerRegistration) => {
    const look = () => {
      // The first version has nothing to replace: it is no later one.
      const later = registration.active === null ? null : registration.waiting;
      set(registration.active === null ? state : 'ready', later);
    };
    const follow = (worker: ServiceWorker | null) => {
      worker?.addEventListener('statechange', () => {
        if (worker.state === 'redundant' && registration.active === null) set('unavailable');
        else look();
      });
    };
    registration.addEventListener('updatefound', () => follow(registration.installing));
    follow(registration.installing);
    follow(registration.active);
    look();
  };
  if (workers === undefined) state = 'unavailable';
  else {
    workers.register(file).then(watch, () => set('unavailable'));
    workers.addEventListener('controllerchange', () => {
      if (changing) reload();
    });
  }
  return {
    get state() {
      return state;
    },
    get laterVersion() {
      return waiting !== null;
    },
    subscribe(listener) {
      listeners.add(listener);
      return () => listeners.delete(listener);
    },
    change() {
      if (waiting === null || changing) return;
      changing = true;
      waiting.postMessage('take over');
    },
  };
}
