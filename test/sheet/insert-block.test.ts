// Blocks: a template in one sheet twice, its numbers those of two sheets, its names, tables, references and cases kept apart.

import { readFileSync } from 'node:fs';
import { describe, expect, it } from 'vitest';
import { makeRecord } from '../../src/record/index.ts';
import {
  applyEdit,
  type BlockOptions,
  calculate,
  type DerivedCell,
  freeSuffix,
  insertBlock,
  newFromTemplate,
  readSheet,
  type Sheet,
  setValues,
  writeSheet,
} from '../../src/sheet/index.ts';
import { solver } from '../../src/study/index.ts';
import { sheetOf } from './build.ts';

function template(id: string): Sheet {
  const read = readSheet(readFileSync(new URL(`../../templates/${id}.sheet.json`, import.meta.url), 'utf8'));
  if (!read.ok) throw new Error(read.problems[0]?.message);
  return read.value;
}
function inserted(sheet: Sheet, block: Sheet, options: Partial<BlockOptions> = {}) {
  const done = insertBlock(sheet, block, { suffix: 'B', at: sheet.cells.length, ...options });
  if (!done.ok) throw new Error(done.problems.map(({ message }) => message).join('\n'));
  return { ...done, ...applyEdit(sheet, done.edit) };
}
function refused(sheet: Sheet, block: Sheet, options: Partial<BlockOptions> = {}): string[] {
  const done = insertBlock(sheet, block, { suffix: 'B', at: sheet.cells.length, ...options });
  return done.ok ? [] : done.problems.map(({ code, message }) => `${code}: ${message}`);
}
const small = (...lines: string[]): Sheet => ({
  ...sheetOf(lines),
  title: 'Small',
  templateInfo: { id: 'small', version: 3, job: 'j', limits: [], caution: 'c' },
});

