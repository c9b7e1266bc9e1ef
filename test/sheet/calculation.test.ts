import { describe, expect, it } from 'vitest';
import { type Calculation, calculate } from '../../src/sheet/index.ts';
import { sheetOf, withLine } from './build.ts';

const si = (calculation: Calculation, name: string) => [...(calculation.named(name)?.si ?? [])];
const messages = (calculation: Calculation) => calculation.problems().map((problem) => `${problem.cell}: ${problem.message}`);

describe('values', () => {
  it('follow from givens in coherent SI', () => {
    const calculation = calculate(sheetOf(['d = 200 mm', 'n = 1450 r/min', 'v [m/s] := pi*d*n']));
    // pi × 0.2 m × 1450/60 s⁻¹, by hand
    expect(si(calculation, 'v')[0]).toBeCloseTo((Math.PI * 0.2 * 1450) / 60, 12);
    expect(calculation.problems()).toEqual([]);
  });

  it('may be used above the line that defines them, with a warning that names the line', () => {
    const calculation = calculate(sheetOf(['b := 2*a', 'a = 3 m']));
    expect(si(calculation, 'b')).toEqual([6]);
    expect(messages(calculation)).toEqual([
      'b: a is used here above the line that defines it (see 2 below); move one of the two if the sheet should read downwards',
    ]);
  });

  it('of a temperature reading without a declared unit stay a reading', () => {
    const calculation = calculate(sheetOf(['T_a = 20 °C', 'T_b = 80 °C', 'T_m := T_a + (T_b - T_a)/2', 'dT := T_b - T_a']));
    expect(calculation.state('T_m')).toMatchObject({ unit: { text: '°C' } });
    expect(si(calculation, 'T_m')[0]).toBeCloseTo(323.15, 10);
    expect(calculation.state('dT')).toMatchObject({ unit: { text: 'K' } });
  });

  it('stand side by side, one for each case', () => {
    const sheet = sheetOf(['K = 1.0', 'P = 2 kW', 'Q [kW] := K*P', 'Q <= P'], { cases: [{ id: 'run' }, { id: 'start' }] });
    const cells = sheet.cells.map((cell) =>
      cell.id === 'K' ? { ...cell, kind: 'given' as const, name: 'K', value: '1.0', byCase: { start: '1.5' } } : cell,
    );
    const calculation = calculate({ ...sheet, cells });
    expect(si(calculation, 'Q')).toEqual([2000, 3000]);
    expect(calculation.state('k3')).toMatchObject({ met: [true, false], utilisation: [1, 1.5] });
  });
});

describe('what is calculated again', () => {
  const chain = () => calculate(sheetOf(['a = 1 m', 'b = 2 m', 'c := 2*a', 'd := 2*b', 'w := c + d', 'w <= c', 'a note']));

  it('is only what depends on the change, each cell once, in order', () => {
    const calculation = chain();
    calculation.update(withLine(calculation.sheet, 'a', 'a = 3 m'));
    expect(calculation.ran).toEqual(['a', 'c', 'w', 'k5']);
    expect(si(calculation, 'w')).toEqual([10]);
  });

  it('stops where a result comes out the same', () => {
    const calculation = calculate(sheetOf(['a = 1 m', 'b := abs(a)', 'c := 2*b']));
    calculation.update(withLine(calculation.sheet, 'a', 'a = -1 m'));
    expect(calculation.ran).toEqual(['a', 'b']);
  });

  it('is nothing for a title, a source or a note', () => {
    const calculation = chain();
    const cells = calculation.sheet.cells.map((cell) =>
      cell.kind === 'note' ? { ...cell, text: 'another note' } : { ...cell, title: 'A title' },
    );
    calculation.update({ ...calculation.sheet, cells: cells as typeof calculation.sheet.cells });
    expect(calculation.ran.filter((id) => calculation.state(id)?.kind === 'derived')).toEqual([]);
  });

  it('is the cell itself and what follows when a formula changes', () => {
    const calculation = chain();
    calculation.update(withLine(calculation.sheet, 'c', 'c := 3*a'));
    expect(calculation.ran).toEqual(['c', 'w', 'k5']);
    expect(si(calculation, 'w')).toEqual([7]);
  });

  it('tells which cells moved', () => {
    const calculation = chain();
    const changed = calculation.update(withLine(calculation.sheet, 'b', 'b = 5 m'));
    expect([...changed]).toEqual(['b', 'd', 'w', 'k5']);
    expect(changed.has('c')).toBe(false);
    expect(changed.size).toBe(4);
  });

  it('takes a change of dimension to whoever uses it', () => {
    const calculation = calculate(sheetOf(['a = 1 m', 'b = 1 m', 'c := a + b', 'd := 2*c']));
    calculation.update(withLine(calculation.sheet, 'a', 'a = 1 s'));
    expect(calculation.state('c')?.problems[0]?.code).toBe('unlike-sum');
    expect(calculation.state('d')?.problems[0]?.message).toBe('waits for c, step 3, which has no value yet');
    calculation.update(withLine(calculation.sheet, 'a', 'a = 4 m'));
    expect(si(calculation, 'd')).toEqual([10]);
    expect(calculation.problems()).toEqual([]);
  });
});

