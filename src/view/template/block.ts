// A block of a template before it is put into the sheet: its givens, what each may be taken from, where it comes, and the sheet with it.
//
// 1. A given is offered the quantities of its own kind: those with its name first, then those whose title has words in common.
// 2. The preview is the record of the sheet with the block in it; nothing is put in for it.
// Not here: how a block is put in (src/sheet, insertBlock), the form (block-form.ts).

import { canonicalName } from '../../formula/index.ts';
import { makeRecord, type RecordModel } from '../../record/index.ts';
import {
  applyEdit,
  type Calculation,
  type Connection,
  calculate,
  type GivenCell,
  type InsertedBlock,
  insertBlock,
  type QuantityState,
  type Sheet,
} from '../../sheet/index.ts';
import { solver } from '../../study/index.ts';

export interface BlockChoice {
  readonly template: Sheet;
  readonly suffix: string;
  /** What the block is called; '' for the title of the template. */
  readonly title: string;
  /** Index of its first cell. */
  readonly at: number;
  /** Formulas of the sheet, by the canonical name of a given of the template; '' where the value of the template stands. */
  readonly taken: ReadonlyMap<string, string>;
}

export interface Offer {
  readonly name: string;
  readonly title: string;
}

/** The quantities of the sheet that a given of the template may be taken from. */
export function offersFor(given: GivenCell, template: Calculation, sheet: Calculation): readonly Offer[] {
  const own = template.state(given.id);
  const type = own?.kind === 'given' ? own.type : undefined;
  if (type === undefined || given.choices !== undefined) return [];
  const name = canonicalName(given.name);
  const words = wordsOf(given.title ?? '');
  const offers: { readonly offer: Offer; readonly rank: number }[] = [];
  for (const { id } of sheet.sheet.cells) {
    const state = sheet.state(id);
    if (!isQuantity(state) || state.type === undefined || !sameKind(state, own)) continue;
    const title = state.cell.title ?? '';
    const common = wordsOf(title).filter((word) => words.includes(word)).length;
    const called = canonicalName(state.cell.name);
    offers.push({ offer: { name: called, title }, rank: common + (called === name ? 100 : 0) });
  }
  return offers.sort((one, other) => other.rank - one.rank).map(({ offer }) => offer);
}

const isQuantity = (state: ReturnType<Calculation['state']>): state is QuantityState =>
  state?.kind === 'given' || state?.kind === 'derived' || state?.kind === 'sought';

function sameKind(one: QuantityState, other: ReturnType<Calculation['state']>): boolean {
  if (!isQuantity(other) || one.unit === undefined || other.unit === undefined) return false;
  return JSON.stringify(one.unit.dimension) === JSON.stringify(other.unit.dimension);
}

const wordsOf = (text: string): readonly string[] => text.toLocaleLowerCase().match(/\p{L}{3,}/gu) ?? [];

export interface BlockPlace {
  /** '3 Belt forces' */
  readonly words: string;
  /** Index behind the last cell of the section. */
  readonly at: number;
}

/** Behind which sections a block may stand; a block has headings of its own and would tear a section in two. */
export function placesOf(sheet: Calculation): readonly BlockPlace[] {
  const { cells } = sheet.sheet;
  const begins = cells.flatMap((cell, at) => (cell.kind === 'heading' && (cell.level ?? 1) === 1 ? [at] : []));
  if (begins.length === 0) return [{ words: 'the last line', at: cells.length }];
  return begins.map((begin, index) => {
    const cell = cells[begin];
    const text = cell?.kind === 'heading' ? cell.text : '';
    return { words: `${sheet.numberOf(cell?.id ?? '')} ${text}`.trim(), at: begins[index + 1] ?? cells.length };
  });
}

/** The place behind the section that the line stands in; the last one for a line that is none. */
export function placeFor(sheet: Calculation, cell: string | null): number {
  const places = placesOf(sheet);
  const index = sheet.sheet.cells.findIndex(({ id }) => id === cell);
  const place = index < 0 ? undefined : places.find(({ at }) => at > index);
  return (place ?? places.at(-1))?.at ?? 0;
}

export interface BlockPreview {
  readonly done: InsertedBlock;
  /** The record of the sheet with the block; null where it cannot be put in. */
  readonly model: RecordModel | null;
  readonly cells: ReadonlySet<string>;
}

export function previewOf(sheet: Sheet, { template, suffix, title, at, taken }: BlockChoice): BlockPreview {
  const connect: readonly Connection[] = [...taken].flatMap(([name, formula]) =>
    formula.trim() === '' ? [] : [{ name, formula: formula.trim() }],
  );
  const done = insertBlock(sheet, template, { suffix, at, connect, ...(title.trim() === '' ? {} : { title: title.trim() }) });
  if (!done.ok) return { done, model: null, cells: new Set() };
  return { done, model: makeRecord(calculate(applyEdit(sheet, done.edit).sheet, solver)), cells: new Set(done.cells) };
}
