// The empty line at the foot of a section: one line of text, and the cell that it stands for.
//
//   d = 200 mm ; Diameter ; Drawing 14    a given: what reads as a value; title and source follow, each behind a `;`
//   v [m/s] = pi*d*n ; Belt speed         a derived quantity: everything else right of `=`. The unit stands in brackets before the sign
//   k := 2                                a derived quantity even where it reads as a value
//   sigma <= sigma_allow ; Stress         a criterion: one of < <= > >= between two formulas; `F_1 [kN] <= F_2` prints in kN
//   F_0x [N] = ? instead F_0 where S = S_req between 10 N to 20 kN        a sought quantity; `instead …` may be absent
//   pair [surfaces.surface] = leather     a given that is chosen from the column of a table
//   # Geometry, ## Pulleys, ### Bores     headings of the three ranks
//   table surfaces: surface, mu [1]       an empty table with these columns
//   assumption: …, limit: …, caution: …   a note of that role; `note: …` and any other text a plain note
//
// 1. Any text has a reading and the same text in the same sheet always has the same one; nothing throws.
// 2. What is a value is a given, even where its unit is also the name of a quantity: `x = 2 m` is two metres.
// Not here: the line of a cell (entry-write.ts), what is wrong with a line and what it will say (entry-help.ts).

import { canonicalName, isName, parseFormula, type Token, tokenize } from '../../formula/index.ts';
import { readUnit, readValue } from '../../quantity/index.ts';
import type { Cell, NoteCell, Relation, TableColumn } from '../../sheet/index.ts';

type WithoutId<T> = T extends unknown ? Omit<T, 'id'> : never;
/** A cell that has no id yet. */
export type CellDraft = WithoutId<Cell>;

/** What a piece of the line is, for help at the caret; half-open spans in the line. */
export type PartRole =
  | 'name'
  | 'unit'
  | 'value'
  | 'formula'
  | 'left'
  | 'right'
  | 'where'
  | 'between'
  | 'instead'
  | 'title'
  | 'source'
  | 'text';
export interface Part {
  readonly role: PartRole;
  readonly from: number;
  readonly to: number;
}

export type EntryKind = 'nothing' | 'heading' | 'note' | 'given' | 'derived' | 'criterion' | 'sought' | 'table';

export interface Entry {
  readonly kind: EntryKind;
  /** The line as typed. */
  readonly text: string;
  /** Undefined for an empty line alone. */
  readonly draft?: CellDraft;
  readonly parts: readonly Part[];
}

/** What reading needs of the sheet. */
export interface EntryScope {
  readonly decimalSign: '.' | ',';
  /** Whether a canonical name is that of a quantity. */
  knows(name: string): boolean;
  hasTable(name: string): boolean;
}

export function readEntry(text: string, scope: EntryScope): Entry {
  const whole = trimmed(text, 0, text.length);
  if (whole.from === whole.to) return { kind: 'nothing', text, parts: [] };
  return (
    readHeading(text, whole) ??
    readRole(text, whole) ??
    readTable(text, whole) ??
    readLine(text, whole, scope) ??
    note(text, whole)
  );
}

interface Reach {
  readonly from: number;
  readonly to: number;
}

function trimmed(text: string, from: number, to: number): Reach {
  let [a, b] = [from, to];
  while (a < b && /\s/u.test(text[a]!)) a += 1;
  while (b > a && /\s/u.test(text[b - 1]!)) b -= 1;
  return { from: a, to: b };
}

const pieceOf = (text: string, { from, to }: Reach) => text.slice(from, to);

function note(text: string, reach: Reach, role?: NoteCell['role']): Entry {
  const draft: CellDraft = { kind: 'note', text: pieceOf(text, reach), ...(role === undefined ? {} : { role }) };
  return { kind: 'note', text, draft, parts: [{ role: 'text', ...reach }] };
}

