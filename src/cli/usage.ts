// What the command line takes: its help, and arguments read into plain data.
//
// 1. Help lists what this version does; a command of the plan that is not there yet says so and ends with wrong usage.
// 2. Wrong usage is a UsageTrouble with one sentence.
// Not here: what a command does (commands/).

import { parseArgs } from 'node:util';
import { canonicalName, nearestNames } from '../formula/index.ts';
import type { Assignment, Connection } from '../sheet/index.ts';

export const exits = { fine: 0, notMet: 1, sheetErrors: 2, fileTrouble: 3, wrongUsage: 4 } as const;

export class UsageTrouble extends Error {}

export const help = `tightside: calculation sheets for belt drives, band brakes, capstans and ropes

  tightside templates [--json] [--also FOLDER]
      the built-in templates, their givens and results; with --also the own ones in FOLDER too
  tightside new TEMPLATE -o FILE [--set NAME="VALUE" …] [--case ID:NAME="VALUE" …] [--force]
      a new sheet from a template; what --set names is confirmed, the rest stays carried over;
      TEMPLATE is the id of a built-in one or the path of a file: an own template, or an earlier sheet;
      a file that is there already is replaced only with --force
  tightside keep FILE --as ID -o OUT [--job TEXT] [--caution TEXT] [--limit TEXT …] [--title TEXT] [--force]
      keeps a sheet as an own template: same lines and sample values, nothing of the old job; says what the
      sheet lacks where it cannot be one (a caution, a criterion, sources, a step that closes …);
      caution and limits are taken from its notes where they are not given here
  tightside add FILE TEMPLATE --suffix B -o OUT [--connect NAME="FORMULA" …] [--set …] [--case …] [--title TEXT] [--force]
      puts a template into a sheet as a block with a suffix on its names: F_1 becomes F_1_B;
      a connected given becomes a formula of the sheet: --connect n_1="n_2" makes n_1_B = n_2
  tightside calc FILE [--set NAME="VALUE" …] [--case ID:NAME="VALUE" …] [--template TEMPLATE] [--json]
      values, criteria and problems of a sheet; the file stays as it is; formulas that are not those of the
      template it came from are shown; --template names an own one, a built-in one is known
  tightside record FILE --to html|json [-o OUT] [--template TEMPLATE]
      the calculation record, to OUT or standard output; beside the template as for calc

  --set NAME="VALUE"      the value for all cases: --set n_1="1450 r/min" --set μ_1="0.28 ± 0.04"
  --case ID:NAME="VALUE"  then the value for one case: --case start:K_A="1.5"
  A value that is set loses the basis and the source of the old one.
  FILE and OUT may be - for standard input and output.

Exit: 0 fine · 1 a criterion is not met · 2 the sheet has errors · 3 a file cannot be read or written · 4 wrong usage
`;

/** Commands of the plan that this version does not have. */
const later: ReadonlySet<string> = new Set(['compare', 'check', 'study']);
const commands = ['templates', 'new', 'keep', 'add', 'calc', 'record', 'help'];

export function unknownCommand(word: string): UsageTrouble {
  if (later.has(word)) return new UsageTrouble(`${word} is not in this version; tightside --help lists what is`);
  const near = nearestNames(word, commands)[0];
  return new UsageTrouble(
    `there is no command ${clip(word)}; ${near === undefined ? '' : `did you mean ${near}? `}tightside --help lists the commands`,
  );
}

type OptionName = keyof typeof optionTypes;
const optionTypes = {
  json: { type: 'boolean' },
  force: { type: 'boolean' },
  output: { type: 'string', short: 'o' },
  set: { type: 'string', multiple: true },
  case: { type: 'string', multiple: true },
  to: { type: 'string' },
  also: { type: 'string' },
  template: { type: 'string' },
  as: { type: 'string' },
  title: { type: 'string' },
  job: { type: 'string' },
  caution: { type: 'string' },
  limit: { type: 'string', multiple: true },
  suffix: { type: 'string' },
  connect: { type: 'string', multiple: true },
} as const;

export interface Arguments {
  readonly positionals: readonly string[];
  readonly json: boolean;
  readonly force: boolean;
  readonly output?: string;
  readonly to?: string;
  readonly assignments: readonly Assignment[];
  /** Options that hold a text, as typed. */
  readonly texts: Readonly<Partial<Record<'also' | 'template' | 'as' | 'title' | 'job' | 'caution' | 'suffix', string>>>;
  readonly limits?: readonly string[];
  readonly connections: readonly Connection[];
}

