// What a given holds: a number, its unit and, with ±, a half-width.
//
// 1. The numeral keeps every digit as typed; `si` is converted exactly and rounded once.
// 2. A half-width has the unit that stands with it, or else the unit of the value; in % it is relative. That of a reading is a
//    difference: 20 °C ± 2 °C and 20 °C ± 2 K mean the same. Its `si` is greater than 0.
// 3. Angles and times may be compound (22° 12′, 1 h 30 min): the numeral is then exact, in the greatest of the units in which
//    it ends, else in the smallest.
// 4. Every refusal names the place and what to write.
// Not here: numerals (numeral-text.ts), units (unit-grammar.ts), compound values (value-compound.ts), printing (print-value.ts).

import { siOfNumeral } from './convert.ts';
import { equalD } from './dimension.ts';
import { doubleOf, multiplyE } from './exact.ts';
import { describeUnit, kindName, withArticle } from './kind.ts';
import type { Numeral } from './numeral.ts';
import { exactOfNumeral, isZeroNumeral } from './numeral.ts';
import { isSpace, isTooLong, noNumber, scanNumeral, tooLong } from './numeral-text.ts';
import type { Style } from './print.ts';
import type { Failure, Result } from './problem.ts';
import { done, fail, quote, shifted } from './problem.ts';
import { equalR } from './rational.ts';
import type { Unit } from './unit.ts';
import { differenceUnit, isRatioUnit, one } from './unit.ts';
import { readUnit } from './unit-text.ts';
import { afterNumber, compoundAt } from './value-compound.ts';

export interface Tolerance {
  readonly numeral: Numeral;
  readonly unit: Unit;
  readonly relative: boolean;
  /** Half-width in SI, greater than 0; kelvin for a reading. */
  readonly si: number;
  readonly typed: string;
}

export interface Value {
  readonly text: string;
  readonly numeral: Numeral;
  readonly unit: Unit;
  readonly si: number;
  readonly tolerance?: Tolerance;
}

const plusMinus = /±|\+\s?\/?\s?[-−–]/;

/** Reads a value; spans of problems count in `text`. Never throws. */
export function readValue(text: string, options: Style): Result<Value> {
  if (isTooLong(text)) return tooLong(text, 'value');
  const end = text.trimEnd().length;
  if (end === 0) return fail('empty-value', 'There is no value: write a number and its unit, such as 15 kW.', 0, text.length);
  const sign = plusMinus.exec(text);
  if (!sign) {
    const plain = readPlain(text, 0, end, options);
    if (!plain.ok) return plain;
    return madeOf(text, plain.value, 0, end);
  }
  return readWithTolerance(text, sign.index, sign.index + sign[0].length, end, options);
}

interface Plain {
  readonly numeral: Numeral;
  readonly unit: Unit;
  /** A unit was written. */
  readonly united: boolean;
}

/** A number and its unit, or a compound angle or time, at [from, to) of the text. */
function readPlain(text: string, from: number, to: number, style: Style): Result<Plain> {
  const part = to === text.length ? text : text.slice(0, to);
  const scanned = scanNumeral(part, from, style.decimalSign);
  if (scanned === undefined) return noNumber(part, from + (part.slice(from).length - part.slice(from).trimStart().length), to);
  if (!scanned.ok) return scanned;
  const { numeral } = scanned.value;
  let at = scanned.value.to;
  while (at < to && isSpace(part.charCodeAt(at))) at++;
  if (at >= to) return done({ numeral, unit: one, united: false });
  const rest = at === 0 ? part : part.slice(at);
  const known = readUnit(rest);
  if (known.ok) {
    if (known.value !== one) return done({ numeral, unit: known.value, united: true });
    return fail('digit-groups', `After the number, ${quote(rest)} is neither a unit nor a group of three digits.`, at, to);
  }
  const compound = compoundAt(part, from, numeral, at, style);
  if (compound) return compound.ok ? done({ ...compound.value, united: true }) : compound;
  return afterNumber(part, from, at, style) ?? shifted(known, at);
}

function madeOf(text: string, { numeral, unit }: Plain, from: number, to: number, tolerance?: Tolerance): Result<Value> {
  const si = siOfNumeral(numeral, unit);
  if (!Number.isFinite(si))
    return fail('number-too-large', `${quote(text)} is too large to be computed with in SI units.`, from, to);
  if (si === 0 && !unit.reading && !isZeroNumeral(numeral)) {
    return fail('number-too-small', `${quote(text)} is too near to zero to be computed with in SI units.`, from, to);
  }
  if (unit.reading && si < 0) {
    return fail('below-absolute-zero', `${quote(text)} lies below absolute zero, which is −273.15 °C or −459.67 °F.`, from, to);
  }
  return done(tolerance ? { text, numeral, unit, si, tolerance } : { text, numeral, unit, si });
}