function readHeading(text: string, whole: Reach): Entry | undefined {
  const hashes = /^#+/u.exec(pieceOf(text, whole))?.[0].length ?? 0;
  if (hashes < 1 || hashes > 3) return undefined;
  const reach = trimmed(text, whole.from + hashes, whole.to);
  const draft: CellDraft = { kind: 'heading', level: hashes as 1 | 2 | 3, text: pieceOf(text, reach) };
  return { kind: 'heading', text, draft, parts: [{ role: 'text', ...reach }] };
}

export const roleWords = /^(note|assumption|limit|caution):/iu;

function readRole(text: string, whole: Reach): Entry | undefined {
  const word = roleWords.exec(pieceOf(text, whole));
  if (word === null) return undefined;
  const role = word[1]!.toLowerCase();
  return note(
    text,
    trimmed(text, whole.from + word[0].length, whole.to),
    role === 'note' ? undefined : (role as NoteCell['role']),
  );
}

export const tableLine = /^table\s+([A-Za-z]\w*)\s*:/u;

function readTable(text: string, whole: Reach): Entry | undefined {
  const head = tableLine.exec(pieceOf(text, whole));
  if (head === null) return undefined;
  const { body, parts, words } = wordsBehind(text, { from: whole.from + head[0].length, to: whole.to });
  const columns = pieceOf(text, body)
    .split(',')
    .map((piece): TableColumn => {
      const found = /^([^[\]]*?)\s*(?:\[([^\]]*)\])?$/u.exec(piece.trim());
      const name = found === null ? piece.trim() : found[1];
      const unit = found?.[2];
      return { name: name ?? '', ...(unit === undefined ? {} : { unit: unit.trim() }) };
    })
    .filter((column) => column.name !== '');
  return { kind: 'table', text, draft: { kind: 'table', name: head[1]!, ...words, columns, rows: [] }, parts };
}

export interface Words {
  readonly title?: string;
  readonly source?: string;
}

/** Cuts title and source off: the first `;` outside quotes begins the title, the second the source. */
function wordsBehind(text: string, reach: Reach): { readonly body: Reach; readonly words: Words; readonly parts: Part[] } {
  const sign = tokenize(pieceOf(text, reach)).find((token) => token.kind === 'operator' && token.text === ';');
  if (sign === undefined) return { body: trimmed(text, reach.from, reach.to), words: {}, parts: [] };
  const first = reach.from + sign.from;
  const second = text.indexOf(';', first + 1);
  const title = trimmed(text, first + 1, second < 0 || second >= reach.to ? reach.to : second);
  const source = second < 0 || second >= reach.to ? { from: reach.to, to: reach.to } : trimmed(text, second + 1, reach.to);
  const words = {
    ...(title.from === title.to ? {} : { title: pieceOf(text, title) }),
    ...(source.from === source.to ? {} : { source: pieceOf(text, source) }),
  };
  return {
    body: trimmed(text, reach.from, first),
    words,
    parts: [
      { role: 'title', ...title },
      { role: 'source', ...source },
    ],
  };
}

export const relations: ReadonlyMap<string, Relation> = new Map<string, Relation>([
  ['<', '<'],
  ['<=', '<='],
  ['=<', '<='],
  ['>', '>'],
  ['>=', '>='],
  ['=>', '>='],
]);

/** The signs of a line that are in no parentheses, with their places in the line. */
export function openSigns(text: string, body: Reach): Token[] {
  const open: Token[] = [];
  let depth = 0;
  for (const token of tokenize(pieceOf(text, body))) {
    if (token.kind === 'open') depth += 1;
    else if (token.kind === 'close') depth = Math.max(0, depth - 1);
    else if (depth === 0 && token.kind === 'operator')
      open.push({ ...token, from: token.from + body.from, to: token.to + body.from });
  }
  return open;
}

