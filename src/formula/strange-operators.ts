// Operators and brackets of other notations: each with what to write instead.
// Not here: characters that are no operators (strange-signs.ts), words (strange-words.ts).

import type { Problem } from '../quantity/index.ts';
import type { Typed } from './refusal.ts';
import { excerpt, inQuotes, refusal, writeInstead } from './refusal.ts';
import type { Token } from './tokens.ts';
import { endsValue } from './tokens.ts';

type Place = readonly [from: number, to: number];

/** Signs for which one other sign is meant. */
const other: ReadonlyMap<string, readonly [write: string, what: string]> = new Map([
  ['**', ['^', 'a power']],
  ['.^', ['^', 'a power']],
  ['.*', ['*', 'a product']],
  ['./', ['/', 'a quotient']],
  ['//', ['/', 'a quotient']],
  ['<>', ['!=', '“not equal”']],
  ['=<', ['<=', '“at most”']],
  ['=>', ['>=', '“at least”']],
  ['&&', ['and', '“and”']],
  ['&', ['and', '“and”']],
  ['||', ['or', '“or”']],
]);

const without: ReadonlyMap<string, string> = new Map([
  ['<<', 'shifts of bits'],
  ['>>', 'shifts of bits'],
  ['>>>', 'shifts of bits'],
  ['^|', 'operations on bits'],
  ['??', 'replacements for missing values'],
  ['?.', 'members of objects'],
]);

export function strangeOperator(input: Typed, i: number): Problem {
  const { source, tokens } = input;
  const token = tokens[i] as Token;
  const at: Place = [token.from, token.to];
  const before = tokens[i - 1];
  const after = tokens[i + 1];
  const instead = other.get(token.text);
  if (instead) {
    const [write, what] = instead;
    const [left, right] = /^[a-z]/.test(write)
      ? [/\s/.test(source[at[0] - 1] ?? ' ') ? '' : ' ', /\s/.test(source[at[1]] ?? ' ') ? '' : ' ']
      : ['', ''];
    return refusal('other-sign', `“${token.text}” is not part of formulas: for ${what} write ${write}.`, at, [
      writeInstead(at, `${left}${write}${right}`, `write ${write}`),
    ]);
  }
  const missing = without.get(token.text);
  if (missing)
    return refusal('not-in-formulas', `“${token.text}” is not part of formulas, which have no ${missing}: leave it out.`, at);
  switch (token.text) {
    case '%':
      return percent(input, before, at);
    case '!':
      if (endsValue(before))
        return refusal(
          'not-in-formulas',
          '“!” is not part of formulas, which have no factorial: write the product, such as 1*2*3.',
          at,
        );
      return refusal('other-sign', '“!” is not part of formulas: for “not” write not.', at, [
        writeInstead(at, 'not ', 'write not'),
      ]);
    case '=':
    case ':=':
      return assignment(input, i);
    case ';':
      return refusal(
        'not-in-formulas',
        '“;” is not part of formulas: a formula is one expression, and the arguments of a function are separated by commas.',
        at,
      );
    case '~':
      return refusal('not-in-formulas', '“~” is not part of formulas: write - for a change of sign or not for logic.', at);
    case '|':
      return bars(input, i);
    default:
      return brackets(input, i, after);
  }
}

function percent(input: Typed, before: Token | undefined, at: Place): Problem {
  if (before?.kind !== 'number') {
    return refusal(
      'percent-in-formula',
      '“%” belongs to values, not to formulas: give the quantity the unit % and use its name here.',
      at,
    );
  }
  const both: Place = [before.from, at[1]];
  const quoted = inQuotes(input, before.text, '%');
  return refusal(
    'percent-in-formula',
    `“${input.source.slice(...both)}”: % belongs to values, not to formulas; write ${quoted} in quotation marks, or make it a given.`,
    both,
    [writeInstead(both, quoted)],
  );
}

function assignment(input: Typed, i: number): Problem {
  const { source, tokens } = input;
  const token = tokens[i] as Token;
  const at: Place = [token.from, token.to];
  const compare = writeInstead(at, '==', 'write == to compare');
  const next = tokens[i + 1];
  if (i === 1 && tokens[0]?.kind === 'name' && next) {
    const name = source.slice(tokens[0].from, tokens[0].to);
    const right = source.slice(next.from).trim();
    return refusal(
      'equals-sign',
      `“${excerpt(`${name} ${token.text} ${right}`)}”: a formula is the right-hand side alone, the name belongs to the line: write ${excerpt(right)}, or == to compare.`,
      at,
      [{ from: 0, to: next.from, text: '', label: `write ${excerpt(right)}` }, compare],
    );
  }
  return refusal(
    'equals-sign',
    `“${token.text}” is not part of a formula, which is the right-hand side alone: write == to compare.`,
    at,
    [compare],
  );
}

function bars(input: Typed, i: number): Problem {
  const { source, tokens } = input;
  const token = tokens[i] as Token;
  const close = tokens.findIndex((t, j) => j > i && t.kind === 'operator' && t.text === '|');
  if (close > i + 1) {
    const both: Place = [token.from, (tokens[close] as Token).to];
    const inner = source.slice(token.to, (tokens[close] as Token).from).trim();
    return refusal(
      'other-sign',
      `“${excerpt(source.slice(...both))}”: bars are not part of formulas: for the absolute value write ${excerpt(`abs(${inner})`)}.`,
      both,
      [writeInstead(both, `${endsValue(tokens[i - 1]) ? '*' : ''}abs(${inner})`)],
    );
  }
  return refusal(
    'other-sign',
    '“|” is not part of formulas: write abs(x) for the absolute value, or the word or between conditions.',
    [token.from, token.to],
  );
}

/** Square brackets and braces: as parentheses, which is what they mean on paper. */
function brackets(input: Typed, i: number, after: Token | undefined): Problem {
  const { source, tokens } = input;
  const token = tokens[i] as Token;
  const at: Place = [token.from, token.to];
  const pair = token.text === '[' ? ']' : token.text === '{' ? '}' : '';
  if (pair === '')
    return refusal('parenthesis-not-opened', `This “${token.text}” closes nothing: formulas have parentheses only.`, at);
  let depth = 0;
  const close = tokens.findIndex((t, j) => {
    if (j < i) return false;
    if (t.kind === 'open' && t.text === token.text) depth++;
    if (t.kind === 'close' && t.text === pair) depth--;
    return depth === 0;
  });
  if (close < 0 || !after || tokens.slice(i, close).some((t) => t.kind === 'comma') || tokens[i - 1]?.kind === 'name') {
    return refusal(
      'not-in-formulas',
      `“${token.text}” is not part of formulas, which have no lists and no indices: write parentheses, and names such as F_1 for numbered quantities.`,
      at,
    );
  }
  const both: Place = [token.from, (tokens[close] as Token).to];
  const inner = source.slice(token.to, (tokens[close] as Token).from);
  return refusal(
    'other-sign',
    `“${excerpt(source.slice(...both))}”: formulas have parentheses only; write ${excerpt(`(${inner})`)}.`,
    both,
    [writeInstead(both, `(${inner})`)],
  );
}
