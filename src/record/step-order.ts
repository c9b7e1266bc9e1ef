// The order in which steps are followed: each after those whose results it uses; the order of the sheet where that is one.
//
// No recursion: a chain of 50 000 definitions is ordinary input. A loop ends somewhere; its cells have no values anyway.

import type { Calculation, CriterionState, DerivedState } from '../sheet/index.ts';

export type ComputedState = DerivedState | CriterionState;

export function stepOrder(calculation: Calculation): readonly ComputedState[] {
  const order: ComputedState[] = [];
  const seen = new Set<string>();
  const computed = (id: string): ComputedState | undefined => {
    const state = calculation.state(id);
    return state?.kind === 'derived' || state?.kind === 'criterion' ? state : undefined;
  };
  for (const cell of calculation.sheet.cells) {
    if (seen.has(cell.id) || computed(cell.id) === undefined) continue;
    seen.add(cell.id);
    const path = [{ id: cell.id, next: 0, uses: calculation.origin(cell.id) }];
    for (let top = path.at(-1); top !== undefined; top = path.at(-1)) {
      const used = top.uses[top.next];
      top.next += 1;
      if (used === undefined) {
        path.pop();
        const state = computed(top.id);
        if (state) order.push(state);
      } else if (!seen.has(used) && computed(used) !== undefined) {
        seen.add(used);
        path.push({ id: used, next: 0, uses: calculation.origin(used) });
      }
    }
  }
  return order;
}
