// Which tab may write a sheet: one at a time, told by a lock of the browser.
//
// 1. A lock is held until it is released, its tab closes, or another tab takes it: then `lost` is called, and only then.
// 2. A browser without locks lets every tab write; the rev and writer of the row then refuse what comes too late.
// Not here: what becomes of the work when a lock is lost (keeper.ts).

export interface Lock {
  release(): void;
}
export interface Locks {
  /** At once or not at all; `steal` takes it from whoever holds it. */
  take(name: string, options: { readonly steal?: boolean; readonly lost: () => void }): Promise<Lock | null>;
  /** Waits its turn; ends with null when the signal says so. */
  wait(name: string, signal: AbortSignal, lost: () => void): Promise<Lock | null>;
}

type Manager = Pick<LockManager, 'request'>;

export function locksOf(manager: Manager | undefined): Locks {
  if (manager === undefined) {
    return {
      take: async () => ({ release() {} }),
      wait: (_name, signal) => new Promise((done) => signal.addEventListener('abort', () => done(null), { once: true })),
    };
  }
  const request = (name: string, options: LockOptions, lost: () => void): Promise<Lock | null> =>
    new Promise((done) => {
      let held = false;
      let released = false;
      manager
        .request(name, options, (lock) => {
          if (lock === null) {
            done(null);
            return undefined;
          }
          held = true;
          return new Promise<void>((end) => {
            done({
              release() {
                released = true;
                end();
              },
            });
          });
        })
        .catch(() => {
          if (held && !released) lost();
          else done(null);
        });
    });
  return {
    take: (name, { steal = false, lost }) => request(name, steal ? { steal: true } : { ifAvailable: true }, lost),
    wait: (name, signal, lost) => request(name, { signal }, lost),
  };
}
