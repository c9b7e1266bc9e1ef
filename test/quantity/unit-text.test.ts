// Unit texts: what is read, how it is printed, and what is refused with what to write instead.

import fc from 'fast-check';
import { describe, expect, test, vi } from 'vitest';
import { allSpellings, symbolOfText, unitRows } from '../../src/quantity/catalogue.ts';
import {
  coherentUnit,
  dimensionOf,
  equalD,
  isAngleUnit,
  nearestUnits,
  rational,
  readUnit,
  unitNames,
  unitOf,
} from '../../src/quantity/index.ts';
import { prefixes } from '../../src/quantity/unit-row.ts';

// Thousands of random cases: on a busy machine more than the usual five seconds.
vi.setConfig({ testTimeout: 60_000 });

describe('the catalogue', () => {
  test('no spelling, prefixed forms included, stands for two units', () => {
    const owners = new Map<string, Set<string>>();
    for (const [spelling, symbol] of allSpellings()) owners.set(spelling, (owners.get(spelling) ?? new Set()).add(symbol));
    expect([...owners].filter(([, symbols]) => symbols.size > 1).map(([spelling, symbols]) => [spelling, ...symbols])).toEqual(
      [],
    );
    expect(owners.size).toBeGreaterThan(900);
  });

  test('every spelling is read as the symbol it stands for', () => {
    for (const [spelling, symbol] of allSpellings()) expect(symbolOfText(spelling)?.text, spelling).toBe(symbol);
  });

  test('no row says a spelling twice, and each names its source', () => {
    const all = unitRows.flatMap((row) => [row.symbol, ...(row.spellings ?? [])]);
    expect(new Set(all).size).toBe(all.length);
    for (const row of unitRows) expect(row.source, row.symbol).toMatch(/^(SI Brochure 9th ed\.|NIST SP 811 B\.|ISO 80000-)/);
  });

  test('usual prefixed forms are forms that the row takes', () => {
    for (const text of unitNames()) expect(readUnit(text).ok, text).toBe(true);
    expect(new Set(unitNames()).size).toBe(unitNames().length);
  });

  test('the prefixes are the twenty-four of the SI', () => {
    // SI Brochure 9th ed., Table 7, and the 27th CGPM (2022), Resolution 3.
    const powers = Object.fromEntries(prefixes.map(({ symbol, power }) => [symbol, power]));
    expect(powers).toEqual({
      da: 1,
      h: 2,
      k: 3,
      M: 6,
      G: 9,
      T: 12,
      P: 15,
      E: 18,
      Z: 21,
      Y: 24,
      R: 27,
      Q: 30,
      d: -1,
      c: -2,
      m: -3,
      µ: -6,
      n: -9,
      p: -12,
      f: -15,
      a: -18,
      z: -21,
      y: -24,
      r: -27,
      q: -30,
    });
  });

  test('a row and a prefix never make the symbol of another row', () => {
    const symbols = new Set(unitRows.map(({ symbol }) => symbol));
    for (const row of unitRows) {
      for (const prefix of prefixes) {
        const text = prefix.symbol + row.symbol;
        if (symbols.has(text)) expect(symbolOfText(text)?.row.symbol).toBe(text);
      }
    }
  });
});

