// Signs that are no signs of the formula language: each with what it was probably meant to be and what to write.
// Not here: words (strange-words.ts), missing values and brackets (refusals.ts).

import type { Problem } from '../quantity/index.ts';
import { excerpt, operand, refusal, writeInstead } from './refusal.ts';
import { endsValue, type Token } from './tokens.ts';

type Place = readonly [from: number, to: number];

/** Signs for which one other sign is meant. */
const other: ReadonlyMap<string, readonly [write: string, what: string]> = new Map([
  ['**', ['^', 'a power']], ['.^', ['^', 'a power']], ['.*', ['*', 'a product']], ['./', ['/', 'a quotient']], ['//', ['/', 'a quotient']],
  ['<>', ['!=', '“not equal”']], ['=<', ['<=', '“at most”']], ['=>', ['>=', '“at least”']],
  ['&&', [' and ', '“and”']], ['&', [' and ', '“and”']], ['||', [' or ', '“or”']],
]);

const without: ReadonlyMap<string, string> = new Map([
  ['<<', 'shifts of bits'], ['>>', 'shifts of bits'], ['>>>', 'shifts of bits'], ['^|', 'operations on bits'],
  ['??', 'replacements for missing values'], ['?.', 'members of objects'],
]);

export function strangeOperator(source: string, tokens: readonly Token[], i: number): Problem {
  const token = tokens[i] as Token;
  const at: Place = [token.from, token.to];
  const before = tokens[i - 1];
  const after = tokens[i + 1];
  const instead = other.get(token.text);
  if (instead) {
    const [write, what] = instead;
    return refusal('other-sign', `“${token.text}” is not part of formulas: for ${what} write ${write.trim()}.`, at, [writeInstead(at, write, `write ${write.trim()}`)]);
  }
  const missing = without.get(token.text);
  if (missing) return refusal('not-in-formulas', `“${token.text}” is not part of formulas, which have no ${missing}: leave it out.`, at);
  switch (token.text) {
    case '%':
      return percent(source, before, at);
    case '!':
      if (endsValue(before)) return refusal('not-in-formulas', '“!” is not part of formulas, which have no factorial: write the product, such as 1*2*3.', at);
      return refusal('other-sign', '“!” is not part of formulas: for “not” write not.', at, [writeInstead(at, 'not ', 'write not')]);
    case '=':
    case ':=':
      return assignment(source, tokens, i);
    case ';':
      return refusal('not-in-formulas', '“;” is not part of formulas: a formula is one expression, and the arguments of a function are separated by commas.', at);
    case '~':
      return refusal('not-in-formulas', '“~” is not part of formulas: write - for a change of sign or not for logic.', at);
    case '|':
      return bars(source, tokens, i);
    default:
      return brackets(source, tokens, i, after);
  }
}

function percent(source: string, before: Token | undefined, at: Place): Problem {
  if (before?.kind !== 'number') {
    return refusal('percent-in-formula', '“%” belongs to values, not to formulas: give the quantity the unit % and use its name here.', at);
  }
  const both: Place = [before.from, at[1]];
  const quoted = `"${before.text} %"`;
  return refusal('percent-in-formula', `“${source.slice(...both)}”: % belongs to values, not to formulas: write ${quoted} in quotation marks, or make it a given.`, both, [writeInstead(both, quoted)]);
}

function assignment(source: string, tokens: readonly Token[], i: number): Problem {
  const token = tokens[i] as Token;
  const at: Place = [token.from, token.to];
  const compare = writeInstead(at, '==', 'write == to compare');
  const next = tokens[i + 1];
  if (i === 1 && tokens[0]?.kind === 'name' && next) {
    const name = source.slice(tokens[0].from, tokens[0].to);
    const right = source.slice(next.from).trim();
    return refusal('equals-sign', `“${excerpt(`${name} ${token.text} ${right}`)}”: a formula is the right-hand side alone, the name belongs to the line: write ${excerpt(right)}, or == to compare.`, at, [
      { from: 0, to: next.from, text: '', label: `write ${excerpt(right)}` },
      compare,
    ]);
  }
  return refusal('equals-sign', `“${token.text}” is not part of a formula, which is the right-hand side alone: write == to compare.`, at, [compare]);
}

