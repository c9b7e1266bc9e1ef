// Own templates and blocks on the command line: kept, listed, begun from, put into a sheet, each refusal one line.

import { mkdirSync, mkdtempSync, readFileSync, rmSync, writeFileSync } from 'node:fs';
import { tmpdir } from 'node:os';
import { join } from 'node:path';
import { fileURLToPath } from 'node:url';
import { afterAll, beforeAll, describe, expect, it } from 'vitest';
import { nodeIo, run } from '../../src/cli/main.ts';
import { readSheet, type Sheet } from '../../src/sheet/index.ts';

const templates = fileURLToPath(new URL('../../templates/', import.meta.url));
const folder = mkdtempSync(join(tmpdir(), 'tightside-own-'));
afterAll(() => rmSync(folder, { recursive: true, force: true }));
const at = (name: string) => join(folder, name);

async function tightside(...argv: string[]) {
  let out = '';
  let err = '';
  const exit = await run(argv, nodeIo(templates, { out: (text) => (out += text), err: (text) => (err += text) }));
  const lines = err
    .split(folder)
    .join('DIR')
    .split('\n')
    .filter((line) => line !== '');
  return { exit, out, err: lines };
}
function sheetIn(name: string): Sheet {
  const read = readSheet(readFileSync(at(name), 'utf8'));
  if (!read.ok) throw new Error(read.problems[0]?.message);
  return read.value;
}

beforeAll(async () => {
  mkdirSync(at('shelf'));
  const done = await tightside('new', 'capstan', '-o', at('job.sheet.json'), '--set', 'F_load=8 kN');
  if (done.exit !== 0) throw new Error(done.err.join());
  // What is set has lost its provenance: a template wants it restated.
  const sheet = sheetIn('job.sheet.json');
  const cells = sheet.cells.map((cell) => (cell.id === 'F_load' ? { ...cell, basis: 'specified', source: 'Order 7' } : cell));
  writeFileSync(at('job.sheet.json'), JSON.stringify({ ...sheet, cells }));
});

describe('keep', () => {
  it('makes a template that is listed beside the built-in ones and begins sheets', async () => {
    const own = at('shelf/bollard.sheet.json');
    const kept = await tightside('keep', at('job.sheet.json'), '--as', 'bollard', '--job', 'Mooring at a bollard', '-o', own);
    expect([kept.exit, kept.out, kept.err]).toEqual([0, '', []]);
    expect(sheetIn('shelf/bollard.sheet.json').templateInfo).toMatchObject({
      id: 'bollard',
      version: 1,
      job: 'Mooring at a bollard',
    });

    const built = JSON.parse((await tightside('templates', '--json')).out) as { id: string }[];
    const all = JSON.parse((await tightside('templates', '--json', '--also', at('shelf'))).out) as Record<string, unknown>[];
    expect(built.map(({ id }) => id)).not.toContain('bollard');
    expect(all.slice(0, built.length)).toEqual(built);
    expect(all.slice(built.length)).toEqual([
      { ...built.find(({ id }) => id === 'capstan'), id: 'bollard', version: 1, file: own },
    ]);

    expect((await tightside('new', own, '-o', at('next.sheet.json'), '--set', 'N=3')).exit).toBe(0);
    const next = sheetIn('next.sheet.json');
    expect(next.template).toMatchObject({ id: 'bollard', version: 1 });
    expect(next.cells.find(({ id }) => id === 'F_load')).toMatchObject({ value: '8 kN', carriedOver: true });
    expect([0, 1]).toContain((await tightside('calc', at('next.sheet.json'))).exit);
  });

  it('says what a sheet lacks, line by line, and writes nothing', async () => {
    const cells = [
      { id: 'x', kind: 'given', name: 'x', value: '2 m' },
      { id: 'y', kind: 'derived', name: 'y', formula: '1.7*x' },
    ];
    writeFileSync(at('bare.sheet.json'), JSON.stringify({ format: 'tightside-sheet/1', title: 'T', cells }));
    const { exit, out, err } = await tightside('keep', at('bare.sheet.json'), '--as', 'bare', '-o', at('none.sheet.json'));
    expect([exit, out]).toEqual([2, '']);
    expect(err).toEqual([
      'DIR/bare.sheet.json: the template does not say what job it is for; say it in a sentence (--job "…")',
      'DIR/bare.sheet.json: the template has no caution; say what it cannot answer for, and who decides where people may come to harm (--caution "…")',
      'DIR/bare.sheet.json: the template states no limit of validity; name at least one (--limit "…")',
      'DIR/bare.sheet.json: the template has no criterion; a sheet that cannot say no proves nothing',
      'DIR/bare.sheet.json: cell 1 x (x): the given has no basis; say whether it is specified, measured, tabulated or assumed',
      'DIR/bare.sheet.json: cell 1 x (x): the given has neither source nor range; say where its value comes from',
      'DIR/bare.sheet.json: cell 2 y (y): 1.7 is a number without a source: make it a given, with its unit and where it comes from',
      'DIR/bare.sheet.json: cell 2 y (y): the line does not say where its formula comes from',
      'DIR/bare.sheet.json: cell 2 y (y): nothing uses this quantity, so it is a result, and a result wants a title',
    ]);
    expect(() => readFileSync(at('none.sheet.json'))).toThrow('ENOENT');
  });

  it.each<[string, string[], RegExp]>([
    ['no id', ['-o', 'x.sheet.json'], /keep wants --as ID/],
    ['no file to write', ['--as', 'mine'], /keep wants -o FILE/],
    ['an id of a built-in template', ['--as', 'capstan', '-o', 'x.sheet.json'], /there is a template capstan already/],
    ['an id that is none', ['--as', 'my own', '-o', 'x.sheet.json'], /“my own” cannot be the id of a template/],
    ['the sheet itself', ['--as', 'mine', '-o', 'job.sheet.json', '--force'], /is the sheet itself/],
  ])('is wrong usage with %s', async (_what, rest, expected) => {
    const argv = rest.map((each) => (each.endsWith('.json') ? at(each) : each));
    const { exit, err } = await tightside('keep', at('job.sheet.json'), ...argv);
    expect(exit).toBe(4);
    expect(err).toHaveLength(1);
    expect(err[0]).toMatch(expected);
  });
});

