// What typing into a given does to it.
//
// 1. A number that is changed loses what spoke of the number before: basis, source, distribution, tracking number.
// 2. It is confirmed (no longer carried over) once no case still holds a value of before.
// Not here: reading of the value (src/sheet), the way back (desk.ts).

import type { Basis, Distribution, GivenCell } from '../sheet/index.ts';

export interface Provenance {
  readonly basis?: Basis;
  readonly source?: string;
  readonly distribution?: Distribution;
  readonly toConfirm?: string;
}

/** True where the case has no value of its own, so that typing in its column means all such cases. */
export const sharesValue = (cell: GivenCell, caseId: string) => cell.byCase?.[caseId] === undefined;

export const heldValue = (cell: GivenCell, caseId: string) => cell.byCase?.[caseId] ?? cell.value;

/** The value for one case, or for all cases without a value of their own; `forAll` takes the case's own value out. */
export function withValue(cell: GivenCell, caseId: string, text: string, forAll: boolean): GivenCell {
  const { byCase, carriedOver, ...rest } = cell;
  const own = new Map(Object.entries(byCase ?? {}));
  if (forAll) own.delete(caseId);
  else own.set(caseId, text);
  return {
    ...rest,
    ...(forAll ? { value: text } : {}),
    ...(own.size === 0 ? {} : { byCase: Object.fromEntries(own) }),
    ...(carriedOver === undefined || (forAll && own.size === 0) ? {} : { carriedOver }),
  };
}

export function withoutProvenance(cell: GivenCell): GivenCell {
  const { basis: _basis, source: _source, distribution: _distribution, toConfirm: _toConfirm, ...rest } = cell;
  return rest;
}

export function provenanceOf({ basis, source, distribution, toConfirm }: GivenCell): Provenance | undefined {
  const all = {
    ...(basis === undefined ? {} : { basis }),
    ...(source === undefined ? {} : { source }),
    ...(distribution === undefined ? {} : { distribution }),
    ...(toConfirm === undefined ? {} : { toConfirm }),
  };
  return Object.keys(all).length === 0 ? undefined : all;
}

export const provenanceText = (of: Provenance | undefined) =>
  of === undefined ? '' : [of.source ?? '', of.basis ?? ''].filter((part) => part !== '').join(', ');

export function withSource(cell: GivenCell, text: string): GivenCell {
  const { source: _, ...rest } = cell;
  return text.trim() === '' ? rest : { ...rest, source: text.trim() };
}

export function withBasis(cell: GivenCell, basis: Basis | null): GivenCell {
  const { basis: _, ...rest } = cell;
  return basis === null ? rest : { ...rest, basis };
}
