// Group D: band brakes, band and block, and heat of a stop, against textbooks and problem pages.
//
// A lever with equal arms sets the slack end directly. Not here: the harness of the templates (test/templates).

import { describe, expect, test } from 'vitest';
import { type Example, solve, testExamples, valueOf } from './template.ts';

const MOTT = 'Mott, Machine Elements in Mechanical Design, 4th ed., example 22-10';
const JUV = 'Juvinall & Marshek, Fundamentals of Machine Component Design, fig. 18.17 (tutorsglobe.com 52175344)';
const PMAX = 'Lining pressure problem, askfilo.com question 3430333434343732';
/** Slack end pulled directly: F on the same arm as the band. */
const direct = { l: '100 mm', a: '100 mm' } as const;

const examples: readonly Example[] = [
  {
    id: 'D2',
    source: MOTT,
    tag: 'print seen',
    template: 'band-brake-simple',
    givens: { ...direct, D: '12 in', w: '2 in', theta: '225°', mu: '0.25', F: '112.39672167136735 lbf' },
    checks: [
      { name: 'F_slack', unit: 'lbf', recomputed: '112.3967', printed: '112' },
      { name: 'F_tight', unit: 'lbf', recomputed: '300.0000', printed: '300' },
      { name: 'p_max', unit: 'psi', recomputed: '25.00000', printed: '25' },
      {
        name: 'M',
        unit: 'lbf·in',
        recomputed: '1125.6197',
        wrong: { printed: '1128', because: 'it was worked out with 112 lb instead of 112.4 lb' },
      },
    ],
  },
  {
    id: 'D4',
    source: `${JUV}; 732 lb·in and 9.31 lb from memory`,
    tag: 'givens seen',
    template: 'band-brake-differential',
    givens: {
      D: '8 in',
      w: '1 in',
      theta: '270°',
      mu: '0.20',
      l: '9 in',
      a_slack: '2 in',
      a_tight: '0.5 in',
      M_req: '732.4066 lbf·in',
      F: '9.310742 lbf',
    },
    checks: [
      { name: 'F_tight', unit: 'lbf', recomputed: '300.0000' },
      { name: 'F_slack', unit: 'lbf', recomputed: '116.8983' },
      { name: 'M', unit: 'lbf·in', recomputed: '732.4066', printed: '732' },
      { name: 'F_req', unit: 'lbf', recomputed: '9.310742', printed: '9.31' },
      { name: 'a_lock', unit: 'in', recomputed: '0.779322' },
      { name: 'p_max', unit: 'psi', recomputed: '75.0000' },
    ],
  },
  {
    id: 'D9',
    source: 'Band brake of 375 N·m, solutions on the same page as the lining pressure problem, no. 1',
    tag: 'givens seen',
    template: 'band-brake-simple',
    givens: { ...direct, D: '400 mm', theta: '225°', mu: '0.25', F: '1123.3485 N', M_req: '375 N·m' },
    checks: [
      { name: 'F_tight', unit: 'N', recomputed: '2998.3485' },
      { name: 'M', unit: 'N·m', recomputed: '375.0000' },
      { name: 'F_req', unit: 'N', recomputed: '1123.3485' },
    ],
  },
  {
    id: 'D10',
    source: PMAX,
    tag: 'print seen',
    template: 'band-brake-simple',
    givens: { ...direct, D: '350 mm', w: '25 mm', theta: '270°', mu: '0.30', F: '659.7819 N' },
    checks: [
      {
        name: 'F_tight',
        unit: 'N',
        recomputed: '2712.500',
        wrong: { printed: '5073.5', because: 'the greatest pressure was taken for a uniform one' },
      },
      {
        name: 'F_slack',
        unit: 'N',
        recomputed: '659.7819',
        wrong: { printed: '1233.2', because: 'the greatest pressure was taken for a uniform one' },
      },
      {
        name: 'M',
        unit: 'N·m',
        recomputed: '359.2257',
        wrong: { printed: '672', because: 'the greatest pressure was taken for a uniform one' },
      },
      { name: 'p_max', unit: 'kPa', recomputed: '620.0000', printed: '620' },
    ],
  },
  {
    id: 'D10, US twin',
    source: "Shigley's Mechanical Engineering Design, band brake of 14 in with 90 psi: 2520 lbf, 776 lbf, 12 200 lbf·in",
    tag: 'from memory',
    template: 'band-brake-simple',
    givens: { ...direct, D: '14 in', w: '4 in', theta: '270°', mu: '0.25', F: '775.817 lbf' },
    checks: [
      { name: 'F_tight', unit: 'lbf', recomputed: '2520.00', printed: '2520' },
      { name: 'F_slack', unit: 'lbf', recomputed: '775.817', printed: '776' },
      { name: 'M', unit: 'lbf·in', recomputed: '12209.28', printed: '1.22e4' },
      { name: 'p_max', unit: 'psi', recomputed: '90.0000', printed: '90' },
    ],
  },
  {
    id: 'D11 at the tight end',
    source: '500 kN of friction on a drum of 1 m, eng-tips.com thread 281393 (givens)',
    tag: 'givens seen',
    template: 'band-brake-simple',
    givens: { ...direct, D: '1000 mm', w: '150 mm', theta: '270°', mu: '0.4', F: '89.5085 kN' },
    checks: [
      { name: 'F_tight', unit: 'kN', recomputed: '589.5085' },
      { name: 'p_max', unit: 'MPa', recomputed: '7.86011' },
    ],
  },
  {
    id: 'D11 at 200° from the slack end',
    source: '500 kN of friction on a drum of 1 m, eng-tips.com thread 281393 (givens)',
    tag: 'givens seen',
    template: 'band-brake-simple',
    givens: { ...direct, D: '1000 mm', w: '150 mm', theta: '200°', mu: '0.4', F: '89.5085 kN' },
    checks: [
      { name: 'F_tight', unit: 'kN', recomputed: '361.6211' },
      { name: 'p_max', unit: 'MPa', recomputed: '4.82161' },
    ],
  },
  {
    id: 'D12',
    source: 'Band and block, formula as at examians.com, numbers derived: 12 blocks of 2 · 8° at 0.3',
    tag: 'derived',
    template: 'band-and-block',
    givens: { N_b: '12', delta: '8°', mu: '0.3' },
    checks: [
      { name: 'k', recomputed: '2.752458' },
      { name: 'k_band', recomputed: '2.732753' },
    ],
  },
  {
    id: 'direction of rotation',
    source: '200 N at the rim, 225° at 0.3: a trap of the trade, 88.96 N or 288.96 N at the lever end',
    tag: 'derived',
    template: 'band-brake-simple',
    givens: { ...direct, D: '400 mm', theta: '225°', mu: '0.3', M_req: '40 N·m' },
    checks: [
      { name: 'F_req', unit: 'N', recomputed: '88.96054' },
      { name: 'F_req_rev', unit: 'N', recomputed: '288.96054' },
    ],
  },
  {
    id: 'both ends on equal arms',
    source: "F·l = (F_1 + F_2)·a, Machinery's Handbook, band brakes (from memory); 270° at 0.25, 1000 N on ten times the arm",
    tag: 'derived',
    template: 'band-brake-two-way',
    givens: { D: '400 mm', theta: '270°', mu: '0.25', F: '100 N', l: '500 mm', a: '50 mm', M_req: '100 N·m' },
    checks: [
      // 1000/(k + 1) and 1000 k/(k + 1) with k = 3.248 187 8.
      { name: 'F_slack', unit: 'N', recomputed: '235.394489' },
      { name: 'F_tight', unit: 'N', recomputed: '764.605511' },
      { name: 'M', unit: 'N·m', recomputed: '105.842204' },
    ],
  },
  {
    id: 'energy of a stop',
    source: '400 kg at a radius of gyration of 0.45 m from 300 r/min, rim of 20 kg',
    tag: 'derived',
    template: 'brake-stop-heat',
    givens: {
      J: '81 kg·m²',
      n_start: '300 r/min',
      n_end: '0 r/min',
      m_load: '0 kg',
      h_drop: '0 m',
      m_rim: '20 kg',
      c_rim: '500 J/(kg·K)',
    },
    checks: [
      { name: 'E', unit: 'J', recomputed: '39971.9' },
      { name: 'dT', unit: 'K', recomputed: '3.997' },
    ],
  },
];

