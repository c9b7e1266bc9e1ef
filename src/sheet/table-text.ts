// Tables as text: pasted from the clipboard or read from a CSV file with a preview, and written for either.
//
// 1. A preview is never refused for what single rows hold: everything stands in it, and each trouble is a sentence with its row.
//    Nothing is rounded or left out but empty lines.
// 2. Heads give name, title and unit (`d/mm`, `d (mm)`, `d [mm]`), a row of units below them likewise; what is told by hand wins.
// 3. A column is numeric when it has a unit or when at least half of its entries are numbers; numbers are written with the decimal
//    sign of the sheet, group signs taken out.
// 4. Text that another program could take for a formula leaves with an apostrophe before it, and loses it on the way in.
// 5. The parser (papaparse) is loaded when first used.
// Not here: the table cell (table.ts), columns from heads (table-heads.ts).

import type { Problem } from '../quantity/index.ts';
import { readUnit } from '../quantity/index.ts';
import type { TableCell, TableColumn } from './document.ts';
import type { DecimalSign } from './reading.ts';
import { readEntry, unsortedRow } from './table.ts';
import { columnName, readHead, unitRow } from './table-heads.ts';
import { decimalSignOf, isNumber, withSign } from './table-numbers.ts';

export type Delimiter = '\t' | ',' | ';' | '|';

export interface TableTextOptions {
  /** Decimal sign of the sheet that the table goes into; `.` by default. */
  readonly into?: DecimalSign;
  /** What the text is written with; found out where it is not told. */
  readonly decimalSign?: DecimalSign;
  readonly delimiter?: Delimiter;
  /** Whether the first row is one of heads. */
  readonly heads?: boolean;
  /** Units told by hand, by column: a unit, null for a column of texts, undefined to leave it as found. */
  readonly units?: readonly (string | null | undefined)[];
}

/** Rows and columns count from 0 in the preview, from 1 in the sentence. */
export interface TableTextProblem extends Problem {
  readonly row?: number;
  readonly column?: number;
}

export interface TablePreview {
  readonly columns: readonly TableColumn[];
  /** As they go into the cell; a ragged row stays ragged. */
  readonly rows: readonly (readonly string[])[];
  readonly problems: readonly TableTextProblem[];
  readonly delimiter: Delimiter;
  readonly decimalSign: DecimalSign;
  readonly heads: boolean;
  readonly unitsRow: boolean;
}

const longest = 2_000_000;
const mostRows = 20_000;
const mostColumns = 200;

/**
 * Reads a text as a table. Codes: 'too-large', 'empty-table', 'bad-quotes', 'ambiguous-comma', 'ambiguous-sign', 'ragged-table', 'bad-entry',
 * 'unlike-entry', 'key-twice', 'unsorted-axis', and those of reading a unit.
 */
