// The harness of templates: built-in ones pass it, each fault is found where it is put in, and a sheet is kept as a template or refused.

import { readdirSync, readFileSync } from 'node:fs';
import { describe, expect, it } from 'vitest';
import { keepAsTemplate, templateFaults } from '../../src/check/index.ts';
import {
  type Cell,
  calculate,
  type GivenCell,
  newFromTemplate,
  readSheet,
  type Sheet,
  setValues,
  writeSheet,
} from '../../src/sheet/index.ts';

const folder = new URL('../../templates/', import.meta.url);
function sheetFrom(text: string): Sheet {
  const read = readSheet(text);
  if (!read.ok) throw new Error(read.problems[0]?.message);
  return read.value;
}
const template = (file: string) => sheetFrom(readFileSync(new URL(file, folder), 'utf8'));
const said = (sheet: Sheet) => templateFaults(sheet).map(({ cell, code }) => `${cell ?? 'sheet'}: ${code}`);

describe('built-in templates', () => {
  it.each(readdirSync(folder).filter((file) => file.endsWith('.sheet.json')))('%s has no fault', (file) => {
    expect(templateFaults(template(file)).map(({ cell, message }) => `${cell}: ${message}`)).toEqual([]);
  });
});

const cells: readonly Cell[] = [
  { id: 'h', kind: 'heading', level: 1, text: 'Loads' },
  { id: 'F', kind: 'given', name: 'F', title: 'Force', value: '2 kN', basis: 'specified', source: 'D-1', carriedOver: true },
  { id: 'A', kind: 'given', name: 'A', value: '50 mm²', basis: 'assumed', range: '10 mm² to 90 mm²', carriedOver: true },
  { id: 'sigma', kind: 'derived', name: 'sigma', title: 'Stress', formula: 'F/A', unit: 'MPa', source: 'definition' },
  { id: 'top', kind: 'given', name: 'sigma_allow', value: '60 MPa', basis: 'tabulated', source: '[R1]', carriedOver: true },
  { id: 'k', kind: 'criterion', title: 'Stress', left: 'sigma', relation: '<=', right: 'sigma_allow', source: '[R1] 5' },
];
const good: Sheet = {
  format: 'tightside-sheet/1',
  title: 'Rod',
  templateInfo: { id: 'rod', version: 1, job: 'A rod in tension', limits: ['no buckling'], caution: 'Not for lifting people.' },
  references: [{ id: 'R1', document: 'Standard' }],
  cells,
};
const withCell = (id: string, change: object): Sheet => ({
  ...good,
  cells: cells.map((cell) => (cell.id === id ? ({ ...cell, ...change } as Cell) : cell)),
});
const without = (id: string, key: string): Sheet => ({
  ...good,
  cells: cells.map((cell) =>
    cell.id === id ? (Object.fromEntries(Object.entries(cell).filter(([k]) => k !== key)) as unknown as Cell) : cell,
  ),
});
const withMore = (...more: Cell[]): Sheet => ({ ...good, cells: [...cells, ...more] });

describe('the harness', () => {
  it('finds nothing in a small template that is in order', () => {
    expect(said(good)).toEqual([]);
  });

  it.each<[string, Sheet, string[]]>([
    ['no template data', (({ templateInfo: _, ...rest }) => rest)(good), ['sheet: no-template']],
    ['no job', { ...good, templateInfo: { ...good.templateInfo!, job: ' ' } }, ['sheet: no-job']],
    ['no caution', { ...good, templateInfo: { ...good.templateInfo!, caution: '' } }, ['sheet: no-caution']],
    ['no limits', { ...good, templateInfo: { ...good.templateInfo!, limits: [''] } }, ['sheet: no-limits']],
    ['no criterion', { ...good, cells: cells.slice(0, 4) }, ['sheet: no-criterion']],
    ['a given without basis', without('F', 'basis'), ['F: no-basis']],
    ['a given without source and range', without('F', 'source'), ['F: no-source']],
    [
      'a given that nothing uses',
      withMore(
        { id: 'x', kind: 'given', name: 'x', value: '1', basis: 'assumed', source: 's' },
        { id: 'n', kind: 'note', text: '{x}' },
      ),
      ['x: unused-given'],
    ],
    ['a given outside its own range', withCell('A', { range: '60 mm² to 90 mm²' }), ['A: outside-range']],
    ['a unit that does not fit', withCell('sigma', { unit: 'kN' }), ['sigma: unlike-target', 'k: waits-for']],
    ['a number without a source', withCell('sigma', { formula: '1.35*F/A' }), ['sigma: number-without-source']],
    ['a formula without a source', without('sigma', 'source'), ['sigma: no-source']],
    [
      'a result without a title',
      withMore({ id: 'y', kind: 'derived', name: 'y', formula: '2*F', source: 's' }),
      ['y: untitled-result'],
    ],
    ['a criterion without a source', without('k', 'source'), ['k: no-source']],
    [
      'a criterion that can never turn out otherwise',
      withMore({ id: 'z', kind: 'criterion', left: '1', relation: '<=', right: '2', source: 's' }),
      ['z: idle-criterion'],
    ],
    [
      'a table without a source',
      withMore({ id: 't', kind: 'table', name: 't', columns: [{ name: 'a' }], rows: [['x']] }),
      ['t: no-source'],
    ],
    ['a citation of nothing', withCell('F', { source: '[R7]' }), ['F: unknown-citation']],
    ['a note that names nothing', withMore({ id: 'n', kind: 'note', text: '{G_1}' }), ['n: unknown-name']],
    [
      'a step that does not close',
      withMore(
        { id: 'w', kind: 'derived', name: 'w', formula: '1 + F/"3e18 N"', source: 's' },
        { id: 'c', kind: 'derived', name: 'c', title: 'Difference', formula: 'w - 1', source: 's' },
      ),
      ['c: does-not-close'],
    ],
  ])('finds %s', (_what, sheet, expected) => {
    expect(said(sheet)).toEqual(expected);
  });
});

