// Text of the record as markup: escaped, and with the names of the sheet's quantities in their symbols.
//
// 1. A word such as F_1min that names a quantity of this sheet is set as its symbol; every other word stays as typed.
// 2. Every text passes here or escapeHtml; none reaches the page otherwise.

import { canonicalName } from '../formula/index.ts';
import { escapeHtml } from './escape.ts';
import { renderTex } from './html-math.ts';
import type { RecordModel } from './model.ts';
import { type ProseBlock, type ProseSpan, rankedItems } from './prose.ts';

/** TeX of the symbol by canonical name. */
export type Symbols = ReadonlyMap<string, string>;

export function symbolsOf(model: RecordModel): Symbols {
  return new Map(
    model.steps.flatMap((step) =>
      step.name === undefined || step.symbol === undefined ? [] : [[step.name, step.symbol] as const],
    ),
  );
}

// Only names with a subscript: a lone letter is more often a word.
const nameWord = /(?<![\p{L}\p{N}_])\p{L}[\p{L}\p{N}]{0,30}_[\p{L}\p{N}_]{1,30}(?![\p{L}\p{N}_])/gu;

export function inlineText(text: string, symbols: Symbols): string {
  let done = '';
  let end = 0;
  for (const match of text.matchAll(nameWord)) {
    const tex = symbols.get(canonicalName(match[0]));
    if (tex === undefined) continue;
    done += escapeHtml(text.slice(end, match.index)) + renderTex(tex, false);
    end = match.index + match[0].length;
  }
  return done + escapeHtml(text.slice(end));
}

export function prose(blocks: readonly ProseBlock[], symbols: Symbols): string {
  return blocks
    .map((block) => {
      if (block.kind === 'paragraph') return `<p>${spans(block.spans, symbols)}</p>`;
      const items = rankedItems(block).map(({ spans: own, below }) => {
        const lists = below.map((one) =>
          list(
            one.ordered,
            one.items.map((item) => spans(item, symbols)),
          ),
        );
        return `${spans(own, symbols)}${lists.join('')}`;
      });
      return list(block.ordered, items);
    })
    .join('');
}

function list(ordered: boolean, items: readonly string[]): string {
  const tag = ordered ? 'ol' : 'ul';
  return `<${tag}>${items.map((item) => `<li>${item}</li>`).join('')}</${tag}>`;
}

const spanTag = { strong: 'strong', emphasis: 'em', code: 'code' } as const;

function spans(all: readonly ProseSpan[], symbols: Symbols): string {
  return all
    .map((span) => {
      if (span.style === 'text') return inlineText(span.text, symbols);
      if (span.style === 'break') return '<br>';
      const inner = span.style === 'code' ? escapeHtml(span.text) : inlineText(span.text, symbols);
      return `<${spanTag[span.style]}>${inner}</${spanTag[span.style]}>`;
    })
    .join('');
}

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

/** 'met' or 'not met', with a bar to the limit where there is a utilisation. */
export function verdict(met: boolean, utilisation: number | null, printed: string): string {
  const word = met ? '<span class="met">met</span>' : '<span class="notmet">not met</span>';
  if (utilisation === null) return `${word} ${printed}`;
  const width = Math.min(100, Math.max(0, utilisation * 100)).toFixed(1);
  return `${word} ${printed}<span class="bar${met ? '' : ' over'}" aria-hidden="true"><i style="width:${width}%"></i></span>`;
}

export function noteLines(notes: readonly string[], symbols: Symbols): string {
  return notes.map((note) => `<p class="note">${inlineText(note, symbols)}</p>`).join('');
}
