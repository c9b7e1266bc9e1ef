// What a user can get wrong in a sheet made from a template: one sentence at the cell that says where, what, and what to do.
//
// 1. Every kind of trouble is made on a real template; cells that only wait for the spoiled one say so and are left out here.
// Not here: reading of values (test/quantity), the solver alone (test/study).

import { describe, expect, test } from 'vitest';
import { type Cell, calculate, type Sheet } from '../../src/sheet/index.ts';
import { solver } from '../../src/study/index.ts';
import { sheetOf } from './harness.ts';

/** With plain spaces, where a number and its unit have one that does not break. */
const spaced = (text: string): string => text.replace(/[\u00a0\u202f]/gu, ' ');

function troubleOf(sheet: Sheet): readonly string[] {
  return calculate(sheet, solver)
    .problems()
    .filter((problem) => problem.code !== 'waits-for' && problem.severity === 'error')
    .map((problem) => `${problem.cell}: ${spaced(problem.message)}`)
    .filter((text, at, all) => all.indexOf(text) === at);
}

function change(id: string, cellId: string, changed: (cell: Cell) => Cell): Sheet {
  const sheet = sheetOf(id);
  if (!sheet.cells.some((cell) => cell.id === cellId)) throw new Error(`${id} has no cell ${cellId}`);
  return { ...sheet, cells: sheet.cells.map((cell) => (cell.id === cellId ? changed(cell) : cell)) };
}

const withValue = (id: string, name: string, value: string) =>
  change(id, name, (cell) => {
    if (cell.kind !== 'given') throw new Error(`${name} is no given`);
    const { byCase: _, ...rest } = cell;
    return { ...rest, value };
  });

const withRows = (id: string, table: string, rows: (rows: readonly (readonly string[])[]) => readonly (readonly string[])[]) =>
  change(id, table, (cell) => (cell.kind === 'table' ? { ...cell, rows: rows(cell.rows) } : cell));

const withRange = (id: string, cellId: string, between: string) =>
  change(id, cellId, (cell) => (cell.kind === 'sought' ? { ...cell, between } : cell));

const notMet = (sheet: Sheet, cellId: string) => {
  const state = calculate(sheet, solver).state(cellId);
  return state?.kind === 'criterion' && state.met.includes(false) ? state.cell.ifNotMet : undefined;
};

describe('impossible geometry', () => {
  test('pulleys that overlap are said to, in a criterion', () => {
    const sheet = withValue('flat-belt-open', 'C', '300 mm');
    expect(notMet(sheet, 'overlap')).toMatch(
      /^The pulleys overlap: the centre distance C must exceed half the sum of the diameters/,
    );
    expect(troubleOf(sheet)).toEqual([]);
  });

  test('a pulley inside the other has no tangent: the angle says why', () => {
    const sheet = withValue('flat-belt-open', 'C', '100 mm');
    expect(troubleOf(sheet)).toEqual([
      'beta: asin(1.5): no angle has a sine beyond 1; (d_2 - d_1)/(2·C) must lie between −1 and 1',
    ]);
    expect(notMet(sheet, 'overlap')).toMatch(/Increase C/);
  });

  test('three pulleys over each other fail at the span between them', () => {
    const sheet = withValue('three-pulleys', 'x_B', '50 mm');
    expect(troubleOf(sheet)[0]).toMatch(/^s_AB: root of a negative number: C_AB\^2 - \(\(d_A - d_B\)\/2\)\^2 is −/);
  });
});

describe('a unit that is apart by 2π', () => {
  test.each([
    ['belt-creep', 'n_1', '20 rad/s', /^n_1: 20 rad\/s is .*one revolution is 2π rad; give the value in r\/min$/],
    ['belt-creep', 'n_1', '1200 deg/s', /^n_1: .*one revolution is 2π rad/],
    ['span-frequency', 'f', '200 rad/s', /^f: .*one revolution is 2π rad; give the value in Hz$/],
    ['capstan', 'alpha', '0.5 r', /^alpha: .*one revolution is 2π rad/],
  ] as const)('%s: %s = %s is refused', (id, name, value, sentence) => {
    expect(troubleOf(withValue(id, name, value))[0]).toMatch(sentence);
  });

  test.each([
    ['n_1', '24 r/s'],
    ['n_1', '1450 1/min'],
    ['n_1', '24 Hz'],
  ] as const)('belt-creep: %s = %s is read', (name, value) => {
    expect(troubleOf(withValue('belt-creep', name, value))).toEqual([]);
  });
});

describe('a case that the method is not made for', () => {
  test.each([
    ['brake-stop-heat', 'h_drop', '-50 m', 'takes-up', /^The raised load stops the masses/],
    ['conveyor-pulley', 'F_U', '-5 kN', 'pulls', /^The belt drives the pulley/],
    ['traction-sheave', 'r', '1.5', 'whole', /^A reeving/],
    ['v-belt', 'd_1', '300 mm', 'groove-size-1', /^A pulley of this size/],
  ] as const)('%s: %s = %s is said to be one', (id, name, value, criterion, sentence) => {
    expect(notMet(withValue(id, name, value), criterion)).toMatch(sentence);
  });
});

