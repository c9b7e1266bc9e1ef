// How the verdict on a criterion is printed: its utilisation, or the room that is left where there is no utilisation.
//
// 1. A utilisation rounds up to two decimals, with at least two significant digits; room rounds down. Both err to the safe side.
// 2. No printed utilisation crosses the limit: one that is met never prints beyond 1, one that is not met never prints within it.
// 3. Temperature readings have no ratio (20 °C is not twice 10 °C): their criteria show the room in K.
// Not here: the comparison itself (src/sheet), the digits of the sides (closing.ts).

import {
  firstPlace,
  lastPlace,
  type Numeral,
  numeralOfDouble,
  plainNumeral,
  roundAtPlace,
  roundSignificant,
} from '../quantity/index.ts';
import type { Relation } from '../sheet/index.ts';

const hundredths = -2;
const thousands = 3;

/** `utilisation` is positive and finite; `met` the verdict on the unrounded sides. */
export function utilisationNumeral(utilisation: number, relation: Relation, met: boolean): Numeral {
  const full = numeralOfDouble(utilisation);
  const first = firstPlace(full);
  // Two decimals tell what matters near 1; far below they would tell nothing, far above more than anybody can use.
  const significant = first < hundredths + 1 ? 2 : first >= thousands ? 4 : undefined;
  let printed = significant === undefined ? roundAtPlace(full, hundredths, 'up') : roundSignificant(full, significant, 'up');
  const strict = relation === '<' || relation === '>';
  // Met with < or >: the true value is below 1, and so is the printed one, with as many decimals as that takes.
  while (met && strict && utilisation < 1 && Number(plainNumeral(printed)) >= 1 && lastPlace(printed) > -18) {
    printed = roundAtPlace(full, lastPlace(printed) - 1, 'up');
  }
  // Not met by less than a double can tell from 1.
  if (!met && !strict && Number(plainNumeral(printed)) <= 1) return { negative: false, digits: '101', exponent: hundredths };
  return printed;
}

/** Room to the limit in coherent SI: positive where the criterion is met with something to spare. */
export function room(left: number, relation: Relation, right: number): number {
  return relation === '<' || relation === '<=' ? right - left : left - right;
}

/** True where demand is the left side. */
export function demandIsLeft(relation: Relation): boolean {
  return relation === '<' || relation === '<=';
}

export function holds(left: number, relation: Relation, right: number): boolean {
  if (relation === '<') return left < right;
  if (relation === '<=') return left <= right;
  if (relation === '>') return left > right;
  return left >= right;
}

export const texRelation: Readonly<Record<Relation, string>> = { '<': '<', '<=': '\\le', '>': '>', '>=': '\\ge' };
/** What holds instead where the relation does not. */
export const texUnmet: Readonly<Record<Relation, string>> = { '<': '\\ge', '<=': '>', '>': '\\le', '>=': '<' };
