// Values that are more than one number and one unit: angles and times in several units, and what looks like it.
//
// 1. Read are 22° 12′ 30″ and 2 d 4 h 30 min: units falling in size, whole numbers but for the last, each below one of the unit
//    before (SI Brochure 9th ed., 5.4.3 allows no other).
// 2. The sum is exact and stands in the greatest of its units in which it ends as a decimal, else in a smaller one.
// 3. Feet and inches, pounds and ounces are refused with the sum worked out.
// Not here: plain values and ± (value.ts).

import type { UnitSymbol } from './catalogue.ts';
import { symbolOfText } from './catalogue.ts';
import { equalD } from './dimension.ts';
import type { Exact } from './exact.ts';
import { divideE, exactOf, multiplyE } from './exact.ts';
import type { Numeral } from './numeral.ts';
import { exactOfNumeral, numeralOf, plainNumeral } from './numeral.ts';
import { isSpace, scanNumeral } from './numeral-text.ts';
import type { Style } from './print.ts';
import type { Failure, Result } from './problem.ts';
import { done, fail, quote } from './problem.ts';
import type { Unit } from './unit.ts';
import { unitOf } from './unit-text.ts';

const angles = ['°', '′', '″'];
const times = ['d', 'h', 'min', 's'];
const marks: ReadonlyMap<string, string> = new Map([
  ["'", '′'],
  ['’', '′'],
  ['´', '′'],
  ['"', '″'],
  ['”', '″'],
  ["''", '″'],
  ['′′', '″'],
]);
const word = /[^\s\d]+/y;

interface Part {
  readonly numeral: Numeral;
  readonly symbol: UnitSymbol;
  readonly from: number;
}

function skipSpaces(text: string, from: number): number {
  let at = from;
  while (at < text.length && isSpace(text.charCodeAt(at))) at++;
  return at;
}

/** The unit word at `at`, if a further number follows it or (behind the first) the text ends there. */
function wordAt(text: string, at: number, first: boolean, afterAngle: boolean): { symbol: UnitSymbol; to: number } | undefined {
  word.lastIndex = at;
  const typed = word.exec(text)?.[0];
  if (typed === undefined) return undefined;
  const to = at + typed.length;
  const symbol = symbolOfText((afterAngle ? marks.get(typed) : undefined) ?? typed.replace('\u00BA', '°'));
  const next = skipSpaces(text, to);
  if (!symbol || (first && !/\d/.test(text[next] ?? ''))) return undefined;
  // "mm2" is a power, "h30" is not.
  if (first && next === to && !angles.includes(symbol.text) && !times.includes(symbol.text)) return undefined;
  return { symbol, to };
}

/** The compound value whose first numeral was read and whose first unit begins at `at`; undefined where there is none. */
export function compoundAt(
  text: string,
  from: number,
  numeral: Numeral,
  at: number,
  style: Style,
): Result<{ numeral: Numeral; unit: Unit }> | undefined {
  const first = wordAt(text, at, true, false);
  if (!first) return undefined;
  const parts: Part[] = [{ numeral, symbol: first.symbol, from }];
  let next = skipSpaces(text, first.to);
  while (next < text.length) {
    const scanned = scanNumeral(text, next, style.decimalSign);
    if (scanned === undefined) return undefined;
    if (!scanned.ok) return scanned;
    const unitAt = skipSpaces(text, scanned.value.to);
    const found = wordAt(text, unitAt, false, angles.includes(first.symbol.text));
    if (!found) return unitMissing(text, from, next);
    parts.push({ numeral: scanned.value.numeral, symbol: found.symbol, from: next });
    next = skipSpaces(text, found.to);
  }
  return summed(text, parts);
}

function unitMissing(text: string, from: number, next: number): Failure {
  const message = `${quote(text.slice(from))} has a second number without a unit that fits: write 22° 12′, 1 h 30 min, or one number and one unit.`;
  return fail('value-form', message, next, text.length);
}

function summed(text: string, parts: readonly Part[]): Result<{ numeral: Numeral; unit: Unit }> {
  const from = parts[0]?.from ?? 0;
  const typed = quote(text.slice(from));
  const symbols = parts.map(({ symbol }) => symbol);
  const smallest = symbols[symbols.length - 1] as UnitSymbol;
  const unlike = symbols.find((symbol) => !equalD(symbol.dimension, smallest.dimension));
  if (unlike) {
    return fail(
      'value-form',
      `${typed} joins ${unlike.text} and ${smallest.text}, which are not alike: write one number and one unit.`,
      from,
      text.length,
    );
  }
  const sum = sumIn(parts, smallest);
  const chain = [angles, times].find((each) => symbols.every(({ text: symbol }) => each.includes(symbol)));
  if (!chain) {
    const total = decimalOf(sum);
    const fix = total ? `${plainNumeral(total)} ${smallest.text}` : '';
    const advice = fix === '' ? '' : `: write ${fix}`;
    return fail(
      'mixed-units',
      `A value has one unit; only angles and times are read in several, not ${typed}${advice}.`,
      from,
      text.length,
      fix === '' ? [] : [fix],
    );
  }
  for (const [place, part] of parts.entries()) {
    const before = parts[place - 1];
    if (before && chain.indexOf(before.symbol.text) >= chain.indexOf(part.symbol.text)) {
      return fail(
        'compound-order',
        `The units of ${typed} do not fall in size: write them from the greatest to the smallest.`,
        part.from,
        text.length,
      );
    }
    if (place < parts.length - 1 && part.numeral.exponent < 0) {
      return fail('compound-order', `Only the last number of ${typed} can have decimals.`, part.from, text.length);
    }
    if (before && (part.numeral.negative || !below(part, before))) {
      const message = `In ${typed}, ${plainNumeral(part.numeral)} ${part.symbol.text} is not less than one ${before.symbol.text}: carry it over.`;
      return fail('compound-order', message, part.from, text.length);
    }
  }
  for (const symbol of symbols) {
    const numeral = decimalOf(multiplyE(sum, divideE(smallest.factor, symbol.factor)));
    if (numeral) return done({ numeral, unit: unitOf(symbol.text) });
  }
  return fail('value-form', `${typed} does not come out as a decimal: write it in ${smallest.text}.`, from, text.length);
}

