// Groups G and H and what stands beside them: spans, three pulleys, creep, friction tests, dead turns, ducts, rolls, idlers.
//
// Not here: the drives themselves (flat-belt.test.ts, v-belt.test.ts).

import { describe, expect, test } from 'vitest';
import { type Example, solve, testExamples, valueOf } from './template.ts';

const examples: readonly Example[] = [
  {
    id: 'G1 in newtons',
    source: 'Alternator belt, hobby page: 0.11 kg/m, 0.17 m, 220 Hz: 610 N, 62 kgf, 136.4 lb',
    tag: 'print seen',
    template: 'span-frequency',
    givens: { m: '0.11 kg/m', L_s: '0.17 m', f: '220 Hz' },
    checks: [
      { name: 'F_0', unit: 'N', recomputed: '615.4544', wrong: { printed: '610', because: 'rounded early, 0.9 % low' } },
      {
        name: 'F_0',
        unit: 'lbf',
        recomputed: '138.3597',
        wrong: { printed: '136.4', because: 'the page converts with 2.2 from a rounded 62 kgf' },
      },
      { name: 'F_0', unit: 'kgf', recomputed: '62.7589' },
    ],
  },
  {
    id: 'force test at 1/64 of the span',
    source: 'small-angle statics: the force is a sixteenth of the tension, as the trade has it for 16 mm a metre',
    tag: 'derived',
    template: 'span-deflection',
    givens: { F_0: '400 N', L_s: '500 mm', q_rel: '0.015625', E_A: '0 N', L: '2 m' },
    checks: [{ name: 'F_q', unit: 'N', recomputed: '25.00000' }],
  },
  {
    id: 'force test with the stretch of the belt',
    source: '4·0.015625·(400 + 2·20 000·(0.0078125)²/(0.5·2)), worked out by hand',
    tag: 'derived',
    template: 'span-deflection',
    givens: { F_0: '400 N', L_s: '500 mm', q_rel: '0.015625', E_A: '20 kN', L: '2 m' },
    checks: [
      { name: 'q', unit: 'mm', recomputed: '7.8125' },
      { name: 'F_q', unit: 'N', recomputed: '25.152588' },
    ],
  },
  {
    id: 'H2',
    source: 'Three pulleys of 2 ft with centres 6, 9 and 13 ft apart, perplexus.info pid 10859: 28 + 2 pi ft',
    tag: 'print seen',
    template: 'three-pulleys',
    givens: {
      x_A: '0 ft',
      y_A: '0 ft',
      d_A: '2 ft',
      x_B: '6 ft',
      y_B: '0 ft',
      d_B: '2 ft',
      x_C: `${124 / 12} ft`,
      y_C: `${Math.sqrt(169 - (124 / 12) ** 2)} ft`,
      d_C: '2 ft',
    },
    checks: [
      { name: 'L', unit: 'ft', recomputed: '34.283185' },
      { name: 'theta_B', unit: 'deg', recomputed: '61.217795' },
      { name: 'theta_C', unit: 'deg', recomputed: '156.139057' },
      { name: 'theta_A', unit: 'deg', recomputed: '142.643148' },
      { name: 's_AB', unit: 'ft', recomputed: '6.0000000' },
      { name: 's_BC', unit: 'ft', recomputed: '9.0000000' },
      { name: 's_CA', unit: 'ft', recomputed: '13.000000' },
    ],
  },
  {
    id: 'B26',
    source:
      'Khurmi & Gupta, Theory of Machines, example 11.2, p. 334, as computed by its companion with square roots of the stresses',
    tag: 'print seen',
    template: 'belt-creep',
    givens: { n_1: '200 r/min', d_1: '1 m', d_2: '2.25 m', sigma_1: '1.4 MPa', sigma_2: '0.5 MPa', E: '100 MPa' },
    checks: [
      { name: 'n_2', unit: 'r/min', recomputed: '88.099934' },
      {
        name: 'dn_2',
        unit: 'r/min',
        recomputed: '0.788955',
        wrong: { printed: '0.012', because: 'square roots of stresses: the answer of that form depends on the unit' },
      },
    ],
  },
  {
    id: 'A10 stable, with uncertainty',
    source: 'Friction by tipping board, igkt.net topic 6933 (2021); half-widths of our own, propagated by JCGM 100:2008 5.1.2',
    tag: 'print seen',
    template: 'wrap-friction-test',
    givens: { F_out: '28 N', a_out: '0.3 N', F_in: '2 N', a_in: '0.05 N', theta: '540°', a_theta: '3°' },
    checks: [
      { name: 'mu', recomputed: '0.2800126794', printed: '0.280012679' },
      { name: 'u_mu', recomputed: '0.001892839805' },
    ],
  },
  {
    id: 'A10 slipping',
    source: 'Friction by tipping board, igkt.net topic 6933 (2021)',
    tag: 'print seen',
    template: 'wrap-friction-test',
    givens: { F_out: '28.5 N', F_in: '1.5 N', theta: '540°' },
    checks: [{ name: 'mu', recomputed: '0.3124146788', printed: '0.312414679' }],
  },
  {
    id: 'two dead turns',
    source: '2.5 S by FEM 1.001 4.2.3, friction 0.1',
    tag: 'derived',
    template: 'drum-dead-turns',
    givens: { S: '1 kN', f: '2.5', mu: '0.1', N: '2' },
    checks: [{ name: 'F_fix', unit: 'kN', recomputed: '0.711524' }],
  },
  {
    id: 'three dead turns',
    source: '2.5 S by FEM 1.001 4.2.3, friction 0.1',
    tag: 'derived',
    template: 'drum-dead-turns',
    givens: { S: '1 kN', f: '2.5', mu: '0.1', N: '3' },
    checks: [{ name: 'F_fix', unit: 'kN', recomputed: '0.379590' }],
  },
  {
    id: 'three sections of a duct',
    source: 'section by section, worked out with a pocket calculator: 60 N/m, 0.3, 200 N',
    tag: 'derived',
    template: 'duct-pull',
    givens: {
      w: '60 N/m',
      mu: '0.3',
      F_in: '200 N',
      L_1: '10 m',
      theta_1: '30°',
      L_2: '20 m',
      theta_2: '90°',
      L_3: '30 m',
      theta_3: '45°',
      L_4: '0 m',
      theta_4: '0°',
      L_5: '0 m',
      theta_5: '0°',
      L_6: '0 m',
      theta_6: '0°',
      R_1: '2 m',
      R_2: '2 m',
      R_3: '1.5 m',
    },
    checks: [
      { name: 'F_s1', unit: 'N', recomputed: '444.63374' },
      { name: 'F_s2', unit: 'N', recomputed: '1289.00527' },
      { name: 'F_out', unit: 'N', recomputed: '2314.95836' },
      { name: 'F_rev', unit: 'N', recomputed: '2087.93527' },
      { name: 'q_max', unit: 'N/m', recomputed: '1543.30557' },
    ],
  },
  {
    id: 'six rolls that make five turns',
    source: 'e^(2 pi · 5 · 0.6) in the article "Capstan equation" (Wikipedia and mirrors): 153 552 935',
    tag: 'print seen',
    template: 'guide-rolls',
    givens: {
      F_in: '1 N',
      mu: '0.6',
      theta_1: '300°',
      theta_2: '300°',
      theta_3: '300°',
      theta_4: '300°',
      theta_5: '300°',
      theta_6: '300°',
    },
    checks: [
      { name: 'k_total', recomputed: '153552935.4', printed: '153552935' },
      { name: 'F_out', unit: 'N', recomputed: '153552935.4' },
    ],
  },
];

