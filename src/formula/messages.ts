// The sentences of the inference: what does not fit, both sides in words and units, what to do next.
//
// 1. Each function gives the text of one problem; code and place are the caller's.
// 2. What is to be typed stands in the syntax of formulas; what is shown is in the notation of print (writeExpr).
// Not here: when a problem arises (infer*.ts), proposals that need proof (offers.ts).

import {
  coherentUnit,
  type Dimension,
  divideD,
  forceHint,
  isZeroR,
  kindName,
  readUnit,
  signR,
  textR,
  type Unit,
  withArticle,
} from '../quantity/index.ts';
import type { Expr } from './expr.ts';
import type { TemperatureFault } from './temperature.ts';
import type { QuantityType } from './term.ts';
import type { FormulaCounts, Type } from './type.ts';
import { describe, kindOf, printUnit, unitOfType, writeExpr } from './wording.ts';

export interface Side {
  readonly expr: Expr;
  readonly type: QuantityType;
}

const shown = (side: Side): string => `${writeExpr(side.expr)} is ${describe(side.type)}`;

export function unlikeSum(operator: '+' | '-', left: Side, right: Side, bare?: string): string {
  const pair =
    operator === '+'
      ? `cannot add ${describe(left.type)} to ${describe(right.type)}`
      : `cannot subtract ${describe(right.type)} from ${describe(left.type)}`;
  return `${pair} in ${writeExpr(left.expr)} ${operator} ${writeExpr(right.expr)}; ${bare ?? differBy(left.type.dimension, right.type.dimension)}`;
}

export function unlikeOperands(where: string, left: Side, right: Side, bare?: string): string {
  const what =
    where === 'comparison'
      ? `cannot compare ${describe(left.type)} with ${describe(right.type)}: ${writeExpr(left.expr)} with ${writeExpr(right.expr)}`
      : where === '?:'
        ? `the branches of ?: must be alike: ${shown(left)}, ${shown(right)}`
        : `${where} needs quantities of one kind: ${shown(left)}, ${shown(right)}`;
  return `${what}; ${bare ?? differBy(left.type.dimension, right.type.dimension)}`;
}

function differBy(left: Dimension, right: Dimension): string {
  const ratio = divideD(left, right);
  const inverse = divideD(right, left);
  const shorter = coherentUnit(inverse).text.length < coherentUnit(ratio).text.length ? inverse : ratio;
  const kind = kindName(shorter);
  const unit = coherentUnit(shorter).text;
  return kind.endsWith(unit)
    ? `a factor in ${unit} is missing or too many`
    : `${withArticle(kind)} (${unit}) is missing on one side or too many on the other`;
}

export function unlikeTarget(type: QuantityType, target: Unit, targetType: QuantityType): string {
  const given = type.unitText === undefined ? undefined : readUnit(type.unitText);
  const hint = forceHint(target, type.dimension) ?? (given?.ok ? forceHint(given.value, target.dimension) : undefined);
  const unit = unitOfType(type);
  const declare = unit === '' ? 'declare the unit 1' : `declare ${unit}`;
  return `the formula gives ${describe(type)}, the declared unit ${printUnit(target.text)} is ${withArticle(kindOf(targetType))}; ${hint ?? `${declare} or correct the formula`}`;
}

export function needsNumber(name: string, expr: Expr, type: QuantityType): string {
  const unit = unitOfType(type);
  return `${name} needs a number, ${writeExpr(expr)} is ${describe(type)}; divide it by a quantity in ${unit}, or by "1 ${unit}" if the formula is meant for ${unit}`;
}

export function roundingNeedsNumber(name: string, expr: Expr, type: QuantityType): string {
  const unit = unitOfType(type);
  return `${name} of a quantity depends on its unit, ${writeExpr(expr)} is ${describe(type)}; say which unit counts: ${name}(…/"1 ${unit}")*"1 ${unit}"`;
}

export function exponentNeedsNumber(expr: Expr, type: QuantityType): string {
  return `an exponent must be a number, ${writeExpr(expr)} is ${describe(type)}; divide it by a quantity of the same kind`;
}

export function exponentMustBeConstant(base: Expr, type: QuantityType, exponent: Expr): string {
  return `${writeExpr(base)} is ${describe(type)}, so its exponent must be written as a plain number such as 2, -1 or 1/3, not ${writeExpr(exponent)}; a variable exponent needs a base that is a number`;
}

export const exponentTooLarge = (expr: Expr): string =>
  `the exponents in ${writeExpr(expr)} are beyond what a unit can carry; use powers of at most three digits`;

