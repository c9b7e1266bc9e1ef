// `tightside templates`: the built-in templates with the names of their givens and results, and on demand the own ones of a folder.

import { type TemplateSummary, templateSummary } from '../../sheet/index.ts';
import type { Io } from '../io.ts';
import { loadTemplates, ownTemplates } from '../load.ts';
import { oneLine } from '../report.ts';
import { exits, readArguments } from '../usage.ts';

export async function templates(argv: readonly string[], io: Io): Promise<number> {
  const args = readArguments('templates', argv, ['json', 'also'], []);
  const { also } = args.texts;
  const listed: Listed[] = [
    ...(await loadTemplates(io)).map(templateSummary),
    ...(also === undefined ? [] : (await ownTemplates(io, also)).map(({ file, sheet }) => ({ ...templateSummary(sheet), file }))),
  ];
  if (args.json) {
    const rows = listed.map(({ id, version, title, givens, results, file }) => ({
      id,
      version,
      title,
      givens,
      results,
      ...(file === undefined ? {} : { file }),
    }));
    io.out(`${JSON.stringify(rows, null, 2)}\n`);
    return exits.fine;
  }
  const blocks = listed.map(({ id, version, title, job, givens, results, file }) =>
    [
      oneLine(`${id}  (version ${version}${file === undefined ? '' : `, ${file}`})`),
      oneLine(`  ${title}`),
      oneLine(`  ${job}`),
      ...wrapped('givens', givens),
      ...wrapped('results', results),
    ].join('\n'),
  );
  io.out(`${blocks.join('\n\n')}\n`);
  return exits.fine;
}

/** `file` of an own template. */
type Listed = TemplateSummary & { readonly file?: string };

/** Names after a label, on lines of at most 100 characters. */
function wrapped(label: string, names: readonly string[]): string[] {
  const lines: string[] = [];
  const indent = ' '.repeat(10);
  let line = `  ${label}:`.padEnd(indent.length);
  for (const name of names) {
    if (line.length + 1 + name.length > 100) {
      lines.push(line);
      line = indent;
    }
    line += ` ${name}`;
  }
  return [...lines, line];
}
