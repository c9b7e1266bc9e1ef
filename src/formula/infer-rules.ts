// How the types of parts make the type of a whole: sums, products, powers, operands that must be alike.
//
// 1. A rule gets its parts already inferred; a part that is undefined has had its say, and the rule keeps silent about it.
// 2. A rule that fails leaves one problem and gives undefined.
// Not here: the walk (infer-node.ts), functions (infer-call.ts), the declared unit (infer-target.ts).

import {
  dimensionless,
  divideD,
  equalD,
  type Fix,
  isDimensionless,
  isZeroR,
  kindName,
  multiplyD,
  powerD,
  type Rational,
} from '../quantity/index.ts';
import { divideCounts, fitsAngle, multiplyCounts, noCounts, powerCounts } from './counts.ts';
import type { Expr, Span } from './expr.ts';
import {
  conversionNumber,
  exponentMustBeConstant,
  exponentNeedsNumber,
  exponentTooLarge,
  notAQuantity,
  revolutionsApart,
  revolutionsInside,
  type Side,
  temperatureFault,
  unlikeOperands,
  unlikeSum,
} from './messages.ts';
import { proposeForRevolutions, proposeForTemperature, proposeWithoutLiteral } from './offers.ts';
import { rationalOf } from './rational-exponent.ts';
import { report } from './report.ts';
import { isTemperatureKind, likeTemperatures, sumOfTemperatures } from './temperature.ts';
import { type Context, countsOfShared, isPlainNumber, meet, number, type QuantityType, sharedOf, type Term } from './term.ts';
import { describe, unitOfType } from './wording.ts';

export interface Part {
  readonly expr: Expr;
  readonly term: Term | undefined;
}

/** The part as a quantity; texts and truth values are refused with the place they stand in. */
export function quantityOf(ctx: Context, part: Part, place: string): QuantityType | undefined {
  if (part.term === undefined) return undefined;
  const type = part.term.type;
  if (type.kind === 'quantity') return type;
  report(ctx, type.kind === 'text' ? 'text-use' : 'truth-use', notAQuantity(type, part.expr, place), part.expr.at);
  return undefined;
}

const operandOf = (type: QuantityType) => ({ kind: type.temperature, zero: type.zero === true });

export function sumOf(ctx: Context, operator: '+' | '-', left: Part, right: Part, at: Span): Term | undefined {
  const place = operator === '+' ? 'a sum' : 'a difference';
  const a = quantityOf(ctx, left, place);
  const b = quantityOf(ctx, right, place);
  if (a === undefined || b === undefined) return undefined;
  const sides: readonly [Side, Side] = [
    { expr: left.expr, type: a },
    { expr: right.expr, type: b },
  ];
  const temperature = sumOfTemperatures(operator, operandOf(a), operandOf(b));
  if (!a.zero && !b.zero && !equalD(a.dimension, b.dimension)) {
    const bare = bareNumber(sides);
    return report(ctx, 'unlike-sum', unlikeSum(operator, ...sides, bare?.message), at, bare?.fixes);
  }
  if (!isTemperatureKind(temperature)) {
    return report(
      ctx,
      'temperature',
      temperatureFault(temperature, sides, place),
      at,
      proposeForTemperature(ctx, temperature, sides, at),
    );
  }
  if (a.zero) return right.term;
  if (b.zero) return left.term;
  const shared = meet([sharedOf(left.term!), sharedOf(right.term!)]);
  if (shared === undefined) {
    const found = proposeForRevolutions(
      ctx,
      sides.map((side) => side.expr),
    );
    return report(ctx, 'revolutions', `${revolutionsApart('sum', ...sides)}${found.sentence}`, at, found.fixes);
  }
  const plain = left.term!.plain === true && right.term!.plain === true;
  if (plain && isTorqueBesideEnergy(a, b)) {
    report(
      ctx,
      'torque-energy',
      `${unlikeKinds(a, b)}; the dimensions agree, the kinds do not: check the formula`,
      at,
      [],
      'warning',
    );
  }
  const unitText =
    temperature === 'reading'
      ? (a.temperature === 'reading' ? a : b).unitText
      : temperature === 'difference'
        ? undefined
        : commonUnitText(a, b);
  return { type: quantity(a.dimension, countsOfShared(shared), temperature, unitText), shared, plain };
}

