// What the helpers of the paper may ask of it.
//
// Not here: the paper (paper.ts), its helpers (new-lines.ts, line-commands.ts).

import type { Desk } from './desk-face.ts';

export interface PaperHost {
  readonly element: HTMLElement;
  desk(): Desk;
  /** The cell of the grid that is in the tab order. */
  place(): { readonly cell: string; readonly column: number } | null;
  /** Puts the focus into a row; false where there is no such row. */
  focus(cell: string, column: number): boolean;
  redraw(): void;
  /** What the desk has now stands on the paper. */
  drawn(): Promise<void>;
}
