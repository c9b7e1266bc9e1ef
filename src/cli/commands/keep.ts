// `tightside keep`: a sheet kept as an own template, or what it lacks to be one.
//
// Faults go to standard error, one line each with its cell, and nothing is written.

import { keepAsTemplate, type TemplateFault } from '../../check/index.ts';
import { type Calculation, calculate } from '../../sheet/index.ts';
import type { Io } from '../io.ts';
import { loadSheet, loadTemplates, Refusal, writeSheetTo } from '../load.ts';
import { problemLine } from '../report.ts';
import { clip, exits, outputOf, readArguments, UsageTrouble } from '../usage.ts';

export async function keep(argv: readonly string[], io: Io): Promise<number> {
  const takes = ['as', 'job', 'caution', 'limit', 'title', 'output', 'force'] as const;
  const args = readArguments('keep', argv, takes, ['FILE']);
  const { as: id, title, job, caution } = args.texts;
  if (id === undefined) throw new UsageTrouble('keep wants --as ID, the id of the template, as in --as mixer-drive');
  const out = outputOf('keep', args);
  const path = args.positionals[0]!;
  const sheet = await loadSheet(io, path);
  // A sheet is not made into its own template: its marks and its title block would be gone.
  if (sheet.templateInfo === undefined && (await io.same(path, out)))
    throw new UsageTrouble(`-o ${clip(out)} is the sheet itself; choose another file for the template`);
  const taken = (await loadTemplates(io)).map((template) => template.templateInfo!.id);
  const info = {
    id,
    ...(title === undefined ? {} : { title }),
    ...(job === undefined ? {} : { job }),
    ...(caution === undefined ? {} : { caution }),
    ...(args.limits === undefined ? {} : { limits: args.limits }),
  };
  const kept = keepAsTemplate(sheet, info, { taken });
  if (!kept.ok) {
    const wrong = kept.problems.some(({ code }) => code === 'bad-id' || code === 'id-taken');
    throw new Refusal(faultLines(path, calculate(sheet), kept.problems), wrong ? exits.wrongUsage : exits.sheetErrors);
  }
  await writeSheetTo(io, out, kept.value, { force: args.force });
  return exits.fine;
}

const options: ReadonlyMap<string, string> = new Map([
  ['no-job', '--job'],
  ['no-caution', '--caution'],
  ['no-limits', '--limit'],
]);

function faultLines(path: string, calculation: Calculation, faults: readonly TemplateFault[]): string[] {
  const cells = new Map(calculation.sheet.cells.map((cell) => [cell.id, cell]));
  return faults.map((fault) => {
    const option = options.get(fault.code);
    const message = option === undefined ? fault.message : `${fault.message} (${option} "…")`;
    return fault.cell === undefined
      ? `${path}: ${message}`
      : problemLine(path, calculation, cells, { ...fault, message, cell: fault.cell, cases: '' });
  });
}
