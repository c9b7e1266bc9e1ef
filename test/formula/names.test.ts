// Names of quantities: what is one, what it becomes, how it looks and sounds.
// The look of subscripts: ISO 80000-1:2009, 7.1.2 (upright, unless a subscript is itself a symbol or a running index).

import fc from 'fast-check';
import katex from 'katex';
import { describe, expect, test } from 'vitest';
import {
  canonicalName,
  isName,
  nearestNames,
  plainName,
  reserved,
  speakName,
  texName,
  texText,
} from '../../src/formula/index.ts';

const seed = 41;

describe('one name however it was typed', () => {
  test.each([
    ['μ_1', 'mu_1'],
    ['µ_1', 'mu_1'],
    ['mu_1', 'mu_1'],
    ['μ₁', 'mu_1'],
    ['F₁min', 'F_1min'],
    ['F_c₁₂', 'F_c12'],
    ['ΔT', 'DeltaT'],
    ['\u2206T', 'DeltaT'],
    ['θ', 'theta'],
    ['ϑ', 'theta'],
    ['ϕ', 'phi'],
    ['ς', 'sigma'],
    ['Ω', 'Omega'],
    ['\u2126', 'Omega'],
    ['\u212b', 'Å'],
    ['\u212a', 'K'],
    ['ά', 'alpha'],
    ['ℓ_1', 'ell_1'],
    ['e\u0301', 'é'],
    ['  F_1 ', 'F_1'],
    ['F_1', 'F_1'],
    ['', ''],
  ])('%j is %j', (typed, name) => {
    expect(canonicalName(typed)).toBe(name);
  });

  test(`to make a name canonical twice changes nothing, whatever the text (seed ${seed})`, () => {
    fc.assert(
      fc.property(fc.string({ unit: 'binary', maxLength: 20 }), (text) => {
        const name = canonicalName(text);
        expect(canonicalName(name)).toBe(name);
        expect(name).not.toMatch(/[α-ωΑ-Ωµ]/);
      }),
      { seed, numRuns: 2000 },
    );
  }, 30_000);
});

describe('what is a name', () => {
  const names = 'a F_1 F_1min μ θ_1 d_2 ρ Ø é_ü ΔT constructor toString hasOwnProperty i E Pi log _'.split(' ').slice(0, -1);
  test.each(names)('%j is', (text) => {
    expect(isName(text)).toBe(true);
  });
  const others = [
    '',
    '_',
    '_a',
    '1a',
    '__proto__',
    'a b',
    'a-b',
    'a.b',
    "a'",
    'a%',
    'π',
    'ж',
    'ạ',
    '日',
    'a\u200bb',
    'a²',
    'ª',
    'º',
    'ⅳ',
    'ａ',
    '×',
    '÷',
    ...reserved,
  ];
  test.each(others)('%j is not', (text) => {
    expect(isName(text)).toBe(false);
  });
  test('all words of formulas are reserved', () => {
    const words =
      'exp ln log10 sqrt cbrt abs sign min max sin cos tan asin acos atan atan2 sinh cosh tanh floor ceil round hypot interpolate entry pi e in to mod xor true false null NaN end and or not';
    for (const word of words.split(' ')) expect([word, reserved.has(word)]).toEqual([word, true]);
  });
});

