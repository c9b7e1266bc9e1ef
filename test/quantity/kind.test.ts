// Kinds of quantity in words (ISO 80000-3 and ISO 80000-4), dimensions, and the hint about mass and force.

import { describe, expect, test } from 'vitest';
import {
  addR,
  compareR,
  describeUnit,
  dimensionKey,
  dimensionless,
  dimensionOf,
  divideD,
  equalD,
  equalR,
  forceHint,
  isDimensionless,
  isZeroR,
  kindName,
  mulR,
  multiplyD,
  negR,
  powerD,
  rational,
  rationalOfText,
  signR,
  subR,
  textR,
  unitOf,
  withArticle,
} from '../../src/quantity/index.ts';

describe('kinds', () => {
  test.each([
    ['N', 'a force (N)'],
    ['lbf', 'a force (lbf)'],
    ['N·m', 'a torque (N·m)'],
    ['lbf·ft', 'a torque (lbf·ft)'],
    ['ft·lbf', 'a torque (ft·lbf)'],
    ['J', 'an energy (J)'],
    ['kJ', 'an energy (kJ)'],
    ['kW·h', 'an energy (kW·h)'],
    ['Btu', 'an energy (Btu)'],
    ['W·s', 'an energy (W·s)'],
    ['eV', 'an energy (eV)'],
    ['1', 'a number'],
    ['%', 'a number (%)'],
    ['mm/m', 'a number (mm/m)'],
    ['°', 'an angle (°)'],
    ['rad', 'an angle (rad)'],
    ['r', 'a number of revolutions (r)'],
    ['r/min', 'a rotational frequency (r/min)'],
    ['Hz', 'a frequency (Hz)'],
    ['rad/s', 'an angular velocity (rad/s)'],
    ['1/s', 'a rate (1/s)'],
    ['rad/s²', 'an angular acceleration (rad/s²)'],
    ['mm', 'a length (mm)'],
    ['mm²', 'an area (mm²)'],
    ['L', 'a volume (L)'],
    ['kg/m', 'a mass per length (kg/m)'],
    ['MPa', 'a stress or pressure (MPa)'],
    ['m/s', 'a speed (m/s)'],
    ['m/s²', 'an acceleration (m/s²)'],
    ['kW', 'a power (kW)'],
    ['kg', 'a mass (kg)'],
    ['lb', 'a mass (lb)'],
    ['kg·m²', 'a moment of inertia (kg·m²)'],
    ['°C', 'a temperature (°C)'],
    ['s', 'a time (s)'],
    ['mm/r', 'a length per revolution (mm/r)'],
    ['J/r', 'an energy per revolution (J/r)'],
    ['A', 'an electric current (A)'],
    ['kg²·m', 'a quantity of unit kg²·m'],
  ])('%s is %s', (text, words) => {
    expect(describeUnit(unitOf(text))).toBe(words);
    expect(withArticle(unitOf(text))).toBe(words);
  });

  test('without a unit, both kinds of one dimension are named', () => {
    expect(kindName(dimensionOf('L2 M T-2'))).toBe('torque or energy');
    expect(kindName(dimensionOf('L M T-2'))).toBe('force');
    expect(kindName(dimensionOf('L7'))).toBe('quantity of unit m⁷');
    // A unit text of another dimension says nothing.
    expect(kindName(dimensionOf('L'), 'N')).toBe('length');
    expect(kindName(dimensionOf('L'), 'no unit')).toBe('length');
    expect([withArticle('force'), withArticle('area'), withArticle('energy')]).toEqual(['a force', 'an area', 'an energy']);
  });

  test('where a mass was written for a force, the force is proposed', () => {
    expect(forceHint(unitOf('lb/in²'), dimensionOf('L-1 M T-2'))).toContain('write lbf/in²');
    expect(forceHint(unitOf('lb·ft'), dimensionOf('L2 M T-2'))).toContain('write lbf·ft');
    expect(forceHint(unitOf('kg'), dimensionOf('L M T-2'))).toContain('write kgf');
    expect(forceHint(unitOf('lb'), dimensionOf('L'))).toBeUndefined();
    expect(forceHint(unitOf('N'), dimensionOf('L M T-2'))).toBeUndefined();
  });
});

describe('dimensions', () => {
  test('algebra', () => {
    const [force, length] = [dimensionOf('L M T-2'), dimensionOf('L')];
    expect(dimensionKey(multiplyD(force, length))).toBe('L2 M1 T-2');
    expect(dimensionKey(divideD(force, powerD(length, rational(2))))).toBe('L-1 M1 T-2');
    expect(dimensionKey(powerD(force, rational(1, 2)))).toBe('L1/2 M1/2 T-1');
    expect(isDimensionless(divideD(force, force))).toBe(true);
    expect(dimensionKey(dimensionless)).toBe('1');
    for (const key of ['1', 'L2 M1 T-2', 'L1/2 M1/2 T-1', 'Θ-1', 'T-3 I2 N1 J1'])
      expect(dimensionKey(dimensionOf(key))).toBe(key);
    expect(equalD(unitOf('J').dimension, unitOf('N·m').dimension)).toBe(true);
    expect(() => dimensionOf('X')).toThrow(RangeError);
  });
});

describe('small rationals', () => {
  test('are in lowest terms with a positive denominator', () => {
    expect(rational(2, -4)).toEqual({ n: -1, d: 2 });
    expect(rational(0, -7)).toEqual({ n: 0, d: 1 });
    expect(textR(addR(rational(1, 2), rational(1, 3)))).toBe('5/6');
    expect(textR(subR(rational(1, 2), rational(1, 2)))).toBe('0');
    expect(textR(mulR(rational(2, 3), rational(3, 2)))).toBe('1');
    expect(Object.is(negR(rational(0)).n, 0)).toBe(true);
    expect([
      compareR(rational(1, 3), rational(1, 2)),
      signR(rational(-1, 9)),
      isZeroR(rational(0, 5)),
      equalR(rational(2, 4), rational(1, 2)),
    ]).toEqual([-1, -1, true, true]);
    for (const [n, d] of [
      [1, 0],
      [1.5, 1],
      [Number.NaN, 1],
      [2 ** 60, 1],
    ] as const)
      expect(() => rational(n, d)).toThrow(RangeError);
  });

  test.each([
    ['1/2', '1/2'],
    ['0.5', '1/2'],
    ['-2', '-2'],
    ['−1/3', '-1/3'],
    ['1.5', '3/2'],
    ['+4', '4'],
  ])('%s is %s', (text, shown) => {
    const value = rationalOfText(text);
    expect(value && textR(value)).toBe(shown);
  });

  test('anything else is none', () => {
    for (const text of ['', 'x', '1/0', '1//2', '1e3', '1.2.3', '12345678', '1/2/3'])
      expect(rationalOfText(text), text).toBeUndefined();
  });
});
