// The algebra of counted revolutions against its definition, written out: a term may stand as r + a − j revolutions, whole a
// in 0..hz, whole j in 0..pi (hz..0, pi..0 where negative).

import fc from 'fast-check';
import { describe, expect, it } from 'vitest';
import {
  common,
  countsAgainst,
  fitsAngle,
  multiplyCounts,
  nearestZero,
  powerCounts,
  standing,
  stands,
} from '../../src/formula/counts.ts';
import { inferFormula, type Scope } from '../../src/formula/index.ts';
import type { FormulaCounts } from '../../src/formula/type.ts';
import { compareR, negR, type Rational, rational, textR } from '../../src/quantity/index.ts';
import { formulaOf, scopeOf, unitOf } from './scope.ts';

const checks = { numRuns: 500, seed: 20261202 };
const exponent = fc.tuple(fc.integer({ min: -9, max: 9 }), fc.constantFrom(1, 1, 1, 2, 3)).map(([n, d]) => rational(n, d));
const counts: fc.Arbitrary<FormulaCounts> = fc.record({ r: exponent, hz: exponent, pi: exponent, rad: fc.constant(rational(0)) });

/** All whole numbers from 0 to x, both included. */
function wholes(x: Rational): number[] {
  const found: number[] = [];
  for (let k = -20; k <= 20; k++) if (k * x.n >= 0 && Math.abs(k) * x.d <= Math.abs(x.n)) found.push(k);
  return found;
}
/** The revolutions a term may stand for, as texts of thirds and halves. */
function defined(of: FormulaCounts): Map<string, number> {
  const found = new Map<string, number>();
  for (const a of wholes(of.hz)) {
    for (const j of wholes(of.pi)) {
      const value = rational(of.r.n + (a - j) * of.r.d, of.r.d);
      found.set(textR(value), value.n / value.d);
    }
  }
  return found;
}

describe('standing', () => {
  it('holds exactly the values of the definition', () => {
    fc.assert(
      fc.property(counts, (of) => {
        const values = defined(of);
        const s = standing(of);
        const wrong: string[] = [];
        for (let k = -30; k <= 30; k++) {
          for (const base of [rational(k), rational(of.r.n + k * of.r.d, of.r.d)])
            if (stands(s, base) !== values.has(textR(base))) wrong.push(textR(base));
        }
        expect(wrong).toEqual([]);
        const nearest = nearestZero(s);
        const distances = [...values.values()].map(Math.abs);
        expect(Math.abs(nearest.n / nearest.d)).toBeCloseTo(Math.min(...distances), 12);
        expect(values.has(textR(nearest))).toBe(true);
        if (values.has(textR(negR(nearest)))) expect(nearest.n).toBeGreaterThanOrEqual(0);
      }),
      checks,
    );
  });

  it('has in common what both sets have', () => {
    fc.assert(
      fc.property(counts, counts, (a, b) => {
        const both = [...defined(a).keys()].filter((value) => defined(b).has(value));
        const found = common(standing(a), standing(b));
        expect(found !== undefined).toBe(both.length > 0);
        expect(
          [...defined(a).keys()].filter((value) => found !== undefined && stands(found, rational(...fraction(value)))),
        ).toEqual(both);
      }),
      checks,
    );
  });

  it('adds for products and multiplies for powers', () => {
    fc.assert(
      fc.property(counts, fc.integer({ min: 1, max: 4 }), (of, times) => {
        let product = of;
        for (let k = 1; k < times; k++) product = multiplyCounts(product, of);
        expect(powerCounts(of, rational(times))).toEqual(product);
      }),
      checks,
    );
  });

  it('needs some whole j with r + hz − j = 0 for an angle', () => {
    fc.assert(
      fc.property(counts, (of) => {
        const whole = wholes(of.pi).some(
          (j) => compareR(rational(of.r.n * of.hz.d + of.hz.n * of.r.d, of.r.d * of.hz.d), rational(j)) === 0,
        );
        expect(fitsAngle(of)).toBe(whole);
      }),
      checks,
    );
  });
});

const fraction = (text: string): [number, number] => {
  const [n, d] = text.split('/').map(Number);
  return [n!, d ?? 1];
};

describe('targets', () => {
  const of = (r: number, hz: number, pi: number, rad: number): FormulaCounts => ({
    r: rational(r),
    hz: rational(hz),
    pi: rational(pi),
    rad: rational(rad),
  });
  it.each([
    [of(1, 0, 0, 0), 'r/min', 'fits'],
    [of(1, 0, 0, 0), '1/s', 'fits'],
    [of(1, 0, 0, 0), 'Hz', 'fits'],
    [of(1, 0, 0, 0), 'rad/s', 'revolutions'],
    [of(2, 0, 0, 0), '1/s', 'revolutions'],
    [of(-1, 0, 0, 0), 's', 'fits'],
    [of(-2, 0, 0, 0), 's', 'revolutions'],
    [of(-1, 0, 0, 0), '1/s', 'revolutions'],
    [of(0, 0, 0, 1), 'Hz', 'radians'],
    [of(0, 0, -1, 1), 'Hz', 'fits'],
    [of(0, 0, 0, 1), '1/s', 'fits'],
    [of(0, 0, 0, 0), 'Hz', 'fits'],
    [of(0, 1, 0, 0), 'r/min', 'fits'],
    [of(0, 1, 0, 0), 'rad/s', 'revolutions'],
    [of(0, 1, 1, 0), 'rad/s', 'fits'],
    [of(1, 0, 1, 0), 'deg', 'fits'],
    [of(1, 0, 0, 0), 'mm/r', 'revolutions'],
    [of(-1, 0, 0, 0), 'mm/r', 'fits'],
    [of(1, 0, 0, 0), '1', 'revolutions'],
    [of(1, 0, 0, 0), 'r', 'fits'],
  ] as const)('%o against %s: %s', (counted, target, verdict) => {
    expect(countsAgainst(counted, unitOf(target))).toBe(verdict);
  });
});

describe('hostile formulas', () => {
  const scope: Scope = scopeOf({
    n: 'r/min',
    L: 'm',
    f: 'Hz',
    ...Object.fromEntries(Array.from({ length: 60 }, (_, index) => [`n_${index}`, 'r/min'])),
  });
  it.each([
    ['a long sum that fails', Array.from({ length: 60 }, (_, index) => `n_${index}*L`).join(' + '), 'm/s'],
    ['a long product', Array.from({ length: 120 }, () => 'n*f').join('*'), 'W'],
    ['a huge power of pi', 'pi^9999*n*L', 'm/s'],
    ['powers of powers', '((((n^999)^999)^999)^999)*L', 'm/s'],
    ['deep parentheses', `${'('.repeat(40)}n*L${')'.repeat(40)}`, 'm/s'],
    ['a long chain of differing roots', Array.from({ length: 60 }, (_, index) => `L^(1/${9000 + index})`).join('*'), 'm'],
  ])('%s ends in a sentence, soon', (_, text, target) => {
    const from = performance.now();
    const { problems } = inferFormula(formulaOf(text), scope, unitOf(target));
    expect(performance.now() - from).toBeLessThan(1000);
    for (const problem of problems) {
      expect(problem.message.length).toBeLessThan(600);
      expect(problem.message).not.toMatch(/undefined|NaN|\[object/);
    }
  });
});
