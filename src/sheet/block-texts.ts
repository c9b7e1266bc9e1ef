// Texts of a block on its way into another sheet: names in prose, citations, decimal signs.
//
// 1. In prose a word with a subscript (F_1min) that names a quantity of the block gets its new name; a lone letter is more often
//    a word and is left alone, except in the braces of a note, where it names a quantity.
// 2. A citation `[R1]` follows its reference to the id that this has in the sheet.
// 3. Decimal signs change only where a number is read: values, ranges, numeric columns, quoted literals. The other sign never
//    groups digits, so the change has one reading.
// Not here: which names, references and signs (insert-block.ts), names in formulas (rename.ts).

import { canonicalName, readLiteral, tokenize } from '../formula/index.ts';
import type { Cell, Reference, TableCell } from './document.ts';
import type { DecimalSign } from './reading.ts';

const nameWord = /(?<![\p{L}\p{N}_{])\p{L}[\p{L}\p{N}]{0,30}_[\p{L}\p{N}_]{1,30}(?![\p{L}\p{N}_}])/gu;
const citation = /\[([^\][\s]{1,40})\]/gu;

/** The cell with `change` applied to its texts for readers; itself where nothing changes. Formulas and values are left alone. */
export function withProse(cell: Cell, change: (text: string) => string): Cell {
  const next: Record<string, string> = {};
  for (const key of ['title', 'source', 'text', 'ifNotMet', 'justification'] as const) {
    const text = (cell as unknown as Partial<Record<typeof key, string>>)[key];
    if (text === undefined) continue;
    const to = change(text);
    if (to !== text) next[key] = to;
  }
  if (cell.kind === 'table') {
    const columns = cell.columns.map((column) =>
      column.title === undefined ? column : { ...column, title: change(column.title) },
    );
    if (columns.some((column, i) => column.title !== cell.columns[i]!.title)) return { ...cell, ...next, columns };
  }
  return Object.keys(next).length === 0 ? cell : ({ ...cell, ...next } as Cell);
}

export function renameInProse(text: string, quantity: (name: string) => string | undefined): string {
  return text.replace(nameWord, (word) => quantity(canonicalName(word)) ?? word);
}

/** Ids that a text cites, each once. */
export function citedIds(text: string): readonly string[] {
  return [...new Set([...text.matchAll(citation)].map((match) => match[1]!))];
}

export function withCitations(text: string, ids: ReadonlyMap<string, string>): string {
  return text.replace(citation, (whole, id: string) => (ids.has(id) ? `[${ids.get(id)}]` : whole));
}

export interface MergedReferences {
  /** The list of the sheet with what came to it; the same list where nothing did. */
  readonly references: readonly Reference[];
  /** From the id in the block to the id in the sheet. */
  readonly ids: ReadonlyMap<string, string>;
}

/** A reference is the same where document and edition are; a new one keeps its id if that is free, else it takes the next R number. */
export function mergeReferences(known: readonly Reference[], added: readonly Reference[]): MergedReferences {
  const references = [...known];
  const taken = new Set(known.map(({ id }) => id));
  const ids = new Map<string, string>();
  for (const reference of added) {
    const same = references.find((other) => sourceKey(other) === sourceKey(reference));
    if (same !== undefined) {
      ids.set(reference.id, same.id);
      continue;
    }
    const id = taken.has(reference.id) ? nextId(taken) : reference.id;
    taken.add(id);
    ids.set(reference.id, id);
    references.push({ ...reference, id });
  }
  return { references: references.length === known.length ? known : references, ids };
}

function sourceKey({ document, edition }: Reference): string {
  return JSON.stringify([document, edition ?? ''].map((text) => text.normalize('NFC').replace(/\s+/gu, ' ').trim()));
}

function nextId(taken: ReadonlySet<string>): string {
  let last = 0;
  for (const id of taken) if (/^R\d{1,6}$/.test(id)) last = Math.max(last, Number(id.slice(1)));
  return `R${last + 1}`;
}

/** The cell with its numbers written for another decimal sign. */
export function withDecimalSign(cell: Cell, from: DecimalSign, to: DecimalSign): Cell {
  if (from === to) return cell;
  const number = (text: string): string => text.replace(/[.,]/gu, (sign) => (sign === from ? to : sign));
  const formula = (text: string): string => {
    let result = '';
    let copied = 0;
    for (const token of tokenize(text)) {
      if (token.kind !== 'string' || !readLiteral(token.text, from).ok) continue;
      result += text.slice(copied, token.from) + number(text.slice(token.from, token.to));
      copied = token.to;
    }
    return result + text.slice(copied);
  };
  switch (cell.kind) {
    case 'given':
      if (cell.choices !== undefined) return cell;
      return {
        ...cell,
        value: number(cell.value),
        ...(cell.byCase === undefined
          ? {}
          : { byCase: Object.fromEntries(Object.entries(cell.byCase).map(([id, text]) => [id, number(text)])) }),
        ...(cell.range === undefined ? {} : { range: number(cell.range) }),
      };
    case 'derived':
      return { ...cell, formula: formula(cell.formula) };
    case 'criterion':
      return { ...cell, left: formula(cell.left), right: formula(cell.right) };
    case 'sought':
      return { ...cell, where: formula(cell.where), between: number(cell.between) };
    case 'chart':
      return { ...cell, from: number(cell.from), to: number(cell.to) };
    case 'table':
      return tableWithSign(cell, number);
    default:
      return cell;
  }
}

function tableWithSign(cell: TableCell, number: (text: string) => string): TableCell {
  const numeric = cell.columns.map((column) => column.unit !== undefined);
  return { ...cell, rows: cell.rows.map((row) => row.map((text, at) => (numeric[at] ? number(text) : text))) };
}
