// An angle without its unit: 40 where 40° is meant is an angle of 40 rad, six turns and more. ISO 80000-3: the radian is the number one,
// so the value reads well; the warning is all that stands between it and the result.

import { describe, expect, it } from 'vitest';
import { type Cell, calculate } from '../../src/sheet/index.ts';

const given = (value: string, more: Partial<Extract<Cell, { kind: 'given' }>> = {}): Cell => ({
  id: 'g1',
  kind: 'given',
  name: 'alpha',
  value,
  ...more,
});
const problems = (cell: Cell) =>
  calculate({ format: 'tightside-sheet/1', title: 'A sheet', cells: [cell] })
    .problems()
    .map(({ code, severity, message, fixes }) => ({ code, severity, message, fixes: fixes?.map((fix) => fix.text) }));

describe('an angle typed as a bare number', () => {
  it.each([
    ['40', { unit: 'deg' }, 'deg'],
    ['40', { range: '20° to 180°' }, '°'],
    ['0.6', { unit: '°' }, '°'],
    ['34', { unit: 'gon' }, 'gon'],
  ] as const)('%s with %j warns and offers both readings', (value, more, unit) => {
    const found = problems(given(value, more)).filter((one) => one.code === 'bare-angle');
    expect(found).toHaveLength(1);
    expect(found[0]).toMatchObject({ severity: 'warning' });
    expect(found[0]?.message).toContain(`${value} without a unit is an angle in rad`);
    const shown = unit === 'deg' ? ['40 deg', '40°'] : [unit === '°' ? `${value}°` : `${value} ${unit}`];
    expect(shown).toContain(found[0]?.fixes?.[0]);
    expect(found[0]?.fixes?.[1]).toBe(`${value} rad`);
  });

  it.each([
    ['40°', { unit: 'deg' }],
    ['0.6 rad', { unit: 'deg' }],
    ['0', { unit: 'deg' }],
    ['3.14', { unit: 'rad' }],
    ['40', {}],
    ['0.3', { range: '0.1 to 0.5' }],
  ] as const)('%s with %j says nothing', (value, more) => {
    expect(problems(given(value, more)).filter((one) => one.code === 'bare-angle')).toEqual([]);
  });

  it('in one case names that case alone', () => {
    const cases = [
      { id: 'run', title: 'Running' },
      { id: 'start', title: 'Start' },
    ];
    const cell = given('40°', { unit: 'deg', byCase: { start: '35' } });
    const all = calculate({ format: 'tightside-sheet/1', title: 'A sheet', cases, cells: [cell] }).problems();
    expect(all.filter((one) => one.code === 'bare-angle')).toMatchObject([{ case: 'start', field: 'byCase.start' }]);
  });
});
