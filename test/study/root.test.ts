import { describe, expect, it } from 'vitest';
import { solver } from '../../src/study/index.ts';
import { findRoot } from '../../src/study/root.ts';

const { sin, cos, exp, log, PI } = Math;

// Source: Alefeld, Potra, Shi, Algorithm 748, ACM Trans. Math. Software 21 (1995) 327–344, and the collection of
// test problems roots-fortran, root_tests.f90 (after it); roots recomputed with 40 digits.
const sum2 = (x: number) => {
  let total = 0;
  for (let i = 1; i <= 20; i += 1) total += (2 * i - 5) ** 2 / (x - i * i) ** 3;
  return -2 * total;
};
const published: readonly [string, (x: number) => number, number, number, string][] = [
  ['sin x − x/2', (x) => sin(x) - x / 2, PI / 2, PI, '1.8954942670339809471'],
  ['sum of poles, first gap', sum2, 1 + 1e-9, 4 - 1e-9, '3.0229153472730569781'],
  ['sum of poles, second gap', sum2, 4 + 1e-9, 9 - 1e-9, '6.6837535608080780814'],
  ['x⁴ − 0.2', (x) => x ** 4 - 0.2, 0, 5, '0.668740304976422024'],
  ['x¹² − 0.2', (x) => x ** 12 - 0.2, 0, 5, '0.87448527222116783564'],
  ['x¹² − 1', (x) => x ** 12 - 1, 0, 5, '1'],
  ['sin x − 0.5', (x) => sin(x) - 0.5, 0, 1.5, '0.52359877559829887308'],
  ['2x e⁻⁵ − 2 e^(−5x) + 1', (x) => 2 * x * exp(-5) - 2 * exp(-5 * x) + 1, 0, 1, '0.13825715505682407593'],
  ['2x e⁻²⁰ − 2 e^(−20x) + 1', (x) => 2 * x * exp(-20) - 2 * exp(-20 * x) + 1, 0, 1, '0.034657359020853851362'],
  ['(1 + (1 − 5)²) x − (1 − 5x)²', (x) => 17 * x - (1 - 5 * x) ** 2, 0, 1, '0.038402551840621900478'],
  ['x² − (1 − x)⁵', (x) => x * x - (1 - x) ** 5, 0, 1, '0.34595481584824201796'],
  ['x² − (1 − x)²⁰', (x) => x * x - (1 - x) ** 20, 0, 1, '0.16492095727644095239'],
  ['(1 + (1 − 4)⁴) x − (1 − 4x)⁴', (x) => 82 * x - (1 - 4 * x) ** 4, 0, 1, '0.010305283778156443691'],
  ['(x − 1) e^(−5x) + x⁵', (x) => (x - 1) * exp(-5 * x) + x ** 5, 0, 1, '0.51615351875793356643'],
  ['(20x − 1)/(19x)', (x) => (20 * x - 1) / (19 * x), 0.01, 1, '0.05'],
  ['x^(1/5) − 5^(1/5)', (x) => x ** 0.2 - 5 ** 0.2, 1, 100, '5'],
  ['cos x − x³', (x) => cos(x) - x ** 3, 0, 4, '0.86547403310161444662'],
  ['x eˣ − 1', (x) => x * exp(x) - 1, -1, 1, '0.567143290409783873'],
  ['x³ − 2x − 5', (x) => x ** 3 - 2 * x - 5, 2, 3, '2.0945514815423265915'],
  ['x³ + 4x² − 10', (x) => x ** 3 + 4 * x * x - 10, 0, 1.5, '1.3652300134140968458'],
  ['x − 3 ln x', (x) => x - 3 * log(x), 1, 2.1, '1.8571838602078353365'],
  ['eˣ + x − 20', (x) => exp(x) + x - 20, 2, 3, '2.8424389537844470678'],
  ['eˣ + x − 5', (x) => exp(x) + x - 5, 0, 2, '1.3065586410393501957'],
  ['(x − 1) x⁶ − 1', (x) => (x - 1) * x ** 6 - 1, 0, 3, '1.2554228710768465432'],
  ['1/x − sin x + 1', (x) => 1 / x - sin(x) + 1, -1.3, -0.5, '-0.62944648407333332996'],
  ['e^(x² + 7x − 30) − 1', (x) => exp(x * x + 7 * x - 30) - 1, 2.8, 3.1, '3'],
  ['1 − 1/x²', (x) => 1 - 1 / (x * x), 1e-12, 1e12, '1'],
  [
    'blood flow of a dialyser',
    (x) => (-3062 * (1 - 0.61489) * exp(-x)) / (0.61489 + (1 - 0.61489) * exp(-x)) - 1013 + 1628 / x,
    2e-4,
    2,
    '1.0375360332870402871',
  ],
  ['eˣ − 2 − 0.01/x² + 2·10⁻⁶/x³', (x) => exp(x) - 2 - 0.01 / (x * x) + 2e-6 / x ** 3, 2e-4, 1, '0.70320484036313580904'],
  ['x² − 1.0038273894 + sin(x/10000)', (x) => x * x - 1.0038273894 + sin(x / 10000), 0.0001, 10.0001, '1.0018618683298284991'],
  // Transcendental constants, recomputed with 40 digits.
  ['x tan x = 1', (x) => x * Math.tan(x) - 1, 0.1, 1.5, '0.86033358901937976'],
  ['tan x = x near 4.49', (x) => Math.tan(x) - x, 4.4, 4.6, '4.4934094579090642'],
  ['cos x = x', (x) => cos(x) - x, 0, 1, '0.73908513321516064'],
  ['x tanh x = 1', (x) => x * Math.tanh(x) - 1, 0.5, 2, '1.1996786402577338'],
];

