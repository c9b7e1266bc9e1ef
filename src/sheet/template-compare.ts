// A sheet beside the template that it came from: which formulas are the template's still, which were changed, what came and went.
//
// 1. Quantities and tables are matched by name, criteria by id, then by title. A quantity that is calculated in one and typed in
//    the other is changed.
// 2. Compared is what computes: formulas, units of results, relations, equations, rows. Values, titles and sources of givens are the
//    business of the job. Spelling that means the same (μ and mu, spaces, the decimal sign) is no change.
// 3. `was` and `now` are texts for a reader, in the spelling of each file.
// Not here: values that are carried over (template.ts).

import { canonicalName, tokenize } from '../formula/index.ts';
import { dimensionKey, readUnit } from '../quantity/index.ts';
import { withDecimalSign } from './block-texts.ts';
import type { Cell, CriterionCell, GivenCell, Sheet, TableCell } from './document.ts';
import { readCell } from './reading.ts';

type Compared = Extract<Cell, { readonly kind: 'given' | 'derived' | 'criterion' | 'sought' | 'table' }>;

export interface CellComparison {
  readonly cell: string;
  readonly kind: Compared['kind'];
  readonly name?: string;
  readonly state: 'untouched' | 'changed' | 'added';
  /** Of a changed cell: in the template, and here. */
  readonly was?: string;
  readonly now?: string;
}
export interface RemovedCell {
  readonly kind: Compared['kind'];
  readonly name?: string;
  readonly title: string;
  readonly was: string;
}
export interface TemplateComparison {
  readonly id: string;
  /** Of the template compared with, and of the one that the sheet was made from. */
  readonly version: number;
  readonly madeFrom?: number;
  /** In the order of the sheet. */
  readonly cells: readonly CellComparison[];
  readonly removed: readonly RemovedCell[];
}

export function compareWithTemplate(sheet: Sheet, template: Sheet): TemplateComparison {
  const sign = sheet.settings?.decimalSign ?? '.';
  const theirs = template.cells
    .map((cell) => withDecimalSign(cell, template.settings?.decimalSign ?? '.', sign))
    .filter(isCompared);
  const mine = sheet.cells.filter(isCompared);
  const partners = matched(mine, theirs);
  const used = new Set(partners.values());
  const { template: origin } = sheet;
  return {
    id: template.templateInfo?.id ?? origin?.id ?? '',
    version: template.templateInfo?.version ?? origin?.version ?? 1,
    ...(origin === undefined ? {} : { madeFrom: origin.version }),
    cells: mine.map((cell) => compared(cell, partners.get(cell), sign)),
    removed: theirs
      .filter((cell) => !used.has(cell))
      .map((cell) => ({ ...labelled(cell), title: cell.title ?? '', was: shown(cell) })),
  };
}

function isCompared(cell: Cell): cell is Compared {
  return ['given', 'derived', 'criterion', 'sought', 'table'].includes(cell.kind);
}

function labelled(cell: Compared) {
  return { kind: cell.kind, ...(cell.kind === 'criterion' ? {} : { name: nameOf(cell) }) };
}

function nameOf(cell: Exclude<Compared, CriterionCell>): string {
  return cell.kind === 'table' ? cell.name : canonicalName(cell.name);
}

/** Keys by which a cell finds its partner, the strongest first. */
function keysOf(cell: Compared): readonly string[] {
  if (cell.kind === 'table') return [`table ${cell.name}`];
  if (cell.kind !== 'criterion') return [`quantity ${nameOf(cell)}`];
  return [`id ${cell.id}`, ...(cell.title === undefined ? [] : [`title ${cell.title.trim()}`])];
}

