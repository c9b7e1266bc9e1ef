// What the inference says of formulas: types, and every refusal word for word with both sides and what to do.

import { describe, expect, it } from 'vitest';
import { inferComparison, inferFormula, type TableData, type Type, typeOfResult, typeOfUnit } from '../../src/formula/index.ts';
import { dimensionKey, textR } from '../../src/quantity/index.ts';
import { formulaOf, scopeOf, unitOf } from './scope.ts';

const surfaces: TableData = {
  name: 'surfaces',
  columns: [
    { name: 'surface', texts: ['leather on cast iron', 'rubber on steel'] },
    {
      name: 'mu_dry',
      unit: unitOf('1'),
      type: typeOfUnit(unitOf('1')),
      numbers: Float64Array.of(0.3, 0.5),
      texts: ['0.30', '0.50'],
    },
    { name: 'remark', texts: ['dry', 'wet'] },
  ],
  rows: 2,
};
const belts: TableData = {
  name: 'belts',
  columns: [
    {
      name: 'length',
      unit: unitOf('mm'),
      type: typeOfUnit(unitOf('mm')),
      numbers: Float64Array.of(1, 2),
      texts: ['1000', '2000'],
    },
    {
      name: 'speed',
      unit: unitOf('r/min'),
      type: typeOfUnit(unitOf('r/min')),
      numbers: Float64Array.of(1, 2),
      texts: ['1', '2'],
    },
    { name: 'warmth', unit: unitOf('degC'), type: typeOfUnit(unitOf('degC')), numbers: Float64Array.of(1, 2), texts: ['1', '2'] },
  ],
  rows: 2,
};

const lining: Type = { kind: 'text', table: 'surfaces', column: 'surface' };
const units = {
  F: 'N',
  F_c: 'N',
  F_u: 'N',
  M: 'N*m',
  E: 'J',
  v: 'm/s',
  L: 'm',
  d: 'mm',
  mu: '1',
  k: '1',
  z: '1',
  theta: 'deg',
  n: 'r/min',
  Nr: 'r',
  omega: 'rad/s',
  f: 'Hz',
  m: 'kg',
  t: 's',
  sigma: 'N/mm^2',
  T_a: 'degC',
  T_b: 'degC',
  T_F: 'degF',
  dT: 'K',
  W: 'lb',
  lining,
  broken: 'failed' as const,
  constructor: 'N',
};
const scope = scopeOf(units, [surfaces, belts]);
const infer = (text: string, target?: string) =>
  inferFormula(formulaOf(text), scope, target === undefined ? undefined : unitOf(target));
const errors = (text: string, target?: string) => infer(text, target).problems.filter((problem) => problem.severity === 'error');
const warnings = (text: string, target?: string) =>
  infer(text, target).problems.filter((problem) => problem.severity === 'warning');
/** The formula after the first correction offered. */
const corrected = (text: string, target?: string, which = 0): string => {
  const fix = errors(text, target)[0]!.fixes![which]!;
  return text.slice(0, fix.from) + fix.text + text.slice(fix.to);
};

