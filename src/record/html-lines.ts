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

export const mostColumns = 3;

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
  const titles = model.cases.map((each) => each.title);
  const heads = wide && titles.length > 1 ? titles : ['Result'];
  const result = heads.length === 1 ? 17 : heads.length === 2 ? 15 : 13.5;
  const columns = `<colgroup><col style="width:15%"><col>${heads.map(() => `<col style="width:${result}%">`).join('')}</colgroup>`;
  const head = `<thead><tr><th scope="col">Source</th><th scope="col">Calculation</th>${heads
    .map((title) => `<th scope="col" class="res">${escapeHtml(title)}</th>`)
    .join('')}</tr></thead>`;
  const rows = model.lines.map((line) => row(line, model, heads.length)).join('\n');
  return `<table class="steps">${columns}${head}<tbody>\n${rows}\n</tbody></table>`;
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
  const tags = step.notes.filter((note) => isState(note)).map((note) => `<span class="tag${openState(note) ? ' open' : ''}">${escapeHtml(note)}</span>`);
  const basis = step.basis === 'specified' || step.basis === 'tabulated' ? ` <span class="basis">(${step.basis})</span>` : '';
  const source = `<td class="src">${escapeHtml(step.source)}${basis}${tags.length > 0 ? `<br>${tags.join(' ')}` : ''}</td>`;
  const title = `<p class="t"><span class="n">${escapeHtml(step.number)}</span> ${escapeHtml(step.title)}</p>`;
  const many = model.cases.length > mostColumns;
  const lines = many ? `<div class="eq"><span>${renderTex(step.symbols)}</span></div>` : equations(step, model);
  const remarks = noteLines([
    ...step.notes.filter((note) => !isState(note)),
    ...(step.justification === undefined ? [] : [`Justification: ${step.justification}`]),
  ]);
  const troubles = problems(step, model);
  const kind = step.kind === 'criterion' ? ' criterion' : '';
  const id = ` id="step-${escapeHtml(step.number)}"`;
  const same = step.cases.every((each) => each.result === step.cases[0]?.result && each.met === step.cases[0]?.met && each.problem === undefined);
  if (many && !(same && step.cases.every((each) => each.substituted === step.cases[0]?.substituted))) {
    const first = `<tr class="step${kind}"${id}>${source}<td class="calc">${title}${lines}${troubles}${remarks}</td><td class="res"></td></tr>`;
    const rest = step.cases.map((each, k) => {
      const label = `<span class="case">${escapeHtml(model.cases[k]?.title ?? each.case)}</span>`;
      return `<tr class="step each"><td class="src"></td><td class="calc"><div class="eq">${label}${numbers(each, step)}</div></td>${result(each, '')}</tr>`;
    });
    return [first, ...rest].join('\n');
  }
  const cells = (many || results === 1 ? step.cases.slice(0, 1) : step.cases).map((each, k) => result(each, model.cases[k]?.title ?? ''));
  const text = many ? equations(step, model) : lines;
  return `<tr class="step${kind}"${id}>${source}<td class="calc">${title}${text}${troubles}${remarks}</td>${cells.join('')}</tr>`;
}

/** Symbols, then the numbers of each case; once where all cases share them. */
function equations(step: Step, model: RecordModel): string {
  const symbols = `<span>${renderTex(step.symbols)}</span>`;
  const groups = new Map<string, { first: StepCase; titles: string[] }>();
  step.cases.forEach((each, k) => {
    const key = `${each.sides ?? ''}\n${each.substituted}`;
    if (key === '\n') return;
    const group = groups.get(key) ?? { first: each, titles: [] };
    group.titles.push(model.cases[k]?.title ?? each.case);
    groups.set(key, group);
  });
  if (groups.size === 0) return `<div class="eq">${symbols}</div>`;
  if (groups.size === 1 && [...groups.values()][0]?.titles.length === step.cases.length) {
    return `<div class="eq">${symbols}${[...groups.values()].map((group) => numbers(group.first, step)).join('')}</div>`;
  }
  const lines = [...groups.values()].map(
    (group) => `<div class="eq"><span class="case">${escapeHtml(group.titles.join(', '))}</span>${numbers(group.first, step)}</div>`,
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

function result(each: StepCase, title: string): string {
  const label = title === '' ? '' : ` data-case="${escapeHtml(title)}"`;
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

function problems(step: Step, model: RecordModel): string {
  const texts = new Map<string, string[]>();
  step.cases.forEach((each, k) => {
    if (each.problem === undefined) return;
    const titles = texts.get(each.problem.message) ?? [];
    titles.push(model.cases[k]?.title ?? '');
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

function isState(note: string): boolean {
  return note === 'assumed' || note === 'measured' || note === 'no source' || openState(note);
}
function openState(note: string): boolean {
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
