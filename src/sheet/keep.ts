// A sheet kept as a template: the same cells and sample values, nothing of the job.
//
// 1. Title block, conclusion, marks, revisions, log, justifications, tracking numbers and the trace to an earlier sheet stay behind;
//    every given is carried over. The sheet itself is untouched.
// 2. Job, limits and caution come from what is said here, else from the sheet: its template data, its notes of that role.
// 3. A caution or a limit that no note of that role says gets one: a sheet made from the template shows its notes, not its template data.
// 4. Kept again under its own id, a template is one version on.
// Not here: whether it is fit to be one (src/check).

import type { Cell, NoteCell, Sheet, TemplateInfo } from './document.ts';
import { newCellId } from './edit.ts';
import { liveNames } from './reading.ts';
import { generic, withoutJob } from './template.ts';

export interface KeepInfo {
  readonly id: string;
  readonly version?: number;
  readonly title?: string;
  /** What the template is for, in a sentence. */
  readonly job?: string;
  readonly limits?: readonly string[];
  readonly caution?: string;
}

export function templateOf(sheet: Sheet, keep: KeepInfo): Sheet {
  const { title, purpose, method, references, titleBlock, settings, cases } = sheet;
  const info = infoOf(sheet, keep);
  const block = titleBlock && generic(titleBlock);
  return {
    format: sheet.format,
    title: keep.title?.trim() || title,
    templateInfo: info,
    ...(purpose === undefined ? {} : { purpose }),
    ...(method === undefined ? {} : { method }),
    status: 'in preparation',
    ...(references === undefined ? {} : { references }),
    ...(block === undefined || Object.keys(block).length === 0 ? {} : { titleBlock: block }),
    ...(settings === undefined ? {} : { settings }),
    ...(cases === undefined ? {} : { cases }),
    cells: withNotes(sheet.cells.map(withoutJob), info),
    marks: [],
    revisions: [],
    log: [],
  };
}

function infoOf(sheet: Sheet, keep: KeepInfo): TemplateInfo {
  const before = sheet.templateInfo;
  const from = before ?? sheet.template;
  const said = (role: NoteCell['role']) =>
    sheet.cells.flatMap((cell) =>
      cell.kind === 'note' && cell.role === role && liveNames(cell).length === 0 ? [cell.text.trim()] : [],
    );
  const limits = (keep.limits ?? before?.limits ?? said('limit')).map((limit) => limit.trim());
  return {
    id: keep.id,
    version: keep.version ?? (from?.id === keep.id ? from.version + 1 : 1),
    job: (keep.job ?? before?.job ?? '').trim(),
    limits: limits.filter((limit) => limit !== ''),
    caution: (keep.caution ?? before?.caution ?? said('caution').join(' ')).trim(),
  };
}

/** Notes for what the cells do not say yet, below the first heading. */
function withNotes(cells: readonly Cell[], info: TemplateInfo): readonly Cell[] {
  const said = (role: NoteCell['role']) =>
    cells.flatMap((cell) => (cell.kind === 'note' && cell.role === role ? [cell.text] : [])).join(' ');
  const cautions = said('caution');
  const limits = said('limit');
  const missing = info.limits.filter((limit) => !limits.includes(limit));
  const added: NoteCell[] = [];
  const add = (text: string, role: 'caution' | 'limit') => {
    const id = newCellId({ format: '', title: '', cells: [...cells, ...added] }, 'note');
    added.push({ id, kind: 'note', text, role });
  };
  if (missing.length > 0) add(`Limits of validity: ${missing.join('; ')}.`, 'limit');
  if (info.caution !== '' && !cautions.includes(info.caution)) add(info.caution, 'caution');
  const at = cells[0]?.kind === 'heading' ? 1 : 0;
  return added.length === 0 ? cells : cells.toSpliced(at, 0, ...added);
}