function bars(source: string, tokens: readonly Token[], i: number): Problem {
  const token = tokens[i] as Token;
  const close = tokens.findIndex((t, j) => j > i && t.kind === 'operator' && t.text === '|');
  if (close > i + 1 && !endsValue(tokens[i - 1])) {
    const both: Place = [token.from, (tokens[close] as Token).to];
    const inner = source.slice(token.to, (tokens[close] as Token).from).trim();
    return refusal('other-sign', `“${excerpt(source.slice(...both))}”: bars are not part of formulas: for the absolute value write ${excerpt(`abs(${inner})`)}.`, both, [writeInstead(both, `abs(${inner})`)]);
  }
  return refusal('other-sign', '“|” is not part of formulas: write abs(x) for the absolute value, or the word or between conditions.', [token.from, token.to]);
}

/** Square brackets and braces: as parentheses, which is what they mean on paper. */
function brackets(source: string, tokens: readonly Token[], i: number, after: Token | undefined): Problem {
  const token = tokens[i] as Token;
  const at: Place = [token.from, token.to];
  const pair = token.text === '[' ? ']' : token.text === '{' ? '}' : '';
  if (pair === '') return refusal('parenthesis-not-opened', `This “${token.text}” closes nothing: formulas have parentheses only.`, at);
  let depth = 0;
  const close = tokens.findIndex((t, j) => {
    if (j < i) return false;
    if (t.kind === 'open' && t.text === token.text) depth++;
    if (t.kind === 'close' && t.text === pair) depth--;
    return depth === 0;
  });
  if (close < 0 || !after || tokens.slice(i, close).some((t) => t.kind === 'comma') || tokens[i - 1]?.kind === 'name') {
    return refusal('not-in-formulas', `“${token.text}” is not part of formulas, which have no lists and no indices: write parentheses, and names such as F_1 for numbered quantities.`, at);
  }
  const both: Place = [token.from, (tokens[close] as Token).to];
  const inner = source.slice(token.to, (tokens[close] as Token).from);
  return refusal('other-sign', `“${excerpt(source.slice(...both))}”: formulas have parentheses only: write ${excerpt(`(${inner})`)}.`, both, [writeInstead(both, `(${inner})`)]);
}

const lookAlikes = new Map([...'АВЕКМНОРСТХаеорсухіј'].map((c, i) => [c, 'ABEKMHOPCTXaeopcyxij'[i] as string]));
const fractions: ReadonlyMap<string, string> = new Map([['½', '(1/2)'], ['¼', '(1/4)'], ['¾', '(3/4)'], ['⅓', '(1/3)'], ['⅔', '(2/3)'], ['⅛', '(1/8)']]);
const invisible = /[\u0000-\u001f\u007f-\u009f\u00ad\u061c\u180e\u200b-\u200f\u202a-\u202e\u2060-\u206f\ufe00-\ufe0f\ufeff]/;

