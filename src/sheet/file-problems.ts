// What is wrong with a sheet file, in words: where first, then what is there and what should be.
//
// 1. A place in a cell names the cell: `cells[4] (given mu_1)`.
// 2. Every text taken from the file is shortened and made well-formed before it stands in a message.
// Not here: finding the faults (json-text.ts, schema.ts), the limit on their number (file.ts).

import type * as v from 'valibot';
import { nearestNames } from '../formula/index.ts';
import { currentFormat } from './document.ts';
import type { JsonFault, JsonPath } from './json-text.ts';
import { childSchema, member, optionOf, sheetSchema } from './schema.ts';

const formatFamily = 'tightside-sheet/';

export interface Found {
  readonly path: string | JsonPath;
  readonly code: string;
  readonly what: string;
}

/** `cells[4] (given mu_1).byCase.start`, and the id of the cell. */
export function placeOf(path: JsonPath, value: unknown): { readonly text: string; readonly cell?: string } {
  let text = '';
  for (const key of path) text += typeof key === 'number' ? `[${key}]` : `${text === '' ? '' : '.'}${shorten(key)}`;
  const [first, index] = path;
  if (first !== 'cells' || typeof index !== 'number') return { text };
  const cell = member(value, ['cells', index]);
  const kind = member(cell, ['kind']);
  const name = member(cell, ['name']) ?? member(cell, ['title']) ?? member(cell, ['id']);
  const words = [kind, name].filter((word): word is string => typeof word === 'string' && word !== '').map(shorten);
  const head = `cells[${index}]`;
  const cellId = member(cell, ['id']);
  return {
    text: words.length === 0 ? text : `${head} (${words.join(' ')})${text.slice(head.length)}`,
    ...(typeof cellId === 'string' ? { cell: cellId } : {}),
  };
}

function shorten(text: string): string {
  const line = text.replace(/\s+/gu, ' ');
  return (line.length > 60 ? `${line.slice(0, 60)}…` : line).replace(/\p{Surrogate}/gu, '\uFFFD');
}

export function faultOf(fault: JsonFault): Found {
  const place = `line ${fault.line}, column ${fault.column}`;
  switch (fault.code) {
    case 'syntax':
      return { path: place, code: 'syntax', what: `expected ${fault.expected}, but ${fault.found}` };
    case 'too-deep':
      return { path: place, code: 'too-deep', what: `nested deeper than a sheet can be (${fault.expected})` };
    case 'too-many':
      return { path: place, code: 'too-many', what: `an object with more keys than a sheet can have (${fault.expected})` };
    case 'duplicate-key':
      return {
        path: fault.path.slice(0, -1),
        code: 'duplicate-key',
        what: `the key \`${shorten(fault.found)}\` stands there twice (${place}); keep one`,
      };
    case 'unknown-key':
      return {
        path: fault.path.slice(0, -1),
        code: 'unknown-key',
        what: `unknown key \`${shorten(fault.found)}\` (${place}); remove it`,
      };
    case 'bad-character':
      return { path: fault.path, code: 'bad-character', what: `the text holds ${fault.expected} (${place}); remove it` };
  }
}

/** Says so at once when the file is no sheet, or a sheet of a later version, instead of listing its keys. */
export function wrongFormat(value: unknown): Found | undefined {
  if (typeof value !== 'object' || value === null || Array.isArray(value)) {
    return { path: '', code: 'not-a-sheet', what: `a sheet is an object in braces; this file holds ${kindOf(value)}` };
  }
  const format = member(value, ['format']);
  if (format === currentFormat) return undefined;
  if (typeof format !== 'string') {
    return { path: '', code: 'not-a-sheet', what: `this is no sheet: the key \`format\` with "${currentFormat}" is missing` };
  }
  const version = format.startsWith(formatFamily) ? format.slice(formatFamily.length) : '';
  if (/^[1-9]\d{0,8}$/.test(version)) {
    return {
      path: 'format',
      code: 'newer-format',
      what: `the sheet was written in format "${format}"; this version of the program knows "${currentFormat}". Open it with a newer version; it was left as it is`,
    };
  }
  return {
    path: 'format',
    code: 'not-a-sheet',
    what: `"${shorten(format)}" is not the format of a sheet, which is "${currentFormat}"`,
  };
}

function kindOf(value: unknown): string {
  if (value === null) return 'null';
  if (Array.isArray(value)) return 'a list';
  if (typeof value === 'object') return 'an object';
  if (typeof value === 'string') return 'a text';
  if (typeof value === 'boolean') return String(value);
  return `the number ${String(value)}`;
}

type Issue = v.BaseIssue<unknown>;

