#!/usr/bin/env node
// The program `tightside`: starts what `npm run build` made of src/cli/main.ts.

import { existsSync } from 'node:fs';
import process from 'node:process';
import { fileURLToPath } from 'node:url';

const built = new URL('../../dist/cli/main.js', import.meta.url);

// A reader that has seen enough (`| head`) closes the pipe: no fault of the sheet, and nothing more to say.
for (const stream of [process.stdout, process.stderr]) {
  stream.on('error', (fault) => {
    if (fault.code !== 'EPIPE') throw fault;
    process.exit(process.exitCode ?? 0);
  });
}

if (existsSync(built)) {
  const { nodeIo, run } = await import(built.href);
  const io = nodeIo(fileURLToPath(new URL('../../templates/', import.meta.url)), {
    out: (text) => process.stdout.write(text),
    err: (text) => process.stderr.write(text),
  });
  try {
    process.exitCode = await run(process.argv.slice(2), io);
  } catch (fault) {
    // Our own fault: never one of the exits that say something of the sheet.
    process.stderr.write(`tightside: a fault of the program, not of the sheet: ${fault?.stack ?? fault}\n`);
    process.exitCode = 70;
  }
} else {
  process.stderr.write('tightside: not built yet; run npm ci && npm run build first\n');
  process.exitCode = 4;
}
