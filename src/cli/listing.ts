// A calculated sheet as lines of text: number, symbol, title and one column of values a case, then what a reader must not miss.
//
// 1. Values stand under each other to the right; a text that is chosen stands behind its title, where it widens no column.
// 2. After the lines: criteria that are not met with their consequence, values nobody has confirmed, warnings.
// 3. No line breaks inside an entry, whatever a title holds.
// Not here: errors, which go to standard error (outcome.ts).

import { plainName } from '../formula/index.ts';
import { comparisonWords, type RecordModel, type Step, templateWords } from '../record/index.ts';
import type { Calculation, TemplateComparison } from '../sheet/index.ts';
import { type Column, oneLine, problemLine, tableLines, tellOnce, width } from './report.ts';

const widestTitle = 60;

export function listing(
  path: string,
  calculation: Calculation,
  model: RecordModel,
  template: TemplateComparison | undefined,
): string {
  const blocks = [
    oneLine(`${model.title} (${model.status})`),
    body(calculation, model),
    notMet(calculation, model),
    notConfirmed(model),
    fromTemplate(calculation, template),
    warnings(path, calculation),
  ];
  return `${blocks.filter((block) => block !== '').join('\n\n')}\n`;
}

function body(calculation: Calculation, model: RecordModel): string {
  const { cases } = calculation;
  const left: Column = { align: 'left' };
  const columns: readonly Column[] = [left, left, left, ...cases.map((): Column => ({ align: 'right' }))];
  const rows: (readonly string[])[] = cases.length > 1 ? [['', '', '', ...cases.map(({ id }) => id)]] : [];
  // Lines that keep out of the columns: headings of sections.
  const whole = new Map<number, string>();
  for (const line of model.lines) {
    if (line.kind === 'heading' && line.level === 1) {
      whole.set(rows.length, `\n${oneLine(`${line.number} ${line.text}`.trim())}`);
      rows.push([]);
    } else if (line.kind === 'step') {
      rows.push(...stepRows(line.step));
    }
  }
  const lines = tableLines(rows, columns).map((line, i) => whole.get(i) ?? line);
  return lines.join('\n').replace(/^\n/, '');
}

function stepRows(step: Step): string[][] {
  const symbol = step.name === undefined ? '' : plainName(step.name);
  const numeric = step.numeric || step.kind !== 'given';
  const [first = '', ...more] = wrapped(numeric ? step.title : `${step.title}: ${choice(step)}`);
  const values = numeric ? step.cases.map((each) => shown(step, each)) : [];
  return [[step.number, symbol, first, ...values], ...more.map((part) => ['', '', part])];
}

/** The chosen text, once where all cases have the same. */
function choice(step: Step): string {
  const texts = step.cases.map((each) => each.result ?? '—');
  return texts.every((text) => text === texts[0])
    ? texts[0]!
    : step.cases.map((each, i) => `${each.case}: ${texts[i]}`).join('; ');
}

function wrapped(text: string): string[] {
  const lines: string[] = [];
  let line = '';
  for (const word of oneLine(text).split(/ +/)) {
    if (line !== '' && width(line) + 1 + width(word) > widestTitle) {
      lines.push(line);
      line = word;
    } else {
      line = line === '' ? word : `${line} ${word}`;
    }
  }
  return [...lines, line];
}

function shown(step: Step, each: Step['cases'][number]): string {
  if (step.kind !== 'criterion') return each.result ?? '—';
  if (each.met === undefined || each.met === null) return '—';
  const verdict = each.met ? 'met' : 'not met';
  // Without a utilisation the record gives the room to the limit, with its unit.
  const figure = each.utilisation === null && each.result !== null ? `, room ${each.result}` : ` ${each.result ?? ''}`;
  return `${verdict}${figure}`.trimEnd();
}

function notMet(calculation: Calculation, model: RecordModel): string {
  const lines = model.steps.flatMap((step) => {
    const ids = step.cases.filter((each) => each.met === false).map((each) => each.case);
    if (step.kind !== 'criterion' || ids.length === 0) return [];
    const state = calculation.state(step.cell);
    const consequence = state?.kind === 'criterion' ? (state.cell.ifNotMet ?? '') : '';
    const reason = step.justification === undefined || step.justification === '' ? '' : `Stands because: ${step.justification}`;
    const where = calculation.cases.length > 1 ? ` (${ids.join(', ')})` : '';
    const words = [consequence, reason].filter((part) => part !== '').join(' ');
    return [oneLine(`${step.number} ${step.title}${where}${words === '' ? '' : `: ${words}`}`)];
  });
  return lines.length === 0 ? '' : ['Not met', ...lines].join('\n');
}

function notConfirmed(model: RecordModel): string {
  const names = model.openPoints.filter((point) => point.kind === 'carried over').map((point) => nameOf(model, point.cell));
  return names.length === 0 ? '' : `Carried over, not confirmed: ${names.join(', ')}`;
}

/** Nothing where everything is the template's. */
function fromTemplate(calculation: Calculation, template: TemplateComparison | undefined): string {
  if (template === undefined || (template.removed.length === 0 && template.cells.every(({ state }) => state === 'untouched')))
    return '';
  const lines = template.cells.flatMap(({ cell, name, state, was, now }) => {
    const label = [calculation.numberOf(cell), name === undefined ? '' : plainName(name)].filter((word) => word !== '').join(' ');
    return state === 'changed' ? [oneLine(`${label}: was ${was}; is ${now}`)] : [];
  });
  return [oneLine(`Beside ${templateWords(template)}: ${comparisonWords(template)}`), ...lines].join('\n');
}

function nameOf(model: RecordModel, cell: string): string {
  const step = model.steps.find((each) => each.cell === cell);
  return step?.name === undefined ? cell : plainName(step.name);
}

function warnings(path: string, calculation: Calculation): string {
  const cells = new Map(calculation.sheet.cells.map((cell) => [cell.id, cell]));
  const found = tellOnce(calculation).filter((problem) => problem.severity === 'warning' && problem.code !== 'not-met');
  return found.length === 0
    ? ''
    : ['Warnings', ...found.map((problem) => problemLine(path, calculation, cells, problem))].join('\n');
}
