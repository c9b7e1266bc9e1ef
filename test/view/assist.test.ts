// Help at the caret and the quiet line: what is offered where, what a line will become, what the typed line prints.

import { readdirSync, readFileSync } from 'node:fs';
import { describe, expect, it } from 'vitest';
import { makeRecord } from '../../src/record/index.ts';
import { type Cell, calculate, checkFormula, readSheet } from '../../src/sheet/index.ts';
import { solver } from '../../src/study/index.ts';
import { type Proposals, proposeInEntry, proposeInFormula, proposeUnits } from '../../src/view/edit/assist.ts';
import { fieldsOf, fieldText, withFieldText } from '../../src/view/edit/cell-forms.ts';
import { readEntry } from '../../src/view/edit/entry.ts';
import { entryScope, helpEntry } from '../../src/view/edit/entry-help.ts';
import { checkField } from '../../src/view/edit/field-checks.ts';
import { live, splitComparison } from '../../src/view/edit/live.ts';
import { marksOfFormula } from '../../src/view/edit/marks.ts';
import { liveLine } from '../../src/view/edit/print-live.ts';
import { sheetOf } from '../sheet/build.ts';

const table: Cell = {
  id: 'surfaces',
  kind: 'table',
  name: 'surfaces',
  columns: [{ name: 'surface' }, { name: 'mu_dry', unit: '1' }, { name: 'mu_wet', unit: '1' }],
  rows: [
    ['leather on iron', '0.30', '0.20'],
    ['rubber on steel', '0.50', '0.25'],
  ],
};
const pair: Cell = { id: 'pair', kind: 'given', name: 'pair', value: 'leather on iron', choices: 'surfaces.surface' };
const friction: Cell = { id: 'mu_1', kind: 'given', name: 'mu_1', title: 'Coefficient of friction', value: '0.30' };
const base = sheetOf(['d = 200 mm', 'n = 1450 r/min', 'F_1 = 900 N', 'F_2 = 300 N', 'v [m/s] := pi*d*n'], {
  more: [table, pair, friction],
});
const calculation = calculate(base);

/** Proposals at the `|` of the text. */
function at(text: string, asked = false): Proposals | undefined {
  const caret = text.indexOf('|');
  return proposeInFormula(text.replace('|', ''), caret, { calculation, asked });
}
const labels = (text: string, asked = false) => at(text, asked)?.list.map((one) => one.label) ?? [];
const taken = (text: string, label: string) => {
  const found = at(text, true);
  const plain = text.replace('|', '');
  const one = found?.list.find((each) => each.label === label);
  if (found === undefined || one === undefined) return undefined;
  return plain.slice(0, found.from) + (one.write ?? one.label) + plain.slice(found.to);
};

