// What is refused by looking at the token list alone, before the grammar is asked: brackets, stray signs, reserved
// words, missing values and operators.
//
// 1. The first trouble in the order of the text is reported, and only it.
// 2. A list that passes holds only words and signs of the formula language, its brackets match, and every operator has
//    a value on each side. What the grammar can still say beyond it is for walk.ts.
// Not here: single signs and characters (strange-signs.ts), the rules for products, `not` and calls (walk.ts).

import type { Problem } from '../quantity/index.ts';
import { arity, isFunctionName, isTableFunction } from './functions.ts';
import { excerpt, refusal, writeInstead } from './refusal.ts';
import { strangeOperator, strangeSign } from './strange-signs.ts';
import { endsValue, type Token } from './tokens.ts';
import { strangeWord } from './strange-words.ts';

const binary = new Set(['+', '-', '*', '/', '^', '<', '<=', '>', '>=', '==', '!=', '?', ':', 'and', 'or']);
const prefix = new Set(['+', '-', 'not']);
export const deepestNesting = 50;

interface Frame {
  readonly open: number;
  /** Name of the called function, '' for plain parentheses. */
  readonly call: string;
  commas: number;
}

export interface Checked {
  readonly problem?: Problem;
  /** Index of the closing bracket for each opening one. */
  readonly closing: ReadonlyMap<number, number>;
}

export function checkTokens(source: string, tokens: readonly Token[], decimalSign: '.' | ','): Checked {
  const closing = new Map<number, number>();
  const frames: Frame[] = [];
  let wantsValue = true;
  for (let i = 0; i < tokens.length; i++) {
    const token = tokens[i] as Token;
    const frame = frames.at(-1);
    const inTableWord = frame !== undefined && isTableFunction(frame.call) && frame.commas < 2;
    const problem = inTableWord && token.kind === 'name' ? besideValue(source, tokens, i, wantsValue) : strange(source, tokens, i, wantsValue);
    if (problem) return { problem, closing };
    switch (token.kind) {
      case 'open': {
        const before = tokens[i - 1];
        if (frames.length >= deepestNesting) return { problem: tooDeep(token), closing };
        frames.push({ open: i, call: before?.kind === 'name' ? before.text : '', commas: 0 });
        wantsValue = true;
        break;
      }
      case 'close': {
        if (frame === undefined) return { problem: unopened(token), closing };
        const empty = frame.open === i - 1;
        if (empty && frame.call === '') return { problem: emptyParentheses(tokens, i), closing };
        if (wantsValue && !empty) return { problem: valueMissing(source, tokens, i), closing };
        closing.set(frame.open, i);
        frames.pop();
        wantsValue = false;
        break;
      }
      case 'comma':
        if (frame === undefined || frame.call === '') return { problem: strayComma(source, tokens, i, decimalSign), closing };
        if (wantsValue) return { problem: valueMissing(source, tokens, i), closing };
        frame.commas++;
        wantsValue = true;
        break;
      case 'operator':
        if (wantsValue && !prefix.has(token.text)) return { problem: valueMissing(source, tokens, i), closing };
        if (!wantsValue && token.text === 'not') return { problem: operatorMissing(source, tokens, i), closing };
        wantsValue = true;
        break;
      default:
        wantsValue = false;
    }
  }
  const unclosed = frames.at(-1);
  if (unclosed) return { problem: notClosed(source, tokens, unclosed.open), closing };
  if (wantsValue) return { problem: endsTooSoon(source, tokens), closing };
  return { closing };
}

/** Trouble that a token makes by itself or with its neighbours. */
function strange(source: string, tokens: readonly Token[], i: number, wantsValue: boolean): Problem | undefined {
  const token = tokens[i] as Token;
  switch (token.kind) {
    case 'unknown':
      return strangeSign(source, tokens, i);
    case 'open':
      return token.text === '(' ? besideValue(source, tokens, i, wantsValue) : strangeOperator(source, tokens, i);
    case 'close':
      return token.text === ')' ? undefined : strangeOperator(source, tokens, i);
    case 'operator':
      if (!binary.has(token.text) && !prefix.has(token.text)) return strangeOperator(source, tokens, i);
      return token.from === token.to ? superscript(source, tokens, i, wantsValue) : undefined;
    case 'name':
      return besideValue(source, tokens, i, wantsValue) ?? strangeWord(source, tokens, i) ?? bareFunction(source, tokens, i);
    case 'number':
      return besideValue(source, tokens, i, wantsValue) ?? strangeNumber(source, tokens, i);
    case 'string':
      return besideValue(source, tokens, i, wantsValue);
    default:
      return undefined;
  }
}

