// Values as typed: what is read, exactly, and what is refused with what to write instead.
//
// SI values that are no short decimals were worked out with rational arithmetic (π to 100 digits) outside this program.

import { describe, expect, test } from 'vitest';
import { type DecimalSign, plainNumeral, readNumeral, readRange, readValue, type Value } from '../../src/quantity/index.ts';

const read = (text: string, decimalSign: DecimalSign = '.'): Value => {
  const value = readValue(text, { decimalSign });
  if (!value.ok) throw new Error(`${text}: ${value.problem.message}`);
  return value.value;
};

describe('values that are read', () => {
  test.each([
    ['15 kW', 15000, '15', 'kW'],
    ['15kW', 15000, '15', 'kW'],
    ['15e3 W', 15000, '1.5e+4', 'W'],
    ['1 500 N', 1500, '1500', 'N'],
    ['1\u202F500\u00A0N', 1500, '1500', 'N'],
    ['1\u2009500 N', 1500, '1500', 'N'],
    ['12 345 678.901 25 m', 12345678.90125, '12345678.90125', 'm'],
    ['0.30', 0.3, '0.30', '1'],
    ['.5', 0.5, '0.5', '1'],
    ['007', 7, '7', '1'],
    ['200 mm', 0.2, '200', 'mm'],
    ['15 × 10^3 W', 15000, '1.5e+4', 'W'],
    ['1.2·10³ N', 1200, '1.2e+3', 'N'],
    ['1.2 x 10^3 N', 1200, '1.2e+3', 'N'],
    ['2*10^5 N/mm²', 2e11, '2e+5', 'N/mm²'],
    ['5 × 10⁻³ m', 0.005, '0.005', 'm'],
    ['10³ N', 1000, '1e+3', 'N'],
    ['10^-3 m', 0.001, '0.001', 'm'],
    ['−3 kN', -3000, '-3', 'kN'],
    ['-3 kN', -3000, '-3', 'kN'],
    ['–3 kN', -3000, '-3', 'kN'],
    ['+3 kN', 3000, '3', 'kN'],
    ['- 3 kN', -3000, '-3', 'kN'],
    ['−0.0 N', 0, '0.0', 'N'],
    ['0.00', 0, '0.00', '1'],
    ['5 %', 0.05, '5', '%'],
    ['5%', 0.05, '5', '%'],
    ['5 1/s', 5, '5', '1/s'],
    ['5.125 1/s', 5.125, '5.125', '1/s'],
    ['5 (N/mm²)', 5e6, '5', 'N/mm²'],
    ['1500 rpm', 25, '1500', 'r/min'],
    ['157.5°', 2.748893571891069, '157.5', '°'],
    ['20 °C', 293.15, '20', '°C'],
    ['20 degC', 293.15, '20', '°C'],
    ['20 deg C', 293.15, '20', '°C'],
    ['20 ℃', 293.15, '20', '°C'],
    ['22° C', 295.15, '22', '°C'],
    ['-40degF', 233.15, '-40', '°F'],
    ['-5 °C', 268.15, '-5', '°C'],
    ['293.15 K', 293.15, '293.15', 'K'],
    ['12 psi', 82737.08751802033, '12', 'psi'],
    ['5 lbf ft', 6.779089741657002, '5', 'lbf·ft'],
    ['3 in', 0.0762, '3', 'in'],
    // Angles and times: SI Brochure 9th ed., 5.4.3.
    ['22° 12′', 0.38746309394274114, '22.2', '°'],
    ['22°12′', 0.38746309394274114, '22.2', '°'],
    ['22 deg 12 arcmin', 0.38746309394274114, '22.2', '°'],
    ['22° 12\' 30"', 0.387608538047074, '1332.5', '′'],
    ['22° 20′', 0.38979019961206696, '1340', '′'],
    ['-22° 12′', -0.38746309394274114, '-22.2', '°'],
    ['1 h 30 min', 5400, '1.5', 'h'],
    ['1h 30min', 5400, '1.5', 'h'],
    ['1 h 20 min', 4800, '80', 'min'],
    ['2 d 4 h 30 min', 189000, '2.1875', 'd'],
    ['1 min 0.5 s', 60.5, '60.5', 's'],
    ['0° 0′ 36″', 0.00017453292519943296, '0.01', '°'],
  ])('%j', (text, si, numeral, unit) => {
    const value = read(text);
    expect(value.si).toBe(si);
    expect([plainNumeral(value.numeral), value.unit.text, value.text]).toEqual([numeral, unit, text]);
    expect(value.tolerance).toBeUndefined();
  });

  test.each([
    ['0,3', 0.3, '0.3', '1'],
    ['0,30 m', 0.3, '0.30', 'm'],
    ['1 500,25 N', 1500.25, '1500.25', 'N'],
    ['2,5e3 N', 2500, '2.5e+3', 'N'],
    ['15 kW', 15000, '15', 'kW'],
    ['2,1·10⁵ N/mm²', 2.1e11, '2.1e+5', 'N/mm²'],
  ])('%j with a decimal comma', (text, si, numeral, unit) => {
    const value = read(text, ',');
    expect([value.si, plainNumeral(value.numeral), value.unit.text]).toEqual([si, numeral, unit]);
  });

  test('a converted value is rounded once: 0.1 in and its like are the nearest doubles', () => {
    // 0.1·25.4 = 2.54 mm exactly; 3·0.0254 in doubles would give 0.07619999999999999.
    expect(read('0.1 in').si).toBe(0.00254);
    expect(read('3 in').si).toBe(0.0762);
    expect(read('0.7 mm').si).toBe(0.0007);
    expect(read('1.1 h').si).toBe(3960);
  });
});