describe('band brakes agree with print and with independent values', () => testExamples(examples));

describe('D7, winch of Khurmi 19.8 (givens from memory): near self-locking the torque runs away', () => {
  const winch = { D: '800 mm', theta: '250°', a_slack: '100 mm', a_tight: '25 mm', F: '750 N', l: '3 m' };
  // The load hangs on a barrel of 450 mm: torque over 225 mm.
  const load = (mu: string) => valueOf(solve('band-brake-differential', { ...winch, mu }), 'M', 'kN·m') / 0.225;
  test('309.0918 kN at 0.25, locked at 0.317 715', () => {
    expect(load('0.25')).toBeCloseTo(309.0918, 3);
    expect(valueOf(solve('band-brake-differential', { ...winch, mu: '0.25' }), 'mu_lock')).toBeCloseTo(0.317715, 6);
  });
  test.each([
    ['0.20', 138.7, 0.05],
    ['0.26', 379.0, 0.05],
    ['0.30', 1453, 0.5],
  ])('at %s it is %d kN', (mu, expected, half) => {
    expect(Math.abs(load(mu) - expected)).toBeLessThanOrEqual(half);
  });
  test('past it there is no number, and the sheet says that the brake locks itself', () => {
    const calculation = solve('band-brake-differential', { ...winch, mu: '0.33' });
    for (const name of ['F_slack', 'F_tight', 'M', 'p_max', 'sigma']) expect(calculation.named(name)?.si[0], name).toBeNaN();
    const state = calculation.state('no-lock');
    expect(state?.kind === 'criterion' && state.met).toEqual([false, false]);
    expect(state?.kind === 'criterion' && state.cell.ifNotMet).toMatch(/locks itself/);
    expect(calculation.named('M_rev')?.si[0]).toBeGreaterThan(0);
  });
});
