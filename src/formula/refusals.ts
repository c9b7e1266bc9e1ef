// What is refused by looking at the token list alone, before the grammar is asked: brackets, stray signs, reserved
// words, missing values and operators.
//
// 1. The first trouble in the order of the text is reported, and only it.
// 2. A list that passes holds only words and signs of the formula language, its brackets match, and every operator has
//    a value on each side. What the grammar can still say beyond it is for walk.ts.
// Not here: a token beside its neighbours (neighbours.ts), strange signs and words (strange-*.ts), the rules for products,
// `not` and calls (walk.ts).

import type { Problem } from '../quantity/index.ts';
import { arity, isFunctionName, isTableFunction } from './functions.ts';
import { besideValue, operatorMissing, strangeNumber, superscript } from './neighbours.ts';
import type { Typed } from './refusal.ts';
import { excerpt, refusal, writeInstead } from './refusal.ts';
import { strangeOperator } from './strange-operators.ts';
import { strangeSign } from './strange-signs.ts';
import { strangeWord } from './strange-words.ts';
import type { Token } from './tokens.ts';

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

export function checkTokens(input: Typed): Checked {
  const { tokens } = input;
  const closing = new Map<number, number>();
  const frames: Frame[] = [];
  let wantsValue = true;
  for (let i = 0; i < tokens.length; i++) {
    const token = tokens[i] as Token;
    const frame = frames.at(-1);
    const inTableWord = frame !== undefined && isTableFunction(frame.call) && frame.commas < 2;
    const problem = inTableWord && token.kind === 'name' ? besideValue(input, i, wantsValue) : strange(input, i, wantsValue);
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
        if (wantsValue && !empty) return { problem: valueMissing(input, i), closing };
        closing.set(frame.open, i);
        frames.pop();
        wantsValue = false;
        break;
      }
      case 'comma':
        if (frame === undefined || frame.call === '') return { problem: strayComma(input, i), closing };
        if (wantsValue) return { problem: valueMissing(input, i), closing };
        frame.commas++;
        wantsValue = true;
        break;
      case 'operator':
        if (wantsValue && !prefix.has(token.text)) return { problem: valueMissing(input, i), closing };
        if (!wantsValue && token.text === 'not') return { problem: operatorMissing(input, i), closing };
        wantsValue = true;
        break;
      default:
        wantsValue = false;
    }
  }
  const unclosed = frames.at(-1);
  if (unclosed) return { problem: notClosed(input, unclosed.open, frames.length), closing };
  if (wantsValue) return { problem: endsTooSoon(input), closing };
  return { closing };
}

/** Trouble that a token makes by itself or with its neighbours. */
function strange(input: Typed, i: number, wantsValue: boolean): Problem | undefined {
  const token = input.tokens[i] as Token;
  switch (token.kind) {
    case 'unknown':
      return strangeSign(input, i);
    case 'open':
      return token.text === '(' ? besideValue(input, i, wantsValue) : strangeOperator(input, i);
    case 'close':
      return token.text === ')' ? undefined : strangeOperator(input, i);
    case 'operator':
      if (!binary.has(token.text) && !prefix.has(token.text)) return strangeOperator(input, i);
      return token.from === token.to ? superscript(input, i, wantsValue) : undefined;
    case 'name':
      return besideValue(input, i, wantsValue) ?? strangeWord(input, i) ?? bareFunction(input, i);
    case 'number':
      return besideValue(input, i, wantsValue) ?? strangeNumber(input, i);
    case 'string':
      return besideValue(input, i, wantsValue);
    default:
      return undefined;
  }
}

