// Corrections offered where revolutions or temperatures do not fit: each is tried out before it is offered.
//
// 1. A changed text is read and inferred anew, a changed unit is inferred with the unit changed; what still does not fit is not offered.
// 2. While an offer is being tried out nothing is offered in turn.
// Not here: when a problem arises (infer-rules.ts, infer-target.ts).

import { addR, type Fix, isDimensionless, isZeroR, negR, oneR, type Rational } from '../quantity/index.ts';
import { childrenOf } from './children.ts';
import type { Expr, Span } from './expr.ts';
import type { Side } from './messages.ts';
import { plainName } from './symbols.ts';
import type { TemperatureFault } from './temperature.ts';
import type { Context, QuantityType, Scope } from './term.ts';
import type { Type } from './type.ts';

export interface Offer {
  /** '; write …, or …', ready to follow the first half of the sentence. */
  readonly sentence: string;
  readonly fixes: readonly Fix[];
}

/** Of more counted names than this, none is tried alone: the work stays bounded. */
const mostAlone = 6;

const nothing: Offer = { sentence: '', fixes: [] };
const general: Offer = {
  sentence:
    '; multiply by 2*pi where an angle is meant, give the other factor a unit per revolution such as mm/r, or divide by "1 r"',
  fixes: [],
};

/** What turns counted revolutions into what is wanted; `parts` are the expressions that do not fit; `whole` where a whole number is wanted, no angle. */
export function proposeForRevolutions(ctx: Context, parts: readonly Expr[], whole = false): Offer {
  if (!ctx.propose || ctx.prove === undefined) return nothing;
  const names = namesIn(parts);
  const phrases: string[] = [];
  const fixes: Fix[] = [];
  const offer = (phrase: string, edits: readonly Fix[]): void => {
    phrases.push(phrase);
    if (edits.length === 1) fixes.push(edits[0]!);
    else if (edits.length > 1) fixes.push(joined(ctx.text, edits, edits[0]!.label));
  };

  const turning = whole ? undefined : turnNames(ctx, names);
  if (turning) offer(`write ${turning.shown} where an angular speed or an angle is meant`, turning.edits);
  for (const part of whole ? [] : parts.slice(0, mostAlone)) {
    const edit = append(ctx.text, part, '/(2*pi)', 'divide by 2*pi');
    if (ctx.prove(applied(ctx.text, [edit]), ctx.scope)) {
      offer('divide by 2*pi where radians stand in for revolutions', [edit]);
      break;
    }
  }
  const unit = otherUnit(ctx, names);
  if (unit) phrases.push(unit);
  if (isCountTarget(ctx, names)) phrases.push('declare the unit r');
  for (const part of parts.slice(0, mostAlone)) {
    const found = (['/"1 r"', '*"1 r"'] as const)
      .map((tail) => ({
        tail,
        edit: append(ctx.text, part, tail, tail.startsWith('/') ? 'divide by "1 r"' : 'multiply by "1 r"'),
      }))
      .find(({ edit }) => ctx.prove!(applied(ctx.text, [edit]), ctx.scope));
    if (found === undefined) continue;
    offer(found.edit.label, [found.edit]);
    break;
  }
  if (phrases.length === 0) return general;
  const last = phrases.pop()!;
  const sentence = phrases.length === 0 ? `; ${last}` : `; ${phrases.join(', ')}, or ${last}`;
  return { sentence, fixes };
}

interface Named {
  readonly name: string;
  readonly type: QuantityType;
  readonly places: readonly Expr[];
}

type Sought = { readonly places: Expr[]; readonly name: string };

function namesIn(parts: readonly Expr[]): Sought[] {
  const found = new Map<string, Sought>();
  const visit = (expr: Expr): void => {
    if (expr.kind === 'name') {
      const known = found.get(expr.name) ?? { name: expr.name, places: [] };
      known.places.push(expr);
      found.set(expr.name, known);
    }
    for (const part of childrenOf(expr)) visit(part);
  };
  for (const part of parts) visit(part);
  return [...found.values()];
}

function typed(ctx: Context, names: readonly Sought[]): Named[] {
  return names.flatMap((sought) => {
    const type = ctx.scope.typeOf(sought.name);
    return typeof type === 'object' && type.kind === 'quantity' ? [{ ...sought, type }] : [];
  });
}

