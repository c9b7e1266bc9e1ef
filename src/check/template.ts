// What any template must be: complete, typed, sourced, closed, with criteria that can fail and its caution; and a sheet kept as one.
//
// 1. One harness for built-in templates and for those of the office.
// 2. A fault is an error with its cell, where it has one; a template without faults gives sheets whose open points are the job's alone.
// 3. Every given is used by a calculation or drawn, and has basis and source or range. What nothing uses among the calculated is a
//    result, and has a title.
// 4. A step that has a value in a case closes in it.
// Not here: what is left behind of the job (src/sheet, templateOf).

import { canonicalName } from '../formula/index.ts';
import type { Problem } from '../quantity/index.ts';
import { makeRecord } from '../record/index.ts';
import { type Calculation, type Cell, calculate, idPattern, type KeepInfo, type Sheet, templateOf } from '../sheet/index.ts';
import { solver } from '../study/index.ts';

export interface TemplateFault extends Problem {
  readonly cell?: string;
  readonly case?: string;
}

export type KeptTemplate =
  | { readonly ok: true; readonly value: Sheet }
  | { readonly ok: false; readonly problems: readonly TemplateFault[] };

/** `taken`: ids of templates that this one may not stand for. Codes: 'bad-id', 'id-taken', and those of templateFaults. */
export function keepAsTemplate(sheet: Sheet, info: KeepInfo, options: { readonly taken?: Iterable<string> } = {}): KeptTemplate {
  if (!idPattern.test(info.id))
    return refuse(
      'bad-id',
      `“${info.id.slice(0, 60)}” cannot be the id of a template; take letters, digits, . _ or -, as in my-drive`,
    );
  if (new Set(options.taken).has(info.id)) return refuse('id-taken', `there is a template ${info.id} already; take another id`);
  const value = templateOf(sheet, info);
  const problems = templateFaults(value);
  return problems.length === 0 ? { ok: true, value } : { ok: false, problems };
}

function refuse(code: string, message: string): KeptTemplate {
  return { ok: false, problems: [{ code, severity: 'error', message }] };
}

/** Warnings of a sheet that a template may not have. */
const notInTemplates: ReadonlySet<string> = new Set([
  'number-without-source',
  'bad-range',
  'outside-range',
  'unknown-case',
  'unknown-name',
  'unsorted-axis',
  'key-twice',
]);

/** In the order of the sheet, those of the whole first. */
export function templateFaults(sheet: Sheet): readonly TemplateFault[] {
  const calculation = calculate(sheet, solver);
  const open = openSteps(calculation);
  const faults: TemplateFault[] = [...headFaults(sheet)];
  for (const cell of sheet.cells) {
    const problems = (calculation.state(cell.id)?.problems ?? []).filter(
      ({ severity, code }) => severity === 'error' || notInTemplates.has(code),
    );
    faults.push(
      ...problems.map((problem): TemplateFault => ({ ...problem, severity: 'error' })),
      ...cellFaults(cell, calculation, problems.length > 0),
      ...citationFaults(cell, sheet),
      ...(open.get(cell.id) ?? []),
    );
  }
  return faults;
}

function fault(code: string, message: string, cell?: string): TemplateFault {
  return { code, severity: 'error', message, ...(cell === undefined ? {} : { cell }) };
}

function headFaults(sheet: Sheet): TemplateFault[] {
  const info = sheet.templateInfo;
  if (info === undefined) return [fault('no-template', 'the sheet has no template data; keep it as a template first')];
  const faults: TemplateFault[] = [];
  const blank = (text: string | undefined) => (text ?? '').trim() === '';
  if (blank(sheet.title)) faults.push(fault('no-title', 'the template has no title; say what is calculated'));
  if (blank(info.job)) faults.push(fault('no-job', 'the template does not say what job it is for; say it in a sentence'));
  if (blank(info.caution))
    faults.push(
      fault(
        'no-caution',
        'the template has no caution; say what it cannot answer for, and who decides where people may come to harm',
      ),
    );
  if (info.limits.every(blank)) faults.push(fault('no-limits', 'the template states no limit of validity; name at least one'));
  if (!sheet.cells.some(({ kind }) => kind === 'criterion'))
    faults.push(fault('no-criterion', 'the template has no criterion; a sheet that cannot say no proves nothing'));
  return faults;
}