/** Reads the arguments behind the command; `takes` lists its options, `names` its positional arguments. */
export function readArguments(
  command: string,
  argv: readonly string[],
  takes: readonly OptionName[],
  names: readonly string[],
): Arguments {
  const options = Object.fromEntries(takes.map((name) => [name, optionTypes[name]]));
  const read = parsed(command, argv, options, takes);
  if (read.positionals.length > names.length) {
    throw new UsageTrouble(
      `${command} takes ${names.length === 0 ? 'no argument' : names.join(' ')}; ${clip(read.positionals[names.length]!)} is one too many (a value with spaces wants quotes)`,
    );
  }
  const missing = names[read.positionals.length];
  if (missing !== undefined) throw new UsageTrouble(`${command} wants ${missing}; tightside --help shows how`);
  const {
    json,
    force,
    output,
    to,
    set,
    case: one,
    limit,
    connect,
    ...texts
  } = read.values as {
    readonly json?: boolean;
    readonly force?: boolean;
    readonly output?: string;
    readonly to?: string;
    readonly set?: readonly string[];
    readonly case?: readonly string[];
    readonly limit?: readonly string[];
    readonly connect?: readonly string[];
  } & Arguments['texts'];
  return {
    positionals: read.positionals,
    json: json ?? false,
    force: force ?? false,
    ...(output === undefined ? {} : { output }),
    ...(to === undefined ? {} : { to }),
    assignments: once([...(set ?? []).map(forAll), ...(one ?? []).map(forOne)]),
    texts,
    ...(limit === undefined ? {} : { limits: limit }),
    connections: (connect ?? []).map(connection),
  };
}

function parsed(
  command: string,
  argv: readonly string[],
  options: Record<string, (typeof optionTypes)[OptionName]>,
  takes: readonly string[],
) {
  try {
    return parseArgs({ args: [...argv], options, allowPositionals: true, strict: true });
  } catch (thrown) {
    const code = (thrown as { code?: string }).code ?? '';
    if (!code.startsWith('ERR_PARSE_ARGS')) throw thrown;
    const text = thrown instanceof Error ? thrown.message : '';
    const option = /'(-[^' ]*)/.exec(text)?.[1] ?? '';
    if (code === 'ERR_PARSE_ARGS_UNKNOWN_OPTION') {
      const near = nearestNames(option.replace(/^-+/, ''), takes)[0];
      const all = takes.map((name) => (name === 'output' ? '-o' : `--${name}`)).join(', ');
      throw new UsageTrouble(
        `${command} has no option ${clip(option)}; ${near === undefined ? `it has ${all}` : `did you mean --${near}?`}`,
      );
    }
    const wants = /argument missing|argument is ambiguous/.test(text) ? 'wants a value behind it' : 'takes no value';
    throw new UsageTrouble(`${option === '' ? 'an option' : option.replace(/,$/, '')} ${wants}; tightside --help shows how`);
  }
}

/** One value for one quantity: of two, nobody could say which was meant. */
function once(assignments: readonly Assignment[]): readonly Assignment[] {
  const seen = new Set<string>();
  for (const { name, case: only } of assignments) {
    const key = `${only ?? ''}:${canonicalName(name)}`;
    if (seen.has(key)) {
      const where = only === undefined ? '' : ` in case ${clip(only)}`;
      throw new UsageTrouble(`${clip(name)} is set twice${where}; leave one of the two out`);
    }
    seen.add(key);
  }
  return assignments;
}

function forAll(text: string): Assignment {
  const sign = text.indexOf('=');
  if (sign <= 0) throw new UsageTrouble(`--set wants NAME="VALUE", as in --set d_1="200 mm", but got ${clip(text)}`);
  return { name: text.slice(0, sign).trim(), value: text.slice(sign + 1) };
}

function forOne(text: string): Assignment {
  const colon = text.indexOf(':');
  const sign = text.indexOf('=');
  if (colon <= 0 || sign <= colon + 1)
    throw new UsageTrouble(`--case wants ID:NAME="VALUE", as in --case start:K_A="1.5", but got ${clip(text)}`);
  return { case: text.slice(0, colon).trim(), name: text.slice(colon + 1, sign).trim(), value: text.slice(sign + 1) };
}

function connection(text: string): Connection {
  const sign = text.indexOf('=');
  if (sign <= 0) throw new UsageTrouble(`--connect wants NAME="FORMULA", as in --connect n_1="n_2", but got ${clip(text)}`);
  return { name: text.slice(0, sign).trim(), formula: text.slice(sign + 1) };
}

/** The file that a command writes. */
export function outputOf(command: string, args: Arguments): string {
  if (args.output === undefined || args.output === '') throw new UsageTrouble(`${command} wants -o FILE, the file to write`);
  return args.output;
}

export function clip(text: string): string {
  const line = text.replace(/[\s\p{Cc}]+/gu, ' ');
  return [...line].length > 60 ? `${[...line].slice(0, 60).join('')}…` : line;
}
