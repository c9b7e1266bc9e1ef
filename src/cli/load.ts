// Sheets and templates as the commands want them: read, with values set, or refused with lines for standard error.
//
// 1. A refusal has its lines, one each, and the exit that goes with it.
// 2. Of a template folder every file that is a template counts; a damaged one is named, the others stand.
// Not here: reading of files (io.ts), of their text (src/sheet).

import { nearestNames } from '../formula/index.ts';
import type { Assignment } from '../sheet/index.ts';
import { readSheet, type Sheet, setValues } from '../sheet/index.ts';
import type { Io } from './io.ts';
import { clip, exits, UsageTrouble } from './usage.ts';

/** Ends a command: lines for standard error, and the exit. */
export class Refusal extends Error {
  readonly lines: readonly string[];
  readonly exit: number;
  constructor(lines: readonly string[], exit: number) {
    super(lines[0]);
    this.lines = lines;
    this.exit = exit;
  }
}

export async function loadSheet(io: Io, path: string): Promise<Sheet> {
  const read = readSheet(await io.read(path));
  if (!read.ok)
    throw new Refusal(
      read.problems.map((problem) => `${path}: ${problem.message}`),
      exits.fileTrouble,
    );
  return read.value;
}

/** The sheet with values set; what keeps a value from being set is wrong usage. */
export function withValues(sheet: Sheet, assignments: readonly Assignment[], path: string): Sheet {
  if (assignments.length === 0) return sheet;
  const assigned = setValues(sheet, assignments);
  if (!assigned.ok)
    throw new Refusal(
      assigned.problems.map((problem) => `${path}: ${problem.message}`),
      exits.wrongUsage,
    );
  return assigned.value;
}

export async function loadTemplates(io: Io): Promise<readonly Sheet[]> {
  const sheets: Sheet[] = [];
  for (const file of await io.templateFiles()) {
    const read = readSheet(await io.templateText(file));
    if (read.ok && read.value.templateInfo) sheets.push(read.value);
    else io.err(`${file}: ${read.ok ? 'is no template and is left out' : read.problems[0]!.message}\n`);
  }
  return sheets.sort((a, b) => compareText(a.templateInfo!.id, b.templateInfo!.id));
}

function compareText(a: string, b: string): number {
  return a < b ? -1 : a > b ? 1 : 0;
}

export async function loadTemplate(io: Io, id: string): Promise<Sheet> {
  const templates = await loadTemplates(io);
  const found = templates.find((sheet) => sheet.templateInfo?.id === id);
  if (found) return found;
  const ids = templates.map((sheet) => sheet.templateInfo!.id);
  const near = nearestNames(id, ids)[0];
  throw new UsageTrouble(
    `there is no template ${clip(id)}; ${near === undefined ? `there are ${ids.join(', ')}` : `did you mean ${near}?`}`,
  );
}
