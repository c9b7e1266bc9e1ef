// Texts made to break things end in one clear problem, quickly.

import fc from 'fast-check';
import { describe, expect, test, vi } from 'vitest';
import { nearestUnits, type Problem, readNumeral, readRange, readUnit, readValue } from '../../src/quantity/index.ts';

// Thousands of random cases: on a busy machine more than the usual five seconds.
vi.setConfig({ testTimeout: 60_000 });

const megabyte = 1_000_000;
const hostile: readonly [string, string][] = [
  ['a megabyte of letters', 'm'.repeat(megabyte)],
  ['a megabyte of digits', '9'.repeat(megabyte)],
  ['a megabyte of spaces', ' '.repeat(megabyte)],
  ['a megabyte of groups', '1 000'.repeat(megabyte / 5)],
  ['10^5 open parentheses', '('.repeat(100_000)],
  ['10^5 closed parentheses', ')'.repeat(100_000)],
  ['nested parentheses', `${'('.repeat(100_000)}m${')'.repeat(100_000)}`],
  ['ninety nested parentheses', `${'('.repeat(45)}m${')'.repeat(45)}`],
  ['many solidi', 'm/'.repeat(49)],
  ['many products', 'm·'.repeat(49)],
  ['nested powers', '((((((m^12)^12)^12)^12)^12)^12)'],
  ['a great exponent', 'm^999999999999'],
  ['an exponent of digits', `m${'⁹'.repeat(90)}`],
  ['a great power of ten', '1e999999999'],
  ['a deep power of ten', '1e-999999999'],
  ['zero with a great power', '0e999999999'],
  ['a power in words', '1 × 10^999999999'],
  ['commas', '1,'.repeat(90)],
  ['points', '1.'.repeat(90)],
  ['plus minus', '±'.repeat(100)],
  ['many ±', '1 ± 1 '.repeat(25)],
  ['minus signs', '-'.repeat(190)],
  ['degrees', '1° '.repeat(60)],
  ['primes', "1'".repeat(90)],
  ['a null', '15 \u0000kW'],
  ['a line end', '15\nkW\nkW'],
  ['right-to-left marks', '15 \u202EkW'],
  ['a lone surrogate', '15 \uD800'],
  ['combining marks', `15 k${'\u0301'.repeat(100)}W`],
  ['an emoji', '15 🙂'],
  ['markup', '15 <img src=x onerror=alert(1)>'],
  ['other digits', '１５ kW'],
  ['letters of another script that look alike', '15 кW'],
  ...['constructor', '__proto__', 'toString', 'hasOwnProperty', 'valueOf', 'prototype', '__defineGetter__'].map(
    (name): [string, string] => [`the name ${name}`, name],
  ),
];

/** What is wrong with a problem: its sentence, or where it points. */
function defects({ message, at, fixes = [] }: Problem, typed: string): string[] {
  const found: string[] = [];
  if (message.length <= 10 || message.length >= 400) found.push(`${message.length} characters: ${message.slice(0, 400)}`);
  if (/[\n\r\u0000]/.test(message) || !message.endsWith('.')) found.push(`no sentence of one line: ${message}`);
  for (const [from, to] of [at ?? [0, 0], ...fixes.map((fix) => [fix.from, fix.to] as const)]) {
    if (!(0 <= from && from <= to && to <= typed.length)) found.push(`points to ${from} to ${to}: ${message}`);
  }
  return found;
}
const expectClear = (problem: Problem, typed: string): void => expect(defects(problem, typed)).toEqual([]);

describe('hostile texts', () => {
  test.each(hostile)('%s', (_name, text) => {
    const before = performance.now();
    for (const decimalSign of ['.', ','] as const) {
      for (const typed of [text, `15 ${text}`, `15 kW ± ${text}`]) {
        const value = readValue(typed, { decimalSign });
        if (!value.ok) expectClear(value.problem, typed);
        const range = readRange(typed, { decimalSign });
        if (!range.ok) expectClear(range.problem, typed);
      }
      const numeral = readNumeral(text, decimalSign);
      if (!numeral.ok) expectClear(numeral.problem, text);
    }
    const unit = readUnit(text);
    if (!unit.ok) expectClear(unit.problem, text);
    nearestUnits(text);
    // Two seconds are the promise for a whole sheet; one text takes far less.
    expect(performance.now() - before).toBeLessThan(1000);
  });

  test('none of them is a value, a unit or a unit of a value', () => {
    const accepted = hostile
      .filter(([, text]) => readValue(text, { decimalSign: '.' }).ok || readUnit(text).ok)
      .map(([name]) => name);
    expect(accepted).toEqual([]);
  });

  test('random texts never throw, and every problem points into the text', () => {
    const pieces = fc.constantFrom(
      ...[
        '1',
        '5',
        '000',
        '.',
        ',',
        ' ',
        '\u00A0',
        'e',
        'E5',
        '-',
        '−',
        '+',
        '±',
        '(',
        ')',
        '/',
        '·',
        '*',
        '^',
        '²',
        '⁻',
        '%',
        '°',
        '′',
        "'",
        '"',
        'k',
        'µ',
        'N',
        'm',
        'kW',
        'lb',
        'in',
        'min',
        'h',
        'to',
        '10',
        '×',
        'K',
        'C',
        '_',
        'el',
        '😀',
        '\n',
      ],
    );
    const text = fc.array(pieces, { maxLength: 14 }).map((each) => each.join(''));
    fc.assert(
      fc.property(
        fc.oneof(text, fc.string({ maxLength: 30 }), fc.string({ unit: 'binary', maxLength: 20 })),
        fc.constantFrom('.', ','),
        (typed, decimalSign) => {
          const results = [
            readValue(typed, { decimalSign }),
            readUnit(typed),
            readNumeral(typed, decimalSign),
            readRange(typed, { decimalSign }),
          ];
          const wrong = results.flatMap((result) => (result.ok ? [] : defects(result.problem, typed)));
          if (wrong.length > 0) throw new Error(wrong.join('; '));
          nearestUnits(typed);
        },
      ),
      { seed: 99, numRuns: 4000, verbose: 1 },
    );
  });
});
