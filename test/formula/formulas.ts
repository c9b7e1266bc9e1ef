// Random formulas that the formula language reads, for tests of everything behind the reading.

import fc from 'fast-check';

/** Functions of one argument. */
export const functions = [
  'exp',
  'ln',
  'log10',
  'sqrt',
  'cbrt',
  'abs',
  'sign',
  'sin',
  'cos',
  'tan',
  'asin',
  'acos',
  'atan',
  'sinh',
  'cosh',
  'tanh',
  'floor',
  'ceil',
  'round',
] as const;
const pairs = ['min', 'max', 'atan2', 'hypot'];
export const names = ['a', 'F_c', 'k', 'mu', 'theta_1', 'n', 'T', 'DeltaT', 'Ø_é', 'big'];

const leaf = fc.oneof(
  { weight: 4, arbitrary: fc.constantFrom(...names) },
  { weight: 3, arbitrary: fc.constantFrom('1', '2', '3', '0.5', '1.20', '2.5e3', '1e-7', '.25', '10') },
  { weight: 1, arbitrary: fc.constantFrom('pi', 'e', '"10 m/s"', '"30 deg"', '"-5 N"') },
);

/** A number, without comparison on its outside. */
export const formulas: fc.Arbitrary<string> = fc.letrec<{ value: string; test: string }>((tie) => ({
  value: fc.oneof(
    { depthSize: 'small', withCrossShrink: true },
    leaf,
    fc.tuple(tie('value'), fc.constantFrom(' + ', ' - ', '*', '/', '^'), tie('value')).map(([a, o, b]) => `${a}${o}${b}`),
    fc.tuple(tie('value'), fc.constantFrom('+', '-', '*', '/', '^'), tie('value')).map(([a, o, b]) => `(${a})${o}(${b})`),
    tie('value').map((a) => `(${a})`),
    tie('value').map((a) => `-${a}`),
    tie('value').map((a) => `(-(${a}))`),
    fc.tuple(fc.constantFrom(...functions), tie('value')).map(([f, a]) => `${f}(${a})`),
    fc.tuple(fc.constantFrom(...pairs), tie('value'), tie('value')).map(([f, a, b]) => `${f}(${a}, ${b})`),
    fc.tuple(tie('test'), tie('value'), tie('value')).map(([t, a, b]) => `(${t} ? ${a} : ${b})`),
    tie('value').map((a) => `entry(t_1, µ_dry, ${a})`),
    tie('value').map((a) => `interpolate(t, c, ${a})`),
    fc
      .tuple(fc.constantFrom('2', '(a)', 'k'), fc.constantFrom('pi', 'mu', '(n)'), fc.constantFrom('T', 'a'))
      .map((parts) => `(${parts[0]} ${parts[1] === '(n)' && parts[0] === 'k' ? 'mu' : parts[1]} ${parts[2]})`),
  ),
  test: fc.oneof(
    { depthSize: 'small' },
    fc
      .tuple(tie('value'), fc.constantFrom('<', '<=', '>', '>=', '==', '!='), tie('value'))
      .map(([a, o, b]) => `(${a}) ${o} (${b})`),
    fc.tuple(tie('test'), fc.constantFrom('and', 'or'), tie('test')).map(([a, o, b]) => `(${a}) ${o} (${b})`),
    tie('test').map((t) => `not (${t})`),
  ),
})).value;
