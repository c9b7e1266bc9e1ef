// The unit catalogue: from a symbol as typed to the row and the prefix it stands for.
//
// 1. A spelling that a row names itself comes before any reading as prefix and unit: "min" is the minute.
// 2. Only the prefixes a row takes are read; what a wrong prefix means is said by misusedPrefix.
// 3. Looked up in Maps: "constructor" and "__proto__" are unknown like any other word.
// Not here: products and quotients (unit-grammar.ts), proposals for unknown symbols (unit-nearest.ts).

import type { Dimension } from './dimension.ts';
import { dimensionOf } from './dimension.ts';
import type { Exact } from './exact.ts';
import { exactOf, exactOfText, multiplyE, powerE } from './exact.ts';
import type { Prefix, UnitRow } from './unit-row.ts';
import { prefixes } from './unit-row.ts';
import { acceptedUnits } from './units.accepted.ts';
import { otherUnits } from './units.other.ts';
import { siUnits } from './units.si.ts';
import { usUnits } from './units.us.ts';

export const unitRows: readonly UnitRow[] = [...siUnits, ...acceptedUnits, ...usUnits, ...otherUnits];

/** One symbol of a unit, found in the catalogue. */
export interface UnitSymbol {
  /** As printed: "kN", "°C". */
  readonly text: string;
  readonly row: UnitRow;
  readonly prefix?: Prefix;
  readonly dimension: Dimension;
  readonly factor: Exact;
}

const rowBySpelling = new Map<string, UnitRow>();
for (const row of unitRows) {
  for (const spelling of [row.symbol, ...(row.spellings ?? [])]) rowBySpelling.set(spelling, row);
}
const prefixBySpelling = new Map<string, Prefix>();
for (const prefix of prefixes) {
  for (const spelling of [prefix.symbol, ...(prefix.spellings ?? [])]) prefixBySpelling.set(spelling, prefix);
}

/** kgs and the like: an English plural s after a symbol is common and cannot mean anything else. */
const plurals = new Map([['kgs', 'kg']]);

const taken = (row: UnitRow, prefix: Prefix): boolean =>
  row.prefixes === 'all' || row.prefixes?.split(' ').includes(prefix.symbol) === true;

const found = new Map<string, UnitSymbol>();

function symbolOf(row: UnitRow, prefix?: Prefix): UnitSymbol {
  const text = `${prefix?.symbol ?? ''}${row.symbol}`;
  const known = found.get(text);
  if (known) return known;
  const own = exactOfText(row.factor);
  const factor = prefix ? multiplyE(own, powerE(exactOf(10), prefix.power)) : own;
  const symbol: UnitSymbol = { text, row, ...(prefix && { prefix }), dimension: dimensionOf(row.dimension), factor };
  found.set(text, symbol);
  return symbol;
}

/** A prefix and the row it stands before, whether or not the row takes it. */
function split(text: string): { prefix: Prefix; row: UnitRow } | undefined {
  let misused: { prefix: Prefix; row: UnitRow } | undefined;
  for (const length of [1, 2]) {
    const prefix = prefixBySpelling.get(text.slice(0, length));
    const row = rowBySpelling.get(text.slice(length));
    if (!prefix || !row) continue;
    if (taken(row, prefix)) return { prefix, row };
    misused ??= { prefix, row };
  }
  return misused;
}

/** The unit a symbol stands for; undefined where it is unknown or its prefix is not used with it. */
export function symbolOfText(text: string): UnitSymbol | undefined {
  const row = rowBySpelling.get(text);
  if (row) return symbolOf(row);
  const parts = split(text);
  if (parts && taken(parts.row, parts.prefix)) return symbolOf(parts.row, parts.prefix);
  const singular = plurals.get(text);
  return singular === undefined ? undefined : symbolOfText(singular);
}

/** "kmin", "µkg", "mµm", "k": the sentence that says what is wrong with the prefix, and what to write where it is clear. */
export function misusedPrefix(text: string): { readonly message: string; readonly instead: readonly string[] } | undefined {
  const alone = prefixBySpelling.get(text);
  if (alone) return { message: `${text} is the prefix ${alone.name} and needs a unit after it`, instead: [] };
  const parts = split(text);
  if (parts && !taken(parts.row, parts.prefix)) {
    const { row, prefix } = parts;
    return {
      message: `${row.symbol} (${row.name}) is not used with the prefix ${prefix.symbol}, the factor belongs to the number`,
      instead: [],
    };
  }
  for (const length of [1, 2]) {
    const outer = prefixBySpelling.get(text.slice(0, length));
    const inner = symbolOfText(text.slice(length));
    // In "Pas" the s is a second, not an attosecond with the prefix peta.
    if (!outer || !inner?.prefix || !usual.has(inner.text)) continue;
    const power = outer.power + inner.prefix.power;
    const joint = prefixes.find((prefix) => prefix.power === power && taken(inner.row, prefix));
    const instead = power === 0 ? [inner.row.symbol] : joint ? [`${joint.symbol}${inner.row.symbol}`] : [];
    return { message: `${inner.text} has a prefix already and takes no second one`, instead };
  }
  return undefined;
}

/** Every spelling that is read, with the symbol it is printed as: rows, other spellings, all prefixed forms. */
export function* allSpellings(): Generator<readonly [spelling: string, symbol: string]> {
  for (const row of unitRows) {
    for (const spelling of [row.symbol, ...(row.spellings ?? [])]) {
      yield [spelling, row.symbol];
      for (const prefix of prefixes) {
        if (!taken(row, prefix)) continue;
        for (const before of [prefix.symbol, ...(prefix.spellings ?? [])]) yield [before + spelling, prefix.symbol + row.symbol];
      }
    }
  }
}

/** The symbols worth proposing: every row and its usual prefixed forms. */
export const usualSymbols: readonly string[] = unitRows.flatMap((row) => [
  row.symbol,
  ...(row.usual === undefined ? [] : row.usual.split(' ').map((prefix) => prefix + row.symbol)),
]);
const usual = new Set(usualSymbols);
