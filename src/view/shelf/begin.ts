// A new line in the register: number, title and project of a sheet that is begun, empty or for a similar job.
//
// 1. Enter in any field begins the sheet. A number that another sheet has is said, and can be taken all the same.
// Not here: what the sheet is made from (register.ts, fill.ts).

import { html, nothing } from 'lit';
import { live } from 'lit/directives/live.js';
import type { Sheet, TitleBlock } from '../../sheet/index.ts';
import type { SheetHead } from '../../store/index.ts';
import { nameOf } from './acts.ts';

export interface Names {
  readonly number: string;
  readonly title: string;
  readonly project: string;
}
export const noNames: Names = { number: '', title: '', project: '' };

/** The sheet under its own names; an empty title leaves the one that it has. */
export function named(sheet: Sheet, { number, title, project }: Names): Sheet {
  const block: TitleBlock = {
    ...sheet.titleBlock,
    ...(number.trim() === '' ? {} : { documentNumber: number.trim() }),
    ...(project.trim() === '' ? {} : { project: project.trim() }),
  };
  return {
    ...sheet,
    title: title.trim() === '' ? sheet.title : title.trim(),
    ...(Object.keys(block).length === 0 ? {} : { titleBlock: block }),
  };
}

/** The sheet that has the number already. */
export const taken = (heads: readonly SheetHead[], number: string): SheetHead | undefined =>
  number.trim() === '' ? undefined : heads.find((head) => head.documentNumber === number.trim());

export const takenWords = (head: SheetHead | undefined, id: string) =>
  html`<p id=${id} class="taken" aria-live="polite">${head === undefined ? nothing : `${head.documentNumber} is the number of ${head.title} already.`}</p>`;

interface BeginRow {
  /** Tells the rows of the page apart. */
  readonly key: string;
  readonly about: string;
  readonly does: string;
  readonly names: Names;
  readonly heads: readonly SheetHead[];
  change(names: Names): void;
  begin(): void;
  leave?(): void;
}

/** A row of the register that is typed into. */
export function beginRow(row: BeginRow) {
  const { key, names, about, does } = row;
  const other = taken(row.heads, names.number);
  const keys = (event: KeyboardEvent) => {
    if (event.isComposing) return;
    if (event.key === 'Enter') row.begin();
    else if (event.key === 'Escape' && row.leave !== undefined) row.leave();
    else return;
    event.preventDefault();
  };
  const field = (name: keyof Names, label: string) =>
    html`<input class="line" type="text" spellcheck=${name === 'title'} autocomplete="off" data-field=${name} placeholder=${label} aria-label=${`${label}, ${about}`}
      aria-describedby=${name === 'number' ? `taken-${key}` : nothing} .value=${live(names[name])} @keydown=${keys}
      @input=${(event: Event) => row.change({ ...names, [name]: (event.target as HTMLInputElement).value })} />`;
  return html`<tr role="row" class="begin" data-begin=${key}>
    <td role="cell" class="number">${field('number', 'Number')}</td>
    <td role="cell" class="revision"></td>
    <td role="cell" class="title">${field('title', 'Title')}${takenWords(other, `taken-${key}`)}</td>
    <td role="cell" class="project">${field('project', 'Project')}</td>
    <td role="cell" class="acts wide" colspan="3"><button type="button" class="do" title=${about} @click=${() => row.begin()}>${does}</button>
      ${row.leave === undefined ? nothing : html` <button type="button" class="word" aria-label=${`Leave it: ${nameOf({ title: about })}`} @click=${() => row.leave?.()}>Leave it</button>`}</td>
  </tr>`;
}
