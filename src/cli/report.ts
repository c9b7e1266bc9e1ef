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
  problem: CellProblem,
): string {
  const cell = cells.get(problem.cell);
  const name = cell && 'name' in cell ? canonicalName(cell.name) : '';
  const words = [calculation.numberOf(problem.cell), name, `(${problem.cell})`].filter((word) => word !== '');
  const inCase = problem.case === undefined || calculation.cases.length === 1 ? '' : `, case ${problem.case}`;
  return oneLine(`${path}: cell ${words.join(' ')}${inCase}: ${problem.message}`);
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
