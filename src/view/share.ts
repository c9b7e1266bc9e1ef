// Keeps of a new record what prints like the old one: the same object means "draw nothing again".
//
// Not here: what a line holds (src/record).

import type { Line, RecordModel } from '../record/index.ts';
import type { Cell, Sheet } from '../sheet/index.ts';

/** Deep equality of plain data. */
export function alike(one: unknown, other: unknown): boolean {
  if (Object.is(one, other)) return true;
  if (typeof one !== 'object' || typeof other !== 'object' || one === null || other === null) return false;
  if (Array.isArray(one) !== Array.isArray(other)) return false;
  const keys = Object.keys(one);
  if (keys.length !== Object.keys(other).length) return false;
  const left = one as Record<string, unknown>;
  const right = other as Record<string, unknown>;
  return keys.every((key) => Object.hasOwn(right, key) && alike(left[key], right[key]));
}

/** The same things in the same order. */
export function alikeList(one: readonly unknown[], other: readonly unknown[]): boolean {
  if (one.length !== other.length) return false;
  for (let at = 0; at < one.length; at += 1) if (!Object.is(one[at], other[at])) return false;
  return true;
}

export const cellOf = (line: Line): string => (line.kind === 'step' ? line.step.cell : line.cell);

export function shareModel(before: RecordModel, after: RecordModel): RecordModel {
  const known = new Map(before.lines.map((line) => [cellOf(line), line]));
  const lines = after.lines.map((line) => {
    const old = known.get(cellOf(line));
    return old !== undefined && alike(old, line) ? old : line;
  });
  const steps = lines.flatMap((line) => (line.kind === 'step' ? [line.step] : []));
  const parts = { ...after, lines, steps } as Record<keyof RecordModel, unknown>;
  for (const key of Object.keys(after) as (keyof RecordModel)[]) {
    if (key !== 'lines' && key !== 'steps' && alike(before[key], after[key])) parts[key] = before[key];
  }
  return parts as unknown as RecordModel;
}

const byId = new WeakMap<readonly Cell[], ReadonlyMap<string, Cell>>();

export function cellsById({ cells }: Sheet): ReadonlyMap<string, Cell> {
  const known = byId.get(cells) ?? new Map(cells.map((cell) => [cell.id, cell]));
  byId.set(cells, known);
  return known;
}
