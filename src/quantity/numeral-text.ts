// Reading of numerals as people type them.
//
// 1. A decimal sign is the one of the sheet; the other one is refused, never taken for a group sign (SI Brochure 5.4.4).
// 2. Digits are grouped in threes by a space of any width; commas, points, apostrophes and underscores do not group.
// 3. Every digit is kept, trailing zeros too. What a double cannot hold is refused.
// Not here: units and tolerances (value.ts), printing (print.ts).

import type { Numeral } from './numeral.ts';
import { doubleOfNumeral, isZeroNumeral, numeralOf } from './numeral.ts';
import type { Failure, Result } from './problem.ts';
import { done, fail, failWith, fixOf, quote } from './problem.ts';

export type DecimalSign = '.' | ',';

/** Spaces that people and programs put between digits, and between a number and its unit. */
export const spaces = '[ \\t\\u00A0\\u2002-\\u200A\\u202F\\u205F]';
const superscripts = '⁰¹²³⁴⁵⁶⁷⁸⁹';
const longest = 200;
const greatestExponent = 400;

const numberPattern = new RegExp(
  `([+\\-−–]?)${spaces}*` +
    `(?:(\\d+(?:${spaces}\\d{3}(?!\\d))*)` +
    `(?:([.,])(\\d{3}(?!\\d)(?:${spaces}\\d{3}(?!\\d))*(?:${spaces}\\d{1,2}(?!\\d|${spaces}*/))?|\\d*))?|([.,])(\\d+))`,
  'y',
);
const exponentPattern = new RegExp(
  `[eE]([+\\-−]?\\d+)|${spaces}*[×x*·⋅∙]${spaces}*10(?:\\^\\(?([+\\-−]?\\d+)\\)?|([⁺⁻]?[${superscripts}]+))`,
  'y',
);
const powerPattern = new RegExp(`\\^\\(?([+\\-−]?\\d+)\\)?|([⁺⁻]?[${superscripts}]+)`, 'y');
const runPattern = /[\d.,'’_]+/y;
const spacesPattern = new RegExp(spaces, 'g');

export interface Scanned {
  readonly numeral: Numeral;
  /** Where the numeral ends. */
  readonly to: number;
}

/** The numeral that begins at `from` (spaces skipped); undefined where none begins. */
export function scanNumeral(text: string, from: number, decimalSign: DecimalSign): Result<Scanned> | undefined {
  let start = from;
  while (start < text.length && isSpace(text.charCodeAt(start))) start++;
  numberPattern.lastIndex = start;
  const match = numberPattern.exec(text);
  if (!match) return undefined;
  const [matched, sign, grouped = '', mark = match[5], decimalsText = match[6] ?? ''] = match;
  let to = start + matched.length;
  const broken = brokenGroups(text, start, to, grouped, mark, decimalSign);
  if (broken) return broken;
  const whole = ungrouped(grouped);
  const decimals = ungrouped(decimalsText);
  if (mark !== undefined && decimals === '') {
    const fix = `${sign}${whole}`;
    return fail('number-form', `No digit follows the decimal sign of ${quote(matched)}: write ${fix}.`, start, to, [fix]);
  }
  let digits = `${whole}${decimals}`;
  let exponent = 0 - decimals.length;
  const power = scanPower(text, to, digits, exponent);
  if (power) {
    to = power.to;
    exponent += power.exponent;
    if (power.ofTen) digits = '1';
    if (Math.abs(power.exponent) > greatestExponent) return outOfRange(text, start, to, power.exponent > 0);
  }
  const numeral = numeralOf(sign !== '' && sign !== '+', digits, exponent);
  if (digits.length + Math.abs(exponent) > 15) {
    const value = doubleOfNumeral(numeral);
    if (!Number.isFinite(value)) return outOfRange(text, start, to, true);
    if (value === 0 && !isZeroNumeral(numeral)) return outOfRange(text, start, to, false);
  }
  return done({ numeral, to });
}

/** Reads a text that is a numeral and nothing else. */
export function readNumeral(text: string, decimalSign: DecimalSign): Result<Numeral> {
  const end = text.trimEnd().length;
  if (end > longest) return tooLong(text, 'number');
  if (end === 0) return fail('no-number', 'There is no number: write one, such as 1 500 or 15e3.', 0, text.length);
  const scanned = scanNumeral(text, 0, decimalSign);
  if (scanned === undefined) return noNumber(text, 0, end);
  if (!scanned.ok) return scanned;
  const { numeral, to } = scanned.value;
  if (to === end) return done(numeral);
  return fail(
    'number-form',
    `${quote(text.slice(to, end))} after the number is not understood: write the number alone.`,
    to,
    end,
  );
}

export function tooLong(text: string, what: string): Failure {
  return fail('text-too-long', `This ${what} has ${text.length} characters; ${longest} are the most.`, 0, text.length);
}
export const isTooLong = (text: string): boolean => text.length > longest;

const notFinite = /^[+\-−–]?\s*(?:∞|infinity\b|infinite\b|inf\b|nan\b)/i;

export function noNumber(text: string, from: number, to: number): Failure {
  const piece = text.slice(from, to);
  if (notFinite.test(piece)) {
    return fail('not-finite', `${quote(piece)} is not a number that can be computed with: write a finite number.`, from, to);
  }
  return fail('no-number', `${quote(piece)} does not begin with a number: write a number and its unit, such as 15 kW.`, from, to);
}

/** One of `spaces`. */
export function isSpace(code: number): boolean {
  return code === 32 || code === 9 || code === 0xa0 || (code >= 0x2002 && code <= 0x200a) || code === 0x202f || code === 0x205f;
}

const ungrouped = (digits: string): string => (/^\d*$/.test(digits) ? digits : digits.replace(spacesPattern, ''));

interface Power {
  readonly exponent: number;
  readonly to: number;
  /** The numeral was the 10 of "10³": the power of ten stands alone. */
  readonly ofTen: boolean;
}

function scanPower(text: string, from: number, digits: string, exponent: number): Power | undefined {
  exponentPattern.lastIndex = from;
  const match = exponentPattern.exec(text);
  if (match) {
    const value =
      match[3] === undefined ? Number((match[1] ?? match[2] ?? '').replace('−', '-')) : numberOfSuperscripts(match[3]);
    return { exponent: value, to: from + match[0].length, ofTen: false };
  }
  if (digits !== '10' || exponent !== 0) return undefined;
  powerPattern.lastIndex = from;
  const power = powerPattern.exec(text);
  if (!power) return undefined;
  const value = power[2] === undefined ? Number((power[1] ?? '').replace('−', '-')) : numberOfSuperscripts(power[2]);
  return { exponent: value, to: from + power[0].length, ofTen: true };
}

export function numberOfSuperscripts(text: string): number {
  let digits = '';
  for (const char of text) digits += char === '⁻' ? '-' : char === '⁺' ? '' : superscripts.indexOf(char);
  return Number(digits);
}

function outOfRange(text: string, from: number, to: number, large: boolean): Failure {
  const number = quote(text.slice(from, to));
  return large
    ? fail('number-too-large', `${number} is too large: numbers reach to about 1.8 × 10³⁰⁸.`, from, to)
    : fail('number-too-small', `${number} is too near to zero: numbers begin at about 5 × 10⁻³²⁴.`, from, to);
}

/** Whatever is wrong with decimal signs and groups at [from, to). */
function brokenGroups(
  text: string,
  from: number,
  to: number,
  grouped: string,
  mark: string | undefined,
  decimalSign: DecimalSign,
): Failure | undefined {
  const next = text[to];
  // 22°12'30" has an apostrophe between digits as well: it groups only before three of them.
  const apostrophe = (next === "'" || next === '’') && /^\d{3}(?!\d)/.test(text.slice(to + 1, to + 5));
  const goesOn = apostrophe || ((next === '.' || next === ',' || next === '_') && /\d/.test(text[to + 1] ?? ''));
  if (goesOn || (mark !== undefined && mark !== decimalSign)) return wrongSigns(text, from, decimalSign);
  const firstGroup = grouped.search(/\D/);
  if (firstGroup > 3) {
    const fix = ungrouped(grouped);
    const message = `The digits of ${quote(text.slice(from, to))} are not grouped in threes: write ${fix}.`;
    return fail('digit-groups', message, from, from + grouped.length, [fix]);
  }
  return undefined;
}

const nameOf = (sign: DecimalSign): string => (sign === '.' ? 'point' : 'comma');

/** A comma where the sheet has a point (or the reverse), or either as a group sign. */
function wrongSigns(text: string, from: number, decimalSign: DecimalSign): Failure {
  const start = from + (/^[+\-−–]?\s*/.exec(text.slice(from, from + 20))?.[0].length ?? 0);
  runPattern.lastIndex = start;
  const run = (runPattern.exec(text)?.[0] ?? '').replace(/[.,'’_]+$/, '');
  const end = start + run.length;
  const marks = run.match(/[.,'’_]/g) ?? [];
  const [only] = marks;
  const other = decimalSign === '.' ? ',' : '.';
  const swapped = run.replace(other, decimalSign);
  if (marks.length === 1 && only === other) {
    const setting = `or set the decimal sign of the sheet to a ${nameOf(other)}`;
    if (/^[1-9]\d{0,2}[.,]\d{3}$/.test(run)) {
      const group = run.replace(other, ' ');
      const message = `${quote(run)} could be ${group} or ${swapped}: this sheet writes a decimal ${nameOf(decimalSign)} and groups digits by a space. Write ${group} or ${swapped}.`;
      return fail('decimal-sign', message, start, end, [group, swapped]);
    }
    const message = `${quote(run)} has a decimal ${nameOf(other)}, but this sheet writes a decimal ${nameOf(decimalSign)}: write ${swapped}, ${setting}.`;
    return fail('decimal-sign', message, start, end, [swapped]);
  }
  // Several signs: the last one is the decimal sign if it stands once, everything before it groups.
  const last = marks[marks.length - 1] ?? '';
  const lastIsDecimal = (last === '.' || last === ',') && marks.filter((each) => each === last).length === 1 && marks.length > 1;
  const cut = lastIsDecimal ? run.lastIndexOf(last) : run.length;
  const whole = run.slice(0, cut).replace(/[.,'’_]/g, '');
  const spaced = whole.replace(/\B(?=(\d{3})+$)/g, ' ');
  const fix = `${spaced}${lastIsDecimal ? decimalSign + run.slice(cut + 1) : ''}`;
  const message = `The digits of ${quote(run)} are grouped by a sign that does not group: digits are grouped by a space, and the decimal sign of this sheet is a ${nameOf(decimalSign)}. Write ${fix}.`;
  return failWith('digit-groups', message, start, end, [fixOf(start, end, fix)]);
}
