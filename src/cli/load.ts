// Sheets and templates as the commands want them: read, with values set, or refused with lines for standard error.
//
// 1. A refusal has its lines, one each, and the exit that goes with it.
// 2. Of a template folder every file that is a template counts; a damaged one is named, the others stand.
// 3. A template is named by the id of a built-in one or by the path of a file.
// Not here: reading of files (io.ts), of their text (src/sheet).

import { nearestNames } from '../formula/index.ts';
import type { Assignment } from '../sheet/index.ts';
import { compareWithTemplate, readSheet, type Sheet, setValues, type TemplateComparison, writeSheet } from '../sheet/index.ts';
import { FileTrouble, type Io } from './io.ts';
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

/** The templates of the package, by id. */
export async function loadTemplates(io: Io): Promise<readonly Sheet[]> {
  const sheets: Sheet[] = [];
  for (const file of await io.templateFiles()) {
    const sheet = templateIn(io, file, await io.templateText(file));
    if (sheet) sheets.push(sheet);
  }
  return sheets.sort(byId);
}

export interface OwnTemplate {
  readonly file: string;
  readonly sheet: Sheet;
}

/** The templates among the sheet files of a folder, by id; sheets that are none are passed over. */
export async function ownTemplates(io: Io, folder: string): Promise<readonly OwnTemplate[]> {
  const found: OwnTemplate[] = [];
  for (const file of await io.sheetFiles(folder)) {
    const read = readSheet(await io.read(file));
    if (!read.ok) io.err(`${file}: ${read.problems[0]!.message}\n`);
    else if (read.value.templateInfo) found.push({ file, sheet: read.value });
  }
  return found.sort((a, b) => byId(a.sheet, b.sheet));
}

function templateIn(io: Io, file: string, text: string): Sheet | undefined {
  const read = readSheet(text);
  if (read.ok && read.value.templateInfo) return read.value;
  io.err(`${file}: ${read.ok ? 'is no template and is left out' : read.problems[0]!.message}\n`);
  return undefined;
}

function byId(a: Sheet, b: Sheet): number {
  const [one, other] = [a.templateInfo?.id ?? '', b.templateInfo?.id ?? ''];
  return one < other ? -1 : one > other ? 1 : 0;
}

/** The sheet beside the template that it came from: the file that is named, else the built-in one; undefined where there is none. */
export async function comparison(io: Io, sheet: Sheet, path: string | undefined): Promise<TemplateComparison | undefined> {
  if (path !== undefined) return compareWithTemplate(sheet, await loadTemplate(io, path));
  const file = `${sheet.template?.id ?? ''}.sheet.json`;
  if (sheet.template === undefined || !(await io.templateFiles()).includes(file)) return undefined;
  const template = readSheet(await io.templateText(file));
  return template.ok ? compareWithTemplate(sheet, template.value) : undefined;
}

/** A built-in template by its id, or the sheet of a file by its path: an own template or an earlier sheet. */
export async function loadTemplate(io: Io, idOrPath: string): Promise<Sheet> {
  if (isPath(idOrPath)) return loadSheet(io, idOrPath);
  const templates = await loadTemplates(io);
  const found = templates.find((sheet) => sheet.templateInfo?.id === idOrPath);
  if (found) return found;
  if (await io.exists(idOrPath)) return loadSheet(io, idOrPath);
  const ids = templates.map((sheet) => sheet.templateInfo!.id);
  const near = nearestNames(idOrPath, ids)[0];
  throw new UsageTrouble(
    `there is no template ${clip(idOrPath)}; ${near === undefined ? `there are ${ids.join(', ')}` : `did you mean ${near}?`}`,
  );
}

/** What cannot be an id: a path with folders, a file name with its ending, standard input. */
function isPath(text: string): boolean {
  return text === '-' || /[/\\]/.test(text) || text.endsWith('.json');
}

/** Writes a sheet; a file of a later format is never overwritten, asked or not. */
export async function writeSheetTo(io: Io, path: string, sheet: Sheet, options: { readonly force: boolean }): Promise<void> {
  if (options.force) await refuseNewer(io, path);
  await io.write(path, writeSheet(sheet), { replace: options.force });
}

async function refuseNewer(io: Io, path: string): Promise<void> {
  if (path === '-' || !(await io.exists(path))) return;
  const read = await io.read(path).then(readSheet, () => undefined);
  if (read !== undefined && !read.ok && read.problems[0]?.code === 'newer-format')
    throw new FileTrouble(`${path}: ${read.problems[0].message}`);
}
