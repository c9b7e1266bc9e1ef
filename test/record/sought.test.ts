import { describe, expect, it } from 'vitest';
import { makeRecord, recordJson } from '../../src/record/index.ts';
import { type Cell, calculate } from '../../src/sheet/index.ts';
import { solver } from '../../src/study/index.ts';
import { sheetOf } from '../sheet/build.ts';

const sought: Cell = {
  id: 's',
  kind: 'sought',
  name: 'F_0x',
  title: 'Installed tension for the allowable force',
  instead: 'F_0',
  where: 'F_1 = F_1lim',
  between: '10 N to 20 kN',
  source: 'derived here',
};
const lines = ['F_0 = 100 N', 'F_u = 50 N', 'F_1 := F_0 + F_u/2', 'F_1lim = 300 N'];

describe('a sought quantity in the record', () => {
  const record = () => makeRecord(calculate(sheetOf([...lines], { more: [sought] }), solver));

  it('prints its value, its equation with the value put back, and how it was found', () => {
    const step = record().steps.find((one) => one.cell === 's')!;
    // F_0 + 50 N/2 = 300 N, by hand
    expect(step.cases[0]).toMatchObject({ result: '275.0\u00a0N', calculatorResult: '275.0', closes: true });
    expect(step.cases[0]!.substituted).toBe('300.0\\,\\mathrm{N} = 300.0\\,\\mathrm{N}');
    expect(step.notes.join(' ')).toMatch(
      /^F_0 varied, the sheet itself keeps its value; one root, sought from 10 N to 20 kN after Brent 1973: \d+ iterations, residual /u,
    );
  });

  it('stands among the steps of the JSON form, and what uses it closes', () => {
    const use: Cell = { id: 'w', kind: 'derived', name: 'w', formula: '3*F_0x', unit: 'N' };
    const json = recordJson(makeRecord(calculate(sheetOf([...lines], { more: [sought, use] }), solver)));
    expect(json.unsolved).toEqual([]);
    expect(json.steps.find((step) => step.cell === 's')).toMatchObject({ name: 'F_0x' });
    expect(json.steps.find((step) => step.cell === 'w')?.cases[0]).toMatchObject({ result: '825.0\u00a0N', closes: true });
  });

  it('without a value is listed as unsolved with its reason', () => {
    const json = recordJson(
      makeRecord(calculate(sheetOf([...lines], { more: [{ ...sought, between: '10 N to 20 N' }] }), solver)),
    );
    expect(json.unsolved).toMatchObject([{ cell: 's', name: 'F_0x' }]);
    expect(json.problems.find((problem) => problem.cell === 's')?.message).toContain(
      'no value of F_0 from 10 N to 20 N fulfils F_1 = F_1lim',
    );
  });
});
