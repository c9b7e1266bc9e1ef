// The record of a sheet beside its template: one count at the head, notes only where something is not the template's.

import { readFileSync } from 'node:fs';
import { expect, it } from 'vitest';
import { makeRecord, recordHtml, recordJson } from '../../src/record/index.ts';
import { type Cell, calculate, compareWithTemplate, newFromTemplate, readSheet, type Sheet } from '../../src/sheet/index.ts';

function template(id: string): Sheet {
  const read = readSheet(readFileSync(new URL(`../../templates/${id}.sheet.json`, import.meta.url), 'utf8'));
  if (!read.ok) throw new Error(read.problems[0]?.message);
  return read.value;
}
const capstan = template('capstan');
const made = newFromTemplate(capstan);
const recordOf = (sheet: Sheet) => makeRecord(calculate(sheet), { template: compareWithTemplate(sheet, capstan) });
const computed = capstan.cells.filter(({ kind }) => kind === 'derived' || kind === 'criterion' || kind === 'sought').length;

it('counts the formulas of an untouched sheet, and puts a note on no line', () => {
  const record = recordOf(made);
  expect(record.origin).toBe(`template capstan, version 1; ${computed} formulas and criteria untouched`);
  const without = makeRecord(calculate(made));
  expect(record.steps.map(({ notes }) => notes)).toEqual(without.steps.map(({ notes }) => notes));
  expect(new Set(record.steps.map((step) => step.template))).toEqual(new Set(['untouched']));
  expect(without.steps.every((step) => step.template === undefined)).toBe(true);
});

it('shows what a changed formula was, what is not in the template, and what was left out', () => {
  const cells = made.cells.flatMap((cell): Cell[] => {
    if (cell.kind === 'derived' && cell.name === 'k') return [{ ...cell, formula: 'exp(mu*theta)*1' }];
    if (cell.kind === 'derived' && cell.name === 'N_req') return [];
    return [cell];
  });
  const own: Cell = { id: 'own', kind: 'derived', name: 'F_own', title: 'Own', formula: '2*F_load', unit: 'N', source: 's' };
  const typed: Cell = { id: 'typed', kind: 'given', name: 'x_own', value: '1', basis: 'assumed', source: 's' };
  const record = recordOf({ ...made, cells: [...cells, own, typed] });
  const notes = (name: string) =>
    record.steps
      .find((step) => step.name === name)
      ?.notes.filter((note) => note.includes('template capstan,') || note.endsWith('template capstan'));
  expect(notes('k')).toEqual([expect.stringMatching(/^formula changed: in template capstan, version 1, it was (?:exp|e\^)/)]);
  expect(notes('F_own')).toEqual(['formula not in template capstan']);
  expect(notes('x_own')).toEqual([]);
  expect(record.origin).toContain('; 1 changed; 1 added; 1 left out (N_req)');
  const json = recordJson(record);
  expect(json.steps.find((step) => step.name === 'k')?.template).toBe('changed');
  expect(json.steps.find((step) => step.name === 'F_own')?.template).toBe('added');
  expect(recordJson(makeRecord(calculate(made))).steps[0]?.template).toBeNull();
});

it('says when the template is of another version than the sheet was made from', () => {
  const older: Sheet = { ...made, template: { id: 'capstan', version: 1 } };
  const newer: Sheet = { ...capstan, templateInfo: { ...capstan.templateInfo!, version: 3 } };
  const record = makeRecord(calculate(older), { template: compareWithTemplate(older, newer) });
  expect(record.origin).toBe(
    `template capstan, version 1; beside template capstan, version 3, the sheet was made from version 1: ${computed} formulas and criteria untouched`,
  );
});

it('lists at the head what is not the template’s, with was and now, and says when nothing could be compared', () => {
  const cells = made.cells.flatMap((cell): Cell[] => {
    if (cell.kind === 'derived' && cell.name === 'k') return [{ ...cell, formula: 'exp(mu*theta)*1' }];
    if (cell.kind === 'derived' && cell.name === 'N_req') return [];
    return [cell];
  });
  const own: Cell = { id: 'own', kind: 'derived', name: 'F_own', title: 'Own', formula: '2*F_load', unit: 'N', source: 's' };
  const was = capstan.cells.find((cell) => cell.kind === 'derived' && cell.name === 'k');
  const record = recordOf({ ...made, cells: [...cells, own] });
  expect(record.beside?.words).toBe('Formulas as in template capstan, version 1, except:');
  const number = (name: string) => record.steps.find((step) => step.name === name)?.number;
  expect(
    record.beside?.differences.map(({ what, number, name, was, now }) => [
      what,
      number,
      name,
      was.split(',')[0],
      now.split(',')[0],
    ]),
  ).toEqual([
    ['changed', number('k'), 'k', was?.kind === 'derived' ? was.formula : '', 'exp(mu*theta)*1'],
    ['added', number('F_own'), 'F_own', '', '2*F_load'],
    ['left out', '', 'N_req', expect.any(String), ''],
  ]);
  const page = recordHtml(record, { faces: [], formulaStyle: '' });
  expect(page).toContain('<h2>Formulas beside the template</h2><p>Formulas as in template capstan, version 1, except:</p>');
  expect(page).toContain('<code>exp(mu*theta)*1</code>');
  expect(recordOf(made).beside).toEqual({ words: 'Formulas as in template capstan, version 1.', differences: [] });
  const alone = makeRecord(calculate(made));
  expect(alone.beside?.words).toBe('The formulas were not compared: template capstan, version 1, is not at hand.');
  const { template: _, ...free } = made;
  expect(makeRecord(calculate(free)).beside).toBeNull();
});
