// Formulas of the record as markup: KaTeX's boxes to look at, MathML beside them for readers that speak.
//
// 1. Nothing in a formula can load, link or size anything beyond a line (KaTeX's trust is off, sizes and macros are limited).
// 2. A formula that cannot be set prints as its text: a record never fails for a formula.

import katex from 'katex';
import { escapeHtml } from './escape.ts';

const kept = new Map<string, string>();
const mostKept = 20_000;

/** Inline markup; `display` gives fractions their full height. */
export function renderTex(tex: string, display = true): string {
  const key = display ? `d${tex}` : tex;
  const known = kept.get(key);
  if (known !== undefined) return known;
  const markup = render(display ? `\\displaystyle ${tex.replaceAll('{cases}', '{dcases}')}` : tex);
  if (kept.size >= mostKept) kept.clear();
  kept.set(key, markup);
  return markup;
}

function render(tex: string): string {
  try {
    return katex.renderToString(tex, {
      output: 'htmlAndMathml',
      strict: 'ignore',
      trust: false,
      maxSize: 10,
      maxExpand: 100,
      throwOnError: true,
    });
  } catch {
    return `<code>${escapeHtml(tex)}</code>`;
  }
}