export async function tableFromText(text: string, options: TableTextOptions = {}): Promise<TablePreview> {
  const into = options.into ?? '.';
  const nothing = {
    columns: [],
    rows: [],
    delimiter: options.delimiter ?? '\t',
    decimalSign: into,
    heads: false,
    unitsRow: false,
  };
  if (text.length > longest) return { ...nothing, problems: [problem('too-large', tooLarge)] };
  const { default: parser } = await import('papaparse');
  const parse = (delimiter: Delimiter) =>
    parser.parse<string[]>(text.replace(/^\uFEFF/u, ''), { delimiter, header: false, skipEmptyLines: 'greedy' });
  const found = options.delimiter ?? findDelimiter(text, parse, options.decimalSign ?? into);
  const parsed = parse(found);
  const all = parsed.data.map((row) => row.map(entryText));
  const problems: TableTextProblem[] = parsed.errors
    .filter(({ type }) => type === 'Quotes')
    .map(({ row }) =>
      problem('bad-quotes', `line ${(row ?? 0) + 1} opens a quotation mark that nothing closes as it should; check its entries`),
    );
  if (all.length > mostRows || all.some((row) => row.length > mostColumns))
    return { ...nothing, delimiter: found, problems: [problem('too-large', tooLarge)] };
  if (all.length === 0)
    return {
      ...nothing,
      delimiter: found,
      problems: [problem('empty-table', 'there are no rows; copy the table with its heads')],
    };

  const sign = options.decimalSign ?? decimalSignOf(all.flat(), into);
  if (sign === undefined)
    problems.push(
      problem(
        'ambiguous-sign',
        `“${all.flat().find((entry) => /\d[.,]\d/u.test(entry))}” could be grouped by thousands or have a decimal sign; it is taken as a decimal ${into === '.' ? 'point' : 'comma'} of the sheet, tell the sign of the text if that is wrong`,
        'warning',
      ),
    );
  const decimalSign = sign ?? into;
  const heads = options.heads ?? hasHeads(all, decimalSign);
  const below = heads ? all.slice(1) : all;
  const units = heads && below.length > 1 ? unitRow(below[0]!, below.slice(1), decimalSign) : undefined;
  const body = units === undefined ? below : below.slice(1);
  const width = heads ? all[0]!.length : commonLength(body);
  if (
    options.delimiter === undefined &&
    found === ',' &&
    !heads &&
    width === 2 &&
    body.flat().every((entry) => /^[+-]?\d+$/u.test(entry))
  )
    problems.push(
      problem(
        'ambiguous-comma',
        'the comma could part two columns or be a decimal sign; it is taken to part columns, tell the delimiter if that is wrong',
        'warning',
      ),
    );

  const columns: TableColumn[] = [];
  const taken = new Set<string>();
  for (let at = 0; at < width; at += 1) {
    const entries = body.map((row) => row[at] ?? '');
    columns.push(columnOf(heads ? (all[0]![at] ?? '') : '', at, entries, units?.[at], options.units?.[at], decimalSign, taken));
  }
  const rows = body.map((row) =>
    row.map((entry, at) => (columns[at]?.unit === undefined ? entry : withSign(entry, decimalSign, into))),
  );
  problems.push(...rowProblems(columns, rows, into));
  return { columns, rows, problems, delimiter: found, decimalSign, heads, unitsRow: units !== undefined };
}

const tooLarge = `the text is longer than a table of a sheet should be (${mostRows} rows, ${mostColumns} columns); take the part that the sheet needs`;

function problem(code: string, message: string, severity: Problem['severity'] = 'error'): TableTextProblem {
  return { code, severity, message };
}

/** A line break inside an entry is a space; an apostrophe that kept a formula from being one is taken off. */
function entryText(text: string): string {
  const line = text.replace(/\s*[\r\n]+\s*/gu, ' ').trim();
  return /^'[=+\-@]/u.test(line) ? line.slice(1) : line;
}

/** A tab where there is one; else the sign that parts all rows alike, a comma last since it may be a decimal sign. */
function findDelimiter(
  text: string,
  parse: (delimiter: Delimiter) => { readonly data: readonly (readonly string[])[] },
  sign: DecimalSign,
): Delimiter {
  if (text.includes('\t')) return '\t';
  let best: Delimiter = ',';
  let most = 0;
  for (const delimiter of [';', '|', ','] as const) {
    if (!text.includes(delimiter)) continue;
    const { data } = parse(delimiter);
    const common = commonLength(data);
    if (common < 2) continue;
    // With a decimal comma, 1,5 is one entry.
    if (delimiter === ',' && sign === ',' && data.every(isOneNumber)) continue;
    const alike = data.filter((row) => row.length === common).length / data.length;
    if (alike > most) {
      most = alike;
      best = delimiter;
    }
  }
  return most > 0 ? best : sign === ',' || !text.includes(',') ? ';' : ',';
}

/** A row that may be one number with a decimal comma, or a head above it. */
function isOneNumber(row: readonly string[]): boolean {
  return row.length === 1 || (row.length === 2 && row.every((entry) => /^\s*[+\-−]?\d+\s*$/u.test(entry)));
}

function commonLength(rows: readonly (readonly string[])[]): number {
  const counts = new Map<number, number>();
  for (const { length } of rows) counts.set(length, (counts.get(length) ?? 0) + 1);
  let common = 0;
  for (const [length, count] of counts) if (count > (counts.get(common) ?? 0)) common = length;
  return common;
}

/** A first row of heads has no number where numbers stand below it. */
function hasHeads(rows: readonly (readonly string[])[], sign: DecimalSign): boolean {
  const [first = [], ...rest] = rows;
  if (rest.length === 0 || first.some((entry) => isNumber(entry, sign))) return false;
  return (
    first.some((_, at) =>
      mostlyNumbers(
        rest.map((row) => row[at] ?? ''),
        sign,
      ),
    ) ||
    (first.every((entry) => entry !== '') && first.length > 1)
  );
}

function mostlyNumbers(entries: readonly string[], sign: DecimalSign): boolean {
  const filled = entries.filter((entry) => entry !== '');
  return filled.length > 0 && filled.filter((entry) => isNumber(entry, sign)).length * 2 >= filled.length;
}