describe('roots of the published test problems', () => {
  it.each(published)('%s', (_, f, low, high, root) => {
    const result = findRoot(f, low, high);
    expect(result).toMatchObject({ ok: true });
    if (result.ok) expect(Math.abs(result.root - Number(root))).toBeLessThanOrEqual(4e-15 * Math.max(1, Math.abs(Number(root))));
  });

  // f from the Colebrook–White equation 1/√f = −2 lg(ε/(3.7 D) + 2.51/(Re √f)), recomputed with 40 digits.
  it.each([
    [1e5, 1e-4, 0.018513866077472],
    [1e6, 1e-3, 0.019943465840477],
    [4000, 0, 0.039907014055635],
  ])('Colebrook–White at Re = %d, ε/D = %d', (re, rough, expected) => {
    const result = findRoot((f) => 1 / Math.sqrt(f) + 2 * Math.log10(rough / 3.7 + 2.51 / (re * Math.sqrt(f))), 0.001, 0.1);
    expect(result.ok && Math.abs(result.root - expected)).toBeLessThan(5.1e-16);
  });

  // Published as hard: below 0.0366 the value is 0 in double precision, so that no program can tell the root 0 from its neighbours.
  it('x e^(−1/x²) on [−1, 4] is found to the stretch on which it cannot be told from 0', () => {
    const result = findRoot((x) => x * exp(-1 / (x * x)), -1, 4);
    expect(result).toMatchObject({ ok: true, residual: 0 });
    expect(result.ok && Math.abs(result.root)).toBeLessThan(0.0367);
  });

  it('the flat cubic (x − 3)³ is found to its digits', () => {
    const result = findRoot((x) => (x - 3) ** 3, 0, 5);
    expect(result.ok && Math.abs(result.root - 3)).toBeLessThan(1e-15);
  });

  it.each([9, 19])('x^%i on [−1, 4] is found though flat at its root', (power) => {
    const result = findRoot((x) => x ** power, -1, 4);
    expect(result.ok && Math.abs(result.root)).toBeLessThan(1e-15);
  });
});

describe('what is no root', () => {
  it.each<[string, (x: number) => number, number, number, string]>([
    ['no change of sign: x² + 1', (x) => x * x + 1, -1, 1, 'no-sign-change'],
    ['a pole: 1/x', (x) => 1 / x, -1, 1.5, 'pole'],
    ['a pole met at once: 1/x', (x) => 1 / x, -1, 1, 'pole'],
    ['a pole: tan x on [1, 2]', (x) => Math.tan(x), 1, 2, 'pole'],
    ['not a number at an end', (x) => Math.sqrt(x), -1, 1, 'not-finite'],
    ['not a number inside', (x) => (Math.abs(x) < 0.5 ? Number.NaN : x), -1, 1, 'not-finite'],
  ])('%s', (_, f, low, high, failure) => {
    expect(findRoot(f, low, high)).toMatchObject({ ok: false, failure });
  });
});

describe('the search of a whole bracket', () => {
  const search = (f: (x: number) => number, low: number, high: number) =>
    solver((samples, count) => Float64Array.from({ length: count }, (_, i) => f(samples[i]!)), low, high);

  it.each(published)('%s: its published root is among those found', (_, f, low, high, root) => {
    const found = search(f, low, high).roots.map(
      (one) => Math.abs(one.root - Number(root)) / Math.max(1, Math.abs(Number(root))),
    );
    expect(Math.min(...found)).toBeLessThanOrEqual(4e-15);
  });

  it('a stretch of equal sides is one root, its middle, and is told', () => {
    const { roots } = search((x) => x * exp(-1 / (x * x)), -1, 4);
    expect(roots).toHaveLength(1);
    expect(Math.abs(roots[0]!.root)).toBeLessThan(0.01);
    // e^(−1/x²) is 0 in double precision where 1/x² > 745.13, that is |x| < 0.03663.
    expect(roots[0]!.stretch?.[0]).toBeCloseTo(-0.0366, 2);
    expect(roots[0]!.stretch?.[1]).toBeCloseTo(0.0366, 2);
  });

  it.each<[string, (x: number) => number, number, number]>([
    ['x² + 1', (x) => x * x + 1, -1, 1],
    ['1/x', (x) => 1 / x, -1, 1],
    ['tan x', Math.tan, 1, 2],
  ])('%s has none', (_, f, low, high) => {
    expect(search(f, low, high).roots).toEqual([]);
  });
});