/** Two values side by side: a product only where the grammar and the eye agree that it is one. */
function besideValue(source: string, tokens: readonly Token[], i: number, wantsValue: boolean): Problem | undefined {
  const token = tokens[i] as Token;
  const before = tokens[i - 1];
  if (wantsValue || !before || !endsValue(before)) return undefined;
  const both = [before.from, token.to] as const;
  const typed = source.slice(before.from, token.to);
  if (/[\n\r]/.test(source.slice(before.to, token.from))) {
    return refusal('line-break', `“${excerpt(typed)}” is broken over two lines without an operator: write one formula on one line.`, both);
  }
  if (token.kind === 'string') {
    if (before.kind === 'number') {
      const joined = `"${source.slice(before.from, before.to)} ${token.text.trim()}"`;
      return refusal('number-outside-quotes', `“${excerpt(typed)}”: the number of a quoted quantity stands inside the quotation marks: write ${joined}.`, both, [writeInstead(both, joined)]);
    }
    return operatorMissing(source, tokens, i);
  }
  if (token.kind !== 'number') return undefined;
  if (before.kind === 'string') return operatorMissing(source, tokens, i);
  if (before.kind === 'number') {
    if (before.to === token.from && token.text.startsWith('.')) {
      return refusal('two-decimal-points', `“${excerpt(typed)}” has two decimal points: write one number.`, both);
    }
    const joined = before.text + token.text;
    if (/^[0-9]{3}(?:\.[0-9]*)?$/.test(token.text) && /^[0-9]+$/.test(before.text)) {
      return refusal('digits-apart', `“${excerpt(typed)}” reads as two numbers: in a formula digits stand together, write ${joined}.`, both, [writeInstead(both, joined)]);
    }
    return operatorMissing(source, tokens, i);
  }
  if (before.kind === 'name' && before.to === token.from && token.text.startsWith('.')) return memberAccess(source, before, token);
  return undefined;
}

export function memberAccess(source: string, before: Token, token: Token): Problem {
  const both = [before.from, token.to] as const;
  const instead = `${source.slice(before.from, before.to)}_${token.text.replace('.', '')}`;
  return refusal('point-in-name', `“${excerpt(source.slice(...both))}”: a name holds no point: write ${instead} for a subscript.`, both, [writeInstead(both, instead)]);
}

function strangeNumber(source: string, tokens: readonly Token[], i: number): Problem | undefined {
  const token = tokens[i] as Token;
  const next = tokens[i + 1];
  if (next?.kind === 'name' && next.from === token.to) {
    const both = [token.from, next.to] as const;
    const typed = source.slice(...both);
    if (next.text === 'e') {
      return refusal('unfinished-power-of-ten', `“${typed}” can be read as an unfinished power of ten or as ${token.text} times the constant e: write ${token.text}e3 or ${token.text}*e.`, both, [writeInstead(both, `${token.text}*e`)]);
    }
    if (token.text === '0' && /^(?:[xX][0-9A-Fa-f]+|[bB][01]+|[oO][0-7]+)$/.test(next.text)) {
      const value = String(Number(`0${next.text.toLowerCase()}`));
      return refusal('not-decimal', `“${excerpt(typed)}”: numbers are decimal here: write ${value}.`, both, [writeInstead(both, value)]);
    }
  }
  const value = Number(token.text);
  if (!Number.isFinite(value) || (value === 0 && /[1-9]/.test(token.text.split(/[eE]/)[0] as string))) {
    return refusal('number-out-of-range', `“${excerpt(token.text)}” is beyond the numbers that can be computed (about 1e-308 to 1e308): choose a larger or smaller unit.`, [token.from, token.to]);
  }
  return undefined;
}

function bareFunction(source: string, tokens: readonly Token[], i: number): Problem | undefined {
  const token = tokens[i] as Token;
  const next = tokens[i + 1];
  if (next?.kind === 'open' || !(isFunctionName(token.text) || isTableFunction(token.text))) return undefined;
  const name = token.text;
  const at = [token.from, token.to] as const;
  if (isTableFunction(name)) {
    return refusal('function-without-parentheses', `“${name}” is a function: write ${name}(table, column, ${name === 'entry' ? 'key' : 'x'}).`, at);
  }
  if (next?.kind === 'operator' && next.text === '^' && tokens[i + 2]?.kind === 'number' && tokens[i + 3]?.kind === 'open') {
    const typed = source.slice(token.from, tokens[i + 3]?.to);
    return refusal('function-without-parentheses', `“${excerpt(typed)}…”: the power stands after the parentheses: write ${name}(x)^${tokens[i + 2]?.text}.`, at);
  }
  const single = arity.get(name)?.[0] === 1;
  // What the argument is must be plain: in `sin x/2` or `sin 2 x` it is not.
  const beyond = tokens[i + 2];
  const plain = !beyond || beyond.kind === 'close' || beyond.kind === 'comma' || (beyond.kind === 'operator' && !/^[*/^]$/.test(beyond.text));
  if (next && plain && (next.kind === 'name' || next.kind === 'number' || next.kind === 'string') && single && !isFunctionName(next.text)) {
    const both = [token.from, next.to] as const;
    const instead = `${name}(${source.slice(next.from, next.to)})`;
    return refusal('function-without-parentheses', `“${excerpt(source.slice(...both))}”: the argument of a function stands in parentheses: write ${excerpt(instead)}.`, both, [writeInstead(both, instead)]);
  }
  return refusal('function-without-parentheses', `“${name}” is a function and needs its argument${single ? '' : 's'} in parentheses: write ${name}(${single ? 'x' : 'a, b'}).`, at);
}

