// Which rows of the tables the calculation uses: chosen by a given, read by a lookup, or the two rows that a value lies between.
//
// 1. A mark tells the lines that use the row, by number, and the cases in which they do; in different cases different rows may be used.
// 2. What a formula reads on a branch that it does not take is not marked.
// 3. Lines of a table without marks stay the same objects.
// Not here: the lookups (src/formula), what a mark looks like (html-table.ts, src/view).

import type { Expr, Formula, TakenRow } from '../formula/index.ts';
import type { Calculation, CellState, GivenState } from '../sheet/index.ts';
import type { CasePrint } from './case-print.ts';
import type { Line, RecordCase, TableMark } from './model.ts';

interface Use {
  readonly table: string;
  readonly row: number;
  readonly how: TableMark['how'];
  readonly cell: string;
}

export function withMarks(lines: readonly Line[], calculation: Calculation, prints: readonly CasePrint[]): readonly Line[] {
  if (!lines.some((line) => line.kind === 'table')) return lines;
  const used = prints.map((print) => usesOf(calculation, print));
  return lines.map((line) => {
    if (line.kind !== 'table') return line;
    const marks = marksOf(line.name, used, calculation);
    return marks.length === 0 ? line : { ...line, marks };
  });
}

/** 'read in 2.4 and 3.1', with the cases where it is not all of them. */
export function markWords({ how, by, cases: inCases }: TableMark, cases: readonly RecordCase[]): string {
  const where = by.map(({ number }) => number).join(', ');
  const titles = inCases.map((id) => cases.find((one) => one.id === id)?.title ?? id);
  return `${how} in ${where}${titles.length === 0 ? '' : `: ${titles.join(', ')}`}`;
}

function usesOf(calculation: Calculation, print: CasePrint): readonly Use[] {
  const uses: Use[] = [];
  for (const { id } of calculation.sheet.cells) {
    const state = calculation.state(id);
    if (state?.kind === 'given') uses.push(...choiceOf(calculation, state, print.index));
    for (const formula of formulasOf(state)) uses.push(...lookupsOf(formula, print, id));
  }
  return uses;
}

function choiceOf(calculation: Calculation, { cell, texts }: GivenState, index: number): readonly Use[] {
  const text = texts?.[index];
  if (cell.choices === undefined || text === undefined) return [];
  const [table = '', column] = cell.choices.split('.');
  const row =
    calculation
      .table(table)
      ?.data?.columns.find((one) => one.name === column)
      ?.texts.indexOf(text) ?? -1;
  return row < 0 ? [] : [{ table, row, how: 'chosen', cell: cell.id }];
}

/** What is evaluated with the values of the sheet; a sought cell that varies a given is not. */
function formulasOf(state: CellState | undefined): readonly Formula[] {
  const all =
    state?.kind === 'derived'
      ? [state.formula]
      : state?.kind === 'criterion' || (state?.kind === 'sought' && state.cell.instead === undefined)
        ? [state.left, state.right]
        : [];
  return all.filter((formula) => formula !== undefined && formula.tables.length > 0) as readonly Formula[];
}

function lookupsOf(formula: Formula, print: CasePrint, cell: string): readonly Use[] {
  const taken = print.taken(formula);
  if (taken === undefined) return [];
  const uses: Use[] = [];
  const add = (table: string, found: TakenRow | undefined) => {
    if (found?.row === undefined) return;
    const { row } = found;
    if (found.kind === 'entry') uses.push({ table, row, how: 'read', cell });
    else uses.push({ table, row, how: 'between', cell }, { table, row: row + 1, how: 'between', cell });
  };
  eachTable(formula.expr, (node) => add(node.table, taken.table(node)));
  return uses;
}

function eachTable(expr: Expr, visit: (node: Extract<Expr, { kind: 'table' }>) => void) {
  const open: Expr[] = [expr];
  for (let node = open.pop(); node !== undefined; node = open.pop()) {
    if (node.kind === 'table') visit(node);
    open.push(...childrenOf(node));
  }
}

function childrenOf(node: Expr): readonly Expr[] {
  switch (node.kind) {
    case 'parens':
    case 'minus':
    case 'not':
      return [node.inner];
    case 'binary':
    case 'logic':
      return [node.left, node.right];
    case 'compare':
      return node.sides;
    case 'choose':
      return [node.test, node.then, node.otherwise];
    case 'call':
      return node.args;
    case 'table':
      return [node.key];
    default:
      return [];
  }
}

function marksOf(table: string, used: readonly (readonly Use[])[], calculation: Calculation): readonly TableMark[] {
  // By row and how, the cases in which each line uses it so.
  const found = new Map<
    string,
    { readonly row: number; readonly how: TableMark['how']; readonly lines: Map<string, Set<number>> }
  >();
  for (const [index, uses] of used.entries()) {
    for (const use of uses) {
      if (use.table !== table) continue;
      const key = `${use.row} ${use.how}`;
      const place = found.get(key) ?? { row: use.row, how: use.how, lines: new Map<string, Set<number>>() };
      found.set(key, place);
      place.lines.set(use.cell, (place.lines.get(use.cell) ?? new Set()).add(index));
    }
  }
  const marks: TableMark[] = [];
  for (const { row, how, lines } of found.values()) {
    // Lines that use it in the same cases share a mark.
    const byCases = new Map<string, { cases: readonly string[]; by: TableMark['by'][number][] }>();
    for (const [cell, indices] of lines) {
      const cases = indices.size === used.length ? [] : [...indices].map((index) => calculation.cases[index]?.id ?? '');
      const key = cases.join(' ');
      const shared = byCases.get(key) ?? { cases, by: [] };
      byCases.set(key, shared);
      shared.by.push({ cell, number: calculation.numberOf(cell) });
    }
    for (const { cases, by } of byCases.values()) marks.push({ row, how, by, cases });
  }
  const order = ['chosen', 'read', 'between'];
  return marks.sort((one, other) => one.row - other.row || order.indexOf(one.how) - order.indexOf(other.how));
}

/** The marks of each row that has any. */
export function marksByRow(marks: readonly TableMark[]): ReadonlyMap<number, readonly TableMark[]> {
  const rows = new Map<number, TableMark[]>();
  for (const mark of marks) rows.set(mark.row, [...(rows.get(mark.row) ?? []), mark]);
  return rows;
}
