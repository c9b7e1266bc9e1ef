// The verdict on a criterion: met, not met, or not known.
//
// 1. Sides are compared unrounded.
// 2. A side that has no value gives null, never false.
// 3. Utilisation is demand over capacity: left/right for < and <=, right/left for > and >=; null where a side is not positive.

import type { Relation } from './document.ts';

export interface Verdict {
  readonly met: boolean | null;
  readonly utilisation: number | null;
}

/** Both sides in coherent SI; NaN for a side without a value. */
export function judge(left: number, relation: Relation, right: number): Verdict {
  if (Number.isNaN(left) || Number.isNaN(right)) return { met: null, utilisation: null };
  const met = holds(left, relation, right);
  if (left <= 0 || right <= 0) return { met, utilisation: null };
  const demandIsLeft = relation === '<' || relation === '<=';
  return { met, utilisation: demandIsLeft ? left / right : right / left };
}

function holds(left: number, relation: Relation, right: number): boolean {
  switch (relation) {
    case '<':
      return left < right;
    case '<=':
      return left <= right;
    case '>':
      return left > right;
    case '>=':
      return left >= right;
  }
}
