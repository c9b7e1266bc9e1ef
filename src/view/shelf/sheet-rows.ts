// The register of sheets: a line a sheet, with number, state of change, title, project, status, when it was changed last, and its acts.
//
// 1. A sheet that was just removed leaves its line, with the word that puts it back.
// 2. Arrow keys move from line to line in the same place; the table reads as a table at every width.
// Not here: what the acts do (register.ts).

import { html, nothing, type TemplateResult } from 'lit';
import { repeat } from 'lit/directives/repeat.js';
import type { SheetHead } from '../../store/index.ts';
import { hashOf } from '../route.ts';
import { day, nameOf, stamp, time } from './acts.ts';

export interface SheetActs {
  similar(head: SheetHead): void;
  copy(head: SheetHead): void;
  remove(head: SheetHead): void;
  putBack(head: SheetHead): void;
  download(head: SheetHead): void;
}
export interface SheetRows {
  readonly heads: readonly SheetHead[];
  /** Removed while this screen stands, by id. */
  readonly removed: ReadonlyMap<string, SheetHead>;
  readonly onDesk: string | null;
  /** The line that is typed into at the head of the register. */
  readonly begin: TemplateResult;
  /** The line under a sheet from which one for a similar job is begun. */
  readonly similar: { readonly id: string; readonly row: TemplateResult } | null;
  readonly acts: SheetActs;
}

export function sheetTable({ heads, removed, onDesk, begin, similar, acts }: SheetRows) {
  const column = (name: string, text: string) => html`<th role="columnheader" scope="col" class=${name}>${text}</th>`;
  return html`<table role="table" class="register" aria-labelledby="sheets-title" @keydown=${walkRows}>
    <thead role="rowgroup"><tr role="row">${column('number', 'Number')}${column('revision', 'Rev')}${column('title', 'Title')}${column('project', 'Project')}${column('status', 'Status')}${column('changed', 'Changed')}${column('acts', 'Acts')}</tr></thead>
    <tbody role="rowgroup">
      ${begin}
      ${repeat(
        heads,
        (head) => head.id,
        (head) =>
          html`${removed.has(head.id) ? gone(head, acts) : line(head, onDesk, acts)}${similar?.id === head.id ? similar.row : nothing}`,
      )}
    </tbody>
  </table>`;
}

function line(head: SheetHead, onDesk: string | null, acts: SheetActs) {
  const { id, title, documentNumber, revision, project, status, changed, unreadable, template, copyOf } = head;
  const act = (name: string, text: string, does: () => void) =>
    html`<button type="button" class="word" data-act=${name} aria-label=${`${text}: ${nameOf(head)}`} @click=${does}>${text}</button>`;
  const about = [
    id === onDesk ? 'on the desk' : '',
    copyOf === undefined ? '' : `set aside: ${copyOf}`,
    template === undefined ? '' : `from template ${template}`,
  ].filter(Boolean);
  return html`<tr role="row" data-id=${id} class=${unreadable === undefined ? '' : 'unreadable'}>
    <td role="cell" class="number">${documentNumber ?? nothing}</td>
    <td role="cell" class="revision">${revision ?? nothing}</td>
    <th role="rowheader" scope="row" class="title"><a data-act="open" href=${hashOf({ screen: 'sheet', id })}>${title}</a>
      ${about.length === 0 ? nothing : html`<span class="about">${about.join(' · ')}</span>`}
      ${unreadable === undefined ? nothing : html`<span class="about"><b class="not-met">cannot be read</b>: ${unreadable} The text is kept as it is.</span>`}</th>
    <td role="cell" class="project">${project ?? nothing}</td>
    <td role="cell" class="status">${unreadable === undefined ? status : nothing}</td>
    <td role="cell" class="changed"><time datetime=${stamp(changed)}>${day(changed)} <span class="clock">${time(changed)}</span></time></td>
    <td role="cell" class="acts">${
      unreadable === undefined
        ? html`${act('similar', 'Similar job', () => acts.similar(head))} ${act('copy', 'Copy', () => acts.copy(head))}`
        : act('download', 'Download the text', () => acts.download(head))
    } ${act('remove', 'Remove', () => acts.remove(head))}</td>
  </tr>`;
}

const gone = (head: SheetHead, acts: SheetActs) => html`<tr role="row" class="gone" data-id=${head.id}>
    <td role="cell" class="number">${head.documentNumber ?? nothing}</td><td role="cell" class="revision"></td>
    <td role="cell" class="title wide" colspan="5"><span class="was">${head.title}</span> was removed.
      <button type="button" class="word" data-act="put-back" aria-label=${`Put it back: ${nameOf(head)}`} @click=${() => acts.putBack(head)}>Put it back</button></td>
  </tr>`;

/** Up and down to the same act of the next line, Home and End to the first and last; Delete removes. */
function walkRows(event: KeyboardEvent) {
  const target = event.target as HTMLElement;
  const act = target.dataset['act'];
  if (act === undefined || event.ctrlKey || event.metaKey || event.altKey || event.shiftKey) return;
  const table = event.currentTarget as HTMLElement;
  const rows = [...table.querySelectorAll<HTMLElement>('tr[data-id]')];
  const at = rows.indexOf(target.closest('tr')!);
  if (event.key === 'Delete') {
    event.preventDefault();
    rows[at]?.querySelector<HTMLElement>('[data-act="remove"]')?.click();
    return;
  }
  const to = { ArrowDown: at + 1, ArrowUp: at - 1, Home: 0, End: rows.length - 1 }[event.key];
  if (to === undefined) return;
  event.preventDefault();
  const row = rows[to];
  if (row === undefined && to < 0) table.closest('.paper')?.querySelector<HTMLElement>('#search')?.focus();
  (row?.querySelector<HTMLElement>(`[data-act="${act}"]`) ?? row?.querySelector<HTMLElement>('[data-act]'))?.focus();
}
