// Tokens beside one another: two values without an operator, numbers that were meant as one, superscripts.
//
// Two values side by side are a product only where the grammar and the eye agree that they are.
// Not here: the order of tokens as a whole (refusals.ts), products that the grammar makes (products.ts).

import type { Problem } from '../quantity/index.ts';
import type { Typed } from './refusal.ts';
import { excerpt, inQuotes, refusal, writeInstead } from './refusal.ts';
import type { Token } from './tokens.ts';
import { endsValue } from './tokens.ts';

export function besideValue(input: Typed, i: number, wantsValue: boolean): Problem | undefined {
  const { source, tokens } = input;
  const token = tokens[i] as Token;
  const before = tokens[i - 1];
  if (wantsValue || !before || !endsValue(before)) return undefined;
  const both = [before.from, token.to] as const;
  const typed = source.slice(before.from, token.to);
  if (/[\n\r]/.test(source.slice(before.to, token.from))) {
    return refusal(
      'line-break',
      `“${excerpt(typed)}” is broken over two lines without an operator: write one formula on one line.`,
      both,
    );
  }
  if (token.kind === 'string') {
    if (before.kind === 'number') {
      const joined = inQuotes(input, before.text, token.text.trim());
      return refusal(
        'number-outside-quotes',
        `“${excerpt(typed)}”: the number of a quoted quantity stands inside the quotation marks; write ${excerpt(joined)}.`,
        both,
        [writeInstead(both, joined)],
      );
    }
    return operatorMissing(input, i);
  }
  if (token.kind !== 'number') return undefined;
  if (before.kind === 'string') return operatorMissing(input, i);
  if (before.kind === 'number') {
    if (before.to === token.from && token.text.startsWith('.')) {
      return refusal('two-decimal-points', `“${excerpt(typed)}” has two decimal points: write one number.`, both);
    }
    const joined = before.text + token.text;
    if (/^[0-9]{3}(?:\.[0-9]*)?$/.test(token.text) && /^[0-9]+$/.test(before.text)) {
      return refusal(
        'digits-apart',
        `“${excerpt(typed)}” reads as two numbers: in a formula digits stand together, write ${joined}.`,
        both,
        [writeInstead(both, joined)],
      );
    }
    return operatorMissing(input, i);
  }
  if (before.kind === 'name' && before.to === token.from && token.text.startsWith('.'))
    return memberAccess(source, before, token);
  return undefined;
}

function memberAccess(source: string, before: Token, token: Token): Problem {
  const both = [before.from, token.to] as const;
  const instead = `${source.slice(before.from, before.to)}_${token.text.replace('.', '')}`;
  return refusal(
    'point-in-name',
    `“${excerpt(source.slice(...both))}”: a name holds no point; write ${instead} for a subscript.`,
    both,
    [writeInstead(both, instead)],
  );
}

export function strangeNumber(input: Typed, i: number): Problem | undefined {
  const { source, tokens } = input;
  const token = tokens[i] as Token;
  const next = tokens[i + 1];
  if (next?.kind === 'name' && next.from === token.to) {
    const both = [token.from, next.to] as const;
    const typed = source.slice(...both);
    if (next.text === 'e') {
      return refusal(
        'unfinished-power-of-ten',
        `“${typed}” can be read as an unfinished power of ten or as ${token.text} times the constant e: write ${token.text}e3 or ${token.text}*e.`,
        both,
        [writeInstead(both, `${token.text}*e`)],
      );
    }
    if (token.text === '0' && /^(?:[xX][0-9A-Fa-f]+|[bB][01]+|[oO][0-7]+)$/.test(next.text)) {
      const value = String(Number(`0${next.text.toLowerCase()}`));
      return refusal('not-decimal', `“${excerpt(typed)}”: numbers are decimal here; write ${value}.`, both, [
        writeInstead(both, value),
      ]);
    }
  }
  const value = Number(token.text);
  if (!Number.isFinite(value) || (value === 0 && /[1-9]/.test(token.text.split(/[eE]/)[0] as string))) {
    return refusal(
      'number-out-of-range',
      `“${excerpt(token.text)}” is beyond the numbers that can be computed (about 1e-308 to 1e308): choose a larger or smaller unit.`,
      [token.from, token.to],
    );
  }
  return undefined;
}

export function superscript(input: Typed, i: number, wantsValue: boolean): Problem | undefined {
  const { source, tokens } = input;
  const signed = tokens[i + 1]?.kind === 'operator' ? 1 : 0;
  const digits = tokens[i + 1 + signed] as Token;
  const at = [(tokens[i] as Token).from, digits.to] as const;
  if (wantsValue)
    return refusal(
      'nothing-to-raise',
      `The superscript “${source.slice(...at)}” has nothing before it to raise: put a value there.`,
      at,
    );
  const before = tokens[i - 1];
  const after = tokens[i + 2 + signed];
  const tower = before?.kind === 'number' && tokens[i - 2]?.text === '^' ? tokens[i - 3] : undefined;
  if (tower || (after?.kind === 'operator' && after.text === '^')) {
    const [base, one, two] = tower ? [tower, before, digits] : [before, digits, tokens[i + 3 + signed]];
    const whole = [(base ?? digits).from, (two ?? after ?? digits).to] as const;
    const plain = base && (base.kind === 'name' || base.kind === 'number') ? source.slice(base.from, base.to) : 'x';
    const [first, second] = [
      `${signed && !tower ? tokens[i + 1]?.text : ''}${one?.text ?? 2}`,
      `${signed && tower ? tokens[i + 1]?.text : ''}${two?.text ?? 3}`,
    ];
    return refusal(
      'ambiguous-power',
      `“${excerpt(source.slice(...whole))}” can be read as (${plain}^${first})^${second} or as ${plain}^(${first}^${second}): write the one that is meant.`,
      whole,
    );
  }
  return undefined;
}

export function operatorMissing(input: Typed, i: number): Problem {
  const { source, tokens } = input;
  const token = tokens[i] as Token;
  const before = tokens[i - 1] as Token;
  const left = excerpt(source.slice(before.from, before.to), 20);
  const right = excerpt(source.slice(token.from, token.to), 20);
  if (token.text === 'not') {
    return refusal('operator-missing', `Between “${left}” and “not” the word “and” or “or” is missing: write it.`, [
      before.from,
      token.to,
    ]);
  }
  return refusal(
    'operator-missing',
    `Between “${left}” and “${right}” an operator is missing: write * for a product.`,
    [before.from, token.to],
    [writeInstead([before.to, token.from], '*', 'write * between them')],
  );
}
