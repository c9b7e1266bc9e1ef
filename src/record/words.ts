// The words that stand beside the numbers: notes of a step, live values in a text, citations, values of several cases in a row.
//
// 1. One wording for each fact, so that every form and every list says it alike.
// 2. A citation is `[R1]` in a source, where R1 is an entry of the sheet's references.
// Not here: which facts hold (make.ts).

import type { GivenCell, LiveName, Sheet } from '../sheet/index.ts';

export const noSource = 'no source';

/** Where values that are carried over stem from: 'CS-009 rev B', 'template flat-belt-open', ''. */
export function carriedFrom(sheet: Sheet): string {
  const earlier = sheet.carriedFrom;
  if (earlier !== undefined) {
    const document = [earlier.documentNumber ?? '', earlier.revision ? `rev ${earlier.revision}` : '']
      .filter((part) => part !== '')
      .join(' ');
    return document === '' ? earlier.title : document;
  }
  return sheet.template === undefined ? '' : `template ${sheet.template.id}`;
}

/** What a reader must know of a given, the heaviest last. */
export function givenNotes(cell: GivenCell, sheet: Sheet): readonly string[] {
  const notes: string[] = [];
  if (cell.basis === 'assumed' || cell.basis === 'measured') notes.push(cell.basis);
  if (isBlank(cell.source)) notes.push(noSource);
  if (cell.toConfirm !== undefined && cell.toConfirm !== '') notes.push(`to be confirmed: ${cell.toConfirm}`);
  if (cell.carriedOver === true) {
    const from = carriedFrom(sheet);
    notes.push(from === '' ? 'carried over, not confirmed' : `carried over from ${from}, not confirmed`);
  }
  return notes;
}

export function isBlank(text: string | undefined): boolean {
  return text === undefined || text.trim() === '';
}

/** Ids in square brackets, each once, in the order of the text. */
export function citations(source: string | undefined): readonly string[] {
  const found = new Set<string>();
  for (const match of (source ?? '').matchAll(/\[([^\][\s]{1,40})\]/gu)) found.add(match[1] ?? '');
  return [...found];
}

/** What is cited without being in the list of references. */
export function citationNotes(source: string | undefined, sheet: Sheet): readonly string[] {
  const known = new Set((sheet.references ?? []).map((entry) => entry.id));
  return citations(source)
    .filter((id) => !known.has(id))
    .map((id) => `[${id}] is not in the list of sources`);
}

/** One text where all cases agree, otherwise '15.2 m/s (Steady running), 3 m/s (Start-up)'; null stands for no value. */
export function inCases(texts: readonly (string | null)[], titles: readonly string[]): string {
  const shown = texts.map((text) => text ?? 'no value');
  if (shown.every((text) => text === shown[0])) return shown[0] ?? '';
  return shown.map((text, k) => (titles[k] ? `${text} (${titles[k]})` : text)).join(', ');
}

/** `value` gives undefined for a name that no quantity answers to: its braces stay. */
export function replaceLive(text: string, live: readonly LiveName[], value: (name: string) => string | undefined): string {
  let done = '';
  let end = 0;
  for (const name of live) {
    const printed = value(name.name);
    if (printed === undefined || name.from < end) continue;
    done += text.slice(end, name.from) + printed;
    end = name.to;
  }
  return done + text.slice(end);
}
