// The data of a table as formulas use it: columns of numbers in coherent SI beside their texts as typed.
//
// 1. The first column is the key. A column without a type holds texts.
// 2. `numbers` stands where the column has a unit, NaN where an entry is no number; `texts` always stands.
// 3. A lookup takes the first row that fits. Interpolation wants keys that rise, or fall, from row to row throughout.
// Not here: reading a table cell (src/sheet), typing of lookups (infer-table.ts).

import type { Unit } from '../quantity/index.ts';
import { nearestNames } from './nearest.ts';
import type { TableType, Type } from './type.ts';

export interface TableColumnData {
  readonly name: string;
  readonly type?: Type;
  readonly unit?: Unit;
  /** Coherent SI, one entry a row. */
  readonly numbers?: Float64Array;
  readonly texts: readonly string[];
}

export interface TableData {
  readonly name: string;
  readonly columns: readonly TableColumnData[];
  readonly rows: number;
}

export function columnOf(table: TableData, name: string): TableColumnData | undefined {
  return table.columns.find((column) => column.name === name);
}

/** +1 where the keys rise throughout, −1 where they fall throughout, 0 otherwise (NaN among them, or a key twice). */
export function directionOf(keys: Float64Array): 1 | -1 | 0 {
  const first = keys[0];
  if (first === undefined || Number.isNaN(first)) return 0;
  if (keys.length === 1) return 1;
  const direction = keys[1]! > first ? 1 : -1;
  for (let row = 1; row < keys.length; row++) {
    if (!((keys[row]! - keys[row - 1]!) * direction > 0)) return 0;
  }
  return direction;
}

/**
 * The row at or below x in the direction of the keys: keys[row] <= x < keys[row + 1]; the last row only where x is its key.
 * −1 where x lies outside the table or is NaN.
 */
export function rowBelow(keys: Float64Array, direction: 1 | -1, x: number): number {
  const last = keys.length - 1;
  const s = x * direction;
  if (!(s >= keys[0]! * direction && s <= keys[last]! * direction)) return -1;
  let low = 0;
  let high = last;
  while (low < high) {
    const middle = (low + high + 1) >> 1;
    if (keys[middle]! * direction <= s) low = middle;
    else high = middle - 1;
  }
  return low;
}

/** Linear between rows, exactly the entry at a row, NaN outside the table. */
export function interpolateAt(keys: Float64Array, values: Float64Array, direction: 1 | -1, x: number): number {
  const row = rowBelow(keys, direction, x);
  if (row < 0) return Number.NaN;
  const x0 = keys[row]!;
  const y0 = values[row]!;
  if (x === x0) return y0;
  return y0 + ((x - x0) * (values[row + 1]! - y0)) / (keys[row + 1]! - x0);
}

/** The first row whose number is exactly x; −1 where none is. */
export function rowOfNumber(keys: Float64Array, x: number): number {
  return keys.indexOf(x);
}

/** The texts of a column, where the table's data are at hand. */
export function textsOf(table: TableType | TableData, column: string): readonly string[] | undefined {
  for (const each of table.columns) {
    if (each.name === column) return (each as Partial<TableColumnData>).texts;
  }
  return undefined;
}

/** The text of a column that was most likely meant: nearest in spelling, or one that begins alike. */
export function nearestText(text: string, texts: readonly string[]): string | undefined {
  const near = nearestNames(text, new Set(texts))[0];
  if (near !== undefined || text === '') return near;
  const begins = text.toLowerCase();
  return texts.find((each) => each !== '' && (each.toLowerCase().startsWith(begins) || begins.startsWith(each.toLowerCase())));
}
