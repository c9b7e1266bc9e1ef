// Printing by the SI Brochure and ISO 80000-1, and print → read → print.

import fc from 'fast-check';
import katex from 'katex';
import { describe, expect, test, vi } from 'vitest';
import { allSpellings } from '../../src/quantity/catalogue.ts';
import {
  doubleOfNumeral,
  isZeroNumeral,
  type Numeral,
  numeralOf,
  numeralOfDouble,
  plainNumeral,
  printNumeral,
  printQuantity,
  printValue,
  readNumeral,
  readValue,
  texNumeral,
  texQuantity,
  texUnit,
  texValue,
  unitNames,
  unitOf,
} from '../../src/quantity/index.ts';

// Thousands of random cases: on a busy machine more than the usual five seconds.
vi.setConfig({ testTimeout: 60_000 });

const point = { decimalSign: '.' } as const;
const comma = { decimalSign: ',' } as const;
const numeral = (text: string): Numeral => {
  const read = readNumeral(text, '.');
  if (!read.ok) throw new Error(read.problem.message);
  return read.value;
};

// SI Brochure 9th ed., 5.4.3 and 5.4.4; ISO 80000-1:2009, 7.3. ~ stands for U+00A0, ' for U+202F.
const marked = (text: string) => text.replaceAll('~', '\u00A0').replaceAll("'", '\u202F');

describe('numerals in print', () => {
  test.each([
    ['0', '0'],
    ['0.00', '0.00'],
    ['-0.00', '0.00'],
    ['5', '5'],
    ['-5', '−5'],
    ['999', '999'],
    ['1235', "1'235"],
    ['43279.16829', "43'279.168'29"],
    ['0.1234', '0.1234'],
    ['0.12345', "0.123'45"],
    ['1234567', "1'234'567"],
    ['0.30', '0.30'],
    ['1.5e4', '1.5~×~10⁴'],
    ['1376e1', '1.376~×~10⁴'],
    ['5e1', '5~×~10¹'],
    ['0.001', '0.001'],
    ['0.00099', '9.9~×~10⁻⁴'],
    ['-2.5e-7', '−2.5~×~10⁻⁷'],
    ['1.6021766340e-19', "1.602'176'634'0~×~10⁻¹⁹"],
    ['12345e10', '1.2345~×~10¹⁴'],
    ['100.0', '100.0'],
    ['1500', "1'500"],
  ])('%s prints as %s', (text, printed) => {
    expect(printNumeral(numeral(text), point)).toBe(marked(printed));
    expect(printNumeral(numeral(text), comma)).toBe(marked(printed).replace('.', ','));
  });

  test.each([
    ['1235', '1\\,235'],
    ['-0.30', '-0.30'],
    ['1376e1', '1.376\\times 10^{4}'],
    ['0.12345', '0.123\\,45'],
    ['2.5e-7', '2.5\\times 10^{-7}'],
    ['0.00', '0.00'],
  ])('%s is %s in TeX', (text, tex) => {
    expect(texNumeral(numeral(text), point)).toBe(tex);
    expect(texNumeral(numeral(text), comma)).toBe(tex.replace('.', '{,}'));
  });

  test.each([
    ['1526', '1526'],
    ['0.3012', '0.3012'],
    ['1376e1', '1.376e+4'],
    ['21e6', '2.1e+7'],
    ['5e1', '5e+1'],
    ['0.000001', '0.000001'],
    ['0.0000015', '0.0000015'],
    ['0.00000099', '9.9e-7'],
    ['-12.50', '-12.50'],
    ['0', '0'],
    ['0.000', '0.000'],
    ['-0', '0'],
    ['0e5', '0'],
  ])('%s is %s for machines', (text, plain) => {
    expect(plainNumeral(numeral(text))).toBe(plain);
  });

  test.each([
    [0.1, '0.1'],
    [1e21, '1e+21'],
    [5e-324, '5e-324'],
    [Number.MAX_VALUE, '1.7976931348623157e+308'],
    [-0, '0'],
    [1500, '1500'],
    [123456789012345, '123456789012345'],
    [1e15, '1e+15'],
    [0.1 + 0.2, '0.30000000000000004'],
    [1e-7, '1e-7'],
    [-2.5, '-2.5'],
  ])('the double %d is the numeral %s', (x, text) => {
    expect(plainNumeral(numeralOfDouble(x))).toBe(text);
  });

  test('numeralOfDouble and plainNumeral keep every double', () => {
    fc.assert(
      fc.property(fc.double({ noNaN: true, noDefaultInfinity: true }), (x) => {
        expect(doubleOfNumeral(numeralOfDouble(x))).toBe(x === 0 ? 0 : x);
        expect(Number(plainNumeral(numeralOfDouble(x)))).toBe(x === 0 ? 0 : x);
      }),
      { seed: 3, numRuns: 3000, verbose: 1 },
    );
  });
});