describe('values with ±', () => {
  test.each([
    ['0.30 ± 0.05', 0.3, 0.05, false, '0.05'],
    ['15 kW ± 5 %', 15000, 750, true, '5 %'],
    ['15 kW ± 0.5 kW', 15000, 500, false, '0.5 kW'],
    ['15 kW ± 500 W', 15000, 500, false, '500 W'],
    ['15 kW ± 0.5', 15000, 500, false, '0.5'],
    ['(0.30 ± 0.05) m', 0.3, 0.05, false, '0.05'],
    ['(0.30 ± 0.05)', 0.3, 0.05, false, '0.05'],
    ['(5 ± 1) %', 0.05, 0.01, false, '1'],
    ['10 ± 0.1 mm', 0.01, 0.0001, false, '0.1 mm'],
    ['0.30 ± 10 %', 0.3, 0.03, true, '10 %'],
    ['-4 N ± 25 %', -4, 1, true, '25 %'],
    ['15 kW +/- 5 %', 15000, 750, true, '5 %'],
    ['15 kW +- 5%', 15000, 750, true, '5%'],
    ['15kW±5%', 15000, 750, true, '5%'],
    ['200 mm ± 2 ‰', 0.2, 0.0004, true, '2 ‰'],
    ['100 kPa ± 1 psi', 100000, 6894.757293168362, false, '1 psi'],
    ['22° 12′ ± 6′', 0.38746309394274114, 0.0017453292519943296, false, '6′'],
    // The half-width of a reading is a difference.
    ['20 °C ± 2 K', 293.15, 2, false, '2 K'],
    ['20 °C ± 2 °C', 293.15, 2, false, '2 °C'],
    ['20 °C ± 2', 293.15, 2, false, '2'],
    ['20 °C ± 9 °F', 293.15, 5, false, '9 °F'],
    ['68 °F ± 9 °F', 293.15, 5, false, '9 °F'],
    ['(20 ± 2) °C', 293.15, 2, false, '2'],
    ['300 K ± 2 °C', 300, 2, false, '2 °C'],
  ])('%j', (text, si, half, relative, typed) => {
    const value = read(text);
    expect(value.si).toBe(si);
    expect([value.tolerance?.si, value.tolerance?.relative, value.tolerance?.typed]).toEqual([half, relative, typed]);
    expect(value.tolerance?.unit.reading).toBeUndefined();
  });

  test('with a decimal comma', () => {
    expect(read('0,30 ± 0,05', ',').tolerance?.si).toBe(0.05);
  });
});

