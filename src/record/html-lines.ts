// The lines of the record as rows of one table: source | calculation | one result column a case.
//
// 1. Up to three cases have a column each; beyond that each case is a row of its own under its step.
// 2. A substituted line is printed once for all cases that share it, otherwise once a case, named.
// 3. All text passes escapeHtml, all TeX passes KaTeX.
// Not here: the page around the rows (html.ts).

import { escapeHtml, safeImage } from './escape.ts';
import { renderTex } from './html-math.ts';
import type { Line, RecordModel, Step, StepCase } from './model.ts';
import type { ProseBlock, ProseSpan } from './prose.ts';
import { noSource } from './words.ts';

export const mostColumns = 3;

/** Short mark of a case on its lines: A, B, C …; '' where there is only one. */
export function caseMark(index: number, count: number): string {
  if (count < 2) return '';
  return index < 26 ? String.fromCharCode(65 + index) : String(index + 1);
}

/** The head of a case: its mark and its title. */
export function caseHead(model: RecordModel, index: number): string {
  const mark = caseMark(index, model.cases.length);
  const title = escapeHtml(model.cases[index]?.title ?? '');
  return mark === '' ? title : `<span class="mark">${mark}</span> ${title}`;
}

export function prose(blocks: readonly ProseBlock[]): string {
  return blocks
    .map((block) => {
      if (block.kind === 'paragraph') return `<p>${spans(block.spans)}</p>`;
      const tag = block.ordered ? 'ol' : 'ul';
      return `<${tag}>${block.items.map((item) => `<li>${spans(item)}</li>`).join('')}</${tag}>`;
    })
    .join('');
}

const spanTag = { strong: 'strong', emphasis: 'em', code: 'code' } as const;
function spans(list: readonly ProseSpan[]): string {
  return list
    .map((span) => (span.style === 'text' ? escapeHtml(span.text) : `<${spanTag[span.style]}>${escapeHtml(span.text)}</${spanTag[span.style]}>`))
    .join('');
}

export function stepsTable(model: RecordModel): string {
  const wide = model.cases.length <= mostColumns;
  const heads = wide && model.cases.length > 1 ? model.cases.map((_, k) => caseHead(model, k)) : ['Result'];
  const result = heads.length === 1 ? 17 : heads.length === 2 ? 15 : 13.5;
  const columns = `<colgroup><col style="width:15%"><col>${heads.map(() => `<col style="width:${result}%">`).join('')}</colgroup>`;
  const head = `<thead><tr><th scope="col">Source</th><th scope="col">Calculation</th>${heads
    .map((title) => `<th scope="col" class="res">${title}</th>`)
    .join('')}</tr></thead>`;
  const rows = model.lines.map((line) => row(line, model, heads.length)).join('\n');
  const legend = wide ? '' : `<p class="legend">${model.cases.map((_, k) => `<span>${caseHead(model, k)}</span>`).join(' ')}</p>`;
  return `${legend}<table class="steps">${columns}${head}<tbody>\n${rows}\n</tbody></table>`;
}

function row(line: Line, model: RecordModel, results: number): string {
  const span = results + 2;
  switch (line.kind) {
    case 'heading': {
      const tag = `h${line.level + 1}`;
      const number = line.number === '' ? '' : `${escapeHtml(line.number)}&ensp;`;
      return `<tr class="section"><th scope="rowgroup" colspan="${span}"><${tag}>${number}${escapeHtml(line.text)}</${tag}></th></tr>`;
    }
    case 'step':
      return stepRow(line.step, model, results);
    case 'note': {
      const role = line.role === undefined ? '' : `<p class="role">${capital(line.role)}</p>`;
      const kind = line.role === 'limit' ? ' limitnote' : line.role === 'caution' ? ' cautionnote' : '';
      return `<tr class="text"><td class="src">${escapeHtml(line.source)}</td><td class="wide" colspan="${span - 1}"><div class="prose${kind}">${role}${prose(line.blocks)}${noteLines(line.notes)}</div></td></tr>`;
    }
    case 'table':
      return `<tr class="text"><td class="src">${escapeHtml(line.source)}</td><td class="wide" colspan="${span - 1}">${dataTable(line)}</td></tr>`;
    case 'other':
      return `<tr class="text"><td class="src">${escapeHtml(line.source)}</td><td class="wide" colspan="${span - 1}">${picture(line)}</td></tr>`;
  }
}