function readLine(text: string, whole: Reach, scope: EntryScope): Entry | undefined {
  const { body, words, parts } = wordsBehind(text, whole);
  const signs = openSigns(text, body);
  const equal = signs.find((token) => token.text === '=' || token.text === ':=' || relations.has(token.text));
  if (equal !== undefined && (equal.text === '=' || equal.text === ':=')) {
    const head = headOf(text, { from: body.from, to: equal.from });
    // A name has no spaces; a line of prose may hold an equals sign.
    if (head.what.from === head.what.to || /\s/u.test(pieceOf(text, head.what))) return undefined;
    const side = trimmed(text, equal.to, body.to);
    return quantity({ text, head, side, words, parts, forced: equal.text === ':=' }, scope);
  }
  const comparisons = signs.filter((token) => relations.has(token.text));
  const [sign] = comparisons;
  if (sign === undefined || comparisons.length > 1 || signs.some((token) => token.text === '?' || token.text === '='))
    return undefined;
  const head = headOf(text, { from: body.from, to: sign.from });
  const right = trimmed(text, sign.to, body.to);
  const left = pieceOf(text, head.what);
  if (!isComparison(left, pieceOf(text, right), scope)) return undefined;
  const unit = head.unit === undefined ? '' : pieceOf(text, head.unit);
  const draft: CellDraft = {
    kind: 'criterion',
    ...titleOf(words),
    left,
    relation: relations.get(sign.text) ?? '<=',
    right: pieceOf(text, right),
    ...(unit === '' ? {} : { unit }),
    ...sourceOf(words),
  };
  const own: Part[] = [
    { role: 'left', ...head.what },
    { role: 'right', ...right },
  ];
  if (head.unit) own.push({ role: 'unit', ...head.unit });
  return { kind: 'criterion', text, draft, parts: [...own, ...parts] };
}

interface Head {
  readonly what: Reach;
  readonly unit?: Reach;
}

/** `v [m/s]`: what stands before the sign, and the unit in brackets. */
function headOf(text: string, reach: Reach): Head {
  const all = trimmed(text, reach.from, reach.to);
  if (text[all.to - 1] !== ']' || all.to === all.from) return { what: all };
  const bracket = text.lastIndexOf('[', all.to);
  if (bracket < all.from) return { what: all };
  return { what: trimmed(text, all.from, bracket), unit: trimmed(text, bracket + 1, all.to - 1) };
}

/** Prose may hold a sign of comparison: a criterion has formulas on both sides, or what can become one, beside a known name. */
function isComparison(left: string, right: string, scope: EntryScope): boolean {
  const knows = (token: Token) => token.kind !== 'name' || scope.knows(token.text) || !isName(token.text);
  const sides = [left, right].map((text) => ({ text, tokens: tokenize(text), reads: parseFormula(text, scope).ok }));
  const known = sides.some(({ tokens }) => tokens.some((token) => token.kind === 'name' && scope.knows(token.text)));
  return sides.every(({ text, tokens, reads }) => {
    if (wordsInARow(text)) return reads && tokens.every(knows);
    return reads || (known && (text === '' || tokens.every((token) => token.kind !== 'unknown')));
  });
}

/** Two names beside each other: in a formula a product without its sign, in prose every sentence. */
export function wordsInARow(text: string): boolean {
  const tokens = tokenize(text);
  return tokens.some((token, index) => token.kind === 'name' && tokens[index + 1]?.kind === 'name');
}

interface QuantityLine {
  readonly text: string;
  readonly head: Head;
  readonly side: Reach;
  readonly words: Words;
  readonly parts: readonly Part[];
  readonly forced: boolean;
}

const titleOf = ({ title }: Words) => (title === undefined ? {} : { title });
const sourceOf = ({ source }: Words) => (source === undefined ? {} : { source });