describe('new from a file', () => {
  it('begins from an earlier sheet: everything is carried over from it', async () => {
    expect((await tightside('new', at('job.sheet.json'), '-o', at('second.sheet.json'))).exit).toBe(0);
    const second = sheetIn('second.sheet.json');
    expect(second.carriedFrom?.title).toBe(sheetIn('job.sheet.json').title);
    expect(second.cells.every((cell) => cell.kind !== 'given' || cell.carriedOver === true)).toBe(true);
  });
  it('never writes over what it begins from, and says what cannot be read', async () => {
    const same = await tightside('new', at('job.sheet.json'), '-o', at('job.sheet.json'), '--force');
    expect([same.exit, same.err]).toEqual([
      4,
      [expect.stringContaining('is the template itself; choose another file for the sheet')],
    ]);
    const none = await tightside('new', at('nothing.sheet.json'), '-o', at('y.sheet.json'));
    expect([none.exit, none.err]).toEqual([3, ['DIR/nothing.sheet.json: cannot be read: there is no such file or folder']]);
    expect((await tightside('templates', '--also', at('nowhere'))).exit).toBe(3);
  });
});

describe('add', () => {
  it('puts a second stage into a sheet, connected to the first', async () => {
    expect((await tightside('new', 'flat-belt-open', '-o', at('stage.sheet.json'))).exit).toBe(0);
    const { exit, err } = await tightside(
      'add',
      at('stage.sheet.json'),
      'flat-belt-open',
      '--suffix',
      'B',
      '-o',
      at('two.sheet.json'),
      '--connect',
      'n_1=n_2',
      '--connect',
      'P_B=0.98*P',
      '--set',
      'd_2_B=400 mm',
      '--title',
      'Second stage',
    );
    expect([exit, err]).toEqual([0, []]);
    const json = JSON.parse((await tightside('calc', at('two.sheet.json'), '--json')).out) as {
      quantities: Record<string, { unit: string; values: number[] }>;
      problems: { severity: string }[];
    };
    expect(json.problems.filter(({ severity }) => severity === 'error')).toEqual([]);
    // 1450 r/min × 200/500, then × 200/400; 7.5 kW × 0.98
    expect(json.quantities['n_1_B']).toMatchObject({ unit: 'r/min' });
    expect(json.quantities['n_1_B']!.values[0]).toBeCloseTo(580, 9);
    expect(json.quantities['n_2_B']!.values[0]).toBeCloseTo(290, 9);
    expect(json.quantities['P_B']!.values[0]).toBeCloseTo(7.35, 9);
    expect(
      sheetIn('two.sheet.json').cells.some((cell) => cell.kind === 'heading' && cell.text === 'Scope (B): Second stage'),
    ).toBe(true);
  });

  it('takes an own template and tells of values that find no case', async () => {
    writeFileSync(at('empty.sheet.json'), JSON.stringify({ format: 'tightside-sheet/1', title: 'T', cells: [] }));
    const { exit, err } = await tightside(
      'add',
      at('empty.sheet.json'),
      'flat-belt-open',
      '--suffix',
      '2',
      '-o',
      at('e2.sheet.json'),
    );
    expect(exit).toBe(0);
    expect(err[0]).toMatch(/^DIR\/empty\.sheet\.json: the sheet has no case start, .*K_A_2, s_n_2/);
  });

  it.each<[string, string[], number, RegExp]>([
    ['no suffix', ['-o', 'z.sheet.json'], 4, /add wants --suffix, .*B is free/],
    ['no file to write', ['--suffix', 'B'], 4, /add wants -o FILE/],
    [
      'a connection without a formula',
      ['--suffix', 'B', '-o', 'z.sheet.json', '--connect', 'mu'],
      4,
      /--connect wants NAME="FORMULA"/,
    ],
    [
      'a connection of another kind',
      ['--suffix', 'B', '-o', 'z.sheet.json', '--connect', 'F_load=mu'],
      4,
      /job\.sheet\.json: F_load_B: /,
    ],
    ['a file that is there', ['--suffix', 'B', '-o', 'job.sheet.json'], 3, /there is such a file already/],
  ])('is refused with %s', async (_what, rest, exit, expected) => {
    const argv = rest.map((each) => (each.endsWith('.json') ? at(each) : each));
    const done = await tightside('add', at('job.sheet.json'), 'capstan', ...argv);
    expect([done.exit, done.err.length]).toEqual([exit, 1]);
    expect(done.err[0]).toMatch(expected);
  });
});