describe('refusals', () => {
  it.each<[formula: string, target: string | undefined, code: string, message: string]>([
    [
      'F + M',
      'N',
      'unlike-sum',
      'cannot add a force (N) to a torque (N·m) in F + M; a length (m) is missing on one side or too many on the other',
    ],
    [
      'M - F*k',
      'N',
      'unlike-sum',
      'cannot subtract a force (N) from a torque (N·m) in M - F·k; a length (m) is missing on one side or too many on the other',
    ],
    ['F + 3', 'N', 'unlike-sum', 'cannot add a force (N) to a number in F + 3; write 3 with its unit in quotes, such as "3 N"'],
    [
      'v',
      'N',
      'unlike-target',
      'the formula gives a speed (m/s), the declared unit N is a force; declare m/s or correct the formula',
    ],
    [
      'F*L/M',
      'mm',
      'unlike-target',
      'the formula gives a number, the declared unit mm is a length; declare the unit 1 or correct the formula',
    ],
    [
      'max(F, M)',
      'N',
      'unlike-operands',
      'max needs quantities of one kind: F is a force (N), M is a torque (N·m); a length (m) is missing on one side or too many on the other',
    ],
    [
      'k > 1 ? F : M',
      'N',
      'unlike-operands',
      'the branches of ?: must be alike: F is a force (N), M is a torque (N·m); a length (m) is missing on one side or too many on the other',
    ],
    [
      'F > M ? F : 0',
      'N',
      'unlike-operands',
      'cannot compare a force (N) with a torque (N·m): F with M; a length (m) is missing on one side or too many on the other',
    ],
    [
      'exp(mu*L)',
      '1',
      'needs-number',
      'exp needs a number, μ·L is a length (m); divide it by a quantity in m, or by "1 m" if the formula is meant for m',
    ],
    [
      'ln(F)',
      '1',
      'needs-number',
      'ln needs a number, F is a force (N); divide it by a quantity in N, or by "1 N" if the formula is meant for N',
    ],
    [
      'ceil(d)',
      'mm',
      'rounding-unit',
      'ceil of a quantity depends on its unit, d is a length (mm); say which unit counts: ceil(…/"1 mm")*"1 mm"',
    ],
    [
      'round(theta)',
      'deg',
      'rounding-unit',
      'round of a quantity depends on its unit, θ is an angle (°); say which unit counts: round(…/"1 °")*"1 °"',
    ],
    [
      'L^mu',
      'm',
      'exponent-constant',
      'L is a length (m), so its exponent must be written as a plain number such as 2, -1 or 1/3, not μ; a variable exponent needs a base that is a number',
    ],
    ['mu^L', '1', 'exponent-unit', 'an exponent must be a number, L is a length (m); divide it by a quantity of the same kind'],
    [
      'L^9999^9999',
      'm',
      'exponent-constant',
      'L is a length (m), so its exponent must be written as a plain number such as 2, -1 or 1/3, not 9999^9999; a variable exponent needs a base that is a number',
    ],
    [
      '((L^9999)^9999)^9999',
      'm',
      'exponent-range',
      'the exponents in (L^9999) are beyond what a unit can carry; use powers of at most three digits',
    ],
    [
      'F > F_c',
      'N',
      'truth-use',
      'F > F_c is true or false, a quantity needs a value; write F > F_c ? 1 : 0, or make it a criterion',
    ],
    ['(F > F_c)*F', 'N', 'truth-use', 'F > F_c is true or false, not a value for a product; choose a value with test ? a : b'],
    ['F ? 1 : 2', '1', 'truth-use', '?: needs a comparison, F is a force (N); write for example F > …'],
    ['(F and F > F_c) ? 1 : 2', '1', 'truth-use', 'and needs a comparison, F is a force (N); write for example F > …'],
    [
      'lining',
      '1',
      'text-use',
      'lining is a text, a quantity needs a value; look one up with entry, or compare the text with ==',
    ],
    [
      'lining*2',
      '1',
      'text-use',
      'lining is a text (a choice from surfaces.surface), not a value for a product; a text can be compared with == or != and be the key of entry',
    ],
    [
      'lining < "rubber on steel" ? 1 : 2',
      '1',
      'text-use',
      'lining is a text, and texts have no order: < does not apply; use == or !=',
    ],
    [
      'lining == mu ? 1 : 2',
      '1',
      'text-use',
      'cannot compare a text with a quantity: lining is a text, μ is not; put the text in quotes',
    ],
    [
      'lining == "rubber on stel" ? 1 : 2',
      '1',
      'unknown-text',
      '"rubber on stel" is no text of surfaces.surface, so lining can never equal it; did you mean "rubber on steel"',
    ],
    [
      'entry(surfaces, mu_dry, "rubber")',
      '1',
      'unknown-text',
      'the table surfaces has no row "rubber"; did you mean "rubber on steel"',
    ],
    [
      'entry(surfaces, mu_dry, k)',
      '1',
      'text-use',
      'the rows of surfaces are found by text, k is a number; give a choice or a text in quotes',
    ],
    [
      'entry(surfaces, mu_wet, lining)',
      '1',
      'unknown-column',
      'the table surfaces has no column mu_wet; there are surface, mu_dry, remark',
    ],
    ['entry(surface, mu_dry, lining)', '1', 'unknown-table', 'there is no table surface; did you mean surfaces'],
    [
      'entry(surfaces, remark, lining)',
      '1',
      'text-use',
      'entry(surfaces, remark, lining) is a text, a quantity needs a value; look one up with entry, or compare the text with ==',
    ],
    [
      'interpolate(surfaces, mu_dry, lining)',
      '1',
      'text-use',
      'interpolate needs numeric keys, the first column surfaces.surface holds texts; use entry',
    ],
    [
      'interpolate(belts, speed, F)',
      'r/min',
      'unlike-key',
      'the rows of belts are found by a length (mm), F is a force (N); give a key of that kind',
    ],
    ['F_x*2', 'N', 'unknown-name', 'no quantity is called F_x; did you mean F, F_c or F_u'],
    ['qqqqqq*2', 'N', 'unknown-name', 'no quantity is called qqqqqq; define it in a cell of its own, or correct the name'],
    ['F*"3 ± 1 m"', 'N*m', 'literal-tolerance', '"3 ± 1 m" has a tolerance, which a formula cannot carry; make it a given'],
    [
      'W',
      'lbf',
      'unlike-target',
      'the formula gives a mass (lb), the declared unit lbf is a force; lb is a unit of mass; the force is lbf: write lbf',
    ],
  ])('%s against %s', (formula, target, code, message) => {
    const found = errors(formula, target);
    expect(found.map((problem) => problem.message)).toEqual([message]);
    expect(found[0]!.code).toBe(code);
  });

  it('name each trouble of a formula once', () => {
    expect(errors('(F + M)*exp(L) + qqqqqq').map((problem) => problem.code)).toEqual([
      'unlike-sum',
      'needs-number',
      'unknown-name',
    ]);
  });

  it('keep silent about what is built on a failed cell, and list it', () => {
    const found = infer('broken + F*exp(broken) - M*broken', 'N');
    expect(found.problems).toEqual([]);
    expect(found.type).toBeUndefined();
    expect(found.failedNames).toEqual(['broken']);
    expect(infer('broken + F + M').problems.map((problem) => problem.code)).toEqual([]);
    expect(infer('broken + (F + M)').problems.map((problem) => problem.code)).toEqual(['unlike-sum']);
  });

  it('point at the part that is wrong', () => {
    const text = '2*F + exp(mu*L)*F';
    expect(text.slice(...errors(text)[0]!.at!)).toBe('mu*L');
    const unit = 'F*("3 xx" + L)';
    expect(unit.slice(...errors(unit)[0]!.at!)).toBe('xx');
    const call = 'entry(surfaces,  mu_wet, lining)';
    expect(call.slice(...errors(call)[0]!.at!)).toBe('mu_wet');
  });

  it('read names of every object as names', () => {
    expect(errors('constructor + F', 'N')).toEqual([]);
    expect(errors('toString + F', 'N').map((problem) => problem.code)).toEqual(['unknown-name']);
    expect(errors('hasOwnProperty(F)'.replace('(F)', '*F'), 'N').map((problem) => problem.code)).toEqual(['unknown-name']);
  });
});