describe('quantities in print', () => {
  test.each([
    ['1235', 'N', "1'235~N", '1\\,235\\,\\mathrm{N}'],
    ['0.30', '1', '0.30', '0.30'],
    ['157.5', 'deg', '157.5°', '157.5{}^{\\circ}'],
    ['12', 'arcmin', '12′', '12{}^{\\prime}'],
    ['30', 'arcsec', '30″', '30{}^{\\prime\\prime}'],
    // SI Brochure 9th ed., 5.4.3: 30.2 °C, not 30.2°C; 5.4.7: a space before %.
    ['30.2', '°C', '30.2~°C', '30.2\\,\\mathrm{{}^{\\circ}C}'],
    ['5', '%', '5~%', '5\\,\\%'],
    ['-40', '°F', '−40~°F', '-40\\,\\mathrm{{}^{\\circ}F}'],
    ['1500', 'rpm', "1'500~r/min", '1\\,500\\,\\mathrm{r/min}'],
    ['12', 'N*m', '12~N·m', '12\\,\\mathrm{N{\\cdot}m}'],
    ['2.1e5', 'N/mm^2', '2.1~×~10⁵~N/mm²', '2.1\\times 10^{5}\\,\\mathrm{N/mm^{2}}'],
    ['4', '1/s', '4~1/s', '4\\,\\mathrm{1/s}'],
    ['4', 's^-1', '4~s⁻¹', '4\\,\\mathrm{s^{-1}}'],
    ['3', 'inH2O', '3~inH2O', '3\\,\\mathrm{inH_{2}O}'],
    ['3', 'MPa m^(1/2)', '3~MPa·m^(1/2)', '3\\,\\mathrm{MPa{\\cdot}m^{1/2}}'],
    ['5', 'um', '5~µm', '5\\,\\mathrm{\\text{µ}m}'],
    ['2', 'ton_short', '2~ton_short', '2\\,\\mathrm{ton_{short}}'],
    ['2', 'kΩ', '2~kΩ', '2\\,\\mathrm{k\\Omega }'],
    ['6', '°/s', '6°/s', '6\\mathrm{{}^{\\circ}/s}'],
  ])('%s %s prints as %s', (text, unit, printed, tex) => {
    expect(printQuantity(numeral(text), unitOf(unit), point)).toBe(marked(printed));
    expect(texQuantity(numeral(text), unitOf(unit), point)).toBe(tex);
  });

  test.each([
    ['15 kW ± 5 %', '15~kW~±~5~%', '15\\,\\mathrm{kW}\\pm 5\\,\\%'],
    ['0.30 ± 0.05', '0.30~±~0.05', '0.30\\pm 0.05'],
    // NIST SP 811, 7.7: the unit is not dropped.
    ['(63.2 ± 0.1) m', '63.2~m~±~0.1~m', '63.2\\,\\mathrm{m}\\pm 0.1\\,\\mathrm{m}'],
    ['20 °C ± 2 K', '20~°C~±~2~K', '20\\,\\mathrm{{}^{\\circ}C}\\pm 2\\,\\mathrm{K}'],
    ['(5 ± 1) %', '(5~±~1)~%', '(5\\pm 1)\\,\\%'],
    ['30° ± 1°', '30°~±~1°', '30{}^{\\circ}\\pm 1{}^{\\circ}'],
    ['15e3 W', '1.5~×~10⁴~W', '1.5\\times 10^{4}\\,\\mathrm{W}'],
  ])('the value %s prints as %s', (text, printed, tex) => {
    const value = readValue(text, point);
    if (!value.ok) throw new Error(value.problem.message);
    expect(printValue(value.value, point)).toBe(marked(printed));
    expect(texValue(value.value, point)).toBe(tex);
  });
});

const symbols = [...new Set([...allSpellings()].map(([, symbol]) => symbol)), ...unitNames()];
const numerals = fc
  .record({
    negative: fc.boolean(),
    digits: fc.oneof(fc.bigInt({ min: 0n, max: 9999n }), fc.bigInt({ min: 0n, max: 10n ** 20n })).map(String),
    zeros: fc.integer({ min: 0, max: 3 }),
    exponent: fc.integer({ min: -24, max: 12 }),
  })
  .map(({ negative, digits, zeros, exponent }) => numeralOf(negative, digits + '0'.repeat(zeros), exponent));

