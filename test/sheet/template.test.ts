// Sheets from templates, and values set by name: what is confirmed, what stays carried over, what loses its provenance.

import { readdirSync, readFileSync } from 'node:fs';
import { describe, expect, it } from 'vitest';
import {
  type GivenCell,
  newFromSheet,
  newFromTemplate,
  readSheet,
  type Sheet,
  setValue,
  setValues,
  templateSummary,
  writeSheet,
} from '../../src/sheet/index.ts';

const template: Sheet = {
  format: 'tightside-sheet/1',
  title: 'Small template',
  templateInfo: { id: 'small', version: 3, job: 'j', limits: [], caution: 'c' },
  purpose: 'p',
  status: 'issued',
  references: [{ id: 'R1', document: 'D' }],
  titleBlock: {
    organisation: 'O',
    project: 'P',
    documentNumber: 'CS-1',
    revision: 'A',
    date: '2026-01-01',
    preparedBy: 'x',
    documentType: 'Calculation',
    language: 'en',
  },
  settings: { decimalSign: '.' },
  cases: [{ id: 'run' }, { id: 'start' }],
  cells: [
    {
      id: 't',
      kind: 'table',
      name: 'surfaces',
      columns: [{ name: 'surface' }, { name: 'mu_t', unit: '1' }],
      rows: [
        ['leather', '0.3'],
        ['rubber', '0.4'],
      ],
    },
    {
      id: 'd',
      kind: 'given',
      name: 'd_1',
      value: '200 mm',
      unit: 'mm',
      basis: 'specified',
      source: 'S',
      title: 'Diameter',
      toConfirm: 'Q-1',
    },
    { id: 'n', kind: 'given', name: 'n_1', value: '1450 r/min' },
    {
      id: 'mu',
      kind: 'given',
      name: 'mu_1',
      value: '0.3 ± 0.05',
      distribution: 'normal',
      basis: 'assumed',
      source: 'S',
      range: '0.1 to 0.8',
    },
    { id: 'k', kind: 'given', name: 'K_A', value: '1.0', byCase: { start: '1.5' } },
    { id: 's', kind: 'given', name: 'surface', value: 'leather', choices: 'surfaces.surface' },
    { id: 'v', kind: 'derived', name: 'v', formula: 'pi*d_1*n_1', unit: 'm/s' },
    { id: 'c', kind: 'criterion', left: 'v', relation: '<=', right: '"30 m/s"', justification: 'old trial' },
    { id: 'x', kind: 'sought', name: 'n_x', instead: 'n_1', where: 'v = "20 m/s"', between: '100 r/min to 3000 r/min' },
  ],
  conclusion: 'All fine.',
  marks: [{ cell: 'v' }],
  revisions: [{ revision: 'A' }],
  log: [1],
};
const begun = newFromTemplate(template);
const givenOf = (sheet: Sheet, id: string) => sheet.cells.find((cell) => cell.id === id) as GivenCell;

describe('a sheet from a template', () => {
  it('has every given carried over, and names the template', () => {
    expect(begun.cells.filter((cell) => cell.kind === 'given').map((cell) => cell.carriedOver)).toEqual([
      true,
      true,
      true,
      true,
      true,
    ]);
    expect(begun.template).toEqual({ id: 'small', version: 3 });
    expect(newFromTemplate(template, 'ab').template).toEqual({ id: 'small', version: 3, fingerprint: 'ab' });
  });
  it('leaves behind what belongs to a job: names, numbers, marks, justifications, tracking numbers, conclusion', () => {
    expect(begun.titleBlock).toEqual({ documentType: 'Calculation', language: 'en' });
    expect([begun.status, begun.marks, begun.revisions, begun.log]).toEqual(['in preparation', [], [], []]);
    expect(begun).not.toHaveProperty('templateInfo');
    expect(begun).not.toHaveProperty('conclusion');
    expect(givenOf(begun, 'd')).not.toHaveProperty('toConfirm');
    expect(begun.cells[7]).not.toHaveProperty('justification');
  });
  it('keeps values, basis and sources of the template, which are shown until confirmed', () => {
    expect(givenOf(begun, 'd')).toMatchObject({ value: '200 mm', basis: 'specified', source: 'S' });
  });
  it('from an earlier sheet names that sheet and its template', () => {
    const next = newFromSheet({ ...begun, title: 'Old drive', titleBlock: { documentNumber: 'CS-009', revision: 'B' } }, 'cd');
    expect(next.carriedFrom).toEqual({ title: 'Old drive', documentNumber: 'CS-009', revision: 'B', fingerprint: 'cd' });
    expect(next.template).toEqual({ id: 'small', version: 3 });
    expect(next.titleBlock).toEqual({});
  });
  it('is listed by the names of givens and results', () => {
    expect(templateSummary(template)).toEqual({
      id: 'small',
      version: 3,
      title: 'Small template',
      job: 'j',
      givens: ['d_1', 'n_1', 'mu_1', 'K_A', 'surface'],
      results: ['v', 'n_x'],
    });
  });
});