describe('corrections', () => {
  it.each([
    ['F_cc*2', 'N', 'F_c*2'],
    ['F + 3', 'N', 'F + "3 N"'],
    ['n*M', 'W', '2*pi*n*M'],
    ['M/n', 'J*s', 'M/(2*pi*n)'],
    ['m*L^2*n^2', 'J', 'm*L^2*(2*pi*n)^2'],
    ['n*L + n*d', 'm/s', '2*pi*n*L + 2*pi*n*d'],
    ['omega', 'r/min', 'omega/(2*pi)'],
    ['omega + omega', 'r/min', '(omega + omega)/(2*pi)'],
    ['mu^Nr', '1', 'mu^(2*pi*Nr)'],
    ['pi*n/30', 'rad/s', '2*pi*n'],
    ['pi*L*n/60', 'm/s', 'pi*L*n'],
    ['60*pi*L*n', 'm/s', 'pi*L*n'],
    ['pi*L*(60*n)', 'm/s', 'pi*L*(n)'],
    ['(T_a + T_b)/2', 'degC', 'T_a + (T_b - T_a)/2'],
    ['F + 1 > F ? (T_a + T_b)/2 : T_a'.replace('F + 1 > F', 'F > F_c'), 'degC', 'F > F_c ? (T_a + (T_b - T_a)/2) : T_a'],
    ['dT - T_a', 'K', 'T_a - dT'],
    ['T_a', 'K', 'T_a - "-273.15 degC"'],
    ['max(0, T_F)', 'degF', 'max("0 °F", T_F)'],
    ['ceil(d)', 'mm', 'ceil(d/"1 mm")'],
    ['lining == "rubber on stel" ? 1 : 2', '1', 'lining == "rubber on steel" ? 1 : 2'],
    ['entry(surface, mu_dry, lining)', '1', 'entry(surfaces, mu_dry, lining)'],
  ])('%s against %s may become %s', (formula, target, expected) => {
    expect(corrected(formula, target)).toBe(expected);
  });

  it.each([
    ['n*M', 'W'],
    ['M/n', 'J*s'],
    ['n*L + v', 'm/s'],
    ['omega', 'r/min'],
    ['exp(mu*Nr)', '1'],
    ['max(n, omega)', 'r/min'],
    ['m*L^2*n^2', 'J'],
    ['n*t', '1'],
    ['ceil(Nr)', '1'],
    ['sqrt(n)*sqrt(n)*L', 'm/s'],
    ['Nr^mu', '1'],
  ])('for %s against %s leave no trouble with revolutions, whichever is taken', (formula, target) => {
    const fixes = errors(formula, target)[0]!.fixes ?? [];
    expect(fixes.length).toBeGreaterThan(0);
    for (const fix of fixes) {
      const changed = formula.slice(0, fix.from) + fix.text + formula.slice(fix.to);
      expect(errors(changed, target).filter((problem) => /revolutions|conversion/.test(problem.message))).toEqual([]);
    }
  });

  it('name the unit per revolution, the angle and the single revolution', () => {
    expect(errors('z*L*n', 'm/s')[0]!.message).toBe(
      'revolutions against m/s: the formula counts revolutions (r); write 2*pi*n where an angular speed or an angle is meant, give L a unit per revolution (m/r) if it is an amount per revolution, or divide by "1 r"',
    );
    expect(errors('v/L', 'r/min')[0]!.message).toBe(
      'revolutions against r/min: the formula counts no revolutions; divide by 2*pi where radians stand in for revolutions, give L a unit per revolution (m/r) if it is an amount per revolution, or multiply by "1 r"',
    );
  });
});

