// Words of the grammar that are no words of the formula language: each with what to write instead.
// Not here: functions of other languages (functions.ts), signs (strange-signs.ts).

import type { Problem } from '../quantity/index.ts';
import type { Typed } from './refusal.ts';
import { excerpt, inQuotes, operand, refusal, writeInstead } from './refusal.ts';
import type { Token } from './tokens.ts';
import { endsValue } from './tokens.ts';

const plain = new Set(['name', 'number']);

/** A reserved word where a name should stand; undefined for every other name. */
export function strangeWord(input: Typed, i: number): Problem | undefined {
  const { source, tokens } = input;
  const token = tokens[i] as Token;
  const at = [token.from, token.to] as const;
  const before = tokens[i - 1];
  const after = tokens[i + 1];
  const typed = source.slice(...at);
  switch (token.text) {
    case 'in':
      if (before?.kind === 'number' && !(after && plain.has(after.kind))) {
        const both = [before.from, token.to] as const;
        const instead = inQuotes(input, before.text, 'in');
        return refusal(
          'unit-in-formula',
          `“${source.slice(...both)}”: a quantity inside a formula stands in quotation marks; write ${instead}.`,
          both,
          [writeInstead(both, instead)],
        );
      }
      return conversion(typed, at);
    case 'to':
      return conversion(typed, at);
    case 'mod':
    case 'xor': {
      // A call says its arguments: calls.ts writes them out.
      if (token.text === 'mod' && after?.kind === 'open') return undefined;
      const pair = before && after && plain.has(before.kind) && plain.has(after.kind);
      const [a, b] = pair ? [source.slice(before.from, before.to), source.slice(after.from, after.to)] : ['a', 'b'];
      const instead =
        token.text === 'mod' ? `${operand(a)} - ${operand(b)}*floor(${a}/${b})` : `(${a} or ${b}) and not (${a} and ${b})`;
      const fixes = pair ? [writeInstead([before.from, after.to], `(${instead})`)] : [];
      return refusal('not-in-formulas', `“${token.text}” is not part of formulas: write ${excerpt(instead, 60)}.`, at, fixes);
    }
    case 'true':
    case 'false':
      return refusal(
        'not-in-formulas',
        `“${typed}” is not part of formulas: write the comparison itself, such as v > v_max.`,
        at,
      );
    case 'null':
    case 'undefined':
    case 'NaN':
      return refusal('not-in-formulas', `“${typed}” is not part of formulas, a formula always has a value: leave it out.`, at);
    case 'Infinity':
      return refusal(
        'not-in-formulas',
        `“${typed}” is not part of formulas: write the formula of the limit case, or a choice, test ? this : that.`,
        at,
      );
    case 'end':
      return refusal(
        'not-in-formulas',
        `“${typed}” is reserved and cannot name a quantity: choose another name, such as ${typed}_1.`,
        at,
      );
    default:
      return spelled(token, typed, at, before);
  }
}

function conversion(typed: string, at: readonly [number, number]): Problem {
  return refusal(
    'conversion-in-formula',
    `“${typed}” converts no units here: units follow by themselves, and the unit of the result stands in the unit field of the line.`,
    at,
  );
}

function spelled(token: Token, typed: string, at: readonly [number, number], before: Token | undefined): Problem | undefined {
  if (/\p{Mn}/u.test(token.text)) {
    return refusal(
      'unknown-letter',
      `“${excerpt(typed)}” holds an accent that belongs to no letter: write the name without it.`,
      at,
    );
  }
  if (/^(?:AND|OR|NOT|And|Or|Not)$/.test(token.text) && (endsValue(before) || /^not$/i.test(token.text))) {
    const word = token.text.toLowerCase();
    return refusal('small-letters', `“${typed}”: the words and, or, not are written in small letters; write ${word}.`, at, [
      writeInstead(at, word),
    ]);
  }
  return undefined;
}
