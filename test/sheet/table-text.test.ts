// Tables as text: pasted and read, with every trouble in a sentence, and written so that they read back.

import fc from 'fast-check';
import { describe, expect, it } from 'vitest';
import type { TableCell } from '../../src/sheet/document.ts';
import { calculate, type TableTextOptions, tableFromText, tableToText } from '../../src/sheet/index.ts';
import { seeded } from './any-sheet.ts';
import { sheetOf } from './build.ts';

const lines = (...rows: string[]): string => rows.join('\n');
async function shape(text: string, options?: TableTextOptions) {
  const { columns, rows, problems } = await tableFromText(text, options);
  return {
    columns: columns.map(({ name, unit }) => (unit === undefined ? name : `${name} [${unit}]`)),
    rows: rows.map((row) => row.join('|')),
    problems: problems.map(({ code, message }) => `${code}: ${message}`),
  };
}

describe('a text with heads', () => {
  it.each<[string, string, string[]]>([
    ['d/mm', 'd/mm\tF/kN\n1\t2\n3\t4', ['d [mm]', 'F [kN]']],
    ['d (mm)', 'd (mm)\tq (kg/m)\n1\t2\n3\t4', ['d [mm]', 'q [kg/m]']],
    ['d [mm]', 'd [mm]\tv [m/s]\n1\t2\n3\t4', ['d [mm]', 'v [m/s]']],
    ['v/(m/s)', 'd/mm\tv/(m/s)\n1\t2\n3\t4', ['d [mm]', 'v [m/s]']],
    ['a row of units in brackets', 'd\tF\n[mm]\t[kN]\n1\t2\n3\t4', ['d [mm]', 'F [kN]']],
    ['a row of units as they are', 'd\tF\tmu\nmm\tkN\t-\n1\t2\t0.3\n3\t4\t0.4', ['d [mm]', 'F [kN]', 'mu [1]']],
    ['no units', 'x\ty\n1\t2\n3\t4', ['x [1]', 'y [1]']],
    ['what reads as no unit', 'd/D\tF (max)\n1\t2\n3\t4', ['d_D [1]', 'F_max [1]']],
    ['a column of texts', 'surface\tmu\nwood\t0.3\nsteel\t0.2', ['surface', 'mu [1]']],
    ['names of the trade', 'Angle of wrap [deg]\tμ_1\te\n1\t2\t3\n4\t5\t6', ['Angle_of_wrap [deg]', 'mu_1 [1]', 'c_e [1]']],
    ['equal heads', 'x\tx\n1\t2\n3\t4', ['x [1]', 'x_2 [1]']],
  ])('takes name and unit of a column: %s', async (_what, text, expected) => {
    expect((await shape(text)).columns).toEqual(expected);
    expect((await tableFromText(text)).heads).toBe(true);
  });

  it('keeps a head that is no name as the title', async () => {
    expect((await tableFromText('Angle of wrap [deg]\tk\n1\t2')).columns[0]).toEqual({
      name: 'Angle_of_wrap',
      title: 'Angle of wrap',
      unit: 'deg',
    });
  });

  it('does without heads where the first row holds numbers', async () => {
    const preview = await tableFromText('1\t2\n3\t4');
    expect([preview.heads, preview.columns.map(({ name }) => name), preview.rows.length]).toEqual([false, ['c_1', 'c_2'], 2]);
  });

  it('takes no row of words for units: m and t may be keys', async () => {
    expect((await shape('class\tx\nm\t1\nt\t2')).rows).toEqual(['m|1', 't|2']);
    expect((await shape('class\tkind\nm\tt\nt\tm')).rows).toEqual(['m|t', 't|m']);
  });

  it('takes the units that are told by hand before all others', async () => {
    expect((await shape('d/mm\tx\n1\t2\n3\t4', { units: ['in', null] })).columns).toEqual(['d [in]', 'x']);
  });
});

