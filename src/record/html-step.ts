// One step as rows of the sheet: title, symbols, numbers; each result on the line of its case.
//
// 1. Up to three cases have a column each; beyond that there is one result column and a line a case.
// 2. A substituted line stands once for all cases that share it, otherwise once for each, marked A, B …
// 3. Symbols and numbers share a line where they fit, and stand under each other at the relation where they do not.
// Not here: other lines of the record (html-lines.ts).

import { escapeHtml } from './escape.ts';
import { renderTex } from './html-math.ts';
import { caseMark, inlineText, noteLines, type Symbols, verdict } from './html-text.ts';
import type { RecordModel, Step, StepCase } from './model.ts';
import { noSource } from './words.ts';

export const mostColumns = 3;

interface Row {
  readonly equation: string;
  /** About how many digits wide. */
  readonly length: number;
  /** One entry a result column. */
  readonly results: readonly (StepCase | undefined)[];
}

export function stepBody(step: Step, model: RecordModel, symbols: Symbols): string {
  const many = model.cases.length > mostColumns;
  const columns = many ? 1 : model.cases.length;
  const fits = columns > 2 ? 40 : columns > 1 ? 50 : 64;
  const lines = rows(step, many, fits).flatMap((line) => spread(line, fits));
  const none = '<td class="res"></td>'.repeat(columns);
  const markup = lines.map((line) => {
    const cells = line.results.map((each, k) =>
      each === undefined ? '<td class="res"></td>' : result(each, many ? '' : caseMark(k, columns)),
    );
    // A line that the results have no part in may run under them.
    const free = line.length > fits && line.results.every((each) => each === undefined);
    return free
      ? `<tr><td class="calc" colspan="${columns + 1}">${line.equation}</td></tr>`
      : `<tr><td class="calc">${line.equation}</td>${cells.join('')}</tr>`;
  });
  const kind = step.kind === 'criterion' ? 'step criterion' : 'step';
  return `<tbody class="${kind}" id="step-${escapeHtml(step.number)}"><tr>${source(step, symbols, lines.length + 1)}<td class="calc">${above(step, symbols)}</td>${none}</tr>\n${markup.join('\n')}</tbody>`;
}

function source(step: Step, symbols: Symbols, span: number): string {
  const basis =
    step.basis === undefined
      ? ''
      : step.basis === 'assumed'
        ? ' <span class="tag">assumed</span>'
        : ` <span class="basis">${step.basis}</span>`;
  const missing = step.notes.includes(noSource) ? ` <span class="tag open">${noSource}</span>` : '';
  return `<td class="src" rowspan="${span}">${inlineText(step.source, symbols)}${missing}${basis}</td>`;
}

function above(step: Step, symbols: Symbols): string {
  const tags = step.notes.filter(isOpenState).map((note) => `<span class="tag open">${escapeHtml(note)}</span>`);
  const states = tags.length === 0 ? '' : `<span class="states">${tags.join(' ')}</span>`;
  const title = `<p class="t"><span class="n">${escapeHtml(step.number)}</span> ${inlineText(step.title, symbols)}${states}</p>`;
  const notes = step.notes.filter((note) => note !== noSource && note !== step.basis && !isOpenState(note));
  const justification = step.justification === undefined ? [] : [`Justification: ${step.justification}`];
  return `${title}${problems(step)}${noteLines([...notes, ...justification], symbols)}`;
}

/** States that somebody still has to change stand beside the title, where a reader runs into them. */
function isOpenState(note: string): boolean {
  return note.startsWith('carried over') || note.startsWith('to be confirmed');
}

function problems(step: Step): string {
  const texts = new Map<string, string[]>();
  step.cases.forEach((each, k) => {
    if (each.problem === undefined) return;
    texts.set(each.problem.message, [...(texts.get(each.problem.message) ?? []), caseMark(k, step.cases.length)]);
  });
  return [...texts]
    .map(
      ([text, marks]) =>
        `<p class="note wrong">${escapeHtml(marks.length === step.cases.length ? text : `${marks.join(', ')}: ${text}`)}</p>`,
    )
    .join('');
}

interface Group {
  readonly first: StepCase;
  readonly marks: string[];
  readonly results: (StepCase | undefined)[];
}

/** A line too long to stand beside its result stands above it. */
function spread(line: Row, fits: number): readonly Row[] {
  if (line.length <= fits || line.results.every((each) => each === undefined)) return [line];
  return [
    { ...line, results: line.results.map(() => undefined) },
    { equation: '', length: 0, results: line.results },
  ];
}