describe('forms that are read', () => {
  test.each([
    ['kN', 'kN'],
    ['N m', 'N·m'],
    ['N·m', 'N·m'],
    ['N*m', 'N·m'],
    ['N⋅m', 'N·m'],
    ['N/mm^2', 'N/mm²'],
    ['N/mm²', 'N/mm²'],
    ['N/mm2', 'N/mm²'],
    ['N / mm²', 'N/mm²'],
    ['kg/m', 'kg/m'],
    ['1/s', '1/s'],
    ['1 / s', '1/s'],
    ['s^-1', 's⁻¹'],
    ['s⁻¹', 's⁻¹'],
    ['s-1', 's⁻¹'],
    ['s^(-1)', 's⁻¹'],
    ['m s^-1', 'm·s⁻¹'],
    ['m·s⁻¹', 'm·s⁻¹'],
    ['W/(m²·K)', 'W/(m²·K)'],
    ['W/(m^2 K)', 'W/(m²·K)'],
    ['(W)/(m²·K)', 'W/(m²·K)'],
    ['W·m⁻²·K⁻¹', 'W·m⁻²·K⁻¹'],
    ['r/min', 'r/min'],
    ['rpm', 'r/min'],
    ['rev/min', 'r/min'],
    ['N·m/rpm', 'N·m·min/r'],
    ['rpm/s', 'r/(min·s)'],
    ['%', '%'],
    ['1', '1'],
    ['', '1'],
    [' 1 ', '1'],
    ['mm/r', 'mm/r'],
    ['lbf·ft', 'lbf·ft'],
    ['lbf ft', 'lbf·ft'],
    ['ft·lbf', 'ft·lbf'],
    ['m^(1/2)', 'm^(1/2)'],
    ['m^0.5', 'm^(1/2)'],
    ['MPa·m^(1/2)', 'MPa·m^(1/2)'],
    ['(mi/h)^2/ft', 'mi²/(h²·ft)'],
    ['(m/s)^-1', 's/m'],
    ['(m/s)/s', 'm/(s·s)'],
    ['m/(s/s)', 'm·s/s'],
    ['degC', '°C'],
    ['deg C', '°C'],
    ['° C', '°C'],
    ['℃', '°C'],
    ['degF', '°F'],
    ['℉', '°F'],
    ['deg', '°'],
    ['arcmin', '′'],
    ['arcsec', '″'],
    ['º', '°'],
    ['um', 'µm'],
    ['μm', 'µm'],
    ['µm', 'µm'],
    ['uin', 'µin'],
    ['Ω', 'Ω'],
    ['Ω', 'Ω'],
    ['ohm', 'Ω'],
    ['kohm', 'kΩ'],
    ['Å', 'Å'],
    ['K', 'K'],
    ['kgs', 'kg'],
    ['sec', 's'],
    ['hr', 'h'],
    ['lbm', 'lb'],
    ['lbs', 'lb'],
    ['kips', 'kip'],
    ['l', 'L'],
    ['ml', 'mL'],
    ['inH2O', 'inH2O'],
    ['Btu_IT', 'Btu'],
    ['PS', 'hp_metric'],
    ['°/s', '°/s'],
    ['%/K', '%/K'],
    ['kW h', 'kW·h'],
    ['mm⁴', 'mm⁴'],
    ['N\u00A0m', 'N·m'],
    ['N\u202Fm', 'N·m'],
  ])('%j is %s', (typed, text) => {
    const unit = readUnit(typed);
    expect(unit.ok ? unit.value.text : unit.problem.message).toBe(text);
  });

  test('the canonical text of every listed unit reads as itself', () => {
    for (const [spelling] of allSpellings()) {
      const unit = unitOf(spelling);
      expect(unitOf(unit.text)).toBe(unit);
    }
    for (const text of unitNames()) expect(unitOf(text).text).toBe(text);
  });

  test('canonical texts of random compounds read back as the same unit', () => {
    const symbols = [...new Set([...allSpellings()].map(([, symbol]) => symbol))];
    const exponent = fc.constantFrom('', '^2', '^3', '^-1', '^-2', '^(1/2)', '²', '⁻¹');
    const factor = fc.tuple(fc.constantFrom(...symbols), exponent).map(([symbol, power]) => symbol + power);
    const product = fc.array(factor, { minLength: 1, maxLength: 3 }).map((factors) => factors.join('·'));
    fc.assert(
      fc.property(product, fc.option(product), (above, below) => {
        const unit = unitOf(below === null ? above : `${above}/(${below})`);
        const again = unitOf(unit.text);
        expect(again.text).toBe(unit.text);
        expect(again.factor).toEqual(unit.factor);
        expect(equalD(again.dimension, unit.dimension)).toBe(true);
        expect(again.counts).toEqual(unit.counts);
      }),
      { seed: 11, numRuns: 400, verbose: 1 },
    );
  });

  test('the same text gives the same unit object', () => {
    expect(unitOf('N/mm^2')).toBe(unitOf('N/mm²'));
  });

  test('angles are told from other numbers', () => {
    for (const text of ['rad', 'mrad', '°', 'deg', '′', '″', 'gon']) expect(isAngleUnit(unitOf(text)), text).toBe(true);
    for (const text of ['1', '%', 'r', 'rad/s', '°/s', 'sr', 'rad²', '°C', 'm'])
      expect(isAngleUnit(unitOf(text)), text).toBe(false);
  });
});

