// A short notation for sheets in tests: one line a cell.
//   'd = 200 mm'            a given
//   'v [m/s] := pi*d*n'     a derived quantity (unit optional)
//   'v <= v_max'            a criterion
//   '# Geometry'            a heading
//   anything else           a note
// Cell ids are the names; criteria are k0, k1 …, headings h0 …, notes n0 ….

import type { Cell, LoadCase, Settings, Sheet } from '../../src/sheet/document.ts';

export interface SheetOptions {
  readonly cases?: readonly LoadCase[];
  readonly settings?: Settings;
  readonly more?: readonly Cell[];
}

export function cellOf(line: string, index: number): Cell {
  const derived = /^(\S+)(?:\s+\[([^\]]*)\])?\s*:=\s*(.*)$/u.exec(line);
  if (derived) {
    const [, name, unit, formula] = derived;
    return { id: name!, kind: 'derived', name: name!, formula: formula!, ...(unit === undefined ? {} : { unit }) };
  }
  const criterion = /^(.*?)\s(<=|>=|<|>)\s(.*)$/u.exec(line);
  if (criterion) {
    return { id: `k${index}`, kind: 'criterion', left: criterion[1]!, relation: criterion[2] as '<=', right: criterion[3]! };
  }
  const given = /^(\S+)\s*=\s*(.*)$/u.exec(line);
  if (given) return { id: given[1]!, kind: 'given', name: given[1]!, value: given[2]! };
  if (line.startsWith('# ')) return { id: `h${index}`, kind: 'heading', level: 1, text: line.slice(2) };
  return { id: `n${index}`, kind: 'note', text: line };
}

export function sheetOf(lines: readonly string[], options: SheetOptions = {}): Sheet {
  return {
    format: 'tightside-sheet/1',
    title: 'A sheet',
    ...(options.settings ? { settings: options.settings } : {}),
    ...(options.cases ? { cases: options.cases } : {}),
    cells: [...lines.map(cellOf), ...(options.more ?? [])],
  };
}

/** The sheet with one cell replaced by what `line` says, under the same id. */
export function withLine(sheet: Sheet, id: string, line: string): Sheet {
  return { ...sheet, cells: sheet.cells.map((cell, index) => (cell.id === id ? { ...cellOf(line, index), id } : cell)) };
}
