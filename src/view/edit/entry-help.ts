// What the empty line says while it is typed: what it will become, and what is wrong with it, in one quiet sentence.
//
// 1. Every problem has its place in the line and its corrections apply to the line.
// 2. A line with an error can still be kept: nothing that was typed is ever lost.
// Not here: the forms of lines (entry.ts), how it is shown (entry-line.ts).

import { canonicalName } from '../../formula/index.ts';
import { describeUnit, type Problem, printValue, readRange, readUnit, readValue } from '../../quantity/index.ts';
import { type Calculation, checkComparison, checkEquation, checkFormula, nameFault } from '../../sheet/index.ts';
import { type Entry, type EntryScope, type PartRole, readEntry } from './entry.ts';
import { moved, printSi } from './print-live.ts';

export interface EntryHelp {
  readonly entry: Entry;
  /** Errors first. */
  readonly problems: readonly Problem[];
  /** What the line becomes: 'a derived quantity: speed = number × length × rotational frequency, units agree · 15.18 m/s'. */
  readonly hint: string;
}

export const entryExamples = 'd = 200 mm · v = pi*d*n · F_1 <= F_max · # heading · or a note';

export function entryScope(calculation: Calculation): EntryScope {
  return {
    decimalSign: calculation.style.decimalSign,
    knows: (name) => calculation.named(name) !== undefined,
    hasTable: (name) => calculation.table(name) !== undefined,
  };
}

export function helpEntry(text: string, calculation: Calculation): EntryHelp {
  const entry = readEntry(text, entryScope(calculation));
  const problems: Problem[] = [];
  const at = (role: PartRole) => entry.parts.find((part) => part.role === role)?.from ?? 0;
  const reach = (role: PartRole): readonly [number, number] => {
    const part = entry.parts.find((one) => one.role === role);
    return part === undefined ? [0, text.length] : [part.from, part.to];
  };
  const add = (problem: Problem | undefined, role: PartRole) => {
    if (problem !== undefined) problems.push(moved(problem, at(role), reach(role)));
  };
  const hint = hintOf(entry, calculation, add);
  const isError = (problem: Problem) => problem.severity === 'error';
  return { entry, problems: [...problems.filter(isError), ...problems.filter((one) => !isError(one))], hint };
}

type Add = (problem: Problem | undefined, role: PartRole) => void;

function hintOf({ draft }: Entry, calculation: Calculation, add: Add): string {
  if (draft === undefined) return entryExamples;
  switch (draft.kind) {
    case 'heading':
      if (draft.text === '') add(fault('no-heading', 'the heading has no words yet'), 'text');
      return draft.level === 1 ? 'becomes a heading' : `becomes a heading of the ${draft.level === 2 ? 'second' : 'third'} rank`;
    case 'note':
      if (draft.text === '') add(fault('no-note', 'the note has no words yet'), 'text');
      return draft.role === undefined ? 'becomes a note' : `becomes ${draft.role === 'assumption' ? 'an' : 'a'} ${draft.role}`;
    case 'given': {
      add(nameProblem(draft.name, calculation), 'name');
      if (draft.choices !== undefined) return choiceHint(draft.choices, draft.value, calculation, add);
      const unit = readUnit(draft.unit ?? '');
      if (!unit.ok) add(unit.problem, 'unit');
      if (draft.value === '') {
        add(fault('no-value', 'no value yet: type a number with its unit, as in 200 mm, or a formula'), 'value');
        return 'becomes a given';
      }
      const value = readValue(draft.value, calculation.style);
      if (!value.ok) {
        add(value.problem, 'value');
        return 'becomes a given';
      }
      return `becomes a given: ${describeUnit(value.value.unit)}, ${printValue(value.value, calculation.style)}`;
    }
    case 'derived': {
      add(nameProblem(draft.name, calculation), 'name');
      const checked = checkFormula(calculation, draft.formula, { name: draft.name, ...(draft.unit ? { unit: draft.unit } : {}) });
      for (const problem of checked.problems) add(problem, 'formula');
      add(checked.unitProblem, 'unit');
      const values = checked.cases.map((one) => printSi(one.value, checked.unit, calculation));
      const words = checked.words === undefined ? '' : `: ${checked.words}`;
      return `becomes a derived quantity${words}${valuesText(values)}`;
    }
    case 'criterion': {
      const { left, right, relation, unit } = draft;
      if (left === '' || right === '') {
        add(fault('no-side', `the ${left === '' ? 'left' : 'right'} side is not there yet`), left === '' ? 'left' : 'right');
        return 'becomes a criterion';
      }
      // Each side counts from its own start: the places are put right below.
      const checked = checkComparison(calculation, { left, right, leftAt: 0, rightAt: farAway }, relation, unit ? { unit } : {});
      addSides(checked.problems, add, 'left', 'right');
      add(checked.unitProblem, 'unit');
      const verdicts = checked.cases.map(({ met }) => (met === null ? 'no verdict' : met ? 'met' : 'not met'));
      const words = checked.words === undefined ? '' : `: ${checked.words}`;
      return `becomes a criterion${words}${valuesText(verdicts)}`;
    }
    case 'sought':
      soughtProblems(draft, calculation, add);
      return 'becomes a sought quantity: the unknown for which the equation holds';
    case 'table': {
      if (calculation.table(draft.name) !== undefined)
        add(fault('name-twice', `there is a table ${draft.name} already; take another name`), 'text');
      if (draft.columns.length === 0) add(fault('empty-table', 'the table has no columns yet: surface, mu [1]'), 'text');
      return `becomes a table of ${draft.columns.length} ${draft.columns.length === 1 ? 'column' : 'columns'}`;
    }
    default:
      return '';
  }
}

