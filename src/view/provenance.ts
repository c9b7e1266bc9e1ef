// What is done about where a number comes from: confirming a value that was carried over, stating a basis, keeping the former source.
//
// Not here: typing a value or a source (desk.ts), what typing does to a given (given.ts).

import type { GivenCell } from '../sheet/index.ts';
import type { Desk } from './desk-face.ts';
import { type Provenance, provenanceOf, withBasis } from './given.ts';

export interface ProvenanceHouse {
  givenOf(id: string): GivenCell | undefined;
  /** True where nothing may be written. */
  refused(): boolean;
  keep(cell: GivenCell, label?: string, words?: string): void;
  /** Basis and source that stood beside the number before the last one, by cell. */
  readonly former: Map<string, Provenance>;
}

export function provenanceActs({
  givenOf,
  refused,
  keep,
  former,
}: ProvenanceHouse): Pick<Desk, 'confirm' | 'setBasis' | 'formerProvenance' | 'restoreProvenance'> {
  return {
    confirm(id) {
      const cell = givenOf(id);
      if (cell?.carriedOver === undefined || refused()) return;
      const { carriedOver: _, ...rest } = cell;
      keep(rest, `confirmation of ${cell.name}`, `${cell.name} is confirmed`);
    },
    setBasis(id, basis) {
      const cell = givenOf(id);
      if (cell === undefined || refused()) return;
      keep(withBasis(cell, basis), undefined, `basis of ${cell.name} ${basis ?? 'not stated'}`);
    },
    formerProvenance(id) {
      const cell = givenOf(id);
      return cell !== undefined && provenanceOf(cell) === undefined ? former.get(id) : undefined;
    },
    restoreProvenance(id) {
      const cell = givenOf(id);
      const before = former.get(id);
      if (cell === undefined || before === undefined || refused()) return;
      former.delete(id);
      keep({ ...cell, ...before }, `source of ${cell.name}`, `source of ${cell.name} kept`);
    },
  };
}