/** Each cell of the template is the partner of one cell at most. */
function matched(mine: readonly Compared[], theirs: readonly Compared[]): ReadonlyMap<Compared, Compared> {
  const partners = new Map<Compared, Compared>();
  const used = new Set<Compared>();
  for (const strength of [0, 1]) {
    const byKey = new Map<string, Compared>();
    for (const cell of theirs) {
      const key = keysOf(cell)[strength];
      if (key !== undefined && !used.has(cell) && !byKey.has(key)) byKey.set(key, cell);
    }
    for (const cell of mine) {
      const key = keysOf(cell)[strength];
      const partner = key === undefined || partners.has(cell) ? undefined : byKey.get(key);
      if (partner === undefined || used.has(partner)) continue;
      partners.set(cell, partner);
      used.add(partner);
    }
  }
  return partners;
}

function compared(cell: Compared, partner: Compared | undefined, sign: '.' | ','): CellComparison {
  const label = { cell: cell.id, ...labelled(cell) };
  if (partner === undefined) return { ...label, state: 'added' };
  if (meaning(cell, sign) === meaning(partner, sign)) return { ...label, state: 'untouched' };
  return { ...label, state: 'changed', was: shown(partner), now: shown(cell) };
}

const known = { '.': new WeakMap<Compared, string>(), ',': new WeakMap<Compared, string>() } as const;

/** Equal texts: the two compute alike. Cells never change: what was read of one holds. */
function meaning(cell: Compared, sign: '.' | ','): string {
  const before = known[sign].get(cell);
  if (before !== undefined) return before;
  const text = meaningAnew(cell, sign);
  known[sign].set(cell, text);
  return text;
}

function meaningAnew(cell: Compared, sign: '.' | ','): string {
  switch (cell.kind) {
    case 'given':
      return JSON.stringify(['given', cell.choices ?? dimensionOf(cell, sign)]);
    case 'derived':
      return JSON.stringify(['derived', formula(cell.formula), unitText(cell.unit)]);
    case 'criterion':
      return JSON.stringify(['criterion', formula(cell.left), cell.relation, formula(cell.right), unitText(cell.unit)]);
    case 'sought':
      return JSON.stringify([
        'sought',
        formula(cell.where),
        canonicalName(cell.instead ?? ''),
        cell.between.replace(/\s+/gu, ' ').trim(),
        unitText(cell.unit),
      ]);
    case 'table':
      return JSON.stringify(['table', cell.columns.map(({ name, unit }) => [name, unitText(unit)]), cell.rows]);
  }
}

/** A value in another unit of one kind is the job's; one of another kind is another quantity. */
function dimensionOf(cell: GivenCell, sign: '.' | ','): string {
  const { unit, value } = readCell(cell, sign);
  const held = unit ?? value?.unit;
  return held === undefined ? '' : dimensionKey(held.dimension);
}

function formula(text: string): readonly string[] {
  return tokenize(text).map((token) => (token.kind === 'string' ? `"${token.text.replace(/\s+/gu, ' ').trim()}"` : token.text));
}

function unitText(unit: string | undefined): string {
  if (unit === undefined) return '';
  const read = readUnit(unit);
  return read.ok ? read.value.text : unit.trim();
}

function shown(cell: Compared): string {
  const within = (unit: string | undefined) => (unit === undefined || unit === '1' ? '' : `, in ${unit}`);
  switch (cell.kind) {
    case 'given':
      return cell.choices === undefined ? `a given, ${cell.value.trim()}` : `a choice from ${cell.choices}`;
    case 'derived':
      return `${cell.formula.trim()}${within(cell.unit)}`;
    case 'criterion':
      return `${cell.left.trim()} ${cell.relation} ${cell.right.trim()}${within(cell.unit)}`;
    case 'sought':
      return `${cell.instead === undefined ? '' : `${cell.instead} sought so that `}${cell.where.trim()}, between ${cell.between.trim()}${within(cell.unit)}`;
    case 'table':
      return shownTable(cell);
  }
}

function shownTable({ columns, rows }: TableCell): string {
  const heads = columns.map(({ name, unit }) => (unit === undefined || unit === '1' ? name : `${name} in ${unit}`)).join(', ');
  const count = rows.length === 1 ? '1 row' : `${rows.length} rows`;
  return `${count} of ${heads}`;
}