describe('warnings', () => {
  it.each([
    ['1.3*F', '1.3'],
    ['F*1000000', '1000000'],
    ['F/13', '13'],
    ['0.25*F', '0.25'],
    ['F*3.6', '3.6'],
  ])('%s has a number without a source', (formula, literal) => {
    const [warning] = warnings(formula, 'N');
    expect(warning).toMatchObject({
      code: 'number-without-source',
      message: `${literal} is a number without a source: make it a given, with its unit and where it comes from`,
    });
    expect(formula.slice(...warning!.at!)).toBe(literal);
  });

  it.each(['2*F', '0.5*F', 'F*12', 'F*pi/4', 'F*(1 + 1/3)', 'pi*F/64', '5*F/384', 'F*k^1.85', 'F*k^(-0.371)', 'F*k^(1/15)'])(
    '%s passes without a word',
    (formula) => {
      expect(infer(formula, 'N').problems).toEqual([]);
    },
  );

  it.each([
    ['M', 'J', 'M is a torque (N·m), the declared unit makes it an energy (J); declare N·m if it stays what it is'],
    [
      'M + (M - M)',
      'kW*h',
      'M + (M - M) is a torque (N·m), the declared unit makes it an energy (kW·h); declare N·m if it stays what it is',
    ],
    ['-E', 'N*m', '-E is an energy (J), the declared unit makes it a torque (N·m); declare J if it stays what it is'],
    ['M + E', 'J', 'a torque (N·m) is added to an energy (J); the dimensions agree, the kinds do not: check the formula'],
  ])('%s declared in %s: torque beside energy', (formula, target, message) => {
    expect(infer(formula, target).problems).toMatchObject([{ code: 'torque-energy', severity: 'warning', message }]);
  });

  it.each([
    ['M*theta', 'J'],
    ['F*L', 'J'],
    ['F*L', 'N*m'],
    ['M', 'lbf*ft'],
    ['E', 'Btu'],
    ['2*M', 'N*m'],
  ])('%s declared in %s passes', (formula, target) => {
    expect(infer(formula, target).problems).toEqual([]);
  });
});

