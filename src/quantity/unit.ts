// A unit: what a unit text means, exactly.
//
// 1. `text` is canonical and reads back as the same unit; it keeps the order and the choice of units of the one who typed it.
// 2. `factor` leads to coherent SI units and is exact (roots of inexact factors: 90 digits, exact.ts); `si` is its double.
// 3. °C and °F alone, to the first power, are readings of a scale; inside a compound they are differences.
// 4. Frozen by use: conversion and printing never change a unit; units of equal text are the same object while cached.
// Not here: the grammar of unit texts (unit-grammar.ts), conversion of numbers (convert.ts).

import type { UnitSymbol } from './catalogue.ts';
import type { Dimension } from './dimension.ts';
import { dimensionless, multiplyD, powerD } from './dimension.ts';
import type { Exact } from './exact.ts';
import { doubleOf, exactOfText, multiplyE, oneE, rationalPowerE } from './exact.ts';
import type { Rational } from './rational.ts';
import { addR, negR, textR, zeroR } from './rational.ts';

/** Exponents of r, of Hz, and of rad or ° (and ′, ″, gon): what the rule of counted revolutions needs. */
export interface Counts {
  readonly r: Rational;
  readonly hz: Rational;
  readonly rad: Rational;
}

export interface UnitPart {
  readonly symbol: string;
  readonly exponent: Rational;
}

export interface Unit {
  readonly text: string;
  readonly dimension: Dimension;
  readonly factor: Exact;
  readonly si: number;
  readonly counts: Counts;
  /** Only for °C and °F alone: kelvin at the zero of the scale. */
  readonly reading?: Exact;
  readonly parts: readonly UnitPart[];
}

/** A factor of a unit text: the exponent as written, above or below the solidus. */
export interface Factor {
  readonly symbol: UnitSymbol;
  readonly exponent: Rational;
}

const raised: Readonly<Record<string, string>> = {
  '-': '⁻',
  '0': '⁰',
  '1': '¹',
  '2': '²',
  '3': '³',
  '4': '⁴',
  '5': '⁵',
  '6': '⁶',
  '7': '⁷',
  '8': '⁸',
  '9': '⁹',
};
/** "⁻²" for "-2". */
export const superscript = (whole: number): string => [...String(whole)].map((char) => raised[char] ?? char).join('');

function powerText({ symbol, exponent }: Factor): string {
  if (exponent.d !== 1) return `${symbol.text}^(${textR(exponent)})`;
  return exponent.n === 1 ? symbol.text : symbol.text + superscript(exponent.n);
}

/** "W/(m²·K)" from what stands above and below the solidus. */
export function textOfFactors(above: readonly Factor[], below: readonly Factor[]): string {
  const product = (factors: readonly Factor[]) => factors.map(powerText).join('·');
  if (below.length === 0) return above.length === 0 ? '1' : product(above);
  return `${above.length === 0 ? '1' : product(above)}/${below.length > 1 ? `(${product(below)})` : product(below)}`;
}

const noCounts: Counts = { r: zeroR, hz: zeroR, rad: zeroR };

export function unitOfFactors(above: readonly Factor[], below: readonly Factor[]): Unit {
  let dimension: Dimension = dimensionless;
  let factor: Exact = oneE;
  let counts = noCounts;
  const parts: UnitPart[] = [];
  const all = [...above, ...below.map(({ symbol, exponent }) => ({ symbol, exponent: negR(exponent) }))];
  for (const { symbol, exponent } of all) {
    dimension = multiplyD(dimension, powerD(symbol.dimension, exponent));
    factor = multiplyE(factor, rationalPowerE(symbol.factor, exponent));
    const counted = symbol.row.counts;
    if (counted) counts = { ...counts, [counted]: addR(counts[counted], exponent) };
    parts.push({ symbol: symbol.text, exponent });
  }
  const reading = readingOf(all);
  const unit: Unit = { text: textOfFactors(above, below), dimension, factor, si: doubleOf(factor), counts, parts };
  return reading ? { ...unit, reading } : unit;
}

function readingOf(all: readonly Factor[]): Exact | undefined {
  const [only] = all;
  if (all.length !== 1 || only?.symbol.row.reading === undefined) return undefined;
  return only.exponent.n === 1 && only.exponent.d === 1 ? exactOfText(only.symbol.row.reading) : undefined;
}

/** The number one, of which every dimensionless number is a multiple. */
/** One counts revolutions or cycles, the other measures an angle: of one dimension, and apart by 2π. */
export function turnsAgainstAngle(a: Unit, b: Unit): boolean {
  const turns = ({ counts }: Unit) => counts.r.n !== 0 || counts.hz.n !== 0;
  const angle = ({ counts }: Unit) => counts.rad.n !== 0;
  return (turns(a) && angle(b)) || (angle(a) && turns(b));
}

export const one: Unit = { text: '1', dimension: dimensionless, factor: oneE, si: 1, counts: noCounts, parts: [] };

const angles = new Set(['rad', 'mrad', 'µrad', '°', '′', '″', 'gon']);

/** rad, °, ′, ″ or gon alone. */
export function isAngleUnit(unit: Unit): boolean {
  const [only] = unit.parts;
  return (
    unit.parts.length === 1 && only !== undefined && only.exponent.n === 1 && only.exponent.d === 1 && angles.has(only.symbol)
  );
}

/** %, ‰ or ppm alone. */
export const isRatioUnit = (unit: Unit): boolean => unit.text === '%' || unit.text === '‰' || unit.text === 'ppm';

/** The unit of a difference of two values in `unit`: °C without its zero. */
export function differenceUnit(unit: Unit): Unit {
  const { reading, ...rest } = unit;
  return reading ? rest : unit;
}
