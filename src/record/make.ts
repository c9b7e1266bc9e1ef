// Makes the record of a calculated sheet.
//
// 1. A pure function of the calculation: the same sheet gives the same record, on every machine.
// 2. Every cell has its line, failed ones with their problem; nothing is left out and nothing throws for what a sheet says.
// Not here: the steps (steps.ts), their digits (case-print.ts), the lists at the head (heads.ts), forms (html.ts, json.ts).

import { canonicalName, plainName } from '../formula/index.ts';
import { printNumeral, readNumeral } from '../quantity/index.ts';
import type { Calculation, CellState, LoadCase, NoteState, TableState, TemplateComparison } from '../sheet/index.ts';
import { besideTemplate } from './beside-template.ts';
import { type CasePrint, printCases } from './case-print.ts';
import { comparisonWords, templateWords, withTemplate } from './from-template.ts';
import { assumptionsOf, openPointsOf, referencesOf, summaryOf } from './heads.ts';
import { type Heard, type LineReasons, type Memory, newMemory, same } from './memory.ts';
import type { Line, RecordModel } from './model.ts';
import { readProse } from './prose.ts';
import { makeStep, printedValue } from './steps.ts';
import { withMarks } from './table-marks.ts';
import { citationNotes, inCases, isBlank, noSource, replaceLive } from './words.ts';

export interface RecordOptions {
  /** The sheet beside its template (compareWithTemplate): said at the head and on the steps that are not the template's. */
  readonly template?: TemplateComparison;
  /**
   * Lines that somebody looks at. The steps of all others, but for criteria and givens, may still be those of the record before: made for
   * a screen that is completed in the next pause, never for a record that is kept or given away.
   */
  readonly first?: (cell: string) => boolean;
}

/** Printed values of every quantity, by cell id, one entry a case: the numerals of the record without its typesetting. */
export function printedValues(calculation: Calculation): ReadonlyMap<string, readonly (string | null)[]> {
  const prints = printCases(calculation, newMemory()(calculation).cases);
  const printed = new Map<string, readonly (string | null)[]>();
  for (const cell of calculation.sheet.cells) {
    const state = calculation.state(cell.id);
    if (state?.kind !== 'given' && state?.kind !== 'derived' && state?.kind !== 'sought') continue;
    printed.set(
      cell.id,
      prints.map((print) => printedValue(calculation, state, print)),
    );
  }
  return printed;
}

export type MakeRecord = (calculation: Calculation, options?: RecordOptions) => RecordModel;

/** Makes one record of a sheet after the other, each from what changed since the last; equal to what `makeRecord` gives. */
export function recordMaker(): MakeRecord {
  const remember = newMemory();
  return (calculation, options = {}) => make(calculation, options, remember(calculation));
}

export const makeRecord: MakeRecord = (calculation, options) => recordMaker()(calculation, options);

function make(calculation: Calculation, options: RecordOptions, memory: Memory): RecordModel {
  const { sheet } = calculation;
  memory.prints ??= { of: sheet, cases: printCases(calculation, memory.cases) };
  const prints = memory.prints.cases;
  const titles = calculation.cases.map(caseTitle);
  const plain: Line[] = [];
  for (const cell of sheet.cells) {
    const state = calculation.state(cell.id);
    if (state !== undefined) plain.push(keptLine(calculation, state, prints, titles, memory, options.first));
  }
  const lines = withTemplate(withMarks(plain, calculation, prints), options.template);
  const steps = lines.flatMap((line) => (line.kind === 'step' ? [line.step] : []));
  const problems = calculation.problems();
  const assumptions = assumptionsOf(calculation, steps, lines, titles);
  const live = (text: string | undefined) => readProse(text ?? '');
  return {
    title: sheet.title,
    titleBlock: sheet.titleBlock ?? {},
    settings: sheet.settings ?? {},
    status: sheet.status ?? 'in preparation',
    purpose: live(sheet.purpose),
    method: live(sheet.method),
    conclusion: live(sheet.conclusion),
    origin: originOf(calculation, options.template),
    beside: besideTemplate(calculation, lines, options.template),
    limits: sheet.templateInfo?.limits ?? [],
    caution: sheet.templateInfo?.caution ?? '',
    cases: calculation.cases.map((each, k) => ({ id: each.id, title: titles[k] ?? each.id })),
    summary: summaryOf(steps),
    assumptions,
    references: referencesOf(calculation, lines),
    openPoints: openPointsOf(calculation, lines, problems, assumptions),
    lines,
    steps,
    problems,
  };
}

function caseTitle(each: LoadCase, _index: number, all: readonly LoadCase[]): string {
  if (!isBlank(each.title)) return each.title ?? '';
  return all.length === 1 && each.id === 'base' ? '' : each.id;
}

function originOf(calculation: Calculation, comparison: TemplateComparison | undefined): string {
  const { template, carriedFrom } = calculation.sheet;
  const parts: string[] = [];
  if (template !== undefined) parts.push(`template ${template.id}, version ${template.version}`);
  if (carriedFrom !== undefined) {
    parts.push(
      [carriedFrom.documentNumber ?? '', carriedFrom.revision ? `rev ${carriedFrom.revision}` : '', carriedFrom.title]
        .filter((part) => part !== '')
        .join(' '),
    );
  }
  if (comparison !== undefined) {
    const same = template?.id === comparison.id && template.version === comparison.version;
    parts.push(`${same ? '' : `beside ${templateWords(comparison)}: `}${comparisonWords(comparison)}`);
  }
  return parts.join('; ');
}

