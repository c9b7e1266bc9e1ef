// Formulas read aloud: the grouping that the eye sees must be heard.

import fc from 'fast-check';
import { describe, expect, test } from 'vitest';
import { parseFormula, speakFormula } from '../../src/formula/index.ts';
import { formulas } from './formulas.ts';

function spoken(text: string): string {
  const formula = parseFormula(text);
  if (!formula.ok) throw new Error(formula.problem.message);
  return speakFormula(formula.value.expr);
}

describe('a formula in words', () => {
  test.each([
    ['F_c + F_u*k/(k - 1)', 'F sub c plus fraction F sub u times k, over k minus 1, end of fraction'],
    ['m*v^2', 'm times v squared'],
    ['e^(mu*theta_1)', 'e to the power mu times theta sub 1, end of power'],
    ['exp(mu)', 'e to the power mu'],
    ['a/b*c', 'a over b times c'],
    ['a/(b*c)', 'fraction a, over b times c, end of fraction'],
    ['(a + b)*c', 'open parenthesis a plus b close parenthesis times c'],
    ['a - (b - c)', 'a minus open parenthesis b minus c close parenthesis'],
    ['(a*b)^2', 'open parenthesis a times b close parenthesis squared'],
    ['(a/b)^2', 'open parenthesis a over b close parenthesis squared'],
    ['2^-n', '2 to the power minus n, end of power'],
    ['-a^2', 'minus a squared'],
    ['sqrt(F_1)', 'square root of F sub 1'],
    ['sqrt(a + b)/2', 'fraction square root of a plus b, end of root, over 2, end of fraction'],
    ['sin(theta_1/2)', 'sine of theta sub 1 over 2, end of sine'],
    ['max(a, b + c)', 'the largest of a, b plus c, end of list'],
    ['a < b ? c : d', 'if a is less than b, c, otherwise, d, end of choice'],
    [
      'a < b and (c >= d or a != c)',
      'a is less than b and open parenthesis c is at least d or a is not equal to c close parenthesis',
    ],
    ['v/"10 m/s"', 'v over 10 m/s'],
    ['entry(surfaces, mu_dry, s)', 'entry of table surfaces, column mu_dry, at s, end of lookup'],
    ['DeltaT*2', 'Delta T times 2'],
  ])('%s', (text, words) => {
    expect(spoken(text)).toBe(words);
  });

  test('values may stand in the place of names', () => {
    const formula = parseFormula('F_c + 2*k');
    if (!formula.ok) throw new Error(formula.problem.message);
    expect(speakFormula(formula.value.expr, (name) => (name === 'k' ? '2.281' : '145.3 N'))).toBe('145.3 N plus 2 times 2.281');
  });

  const seed = 5;
  test(`leaves no sign of operation to the voice (seed ${seed})`, () => {
    fc.assert(
      fc.property(formulas, (text) => {
        const words = spoken(text).replace(/10 m\/s|-5 N|2\.5e3|1e-7|t_1|µ_dry/g, 'x');
        expect(words).not.toMatch(/[-+*/^()<>=?:|]| {2}|undefined/);
      }),
      { seed, numRuns: 500 },
    );
  }, 30_000);
});
