// Group C: V-belts and ropes in grooves, against textbooks and problem pages.
//
// Books give the full groove angle or its half; the template takes the full one. Where a book excludes the centrifugal part
// from its forces, the force here is larger by F_c. Not here: flat belts.

import { describe } from 'vitest';
import { type Example, speedFor, testExamples, wrapped } from './template.ts';

const noService = { K_A: '1', s_n: '1' } as const;
const KHURMI = 'Khurmi & Gupta, Theory of Machines, ch. 11';

const groove = (alpha: string, mu: string) => ({ alpha_1: alpha, alpha_2: alpha, mu_1: mu, mu_2: mu });

const jindal = {
  ...noService,
  P: '12 kW',
  d_1: '0.3 m',
  d_2: '0.9 m',
  C: '0.9 m',
  n_1: '1500 r/min',
  m: '0.253 kg/m',
  F_allow: '483 N',
  mu_1: '0.22',
  mu_2: '0.22',
  alpha_1: '40°',
};
// Girth of the rope of example C8: 53 C² in kg/m and 122 C² in kN with a diameter of 31.564 19 mm.
const girth = Math.PI * 0.03156419;

const examples: readonly Example[] = [
  {
    id: 'C1, flat rim on the large pulley',
    source: 'Jindal, Machine Design, example 21-1 (statement not seen; the numbers are those of a V-flat drive)',
    tag: 'print seen',
    template: 'v-belt',
    givens: { ...jindal, alpha_2: '180°' },
    checks: [
      { name: 'F_c', unit: 'N', recomputed: '140.4568', printed: '140.5' },
      { name: 'k_1', recomputed: '4.872451' },
      { name: 'k_2', recomputed: '2.317940' },
      { name: 'i_gov', recomputed: '2' },
      { name: 'F_2lim', unit: 'N', recomputed: '288.2360', printed: '288.2' },
      { name: 'P_1', unit: 'W', recomputed: '4589.019', printed: '4589' },
      { name: 'z_req', recomputed: '3', printed: '3' },
    ],
  },
  {
    id: 'C1, both pulleys grooved',
    source: 'Jindal, Machine Design, example 21-1, other reading of the statement',
    tag: 'givens seen',
    template: 'v-belt',
    givens: { ...jindal, alpha_2: '40°' },
    checks: [
      { name: 'i_gov', recomputed: '1' },
      { name: 'F_2lim', unit: 'N', recomputed: '210.7588' },
      { name: 'P_1', unit: 'W', recomputed: '6414.53' },
      { name: 'z_req', recomputed: '2' },
    ],
  },
  {
    id: 'C3',
    source: `${KHURMI}, example 11.18 (companion code)`,
    tag: 'givens seen',
    template: 'v-belt',
    givens: {
      ...noService,
      ...wrapped(140, 0.2, 1),
      ...groove('30°', '0.15'),
      n_1: speedFor(23.094010767585033, 0.2),
      m: '0.35 kg/m',
      F_allow: '560 N',
    },
    checks: [
      { name: 'v', unit: 'm/s', recomputed: '23.094011' },
      { name: 'k', recomputed: '4.121105' },
      // 90.5906 N in the book, without the 186.6667 N of centrifugal tension.
      { name: 'F_2lim', unit: 'N', recomputed: '277.2573' },
      { name: 'P_1', unit: 'kW', recomputed: '6.529664' },
    ],
  },
  {
    id: 'C5',
    source: `${KHURMI}, example 11.20 (companion code; 20 ropes of the book from memory)`,
    tag: 'givens seen',
    template: 'v-belt',
    givens: {
      ...noService,
      ...wrapped(160, 4, 12),
      ...groove('45°', '0.28'),
      P: '600 kW',
      n_1: '90 r/min',
      m: '1.5 kg/m',
      F_allow: '2400 N',
    },
    checks: [
      { name: 'v', unit: 'm/s', recomputed: '18.849556' },
      { name: 'F_c', unit: 'N', recomputed: '532.9586' },
      { name: 'k', recomputed: '7.715434' },
      // 241.9879 N in the book, without the centrifugal tension.
      { name: 'F_2lim', unit: 'N', recomputed: '774.9465' },
      { name: 'P_1', unit: 'kW', recomputed: '30.631537' },
      { name: 'z_req', recomputed: '20', printed: '20' },
    ],
  },
  {
    id: 'C7',
    source: 'Sarkar, Theory of Machines, ch. 2, illustration 14, p. 68 (companion code)',
    tag: 'givens seen',
    template: 'v-belt',
    givens: {
      ...noService,
      ...wrapped(160, 1.5, 6),
      ...groove('45°', '0.3'),
      P: '75 kW',
      n_1: '200 r/min',
      m: '0.6 kg/m',
      F_allow: '800 N',
    },
    checks: [
      { name: 'P_1', unit: 'kW', recomputed: '9.093817' },
      { name: 'z_req', recomputed: '9' },
    ],
  },
  {
    id: 'C8 without centrifugal part',
    source: 'Exam problem with stated answer, askfilo.com question 3336323239363230: 675.55 N, 31.57 mm',
    tag: 'print seen',
    template: 'v-belt',
    givens: {
      K_A: '1',
      s_n: '0',
      S_req: '1',
      ...wrapped(160, 0.4, 2),
      ...groove('45°', '0.28'),
      P: '24 kW',
      n_1: '110 r/min',
      z: '10',
      m: `${53 * girth ** 2} kg/m`,
    },
    checks: [
      { name: 'F_0req', unit: 'N', recomputed: '675.9972', wrong: { printed: '675.55', because: 'rounded early, 0.07 % low' } },
    ],
  },
  {
    id: 'C8 with centrifugal part',
    source: 'Exam problem with stated answer, askfilo.com question 3336323239363230: 675.55 N, 31.57 mm',
    tag: 'print seen',
    template: 'v-belt',
    givens: {
      ...noService,
      S_req: '1',
      ...wrapped(160, 0.4, 2),
      ...groove('45°', '0.28'),
      P: '24 kW',
      n_1: '110 r/min',
      z: '10',
      m: `${53 * girth ** 2} kg/m`,
      F_allow: `${122000 * girth ** 2} N`,
      F_0: '678.7633 N',
    },
    checks: [
      { name: 'F_0req', unit: 'N', recomputed: '678.7633' },
      // The diameter is the one at which the tight side uses the working load: 1199.634 N.
      { name: 'F_1', unit: 'N', recomputed: '1199.634' },
    ],
  },
  {
    id: 'C10',
    source: 'Drive of 200 N·m at a 400 mm pulley, physicsforums.com thread 900162 (givens)',
    tag: 'givens seen',
    template: 'v-belt',
    givens: {
      K_A: '1',
      s_n: '0',
      P: '1963.4954 W',
      d_1: '150 mm',
      d_2: '400 mm',
      C: '600 mm',
      n_1: '250 r/min',
      ...groove('40°', '0.4'),
      z: '1',
      F_allow: '4 kN',
    },
    checks: [
      { name: 'theta_1', unit: 'deg', recomputed: '155.950602' },
      { name: 'k', recomputed: '24.125383' },
      { name: 'F_2lim', unit: 'N', recomputed: '165.8005' },
      { name: 'P_1', unit: 'W', recomputed: '7528.4332' },
      // 200 N·m at 0.2 m.
      { name: 'F_u', unit: 'N', recomputed: '1000.0000' },
    ],
  },
];

describe('V-belts and ropes agree with print and with independent values', () => testExamples(examples));
