// A field of the sheet's head as <ts-here>, bound to the desk: every keeping is a step with a label, typing in one place is one step.
//
// Not here: the field itself (here.ts).

import { html, type TemplateResult } from 'lit';
import type { Edit } from '../sheet/index.ts';
import type { Desk } from './desk-face.ts';
import type { HereOption } from './here.ts';

export interface HereField {
  readonly desk: Desk;
  readonly label: string;
  readonly value: string;
  /** What the text makes of the sheet. */
  readonly edit: (text: string) => Edit;
  /** What is undone: 'client', 'title of case start'. */
  readonly step: string;
  readonly shown?: TemplateResult | readonly TemplateResult[];
  readonly options?: readonly HereOption[];
  readonly lines?: number;
  readonly hint?: string;
  readonly check?: (text: string) => string | undefined;
  /** Kept when it is finished, not at every pause: other texts hang on it. */
  readonly late?: boolean;
}

export function hereField({
  desk,
  label,
  value,
  edit,
  step,
  shown,
  options,
  lines,
  hint,
  check,
  late,
}: HereField): TemplateResult {
  const keep = (text: string) =>
    desk.act(edit(text), { label: step, words: `${step} ${text.trim() === '' ? 'emptied' : 'kept'}`, typing: `head ${step}` });
  const may = () => {
    if (desk.locked !== null) desk.tell(desk.locked);
    return desk.locked === null;
  };
  return html`<ts-here .label=${label} .value=${value} .shown=${shown ?? null} .options=${options ?? null} .lines=${lines ?? 1} .hint=${hint ?? ''}
    .late=${late ?? false} .keep=${keep} .may=${may} .check=${check ?? fine}></ts-here>`;
}

const fine = () => undefined;