describe('trouble', () => {
  it('in one cell leaves the rest of the sheet standing', () => {
    const calculation = calculate(sheetOf(['a = 1 m', 'z = 0 m', 'b := a/z', 'c := 2*b', 'd := 3*a']));
    expect(calculation.state('b')?.problems[0]?.code).toBe('division-by-zero');
    expect(calculation.state('c')?.problems[0]?.message).toBe('waits for b, step 3, which has no value yet');
    expect(si(calculation, 'd')).toEqual([3]);
  });

  it('in one case leaves the other case standing', () => {
    const sheet = sheetOf(['x = 0.5', 'y := asin(x)', 'w := 2*y'], { cases: [{ id: 'run' }, { id: 'start' }] });
    const cells = sheet.cells.map((cell) =>
      cell.id === 'x' ? { id: 'x', kind: 'given' as const, name: 'x', value: '0.5', byCase: { start: '1.2' } } : cell,
    );
    const calculation = calculate({ ...sheet, cells });
    expect(si(calculation, 'y')[0]).toBeCloseTo(Math.PI / 6, 15);
    expect(si(calculation, 'y')[1]).toBeNaN();
    expect(calculation.state('y')?.problems.map((problem) => problem.case)).toEqual(['start']);
    expect(calculation.state('w')?.problems).toMatchObject([{ code: 'waits-for', case: 'start' }]);
    calculation.update({
      ...sheet,
      cells: cells.map((cell) => (cell.id === 'x' ? { ...cell, byCase: { start: '1' } } : cell)) as typeof cells,
    });
    expect(si(calculation, 'w')[1]).toBeCloseTo(Math.PI, 15);
    expect(calculation.problems()).toEqual([]);
  });

  it('names a loop, in the words of the sheet, at each of its cells and nowhere else', () => {
    const calculation = calculate(sheetOf(['a := b + c', 'b := 2*a', 'c = 1 m', 'd := a']));
    expect(calculation.state('a')?.problems[0]?.message).toBe(
      'a (1) → b (2) → a use each other in a loop; break it, or make one of them a sought cell with an equation',
    );
    expect(calculation.state('b')?.problems[0]?.code).toBe('loop');
    expect(calculation.state('d')?.problems[0]?.code).toBe('waits-for');
    calculation.update(withLine(calculation.sheet, 'b', 'b = 2 m'));
    expect(si(calculation, 'd')).toEqual([3]);
  });

  it('of a name that stands twice is told at the second, and the first goes on', () => {
    const sheet = sheetOf(['a = 1 m', 'b := 2*a']);
    const calculation = calculate({ ...sheet, cells: [...sheet.cells, { id: 'x', kind: 'given', name: 'a', value: '5 m' }] });
    expect(calculation.state('x')?.problems[0]?.message).toBe('the quantity a is already defined at 1; rename one of the two');
    expect(si(calculation, 'b')).toEqual([2]);
  });

  it('of a missing name goes away when the name appears, and comes back when it is renamed', () => {
    const calculation = calculate(sheetOf(['a = 1 m', 'c := 2*x_1']));
    expect(calculation.state('c')?.problems[0]?.code).toBe('unknown-name');
    const more = {
      ...calculation.sheet,
      cells: [...calculation.sheet.cells, { id: 'x', kind: 'given' as const, name: 'x_1', value: '4 m' }],
    };
    calculation.update(more);
    expect(si(calculation, 'c')).toEqual([8]);
    calculation.update({
      ...more,
      cells: more.cells.map((cell) => (cell.id === 'x' ? { ...cell, name: 'x_2' } : cell)) as typeof more.cells,
    });
    expect(calculation.state('c')?.problems[0]?.message).toContain('x_2');
  });

  it('of a branch that is not taken is no trouble', () => {
    const calculation = calculate(sheetOf(['z = 0 m', 'a = 1 m', 'b := z == 0 ? 0 : a/z']));
    expect(si(calculation, 'b')).toEqual([0]);
    expect(calculation.problems()).toEqual([]);
  });

  it.each(['constructor', 'toString', 'hasOwnProperty', 'valueOf', 'prototype', 'arguments'])(
    'does not come from a quantity called %s',
    (name) => {
      const calculation = calculate(sheetOf([`${name} = 2 m`, `b := 3*${name}`]));
      expect(si(calculation, 'b')).toEqual([6]);
    },
  );

  it('of an unreadable value is told with the nearest unit', () => {
    const calculation = calculate(sheetOf(['P = 15 KW', 'Q := 2*P']));
    expect(calculation.state('P')?.problems[0]?.message).toContain('kW');
    expect(calculation.state('Q')?.problems[0]?.code).toBe('waits-for');
  });
});

describe('a state that was looked at', () => {
  const sheet = sheetOf(['a = 1 m', 'b := 2*a', 'c := 3*a']);
  const withA = (value: string) => ({
    ...sheet,
    cells: sheet.cells.map((cell) => (cell.kind === 'given' ? { ...cell, value } : cell)),
  });
  const note = { id: 'note', kind: 'note', text: 'words' } as const;

  it('is not told again after its value moved unseen and a row came', () => {
    const calculation = calculate(sheet);
    expect(si(calculation, 'b')).toEqual([2]);
    const moved = withA('5 m');
    calculation.update(moved);
    calculation.update({ ...moved, cells: [...moved.cells, note] });
    expect(si(calculation, 'b')).toEqual([10]);
  });

  it('tells its new place after a row came that has no number', () => {
    const calculation = calculate(sheet);
    expect(calculation.state('c')?.index).toBe(2);
    calculation.update({ ...sheet, cells: [note, ...sheet.cells] });
    expect(calculation.state('c')?.index).toBe(3);
  });
});

describe('size', () => {
  it('of a chain of 50 000 definitions, written upside down, is no trouble', () => {
    const lines = Array.from({ length: 50_000 }, (_, i) => (i === 49_999 ? 'q_49999 = 1 m' : `q_${i} := q_${i + 1} + "1 m"`));
    const calculation = calculate(sheetOf(lines));
    expect(si(calculation, 'q_0')).toEqual([50_000]);
  }, 60_000);
});