describe('a two-stage belt drive in one sheet', () => {
  const belt = template('flat-belt-open');
  const first = newFromTemplate(belt);
  const connect = [
    { name: 'n_1_B', formula: 'n_2' },
    { name: 'P', formula: 'P' },
    { name: 's_n_B', formula: 's_n' },
  ];
  const both = inserted(first, belt, { connect });
  const values = [
    { name: 'd_1_B', value: '160 mm' },
    { name: 'd_2_B', value: '400 mm' },
    { name: 'F_0_B', value: '2.4 kN' },
  ];
  const set = setValues(both.sheet, values);
  if (!set.ok) throw new Error(set.problems[0]?.message);
  const calculation = calculate(set.value, solver);

  it('has the numbers of the two separate sheets in every case, each quantity of both', () => {
    const alone = setValues(first, [
      ...values.map(({ name, value }) => ({ name: name.replace('_B', ''), value })),
      // 1450 r/min × 200 mm / 500 mm
      { name: 'n_1', value: '580 r/min' },
    ]);
    if (!alone.ok) throw new Error(alone.problems[0]?.message);
    const second = calculate(alone.value, solver);
    const one = calculate(first, solver);
    let compared = 0;
    for (const cell of belt.cells) {
      if (cell.kind !== 'given' && cell.kind !== 'derived' && cell.kind !== 'sought') continue;
      const expected = second.named(cell.name)!.si;
      const found = calculation.named(`${cell.name}_B`)!.si;
      expect(Array.from(calculation.named(cell.name)!.si), cell.name).toEqual(Array.from(one.named(cell.name)!.si));
      expect(found.length).toBe(2);
      for (const [i, value] of expected.entries()) {
        if (Number.isNaN(value)) expect(found[i]).toBeNaN();
        else expect(Math.abs(found[i]! - value), cell.name).toBeLessThanOrEqual(1e-12 * Math.abs(value));
        compared += 1;
      }
    }
    expect(compared).toBeGreaterThan(80);
  });

  it('has no problem, and every step of its record closes', () => {
    // The second stage carries less than the first asks of it: that is a criterion not met, and no problem of the sheet's making.
    const problems = calculation.problems().filter(({ code }) => code !== 'not-met');
    expect(problems.map(({ cell, message }) => `${cell}: ${message}`)).toEqual([]);
    const open = makeRecord(calculation).steps.flatMap((step) =>
      step.cases.filter((each) => !each.closes).map((each) => `${step.number} ${step.name ?? step.title} ${each.case}`),
    );
    expect(open).toEqual([]);
  });

  it('shares the table of service factors and the references, and repeats neither', () => {
    expect(both.sheet.cells.filter(({ kind }) => kind === 'table')).toHaveLength(
      first.cells.filter(({ kind }) => kind === 'table').length,
    );
    expect(both.sheet.references).toEqual(first.references);
    expect(both.sheet.cells.find(({ id }) => id === 'service-factor-B')).toMatchObject({
      left: 'K_A_B',
      right: 'entry(service, K_A, duty_B)',
    });
  });

  it('keeps the units of connected givens and says where they come from', () => {
    const cell = both.sheet.cells.find(({ id }) => id === 'n_1-B') as DerivedCell;
    expect(cell).toEqual({
      id: 'n_1-B',
      kind: 'derived',
      name: 'n_1_B',
      title: 'Speed of the driving pulley',
      formula: 'n_2',
      unit: 'r/min',
      source: 'taken from n_2 of this sheet',
    });
  });

  it('names the quantities of the block in notes, drawings, charts and texts', () => {
    const cell = (id: string) => both.sheet.cells.find((each) => each.id === id);
    expect(cell('drawing-B')).toMatchObject({ uses: { driver: 'd_1_B', driven: 'd_2_B', centres: 'C_B' } });
    expect(cell('chart-B')).toMatchObject({ vary: 'n_1_B', show: ['P_lim_B', 'P_0_B'], title: 'Power against speed (B)' });
    expect(cell('note-slip-B')).toMatchObject({
      text: 'The strand forces F_1_B and F_2_B, the stress sigma_max_B and the shaft load F_W_B stand for a belt that grips: S_slip_B of at least 1, here {S_slip_B}. The slip power is {P_0_B}.',
    });
    expect(cell('beta-B')).toMatchObject({ title: 'Inclination of each strand to the centre line, negative for d_1_B > d_2_B' });
    expect(cell('h-scope-B')).toMatchObject({ text: 'Scope (B): Flat belt drive, open belt' });
  });

  it('is one step that can be taken back, and a file that reads again', () => {
    expect(applyEdit(both.sheet, both.inverse).sheet).toEqual(first);
    const read = readSheet(writeSheet(both.sheet));
    expect(read).toEqual({ ok: true, value: both.sheet });
  });

  it('takes a third stage, connected to the second', () => {
    expect(freeSuffix(both.sheet, belt)).toBe('C');
    const three = inserted(both.sheet, belt, { suffix: 'C', connect: [{ name: 'n_1_C', formula: 'n_2_B' }] });
    const third = calculate(three.sheet, solver);
    expect(third.problems().filter(({ severity }) => severity === 'error')).toEqual([]);
    // 1450 r/min × (2/5)²
    expect(third.named('n_1_C')!.si[0]! * 60).toBeCloseTo(232, 9);
  });
});

describe('every built-in template', () => {
  it.each(['band-brake-differential', 'capstan', 'v-belt', 'traction-sheave', 'three-pulleys'])(
    'stands beside itself with equal numbers: %s',
    (id) => {
      const block = template(id);
      const { sheet } = inserted(newFromTemplate(block), block);
      const calculation = calculate(sheet, solver);
      expect(calculation.problems().filter(({ severity }) => severity === 'error')).toEqual([]);
      for (const cell of block.cells) {
        if (!('name' in cell) || cell.kind === 'table') continue;
        expect(Array.from(calculation.named(`${cell.name}_B`)!.si), cell.name).toEqual(
          Array.from(calculation.named(cell.name)!.si),
        );
      }
    },
  );
});

