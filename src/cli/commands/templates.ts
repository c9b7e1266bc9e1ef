// `tightside templates`: the built-in templates with the names of their givens and results.

import { templateSummary } from '../../sheet/index.ts';
import type { Io } from '../io.ts';
import { loadTemplates } from '../load.ts';
import { exits, readArguments } from '../usage.ts';

export async function templates(argv: readonly string[], io: Io): Promise<number> {
  const args = readArguments('templates', argv, ['json'], []);
  const summaries = (await loadTemplates(io)).map(templateSummary);
  if (args.json) {
    const rows = summaries.map(({ id, version, title, givens, results }) => ({ id, version, title, givens, results }));
    io.out(`${JSON.stringify(rows, null, 2)}\n`);
    return exits.fine;
  }
  const blocks = summaries.map(({ id, version, title, job, givens, results }) =>
    [`${id}  (version ${version})`, `  ${title}`, `  ${job}`, ...wrapped('givens', givens), ...wrapped('results', results)].join(
      '\n',
    ),
  );
  io.out(`${blocks.join('\n\n')}\n`);
  return exits.fine;
}

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
