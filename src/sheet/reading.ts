// What a cell says by itself: its values and formulas read, before any other cell is looked at.
//
// 1. A reading depends on the cell and on the sheet's decimal sign alone, so it is kept with the cell object.
// 2. Whatever cannot be read is a problem with the key and the span it is about; the other keys are still read.
// Not here: names of other cells, dimensions against each other (calculation.ts).

import { canonicalName, type Formula, isName, parseFormula, reserved } from '../formula/index.ts';
import { one, type Problem, readRange, readUnit, readValue, type Unit, type Value, type ValueRange } from '../quantity/index.ts';
import type { Cell, CriterionCell, DerivedCell, GivenCell, NoteCell, SoughtCell } from './document.ts';
import type { LiveName } from './state.ts';

export type DecimalSign = '.' | ',';

export interface FieldProblem extends Problem {
  readonly field: string;
  readonly case?: string;
}

export interface Reading {
  readonly decimalSign: DecimalSign;
  readonly problems: readonly FieldProblem[];
  /** Canonical name of the quantity that the cell defines. */
  readonly name?: string;
  readonly unit?: Unit;
  /** Given: the value for all cases and those for one. */
  readonly value?: Value;
  readonly byCase?: ReadonlyMap<string, Value>;
  readonly range?: ValueRange;
  /** Sought: where the unknown is looked for, and the quantity varied in its stead. */
  readonly between?: ValueRange;
  readonly instead?: string;
  /** Given that is a choice: the table and the column of its texts. */
  readonly choices?: { readonly table: string; readonly column: string };
  /** Derived: [formula]; criterion: [left, right]; sought: both sides of its equation. */
  readonly formulas: readonly (Formula | undefined)[];
  /** Names in braces of a note; names that a drawing or a chart shows. */
  readonly mentions: readonly LiveName[];
}

const kept = new WeakMap<Cell, Reading>();

export function readCell(cell: Cell, decimalSign: DecimalSign): Reading {
  const known = kept.get(cell);
  if (known && known.decimalSign === decimalSign) return known;
  const reading = readAnew(cell, decimalSign);
  kept.set(cell, reading);
  return reading;
}

function readAnew(cell: Cell, decimalSign: DecimalSign): Reading {
  const nothing = { decimalSign, problems: [], formulas: [], mentions: [] };
  switch (cell.kind) {
    case 'given':
      return readGiven(cell, decimalSign);
    case 'derived':
      return readDerived(cell, decimalSign);
    case 'criterion':
      return readCriterion(cell, decimalSign);
    case 'sought':
      return readSought(cell, decimalSign);
    case 'note':
      return { ...nothing, mentions: liveNames(cell) };
    case 'drawing':
      return { ...nothing, mentions: Object.values(cell.uses).map(mention) };
    case 'chart':
      return { ...nothing, mentions: [cell.vary, ...cell.show].map(mention) };
    default:
      return nothing;
  }
}

function mention(text: string): LiveName {
  return { text, name: canonicalName(text.trim()), from: 0, to: text.length };
}

/** Names in braces, `{F_1}`; a brace that encloses no name is ordinary text. */
export function liveNames(cell: NoteCell): LiveName[] {
  const found: LiveName[] = [];
  for (const match of cell.text.matchAll(/\{([^{}\n]{1,100})\}/gu)) {
    const name = canonicalName(match[1]!.trim());
    if (isName(name)) found.push({ text: match[1]!.trim(), name, from: match.index, to: match.index + match[0].length });
  }
  return found;
}

function readName(text: string, problems: FieldProblem[]): string | undefined {
  const name = canonicalName(text);
  if (reserved.has(name)) {
    problems.push(
      fault(
        'reserved-name',
        'name',
        `“${text}” has a fixed meaning in formulas and cannot name a quantity; add a subscript, as in ${text}_1`,
      ),
    );
    return undefined;
  }
  if (!isName(name)) {
    const shown = text.length > 40 ? `${text.slice(0, 40)}…` : text;
    problems.push(
      fault('bad-name', 'name', `“${shown}” is no name: a name is a letter, then letters, digits and _, as in F_1 or mu`),
    );
    return undefined;
  }
  return name;
}

function fault(code: string, field: string, message: string): FieldProblem {
  return { code, severity: 'error', message, field };
}

function readDeclaredUnit(text: string | undefined, problems: FieldProblem[]): Unit | undefined {
  if (text === undefined) return undefined;
  const read = readUnit(text);
  if (read.ok) return read.value;
  problems.push({ ...read.problem, field: 'unit' });
  return undefined;
}

function readGiven(cell: GivenCell, decimalSign: DecimalSign): Reading {
  const problems: FieldProblem[] = [];
  const name = readName(cell.name, problems);
  const base = { decimalSign, problems, formulas: [], mentions: [], ...(name === undefined ? {} : { name }) };
  if (cell.choices !== undefined) {
    const dot = cell.choices.indexOf('.');
    if (dot > 0) return { ...base, choices: { table: cell.choices.slice(0, dot), column: cell.choices.slice(dot + 1) } };
    problems.push(
      fault('bad-choices', 'choices', `choices “${cell.choices}” must name a table and a column, as in surfaces.surface`),
    );
    return base;
  }
  const unit = readDeclaredUnit(cell.unit, problems);
  const value = readOne(cell.value, 'value', decimalSign, problems);
  const byCase = new Map<string, Value>();
  for (const [id, text] of Object.entries(cell.byCase ?? {})) {
    const read = readOne(text, `byCase.${id}`, decimalSign, problems, id);
    if (read) byCase.set(id, read);
  }
  const range = cell.range === undefined ? undefined : readGivenRange(cell.range, value, decimalSign, problems);
  return {
    ...base,
    ...(unit ? { unit } : {}),
    ...(value ? { value } : {}),
    byCase,
    ...(range ? { range } : {}),
  };
}

