// Ranges as they stand beside a given or a sought quantity: "0.1 to 0.8", "10 N to 20 kN", "10 to 20 N".
//
// Both ends are values without ±, of one kind, the first not above the second; a first end without a unit takes the second's.
// Not here: whether a value lies in the range.

import { siOfNumeral } from './convert.ts';
import { equalD } from './dimension.ts';
import { describeUnit } from './kind.ts';
import type { Style } from './print.ts';
import type { Result } from './problem.ts';
import { done, fail, quote, shifted } from './problem.ts';
import type { Value } from './value.ts';
import { readValue } from './value.ts';

export interface ValueRange {
  readonly text: string;
  readonly from: Value;
  readonly to: Value;
}

const between = /\s(?:to|…|\.\.\.?)\s/;

export function readRange(text: string, options: Style): Result<ValueRange> {
  const sign = text.length > 400 ? null : between.exec(text);
  if (!sign)
    return fail(
      'range-form',
      `${quote(text)} is no range: write two values joined by "to", such as 10 N to 20 kN.`,
      0,
      text.length,
    );
  const from = readValue(text.slice(0, sign.index), options);
  if (!from.ok) return from;
  const start = sign.index + sign[0].length;
  const to = readValue(text.slice(start), options);
  if (!to.ok) return shifted(to, start);
  if (from.value.tolerance || to.value.tolerance) {
    return fail('range-form', `The ends of the range ${quote(text)} are plain values: leave ± out.`, 0, text.length);
  }
  const unit = to.value.unit;
  const shared = from.value.unit.text === '1' && unit.text !== '1';
  const lower: Value = shared ? { ...from.value, unit, si: siOfNumeral(from.value.numeral, unit) } : from.value;
  if (!equalD(lower.unit.dimension, unit.dimension) || (lower.unit.reading === undefined) !== (unit.reading === undefined)) {
    const message = `The ends of the range ${quote(text)} are not alike: ${describeUnit(lower.unit)} and ${describeUnit(unit)}. Write both in units of one kind.`;
    return fail('range-form', message, 0, text.length);
  }
  if (lower.si > to.value.si) {
    return fail('range-form', `The range ${quote(text)} begins above its end: write the lower value first.`, 0, text.length);
  }
  return done({ text, from: lower, to: to.value });
}