export function issueOf(issue: Issue, value: unknown): Found {
  const path: JsonPath = (issue.path ?? []).map((item) => item.key as string | number);
  const last = issue.path?.at(-1);
  const parent = path.slice(0, -1);
  if (last?.origin === 'key' && issue.type === 'strict_object') {
    if (Array.isArray(last.input))
      return { path: parent, code: 'wrong-type', what: 'must be an object in braces, but is a list' };
    const key = String(last.key);
    if (issue.expected !== 'never') return { path: parent, code: 'missing-key', what: `the key \`${key}\` is missing` };
    return {
      path: parent,
      code: 'unknown-key',
      what: `unknown key \`${shorten(key)}\`${proposal(key, knownKeys(parent, value), '; remove it, no such key is known here')}`,
    };
  }
  if (last?.origin === 'key') {
    return { path: parent, code: 'bad-value', what: `\`${shorten(String(last.key))}\` cannot be an id; ${idRule}` };
  }
  if (issue.type === 'variant') {
    if (last === undefined || last.key !== 'kind') return wrongType(path, 'an object in braces', issue.input);
    const kinds = listed(issue.expected);
    if (issue.input === undefined)
      return { path: parent, code: 'missing-key', what: `the key \`kind\` is missing; it is one of ${kinds.join(', ')}` };
    const shown = typeof issue.input === 'string' ? `\`${shorten(issue.input)}\`` : kindOf(issue.input);
    return {
      path: parent,
      code: 'bad-value',
      what: `unknown kind ${shown}${proposal(String(issue.input), kinds, `; the kinds are ${kinds.join(', ')}`)}`,
    };
  }
  if (issue.type === 'picklist' || issue.type === 'literal') {
    const choices = listed(issue.expected);
    const shown = typeof issue.input === 'string' ? `"${shorten(issue.input)}"` : kindOf(issue.input);
    return { path, code: 'bad-value', what: `must be ${oneOf(choices)}, but is ${shown}` };
  }
  switch (issue.type) {
    case 'string':
      return wrongType(path, 'a text in double quotes', issue.input);
    case 'number':
      return wrongType(path, 'a number', issue.input);
    case 'boolean':
      return wrongType(path, 'true or false', issue.input);
    case 'array':
      return wrongType(path, 'a list in brackets', issue.input);
    case 'strict_object':
    case 'record':
      return wrongType(path, 'an object in braces', issue.input);
    case 'integer':
    case 'min_value':
    case 'max_value':
      return { path, code: 'bad-value', what: `must be a whole number ${wholeRange(path)}, but is ${String(issue.input)}` };
    case 'min_length':
      return { path, code: 'bad-value', what: 'must have at least one entry' };
    case 'max_length':
      return { path, code: 'too-large', what: 'has more entries than a sheet can keep' };
    case 'regex':
      return { path, code: 'bad-value', what: regexRule(path, String(issue.input)) };
    default:
      return { path, code: 'bad-value', what: issue.message };
  }
}

const idRule = 'an id has 1 to 64 Latin letters, digits, . _ or -, and begins with a letter or a digit';

function regexRule(path: JsonPath, input: string): string {
  if (path.at(-1) === 'image') return 'must be a PNG or JPEG picture as a data: address in base64';
  if (path.at(-1) === 'fingerprint') return 'must be 64 hexadecimal digits in lower case';
  return `"${shorten(input)}" cannot be an id; ${idRule}`;
}

function wholeRange(path: JsonPath): string {
  return path.at(-1) === 'digits' ? 'from 1 to 15' : 'from 1 to 1000000';
}

function wrongType(path: JsonPath, wanted: string, input: unknown): Found {
  return { path, code: 'wrong-type', what: `must be ${wanted}, but is ${kindOf(input)}` };
}

/** `("a" | "b")` as a list of a, b. */
function listed(expected: string | null): string[] {
  return (expected ?? '')
    .replace(/^\(|\)$/g, '')
    .split(' | ')
    .map((word) => word.replace(/^"|"$/g, ''));
}

function oneOf(choices: readonly string[]): string {
  const quoted = choices.map((choice) => (/^\d+$/.test(choice) ? choice : `"${choice}"`));
  return quoted.length === 1 ? quoted[0]! : `one of ${quoted.join(', ')}`;
}

function proposal(word: string, known: readonly string[], otherwise = ''): string {
  const near = nearestNames(word, known)[0];
  return near === undefined ? otherwise : `; did you mean \`${near}\`?`;
}

/** The keys that the schema knows at this place. */
function knownKeys(path: JsonPath, value: unknown): readonly string[] {
  let schema: unknown = sheetSchema;
  for (const [depth, key] of path.entries()) schema = childSchema(schema, key, member(value, path.slice(0, depth + 1)));
  const entries = optionOf(schema, value)['entries'];
  return typeof entries === 'object' && entries !== null ? Object.keys(entries) : [];
}