describe('spans, creep, friction tests, drums, ducts and rolls agree with print and with independent values', () =>
  testExamples(examples));

describe('the path over two pulleys and an idler is a closed belt', () => {
  const at = (givens: Readonly<Record<string, string>>) => {
    const calculation = solve('flat-belt-idler', givens);
    const value = (name: string, unit: string) => valueOf(calculation, name, unit);
    return { value, error: calculation.problems().filter((problem) => problem.severity === 'error') };
  };

  test.each([
    { d_1: '160 mm', d_2: '560 mm', C: '800 mm', x_I: '280 mm', y_I: '175 mm', d_I: '140 mm' },
    { d_1: '500 mm', d_2: '200 mm', C: '1200 mm', x_I: '900 mm', y_I: '180 mm', d_I: '120 mm' },
    { d_1: '300 mm', d_2: '300 mm', C: '1000 mm', x_I: '400 mm', y_I: '150 mm', d_I: '200 mm' },
  ])('tangents meet their circles and turns add up: %o', (givens) => {
    const { value, error } = at(givens);
    expect(error).toEqual([]);
    const [d1, d2, dI, C, x, y] = (['d_1', 'd_2', 'd_I', 'C', 'x_I', 'y_I'] as const).map((name) => value(name, 'm')) as [
      number,
      number,
      number,
      number,
      number,
      number,
    ];
    const [beta, delta1, delta2] = (['beta', 'delta_1', 'delta_2'] as const).map((name) => value(name, '1')) as [
      number,
      number,
      number,
    ];
    const wraps = value('theta_1', '1') + value('theta_2', '1') - value('theta_I', '1');
    expect(wraps).toBeCloseTo(2 * Math.PI, 12);
    // A strand leaves its circle at a right angle to the radius: the ends, built from the directions, must lie apart by the span.
    const end = (cx: number, cy: number, d: number, angle: number, side: 1 | -1) =>
      [cx - (side * d * Math.sin(angle)) / 2, cy + (side * d * Math.cos(angle)) / 2] as const;
    const strand = (from: readonly [number, number], to: readonly [number, number], angle: number, span: number) => {
      expect(to[0] - from[0]).toBeCloseTo(span * Math.cos(angle), 12);
      expect(to[1] - from[1]).toBeCloseTo(span * Math.sin(angle), 12);
    };
    strand(end(0, 0, d1, delta1, 1), end(x, y, dI, delta1, -1), delta1, value('s_1I', 'm'));
    strand(end(x, y, dI, delta2, -1), end(C, 0, d2, delta2, 1), delta2, value('s_I2', 'm'));
    strand(end(0, 0, d1, -beta, -1), end(C, 0, d2, -beta, -1), -beta, value('s_t', 'm'));
  });

  test('an idler that only just touches leaves wraps, length and loads of the open belt', () => {
    const open = solve('flat-belt-open', { d_1: '160 mm', d_2: '560 mm', C: '800 mm', P: '5.5 kW' });
    const beta = Math.asin((0.56 - 0.16) / 1.6);
    // On the upper strand, 300 mm along it from pulley 1, outside by its radius.
    const along = 0.3;
    const out = 0.08 + 0.07;
    const { value } = at({
      d_1: '160 mm',
      d_2: '560 mm',
      C: '800 mm',
      P: '5.5 kW',
      d_I: '140 mm',
      x_I: `${along * Math.cos(beta) - out * Math.sin(beta)} m`,
      y_I: `${along * Math.sin(beta) + out * Math.cos(beta)} m`,
    });
    for (const name of ['theta_1', 'theta_2', 'k', 'S_slip']) expect(value(name, '1')).toBeCloseTo(valueOf(open, name), 9);
    expect(value('L', 'm')).toBeCloseTo(valueOf(open, 'L', 'm'), 9);
    expect(value('F_W', 'N')).toBeCloseTo(valueOf(open, 'F_W', 'N'), 6);
    expect(value('psi_W', '1')).toBeCloseTo(valueOf(open, 'psi_W', '1'), 9);
    expect(Math.abs(value('theta_I', '1'))).toBeLessThan(1e-9);
  });

  test('with all strands at the same force the loads of pulleys and idler balance', () => {
    const { value } = at({});
    const [beta, delta1, delta2] = (['beta', 'delta_1', 'delta_2'] as const).map((name) => value(name, '1')) as [
      number,
      number,
      number,
    ];
    const F = value('F_0', 'N');
    const load1 = [F * (Math.cos(beta) + Math.cos(delta1)), F * (Math.sin(delta1) - Math.sin(beta))] as const;
    const load2 = [-F * (Math.cos(beta) + Math.cos(delta2)), F * (Math.sin(beta) - Math.sin(delta2))] as const;
    const idler = [-load1[0] - load2[0], -load1[1] - load2[1]] as const;
    expect(Math.hypot(...load1)).toBeCloseTo(value('F_W0', 'N'), 6);
    expect(Math.hypot(...load2)).toBeCloseTo(value('F_W02', 'N'), 6);
    expect(Math.hypot(...idler)).toBeCloseTo(value('F_WI0', 'N'), 6);
  });
});
