// Group B: geometry of flat belts, against textbooks and problem pages.
//
// Exact lengths; where a book prints the series, the test says so. Not here: forces and power (flat-belt.test.ts).

import { describe, expect, test } from 'vitest';
import { type Example, solve, testExamples, valueOf } from './template.ts';

const TAYAL = 'Tayal, Engineering Mechanics, ch. 7';
const KHURMI = 'Khurmi & Gupta, Theory of Machines, ch. 11';

const geometry: readonly Example[] = [
  {
    id: 'B1',
    source: `${TAYAL}, example 7.1`,
    tag: 'print seen',
    template: 'flat-belt-open',
    givens: { d_1: '12 cm', d_2: '24 cm', C: '30 cm' },
    checks: [
      { name: 'theta_1', unit: 'deg', recomputed: '156.9260819', printed: '156.926082' },
      { name: 'theta_2', unit: 'deg', recomputed: '203.0739181', printed: '203.073918' },
      {
        name: 'L',
        unit: 'cm',
        recomputed: '117.7527166',
        wrong: { printed: '117.748668', because: 'the print is the series, not the exact length' },
      },
    ],
  },
  {
    id: 'B2',
    source: `${TAYAL}, example 7.2`,
    tag: 'print seen',
    template: 'flat-belt-crossed',
    givens: { d_1: '0.3 m', d_2: '0.6 m', C: '3.5 m' },
    checks: [
      { name: 'theta_1', unit: 'deg', recomputed: '194.7740969', printed: '194.774097' },
      { name: 'theta_2', unit: 'deg', recomputed: '194.7740969' },
      {
        name: 'L',
        unit: 'm',
        recomputed: '8.4716539',
        wrong: { printed: '8.420145', because: 'the term of the open belt, with the difference of the radii, was used' },
      },
    ],
  },
  {
    id: 'B5 open',
    source: 'Belt length for 1.6 m, 0.5 m, 12 m, sarthaks.com/509872',
    tag: 'print seen',
    template: 'flat-belt-open',
    givens: { d_1: '0.5 m', d_2: '1.6 m', C: '12 m' },
    checks: [{ name: 'L', unit: 'm', recomputed: '27.3238850', printed: '27.32' }],
  },
  {
    id: 'B5 crossed',
    source: 'Belt length for 1.6 m, 0.5 m, 12 m, sarthaks.com/509872',
    tag: 'givens seen',
    template: 'flat-belt-crossed',
    givens: { d_1: '0.5 m', d_2: '1.6 m', C: '12 m' },
    checks: [{ name: 'L', unit: 'm', recomputed: '27.3906060' }],
  },
  {
    id: 'B6 crossed',
    source: 'Sarkar, Theory of Machines, ch. 2, illustration 3, p. 58 (companion code)',
    tag: 'givens seen',
    template: 'flat-belt-crossed',
    givens: { d_1: '30 cm', d_2: '50 cm', C: '500 cm' },
    checks: [{ name: 'L', unit: 'cm', recomputed: '1128.865416' }],
  },
  {
    id: 'B6 open',
    source: 'Sarkar, Theory of Machines, ch. 2, illustration 3, p. 58 (companion code)',
    tag: 'givens seen',
    template: 'flat-belt-open',
    givens: { d_1: '30 cm', d_2: '50 cm', C: '500 cm' },
    checks: [{ name: 'L', unit: 'cm', recomputed: '1125.863713' }],
  },
  {
    id: 'B25 first stage',
    source: `${KHURMI}, example 11.1, p. 333, without slip`,
    tag: 'print seen',
    template: 'flat-belt-open',
    givens: { n_1: '150 r/min', d_1: '750 mm', d_2: '450 mm', C: '3 m' },
    checks: [{ name: 'n_2', unit: 'r/min', recomputed: '250' }],
  },
  {
    id: 'B25 second stage',
    source: `${KHURMI}, example 11.1, p. 333, without slip`,
    tag: 'print seen',
    template: 'flat-belt-open',
    givens: { n_1: '250 r/min', d_1: '900 mm', d_2: '150 mm', C: '3 m' },
    checks: [{ name: 'n_2', unit: 'r/min', recomputed: '1500', printed: '1500' }],
  },
  {
    id: 'B30',
    source: 'Belt round wheels of radius 6 and 1, 13 apart, solve.club: 49.939 059 772 127 518 89',
    tag: 'print seen',
    template: 'flat-belt-open',
    givens: { d_1: '2 m', d_2: '12 m', C: '13 m' },
    checks: [
      {
        name: 'L',
        unit: 'm',
        recomputed: '49.939059772126',
        printed: '49.939059772',
        wrong: { printed: '49.914225', because: 'the series is 0.05 % short' },
      },
    ],
  },
];

describe('belt geometry agrees with print and with independent values', () => testExamples(geometry));

test('a crossed belt keeps its length when the sum of the diameters is kept, an open one does not: Khurmi 11.3, step cones', () => {
  const length = (template: string, d_1: string, d_2: string) => valueOf(solve(template, { d_1, d_2, C: '1 m' }), 'L', 'm');
  expect(length('flat-belt-crossed', '150 mm', '450 mm')).toBeCloseTo(length('flat-belt-crossed', '300 mm', '300 mm'), 12);
  expect(length('flat-belt-open', '150 mm', '450 mm') - length('flat-belt-open', '300 mm', '300 mm')).toBeGreaterThan(0.02);
});
