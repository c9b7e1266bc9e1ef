// A template, or any sheet, put into another sheet as a block, as often as it is wanted: each time with a suffix on its names.
//
// 1. F_1 becomes F_1_B and k becomes k_B, in formulas, notes, drawings, charts, choices and texts alike.
// 2. A table that the sheet has already, row for row, is shared; any other comes along under its name with the suffix.
// 3. A given of the block may be connected: it becomes a derived quantity with a formula of the sheet, in the same unit.
// 4. Values by case follow the ids of the cases; what finds no case is told and stands at its value for all cases.
// 5. Every given of the block is carried over until somebody confirms it.
// 6. A block that would not fit (names taken, a connection that is no quantity of that kind) is refused with sentences; the sheet
//    stays as it is.
// Not here: texts (block-texts.ts), names in formulas (rename.ts), the step of editing (edit.ts).

import { canonicalName, isName, nearestNames, parseFormula, plainName } from '../formula/index.ts';
import type { Problem } from '../quantity/index.ts';
import {
  citedIds,
  type MergedReferences,
  mergeReferences,
  renameInProse,
  withCitations,
  withDecimalSign,
  withProse,
} from './block-texts.ts';
import { calculate } from './calculation.ts';
import { casesOf } from './cases.ts';
import type { Cell, DerivedCell, GivenCell, Sheet, TableCell } from './document.ts';
import { applyEdit, type Edit, newCellId } from './edit.ts';
import { readCell } from './reading.ts';
import { type Renaming, renamedCell } from './rename.ts';
import { idPattern } from './schema.ts';
import { withoutJob } from './template.ts';

export interface Connection {
  /** A given of the block, by its name in the template or with the suffix. */
  readonly name: string;
  /** A formula of the sheet: `n_2`, or `P*eta`. */
  readonly formula: string;
}
export interface BlockOptions {
  /** Letters and digits: `B` makes F_1_B of F_1. */
  readonly suffix: string;
  /** Index of the first cell of the block. */
  readonly at: number;
  /** What the block is, for its first heading; the title of the template by default. */
  readonly title?: string;
  readonly connect?: readonly Connection[];
}
export type InsertedBlock =
  | {
      readonly ok: true;
      readonly edit: Edit;
      /** What the step is called: 'block B of Flat belt drive'. */
      readonly label: string;
      /** From a canonical name in the template to its name in the sheet. */
      readonly names: ReadonlyMap<string, string>;
      readonly cells: readonly string[];
      /** Warnings: cases without a partner. */
      readonly notes: readonly Problem[];
    }
  | { readonly ok: false; readonly problems: readonly Problem[] };

/**
 * The step that puts the block in. Codes of a refusal: 'bad-suffix', 'name-taken', 'unknown-name', 'computed-name', 'connected-twice',
 * 'connect-choice', and those of reading a formula or of a cell that would not stand.
 */
export function insertBlock(sheet: Sheet, template: Sheet, options: BlockOptions): InsertedBlock {
  const suffix = canonicalName(options.suffix);
  const names = blockNames(template, suffix);
  const faults = nameFaults(sheet, template, options.suffix, suffix, names);
  const connections = readConnections(sheet, template, names, options.connect ?? []);
  if (faults.length > 0 || !connections.ok)
    return { ok: false, problems: connections.ok ? faults : [...faults, ...connections.problems] };
  const tables = blockTables(sheet, template, suffix);
  const merged = mergeReferences(sheet.references ?? [], citedReferences(template));
  const title = options.title?.trim() || template.title;
  const cells = blockCells(sheet, template, { suffix, title, names, tables, merged, connections: connections.value });
  const edit: Edit = {
    kind: 'batch',
    edits: [
      ...(merged.references === (sheet.references ?? []) || merged.references.length === (sheet.references ?? []).length
        ? []
        : [{ kind: 'set-head' as const, key: 'references' as const, value: merged.references }]),
      ...cells.map((cell, i) => ({ kind: 'insert-cell' as const, cell, at: options.at + i })),
    ],
  };
  const problems = misfits(sheet, edit, cells);
  if (problems.length > 0) return { ok: false, problems };
  return {
    ok: true,
    edit,
    label: `block ${options.suffix.trim()} of ${title}`,
    names,
    cells: cells.map(({ id }) => id),
    notes: caseNotes(sheet, template, names),
  };
}

