import { readFileSync } from 'node:fs';
import { describe, expect, it } from 'vitest';
import { type Calculation, type Cell, calculate, readSheet, type Sheet } from '../../src/sheet/index.ts';
import { solver } from '../../src/study/index.ts';
import { cellOf } from '../sheet/build.ts';

type Sought = Omit<Extract<Cell, { kind: 'sought' }>, 'id' | 'kind'>;

function sheetWith(lines: readonly string[], sought: Sought, cases?: Sheet['cases']): Sheet {
  const cells: Cell[] = [...lines.map(cellOf), { id: 's', kind: 'sought', ...sought }];
  return { format: 'tightside-sheet/1', title: 'Sought', cells, ...(cases ? { cases } : {}) };
}

const solve = (sheet: Sheet) => calculate(sheet, solver);
const root = (calculation: Calculation) => calculation.named('x')!.si[0]!;
const problem = (calculation: Calculation) => calculation.state('s')?.problems[0];

describe('a sought quantity', () => {
  // Transcendental roots recomputed with 40 digits.
  it.each([
    ['x*tan(x) = 1', '0.1 to 1.5', 0.8603335890193798],
    ['cos(x) = x', '0 to 1', 0.7390851332151607],
    ['x*tanh(x) = 1', '0.5 to 2', 1.1996786402577337],
  ])('%s', (where, between, expected) => {
    const calculation = solve(sheetWith([], { name: 'x', where, between }));
    expect(Math.abs(root(calculation) - expected)).toBeLessThan(4e-16);
    expect(calculation.problems()).toEqual([]);
  });

  it('keeps its unit, and what uses it follows', () => {
    // h from V = π d² h/4 with V = 1 l, d = 100 mm: 0.127324 m, by hand
    const calculation = solve(
      sheetWith(['d = 100 mm', 'V = 1 L', 'm := 2*x'], {
        name: 'x',
        unit: 'mm',
        where: 'pi*d^2*x/4 = V',
        between: '1 mm to 2 m',
      }),
    );
    expect(root(calculation)).toBeCloseTo(0.004 / (Math.PI * 0.01), 14);
    expect(calculation.named('m')!.si[0]).toBeCloseTo(2 * root(calculation), 15);
    expect(calculation.named('x')!.unit?.text).toBe('mm');
  });

  it('closes a circle of definitions with its equation', () => {
    // y = 2 x + 1 and x = y²/10 − 1 … : x − (2x + 1)²/10 + 1 = 0 has the roots (6 ± √(36 + 4·4·9))/8, by hand
    const calculation = solve(sheetWith(['y := 2*x + 1'], { name: 'x', where: 'x = y^2/10 - 1', between: '0 to 10' }));
    expect(root(calculation)).toBeCloseTo((6 + Math.sqrt(36 + 144)) / 8, 13);
    expect(calculation.named('y')!.si[0]).toBeCloseTo(2 * root(calculation) + 1, 13);
  });

  it('is looked for by varying a given, and the given stays as typed', () => {
    const lines = ['F_0 = 100 N', 'F_u = 50 N', 'F_1 := F_0 + F_u/2', 'F_1lim = 300 N'];
    const calculation = solve(sheetWith(lines, { name: 'x', instead: 'F_0', where: 'F_1 = F_1lim', between: '10 N to 20 kN' }));
    expect(root(calculation)).toBeCloseTo(275, 10);
    expect(calculation.named('F_1')!.si[0]).toBe(125);
    expect(calculation.state('s')).toMatchObject({ kind: 'sought', unit: { text: 'N' } });
  });

  it('is found in each case by itself', () => {
    const sheet = sheetWith(
      ['F_0 = 100 N', 'F_u = 50 N', 'F_1 := F_0 + F_u/2'],
      { name: 'x', instead: 'F_0', where: 'F_1 = "300 N"', between: '10 N to 1 kN' },
      [{ id: 'run' }, { id: 'start' }],
    );
    const cells = sheet.cells.map((cell) =>
      cell.kind === 'given' && cell.name === 'F_u' ? { ...cell, byCase: { start: '100 N' } } : cell,
    );
    const calculation = solve({ ...sheet, cells });
    expect([...calculation.named('x')!.si].map((value) => Math.round(value * 1e9) / 1e9)).toEqual([275, 250]);
  });

  it('agrees with the forward question of the flat belt to 1e-9, in both cases', () => {
    const read = readSheet(readFileSync('templates/flat-belt-open.sheet.json', 'utf8'));
    if (!read.ok) throw new Error('the template cannot be read');
    const sought: Cell = {
      id: 's',
      kind: 'sought',
      name: 'x',
      instead: 'F_0',
      where: 'S_slip = S_req',
      between: '10 N to 100 kN',
    };
    const calculation = solve({ ...read.value, cells: [...read.value.cells, sought] });
    // F_0req is the same question solved by algebra.
    const algebra = calculation.named('F_0req')!.si;
    for (const [index, value] of calculation.named('x')!.si.entries())
      expect(Math.abs(value / algebra[index]! - 1)).toBeLessThan(1e-9);
    // And forward: with F_0 typed in, S_slip is S_req.
    const found = calculation.named('x')!.si[0]!;
    const cells = read.value.cells.map((cell) =>
      cell.kind === 'given' && cell.name === 'F_0' ? { ...cell, value: `${found} N` } : cell,
    );
    const forward = calculate({ ...read.value, cells });
    expect(Math.abs(forward.named('S_slip')!.si[0]! / forward.named('S_req')!.si[0]! - 1)).toBeLessThan(1e-9);
  });

  it('follows every edit like a fresh calculation', () => {
    const lines = ['F_0 = 100 N', 'F_u = 50 N', 'F_1 := F_0 + F_u/2', 'F_1lim = 300 N', 'q := 2*x'];
    const sheet = sheetWith(lines, { name: 'x', instead: 'F_0', where: 'F_1 = F_1lim', between: '10 N to 20 kN' });
    const kept = solve(sheet);
    for (const [name, value] of [
      ['F_u', '80 N'],
      ['F_1lim', '500 N'],
      ['F_1lim', '1 N'],
      ['F_1lim', '2 m'],
      ['F_1lim', '400 N'],
      ['F_u', 'fifty'],
      ['F_u', '60 N'],
      ['F_0', ''],
      ['F_0', '7 N'],
    ] as const) {
      const cells = kept.sheet.cells.map((cell) => (cell.kind === 'given' && cell.name === name ? { ...cell, value } : cell));
      kept.update({ ...sheet, cells });
      const fresh = solve({ ...sheet, cells });
      expect([...kept.named('q')!.si]).toEqual([...fresh.named('q')!.si]);
      expect(kept.problems()).toEqual(fresh.problems());
      expect(kept.state('s')).toEqual(fresh.state('s'));
    }
  });
});