describe('delimiter and decimal sign', () => {
  it.each<[string, string, TableTextOptions, string[]]>([
    ['tabs', 'x\ty\n1.5\t2', {}, ['1.5|2']],
    ['commas', 'x,y\n1.5,2\n2.5,3', {}, ['1.5|2', '2.5|3']],
    ['semicolons and decimal commas', 'x;y\n1,5;2\n2,5;3', {}, ['1.5|2', '2.5|3']],
    ['semicolons into a sheet with decimal commas', 'x;y\n1,5;2\n2,5;3', { into: ',' }, ['1,5|2', '2,5|3']],
    ['points into a sheet with decimal commas', 'x\ty\n1.5\t2\n2.25\t3', { into: ',' }, ['1,5|2', '2,25|3']],
    ['groups of thousands', 'x\ty\n1,234.5\t2\n12,345,678\t3', {}, ['1234.5|2', '12345678|3']],
    ['points that group', 'x\ty\n1.234,5\t2\n12.345.678\t3', {}, ['1234.5|2', '12345678|3']],
    ['quoted entries', 'a,b\n"one, two","say ""so"""\nx,y', { heads: true }, ['one, two|say "so"', 'x|y']],
    ['line ends of another system and a mark of order', '\uFEFFx,y\r\n1,2\r\n3,4\r\n\r\n', {}, ['1|2', '3|4']],
    ['line breaks in an entry', 'a\tb\n"one\ntwo"\t1\n', {}, ['one two|1']],
    ['bars', 'x|y\n1|2\n3|4', {}, ['1|2', '3|4']],
    ['the delimiter that is told', 'x;y,z\n1;2,3', { delimiter: ',', heads: true }, ['1;2|3']],
    ['one column of decimal commas', 'x\n1,5\n2,5', { into: ',' }, ['1,5', '2,5']],
    ['units beside the numbers', 'd\n200 mm\n1.5 m', {}, ['200 mm', '1.5 m']],
  ])('are found: %s', async (_what, text, options, rows) => {
    expect((await shape(text, options)).rows).toEqual(rows);
  });

  it('are asked about where nothing tells them', async () => {
    expect((await shape('1,5\n2,7')).problems[0]).toMatch(/^ambiguous-comma: the comma could part two columns/);
    expect((await shape('x\ty\n1,234\t2')).problems[0]).toMatch(/^ambiguous-sign: “1,234” could be grouped by thousands/);
    expect((await shape('x\ty\n1,234\t2', { decimalSign: ',' })).rows).toEqual(['1.234|2']);
    expect((await shape('x\ty\n0,234\t2')).rows).toEqual(['0.234|2']);
  });
});

describe('trouble in a row is one sentence', () => {
  it.each<[string, string, string[]]>([
    [
      'ragged',
      'x\ty\n1\t2\n3\n5\t6\t7',
      [
        'ragged-table: row 2 has 1 entry, the table has 2 columns; fill or remove the difference',
        'ragged-table: row 3 has 3 entries, the table has 2 columns; fill or remove the difference',
      ],
    ],
    [
      'empty entry',
      'x\ty\n1\t2\n3\t\n5\t6',
      ['bad-entry: row 2, column y: the entry is empty; type a number, or take the row out'],
    ],
    [
      'entry of another kind',
      'd/mm\ty\n1\t2\n3 kN\t4\n5\t6',
      ['unlike-entry: row 2, column d: 3 kN is a force (kN), the column holds a length (mm)'],
    ],
    ['key twice', 'k\ty\na\t1\nb\t2\na\t3', ['key-twice: row 3 has the key “a” of row 1; a lookup takes the first']],
    [
      'unsorted axis',
      'x\ty\n1\t2\n3\t4\n2\t5',
      [
        'unsorted-axis: column x neither rises nor falls throughout: row 3 (2) follows row 2 (3); sort the rows if values are interpolated over it',
      ],
    ],
    ['falling axis', 'x\ty\n3\t2\n2\t4\n1\t5', []],
  ])('%s', async (_what, text, expected) => {
    expect((await shape(text)).problems).toEqual(expected);
  });

  it('of an entry that is no number names row and column, and keeps the entry', async () => {
    const preview = await tableFromText('surface\tmu\nwood\t0.3\nsteel\tn/a\nice\t0.05');
    expect(preview.problems).toMatchObject([{ code: 'bad-entry', row: 1, column: 1 }]);
    expect(preview.problems[0]?.message).toMatch(/^row 2, column mu: .*n\/a/);
    expect(preview.rows[1]).toEqual(['steel', 'n/a']);
  });

  it('is told of quotes that nothing closes, of nothing, and of too much', async () => {
    expect((await shape('a,b\n"x,1\ny,2', { delimiter: ',' })).problems[0]).toMatch(/^bad-quotes: line 2/);
    expect((await shape(' \n\n')).problems).toEqual(['empty-table: there are no rows; copy the table with its heads']);
    expect((await shape('1\n'.repeat(1_500_000))).problems[0]).toMatch(/^too-large/);
  });
});

