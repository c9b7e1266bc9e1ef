// A table cell read into columns: texts as typed, numbers in coherent SI where the column has a unit.
//
// 1. The first column is the key; a column without `unit` is text.
// 2. An entry that is no number of the column's unit is a problem with its row and column; its number is NaN and the other entries stand.
// 3. An entry is typed as a bare number in the column's unit, or with a unit of its own of the same dimension.
// Not here: looking a row up (src/formula).

import { type TableColumnData, type TableData, typeOfUnit } from '../formula/index.ts';
import {
  equalD,
  type Problem,
  readUnit,
  readValue,
  siOfNumeral,
  turnsAgainstAngle,
  type Unit,
  withArticle,
} from '../quantity/index.ts';
import type { TableCell, TableColumn } from './document.ts';
import type { DecimalSign, FieldProblem } from './reading.ts';

export interface ReadTable {
  readonly decimalSign: DecimalSign;
  readonly data?: TableData;
  readonly problems: readonly FieldProblem[];
}

const kept = new WeakMap<TableCell, ReadTable>();

export function readTable(cell: TableCell, decimalSign: DecimalSign): ReadTable {
  const known = kept.get(cell);
  if (known && known.decimalSign === decimalSign) return known;
  const read = readAnew(cell, decimalSign);
  kept.set(cell, read);
  return read;
}

function readAnew(cell: TableCell, decimalSign: DecimalSign): ReadTable {
  const problems: FieldProblem[] = [];
  if (cell.columns.length === 0) {
    problems.push({
      code: 'empty-table',
      severity: 'error',
      message: 'the table has no columns; give it a key column first',
      field: 'columns',
    });
    return { decimalSign, problems };
  }
  const seen = new Set<string>();
  for (const [index, column] of cell.columns.entries()) {
    if (seen.has(column.name)) {
      problems.push({
        code: 'column-twice',
        severity: 'error',
        message: `two columns are called “${column.name}”; formulas could not tell them apart, rename one`,
        field: `columns.${index}`,
      });
    }
    seen.add(column.name);
  }
  for (const [index, row] of cell.rows.entries()) {
    if (row.length !== cell.columns.length) {
      problems.push({
        code: 'ragged-table',
        severity: 'error',
        message: `row ${index + 1} has ${row.length} ${row.length === 1 ? 'entry' : 'entries'}, the table has ${cell.columns.length} ${cell.columns.length === 1 ? 'column' : 'columns'}; fill or remove the difference`,
        field: `rows.${index}`,
      });
    }
  }
  if (problems.length > 0) return { decimalSign, problems };
  const columns = cell.columns.map((column, at) => readColumn(cell, column, at, decimalSign, problems));
  const keys = new Set<string>();
  for (const [index, row] of cell.rows.entries()) {
    if (keys.has(row[0]!)) {
      problems.push({
        code: 'key-twice',
        severity: 'warning',
        message: `the key “${row[0]}” stands in more than one row; a lookup takes the first`,
        field: `rows.${index}`,
      });
    }
    keys.add(row[0]!);
  }
  return { decimalSign, data: { name: cell.name, columns, rows: cell.rows.length }, problems };
}

function readColumn(
  cell: TableCell,
  column: TableColumn,
  at: number,
  decimalSign: DecimalSign,
  problems: FieldProblem[],
): TableColumnData {
  const texts = cell.rows.map((row) => row[at]!);
  if (column.unit === undefined) return { name: column.name, texts };
  const unit = readUnit(column.unit);
  if (!unit.ok) {
    problems.push({ ...unit.problem, field: `columns.${at}` });
    return { name: column.name, texts };
  }
  const numbers = new Float64Array(texts.length);
  for (const [row, text] of texts.entries()) {
    const read = readEntry(text, unit.value, decimalSign);
    if (typeof read === 'number') {
      numbers[row] = read;
      continue;
    }
    numbers[row] = Number.NaN;
    problems.push({
      code: 'bad-entry',
      severity: 'error',
      message: `row ${row + 1}, column ${column.name}: ${read.message}`,
      field: `rows.${row}.${at}`,
    });
  }
  return { name: column.name, texts, numbers, unit: unit.value, type: typeOfUnit(unit.value) };
}

/** The number of an entry in coherent SI, or what keeps it from being one of the column's unit. */
export function readEntry(text: string, unit: Unit, decimalSign: DecimalSign): number | Problem {
  const read = readValue(text, { decimalSign });
  if (!read.ok) return read.problem;
  const value = read.value;
  if (value.unit.text === '1' || value.unit.text === '') return siOfNumeral(value.numeral, unit);
  if (equalD(value.unit.dimension, unit.dimension) && !turnsAgainstAngle(value.unit, unit)) return value.si;
  return {
    code: 'unlike-entry',
    severity: 'error',
    message: `${text} is ${withArticle(value.unit)}, the column holds ${withArticle(unit)}`,
  };
}

/** The first row at which the keys stop to rise, or to fall, throughout; undefined where they do not, or where one is no number. */
export function unsortedRow(keys: Float64Array): number | undefined {
  if (keys.some(Number.isNaN)) return undefined;
  const rises = keys.length > 1 && keys[1]! > keys[0]!;
  for (let row = 1; row < keys.length; row += 1) {
    if (rises ? !(keys[row]! > keys[row - 1]!) : !(keys[row]! < keys[row - 1]!)) return row;
  }
  return undefined;
}

/** The warning of a table that a formula interpolates over, where its keys are out of order. */
export function unsortedAxis(
  cell: TableCell,
  data: TableData | undefined,
): readonly (FieldProblem & { readonly cell: string })[] {
  const key = data?.columns[0];
  const row = key?.numbers && unsortedRow(key.numbers);
  if (key === undefined || row === undefined) return [];
  const [now, last] = [key.texts[row], key.texts[row - 1]];
  return [
    {
      code: 'unsorted-axis',
      severity: 'warning',
      message: `column ${key.name} neither rises nor falls throughout: row ${row + 1} (${now}) follows row ${row} (${last}); a formula interpolates over it, sort the rows`,
      field: `rows.${row}.0`,
      cell: cell.id,
    },
  ];
}
