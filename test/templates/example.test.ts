// The finished example that the page opens with: a complete calculation, every step of it closed.
//
// Not here: what its template must be (harness.ts).

import { readFileSync } from 'node:fs';
import { describe, expect, test } from 'vitest';
import { makeRecord } from '../../src/record/index.ts';
import { type Cell, calculate, type GivenCell, readSheet, writeSheet } from '../../src/sheet/index.ts';
import { solver } from '../../src/study/index.ts';
import { faultsOf, sheetOf } from './harness.ts';

const text = readFileSync(new URL('../../src/view/example.sheet.json', import.meta.url), 'utf8');
const read = readSheet(text);
if (!read.ok) throw new Error(read.problems.map((problem) => problem.message).join('\n'));
const sheet = read.value;
const calculation = calculate(sheet, solver);
const record = makeRecord(calculation);
const isGiven = (cell: Cell): cell is GivenCell => cell.kind === 'given';

describe('the finished example', () => {
  test('is written as the program writes it, and has no problem', () => {
    expect(writeSheet(sheet)).toBe(text);
    expect(calculation.problems().map((problem) => `${problem.cell}: ${problem.message}`)).toEqual([]);
  });

  test('every step closes', () => {
    expect(faultsOf(calculation)).toEqual([]);
    expect(record.steps.flatMap((step) => step.cases.filter((one) => !one.closes).map(() => step.number))).toEqual([]);
  });

  test('meets every criterion in both cases, grip at the start with less than 2 % to spare', () => {
    const criteria = record.summary.map((one) => ({ cell: one.cell, met: one.cases.map((each) => each.met) }));
    expect(criteria.filter((one) => !one.met.every((met) => met === true))).toEqual([]);
    const grip = record.summary.find((one) => one.cell === 'grip');
    expect(grip?.governing).toBe('start');
    const used = grip?.cases.find((one) => one.case === 'start')?.utilisation ?? 0;
    expect(used).toBeGreaterThan(0.98);
    // The conclusion states what the record prints.
    expect(sheet.conclusion).toContain(`grip uses ${Math.ceil(used * 100)} %`);
    const tight =
      record.summary.find((one) => one.cell === 'tight-side')?.cases.find((one) => one.case === 'start')?.utilisation ?? 0;
    expect(sheet.conclusion).toContain(`the tight strand ${Math.ceil(tight * 100)} %`);
  });

  test('is finished but for what it names: one value carried over, two to confirm, every value with basis and source', () => {
    const givens = sheet.cells.filter(isGiven);
    expect(givens.filter((cell) => cell.carriedOver).map((cell) => cell.name)).toEqual(['E_b']);
    expect(givens.filter((cell) => cell.toConfirm !== undefined).map((cell) => cell.name)).toEqual(['mu_1', 'mu_2']);
    expect(givens.filter((cell) => !cell.basis || !cell.source).map((cell) => cell.name)).toEqual([]);
  });

  test('has the formulas of its template, untouched', () => {
    const formulas = (cells: readonly Cell[]) =>
      cells.flatMap((cell) => (cell.kind === 'derived' ? [`${cell.name} = ${cell.formula}`] : []));
    expect(formulas(sheet.cells)).toEqual(formulas(sheetOf(sheet.template?.id ?? '').cells));
  });
});