/** 2*pi at each counted name: one name alone where that is enough, otherwise all of them. */
function turnNames(
  ctx: Context,
  names: readonly Sought[],
): { readonly shown: string; readonly edits: readonly Fix[] } | undefined {
  const counted = typed(ctx, names).filter(({ type }) => !isZeroR(type.counts.r) || !isZeroR(type.counts.hz));
  const sets = counted.length > 1 && counted.length <= mostAlone ? [...counted.map((one) => [one]), counted] : [counted];
  for (const set of sets) {
    if (set.length === 0) continue;
    const edits = set.flatMap(({ places }) => places.map((place) => turn(ctx.text, place)));
    if (!ctx.prove!(applied(ctx.text, edits), ctx.scope)) continue;
    const shown = set.slice(0, 3).map(({ places }) => `2*pi*${ctx.text.slice(...places[0]!.at)}`);
    return { shown: `${shown.join(' and ')}${set.length > 3 ? ' and so on' : ''}`, edits };
  }
  return undefined;
}

function turn(text: string, place: Expr): Fix {
  const [from, to] = place.at;
  const before = text.slice(0, from).trimEnd().at(-1) ?? '(';
  const after = text.slice(to).trimStart()[0] ?? '';
  const bare = after !== '^' && '(*+-,?:<>='.includes(before);
  const name = text.slice(from, to);
  return { from, to, text: bare ? `2*pi*${name}` : `(2*pi*${name})`, label: `write 2*pi*${name}` };
}

function append(text: string, part: Expr, tail: string, label: string): Fix {
  const [from, to] = part.at;
  const old = text.slice(from, to);
  const loose =
    part.kind === 'choose' ||
    part.kind === 'compare' ||
    part.kind === 'logic' ||
    part.kind === 'not' ||
    (part.kind === 'binary' && (part.operator === '+' || part.operator === '-'));
  const changed = loose ? `(${old})${tail}` : `${old}${tail}`;
  const inPower = text.slice(0, from).trimEnd().endsWith('^') || text.slice(to).trimStart().startsWith('^');
  return { from, to, text: inPower ? `(${changed})` : changed, label };
}

/** A unit of another quantity that would make the formula fit: per revolution, or counted. */
function otherUnit(ctx: Context, names: readonly Sought[]): string | undefined {
  for (const { name, type } of typed(ctx, names).slice(0, mostAlone)) {
    if (isDimensionless(type.dimension) || type.temperature !== 'none' || !isZeroR(type.counts.r) || !isZeroR(type.counts.hz))
      continue;
    const unit = type.unitText;
    if (unit === undefined || !isZeroR(type.counts.rad)) continue;
    if (!isTime(type) && ctx.prove!(ctx.text, recounted(ctx.scope, name, negR(oneR)))) {
      return `give ${plainName(name)} a unit per revolution (${perRevolution(unit)}) if it is an amount per revolution`;
    }
    if (isPerTime(type) && ctx.prove!(ctx.text, recounted(ctx.scope, name, oneR))) {
      return `give ${plainName(name)} in r/s or Hz if it counts revolutions`;
    }
  }
  return undefined;
}

const isPerTime = (type: QuantityType): boolean => isPowerOfTime(type, -1);
const isTime = (type: QuantityType): boolean => isPowerOfTime(type, 1);

function isPowerOfTime(type: QuantityType, power: 1 | -1): boolean {
  return type.dimension.every((exponent, index) => (index === 2 ? exponent.n === power && exponent.d === 1 : exponent.n === 0));
}

function recounted(scope: Scope, name: string, by: Rational): Scope {
  const changed = (type: Type): Type =>
    type.kind === 'quantity' ? { ...type, counts: { ...type.counts, r: addR(type.counts.r, by) } } : type;
  return {
    typeOf: (asked) => {
      const type = scope.typeOf(asked);
      return asked === name && typeof type === 'object' ? changed(type) : type;
    },
    table: (table) => scope.table(table),
    names: () => scope.names(),
    tableNames: () => scope.tableNames(),
    ...(scope.decimalSign && { decimalSign: scope.decimalSign }),
  };
}

/** 'mm' → 'mm/r', 'm/s' → 'm/(s·r)'. */
function perRevolution(unit: string): string {
  const slash = unit.indexOf('/');
  if (slash < 0) return `${unit}/r`;
  const below = unit.slice(slash + 1).replace(/^\(|\)$/g, '');
  return `${unit.slice(0, slash)}/(${below}·r)`;
}