export function isTorqueBesideEnergy(a: QuantityType, b: QuantityType): boolean {
  if (a.unitText === undefined || b.unitText === undefined) return false;
  const kinds = [kindName(a.dimension, a.unitText), kindName(b.dimension, b.unitText)];
  return kinds.includes('torque') && kinds.includes('energy');
}

const unlikeKinds = (a: QuantityType, b: QuantityType): string => `${describe(a)} is added to ${describe(b)}`;

/** The unit text that speaks for both: the first, where both name the same kind. */
function commonUnitText(a: QuantityType, b: QuantityType): string | undefined {
  if (a.unitText === undefined || b.unitText === undefined) return undefined;
  if (a.unitText === b.unitText) return a.unitText;
  return kindName(a.dimension, a.unitText) === kindName(b.dimension, b.unitText) ? a.unitText : undefined;
}

export function quantity(
  dimension: QuantityType['dimension'],
  counts: QuantityType['counts'],
  temperature: QuantityType['temperature'] = 'none',
  unitText?: string,
): QuantityType {
  return unitText === undefined
    ? { kind: 'quantity', dimension, counts, temperature }
    : { kind: 'quantity', dimension, counts, temperature, unitText };
}

/** Operands of min, max, hypot, atan2, comparison and ?: meet in one dimension, one count of revolutions, one kind of temperature. */
export function alike(ctx: Context, where: string, parts: readonly Part[], at: Span): Term | undefined {
  const place = where === '?:' ? 'a branch of ?:' : where === 'comparison' ? 'a comparison of numbers' : where;
  const types = parts.map((part) => quantityOf(ctx, part, place));
  const sides: Side[] = [];
  for (const [index, type] of types.entries()) {
    if (type === undefined) return undefined;
    sides.push({ expr: parts[index]!.expr, type });
  }
  const solid = sides.filter((side) => !side.type.zero);
  const first = solid[0];
  for (const side of solid) {
    if (first && !equalD(first.type.dimension, side.type.dimension)) {
      const bare = bareNumber([first, side]);
      return report(ctx, 'unlike-operands', unlikeOperands(where, first, side, bare?.message), at, bare?.fixes);
    }
  }
  const temperature = likeTemperatures(sides.map((side) => operandOf(side.type)));
  if (!isTemperatureKind(temperature)) {
    return report(
      ctx,
      'temperature',
      temperatureFault(temperature, sides, where),
      at,
      proposeForTemperature(ctx, temperature, sides, at),
    );
  }
  if (first === undefined) return parts[0]!.term;
  const terms = parts.flatMap((part) => (part.term && !(part.term.type as QuantityType).zero ? [part.term] : []));
  const shared = meet(terms.map(sharedOf));
  if (shared === undefined) {
    const other =
      solid.find((_, index) => index > 0 && meet([sharedOf(terms[0]!), sharedOf(terms[index]!)]) === undefined) ?? solid[1]!;
    const found = proposeForRevolutions(
      ctx,
      sides.map((side) => side.expr),
    );
    return report(ctx, 'revolutions', `${revolutionsApart(where, first, other)}${found.sentence}`, at, found.fixes);
  }
  const unitText = solid.every((side) => commonUnitText(first.type, side.type) !== undefined) ? first.type.unitText : undefined;
  return { type: quantity(first.type.dimension, countsOfShared(shared), temperature, unitText), shared };
}

/** A literal beside a quantity: most likely its unit was left out. */
function bareNumber(sides: readonly Side[]): { readonly message: string; readonly fixes: readonly Fix[] } | undefined {
  const literal = sides.find((side) => side.expr.kind === 'number')?.expr;
  const unit = sides.map((side) => unitOfType(side.type)).find((text) => text !== '');
  if (literal?.kind !== 'number' || unit === undefined) return undefined;
  const text = `"${literal.text} ${unit}"`;
  return {
    message: `write ${literal.text} with its unit in quotes, such as ${text}`,
    fixes: [{ from: literal.at[0], to: literal.at[1], text, label: `write ${text}` }],
  };
}

export interface Factor {
  readonly expr: Expr;
  readonly term: Term | undefined;
  readonly inverse: boolean;
}

const conversionNumbers: ReadonlySet<number> = new Set([30, 60, 120, 360, 1000, 3600, 9550, 33000]);