describe('print → read → print', () => {
  test('every unit of the catalogue, both decimal signs: the same numeral, the same unit, the same print', () => {
    fc.assert(
      fc.property(numerals, fc.constantFrom(...symbols), fc.constantFrom(point, comma), (a, symbol, style) => {
        const unit = unitOf(symbol);
        const n = unit.reading ? { ...a, negative: false } : a;
        const printed = printQuantity(n, unit, style);
        const read = readValue(printed, style);
        if (!read.ok) throw new Error(`${printed}: ${read.problem.message}`);
        expect(read.value.numeral).toEqual(n);
        expect(read.value.unit).toBe(unit);
        expect(printQuantity(read.value.numeral, read.value.unit, style)).toBe(printed);
        expect(printValue(read.value, style)).toBe(printed);
      }),
      { seed: 20261202, numRuns: 4000, verbose: 1 },
    );
  });

  test('each single unit of the catalogue', () => {
    for (const symbol of symbols) {
      for (const style of [point, comma]) {
        for (const n of [numeral('1.50'), numeral('12345.678901'), numeral('2.5e-7'), numeral('4e3')]) {
          const printed = printQuantity(n, unitOf(symbol), style);
          const read = readValue(printed, style);
          expect(read.ok ? [read.value.numeral, read.value.unit.text] : read.problem.message, printed).toEqual([
            n,
            unitOf(symbol).text,
          ]);
        }
      }
    }
  });

  test('values with ± keep their half-width', () => {
    const half = fc.bigInt({ min: 1n, max: 99999n }).map(String);
    fc.assert(
      fc.property(
        numerals,
        half,
        fc.integer({ min: -6, max: 2 }),
        fc.constantFrom(...unitNames()),
        fc.boolean(),
        fc.constantFrom(point, comma),
        (a, digits, exponent, symbol, relative, style) => {
          const unit = unitOf(symbol);
          const ratio = ['%', '‰', 'ppm'].includes(symbol);
          if (relative && (unit.reading || ratio || isZeroNumeral(a))) return;
          const n = unit.reading ? { ...a, negative: false } : a;
          const width = numeralOf(false, digits, exponent);
          const typed = ratio
            ? `(${printNumeral(n, style)} ± ${printNumeral(width, style)}) ${symbol}`
            : `${printQuantity(n, unit, style)} ± ${printQuantity(width, relative ? unitOf('%') : unit, style)}`;
          const read = readValue(typed, style);
          if (!read.ok) throw new Error(`${typed}: ${read.problem.message}`);
          const printed = printValue(read.value, style);
          const again = readValue(printed, style);
          if (!again.ok) throw new Error(`${printed}: ${again.problem.message}`);
          expect(printValue(again.value, style)).toBe(printed);
          expect(again.value.tolerance?.si).toBe(read.value.tolerance?.si);
          expect(again.value.tolerance?.relative).toBe(relative);
          expect(again.value.si).toBe(read.value.si);
        },
      ),
      { seed: 5, numRuns: 2000, verbose: 1 },
    );
  });
});

describe('the typesetting library', () => {
  // It has no upright µ and no ‰ of its own (its \mu is italic) and takes them from the font of the page, with a remark.
  const strict = (code: string, message: string) =>
    /^(unknownSymbol|symbolNotInFont)$/.test(code) && /["'][µ‰]["']/.test(message) ? 'ignore' : 'error';

  test('sets every unit of the catalogue without a complaint', () => {
    for (const symbol of symbols) {
      const tex = texUnit(unitOf(symbol));
      expect(() => katex.renderToString(tex, { strict, throwOnError: true }), `${symbol}: ${tex}`).not.toThrow();
    }
  });

  test('shows the same characters as plain print', () => {
    const shown = (tex: string) =>
      katex
        .renderToString(tex, { strict, output: 'mathml' })
        .replace(/<annotation.*<\/annotation>/, '')
        .replace(/<[^>]+>/g, '')
        .replace(/[\u200B\u2009\u00A0\s]/g, '');
    for (const symbol of [
      'kN',
      'N·m',
      'µm',
      'Ω',
      'kΩ',
      'Å',
      '%',
      '‰',
      'W/(m·K)',
      'lbf·ft',
      'r/min',
      '1/s',
      'ton_short',
      'Btu_th',
    ]) {
      expect(shown(texUnit(unitOf(symbol))), symbol).toBe(symbol.replace('_', '').replaceAll('·', '⋅').replace('Å', 'A˚'));
    }
  });
});