/** The sum of all parts in one unit; the sign of the first holds for all. */
function sumIn(parts: readonly Part[], smallest: UnitSymbol): Exact {
  let [n, d] = [0n, 1n];
  for (const { numeral, symbol } of parts) {
    const part = multiplyE(exactOfNumeral({ ...numeral, negative: false }), divideE(symbol.factor, smallest.factor));
    [n, d] = [n * part.d + part.n * d, d * part.d];
  }
  return exactOf(parts[0]?.numeral.negative ? -n : n, d);
}

/** Less than one of the unit before. */
function below(part: Part, before: Part): boolean {
  const value = multiplyE(exactOfNumeral(part.numeral), divideE(part.symbol.factor, before.symbol.factor));
  return value.n < value.d;
}

/** A rational number as a decimal, where it ends within 30 places. */
function decimalOf({ n, d }: Exact): Numeral | undefined {
  let [digits, divisor, exponent] = [n, d, 0];
  while (divisor !== 1n && exponent > -30) {
    digits *= 10n;
    exponent--;
    if (digits % divisor === 0n) {
      digits /= divisor;
      divisor = 1n;
    }
  }
  if (divisor !== 1n) return undefined;
  return numeralOf(digits < 0n, String(digits < 0n ? -digits : digits), exponent);
}

const fraction = /^(?:(\d+)\s+)?(\d+)\s*\/\s*(\d+)(?![\d.,])\s*(.*)$/;

/** What follows a number and is no unit, where a better answer than "unknown unit" can be given. */
export function afterNumber(text: string, from: number, at: number, style: Style): Failure | undefined {
  const rest = text.slice(at);
  const typed = quote(text.slice(from));
  const end = text.length;
  if (/^\(\s*\d+\s*\)/.test(rest)) {
    return fail(
      'value-form',
      `${typed} gives a standard uncertainty in parentheses; a half-width is written as 0.30 ± 0.05.`,
      at,
      end,
    );
  }
  const parts = fraction.exec(text.slice(from).trim());
  if (parts && (rest.startsWith('/') || /^\d/.test(rest))) return fractionFailure(parts, typed, from, end, style);
  if (/^(?:to\b|\.\.|…|[–-]\s*\d)/i.test(rest)) {
    return fail('value-form', `${typed} is a range, and a value is one number: write it as 15 kW or (15 ± 2) kW.`, from, end);
  }
  if (/^\+|\s\+\s*[\d.,]/.test(rest)) {
    return fail(
      'value-form',
      `${typed} has limits that are not written with ±: write the middle value ± half the width, such as (15 ± 2) kW.`,
      at,
      end,
    );
  }
  if (/^[eE][+\-−]?\d/.test(rest)) {
    const fix = `${text.slice(from, at).trimEnd()}${rest}`;
    return fail('number-form', `The exponent of ${typed} follows the number without a space: write ${fix.trim()}.`, from, end, [
      fix,
    ]);
  }
  if (/^\//.test(rest)) {
    const fix = ` 1${rest}`;
    return fail(
      'value-form',
      `A unit such as ${quote(rest)} begins with 1: write ${quote(`${text.slice(from, at)}${fix}`)}.`,
      at,
      end,
      [fix],
    );
  }
  if (/^\d/.test(rest)) {
    return fail(
      'digit-groups',
      `${typed} has a space between digits that are not grouped in threes: write the number without it.`,
      from,
      end,
    );
  }
  if (/^[*·×^=]/.test(rest)) {
    return fail(
      'value-form',
      `${typed} is a formula, and a value is one number and its unit: compute in a derived quantity.`,
      at,
      end,
    );
  }
  return undefined;
}

function fractionFailure(parts: RegExpExecArray, typed: string, from: number, end: number, style: Style): Failure {
  const [, whole = '0', above = '0', below = '1', unit = ''] = parts;
  const value =
    Number(below) === 0 ? undefined : decimalOf(exactOf(BigInt(whole) * BigInt(below) + BigInt(above), BigInt(below)));
  const decimal = value && plainNumeral(value).replace('.', style.decimalSign);
  const fix = decimal === undefined ? '' : `${decimal}${unit === '' ? '' : ` ${unit}`}`;
  const message = `${typed} holds a fraction, and a value is one decimal number: ${fix === '' ? 'write it as a decimal' : `write ${fix}`}.`;
  return fail('value-form', message, from, end, fix === '' ? [] : [fix]);
}