/** Two values side by side: a product only where the grammar and the eye agree that it is one. */
function bareFunction(input: Typed, i: number): Problem | undefined {
  const { source, tokens } = input;
  const token = tokens[i] as Token;
  const next = tokens[i + 1];
  if (next?.kind === 'open' || !(isFunctionName(token.text) || isTableFunction(token.text))) return undefined;
  const name = token.text;
  const at = [token.from, token.to] as const;
  if (isTableFunction(name)) {
    return refusal(
      'function-without-parentheses',
      `“${name}” is a function: write ${name}(table, column, ${name === 'entry' ? 'key' : 'x'}).`,
      at,
    );
  }
  if (next?.kind === 'operator' && next.text === '^' && tokens[i + 2]?.kind === 'number' && tokens[i + 3]?.kind === 'open') {
    const close = closingOf(tokens, i + 3);
    const whole = [token.from, close?.to ?? token.to] as const;
    const argument = close ? source.slice(tokens[i + 3]?.from, close.to) : '(x)';
    const instead = `${name}${argument}^${tokens[i + 2]?.text}`;
    return refusal(
      'function-without-parentheses',
      `“${excerpt(source.slice(...whole))}”: the power stands after the parentheses; write ${excerpt(instead)}.`,
      whole,
      close ? [writeInstead(whole, instead)] : [],
    );
  }
  const single = arity.get(name)?.[0] === 1;
  // What the argument is must be plain: in `sin x/2` or `sin 2 x` it is not.
  const beyond = tokens[i + 2];
  const plain =
    !beyond || beyond.kind === 'close' || beyond.kind === 'comma' || (beyond.kind === 'operator' && !/^[*/^]$/.test(beyond.text));
  if (
    next &&
    plain &&
    (next.kind === 'name' || next.kind === 'number' || next.kind === 'string') &&
    single &&
    !isFunctionName(next.text)
  ) {
    const both = [token.from, next.to] as const;
    const instead = `${name}(${source.slice(next.from, next.to)})`;
    return refusal(
      'function-without-parentheses',
      `“${excerpt(source.slice(...both))}”: the argument of a function stands in parentheses; write ${excerpt(instead)}.`,
      both,
      [writeInstead(both, instead)],
    );
  }
  return refusal(
    'function-without-parentheses',
    `“${name}” is a function and needs its argument${single ? '' : 's'} in parentheses: write ${name}(${single ? 'x' : 'a, b'}).`,
    at,
  );
}

function closingOf(tokens: readonly Token[], open: number): Token | undefined {
  let depth = 0;
  return tokens.find((t, i) => {
    if (i < open) return false;
    if (t.kind === 'open') depth++;
    if (t.kind === 'close') depth--;
    return depth === 0;
  });
}

function strayComma(input: Typed, i: number): Problem {
  const { source, tokens } = input;
  const before = tokens[i - 1];
  const comma = tokens[i] as Token;
  const after = tokens[i + 1];
  if (before?.kind === 'number' && after?.kind === 'number' && before.to === comma.from && comma.to === after.from) {
    const both = [before.from, after.to] as const;
    const instead = `${before.text}.${after.text}`;
    const but = input.decimalSign === ',' ? ', unlike in the values of this sheet' : '';
    return refusal(
      'decimal-comma',
      `“${source.slice(...both)}”: in a formula the decimal sign is a point${but}; write ${instead}.`,
      both,
      [writeInstead(both, instead)],
    );
  }
  return refusal(
    'stray-comma',
    'A comma stands only between the arguments of a function: leave it out, or write the function before the parentheses.',
    [comma.from, comma.to],
  );
}

function valueMissing(input: Typed, i: number): Problem {
  const { source, tokens } = input;
  const token = tokens[i] as Token;
  const before = tokens[i - 1];
  const typed = source.slice(token.from, token.to);
  const place = before ? `between “${source.slice(before.from, before.to)}” and “${typed}”` : `before “${typed}”`;
  return refusal('value-missing', `A value is missing ${place}: write a name, a number or a quantity in quotation marks there.`, [
    before?.from ?? token.from,
    token.to,
  ]);
}

function endsTooSoon(input: Typed): Problem {
  const { source, tokens } = input;
  const last = tokens.at(-1) as Token;
  return refusal('value-missing', `The formula ends after “${source.slice(last.from, last.to)}”: write the value that follows.`, [
    last.from,
    last.to,
  ]);
}

function emptyParentheses(tokens: readonly Token[], i: number): Problem {
  return refusal('value-missing', 'The parentheses are empty: write a value between them.', [
    (tokens[i - 1] as Token).from,
    (tokens[i] as Token).to,
  ]);
}

function unopened(token: Token): Problem {
  return refusal(
    'parenthesis-not-opened',
    'This “)” closes nothing: leave it out, or write the “(” that it closes.',
    [token.from, token.to],
    [writeInstead([token.from, token.to], '', 'leave it out')],
  );
}

function notClosed(input: Typed, open: number, count: number): Problem {
  const { source, tokens } = input;
  const token = tokens[open] as Token;
  const rest = excerpt(source.slice(token.from), 20);
  return refusal(
    'parenthesis-not-closed',
    `The parenthesis that opens at “${rest}” is not closed: write the “)” that belongs to it.`,
    [token.from, token.to],
    [writeInstead([source.length, source.length], ')'.repeat(count), 'close it at the end')],
  );
}

function tooDeep(token: Token): Problem {
  return refusal(
    'formula-too-deep',
    `Parentheses stand more than ${deepestNesting} deep in each other here: split the formula into quantities of their own.`,
    [token.from, token.to],
  );
}
