// What every built-in template must be: complete, typed, sourced, closed, and able to say no.
//
// 1. One harness for all files of templates/, by their own data; what outside programs rely on stands in names.ts.
// 2. Random draws come from one seed, TIGHTSIDE_SEED or a fixed one, which stands in the name of the test.
// Not here: which file tests which templates (*.test.ts beside), agreement with published examples (test/reference).

import { readdirSync, readFileSync } from 'node:fs';
import { describe, expect, test } from 'vitest';
import { fromSI } from '../../src/quantity/index.ts';
import { makeRecord } from '../../src/record/index.ts';
import {
  type Calculation,
  calculate,
  type DerivedCell,
  type GivenCell,
  readSheet,
  type Sheet,
  writeSheet,
} from '../../src/sheet/index.ts';
import { solver } from '../../src/study/index.ts';
import { fault } from './lines.ts';
import { listOf, publishedNames } from './names.ts';
import { randomFrom, rangeOf, varied, variedInOne } from './vary.ts';

const folder = new URL('../../templates/', import.meta.url);
const ending = '.sheet.json';
export const templateIds = readdirSync(folder)
  .filter((file) => file.endsWith(ending))
  .map((file) => file.slice(0, -ending.length));
const seed = Number(process.env['TIGHTSIDE_SEED'] ?? 20_261_201);
const variations = 200;

function textOf(id: string): string {
  return readFileSync(new URL(`${id}${ending}`, folder), 'utf8');
}

export function sheetOf(id: string): Sheet {
  const read = readSheet(textOf(id));
  if (!read.ok) throw new Error(read.problems.map((problem) => problem.message).join('\n'));
  return read.value;
}

const said = (calculation: Calculation) =>
  calculation.problems().map((problem) => `${problem.cell}: ${problem.code}: ${problem.message}`);

/** Faults of all numeric steps that have a value, one line each. */
export function faultsOf(calculation: Calculation): string[] {
  return makeRecord(calculation).steps.flatMap((step) =>
    (step.kind !== 'derived' && step.kind !== 'sought') || !step.numeric
      ? []
      : step.cases.flatMap((one, index) => {
          const state = calculation.named(step.name ?? '');
          const si = state?.si[index] ?? Number.NaN;
          if (Number.isNaN(si) || !state?.unit) return [];
          const found = fault(step, one, si, fromSI(si, state.unit));
          return found === '' ? [] : [found];
        }),
  );
}

/** Is the cell an inverse question, or does it judge one? */
export function asks(calculation: Calculation, cell: string): boolean {
  return [cell, ...calculation.origin(cell)].some((id) => calculation.state(id)?.kind === 'sought');
}

/** What each criterion has said so far. */
class Verdicts {
  private readonly seen = new Map<string, Set<boolean>>();

  note(calculation: Calculation): void {
    for (const cell of calculation.sheet.cells) {
      const state = calculation.state(cell.id);
      if (state?.kind !== 'criterion') continue;
      const seen = this.seen.get(cell.id) ?? new Set();
      for (const met of state.met) if (met !== null) seen.add(met);
      this.seen.set(cell.id, seen);
    }
  }

  oneSided(): string[] {
    return [...this.seen].filter(([, seen]) => seen.size < 2).map(([cell, seen]) => `${cell}: only ${[...seen].join()}`);
  }
}

export function testTemplates(ids: readonly string[]): void {
  describe.each(ids)('template %s', (id) => testTemplate(id));
}

