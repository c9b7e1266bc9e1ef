// The scan of a JSON text against the reader of the language: they agree on what is JSON, whatever is done to a text.

import { readdirSync, readFileSync } from 'node:fs';
import fc from 'fast-check';
import { describe, expect, it } from 'vitest';
import { readSheet } from '../../src/sheet/file.ts';
import { scanJson } from '../../src/sheet/json-text.ts';

const folder = new URL('./golden/', import.meta.url);
const golden = readdirSync(folder).map((name) => readFileSync(new URL(name, folder), 'utf8'));

function isJson(text: string): boolean {
  try {
    JSON.parse(text);
    return true;
  } catch {
    return false;
  }
}
const isSyntax = (text: string): boolean => scanJson(text).some((fault) => fault.code === 'syntax');

const bits = [
  '"',
  '\\',
  '{',
  '}',
  '[',
  ']',
  ',',
  ':',
  '0',
  '-',
  '.',
  'e',
  'null',
  'tru',
  ' ',
  '\n',
  '\t',
  '\u0000',
  'é',
  '🧮',
  '\ud83e',
  '\\u12',
  '//',
  "'",
  '1e5',
  'NaN',
];
/** A golden file with a few places cut out, put in or exchanged. */
const damaged = fc
  .tuple(
    fc.constantFrom(...golden),
    fc.array(fc.record({ at: fc.double({ min: 0, max: 1, noNaN: true }), cut: fc.nat(3), put: fc.constantFrom('', ...bits) }), {
      minLength: 1,
      maxLength: 4,
    }),
  )
  .map(([text, edits]) =>
    edits.reduce(
      (now, { at, cut, put }) => now.slice(0, Math.floor(at * now.length)) + put + now.slice(Math.floor(at * now.length) + cut),
      text,
    ),
  );

describe('scan of a JSON text', () => {
  it.each([
    '0',
    '-0',
    '-',
    '01',
    '1.',
    '.5',
    '1e',
    '1e+',
    '1E-5',
    '-1.5e+10',
    '+1',
    '0x1',
    'NaN',
    'Infinity',
    'true',
    'True',
    'nulll',
    '""',
    '"\\u12"',
    '"\\u12aF"',
    '"\\a"',
    '"\t"',
    '"\\t"',
    '[]',
    '[,]',
    '[1,]',
    '[1 2]',
    '[1]]',
    '{}',
    '{,}',
    '{"a":}',
    '{"a":1,}',
    '{"a" 1}',
    '{a:1}',
    '{"a":1 "b":2}',
    ' 1 ',
    '\u00a01',
    '1\u2028',
    '',
    ' ',
    '"\u2028"',
    '"\\ud800"',
    '1 // x',
    '[[[]]]',
    '{"a":[{"b":null}]}',
  ])('agrees with the language on %j', (text) => {
    expect(isSyntax(text)).toBe(!isJson(text));
  });

  it('agrees with the language on any JSON and on any damaged sheet', () => {
    fc.assert(
      fc.property(
        fc.oneof(
          { weight: 1, arbitrary: fc.json() },
          { weight: 3, arbitrary: damaged },
          { weight: 1, arbitrary: fc.string({ unit: fc.constantFrom(...bits), maxLength: 12 }) },
        ),
        (text) => {
          expect(isSyntax(text)).toBe(!isJson(text));
        },
      ),
      { seed: 20261202, numRuns: 2000 },
    );
  }, 60_000);

  it('ends any damaged sheet in sentences of one line with a stable code', () => {
    fc.assert(
      fc.property(damaged, (text) => {
        const read = readSheet(text);
        if (read.ok) return;
        expect(read.problems.length).toBeGreaterThan(0);
        expect(read.problems.length).toBeLessThanOrEqual(21);
        for (const { code, message } of read.problems) {
          expect(code).toMatch(/^[a-z]+(-[a-z]+)*$/);
          expect(message).toMatch(/^[^\n\r\p{Surrogate}]{10,400}$/u);
        }
      }),
      { seed: 20261203, numRuns: 1000 },
    );
  }, 60_000);
});