/** Beyond any line: tells the places of the right side from those of the left. */
const farAway = 1_000_000;

function addSides(problems: readonly Problem[], add: Add, left: PartRole, right: PartRole) {
  for (const problem of problems) {
    const isRight = (problem.at?.[0] ?? 0) >= farAway;
    add(isRight ? moved(problem, -farAway) : problem, isRight ? right : left);
  }
}

function choiceHint(choices: string, value: string, calculation: Calculation, add: Add): string {
  const [table = '', column = ''] = choices.split('.');
  const data = calculation.table(table)?.data;
  const texts = data?.columns.find((one) => one.name === column)?.texts;
  if (data === undefined) add(fault('unknown-table', `no table of this sheet is called ${table}`), 'unit');
  else if (texts === undefined)
    add(
      fault('unknown-column', `table ${table} has no column ${column}; it has ${data.columns.map((one) => one.name).join(', ')}`),
      'unit',
    );
  else if (!texts.includes(value))
    add(fault('unknown-choice', `“${value}” is not in column ${column} of table ${table}`), 'value');
  return `becomes a choice from table ${table}`;
}

function soughtProblems(draft: Extract<Entry['draft'], { readonly kind: 'sought' }>, calculation: Calculation, add: Add) {
  const { name, unit, where, between, instead } = draft;
  add(nameProblem(name, calculation), 'name');
  if (unit !== undefined) {
    const read = readUnit(unit);
    if (!read.ok) add(read.problem, 'unit');
  }
  if (instead !== undefined && calculation.named(canonicalName(instead))?.kind !== 'given')
    add(fault('bad-instead', `${instead} is no given of this sheet, and only a given can be varied`), 'instead');
  const sign = equalSign(where);
  if (sign < 0)
    add(
      fault('no-equation', 'write the equation behind where: two formulas with one = between them, as in S_slip = S_req'),
      'where',
    );
  else {
    const sides = { left: where.slice(0, sign), right: where.slice(sign + 1), rightAt: sign + 1 };
    for (const problem of checkEquation(calculation, sides, { name, ...(unit ? { unit } : {}) }).problems) add(problem, 'where');
  }
  if (between === '') add(fault('range-form', 'say where to look, behind between: 10 N to 20 kN'), 'between');
  else {
    const read = readRange(between, calculation.style);
    if (!read.ok) add(read.problem, 'between');
  }
}

/** Position of the only `=` that is no comparison, outside quotes; -1 where there is none or more than one. */
export function equalSign(text: string): number {
  const places = [...text.replace(/"[^"]*"/gu, (quoted) => ' '.repeat(quoted.length)).matchAll(/(?<![<>=!])=(?!=)/gu)];
  return places.length === 1 ? places[0]!.index : -1;
}

const fault = (code: string, message: string): Problem => ({ code, severity: 'error', message });

function nameProblem(name: string, calculation: Calculation): Problem | undefined {
  const message = nameFault(calculation.sheet, name);
  if (message === undefined) return undefined;
  const problem: Problem = { code: 'bad-name', severity: 'error', message };
  const free = freeName(name, calculation);
  if (free === undefined) return problem;
  return { ...problem, fixes: [{ from: 0, to: name.length, text: free, label: `write ${free}` }] };
}

/** The next name like this one that nobody has: d → d_2, F_1 → F_2. */
function freeName(name: string, calculation: Calculation): string | undefined {
  const digits = /_(\d{1,6})$/u.exec(name);
  const stem = digits === null ? name : name.slice(0, digits.index);
  for (let next = digits === null ? 1 : Number(digits[1]) + 1; next < 10_000; next += 1) {
    const free = `${stem}_${next}`;
    const message = nameFault(calculation.sheet, free);
    if (message === undefined) return free;
    if (!message.includes('already')) return undefined;
  }
  return undefined;
}

/** ' · 15.18 m/s', ' · 900 N, 1 350 N'. */
export function valuesText(values: readonly string[]): string {
  const shown = values.every((value) => value === values[0]) ? values.slice(0, 1) : values;
  return shown.length === 0 || shown.every((value) => value === '')
    ? ''
    : ` · ${shown.map((value) => value || 'no value').join(', ')}`;
}