describe('forms that are refused', () => {
  /** Code, the two things it could mean or what to write, and the words that must stand in the message. */
  test.each([
    ['m/s/s', 'ambiguous-unit', ['m/s²', 'm'], 'more than one solidus'],
    ['W/m2/K', 'ambiguous-unit', ['W/(m²·K)', 'W·K/m²'], 'more than one solidus'],
    ['J/kg K', 'ambiguous-unit', ['J/(kg·K)', 'J·K/kg'], 'a product after the solidus'],
    ['J/kg·K', 'ambiguous-unit', ['J/(kg·K)', 'J·K/kg'], 'two ways'],
    ['J/kg*K', 'ambiguous-unit', ['J/(kg·K)', 'J·K/kg'], 'two ways'],
    ['W/(m·K)·s', 'ambiguous-unit', ['W/(m·K·s)', 'W·s/(m·K)'], 'two ways'],
    ['J/kg/K/s', 'ambiguous-unit', [], 'set parentheses'],
    ["'", 'ambiguous-unit', ['ft', 'arcmin'], 'feet or for minutes'],
    ['"', 'ambiguous-unit', ['in', 'arcsec'], 'inches or for seconds'],
    ['N.m', 'unit-sign', ['N·m'], 'does not multiply'],
    ['N×m', 'unit-sign', ['N·m'], 'does not multiply'],
    ['ft-lbf', 'unit-sign', ['ft·lbf'], 'does not multiply'],
    ['ft-lb', 'unit-sign', ['ft·lbf'], 'does not multiply'],
    ['lb-ft', 'unit-sign', ['lbf·ft'], 'does not multiply'],
    ['m**2', 'unit-sign', ['m^2'], 'A power is written with ^'],
    ['W(m K)', 'unit-sign', ['W·(m K)'], 'missing before'],
    ['m²K', 'unit-sign', ['m²·K'], 'missing before'],
    ['·N', 'unit-sign', [], 'cannot stand there'],
    ['N·', 'unit-form', [], 'ends too early'],
    ['(m', 'unit-parentheses', [], 'not closed'],
    ['m)', 'unit-parentheses', [], 'not opened'],
    ['L/100 km', 'unit-number', [], '“100” stands inside'],
    ['m^1/2', 'unit-number', [], 'm^(1/2)'],
    ['10^3 N', 'unit-number', [], 'no number but 1'],
    ['m^0', 'unit-exponent', [], 'no exponent'],
    ['m^99', 'unit-exponent', [], 'Exponents'],
    ['m^(1/0)', 'unit-exponent', [], 'no exponent'],
    ['(m^12)^12', 'unit-exponent', [], 'Exponents'],
    ['kmin', 'unit-prefix', [], 'not used with the prefix k'],
    ['mh', 'unit-prefix', [], 'not used with the prefix m'],
    ['klbf', 'unit-prefix', [], 'not used with the prefix k'],
    ['µkg', 'unit-prefix', ['mg'], 'a prefix already'],
    ['mkg', 'unit-prefix', ['g'], 'a prefix already'],
    ['mµm', 'unit-prefix', ['nm'], 'a prefix already'],
    ['kkN', 'unit-prefix', ['MN'], 'a prefix already'],
    ['k', 'unit-prefix', [], 'needs a unit after it'],
    ['kW_el', 'unit-annotation', ['kW'], 'belongs to the name'],
    ['V_max', 'unit-annotation', ['V'], 'belongs to the name'],
    ['kWel', 'unit-annotation', ['kW'], 'belongs to the name'],
    ['kW el', 'unit-annotation', ['kW'], 'belongs to the name'],
    ['barg', 'unit-annotation', ['bar'], 'belongs to the name'],
    ['psia', 'unit-annotation', ['psi'], 'belongs to the name'],
    ['kPag', 'unit-annotation', ['kPa'], 'belongs to the name'],
    ['bar(g)', 'unit-annotation', ['bar'], 'belongs to the name'],
    ['-', 'unknown-unit', ['1'], 'the unit 1'],
    ['sq mm', 'unknown-unit', ['mm²'], 'is written as mm²'],
    ['cu ft/min', 'unknown-unit', ['ft³/min'], 'is written as ft³'],
  ])('%j: %s', (typed, code, instead, words) => {
    const unit = readUnit(typed);
    if (unit.ok) throw new Error(`read as ${unit.value.text}`);
    const { problem } = unit;
    expect(problem.code).toBe(code);
    expect(problem.message).toContain(words);
    expect(problem.severity).toBe('error');
    const fixed = (problem.fixes ?? []).map(({ from, to, text }) => (typed.slice(0, from) + text + typed.slice(to)).trim());
    expect(fixed).toEqual(instead);
    // What is proposed must be read.
    for (const text of fixed) expect(readUnit(text).ok, text).toBe(true);
  });

  test.each([
    ['KW', ['kW']],
    ['kw', ['kW']],
    ['KN', ['kN', 'kn']],
    ['Mpa', ['MPa']],
    ['mpa', ['MPa']],
    ['Kg', ['kg']],
    ['KG', ['kg']],
    ['HZ', ['Hz']],
    ['hz', ['Hz']],
    ['torr', ['Torr']],
    ['Nm', ['N·m']],
    ['kNm', ['kN·m']],
    ['kWh', ['kW·h']],
    ['Ah', ['A·h']],
    ['Pas', ['Pa·s']],
    ['newton', ['N']],
    ['newtons', ['N']],
    ['kilonewton', ['kN']],
    ['millimeter', ['mm']],
    ['millimetres', ['mm']],
    ['metre', ['m']],
    ['meters', ['m']],
    ['inch', ['in']],
    ['inches', ['in']],
    ['foot', ['ft']],
    ['feet', ['ft']],
    ['liter', ['L']],
    ['degrees', ['°']],
    ['hours', ['h']],
    ['pounds', ['lb', 'lbf']],
    ['ton', ['ton_short', 'ton_long', 't']],
    ['mph', ['mi/h']],
    ['kmh', ['km/h']],
    ['fpm', ['ft/min']],
    ['cfm', ['ft³/min']],
    ['gpm', ['gal/min']],
    ['psf', ['lbf/ft²']],
    ['plf', ['lbf/ft']],
    ['mtr', ['m']],
    ['cc', ['cm³']],
    ['gr', ['g', 'grain']],
    ['lbff', ['lbf']],
    ['pssi', ['psi']],
    ['kipp', ['kip']],
    ['slgu', ['slug']],
  ])('%s is not known, and %j is proposed', (typed, expected) => {
    const near = nearestUnits(typed);
    for (const each of expected) expect(near).toContain(each);
    expect(near[0]).toBe(expected[0]);
    for (const each of near) expect(readUnit(each).ok, each).toBe(true);
    const unit = readUnit(typed);
    expect(unit.ok ? '' : unit.problem.message).toContain(`write ${expected[0]}`);
  });
});