describe('a value that is set', () => {
  const set = (name: string, value: string, options = {}) => {
    const result = setValue(begun, name, value, options);
    if (!result.ok) throw new Error(result.problem.message);
    return result.value;
  };
  it('is confirmed and loses basis, source and distribution; title, unit and range stay', () => {
    expect(givenOf(set('d_1', '250 mm'), 'd')).toEqual({
      id: 'd',
      kind: 'given',
      name: 'd_1',
      value: '250 mm',
      unit: 'mm',
      title: 'Diameter',
    });
    expect(givenOf(set('μ_1', '0.28 ± 0.02'), 'mu')).toEqual({
      id: 'mu',
      kind: 'given',
      name: 'mu_1',
      value: '0.28 ± 0.02',
      range: '0.1 to 0.8',
    });
  });
  it('for all cases drops the values by case', () => {
    expect(givenOf(set('K_A', '1.2'), 'k')).toEqual({ id: 'k', kind: 'given', name: 'K_A', value: '1.2' });
  });
  it('for one case leaves the given carried over while the other case has the old value', () => {
    expect(givenOf(set('K_A', '1.8', { case: 'start' }), 'k')).toEqual({
      id: 'k',
      kind: 'given',
      name: 'K_A',
      value: '1.0',
      byCase: { start: '1.8' },
      carriedOver: true,
    });
  });
  it('for each case in turn confirms it', () => {
    const both = setValues(begun, [
      { name: 'K_A', value: '1.8', case: 'start' },
      { name: 'K_A', value: '1.1', case: 'run' },
    ]);
    expect(both.ok && givenOf(both.value, 'k')).toEqual({
      id: 'k',
      kind: 'given',
      name: 'K_A',
      value: '1.0',
      byCase: { start: '1.8', run: '1.1' },
    });
  });
  it('first for all cases, then for one, whatever the order they are given in', () => {
    const both = setValues(begun, [
      { name: 'K_A', value: '1.8', case: 'start' },
      { name: 'K_A', value: '1.1' },
    ]);
    expect(both.ok && givenOf(both.value, 'k')).toEqual({
      id: 'k',
      kind: 'given',
      name: 'K_A',
      value: '1.1',
      byCase: { start: '1.8' },
    });
  });
  it('touches no other cell', () => {
    const next = set('d_1', '250 mm');
    for (const [i, cell] of begun.cells.entries()) if (cell.id !== 'd') expect(next.cells[i]).toBe(cell);
  });
  it('may be a text of the choices', () => {
    expect(givenOf(set('surface', 'rubber'), 's')).toMatchObject({ value: 'rubber' });
  });
  it('may be in another unit of the same dimension', () => {
    expect(givenOf(set('d_1', '10 in'), 'd').value).toBe('10 in');
  });

  it.each([
    // name, value, case, code, what the sentence says
    ['d_3', '1 mm', undefined, 'unknown-name', /the sheet has no given d_3; did you mean d_1/],
    ['zzzzzzz', '1', undefined, 'unknown-name', /its givens are d_1, n_1, mu_1, K_A, surface/],
    ['v', '20 m/s', undefined, 'computed-name', /v is calculated as pi\*d_1\*n_1 and cannot be set/],
    ['n_x', '1 r/min', undefined, 'computed-name', /n_x is sought so that v = "20 m\/s" and cannot be set/],
    ['K_A', '1', 'strat', 'unknown-case', /no case strat; its cases are run, start/],
    ['d_1', '200 mN', undefined, 'unlike-value', /d_1 is a length.*but 200 mN is a force/],
    ['d_1', '200', undefined, 'unlike-value', /d_1 is a length.*give a value in mm/],
    [
      'n_1',
      '20 rad/s',
      undefined,
      'unlike-value',
      /n_1 is .*but 20 rad\/s is .*one revolution is 2π rad; give a value in r\/min/,
    ],
    ['n_1', '10 m', undefined, 'unlike-value', /n_1 is .*but 10 m is a length/],
    ['d_1', '200 mmm', undefined, undefined, /^d_1: .*mmm/],
    ['d_1', 'two hundred', undefined, undefined, /^d_1: /],
    ['surface', 'wood', undefined, undefined, /^surface: .*wood/],
  ] as const)('%s = %s is refused with both sides', (name, value, one, code, sentence) => {
    const result = setValue(begun, name, value, one === undefined ? {} : { case: one });
    expect(result.ok).toBe(false);
    if (result.ok) return;
    expect(result.problem.message).toMatch(sentence);
    if (code !== undefined) expect(result.problem.code).toBe(code);
  });
  it('lists every value that cannot be set', () => {
    const result = setValues(begun, [
      { name: 'd_3', value: '1' },
      { name: 'v', value: '1' },
      { name: 'd_1', value: '3 mm' },
    ]);
    expect(!result.ok && result.problems.map(({ code }) => code)).toEqual(['unknown-name', 'computed-name']);
  });
});

describe('built-in sheets', () => {
  const root = new URL('../../', import.meta.url);
  const files = readdirSync(new URL('templates/', root)).filter((file) => file.endsWith('.sheet.json'));
  it.each([...files.map((file) => `templates/${file}`), 'src/view/example.sheet.json'])('%s is a canonical file', (file) => {
    const text = readFileSync(new URL(file, root), 'utf8');
    const read = readSheet(text);
    expect(read.ok ? [] : read.problems).toEqual([]);
    if (read.ok) expect(writeSheet(read.value)).toBe(text);
  });
});