describe('at the caret of a formula', () => {
  it.each([
    ['F|', ['F_1', 'F_2', 'floor']],
    ['f|', ['F_1', 'F_2', 'floor']],
    ['μ|', ['mu_1']],
    ['2*fric|', ['mu_1']],
    ['sq|', ['sqrt']],
    ['F_1 + en|', ['entry']],
    ['entry(su|', ['surfaces']],
    ['entry(surfaces, mu|', ['mu_dry', 'mu_wet']],
    ['entry(surfaces, mu_dry, "l|', ['leather on iron']],
    ['pair == "rub|', ['rubber on steel']],
    ['max(F_1, entry(surfaces, mu_w|', ['mu_wet']],
    ['entry(surfaces, mu_dry, pa|', ['pair']],
    ['"3 k|"', ['kg', 'kN', 'kW', 'km']],
    // Nothing was begun; or what stands there is complete; or no name can begin here.
    ['F_1 + |', []],
    ['F_1|', []],
    ['12|', []],
    ['(F_1)|', []],
    ['|', []],
  ] as const)('%s', (text, wanted) => {
    const found = labels(text);
    if (wanted.length === 0) expect(found).toEqual([]);
    else expect(found).toEqual(expect.arrayContaining([...wanted]));
    if (wanted[0] !== undefined && !text.includes('"3')) expect(found[0]).toBe(wanted[0]);
  });

  it('everything is offered where it is asked for, never the line to itself', () => {
    expect(labels('F_1 + |', true)).toEqual(['d', 'n', 'F_1', 'F_2', 'v', 'pair', 'mu_1', 'pi']);
    expect(proposeInFormula('', 0, { calculation, asked: true, own: 'v' })?.list.map((one) => one.label)).not.toContain('v');
  });

  it('each says what it is: title, value with its unit, arguments', () => {
    expect(at('mu|')?.list[0]?.detail).toBe('Coefficient of friction · 0.30');
    expect(at('v|', true)?.list[0]?.detail).toBe('15.18\u00a0m/s');
    expect(at('atan2|', true)?.list[0]?.detail).toBe('atan2(y, x) · angle of the point (x, y)');
  });

  it('replaces what was begun and nothing else', () => {
    expect(taken('F_1*fr|', 'mu_1')).toBe('F_1*mu_1');
    expect(taken('2*sq|', 'sqrt')).toBe('2*sqrt()');
    expect(taken('2*sq|(d)', 'sqrt')).toBe('2*sqrt(d)');
    expect(taken('entry(su|', 'surfaces')).toBe('entry(surfaces, ');
    expect(taken('pair == "rub|', 'rubber on steel')).toBe('pair == "rubber on steel"');
    expect(taken('F_1 + "3 k|"', 'kN')).toBe('F_1 + "3 kN"');
  });
});

describe('at the caret of a value', () => {
  const units = (text: string, more = {}) =>
    proposeUnits(text, text.length, { asked: false, ...more })?.list.map((one) => one.label);
  it('units by their beginning, those of the kind at hand first', () => {
    expect(units('200 m')?.slice(0, 3)).toContain('m');
    expect(units('200 mm^')).toEqual(['mm²', 'mm³', 'mm⁴', 'mm²/s']);
    expect(units('3 N*')?.[0]).toBe('N·m');
    expect(units('3 m', { like: checkFormula(calculation, 'F_1/d').unit })).toContain('m');
    expect(proposeUnits('200', 3, { asked: true, like: calculation.named('d')?.unit ?? never() })?.list[0]).toMatchObject({
      write: expect.stringMatching(/^ /u),
    });
  });
  it('none before a number, none in the number itself', () => {
    expect(units('m')).toBeUndefined();
    expect(units('1e')).toBeUndefined();
    expect(units('200 ')).toBeUndefined();
  });
  it('of the empty line go by the piece at the caret', () => {
    const propose = (text: string) =>
      proposeInEntry(readEntry(text, entryScope(calculation)), text.length, { calculation, asked: false });
    expect(propose('x = 5 k')?.list.map((one) => one.label)).toContain('kN');
    expect(propose('x = F')?.list.map((one) => one.label)).toContain('F_1');
    expect(propose('x = F_1 ; F')).toBeUndefined();
    expect(propose('The F')).toBeUndefined();
    const unit = proposeInEntry(readEntry('x [m/] = v', entryScope(calculation)), 5, { calculation, asked: false });
    expect(unit).toMatchObject({ from: 3, to: 5 });
    expect(unit?.list.map((one) => one.label)).toContain('m/s');
  });
});

