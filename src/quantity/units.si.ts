// The units of the SI: base units, the derived units with special names, and revolutions.
//
// Prefixes of the kilogram go with the gram. The siemens takes only the prefixes in use: PS is the metric horsepower.
// Not here: units accepted with the SI (units.accepted.ts), all others (units.us.ts, units.other.ts).

import type { UnitRow } from './unit-row.ts';

const base = 'SI Brochure 9th ed., Table 2';
const derived = 'SI Brochure 9th ed., Table 4';

export const siUnits: readonly UnitRow[] = [
  { symbol: 'm', name: 'metre', dimension: 'L', factor: '1', source: base, prefixes: 'all', usual: 'k d c m µ n' },
  {
    symbol: 'g',
    name: 'gram',
    dimension: 'M',
    factor: '1/1000',
    source: 'SI Brochure 9th ed., ch. 3',
    prefixes: 'all',
    usual: 'k m µ M',
  },
  { symbol: 's', name: 'second', dimension: 'T', factor: '1', source: base, prefixes: 'all', usual: 'm µ n', spellings: ['sec'] },
  { symbol: 'A', name: 'ampere', dimension: 'I', factor: '1', source: base, prefixes: 'all', usual: 'k m µ' },
  { symbol: 'K', name: 'kelvin', dimension: 'Θ', factor: '1', source: base, prefixes: 'all', usual: 'm' },
  { symbol: 'mol', name: 'mole', dimension: 'N', factor: '1', source: base, prefixes: 'all', usual: 'k m' },
  { symbol: 'cd', name: 'candela', dimension: 'J', factor: '1', source: base, prefixes: 'all' },

  { symbol: 'rad', name: 'radian', dimension: '1', factor: '1', source: derived, prefixes: 'all', usual: 'm', counts: 'rad' },
  { symbol: 'sr', name: 'steradian', dimension: '1', factor: '1', source: derived },
  { symbol: 'Hz', name: 'hertz', dimension: 'T-1', factor: '1', source: derived, prefixes: 'all', usual: 'k M G', counts: 'hz' },
  { symbol: 'N', name: 'newton', dimension: 'L M T-2', factor: '1', source: derived, prefixes: 'all', usual: 'k da M m' },
  { symbol: 'Pa', name: 'pascal', dimension: 'L-1 M T-2', factor: '1', source: derived, prefixes: 'all', usual: 'k M G h' },
  {
    symbol: 'J',
    name: 'joule',
    dimension: 'L2 M T-2',
    factor: '1',
    source: derived,
    prefixes: 'all',
    usual: 'k M G m',
    kind: 'energy',
  },
  { symbol: 'W', name: 'watt', dimension: 'L2 M T-3', factor: '1', source: derived, prefixes: 'all', usual: 'k M m G' },
  { symbol: 'C', name: 'coulomb', dimension: 'T I', factor: '1', source: derived, prefixes: 'all' },
  { symbol: 'V', name: 'volt', dimension: 'L2 M T-3 I-1', factor: '1', source: derived, prefixes: 'all', usual: 'k m' },
  { symbol: 'F', name: 'farad', dimension: 'L-2 M-1 T4 I2', factor: '1', source: derived, prefixes: 'all', usual: 'µ n p' },
  {
    symbol: 'Ω',
    name: 'ohm',
    dimension: 'L2 M T-3 I-2',
    factor: '1',
    source: derived,
    prefixes: 'all',
    usual: 'k M m',
    spellings: ['ohm'],
  },
  { symbol: 'S', name: 'siemens', dimension: 'L-2 M-1 T3 I2', factor: '1', source: derived, prefixes: 'M k d c m µ n p' },
  { symbol: 'Wb', name: 'weber', dimension: 'L2 M T-2 I-1', factor: '1', source: derived, prefixes: 'all' },
  { symbol: 'T', name: 'tesla', dimension: 'M T-2 I-1', factor: '1', source: derived, prefixes: 'all' },
  { symbol: 'H', name: 'henry', dimension: 'L2 M T-2 I-2', factor: '1', source: derived, prefixes: 'all', usual: 'm µ' },
  { symbol: 'lm', name: 'lumen', dimension: 'J', factor: '1', source: derived, prefixes: 'all' },
  { symbol: 'lx', name: 'lux', dimension: 'L-2 J', factor: '1', source: derived, prefixes: 'all' },
  { symbol: 'Bq', name: 'becquerel', dimension: 'T-1', factor: '1', source: derived, prefixes: 'all' },
  { symbol: 'Gy', name: 'gray', dimension: 'L2 T-2', factor: '1', source: derived, prefixes: 'all' },
  { symbol: 'Sv', name: 'sievert', dimension: 'L2 T-2', factor: '1', source: derived, prefixes: 'all' },
  { symbol: 'kat', name: 'katal', dimension: 'T-1 N', factor: '1', source: derived, prefixes: 'all' },
  {
    symbol: '°C',
    name: 'degree Celsius',
    dimension: 'Θ',
    factor: '1',
    source: 'SI Brochure 9th ed., 2.3.1 and Table 4',
    spellings: ['degC', '℃'],
    reading: '273.15',
  },
  // A count of turns, of dimension one; r/min and r/s for rotational frequency: ISO 80000-3.
  {
    symbol: 'r',
    name: 'revolution',
    dimension: '1',
    factor: '1',
    source: 'ISO 80000-3, rotational frequency',
    spellings: ['rev'],
    counts: 'r',
  },
];