describe('types', () => {
  const typeOf = (text: string): string => {
    const { type } = infer(text);
    if (type?.kind !== 'quantity') return type?.kind ?? 'none';
    const { r, hz, pi, rad } = type.counts;
    return [
      dimensionKey(type.dimension),
      ...Object.entries({ r, hz, pi, rad }).flatMap(([name, count]) => (count.n === 0 ? [] : [`${name}${textR(count)}`])),
    ].join(' ');
  };
  it.each([
    ['F*L^2/t', 'L3 M1 T-3'],
    ['sqrt(F/m)', 'L1/2 T-1'],
    ['cbrt(L)*L^(2/3)', 'L1'],
    ['F^0.5*F^(-1/2)', '1'],
    ['hypot(L, d)', 'L1'],
    ['abs(-F)', 'L1 M1 T-2'],
    ['sign(F)', '1'],
    ['atan2(L, d)', '1 rad1'],
    ['2*pi*n', 'T-1 r1 pi1'],
    ['n*f', 'T-2 r1 hz1'],
    ['(2*pi*f)^2', 'T-2 hz2 pi2'],
    ['pi + 1', '1'],
    ['pi*n + pi*n', 'T-1 r1 pi1'],
    ['pi*n + omega', 'T-1'],
    ['max(n, f)', 'T-1 r1'],
    ['n + f + n', 'T-1 r1'],
    ['e^(mu*theta)', '1'],
    ['0', '1'],
    ['0 + F', 'L1 M1 T-2'],
    ['max(0, F)', 'L1 M1 T-2'],
    ['k > 1 ? 0 : n', 'T-1 r1'],
    ['entry(surfaces, mu_dry, lining)', '1'],
    ['interpolate(belts, speed, L)', 'T-1 r1'],
    ['F*"3 m"', 'L2 M1 T-2'],
    ['mu^k', '1'],
  ])('%s is %s', (formula, expected) => {
    expect(errors(formula)).toEqual([]);
    expect(typeOf(formula)).toBe(expected);
  });

  it('find what addends have in common whatever the order', () => {
    for (const formula of ['f + pi*n + n', 'n + pi*n + f', 'pi*n + (n + f)', '(f + pi*n) + n', 'n - (f - pi*n)']) {
      expect(typeOf(formula)).toBe('T-1 r1');
    }
  });

  it('pass on the declared unit alone, or settled counts where none is declared', () => {
    const angular = infer('2*pi*n');
    expect(typeOfResult(angular, unitOf('rad/s'))).toEqual(typeOfUnit(unitOf('rad/s')));
    expect(typeOfResult(angular)).toMatchObject({ counts: { r: { n: 0 }, pi: { n: 0 }, rad: { n: 0 } } });
    expect(typeOfResult(infer('n*z'))).toMatchObject({ counts: { r: { n: 1 } } });
    expect(typeOfResult(infer('omega'))).toMatchObject({ counts: { r: { n: 0 }, rad: { n: 1 } } });
    expect(typeOfResult(infer('T_a + dT'))).toMatchObject({ temperature: 'reading' });
  });

  it('keep kinds of temperature through tables, branches and factors', () => {
    expect(infer('interpolate(belts, warmth, L)').type).toMatchObject({ temperature: 'reading' });
    expect(errors('interpolate(belts, warmth, L)', 'degC')).toEqual([]);
    expect(errors('interpolate(belts, warmth, L)', 'K').map((problem) => problem.message.split(':')[0])).toEqual([
      'reading against difference',
    ]);
    expect(infer('k > 1 ? T_a : T_b').type).toMatchObject({ temperature: 'reading' });
    expect(infer('(T_b - T_a)/2').type).toMatchObject({ temperature: 'difference' });
    expect(errors('(T_b - T_a)/2', 'degC').map((problem) => problem.message)).toEqual([
      'difference against reading: the formula gives a difference of two readings, the declared unit °C takes a reading; declare K',
    ]);
    expect(errors('T_F - T_a', 'K')).toEqual([]);
    expect(errors('T_a > T_b ? 1 : 0', '1')).toEqual([]);
    expect(errors('T_a > dT ? 1 : 0', '1').map((problem) => problem.message.split(':')[0])).toEqual(['reading and difference']);
    expect(errors('T_a + 0', 'degC').map((problem) => problem.message.split(':')[0])).toEqual(['reading and difference']);
    for (const formula of ['abs(T_a)', 'T_a^2', 'sqrt(T_a)', 'hypot(T_a, T_b)', 'exp(T_a)', 'sign(T_a)', 'ceil(T_a)', '1/T_a']) {
      expect(errors(formula).map((problem) => problem.message.split(':')[0])).toEqual([
        'a temperature reading cannot be used here',
      ]);
    }
  });
});

