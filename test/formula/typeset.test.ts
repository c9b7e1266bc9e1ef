// Formulas as TeX. The lines of the drawing office: F_c, F_u, k and F_1min of a flat-belt drive.
// Notation: ISO 80000-2 (operators, functions, fractions), ISO 80000-1 (numerals and units).

import fc from 'fast-check';
import katex from 'katex';
import { describe, expect, test } from 'vitest';
import {
  type Expr,
  nothingTaken,
  parseFormula,
  type Substitution,
  type Taken,
  texSubstituted,
  texSymbols,
} from '../../src/formula/index.ts';
import { unitOf } from '../../src/quantity/index.ts';
import { formulas } from './formulas.ts';

const shown: ReadonlyMap<string, string> = new Map([
  ['F_c', '145.3\\,\\mathrm{N}'],
  ['F_u', '592.7\\,\\mathrm{N}'],
  ['k', '2.281'],
  ['mu', '0.30'],
  ['theta_1', '157.5°'],
  ['m', '0.63\\,\\mathrm{kg/m}'],
  ['v', '15.1844\\,\\mathrm{m/s}'],
  ['P', '7.5\\,\\mathrm{kW}'],
  ['K_A', '1.2'],
  ['n', '-5'],
  ['T', '-5\\,\\mathrm{N}'],
  ['big', '1.376\\times 10^{4}'],
  ['s', '\\text{leather}'],
]);
const substitution: Substitution = {
  tex: (name, inExponent) => (inExponent && name === 'theta_1' ? '2.7482\\,\\mathrm{rad}' : (shown.get(name) ?? '3')),
  needsParens: (name) => /mathrm|°|^-/.test(shown.get(name) ?? '3'),
  number: () => '3',
};

function expr(text: string): Expr {
  const formula = parseFormula(text);
  if (!formula.ok) throw new Error(`${text}: ${formula.problem.message}`);
  return formula.value.expr;
}

