// A sheet made from a template or from an earlier sheet, and values set by name.
//
// 1. Every given of the new sheet is carried over until somebody confirms it or sets its value.
// 2. What belongs to the old job stays behind: names, numbers and dates of the title block, marks, revisions, log, justifications,
//    tracking numbers, the conclusion.
// 3. A value that is set loses basis, source, distribution and tracking number: provenance is never kept for a number it does
//    not belong to.
// 4. A value set for one case alone confirms that case only: the given stays carried over while another case still uses the old value.
// Not here: where templates are kept (src/cli, src/view).

import { canonicalName, nearestNames } from '../formula/index.ts';
import {
  equalD,
  type Problem,
  type Result,
  readUnit,
  readValue,
  turnsAgainstAngle,
  type Unit,
  withArticle,
} from '../quantity/index.ts';
import { calculate } from './calculation.ts';
import { casesOf } from './cases.ts';
import type { Cell, EarlierSheet, GivenCell, Sheet, TemplateOrigin, TitleBlock } from './document.ts';

/** A new sheet from a sheet that has a `templateInfo`; `fingerprint` is that of the template. */
export function newFromTemplate(template: Sheet, fingerprint?: string): Sheet {
  const info = template.templateInfo;
  if (info === undefined) throw new RangeError('the sheet is no template');
  const origin: TemplateOrigin = { id: info.id, version: info.version, ...(fingerprint === undefined ? {} : { fingerprint }) };
  return begun(template, { template: origin });
}

/** A new sheet for a similar job; what it stems from is named in it. */
export function newFromSheet(earlier: Sheet, fingerprint?: string): Sheet {
  const { documentNumber, revision } = earlier.titleBlock ?? {};
  const carriedFrom: EarlierSheet = {
    title: earlier.title,
    ...(documentNumber === undefined ? {} : { documentNumber }),
    ...(revision === undefined ? {} : { revision }),
    ...(fingerprint === undefined ? {} : { fingerprint }),
  };
  return begun(earlier, { ...(earlier.template ? { template: earlier.template } : {}), carriedFrom });
}

function begun(from: Sheet, origin: Pick<Sheet, 'template' | 'carriedFrom'>): Sheet {
  const { templateInfo: _, template: _1, carriedFrom: _2, conclusion: _3, marks: _4, revisions: _5, log: _6, ...kept } = from;
  const { titleBlock, ...rest } = kept;
  const block = titleBlock && generic(titleBlock);
  return {
    ...rest,
    ...origin,
    status: 'in preparation',
    ...(block === undefined ? {} : { titleBlock: block }),
    cells: from.cells.map(withoutJob),
    marks: [],
    revisions: [],
    log: [],
  };
}

/** What a title block says of the kind of document, not of the job. */
export function generic({ documentType, classification, language }: TitleBlock): TitleBlock {
  return {
    ...(documentType === undefined ? {} : { documentType }),
    ...(classification === undefined ? {} : { classification }),
    ...(language === undefined ? {} : { language }),
  };
}

/** The cell for another job: a given is carried over; what tracked or excused the old one is gone. */
export function withoutJob(cell: Cell): Cell {
  if (cell.kind === 'given') {
    const { toConfirm: _, ...rest } = cell;
    return { ...rest, carriedOver: true };
  }
  if (cell.kind === 'criterion' && cell.justification !== undefined) {
    const { justification: _, ...rest } = cell;
    return rest;
  }
  if (cell.kind === 'note' && cell.toConfirm !== undefined) {
    const { toConfirm: _, ...rest } = cell;
    return rest;
  }
  return cell;
}

export interface TemplateSummary {
  readonly id: string;
  readonly version: number;
  readonly title: string;
  readonly job: string;
  /** Canonical names in the order of the sheet: of the givens, and of what is calculated or sought. */
  readonly givens: readonly string[];
  readonly results: readonly string[];
}

export function templateSummary(template: Sheet): TemplateSummary {
  const info = template.templateInfo;
  if (info === undefined) throw new RangeError('the sheet is no template');
  const names = (kinds: readonly Cell['kind'][]): string[] =>
    template.cells.flatMap((cell) => ('name' in cell && kinds.includes(cell.kind) ? [canonicalName(cell.name)] : []));
  return {
    id: info.id,
    version: info.version,
    title: template.title,
    job: info.job,
    givens: names(['given']),
    results: names(['derived', 'sought']),
  };
}

export interface Assignment {
  readonly name: string;
  readonly value: string;
  /** For this case alone; none: for all cases. */
  readonly case?: string;
}
export type Assigned =
  | { readonly ok: true; readonly value: Sheet }
  | { readonly ok: false; readonly problems: readonly Problem[] };

/** Sets one value; see setValues. */
export function setValue(sheet: Sheet, name: string, value: string, options: { readonly case?: string } = {}): Result<Sheet> {
  const assigned = setValues(sheet, [{ name, value, ...options }]);
  return assigned.ok ? assigned : { ok: false, problem: assigned.problems[0]! };
}

/**
 * Sets values by name: first those for all cases, which drop the values by case, then those for one case.
 * Codes: 'unknown-name', 'computed-name', 'unknown-case', 'unlike-value', and those of reading a value or of the cell.
 */