/** A chain of factors and divisors, parentheses flattened. */
export function productOf(ctx: Context, factors: readonly Factor[], at: Span): Term | undefined {
  const types = factors.map((factor) => quantityOf(ctx, factor, 'a product'));
  const literal = factors.find(({ expr }) => expr.kind === 'number' && conversionNumbers.has(expr.value));
  const counted = factors.find((_, index) => types[index] !== undefined && !isZeroR(types[index].counts.r));
  let failed = false;
  if (literal && counted && literal.expr.kind === 'number') {
    ctx.spoken.add(literal.expr);
    const message = conversionNumber(literal.expr.text, literal.expr.value, counted.expr);
    report(ctx, 'conversion-number', message, literal.expr.at, proposeWithoutLiteral(ctx, literal.expr, factors));
    failed = true;
  }
  for (const [index, type] of types.entries()) {
    if (type?.temperature !== 'reading') continue;
    const side = { expr: factors[index]!.expr, type };
    report(ctx, 'temperature', temperatureFault('a temperature reading cannot be used here', [side], 'a product'), side.expr.at);
    failed = true;
    break;
  }
  if (failed) return undefined;
  let dimension = dimensionless;
  let counts = noCounts;
  let special: number | undefined = -1;
  for (const [index, type] of types.entries()) {
    if (type === undefined) return undefined;
    const inverse = factors[index]!.inverse;
    if (type.dimension !== dimensionless)
      dimension = inverse ? divideD(dimension, type.dimension) : multiplyD(dimension, type.dimension);
    counts = inverse ? divideCounts(counts, type.counts) : multiplyCounts(counts, type.counts);
    if (!isBounded(dimension)) return report(ctx, 'exponent-range', exponentTooLarge(factors[index]!.expr), at);
    if (isPlainNumber(type) && type.unitText === undefined) continue;
    special = special === -1 && !inverse ? index : undefined;
  }
  // One factor beside bare numbers lends its kind to the product.
  const lender = special === undefined || special < 0 ? undefined : types[special];
  return { type: quantity(dimension, counts, lender?.temperature === 'difference' ? 'difference' : 'none', lender?.unitText) };
}

const largest = 1e6;
function isBounded(dimension: readonly Rational[]): boolean {
  return dimension.every(({ n, d }) => Math.abs(n) <= largest && d <= 1e4);
}

export function powerOf(ctx: Context, base: Part, exponent: Part, at: Span): Term | undefined {
  const a = quantityOf(ctx, base, 'the base of a power');
  const b = quantityOf(ctx, exponent, 'an exponent');
  if (a?.temperature === 'reading') return refuseReading(ctx, base.expr, a, 'a power');
  if (b !== undefined && !isDimensionless(b.dimension)) {
    return report(ctx, 'exponent-unit', exponentNeedsNumber(exponent.expr, b), exponent.expr.at);
  }
  if (b !== undefined && !fitsAngle(b.counts)) return refuseRevolutions(ctx, 'the exponent', exponent.expr, b);
  if (a === undefined || b === undefined) return undefined;
  const rational = rationalOf(exponent.expr);
  if (rational !== undefined) return powerByRational(ctx, base, a, rational, at);
  if (!isDimensionless(a.dimension)) {
    return report(ctx, 'exponent-constant', exponentMustBeConstant(base.expr, a, exponent.expr), exponent.expr.at);
  }
  if (!fitsAngle(a.counts)) return refuseRevolutions(ctx, 'a variable power', base.expr, a);
  return { type: number };
}

export function powerByRational(ctx: Context, base: Part, type: QuantityType, exponent: Rational, at: Span): Term | undefined {
  if (type.zero) return { type: number };
  const dimension = powerD(type.dimension, exponent);
  const counts = powerCounts(type.counts, exponent);
  if (!isBounded(dimension) || !isBounded([counts.r, counts.hz, counts.pi, counts.rad])) {
    return report(ctx, 'exponent-range', exponentTooLarge(base.expr), at);
  }
  return { type: quantity(dimension, counts) };
}

export function refuseReading(ctx: Context, expr: Expr, type: QuantityType, operation: string): undefined {
  return report(
    ctx,
    'temperature',
    temperatureFault('a temperature reading cannot be used here', [{ expr, type }], operation),
    expr.at,
  );
}

export function refuseRevolutions(ctx: Context, inside: string, expr: Expr, type: QuantityType, whole = false): undefined {
  const found = proposeForRevolutions(ctx, [expr], whole);
  return report(ctx, 'revolutions', `${revolutionsInside(inside, expr, type)}${found.sentence}`, expr.at, found.fixes);
}
