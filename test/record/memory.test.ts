// A record that is made from the one before equals one made from nothing, through every edit; and what did not move is taken over.

import { readdirSync, readFileSync } from 'node:fs';
import fc from 'fast-check';
import { describe, expect, test } from 'vitest';
import { makeRecord, recordMaker } from '../../src/record/index.ts';
import { applyEdit, type Cell, calculate, readSheet, type Sheet } from '../../src/sheet/index.ts';
import { solver } from '../../src/study/index.ts';
import { cellOf } from '../sheet/build.ts';
import { start, step } from '../sheet/random-days.ts';

const seed = Number(process.env['TIGHTSIDE_SEED'] ?? 20_261_201);
const folder = new URL('../../templates/', import.meta.url);

function templateOf(file: string): Sheet {
  const read = readSheet(readFileSync(new URL(file, folder), 'utf8'));
  if (!read.ok) throw new Error(`${file} cannot be read`);
  return read.value;
}

/** A value with other digits, one digit more or less, a text that cannot be read, or none. */
function otherValue(text: string, how: number): string {
  if (how % 11 === 0) return '';
  if (how % 11 === 1) return `${text} ?`;
  const digits = [...text].map((sign, at) => (/[1-9]/u.test(sign) ? String(1 + ((Number(sign) + how + at) % 9)) : sign)).join('');
  return how % 3 === 0 ? digits.replace(/(\d)(?!.*\d)/u, `$1${how % 10}`) : digits;
}

describe('a record made after another one', () => {
  test('equals one made from nothing through random days', () => {
    fc.assert(
      fc.property(fc.array(step, { minLength: 1, maxLength: 25 }), (steps) => {
        let sheet: Sheet = { format: 'tightside-sheet/1', title: 'Random', cells: start.map(cellOf) };
        const kept = calculate(sheet);
        const make = recordMaker();
        for (const next of steps) {
          const edit = next(sheet);
          if (edit === undefined) continue;
          sheet = applyEdit(sheet, edit).sheet;
          kept.update(sheet);
          expect(make(kept)).toEqual(makeRecord(calculate(sheet)));
        }
      }),
      { numRuns: 50, seed },
    );
  }, 300_000);

  test.each(readdirSync(folder))(
    'equals one made from nothing while values of %s are typed over',
    (file) => {
      const first = templateOf(file);
      const givens = first.cells.flatMap((cell, at) => (cell.kind === 'given' && cell.choices === undefined ? [at] : []));
      fc.assert(
        fc.property(fc.array(fc.tuple(fc.nat(1000), fc.nat(1000)), { minLength: 1, maxLength: 8 }), (edits) => {
          let sheet = first;
          const kept = calculate(sheet, solver);
          const make = recordMaker();
          make(kept);
          for (const [which, how] of edits) {
            const place = givens[which % givens.length];
            const cells = sheet.cells.map((cell, at): Cell => {
              if (at !== place || cell.kind !== 'given') return cell;
              // Every fourth time the way back.
              return how % 4 === 0 ? first.cells[at]! : { ...cell, value: otherValue(cell.value, how) };
            });
            sheet = { ...sheet, cells };
            kept.update(sheet);
            expect(make(kept)).toEqual(makeRecord(calculate(sheet, solver)));
          }
        }),
        { numRuns: 5, seed },
      );
    },
    300_000,
  );

  test('takes over every line that neither moved nor prints a number that moved', () => {
    const sheet: Sheet = {
      format: 'tightside-sheet/1',
      title: 'Two chains',
      cells: ['a = 2 m', 'b = 3 m', 'c [m] := 2*a', 'd [m] := 2*b', 'c < d', '# Part', 'the value is {d}'].map(cellOf),
    };
    const kept = calculate(sheet);
    const make = recordMaker();
    const before = make(kept);
    kept.update({
      ...sheet,
      cells: sheet.cells.map((cell, at) => (at === 1 && cell.kind === 'given' ? { ...cell, value: '4 m' } : cell)),
    });
    const after = make(kept);
    expect(after.lines.map((line, at) => line === before.lines[at])).toEqual([true, false, true, false, false, true, false]);
  });
});