/** The first suffix, B to Z and then 2, 3 …, that gives every name of the block a free one. */
export function freeSuffix(sheet: Sheet, template: Sheet): string {
  const taken = namesOf(sheet);
  const own = [...namesOf(template)];
  const free = (suffix: string) => own.every((name) => !taken.has(withSuffix(name, suffix)));
  const letter = [...'BCDEFGHIJKLMNOPQRSTUVWXYZ'].find(free);
  if (letter !== undefined) return letter;
  let number = 2;
  while (!free(String(number))) number += 1;
  return String(number);
}

const withSuffix = (name: string, suffix: string): string => `${name}_${suffix}`;

function namesOf(sheet: Sheet): Set<string> {
  const names = new Set<string>();
  for (const cell of sheet.cells) if ('name' in cell && cell.kind !== 'table') names.add(canonicalName(cell.name));
  return names;
}

function blockNames(template: Sheet, suffix: string): ReadonlyMap<string, string> {
  return new Map([...namesOf(template)].map((name) => [name, withSuffix(name, suffix)]));
}

function fault(code: string, message: string): Problem {
  return { code, severity: 'error', message };
}

function nameFaults(
  sheet: Sheet,
  template: Sheet,
  typed: string,
  suffix: string,
  names: ReadonlyMap<string, string>,
): readonly Problem[] {
  if (!/^[A-Za-z0-9]{1,20}$/.test(suffix))
    return [fault('bad-suffix', `“${typed.slice(0, 40)}” cannot be a suffix: take letters and digits, as in B or 2`)];
  const taken = namesOf(sheet);
  const twice = [...names.values()].filter((name) => taken.has(name));
  if (twice.length > 0) {
    const shown = twice.slice(0, 4).map(plainName).join(', ');
    const more = twice.length > 4 ? ` and ${twice.length - 4} more` : '';
    return [
      fault(
        'name-taken',
        `${shown}${more} ${twice.length === 1 ? 'is' : 'are'} in the sheet already; take another suffix, ${freeSuffix(sheet, template)} is free`,
      ),
    ];
  }
  return [...names.values()]
    .filter((name) => !isName(name))
    .map((name) => fault('bad-name', `${name.slice(0, 60)} would be no name; correct it in the template first`));
}

type Connected = ReadonlyMap<string, string>;

function readConnections(
  sheet: Sheet,
  template: Sheet,
  names: ReadonlyMap<string, string>,
  connect: readonly Connection[],
): { readonly ok: true; readonly value: Connected } | { readonly ok: false; readonly problems: readonly Problem[] } {
  const given = new Map<string, GivenCell>();
  for (const cell of template.cells) if (cell.kind === 'given') given.set(canonicalName(cell.name), cell);
  const own = new Map([...names].map(([name, to]) => [to, name]));
  const value = new Map<string, string>();
  const problems: Problem[] = [];
  for (const { name: typed, formula } of connect) {
    const asked = canonicalName(typed);
    const name = names.has(asked) ? asked : (own.get(asked) ?? asked);
    const cell = given.get(name);
    const shown = typed.trim().slice(0, 60);
    if (cell === undefined) {
      problems.push(
        names.has(name)
          ? fault('computed-name', `${shown} is calculated in the block and cannot be connected; connect a given of it`)
          : fault('unknown-name', `the block has no given ${shown}${offer(name, [...given.keys()])}`),
      );
    } else if (value.has(name)) {
      problems.push(fault('connected-twice', `${shown} is connected twice; one formula says what it is`));
    } else if (cell.choices !== undefined) {
      problems.push(
        fault('connect-choice', `${shown} is a choice from table ${cell.choices.split('.')[0]}; only numbers are connected`),
      );
    } else {
      const parsed = parseFormula(formula, { decimalSign: signOf(sheet) });
      if (parsed.ok) value.set(name, formula.trim());
      else problems.push({ ...parsed.problem, message: `${shown}: ${parsed.problem.message}` });
    }
  }
  return problems.length > 0 ? { ok: false, problems } : { ok: true, value };
}

