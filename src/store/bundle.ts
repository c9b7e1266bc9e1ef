// Everything that is kept, as one file: the bundle, written and read.
//
// 1. The texts of sheets and templates stand in it as in a file of their own, character for character; one that cannot be read, as it is.
// 2. Reading it never overwrites: what is here already with the same text is left out, another text under the same id comes beside it.
// 3. A bundle of a later version is refused whole; a sheet in it that cannot be read is refused by itself, and said.
// Not in it: steps to undo, the trash, handles of files on the disk.

import * as v from 'valibot';
import type { TemplateRow } from './rows.ts';

export const bundleFormat = 'tightside-bundle/1';
const family = 'tightside-bundle/';
/** Characters; far more than a shelf of thousands of sheets has. */
const largestBundle = 256 * 1024 * 1024;

const time = v.pipe(v.number(), v.finite(), v.minValue(0), v.maxValue(8.64e15));
const id = v.pipe(v.string(), v.regex(/^[A-Za-z0-9][A-Za-z0-9._-]{0,63}$/));
const schema = v.strictObject({
  format: v.literal(bundleFormat),
  sheets: v.array(v.strictObject({ id, made: time, changed: time, text: v.string() })),
  templates: v.array(v.strictObject({ id, changed: time, text: v.string() })),
});

export interface BundledSheet {
  readonly id: string;
  readonly made: number;
  readonly changed: number;
  readonly text: string;
}
export interface Bundle {
  readonly format: string;
  readonly sheets: readonly BundledSheet[];
  readonly templates: readonly Pick<TemplateRow, 'id' | 'changed' | 'text'>[];
}

/** The same content gives the same text. */
export function writeBundle(sheets: readonly BundledSheet[], templates: Bundle['templates']): string {
  const byId = (one: { readonly id: string }, other: { readonly id: string }) =>
    one.id < other.id ? -1 : one.id > other.id ? 1 : 0;
  const bundle: Bundle = {
    format: bundleFormat,
    sheets: sheets.map(({ id, made, changed, text }) => ({ id, made, changed, text })).sort(byId),
    templates: templates.map(({ id, changed, text }) => ({ id, changed, text })).sort(byId),
  };
  return `${JSON.stringify(bundle, null, 2)}\n`;
}

export type ReadBundle =
  | { readonly ok: true; readonly value: Bundle }
  | { readonly ok: false; readonly code: 'no-bundle' | 'newer-bundle'; readonly message: string };

export function readBundle(text: string): ReadBundle {
  const refuse = (message: string, code: 'no-bundle' | 'newer-bundle' = 'no-bundle'): ReadBundle => ({
    ok: false,
    code,
    message,
  });
  if (text.length > largestBundle) return refuse('The file is larger than any export of this page.');
  let value: unknown;
  try {
    value = JSON.parse(text.startsWith('\uFEFF') ? text.slice(1) : text);
  } catch {
    return refuse('The file is no export of this page: it is no JSON, or it was cut off.');
  }
  const format = formatOf(value);
  if (format !== bundleFormat && format.startsWith(family))
    return refuse(
      `The file is an export in a form that this version does not know (${format.slice(0, 40)}). Reload the page to get the later version.`,
      'newer-bundle',
    );
  const parsed = v.safeParse(schema, value);
  if (parsed.success) return { ok: true, value: parsed.output };
  if (format !== bundleFormat) return refuse(`The file is no export of this page: \`format\` is not "${bundleFormat}".`);
  const [issue] = parsed.issues;
  return refuse(`The export is damaged at ${v.getDotPath(issue) ?? 'its head'}.`);
}

/** Whether a text is a bundle and not a sheet, for a file that may be either. */
export const looksLikeBundle = (text: string): boolean => text.slice(0, 200).includes(`"${family}`);

function formatOf(value: unknown): string {
  if (typeof value !== 'object' || value === null || !Object.hasOwn(value, 'format')) return '';
  const { format } = value as { readonly format: unknown };
  return typeof format === 'string' ? format : '';
}