describe('a sheet kept as a template', () => {
  const belt = template('flat-belt-open.sheet.json');
  const job = setValues(newFromTemplate(belt), [{ name: 'P', value: '9 kW' }]);
  if (!job.ok) throw new Error('not set');
  // What is set has lost its source, and the author restates it.
  const sheet: Sheet = {
    ...job.value,
    title: 'Mixer drive',
    titleBlock: { ...job.value.titleBlock, project: 'Pilot plant', documentNumber: 'CS-014', preparedBy: 'A. Author' },
    conclusion: 'The drive holds.',
    carriedFrom: { title: 'Older sheet' },
    cells: job.value.cells.map((cell) =>
      cell.id === 'P'
        ? { ...(cell as GivenCell), basis: 'specified', source: 'Order 7', toConfirm: 'Q-3' }
        : cell.id === 'no-slip'
          ? { ...cell, justification: 'for the trial run' }
          : cell,
    ),
    marks: [{ cell: 'P' }],
    revisions: [{ revision: 'A' }],
    log: [1],
  };
  const kept = keepAsTemplate(sheet, { id: 'mixer', job: 'Drive of a mixer' });
  if (!kept.ok) throw new Error(kept.problems.map(({ message }) => message).join('\n'));
  const own = kept.value;

  it('has its template data from what is said and from its notes', () => {
    expect(own.templateInfo).toMatchObject({ id: 'mixer', version: 1, job: 'Drive of a mixer' });
    expect(own.templateInfo?.caution).toBe(belt.templateInfo?.caution);
    expect(own.templateInfo?.limits).toHaveLength(1);
  });

  it('keeps values, and nothing of the job', () => {
    expect(own.cells.find(({ id }) => id === 'P')).toEqual({
      ...belt.cells.find(({ id }) => id === 'P'),
      value: '9 kW',
      source: 'Order 7',
      carriedOver: true,
    });
    expect(own.cells.find(({ id }) => id === 'no-slip')).not.toHaveProperty('justification');
    expect(own.titleBlock).toEqual({ documentType: 'Design calculation', language: 'en' });
    expect([own.marks, own.revisions, own.log]).toEqual([[], [], []]);
    for (const key of ['conclusion', 'carriedFrom', 'template']) expect(own).not.toHaveProperty(key);
    expect(own.cells.every((cell) => cell.kind !== 'given' || cell.carriedOver === true)).toBe(true);
    expect(own.cells).toHaveLength(belt.cells.length);
  });

  it('is a file, begins sheets, and gives the numbers of the sheet it came from', () => {
    expect(sheetFrom(writeSheet(own))).toEqual(own);
    const next = newFromTemplate(sheetFrom(writeSheet(own)));
    expect(next.template).toEqual({ id: 'mixer', version: 1 });
    expect(calculate(next).named('F_1')?.si).toEqual(calculate(sheet).named('F_1')?.si);
  });

  it('is one version on when kept again, itself or a sheet made from it', () => {
    for (const from of [own, newFromTemplate(own)]) {
      const again = keepAsTemplate(from, { id: 'mixer', job: 'j' });
      expect(again.ok && again.value.templateInfo?.version).toBe(2);
    }
  });

  it('gets a note of its caution and its limits where it has none, so that every sheet made from it shows them', () => {
    const { templateInfo: _, ...bare } = good;
    const made = keepAsTemplate(bare, { id: 'rod-2', job: 'j', caution: 'Mind the load.', limits: ['one', 'two'] });
    if (!made.ok) throw new Error(made.problems[0]?.message);
    expect(made.value.cells.slice(0, 3)).toEqual([
      cells[0],
      { id: 'n1', kind: 'note', text: 'Limits of validity: one; two.', role: 'limit' },
      { id: 'n2', kind: 'note', text: 'Mind the load.', role: 'caution' },
    ]);
  });

  it('is refused with every fault, and under an id that is none or is taken', () => {
    const { templateInfo: _, ...bare } = without('F', 'basis');
    const refused = keepAsTemplate(bare, { id: 'rod' });
    expect(refused.ok ? [] : refused.problems.map(({ code }) => code)).toEqual(['no-job', 'no-caution', 'no-limits', 'no-basis']);
    for (const [id, code] of [
      ['my rod', 'bad-id'],
      ['', 'bad-id'],
      ['capstan', 'id-taken'],
    ] as const) {
      const none = keepAsTemplate(good, { id }, { taken: ['capstan'] });
      expect(none.ok ? '' : none.problems[0]?.code).toBe(code);
    }
  });
});