function rows(step: Step, many: boolean, fits: number): readonly Row[] {
  const count = step.cases.length;
  const groups = new Map<string, Group>();
  step.cases.forEach((each, k) => {
    const key = [each.sides ?? '', each.substituted, many || each.result === null ? each.result : ''].join('\n');
    const group = groups.get(key) ?? { first: each, marks: [], results: many ? [each] : step.cases.map(() => undefined) };
    group.marks.push(caseMark(k, count));
    if (!many) group.results[k] = each;
    groups.set(key, group);
  });
  const list = [...groups.values()];
  const [only] = list;
  const symbols: Part = { markup: renderTex(step.symbols), length: lengthOf(step.symbols) };
  const empty = (many ? [undefined] : step.cases.map(() => undefined)) as readonly undefined[];
  if (only !== undefined && list.length === 1) {
    if (only.first.substituted === '') return [row([symbols], only.results)];
    if (step.kind === 'criterion')
      return [row([symbols, ...sidesOf(only.first, ':\\quad ')], empty), row([numbersOf(only.first, step)], only.results)];
    const numbers = numbersOf(only.first, step);
    if (symbols.length + numbers.length <= fits) return [row([symbols, numbers], only.results)];
    return [row([symbols], empty), row([numbers], only.results)];
  }
  // Cases that print no numbers (a given, a failed one) need no line of their own where each has its column.
  const bare = many ? [] : list.filter((group) => group.first.substituted === '');
  const rest = list
    .filter((group) => !bare.includes(group))
    .map((group) => {
      const mark: Part = { markup: `<b class="case">${group.marks.join(', ')}</b>`, length: 2 };
      const numbers = group.first.substituted === '' ? [] : [numbersOf(group.first, step)];
      return row([mark, ...sidesOf(group.first, ''), ...numbers], group.results);
    });
  return [row([symbols], merged(bare, empty)), ...rest];
}

interface Part {
  readonly markup: string;
  readonly length: number;
}

const phoneWidth = 28;

function row(parts: readonly Part[], results: Row['results']): Row {
  const markup = parts.map((part) => (part.markup.startsWith('<b') ? part.markup : `<span>${part.markup}</span>`));
  const length = parts.reduce((sum, part) => sum + part.length, 0);
  // On a phone a long line is moved sideways, by the keyboard too.
  return { equation: `<div class="eq"${length > phoneWidth ? ' tabindex="0"' : ''}>${markup.join(' ')}</div>`, length, results };
}

function sidesOf(each: StepCase, before: string): readonly Part[] {
  if (each.sides === undefined) return [];
  return [{ markup: renderTex(`${before}${each.sides}\\quad`), length: lengthOf(each.sides) + 3 }];
}

/** The equal sign is no place to break: what follows may be a fraction that stays whole. */
function numbersOf(each: StepCase, step: Step): Part {
  if (step.kind === 'sought')
    return { markup: renderTex(`\\quad\\text{put back:}\\;${each.substituted}`), length: lengthOf(each.substituted) + 10 };
  const word = step.kind !== 'criterion' ? '' : `\\text{${each.utilisation == null ? 'room' : 'utilisation'}}\\,`;
  return { markup: renderTex(`${word}{=}\\;${each.substituted}`), length: lengthOf(each.substituted) + (word === '' ? 2 : 10) };
}

function merged(groups: readonly Group[], empty: readonly undefined[]): readonly (StepCase | undefined)[] {
  return empty.map((_, k) => groups.map((group) => group.results[k]).find((each) => each !== undefined));
}

function result(each: StepCase, mark: string): string {
  const label = mark === '' ? '' : ` data-case="${mark}"`;
  if (each.result === null) return `<td class="res"${label}><span class="wrong">no value</span></td>`;
  const shown = each.resultTex === null ? escapeHtml(each.result) : renderTex(each.resultTex);
  if (each.met == null) return `<td class="res"${label}><span>${shown}</span></td>`;
  return `<td class="res"${label}><span>${verdict(each.met, each.utilisation ?? null, shown)}</span></td>`;
}

/** About how many digits wide a formula is; of a fraction the wider part counts. */
function lengthOf(tex: string): number {
  let text = tex
    .replace(/\\(?:mathrm|mathit|text|textit|operatorname)\{([^{}]*)\}/gu, '$1')
    .replace(/\\(?:left|right|displaystyle|,|;|quad)/gu, '')
    // Raised and lowered pieces are smaller.
    .replace(/[_^]\{([^{}]*)\}/gu, (_, inner: string) => inner.slice(0, Math.ceil(inner.length * 0.7)));
  for (let round = 0; round < 20 && /\{[^{}]*\}/u.test(text); round++) {
    text = text
      .replace(/\\frac\{([^{}]*)\}\{([^{}]*)\}/gu, (_, over: string, under: string) =>
        over.length > under.length ? over : under,
      )
      .replace(/(?<!\\frac(?:\{[^{}]*\})?)\{([^{}]*)\}/gu, '$1');
  }
  return text.replace(/\\[A-Za-z]+ ?/gu, 'x').replace(/[_^\s]/gu, '').length;
}
