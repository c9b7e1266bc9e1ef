// Non-SI units accepted for use with the SI, and the ratios that are written as units.
//
// Neper, bel and decibel are left out: they are logarithms, and a factor cannot stand for them.
// Dalton is left out: its value is measured, not exact.
// Not here: US customary units (units.us.ts).

import type { UnitRow } from './unit-row.ts';

const accepted = 'SI Brochure 9th ed., Table 8';
const ratio = 'SI Brochure 9th ed., 5.4.7';

export const acceptedUnits: readonly UnitRow[] = [
  { symbol: 'min', name: 'minute', dimension: 'T', factor: '60', source: accepted, spellings: ['mins'] },
  { symbol: 'h', name: 'hour', dimension: 'T', factor: '3600', source: accepted, spellings: ['hr', 'hrs'] },
  { symbol: 'd', name: 'day', dimension: 'T', factor: '86400', source: accepted },
  { symbol: 'au', name: 'astronomical unit', dimension: 'L', factor: '149597870700', source: accepted },
  { symbol: '°', name: 'degree', dimension: '1', factor: 'pi/180', source: accepted, spellings: ['deg'], counts: 'rad' },
  {
    symbol: '′',
    name: 'minute of angle',
    dimension: '1',
    factor: 'pi/10800',
    source: accepted,
    spellings: ['arcmin'],
    counts: 'rad',
  },
  {
    symbol: '″',
    name: 'second of angle',
    dimension: '1',
    factor: 'pi/648000',
    source: accepted,
    spellings: ['arcsec'],
    counts: 'rad',
  },
  { symbol: 'gon', name: 'gon', dimension: '1', factor: 'pi/200', source: 'NIST SP 811 B.8', counts: 'rad' },
  { symbol: 'ha', name: 'hectare', dimension: 'L2', factor: '1e4', source: accepted },
  {
    symbol: 'L',
    name: 'litre',
    dimension: 'L3',
    factor: '1/1000',
    source: accepted,
    spellings: ['l'],
    prefixes: 'M k h d c m µ n',
    usual: 'm c',
  },
  { symbol: 't', name: 'tonne', dimension: 'M', factor: '1000', source: accepted, prefixes: 'k M G', usual: 'k' },
  {
    symbol: 'eV',
    name: 'electronvolt',
    dimension: 'L2 M T-2',
    factor: '1.602176634e-19',
    source: accepted,
    prefixes: 'all',
    usual: 'k M',
    kind: 'energy',
  },
  {
    symbol: 'bar',
    name: 'bar',
    dimension: 'L-1 M T-2',
    factor: '1e5',
    source: 'NIST SP 811 B.8',
    prefixes: 'M k d m µ',
    usual: 'm',
  },
  { symbol: '%', name: 'per cent', dimension: '1', factor: '1/100', source: ratio },
  { symbol: '‰', name: 'per mille', dimension: '1', factor: '1/1000', source: 'ISO 80000-1:2009, 6.5.5' },
  { symbol: 'ppm', name: 'part per million', dimension: '1', factor: '1e-6', source: ratio },
];
