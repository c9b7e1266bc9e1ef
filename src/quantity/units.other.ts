// Other units still met in dossiers: navigation, the technical metric system, CGS.
//
// Torr and mmHg differ in the seventh digit, cal and cal_IT in the third: they stay apart.
// Not here: units whose value depends on a place or a measurement.

import type { UnitRow } from './unit-row.ts';

const b8 = 'NIST SP 811 B.8';

export const otherUnits: readonly UnitRow[] = [
  { symbol: 'nmi', name: 'nautical mile', dimension: 'L', factor: '1852', source: b8 },
  { symbol: 'kn', name: 'knot', dimension: 'L T-1', factor: '1852/3600', source: b8, spellings: ['knot'] },
  { symbol: 'Å', name: 'ångström', dimension: 'L', factor: '1e-10', source: b8 },

  { symbol: 'kgf', name: 'kilogram-force', dimension: 'L M T-2', factor: '9.80665', source: b8, spellings: ['kp'] },
  { symbol: 'at', name: 'technical atmosphere, 1 kgf/cm²', dimension: 'L-1 M T-2', factor: '98066.5', source: b8 },
  { symbol: 'atm', name: 'standard atmosphere', dimension: 'L-1 M T-2', factor: '101325', source: b8 },
  { symbol: 'Torr', name: 'torr', dimension: 'L-1 M T-2', factor: '101325/760', source: b8, prefixes: 'm', usual: 'm' },
  { symbol: 'mmHg', name: 'conventional millimetre of mercury', dimension: 'L-1 M T-2', factor: '13.5951*9.80665', source: b8 },
  { symbol: 'mmH2O', name: 'conventional millimetre of water', dimension: 'L-1 M T-2', factor: '9.80665', source: b8 },
  {
    symbol: 'hp_metric',
    name: 'metric horsepower, 75 kgf·m/s',
    dimension: 'L2 M T-3',
    factor: '75*9.80665',
    source: b8,
    spellings: ['PS'],
  },
  {
    symbol: 'cal',
    name: 'calorie (thermochemical)',
    dimension: 'L2 M T-2',
    factor: '4.184',
    source: b8,
    spellings: ['cal_th'],
    prefixes: 'k',
    usual: 'k',
    kind: 'energy',
  },
  { symbol: 'cal_IT', name: 'calorie (IT)', dimension: 'L2 M T-2', factor: '4.1868', source: b8, prefixes: 'k', kind: 'energy' },

  { symbol: 'dyn', name: 'dyne', dimension: 'L M T-2', factor: '1e-5', source: b8 },
  { symbol: 'erg', name: 'erg', dimension: 'L2 M T-2', factor: '1e-7', source: b8, kind: 'energy' },
  { symbol: 'Gal', name: 'gal, the acceleration', dimension: 'L T-2', factor: '1/100', source: b8, prefixes: 'm µ', usual: 'm' },
  { symbol: 'St', name: 'stokes', dimension: 'L2 T-1', factor: '1e-4', source: b8, prefixes: 'c m', usual: 'c' },
  { symbol: 'P', name: 'poise', dimension: 'L-1 M T-1', factor: '0.1', source: b8, prefixes: 'c m', usual: 'c' },
  { symbol: 'g_n', name: 'standard acceleration of free fall', dimension: 'L T-2', factor: '9.80665', source: b8 },
];