function stepRow(step: Step, model: RecordModel, results: number): string {
  const count = model.cases.length;
  const basis = step.basis === undefined ? '' : step.basis === 'assumed' ? ' <span class="tag">assumed</span>' : ` <span class="basis">${step.basis}</span>`;
  const missing = step.notes.includes(noSource) ? ` <span class="tag open">${noSource}</span>` : '';
  const source = `<td class="src">${escapeHtml(step.source)}${missing}${basis}</td>`;
  const tags = step.notes.filter(isOpenState).map((note) => `<span class="tag open">${escapeHtml(note)}</span>`);
  const title = `<p class="t"><span class="n">${escapeHtml(step.number)}</span> ${escapeHtml(step.title)}${tags.length === 0 ? '' : ` <span class="states">${tags.join(' ')}</span>`}</p>`;
  const remarks = noteLines([
    ...step.notes.filter((note) => note !== noSource && note !== step.basis && !isOpenState(note)),
    ...(step.justification === undefined ? [] : [`Justification: ${step.justification}`]),
  ]);
  const above = `${title}${problems(step)}${remarks}`;
  const open = `<tr class="step${step.kind === 'criterion' ? ' criterion' : ''}" id="step-${escapeHtml(step.number)}">${source}`;
  if (count > mostColumns && !sameInAll(step)) {
    const rest = step.cases.map((each, k) => {
      const label = `<span class="case">${caseMark(k, count)}</span>`;
      return `<tr class="step each"><td class="src"></td><td class="calc"><div class="eq">${label}${numbers(each, step)}</div></td>${result(each, caseMark(k, count))}</tr>`;
    });
    return `${open}<td class="calc">${above}<div class="eq"><span>${renderTex(step.symbols)}</span></div></td><td class="res"></td></tr>\n${rest.join('\n')}`;
  }
  const shown = results === 1 ? step.cases.slice(0, 1) : step.cases;
  const cells = shown.map((each, k) => result(each, results === 1 ? '' : caseMark(k, count)));
  return `${open}<td class="calc">${above}${equations(step, count)}</td>${cells.join('')}</tr>`;
}

function sameInAll(step: Step): boolean {
  const [first] = step.cases;
  return step.cases.every((each) => each.result === first?.result && each.met === first?.met && each.substituted === first?.substituted && each.problem === undefined);
}

/** Symbols, then the numbers of each case; once where all cases share them. */
function equations(step: Step, count: number): string {
  const symbols = `<span>${renderTex(step.symbols)}</span>`;
  const groups = new Map<string, { first: StepCase; marks: string[] }>();
  step.cases.forEach((each, k) => {
    const key = `${each.sides ?? ''}\n${each.substituted}`;
    if (key === '\n') return;
    const group = groups.get(key) ?? { first: each, marks: [] };
    group.marks.push(caseMark(k, count));
    groups.set(key, group);
  });
  if (groups.size === 0) return `<div class="eq">${symbols}</div>`;
  if (groups.size === 1 && [...groups.values()][0]?.marks.length === step.cases.length) {
    return `<div class="eq">${symbols}${[...groups.values()].map((group) => numbers(group.first, step)).join('')}</div>`;
  }
  const lines = [...groups.values()].map(
    (group) => `<div class="eq"><span class="case">${group.marks.join(', ')}</span>${numbers(group.first, step)}</div>`,
  );
  return `<div class="eq">${symbols}</div>${lines.join('')}`;
}