function testTemplate(id: string): void {
  const sheet = sheetOf(id);
  const calculation = calculate(sheet, solver);
  const givens = sheet.cells.filter((cell): cell is GivenCell => cell.kind === 'given');
  const derived = sheet.cells.filter((cell): cell is DerivedCell => cell.kind === 'derived');
  const names = publishedNames.get(id) ?? { givens: '', results: '' };

  test('the file is written as the program writes it', () => {
    expect(writeSheet(sheet)).toBe(textOf(id));
  });

  test('states its job, purpose, method, references, limits and cautions', () => {
    expect(sheet.templateInfo?.id).toBe(id);
    expect(sheet.templateInfo?.job).not.toBe('');
    expect(sheet.templateInfo?.limits.length).toBeGreaterThan(0);
    expect(sheet.templateInfo?.caution.length).toBeGreaterThan(80);
    expect(sheet.purpose?.length).toBeGreaterThan(40);
    expect(sheet.method?.length).toBeGreaterThan(40);
    expect(sheet.references?.length).toBeGreaterThan(0);
    const roles = new Set(sheet.cells.flatMap((cell) => (cell.kind === 'note' && cell.role ? [cell.role] : [])));
    expect([...roles].sort()).toEqual(['assumption', 'caution', 'limit']);
  });

  test('has the published names', () => {
    const have = new Set(givens.map((cell) => cell.name));
    const results = new Set(derived.map((cell) => cell.name));
    expect(listOf(names.givens).filter((name) => !have.has(name))).toEqual([]);
    expect(listOf(names.results).filter((name) => !results.has(name))).toEqual([]);
  });

  test('has no problem as it stands: every unit inferred, no number without a source, nothing used above its line', () => {
    expect(said(calculation)).toEqual([]);
    for (const cell of derived) {
      expect(cell.unit, cell.name).toBeDefined();
      expect(calculation.named(cell.name)?.type?.kind, cell.name).toBe('quantity');
    }
  });

  test('every given has title, basis, source or range, a value in its range, and waits to be confirmed', () => {
    for (const cell of givens) {
      expect(cell.title, cell.name).toBeTruthy();
      expect(cell.basis, cell.name).toBeTruthy();
      expect(cell.source || cell.range, cell.name).toBeTruthy();
      expect(cell.carriedOver, cell.name).toBe(true);
      if (cell.choices !== undefined) continue;
      const range = rangeOf(cell);
      expect(cell.unit, cell.name).toBeDefined();
      expect(range, cell.name).toBeDefined();
      for (const si of calculation.named(cell.name)?.si ?? []) {
        expect(si, cell.name).toBeGreaterThanOrEqual(range?.[0] ?? Number.NaN);
        expect(si, cell.name).toBeLessThanOrEqual(range?.[1] ?? Number.NaN);
      }
    }
  });

  test('every derived line, sought line and criterion has a title and names where it comes from', () => {
    for (const cell of sheet.cells) {
      if (cell.kind !== 'derived' && cell.kind !== 'sought' && cell.kind !== 'criterion') continue;
      expect(cell.title, cell.id).toBeTruthy();
      expect(cell.source, cell.id).toBeTruthy();
    }
  });

  test('every reference is cited and every citation has its reference', () => {
    const references = new Set((sheet.references ?? []).map((one) => one.id));
    const cited = new Set(
      [...JSON.stringify({ ...sheet, references: [] }).matchAll(/\[(R\d+)\]/g)].map((match) => match[1] ?? ''),
    );
    expect([...cited].sort()).toEqual([...references].sort());
  });

  test('every given and every derived line is used, or is a result', () => {
    const results = new Set([...listOf(names.results), ...listOf(names.further)]);
    const computing = (cellId: string) =>
      ['derived', 'criterion', 'sought'].includes(sheet.cells.find((cell) => cell.id === cellId)?.kind ?? '');
    const idle = [...givens, ...derived].filter((cell) => !results.has(cell.name) && !calculation.use(cell.id).some(computing));
    expect(idle.map((cell) => cell.name)).toEqual([]);
  });

  test('its own values close: lines evaluated by another program, printed numbers are the true ones rounded', () => {
    expect(faultsOf(calculation)).toEqual([]);
  });

  test(`${variations} variations within the ranges (seed ${seed}) close, and each criterion is seen met and not met`, () => {
    const random = randomFrom(seed);
    const verdicts = new Verdicts();
    verdicts.note(calculation);
    const faults: string[] = [];
    const errors: string[] = [];
    let whole = 0;
    for (let round = 0; round < variations; round += 1) {
      const one = calculate(varied(sheet, random), solver);
      // An impossible geometry is an error of its cells; whatever has a value must still close. An inverse question without an
      // answer stops nothing but itself and its criterion (inverse.test.ts).
      const failed = one.problems().filter((problem) => problem.severity === 'error' && !asks(one, problem.cell));
      if (failed.length === 0) whole += 1;
      else errors.push(...failed.map((problem) => `${problem.cell}: ${problem.code}`));
      verdicts.note(one);
      faults.push(...faultsOf(one).map((text) => `round ${round}: ${text}`));
    }
    expect(faults.length, faults.slice(0, 10).join('\n')).toBe(0);
    expect(whole, `variations without an error; errors: ${[...new Set(errors)].join(', ')}`).toBeGreaterThanOrEqual(
      variations / 2,
    );
    // Corners where two givens meet are rare: more draws, without their records, until each criterion has said both.
    for (let round = 0; round < 20 * variations && verdicts.oneSided().length > 0; round += 1)
      verdicts.note(calculate(varied(sheet, random), solver));
    expect(verdicts.oneSided()).toEqual([]);
  }, 120_000);

  test(`a single given moved within its range (seed ${seed}) leaves every step closed`, () => {
    const random = randomFrom(seed + 1);
    const faults = givens.flatMap((cell) =>
      faultsOf(calculate(variedInOne(sheet, cell.name, random), solver)).map((text) => `${cell.name}: ${text}`),
    );
    expect(faults.length, faults.slice(0, 10).join('\n')).toBe(0);
  }, 120_000);
}
