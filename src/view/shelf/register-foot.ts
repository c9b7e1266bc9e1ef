// The foot of the shelf: what was removed and can be put back, and the quiet line about how safely all of it is kept.
//
// Not here: how it is kept (src/store).

import { html, nothing } from 'lit';
import type { Offline, Persistence, SheetHead, TrashRow } from '../../store/index.ts';
import { words } from '../text.ts';
import { day, nameOf, stamp, time } from './acts.ts';

export interface TrashActs {
  putBack(head: SheetHead): void;
  /** Whether the trash is to be emptied is asked once more. */
  ask(asked: boolean): void;
  empty(): void;
}

export function trashList(rows: readonly TrashRow[], asked: boolean, acts: TrashActs) {
  if (rows.length === 0) return nothing;
  const count = words(rows.length, 'sheet', 'sheets');
  return html`<section aria-labelledby="trash-title"><h2 id="trash-title" tabindex="-1">Removed <span class="count">${rows.length}</span></h2>
    <ul class="trash">${rows.map(
      ({ head, deleted }) =>
        html`<li><span class="number">${head.documentNumber ?? nothing}</span> <span class="title">${head.title}</span>
          <span class="about">removed <time datetime=${stamp(deleted)}>${day(deleted)} ${time(deleted)}</time></span>
          <button type="button" class="word" aria-label=${`Put back: ${nameOf(head)}`} @click=${() => acts.putBack(head)}>Put back</button></li>`,
    )}</ul>
    <p class="remark-line">${
      asked
        ? html`<span>${count} will be gone for good, with all steps to undo.</span>
          <button type="button" class="word" data-act="empty-now" @click=${acts.empty}>Remove ${count} for good</button>
          <button type="button" class="word" data-act="keep-removed" @click=${() => acts.ask(false)}>Keep them here</button>`
        : html`<span>Removed sheets stay here for thirty days.</span> <button type="button" class="word" data-act="empty" @click=${() => acts.ask(true)}>Empty this list</button>`
    }</p></section>`;
}

const network: Readonly<Record<Offline['state'], string>> = {
  ready: 'The page works without a network.',
  preparing: 'The page is being put by for work without a network.',
  unavailable: 'This browser does not put the page by: it opens with its server only. Nothing leaves this machine either way.',
};
const size = (bytes: number) => (bytes < 1e6 ? `${Math.max(1, Math.round(bytes / 1e3))} kB` : `${(bytes / 1e6).toFixed(1)} MB`);

export function keepingLine(persistence: Persistence | null, offline: Offline['state']) {
  const used = persistence?.used == null ? '' : ` ${size(persistence.used)} are in use.`;
  return html`<p class="keeping">${persistence?.message ?? ''}${used} ${network[offline]}</p>`;
}
