// The order of calculation as flat arrays: for every place what to run, so that a run of ten thousand cells touches no object.
//
// 1. Entry p speaks of the node at place p of the graph's order; the plan is made anew whenever code, slots or order move.
// 2. `formula` marks a derived cell whose run is judged by its numbers alone; everything else takes the careful way.
// 3. Cells that stand side by side in order and in code may be run as one stretch.
// Not here: what is stale, what failed (calculation.ts).

import type { Columns } from './columns.ts';
import type { Graph } from './graph.ts';
import type { Node } from './node.ts';

export const mode = { nothing: 0, careful: 1, formula: 2 } as const;

export interface Plan {
  readonly mode: Uint8Array;
  readonly slot: Int32Array;
  readonly start: Int32Array;
  readonly end: Int32Array;
}

export function makePlan(nodes: readonly Node[], graph: Graph, columns: Columns): Plan {
  const count = nodes.length;
  const plan: Plan = {
    mode: new Uint8Array(count),
    slot: new Int32Array(count),
    start: new Int32Array(count),
    end: new Int32Array(count),
  };
  for (let place = 0; place < count; place += 1) {
    const node = nodes[graph.order[place]!]!;
    plan.slot[place] = columns.slotOf(node);
    const range = columns.rangesOf(node)?.[0];
    if (
      node.cell.kind === 'derived' &&
      range !== undefined &&
      !node.broken &&
      !node.jumps &&
      !node.usesTexts &&
      node.failed.length === 0
    ) {
      plan.mode[place] = mode.formula;
      plan.start[place] = range.start;
      plan.end[place] = range.end;
    } else {
      plan.mode[place] = columns.slotsOf(node) > 0 ? mode.careful : mode.nothing;
    }
  }
  return plan;
}
