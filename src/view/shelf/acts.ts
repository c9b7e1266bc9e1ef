// What every screen of the shelf does alike: an act with its trouble told in words, a text saved as a file, a moment put in words.
//
// Not here: which acts there are (register.ts, template-list.ts, fill.ts, keep.ts).

import { StoreFault } from '../../store/index.ts';
import type { House, Session } from '../session.ts';

/** Does it; trouble of the store is told above the screen. True where it was done. */
export async function attempt(session: Session, act: (house: House) => Promise<unknown>): Promise<boolean> {
  if (session.house === null) return false;
  try {
    await act(session.house);
    return true;
  } catch (cause) {
    if (!(cause instanceof StoreFault)) throw cause;
    session.tell({ message: cause.problem.message, wayOut: cause.problem.wayOut, trouble: true });
    return false;
  }
}

/** Saves a text as a file of the user's and says where it is. */
export function saveText(session: Session, text: () => Promise<{ readonly name: string; readonly text: string }>) {
  return attempt(session, async ({ files }) => {
    const file = await text();
    const done = await files.saveText(file.name, file.text);
    if (done.kind === 'trouble') session.tell({ message: done.problem.message, wayOut: done.problem.wayOut, trouble: true });
    else if (done.kind !== 'cancelled') session.tell({ message: done.message });
  });
}

const days = new Intl.DateTimeFormat('en-GB', { day: 'numeric', month: 'short', year: 'numeric' });
const clock = new Intl.DateTimeFormat('en-GB', { hour: '2-digit', minute: '2-digit' });
export const day = (at: number) => days.format(at);
export const time = (at: number) => clock.format(at);
/** For machines: `<time datetime>`. */
export const stamp = (at: number) => new Date(at).toISOString();

/** `CS-014 Mixer drive` */
export const nameOf = ({ documentNumber, title }: { readonly documentNumber?: string | undefined; readonly title: string }) =>
  [documentNumber, title].filter(Boolean).join(' ');

/** The focus on what the selector finds once it stands there; otherwise on the heading of the screen. */
export async function focusOn(owner: HTMLElement & { readonly updateComplete: Promise<unknown> }, selector: string) {
  await owner.updateComplete;
  const found = owner.querySelector<HTMLElement>(selector);
  if (found !== null && selector !== 'h1') {
    found.focus();
    found.scrollIntoView({ block: 'nearest' });
    return;
  }
  // A screen begins at its head, wherever the one before it stood.
  scrollTo(0, 0);
  owner.querySelector<HTMLElement>('h1')?.focus({ preventScroll: true });
}
