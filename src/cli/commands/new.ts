// `tightside new`: a sheet from a template or an earlier sheet, with the values that the job gives.

import { fingerprints } from '../../check/index.ts';
import { calculate, newFromSheet, newFromTemplate } from '../../sheet/index.ts';
import { solver } from '../../study/index.ts';
import type { Io } from '../io.ts';
import { loadTemplate, withValues, writeSheetTo } from '../load.ts';
import { clip, exits, outputOf, readArguments, UsageTrouble } from '../usage.ts';

export async function newSheet(argv: readonly string[], io: Io): Promise<number> {
  const args = readArguments('new', argv, ['output', 'set', 'case', 'force'], ['TEMPLATE']);
  const path = outputOf('new', args);
  const id = args.positionals[0]!;
  const template = await loadTemplate(io, id);
  if (await io.same(id, path))
    throw new UsageTrouble(`-o ${clip(path)} is the template itself; choose another file for the sheet`);
  const begin = template.templateInfo === undefined ? newFromSheet : newFromTemplate;
  const begun = begin(template, fingerprints(calculate(template, solver)).sheet);
  await writeSheetTo(io, path, withValues(begun, args.assignments, id), { force: args.force });
  return exits.fine;
}
