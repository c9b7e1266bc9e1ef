// A sheet file: its text read into a sheet, a sheet written as text.
//
// 1. What writeSheet wrote, readSheet reads, and writing it again gives the same bytes.
// 2. A file is read whole or refused whole; a refusal lists at most twenty problems, each with its path first.
// 3. Values are kept as typed: nothing is trimmed, normalised or rounded on the way in or out.
// 4. Writing never refuses: a sheet on the screen must reach the disk whatever was pasted into it.
// Not here: names, values, formulas (reading.ts) and ragged tables (table.ts): problems of their cell, the file still opens;
// the wording of the problems (file-problems.ts).

import * as v from 'valibot';
import type { Problem } from '../quantity/index.ts';
import type { Sheet } from './document.ts';
import { type Found, faultOf, issueOf, placeOf, wrongFormat } from './file-problems.ts';
import { badCharacter, badCharacters, scanJson } from './json-text.ts';
import { childSchema, member, optionOf, sheetSchema } from './schema.ts';

/** A problem of the file: the message begins with the path. `cell` is the id, where there is one. */
export interface FileProblem extends Problem {
  readonly path: string;
  readonly cell?: string;
}
export type ReadSheet =
  | { readonly ok: true; readonly value: Sheet }
  | { readonly ok: false; readonly problems: readonly FileProblem[] };

/** Files beyond this many UTF-16 units are not read: a sheet of 10 000 cells has about two million. */
const largestFile = 64 * 1024 * 1024;
/** Longer texts are left at their first problem: a list of a million would take longer to make than anybody waits. */
const longestForList = 1_000_000;
const mostProblems = 20;
const endsReading: ReadonlySet<string> = new Set(['syntax', 'too-deep', 'too-many']);

/**
 * Reads the text of a sheet file. Codes: 'too-large', 'syntax', 'too-deep', 'too-many', 'duplicate-key', 'unknown-key', 'bad-character',
 * 'not-a-sheet', 'newer-format', 'missing-key', 'wrong-type', 'bad-value', 'duplicate-id'.
 */
export function readSheet(text: string): ReadSheet {
  if (text.length > largestFile) {
    return refused([
      {
        path: '',
        code: 'too-large',
        what: `the file has more than ${largestFile / 1024 / 1024} million characters; a sheet is text, keep pictures small`,
      },
    ]);
  }
  const json = text.startsWith('\uFEFF') ? text.slice(1) : text;
  const faults = scanJson(json);
  const [end] = faults;
  if (end && endsReading.has(end.code)) return refused([faultOf(end)]);
  const value: unknown = JSON.parse(json);
  const notSheet = wrongFormat(value);
  if (notSheet) return refused([notSheet]);
  const found: Found[] = faults.map(faultOf);
  const parsed = v.safeParse(sheetSchema, value, { abortEarly: json.length > longestForList });
  if (!parsed.success) found.push(...parsed.issues.map((issue) => issueOf(issue, value)));
  else found.push(...duplicates(parsed.output as Sheet));
  if (found.length > 0) return refused(withoutRepeats(found), value);
  return { ok: true, value: parsed.output as Sheet };
}

function refused(found: readonly Found[], value?: unknown): ReadSheet {
  const problems: FileProblem[] = found.slice(0, mostProblems).map(({ path, code, what }) => {
    const where = typeof path === 'string' ? { text: path } : placeOf(path, value);
    return {
      code,
      severity: 'error',
      path: where.text,
      message: where.text === '' ? what : `${where.text}: ${what}`,
      ...('cell' in where && where.cell !== undefined ? { cell: where.cell } : {}),
    };
  });
  if (found.length > mostProblems) {
    problems.push({
      code: 'more',
      severity: 'error',
      path: '',
      message: `and ${found.length - mostProblems} more problems of this kind`,
    });
  }
  return { ok: false, problems };
}

function duplicates(sheet: Sheet): Found[] {
  const found: Found[] = [];
  const look = (key: string, items: readonly { readonly id: string }[]): void => {
    const first = new Map<string, number>();
    for (const [index, { id }] of items.entries()) {
      const before = first.get(id);
      if (before === undefined) first.set(id, index);
      else
        found.push({
          path: [key, index],
          code: 'duplicate-id',
          what: `the id \`${id}\` is already that of ${key}[${before}]; give this one another`,
        });
    }
  };
  look('cells', sheet.cells);
  look('cases', sheet.cases ?? []);
  look('references', sheet.references ?? []);
  return found;
}

function withoutRepeats(found: readonly Found[]): Found[] {
  const seen = new Set<string>();
  return found.filter(({ path, code, what }) => {
    // A refused key is found by the scan, with its line, and again by the schema, without.
    const key = JSON.stringify([path, code, what.replace(/(?: \(line |; remove it).*$/, '')]);
    if (seen.has(key)) return false;
    seen.add(key);
    return true;
  });
}

/** The text of the file: keys in the order of the schema, two-space indent, lists of short texts on one line, one newline at the end. */
export function writeSheet(sheet: Sheet): string {
  return `${print(inOrder(sheet, sheetSchema), '')}\n`;
}

function inOrder(value: unknown, schema: unknown): unknown {
  const here = optionOf(schema, value);
  if (here['type'] === 'array' && Array.isArray(value)) return value.map((item) => inOrder(item, here['item']));
  if (here['type'] !== 'strict_object' || typeof value !== 'object' || value === null) return value;
  const ordered: Record<string, unknown> = {};
  for (const key of Object.keys(here['entries'] as object)) {
    const entry = member(value, [key]);
    if (entry !== undefined) ordered[key] = inOrder(entry, childSchema(here, key, entry));
  }
  return ordered;
}

const lineWidth = 120;

function print(value: unknown, indent: string): string {
  const deeper = `${indent}  `;
  if (Array.isArray(value)) {
    if (value.length === 0) return '[]';
    if (value.every((item) => typeof item === 'string')) {
      const line = `[${value.map(quoted).join(', ')}]`;
      if (indent.length + line.length <= lineWidth) return line;
    }
    return `[\n${value.map((item) => deeper + print(item, deeper)).join(',\n')}\n${indent}]`;
  }
  if (typeof value === 'object' && value !== null) {
    const entries = Object.entries(value).filter(([, entry]) => entry !== undefined);
    if (entries.length === 0) return '{}';
    return `{\n${entries.map(([key, entry]) => `${deeper}${quoted(key)}: ${print(entry, deeper)}`).join(',\n')}\n${indent}}`;
  }
  return typeof value === 'string' ? quoted(value) : JSON.stringify(value);
}

/** Half a surrogate pair and control characters, which readSheet refuses, can be pasted: they become U+FFFD. */
function quoted(text: string): string {
  return JSON.stringify(badCharacter(text) === undefined ? text : text.replace(badCharacters, '\uFFFD'));
}
