// The cell of the grid that is in the tab order, and what becomes of it when its line goes.
//
// 1. A grid with lines always has one cell in the tab order.
// Not here: the focus itself (paper.ts).

export interface Place {
  readonly cell: string;
  readonly column: number;
}

/** The place itself, or where its line has gone, the line that now stands where it stood; null where no line is left. */
export function stillThere(place: Place | null, before: readonly string[], now: readonly string[]): Place | null {
  if (place === null || now.includes(place.cell)) return place;
  const cell = now[Math.min(Math.max(before.indexOf(place.cell), 0), now.length - 1)];
  return cell === undefined ? null : { ...place, cell };
}
