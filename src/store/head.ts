// The head of a sheet on the shelf, made from the sheet; and a new row for a sheet that is not kept yet.

import { emptyHistory, type History, type Sheet } from '../sheet/index.ts';
import type { KeptWithSteps } from './backend.ts';
import type { Draft, SheetHead } from './rows.ts';
import { keptText } from './sheet-text.ts';
import { lineChange, noLine } from './steps.ts';
import { newId } from './store.ts';

/** What the sheet says of itself; the rest is the row's own. */
export function headOf(sheet: Sheet, row: Pick<SheetHead, 'id' | 'rev' | 'writer' | 'made' | 'changed' | 'copyOf'>): SheetHead {
  const { documentNumber, revision, project, client } = sheet.titleBlock ?? {};
  const filled = Object.entries({ documentNumber, revision, project, client, template: sheet.template?.id, copyOf: row.copyOf });
  const { id, rev, writer, made, changed } = row;
  return {
    id,
    rev,
    writer,
    title: sheet.title,
    status: sheet.status ?? 'in preparation',
    ...Object.fromEntries(filled.filter(([, value]) => value !== undefined && value !== '')),
    cells: sheet.cells.length,
    made,
    changed,
  };
}

export interface NewRow {
  readonly id?: string;
  readonly history?: History;
  readonly draft?: Draft | null;
  readonly copyOf?: string;
  readonly made?: number;
  readonly changed?: number;
}

export function newRow(sheet: Sheet, options: NewRow = {}): KeptWithSteps {
  const now = Date.now();
  const id = options.id ?? newId();
  const change = lineChange(id, noLine(0).line, options.history ?? emptyHistory, now);
  const { made = now, changed = now, copyOf } = options;
  return {
    head: headOf(sheet, { id, rev: 1, writer: '', made, changed, ...(copyOf === undefined ? {} : { copyOf }) }),
    text: keptText(sheet),
    position: change.position,
    draft: options.draft ?? null,
    steps: change.put,
  };
}