describe('a block', () => {
  it('replaces all its names at once, whatever they look like', () => {
    const block = small('k = 2', 'k_B = 3', 'μ_1 = 0.3', 'y := k*k_B + mu_1', 'k <= y');
    const { sheet, names } = inserted(sheetOf(['x = 1']), block);
    expect(names.get('mu_1')).toBe('mu_1_B');
    expect(sheet.cells.find(({ id }) => id === 'y-B')).toMatchObject({ formula: 'k_B*k_B_B + mu_1_B' });
    // 2 × 3 + 0.3
    expect(calculate(sheet).named('y_B')!.si[0]).toBeCloseTo(6.3, 12);
  });

  it('takes ids that no cell has', () => {
    const block = small('a = 1', 'b := a');
    const { sheet } = inserted({ ...sheetOf(['x = 1']), cells: [{ id: 'a-B', kind: 'note', text: '' }] }, block);
    expect(new Set(sheet.cells.map(({ id }) => id)).size).toBe(sheet.cells.length);
  });

  it('merges references: the same document and edition is one, a taken id gives way, citations follow', () => {
    const sheet: Sheet = {
      ...sheetOf(['x = 1']),
      references: [
        { id: 'R1', document: 'Handbook', edition: '2' },
        { id: 'R2', document: 'Standard' },
      ],
    };
    const block: Sheet = {
      ...small(),
      method: 'After [R2].',
      references: [
        { id: 'R1', document: 'Other book' },
        { id: 'R2', document: 'Handbook ', edition: '2' },
        { id: 'R3', document: 'Handbook', edition: '3' },
        { id: 'R9', document: 'Never cited' },
      ],
      cells: [
        { id: 'a', kind: 'given', name: 'a', value: '1', source: '[R1] p. 5, [R2] and [R3], not [R7]' },
        { id: 'n', kind: 'note', text: 'see [R1]' },
      ],
    };
    const done = inserted(sheet, block);
    expect(done.sheet.references).toEqual([
      { id: 'R1', document: 'Handbook', edition: '2' },
      { id: 'R2', document: 'Standard' },
      { id: 'R3', document: 'Other book' },
      { id: 'R4', document: 'Handbook', edition: '3' },
    ]);
    expect(done.sheet.cells.find(({ id }) => id === 'a-B')).toMatchObject({ source: '[R3] p. 5, [R1] and [R4], not [R7]' });
    expect(done.sheet.cells.find(({ id }) => id === 'n-B')).toMatchObject({ text: 'see [R3]' });
    expect(done.sheet.cells.find(({ id }) => id === 'note-block-B')).toMatchObject({
      text: 'Small, from template small, version 3: the names of this block carry the suffix B. After [R1].',
    });
  });

  it('keeps values of cases that the sheet has and tells of those that it has not', () => {
    const block: Sheet = {
      ...small('a = 1'),
      cases: [{ id: 'run' }, { id: 'start' }],
      cells: [{ id: 'a', kind: 'given', name: 'a', value: '1', byCase: { run: '2', start: '3' } }],
    };
    const { sheet, notes } = inserted({ ...sheetOf([]), cases: [{ id: 'run' }, { id: 'stop' }] }, block);
    expect(sheet.cells.find(({ id }) => id === 'a-B')).toMatchObject({ value: '1', byCase: { run: '2' } });
    expect(notes.map(({ code, message }) => `${code}: ${message}`)).toEqual([
      'case-left-out: the sheet has no case start, for which the template has values of its own: a_B stand at their value for all cases',
      'case-not-in-template: the template knows no case stop: the block stands there at its values for all cases; set what is other in stop',
    ]);
    expect(Array.from(calculate(sheet).named('a_B')!.si)).toEqual([2, 1]);
  });

  it('brings along a table whose rows differ, under a name of its own', () => {
    const rows = (value: string) => ({
      columns: [{ name: 'kind' }, { name: 'mu_t', unit: '1' }],
      rows: [['wood', value]],
    });
    const block: Sheet = {
      ...small(),
      cells: [
        { id: 't', kind: 'table', name: 'pairs', ...rows('0.4') },
        { id: 's', kind: 'given', name: 's', value: 'wood', choices: 'pairs.kind' },
        { id: 'm', kind: 'derived', name: 'm', formula: 'entry(pairs, mu_t, s)' },
      ],
    };
    const sheet: Sheet = { ...sheetOf([]), cells: [{ id: 't', kind: 'table', name: 'pairs', ...rows('0.3') }] };
    const once = inserted(sheet, block).sheet;
    expect(once.cells.map((cell) => ('name' in cell ? cell.name : cell.kind))).toEqual([
      'pairs',
      'heading',
      'note',
      'pairs_B',
      's_B',
      'm_B',
    ]);
    expect(calculate(once).named('m_B')!.si[0]).toBe(0.4);
    // A third block finds the table of the second.
    const twice = inserted(once, block, { suffix: 'C' }).sheet;
    expect(twice.cells.find(({ id }) => id === 'm-C')).toMatchObject({ formula: 'entry(pairs_B, mu_t, s_C)' });
  });

  it('is written with the decimal sign of the sheet', () => {
    const block: Sheet = {
      ...small('a = 0.5 m', 'y := a*"1.5 m"/2 + "0.25 m"^2*0.5'),
      cells: [
        ...small('a = 0.5 m', 'y := a*"1.5 m"/2 + "0.25 m"^2*0.5').cells,
        {
          id: 't',
          kind: 'table',
          name: 't',
          columns: [{ name: 'v. 1.2' }, { name: 'x', unit: '1' }],
          rows: [['no. 1.2', '1.2']],
        },
      ],
    };
    const { sheet } = inserted({ ...sheetOf([]), settings: { decimalSign: ',' } }, block);
    expect(sheet.cells.find(({ id }) => id === 'a-B')).toMatchObject({ value: '0,5 m' });
    expect(sheet.cells.find(({ id }) => id === 't-B')).toMatchObject({ rows: [['no. 1.2', '1,2']] });
    expect(calculate(sheet).named('y_B')!.si[0]).toBe(calculate(block).named('y')!.si[0]);
  });

  it.each<[string, Partial<BlockOptions>, string]>([
    ['a suffix with a sign', { suffix: 'B-1' }, 'bad-suffix: “B-1” cannot be a suffix: take letters and digits, as in B or 2'],
    ['no suffix', { suffix: '' }, 'bad-suffix: “” cannot be a suffix: take letters and digits, as in B or 2'],
    ['names that are taken', { suffix: 'A' }, 'name-taken: P_A is in the sheet already; take another suffix, B is free'],
    ['a connection to no given', { connect: [{ name: 'Q_B', formula: 'P_A' }] }, 'unknown-name: the block has no given Q_B'],
    [
      'a connection to what is calculated',
      { connect: [{ name: 'y', formula: 'P_A' }] },
      'computed-name: y is calculated in the block and cannot be connected; connect a given of it',
    ],
    [
      'a given connected twice',
      {
        connect: [
          { name: 'P', formula: 'P_A' },
          { name: 'P_B', formula: 'P_A' },
        ],
      },
      'connected-twice: P_B is connected twice; one formula says what it is',
    ],
    ['a connection to a name that is not there', { connect: [{ name: 'P', formula: 'P_Q' }] }, 'unknown-name: P_B: '],
    ['a connection of another kind', { connect: [{ name: 'P', formula: 'd_A' }] }, 'P_B: '],
    ['a connection in a loop', { connect: [{ name: 'P', formula: 'y_B*"1 kW"' }] }, 'loop: P_B: '],
  ])('is refused with one sentence: %s', (_what, options, expected) => {
    const found = refused(sheetOf(['P_A = 3 kW', 'd_A = 2 m']), small('P = 2 kW', 'y := P/"1 kW"'), options);
    expect(found.length).toBeGreaterThan(0);
    expect(found[0]).toContain(expected);
  });

  it('does not connect a given that a sought cell of the block varies', () => {
    const block: Sheet = {
      ...small('F = 2 kN', 'y := 2*F'),
      cells: [
        ...small('F = 2 kN', 'y := 2*F').cells,
        { id: 's', kind: 'sought', name: 'F_x', instead: 'F', where: 'y = "3 kN"', between: '1 kN to 9 kN' },
      ],
    };
    expect(inserted(sheetOf(['F_A = 1 kN']), block).sheet.cells.find(({ id }) => id === 's-B')).toMatchObject({
      instead: 'F_B',
      where: 'y_B = "3 kN"',
    });
    expect(refused(sheetOf(['F_A = 1 kN']), block, { connect: [{ name: 'F', formula: 'F_A' }] })[0]).toContain(
      'bad-instead: F_x_B: F_B is not a given',
    );
  });
});