describe('the quiet line of a new line', () => {
  const help = (text: string) => helpEntry(text, calculation);
  it.each([
    ['D = 200 mm', 'becomes a given: a length (mm), 200\u00a0mm'],
    [
      'w [km/h] = pi*d*n',
      'becomes a derived quantity: speed = length × rotational frequency × number, units agree · 54.66\u00a0km/h',
    ],
    ['F_1 <= 3*F_2', 'becomes a criterion: force, units agree · met'],
    ['## Pulleys', 'becomes a heading of the second rank'],
    ['assumption: new', 'becomes an assumption'],
    ['some words', 'becomes a note'],
    ['q [surfaces.surface] = leather on iron', 'becomes a choice from table surfaces'],
    ['table belts: type, m [kg/m]', 'becomes a table of 2 columns'],
  ])('%s', (text, hint) => {
    expect(help(text)).toMatchObject({ hint, problems: [] });
  });

  it('says what is wrong at its place in the line, and its correction is one of the line', () => {
    const fixed = (text: string) => {
      const [problem] = help(text).problems;
      const fix = problem?.fixes?.[0];
      if (!problem || !fix) return undefined;
      return [text.slice(...(problem.at ?? [0, 0])), text.slice(0, fix.from) + fix.text + text.slice(fix.to)];
    };
    expect(fixed('  P = 5 kWw ; Power')).toEqual(['kWw', '  P = 5 kW ; Power']);
    expect(fixed('w = F_1 - F_22')).toEqual(['F_22', 'w = F_1 - F_2']);
    expect(fixed('w [m/ss] = v')?.[0]).toBe('ss');
    expect(fixed('F_1 <= F_22 ; Pull')).toEqual(['F_22', 'F_1 <= F_2 ; Pull']);
    expect(fixed('d = 300 mm')).toEqual(['d', 'd_1 = 300 mm']);
    expect(fixed('F_1 = 300 N')).toEqual(['F_1', 'F_3 = 300 N']);
    expect(help('F_1 <=').problems[0]?.message).toContain('right side');
    expect(help('x = ? where d = F_1 between 1 N to 2 N').problems[0]?.severity).toBe('error');
  });
});

describe('the line as it will print', () => {
  it('has, in every derived line of the built-in sheets, the symbols of the record, and closes wherever the record does', () => {
    const folder = new URL('../../templates/', import.meta.url);
    let closing = 0;
    let same = 0;
    for (const file of readdirSync(folder)
      .filter((name) => name.endsWith('.sheet.json'))
      .slice(0, 12)) {
      const read = readSheet(readFileSync(new URL(file, folder), 'utf8'));
      if (!read.ok) throw new Error(file);
      const sheet = calculate(read.value, solver);
      for (const step of makeRecord(sheet).steps) {
        const state = sheet.state(step.cell);
        const [each] = step.cases;
        if (state?.kind !== 'derived' || state.formula === undefined || each === undefined || each.result === null) continue;
        const draft = checkFormula(sheet, state.cell.formula, {
          cell: state.cell.id,
          ...(state.cell.unit ? { unit: state.cell.unit } : {}),
        });
        const line = liveLine(sheet, draft.formula ?? state.formula, draft.unit, draft.cases[0], 0);
        expect(step.symbols).toBe(`${step.symbol} = ${line.symbols}`);
        expect(draft.words).toBe(state.words);
        if (each.closes) {
          expect(line.closes, `${file} ${step.number}`).toBe(true);
          closing += 1;
          if (each.result === line.result) same += 1;
        }
      }
    }
    expect(closing).toBeGreaterThan(60);
    // The record raises digits where a later line needs them; most results have the sheet's digits all the same.
    expect(same / closing).toBeGreaterThan(0.6);
  });

  it('of a criterion is cut at its relation, in parentheses or out', () => {
    expect(splitComparison(' F_1 ≤ (d > n ? 1 : 2) ')).toEqual({
      left: 'F_1',
      leftAt: 1,
      relation: '<=',
      right: '(d > n ? 1 : 2)',
      rightAt: 7,
    });
    expect(splitComparison('a < b < c')).toBeUndefined();
    expect(splitComparison('a + b')).toBeUndefined();
    expect(live('comparison', 'F_1 > F_2', calculation, { reading: 0 })).toMatchObject({
      problems: [],
      results: ['met'],
      words: 'force, units agree · met',
    });
    expect(live('comparison', 'F_1', calculation, { reading: 0 }).problems[0]?.code).toBe('no-relation');
    expect(live('equation', 'F_1 = x', calculation, { reading: 0, name: 'x', unit: 'N' }).problems).toEqual([]);
  });

  it('tells known names from others', () => {
    const text = 'F_1*entry(surfaces, mu_dry, pair) + x*sin(pi) - "3 N"';
    expect(
      marksOfFormula(text, (name) => name === 'F_1' || name === 'pair').map(
        ({ kind, from, to }) => `${kind} ${text.slice(from, to)}`,
      ),
    ).toEqual([
      'name F_1',
      'function entry',
      'table surfaces',
      'table mu_dry',
      'name pair',
      'unknown x',
      'function sin',
      'constant pi',
      'quoted "3 N"',
    ]);
  });
});