describe('values that are refused', () => {
  /** [text, code, what stands at the span, corrections, words of the message]. */
  test.each<[string, string, string, string[], string]>([
    ['', 'empty-value', '', [], 'write a number and its unit'],
    ['   ', 'empty-value', '', [], 'There is no value'],
    ['kW', 'no-number', 'kW', [], 'does not begin with a number'],
    ['--5', 'no-number', '--5', [], 'does not begin with a number'],
    ['∞', 'not-finite', '∞', [], 'finite'],
    ['Infinity kW', 'not-finite', 'Infinity kW', [], 'finite'],
    ['NaN', 'not-finite', 'NaN', [], 'finite'],
    ['-inf', 'not-finite', '-inf', [], 'finite'],
    ['1e400', 'number-too-large', '1e400', [], 'too large'],
    ['1e99999999999999999999', 'number-too-large', '1e99999999999999999999', [], 'too large'],
    ['1e-400', 'number-too-small', '1e-400', [], 'too near to zero'],
    ['1e308 km', 'number-too-large', '1e308 km', [], 'too large'],
    ['1e-320 qm', 'number-too-small', '1e-320 qm', [], 'too near to zero'],
    ['-300 °C', 'below-absolute-zero', '-300 °C', [], 'absolute zero'],
    ['-460 °F', 'below-absolute-zero', '-460 °F', [], '−459.67 °F'],
    // SI Brochure 9th ed., 5.4.4: neither points nor commas group digits.
    ['0,3', 'decimal-sign', '0,3', ['0.3'], 'this sheet writes a decimal point'],
    ['12,5 kN', 'decimal-sign', '12,5', ['12.5 kN'], 'set the decimal sign of the sheet to a comma'],
    ['1,234', 'decimal-sign', '1,234', ['1 234', '1.234'], 'could be 1 234 or 1.234'],
    ['1,234.5', 'digit-groups', '1,234.5', ['1 234.5'], 'grouped by a space'],
    ['1,234,567 N', 'digit-groups', '1,234,567', ['1 234 567 N'], 'grouped by a space'],
    ['1.234.567', 'digit-groups', '1.234.567', ['1 234 567'], 'grouped by a space'],
    ["1'500 N", 'digit-groups', "1'500", ['1 500 N'], 'grouped by a space'],
    ['1_000 N', 'digit-groups', '1_000', ['1 000 N'], 'grouped by a space'],
    ['1500 000 N', 'digit-groups', '1500 000', ['1500000 N'], 'not grouped in threes'],
    ['1 50 N', 'digit-groups', '1 50 N', [], 'not grouped in threes'],
    ['12 1', 'digit-groups', '1', [], 'neither a unit nor a group'],
    ['5. mm', 'number-form', '5.', ['5 mm'], 'No digit follows'],
    ['1 e5', 'number-form', '1 e5', ['1e5'], 'without a space'],
    ['3/4 in', 'value-form', '3/4 in', ['0.75 in'], 'write 0.75 in'],
    ['1 1/2 in', 'value-form', '1 1/2 in', ['1.5 in'], 'write 1.5 in'],
    ['1/3', 'value-form', '1/3', [], 'write it as a decimal'],
    ['5/s', 'value-form', '/s', ['5 1/s'], 'begins with 1'],
    ['5 to 10 N', 'value-form', '5 to 10 N', [], 'is a range'],
    ['5-10 N', 'value-form', '5-10 N', [], 'is a range'],
    ['10 mm +0.1 -0.2', 'value-form', 'mm +0.1 -0.2', [], 'middle value ± half the width'],
    ['0.30(5)', 'value-form', '(5)', [], 'standard uncertainty'],
    ['2*pi', 'value-form', '*pi', [], 'is a formula'],
    ['15 * kW', 'value-form', '* kW', [], 'is a formula'],
    ['5 ft 6 in', 'mixed-units', '5 ft 6 in', ['66 in'], 'write 66 in'],
    ['5 lb 3 oz', 'mixed-units', '5 lb 3 oz', ['83 oz'], 'write 83 oz'],
    ['45 m 3 s', 'value-form', '45 m 3 s', [], 'not alike'],
    ['22° 12', 'value-form', '12', [], 'without a unit'],
    ['1 h 90 min', 'compound-order', '90 min', [], 'not less than one h'],
    ['30 min 1 h', 'compound-order', '1 h', [], 'from the greatest to the smallest'],
    ['1.5 h 30 min', 'compound-order', '1.5 h 30 min', [], 'Only the last number'],
    ['15 KW', 'unknown-unit', 'KW', ['15 kW'], 'write kW'],
    ['15 kW_el', 'unit-annotation', 'kW_el', ['15 kW'], 'Write kW'],
    ['15 kW el', 'unit-annotation', ' el', ['15 kW'], 'Write kW'],
    ['15 J/kg K', 'ambiguous-unit', 'J/kg K', ['15 J/(kg·K)', '15 J·K/kg'], 'two ways'],
    ['15 constructor', 'unknown-unit', 'constructor', [], 'not known'],
    ['15 __proto__', 'unknown-unit', '__proto__', [], 'not known'],
    ['15 kW ±', 'no-number', '±', [], 'No half-width follows'],
    ['± 5 %', 'no-number', '±', [], 'No value stands before'],
    ['(5 ± 1 m', 'value-form', '(', [], 'not closed'],
    ['(5 m ± 1 m)', 'value-form', '5 m ± 1 m', [], 'inside the parentheses'],
    ['15 kW ± 0', 'tolerance-sign', '0', [], 'greater than 0'],
    ['15 kW ± -1 kW', 'tolerance-sign', '-1 kW', [], 'greater than 0'],
    ['0 N ± 5 %', 'tolerance-sign', '5 %', [], 'write an absolute one'],
    ['15 kW ± 2 kN', 'unlike-tolerance', '2 kN', [], 'is a force (kN), but the value is a power (kW): write it in kW or in %'],
    ['1500 r/min ± 1 rad/s', 'unlike-tolerance', '1 rad/s', [], 'an angular velocity (rad/s)'],
    ['1500 r/min ± 1 1/s', 'unlike-tolerance', '1 1/s', [], 'rotational frequency'],
    ['20 °C ± 5 %', 'relative-reading', '5 %', [], '± 2 K'],
    ['5 % ± 1 %', 'ambiguous-tolerance', '5 % ± 1 %', ['(5 ± 1) %'], 'a share of the value or a difference'],
    ['5 % ± 1', 'ambiguous-tolerance', '5 % ± 1', ['(5 ± 1) %'], 'a share of the value or a difference'],
  ])('%j: %s', (text, code, at, fixed, words) => {
    const value = readValue(text, { decimalSign: '.' });
    if (value.ok) throw new Error(`read as ${value.value.si}`);
    const { problem } = value;
    expect(problem.message).toContain(words);
    expect(problem.code).toBe(code);
    if (at !== '') expect(text.slice(...(problem.at ?? [0, 0]))).toBe(at);
    const corrected = (problem.fixes ?? []).map((fix) => (text.slice(0, fix.from) + fix.text + text.slice(fix.to)).trim());
    expect(corrected).toEqual(fixed);
    for (const each of corrected) expect(readValue(each, { decimalSign: '.' }).ok, each).toBe(true);
  });

  test.each([
    ['0.3', ['0,3'], 'decimal comma'],
    ['12.5 kN', ['12,5 kN'], 'decimal comma'],
    ['1.234,5', ['1 234,5'], 'grouped by a space'],
    ['1.234', ['1 234', '1,234'], 'could be 1 234 or 1,234'],
    ['1.234.567,8 N', ['1 234 567,8 N'], 'grouped'],
    ['0,3 ± 0.1', ['0,3 ± 0,1'], 'decimal comma'],
    ['3/4 in', ['0,75 in'], 'write 0,75 in'],
  ])('%j where the decimal sign is a comma', (text, fixed, words) => {
    const value = readValue(text, { decimalSign: ',' });
    if (value.ok) throw new Error('read');
    expect(value.problem.message).toContain(words);
    const corrected = (value.problem.fixes ?? []).map((fix) => text.slice(0, fix.from) + fix.text + text.slice(fix.to));
    expect(corrected).toEqual(fixed);
    for (const each of corrected) expect(readValue(each, { decimalSign: ',' }).ok, each).toBe(true);
  });

  test('a message is one line and quotes no more than a piece of the text', () => {
    for (const text of [`15 ${'x'.repeat(150)}`, `${'1'.repeat(190)}\u0007`, `5 \n${'é'.repeat(100)}`, '😀'.repeat(60)]) {
      const value = readValue(text, { decimalSign: '.' });
      const message = value.ok ? '' : value.problem.message;
      expect(message).not.toMatch(/[\n\r\u0007]/);
      expect(message.length).toBeLessThan(300);
      expect(message.length).toBeGreaterThan(10);
    }
  });
});

