// A formula that is being typed: what it would mean on its line, without touching the sheet.
//
// 1. It is read, inferred and evaluated as a cell of the sheet would be, with the same sentences; the calculation stays as it is.
// 2. A name that leads back to the line being typed is a loop and is said to be one; what hangs on the line is known from the sheet.
// 3. Places of problems count in the text handed in; those of the declared unit stand apart, in the text of the unit.
// Not here: how it is printed (the page), the sheet itself (calculation.ts).

import {
  canonicalName,
  explain,
  type Formula,
  inferComparison,
  inferFormula,
  parseFormula,
  type Scope,
  type Taken,
  type Type,
  typeOfResult,
} from '../formula/index.ts';
import { coherentUnit, type Problem, readUnit, type Unit } from '../quantity/index.ts';
import type { Calculation } from './calculation.ts';
import { judge } from './criterion.ts';
import type { Relation } from './document.ts';
import { shifted } from './reading.ts';

/** Where the text stands: the cell that it is a text of, the quantity that the line defines, its declared unit. */
export interface DraftPlace {
  readonly cell?: string;
  readonly name?: string;
  readonly unit?: string;
}

export interface DraftCase {
  readonly case: string;
  /** Coherent SI; NaN where there is none. */
  readonly value: number;
  readonly taken?: Taken;
  readonly problem?: Problem;
}

export interface FormulaDraft {
  readonly formula?: Formula;
  /** Errors first, then warnings, each in the order of the text. */
  readonly problems: readonly Problem[];
  readonly unitProblem?: Problem;
  /** The unit check in words. */
  readonly words?: string;
  readonly type?: Type;
  /** Declared unit, else the coherent one. */
  readonly unit?: Unit;
  /** One entry a case; none while an error stands. */
  readonly cases: readonly DraftCase[];
}

/** Two formulas in one text, the right one beginning at `rightAt` and the left one at 0 where `leftAt` is absent. */
export interface TwoSides {
  readonly left: string;
  readonly right: string;
  readonly leftAt?: number;
  readonly rightAt: number;
}

export interface DraftVerdict {
  readonly case: string;
  readonly left: DraftCase;
  readonly right: DraftCase;
  readonly met: boolean | null;
  readonly utilisation: number | null;
}

export interface ComparisonDraft {
  readonly left?: Formula;
  readonly right?: Formula;
  readonly problems: readonly Problem[];
  readonly unitProblem?: Problem;
  readonly words?: string;
  readonly unit?: Unit;
  readonly cases: readonly DraftVerdict[];
}

/** The formula of a derived quantity. */
export function checkFormula(calculation: Calculation, text: string, place: DraftPlace = {}): FormulaDraft {
  const unit = declared(place);
  const read = parseFormula(text, calculation.style);
  if (!read.ok) return { problems: [read.problem], ...unit.problem, cases: [] };
  const formula = read.value;
  const inferred = inferFormula(formula, scopeOf(calculation, place), unit.value);
  const own = ownProblems(calculation, [formula], place);
  const problems = ordered([...own, ...inferred.problems]);
  const base = { formula, ...unit.problem, ...(inferred.words === undefined ? {} : { words: inferred.words }) };
  if (inferred.type === undefined || problems.some(isError) || unit.problem.unitProblem !== undefined)
    return { ...base, problems, cases: [] };
  const type = typeOfResult(inferred, unit.value);
  const shown = unit.value ?? (type.kind === 'quantity' ? coherentUnit(type.dimension, type.counts.r) : undefined);
  const cases = valuesOf(calculation, formula);
  return { ...base, problems: ordered([...problems, ...caseProblems(cases)]), type, ...(shown && { unit: shown }), cases };
}