describe('a table as text', () => {
  const cell: TableCell = {
    id: 't',
    kind: 'table',
    name: 't',
    columns: [{ name: 'kind' }, { name: 'd', unit: 'mm' }, { name: 'k', unit: '1' }],
    rows: [
      ['flat, "wide"', '-1.5', '2e3'],
      ['=1+1', '−3', '+4'],
      ['@x', '0.30', '1 500'],
      ["-2+3+cmd|' /C x'!A0", '1', '1'],
    ],
  };

  it('is parted by tabs or commas, and no entry can be taken for a formula', async () => {
    expect(await tableToText(cell, 'tab')).toBe(
      `kind\td [mm]\tk [1]\n"flat, ""wide"""\t-1.5\t2e3\n"'=1+1"\t−3\t+4\n"'@x"\t0.30\t1 500\n"'-2+3+cmd|' /C x'!A0"\t1\t1\n`,
    );
    expect(await tableToText(cell, 'csv')).toContain('"flat, ""wide""",-1.5,2e3\r\n');
    expect(await tableToText(cell, 'csv', { decimalSign: ',' })).toContain('kind;d [mm];k [1]\r\n');
  });

  it('reads back to the same columns and rows', async () => {
    for (const form of ['tab', 'csv'] as const) {
      const back = await tableFromText(await tableToText(cell, form));
      expect({ columns: back.columns, rows: back.rows }).toEqual({ columns: cell.columns, rows: cell.rows });
    }
  });

  it('reads back whatever its texts hold', async () => {
    const text = fc
      .string({ unit: 'grapheme', maxLength: 10 })
      .map((each) => each.replace(/[\s\p{Cc}\uFEFF]+/gu, ' ').trim())
      // An apostrophe before a sign is what keeps a formula from being one.
      .filter((each) => !/^'[=+\-@]/u.test(each) && each !== '');
    await fc.assert(
      fc.asyncProperty(
        fc.array(fc.tuple(text, fc.integer()), { minLength: 1, maxLength: 5 }),
        fc.constantFrom('tab', 'csv'),
        async (pairs, form) => {
          const table = {
            columns: [{ name: 'k_1' }, { name: 'x', unit: 'mm' }],
            rows: pairs.map(([key, x]) => [key, String(x)]),
          };
          const back = await tableFromText(await tableToText(table, form as 'tab'), {
            heads: true,
            units: [null, 'mm'],
            decimalSign: '.',
          });
          expect(back.rows).toEqual(table.rows);
        },
      ),
      seeded,
    );
  });

  it('stands in a sheet as it was previewed', async () => {
    const preview = await tableFromText(lines('d/mm;F/kN', '10;1,5', '20;2,5'));
    const sheet = sheetOf(['x = 15 mm', 'F := interpolate(belts, F, x)'], {
      more: [{ id: 't', kind: 'table', name: 'belts', columns: preview.columns, rows: preview.rows, source: 's' }],
    });
    // Half way between 1.5 kN and 2.5 kN.
    expect(calculate(sheet).named('F')!.si[0]).toBe(2000);
  });
});