describe('numerals alone', () => {
  test.each([
    ['1 500', '1500'],
    ['15e3', '1.5e+4'],
    ['15 × 10^3', '1.5e+4'],
    ['−3', '-3'],
    ['1.2·10³', '1.2e+3'],
    [' 0.30 ', '0.30'],
  ])('%j is %s', (text, plain) => {
    const numeral = readNumeral(text, '.');
    expect(numeral.ok ? plainNumeral(numeral.value) : numeral.problem.message).toBe(plain);
  });

  test.each([
    ['', 'no-number'],
    ['x', 'no-number'],
    ['5 kN', 'number-form'],
    ['1,5', 'decimal-sign'],
    ['∞', 'not-finite'],
    ['1e999', 'number-too-large'],
  ])('%j is refused: %s', (text, code) => {
    const numeral = readNumeral(text, '.');
    expect(numeral.ok ? 'read' : numeral.problem.code).toBe(code);
  });
});

describe('ranges', () => {
  test.each([
    ['0.1 to 0.8', 0.1, 0.8],
    ['10 N to 20 kN', 10, 20000],
    ['10 to 20 N', 10, 20],
    ['-5 °C to 40 °C', 268.15, 313.15],
    ['0 to 180 deg', 0, Math.PI],
  ])('%j', (text, from, to) => {
    const range = readRange(text, { decimalSign: '.' });
    expect(range.ok ? [range.value.from.si, range.value.to.si] : range.problem.message).toEqual([from, to]);
  });

  test.each([
    ['10 N', 'range-form', 'two values joined by "to"'],
    ['10 N to 20 m', 'range-form', 'not alike'],
    ['20 N to 10 N', 'range-form', 'lower value first'],
    ['10 N to', 'range-form', 'no range'],
    ['10 N to 2x N', 'unknown-unit', 'not known'],
    ['1 ± 0.1 to 2', 'range-form', 'leave ± out'],
    ['10 K to 20 °C', 'range-form', 'not alike'],
  ])('%j is refused', (text, code, words) => {
    const range = readRange(text, { decimalSign: '.' });
    if (range.ok) throw new Error('read');
    expect(range.problem.code).toBe(code);
    expect(range.problem.message).toContain(words);
  });
});
