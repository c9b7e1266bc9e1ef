// The verdicts on counted revolutions, radians, cycles and temperatures, row by row.
//
// ISO 80000-3:2019 counts rotation (N) and rotational frequency (n, item 3-17) in revolutions beside angles in radians; the SI
// Brochure (9th ed., 2.3.4) leaves rad = 1 and Hz only for cycles. `sense` says whether the formula is right in the trade
// (common practice). `refused` is the phrase of the refusal, absent where the formula passes.

import { describe, expect, it } from 'vitest';
import { inferFormula } from '../../src/formula/index.ts';
import { formulaOf, scopeOf, unitOf } from './scope.ts';

const scope = scopeOf({
  n: 'r/min',
  n_1: 'r/min',
  n_2: 'r/min',
  omega: 'rad/s',
  omega_1: 'rad/s',
  omega_2: 'rad/s',
  f: 'Hz',
  f_s: '1/s',
  n_si: '1/s',
  v: 'm/s',
  v_x: 'm/s',
  d: 'm',
  d_1: 'm',
  d_2: 'm',
  D: 'm',
  C: 'm',
  L: 'm',
  r: 'm',
  t: 'm',
  pt: 'm',
  M: 'N*m',
  P: 'W',
  F: 'N',
  th: 'deg',
  phi: 'rad',
  mu: '1',
  s: '1',
  z: '1',
  N: '1',
  p: '1',
  Nr: 'r',
  zr: '1/r',
  V_r: 'cm^3/r',
  f_r: 'mm/r',
  W_r: 'J/r',
  W_j: 'J',
  V: 'cm^3',
  T_a: 'degC',
  T_b: 'degC',
  dT: 'K',
  T_K: 'K',
  J: 'kg*m^2',
  k_t: 'N*m',
  m: 'kg/m',
  mass: 'kg',
  ts: 's',
  Cd: 'N',
  Pd: 'N',
  Q: 'm^3/s',
  c: 'J/(kg*K)',
  h_t: 'W/(m^2*K)',
  Ar: 'm^2',
});

type Row = readonly [formula: string, target: string, sense: 'right' | 'wrong', refused?: string];

