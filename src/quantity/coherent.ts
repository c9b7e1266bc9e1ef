// The coherent SI unit in which a quantity is printed that declares none.
//
// 1. A special name where the trade expects one; N·m for torque and energy alike: right for both, while J is wrong for torque
//    (SI Brochure 9th ed., 2.3.4).
// 2. Revolutions stay in sight: r/s, m/r.
// 3. The factor of every unit given here is exactly 1.
// Not here: kinds in words (kind.ts).

import { symbolOfText } from './catalogue.ts';
import type { Dimension } from './dimension.ts';
import { baseSymbols, dimensionKey, dimensionOf } from './dimension.ts';
import type { Rational } from './rational.ts';
import { isZeroR, negR, textR, zeroR } from './rational.ts';
import type { Factor, Unit } from './unit.ts';
import { unitOfFactors } from './unit.ts';
import type { Quotient } from './unit-grammar.ts';
import { readQuotient } from './unit-grammar.ts';

const named: ReadonlyMap<string, string> = new Map(
  (
    [
      ['L M T-2', 'N'],
      ['L-1 M T-2', 'Pa'],
      ['L2 M T-2', 'N·m'],
      ['L2 M T-3', 'W'],
      ['M T-2', 'N/m'],
      ['L-2 M T-2', 'N/m³'],
      ['L3 M T-2', 'N·m²'],
      ['L-1 M T-1', 'Pa·s'],
      ['M T-3', 'W/m²'],
      ['L M T-1', 'N·s'],
      ['L2 M T-1', 'N·m·s'],
      ['L2 T-2 Θ-1', 'J/(kg·K)'],
      ['L2 M T-2 Θ-1', 'J/K'],
      ['L M T-3 Θ-1', 'W/(m·K)'],
      ['M T-3 Θ-1', 'W/(m²·K)'],
      ['T I', 'C'],
      ['L2 M T-3 I-1', 'V'],
      ['L2 M T-3 I-2', 'Ω'],
      ['L-2 M-1 T4 I2', 'F'],
      ['L2 M T-2 I-2', 'H'],
      ['M T-2 I-1', 'T'],
      ['L2 M T-2 I-1', 'Wb'],
    ] as const
  ).map(([key, text]) => [dimensionKey(dimensionOf(key)), text]),
);

/** Mass first, as in kg·m². */
const order = [1, 0, 2, 3, 4, 5, 6];

function factorsOf(symbol: string, exponent: Rational): Factor[] {
  const found = symbolOfText(symbol);
  return found && !isZeroR(exponent) ? [{ symbol: found, exponent }] : [];
}

function baseQuotient(dimension: Dimension): Quotient {
  const above: Factor[] = [];
  const below: Factor[] = [];
  for (const place of order) {
    const exponent = dimension[place] ?? zeroR;
    const symbol = baseSymbols[place] ?? '';
    if (exponent.n > 0) above.push(...factorsOf(symbol, exponent));
    else below.push(...factorsOf(symbol, negR(exponent)));
  }
  return { above, below };
}

const known = new Map<string, Unit>();

/** `revolutions`: the exponent of r that the quantity carries. */
export function coherentUnit(dimension: Dimension, revolutions: Rational = zeroR): Unit {
  const key = `${dimensionKey(dimension)} ${textR(revolutions)}`;
  const before = known.get(key);
  if (before) return before;
  const text = named.get(dimensionKey(dimension));
  const read = text === undefined ? undefined : readQuotient(text);
  const { above, below } = read?.ok ? read.value : baseQuotient(dimension);
  const turns = factorsOf('r', revolutions.n > 0 ? revolutions : negR(revolutions));
  const unit = revolutions.n > 0 ? unitOfFactors([...above, ...turns], below) : unitOfFactors(above, [...below, ...turns]);
  if (known.size > 500) known.clear();
  known.set(key, unit);
  return unit;
}
