// Text of the sheet as markup: printed quantities with raised exponents, prose, sources with their references.
//
// 1. Every text reaches the page as text; nothing of a sheet is ever read as markup.
// Not here: reading of prose (src/record), formulas (math.ts).

import { html, type TemplateResult } from 'lit';
import { type ProseBlock, type ProseSpan, rankedItems } from '../record/index.ts';

const raised = new Map([...'⁰¹²³⁴⁵⁶⁷⁸⁹⁻⁺'].map((sign, index) => [sign, [...'0123456789−+'][index] ?? '']));

/** `1.2 × 10⁴ mm²` with its exponents raised as the formulas raise them. */
export function quantity(text: string): TemplateResult {
  const parts = text.split(/([⁰¹²³⁴⁵⁶⁷⁸⁹⁻⁺]+)/u);
  return html`<span class="quantity">${parts.map((part, index) => (index % 2 === 0 ? part : html`<sup>${[...part].map((sign) => raised.get(sign)).join('')}</sup>`))}</span>`;
}

function span({ style, text }: ProseSpan): TemplateResult | string {
  if (style === 'strong') return html`<strong>${text}</strong>`;
  if (style === 'emphasis') return html`<em>${text}</em>`;
  if (style === 'break') return html`<br />`;
  return style === 'code' ? html`<code>${text}</code>` : text;
}

export function prose(blocks: readonly ProseBlock[]): TemplateResult[] {
  return blocks.map((block) => {
    if (block.kind === 'paragraph') return html`<p>${block.spans.map((one) => withReferences(one))}</p>`;
    const items = rankedItems(block).map(({ spans, below }) => {
      const lists = below.map(({ ordered, items: inner }) =>
        list(
          ordered,
          inner.map((item) => html`<li>${item.map(withReferences)}</li>`),
        ),
      );
      return html`<li>${spans.map(withReferences)}${lists}</li>`;
    });
    return list(block.ordered, items);
  });
}

const list = (ordered: boolean, items: readonly TemplateResult[]) =>
  ordered ? html`<ol>${items}</ol>` : html`<ul>${items}</ul>`;

const withReferences = (one: ProseSpan) => (one.style === 'text' ? source(one.text) : span(one));

/** `[R1] 5.10.5.2`: the mark in brackets leads to the list of references. */
export function source(text: string): (TemplateResult | string)[] {
  return text
    .split(/(\[[A-Za-z][A-Za-z0-9]{0,7}\])/u)
    .map((part, index) => (index % 2 === 0 ? part : html`<a class="reference" href="#ref-${part.slice(1, -1)}">${part}</a>`));
}

export const words = (count: number, one: string, many: string) => `${count} ${count === 1 ? one : many}`;