const rows: readonly Row[] = [
  ['M*n', 'W', 'wrong', 'revolutions against W'],
  ['n*d/2', 'm/s', 'wrong', 'revolutions against m/s'],
  ['2*pi*n', 'rad/s', 'right'],
  ['2*pi*n*M', 'W', 'right'],
  ['n*d_1/d_2', 'r/min', 'right'],
  ['n*z', '1/s', 'right'],
  ['omega', 'r/min', 'wrong', 'revolutions against r/min'],
  ['omega/(2*pi)', 'r/min', 'right'],
  ['V_r*n', 'm^3/s', 'right'],
  ['P/(2*pi*n)', 'N*m', 'right'],
  ['P/omega', 'N*m', 'right'],
  ['omega*d/2', 'm/s', 'right'],
  ['2*v/d', 'r/min', 'wrong', 'revolutions against r/min'],
  ['v/(d/2)', 'r/min', 'wrong', 'revolutions against r/min'],
  ['m*v^2', 'N', 'right'],
  ['mass*r*n^2', 'N', 'wrong', 'revolutions against N'],
  ['J*(2*pi*n)^2/2', 'J', 'right'],
  ['J*n^2/2', 'J', 'wrong', 'revolutions against J'],
  ['0.5*J*(omega_1^2 - omega_2^2)', 'J', 'right'],
  ['2*pi*n/ts', 'rad/s^2', 'right'],
  ['n*ts/2', 'r', 'right'],
  ['n*ts/2', '1', 'right', 'revolutions against 1'],
  ['Nr/n', 's', 'right'],
  ['N/n', 's', 'right'],
  ['f/p', 'r/min', 'right'],
  ['f_s/p', 'r/min', 'right', 'revolutions against r/min'],
  ['2*pi*f', 'rad/s', 'right'],
  ['omega', 'Hz', 'wrong', 'revolutions against Hz'],
  ['4*m*L^2*f^2', 'N', 'right'],
  ['sqrt(F/m)/(2*L)', 'Hz', 'right'],
  ['v/L', 'r/min', 'right', 'revolutions against r/min'],
  ['z*pt*n', 'm/s', 'right', 'revolutions against m/s'],
  ['f_r*n', 'm/s', 'right'],
  ['W_j*n', 'W', 'right', 'revolutions against W'],
  ['V*n', 'm^3/s', 'right', 'revolutions against m³/s'],
  ['n*sqrt((pi*D)^2 + pt^2)', 'm/s', 'right', 'revolutions against m/s'],
  ['2*pi*N', 'deg', 'right'],
  ['pi*D*N', 'm', 'right'],
  ['F*exp(-2*pi*mu*Nr)', 'N', 'right'],
  ['F*exp(-mu*Nr)', 'N', 'wrong', 'revolutions inside exp'],
  ['sin(n*ts)', '1', 'wrong', 'revolutions inside sin'],
  ['sin(2*pi*n*ts)', '1', 'right'],
  ['omega_1/n_2', '1', 'wrong', 'revolutions against 1'],
  ['n_1/omega_2', '1', 'wrong', 'revolutions against 1'],
  ['n_1*(d_1 + t)/(d_2 + t)*(1 - s)', 'r/min', 'right'],
  ['sqrt(k_t/J)', 'rad/s', 'right'],
  ['sqrt(k_t/J)/(2*pi)', 'r/min', 'right'],
  ['sqrt(k_t/J)', 'r/min', 'wrong', 'revolutions against r/min'],
  ['pi - 2*asin((D - d)/(2*C))', 'deg', 'right'],
  ['2*C + pi*(D + d)/2 + (D - d)^2/(4*C)', 'm', 'right'],
  ['n*D + v_x', 'm/s', 'wrong', 'revolutions in sum'],
  ['(2*pi - th)*n', 'rad/s', 'right', 'revolutions against rad/s'],
  ['(Cd/Pd)^3*1000000/n', 'h', 'right'],
  ['pi*n/30', 'rad/s', 'wrong', 'conversion number beside a counted quantity'],
  ['pi*d*n/60', 'm/s', 'wrong', 'conversion number beside a counted quantity'],
  ['P*9550/n', 'N*m', 'wrong', 'conversion number beside a counted quantity'],
  ['max(n, omega)', 'r/min', 'wrong', 'revolutions in max'],
  ['max(n, f)', '1/s', 'right'],
  ['pi*d*(n_1 - n_2)', 'm/s', 'right'],
  ['n_si*d*pi', 'm/s', 'right'],
  ['n_si*d/2', 'm/s', 'wrong'],
  ['M*phi', 'J', 'right'],
  ['sqrt(4*Q/(pi*v))', 'm', 'right'],
  ['v/(pi*n)', 'm', 'right'],
  ['M*Nr', 'J', 'wrong', 'revolutions against J'],
  ['P/(pi*d*n)', 'N', 'right'],
  ['T_a + T_b', 'degC', 'wrong', 'reading + reading'],
  ['T_b - T_a', 'K', 'right'],
  ['T_a + dT', 'degC', 'right'],
  ['dT + T_a', 'degC', 'right'],
  ['dT - T_a', 'K', 'wrong', 'difference - reading'],
  ['T_a*2', 'degC', 'wrong', 'a temperature reading cannot be used here'],
  ['T_a + (T_b - T_a)/2', 'degC', 'right'],
  ['T_a', 'K', 'right', 'reading against difference'],
  ['mass*c*(T_b - T_a)', 'J', 'right'],
  ['mass*c*T_a', 'J', 'wrong', 'a temperature reading cannot be used here'],
  ['max(T_a, T_b)', 'degC', 'right'],
  ['max(T_a, dT)', 'degC', 'wrong', 'reading and difference'],
  ['-T_a', 'degC', 'wrong', 'a temperature reading cannot be used here'],
  ['max(0, T_a)', 'degC', 'wrong', 'reading and difference'],
  ['T_K - T_a', 'K', 'right', 'difference - reading'],
  ['h_t*Ar*(T_b - T_a)', 'W', 'right'],
  ['T_K + T_K', 'K', 'right'],
  ['T_a + T_K', 'degC', 'wrong'],
];

const refusals = (formula: string, target: string): readonly string[] =>
  inferFormula(formulaOf(formula), scope, unitOf(target))
    .problems.filter((problem) => problem.severity === 'error')
    .map((problem) => problem.message);

describe('verdicts', () => {
  it.each(rows.map(([formula, target, sense, refused]) => ({ formula, target, sense, refused })))(
    '$formula against $target ($sense in the trade)',
    ({ formula, target, refused }) => {
      const messages = refusals(formula, target);
      if (refused === undefined) expect(messages).toEqual([]);
      else {
        expect(messages).toHaveLength(1);
        expect(messages[0]).toMatch(new RegExp(`^${refused.replace(/[+()]/g, '\\$&')}: .{20,}`));
      }
    },
  );

  const unjust = rows.filter(([, , sense, refused]) => sense === 'right' && refused !== undefined);
  it.each(unjust.map(([formula, target]) => ({ formula, target })))(
    '$formula against $target is right but refused: its message names the correction',
    ({ formula, target }) => {
      expect(refusals(formula, target)[0]).toMatch(/2\*pi|\/r\)|·r\)|"1 r"|-273\.15 degC/);
    },
  );
});