describe('symbols and numbers have the same shape', () => {
  const table = String.raw`
F_c + F_u*k/(k - 1)
  F_{\mathrm{c}} + \frac{F_{\mathrm{u}}\,k}{k - 1}
  145.3\,\mathrm{N} + \frac{(592.7\,\mathrm{N}) \times 2.281}{2.281 - 1}
m*v^2
  m\,v^{2}
  (0.63\,\mathrm{kg/m}) \times (15.1844\,\mathrm{m/s})^{2}
P*K_A/v
  \frac{P\,K_{\mathrm{A}}}{v}
  \frac{(7.5\,\mathrm{kW}) \times 1.2}{15.1844\,\mathrm{m/s}}
e^(mu*theta_1)
  \mathrm{e}^{\mu\,\theta_{1}}
  \mathrm{e}^{0.30 \times 2.7482\,\mathrm{rad}}
exp(-mu*theta_1)
  \mathrm{e}^{-\mu\,\theta_{1}}
  \mathrm{e}^{-0.30 \times 2.7482\,\mathrm{rad}}
sqrt(F_c^2 + F_u^2 - 2*F_c*F_u*cos(theta_1))
  \sqrt{F_{\mathrm{c}}^{2} + F_{\mathrm{u}}^{2} - 2\,F_{\mathrm{c}}\,F_{\mathrm{u}}\,\cos(\theta_{1})}
  \sqrt{(145.3\,\mathrm{N})^{2} + (592.7\,\mathrm{N})^{2} - 2 \times (145.3\,\mathrm{N}) \times (592.7\,\mathrm{N}) \times \cos(157.5°)}
mu/(1 + v/"10 m/s")
  \frac{\mu}{1 + \frac{v}{10\,\mathrm{m/s}}}
  \frac{0.30}{1 + \frac{15.1844\,\mathrm{m/s}}{10\,\mathrm{m/s}}}
"10 m/s"*v
  (10\,\mathrm{m/s})\,v
  (10\,\mathrm{m/s}) \times (15.1844\,\mathrm{m/s})
v*"10 m/s"
  v \times (10\,\mathrm{m/s})
  (15.1844\,\mathrm{m/s}) \times (10\,\mathrm{m/s})
2*pi*n
  2\,\pi\,n
  2 \times \pi \times (-5)
n - T
  n - T
  -5 - (-5\,\mathrm{N})
-n*k
  -n\,k
  -(-5) \times 2.281
-T
  -T
  -(-5\,\mathrm{N})
-F_c
  -F_{\mathrm{c}}
  -145.3\,\mathrm{N}
n^2
  n^{2}
  (-5)^{2}
big*k
  \mathit{big}\,k
  1.376\times 10^{4} \times 2.281
big^2
  \mathit{big}^{2}
  (1.376\times 10^{4})^{2}
k*2*3
  k \times 2 \times 3
  2.281 \times 2 \times 3
k*-n
  k \times (-n)
  2.281 \times (-(-5))
(F_c/k)*v
  \frac{F_{\mathrm{c}}}{k}\,v
  \frac{145.3\,\mathrm{N}}{2.281} \times (15.1844\,\mathrm{m/s})
a/(b/c)
  \frac{a}{\frac{b}{c}}
  \frac{3}{\frac{3}{3}}
(a/b)^2
  \left(\frac{a}{b}\right)^{2}
  \left(\frac{3}{3}\right)^{2}
a^(b/c)*d
  a^{b/c}\,d
  3^{3/3} \times 3
e^((a + b)/c*d)
  \mathrm{e}^{((a + b)/c)\,d}
  \mathrm{e}^{((3 + 3)/3) \times 3}
(a^b)^c - a^b^c
  (a^{b})^{c} - a^{b^{c}}
  (3^{3})^{3} - 3^{3^{3}}
2^-3
  2^{-3}
  2^{-3}
-a^2 + (-a)^2
  -a^{2} + (-a)^{2}
  -3^{2} + (-3)^{2}
a - (b - c) + (c + d)
  a - (b - c) + (c + d)
  3 - (3 - 3) + (3 + 3)
((a + b)) + c
  a + b + c
  3 + 3 + 3
a*(b*c)*(b + c)
  a\,b\,c\,(b + c)
  3 \times 3 \times 3 \times (3 + 3)
-a/b*c
  \frac{-a}{b}\,c
  \frac{-3}{3} \times 3
2 pi d
  2\,\pi\,d
  2 \times \pi \times 3
1.20*a + .5*b + 2e3*c + 9550*d
  1.20\,a + 0.5\,b + 2\times 10^{3}\,c + 9\,550\,d
  1.20 \times 3 + 0.5 \times 3 + 2\times 10^{3} \times 3 + 9\,550 \times 3
sin(theta_1)^2 + sin(theta_1)^-1 + (cos(theta_1))^2
  \sin^{2}(\theta_{1}) + (\sin(\theta_{1}))^{-1} + (\cos(\theta_{1}))^{2}
  \sin^{2}(157.5°) + (\sin(157.5°))^{-1} + (\cos(157.5°))^{2}
ln(a) + log10(a/b) + atan2(a, b)
  \ln(a) + \log_{10}\left(\frac{a}{b}\right) + \operatorname{atan2}(a,\ b)
  \ln(3) + \log_{10}\left(\frac{3}{3}\right) + \operatorname{atan2}(3,\ 3)
asin(a) + acos(b) + atan(c) + sinh(a) + sign(b) + round(c)
  \arcsin(a) + \arccos(b) + \arctan(c) + \sinh(a) + \operatorname{sign}(b) + \operatorname{round}(c)
  \arcsin(3) + \arccos(3) + \arctan(3) + \sinh(3) + \operatorname{sign}(3) + \operatorname{round}(3)
min(a, b, n) + cbrt(a) + abs(n) + hypot(F_c, n)
  \min(a,\ b,\ n) + \sqrt[3]{a} + \left|n\right| + \sqrt{F_{\mathrm{c}}^{2} + n^{2}}
  \min(3,\ 3,\ -5) + \sqrt[3]{3} + \left|-5\right| + \sqrt{(145.3\,\mathrm{N})^{2} + (-5)^{2}}
floor(a)*ceil(b/c)
  \left\lfloor a\right\rfloor \,\left\lceil \frac{b}{c}\right\rceil
  \left\lfloor 3\right\rfloor  \times \left\lceil \frac{3}{3}\right\rceil
e*a
  \mathrm{e}\,a
  \mathrm{e} \times 3
e^"30 deg"
  \mathrm{e}^{30{}^{\circ}}
  \mathrm{e}^{0.523\,599\,\mathrm{rad}}`;
  const rows = table
    .trim()
    .split(/\n(?! )/)
    .map((row) => row.split('\n  '));

  test.each(rows.map((row) => [row[0] as string, row] as const))('%s', (text, [, symbols, numbers]) => {
    const tree = expr(text);
    expect(texSymbols(tree).trim()).toBe(symbols);
    expect(texSubstituted(tree, substitution, nothingTaken).trim()).toBe(numbers);
  });
});

