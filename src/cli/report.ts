// Lines of text for a terminal: problems with their place, and columns that stand under each other.
//
// 1. A problem is one line: `FILE: cell 3.2 F_1 (d7), case start: what; what to do`.
// 2. Widths count characters, without combining marks: the spaces and digits that are printed have width one.
// Not here: what is calculated (commands/).

import { canonicalName } from '../formula/index.ts';
import type { Calculation, Cell, CellProblem } from '../sheet/index.ts';

export function problemLine(
  path: string,
  calculation: Calculation,
  cells: ReadonlyMap<string, Cell>,
  problem: ToldProblem,
): string {
  const cell = cells.get(problem.cell);
  const name = cell && 'name' in cell ? canonicalName(cell.name) : '';
  const words = [calculation.numberOf(problem.cell), name, `(${problem.cell})`].filter((word) => word !== '');
  const inCase = problem.cases === '' ? '' : `, ${problem.cases}`;
  return oneLine(`${path}: cell ${words.join(' ')}${inCase}: ${problem.message}`);
}

export interface ToldProblem extends CellProblem {
  /** 'case start', 'cases run, start'; empty where it concerns every case. */
  readonly cases: string;
}

/** The problems of a sheet, each sentence of a cell once, with the cases it concerns where these are not all. */
export function tellOnce(calculation: Calculation): readonly ToldProblem[] {
  const told = new Map<string, { readonly problem: CellProblem; readonly cases: string[] }>();
  for (const problem of calculation.problems()) {
    const key = JSON.stringify([problem.cell, problem.severity, problem.code, problem.message]);
    const known = told.get(key);
    if (known === undefined) told.set(key, { problem, cases: problem.case === undefined ? [] : [problem.case] });
    else if (problem.case !== undefined) known.cases.push(problem.case);
  }
  return [...told.values()].map(({ problem, cases }) => ({
    ...problem,
    cases:
      cases.length === 0 || cases.length === calculation.cases.length
        ? ''
        : `${cases.length === 1 ? 'case' : 'cases'} ${cases.join(', ')}`,
  }));
}

export function oneLine(text: string): string {
  return text.replace(/[\n\r\p{Cc}]+/gu, ' ');
}

export interface Column {
  readonly align: 'left' | 'right';
}

/** Rows as lines: columns two spaces apart, each as wide as its widest entry, no space at the end of a line. */
export function tableLines(rows: readonly (readonly string[])[], columns: readonly Column[]): string[] {
  const widths = columns.map((_, at) => Math.max(0, ...rows.map((row) => width(row[at] ?? ''))));
  return rows.map((row) =>
    columns
      .map(({ align }, at) => {
        const text = row[at] ?? '';
        const fill = ' '.repeat(Math.max(0, widths[at]! - width(text)));
        return align === 'left' ? text + fill : fill + text;
      })
      .join('  ')
      .trimEnd(),
  );
}

export function width(text: string): number {
  return [...text.replace(/\p{Mark}/gu, '')].length;
}
