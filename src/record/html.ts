// The record as one HTML file: prints right on A4 and Letter, opens on any machine with no network, reads on a phone.
//
// 1. No script, no reference to anything outside the file; a content policy in the file says so too.
// 2. First what a reader decides by: purpose, criteria, open points, assumptions. Then the steps, then conclusion and sources.
// 3. Every page carries the head of the sheet, its number of sheets and, until it is issued, its status.
// Not here: what the record says (make.ts), rows of the steps (html-lines.ts), style (html-style.ts).

import { escapeHtml } from './escape.ts';
import { stepsTable } from './html-lines.ts';
import { renderTex } from './html-math.ts';
import { type RecordAssets, recordStyle } from './html-style.ts';
import { caseHead, caseMark, inlineText, prose, type Symbols, symbolsOf, verdict } from './html-text.ts';
import type { CriterionSummary, RecordModel } from './model.ts';

export const footerCaution =
  "Calculation aid. A competent engineer verifies inputs, method and applicability; local codes and the maker's data prevail. Not for carrying persons unless stated.";

export function recordHtml(model: RecordModel, assets: RecordAssets): string {
  const block = model.titleBlock;
  const symbols = symbolsOf(model);
  const state = model.status === 'issued' ? '' : ` · ${model.status}`;
  const identity = `${documentWords(model)}${state}`;
  const style = recordStyle(assets, { paper: model.settings.paper ?? 'A4', identity, footer: footerCaution });
  const language = /^[A-Za-z]{2,3}(?:-[A-Za-z0-9]{2,8})*$/u.test(block.language ?? '') ? block.language : 'en';
  return `<!DOCTYPE html>
<html lang="${language}">
<head>
<meta charset="utf-8">
<meta http-equiv="Content-Security-Policy" content="default-src 'none'; style-src 'unsafe-inline'; font-src data:; img-src data:">
<meta name="viewport" content="width=device-width, initial-scale=1">
<title>${escapeHtml([identity, model.title].filter((part) => part !== '').join(' · '))}</title>
<style>
${style}
</style>
</head>
<body>
<div class="record">
${head(model)}
<main>
<div class="front">
${fields(model)}
${section('Purpose', prose(model.purpose, symbols))}
${section('Method', prose(model.method, symbols))}
${criteria(model, symbols)}
${openPoints(model, symbols)}
${assumptions(model, symbols)}
${besideTemplate(model, symbols)}
${section('Limits of validity', model.limits.length === 0 ? '' : `<ul>${model.limits.map((limit) => `<li>${inlineText(limit, symbols)}</li>`).join('')}</ul>`)}
</div>
<section aria-label="Calculation">
${stepsTable(model, symbols)}
</section>
<div class="back">
${section('Conclusion', prose(model.conclusion, symbols))}
${references(model)}
<div class="caution">${model.caution === '' ? '' : `<p><strong>Caution.</strong> ${escapeHtml(model.caution)}</p>`}<p>${escapeHtml(footerCaution)}</p></div>
</div>
</main>
</div>
</body>
</html>
`;
}

function documentWords(model: RecordModel): string {
  const { documentNumber, revision } = model.titleBlock;
  const words = [documentNumber ?? '', revision ? `rev ${revision}` : ''].filter((word) => word !== '').join(' ');
  return clipped(words === '' ? model.title : words);
}

/** The margin of a page has room for so much. */
const longestIdentity = 80;

function clipped(text: string): string {
  return text.length > longestIdentity ? `${text.slice(0, longestIdentity - 1)}…` : text;
}

function head(model: RecordModel): string {
  const block = model.titleBlock;
  const kind = block.documentType ?? 'Calculation sheet';
  const entry = (name: string, value: string, kindOf = '') =>
    `<div${kindOf === '' ? '' : ` class="${kindOf}"`}><dt>${name}</dt><dd>${value === '' ? '—' : escapeHtml(value)}</dd></div>`;
  return `<header class="head"><div>
<dl><div class="title"><dt>${escapeHtml(kind)}</dt><dd><h1>${escapeHtml(model.title)}</h1></dd></div>${entry('Document', block.documentNumber ?? '')}${entry('Revision', block.revision ?? '')}${entry('Date', block.date ?? '')}${entry('Status', model.status, 'status')}</dl>
<dl class="names">${entry('Prepared', block.preparedBy ?? '')}${entry('Checked', block.checkedBy ?? '')}${entry('Approved', block.approvedBy ?? '')}</dl>
</div></header>`;
}