/** Both sides of a criterion. */
export function checkComparison(
  calculation: Calculation,
  sides: TwoSides,
  relation: Relation,
  place: DraftPlace = {},
): ComparisonDraft {
  const unit = declared(place);
  const compared = checkSides(calculation, sides, place, unit.value);
  const base = { ...compared, ...unit.problem };
  const { left, right } = compared;
  if (!left || !right || compared.problems.some(isError) || unit.problem.unitProblem !== undefined) return { ...base, cases: [] };
  const lefts = valuesOf(calculation, left);
  const rights = valuesOf(calculation, right);
  const cases = lefts.map((one, index) => ({
    case: one.case,
    left: one,
    right: rights[index]!,
    ...judge(one.value, relation, rights[index]!.value),
  }));
  const found = [
    ...caseProblems(lefts).map((problem) => shifted(problem, sides.leftAt ?? 0)),
    ...caseProblems(rights).map((problem) => shifted(problem, sides.rightAt)),
  ];
  const shown = unit.value ?? unitOfSide(calculation, left) ?? unitOfSide(calculation, right);
  return { ...base, problems: ordered([...compared.problems, ...found]), ...(shown && { unit: shown }), cases };
}

/** Both sides of the equation of a sought quantity, which may name the unknown itself. */
export function checkEquation(calculation: Calculation, sides: TwoSides, place: DraftPlace = {}): ComparisonDraft {
  const { cell: _own, name, ...rest } = place;
  const unknown = name === undefined ? undefined : { name: canonicalName(name), unit: declared(place).value };
  return { ...checkSides(calculation, sides, rest, undefined, unknown), cases: [] };
}

interface Unknown {
  readonly name: string;
  readonly unit: Unit | undefined;
}

function checkSides(
  calculation: Calculation,
  sides: TwoSides,
  place: DraftPlace,
  target: Unit | undefined,
  unknown?: Unknown,
): Omit<ComparisonDraft, 'cases'> {
  const [left, right] = [sides.left, sides.right].map((text) => parseFormula(text, calculation.style));
  const leftAt = sides.leftAt ?? 0;
  if (!left?.ok || !right?.ok) {
    const problems = [
      ...(left?.ok === false ? [shifted(left.problem, leftAt)] : []),
      ...(right?.ok === false ? [shifted(right.problem, sides.rightAt)] : []),
    ];
    return { problems, ...(left?.ok && { left: left.value }), ...(right?.ok && { right: right.value }) };
  }
  const formulas = { left: left.value, right: right.value };
  const compared = inferComparison(left.value, right.value, scopeOf(calculation, place, unknown), target);
  const problems = [
    ...ownProblems(calculation, [left.value, right.value], place),
    ...compared.leftProblems.map((problem) => shifted(problem, leftAt)),
    ...compared.rightProblems.map((problem) => shifted(problem, sides.rightAt)),
  ];
  return { ...formulas, problems: ordered(problems), ...(compared.words === undefined ? {} : { words: compared.words }) };
}

function declared(place: DraftPlace): { readonly value: Unit | undefined; readonly problem: { readonly unitProblem?: Problem } } {
  if (place.unit === undefined || place.unit.trim() === '') return { value: undefined, problem: {} };
  const read = readUnit(place.unit);
  return read.ok ? { value: read.value, problem: {} } : { value: undefined, problem: { unitProblem: read.problem } };
}

/** Names as the sheet knows them; the one being defined has no value to offer yet. */
function scopeOf(calculation: Calculation, place: DraftPlace, unknown?: Unknown): Scope {
  const own = ownNames(calculation, place);
  const target = unknown?.unit === undefined ? undefined : typeOfResult({}, unknown.unit);
  return {
    typeOf(name): Type | 'unknown-name' | 'failed' {
      if (own.has(name)) return 'failed';
      if (unknown?.name === name && calculation.named(name) === undefined) return target ?? 'failed';
      const state = calculation.named(name);
      return state === undefined ? 'unknown-name' : (state.type ?? 'failed');
    },
    table: (name) => calculation.table(name)?.data,
    names: () => quantityNames(calculation),
    tableNames: () => tableNames(calculation),
    decimalSign: calculation.style.decimalSign,
  };
}

/** Canonical names of the quantities of the sheet, in its order. */
export function* quantityNames(calculation: Calculation): Iterable<string> {
  for (const cell of calculation.sheet.cells)
    if (cell.kind === 'given' || cell.kind === 'derived' || cell.kind === 'sought') yield canonicalName(cell.name);
}