describe('comparisons, logic and choices', () => {
  const taken = (branch: boolean): Taken => ({ branch: () => branch, table: () => undefined });
  test('relations and words', () => {
    expect(texSymbols(expr('a <= b'))).toBe('a \\le b');
    expect(texSymbols(expr('0 < a < 1'))).toBe('0 < a < 1');
    expect(texSymbols(expr('not (a < b) and (c >= d or a != b)'))).toBe(
      '\\text{not }(a < b) \\text{ and } (c \\ge d \\text{ or } a \\ne b)',
    );
  });
  test('a choice shows its branches in symbols, the branch taken in numbers', () => {
    const tree = expr('k*(a < b ? F_c : c < d ? 4 : T)');
    expect(texSymbols(tree)).toBe(
      'k\\,\\left(\\begin{cases} F_{\\mathrm{c}} & \\text{if } a < b \\\\ 4 & \\text{if } c < d \\\\ T & \\text{otherwise} \\end{cases}\\right)',
    );
    expect(texSubstituted(tree, substitution, taken(true))).toBe('2.281 \\times (145.3\\,\\mathrm{N})');
    expect(texSubstituted(tree, substitution, taken(false))).toBe('2.281 \\times (-5\\,\\mathrm{N})');
  });
  test('a text that is compared is shown as text', () => {
    expect(texSymbols(expr('s == "leather on cast iron" ? a : b'))).toContain('\\text{if } s = \\text{“leather on cast iron”}');
  });
});

describe('tables', () => {
  const row: Taken = {
    branch: () => undefined,
    table: (node) =>
      node.kind === 'table' && node.name === 'entry'
        ? { kind: 'entry', value: 0.3, unit: unitOf('1') }
        : { kind: 'interpolate', x0: 0.01, x1: 0.02, y0: 2000, y1: -1000, xUnit: unitOf('mm'), yUnit: unitOf('kN') },
  };
  test('a lookup alone shows its key, within a formula its value', () => {
    const alone = expr('entry(surfaces, mu_dry, s)');
    expect(texSymbols(alone)).toBe('\\operatorname{entry}(\\text{surfaces},\\ \\text{mu\\_dry},\\ s)');
    expect(texSubstituted(alone, substitution, row)).toBe(
      '\\operatorname{entry}(\\text{surfaces},\\ \\text{mu\\_dry},\\ \\text{leather})',
    );
    expect(texSubstituted(expr('2*entry(surfaces, mu_dry, s)'), substitution, row)).toBe('2 \\times 0.3');
  });
  test('an interpolation shows its arithmetic in the units of the columns', () => {
    expect(texSubstituted(expr('interpolate(t, c, k)*k'), substitution, row)).toBe(
      '\\left(2\\,\\mathrm{kN} + (-1\\,\\mathrm{kN} - 2\\,\\mathrm{kN}) \\times \\frac{2.281 - 10\\,\\mathrm{mm}}{20\\,\\mathrm{mm} - 10\\,\\mathrm{mm}}\\right) \\times 2.281',
    );
  });
  test('without a row the call stays', () => {
    expect(texSubstituted(expr('interpolate(t, c, k)'), substitution, nothingTaken)).toBe(
      '\\operatorname{interpolate}(\\text{t},\\ \\text{c},\\ 2.281)',
    );
  });
});

test('a decimal comma of the sheet is one in print and in quoted quantities', () => {
  const tree = expr('1.5*"2,5 m"');
  expect(texSymbols(tree, { decimalSign: ',' })).toBe('1{,}5 \\times (2{,}5\\,\\mathrm{m})');
  expect(texSubstituted(tree, { ...substitution, decimalSign: ',' }, nothingTaken)).toBe('1{,}5 \\times (2{,}5\\,\\mathrm{m})');
});

const seed = 98;
test(`any formula passes the typesetter at its strictest, with symbols and with numbers (seed ${seed})`, () => {
  const strict = { trust: false, strict: 'error', throwOnError: true, maxExpand: 100, maxSize: 20, output: 'html' } as const;
  fc.assert(
    fc.property(formulas, (text) => {
      const tree = expr(text);
      katex.renderToString(texSymbols(tree), strict);
      katex.renderToString(texSubstituted(tree, substitution, nothingTaken), strict);
      katex.renderToString(
        texSubstituted(tree, substitution, {
          branch: () => true,
          table: () => ({ kind: 'entry', value: -1.5, unit: unitOf('mm') }),
        }),
        strict,
      );
    }),
    { seed, numRuns: 200 },
  );
}, 60_000);