function offer(name: string, known: readonly string[]): string {
  const near = nearestNames(name, known).slice(0, 3);
  return near.length > 0 ? `; did you mean ${near.join(', ')}?` : '';
}

/** From the name of a table in the template to that in the sheet; shared tables are those that need not come along. */
interface BlockTables {
  readonly names: ReadonlyMap<string, string>;
  readonly shared: ReadonlySet<string>;
}

function blockTables(sheet: Sheet, template: Sheet, suffix: string): BlockTables {
  const known = sheet.cells.filter((cell): cell is TableCell => cell.kind === 'table');
  const taken = new Set(known.map(({ name }) => name));
  const names = new Map<string, string>();
  const shared = new Set<string>();
  for (const cell of template.cells) {
    if (cell.kind !== 'table') continue;
    const there = withDecimalSign(cell, signOf(template), signOf(sheet)) as TableCell;
    const same = known.find(
      (other) => (other.name === cell.name || other.name.startsWith(`${cell.name}_`)) && sameRows(other, there),
    );
    if (same !== undefined) {
      names.set(cell.name, same.name);
      shared.add(cell.name);
      continue;
    }
    let name = withSuffix(cell.name, suffix);
    for (let more = 2; taken.has(name); more += 1) name = withSuffix(cell.name, `${suffix}${more}`);
    taken.add(name);
    names.set(cell.name, name);
  }
  return { names, shared };
}

function sameRows(one: TableCell, other: TableCell): boolean {
  const data = ({ columns, rows }: TableCell) => JSON.stringify([columns.map(({ name, unit }) => [name, unit ?? null]), rows]);
  return data(one) === data(other);
}

const signOf = (sheet: Sheet): '.' | ',' => sheet.settings?.decimalSign ?? '.';

/** What the block cites: in its cells, and in the method, which comes along as a note. */
export function citedReferences(template: Sheet) {
  const texts: string[] = [template.method ?? ''];
  for (const cell of template.cells) {
    withProse(cell, (text) => {
      texts.push(text);
      return text;
    });
  }
  const cited = new Set(texts.flatMap(citedIds));
  return (template.references ?? []).filter(({ id }) => cited.has(id));
}

interface BlockParts {
  readonly suffix: string;
  readonly title: string;
  readonly names: ReadonlyMap<string, string>;
  readonly tables: BlockTables;
  readonly merged: MergedReferences;
  readonly connections: Connected;
}

function blockCells(sheet: Sheet, template: Sheet, parts: BlockParts): readonly Cell[] {
  const { suffix, names, tables, merged } = parts;
  const quantity = (name: string) => names.get(name);
  const renaming: Renaming = { quantity, table: (name) => tables.names.get(name) };
  const cases = new Set(casesOf(sheet).map(({ id }) => id));
  const prose = (text: string) => renameInProse(withCitations(text, merged.ids), quantity);
  const cells = template.cells
    .filter((cell) => cell.kind !== 'table' || !tables.shared.has(cell.name))
    .map((cell) => {
      const worked = withDecimalSign(onlyCases(withoutJob(cell), cases), signOf(template), signOf(sheet));
      const named = marked(withProse(renamedCell(worked, renaming), prose), suffix);
      const formula = cell.kind === 'given' ? parts.connections.get(canonicalName(cell.name)) : undefined;
      return formula === undefined || named.kind !== 'given' ? named : connected(named, formula, signOf(sheet));
    });
  const [first] = cells;
  const hasHeading = first?.kind === 'heading';
  const lead: Cell = {
    id: hasHeading ? first.id : 'h-block',
    kind: 'heading',
    level: 1,
    text: hasHeading ? `${first.text}: ${parts.title}` : `${parts.title} (${suffix})`,
  };
  const note: Cell = { id: 'note-block', kind: 'note', text: blockNote(template, parts, prose) };
  return withFreshIds(sheet, [lead, note, ...(hasHeading ? cells.slice(1) : cells)], suffix);
}

function blockNote(template: Sheet, { suffix, title }: BlockParts, prose: (text: string) => string): string {
  const info = template.templateInfo ?? template.template;
  const origin = info === undefined ? '' : `, from template ${info.id}, version ${info.version}`;
  const method = template.method?.trim() ?? '';
  return `${title}${origin}: the names of this block carry the suffix ${suffix}.${method === '' ? '' : ` ${prose(method)}`}`;
}

