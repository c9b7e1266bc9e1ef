// The one description of a sheet file: which keys there are, in which order, and what each may hold.
//
// 1. The order of the keys here is the order of the keys in the file.
// 2. Unknown keys are refused everywhere but inside marks, revisions and log, which are plain JSON until their desk has its life.
// 3. Only what would make the file unreadable is refused. A name that is no name, a value that is no value, a formula that is no
//    formula are problems of their cell (reading.ts): the file opens and the rest of the sheet goes on.
// 4. Any new key raises the format number (document.ts).
// Not here: the text of the file and the wording of its problems (file.ts).

import * as v from 'valibot';
import { currentFormat } from './document.ts';

/** Ids of cells, cases and references: short, plain, and safe in a path, a link and a command line. */
export const idPattern = /^[A-Za-z0-9][A-Za-z0-9._-]{0,63}$/;
const hexDigest = /^[0-9a-f]{64}$/;
const picture = /^data:image\/(?:png|jpeg);base64,[A-Za-z0-9+/]+={0,2}$/;

const text = v.string();
const id = v.pipe(v.string(), v.regex(idPattern));
const optionalText = v.exactOptional(text);
const fingerprint = v.exactOptional(v.pipe(v.string(), v.regex(hexDigest)));
const wholeFromOne = v.pipe(v.number(), v.integer(), v.minValue(1), v.maxValue(1_000_000));
const plainList = v.exactOptional(v.pipe(v.array(v.unknown()), v.maxLength(100_000)));

const heading = v.strictObject({
  id,
  kind: v.literal('heading'),
  level: v.exactOptional(v.picklist([1, 2, 3])),
  text,
});
const note = v.strictObject({
  id,
  kind: v.literal('note'),
  text,
  role: v.exactOptional(v.picklist(['assumption', 'limit', 'caution'])),
  source: optionalText,
  toConfirm: optionalText,
});
const given = v.strictObject({
  id,
  kind: v.literal('given'),
  name: text,
  title: optionalText,
  value: text,
  byCase: v.exactOptional(v.record(id, text)),
  unit: optionalText,
  choices: optionalText,
  distribution: v.exactOptional(v.picklist(['rectangular', 'triangular', 'normal'])),
  basis: v.exactOptional(v.picklist(['specified', 'measured', 'tabulated', 'assumed'])),
  source: optionalText,
  range: optionalText,
  toConfirm: optionalText,
  carriedOver: v.exactOptional(v.boolean()),
});
const derived = v.strictObject({
  id,
  kind: v.literal('derived'),
  name: text,
  title: optionalText,
  formula: text,
  unit: optionalText,
  source: optionalText,
});
const criterion = v.strictObject({
  id,
  kind: v.literal('criterion'),
  title: optionalText,
  left: text,
  relation: v.picklist(['<', '<=', '>', '>=']),
  right: text,
  unit: optionalText,
  source: optionalText,
  justification: optionalText,
  ifNotMet: optionalText,
});
const sought = v.strictObject({
  id,
  kind: v.literal('sought'),
  name: text,
  title: optionalText,
  unit: optionalText,
  instead: optionalText,
  where: text,
  between: text,
  source: optionalText,
});
const column = v.strictObject({ name: text, title: optionalText, unit: optionalText });
const table = v.strictObject({
  id,
  kind: v.literal('table'),
  name: text,
  title: optionalText,
  columns: v.array(column),
  rows: v.array(v.array(text)),
  source: optionalText,
});
const drawing = v.strictObject({
  id,
  kind: v.literal('drawing'),
  title: optionalText,
  layout: text,
  uses: v.record(text, text),
});
const chart = v.strictObject({
  id,
  kind: v.literal('chart'),
  title: optionalText,
  vary: text,
  from: text,
  to: text,
  show: v.array(text),
});
const figure = v.strictObject({
  id,
  kind: v.literal('figure'),
  title: optionalText,
  image: v.pipe(v.string(), v.regex(picture)),
  source: optionalText,
});

