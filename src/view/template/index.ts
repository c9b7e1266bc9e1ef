// What a sheet has to do with templates once it lies on the desk: a block of one put in, and the comparison with the one it came from.
//
// Not here: new sheets from templates, sheets kept as templates (shelf/).

import './template.css';
import type { InsertedBlock } from '../../sheet/index.ts';
import type { Desk } from '../desk-face.ts';
import type { House } from '../session.ts';
import { BlockElement } from './block-form.ts';
import { templateGroups } from './find.ts';

export { templateOf } from './find.ts';

customElements.define('ts-block', BlockElement);

/** Asks what is to be put in behind the section of the line; `goTo` leads to the first new line. */
export async function askForBlock(desk: Desk, house: House | null, behind: string | null, goTo: (cell: string) => void) {
  desk.finish();
  const form = new BlockElement();
  form.desk = desk;
  form.behind = behind;
  form.groups = await templateGroups(house);
  const dialog = document.createElement('dialog');
  dialog.className = 'block';
  dialog.setAttribute('aria-labelledby', 'block-title');
  dialog.append(form);
  document.body.append(dialog);
  let first: string | undefined;
  form.addEventListener('block-leave', () => dialog.close());
  form.addEventListener('block-put', (event) => {
    const done = (event as CustomEvent<InsertedBlock>).detail;
    if (!done.ok) return;
    const notes = done.notes.map(({ message }) => message);
    const [cell] = done.cells;
    const beside = cell === undefined || notes.length === 0 ? {} : { beside: { cell, words: notes.join('; ') } };
    if (desk.act(done.edit, { label: done.label, words: `${done.label} put in`, ...beside })) first = cell;
    dialog.close();
  });
  // Keys pressed in the form are not those of the page behind it.
  dialog.addEventListener('keydown', (event) => event.stopPropagation());
  dialog.addEventListener('close', () => {
    dialog.remove();
    if (first !== undefined) goTo(first);
  });
  dialog.showModal();
  await form.updateComplete;
  form.querySelector('select')?.focus();
}
