// Speed of the engine, as ratios: ours divided by a reference that does the same work in the same run.
//
//   recalculation-10000        a change that touches 10 000 derived cells, against the formula library's compiled unit arithmetic
//   study-handwritten          10^5 samples of the open flat belt, all inputs varying, against a loop written by hand
//   study-library              the same samples against the formula library, compiled, on plain numbers
//   growth-10000, -50000       a whole calculation, time per derived cell, against that of a sheet of 1 000: near 1 where it is linear
//   recalculation-growth       a change that touches all of 50 000 derived cells, per cell, against that of 1 000
//
// Both sides are prepared once; only the repeated work is measured. For growth a whole calculation is that work, and the small
// sheet is calculated as many times as makes up the same number of cells.

import { readFileSync } from 'node:fs';
import { all, create } from 'mathjs';
import type { Cell, Sheet } from '../../src/sheet/index.ts';
import { calculate, readSheet } from '../../src/sheet/index.ts';
import { flatBelt, inputs, outputs } from './flat-belt.ts';
import { type Measured, measure } from './pairs.ts';

const math = create(all!);

function print(name: string, measured: Measured): void {
  console.log(
    `ratio ${name} ${measured.ratio.toPrecision(3)}   (${measured.ours.toFixed(2)} ms against ${measured.reference.toFixed(2)} ms)`,
  );
}

function sum(values: Iterable<number>): number {
  let total = 0;
  for (const value of values) total += value;
  return total;
}

// ---- 10 000 derived cells that follow from one given ----

/** A sheet of `count` derived cells that all follow from d; and their formulas. */
function chains(count: number): { readonly formulas: readonly string[]; sheet(value: string): Sheet } {
  const cells: Cell[] = [
    { id: 'd', kind: 'given', name: 'd', value: '200 mm' },
    { id: 'n', kind: 'given', name: 'n', value: '1450 r/min' },
    { id: 'F', kind: 'given', name: 'F', value: '1200 N' },
  ];
  // Three shapes in turn, each using the given d and the cell before it of its own kind: speed, torque, power.
  const formulas: string[] = [];
  for (let i = 0; i < count; i += 1) {
    const formula = i % 3 === 0 ? 'pi*d*n' : i % 3 === 1 ? 'F*d/2' : `F*q_${i - 2}`;
    formulas.push(formula);
    cells.push({ id: `q_${i}`, kind: 'derived', name: `q_${i}`, formula });
  }
  return {
    formulas,
    sheet: (value) => ({
      format: 'tightside-sheet/1',
      title: 'Cells that follow from one given',
      cells: [{ id: 'd', kind: 'given', name: 'd', value }, ...cells.slice(1)],
    }),
  };
}

function recalculation(): void {
  const count = 10_000;
  const { formulas, sheet } = chains(count);
  const sheets = [sheet('200 mm'), sheet('210 mm')];
  const calculation = calculate(sheets[0]!);
  let turn = 0;
  const ours = (): number => {
    turn = 1 - turn;
    calculation.update(sheets[turn]!);
    return calculation.named('q_9998')!.si[0]! + calculation.named('q_9997')!.si[0]! + calculation.named('q_9999')!.si[0]!;
  };

  const compiled = formulas.map((formula) => math.compile(formula));
  const scope = new Map<string, unknown>([
    ['n', math.unit(1450 / 60, '1/s')],
    ['F', math.unit(1200, 'N')],
  ]);
  const sizes = [math.unit(200, 'mm'), math.unit(210, 'mm')];
  let other = 0;
  const reference = (): number => {
    other = 1 - other;
    scope.set('d', sizes[other]!);
    for (let i = 0; i < count; i += 1) scope.set(`q_${i}`, compiled[i]!.evaluate(scope));
    return sumOfUnits(scope, ['q_9997', 'q_9998', 'q_9999']);
  };
  print('recalculation-10000', measure({ name: 'recalculation-10000', ours, reference, tolerance: 1e-12 }));
  if (calculation.ran.length !== count + 1)
    throw new Error(`a change ran ${calculation.ran.length} cells instead of ${count + 1}`);
}

/** Sum of coherent SI values. */
function sumOfUnits(scope: ReadonlyMap<string, unknown>, names: readonly string[]): number {
  return sum(names.map((name) => (scope.get(name) as { toSI(): { toNumeric(): number } }).toSI().toNumeric()));
}

// ---- growth with the size of the sheet ----

/** Works through `cells` derived cells in sheets of `size`; the last cell of each sheet goes into the checksum. */
function wholeCalculations(size: number, cells: number): () => number {
  const { sheet } = chains(size);
  return () => {
    let total = 0;
    // A sheet object is made anew each time: readings are kept with the cells they belong to.
    for (let done = 0; done < cells; done += size) {
      const calculation = calculate(structuredClone(sheet('200 mm')));
      total += calculation.named(`q_${size - 1 - ((size - 1) % 3)}`)!.si[0]! * size;
    }
    return total;
  };
}