/** The line of the record before, where nothing that it says or prints has moved. */
function keptLine(
  calculation: Calculation,
  state: CellState,
  prints: readonly CasePrint[],
  titles: readonly string[],
  { lines }: Memory,
  first: RecordOptions['first'],
): Line {
  if (first !== undefined && state.kind === 'derived' && !first(state.cell.id)) {
    const before = lines.leave(state.cell.id);
    if (before !== undefined) return before;
  }
  const grounds = groundsOf(calculation, state, prints);
  const holds = ({ reasons, heard }: LineReasons) =>
    same(reasons, grounds) &&
    heard.every(({ index, name, inExponent, answer }) => prints[index]?.printed(name, inExponent) === answer);
  return lines.take(state.cell.id, holds, () => {
    const heard: Heard[] = [];
    const listening = prints.map(
      (print): CasePrint => ({
        ...print,
        printed: (name, inExponent = false) => {
          const answer = print.printed(name, inExponent);
          heard.push({ index: print.index, name, inExponent, answer });
          return answer;
        },
      }),
    );
    return { reasons: { reasons: grounds, heard }, value: lineOf(calculation, state, listening, titles) };
  });
}

/** All that a line is made from, but for the printed numbers. */
function groundsOf(calculation: Calculation, state: CellState, prints: readonly CasePrint[]): readonly unknown[] {
  const { cell } = state;
  const grounds: unknown[] = [state, calculation.numberOf(cell.id)];
  const use = (name: string) => {
    const used = calculation.named(name);
    grounds.push(used, used === undefined ? '' : calculation.numberOf(used.cell.id));
  };
  if (state.kind === 'note') for (const { name } of state.live) use(name);
  const formulas =
    state.kind === 'derived'
      ? [state.formula]
      : state.kind === 'criterion' || state.kind === 'sought'
        ? [state.left, state.right]
        : [];
  for (const formula of formulas) {
    if (formula === undefined) continue;
    for (const name of formula.names) use(name);
    for (const name of formula.tables) grounds.push(calculation.table(name));
    if (state.kind !== 'sought') for (const print of prints) grounds.push(print.taken(formula));
  }
  if (state.kind === 'derived' || state.kind === 'criterion')
    for (const print of prints) grounds.push(print.open(cell.id), print.verdict(cell.id));
  return grounds;
}

function lineOf(calculation: Calculation, state: CellState, prints: readonly CasePrint[], titles: readonly string[]): Line {
  switch (state.kind) {
    case 'given':
    case 'derived':
    case 'sought':
    case 'criterion':
      return { kind: 'step', step: makeStep(calculation, state, prints) };
    case 'note':
      return noteLine(calculation, state, prints, titles);
    case 'table':
      return tableLine(calculation, state);
    case 'plain':
      return plainLine(calculation, state);
  }
}

function noteLine(calculation: Calculation, state: NoteState, prints: readonly CasePrint[], titles: readonly string[]): Line {
  const { cell } = state;
  const text = replaceLive(cell.text, state.live, (name) => {
    const quantity = calculation.named(name);
    if (quantity === undefined) return undefined;
    return inCases(
      prints.map((print) => printedValue(calculation, quantity, print)),
      titles,
    );
  });
  const role = cell.role === undefined ? {} : { role: cell.role };
  return {
    kind: 'note',
    cell: cell.id,
    ...role,
    text,
    blocks: readProse(text),
    notes: messages(state),
    source: cell.source ?? '',
  };
}

function tableLine(calculation: Calculation, state: TableState): Line {
  const { cell, data } = state;
  const { sheet } = calculation;
  const heads = cell.columns.map((column) => {
    const unit = column.unit === undefined || column.unit === '1' ? '' : column.unit;
    const read = data?.columns.find((each) => each.name === column.name)?.unit;
    return {
      title: column.title ?? column.name,
      unit: unit === '' ? '' : (read?.text ?? unit),
      numeric: column.unit !== undefined,
    };
  });
  const rows = cell.rows.map((row) =>
    row.map((text, k) => (heads[k]?.numeric ? asPrinted(text, calculation.style.decimalSign) : text)),
  );
  const notes = [...messages(state), ...(isBlank(cell.source) ? [noSource] : []), ...citationNotes(cell.source, sheet)];
  return {
    kind: 'table',
    cell: cell.id,
    title: cell.title ?? '',
    name: cell.name,
    source: cell.source ?? '',
    heads,
    rows,
    marks: [],
    notes,
  };
}

/** A typed number with the signs and groups of print; all its digits stay. */
function asPrinted(text: string, decimalSign: '.' | ','): string {
  const read = readNumeral(text, decimalSign);
  return read.ok ? printNumeral(read.value, { decimalSign }) : text;
}

function plainLine(calculation: Calculation, state: Extract<CellState, { kind: 'plain' }>): Line {
  const { cell } = state;
  switch (cell.kind) {
    case 'heading':
      return { kind: 'heading', cell: cell.id, number: calculation.numberOf(cell.id), level: cell.level ?? 1, text: cell.text };
    case 'figure':
      return {
        kind: 'other',
        cell: cell.id,
        what: 'figure',
        title: cell.title ?? '',
        source: cell.source ?? '',
        image: cell.image,
        text: 'The picture of this figure cannot be shown.',
      };
    case 'drawing':
      return {
        kind: 'other',
        cell: cell.id,
        what: 'drawing',
        title: cell.title ?? cell.layout,
        source: '',
        text: `Drawing “${cell.layout}”: not drawn in this version.`,
      };
    case 'chart':
      return {
        kind: 'other',
        cell: cell.id,
        what: 'chart',
        title: cell.title ?? '',
        source: '',
        text: `Chart of ${cell.show.join(', ')} over ${plainName(canonicalName(cell.vary))} from ${cell.from} to ${cell.to}: not drawn in this version.`,
      };
  }
}

function messages(state: CellState): readonly string[] {
  return [...new Set(state.problems.map((problem) => problem.message))];
}
