// The title block as on a drawing: the data fields of ISO 7200, typed where they stand.
//
// 1. Names of who checked and who approved come from those acts and are not typed here; so do the states behind them.
// 2. On paper the same fields without what is typed into.
// Not here: the fields themselves (here.ts), the other parts of the head (heads.ts).

import { html, nothing } from 'lit';
import { changeSetting, changeTitleBlock, type Settings, type Status, type TitleBlock } from '../sheet/index.ts';
import type { Desk } from './desk-face.ts';
import type { HereOption } from './here.ts';
import { hereField } from './here-field.ts';

const blank = html`<span class="blank">–</span>`;
const field = (name: string, content: unknown, kind = '') =>
  html`<div class="field ${kind}"><dt>${name}</dt><dd>${content === '' || content === undefined ? blank : content}</dd></div>`;

type Key = keyof TitleBlock;

/** A field of the block; on paper its text. */
function typed(desk: Desk, printing: boolean, key: Key, label: string, step: string, hint = '') {
  const value = desk.drawn.titleBlock[key] ?? '';
  if (printing) return value;
  return hereField({ desk, label, value, step, hint, edit: (text) => changeTitleBlock(desk.kept, key, text) });
}

/** States that the author sets; the others come from checking, approving and issuing. */
const authorStates: readonly Status[] = ['in preparation', 'for checking'];

export function titleBlock(desk: Desk, printing: boolean) {
  const { title, titleBlock: block, status } = desk.drawn;
  const name = title
    .split(/(?<=\s)/u)
    .map((word) => (word.length < 24 && word.includes('-') ? html`<span>${word}</span>` : word));
  const heading = printing
    ? name
    : hereField({
        desk,
        label: 'Title',
        value: title,
        step: 'title',
        shown: html`${name}`,
        hint: 'Title of the sheet',
        edit: (text) => ({ kind: 'set-head', key: 'title', value: text.trim() }),
      });
  const state = printing
    ? status
    : hereField({
        desk,
        label: 'Status',
        value: status,
        step: 'status',
        options: authorStates.map((one) => ({ value: one, label: one })),
        edit: (text) => ({ kind: 'set-head', key: 'status', value: authorStates.find((one) => one === text) ?? null }),
      });
  const own = (key: Key, label: string, step: string) => typed(desk, printing, key, label, step);
  const or = (text: string | undefined, act: string) =>
    text ?? (printing ? '' : html`<span class="blank" title=${`entered when the sheet is ${act}`}>–</span>`);
  return html`<header class="title-block">
    <div class="name">
      <p>${typed(desk, printing, 'documentType', 'Kind of document', 'kind of document', 'Calculation sheet') || 'Calculation sheet'}</p>
      <h1>${heading}</h1>
      ${block.supplementaryTitle ? html`<p>${own('supplementaryTitle', 'Supplementary title', 'supplementary title')}</p>` : nothing}
    </div>
    <dl>
      ${field('Document', own('documentNumber', 'Document', 'document number'), 'strong')}${field('Revision', own('revision', 'Revision', 'revision'), 'strong')}${field('Date', own('date', 'Date', 'date'))}${field('Status', state)}
      ${field('Organisation', printing ? [block.organisation, block.department].filter(Boolean).join(', ') : own('organisation', 'Organisation', 'organisation'), 'wide')}${field('Project', own('project', 'Project', 'project'), 'wide')}
      ${field('Prepared', own('preparedBy', 'Prepared', 'preparer'))}${field('Checked', or(block.checkedBy, 'checked'))}${field('Approved', or(block.approvedBy, 'approved'))}${field('Client', own('client', 'Client', 'client'))}
    </dl>
  </header>`;
}

interface Setting {
  readonly key: keyof Settings;
  readonly label: string;
  readonly none: string;
  readonly options: readonly HereOption[];
}

const options = (...values: readonly (string | readonly [string, string])[]): HereOption[] =>
  values.map((one) => (typeof one === 'string' ? { value: one, label: one } : { value: one[0], label: one[1] }));
const settings: readonly Setting[] = [
  {
    key: 'decimalSign',
    label: 'Decimal sign',
    none: '.',
    options: options(['.', 'point, as in 1.5'], [',', 'comma, as in 1,5']),
  },
  { key: 'digits', label: 'Significant digits', none: '4', options: options('2', '3', '4', '5', '6', '7', '8') },
  { key: 'paper', label: 'Paper', none: 'A4', options: options('A4', 'Letter') },
];

const more: readonly (readonly [Key, string])[] = [
  ['supplementaryTitle', 'Supplementary title'],
  ['department', 'Department'],
  ['technicalReference', 'Technical reference'],
  ['classification', 'Classification'],
  ['language', 'Language'],
];

/** What is seldom changed: settings, and the fields that the block has no room for. */
export function moreFields(desk: Desk) {
  const { kept } = desk;
  const now = [
    kept.settings?.decimalSign === ',' ? 'decimal comma' : 'decimal point',
    `${kept.settings?.digits ?? 4} significant digits`,
    kept.settings?.paper ?? 'A4',
  ];
  return html`<details class="settings"><summary>${now.join(', ')}; more fields of the title block</summary><dl class="more-fields">
    ${settings.map(({ key, label, none, options: all }) =>
      field(
        label,
        hereField({
          desk,
          label,
          value: String(kept.settings?.[key] ?? none),
          step: label.toLowerCase(),
          options: all,
          edit: (text) =>
            changeSetting(desk.kept, key, (key === 'digits' ? Number(text) : text) as NonNullable<Settings[typeof key]>),
        }),
      ),
    )}
    ${more.map(([key, label]) => field(label, typed(desk, false, key, label, label.toLowerCase())))}
  </dl></details>`;
}
