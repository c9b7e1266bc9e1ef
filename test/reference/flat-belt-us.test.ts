// Group B: flat belts in US customary units, and shaft loads, against textbooks and problem pages.
//
// Not here: power and forces in SI (flat-belt.test.ts).

import { describe } from 'vitest';
import { type Example, speedFor, testExamples, wrapped } from './template.ts';

const noService = { K_A: '1' } as const;
const neglected = { K_A: '1', s_n: '0' } as const;

// 85.1 lbf a inch of width at 0.003 in; E/(1 − 0.285²) with E = 28e6 psi.
const metal = {
  ...neglected,
  d_1: '4 in',
  d_2: '4 in',
  C: '20 in',
  t: '0.003 in',
  mu_1: '0.35',
  mu_2: '0.35',
  E_b: '30475361.214660827 psi',
};
const SHIGLEY = "Shigley's Mechanical Engineering Design, friction drive with a stainless steel belt (holooly.com)";
/** Power of 30 lbf·in at 600 r/min: 15 lbf at the rim of 4 in, as the book has it. */
const torque = { n_1: '600 r/min', P: `${(2 * Math.PI * 600 * 30) / 12} ft·lbf/min` };

const customary: readonly Example[] = [
  {
    id: 'B22 ratio and width',
    source: SHIGLEY,
    tag: 'print seen',
    template: 'flat-belt-open',
    givens: { ...metal, ...torque, sigma_allow: `${85.1 / 0.003} psi` },
    checks: [
      { name: 'k', recomputed: '3.002837', printed: '3.00' },
      { name: 'b_req', unit: 'in', recomputed: '0.264270', printed: '0.264' },
    ],
  },
  {
    id: 'B22 forces',
    source: SHIGLEY,
    tag: 'print seen',
    template: 'flat-belt-open',
    givens: { ...metal, ...torque, b: '0.75 in', F_0: '56.325 lbf' },
    checks: [
      { name: 'F_1', unit: 'lbf', recomputed: '63.825', printed: '63.8' },
      { name: 'F_2', unit: 'lbf', recomputed: '48.825', printed: '48.8' },
    ],
  },
  {
    id: 'B22 fatigue strength reached at 85.1 lbf an inch',
    source: SHIGLEY,
    tag: 'print seen',
    template: 'flat-belt-open',
    givens: { ...metal, ...torque, b: '1 in', F_0: '77.56577 lbf' },
    checks: [
      { name: 'F_1', unit: 'lbf', recomputed: '85.06577', printed: '85.1' },
      { name: 'sigma_max', unit: 'psi', recomputed: '51211.8', printed: '5.121e4' },
    ],
  },
  {
    id: 'B22 friction that is used: the belt would slip at 0.0853',
    source: SHIGLEY,
    tag: 'print seen',
    template: 'flat-belt-open',
    // ln(63.79933/48.79933)/pi with the unrounded tight side of 0.75 in times 85.06577 lbf/in.
    givens: { ...metal, ...torque, b: '0.75 in', F_0: '56.2993275 lbf', mu_1: '0.085314', mu_2: '0.085314' },
    checks: [{ name: 'S_slip', recomputed: '1.0000' }],
  },
  {
    id: 'B24',
    source: 'Faires, Design of Machine Elements, problem 841 (a): 60 hp, 7 in, 2700 rpm',
    tag: 'print seen',
    template: 'flat-belt-open',
    givens: { ...noService, P: '60 hp', d_1: '7 in', d_2: '21 in', C: '60 in', n_1: '2700 r/min' },
    checks: [
      { name: 'v', unit: 'ft/min', recomputed: '4948.0084', printed: '4948' },
      { name: 'F_u', unit: 'lbf', recomputed: '400.16', printed: '400.16' },
    ],
  },
  {
    id: 'pound-mass and pound-force',
    source: 'Belt of 0.3 lb/ft at 4000 ft/min: w v²/g, common practice; 1333 where g is forgotten',
    tag: 'derived',
    template: 'flat-belt-open',
    givens: {
      ...noService,
      s_n: '1',
      d_1: '1 ft',
      d_2: '2 ft',
      C: '5 ft',
      n_1: `${4000 / Math.PI} r/min`,
      b: '1 ft',
      t: '0.1 ft',
      rho: '3 lb/ft^3',
    },
    checks: [
      {
        name: 'F_c',
        unit: 'lbf',
        recomputed: '41.4413',
        wrong: { printed: '1333', because: 'pounds of mass were taken for pounds of force' },
      },
    ],
  },
];

const shaft: readonly Example[] = [
  {
    id: 'shaft load of 900 N and 300 N at 150°',
    source: 'vector sum, derived from equilibrium of the pulley',
    tag: 'derived',
    template: 'flat-belt-open',
    givens: { ...neglected, ...wrapped(150), n_1: speedFor(1, 0.1), P: '600 W', F_0: '600 N' },
    checks: [
      { name: 'F_1', unit: 'N', recomputed: '900.0000' },
      { name: 'F_2', unit: 'N', recomputed: '300.0000' },
      { name: 'F_W', unit: 'N', recomputed: '1169.4673' },
    ],
  },
  {
    id: 'shaft load from the effective pull',
    source: 'F_u·√(k² + 1 − 2k·cos θ)/(k − 1), form of Roloff/Matek, Maschinenelemente; a public student script gives 48.33 N',
    tag: 'print seen',
    template: 'flat-belt-open',
    // At the limit of grip: F_0 = F_u (k + 1)/(2 (k − 1)) with k = 4.810477 and F_u = 16.6667 N.
    givens: {
      ...neglected,
      d_1: '0.1 m',
      d_2: '0.1 m',
      C: '1 m',
      n_1: speedFor(1, 0.1),
      P: '16.666666666666668 W',
      mu_1: '0.5',
      mu_2: '0.5',
      F_0: '12.70723865 N',
    },
    checks: [
      { name: 'k', recomputed: '4.810477' },
      {
        name: 'F_W',
        unit: 'N',
        recomputed: '25.414477',
        wrong: { printed: '48.33', because: 'degrees were converted by 180/pi and a factor was left under the root' },
      },
    ],
  },
];

describe('belts in US customary units agree with print', () => testExamples(customary));
describe('shaft loads agree with independent values', () => testExamples(shaft));
