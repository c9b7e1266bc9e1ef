// Hostile texts: each ends in one sentence, at once, whatever its length and depth.

import { describe, expect, test } from 'vitest';
import { parseFormula, tokenize } from '../../src/formula/index.ts';

const repeat = (text: string, times: number): string => text.repeat(times);

describe('a text beyond the limits', () => {
  test.each([
    [
      'a formula of a megabyte',
      repeat('a+', 500_000),
      'formula-too-long',
      'The formula has 1000000 characters, more than 2000: split it into quantities of their own.',
    ],
    [
      '100 000 parentheses',
      repeat('(', 100_000) + repeat(')', 100_000),
      'formula-too-long',
      'The formula has 200000 characters, more than 2000: split it into quantities of their own.',
    ],
    [
      '51 parentheses',
      `${repeat('(', 51)}a${repeat(')', 51)}`,
      'formula-too-deep',
      'Parentheses stand more than 50 deep in each other here: split the formula into quantities of their own.',
    ],
    [
      '1900 parentheses that are not closed',
      repeat('(', 400),
      'formula-too-deep',
      'Parentheses stand more than 50 deep in each other here: split the formula into quantities of their own.',
    ],
    [
      '51 calls',
      `${repeat('sin(', 51)}a${repeat(')', 51)}`,
      'formula-too-deep',
      'Parentheses stand more than 50 deep in each other here: split the formula into quantities of their own.',
    ],
    [
      '501 words and signs',
      `${repeat('a+', 250)}a`,
      'formula-too-long',
      'The formula has 501 words and signs, more than 500: split it into quantities of their own.',
    ],
    [
      'per cent signs that double the work',
      repeat('1%(', 80),
      'percent-in-formula',
      '“1%”: % belongs to values, not to formulas; write "1 %" in quotation marks, or make it a given.',
    ],
    [
      'per cent signs that share their tree',
      `${repeat('(', 30)}1${repeat('+1%)', 30)}`,
      'percent-in-formula',
      '“1%”: % belongs to values, not to formulas; write "1 %" in quotation marks, or make it a given.',
    ],
    [
      'quotation marks',
      repeat('"', 999),
      'operator-missing',
      'Between “""” and “""” an operator is missing: write * for a product.',
    ],
    [
      'a quotation mark and a long rest',
      `"${repeat('a', 1900)}`,
      'quote-not-closed',
      'The quotation mark at "aaaaaaaaaaaaaaaaaa… is not closed: write " after the quantity.',
    ],
    [
      'brackets of three kinds',
      repeat('[({', 160),
      'not-in-formulas',
      '“[” is not part of formulas, which have no lists and no indices: write parentheses, and names such as F_1 for numbered quantities.',
    ],
  ])('%s', (_what, text, code, message) => {
    const start = performance.now();
    const result = parseFormula(text);
    expect(performance.now() - start).toBeLessThan(2000);
    expect(result.ok ? 'read' : [result.problem.code, result.problem.message]).toEqual([code, message]);
  });
});

describe('a text at the limits is read', () => {
  test.each([
    ['50 parentheses', `${repeat('(', 50)}a${repeat(')', 50)}`],
    ['499 words and signs', `${repeat('a+', 249)}a`],
    ['a chain of signs', `${repeat('-', 499)}a`],
    ['a tower of powers', `${repeat('2^', 249)}2`],
    ['a chain of choices', `${repeat('a?b:', 124)}c`],
    ['factors without signs', repeat('a ', 500)],
    ['a number of 1999 digits', `0.${repeat('1', 1997)}`],
    ['a name of 2000 letters', repeat('x', 2000)],
    ['comparisons in a chain', `${repeat('a<', 249)}b`],
    ['not, and again', `${repeat('not ', 498)}a`],
  ])('%s', (_what, text) => {
    const start = performance.now();
    const result = parseFormula(text);
    expect(performance.now() - start).toBeLessThan(2000);
    expect(result.ok ? 'read' : result.problem.message).toBe('read');
  });
});

test('tokens of a long text take time in proportion to it', () => {
  for (const piece of ['a+', "a'", '"', "'(", 'αβ ', '1.', '⁻', '\u0301', '((']) {
    const start = performance.now();
    tokenize(repeat(piece, 100_000));
    expect([piece, performance.now() - start < 2000]).toEqual([piece, true]);
  }
});