function superscript(source: string, tokens: readonly Token[], i: number, wantsValue: boolean): Problem | undefined {
  const signed = tokens[i + 1]?.kind === 'operator' ? 1 : 0;
  const digits = tokens[i + 1 + signed] as Token;
  const at = [(tokens[i] as Token).from, digits.to] as const;
  if (wantsValue) return refusal('nothing-to-raise', `The superscript “${source.slice(...at)}” has nothing before it to raise: put a value there.`, at);
  const before = tokens[i - 1];
  const after = tokens[i + 2 + signed];
  const tower = before?.kind === 'number' && tokens[i - 2]?.text === '^' ? tokens[i - 3] : undefined;
  if (tower || (after?.kind === 'operator' && after.text === '^')) {
    return refusal('ambiguous-power', `“${excerpt(source.slice((tower ?? before ?? digits).from, (after ?? digits).to))}” can be read as a power of a power or as a power in the exponent: write parentheses, (x^2)^3 or x^(2^3).`, at);
  }
  return undefined;
}

function strayComma(source: string, tokens: readonly Token[], i: number, decimalSign: '.' | ','): Problem {
  const before = tokens[i - 1];
  const comma = tokens[i] as Token;
  const after = tokens[i + 1];
  if (before?.kind === 'number' && after?.kind === 'number' && before.to === comma.from && comma.to === after.from) {
    const both = [before.from, after.to] as const;
    const instead = `${before.text}.${after.text}`;
    const but = decimalSign === ',' ? ', unlike in the values of this sheet' : '';
    return refusal('decimal-comma', `“${source.slice(...both)}”: in a formula the decimal sign is a point${but}: write ${instead}.`, both, [writeInstead(both, instead)]);
  }
  return refusal('stray-comma', 'A comma stands only between the arguments of a function: leave it out, or write the function before the parentheses.', [comma.from, comma.to]);
}

function valueMissing(source: string, tokens: readonly Token[], i: number): Problem {
  const token = tokens[i] as Token;
  const before = tokens[i - 1];
  const typed = source.slice(token.from, token.to);
  const place = before ? `between “${source.slice(before.from, before.to)}” and “${typed}”` : `before “${typed}”`;
  return refusal('value-missing', `A value is missing ${place}: write a name, a number or a quantity in quotation marks there.`, [before?.from ?? token.from, token.to]);
}

export function operatorMissing(source: string, tokens: readonly Token[], i: number): Problem {
  const token = tokens[i] as Token;
  const before = tokens[i - 1] as Token;
  const left = excerpt(source.slice(before.from, before.to), 20);
  const right = excerpt(source.slice(token.from, token.to), 20);
  if (token.text === 'not') {
    return refusal('operator-missing', `Between “${left}” and “not” the word and or or is missing: write it.`, [before.from, token.to]);
  }
  return refusal('operator-missing', `Between “${left}” and “${right}” an operator is missing: write * for a product.`, [before.from, token.to], [writeInstead([before.to, token.from], '*', 'write * between them')]);
}

function endsTooSoon(source: string, tokens: readonly Token[]): Problem {
  const last = tokens.at(-1) as Token;
  return refusal('value-missing', `The formula ends after “${source.slice(last.from, last.to)}”: write the value that follows.`, [last.from, last.to]);
}

function emptyParentheses(tokens: readonly Token[], i: number): Problem {
  return refusal('value-missing', 'The parentheses are empty: write a value between them.', [(tokens[i - 1] as Token).from, (tokens[i] as Token).to]);
}

function unopened(token: Token): Problem {
  return refusal('parenthesis-not-opened', 'This “)” closes nothing: leave it out, or write the “(” that it closes.', [token.from, token.to], [writeInstead([token.from, token.to], '', 'leave it out')]);
}

function notClosed(source: string, tokens: readonly Token[], open: number): Problem {
  const token = tokens[open] as Token;
  const rest = excerpt(source.slice(token.from), 20);
  return refusal('parenthesis-not-closed', `The parenthesis that opens at “${rest}” is not closed: write the “)” that belongs to it.`, [token.from, token.to], [writeInstead([source.length, source.length], ')', 'close it at the end')]);
}

function tooDeep(token: Token): Problem {
  return refusal('formula-too-deep', `Parentheses stand more than ${deepestNesting} deep in each other here: split the formula into quantities of their own.`, [token.from, token.to]);
}
