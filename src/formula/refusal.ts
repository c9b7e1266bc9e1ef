// Small tools for saying why a formula is refused: a Problem with its place, excerpts of the text, and fixes.
//
// Every sentence says what stands there, how it can be read where there are two ways, and what to write.
// Not here: which formulas are refused (refusals.ts, walk.ts).

import type { Fix, Problem } from '../quantity/index.ts';
import type { Span } from './expr.ts';
import type { Token } from './tokens.ts';

/** A formula as typed, before the grammar has seen it. */
export interface Typed {
  readonly source: string;
  readonly tokens: readonly Token[];
  /** The sign in quoted quantities; formulas themselves have the point. */
  readonly decimalSign: '.' | ',';
}

/** A number of the formula with its unit, as a quoted quantity of the sheet. */
export function inQuotes(input: Typed, number: string, unit: string): string {
  return `"${input.decimalSign === ',' ? number.replace('.', ',') : number} ${unit}"`;
}

export function refusal(code: string, sentence: string, at: Span, fixes: readonly Fix[] = []): Problem {
  // Neither a line break nor a word of hundreds of letters in the typed text may break the sentence.
  const message = sentence
    .replace(/\s+/g, ' ')
    .replace(/\S{60,}/g, (word) => `${excerpt(word, 40)}${word.endsWith('.') ? '.' : ''}`);
  return fixes.length === 0 ? { code, severity: 'error', message, at } : { code, severity: 'error', message, at, fixes };
}

/** A fix that replaces a span; its label is what will be written. */
export function writeInstead(at: Span, text: string, label = `write ${excerpt(text)}`): Fix {
  return { from: at[0], to: at[1], text, label };
}

/** A piece of typed text, on one line and short enough for a sentence. */
export function excerpt(text: string, longest = 40): string {
  const line = text.replace(/\s+/g, ' ').trim();
  if (line.length <= longest) return line;
  // No half of a surrogate pair at the cut.
  return `${line.slice(0, longest - 1).replace(/[\ud800-\udbff]$/, '')}…`;
}

/** An operand as it must be written inside a product or a power. */
export function operand(text: string): string {
  return /^[A-Za-z0-9_.\u0080-\uffff]+(?:\([^()]*\))?$/.test(text) || wrapped(text) ? text : `(${text})`;
}

/** Whether one pair of parentheses holds the whole text. */
function wrapped(text: string): boolean {
  if (!text.startsWith('(') || !text.endsWith(')')) return false;
  let depth = 0;
  for (let i = 0; i < text.length; i++) {
    if (text[i] === '(') depth++;
    else if (text[i] === ')' && --depth === 0) return i === text.length - 1;
  }
  return false;
}
