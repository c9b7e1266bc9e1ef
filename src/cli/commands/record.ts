// `tightside record`: the calculation record of a sheet as a file.

import { fingerprints } from '../../check/index.ts';
import { loadRecordAssets, makeRecord, recordHtml, recordJson } from '../../record/index.ts';
import { calculate } from '../../sheet/index.ts';
import { solver } from '../../study/index.ts';
import type { Io } from '../io.ts';
import { comparison, loadSheet } from '../load.ts';
import { stateExit, writeProblems } from '../outcome.ts';
import { clip, readArguments, UsageTrouble } from '../usage.ts';

const later: ReadonlySet<string> = new Set(['pdf', 'md', 'tex', 'csv']);

export async function record(argv: readonly string[], io: Io): Promise<number> {
  const args = readArguments('record', argv, ['to', 'output', 'template'], ['FILE']);
  const path = args.positionals[0]!;
  const form = args.to;
  if (form === undefined) throw new UsageTrouble('record wants --to html or --to json');
  if (later.has(form)) throw new UsageTrouble(`--to ${form} is not in this version; it writes html and json`);
  if (form !== 'html' && form !== 'json')
    throw new UsageTrouble(`there is no form ${clip(form)} of the record; --to takes html or json`);
  const out = args.output ?? '-';
  if (await io.same(path, out)) throw new UsageTrouble(`-o ${clip(out)} is the sheet itself; choose another file for the record`);
  const calculation = calculate(await loadSheet(io, path), solver);
  const template = await comparison(io, calculation.sheet, args.texts.template);
  const model = makeRecord(calculation, template === undefined ? {} : { template });
  const text =
    form === 'html'
      ? recordHtml(model, await loadRecordAssets())
      : `${JSON.stringify(recordJson(model, fingerprints(calculation).sheet), null, 2)}\n`;
  await io.write(out, text, { replace: true });
  writeProblems(io, path, calculation);
  return stateExit(calculation);
}
