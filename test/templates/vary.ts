// Random variations of the givens of a sheet within their ranges, from a seed.
//
// 1. A range over more than a decade is drawn by its logarithm, so that small values come up as often as large ones.
// 2. One draw in eight is an end of the range: limits fail in corners.
// 3. A drawn value has four significant digits, as an author would type it; a choice is drawn from the rows of its table.
// Not here: what is expected of the varied sheet.

import { fromSI, readUnit, readValue } from '../../src/quantity/index.ts';
import type { Cell, GivenCell, Sheet } from '../../src/sheet/index.ts';

/** Uniform numbers in [0, 1) from a 32-bit seed (mulberry32, public domain). */
export function randomFrom(seed: number): () => number {
  let state = seed >>> 0;
  return () => {
    state = (state + 0x6d2b79f5) >>> 0;
    let mixed = Math.imul(state ^ (state >>> 15), state | 1);
    mixed ^= mixed + Math.imul(mixed ^ (mixed >>> 7), mixed | 61);
    return ((mixed ^ (mixed >>> 14)) >>> 0) / 4294967296;
  };
}

export function rangeOf(cell: GivenCell): readonly [low: number, high: number] | undefined {
  const ends = cell.range?.split(' to ') ?? [];
  const [low, high] = ends.map((end) => readValue(end, { decimalSign: '.' }));
  return low?.ok && high?.ok ? [low.value.si, high.value.si] : undefined;
}

function draw(cell: GivenCell, random: () => number): string {
  const range = rangeOf(cell);
  const unit = readUnit(cell.unit ?? '1');
  if (!range || !unit.ok) throw new Error(`${cell.name}: no range or no unit to draw from`);
  const [low, high] = range;
  const byLogarithm = low > 0 && high / low > 10;
  const corner = random();
  const inside = byLogarithm ? low * (high / low) ** random() : low + (high - low) * random();
  const si = corner < 1 / 16 ? low : corner > 15 / 16 ? high : inside;
  const shown = cell.unit === undefined || cell.unit === '1' ? '' : ` ${cell.unit}`;
  return `${Number(fromSI(si, unit.value).toPrecision(4))}${shown}`;
}

function drawChoice(cell: GivenCell, cells: readonly Cell[], random: () => number): string {
  const [table, column] = (cell.choices ?? '').split('.');
  for (const other of cells) {
    if (other.kind !== 'table' || other.name !== table) continue;
    const at = other.columns.findIndex((one) => one.name === column);
    return other.rows[Math.floor(random() * other.rows.length)]?.[at] ?? '';
  }
  throw new Error(`${cell.name}: no table ${table}`);
}

/** The sheet with every given drawn anew, in each case in which it has a value of its own. */
export function varied(sheet: Sheet, random: () => number): Sheet {
  const cells = sheet.cells.map((cell): Cell => {
    if (cell.kind !== 'given') return cell;
    if (cell.choices !== undefined) return { ...cell, value: drawChoice(cell, sheet.cells, random) };
    const value = draw(cell, random);
    if (cell.byCase === undefined) return { ...cell, value };
    return { ...cell, value, byCase: Object.fromEntries(Object.keys(cell.byCase).map((id) => [id, draw(cell, random)])) };
  });
  return { ...sheet, cells };
}

/** One given drawn anew, all others as they stand: finds what a single value can upset. */
export function variedInOne(sheet: Sheet, name: string, random: () => number): Sheet {
  const all = varied(sheet, random);
  return {
    ...sheet,
    cells: sheet.cells.map((cell, index) => (cell.kind === 'given' && cell.name === name ? all.cells[index]! : cell)),
  };
}
