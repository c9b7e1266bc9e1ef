// The address of a screen: `#/sheet/ID`, `#/shelf`, `#/template/ID`, `#/keep/ID`; no hash at all is the sheet of last time.

export type Route =
  /** `id` null: whichever sheet comes first. */
  | { readonly screen: 'sheet'; readonly id: string | null }
  | { readonly screen: 'shelf' }
  /** A new sheet from a template, before it is made. */
  | { readonly screen: 'template'; readonly id: string }
  /** A sheet that is to be kept as a template. */
  | { readonly screen: 'keep'; readonly id: string };

export function hashOf(route: Route): string {
  if (route.screen === 'shelf') return '#/shelf';
  return route.id === null ? '#/' : `#/${route.screen}/${encodeURIComponent(route.id)}`;
}

/** Anything that is no address of ours is the sheet of last time. */
export function readHash(hash: string): Route {
  const [, screen, id] = /^#\/(sheet|template|keep|shelf)(?:\/([^/]+))?$/u.exec(hash) ?? [];
  if (screen === 'shelf') return { screen };
  if ((screen === 'sheet' || screen === 'template' || screen === 'keep') && id !== undefined) {
    try {
      return { screen, id: decodeURIComponent(id) };
    } catch {
      // No text that an address of ours could hold.
    }
  }
  return { screen: 'sheet', id: null };
}

/** Follows the address of the page. `go` with `instead` leaves no way back to the address before. */
export function createRoute(heard: (route: Route) => void) {
  let now = readHash(location.hash);
  addEventListener('hashchange', () => {
    const next = readHash(location.hash);
    if (hashOf(next) === hashOf(now)) return;
    now = next;
    heard(now);
  });
  return {
    route: () => now,
    go(route: Route, instead = false) {
      if (hashOf(route) === hashOf(now)) return;
      now = route;
      if (instead) history.replaceState(null, '', hashOf(route));
      else history.pushState(null, '', hashOf(route));
      heard(now);
    },
  };
}