export function strangeSign(source: string, tokens: readonly Token[], i: number): Problem {
  const token = tokens[i] as Token;
  const sign = token.text;
  const at: Place = [token.from, token.to];
  const before = tokens[i - 1];
  const after = tokens[i + 1];
  if (/^["“”„‟«»'‘’‚‛]/.test(sign)) {
    if (endsValue(before) && /^['‘’‚‛]/.test(sign) && sign.length === 1) return prime(source, before as Token, at);
    return refusal('quote-not-closed', `The quotation mark at ${excerpt(sign, 20)} is not closed: write " after the quantity.`, at, [writeInstead([source.length, source.length], '"', 'close it at the end')]);
  }
  if (invisible.test(sign)) {
    return refusal('invisible-character', `An invisible character (${codeOf(sign)}) stands here: delete it.`, at, [writeInstead(at, '', 'delete it')]);
  }
  const latin = lookAlikes.get(sign);
  if (latin !== undefined) {
    return refusal('look-alike-letter', `“${sign}” (${codeOf(sign)}) is a Cyrillic letter that looks like ${latin}: type the Latin ${latin}.`, at, [writeInstead(at, latin)]);
  }
  const fraction = fractions.get(sign);
  if (fraction !== undefined) return refusal('other-sign', `“${sign}” is not part of formulas: write ${fraction}.`, at, [writeInstead(at, endsValue(before) ? `*${fraction}` : fraction)]);
  switch (sign) {
    case '°':
    case 'º':
    case '˚':
      return degree(source, before, after, at);
    case '′':
    case '″':
      return prime(source, before, at);
    case '√':
    case '∛':
      return root(source, tokens, i);
    case '±':
      return refusal('tolerance-in-formula', '“±” belongs to values, not to formulas: write the tolerance in the value of the given.', at);
    case '∞':
      return refusal('not-in-formulas', '“∞” is not part of formulas: write the formula of the limit case.', at);
    case '.':
      if (before && after && before.to === token.from && token.to === after.from) {
        const both: Place = [before.from, after.to];
        const instead = `${source.slice(before.from, before.to)}_${source.slice(after.from, after.to)}`;
        return refusal('point-in-name', `“${excerpt(source.slice(...both))}”: a name holds no point: write ${instead} for a subscript.`, both, [writeInstead(both, instead)]);
      }
      return refusal('point-in-name', 'This point belongs to no number: write a digit beside it, or leave it out.', at);
    case '_':
      return refusal('not-a-name', 'A name begins with a letter, not with “_”: write a letter before it.', at);
    case '#':
      return refusal('not-in-formulas', '“#” is not part of formulas: a remark belongs in the title or in a note.', at);
    default:
  }
  if (/\p{L}/u.test(sign)) {
    return refusal('unknown-letter', `The letter “${sign}” (${codeOf(sign)}) cannot stand in a name: names are written in Latin or Greek letters, digits and _.`, at);
  }
  const shown = /\p{M}|[\ud800-\udfff]/u.test(sign) ? codeOf(sign) : `“${sign}”`;
  return refusal('unknown-sign', `${shown} is not part of formulas: use + - * / ^, parentheses, names, numbers and quantities in quotation marks.`, at);
}

function codeOf(sign: string): string {
  return `U+${(sign.codePointAt(0) as number).toString(16).toUpperCase().padStart(4, '0')}`;
}

function degree(source: string, before: Token | undefined, after: Token | undefined, at: Place): Problem {
  if (before?.kind !== 'number') return refusal('degree-sign', '“°” belongs to values, not to formulas: give the angle the unit deg and use its name here.', at);
  const scale = after?.kind === 'name' && after.from === at[1] && (after.text === 'C' || after.text === 'F') ? after.text : '';
  const both: Place = [before.from, scale === '' ? at[1] : (after as Token).to];
  const quoted = `"${before.text} ${scale === '' ? 'deg' : `deg${scale}`}"`;
  return refusal('degree-sign', `“${source.slice(...both)}”: a quantity inside a formula stands in quotation marks: write ${quoted}.`, both, [writeInstead(both, quoted)]);
}

function prime(source: string, before: Token | undefined, at: Place): Problem {
  if (before?.kind === 'name') {
    const both: Place = [before.from, at[1]];
    const instead = `${source.slice(before.from, before.to)}${before.text.includes('_') ? 'p' : '_p'}`;
    return refusal('prime', `“${source.slice(...both)}”: a name has no prime: give it a subscript, such as ${instead}.`, both, [writeInstead(both, instead)]);
  }
  return refusal('prime', `“${source.slice(...at)}” is not part of formulas: write a length in feet and inches or an angle in minutes as a quantity in quotation marks, such as "10 in".`, at);
}

function root(source: string, tokens: readonly Token[], i: number): Problem {
  const token = tokens[i] as Token;
  const name = token.text === '√' ? 'sqrt' : 'cbrt';
  const next = tokens[i + 1];
  if (next?.kind === 'open') {
    const at: Place = [token.from, token.to];
    return refusal('other-sign', `“${token.text}” is not part of formulas: write ${name}(…).`, at, [writeInstead([token.from, next.from], endsValue(tokens[i - 1]) ? `*${name}` : name)]);
  }
  const argument = next && (next.kind === 'name' || next.kind === 'number') ? source.slice(next.from, next.to) : undefined;
  const at: Place = [token.from, argument === undefined ? token.to : (next as Token).to];
  const instead = `${name}(${operand(argument ?? 'x')})`;
  return refusal('other-sign', `“${source.slice(...at)}” is not part of formulas: write ${instead}.`, at, argument === undefined ? [] : [writeInstead(at, endsValue(tokens[i - 1]) ? `*${instead}` : instead)]);
}
