// The token list: kinds, normalised texts, places. What is typed on paper's signs has the tokens of the plain ones.

import { describe, expect, test } from 'vitest';
import { tokenize } from '../../src/formula/index.ts';

const short: Readonly<Record<string, string>> = {
  name: 'n',
  number: '#',
  string: 's',
  operator: 'o',
  open: '(',
  close: ')',
  comma: ',',
  unknown: '?',
};
const list = (text: string): string =>
  tokenize(text)
    .map((t) => `${short[t.kind]}${t.text}@${t.from}-${t.to}`)
    .join(' ');

describe('tokens', () => {
  test.each([
    ['', ''],
    ['F_c + 2', 'nF_c@0-3 o+@4-5 #2@6-7'],
    ['μ·θ₁', 'nmu@0-1 o*@1-2 ntheta_1@2-4'],
    ['1.5e-3x', '#1.5e-3@0-6 nx@6-7'],
    ['1.5e−3', '#1.5e-3@0-6'],
    ['2e+x', '#2@0-1 ne@1-2 o+@2-3 nx@3-4'],
    ['.5+5.', '#.5@0-2 o+@2-3 #5.@3-5'],
    ['1.2.3', '#1.2@0-3 #.3@3-5'],
    ['a≤b≥c≠d', 'na@0-1 o<=@1-2 nb@2-3 o>=@3-4 nc@4-5 o!=@5-6 nd@6-7'],
    ['a × b ÷ c − d', 'na@0-1 o*@2-3 nb@4-5 o/@6-7 nc@8-9 o-@10-11 nd@12-13'],
    ['x²', 'nx@0-1 o^@1-1 #2@1-2'],
    ['x⁻¹²y', 'nx@0-1 o^@1-1 o-@1-2 #12@2-4 ny@4-5'],
    ['"10 m/s"*v', 's10 m/s@0-8 o*@8-9 nv@9-10'],
    ['“a” „b“ «c»', 'sa@0-3 sb@4-7 sc@8-11'],
    [`'a' b' c`, `sa@0-3 nb@4-5 ?'@5-6 nc@7-8`],
    ['"open + 1', '?"open + 1@0-9'],
    ['max(a, b)', 'nmax@0-3 ((@3-4 na@4-5 ,,@5-6 nb@7-8 ))@8-9'],
    ['a and not b', 'na@0-1 oand@2-5 onot@6-9 nb@10-11'],
    ['and_1 nota', 'nand_1@0-5 nnota@6-10'],
    ['a ?.5:b', 'na@0-1 o?@2-3 #.5@3-5 o:@5-6 nb@6-7'],
    ['a?.b', 'na@0-1 o?.@1-3 nb@3-4'],
    ['a**b <> c', 'na@0-1 o**@1-3 nb@3-4 o<>@5-7 nc@8-9'],
    ['30°', '#30@0-2 ?°@2-3'],
    ['a😀b', 'na@0-1 ?😀@1-3 nb@3-4'],
    ['a\u00a0+\u2009b\n', 'na@0-1 o+@2-3 nb@4-5'],
    ['_a', '?_@0-1 na@1-2'],
    ['e\u0301a', 'néa@0-3'],
  ])('of %j', (text, tokens) => {
    expect(list(text)).toBe(tokens);
  });
});