export function setValues(sheet: Sheet, assignments: readonly Assignment[]): Assigned {
  const problems: Problem[] = [];
  const set = new Map<string, { cell: GivenCell; all: boolean; cases: Set<string> }>();
  const cases = casesOf(sheet).map(({ id }) => id);
  const ordered = [...assignments.filter((a) => a.case === undefined), ...assignments.filter((a) => a.case !== undefined)];
  for (const assignment of ordered) {
    const found = givenNamed(sheet, assignment.name);
    const fault = found.ok ? assignmentFault(found.value, assignment, sheet, cases) : found.problem;
    if (!found.ok || fault) {
      if (fault) problems.push(fault);
      continue;
    }
    const known = set.get(found.value.id) ?? { cell: found.value, all: false, cases: new Set<string>() };
    set.set(found.value.id, known);
    known.cell = withValue(known.cell, assignment, cases);
    if (assignment.case === undefined) known.all = true;
    else known.cases.add(assignment.case);
  }
  if (problems.length > 0) return { ok: false, problems };
  const next: Sheet = {
    ...sheet,
    cells: sheet.cells.map((cell) => {
      const change = set.get(cell.id);
      if (change === undefined) return cell;
      return change.all || cases.every((id) => change.cases.has(id)) ? confirmed(change.cell) : change.cell;
    }),
  };
  const refused = refusals(next, new Set(set.keys()));
  return refused.length > 0 ? { ok: false, problems: refused } : { ok: true, value: next };
}

function withValue(cell: GivenCell, assignment: Assignment, cases: readonly string[]): GivenCell {
  const { basis: _, source: _1, distribution: _2, toConfirm: _3, byCase, ...rest } = cell;
  const value = assignment.value.trim();
  if (assignment.case === undefined || cases.length === 1) return { ...rest, value };
  return { ...rest, byCase: { ...byCase, [assignment.case]: value } };
}

function confirmed(cell: GivenCell): GivenCell {
  const { carriedOver: _, ...rest } = cell;
  return rest;
}

function error(code: string, message: string): Problem {
  return { code, severity: 'error', message };
}

function givenNamed(sheet: Sheet, typed: string): Result<GivenCell> {
  const name = canonicalName(typed.trim());
  const givens: GivenCell[] = [];
  for (const cell of sheet.cells) {
    if (cell.kind === 'given') {
      if (canonicalName(cell.name) === name) return { ok: true, value: cell };
      givens.push(cell);
    } else if ((cell.kind === 'derived' || cell.kind === 'sought') && canonicalName(cell.name) === name) {
      const how = cell.kind === 'derived' ? `calculated as ${clipped(cell.formula)}` : `sought so that ${clipped(cell.where)}`;
      return {
        ok: false,
        problem: error('computed-name', `${name} is ${how} and cannot be set; set the givens that it comes from`),
      };
    }
  }
  const near = nearestNames(
    name,
    givens.map((cell) => canonicalName(cell.name)),
  ).slice(0, 3);
  const offer =
    near.length > 0
      ? `; did you mean ${near.join(', ')}?`
      : `; its givens are ${clipped(givens.map((cell) => canonicalName(cell.name)).join(', '), 200)}`;
  return { ok: false, problem: error('unknown-name', `the sheet has no given ${clipped(typed)}${offer}`) };
}

function assignmentFault(cell: GivenCell, assignment: Assignment, sheet: Sheet, cases: readonly string[]): Problem | undefined {
  if (assignment.case !== undefined && !cases.includes(assignment.case)) {
    return error('unknown-case', `the sheet has no case ${clipped(assignment.case)}; its cases are ${cases.join(', ')}`);
  }
  if (cell.choices !== undefined) return undefined;
  const decimalSign = sheet.settings?.decimalSign ?? '.';
  const read = readValue(assignment.value, { decimalSign });
  const name = canonicalName(cell.name);
  if (!read.ok) return { ...read.problem, message: `${name}: ${read.problem.message}` };
  const held = heldUnit(cell, decimalSign);
  if (held === undefined) return undefined;
  const { unit } = read.value;
  const shown = clipped(assignment.value);
  if (equalD(held.dimension, unit.dimension)) {
    if (!turnsAgainstAngle(unit, held)) return undefined;
    return error(
      'unlike-value',
      `${name} is ${withArticle(held)}, but ${shown} is ${withArticle(unit)}, and one revolution is 2π rad; give a value in ${held.text}`,
    );
  }
  return error(
    'unlike-value',
    `${name} is ${withArticle(held)}, but ${shown} is ${withArticle(unit)}; give a value in ${held.text === '1' ? 'plain numbers' : held.text}`,
  );
}

/** The unit that the given is declared in, else that of the value it holds. */
function heldUnit(cell: GivenCell, decimalSign: '.' | ','): Unit | undefined {
  if (cell.unit !== undefined) {
    const unit = readUnit(cell.unit);
    return unit.ok ? unit.value : undefined;
  }
  const value = readValue(cell.value, { decimalSign });
  return value.ok ? value.value.unit : undefined;
}

/** What the sheet itself has against a value that was set: a text that is no choice, a unit that counts revolutions where none may. */
function refusals(sheet: Sheet, set: ReadonlySet<string>): Problem[] {
  const names = new Map(
    sheet.cells.flatMap((cell) => (cell.kind === 'given' ? [[cell.id, canonicalName(cell.name)] as const] : [])),
  );
  return calculate(sheet)
    .problems()
    .filter(
      ({ cell, severity, field }) => severity === 'error' && set.has(cell) && (field === 'value' || field?.startsWith('byCase.')),
    )
    .map((problem) => ({ ...problem, message: `${names.get(problem.cell) ?? problem.cell}: ${problem.message}` }));
}

function clipped(text: string, most = 60): string {
  const line = text.replace(/\s+/gu, ' ').trim();
  return [...line].length > most ? `${[...line].slice(0, most).join('')}…` : line;
}