function updates(size: number, cells: number): () => number {
  const { sheet } = chains(size);
  const sheets = [sheet('200 mm'), sheet('210 mm')];
  const calculation = calculate(sheets[0]!);
  return () => {
    let total = 0;
    // Two updates a turn, so that each turn ends where it began.
    for (let done = 0; done < cells; done += size) {
      for (const next of [sheets[1]!, sheets[0]!]) {
        calculation.update(next);
        if (calculation.ran.length !== size + 1) throw new Error(`a change ran ${calculation.ran.length} cells of ${size}`);
        total += calculation.named(`q_${size - 1 - ((size - 1) % 3)}`)!.si[0]! * size;
      }
    }
    return total;
  };
}

function growth(): void {
  for (const size of [10_000, 50_000]) {
    const name = `growth-${size}`;
    const ours = wholeCalculations(size, size);
    print(name, measure({ name, ours, reference: wholeCalculations(1_000, size), tolerance: 1e-12, pairs: 5 }));
  }
  const name = 'recalculation-growth';
  const size = 50_000;
  print(name, measure({ name, ours: updates(size, size), reference: updates(1_000, size), tolerance: 1e-12 }));
}

// ---- 10^5 samples of the open flat belt ----

/** Every number of every column, not only those of the checksum. */
function sameColumns(ours: readonly Float64Array[], reference: readonly Float64Array[]): void {
  for (const [at, column] of reference.entries()) {
    const mine = ours[at]!;
    for (let i = 0; i < column.length; i += 1) {
      if (!(Math.abs(mine[i]! - column[i]!) <= 1e-12 * Math.abs(column[i]!)))
        throw new Error(`${outputs[at]} of sample ${i} is ${mine[i]}, by hand ${column[i]}`);
    }
  }
}

function studies(): void {
  const read = readSheet(readFileSync('templates/flat-belt-open.sheet.json', 'utf8'));
  if (!read.ok) throw new Error('the flat belt template cannot be read');
  const calculation = calculate(read.value);
  const count = 100_000;
  let seed = 20_261_201;
  const random = (): number => {
    seed = (Math.imul(seed, 1_664_525) + 1_013_904_223) >>> 0;
    return seed / 2 ** 32;
  };
  const samples = inputs.map((name) => {
    const centre = calculation.named(name)!.si[0]!;
    return Float64Array.from({ length: count }, () => centre * (0.95 + 0.1 * random()));
  });
  const study = calculation.whatIf({ vary: inputs, want: outputs, caseIndex: 0 });
  const missing = study.computes.filter((cell) => !(outputs as readonly string[]).includes(cell));
  if (missing.length > 0) throw new Error(`the loop by hand does not compute ${missing.join(', ')}`);
  const checksum = (columns: readonly Float64Array[]): number => {
    let total = 0;
    for (const column of columns)
      total +=
        Math.log1p(Math.abs(column[0]!)) + Math.log1p(Math.abs(column[count - 1]!)) + Math.log1p(Math.abs(column[count >> 1]!));
    return total;
  };
  const mine = (): number => checksum(study.run(samples, count));
  const stored = outputs.map(() => new Float64Array(count));
  const byHand = (): number => {
    flatBelt(samples, stored, count);
    return checksum(stored);
  };
  print('study-handwritten', measure({ name: 'study-handwritten', ours: mine, reference: byHand, tolerance: 1e-12 }));
  sameColumns(study.run(samples, count), stored);

  const compiled = outputs.map((name) => {
    const state = calculation.named(name)!;
    if (state.kind !== 'derived') throw new Error(`${name} is not derived`);
    return math.compile(state.cell.formula.replaceAll('ln(', 'log('));
  });
  const few = 2_000;
  const byLibrary = (): number => {
    const scope = new Map<string, number>();
    for (let i = 0; i < few; i += 1) {
      for (let j = 0; j < inputs.length; j += 1) scope.set(inputs[j]!, samples[j]![i]!);
      for (let j = 0; j < outputs.length; j += 1) {
        const value = compiled[j]!.evaluate(scope) as number;
        scope.set(outputs[j]!, value);
        stored[j]![i] = value;
      }
    }
    return stored.reduce((total, column) => total + Math.log1p(Math.abs(column[few - 1]!)), 0);
  };
  const mineFew = (): number =>
    study.run(samples, few).reduce((total, column) => total + Math.log1p(Math.abs(column[few - 1]!)), 0);
  print('study-library', measure({ name: 'study-library', ours: mineFew, reference: byLibrary, tolerance: 1e-12 }));
}

recalculation();
studies();
growth();
