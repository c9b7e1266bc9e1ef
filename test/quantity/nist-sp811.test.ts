// Factors, temperatures and unit algebra against the published tables.
//
// Sources stand beside the values. Every expectation was printed in a source or worked out from its exact definitions outside
// this program; none was copied from its output.

import { describe, expect, test, vi } from 'vitest';
import {
  doubleOfNumeral,
  fromSI,
  numeralInUnit,
  numeralOfDouble,
  plainNumeral,
  readUnit,
  readValue,
  roundSignificant,
  unitOf,
} from '../../src/quantity/index.ts';
import { publishedFactors } from './nist-sp811.ts';

// Thousands of random cases: on a busy machine more than the usual five seconds.
vi.setConfig({ testTimeout: 60_000 });

const si = (text: string): number => {
  const value = readValue(text, { decimalSign: '.' });
  if (!value.ok) throw new Error(value.problem.message);
  return value.value.si;
};

describe('NIST SP 811, Appendix B', () => {
  test.each(publishedFactors)('$unit is $full $si', ({ unit, si: target, full }) => {
    const [from, to] = [unitOf(unit), unitOf(target)];
    expect(from.dimension).toEqual(to.dimension);
    expect(to.si).toBe(1);
    // Of a value that does not end, the twenty digits fix the nearest double as well.
    expect(from.si).toBe(Number(full));
  });

  test.each(publishedFactors)('$unit rounds to the printed $printed', ({ unit, printed }) => {
    const [mantissa = '', exponent = ''] = printed.replace(/ (?=\d)/g, '').split(' E');
    const digits = mantissa.replace('.', '').length;
    const shown = roundSignificant(numeralOfDouble(unitOf(unit).si), digits);
    expect(doubleOfNumeral(shown)).toBe(Number(`${mantissa}e${exponent}`));
    expect(shown.digits).toHaveLength(digits);
  });

  // Footnotes 22 (lb), 23 (lbf) and 9 (Btu IT) of SP 811 B.8: exact values in full.
  test.each([
    ['lb', '0.45359237'],
    ['lbf', '4.4482216152605'],
    ['Btu', '1055.05585262'],
    // US gallon of 231 in³, short ton of 2000 lb, mile of 5280 ft: exact by definition.
    ['gal', '0.003785411784'],
    ['ton_short', '907.18474'],
    ['mi', '1609.344'],
    // SI Brochure 9th ed., Table 8.
    ['ha', '10000'],
    ['L', '0.001'],
    ['au', '149597870700'],
    ['d', '86400'],
    // Conventional columns: 13 595.1 kg/m³ · 9.806 65 m/s² · 1 mm, and 1000 kg/m³ likewise.
    ['mmHg', '133.322387415'],
    ['mmH2O', '9.80665'],
    // SP 811 B.8: knot 5.144 444 E−01 = 1852/3600; acre 4046.856 422 4 from the foot of 0.3048 m; Å, P exact.
    ['kn', '0.51444444444444444444'],
    ['acre', '4046.8564224'],
    ['Å', '1e-10'],
    ['P', '0.1'],
    ['bar', '100000'],
    ['kgf', '9.80665'],
    ['cal_IT', '4.1868'],
    // SI Brochure 9th ed., Table 8, from e of the 26th CGPM: exact.
    ['eV', '1.602176634e-19'],
  ])('%s is exactly %s in SI', (unit, full) => {
    expect(unitOf(unit).si).toBe(Number(full));
  });

  test('torr and conventional mmHg print alike and are not alike', () => {
    const [torr, mmHg] = [unitOf('Torr').si, unitOf('mmHg').si];
    expect([torr, mmHg].map((each) => each.toPrecision(7))).toEqual(['133.3224', '133.3224']);
    expect(torr).not.toBe(mmHg);
  });

  test('the pound of mass and the pound-force are of different dimension', () => {
    expect(unitOf('lb').dimension).not.toEqual(unitOf('lbf').dimension);
    expect(unitOf('lbf/lb').si).toBe(9.80665);
  });
});

// SP 811 B.9: T/K = t/°C + 273.15; t/°C = (t/°F − 32)/1.8; T/K = (t/°F + 459.67)/1.8; T/K = (T/°R)/1.8.
describe('temperature readings', () => {
  test.each([
    ['32 degF', 'degC', 0],
    ['212 degF', 'degC', 100],
    ['-40 degF', 'degC', -40],
    ['-459.67 degF', 'K', 0],
    ['98.6 degF', 'degC', 37],
    ['491.67 degR', 'K', 273.15],
    ['25 degC', 'K', 298.15],
    ['-273.15 degC', 'K', 0],
    ['100 °C', '°F', 212],
    ['37 °C', '°F', 98.6],
    ['0 K', '°F', -459.67],
  ])('%s is %s %d', (text, target, value) => {
    expect(fromSI(si(text), unitOf(target))).toBe(value);
  });

  test('a reading comes back as it was typed, for every tenth of a degree from -100 to 1000', () => {
    const changed: string[] = [];
    for (const name of ['°C', '°F']) {
      const unit = unitOf(name);
      for (let tenths = -1000; tenths <= 10000; tenths++) {
        const text = (tenths / 10).toString();
        if (plainNumeral(numeralInUnit(si(`${text} ${name}`), unit)) !== text) changed.push(`${text} ${name}`);
      }
    }
    expect(changed).toEqual([]);
  });

  test('inside a compound unit a degree is a difference', () => {
    for (const text of ['W/(m²·°C)', '1/°C', 'J/(kg·degC)', '°C/min', 'Btu/(h·ft²·°F)', '°C²']) {
      const unit = readUnit(text);
      expect(unit.ok && unit.value.reading, text).toBeUndefined();
    }
    expect(unitOf('W/(m·°C)').si).toBe(1);
    expect(unitOf('J/(kg·°F)').si).toBe(1.8);
    expect(unitOf('°C').reading).toBeDefined();
    expect(unitOf('K').reading).toBeUndefined();
    expect(unitOf('degR').reading).toBeUndefined();
  });

  test('a difference of 9 °F is 5 K', () => {
    // SP 811 B.9: an interval of 1 °F is 5/9 K. As a half-width it stands beside a reading.
    const value = readValue('20 °C ± 9 °F', { decimalSign: '.' });
    expect(value.ok && value.value.tolerance?.si).toBe(5);
  });
});