describe('the unit check in words', () => {
  it.each([
    ['F_c + F_u*k/(k - 1)', 'N', 'force = force + force × number, units agree'],
    ['pi*d*n', 'm/s', 'speed = length × rotational frequency × number, units agree'],
    ['F*v', 'W', 'power = force × speed, units agree'],
    ['m*v^2/L', 'N', 'force = mass × speed² / length, units agree'],
    ['e^(mu*theta)', '1', 'number, units agree'],
    ['sqrt(F^2 + F_c^2)', 'N', 'force = √(force² + force²), units agree'],
    ['max(0, F - F_c)', 'N', 'force = max(force − force), units agree'],
    ['F > 0 ? F : 0', 'N', 'force, units agree'],
    ['F/(L*d)', 'N/mm^2', 'stress or pressure = force / (length × length), units agree'],
  ])('%s in %s: %s', (formula, target, words) => {
    expect(infer(formula, target).words).toBe(words);
  });

  it('are absent where something does not fit', () => {
    expect(infer('F', 'm').words).toBeUndefined();
    expect(infer('F + M').words).toBeUndefined();
  });
});

describe('comparisons', () => {
  const compare = (left: string, right: string, unit?: string) =>
    inferComparison(formulaOf(left), formulaOf(right), scope, unit === undefined ? undefined : unitOf(unit));

  it('give the type of both sides', () => {
    expect(compare('F/(d*d)', 'sigma')).toMatchObject({
      type: { kind: 'quantity' },
      problems: [],
      words: 'stress or pressure = force / (length × length), units agree',
    });
    expect(compare('n', 'f').type).toMatchObject({ counts: { r: { n: 1 } } });
    expect(compare('F', '0').problems).toEqual([]);
  });

  it.each([
    [
      'F',
      'M',
      undefined,
      'left',
      'cannot compare a force (N) with a torque (N·m): F with M; a length (m) is missing on one side or too many on the other',
    ],
    ['v', 'n*L', undefined, 'left', 'revolutions in comparison: v counts no revolutions, n·L counts revolutions (r)'],
    [
      'T_a',
      'dT',
      undefined,
      'left',
      'reading and difference: in comparison, T_a is a temperature reading and dT is in kelvin; compare like with like: T_a - "-273.15 degC" is the absolute temperature',
    ],
    [
      'F',
      'F + M',
      undefined,
      'right',
      'cannot add a force (N) to a torque (N·m) in F + M; a length (m) is missing on one side or too many on the other',
    ],
    [
      'F',
      'F_c',
      'mm',
      'left',
      'the formula gives a force (N), the declared unit mm is a length; declare N or correct the formula',
    ],
  ] as const)('%s with %s in %s', (left, right, unit, side, message) => {
    const found = compare(left, right, unit);
    expect(found[side === 'left' ? 'leftProblems' : 'rightProblems'][0]!.message).toBe(message);
  });
});

it('reads literals with the decimal sign of the sheet', () => {
  const comma = { ...scope, decimalSign: ',' as const };
  expect(inferFormula(formulaOf('F*"2,5 m"'), comma, unitOf('N*m')).problems).toEqual([]);
  expect(inferFormula(formulaOf('F*"2,5 m"'), scope, unitOf('N*m')).problems).not.toEqual([]);
});
