// A sheet beside its template: untouched, changed and shown, added, left out.

import { readdirSync, readFileSync } from 'node:fs';
import { describe, expect, it } from 'vitest';
import { type Cell, compareWithTemplate, newFromTemplate, readSheet, type Sheet, setValues } from '../../src/sheet/index.ts';
import { cellOf } from './build.ts';

const folder = new URL('../../templates/', import.meta.url);
const template: Sheet = {
  format: 'tightside-sheet/1',
  title: 'Rod',
  templateInfo: { id: 'rod', version: 2, job: 'j', limits: [], caution: 'c' },
  cells: [
    cellOf('F = 2.5 kN', 0),
    cellOf('A = 50 mm²', 1),
    { id: 's', kind: 'derived', name: 'σ', formula: 'F/A*"1.5 m"/"1 m"', unit: 'MPa' },
    { id: 'k', kind: 'criterion', title: 'Stress', left: 'sigma', relation: '<=', right: '"60 MPa"' },
    { id: 'x', kind: 'sought', name: 'F_x', instead: 'F', where: 'sigma = "60 MPa"', between: '1 kN to 9 kN' },
    { id: 't', kind: 'table', name: 'sizes', columns: [{ name: 'd', unit: 'mm' }], rows: [['1'], ['2']] },
    { id: 'n', kind: 'note', text: 'text' },
  ],
};
const made = newFromTemplate(template);
const withCell = (id: string, change: object): Sheet => ({
  ...made,
  cells: made.cells.map((cell) => (cell.id === id ? ({ ...cell, ...change } as Cell) : cell)),
});
const changes = (sheet: Sheet) =>
  compareWithTemplate(sheet, template)
    .cells.filter(({ state }) => state !== 'untouched')
    .map(({ name, cell, state, was, now }) => `${name ?? cell} ${state}${was === undefined ? '' : `: ${was} -> ${now}`}`);

describe.each(readdirSync(folder).filter((file) => file.endsWith('.sheet.json')))('a sheet made from %s', (file) => {
  it('is untouched in every quantity, criterion and table', () => {
    const read = readSheet(readFileSync(new URL(file, folder), 'utf8'));
    if (!read.ok) throw new Error(file);
    const { cells, removed, version, madeFrom } = compareWithTemplate(newFromTemplate(read.value), read.value);
    expect(cells.length).toBeGreaterThan(5);
    expect(cells.filter(({ state }) => state !== 'untouched')).toEqual([]);
    expect([removed, version]).toEqual([[], madeFrom]);
  });
});

describe('what the job does', () => {
  it.each<[string, Sheet]>([
    ['sets a value', (setValues(made, [{ name: 'F', value: '3000 N' }]) as { value: Sheet }).value],
    ['writes a title and a source', withCell('s', { title: 'Stress', source: 'definition' })],
    ['spells a name and spaces otherwise', withCell('s', { name: 'sigma', formula: ' F / A * "1.5  m" / "1 m" ' })],
    ['writes a unit otherwise', withCell('s', { unit: 'MPa ' })],
    ['moves a line', { ...made, cells: [...made.cells].reverse() }],
    ['gives a line another id', withCell('s', { id: 'other' })],
    ['gives a criterion another id', withCell('k', { id: 'other' })],
  ])('changes nothing of the template where it %s', (_what, sheet) => {
    expect(changes(sheet)).toEqual([]);
    expect(compareWithTemplate(sheet, template).removed).toEqual([]);
  });

  it('is compared through another decimal sign', () => {
    const comma = { ...made, settings: { decimalSign: ',' as const } };
    const sheet: Sheet = {
      ...comma,
      cells: made.cells.map((cell) =>
        cell.id === 's'
          ? ({ ...cell, formula: 'F/A*"1,5 m"/"1 m"' } as Cell)
          : cell.id === 'F'
            ? ({ ...cell, value: '2,5 kN' } as Cell)
            : cell,
      ),
    };
    expect(changes(sheet)).toEqual([]);
  });

  it.each<[string, Sheet, string[]]>([
    ['a formula', withCell('s', { formula: '2*F/A' }), ['sigma changed: F/A*"1.5 m"/"1 m", in MPa -> 2*F/A, in MPa']],
    [
      'a literal',
      withCell('s', { formula: 'F/A*"1.6 m"/"1 m"' }),
      ['sigma changed: F/A*"1.5 m"/"1 m", in MPa -> F/A*"1.6 m"/"1 m", in MPa'],
    ],
    [
      'the unit of a result',
      withCell('s', { unit: 'kPa' }),
      ['sigma changed: F/A*"1.5 m"/"1 m", in MPa -> F/A*"1.5 m"/"1 m", in kPa'],
    ],
    [
      'a formula replaced by a number',
      {
        ...made,
        cells: made.cells.map((cell) => (cell.id === 's' ? { id: 's', kind: 'given', name: 'sigma', value: '40 MPa' } : cell)),
      },
      ['sigma changed: F/A*"1.5 m"/"1 m", in MPa -> a given, 40 MPa'],
    ],
    ['a given of another kind', withCell('A', { value: '50 mm' }), ['A changed: a given, 50 mm² -> a given, 50 mm']],
    ['a relation', withCell('k', { relation: '<' }), ['k changed: sigma <= "60 MPa" -> sigma < "60 MPa"']],
    [
      'an equation',
      withCell('x', { between: '1 kN to 8 kN' }),
      [
        'F_x changed: F sought so that sigma = "60 MPa", between 1 kN to 9 kN -> F sought so that sigma = "60 MPa", between 1 kN to 8 kN',
      ],
    ],
    ['a table', withCell('t', { rows: [['1']] }), ['sizes changed: 2 rows of d in mm -> 1 row of d in mm']],
    ['a line', { ...made, cells: [...made.cells, cellOf('y := F/A', 9)] }, ['y added']],
  ])('shows what was and is, of %s', (_what, sheet, expected) => {
    expect(changes(sheet)).toEqual(expected);
    expect(compareWithTemplate(sheet, template).removed).toEqual([]);
  });

  it('shows what was left out', () => {
    const sheet = { ...made, cells: made.cells.filter(({ id }) => id !== 'k' && id !== 's') };
    expect(compareWithTemplate(sheet, template).removed).toEqual([
      { kind: 'derived', name: 'sigma', title: '', was: 'F/A*"1.5 m"/"1 m", in MPa' },
      { kind: 'criterion', title: 'Stress', was: 'sigma <= "60 MPa"' },
    ]);
  });

  it('counts a renamed quantity as added and left out', () => {
    const sheet = withCell('s', { name: 'sigma_t' });
    expect(changes(sheet)).toEqual(['sigma_t added']);
    expect(compareWithTemplate(sheet, template).removed.map(({ name }) => name)).toEqual(['sigma']);
  });

  it('tells the version that the sheet was made from beside that of the template', () => {
    const older = { ...made, template: { id: 'rod', version: 1 } };
    expect(compareWithTemplate(older, template)).toMatchObject({ id: 'rod', version: 2, madeFrom: 1 });
  });
});
