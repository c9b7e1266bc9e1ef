// The command line, called as the program calls it, on files in memory and on disk.

import { spawnSync } from 'node:child_process';
import {
  copyFileSync,
  mkdirSync,
  mkdtempSync,
  readdirSync,
  readFileSync,
  rmSync,
  statSync,
  symlinkSync,
  writeFileSync,
} from 'node:fs';
import { tmpdir } from 'node:os';
import { join } from 'node:path';
import { fileURLToPath } from 'node:url';
import fc from 'fast-check';
import { afterAll, describe, expect, it } from 'vitest';
import { nodeIo, run } from '../../src/cli/main.ts';
import { type GivenCell, readSheet, type Sheet, writeSheet } from '../../src/sheet/index.ts';
import { aSheet, seeded } from '../sheet/any-sheet.ts';

const templates = fileURLToPath(new URL('../../templates/', import.meta.url));
const folder = mkdtempSync(join(tmpdir(), 'tightside-'));
afterAll(() => rmSync(folder, { recursive: true, force: true }));
const at = (name: string) => join(folder, name);

async function tightside(...argv: string[]) {
  let out = '';
  let err = '';
  const io = nodeIo(templates, { out: (text) => (out += text), err: (text) => (err += text) });
  const exit = await run(argv, io);
  return {
    exit,
    out,
    err: err
      .split(folder)
      .join('DIR')
      .split('\n')
      .filter((line) => line !== ''),
  };
}
function write(name: string, text: string): string {
  writeFileSync(at(name), text);
  return at(name);
}
function sheetFile(name: string, ...cells: object[]): string {
  return write(name, JSON.stringify({ format: 'tightside-sheet/1', title: 'T', cells }));
}
function read(name: string): Sheet {
  const result = readSheet(readFileSync(at(name), 'utf8'));
  if (!result.ok) throw new Error(result.problems[0]?.message);
  return result.value;
}
const given = (id: string, name: string, value: string, more: object = {}) => ({ id, kind: 'given', name, value, ...more });
const derived = (id: string, name: string, formula: string, unit?: string) => ({
  id,
  kind: 'derived',
  name,
  formula,
  ...(unit === undefined ? {} : { unit }),
});

describe('templates', () => {
  it('are listed as JSON with the keys of the contract', async () => {
    const { exit, out, err } = await tightside('templates', '--json');
    expect([exit, err]).toEqual([0, []]);
    const rows = JSON.parse(out) as { id: string; givens: string[]; results: string[] }[];
    expect(Object.keys(rows[0]!)).toEqual(['id', 'version', 'title', 'givens', 'results']);
    const byId = new Map(rows.map((row) => [row.id, row]));
    // Names that outside programs rely on.
    expect(byId.get('capstan')!.givens).toEqual(expect.arrayContaining(['F_load', 'F_hand', 'mu', 'N', 'alpha']));
    expect(byId.get('capstan')!.results).toEqual(expect.arrayContaining(['theta', 'k', 'F_hold', 'F_haul', 'N_req', 'mu_req']));
    for (const id of ['flat-belt-open', 'flat-belt-crossed']) {
      expect(byId.get(id)!.givens).toEqual(
        expect.arrayContaining([
          'P',
          'K_A',
          'n_1',
          's_n',
          'd_1',
          'd_2',
          'C',
          'mu_1',
          'mu_2',
          'b',
          't',
          'rho',
          'sigma_allow',
          'sigma_tot',
          'E_b',
          'F_0',
          'S_req',
        ]),
      );
    }
  });
  it('are listed for reading', async () => {
    const { exit, out } = await tightside('templates');
    expect(exit).toBe(0);
    expect(out).toMatch(/^capstan {2}\(version 1\)$/m);
    expect(out).toMatch(/^ {2}givens: {2}F_load/m);
  });
  it('that are damaged are named, and the others stand', async () => {
    mkdirSync(at('some'));
    writeFileSync(at('some/bad.sheet.json'), '{');
    copyFileSync(join(templates, 'capstan.sheet.json'), at('some/capstan.sheet.json'));
    let out = '';
    let err = '';
    const exit = await run(
      ['templates', '--json'],
      nodeIo(at('some'), { out: (text) => (out += text), err: (text) => (err += text) }),
    );
    expect([exit, (JSON.parse(out) as unknown[]).length]).toEqual([0, 1]);
    expect(err).toMatch(/^bad\.sheet\.json: line 1, column 2: expected a key in double quotes, but the file ends\n$/);
  });
});

