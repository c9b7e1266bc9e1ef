// What a formula gives against the unit that its cell declares.
//
// Not here: what the cell passes on (typeOfResult in term.ts).

import { equalD, type Fix, type Unit } from '../quantity/index.ts';
import { countsAgainst } from './counts.ts';
import type { Expr } from './expr.ts';
import { isTorqueBesideEnergy } from './infer-rules.ts';
import { revolutionsAgainst, temperatureFault, unlikeTarget } from './messages.ts';
import { proposeForRevolutions } from './offers.ts';
import { report } from './report.ts';
import { temperatureAgainst } from './temperature.ts';
import { type Context, type QuantityType, type Term, typeOfUnit } from './term.ts';
import { describe, unitOfType, writeExpr } from './wording.ts';

/** Leaves a problem where the formula and its declared unit do not fit; true where they do. */
export function checkTarget(ctx: Context, expr: Expr, term: Term, target: Unit): boolean {
  const type = term.type as QuantityType;
  const wanted = typeOfUnit(target);
  if (!type.zero && !equalD(type.dimension, target.dimension)) {
    report(ctx, 'unlike-target', unlikeTarget(type, target, wanted), undefined);
    return false;
  }
  const reads = target.reading !== undefined;
  const fault = temperatureAgainst({ kind: type.temperature, zero: type.zero === true }, reads);
  if (fault !== undefined) {
    report(ctx, 'temperature', temperatureFault(fault, [{ expr, type }], '', target), undefined, fixesOf(ctx, fault, expr));
    return false;
  }
  if (type.zero) return true;
  if (countsAgainst(type.counts, target) !== 'fits') {
    const found = proposeForRevolutions(ctx, [expr]);
    report(ctx, 'revolutions', `${revolutionsAgainst(target, type)}${found.sentence}`, undefined, found.fixes);
    return false;
  }
  if (term.plain === true && isTorqueBesideEnergy(type, wanted)) {
    report(
      ctx,
      'torque-energy',
      `${writeExpr(expr)} is ${describe(type)}, the declared unit makes it ${describe(wanted)}; declare ${unitOfType(type)} if it stays what it is`,
      undefined,
      [],
      'warning',
    );
  }
  return true;
}

function fixesOf(ctx: Context, fault: string, expr: Expr): readonly Fix[] {
  if (!ctx.propose || fault !== 'reading against difference' || ctx.text === '') return [];
  const [from, to] = expr.at;
  const old = ctx.text.slice(from, to);
  const text = `${expr.kind === 'choose' ? `(${old})` : old} - "-273.15 degC"`;
  return [{ from, to, text, label: `write ${text}` }];
}
