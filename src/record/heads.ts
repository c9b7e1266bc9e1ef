// What a reader decides by, drawn together from the steps: criteria with their governing case, assumptions, sources, open points.
//
// 1. Everything here is computed from the lines; nothing is typed twice.
// 2. The governing case of a criterion is the one in which it is worst off: not met before met, then the greater utilisation.
// Not here: the steps (steps.ts), layout.

import type { Calculation, CellProblem } from '../sheet/index.ts';
import type { Assumption, CriterionSummary, Line, OpenPoint, RecordReference, Step, StepCase } from './model.ts';
import { citations, inCases, isBlank, noSource } from './words.ts';

export function summaryOf(steps: readonly Step[]): readonly CriterionSummary[] {
  return steps
    .filter((step) => step.kind === 'criterion')
    .map((step) => ({
      number: step.number,
      cell: step.cell,
      title: step.title,
      symbols: step.symbols,
      cases: step.cases.map((each) => ({
        case: each.case,
        met: each.met ?? null,
        utilisation: each.utilisation ?? null,
        printed: each.met == null ? null : each.result,
      })),
      governing: governing(step.cases),
      justification: step.justification ?? '',
    }));
}

function governing(cases: readonly StepCase[]): string | null {
  let worst: StepCase | undefined;
  for (const each of cases) {
    if (each.met == null) continue;
    if (worst === undefined || severity(each) > severity(worst)) worst = each;
  }
  return worst?.case ?? null;
}

/** Greater is worse. A verdict without a utilisation counts as beyond, or as idle, whatever its room. */
function severity(each: StepCase): number {
  const unmet = each.met === false ? 1e300 : 0;
  return unmet + (each.utilisation ?? (each.met === false ? 1e299 : 0));
}

export function assumptionsOf(
  calculation: Calculation,
  steps: readonly Step[],
  lines: readonly Line[],
  titles: readonly string[],
): readonly Assumption[] {
  const found: Assumption[] = [];
  for (const line of lines) {
    if (line.kind === 'note' && line.role === 'assumption') {
      const cell = calculation.state(line.cell)?.cell;
      const toConfirm = cell?.kind === 'note' ? (cell.toConfirm ?? '') : '';
      found.push({ number: '', cell: line.cell, text: line.text, symbol: '', value: '', source: line.source, toConfirm });
    }
  }
  for (const step of steps) {
    if (step.basis !== 'assumed') continue;
    const cell = calculation.state(step.cell)?.cell;
    const toConfirm = cell?.kind === 'given' ? (cell.toConfirm ?? '') : '';
    const value = inCases(
      step.cases.map((each) => each.result),
      titles,
    );
    found.push({
      number: step.number,
      cell: step.cell,
      text: step.title,
      symbol: step.symbol ?? '',
      value,
      source: step.source,
      toConfirm,
    });
  }
  return found;
}

export function referencesOf(calculation: Calculation, lines: readonly Line[]): readonly RecordReference[] {
  const cited = new Map<string, string[]>();
  const cite = (source: string, where: string) => {
    for (const id of citations(source)) cited.set(id, [...(cited.get(id) ?? []), where]);
  };
  for (const line of lines) {
    if (line.kind === 'step') cite(line.step.source, line.step.number);
    else if (line.kind === 'table') cite(line.source, `table ${line.name}`);
    else if (line.kind === 'note') cite(`${line.source} ${line.text}`, line.role ?? 'note');
    else if (line.kind === 'other') cite(line.source, line.title === '' ? line.what : line.title);
  }
  const { sheet } = calculation;
  cite(sheet.purpose ?? '', 'purpose');
  cite(sheet.method ?? '', 'method');
  cite(sheet.conclusion ?? '', 'conclusion');
  return (sheet.references ?? []).map((entry) => ({
    id: entry.id,
    document: entry.document,
    edition: entry.edition ?? '',
    title: entry.title ?? '',
    citedBy: [...new Set(cited.get(entry.id) ?? [])],
  }));
}

/** In the order of the sheet; of one cell: problems, then what is not confirmed, then what is not met. */
export function openPointsOf(
  calculation: Calculation,
  lines: readonly Line[],
  problems: readonly CellProblem[],
  assumptions: readonly Assumption[],
): readonly OpenPoint[] {
  const points: OpenPoint[] = [];
  const errors = new Map<string, CellProblem[]>();
  for (const problem of problems) {
    if (problem.severity === 'error') errors.set(problem.cell, [...(errors.get(problem.cell) ?? []), problem]);
  }
  const confirm = new Map(assumptions.filter((each) => each.toConfirm !== '').map((each) => [each.cell, each.toConfirm]));
  for (const line of lines) {
    const cell = line.kind === 'step' ? line.step.cell : line.cell;
    const number = calculation.numberOf(cell);
    const add = (kind: OpenPoint['kind'], text: string) => points.push({ number, cell, kind, text });
    for (const text of new Set((errors.get(cell) ?? []).map((problem) => problem.message))) add('problem', text);
    if (line.kind === 'note' && confirm.has(cell)) add('to confirm', `${confirm.get(cell)}: ${line.text}`);
    if (line.kind === 'step') stepPoints(line.step, add);
  }
  return points;
}

function stepPoints(step: Step, add: (kind: OpenPoint['kind'], text: string) => void): void {
  const title = step.title === '' ? (step.name ?? '') : step.title;
  for (const note of step.notes) {
    if (note.startsWith('carried over')) add('carried over', title);
    else if (note.startsWith('to be confirmed')) add('to confirm', `${note.slice('to be confirmed: '.length)}: ${title}`);
    else if (note === noSource) add('no source', title);
  }
  if (step.kind === 'criterion' && step.cases.some((each) => each.met === false)) {
    add('not met', isBlank(step.justification) ? title : `${title} (justified: ${step.justification ?? ''})`);
  }
  if (step.cases.some((each) => each.reason !== undefined)) add('does not close', title);
}
