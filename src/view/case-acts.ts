// Steps and words for the load cases: what adding one makes, what goes with one that is removed.
//
// Not here: the list on the page (cases-part.ts), what an edit does to the sheet (src/sheet/cases.ts).

import { caseIdFault, casesOf, type Edit, type LoadCase, type Sheet } from '../sheet/index.ts';

export const titleOf = ({ id, title }: LoadCase) => (title === undefined || title.trim() === '' ? id : title);

/** Names of the givens that have a value of their own in the case. */
export const ownValues = (sheet: Sheet, id: string) =>
  sheet.cells.flatMap((cell) => (cell.kind === 'given' && cell.byCase?.[id] !== undefined ? [cell.name] : []));

function freeCaseId(sheet: Sheet): string {
  let number = casesOf(sheet).length + 1;
  while (caseIdFault(sheet, `case-${number}`) !== undefined) number += 1;
  return `case-${number}`;
}

/** The step that adds a case; the first second one gives the one that was there a name as well. */
export function addCaseEdit(sheet: Sheet, like?: string): { readonly edit: Edit; readonly id: string } {
  const id = freeCaseId(sheet);
  const cases = casesOf(sheet);
  const at = like === undefined ? cases.length : cases.findIndex((one) => one.id === like) + 1;
  const add: Edit = {
    kind: 'add-case',
    case: { id, title: `Case ${cases.length + 1}` },
    at,
    ...(like === undefined ? {} : { like }),
  };
  if (sheet.cases !== undefined) return { edit: add, id };
  const named: Edit = { kind: 'change-case', id: 'base', case: { id: 'base', title: 'Case 1' } };
  return { edit: { kind: 'batch', edits: [add, named] }, id };
}

export function removeCaseWords(sheet: Sheet, id: string): string {
  const names = ownValues(sheet, id);
  const shown = names.length > 5 ? `${names.slice(0, 5).join(', ')} and ${names.length - 5} more` : names.join(', ');
  const title = titleOf(casesOf(sheet).find((one) => one.id === id) ?? { id });
  return names.length === 0
    ? `case ${title} removed`
    : `case ${title} removed, with its values of ${shown}; undo brings them back`;
}
