// Heads of a pasted table: what a column is called, and in which unit it stands.
//
// 1. A unit is taken from a head only where it reads as one: the `D` of `d/D` stays with the head.
// 2. A column name is one that a formula can write; it is unique in its table.
// Not here: rows (table-text.ts).

import { canonicalName, isName } from '../formula/index.ts';
import { readUnit } from '../quantity/index.ts';
import type { DecimalSign } from './reading.ts';
import { isNumber } from './table-numbers.ts';

export interface Head {
  readonly text: string;
  readonly unit?: string;
}

const forms = [/^(.*?)\s*\[([^[\]]*)\]$/u, /^(.*?)\s*\(([^()]*(?:\([^()]*\)[^()]*)*)\)$/u, /^(.*?)\s*\/\s*([^\s/].*)$/u];

const longestHead = 200;

/** `d/mm`, `d (mm)`, `d [mm]`; `d [-]` is of unit 1. */
export function readHead(head: string): Head {
  const typed = head.trim();
  if (typed.length > longestHead) return { text: typed };
  for (const form of forms) {
    const [, text = '', inside = ''] = form.exec(typed) ?? [];
    const unit = unitText(inside);
    if (text !== '' && unit !== undefined) return { text: text.trim(), unit };
  }
  return { text: typed };
}

function unitText(text: string): string | undefined {
  const typed = text.trim().replace(/^\((.*)\)$/u, '$1');
  if (typed === '-' || typed === '–' || typed === '1') return '1';
  if (typed === '' || /^[\d.,]+$/u.test(typed)) return undefined;
  return readUnit(typed).ok ? typed : undefined;
}

/** The units of a row of units, '' entries and columns of texts undefined; undefined where it is a row like the others. */
export function unitRow(
  row: readonly string[],
  below: readonly (readonly string[])[],
  sign: DecimalSign,
): readonly (string | undefined)[] | undefined {
  let units = 0;
  const found: (string | undefined)[] = [];
  for (const [at, entry] of row.entries()) {
    const inner = /^\[(.*)\]$|^\((.*)\)$/u.exec(entry);
    const text = inner ? (inner[1] ?? inner[2] ?? '') : entry;
    const numbers = below.some((other) => isNumber(other[at] ?? '', sign));
    if (text === '') found.push(undefined);
    else if (!inner && isNumber(entry, sign)) return undefined;
    else {
      const unit = unitText(text);
      // Over texts a word that happens to be a unit is an entry.
      if (unit === undefined || !numbers) return undefined;
      if (inner || unit !== '1') units += 1;
      found.push(unit);
    }
  }
  return units > 0 ? found : undefined;
}

export function columnName(head: string, at: number, taken: Set<string>): string {
  const asTyped = canonicalName(head);
  const words = head
    .normalize('NFC')
    .replace(/[^\p{L}\p{N}]+/gu, '_')
    .replace(/^_+|_+$/gu, '');
  const candidates = words === '' ? [] : [asTyped, words, `c_${words}`];
  const base = candidates.map((each) => canonicalName(each)).find((each) => isName(each)) ?? `c_${at + 1}`;
  let name = base;
  for (let more = 2; taken.has(name); more += 1) name = `${base}_${more}`;
  taken.add(name);
  return name;
}