describe('several roots, or none', () => {
  it('says how many there are, and takes the lowest', () => {
    const calculation = solve(sheetWith([], { name: 'x', where: 'x^2 - 3*x + 2 = 0', between: '0 to 10' }));
    expect(root(calculation)).toBeCloseTo(1, 14);
    expect(problem(calculation)).toMatchObject({ code: 'several-roots', severity: 'warning' });
    expect(problem(calculation)?.message).toBe(
      '2 values from 0 to 10 fulfil x^2 - 3*x + 2 = 0: 1.000; 2.000; the lowest is taken, narrow the range to take another',
    );
  });

  it('says where every value will do', () => {
    const calculation = solve(sheetWith([], { name: 'x', where: 'max(x, 2) = 2', between: '0 to 4' }));
    expect(problem(calculation)).toMatchObject({ code: 'equal-throughout', severity: 'warning' });
    expect(problem(calculation)?.message).toBe(
      'every value tried from 0 to 2.000 fulfils max(x, 2) = 2 within the precision of numbers; the middle is taken, and no value there is better than another',
    );
    expect(root(calculation)).toBe(1);
  });

  it.each([
    [
      'x^2 + 1 = 0',
      '-1 to 1',
      'not-bracketed',
      'no value of x from -1 to 1 fulfils x^2 + 1 = 0: the left side stays greater than the right side throughout; widen the range, or check the equation',
    ],
    [
      '1/x = 0',
      '-1 to 1.5',
      'pole',
      'from -1 to 1.5 the two sides of 1/x = 0 jump past each other without meeting (a pole or a gap); choose a range on one side of the jump',
    ],
    ['x + 1', '0 to 1', 'no-equation', '“x + 1” must hold exactly one = between two formulas, as in S_slip = S_req'],
    ['x = 1 = x', '0 to 1', 'no-equation', '“x = 1 = x” must hold exactly one = between two formulas, as in S_slip = S_req'],
    ['2 = 3', '0 to 1', 'not-in-equation', '2 = 3 does not depend on x, so no value of it can make the two sides equal'],
  ])('%s between %s ends in one sentence', (where, between, code, message) => {
    const calculation = solve(sheetWith([], { name: 'x', where, between }));
    expect(problem(calculation)).toMatchObject({ code, severity: 'error', message });
    expect(root(calculation)).toBeNaN();
  });

  it('refuses two sought cells on one path', () => {
    const sheet = sheetWith(['a = 1', 'b := a + y'], { name: 'x', instead: 'a', where: 'b = 5', between: '0 to 10' });
    const second: Cell = { id: 't', kind: 'sought', name: 'y', where: 'y^2 = a', between: '0 to 10' };
    const calculation = solve({ ...sheet, cells: [...sheet.cells, second] });
    expect(calculation.state('s')?.problems.map((one) => one.code)).toContain('sought-twice');
  });

  it('names a given that does not exist, and a quantity that is no given', () => {
    expect(
      problem(
        solve(
          sheetWith(['F_0 = 1 N', 'F_1 := 2*F_0'], { name: 'x', instead: 'F_O', where: 'F_1 = "3 N"', between: '0 N to 9 N' }),
        ),
      )?.message,
    ).toBe('no quantity of this sheet is called F_O, and only a given can be varied; the nearest is F_0');
    expect(
      problem(
        solve(
          sheetWith(['F_0 = 1 N', 'F_1 := 2*F_0'], { name: 'x', instead: 'F_1', where: 'F_1 = "3 N"', between: '0 N to 9 N' }),
        ),
      )?.code,
    ).toBe('bad-instead');
  });

  it('names both kinds where the range does not fit', () => {
    expect(
      problem(solve(sheetWith(['F_0 = 1 N'], { name: 'x', instead: 'F_0', where: 'F_0 = "3 N"', between: '0 m to 9 m' })))
        ?.message,
    ).toBe('x is a force (N), the range to look in is a length (m); give both one kind');
  });

  it('whoever uses a sought quantity without a value waits for it', () => {
    const calculation = solve(sheetWith(['w := 2*x'], { name: 'x', where: 'x^2 + 1 = 0', between: '0 to 1' }));
    expect(calculation.state('w')?.problems.map((one) => one.code)).toContain('waits-for');
  });
});