export function* tableNames(calculation: Calculation): Iterable<string> {
  for (const cell of calculation.sheet.cells) if (cell.kind === 'table') yield cell.name;
}

function ownNames(calculation: Calculation, place: DraftPlace): ReadonlySet<string> {
  const names = new Set<string>();
  const name = place.name === undefined ? undefined : canonicalName(place.name);
  // A name that another line has already is that line's: the doubled name is told elsewhere.
  const holder = name === undefined ? undefined : calculation.named(name);
  if (name !== undefined && (holder === undefined || holder.cell.id === place.cell)) names.add(name);
  const cell = calculation.sheet.cells.find((one) => one.id === place.cell);
  if (cell !== undefined && 'name' in cell) names.add(canonicalName(cell.name));
  return names;
}

/** Loops, and the first quantity or table that has no value yet. */
function ownProblems(calculation: Calculation, formulas: readonly Formula[], place: DraftPlace): Problem[] {
  const own = ownNames(calculation, place);
  const below = place.cell === undefined ? new Set<string>() : dependents(calculation, place.cell);
  const loops: Problem[] = [];
  const waiting: string[] = [];
  for (const formula of formulas) {
    for (const name of formula.names) {
      const state = calculation.named(name);
      if (own.has(name)) {
        loops.push(loop(`${name} is defined by itself here; use a sought cell where it has to satisfy an equation`));
      } else if (state !== undefined && below.has(state.cell.id)) {
        const where = stepOf(calculation, state.cell.id);
        loops.push(
          loop(
            `${name}${where} is itself computed from this line: the two would go round in a loop; use a sought cell where both have to hold`,
          ),
        );
      } else if (state !== undefined && state.type === undefined) waiting.push(`${name}${stepOf(calculation, state.cell.id)}`);
    }
    for (const name of formula.tables) {
      const state = calculation.table(name);
      if (state !== undefined && state.data === undefined) waiting.push(`table ${name}${stepOf(calculation, state.cell.id)}`);
    }
  }
  return [...loops, ...waiting.slice(0, 1).map(waitsFor)];
}

const loop = (message: string): Problem => ({ code: 'loop', severity: 'error', message });
const waitsFor = (what: string): Problem => ({
  code: 'waits-for',
  severity: 'error',
  message: `waits for ${what}, which has no value yet`,
});

function stepOf(calculation: Calculation, cell: string): string {
  const number = calculation.numberOf(cell);
  return number === '' ? '' : `, step ${number}`;
}

function dependents(calculation: Calculation, cell: string): ReadonlySet<string> {
  const found = new Set<string>();
  const queue = [cell];
  for (let next = queue.pop(); next !== undefined; next = queue.pop()) {
    for (const user of calculation.use(next)) {
      if (found.has(user)) continue;
      found.add(user);
      queue.push(user);
    }
  }
  return found;
}

function valuesOf(calculation: Calculation, formula: Formula): DraftCase[] {
  return calculation.cases.map(({ id }, index) => {
    const explained = explain(formula.expr, calculation.lookup(index));
    const [warning] = explained.warnings;
    if (!explained.ok) return { case: id, value: Number.NaN, problem: explained.problem };
    return { case: id, value: explained.value, taken: explained.taken, ...(warning && { problem: warning }) };
  });
}

/** What went wrong in cases, each sentence once. */
function caseProblems(cases: readonly DraftCase[]): Problem[] {
  const told = new Map<string, Problem>();
  for (const { problem } of cases) if (problem !== undefined && !told.has(problem.message)) told.set(problem.message, problem);
  return [...told.values()];
}

function unitOfSide(calculation: Calculation, formula: Formula): Unit | undefined {
  return formula.expr.kind === 'name' ? calculation.named(formula.expr.name)?.unit : undefined;
}

const isError = (problem: Problem) => problem.severity === 'error';
const ordered = (problems: readonly Problem[]): Problem[] => [
  ...problems.filter(isError),
  ...problems.filter((problem) => !isError(problem)),
];