function quantity(line: QuantityLine, scope: EntryScope): Entry {
  const { text, head, side, words, forced } = line;
  const name = canonicalName(pieceOf(text, head.what));
  const unit = head.unit === undefined ? '' : pieceOf(text, head.unit);
  const right = pieceOf(text, side);
  const parts: Part[] = [{ role: 'name', ...head.what }];
  if (head.unit) parts.push({ role: 'unit', ...head.unit });
  const declared = unit === '' ? {} : { unit };
  if (!forced && right.startsWith('?')) return sought(line, name, declared);
  if (!forced && isColumn(unit, right, scope)) {
    const value = right.length > 1 && /^".*"$/u.test(right) ? right.slice(1, -1) : right;
    const draft: CellDraft = { kind: 'given', name, ...titleOf(words), value, choices: unit, ...sourceOf(words) };
    return { kind: 'given', text, draft, parts: [...parts, { role: 'value', ...side }, ...line.parts] };
  }
  if (!forced && isValue(right, scope)) {
    const draft: CellDraft = { kind: 'given', name, ...titleOf(words), value: right, ...declared, ...sourceOf(words) };
    return { kind: 'given', text, draft, parts: [...parts, { role: 'value', ...side }, ...line.parts] };
  }
  const draft: CellDraft = { kind: 'derived', name, ...titleOf(words), formula: right, ...declared, ...sourceOf(words) };
  return { kind: 'derived', text, draft, parts: [...parts, { role: 'formula', ...side }, ...line.parts] };
}

/** `surfaces.surface` in the brackets: a column of a table, or what can only be meant as one. */
function isColumn(text: string, right: string, scope: EntryScope): boolean {
  const dot = text.indexOf('.');
  if (dot < 1 || dot === text.length - 1) return false;
  if (scope.hasTable(text.slice(0, dot))) return true;
  return /^[A-Za-z]\w*\.\D/u.test(text) && !readUnit(text).ok && !readValue(right, scope).ok;
}

/** Whether the right side is a value, or one that was mistyped: a number first, and nothing that only a formula has. */
function isValue(text: string, scope: EntryScope): boolean {
  if (text === '' || readValue(text, scope).ok) return true;
  if (/±|\+\s?\/\s?-/u.test(text)) return true;
  if (!/^[+\-−–]?\s*[.,]?\d/u.test(text)) return false;
  const tokens = tokenize(text);
  const names = tokens.filter((token) => token.kind === 'name');
  if (names.some((token) => scope.knows(token.text) || !isName(token.text))) return false;
  if (tokens.some((token) => token.kind === 'open' || token.kind === 'string')) return false;
  const read = parseFormula(text, scope);
  return (
    !read.ok || (names.length > 0 && !tokens.slice(1).some((token) => token.kind === 'operator' && /^[+-]$/u.test(token.text)))
  );
}

const soughtLine = /^\?\s*(?:instead\s+(\S+)\s+)?(?:where\s+)?(.*?)(?:(?:^|\s+)between(?:\s+(.*))?)?$/u;

function sought({ text, head, side, words, parts }: QuantityLine, name: string, declared: { readonly unit?: string }): Entry {
  const right = pieceOf(text, side);
  const [, instead, where = '', between = ''] = soughtLine.exec(right) ?? [];
  const draft: CellDraft = {
    kind: 'sought',
    name,
    ...titleOf(words),
    ...declared,
    ...(instead === undefined ? {} : { instead: canonicalName(instead) }),
    where: where.trim(),
    between: between.trim(),
    ...sourceOf(words),
  };
  const place = (role: PartRole, piece: string): Part[] => {
    const from = piece.trim() === '' ? -1 : text.lastIndexOf(piece.trim(), side.to);
    return from < side.from ? [] : [{ role, from, to: from + piece.trim().length }];
  };
  const own: Part[] = [{ role: 'name', ...head.what }, ...(head.unit ? [{ role: 'unit' as const, ...head.unit }] : [])];
  const inside = [...place('instead', instead ?? ''), ...place('where', where), ...place('between', between)];
  return { kind: 'sought', text, draft, parts: [...own, ...inside, ...parts] };
}
