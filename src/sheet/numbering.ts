// The numbers of the lines, as the record prints them and as messages name them.
//
// 1. Headings of level 1 are sections 1, 2, 3 …; deeper headings carry no number.
// 2. Numbered lines (given, derived, criterion, sought) count within their section: 3.1, 3.2 …
// 3. Lines above the first section are 0.1, 0.2 …; a sheet with no section counts 1, 2, 3 ….

import type { Cell, Sheet } from './document.ts';

export function isNumbered(cell: Cell): boolean {
  return cell.kind === 'given' || cell.kind === 'derived' || cell.kind === 'criterion' || cell.kind === 'sought';
}

/** Number of each section heading and each numbered line, by cell id. */
export function lineNumbers(sheet: Sheet): ReadonlyMap<string, string> {
  const numbers = new Map<string, string>();
  const hasSections = sheet.cells.some((cell) => cell.kind === 'heading' && (cell.level ?? 1) === 1);
  let section = 0;
  let line = 0;
  for (const cell of sheet.cells) {
    if (cell.kind === 'heading' && (cell.level ?? 1) === 1) {
      section += 1;
      line = 0;
      numbers.set(cell.id, String(section));
    } else if (isNumbered(cell)) {
      line += 1;
      numbers.set(cell.id, hasSections ? `${section}.${line}` : String(line));
    }
  }
  return numbers;
}