export function notAQuantity(type: Type, expr: Expr, place: string): string {
  if (type.kind === 'truth') {
    return `${writeExpr(expr)} is true or false, not a value for ${place}; choose a value with test ? a : b`;
  }
  const from = type.kind === 'text' ? ` (a choice from ${type.table}.${type.column})` : '';
  return `${writeExpr(expr)} is a text${from}, not a value for ${place}; a text can be compared with == or != and be the key of entry`;
}

export function notATruth(type: Type, expr: Expr, place: string): string {
  return `${place} needs a comparison, ${writeExpr(expr)} is ${describe(type)}; write for example ${writeExpr(expr)} > …`;
}

/** 'counts revolutions (r)', 'counts 1/r', 'counts no revolutions'. */
export function countWords(counts: FormulaCounts): string {
  if (isZeroR(counts.r)) return isZeroR(counts.hz) ? 'counts no revolutions' : 'counts cycles (Hz), which may be revolutions';
  const exponent =
    counts.r.n === 1 && counts.r.d === 1
      ? 'r'
      : `r^${signR(counts.r) < 0 || counts.r.d !== 1 ? `(${textR(counts.r)})` : textR(counts.r)}`;
  return counts.r.n === -1 && counts.r.d === 1 ? 'counts per revolution (1/r)' : `counts revolutions (${exponent})`;
}

export function revolutionsApart(where: string, left: Side, right: Side): string {
  return `revolutions in ${where}: ${writeExpr(left.expr)} ${countWords(left.type.counts)}, ${writeExpr(right.expr)} ${countWords(right.type.counts)}`;
}

export function revolutionsInside(name: string, expr: Expr, type: QuantityType): string {
  return `revolutions inside ${name}: ${writeExpr(expr)} ${countWords(type.counts)}, where a number or an angle is needed`;
}

export function revolutionsAgainst(target: Unit, type: QuantityType): string {
  const gives = !isZeroR(type.counts.r)
    ? countWords(type.counts)
    : !isZeroR(type.counts.rad)
      ? 'gives radians, not revolutions'
      : 'counts no revolutions';
  return `revolutions against ${printUnit(target.text)}: the formula ${gives}`;
}

const instead: ReadonlyMap<number, string> = new Map([
  [30, 'an angular speed is 2*pi*n'],
  [120, 'the synchronous speed is f/p with p pairs of poles'],
  [360, 'an angle is 2*pi*n*t, degrees are a matter of its unit'],
  [9550, 'a torque is P/(2*pi*n)'],
  [33000, 'a power is 2*pi*n*M'],
]);

export function conversionNumber(literal: string, value: number, counted: Expr): string {
  const hint = instead.get(value);
  return `conversion number beside a counted quantity: ${writeExpr(counted)} carries its unit, so ${literal} would convert a second time; leave ${literal} out${hint === undefined ? '' : `, ${hint}`}`;
}

export function temperatureFault(fault: TemperatureFault, sides: readonly Side[], operator: string, target?: Unit): string {
  const reading = sides.find((side) => side.type.temperature === 'reading');
  const other = sides.find((side) => side.type.temperature !== 'reading');
  const r = reading ? writeExpr(reading.expr) : '';
  const o = other ? writeExpr(other.expr) : '';
  switch (fault) {
    case 'reading + reading': {
      const a = writeExpr(sides[0]!.expr);
      const b = writeExpr(sides[1]!.expr);
      return `${fault}: ${a} and ${b} are readings of a temperature scale, their sum has no meaning; for a mean write ${a} + (${b} - ${a})/2, for an absolute temperature ${a} - "-273.15 degC"`;
    }
    case 'difference - reading':
      return `${fault}: ${o} is in kelvin, ${r} is a reading; write ${r} - ${o} for a reading, or ${o} - (${r} - "-273.15 degC") if ${o} is an absolute temperature`;
    case 'reading and difference':
      return other?.type.zero && target === undefined
        ? `${fault}: ${r} is a temperature reading and the literal 0 is none; write "0 degC"`
        : target !== undefined
          ? `${fault}: the declared unit ${printUnit(target.text)} takes a reading, the literal 0 is none; write "0 degC"`
          : `${fault}: in ${operator}, ${r} is a temperature reading and ${o} is in kelvin; compare like with like: ${r} - "-273.15 degC" is the absolute temperature`;
    case 'reading against difference':
      return `${fault}: the formula gives a temperature reading, the declared unit ${printUnit(target!.text)} takes a difference or an absolute temperature; write ${r} - "-273.15 degC" for the absolute temperature, or declare degC`;
    case 'difference against reading':
      return `${fault}: the formula gives a difference of two readings, the declared unit ${printUnit(target!.text)} takes a reading; declare K`;
    case 'a temperature reading cannot be used here':
      return `${fault}: ${r} is a reading (°C or °F), ${operator} needs a difference or an absolute temperature; use a difference of two readings, or ${r} - "-273.15 degC"`;
  }
}