/** The fields of the title block that the running head has no room for. */
function fields(model: RecordModel): string {
  const block = model.titleBlock;
  const rows: readonly (readonly [string, string | undefined])[] = [
    ['Organisation', block.organisation],
    ['Department', block.department],
    ['Client', block.client],
    ['Project', block.project],
    ['Supplementary title', block.supplementaryTitle],
    ['Technical reference', block.technicalReference],
    ['Classification', block.classification],
    [
      'Load cases',
      model.cases
        .map((each) => each.title)
        .filter((title) => title !== '')
        .join('; '),
    ],
    ['Begun from', model.origin],
  ];
  const shown = rows.filter(([, value]) => value !== undefined && value !== '');
  if (shown.length === 0) return '';
  return `<dl class="fields">${shown.map(([name, value]) => `<div><dt>${name}</dt><dd>${escapeHtml(value ?? '')}</dd></div>`).join('')}</dl>`;
}

/** Wider than a phone: moved by the keyboard too. */
const scroll = '<div class="scroll" tabindex="0">';

function section(title: string, body: string): string {
  return body === '' ? '' : `<section><h2>${title}</h2>${body}</section>`;
}

function criteria(model: RecordModel, symbols: Symbols): string {
  if (model.summary.length === 0) return '';
  const several = model.cases.length > 1;
  const heads = several
    ? model.cases.map((_, k) => `<th scope="col">${caseHead(model, k)}</th>`).join('')
    : '<th scope="col">Utilisation</th>';
  const rows = model.summary.map((line) => {
    const cells = line.cases.map((each) => {
      if (each.met === null) return '<td><span class="wrong">no verdict</span></td>';
      return `<td>${verdict(each.met, each.utilisation, escapeHtml(each.printed ?? ''))}</td>`;
    });
    const governing = several ? `<td>${governingWord(line, model)}</td>` : '';
    const justification =
      line.justification === '' ? '' : `<p class="note">Justification: ${inlineText(line.justification, symbols)}</p>`;
    return `<tr><td>${stepLink(line.number)}</td><td>${inlineText(line.title, symbols)} <span class="limit">${renderTex(line.symbols, false)}</span>${justification}</td>${cells.join('')}${governing}</tr>`;
  });
  return `<section><h2>Criteria</h2><p>${escapeHtml(criteriaWords(model.summary))}</p>${scroll}<table class="list"><thead><tr><th scope="col">Step</th><th scope="col">Criterion</th>${heads}${several ? '<th scope="col">Governs</th>' : ''}</tr></thead><tbody>${rows.join('')}</tbody></table></div></section>`;
}

function governingWord(line: CriterionSummary, model: RecordModel): string {
  if (line.governing === null) return '—';
  const [first] = line.cases;
  if (line.cases.every((each) => each.printed === first?.printed && each.met === first?.met)) return 'all alike';
  return `<span class="mark">${caseMark(
    model.cases.findIndex((each) => each.id === line.governing),
    model.cases.length,
  )}</span>`;
}

/** 'All 5 criteria are met.' */
export function criteriaWords(summary: readonly CriterionSummary[]): string {
  const unmet = summary.filter((line) => line.cases.some((each) => each.met === false));
  const unknown = summary.filter((line) => line.cases.some((each) => each.met === null));
  const rest =
    unknown.length === 0 ? '' : ` ${unknown.length} without a verdict: ${unknown.map((line) => line.number).join(', ')}.`;
  if (unmet.length > 0)
    return `${unmet.length} of ${summary.length} criteria not met: ${unmet.map((line) => line.number).join(', ')}.${rest}`;
  if (unknown.length > 0) return `${summary.length - unknown.length} of ${summary.length} criteria met.${rest}`;
  return summary.length === 1 ? 'The criterion is met.' : `All ${summary.length} criteria are met.`;
}

