// Speed of the engine, as ratios: ours divided by a reference that does the same work in the same run.
//
//   recalculation-10000        a change that touches 10 000 derived cells, against the formula library's compiled unit arithmetic
//   study-handwritten          10^5 samples of the open flat belt, all inputs varying, against a loop written by hand
//   study-library              the same samples against the formula library, compiled, on plain numbers
//
// Both sides are prepared once; only the repeated work is measured.

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

function recalculation(): void {
  const count = 10_000;
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
  const sheet = (value: string): Sheet => ({
    format: 'tightside-sheet/1',
    title: 'Ten thousand cells',
    cells: [{ id: 'd', kind: 'given', name: 'd', value }, ...cells.slice(1)],
  });
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

// ---- 10^5 samples of the open flat belt ----

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