/** Lines without a symbol of their own say in their title which block they belong to. */
function marked(cell: Cell, suffix: string): Cell {
  if (cell.kind === 'heading') return { ...cell, text: `${cell.text} (${suffix})` };
  const bare =
    cell.kind === 'criterion' ||
    cell.kind === 'drawing' ||
    cell.kind === 'chart' ||
    cell.kind === 'table' ||
    cell.kind === 'figure';
  return bare && cell.title !== undefined ? { ...cell, title: `${cell.title} (${suffix})` } : cell;
}

export function onlyCases(cell: Cell, cases: ReadonlySet<string>): Cell {
  if (cell.kind !== 'given' || cell.byCase === undefined) return cell;
  const { byCase, ...rest } = cell;
  const kept = Object.entries(byCase).filter(([id]) => cases.has(id));
  return kept.length === 0 ? rest : { ...rest, byCase: Object.fromEntries(kept) };
}

function connected(cell: GivenCell, formula: string, decimalSign: '.' | ','): DerivedCell {
  const unit = cell.unit ?? readCell(cell, decimalSign).value?.unit.text;
  const parsed = parseFormula(formula, { decimalSign });
  const from = parsed.ok ? parsed.value.names.map(plainName).join(', ') : '';
  return {
    id: cell.id,
    kind: 'derived',
    name: cell.name,
    ...(cell.title === undefined ? {} : { title: cell.title }),
    formula,
    ...(unit === undefined ? {} : { unit }),
    source: from === '' ? 'set for this block' : `taken from ${from} of this sheet`,
  };
}

/** `F_1-B` where that is free, so that the file reads well; else the next free number. */
function withFreshIds(sheet: Sheet, cells: readonly Cell[], suffix: string): readonly Cell[] {
  const taken = new Set(sheet.cells.map(({ id }) => id));
  const added: Cell[] = [];
  for (const cell of cells) {
    const wanted = `${cell.id}-${suffix}`;
    const id =
      idPattern.test(wanted) && !taken.has(wanted)
        ? wanted
        : newCellId({ ...sheet, cells: [...sheet.cells, ...added] }, cell.kind);
    taken.add(id);
    added.push({ ...cell, id });
  }
  return added;
}

/** What cells of the block would have against their new place, whatever the numbers. */
function misfits(sheet: Sheet, edit: Edit, cells: readonly Cell[]): readonly Problem[] {
  const own = new Map(cells.map((cell) => [cell.id, 'name' in cell ? plainName(canonicalName(cell.name)) : cell.id]));
  return calculate(applyEdit(sheet, edit).sheet)
    .problems()
    .filter(
      ({ cell, severity, code, case: one }) => severity === 'error' && one === undefined && code !== 'waits-for' && own.has(cell),
    )
    .map((problem) => fault(problem.code, `${own.get(problem.cell)}: ${problem.message}`));
}

function caseNotes(sheet: Sheet, template: Sheet, names: ReadonlyMap<string, string>): readonly Problem[] {
  const here = new Set(casesOf(sheet).map(({ id }) => id));
  const there = new Set(casesOf(template).map(({ id }) => id));
  const own = new Map<string, string[]>();
  for (const cell of template.cells) {
    if (cell.kind !== 'given') continue;
    const name = plainName(names.get(canonicalName(cell.name)) ?? cell.name);
    for (const id of Object.keys(cell.byCase ?? {})) own.set(id, [...(own.get(id) ?? []), name]);
  }
  const notes: Problem[] = [];
  for (const [id, givens] of own) {
    if (here.has(id)) continue;
    notes.push({
      code: 'case-left-out',
      severity: 'warning',
      message: `the sheet has no case ${id}, for which the template has values of its own: ${givens.join(', ')} stand at their value for all cases`,
    });
  }
  if (own.size === 0) return notes;
  for (const id of here) {
    if (there.has(id)) continue;
    notes.push({
      code: 'case-not-in-template',
      severity: 'warning',
      message: `the template knows no case ${id}: the block stands there at its values for all cases; set what is other in ${id}`,
    });
  }
  return notes;
}
