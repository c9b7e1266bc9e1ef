// The words of a unit text, with their places.
//
// 1. Tokens keep half-open spans of the text as typed; signs that look alike are brought to one of them first, length kept.
// 2. A space between two factors is a product, as the SI Brochure has it; around a sign it says nothing.
// 3. A symbol ends before digits that are its exponent: "mm2" is mm², but "inH2O" is one symbol.
// Not here: what an order of tokens means (unit-grammar.ts).

import { symbolOfText } from './catalogue.ts';
import { numberOfSuperscripts, spaces } from './numeral-text.ts';
import type { Rational } from './rational.ts';
import { rational, rationalOfText } from './rational.ts';

export interface Token {
  readonly kind: 'symbol' | 'exponent' | 'times' | 'over' | 'open' | 'close' | 'number' | 'other' | 'end';
  readonly text: string;
  readonly from: number;
  readonly to: number;
  /** Of an exponent; none where it is no number. */
  readonly exponent?: Rational;
  /** No space and no sign stands between this token and the one before. */
  readonly attached: boolean;
}

const gapPattern = new RegExp(`${spaces}*`, 'y');
const symbolPattern = new RegExp(`(?:deg|°)${spaces}?[CFR](?![\\p{L}\\d_])|[°′″%‰℃℉]|[\\p{L}_][\\p{L}\\d_]*`, 'uy');
const exponentPattern = /\^\(\s*([^()]{1,12})\)|\^([+\-−]?\d+(?:\.\d+)?)|([⁺⁻]?[⁰¹²³⁴⁵⁶⁷⁸⁹]+)/y;
const attachedExponentPattern = /[-−]\d{1,3}(?![\d.])/y;
const numberPattern = /\d+(?:[.,]\d+)?/y;

const lookAlike: ReadonlyMap<string, string> = new Map([
  ['\u2126', 'Ω'],
  ['\u212A', 'K'],
  ['\u212B', 'Å'],
  ['\u03BC', 'µ'],
  ['\u00BA', '°'],
  ['\u02DA', '°'],
]);
const lookAlikes = /[\u2126\u212A\u212B\u03BC\u00BA\u02DA]/g;

function match(pattern: RegExp, text: string, from: number): RegExpExecArray | null {
  pattern.lastIndex = from;
  return pattern.exec(text);
}

/** The tokens of a unit text, an `end` last. Never fails: what is no token is `other`, one character long. */
export function unitTokens(typed: string): readonly Token[] {
  const text = typed.replace(lookAlikes, (char) => lookAlike.get(char) ?? char);
  const tokens: Token[] = [];
  const push = (kind: Token['kind'], from: number, to: number, attached: boolean, exponent?: Rational) => {
    const token = { kind, text: text.slice(from, to), from, to, attached };
    tokens.push(exponent ? { ...token, exponent } : token);
  };
  let at = 0;
  for (;;) {
    const start = at;
    at += match(gapPattern, text, at)?.[0].length ?? 0;
    const spaced = at > start;
    if (at >= text.length) break;
    const char = text[at] ?? '';
    const before = tokens[tokens.length - 1]?.kind;
    const factorBefore = before === 'symbol' || before === 'exponent' || before === 'close' || before === 'number';
    const simple = simpleKind(char);
    const symbol = simple ? null : match(symbolPattern, text, at);
    const number = simple || symbol ? null : match(numberPattern, text, at);
    if (spaced && factorBefore && (symbol || number || simple === 'open')) push('times', start, at, false);
    const attached = !spaced && factorBefore;
    if (simple) {
      push(simple, at, at + 1, attached);
      at += 1;
    } else if (symbol) {
      at = pushSymbol(push, text, at, symbol[0], attached);
    } else if (number) {
      push('number', at, at + number[0].length, attached);
      at += number[0].length;
    } else {
      const power = match(exponentPattern, text, at);
      const to = at + (power?.[0].length ?? char.length);
      push(power ? 'exponent' : 'other', at, to, attached, power ? exponentOf(power) : undefined);
      at = to;
    }
  }
  push('end', text.length, text.length, false);
  return tokens;
}

function simpleKind(char: string): 'times' | 'over' | 'open' | 'close' | undefined {
  if (char === '·' || char === '*' || char === '⋅' || char === '∙') return 'times';
  if (char === '/' || char === '∕' || char === '⁄') return 'over';
  if (char === '(') return 'open';
  return char === ')' ? 'close' : undefined;
}

type Push = (kind: Token['kind'], from: number, to: number, attached: boolean, exponent?: Rational) => void;

/** A symbol and the exponent that is written right after it in plain digits; returns where they end. */
function pushSymbol(push: Push, text: string, from: number, word: string, attached: boolean): number {
  const digits = /\d{1,2}$/.exec(word);
  const base = digits ? word.slice(0, digits.index) : word;
  const isPower = digits !== null && base !== '' && symbolOfText(word) === undefined && symbolOfText(base) !== undefined;
  const end = from + (isPower ? base.length : word.length);
  push('symbol', from, end, attached);
  if (isPower) {
    push('exponent', end, from + word.length, true, rational(Number(digits[0])));
    return from + word.length;
  }
  const negative = match(attachedExponentPattern, text, end);
  if (!negative) return end;
  const to = end + negative[0].length;
  push('exponent', end, to, true, rationalOfText(negative[0]));
  return to;
}

function exponentOf(power: RegExpExecArray): Rational | undefined {
  if (power[3] !== undefined) return power[3].length > 4 ? undefined : rational(numberOfSuperscripts(power[3]));
  return rationalOfText(power[1] ?? power[2] ?? '');
}
