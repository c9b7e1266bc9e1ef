// Work that nobody waits for: done when the browser has time.

/** Runs `work` in a pause, with the milliseconds that it has; at the latest after half a second. */
export function inPause(work: (remaining: number) => void) {
  if (globalThis.requestIdleCallback === undefined) setTimeout(() => work(5), 50);
  else requestIdleCallback((until) => work(until.timeRemaining()), { timeout: 500 });
}
