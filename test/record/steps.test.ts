// Steps of small sheets, worked out by hand: numerals, calculator lines, verdicts, what cannot close.

import { describe, expect, test } from 'vitest';
import { lineOf, plain, recordOf, stepNamed } from './sheets.ts';

describe('numerals of a step', () => {
  test('a given prints as typed and its calculator line is its SI number', () => {
    const record = recordOf(['d = 200 mm', 'mu = 0.30 ± 0.05', 'P = 7.5 kW', 'n = 1 450 r/min']);
    expect(lineOf(record, 'd')).toEqual({ result: '200 mm', line: '0.2', gives: '0.200' });
    expect(lineOf(record, 'mu')).toEqual({ result: '0.30 ± 0.05', line: '0.3', gives: '0.30' });
    expect(lineOf(record, 'P')).toEqual({ result: '7.5 kW', line: '7500', gives: '7.5e+3' });
    // 1450/60 = 24.1666…
    expect(lineOf(record, 'n')).toEqual({ result: '1 450 r/min', line: '24.166666666666668', gives: '24.17' });
  });

  test('a derived quantity prints four digits in its unit, and its line uses printed numbers only', () => {
    // v = pi·0.2 m·24.1667/s = 15.18436 m/s; F = 0.63·v² = 145.2556 N prints 145.3. With 15.18 the line gives 145.17, off by 0.13
    // at a last digit of 0.1; with 15.184 it gives 145.25, off by 0.05.
    const record = recordOf(['d = 200 mm', 'n = 1450 r/min', 'm = 0.63 kg/m', 'v := pi*d*n [m/s]', 'F := m*v^2 [N]']);
    expect(lineOf(record, 'v')).toEqual({ result: '15.184 m/s', line: 'pi*0.2*24.166666666666668', gives: '15.184' });
    expect(lineOf(record, 'F')).toEqual({ result: '145.3 N', line: '0.63*15.184^2', gives: '145.3' });
    expect(stepNamed(record, 'F').symbols).toBe('F = m\\,v^{2}');
    expect(stepNamed(record, 'F').cases[0]?.substituted).toBe('(0.63\\,\\mathrm{kg/m}) \\times (15.184\\,\\mathrm{m/s})^{2}');
  });

  test('an operand gets the digits that its use needs, everywhere the same', () => {
    // a = 1.23456; 8·a = 9.87648 prints 9.876: 8·1.235 = 9.880 is 4 units off, 8·1.2346 = 9.8768 within one.
    const record = recordOf(['t = 1.23456', 'a := t/1', 'b := 8*a', 'c := a/1']);
    expect(lineOf(record, 'a').result).toBe('1.2346');
    expect(lineOf(record, 'b')).toEqual({ result: '9.876', line: '8*1.2346', gives: '9.876' });
    expect(lineOf(record, 'c').line).toBe('1.2346/1');
  });

  test('an angle in an exponent stands in rad with the digits of the quantity', () => {
    // 157.5° = 2.748893… rad, prints 2.749 rad; e^(0.30·2.749) = 2.28119, true 2.28112.
    const record = recordOf([
      'mu = 0.30',
      'g = 315 deg',
      'theta := g/2 [deg]',
      'k := e^(mu*theta)',
      'j := exp(mu*theta)',
      's := sin(theta)',
    ]);
    expect(lineOf(record, 'theta').result).toBe('157.5°');
    expect(lineOf(record, 'k')).toEqual({ result: '2.281', line: 'exp(0.3*2.749)', gives: '2.281' });
    expect(lineOf(record, 'j').line).toBe('exp(0.3*2.749)');
    expect(stepNamed(record, 'k').cases[0]?.substituted).toBe('\\mathrm{e}^{0.30 \\times 2.749\\,\\mathrm{rad}}');
    // Elsewhere the printed degrees enter, converted exactly: 157.5·π/180.
    expect(lineOf(record, 's').line).toBe(`sin(${(157.5 * Math.PI) / 180})`);
  });

  test('a typed angle gets its rad digits from the step that needs them', () => {
    // 220° = 3.83972435… rad. e^(3·θ) = 100643 prints 1.006e5 (true value): with 3.840: e^11.52 = 100710, within 100.
    const record = recordOf(['m = 9', 'theta = 220 deg', 'k := exp(m*theta)']);
    // e^(34.5575…) = 1.0187e15 by 9·3.8397: digits have to grow until the fourth digit holds: 9·Δθ <= 1e-3/1.0187.
    const { line, gives } = lineOf(record, 'k');
    const rad = Number(/9\*([\d.]+)/.exec(line ?? '')?.[1]);
    expect(String(rad).length).toBeGreaterThan(5);
    expect(Math.abs(Math.exp(9 * rad) / Number(gives) - 1)).toBeLessThan(1.1e-3);
    expect(stepNamed(record, 'theta').cases[0]?.result).toBe('220°');
  });

  test('floor, ceil and round print whole, through parentheses and branches; so does a whole number that a branch gives', () => {
    const record = recordOf(['a = 123456.7', 'z := ceil(a)', 'y := (floor(a))', 'x := a > 1 ? round(a) : a', 'w := 2*floor(a)']);
    expect(lineOf(record, 'z')).toEqual({ result: '123 457', line: 'ceil(123456.7)', gives: '123457' });
    expect(lineOf(record, 'y').result).toBe('123 456');
    expect(lineOf(record, 'x')).toEqual({ result: '123 457', line: 'round(123456.7)', gives: '123457' });
    expect(lineOf(record, 'w').result).toBe('2.469 × 10⁵');
  });

  test('a reading of temperature keeps its last place in kelvin', () => {
    // 20.5 °C + 10 K = 30.5 °C prints 30.50 °C; in kelvin 303.65.
    const record = recordOf(['T_a = 20.5 °C', 'dT = 10 K', 'T_b := T_a + dT [°C]']);
    expect(lineOf(record, 'T_b')).toEqual({ result: '30.50 °C', line: '293.65 + 10', gives: '303.65' });
  });

  test('zero prints 0', () => {
    const record = recordOf(['a = 0 m', 'b := 3*a [mm]']);
    expect(lineOf(record, 'b')).toEqual({ result: '0 mm', line: '3*0', gives: '0' });
  });

  test('each case has its own digits and its own line', () => {
    const record = recordOf(
      [{ kind: 'given', name: 't', value: '1.23456', byCase: { b: '2' }, source: 'x' }, 'a := t/1', 'b := 8*a'],
      { cases: [{ id: 'a' }, { id: 'b' }] },
    );
    expect(stepNamed(record, 'a').cases.map((each) => each.result)).toEqual(['1.2346', '2.000']);
    expect(stepNamed(record, 'b').cases.map((each) => each.calculatorLine)).toEqual(['8*1.2346', '8*2']);
  });
});

