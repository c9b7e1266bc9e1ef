// What a sheet has to do with templates arrives behind the first screen, with the templates themselves.
//
// Not here: what it does (template/).

import type { Desk } from './desk-face.ts';
import type { Session } from './session.ts';

const load = () => import('./template/index.ts');

export async function loadTemplates(): Promise<void> {
  await load().catch(() => undefined);
}

/** A block of a template is asked for at a line; says so where it cannot be. */
export async function askForBlock(session: Session, desk: Desk, behind: string | null, goTo: (cell: string) => void) {
  if (desk.locked !== null) return desk.tell(desk.locked);
  try {
    await (await load()).askForBlock(desk, session.house, behind, goTo);
  } catch {
    desk.tell('the templates could not be loaded; load the page anew, the sheet is kept', behind ?? undefined);
  }
}

/** Reads the sheet beside the template that it came from, where that is at hand. */
export async function compareWithOrigin(session: Session, desk: Desk) {
  const { template } = desk.kept;
  if (template === undefined) return;
  // The sheet stands without it: what could not be compared is said in its head.
  const found = await load()
    .then(({ templateOf }) => templateOf(template, session.house))
    .catch(() => null);
  desk.compareWith(found);
}