describe('a sheet beside its template', () => {
  it('says nothing while every formula is the template\u2019s, in JSON the count', async () => {
    const { out } = await tightside('calc', at('job.sheet.json'));
    expect(out).not.toContain('Beside template');
    const json = JSON.parse((await tightside('calc', at('job.sheet.json'), '--json')).out) as { template: object };
    expect(json.template).toMatchObject({ id: 'capstan', version: 1, changed: [], added: [], removed: [] });
  });

  it('shows a changed formula with what it was, in calc and record', async () => {
    const sheet = sheetIn('job.sheet.json');
    const was = sheet.cells.find((cell) => cell.kind === 'derived' && cell.name === 'F_hold');
    if (was?.kind !== 'derived') throw new Error('no F_hold');
    const cells = sheet.cells.map((cell) => (cell === was ? { ...was, formula: `(${was.formula})/2` } : cell));
    writeFileSync(at('changed.sheet.json'), JSON.stringify({ ...sheet, cells }));
    const { out } = await tightside('calc', at('changed.sheet.json'));
    expect(out).toMatch(/Beside template capstan, version 1: \d+ formulas and criteria untouched; 1 changed\n/);
    expect(out).toContain(`F_hold: was ${was.formula}, in N; is (${was.formula})/2, in N`);
    const record = JSON.parse((await tightside('record', at('changed.sheet.json'), '--to', 'json')).out) as {
      steps: { name: string; template: string; notes: string[] }[];
    };
    const step = record.steps.find(({ name }) => name === 'F_hold');
    expect(step?.template).toBe('changed');
    expect(step?.notes).toContain(`formula changed: in template capstan, version 1, it was ${was.formula}, in N`);
  });

  it('is compared with an own template that is named', async () => {
    const own = at('shelf/bollard.sheet.json');
    const alone = JSON.parse((await tightside('calc', at('next.sheet.json'), '--json')).out) as { template?: object };
    expect(alone.template).toBeUndefined();
    const beside = JSON.parse((await tightside('calc', at('next.sheet.json'), '--json', '--template', own)).out) as {
      template: object;
    };
    expect(beside.template).toMatchObject({ id: 'bollard', version: 1, changed: [] });
  });
});
