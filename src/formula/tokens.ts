// The token list of a formula: what was typed, piece by piece, each with its place in the text as typed.
//
// 1. Tokens stand in the order of the text and do not overlap; white space is between them and nowhere in them.
//    A superscript digit is two tokens: a `^` of no width and the number.
// 2. The text of a token is normalised (`×` is `*`, `≤` is `<=`, a name is canonical); `from` and `to` are not.
// 3. Any text has a token list: what is no token of the language is 'unknown'. Time grows with the length alone.
// Not here: which tokens a formula may hold and in what order (refusals.ts, walk.ts).

import { canonicalName, nameLetter } from './names.ts';

export type TokenKind = 'name' | 'number' | 'string' | 'operator' | 'open' | 'close' | 'comma' | 'unknown';

export interface Token {
  readonly kind: TokenKind;
  /** Normalised; of a string what stands between its quotation marks, as typed. */
  readonly text: string;
  readonly from: number;
  readonly to: number;
}

const number = /(?:[0-9]+(?:\.[0-9]*)?|\.[0-9]+)(?:[eE][+\-−]?[0-9]+)?/y;
const superscripts = '⁰¹²³⁴⁵⁶⁷⁸⁹';
const superscriptRun = /[⁺⁻]?[⁰¹²³⁴⁵⁶⁷⁸⁹]+/y;
const space = /[\s\u00a0\u2000-\u200a\u202f\u205f\u3000]/;
const laterPart = /[₀-₉]|\p{Mn}/u;
const doubleQuotes = '"“”„‟«»';
const singleQuotes = "'‘’‚‛";
const words = new Set(['and', 'or', 'not']);

const signs: ReadonlyMap<string, string> = new Map([
  ['×', '*'],
  ['·', '*'],
  ['⋅', '*'],
  ['∗', '*'],
  ['∙', '*'],
  ['•', '*'],
  ['✕', '*'],
  ['÷', '/'],
  ['∕', '/'],
  ['⁄', '/'],
  ['−', '-'],
  ['–', '-'],
  ['—', '-'],
  ['‐', '-'],
  ['‑', '-'],
  ['≤', '<='],
  ['⩽', '<='],
  ['≥', '>='],
  ['⩾', '>='],
  ['≠', '!='],
]);
const longOperators = [
  '>>>',
  '**',
  '.*',
  './',
  '.^',
  '==',
  '!=',
  '<=',
  '>=',
  '<>',
  '=<',
  '=>',
  '<<',
  '>>',
  '&&',
  '||',
  '??',
  '?.',
  '^|',
  ':=',
  '//',
];
const longStarts = new Set(longOperators.map((o) => o[0]));
const shortOperators = new Set('+-*/^<>=!?:;%&|~');

/** Reads any text; never throws. */
export function tokenize(text: string): readonly Token[] {
  const tokens: Token[] = [];
  const length = text.length;
  let at = 0;
  const push = (kind: TokenKind, normal: string, to: number): void => {
    tokens.push({ kind, text: normal, from: at, to });
    at = to;
  };
  while (at < length) {
    const c = text[at] as string;
    if (c === ' ' || (space.test(c) && c !== '\ufeff')) {
      at++;
    } else if (isAsciiLetter(c) || (c > '\u007f' && nameLetter.test(c))) {
      readName(text, at, push);
    } else if ((c >= '0' && c <= '9') || (c === '.' && isDigit(text[at + 1]))) {
      number.lastIndex = at;
      const typed = number.exec(text)?.[0] ?? c;
      push('number', typed.replace('−', '-'), at + typed.length);
    } else if (c === '(' || c === '[' || c === '{') {
      push('open', c, at + 1);
    } else if (c === ')' || c === ']' || c === '}') {
      push('close', c, at + 1);
    } else if (c === ',') {
      push('comma', c, at + 1);
    } else if (doubleQuotes.includes(c) || (singleQuotes.includes(c) && !endsValue(tokens.at(-1)))) {
      const end = closingQuote(text, at + 1, doubleQuotes.includes(c) ? doubleQuotes : singleQuotes);
      if (end < 0) push('unknown', text.slice(at), length);
      else push('string', text.slice(at + 1, end), end + 1);
    } else if (c === '⁺' || c === '⁻' || superscripts.includes(c)) {
      readSuperscript(text, at, push);
    } else {
      const long = longStarts.has(c) ? longOperators.find((o) => text.startsWith(o, at)) : undefined;
      // `a ?.5 : b` is a choice with a number, not a chain.
      if (long !== undefined && !(long === '?.' && isDigit(text[at + 2]))) push('operator', long, at + long.length);
      else if (shortOperators.has(c)) push('operator', c, at + 1);
      else if (signs.has(c)) push('operator', signs.get(c) as string, at + 1);
      else
        push(
          'unknown',
          String.fromCodePoint(text.codePointAt(at) ?? 0),
          at + ((text.codePointAt(at) as number) > 0xffff ? 2 : 1),
        );
    }
  }
  return tokens;
}

/** Whether a value may end with this token: after it a quotation mark is a prime, a name a factor. */
export function endsValue(token: Token | undefined): boolean {
  return (
    token !== undefined && (token.kind === 'name' || token.kind === 'number' || token.kind === 'string' || token.kind === 'close')
  );
}

function readName(text: string, from: number, push: (kind: TokenKind, normal: string, to: number) => void): void {
  let to = from;
  while (to < text.length && isNamePart(text[to] as string)) to++;
  const name = canonicalName(text.slice(from, to));
  push(words.has(name) ? 'operator' : 'name', name, to);
}

function readSuperscript(text: string, from: number, push: (kind: TokenKind, normal: string, to: number) => void): void {
  superscriptRun.lastIndex = from;
  const typed = superscriptRun.exec(text)?.[0];
  if (typed === undefined) {
    push('unknown', text[from] as string, from + 1);
    return;
  }
  push('operator', '^', from);
  const signed = typed.startsWith('⁻') || typed.startsWith('⁺');
  if (signed) push('operator', typed.startsWith('⁻') ? '-' : '+', from + 1);
  push('number', [...typed.slice(signed ? 1 : 0)].map((s) => superscripts.indexOf(s)).join(''), from + typed.length);
}

function closingQuote(text: string, from: number, marks: string): number {
  for (let i = from; i < text.length; i++) if (marks.includes(text[i] as string)) return i;
  return -1;
}

function isAsciiLetter(c: string): boolean {
  return (c >= 'a' && c <= 'z') || (c >= 'A' && c <= 'Z');
}

function isNamePart(c: string): boolean {
  if (c <= '\u007f') return isAsciiLetter(c) || isDigit(c) || c === '_';
  return nameLetter.test(c) || laterPart.test(c);
}

function isDigit(c: string | undefined): boolean {
  return c !== undefined && c >= '0' && c <= '9';
}
