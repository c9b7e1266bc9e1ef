// Small sheets for the tests of the record.

import type { RecordModel, Step } from '../../src/record/index.ts';
import { makeRecord } from '../../src/record/index.ts';
import { calculate } from '../../src/sheet/calculation.ts';
import type { Cell, Sheet } from '../../src/sheet/index.ts';

type Loose<T> = T extends unknown ? Omit<T, 'id'> & { id?: string } : never;

/** `a = 5 mm` a given, `b := 2*a [mm]` derived with its unit, `a <= b` a criterion, `# Title` a heading, anything else a note. */
export function cellsOf(...lines: readonly (string | Loose<Cell>)[]): Cell[] {
  return lines.map((line, index) => {
    const id = `c${index + 1}`;
    if (typeof line !== 'string') return { id, ...line } as Cell;
    const heading = /^(#+) (.*)$/.exec(line);
    if (heading) return { id, kind: 'heading', level: heading[1]!.length as 1 | 2 | 3, text: heading[2]! };
    const derived = /^(\w+) := (.*?)(?: \[([^\]]*)\])?$/.exec(line);
    if (derived)
      return {
        id,
        kind: 'derived',
        name: derived[1]!,
        formula: derived[2]!,
        ...(derived[3] === undefined ? {} : { unit: derived[3] }),
        source: 'derived here',
      };
    const given = /^(\w+) = (.*)$/.exec(line);
    if (given) return { id, kind: 'given', name: given[1]!, value: given[2]!, basis: 'specified', source: 'drawing' };
    const criterion = /^(.*?) (<=|>=|<|>) (.*?)(?: \[([^\]]*)\])?$/.exec(line);
    if (criterion) {
      return {
        id,
        kind: 'criterion',
        left: criterion[1]!,
        relation: criterion[2] as '<=',
        right: criterion[3]!,
        ...(criterion[4] === undefined ? {} : { unit: criterion[4] }),
        source: 'common practice',
      };
    }
    return { id, kind: 'note', text: line };
  });
}

export function sheetOf(cells: readonly Cell[], more: Partial<Sheet> = {}): Sheet {
  return { format: 'tightside-sheet/1', title: 'Test', cells, ...more };
}

export function recordOf(lines: readonly (string | Loose<Cell>)[], more: Partial<Sheet> = {}): RecordModel {
  return makeRecord(calculate(sheetOf(cellsOf(...lines), more)));
}

export function stepNamed(record: RecordModel, name: string): Step {
  const step = record.steps.find((each) => each.name === name || each.number === name);
  if (!step) throw new Error(`no step ${name}`);
  return step;
}

/** Result, calculator line and calculator result of the only case. */
export function lineOf(record: RecordModel, name: string) {
  const step = stepNamed(record, name);
  const one = step.cases[0];
  return { result: plain(one?.result ?? null), line: one?.calculatorLine ?? null, gives: one?.calculatorResult ?? null };
}

/** Spaces of print as ordinary ones. */
export function plain(text: string | null): string | null {
  return text?.replace(/[\u00a0\u202f]/g, ' ') ?? null;
}
