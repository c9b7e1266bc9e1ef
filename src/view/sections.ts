// The lines of a sheet in sections, as they stand on the paper.
//
// Not here: how they are drawn (paper.ts).

import type { Line } from '../record/index.ts';
import { cellOf } from './share.ts';

export interface Section {
  /** Cell of its first line. */
  readonly key: string;
  readonly lines: readonly Line[];
}

/** Lines from one first-level heading to the next. */
export function sectionsOf(lines: readonly Line[]): readonly Section[] {
  const sections: { key: string; lines: Line[] }[] = [];
  for (const line of lines) {
    const last = sections[sections.length - 1];
    if (last === undefined || (line.kind === 'heading' && line.level === 1)) sections.push({ key: cellOf(line), lines: [line] });
    else last.lines.push(line);
  }
  // A sheet without a line still has a place where the first one is typed.
  return sections.length === 0 ? [{ key: '', lines: [] }] : sections;
}

/** What a line is called where it is spoken of. */
export function titleOf(line: Line): string {
  if (line.kind === 'step') return line.step.title === '' ? line.step.number : line.step.title;
  return line.kind === 'heading' ? line.text : `a ${line.kind === 'other' ? 'line' : line.kind}`;
}