const cell = v.variant('kind', [heading, note, given, derived, criterion, sought, table, drawing, chart, figure]);

const titleBlock = v.strictObject({
  organisation: optionalText,
  department: optionalText,
  technicalReference: optionalText,
  documentType: optionalText,
  supplementaryTitle: optionalText,
  classification: optionalText,
  language: optionalText,
  client: optionalText,
  project: optionalText,
  documentNumber: optionalText,
  revision: optionalText,
  date: optionalText,
  preparedBy: optionalText,
  checkedBy: optionalText,
  approvedBy: optionalText,
});

export const sheetSchema = v.strictObject({
  format: v.literal(currentFormat),
  title: text,
  templateInfo: v.exactOptional(v.strictObject({ id, version: wholeFromOne, job: text, limits: v.array(text), caution: text })),
  purpose: optionalText,
  method: optionalText,
  status: v.exactOptional(v.picklist(['in preparation', 'for checking', 'checked', 'approved', 'issued', 'superseded'])),
  references: v.exactOptional(v.array(v.strictObject({ id, document: text, edition: optionalText, title: optionalText }))),
  titleBlock: v.exactOptional(titleBlock),
  settings: v.exactOptional(
    v.strictObject({
      digits: v.exactOptional(v.pipe(v.number(), v.integer(), v.minValue(1), v.maxValue(15))),
      decimalSign: v.exactOptional(v.picklist(['.', ','])),
      paper: v.exactOptional(v.picklist(['A4', 'Letter'])),
    }),
  ),
  template: v.exactOptional(v.strictObject({ id, version: wholeFromOne, fingerprint })),
  carriedFrom: v.exactOptional(
    v.strictObject({ title: text, documentNumber: optionalText, revision: optionalText, fingerprint }),
  ),
  cases: v.exactOptional(v.pipe(v.array(v.strictObject({ id, title: optionalText })), v.minLength(1))),
  cells: v.array(cell),
  conclusion: optionalText,
  marks: plainList,
  revisions: plainList,
  log: plainList,
});

/** What the schema lets through; a test holds it equal to the hand-written `Sheet`. */
export type SheetOfSchema = v.InferOutput<typeof sheetSchema>;

/** A schema of the library as plain data: only what is walked here. */
export type SchemaData = Readonly<Record<string, unknown>>;

function unwrap(schema: unknown): SchemaData {
  let here = schema as SchemaData;
  while (here['type'] === 'exact_optional' || Array.isArray(here['pipe'])) {
    const pipe = here['pipe'] as readonly SchemaData[] | undefined;
    const next = here['type'] === 'exact_optional' ? here['wrapped'] : pipe?.[0];
    if (next === here || next === undefined) break;
    here = next as SchemaData;
  }
  return here;
}

/** The schema of an entry of a list or of a key of an object; empty where there is none. */
export function childSchema(schema: unknown, key: string | number, child: unknown): SchemaData {
  const here = unwrap(schema);
  if (here['type'] === 'array') return optionOf(here['item'], child);
  if (here['type'] === 'strict_object') return optionOf((here['entries'] as SchemaData)[key], child);
  return {};
}

/** A variant settled by the `kind` of the value. */
export function optionOf(schema: unknown, value: unknown): SchemaData {
  if (schema === undefined) return {};
  const here = unwrap(schema);
  if (here['type'] !== 'variant') return here;
  const options = here['options'] as readonly { readonly entries: { readonly kind: { readonly literal: string } } }[];
  return (options.find(({ entries }) => entries.kind.literal === member(value, ['kind'])) ?? {}) as SchemaData;
}

/** What stands at a path of plain data, own keys only. */
export function member(value: unknown, path: readonly (string | number)[]): unknown {
  let here = value;
  for (const key of path) {
    if (typeof here !== 'object' || here === null || !Object.hasOwn(here, key)) return undefined;
    here = (here as Record<string | number, unknown>)[key];
  }
  return here;
}