describe('the fields of a cell', () => {
  it('put back what they took out: every field of every cell of the built-in sheets', () => {
    const folder = new URL('../../templates/', import.meta.url);
    let count = 0;
    for (const file of readdirSync(folder).filter((name) => name.endsWith('.sheet.json'))) {
      const read = readSheet(readFileSync(new URL(file, folder), 'utf8'));
      if (!read.ok) throw new Error(file);
      const sheet = calculate(read.value, solver);
      for (const cell of read.value.cells) {
        const keys = new Set(fieldsOf(cell, sheet).map((field) => field.key.split('.')[0] ?? ''));
        for (const key of Object.keys(cell))
          if (!['id', 'kind', 'columns', 'rows', 'image', 'byCase'].includes(key)) expect(keys, cell.id).toContain(key);
        for (const field of fieldsOf(cell, sheet)) {
          expect(withFieldText(cell, field, fieldText(cell, field.key)), `${file} ${cell.id} ${field.key}`).toEqual(cell);
          if (field.input !== 'value' && field.input !== 'unit' && field.input !== 'formula') continue;
          const { problems } = checkField(cell, field, sheet);
          expect(
            problems.filter((problem) => problem.severity === 'error'),
            `${file} ${cell.id} ${field.key}`,
          ).toEqual([]);
          count += 1;
        }
      }
    }
    expect(count).toBeGreaterThan(800);
  });

  it('leave no empty key behind, and keep one that is needed', () => {
    const cell: Cell = {
      id: 'g',
      kind: 'given',
      name: 'F',
      value: '1 N',
      byCase: { start: '2 N' },
      source: 'x',
      carriedOver: true,
    };
    const cases = calculate({ ...base, cases: [{ id: 'run' }, { id: 'start' }] });
    const field = (key: string) => fieldsOf(cell, cases).find((one) => one.key === key) ?? never();
    expect(withFieldText(cell, field('byCase.start'), '')).toEqual({
      id: 'g',
      kind: 'given',
      name: 'F',
      value: '1 N',
      source: 'x',
      carriedOver: true,
    });
    expect(withFieldText(cell, field('source'), ' ')).not.toHaveProperty('source');
    expect(withFieldText(cell, field('carriedOver'), 'false')).not.toHaveProperty('carriedOver');
    expect(withFieldText(cell, field('value'), '')).toMatchObject({ value: '' });
  });

  it('say what is wrong with their own text', () => {
    const check = (cell: Cell, key: string) =>
      checkField(cell, fieldsOf(cell, calculation).find((one) => one.key === key) ?? never(), calculation).problems[0];
    const given: Cell = { id: 'g', kind: 'given', name: 'F_1', value: '3 m', unit: 'N', range: '3 to 1' };
    expect(check(given, 'name')?.message).toContain('already');
    expect(check(given, 'value')?.message).toContain('length');
    expect(check(given, 'range')?.code).toBe('range-form');
    const criterion: Cell = { id: 'k', kind: 'criterion', left: 'F_1', relation: '<=', right: 'F_1 - F_22' };
    expect(check(criterion, 'left')).toBeUndefined();
    expect(check(criterion, 'right')?.at).toEqual([6, 10]);
  });
});

function never(): never {
  throw new Error('not there');
}
