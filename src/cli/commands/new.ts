// `tightside new`: a sheet from a template, with the values that the job gives.

import { fingerprints } from '../../check/index.ts';
import { calculate, newFromTemplate, readSheet, writeSheet } from '../../sheet/index.ts';
import { solver } from '../../study/index.ts';
import { FileTrouble, type Io } from '../io.ts';
import { loadTemplate, withValues } from '../load.ts';
import { exits, readArguments, UsageTrouble } from '../usage.ts';

export async function newSheet(argv: readonly string[], io: Io): Promise<number> {
  const args = readArguments('new', argv, ['output', 'set', 'case', 'force'], ['TEMPLATE']);
  const path = args.output;
  if (path === undefined || path === '') throw new UsageTrouble('new wants -o FILE, the file to write');
  const id = args.positionals[0]!;
  const template = await loadTemplate(io, id);
  const begun = newFromTemplate(template, fingerprints(calculate(template, solver)).sheet);
  const sheet = withValues(begun, args.assignments, id);
  if (args.force) await refuseNewer(io, path);
  await io.write(path, writeSheet(sheet), { replace: args.force });
  return exits.fine;
}

/** A sheet of a later format is never overwritten, asked or not. */
async function refuseNewer(io: Io, path: string): Promise<void> {
  if (path === '-' || !(await io.exists(path))) return;
  const read = await io.read(path).then(readSheet, () => undefined);
  if (read !== undefined && !read.ok && read.problems[0]?.code === 'newer-format')
    throw new FileTrouble(`${path}: ${read.problems[0].message}`);
}
