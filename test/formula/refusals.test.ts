// Refused formulas: the whole sentence, the marked place and what each fix writes, word for word; and that any text at
// all ends in a tree or in one sentence.

import fc from 'fast-check';
import { describe, expect, test } from 'vitest';
import { parseFormula, tokenize } from '../../src/formula/index.ts';
import { grammarRefusals } from './refusals.grammar.ts';
import { signRefusals } from './refusals.signs.ts';

interface Refused {
  readonly typed: string;
  readonly told: string;
  readonly fixed: readonly string[];
}

function read(table: string): readonly (readonly [group: string, rows: readonly Refused[]])[] {
  return table
    .trim()
    .split(/^## /m)
    .slice(1)
    .map((group) => {
      const lines = group.split('\n').filter((line) => line !== '');
      const rows: { typed: string; told: string; fixed: string[] }[] = [];
      for (const line of lines.slice(1)) {
        if (line.startsWith('  = ')) rows.at(-1)?.fixed.push(line.slice(4));
        else if (line.startsWith('  ')) (rows.at(-1) as Refused & { told: string }).told = line.slice(2);
        else rows.push({ typed: line, told: '', fixed: [] });
      }
      return [lines[0] as string, rows];
    });
}

function refused(text: string, decimalSign: '.' | ',' = '.'): { readonly told: string; readonly fixed: readonly string[] } {
  const result = parseFormula(text, { decimalSign });
  if (result.ok) return { told: 'read', fixed: [] };
  const { code, message, at, fixes, severity } = result.problem;
  expect(severity).toBe('error');
  return {
    told: `${code} «${text.slice(...(at ?? [0, 0]))}» ${message}`,
    fixed: (fixes ?? []).map((fix) => text.slice(0, fix.from) + fix.text + text.slice(fix.to)),
  };
}

describe.each([...read(grammarRefusals), ...read(signRefusals)])('%s', (_group, rows) => {
  test.each(rows.map((row) => [row.typed, row] as const))('%j is refused', (typed, row) => {
    expect(refused(typed)).toEqual({ told: row.told, fixed: row.fixed });
  });
});

test('the tables hold more than 150 refusals', () => {
  const rows = [...read(grammarRefusals), ...read(signRefusals)].flatMap(([, group]) => group);
  expect(new Set(rows.map((row) => row.typed)).size).toBe(rows.length);
  expect(rows.length).toBeGreaterThan(150);
});

describe('what cannot be seen in a table', () => {
  test.each([
    ['', 'formula-empty «» The formula is empty: write the right-hand side, such as F_1 - F_2.', []],
    [' \t ', 'formula-empty « \t » The formula is empty: write the right-hand side, such as F_1 - F_2.', []],
    ['a\u200bb', 'invisible-character «\u200b» An invisible character (U+200B) stands here: delete it.', ['ab']],
    ['\ufeffa', 'invisible-character «\ufeff» An invisible character (U+FEFF) stands here: delete it.', ['a']],
    ['a\u202eb', 'invisible-character «\u202e» An invisible character (U+202E) stands here: delete it.', ['ab']],
    ['a\u0000', 'invisible-character «\u0000» An invisible character (U+0000) stands here: delete it.', ['a']],
    [
      '1\u202f500',
      'digits-apart «1\u202f500» “1 500” reads as two numbers: in a formula digits stand together, write 1500.',
      ['1500'],
    ],
    ['a\nb', 'line-break «a\nb» “a b” is broken over two lines without an operator: write one formula on one line.', []],
    [
      'a\ud800',
      'unknown-sign «\ud800» U+D800 is not part of formulas: use + - * / ^, parentheses, names, numbers and quantities in quotation marks.',
      [],
    ],
  ])('%j', (typed, told, fixed) => {
    expect(refused(typed)).toEqual({ told, fixed });
  });
});

describe('a sheet with a decimal comma', () => {
  test.each([
    [
      '1,5',
      'decimal-comma «1,5» “1,5”: in a formula the decimal sign is a point, unlike in the values of this sheet; write 1.5.',
      ['1.5'],
    ],
    [
      '1.5 %',
      'percent-in-formula «1.5 %» “1.5 %”: % belongs to values, not to formulas; write "1,5 %" in quotation marks, or make it a given.',
      ['"1,5 %"'],
    ],
    ['0.5°', 'degree-sign «0.5°» “0.5°”: a quantity inside a formula stands in quotation marks; write "0,5 deg".', ['"0,5 deg"']],
    [
      '2.5 in',
      'unit-in-formula «2.5 in» “2.5 in”: a quantity inside a formula stands in quotation marks; write "2,5 in".',
      ['"2,5 in"'],
    ],
    [
      '2.5 "m"',
      'number-outside-quotes «2.5 "m"» “2.5 "m"”: the number of a quoted quantity stands inside the quotation marks; write "2,5 m".',
      ['"2,5 m"'],
    ],
  ])('%j is told in its own sign', (typed, told, fixed) => {
    expect(refused(typed, ',')).toEqual({ told, fixed });
  });
});

describe('every fix leads somewhere', () => {
  const rows = [...read(grammarRefusals), ...read(signRefusals)].flatMap(([, group]) => group);
  // These fix one of several troubles; the next sentence is about the rest.
  const halfway = new Set(['pow(f(x), 2)', 'log()']);
  test('what a fix writes is read, but for two formulas with more than one trouble', () => {
    for (const { typed, fixed } of rows) {
      for (const text of fixed) {
        if (!halfway.has(typed)) expect([typed, text, refused(text).told]).toEqual([typed, text, 'read']);
      }
    }
  });
});

describe('any text', () => {
  const pieces = [
    ...'abeFxμθπ',
    'F_1',
    'theta_1',
    'sin',
    'sqrt',
    'max',
    'log',
    'pow',
    'entry',
    'interpolate',
    'pi',
    'e',
    'not',
    'and',
    'or',
    'in',
    'to',
    'mod',
    'true',
    'NaN',
    'constructor',
    '__proto__',
    `x${'y'.repeat(300)}`,
    `1${'0'.repeat(250)}`,
    `"${'long '.repeat(60)}"`,
    '0',
    '1',
    '2.5',
    '.5',
    '1e3',
    '1e',
    '1,5',
    '+',
    '-',
    '−',
    '*',
    '·',
    '/',
    '^',
    '²',
    '⁻¹',
    '(',
    ')',
    '[',
    ']',
    '{',
    '}',
    ',',
    ';',
    '?',
    ':',
    '<',
    '<=',
    '≤',
    '==',
    '!=',
    '=',
    '%',
    '!',
    "'",
    '"',
    '“',
    '”',
    '"5 m"',
    '°',
    '′',
    '√',
    '|',
    '&',
    '~',
    '#',
    '\\',
    '.',
    '@',
    '\n',
    ' ',
    '\u00a0',
    '\u200b',
    '\ud800',
    '😀',
    'ж',
    'а',
    'ạ',
    '½',
    '\u0301',
  ];
  const text = fc.oneof(
    { weight: 3, arbitrary: fc.array(fc.constantFrom(...pieces), { maxLength: 30 }).map((all) => all.join('')) },
    { weight: 1, arbitrary: fc.array(fc.constantFrom(...pieces), { maxLength: 30 }).map((all) => all.join(' ')) },
    { weight: 1, arbitrary: fc.string({ unit: 'binary', maxLength: 60 }) },
  );
  const seed = 20_261_201;

  test(`ends in a tree or in one sentence with its place (seed ${seed})`, () => {
    fc.assert(
      fc.property(text, (typed) => {
        const result = parseFormula(typed);
        if (result.ok) return;
        const { message, at, fixes, code } = result.problem;
        expect(code).toMatch(/^[a-z]+(-[a-z]+)*$/);
        expect(message).toMatch(/^\S[^\n\r]*\.$/);
        expect(message.length).toBeLessThan(360);
        expect(message).not.toMatch(/undefined is|\[object|null is/);
        const [from, to] = at as readonly [number, number];
        expect(from >= 0 && from <= to && to <= typed.length).toBe(true);
        for (const fix of fixes ?? []) {
          expect(fix.from >= 0 && fix.from <= fix.to && fix.to <= typed.length).toBe(true);
          expect(fix.label).not.toBe('');
          expect(typed.slice(fix.from, fix.to)).not.toBe(fix.text);
        }
      }),
      { seed, numRuns: 5000 },
    );
  }, 30_000);

  test(`has tokens in order, with the text between them white (seed ${seed})`, () => {
    fc.assert(
      fc.property(text, (typed) => {
        let end = 0;
        const gaps: string[] = [];
        for (const token of tokenize(typed)) {
          if (token.from < end || (token.to <= token.from && token.text !== '^'))
            throw new Error(`${token.text} stands at ${token.from}`);
          gaps.push(typed.slice(end, token.from));
          end = token.to;
        }
        expect([...gaps, typed.slice(end)].join('')).toMatch(/^\s*$/);
      }),
      { seed, numRuns: 5000 },
    );
  }, 30_000);
});
