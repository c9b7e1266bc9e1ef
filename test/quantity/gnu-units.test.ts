// The catalogue against a second, independent one: GNU units and its data file.
//
// 1. Every row of our catalogue, every prefixed form and every compound of the completion list.
// 2. Left out, each for its reason: r and everything with it (there a revolution is 2π rad, here it is counted, so that
//    r/min ↔ Hz differ by 2π on purpose); the prefixes of 2022, which version 2.22 does not know; ‰, which it does not know.
// 3. Its definitions, evaluated exactly, must give the very double that we have. The program multiplies doubles and rounds at
//    every step, so its own output may be off by two units of the last place.
// Not here: published tables (nist-sp811.test.ts).

import { beforeAll, describe, expect, test, vi } from 'vitest';
import { symbolOfText, unitRows } from '../../src/quantity/catalogue.ts';
import { baseSymbols, readUnit, readValue, type Unit, unitNames, unitOf } from '../../src/quantity/index.ts';
import { prefixes } from '../../src/quantity/unit-row.ts';
import { stepsApart } from './doubles.ts';
import { Definitions, runUnits } from './gnu-definitions.ts';

// Thousands of random cases: on a busy machine more than the usual five seconds.
vi.setConfig({ testTimeout: 60_000 });

/** Names the program has for our symbols; the others are spelled alike. */
const names = new Map([
  ['°', 'degree'],
  ['′', 'arcmin'],
  ['″', 'arcsec'],
  ['Ω', 'ohm'],
  ['°C', 'degC'],
  ['°F', 'degF'],
  ['°R', 'degR'],
  ['%', 'percent'],
  ['rad', 'radian'],
  ['h', 'hour'],
  ['d', 'day'],
  ['t', 'tonne'],
  ['ha', 'hectare'],
  ['in', 'inch'],
  ['kn', 'knot'],
  ['mil', 'mil'],
  ['gal', 'usgallon'],
  ['gal_UK', 'brgallon'],
  ['qt', 'usquart'],
  ['bbl', 'barrel'],
  ['oz', 'ounce'],
  ['ton_short', 'shortton'],
  ['ton_long', 'longton'],
  ['ozf', 'ounce force'],
  ['ftH2O', 'foot water'],
  ['Btu', 'btu_IT'],
  ['Btu_th', 'btu_th'],
  ['hp', 'horsepower'],
  ['hp_metric', 'metrichorsepower'],
  ['hp_electric', 'electrichorsepower'],
  ['TR', 'tonrefrigeration'],
  ['Torr', 'torr'],
  ['cal', 'cal_th'],
  ['g_n', 'gravity'],
  ['Å', 'angstrom'],
  ['g', 'gram'],
  ['min', 'minute'],
]);
const notKnown = new Set(['R', 'Q', 'r', 'q', '‰']);

interface Pair {
  readonly text: string;
  readonly unit: Unit;
  /** The unit, and coherent SI, in the words of the program. */
  readonly have: string;
  readonly want: string;
}

const wanted = (unit: Unit): string =>
  unit.dimension.flatMap((exponent, place) => (exponent.n === 0 ? [] : [`${baseSymbols[place]}^(${exponent.n})`])).join(' ') ||
  '1';

/** Prefixes by their names, so that no symbol of the program can be taken for another: "kilo (gram)". */
function nameOf(symbol: string): string {
  const found = symbolOfText(symbol);
  if (!found) throw new Error(`no symbol of the catalogue: ${symbol}`);
  const name = names.get(found.row.symbol) ?? found.row.symbol;
  return found.prefix ? `(1${found.prefix.name} (${name}))` : `(${name})`;
}

function pairOf(text: string): Pair {
  const unit = unitOf(text);
  const have = unit.parts.map(({ symbol, exponent }) => `${nameOf(symbol)}^(${exponent.n})`).join(' ');
  return { text, unit, have, want: wanted(unit) };
}

const symbols = unitRows
  .filter((row) => row.counts !== 'r' && !notKnown.has(row.symbol))
  .flatMap((row) => [
    row.symbol,
    ...prefixes
      .filter(({ symbol }) => !notKnown.has(symbol) && symbolOfText(symbol + row.symbol)?.row === row)
      .map(({ symbol }) => symbol + row.symbol),
  ]);
const compounds = unitNames().filter((text) => {
  const unit = readUnit(text);
  return unit.ok && unit.value.parts.some(({ exponent }) => exponent.n !== 1) && unit.value.counts.r.n === 0;
});
const pairs = [...new Set([...symbols, ...compounds])].map(pairOf);

describe('the data file of GNU units, evaluated exactly', () => {
  let definitions: Definitions;
  beforeAll(() => {
    definitions = new Definitions();
  });

  test('knows more than six hundred of our units', () => {
    expect(pairs.length).toBeGreaterThan(600);
  });

  test.each(pairs)('gives the factor and the dimension of $text', ({ unit, have, want }) => {
    const theirs = definitions.amount(`(${have}) / (${want})`);
    expect([...theirs.base]).toEqual([]);
    // 25 digits of the quotient, read by ECMAScript's own rounding.
    const scaled = (theirs.n * 10n ** 90n) / theirs.d;
    expect(Number(`${scaled}e-90`)).toBe(unit.si);
  });
});

describe('the program GNU units', () => {
  const ask = (lines: readonly string[]): number[] =>
    runUnits(['--quiet', '--compact', '--one-line', '--output-format', '%.17g'], `${lines.join('\n')}\n`)
      .split('\n')
      .slice(0, -1)
      .map((line) => Number(line.replace(/ K$/, '')));

  test('converts every unit as we do, to two units of its last place, and nine in ten to the last digit', () => {
    const answers = ask(pairs.flatMap(({ have, want }) => [have, want]));
    expect(answers).toHaveLength(pairs.length);
    const off = pairs.map(({ text, unit }, place) => ({ text, steps: stepsApart(answers[place] ?? Number.NaN, unit.si) }));
    expect(off.filter(({ steps }) => !(steps <= 2))).toEqual([]);
    expect(off.filter(({ steps }) => steps === 0).length).toBeGreaterThan(0.9 * pairs.length);
  });

  test('converts temperature readings as we do', () => {
    const readings = [
      '-459.67 degF',
      '-40 degF',
      '0 degF',
      '32 degF',
      '98.6 degF',
      '212 degF',
      '1000 degF',
      '-273.15 degC',
      '0 degC',
      '25 degC',
      '300 degC',
    ];
    const answers = ask(readings.flatMap((text) => [text.replace(/(\S+) deg([CF])/, 'temp$2($1)'), 'K']));
    expect(answers).toHaveLength(readings.length);
    for (const [place, text] of readings.entries()) {
      const value = readValue(text, { decimalSign: '.' });
      // The program subtracts doubles near 460: two of their last places are 1.2e-13.
      expect(value.ok && Math.abs(value.value.si - (answers[place] ?? Number.NaN)), text).toBeLessThan(1.2e-13);
    }
  });
});