describe('coherent units', () => {
  test.each([
    ['L M T-2', 0, 'N'],
    ['L-1 M T-2', 0, 'Pa'],
    ['L2 M T-2', 0, 'N·m'],
    ['L2 M T-3', 0, 'W'],
    ['L T-1', 0, 'm/s'],
    ['L T-2', 0, 'm/s²'],
    ['T-1', 0, '1/s'],
    ['T-1', 1, 'r/s'],
    ['1', 1, 'r'],
    ['1', 0, '1'],
    ['L', -1, 'm/r'],
    ['L2 M T-2', -1, 'N·m/r'],
    ['L2 M', 0, 'kg·m²'],
    ['L-1 M', 0, 'kg/m'],
    ['L-3 M', 0, 'kg/m³'],
    ['L3 T-1', 0, 'm³/s'],
    ['L1/2', 0, 'm^(1/2)'],
    ['L2 T-2 Θ-1', 0, 'J/(kg·K)'],
    ['M T-3 Θ-1', 0, 'W/(m²·K)'],
    ['L4', 0, 'm⁴'],
    ['L-1 T-1', 0, '1/(m·s)'],
    ['Θ-1', 0, '1/K'],
    ['T', 0, 's'],
    ['M', 0, 'kg'],
    ['1', -1, '1/r'],
  ])('%s with r^%d prints in %s', (key, turns, text) => {
    const unit = coherentUnit(dimensionOf(key), rational(turns));
    expect(unit.text).toBe(text);
    expect([unit.factor.n, unit.factor.d, unit.factor.pi]).toEqual([1n, 1n, 0]);
    expect(equalD(unit.dimension, dimensionOf(key))).toBe(true);
    expect(unit.counts.r).toEqual(rational(turns));
    expect(unitOf(text).dimension).toEqual(unit.dimension);
  });
});
