// The list of keys as a dialog of the page: made from the table that binds them.
//
// Not here: the table (keys.ts).

import { html, type TemplateResult } from 'lit';
import { type KeyGroup, keyTable } from './keys.ts';

const groups: readonly KeyGroup[] = ['Moving', 'Writing', 'Lines', 'Reading', 'Sheet'];

export function keyDialog(): TemplateResult {
  return html`<dialog class="keys" aria-labelledby="keys-title"><form method="dialog">
    <h2 id="keys-title">Keys</h2>
    <p class="quiet">In the rows of the sheet; Ctrl is Command where the keyboard has it. All of it can be done at the line, too: choose it, then “Line …”.</p>
    <div class="key-groups">${groups.map(
      (group) =>
        html`<section><h3>${group}</h3><dl>${keyTable
          .filter((line) => line.group === group)
          .map(({ shown, does }) => html`<div><dt>${shown}</dt><dd>${does}</dd></div>`)}</dl></section>`,
    )}</div>
    <p><button>Close</button></p>
  </form></dialog>`;
}

/** Shows the list; the browser gives the focus back when it is closed. */
export function showKeys(page: HTMLElement) {
  page.querySelector<HTMLDialogElement>('dialog.keys')?.showModal();
}
