// The command line: one command read, done, and its exit.
//
// 1. `run` knows no process: arguments, files and streams come in, the exit comes out; tests call it as the program does.
// 2. Trouble of the user ends in lines on standard error and an exit of 1 to 4; anything else that is thrown is our own fault.
// Not here: what the commands do (commands/).

import { add } from './commands/add.ts';
import { calc } from './commands/calc.ts';
import { keep } from './commands/keep.ts';
import { newSheet } from './commands/new.ts';
import { record } from './commands/record.ts';
import { templates } from './commands/templates.ts';
import { FileTrouble, type Io } from './io.ts';
import { Refusal } from './load.ts';
import { oneLine } from './report.ts';
import { exits, help, UsageTrouble, unknownCommand } from './usage.ts';

export { nodeIo } from './io.ts';

const commands: ReadonlyMap<string, (argv: readonly string[], io: Io) => Promise<number>> = new Map([
  ['templates', templates],
  ['new', newSheet],
  ['keep', keep],
  ['add', add],
  ['calc', calc],
  ['record', record],
]);

export async function run(argv: readonly string[], io: Io): Promise<number> {
  const [word, ...rest] = argv;
  if (word === undefined) {
    io.err(help);
    return exits.wrongUsage;
  }
  if (
    word === 'help' ||
    argv.slice(0, argv.indexOf('--') < 0 ? undefined : argv.indexOf('--')).some((each) => each === '--help' || each === '-h')
  ) {
    io.out(help);
    return exits.fine;
  }
  try {
    const command = commands.get(word);
    if (command === undefined) throw unknownCommand(word);
    return await command(rest, io);
  } catch (thrown) {
    if (thrown instanceof Refusal) {
      io.err(thrown.lines.map((line) => `${oneLine(line)}\n`).join(''));
      return thrown.exit;
    }
    if (thrown instanceof FileTrouble) {
      io.err(`${oneLine(thrown.message)}\n`);
      return exits.fileTrouble;
    }
    if (thrown instanceof UsageTrouble) {
      io.err(`tightside: ${oneLine(thrown.message)}\n`);
      return exits.wrongUsage;
    }
    throw thrown;
  }
}