describe('what cannot close says so, and its digits go back', () => {
  test('cancellation', () => {
    // sqrt(2)² − 2 is 4.44e-16 in doubles; no decimal of 15 digits gives that.
    const record = recordOf(['t = 2', 'a := sqrt(t)', 'b := a*a - t']);
    expect(stepNamed(record, 'b').cases[0]).toMatchObject({ closes: false, reason: 'cancellation' });
    expect(stepNamed(record, 'b').notes.join()).toContain('does not close');
    expect(lineOf(record, 'a').result).toBe('1.414');
    expect(record.openPoints).toContainEqual(expect.objectContaining({ kind: 'does not close', cell: 'c3' }));
  });

  test('a jump', () => {
    // In doubles 0.1·3·10 is 3.0000000000000004, one more than nothing beyond 3: ceil gives 4. By hand 0.3·10 is 3.
    const record = recordOf(['t = 0.1', 'a := t*3', 'n := ceil(a*10)']);
    expect(lineOf(record, 'n').result).toBe('4');
    expect(stepNamed(record, 'n').cases[0]).toMatchObject({ closes: false, reason: 'jump' });
    expect(lineOf(record, 'a').result).toBe('0.3000');
  });

  test('a branch that printed numbers would not take', () => {
    // The true a is above 0.3 by 5e-17, the printed one is not; branches far apart.
    const record = recordOf(['t = 0.1', 'a := t*3', 'b := a > 0.3 ? 1 : 2']);
    expect(stepNamed(record, 'b').cases[0]).toMatchObject({ closes: false, reason: 'jump' });
  });

  test('a branch that four digits would miss gets the digits it needs', () => {
    const record = recordOf(['t = 1.00004', 'a := t/1', 'b := a > 1 ? 5 : 7']);
    expect(lineOf(record, 'a').result).toBe('1.000 04');
    expect(lineOf(record, 'b')).toEqual({ result: '5', line: '5', gives: '5' });
    expect(stepNamed(record, 'b').cases[0]?.closes).toBe(true);
  });
});