function isCountTarget(ctx: Context, names: readonly Sought[]): boolean {
  const target = ctx.target;
  return (
    target !== undefined &&
    typed(ctx, names).every(({ type }) => isZeroR(type.counts.rad)) &&
    isDimensionless(target.dimension) &&
    isZeroR(target.counts.r) &&
    isZeroR(target.counts.rad) &&
    ctx.proveTarget?.('r') === true
  );
}

export function applied(text: string, edits: readonly Fix[]): string {
  let changed = text;
  for (const edit of [...edits].sort((a, b) => b.from - a.from))
    changed = changed.slice(0, edit.from) + edit.text + changed.slice(edit.to);
  return changed;
}

/** Several edits as one, over the span from the first to the last. */
function joined(text: string, edits: readonly Fix[], label: string): Fix {
  const from = Math.min(...edits.map((edit) => edit.from));
  const to = Math.max(...edits.map((edit) => edit.to));
  const changed = applied(text, edits);
  return { from, to, text: changed.slice(from, changed.length - (text.length - to)), label };
}

const absolute = '"-273.15 degC"';

export function proposeForTemperature(ctx: Context, fault: TemperatureFault, sides: readonly Side[], at: Span): readonly Fix[] {
  if (!ctx.propose) return [];
  const written = (side: Side): string => ctx.text.slice(...side.expr.at);
  const reading = sides.find((side) => side.type.temperature === 'reading');
  const other = sides.find((side) => side.type.temperature !== 'reading');
  if (fault === 'reading and difference' && other?.type.zero) {
    const text = `"0 ${reading?.type.unitText ?? 'degC'}"`;
    return [{ from: other.expr.at[0], to: other.expr.at[1], text, label: `write ${text}` }];
  }
  if (fault === 'difference - reading' && reading && other && isAtom(other.expr) && isAtom(reading.expr)) {
    const turned = `${written(reading)} - ${written(other)}`;
    const kelvin = `${written(other)} - (${written(reading)} - ${absolute})`;
    return [turned, kelvin].map((text) => ({ from: at[0], to: at[1], text, label: `write ${text}` }));
  }
  if (fault === 'reading + reading' && sides.length === 2 && sides.every((side) => isAtom(side.expr))) {
    const before = ctx.text.slice(0, at[0]);
    const after = ctx.text.slice(at[1]);
    const head = /\(\s*$/.exec(before);
    const tail = /^\s*\)\s*(?:\/\s*2|\*\s*0\.5)(?![\d.])/.exec(after);
    if (!head || !tail) return [];
    const [a, b] = sides.map(written);
    const text = `${a} + (${b} - ${a})/2`;
    const inside = head.index > 0 || tail[0].length < after.length;
    return [{ from: head.index, to: at[1] + tail[0].length, text: inside ? `(${text})` : text, label: `write ${text}` }];
  }
  return [];
}

const isAtom = (expr: Expr): boolean => expr.kind === 'name' || expr.kind === 'parens' || expr.kind === 'quoted';

/** The formula without a conversion number; where 30 stood beside pi, with the 2 that it hid. */
export function proposeWithoutLiteral(
  ctx: Context,
  literal: Extract<Expr, { kind: 'number' }>,
  factors: readonly { readonly expr: Expr; readonly inverse: boolean }[],
): readonly Fix[] {
  if (ctx.prove === undefined) return [];
  const removal = without(ctx.text, literal.at);
  const pi = factors.find(({ expr, inverse }) => expr.kind === 'constant' && expr.name === 'pi' && !inverse)?.expr;
  const hidesTwo = literal.value === 30 && factors.some(({ expr, inverse }) => expr === literal && inverse);
  const edits = hidesTwo && pi ? [removal, { from: pi.at[0], to: pi.at[0], text: '2*', label: '' }] : [removal];
  const changed = applied(ctx.text, edits);
  if (!ctx.prove(changed, ctx.scope)) return [];
  return [
    { ...joined(ctx.text, edits, ''), label: `write ${changed.length > 40 ? `the formula without ${literal.text}` : changed}` },
  ];
}

/** Takes a factor out of a product, with the sign before or after it. */
function without(text: string, [from, to]: Span): Fix {
  const before = /[*/]\s*$/.exec(text.slice(0, from));
  if (before) return { from: before.index, to, text: '', label: '' };
  const after = /^\s*\*\s*/.exec(text.slice(to));
  if (after) return { from, to: to + after[0].length, text: '', label: '' };
  return { from, to, text: '1', label: '' };
}