describe('unit algebra', () => {
  test.each([
    // SI Brochure 9th ed., ch. 3: the prefix is raised with the unit.
    ['2.3 cm^3', 'm^3', 2.3e-6],
    ['1 cm^-1', 'm^-1', 100],
    ['5000 µs^-1', 's^-1', 5e9],
    ['1 V/cm', 'V/m', 100],
    // SI Brochure 9th ed., 5.4.3: 22.20° rather than 22°12′.
    ['22 deg 12 arcmin', 'deg', 22.2],
    ['22° 12′', '°', 22.2],
    // From the definitions of SP 811 B.8: g_n; 0.447 04² / 0.3048; g_n·10⁴ Pa; 144 in² to the square foot.
    ['1 lbf/lb', 'N/kg', 9.80665],
    ['1 (mi/h)^2/ft', 'm/s^2', 0.6556586666666666],
    ['1 kgf/cm^2', 'kPa', 98.0665],
    ['1 psi', 'lbf/ft^2', 144],
    ['1 ft·lbf', 'in·lbf', 12],
    ['1 hp', 'ft·lbf/min', 33000],
    ['1 hp', 'ft·lbf/s', 550],
    ['1 TR', 'Btu/h', 12000],
    ['1 bbl', 'gal', 42],
    ['1 gal', 'in³', 231],
    ['1 lb', 'oz', 16],
    ['1 lb', 'grain', 7000],
    ['1 mi', 'ft', 5280],
    ['1 nmi', 'm', 1852],
    ['1 kn', 'km/h', 1.852],
    ['1 slug', 'lbf·s²/ft', 1],
    ['1 ksi', 'psi', 1000],
    ['90 °', 'gon', 100],
    ['1 °', '″', 3600],
    ['1 kW·h', 'MJ', 3.6],
    ['1 N/mm²', 'MPa', 1],
    ['1 mm/m', '‰', 1],
    ['1 cSt', 'mm²/s', 1],
    ['1 cP', 'mPa·s', 1],
  ])('%s is %s %d', (text, target, value) => {
    const [unit, read] = [unitOf(target), readValue(text, { decimalSign: '.' })];
    expect(read.ok && read.value.unit.dimension).toEqual(unit.dimension);
    expect(doubleOfNumeral(numeralInUnit(si(text), unit))).toBe(value);
  });
});

// ISO 80000-3: rotational frequency is revolutions by time; the angular velocity is 2π times as much.
describe('counted revolutions', () => {
  test('1 r/min is 1/60 per second, and 2π of that is the 0.104 719 755 rad/s of SP 811', () => {
    const unit = unitOf('r/min');
    expect([unit.factor.n, unit.factor.d, unit.factor.pi]).toEqual([1n, 60n, 0]);
    expect(unit.si).toBe(0.016666666666666666);
    // SP 811 B.8: revolution per minute 1.047 198 E−01 rad/s, in full 0.104 719 755 119 659 77…; revolution 6.283 185 E+00 rad.
    expect(2 * Math.PI * unit.si).toBeCloseTo(0.10471975511965977, 15);
    expect(2 * Math.PI * unitOf('r').si).toBe(6.283185307179586);
  });

  test('1500 r/min times 10 N·m is 1570.796 326 794 8966 W with the 2π of the formula', () => {
    expect(2 * Math.PI * si('1500 r/min') * si('10 N·m')).toBeCloseTo(1570.796326794897, 10);
  });

  test.each([
    ['r', 1, 0, 0],
    ['r/min', 1, 0, 0],
    ['rpm', 1, 0, 0],
    ['mm/r', -1, 0, 0],
    ['r²', 2, 0, 0],
    ['1/r', -1, 0, 0],
    ['Hz', 0, 1, 0],
    ['kHz', 0, 1, 0],
    ['1/Hz', 0, -1, 0],
    ['rad', 0, 0, 1],
    ['rad/s', 0, 0, 1],
    ['°/s', 0, 0, 1],
    ['gon', 0, 0, 1],
    ['arcmin', 0, 0, 1],
    ['N·m/rad', 0, 0, -1],
    ['1/s', 0, 0, 0],
    ['m', 0, 0, 0],
  ])('%s counts r %d, Hz %d, angle %d', (text, r, hz, rad) => {
    const { counts } = unitOf(text);
    expect([counts.r, counts.hz, counts.rad].map(({ n, d }) => n / d)).toEqual([r, hz, rad]);
  });
});