describe('criteria', () => {
  test('utilisation is demand over capacity, rounded up, with the printed sides', () => {
    const record = recordOf(['F = 1200 N', 'G = 1320 N', 'F <= G', 'G >= F']);
    for (const number of ['3', '4']) {
      const one = stepNamed(record, number).cases[0];
      // 1200/1320 = 0.90909…
      expect(one).toMatchObject({
        met: true,
        result: '0.91',
        calculatorLine: '(1200)/(1320)',
        calculatorResult: '0.91',
        closes: true,
      });
    }
    expect(plain(stepNamed(record, '3').cases[0]?.sides ?? null)).toBe('1\\,200\\,\\mathrm{N} \\le 1\\,320\\,\\mathrm{N}');
    expect(record.summary[0]).toMatchObject({ number: '3', governing: 'base' });
  });

  test('sides that print alike get digits until they show the verdict', () => {
    // 1320.4 > 1320.2: both would print 1320.
    const record = recordOf(['a = 1320.4', 'b = 1320.2', 'x := a/1', 'y := b/1', 'x <= y']);
    const one = stepNamed(record, '5').cases[0];
    expect(one).toMatchObject({ met: false, result: '1.01' });
    expect(one?.sides).toBe('1\\,320.4 > 1\\,320.2');
  });

  test('sides closer than 15 digits are compared unrounded, and the step says so', () => {
    const record = recordOf(['t = 0.1', 'a := t*3', 'a <= 0.3']);
    const step = stepNamed(record, '3');
    expect(step.cases[0]).toMatchObject({ met: false, result: '1.01' });
    expect(step.notes.join()).toContain('compared unrounded');
    expect(lineOf(record, 'a').result).toBe('0.3000');
  });

  test('where a side is not positive the room is shown, rounded to the safe side', () => {
    // 5 − (−1.23456) = 6.23456, rounded down.
    const record = recordOf(['a = -1.23456 N', 'b = 5 N', 'a <= b', 'a >= b']);
    expect(stepNamed(record, '3').cases[0]).toMatchObject({
      met: true,
      utilisation: null,
      calculatorLine: '(5) - ((-1.23456))',
      calculatorResult: '6.234',
    });
    expect(plain(stepNamed(record, '3').cases[0]?.result ?? null)).toBe('6.234 N');
    // Not met: −6.23456 N, rounded down to −6.235 N.
    expect(stepNamed(record, '4').cases[0]).toMatchObject({ met: false, calculatorResult: '-6.235' });
  });

  test('temperatures have room in kelvin, no ratio', () => {
    const record = recordOf(['T = 60 °C', 'T <= "80 °C"']);
    expect(plain(stepNamed(record, '2').cases[0]?.result ?? null)).toBe('20.00 K');
    expect(stepNamed(record, '2').cases[0]?.sides).toContain('60');
  });

  test('the governing case is the worst', () => {
    const record = recordOf(
      [{ kind: 'given', name: 'F', value: '900 N', byCase: { b: '1 400 N', c: '1 200 N' }, source: 'x' }, 'G = 1320 N', 'F <= G'],
      { cases: [{ id: 'a' }, { id: 'b' }, { id: 'c' }] },
    );
    expect(record.summary[0]?.governing).toBe('b');
    expect(record.summary[0]?.cases.map((each) => each.printed)).toEqual(['0.69', '1.07', '0.91']);
    expect(record.openPoints).toEqual([expect.objectContaining({ kind: 'not met', number: '3' })]);
  });

  test('a utilisation is raised until the line comes within a hundredth', () => {
    // Sides of two digits would not do; whatever the digits, the line gives the printed utilisation.
    const record = recordOf(['t = 3.3333333', 'a := t/7', 'b := t*t', 'a*b <= b*b'], { settings: { digits: 2 } });
    const one = stepNamed(record, '4').cases[0];
    expect(one?.closes).toBe(true);
    // a·b/b² = 1/(7·3.3333…) … = 0.476190/11.1111 = 0.042857, up: 0.043
    expect(one?.result).toBe('0.043');
  });
});

test('a sheet with a decimal comma prints commas and calculates with points', () => {
  const record = recordOf(['d = 0,2 m', 'n = 1 450,5 r/min', 'v := pi*d*n + "0,5 m/s" [m/s]', 'v <= "20,5 m/s"'], {
    settings: { decimalSign: ',' },
  });
  // pi·0.2·1450.5/60 + 0.5 = 15.6896…
  expect(lineOf(record, 'v')).toEqual({ result: '15,69 m/s', line: 'pi*0.2*24.175 + 0.5', gives: '15.69' });
  expect(stepNamed(record, 'v').cases[0]?.substituted).toContain('0{,}5');
  expect(stepNamed(record, '4').cases[0]).toMatchObject({ result: '0,77', calculatorResult: '0.77' });
});

test('a sheet of one digit closes, and so does one of twelve', () => {
  for (const digits of [1, 2, 12]) {
    const record = recordOf(['t = 2', 'a := sqrt(t)', 'b := a*t', 'b <= 5'], { settings: { digits } });
    expect(record.steps.every((step) => step.cases.every((each) => each.closes))).toBe(true);
  }
});