function cellFaults(cell: Cell, calculation: Calculation, hasProblem: boolean): TemplateFault[] {
  const faults: TemplateFault[] = [];
  const add = (code: string, message: string) => faults.push(fault(code, message, cell.id));
  const blank = (text: string | undefined) => (text ?? '').trim() === '';
  const state = calculation.state(cell.id);
  switch (cell.kind) {
    case 'given':
      if (cell.basis === undefined)
        add('no-basis', 'the given has no basis; say whether it is specified, measured, tabulated or assumed');
      if (blank(cell.source) && blank(cell.range))
        add('no-source', 'the given has neither source nor range; say where its value comes from');
      if (!isUsed(cell, calculation))
        add('unused-given', 'nothing is calculated with this given; use it in a formula, or take it out');
      break;
    case 'derived':
    case 'sought':
      if (blank(cell.source)) add('no-source', 'the line does not say where its formula comes from');
      if (blank(cell.title) && !isUsed(cell, calculation))
        add('untitled-result', 'nothing uses this quantity, so it is a result, and a result wants a title');
      break;
    case 'criterion':
      if (blank(cell.source)) add('no-source', 'the criterion does not say where it comes from');
      if (!hasProblem && !reachesGiven(cell, calculation))
        add('idle-criterion', 'the criterion depends on no given, so it can never turn out otherwise');
      break;
    case 'table':
      if (blank(cell.source)) add('no-source', 'the table does not say where its entries come from');
      break;
    default:
  }
  const computed = state?.kind === 'derived' || state?.kind === 'sought' || state?.kind === 'criterion';
  if (computed && state.type === undefined && !hasProblem) add('no-unit', 'no unit can be inferred for this line');
  return faults;
}

const makesUse: ReadonlySet<Cell['kind']> = new Set(['derived', 'criterion', 'sought', 'drawing']);

function isUsed(cell: Cell, calculation: Calculation): boolean {
  const name = 'name' in cell ? canonicalName(cell.name) : '';
  return (
    calculation.use(cell.id).some((user) => makesUse.has(calculation.state(user)?.cell.kind ?? 'note')) ||
    calculation.sheet.cells.some((other) => other.kind === 'sought' && canonicalName(other.instead ?? '') === name)
  );
}

function reachesGiven(cell: Cell, calculation: Calculation): boolean {
  const seen = new Set<string>();
  const waiting = [...calculation.origin(cell.id)];
  for (let id = waiting.pop(); id !== undefined; id = waiting.pop()) {
    if (seen.has(id)) continue;
    seen.add(id);
    if (calculation.state(id)?.kind === 'given') return true;
    waiting.push(...calculation.origin(id));
  }
  return false;
}

/** `[R7]` without an entry R7; other brackets are text. */
function citationFaults(cell: Cell, sheet: Sheet): TemplateFault[] {
  const known = new Set((sheet.references ?? []).map(({ id }) => id));
  const cited = new Set(
    [...(('source' in cell && cell.source) || '').matchAll(/\[([A-Za-z]{1,3}\d{1,4})\]/gu)].map((match) => match[1]!),
  );
  return [...cited]
    .filter((id) => !known.has(id))
    .map((id) => fault('unknown-citation', `[${id}] is not among the references; add it to the list`, cell.id));
}

/** Steps that have a value which their printed numbers do not give. */
function openSteps(calculation: Calculation): ReadonlyMap<string, readonly TemplateFault[]> {
  const found = new Map<string, TemplateFault[]>();
  for (const step of makeRecord(calculation).steps) {
    for (const each of step.cases) {
      if (each.closes || each.result === null) continue;
      const why = each.reason === 'jump' ? 'the printed numbers fall on the other side of a jump' : 'nearly equal numbers cancel';
      const problem: TemplateFault = {
        ...fault('does-not-close', `the step does not close: ${why}; write the formula in another form`, step.cell),
        case: each.case,
      };
      found.set(step.cell, [...(found.get(step.cell) ?? []), problem]);
    }
  }
  return found;
}
