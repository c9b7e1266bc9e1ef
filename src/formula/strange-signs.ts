// Characters that belong to no formula: each with what was probably meant and what to write.
// Not here: operators of other notations (strange-operators.ts), words (strange-words.ts), missing values (refusals.ts).

import type { Problem } from '../quantity/index.ts';
import type { Typed } from './refusal.ts';
import { excerpt, inQuotes, operand, refusal, writeInstead } from './refusal.ts';
import type { Token } from './tokens.ts';
import { endsValue } from './tokens.ts';

type Place = readonly [from: number, to: number];

const lookAlikes = new Map([...'АВЕКМНОРСТХаеорсухіј'].map((c, i) => [c, 'ABEKMHOPCTXaeopcyxij'[i] as string]));
const fractions: ReadonlyMap<string, string> = new Map([
  ['½', '(1/2)'],
  ['¼', '(1/4)'],
  ['¾', '(3/4)'],
  ['⅓', '(1/3)'],
  ['⅔', '(2/3)'],
  ['⅛', '(1/8)'],
]);
/** Controls, joiners, marks of direction, variation selectors. */
const invisible = /[\p{Cc}\p{Cf}]|\p{Variation_Selector}/u;

export function strangeSign(input: Typed, i: number): Problem {
  const { source, tokens } = input;
  const token = tokens[i] as Token;
  const sign = token.text;
  const at: Place = [token.from, token.to];
  const before = tokens[i - 1];
  const after = tokens[i + 1];
  if (/^["“”„‟«»'‘’‚‛]/.test(sign)) {
    if (endsValue(before) && /^['‘’‚‛]/.test(sign) && sign.length === 1) return prime(source, before as Token, at);
    const mark = /^['‘’‚‛]/.test(sign) ? "'" : '"';
    const fixes = sign.length > 1 ? [writeInstead([source.length, source.length], mark, 'close it at the end')] : [];
    return refusal(
      'quote-not-closed',
      `The quotation mark at ${excerpt(sign, 20)} is not closed: write ${mark} after the quantity.`,
      at,
      fixes,
    );
  }
  if (invisible.test(sign)) {
    return refusal('invisible-character', `An invisible character (${codeOf(sign)}) stands here: delete it.`, at, [
      writeInstead(at, '', 'delete it'),
    ]);
  }
  const latin = lookAlikes.get(sign);
  if (latin !== undefined) {
    return refusal(
      'look-alike-letter',
      `“${sign}” (${codeOf(sign)}) is a Cyrillic letter that looks like ${latin}: type the Latin ${latin}.`,
      at,
      [writeInstead(at, latin)],
    );
  }
  const fraction = fractions.get(sign);
  if (fraction !== undefined)
    return refusal('other-sign', `“${sign}” is not part of formulas: write ${fraction}.`, at, [
      writeInstead(at, endsValue(before) ? `*${fraction}` : fraction),
    ]);
  switch (sign) {
    case '°':
    case 'º':
    case '˚':
      return degree(input, before, after, at);
    case '′':
    case '″':
      return prime(source, before, at);
    case '√':
    case '∛':
      return root(input, i);
    case '±':
      return refusal(
        'tolerance-in-formula',
        '“±” belongs to values, not to formulas: write the tolerance in the value of the given.',
        at,
      );
    case '∞':
      return refusal('not-in-formulas', '“∞” is not part of formulas: write the formula of the limit case.', at);
    case '.':
      if (before?.kind === 'name' && after?.kind === 'name' && before.to === token.from && token.to === after.from) {
        const both: Place = [before.from, after.to];
        const instead = `${source.slice(before.from, before.to)}_${source.slice(after.from, after.to)}`;
        return refusal(
          'point-in-name',
          `“${excerpt(source.slice(...both))}”: a name holds no point; write ${instead} for a subscript.`,
          both,
          [writeInstead(both, instead)],
        );
      }
      return refusal('point-in-name', 'This point belongs to no number: write a digit beside it, or leave it out.', at);
    case '_':
      return refusal('not-a-name', 'A name begins with a letter, not with “_”: write a letter before it.', at);
    case '#':
      return refusal('not-in-formulas', '“#” is not part of formulas: a remark belongs in the title or in a note.', at);
    default:
  }
  if (/\p{L}/u.test(sign)) {
    return refusal(
      'unknown-letter',
      `The letter “${sign}” (${codeOf(sign)}) cannot stand in a name: names are written in Latin or Greek letters, digits and _.`,
      at,
    );
  }
  const shown = /\p{M}|[\ud800-\udfff]/u.test(sign) ? codeOf(sign) : `“${sign}”`;
  return refusal(
    'unknown-sign',
    `${shown} is not part of formulas: use + - * / ^, parentheses, names, numbers and quantities in quotation marks.`,
    at,
  );
}

function codeOf(sign: string): string {
  return `U+${(sign.codePointAt(0) as number).toString(16).toUpperCase().padStart(4, '0')}`;
}

function degree(input: Typed, before: Token | undefined, after: Token | undefined, at: Place): Problem {
  if (before?.kind !== 'number')
    return refusal(
      'degree-sign',
      '“°” belongs to values, not to formulas: give the angle the unit deg and use its name here.',
      at,
    );
  const scale = after?.kind === 'name' && after.from === at[1] && (after.text === 'C' || after.text === 'F') ? after.text : '';
  const both: Place = [before.from, scale === '' ? at[1] : (after as Token).to];
  const quoted = inQuotes(input, before.text, `deg${scale}`);
  return refusal(
    'degree-sign',
    `“${input.source.slice(...both)}”: a quantity inside a formula stands in quotation marks; write ${quoted}.`,
    both,
    [writeInstead(both, quoted)],
  );
}

function prime(source: string, before: Token | undefined, at: Place): Problem {
  if (before?.kind === 'name') {
    const both: Place = [before.from, at[1]];
    const instead = `${source.slice(before.from, before.to)}${before.text.includes('_') ? 'p' : '_p'}`;
    return refusal('prime', `“${source.slice(...both)}”: a name has no prime: give it a subscript, such as ${instead}.`, both, [
      writeInstead(both, instead),
    ]);
  }
  return refusal(
    'prime',
    `“${source.slice(...at)}” is not part of formulas: write a length in feet and inches or an angle in minutes as a quantity in quotation marks, such as "10 in".`,
    at,
  );
}

function root(input: Typed, i: number): Problem {
  const { source, tokens } = input;
  const token = tokens[i] as Token;
  const name = token.text === '√' ? 'sqrt' : 'cbrt';
  const next = tokens[i + 1];
  if (next?.kind === 'open') {
    const at: Place = [token.from, token.to];
    return refusal('other-sign', `“${token.text}” is not part of formulas: write ${name}(…).`, at, [
      writeInstead([token.from, next.from], endsValue(tokens[i - 1]) ? `*${name}` : name),
    ]);
  }
  const argument = next && (next.kind === 'name' || next.kind === 'number') ? source.slice(next.from, next.to) : undefined;
  const at: Place = [token.from, argument === undefined ? token.to : (next as Token).to];
  const instead = `${name}(${operand(argument ?? 'x')})`;
  return refusal(
    'other-sign',
    `“${source.slice(...at)}” is not part of formulas: write ${instead}.`,
    at,
    argument === undefined ? [] : [writeInstead(at, endsValue(tokens[i - 1]) ? `*${instead}` : instead)],
  );
}
