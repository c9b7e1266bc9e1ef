// The references at the foot of the sheet: each piece typed where it stands, added, put in order, removed.
//
// 1. With its id a reference takes its citations along; one that is removed names the lines that still cite it.
// Not here: what cites what (src/record), edits of the list (src/sheet/head-edits.ts).

import { html, nothing } from 'lit';
import {
  addReference,
  changeReference,
  moveReference,
  newReferenceId,
  type Reference,
  referenceIdFault,
  removeReference,
} from '../sheet/index.ts';
import type { Desk } from './desk-face.ts';
import { hereField } from './here-field.ts';

const withText = (one: Reference, key: 'document' | 'edition' | 'title', text: string): Reference => {
  const { edition, title, ...rest } = { ...one, [key]: text.trim() };
  return {
    id: rest.id,
    document: rest.document,
    ...(edition === undefined || edition === '' ? {} : { edition }),
    ...(title === undefined || title === '' ? {} : { title }),
  };
};

export function referencesPart(desk: Desk, printing: boolean) {
  const { references } = desk.drawn;
  if (printing && references.length === 0) return nothing;
  const list = desk.kept.references ?? [];
  const cited = new Map(references.map((one) => [one.id, one.citedBy]));
  const piece = (one: Reference, at: number, key: 'document' | 'edition' | 'title', label: string) =>
    hereField({
      desk,
      label: `${label} of ${one.id}`,
      value: one[key] ?? '',
      hint: key,
      step: `${key} of ${one.id}`,
      edit: (text) => {
        const now = desk.kept.references?.[at] ?? one;
        return changeReference(desk.kept, at, withText(now, key, text));
      },
    });
  const entry = (one: Reference, at: number) => {
    const by = cited.get(one.id) ?? [];
    const citedBy = by.length === 0 ? nothing : html` <span class="cited">cited in ${by.join(', ')}</span>`;
    if (printing)
      return html`<div id=${`ref-${one.id}`}><dt>[${one.id}]</dt><dd>${one.document}${one.edition === undefined ? nothing : `, ${one.edition}`}${one.title === undefined ? nothing : `. ${one.title}`}${citedBy}</dd></div>`;
    const act = (event: Event, word: string, does: () => boolean) => {
      const part = (event.currentTarget as Element).closest('.references-part');
      if (does()) void focusAct(part, word, at);
    };
    const button = (word: string, name: string, disabled: boolean, does: () => boolean, to = at) =>
      html`<button type="button" class="word" data-act=${`${name}-${at}`} aria-label=${`${word}: ${one.id}`} ?disabled=${disabled} @click=${(event: Event) => act(event, `${name}-${to}`, does)}>${word}</button> `;
    const moved = (to: number) => () =>
      desk.act(moveReference(desk.kept, at, to), { label: `move of ${one.id}`, words: `${one.id} is now number ${to + 1}` });
    const removed = () =>
      desk.act(removeReference(desk.kept, at), {
        label: `removal of ${one.id}`,
        words: by.length === 0 ? `${one.id} removed` : `${one.id} removed; it is still cited in ${by.join(', ')}`,
      });
    return html`<div id=${`ref-${one.id}`} tabindex="-1"><dt class="reference-id">${hereField({
      desk,
      label: `Id of reference ${at + 1}`,
      value: one.id,
      step: `id of ${one.id}`,
      late: true,
      check: (text) => referenceIdFault(desk.kept, text.trim(), one.id),
      edit: (text) => changeReference(desk.kept, at, { ...(desk.kept.references?.[at] ?? one), id: text.trim() }),
    })}</dt><dd>${piece(one, at, 'document', 'Document')}, ${piece(one, at, 'edition', 'Edition')}. ${piece(one, at, 'title', 'Title')}${citedBy}
      <span class="acts">${button('Up', 'up', at === 0, moved(at - 1), at - 1)}${button('Down', 'down', at === list.length - 1, moved(at + 1), at + 1)}${button('Remove', 'remove', false, removed)}</span></dd></div>`;
  };
  const add = (event: Event) => {
    const part = (event.currentTarget as Element).closest('.references-part');
    const id = newReferenceId(desk.kept);
    if (desk.act(addReference(desk.kept, { id, document: '' }), { label: `new reference ${id}`, words: `new reference ${id}` }))
      void drawn(part).then(() => part?.querySelector<HTMLElement & { edit?(): void }>(`#ref-${id} dd ts-here`)?.edit?.());
  };
  return html`<div class="part references-part"><h2>References</h2><div class="prose">
    ${list.length === 0 ? nothing : html`<dl class="references">${list.map(entry)}</dl>`}
    ${printing ? nothing : html`<p><button type="button" class="word" data-act="add" @click=${add}>Add a reference</button>${list.length > 0 ? nothing : html` <span class="quiet">A source cites it as [R1].</span>`}</p>`}
  </div></div>`;
}

async function drawn(part: Element | null) {
  const paper = part?.closest('ts-paper') as { updateComplete?: Promise<unknown> } | null | undefined;
  await (part?.closest('ts-page') as { updateComplete?: Promise<unknown> } | null | undefined)?.updateComplete;
  await paper?.updateComplete;
}

async function focusAct(part: Element | null, word: string, at: number) {
  await drawn(part);
  const wanted = part?.querySelector<HTMLButtonElement>(`[data-act="${word}"]`);
  const found =
    wanted !== null && wanted !== undefined && !wanted.disabled
      ? wanted
      : (part?.querySelector<HTMLElement>(`[data-act="remove-${Math.max(0, at - 1)}"]`) ??
        part?.querySelector<HTMLElement>('[data-act="add"]'));
  found?.focus();
}
