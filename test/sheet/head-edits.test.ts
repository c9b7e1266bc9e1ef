// What belongs to the sheet as a whole, changed so that the lines go with it; each change is taken back whole.

import { describe, expect, it } from 'vitest';
import {
  addReference,
  applyEdit,
  calculate,
  changeReference,
  changeSetting,
  changeTitleBlock,
  type Edit,
  moveReference,
  newReferenceId,
  referenceIdFault,
  removeReference,
  type Sheet,
} from '../../src/sheet/index.ts';

const sheet: Sheet = {
  format: 'tightside-sheet/1',
  title: 'Bar',
  method: 'after [R1]; not [R10]',
  titleBlock: { project: 'Plant' },
  references: [
    { id: 'R1', document: 'Handbook' },
    { id: 'R2', document: 'Drawing 4', edition: 'B' },
  ],
  cells: [
    { id: 'g1', kind: 'given', name: 'a', value: '1.5 m', range: '0.5 m to 2 m', source: '[R1] 2, [R2]' },
    { id: 'd1', kind: 'derived', name: 'b', formula: 'a*"2.5 m" + atan2(a, "1 m")*"1 m^2"', source: 'see [R1]' },
    { id: 'n1', kind: 'note', text: 'The length is 1.5 m, see [R1].' },
  ],
};
const done = (edit: Edit): Sheet => {
  const { sheet: after, inverse } = applyEdit(sheet, edit);
  expect(applyEdit(after, inverse).sheet).toEqual(sheet);
  return after;
};

describe('references', () => {
  it('that get another id take their citations along, and no other', () => {
    const after = done(changeReference(sheet, 0, { id: 'H1', document: 'Handbook' }));
    expect(after.method).toBe('after [H1]; not [R10]');
    expect(after.cells.map((cell) => ('source' in cell ? cell.source : 'text' in cell ? cell.text : ''))).toEqual([
      '[H1] 2, [R2]',
      'see [H1]',
      'The length is 1.5 m, see [H1].',
    ]);
  });
  it('are added under a free id, moved, removed, and the list goes with its last entry', () => {
    expect(newReferenceId(sheet)).toBe('R3');
    expect(done(addReference(sheet, { id: 'R3', document: '' })).references).toHaveLength(3);
    expect(done(moveReference(sheet, 1, 0)).references?.map(({ id }) => id)).toEqual(['R2', 'R1']);
    const one = done(removeReference(sheet, 0));
    expect(one.references?.map(({ id }) => id)).toEqual(['R2']);
    expect(applyEdit(one, removeReference(one, 0)).sheet).not.toHaveProperty('references');
  });
  it.each([
    ['R2', 'already'],
    ['1R', 'cited'],
    ['R 1', 'cited'],
    ['', 'cited'],
    ['Rtoolongid', 'cited'],
  ])('cannot be called %j', (id, why) => {
    expect(referenceIdFault(sheet, id, 'R1')).toContain(why);
  });
  it('may keep their id', () => {
    expect(referenceIdFault(sheet, 'R1', 'R1')).toBeUndefined();
  });
});

describe('settings', () => {
  it('with another decimal sign every number is written with it and means what it meant; words stay', () => {
    const after = done(changeSetting(sheet, 'decimalSign', ','));
    expect(after.cells[0]).toMatchObject({ value: '1,5 m', range: '0,5 m to 2 m' });
    expect(after.cells[1]).toMatchObject({ formula: 'a*"2,5 m" + atan2(a; "1 m")*"1 m^2"'.replace(';', ',') });
    expect(after.cells[2]).toMatchObject({ text: 'The length is 1.5 m, see [R1].' });
    const [before, now] = [sheet, after].map((one) => calculate(one));
    expect(now?.problems().filter(({ severity }) => severity === 'error')).toEqual([]);
    expect([...(now?.named('b')?.si ?? [])]).toEqual([...(before?.named('b')?.si ?? [])]);
    // 1.5 · 2.5 + atan2(1.5, 1) in m², atan2(1.5, 1) = arctan 1.5 = 0.982793723 rad: any table of arctangents.
    expect(now?.named('b')?.si[0]).toBeCloseTo(3.75 + 0.982793723, 8);
  });
  it('are one key each', () => {
    expect(done(changeSetting(sheet, 'digits', 5)).settings).toEqual({ digits: 5 });
  });
});

describe('the title block', () => {
  it('takes a field, gives one back, and goes with its last field', () => {
    expect(done(changeTitleBlock(sheet, 'client', ' Harbour office ')).titleBlock).toEqual({
      project: 'Plant',
      client: 'Harbour office',
    });
    expect(done(changeTitleBlock(sheet, 'project', '  '))).not.toHaveProperty('titleBlock');
  });
});