describe('how a name looks and sounds', () => {
  test.each([
    ['F', 'F', 'F', 'F'],
    ['F_1min', 'F_{1\\,\\mathrm{min}}', 'F_1min', 'F sub 1 min'],
    ['F_c', 'F_{\\mathrm{c}}', 'F_c', 'F sub c'],
    ['K_A', 'K_{\\mathrm{A}}', 'K_A', 'K sub A'],
    ['d_1', 'd_{1}', 'd_1', 'd sub 1'],
    ['theta_1', '\\theta_{1}', 'θ_1', 'theta sub 1'],
    ['mu', '\\mu', 'μ', 'mu'],
    ['mu_e1', '\\mu_{\\mathrm{e1}}', 'μ_e1', 'mu sub e1'],
    ['sigma_allow', '\\sigma_{\\mathrm{allow}}', 'σ_allow', 'sigma sub allow'],
    ['epsilon', '\\varepsilon', 'ε', 'epsilon'],
    ['phi_2', '\\varphi_{2}', 'φ_2', 'phi sub 2'],
    ['DeltaT', '\\Delta T', 'ΔT', 'Delta T'],
    ['Deltatheta_1', '\\Delta \\theta_{1}', 'Δθ_1', 'Delta theta sub 1'],
    ['Omega', '\\varOmega', 'Ω', 'Omega'],
    ['dtheta', 'd \\theta', 'dθ', 'd theta'],
    ['m_i', 'm_{i}', 'm_i', 'm sub i'],
    ['x_alpha', 'x_{\\alpha}', 'x_α', 'x sub alpha'],
    ['n_2_ideal', 'n_{2,\\,\\mathrm{ideal}}', 'n_2_ideal', 'n sub 2 ideal'],
    ['F_slack_rev', 'F_{\\mathrm{slack},\\,\\mathrm{rev}}', 'F_slack_rev', 'F sub slack rev'],
    ['Re', '\\mathit{Re}', 'Re', 'Re'],
    ['d1', '\\mathit{d1}', 'd1', 'd1'],
    ['ell_1', '\\ell_{1}', 'ℓ_1', 'ell sub 1'],
    ['Ø_ü', '\\textit{Ø}_{\\text{ü}}', 'Ø_ü', 'Ø sub ü'],
    ['constructor', '\\mathit{constructor}', 'constructor', 'constructor'],
  ])('%s', (name, tex, plain, spoken) => {
    expect([texName(name), plainName(name), speakName(name)]).toEqual([tex, plain, spoken]);
  });

  const strict = { trust: false, strict: 'error', throwOnError: true, maxExpand: 100, maxSize: 20, output: 'html' } as const;
  const part = fc.constantFrom(
    'F',
    'a',
    'mu',
    'Delta',
    'delta',
    'd',
    'theta',
    'eta',
    'ell',
    'é',
    'Ø',
    '1',
    '20',
    '_',
    '__',
    'min',
    'i',
    'e',
    'x',
    'Omega',
    'omicron',
    'Alpha',
    'ij',
    'ı',
    'ǆ',
    'ɏ',
  );
  const names = fc.array(part, { minLength: 1, maxLength: 6 }).map((parts) => parts.join(''));

  test(`any name passes the typesetter at its strictest (seed ${seed})`, () => {
    fc.assert(
      fc.property(names, (name) => void katex.renderToString(texName(name), strict)),
      { seed, numRuns: 1000 },
    );
  }, 30_000);

  test('every letter that a name may have passes it too', () => {
    for (let code = 0x41; code < 0x250; code++) {
      const letter = String.fromCodePoint(code);
      if (!isName(`a${letter}`)) continue;
      katex.renderToString(`${texName(letter)} + ${texName(`${letter}b_${letter}`)}`, strict);
    }
  });

  test(`two different names never have the same TeX (seed ${seed})`, () => {
    const seen = new Map<string, string>();
    fc.assert(
      fc.property(
        names.filter((name) => isName(name)),
        (name) => {
          const tex = texName(name);
          expect(seen.get(tex) ?? name).toBe(name);
          seen.set(tex, name);
        },
      ),
      { seed, numRuns: 5000 },
    );
  }, 30_000);

  test(`any text passes it as text (seed ${seed})`, () => {
    for (const text of ['50 % of {x}', 'a_b^c~d\\e', '$5 & #1', 'µ·Ω ± 2 ≤ 3 ½ √2 ⌀', 'naïve “ß” – ж 日 한', '😀 \u0301', 'a\nb'])
      katex.renderToString(texText(text), strict);
    fc.assert(
      fc.property(fc.string({ unit: 'binary', maxLength: 20 }), (text) => void katex.renderToString(texText(text), strict)),
      { seed, numRuns: 2000 },
    );
    fc.assert(
      fc.property(fc.string({ maxLength: 20 }), (text) => void katex.renderToString(`x + ${texText(text)}`, strict)),
      { seed, numRuns: 1000 },
    );
  }, 30_000);
});

describe('the nearest name', () => {
  const known = ['F_1', 'F_2', 'F_1min', 'F_u', 'sigma_max', 'sigma_allow', 'theta_1', 'mu_1', 'v', 'K_A', 'constructor'];
  test.each([
    ['F1', ['F_1']],
    ['f_1', ['F_1']],
    ['F_1mn', ['F_1min']],
    ['sigma_mx', ['sigma_max']],
    ['sigma_alow', ['sigma_allow']],
    ['thtea_1', ['theta_1']],
    ['k_a', ['K_A']],
    ['zzz', []],
    ['__proto__', []],
    ['', []],
    ['x'.repeat(1000), []],
  ])('to %j is %j', (typed, nearest) => {
    expect(nearestNames(typed, known).slice(0, nearest.length || 3)).toEqual(nearest);
  });

  test('a name is not near to itself, and at most three are given', () => {
    expect(nearestNames('F_1', known)).not.toContain('F_1');
    expect(nearestNames('F_3', ['F_1', 'F_2', 'F_4', 'F_5'])).toHaveLength(3);
  });

  test(`the distance is that of the plain definition (seed ${seed})`, () => {
    // Restricted distance by its recursion, without bands and rows.
    const plain = (a: string, b: string): number => {
      if (a === '' || b === '') return Math.max(a.length, b.length);
      const swap =
        a.length > 1 && b.length > 1 && a.at(-1) === b.at(-2) && a.at(-2) === b.at(-1)
          ? plain(a.slice(0, -2), b.slice(0, -2)) + 1
          : 99;
      return Math.min(
        plain(a.slice(0, -1), b) + 1,
        plain(a, b.slice(0, -1)) + 1,
        plain(a.slice(0, -1), b.slice(0, -1)) + (a.at(-1) === b.at(-1) ? 0 : 1),
        swap,
      );
    };
    const word = fc.string({ unit: fc.constantFrom('a', 'b', 'c'), minLength: 3, maxLength: 6 });
    fc.assert(
      fc.property(word, word, (a, b) => {
        const limit = a.length <= 5 ? 2 : 3;
        const near = a !== b && plain(a, b) <= limit && plain(a, b) * 2 <= Math.max(a.length, b.length);
        expect([a, b, nearestNames(a, [b])]).toEqual([a, b, near ? [b] : []]);
      }),
      { seed, numRuns: 300 },
    );
  }, 30_000);

  test('among 50 000 names the nearest is found, far within the two seconds that a wrong name may take', () => {
    const many = Array.from({ length: 50_000 }, (_, i) => `quantity_${i}`);
    const start = performance.now();
    expect(nearestNames('quantty_17', many)[0]).toBe('quantity_17');
    expect(performance.now() - start).toBeLessThan(2000);
  });
});
