// The tables of temperature kinds, complete: all pairs of operands for every way of putting them together.
//
// Rules: a reading of a scale with an arbitrary zero is a point, differences are vectors (ISO 80000-5:2019, 5-1 and 5-2:
// thermodynamic and Celsius temperature; NIST SP 811, 8.5: t/°C = T/K − 273.15; intervals are equal in K and °C).

import { describe, expect, it } from 'vitest';
import {
  likeTemperatures,
  sumOfTemperatures,
  type TemperatureOperand,
  temperatureAgainst,
} from '../../src/formula/temperature.ts';

const operands = {
  reading: { kind: 'reading', zero: false },
  difference: { kind: 'difference', zero: false },
  kelvin: { kind: 'none', zero: false },
  zero: { kind: 'none', zero: true },
} as const satisfies Record<string, TemperatureOperand>;
type Name = keyof typeof operands;

describe('sums', () => {
  it.each<[Name, Name, plus: string, minus: string]>([
    ['reading', 'reading', 'reading + reading', 'difference'],
    ['reading', 'difference', 'reading', 'reading'],
    ['reading', 'kelvin', 'reading', 'reading'],
    ['reading', 'zero', 'reading and difference', 'reading and difference'],
    ['difference', 'reading', 'reading', 'difference - reading'],
    ['difference', 'difference', 'difference', 'difference'],
    ['difference', 'kelvin', 'none', 'none'],
    ['difference', 'zero', 'difference', 'difference'],
    ['kelvin', 'reading', 'reading', 'difference - reading'],
    ['kelvin', 'difference', 'none', 'none'],
    ['kelvin', 'kelvin', 'none', 'none'],
    ['kelvin', 'zero', 'none', 'none'],
    ['zero', 'reading', 'reading and difference', 'reading and difference'],
    ['zero', 'difference', 'difference', 'difference'],
    ['zero', 'kelvin', 'none', 'none'],
    ['zero', 'zero', 'none', 'none'],
  ])('%s and %s: + gives %s, - gives %s', (left, right, plus, minus) => {
    expect(sumOfTemperatures('+', operands[left], operands[right])).toBe(plus);
    expect(sumOfTemperatures('-', operands[left], operands[right])).toBe(minus);
  });
});

describe('min, max, comparison and branches', () => {
  it.each<[Name, Name, string]>([
    ['reading', 'reading', 'reading'],
    ['reading', 'difference', 'reading and difference'],
    ['reading', 'kelvin', 'reading and difference'],
    ['reading', 'zero', 'reading and difference'],
    ['difference', 'difference', 'difference'],
    ['difference', 'kelvin', 'none'],
    ['difference', 'zero', 'difference'],
    ['kelvin', 'kelvin', 'none'],
    ['kelvin', 'zero', 'none'],
    ['zero', 'zero', 'none'],
  ])('%s with %s: %s, in either order', (left, right, outcome) => {
    expect(likeTemperatures([operands[left], operands[right]])).toBe(outcome);
    expect(likeTemperatures([operands[right], operands[left]])).toBe(outcome);
  });
});

describe('declared units', () => {
  it.each<[Name, reading: string | undefined, kelvin: string | undefined]>([
    ['reading', undefined, 'reading against difference'],
    ['difference', 'difference against reading', undefined],
    ['kelvin', undefined, undefined],
    ['zero', 'reading and difference', undefined],
  ])('%s declared as a reading: %s; in kelvin: %s', (operand, reading, kelvin) => {
    expect(temperatureAgainst(operands[operand], true)).toBe(reading);
    expect(temperatureAgainst(operands[operand], false)).toBe(kelvin);
  });
});
