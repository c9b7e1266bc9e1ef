// US customary and imperial units.
//
// 1. lb is the pound of mass, lbf the pound-force: two rows, two dimensions, no spelling in common. A bare "ton" is no unit:
//    there are three of them.
// 2. Everything rests on the inch of 0.0254 m, the pound of 0.453 592 37 kg, the standard acceleration of free fall of
//    9.806 65 m/s², the gallon of 231 in³ and the IT calorie of 4.1868 J, all exact (NIST SP 811, B.8 and its footnotes).
// Not here: the survey foot, withdrawn at the end of 2022.

import type { UnitRow } from './unit-row.ts';

const b8 = 'NIST SP 811 B.8';

export const usUnits: readonly UnitRow[] = [
  { symbol: 'in', name: 'inch', dimension: 'L', factor: '0.0254', source: b8, prefixes: 'µ', usual: 'µ' },
  { symbol: 'ft', name: 'foot', dimension: 'L', factor: '0.3048', source: b8 },
  { symbol: 'yd', name: 'yard', dimension: 'L', factor: '0.9144', source: b8 },
  { symbol: 'mi', name: 'mile', dimension: 'L', factor: '1609.344', source: b8 },
  { symbol: 'mil', name: 'thousandth of an inch', dimension: 'L', factor: '0.0000254', source: b8, spellings: ['thou', 'mils'] },
  { symbol: 'cmil', name: 'circular mil', dimension: 'L2', factor: 'pi/4*0.0000254^2', source: b8, prefixes: 'k', usual: 'k' },
  {
    symbol: 'acre',
    name: 'acre',
    dimension: 'L2',
    factor: '4840*0.9144^2',
    source: 'NIST SP 811 B.6, with the foot of 0.3048 m',
  },

  { symbol: 'gal', name: 'US gallon', dimension: 'L3', factor: '231*0.0254^3', source: b8, spellings: ['gal_US'] },
  { symbol: 'gal_UK', name: 'imperial gallon', dimension: 'L3', factor: '4.54609/1000', source: b8, spellings: ['gal_imp'] },
  { symbol: 'qt', name: 'US liquid quart', dimension: 'L3', factor: '231/4*0.0254^3', source: b8 },
  { symbol: 'bbl', name: 'barrel of 42 US gallons', dimension: 'L3', factor: '42*231*0.0254^3', source: b8 },

  { symbol: 'lb', name: 'pound', dimension: 'M', factor: '0.45359237', source: b8, spellings: ['lbm', 'lbs'] },
  { symbol: 'oz', name: 'ounce', dimension: 'M', factor: '0.45359237/16', source: b8 },
  { symbol: 'grain', name: 'grain', dimension: 'M', factor: '0.45359237/7000', source: b8 },
  { symbol: 'slug', name: 'slug', dimension: 'M', factor: '0.45359237*9.80665/0.3048', source: b8 },
  { symbol: 'ton_short', name: 'short ton', dimension: 'M', factor: '2000*0.45359237', source: b8, spellings: ['ton_US'] },
  { symbol: 'ton_long', name: 'long ton', dimension: 'M', factor: '2240*0.45359237', source: b8, spellings: ['ton_UK'] },

  { symbol: 'lbf', name: 'pound-force', dimension: 'L M T-2', factor: '0.45359237*9.80665', source: b8 },
  { symbol: 'ozf', name: 'ounce-force', dimension: 'L M T-2', factor: '0.45359237*9.80665/16', source: b8 },
  {
    symbol: 'kip',
    name: 'kip of 1000 pound-force',
    dimension: 'L M T-2',
    factor: '1000*0.45359237*9.80665',
    source: b8,
    spellings: ['kips'],
  },
  { symbol: 'pdl', name: 'poundal', dimension: 'L M T-2', factor: '0.45359237*0.3048', source: b8 },

  {
    symbol: 'psi',
    name: 'pound-force per square inch',
    dimension: 'L-1 M T-2',
    factor: '0.45359237*9.80665/0.0254^2',
    source: b8,
  },
  { symbol: 'ksi', name: 'kip per square inch', dimension: 'L-1 M T-2', factor: '1000*0.45359237*9.80665/0.0254^2', source: b8 },
  { symbol: 'inHg', name: 'conventional inch of mercury', dimension: 'L-1 M T-2', factor: '13.5951*9.80665*25.4', source: b8 },
  { symbol: 'inH2O', name: 'conventional inch of water', dimension: 'L-1 M T-2', factor: '9.80665*25.4', source: b8 },
  { symbol: 'ftH2O', name: 'conventional foot of water', dimension: 'L-1 M T-2', factor: '9.80665*304.8', source: b8 },

  {
    symbol: 'Btu',
    name: 'British thermal unit (IT)',
    dimension: 'L2 M T-2',
    factor: '4.1868*453.59237/1.8',
    source: b8,
    spellings: ['Btu_IT'],
    kind: 'energy',
  },
  {
    symbol: 'Btu_th',
    name: 'British thermal unit (thermochemical)',
    dimension: 'L2 M T-2',
    factor: '4.184*453.59237/1.8',
    source: b8,
    kind: 'energy',
  },
  {
    symbol: 'hp',
    name: 'horsepower of 550 foot pound-force per second',
    dimension: 'L2 M T-3',
    factor: '550*0.3048*0.45359237*9.80665',
    source: b8,
  },
  { symbol: 'hp_electric', name: 'electric horsepower', dimension: 'L2 M T-3', factor: '746', source: b8 },
  {
    symbol: 'TR',
    name: 'ton of refrigeration, 12 000 Btu (IT) per hour',
    dimension: 'L2 M T-3',
    factor: '12000*4.1868*453.59237/1.8/3600',
    source: b8,
  },

  {
    symbol: '°F',
    name: 'degree Fahrenheit',
    dimension: 'Θ',
    factor: '5/9',
    source: 'NIST SP 811 B.9, temperature',
    spellings: ['degF', '℉'],
    reading: '459.67*5/9',
  },
  // Absolute, so no reading; a difference in degrees Fahrenheit has the same size.
  {
    symbol: '°R',
    name: 'degree Rankine',
    dimension: 'Θ',
    factor: '5/9',
    source: 'NIST SP 811 B.9, temperature',
    spellings: ['degR'],
  },
];
