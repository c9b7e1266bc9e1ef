// What the comparison of a sheet with its template says in the record: a note where a formula is not the template's, and a count at
// the head, so that a checker reads only what is new.
//
// 1. A step whose formula is the template's carries that as data and in the count, not as a note on every line.
// 2. Values are not compared: a given has a note only where it stands in place of a formula.
// Not here: the comparison (src/sheet, compareWithTemplate).

import type { CellComparison, TemplateComparison } from '../sheet/index.ts';
import type { Line, Step } from './model.ts';

/** 'template flat-belt-open, version 1' */
export function templateWords({ id, version, madeFrom }: TemplateComparison): string {
  const other = madeFrom === undefined || madeFrom === version ? '' : `, the sheet was made from version ${madeFrom}`;
  return `template ${id}, version ${version}${other}`;
}

/** The lines with what the comparison says of each; the same lines without one. */
export function withTemplate(lines: readonly Line[], comparison: TemplateComparison | undefined): readonly Line[] {
  if (comparison === undefined) return lines;
  const cells = new Map(comparison.cells.map((cell) => [cell.cell, cell]));
  return lines.map((line): Line => {
    if (line.kind === 'step') {
      const cell = cells.get(line.step.cell);
      return cell === undefined ? line : { kind: 'step', step: stepWith(line.step, cell, comparison) };
    }
    const cell = line.kind === 'table' ? cells.get(line.cell) : undefined;
    if (line.kind !== 'table' || cell?.state !== 'changed') return line;
    return { ...line, notes: [...line.notes, changedNote('table', cell, comparison)] };
  });
}

function stepWith(step: Step, cell: CellComparison, comparison: TemplateComparison): Step {
  const what = step.kind === 'sought' || step.kind === 'criterion' ? step.kind : 'formula';
  const words = what === 'sought' ? 'equation' : what;
  const state = { ...step, template: cell.state };
  if (cell.state === 'changed')
    return { ...state, notes: [...step.notes, changedNote(step.kind === 'given' ? 'line' : words, cell, comparison)] };
  // A given of the sheet's own is a value, not a formula: nothing to say.
  if (cell.state === 'added' && step.kind !== 'given')
    return { ...state, notes: [...step.notes, `${words} not in template ${comparison.id}`] };
  return state;
}

function changedNote(what: string, cell: CellComparison, { id, version }: TemplateComparison): string {
  return `${what} changed: in template ${id}, version ${version}, it was ${cell.was}`;
}

/** '38 formulas and criteria untouched; 2 changed; 1 added; 2 left out (F_W, F_W0)'. */
export function comparisonWords(comparison: TemplateComparison): string {
  const formulas = comparison.cells.filter(({ kind }) => kind !== 'given' && kind !== 'table');
  const count = (state: CellComparison['state']) => formulas.filter((cell) => cell.state === state).length;
  // A formula that became a given, and a table, are changes as well.
  const changed = comparison.cells.filter((cell) => cell.state === 'changed').length;
  const added = count('added');
  const left = comparison.removed.filter(({ kind }) => kind !== 'given' && kind !== 'table');
  const parts = [`${count('untouched')} formulas and criteria untouched`];
  if (changed > 0) parts.push(`${changed} changed`);
  if (added > 0) parts.push(`${added} added`);
  if (left.length > 0) parts.push(`${left.length} left out (${left.map(({ name, title }) => name ?? title).join(', ')})`);
  return parts.join('; ');
}
