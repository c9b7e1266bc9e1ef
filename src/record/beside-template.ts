// The formulas of the sheet beside its template as a short list: what a checker has to read although the template was checked before.
//
// 1. A given or a table is in the list only where it stands in place of something else, or was changed: values are the business of the job.
// 2. Where the template is not at hand, or only another version of it, the words say so.
// Not here: the comparison (src/sheet, compareWithTemplate), the notes at the steps (from-template.ts).

import type { Calculation, TemplateComparison } from '../sheet/index.ts';
import type { BesideTemplate, Line, TemplateDifference } from './model.ts';

export function besideTemplate(
  calculation: Calculation,
  lines: readonly Line[],
  comparison: TemplateComparison | undefined,
): BesideTemplate | null {
  const { template } = calculation.sheet;
  if (comparison === undefined) {
    if (template === undefined) return null;
    const words = `The formulas were not compared: template ${template.id}, version ${template.version}, is not at hand.`;
    return { words, differences: [] };
  }
  const differences = differencesOf(calculation, lines, comparison);
  const { id, version, madeFrom } = comparison;
  const other =
    madeFrom === undefined || madeFrom === version
      ? ''
      : `The sheet was made from version ${madeFrom}, which is not at hand; it is compared with version ${version}. `;
  const rest = differences.length === 0 ? '.' : ', except:';
  return { words: `${other}Formulas as in template ${id}, version ${version}${rest}`, differences };
}

function differencesOf(calculation: Calculation, lines: readonly Line[], comparison: TemplateComparison): TemplateDifference[] {
  const titles = new Map<string, string>();
  for (const line of lines) {
    if (line.kind === 'step') titles.set(line.step.cell, line.step.title);
    else if (line.kind === 'table') titles.set(line.cell, line.title);
  }
  const here = comparison.cells
    .filter(({ state, kind }) => state === 'changed' || (state === 'added' && kind !== 'given' && kind !== 'table'))
    .map((cell): TemplateDifference => {
      const own = calculation.sheet.cells.find(({ id }) => id === cell.cell);
      return {
        what: cell.state === 'changed' ? 'changed' : 'added',
        number: calculation.numberOf(cell.cell),
        cell: cell.cell,
        name: cell.name ?? '',
        title: titles.get(cell.cell) ?? '',
        was: cell.was ?? '',
        now: cell.now ?? (own === undefined ? '' : formulaOf(own)),
      };
    });
  const gone = comparison.removed
    .filter(({ kind }) => kind !== 'given' && kind !== 'table')
    .map(
      ({ name = '', title, was }): TemplateDifference => ({ what: 'left out', number: '', cell: '', name, title, was, now: '' }),
    );
  return [...here, ...gone];
}

function formulaOf(cell: Calculation['sheet']['cells'][number]): string {
  if (cell.kind === 'derived') return cell.formula;
  if (cell.kind === 'criterion') return `${cell.left} ${cell.relation} ${cell.right}`;
  return cell.kind === 'sought' ? cell.where : '';
}