/** The two sides of ±, and the unit behind a parenthesis: "(0.30 ± 0.05) m". */
function readWithTolerance(text: string, signFrom: number, signTo: number, end: number, style: Style): Result<Value> {
  const open = /^\s*\(/.exec(text);
  let [leftFrom, rightTo] = [0, end];
  let common: Unit | undefined;
  if (open) {
    leftFrom = open[0].length;
    rightTo = text.lastIndexOf(')', end);
    if (rightTo < signTo)
      return fail(
        'value-form',
        `The parenthesis of ${quote(text)} is not closed: write (0.30 ± 0.05) m.`,
        leftFrom - 1,
        leftFrom,
      );
    const unit = readUnit(text.slice(rightTo + 1, end));
    if (!unit.ok) return shifted(unit, rightTo + 1);
    common = unit.value;
  }
  if (text.slice(0, signFrom).trim() === (open ? '(' : '')) {
    return fail('no-number', `No value stands before the sign ± of ${quote(text)}: write one, such as 15 kW ± 5 %.`, 0, signTo);
  }
  if (text.slice(signTo, rightTo).trim() === '') {
    return fail('no-number', `No half-width follows the sign ±: write one, such as ± 5 % or ± 0.5 kW.`, signFrom, signTo);
  }
  const left = readPlain(text, leftFrom, text.slice(0, signFrom).trimEnd().length, style);
  if (!left.ok) return left;
  const rightEnd = text.slice(0, rightTo).trimEnd().length;
  const rightFrom = signTo + (text.slice(signTo, rightEnd).length - text.slice(signTo, rightEnd).trimStart().length);
  const right = readPlain(text, rightFrom, rightEnd, style);
  if (!right.ok) return right;
  if (open && (left.value.united || right.value.united)) {
    const message = 'A unit stands inside the parentheses: write (0.30 ± 0.05) m or 0.30 m ± 0.05 m.';
    return fail('value-form', message, leftFrom, rightTo);
  }
  return joined(text, {
    left: left.value,
    right: right.value,
    common,
    typed: text.slice(rightFrom, rightEnd),
    from: rightFrom,
    to: rightEnd,
    end,
  });
}

interface Sides {
  readonly left: Plain;
  readonly right: Plain;
  readonly common: Unit | undefined;
  readonly typed: string;
  readonly from: number;
  readonly to: number;
  readonly end: number;
}

function joined(text: string, { left, right, common, typed, from, to, end }: Sides): Result<Value> {
  const { numeral } = right;
  if (numeral.negative || isZeroNumeral(numeral)) {
    return fail(
      'tolerance-sign',
      `The half-width after ± must be greater than 0, not ${quote(typed)}: leave ± out, or write a positive one.`,
      from,
      to,
    );
  }
  const relative = common === undefined && isRatioUnit(right.unit) && !isRatioUnit(left.unit);
  if (common === undefined && isRatioUnit(left.unit) && (isRatioUnit(right.unit) || !right.united)) {
    const value = text
      .slice(0, text.search(plusMinus))
      .replace(/\s*[%‰]\s*$|\s*ppm\s*$/, '')
      .trim();
    const half = typed.replace(/\s*[%‰]\s*$|\s*ppm\s*$/, '');
    const fix = `(${value} ± ${half}) ${left.unit.text}`;
    const message = `${quote(text)} could mean a share of the value or a difference in ${left.unit.text}: write ${fix} for the difference, or the half-width worked out.`;
    return fail('ambiguous-tolerance', message, 0, end, [fix]);
  }
  // "10 ± 0.1 mm": a number without a unit takes the one after it, which cannot be meant otherwise.
  const unit = common ?? (left.united || relative || !right.united ? left.unit : right.unit);
  const plain: Plain = { numeral: left.numeral, unit, united: true };
  const half = common !== undefined || !right.united ? unit : right.unit;
  const tolerance = relative
    ? relativeTolerance(plain, right, typed, from, to)
    : absoluteTolerance(plain, numeral, half, typed, from, to);
  return tolerance.ok ? madeOf(text, plain, 0, end, tolerance.value) : tolerance;
}

function relativeTolerance({ numeral, unit }: Plain, right: Plain, typed: string, from: number, to: number): Result<Tolerance> {
  if (unit.reading) {
    const message = `${quote(typed)} of a temperature reading in ${unit.text} has no meaning: write the half-width as a difference, such as ± 2 K.`;
    return fail('relative-reading', message, from, to);
  }
  const share = multiplyE(exactOfNumeral(right.numeral), right.unit.factor);
  const magnitude = multiplyE(exactOfNumeral({ ...numeral, negative: false }), unit.factor);
  const si = doubleOf(multiplyE(share, magnitude));
  if (!(si > 0 && Number.isFinite(si))) {
    return fail(
      'tolerance-sign',
      `${quote(typed)} of this value is no half-width greater than 0: write an absolute one.`,
      from,
      to,
    );
  }
  return done({ numeral: right.numeral, unit: right.unit, relative: true, si, typed });
}

function absoluteTolerance(
  { unit }: Plain,
  numeral: Numeral,
  half: Unit,
  typed: string,
  from: number,
  to: number,
): Result<Tolerance> {
  if (!equalD(half.dimension, unit.dimension) || !sameCounts(half, unit)) return unlike(unit, half, typed, from, to);
  const difference = differenceUnit(half);
  const si = siOfNumeral(numeral, difference);
  if (!(si > 0 && Number.isFinite(si)))
    return fail('number-too-large', `The half-width ${quote(typed)} is out of range.`, from, to);
  return done({ numeral, unit: difference, relative: false, si, typed });
}

const sameCounts = (a: Unit, b: Unit): boolean =>
  equalR(a.counts.r, b.counts.r) && equalR(a.counts.hz, b.counts.hz) && equalR(a.counts.rad, b.counts.rad);

function unlike(unit: Unit, half: Unit, typed: string, from: number, to: number): Failure {
  const kind = withArticle(kindName(unit.dimension, unit.text));
  const example = unit.text === '1' ? 'without a unit' : `in ${unit.text}`;
  const message = `The half-width ${quote(typed)} is ${describeUnit(half)}, but the value is ${kind === describeUnit(unit) ? kind : describeUnit(unit)}: write it ${example} or in %.`;
  return fail('unlike-tolerance', message, from, to);
}
