// Group F: traction of lift sheaves. No worked example with visible numbers was found: factors of the grooves derived and checked by
// integration of a cosine pressure law (Feyrer, Wire Ropes, eq. 3.30 and 3.31), friction by EN 81-50:2014 5.11, and a lift of our own.
//
// Not here: what the codes ask beyond traction.

import { describe, expect, test } from 'vitest';
import { type Example, halfUnit, solve, testExamples, valueOf } from './template.ts';

const close = (ours: number, text: string, what: string) =>
  expect(Math.abs(ours - Number(text)), `${what}: ${ours} against ${text}`).toBeLessThanOrEqual(halfUnit(text) * 1.001);

// beta, gamma, f/mu
const undercut: readonly (readonly [string, string, string])[] = [
  ['0', '25', '1.248509'],
  ['0', '30', '1.2392'],
  ['65', '30', '1.5916'],
  ['90', '30', '1.8920'],
  ['95', '30', '1.972228'],
  ['95', '25', '2.0186'],
  ['100', '40', '1.9505'],
  ['105', '30', '2.1607'],
  ['105', '50', '1.910831'],
  ['106', '25', '2.2448'],
];
const vGroove: readonly (readonly [string, string])[] = [
  ['0', '1.2732'],
  ['90', '2.0525'],
  ['95', '2.156402'],
  ['100', '2.2744'],
  ['105', '2.4094'],
  ['106', '2.4387'],
];
const hardened: readonly (readonly [string, string])[] = [
  ['35', '3.3255'],
  ['36', '3.2361'],
  ['38', '3.0716'],
  ['40', '2.9238'],
  ['45', '2.6131'],
];
const braking: readonly (readonly [string, string])[] = [
  ['0.5', '.09524'],
  ['1.0', '.09091'],
  ['1.6', '.08621'],
  ['2.0', '.08333'],
  ['2.5', '.08000'],
  ['4.0', '.07143'],
  ['6.0', '.06250'],
];

describe('friction factors of grooves (derived)', () => {
  test.each(undercut)('undercut %s°, groove %s°: %s', (beta, gamma, factor) => {
    const calculation = solve('traction-sheave', { groove: 'undercut', beta: `${beta}°`, gamma: `${gamma}°` });
    close(valueOf(calculation, 'f_load') / 0.1, factor, 'loading');
    close(valueOf(calculation, 'f_stall') / 0.2, factor, 'stalled');
  });
  test.each(vGroove)('V groove with undercut %s°: %s when loading', (beta, factor) => {
    close(valueOf(solve('traction-sheave', { groove: 'V', beta: `${beta}°` }), 'f_load') / 0.1, factor, 'loading');
  });
  test.each(hardened)('V groove of %s°: %s, hardened always, either one when stalled', (gamma, factor) => {
    const hard = solve('traction-sheave', { groove: 'V hardened', gamma: `${gamma}°` });
    close(valueOf(hard, 'f_load') / 0.1, factor, 'hardened, loading');
    close(valueOf(hard, 'f_stall') / 0.2, factor, 'hardened, stalled');
    close(valueOf(solve('traction-sheave', { groove: 'V', gamma: `${gamma}°` }), 'f_stall') / 0.2, factor, 'stalled');
  });
  test.each(braking)('friction at a rope speed of %s m/s: %s', (v, mu) => {
    close(valueOf(solve('traction-sheave', { v: `${v} m/s` }), 'mu_brake'), mu, 'braking');
  });
  test('the rope speed is r times that of the car', () => {
    close(valueOf(solve('traction-sheave', { v: '1.0 m/s', r: '2' }), 'mu_brake'), '.08333', 'braking, 2 : 1');
  });
});

// Rope mass left out: 1e-9 kg/m stands for none, since the stalled side carries ropes alone.
const lift: readonly Example[] = [
  {
    id: 'own lift',
    source:
      '630 kg, car 800 kg, counterweight 1115 kg, undercut 95°, groove 30°, wrap 160°, 1 m/s, 0.5 m/s²; limits of EN 81-50:2014 5.11',
    tag: 'derived',
    template: 'traction-sheave',
    givens: {
      Q: '630 kg',
      K: '800 kg',
      G: '1115 kg',
      r: '1',
      q_R: '0.000000001 kg/m',
      groove: 'undercut',
      beta: '95°',
      gamma: '30°',
      theta: '160°',
      v: '1 m/s',
      a_b: '0.5 m/s²',
    },
    checks: [
      { name: 'ratio_load', recomputed: '1.423767' },
      { name: 'k_load', recomputed: '1.734554' },
      { name: 'ratio_brake_down', recomputed: '1.420268' },
      { name: 'ratio_brake_up', recomputed: '1.543455' },
      { name: 'k_brake', recomputed: '1.649846' },
    ],
  },
];

describe('a lift of our own agrees with independent values', () => testExamples(lift));