function numbers(each: StepCase, step: Step): string {
  if (step.kind !== 'criterion') return each.substituted === '' ? '' : `<span>${renderTex(`= ${each.substituted}`)}</span>`;
  const sides = each.sides === undefined ? '' : `<span>${renderTex(each.sides)}</span>`;
  if (each.substituted === '') return sides;
  const word = each.utilisation == null ? 'room' : 'utilisation';
  return `${sides}<span>${renderTex(`\\text{${word}} = ${each.substituted}`)}</span>`;
}

function result(each: StepCase, mark: string): string {
  const label = mark === '' ? '' : ` data-case="${mark}"`;
  if (each.result === null) return `<td class="res"${label}><span class="wrong">no value</span></td>`;
  const shown = each.resultTex === null ? escapeHtml(each.result) : renderTex(each.resultTex);
  if (each.met === undefined || each.met === null) return `<td class="res"${label}><span>${shown}</span></td>`;
  return `<td class="res"${label}><span>${verdict(each.met, each.utilisation ?? null)}<span class="util">${shown}</span></span></td>`;
}

export function verdict(met: boolean, utilisation: number | null): string {
  const word = met ? '<span class="met">met</span>' : '<span class="notmet">not met</span>';
  if (utilisation === null) return word;
  const width = Math.min(100, Math.max(0, utilisation * 100)).toFixed(1);
  return `${word} <span class="bar${met ? '' : ' over'}" aria-hidden="true"><i style="width:${width}%"></i></span>`;
}

function problems(step: Step): string {
  const texts = new Map<string, string[]>();
  step.cases.forEach((each, k) => {
    if (each.problem === undefined) return;
    const titles = texts.get(each.problem.message) ?? [];
    titles.push(caseMark(k, step.cases.length));
    texts.set(each.problem.message, titles);
  });
  return [...texts]
    .map(([text, titles]) => {
      const where = titles.length === step.cases.length ? '' : `${titles.join(', ')}: `;
      return `<p class="note wrong">${escapeHtml(where + text)}</p>`;
    })
    .join('');
}

function noteLines(notes: readonly string[]): string {
  return notes.map((note) => `<p class="note">${escapeHtml(note)}</p>`).join('');
}

/** States that somebody still has to change stand beside the title, where a reader runs into them. */
function isOpenState(note: string): boolean {
  return note.startsWith('carried over') || note.startsWith('to be confirmed');
}

function dataTable(line: Extract<Line, { kind: 'table' }>): string {
  const heads = line.heads.map((head) => {
    const unit = head.unit === '' ? '' : ` / ${escapeHtml(head.unit)}`;
    return `<th scope="col"${head.numeric ? ' class="num"' : ''}>${escapeHtml(head.title)}${unit}</th>`;
  });
  const rows = line.rows.map(
    (cells) => `<tr>${cells.map((cell, k) => `<td${line.heads[k]?.numeric ? ' class="num"' : ''}>${escapeHtml(cell)}</td>`).join('')}</tr>`,
  );
  return `<p class="t">${escapeHtml(line.title)} <code>${escapeHtml(line.name)}</code></p><div class="scroll"><table class="data"><thead><tr>${heads.join('')}</tr></thead><tbody>${rows.join('')}</tbody></table></div>${noteLines(line.notes)}`;
}

function picture(line: Extract<Line, { kind: 'other' }>): string {
  const image = line.image === undefined ? undefined : safeImage(line.image);
  const caption = line.title === '' ? '' : `<figcaption class="t">${escapeHtml(line.title)}</figcaption>`;
  if (image === undefined) return `<figure>${caption}<p class="absent">${escapeHtml(line.text)}</p></figure>`;
  return `<figure>${caption}<img src="${image}" alt="${escapeHtml(line.title === '' ? 'figure without a title' : line.title)}"></figure>`;
}

function capital(word: string): string {
  return word.charAt(0).toUpperCase() + word.slice(1);
}