describe('new', () => {
  it('writes a sheet in which what was set is confirmed and the rest is carried over', async () => {
    const made = await tightside(
      'new',
      'capstan',
      '-o',
      at('a.sheet.json'),
      '--set',
      'μ=0.25',
      '--set',
      'F_load=12 kN',
      '--case',
      'low:mu=0.2',
    );
    expect(made).toEqual({ exit: 0, out: '', err: [] });
    const sheet = read('a.sheet.json');
    const one = (name: string) => sheet.cells.find((cell) => cell.kind === 'given' && cell.name === name) as GivenCell;
    expect(one('F_load')).toMatchObject({ value: '12 kN' });
    expect(one('F_load')).not.toHaveProperty('carriedOver');
    expect(one('F_load')).not.toHaveProperty('basis');
    expect(one('F_load')).not.toHaveProperty('source');
    expect(one('F_hand')).toMatchObject({ carriedOver: true });
    expect(sheet.template).toMatchObject({ id: 'capstan', version: 1 });
    expect(sheet.template?.fingerprint).toMatch(/^[0-9a-f]{64}$/);
  });
  it('leaves a file that is there alone, unless it is forced', async () => {
    const path = write('there.sheet.json', 'precious');
    const refused = await tightside('new', 'capstan', '-o', path);
    expect(refused).toMatchObject({
      exit: 3,
      err: ['DIR/there.sheet.json: there is such a file already; choose another name, or add --force to replace it'],
    });
    expect(readFileSync(path, 'utf8')).toBe('precious');
    expect((await tightside('new', 'capstan', '-o', path, '--force')).exit).toBe(0);
    expect(read('there.sheet.json').template?.id).toBe('capstan');
  });
  it('never overwrites a sheet of a newer format, forced or not', async () => {
    const path = write('newer.sheet.json', '{"format": "tightside-sheet/2", "title": "T"}');
    const refused = await tightside('new', 'capstan', '-o', path, '--force');
    expect(refused.exit).toBe(3);
    expect(refused.err[0]).toMatch(/written in format "tightside-sheet\/2"/);
    expect(readFileSync(path, 'utf8')).toMatch(/sheet\/2/);
  });
  it('leaves nothing beside the file, and keeps its mode and its link', async () => {
    mkdirSync(at('own'));
    const target = write('own/real.sheet.json', 'old');
    symlinkSync(target, at('own/link.sheet.json'));
    expect((await tightside('new', 'capstan', '-o', at('own/link.sheet.json'), '--force')).exit).toBe(0);
    expect(readdirSync(at('own')).sort()).toEqual(['link.sheet.json', 'real.sheet.json']);
    expect(readFileSync(target, 'utf8')).toMatch(/^\{\n {2}"format"/);
  });
  it('writes to a device without replacing it', async () => {
    const before = statSync('/dev/null').rdev;
    expect((await tightside('new', 'capstan', '-o', '/dev/null', '--force')).exit).toBe(0);
    expect(statSync('/dev/null').rdev).toBe(before);
    expect(statSync('/dev/null').isFile()).toBe(false);
  });
  it('writes to standard output for -', async () => {
    const { exit, out } = await tightside('new', 'capstan', '-o', '-');
    expect(exit).toBe(0);
    expect(readSheet(out).ok).toBe(true);
  });
});

describe('calc', () => {
  const small = () =>
    sheetFile(
      'small.sheet.json',
      given('g1', 'd', '200 mm'),
      given('g2', 'n_1', '1450 r/min'),
      derived('d1', 'v', 'pi*d*n_1', 'm/s'),
      { id: 'k1', kind: 'criterion', title: 'Speed', left: 'v', relation: '<=', right: '"30 m/s"' },
    );

  it('gives values, criteria and problems in the shape of the contract', async () => {
    const { exit, out, err } = await tightside('calc', small(), '--json');
    expect([exit, err]).toEqual([0, []]);
    const made = JSON.parse(out);
    // v = π·0.2 m·(1450/60) 1/s, by hand
    const v = (Math.PI * 0.2 * 1450) / 60;
    expect(made).toEqual({
      title: 'T',
      fingerprint: expect.stringMatching(/^[0-9a-f]{64}$/),
      cases: ['base'],
      quantities: {
        d: { unit: 'mm', values: [200], si: [0.2], printed: ['200\u00a0mm'] },
        n_1: {
          unit: 'r/min',
          values: [1450],
          si: [expect.closeTo(1450 / 60, 12)],
          printed: [expect.stringMatching(/^1.450\u00a0r\/min$/)],
        },
        v: {
          unit: 'm/s',
          values: [expect.closeTo(v, 12)],
          si: [expect.closeTo(v, 12)],
          printed: [expect.stringMatching(/^15\.18\d*\u00a0m\/s$/)],
        },
      },
      criteria: [{ id: 'k1', title: 'Speed', met: [true], utilisation: [expect.closeTo(v / 30, 12)] }],
      problems: expect.any(Array),
    });
  });
  it('ends with 1 where a criterion is not met, and leaves the file as it is', async () => {
    const path = small();
    const before = readFileSync(path, 'utf8');
    const { exit, out } = await tightside('calc', path, '--set', 'd=0.5 m', '--json');
    expect(exit).toBe(1);
    expect(JSON.parse(out).criteria[0].met).toEqual([false]);
    expect(readFileSync(path, 'utf8')).toBe(before);
  });
  it('ends with 2 where the sheet has errors: one line each, null for what has no value, the rest goes on', async () => {
    const path = sheetFile(
      'wrong.sheet.json',
      { id: 'h', kind: 'heading', text: 'A' },
      given('g1', 'F', '10 kN'),
      derived('d1', 'x', 'F + "1 m"'),
      derived('d2', 'y', 'F*2', 'kN'),
      derived('d3', 'z', '1/0'),
      {
        id: 'k1',
        kind: 'criterion',
        left: 'y',
        relation: '<=',
        right: '"1 kN"',
      },
    );
    const { exit, out, err } = await tightside('calc', path, '--json');
    expect(exit).toBe(2);
    expect(err).toEqual([
      expect.stringMatching(/^DIR\/wrong\.sheet\.json: cell 1\.2 x \(d1\): .*force.*length/),
      expect.stringMatching(/^DIR\/wrong\.sheet\.json: cell 1\.4 z \(d3\): division by zero/),
    ]);
    const made = JSON.parse(out);
    expect(made.quantities.x).toMatchObject({ values: [null], si: [null], printed: [null] });
    expect(made.quantities.y).toMatchObject({ unit: 'kN', values: [20] });
    expect(made.problems.filter((problem: { severity: string }) => problem.severity === 'error')).toEqual([
      { cell: 'd1', severity: 'error', code: expect.any(String), message: expect.any(String) },
      { cell: 'd3', severity: 'error', code: expect.any(String), message: expect.any(String) },
    ]);
  });
  it('tells the case of a problem that concerns one', async () => {
    const path = write(
      'cases.sheet.json',
      JSON.stringify({
        format: 'tightside-sheet/1',
        title: 'T',
        cases: [{ id: 'run' }, { id: 'stop' }],
        cells: [given('g', 'n', '2', { byCase: { stop: '0' } }), derived('d', 'x', '1/n')],
      }),
    );
    const { exit, err } = await tightside('calc', path);
    expect(exit).toBe(2);
    expect(err).toEqual([expect.stringMatching(/cell 2 x \(d\), case stop: division by zero/)]);
  });
  it('sets values by name for all cases, then for one', async () => {
    const path = write(
      'two.sheet.json',
      JSON.stringify({
        format: 'tightside-sheet/1',
        title: 'T',
        cases: [{ id: 'run' }, { id: 'start' }],
        cells: [given('g', 'μ_1', '0.3', { byCase: { start: '0.2' } })],
      }),
    );
    const { out } = await tightside('calc', path, '--json', '--case', 'start:mu_1=0.15', '--set', 'mu_1=0.4');
    expect(JSON.parse(out).quantities.mu_1.values).toEqual([0.4, 0.15]);
  });
  it('keeps names such as constructor apart from the objects of the language', async () => {
    const { out } = await tightside(
      'calc',
      sheetFile('names.sheet.json', given('g', 'constructor', '2'), derived('d', 'toString', 'constructor*3')),
      '--json',
    );
    expect(JSON.parse(out).quantities.toString).toMatchObject({ values: [6] });
  });
  it('gives the text of a choice where there is no number', async () => {
    const path = sheetFile(
      'choice.sheet.json',
      {
        id: 't',
        kind: 'table',
        name: 's',
        columns: [{ name: 'key' }, { name: 'x', unit: '1' }],
        rows: [
          ['a', '1'],
          ['b', '2'],
        ],
      },
      given('g', 'kind_1', 'b', { choices: 's.key' }),
      derived('d', 'y', 'entry(s, x, kind_1)', '1'),
    );
    const { out } = await tightside('calc', path, '--json');
    const { quantities } = JSON.parse(out);
    expect(quantities.kind_1).toEqual({ unit: '', values: [null], si: [null], printed: ['b'] });
    expect(quantities.y.values).toEqual([2]);
  });
  it('lists values under each other, what is not met, what is carried over', async () => {
    const path = sheetFile(
      'list.sheet.json',
      { id: 'h', kind: 'heading', text: 'Speed' },
      given('g1', 'd', '500 mm', { carriedOver: true }),
      given('g2', 'n_1', '1450 r/min'),
      derived('d1', 'v', 'pi*d*n_1', 'm/s'),
      {
        id: 'k1',
        kind: 'criterion',
        title: 'Belt speed',
        left: 'v',
        relation: '<=',
        right: '"30 m/s"',
        ifNotMet: 'The rim may burst.',
        justification: 'steel rim',
      },
    );
    const { exit, out } = await tightside('calc', path);
    expect(exit).toBe(1);
    expect(out.replaceAll('\u00a0', ' ').replaceAll('\u202f', ' ')).toBe(
      [
        'T (in preparation)',
        '',
        '1 Speed',
        '1.1  d                      500 mm',
        '1.2  n_1               1 450 r/min',
        '1.3  v                   37.96 m/s',
        '1.4       Belt speed  not met 1.27',
        '',
        'Not met',
        '1.4 Belt speed: The rim may burst. Stands because: steel rim',
        '',
        'Carried over, not confirmed: d',
        '',
      ].join('\n'),
    );
  });
});

describe('record', () => {
  const path = () =>
    sheetFile('rec.sheet.json', given('g1', 'd', '200 mm', { source: 'drawing' }), derived('d1', 'A', 'pi*d^2/4', 'mm^2'));
  it('as JSON has numbered steps with a calculator line each', async () => {
    const { exit, out, err } = await tightside('record', path(), '--to', 'json');
    expect([exit, err]).toEqual([0, []]);
    const { steps } = JSON.parse(out) as {
      steps: { number: string; name: string; cases: { calculatorLine: string; closes: boolean }[] }[];
    };
    expect(steps.map(({ number, name }) => [number, name])).toEqual([
      ['1', 'd'],
      ['2', 'A'],
    ]);
    expect(steps[1]!.cases[0]).toMatchObject({
      closes: true,
      calculatorLine: expect.stringMatching(/^[\d.+\-*/^() e]*pi[\d.+\-*/^() e]*$/),
    });
  });
  it('as HTML is one file without script and without a word from outside', async () => {
    const { exit } = await tightside('record', path(), '--to', 'html', '-o', at('rec.html'));
    expect(exit).toBe(0);
    const html = readFileSync(at('rec.html'), 'utf8');
    expect(html).toMatch(/^<!DOCTYPE html>/);
    expect(html).not.toMatch(/<script|<link|src="http|url\(http|@import/i);
  });
  it('never writes over the sheet itself, by whatever name', async () => {
    const sheet = path();
    symlinkSync(sheet, at('alias.sheet.json'));
    for (const out of [sheet, at('alias.sheet.json'), join(folder, '.', 'rec.sheet.json')]) {
      const refused = await tightside('record', sheet, '--to', 'json', '-o', out);
      expect(refused.exit).toBe(4);
      expect(refused.err[0]).toMatch(/is the sheet itself/);
    }
    expect(readSheet(readFileSync(sheet, 'utf8')).ok).toBe(true);
  });
  it.each(['pdf', 'md', 'tex', 'csv'])('says that %s is not in this version', async (form) => {
    expect(await tightside('record', path(), '--to', form)).toMatchObject({
      exit: 4,
      out: '',
      err: [`tightside: --to ${form} is not in this version; it writes html and json`],
    });
  });
});

describe('a file that cannot be read ends with 3 and one line', () => {
  it.each([
    ['nowhere.sheet.json', undefined, 'DIR/nowhere.sheet.json: cannot be read: there is no such file or folder'],
    ['', undefined, 'DIR: cannot be read: it is a folder'],
    ['cut.sheet.json', '{"format": "tight', 'DIR/cut.sheet.json: line 1, column 18: expected a closing quote, but the file ends'],
    ['bytes.sheet.json', Buffer.from([0x7b, 0xff, 0xfe]), 'DIR/bytes.sheet.json: cannot be read: it is not UTF-8 text'],
    [
      'newer.sheet.json',
      '{"format": "tightside-sheet/9"}',
      'DIR/newer.sheet.json: format: the sheet was written in format "tightside-sheet/9"; this version of the program knows "tightside-sheet/1". Open it with a newer version; it was left as it is',
    ],
    [
      'key.sheet.json',
      '{"format": "tightside-sheet/1", "title": "T", "cells": [{"id": "a", "kind": "given", "name": "mu_1", "value": "1", "valeu": ""}]}',
      'DIR/key.sheet.json: cells[0] (given mu_1): unknown key `valeu`; did you mean `value`?',
    ],
  ])('%s', async (name, content, line) => {
    if (content !== undefined) writeFileSync(at(name), content);
    for (const command of [['calc'], ['calc', '--json'], ['record', '--to', 'json']]) {
      expect(await tightside(command[0]!, at(name), ...command.slice(1))).toEqual({ exit: 3, out: '', err: [line] });
    }
  });
});

describe('any sheet', () => {
  it('that can be read is calculated and recorded: an exit of 0, 1 or 2, JSON without NaN, one line an error', async () => {
    await fc.assert(
      fc.asyncProperty(aSheet, async (sheet) => {
        const path = write('any.sheet.json', writeSheet(sheet));
        const calc = await tightside('calc', path, '--json');
        expect([0, 1, 2]).toContain(calc.exit);
        const made = JSON.parse(calc.out) as {
          problems: { severity: string }[];
          cases: string[];
          quantities: Record<string, { values: unknown[] }>;
        };
        const errors = made.problems.filter(({ severity }) => severity === 'error');
        expect(calc.err).toHaveLength(errors.length);
        expect(calc.exit === 2).toBe(errors.length > 0);
        for (const { values } of Object.values(made.quantities)) expect(values).toHaveLength(made.cases.length);
        const listed = await tightside('calc', path);
        expect(listed.exit).toBe(calc.exit);
        for (const to of ['json', 'html']) {
          const record = await tightside('record', path, '--to', to);
          expect(record.exit).toBe(calc.exit);
          expect(record.out.length).toBeGreaterThan(10);
        }
      }),
      { ...seeded, numRuns: 60 },
    );
  }, 120_000);
});

describe('wrong usage ends with 4 and one line', () => {
  it.each([
    [['claculate'], /there is no command claculate; .*tightside --help/],
    [['clac'], /there is no command clac; did you mean calc\?/],
    [['study', 'x'], /study is not in this version/],
    [['check', 'x'], /check is not in this version/],
    [['compare', 'x', 'y'], /compare is not in this version/],
    [['calc'], /calc wants FILE/],
    [['calc', 'a', 'b'], /calc takes FILE; b is one too many/],
    [['calc', 'a', '--jsn'], /calc has no option --jsn; did you mean --json\?/],
    [['calc', 'a', '--set'], /--set wants a value/],
    [['calc', 'a', '--set', 'mu'], /--set wants NAME="VALUE"/],
    [['calc', 'a', '--case', 'mu=1'], /--case wants ID:NAME="VALUE"/],
    [['calc', 'a', '--json=yes'], /--json takes no value/],
    [['record', 'a'], /record wants --to html or --to json/],
    [['record', 'a', '--to', 'docx'], /no form docx/],
    [['new', 'capstan'], /new wants -o FILE/],
    [['new', 'capsatn', '-o', 'x'], /no template capsatn; did you mean capstan\?/],
    [['templates', 'x'], /templates takes no argument/],
  ])('%j', async (argv, line) => {
    const { exit, out, err } = await tightside(...argv);
    expect([exit, out]).toEqual([4, '']);
    expect(err).toHaveLength(1);
    expect(err[0]).toMatch(/^tightside: /);
    expect(err[0]).toMatch(line);
  });
  it.each([
    ['d_9=1 m', /the sheet has no given d_9; did you mean d_1\?/],
    ['v=1 m/s', /v is calculated as .* and cannot be set/],
    ['d_1=1 N', /d_1 is a length \(m\), but 1 N is a force \(N\)/],
    ['d_1=1 mn', /d_1: .*mn/],
  ])('a value that cannot be set: %s', async (assignment, line) => {
    const path = sheetFile('set.sheet.json', given('g', 'd_1', '1 m'), derived('d', 'v', 'd_1*2'));
    const { exit, out, err } = await tightside('calc', path, '--set', assignment);
    expect([exit, out, err.length]).toEqual([4, '', 1]);
    expect(err[0]).toMatch(line);
  });
  it('help goes to standard output, no command at all is wrong usage', async () => {
    expect(await tightside('--help')).toMatchObject({ exit: 0, err: [] });
    expect(await tightside('calc', '--help')).toMatchObject({ exit: 0, err: [] });
    const nothing = await tightside();
    expect([nothing.exit, nothing.out]).toEqual([4, '']);
  });
});

describe('the program file', () => {
  // The committed program beside a stand-in for what the build makes.
  const root = at('program');
  const program = join(root, 'src/cli/tightside.mjs');
  mkdirSync(join(root, 'src/cli'), { recursive: true });
  copyFileSync(fileURLToPath(new URL('../../src/cli/tightside.mjs', import.meta.url)), program);

  it('says how to build it where it is not built', () => {
    const { status, stdout, stderr } = spawnSync(process.execPath, [program, 'templates'], { encoding: 'utf8' });
    expect({ status, stdout, stderr }).toEqual({
      status: 4,
      stdout: '',
      stderr: 'tightside: not built yet; run npm ci && npm run build first\n',
    });
  });
  it('hands over arguments and the folder of templates, and ends with the exit of the command', () => {
    mkdirSync(join(root, 'dist/cli'), { recursive: true });
    writeFileSync(
      join(root, 'dist/cli/main.js'),
      'export const nodeIo = (templates, streams) => ({ templates, ...streams });\nexport async function run(argv, io) { io.out(JSON.stringify([argv, io.templates])); io.out("x".repeat(5_000_000) + "\\n"); io.err("e\\n"); return 2; }\n',
    );
    const { status, stdout, stderr } = spawnSync(process.execPath, [program, 'calc', 'a b', '--set', 'μ=1'], {
      encoding: 'utf8',
      maxBuffer: 1e8,
    });
    expect([status, stderr, stdout.length > 5_000_000]).toEqual([2, 'e\n', true]);
    expect(stdout.startsWith(JSON.stringify([['calc', 'a b', '--set', 'μ=1'], join(root, 'templates/')]))).toBe(true);
  });
  it('ends with none of the exits of a sheet where the program itself fails', () => {
    writeFileSync(
      join(root, 'dist/cli/main.js'),
      'export const nodeIo = () => ({});\nexport async function run() { throw new Error("broken"); }\n',
    );
    const { status, stdout, stderr } = spawnSync(process.execPath, [program, 'calc'], { encoding: 'utf8' });
    expect([status, stdout]).toEqual([70, '']);
    expect(stderr).toMatch(/^tightside: a fault of the program, not of the sheet: Error: broken/);
  });
  it('ends quietly where the reader of its output has seen enough', () => {
    writeFileSync(
      join(root, 'dist/cli/main.js'),
      'export const nodeIo = (_, streams) => streams;\nexport async function run(argv, io) { for (let i = 0; i < 1000; i += 1) io.out("x".repeat(10_000)); return 0; }\n',
    );
    const { stdout, stderr } = spawnSync('sh', ['-c', `"${process.execPath}" "${program}" calc | head -c 10`], {
      encoding: 'utf8',
    });
    expect([stdout.length, stderr]).toEqual([10, '']);
  });
});