describe('a brake that locks itself', () => {
  const sheet = withValue('band-brake-differential', 'mu', '0.45');

  test('is said to, in a criterion; forces have no number, and the lever force needed is negative', () => {
    expect(notMet(sheet, 'no-lock')).toMatch(/^The brake locks itself/);
    expect(troubleOf(sheet)).toEqual(['F_slack: division by zero: a_eff is 0 mm in F·l/a_eff; check what makes it vanish']);
    const calculation = calculate(sheet, solver);
    // 2·150 N·m·(100 − 7.124 197·20) mm/(400 mm·700 mm·6.124 197), with e^(0.45·250°) = 7.124 197
    expect(calculation.named('F_req')?.si[0]).toBeCloseTo((2 * 150 * (0.1 - 7.124197 * 0.02)) / (0.4 * 0.7 * 6.124197), 4);
    expect(calculation.named('F_slack')?.si[0]).toBeNaN();
  });
});

describe('tables', () => {
  test.each<[string, Sheet, string]>([
    [
      'a ragged row',
      withRows('flat-belt-open', 't-friction', ([first = [], ...rest]) => [first.slice(0, 1), ...rest]),
      't-friction: row 1 has 1 entry, the table has 2 columns; fill or remove the difference',
    ],
    [
      'an entry that is no number',
      withRows('flat-belt-open', 't-friction', ([first = [], ...rest]) => [[first[0] ?? '', 'dry'], ...rest]),
      't-friction: row 1, column mu: “dry” does not begin with a number: write a number and its unit, such as 15 kW.',
    ],
    [
      'an empty entry',
      withRows('capstan', 't-surfaces', ([first = [], ...rest]) => [[first[0] ?? '', '', '0.3'], ...rest]),
      't-surfaces: row 1, column mu_low: There is no value: write a number and its unit, such as 15 kW.',
    ],
  ])('%s is named by its row', (_, sheet, message) => {
    expect(troubleOf(sheet)[0]).toBe(message);
  });

  test('an axis that is not sorted is named where it is interpolated', () => {
    const sheet = sheetOf('flat-belt-open');
    const curve: Cell[] = [
      {
        id: 'curve',
        kind: 'table',
        name: 'curve',
        columns: [
          { name: 'speed', unit: 'm/s' },
          { name: 'share', unit: '1' },
        ],
        rows: [
          ['0', '1'],
          ['20', '0.8'],
          ['10', '0.9'],
        ],
        source: 'x',
      },
      { id: 'share', kind: 'derived', name: 'x_v', formula: 'interpolate(curve, share, v)', unit: '1', source: 'x' },
    ];
    expect(troubleOf({ ...sheet, cells: [...sheet.cells, ...curve] })).toContain(
      'share: cannot interpolate in curve: its keys (speed) must rise or fall from row to row; sort the rows and remove doubles',
    );
  });
});

describe('inverse questions', () => {
  test.each<[string, Sheet, RegExp]>([
    [
      'no root in the range',
      withRange('flat-belt-open', 'F_0x', '1 N to 500 N'),
      /^F_0x: no value of F_0 from 1 N to 500 N fulfils S_slip = S_req: the left side stays less than the right side throughout; widen the range, or check the equation$/,
    ],
    [
      'a range written backwards',
      withRange('flat-belt-open', 'C_up', '200 m to 10 mm'),
      /^C_up: The range “200 m to 10 mm” begins above its end: write the lower value first\.$/,
    ],
    [
      'a range of another kind',
      withRange('flat-belt-open', 'C_up', '10 N to 200 N'),
      /^C_up: C_up is a length \(mm\), the range to look in is a force \(N\); give both one kind$/,
    ],
    [
      'a jump instead of a root',
      withRange('band-brake-differential', 'mu_M', '-0.5 to 0.1'),
      /^mu_M: from -0\.5 to 0\.1 the two sides of F_req = F jump past each other without meeting \(a pole or a gap\); choose a range on one side of the jump$/,
    ],
  ])('%s', (_, sheet, message) => {
    expect(
      troubleOf(sheet).some((text) => message.test(text)),
      troubleOf(sheet).join('\n'),
    ).toBe(true);
  });

  test('more than one root is a warning that lists them', () => {
    const sheet = change('flat-belt-open', 'F_0x', (cell) =>
      cell.kind === 'sought'
        ? { ...cell, unit: 'r/min', instead: 'n_1', where: 'P_0 = K_A*P', between: '1 r/min to 20000 r/min' }
        : cell,
    );
    expect(troubleOf(sheet)).toEqual([]);
    const warnings = calculate(sheet, solver)
      .state('F_0x')
      ?.problems.map(({ severity, message }) => `${severity}: ${spaced(message)}`);
    expect(warnings?.[0]).toMatch(
      /^warning: 2 values from 1 r\/min to 20000 r\/min fulfil P_0 = K_A\*P: .* r\/min; .* r\/min; the lowest is taken, narrow the range to take another$/,
    );
  });

  test('a question that rests on a line without a value waits for that line', () => {
    const state = calculate(withValue('flat-belt-open', 'C', '100 mm'), solver).state('F_0x');
    expect(state?.problems[0]?.message).toBe('waits for k, step 5.9, which has no value yet');
  });
});
