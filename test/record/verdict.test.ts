// Utilisations and rooms at the edge: no printed number crosses the limit. Expected values by hand.

import { describe, expect, test } from 'vitest';
import { plainNumeral } from '../../src/quantity/index.ts';
import { holds, room, utilisationNumeral } from '../../src/record/verdict.ts';
import type { Relation } from '../../src/sheet/index.ts';

describe('utilisation', () => {
  const rows: readonly (readonly [value: number, relation: Relation, met: boolean, printed: string])[] = [
    [0.91, '<=', true, '0.91'],
    [0.9001, '<=', true, '0.91'],
    [0.5, '<=', true, '0.50'],
    [0.0123, '<=', true, '0.013'],
    [0.00456, '>=', true, '0.0046'],
    [0.0991, '<=', true, '0.10'],
    [0.9951, '<=', true, '1.00'],
    [1, '<=', true, '1.00'],
    [0.9951, '<', true, '0.996'],
    [0.99999, '>', true, '0.99999'],
    [1.0001, '<=', false, '1.01'],
    [1.11, '>=', false, '1.11'],
    [12.341, '<=', false, '12.35'],
    [741.7103, '<=', false, '741.72'],
    [7417.103, '<=', false, '7418'],
    [74171.03, '<=', false, '7.418e+4'],
    // Not met although the quotient of the doubles is 1: the sides differ by less than the quotient can hold.
    [1, '<=', false, '1.01'],
    // Not met with < although both sides are equal: at the limit is not below it.
    [1, '<', false, '1.00'],
  ];
  test.each(rows)('%d with %s (met: %s) prints %s', (value, relation, met, printed) => {
    expect(plainNumeral(utilisationNumeral(value, relation, met))).toBe(printed);
  });
});

test('room is positive where something is left, whichever way the relation points', () => {
  expect(room(3, '<=', 5)).toBe(2);
  expect(room(3, '>=', 5)).toBe(-2);
  expect(holds(3, '<', 3)).toBe(false);
  expect(holds(3, '>=', 3)).toBe(true);
});
