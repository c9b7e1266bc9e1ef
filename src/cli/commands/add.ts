// `tightside add`: a template put into a sheet as a block, with a suffix on its names.
//
// What the block cannot bring along (values of cases that the sheet has not) is told on standard error; the file is written.

import { applyEdit, freeSuffix, insertBlock } from '../../sheet/index.ts';
import type { Io } from '../io.ts';
import { loadSheet, loadTemplate, Refusal, withValues, writeSheetTo } from '../load.ts';
import { oneLine } from '../report.ts';
import { exits, outputOf, readArguments, UsageTrouble } from '../usage.ts';

export async function add(argv: readonly string[], io: Io): Promise<number> {
  const takes = ['suffix', 'connect', 'title', 'output', 'set', 'case', 'force'] as const;
  const args = readArguments('add', argv, takes, ['FILE', 'TEMPLATE']);
  const out = outputOf('add', args);
  const [path, id] = args.positionals as [string, string];
  const sheet = await loadSheet(io, path);
  const template = await loadTemplate(io, id);
  const { suffix, title } = args.texts;
  if (suffix === undefined)
    throw new UsageTrouble(`add wants --suffix, which goes on the names of the block; ${freeSuffix(sheet, template)} is free`);
  const block = insertBlock(sheet, template, {
    suffix,
    at: sheet.cells.length,
    connect: args.connections,
    ...(title === undefined ? {} : { title }),
  });
  if (!block.ok)
    throw new Refusal(
      block.problems.map(({ message }) => `${path}: ${message}`),
      exits.wrongUsage,
    );
  const next = withValues(applyEdit(sheet, block.edit).sheet, args.assignments, path);
  await writeSheetTo(io, out, next, { force: args.force });
  for (const { message } of block.notes) io.err(`${oneLine(`${path}: ${message}`)}\n`);
  return exits.fine;
}