/** Values that wait for the same thing share a row; what is not met or fails has its own. */
function openPoints(model: RecordModel, symbols: Symbols): string {
  if (model.openPoints.length === 0) return '';
  const rows: { kind: string; numbers: string[]; text: string }[] = [];
  for (const point of model.openPoints) {
    const shared = point.kind === 'carried over' || point.kind === 'no source';
    const row = shared ? rows.find((each) => each.kind === point.kind) : undefined;
    if (row) row.numbers.push(point.number);
    else rows.push({ kind: point.kind, numbers: [point.number], text: shared ? sharedText[point.kind] : point.text });
  }
  const markup = rows.map(
    (row) =>
      `<tr><td>${row.kind}</td><td>${row.numbers.map(stepLink).join(', ')}</td><td>${inlineText(row.text, symbols)}</td></tr>`,
  );
  return `<section><h2>Open points</h2>${scroll}<table class="list points"><thead><tr><th scope="col">What</th><th scope="col">Step</th><th scope="col">Detail</th></tr></thead><tbody>${markup.join('')}</tbody></table></div></section>`;
}

const sharedText = { 'carried over': 'not confirmed for this sheet', 'no source': 'nothing says where these come from' } as const;

function stepLink(number: string): string {
  return number === '' ? '' : `<a href="#step-${escapeHtml(number)}">${escapeHtml(number)}</a>`;
}

function assumptions(model: RecordModel, symbols: Symbols): string {
  if (model.assumptions.length === 0) return '';
  const rows = model.assumptions.map((each) => {
    const value = each.symbol === '' ? '' : `${renderTex(each.symbol, false)} = ${escapeHtml(each.value)}`;
    const confirm = each.toConfirm === '' ? '' : ` <span class="tag open">to be confirmed: ${escapeHtml(each.toConfirm)}</span>`;
    return `<tr><td>${stepLink(each.number)}</td><td>${inlineText(each.text, symbols)}${confirm}</td><td>${value}</td><td>${inlineText(each.source, symbols)}</td></tr>`;
  });
  return `<section><h2>Assumptions</h2>${scroll}<table class="list"><colgroup><col style="width:7%"><col><col style="width:22%"><col style="width:25%"></colgroup><thead><tr><th scope="col">Step</th><th scope="col">Assumption</th><th scope="col">Value</th><th scope="col">Source</th></tr></thead><tbody>${rows.join('')}</tbody></table></div></section>`;
}

/** What is not the template's, so that a checker reads what is new. */
function besideTemplate({ beside }: RecordModel, symbols: Symbols): string {
  if (beside === null) return '';
  const words = `<p>${escapeHtml(beside.words)}</p>`;
  if (beside.differences.length === 0) return section('Formulas beside the template', words);
  const code = (text: string) => (text === '' ? '—' : `<code>${escapeHtml(text)}</code>`);
  const rows = beside.differences.map(
    ({ what, number, name, title, was, now }) =>
      `<tr><td>${what}</td><td>${stepLink(number)}</td><td>${inlineText(title === '' ? name : title, symbols)}</td><td>${code(was)}</td><td>${code(now)}</td></tr>`,
  );
  return section(
    'Formulas beside the template',
    `${words}${scroll}<table class="list beside"><thead><tr><th scope="col">What</th><th scope="col">Step</th><th scope="col">Line</th><th scope="col">In the template</th><th scope="col">Here</th></tr></thead><tbody>${rows.join('')}</tbody></table></div>`,
  );
}

function references(model: RecordModel): string {
  if (model.references.length === 0) return '';
  const rows = model.references.map((each) => {
    const cited = each.citedBy.length === 0 ? 'not cited' : each.citedBy.join(', ');
    return `<tr><td>[${escapeHtml(each.id)}]</td><td>${escapeHtml(each.document)}</td><td>${escapeHtml(each.edition)}</td><td>${escapeHtml(each.title)}</td><td>${escapeHtml(cited)}</td></tr>`;
  });
  return `<section><h2>Sources</h2>${scroll}<table class="list"><thead><tr><th scope="col">Source</th><th scope="col">Document</th><th scope="col">Edition</th><th scope="col">Title</th><th scope="col">Cited in</th></tr></thead><tbody>${rows.join('')}</tbody></table></div></section>`;
}