function columnOf(
  head: string,
  at: number,
  entries: readonly string[],
  below: string | undefined,
  told: string | null | undefined,
  sign: DecimalSign,
  taken: Set<string>,
): TableColumn {
  const read = readHead(head);
  const name = columnName(read.text, at, taken);
  const numeric = mostlyNumbers(entries, sign);
  const unit = told === null ? undefined : (told ?? read.unit ?? below ?? (numeric ? '1' : undefined));
  return {
    name,
    ...(read.text === '' || read.text === name ? {} : { title: read.text }),
    ...(unit === undefined ? {} : { unit }),
  };
}

function rowProblems(
  columns: readonly TableColumn[],
  rows: readonly (readonly string[])[],
  into: DecimalSign,
): readonly TableTextProblem[] {
  const problems: TableTextProblem[] = [];
  const units = columns.map((column) => (column.unit === undefined ? undefined : readUnit(column.unit)));
  for (const [column, unit] of units.entries()) {
    if (unit?.ok === false)
      problems.push({ ...unit.problem, message: `column ${columns[column]!.name}: ${unit.problem.message}`, column });
  }
  const keys = new Map<string, number>();
  const axis = new Float64Array(rows.length);
  for (const [row, entries] of rows.entries()) {
    if (entries.length !== columns.length) {
      const s = entries.length === 1 ? 'y' : 'ies';
      problems.push({
        ...problem(
          'ragged-table',
          `row ${row + 1} has ${entries.length} entr${s}, the table has ${columns.length} columns; fill or remove the difference`,
        ),
        row,
      });
    }
    for (const [column, entry] of entries.entries()) {
      const unit = units[column];
      if (unit?.ok !== true) continue;
      const read = readEntry(entry, unit.value, into);
      if (column === 0) axis[row] = typeof read === 'number' ? read : Number.NaN;
      if (typeof read === 'number') continue;
      const code = read.code === 'unlike-entry' ? 'unlike-entry' : 'bad-entry';
      const what = entry === '' ? 'the entry is empty; type a number, or take the row out' : read.message;
      problems.push({ ...problem(code, `row ${row + 1}, column ${columns[column]!.name}: ${what}`), row, column });
    }
    const key = entries[0] ?? '';
    const before = keys.get(key);
    if (before === undefined) keys.set(key, row);
    else
      problems.push({
        ...problem('key-twice', `row ${row + 1} has the key “${key}” of row ${before + 1}; a lookup takes the first`, 'warning'),
        row,
        column: 0,
      });
  }
  const unsorted = units[0]?.ok === true ? unsortedRow(axis) : undefined;
  if (unsorted !== undefined) {
    const [name, now, last] = [columns[0]!.name, rows[unsorted]![0], rows[unsorted - 1]![0]];
    problems.push({
      ...problem(
        'unsorted-axis',
        `column ${name} neither rises nor falls throughout: row ${unsorted + 1} (${now}) follows row ${unsorted} (${last}); sort the rows if values are interpolated over it`,
        'warning',
      ),
      row: unsorted,
      column: 0,
    });
  }
  return problems;
}

/** Begins like a formula of another program and is no plain number. */
const formulaLike = /^(?![+-]?(?:\d[\d\s]*(?:[.,]\d+)?|[.,]\d+)(?:[eE][+-]?\d+)?$)[=+\-@\t\r]/u;

/**
 * The table as text that reads back to the same columns and rows: `tab` for the clipboard, `csv` for a file (RFC 4180; parted by
 * semicolons where the sheet writes a decimal comma).
 */
export async function tableToText(
  cell: Pick<TableCell, 'columns' | 'rows'>,
  form: 'tab' | 'csv',
  options: { readonly decimalSign?: DecimalSign; readonly delimiter?: Delimiter } = {},
): Promise<string> {
  const { default: parser } = await import('papaparse');
  const heads = cell.columns.map(({ name, unit }) => (unit === undefined ? name : `${name} [${unit}]`));
  const delimiter = options.delimiter ?? (form === 'tab' ? '\t' : options.decimalSign === ',' ? ';' : ',');
  const newline = form === 'tab' ? '\n' : '\r\n';
  const text = parser.unparse([heads, ...cell.rows.map((row) => [...row])], { delimiter, newline, escapeFormulae: formulaLike });
  return `${text}${newline}`;
}