function readOne(
  text: string,
  field: string,
  decimalSign: DecimalSign,
  problems: FieldProblem[],
  onlyCase?: string,
): Value | undefined {
  if (text.trim() === '') {
    problems.push({
      ...fault('no-value', field, 'no value yet: type a number with its unit, as in 200 mm'),
      ...(onlyCase ? { case: onlyCase } : {}),
    });
    return undefined;
  }
  const read = readValue(text, { decimalSign });
  if (read.ok) return read.value;
  problems.push({ ...read.problem, field, ...(onlyCase ? { case: onlyCase } : {}) });
  return undefined;
}

/** A range that cannot be read is not checked, and says so. */
function readGivenRange(
  text: string,
  value: Value | undefined,
  decimalSign: DecimalSign,
  problems: FieldProblem[],
): ValueRange | undefined {
  const read = readRange(text, { decimalSign });
  if (!read.ok) {
    problems.push({ ...read.problem, severity: 'warning', field: 'range' });
    return undefined;
  }
  // "50 to 200" beside a value in mm is a range in mm.
  const bare = read.value.to.unit.text === one.text && value !== undefined && value.unit.text !== one.text;
  const withUnit = bare ? readRange(`${text} ${value.unit.text}`, { decimalSign }) : read;
  return withUnit.ok ? withUnit.value : read.value;
}

function readFormula(
  text: string,
  field: string,
  decimalSign: DecimalSign,
  problems: FieldProblem[],
  offset = 0,
): Formula | undefined {
  const parsed = parseFormula(text, { decimalSign });
  if (parsed.ok) return parsed.value;
  problems.push({ ...shifted(parsed.problem, offset), field });
  return undefined;
}

/** The same problem in a longer text in which the read one begins at `offset`. */
export function shifted(problem: Problem, offset: number): Problem {
  if (offset === 0) return problem;
  return {
    ...problem,
    ...(problem.at ? { at: [problem.at[0] + offset, problem.at[1] + offset] as const } : {}),
    ...(problem.fixes ? { fixes: problem.fixes.map((fix) => ({ ...fix, from: fix.from + offset, to: fix.to + offset })) } : {}),
  };
}

function readDerived(cell: DerivedCell, decimalSign: DecimalSign): Reading {
  const problems: FieldProblem[] = [];
  const name = readName(cell.name, problems);
  const unit = readDeclaredUnit(cell.unit, problems);
  const formula = readFormula(cell.formula, 'formula', decimalSign, problems);
  return {
    decimalSign,
    problems,
    formulas: [formula],
    mentions: [],
    ...(name === undefined ? {} : { name }),
    ...(unit ? { unit } : {}),
  };
}

function readCriterion(cell: CriterionCell, decimalSign: DecimalSign): Reading {
  const problems: FieldProblem[] = [];
  const unit = readDeclaredUnit(cell.unit, problems);
  const left = readFormula(cell.left, 'left', decimalSign, problems);
  const right = readFormula(cell.right, 'right', decimalSign, problems);
  return { decimalSign, problems, formulas: [left, right], mentions: [], ...(unit ? { unit } : {}) };
}

function readSought(cell: SoughtCell, decimalSign: DecimalSign): Reading {
  const problems: FieldProblem[] = [];
  const name = readName(cell.name, problems);
  const unit = readDeclaredUnit(cell.unit, problems);
  const between = readRange(cell.between, { decimalSign });
  if (!between.ok) problems.push({ ...between.problem, field: 'between' });
  const base = {
    decimalSign,
    problems,
    mentions: [],
    ...(name === undefined ? {} : { name }),
    ...(unit ? { unit } : {}),
    ...(between.ok ? { between: between.value } : {}),
    ...(cell.instead === undefined ? {} : { instead: canonicalName(cell.instead) }),
  };
  const sign = equalSign(cell.where);
  if (sign === undefined) {
    problems.push(
      fault('no-equation', 'where', `“${cell.where}” must hold exactly one = between two formulas, as in S_slip = S_req`),
    );
    return { ...base, formulas: [] };
  }
  const left = readFormula(cell.where.slice(0, sign), 'where', decimalSign, problems);
  const right = readFormula(cell.where.slice(sign + 1), 'where', decimalSign, problems, sign + 1);
  return { ...base, formulas: [left, right] };
}

/** Position of the only `=` that is no comparison, outside quotes; undefined where there is none or more than one. */
function equalSign(text: string): number | undefined {
  const places = [...text.replace(/"[^"]*"/gu, (quoted) => ' '.repeat(quoted.length)).matchAll(/(?<![<>=!])=(?!=)/gu)];
  return places.length === 1 ? places[0]!.index : undefined;
}
