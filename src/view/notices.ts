// What is told above the sheet: trouble with its ways out, what another tab did, what became of a file; and the word that says how far
// the sheet is kept.
//
// 1. Trouble that lasts stands until it is over; what merely happened goes when it is read and put away.
// Not here: when something is told (session.ts), the words of trouble (src/store).

import { html, nothing, type TemplateResult } from 'lit';
import type { WayOut } from '../store/index.ts';
import type { Session } from './session.ts';

const labels: Readonly<Partial<Record<WayOut, string>>> = {
  'save as a file': 'Save as a file',
  'try again': 'Try again',
  reload: 'Load the page anew',
  'keep as a new sheet': 'Keep as a new sheet',
  'download the text': 'Download the text',
  'export everything': 'Export everything',
  'save under another name': 'Save under another name',
  'overwrite the file': 'Overwrite the file',
  'go on without keeping': 'Go on without keeping',
};

export function notices(session: Session): TemplateResult {
  const { troubles, told, offline, following } = session;
  const acts = (ways: readonly WayOut[]) =>
    ways
      .filter((way) => labels[way] !== undefined)
      .map((way) => html`<button type="button" class="word" @click=${() => session.act(way)}>${labels[way]}</button>`);
  const [worst] = troubles;
  const change = async () => {
    await session.settle();
    offline.change();
  };
  return html`<div class="notices">
    ${
      worst === undefined
        ? nothing
        : html`<section class="notice trouble" role="alert"><p>${worst.message}</p><p class="acts">${acts(worst.wayOut)}</p></section>`
    }
    ${
      following
        ? html`<section class="notice" aria-label="Writing"><p>Another tab writes this sheet; this one shows what it keeps.</p>
          <p class="acts"><button type="button" class="word" @click=${() => void session.takeOver()}>Take over writing</button></p></section>`
        : nothing
    }
    ${
      told === null
        ? nothing
        : html`<section class="notice ${told.trouble ? 'trouble' : ''}" role=${told.trouble ? 'alert' : 'status'}><p>${told.message}</p>
          ${told.problems.length === 0 ? nothing : html`<ul>${told.problems.map((problem) => html`<li>${problem}</li>`)}</ul>`}
          <p class="acts">${acts(told.wayOut)}<button type="button" class="word" @click=${() => session.dismiss()}>Close this note</button></p></section>`
    }
    ${
      offline.laterVersion
        ? html`<section class="notice" role="status"><p>A later version of this page is ready. It replaces this one when you ask for it.</p>
          <p class="acts"><button type="button" class="word" @click=${() => void change()}>Change to it now</button></p></section>`
        : nothing
    }
  </div>`;
}

const clock = new Intl.DateTimeFormat('en-GB', { hour: '2-digit', minute: '2-digit' });

/** `kept 14:52`, `keeping …`, `not kept`: how far what is on the screen would survive the browser. */
export function keptWord({ keeping, house }: Session) {
  const memory = house?.store.backend.kind === 'memory';
  if (keeping.kind === 'trouble' || memory) return html`<p class="kept not-met">not kept</p>`;
  if (keeping.kind === 'keeping') return html`<p class="kept">keeping …</p>`;
  if (keeping.kind === 'following') return html`<p class="kept">read only</p>`;
  if (keeping.kind !== 'kept') return nothing;
  return html`<p class="kept" title="Every change is kept in this browser within a second">kept <time>${clock.format(keeping.at)}</time></p>`;
}
