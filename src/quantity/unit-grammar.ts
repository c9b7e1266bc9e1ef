// The grammar of unit texts.
//
//   unit     = product [ "/" factor ]          a second "/", and a product after "/", want parentheses
//   product  = factor { ( "·" | "*" | space ) factor }
//   factor   = "1" | ( symbol | "(" unit ")" ) [ exponent ]
//   exponent = "²" | "^2" | "^-2" | "^(1/2)"; right after a symbol also "2" and "-2"
//
// 1. Nothing is guessed: what can be read in two ways is refused with both of them (SI Brochure 9th ed., 5.2).
// 2. Nesting, exponents and length (unit-text.ts) are limited: every text ends quickly.
// Not here: which symbols there are (catalogue.ts), what is proposed for an unknown one (unit-nearest.ts).

import { symbolOfText } from './catalogue.ts';
import type { Failure, Result } from './problem.ts';
import { done, fail, quote } from './problem.ts';
import type { Rational } from './rational.ts';
import { addR, isZeroR, mulR, oneR, rational } from './rational.ts';
import type { Factor } from './unit.ts';
import { textOfFactors } from './unit.ts';
import { unknownSymbol } from './unit-nearest.ts';
import type { Token } from './unit-tokens.ts';
import { unitTokens } from './unit-tokens.ts';

const deepest = 8;
const greatestExponent = 12;
const greatestRoot = 6;

/** What stands above and below the solidus. */
export interface Quotient {
  readonly above: readonly Factor[];
  readonly below: readonly Factor[];
}

const empty: Quotient = { above: [], below: [] };
const times = (a: Quotient, b: Quotient): Quotient => ({ above: [...a.above, ...b.above], below: [...a.below, ...b.below] });
const inverse = (a: Quotient): Quotient => ({ above: a.below, below: a.above });

function raise(a: Quotient, exponent: Rational): Quotient {
  if (exponent.n < 0) return raise(inverse(a), rational(-exponent.n, exponent.d));
  const each = (factors: readonly Factor[]) =>
    factors.map((factor) => ({ ...factor, exponent: mulR(factor.exponent, exponent) }));
  return { above: each(a.above), below: each(a.below) };
}

/** The words that stand for a quotient of symbols. */
const composites: ReadonlyMap<string, readonly [string, string]> = new Map([['rpm', ['r', 'min']]]);

const factorOf = (symbol: string): Factor[] => {
  const found = symbolOfText(symbol);
  return found ? [{ symbol: found, exponent: oneR }] : [];
};

export function readQuotient(text: string): Result<Quotient> {
  const tokens = unitTokens(text);
  let next = 0;
  let failure: Failure | undefined;
  const peek = (): Token => tokens[Math.min(next, tokens.length - 1)] as Token;
  const take = (): Token => {
    const token = peek();
    next++;
    return token;
  };
  /** Keeps the first failure; every caller gives up on undefined. */
  const give = (problem: Failure): undefined => {
    failure ??= problem;
    return undefined;
  };

  function unit(depth: number): Quotient | undefined {
    const from = peek().from;
    let whole = factor(depth);
    if (!whole) return undefined;
    let divided = false;
    let left = empty;
    let divisor = empty;
    for (;;) {
      const { kind } = peek();
      if (kind !== 'times' && kind !== 'over') return attachedSign() ?? whole;
      if (divided) return ambiguous(from, left, divisor, depth);
      take();
      const other = factor(depth);
      if (!other) return undefined;
      divided = kind === 'over';
      if (divided) [left, divisor] = [whole, other];
      whole = times(whole, divided ? inverse(other) : other);
    }
  }

  /** Two factors with nothing between them, or a sign that is none of ours. */
  function attachedSign(): undefined {
    const token = peek();
    if (token.kind === 'end' || token.kind === 'close') return undefined;
    return give(misplaced(token, text));
  }

  function factor(depth: number): Quotient | undefined {
    const token = take();
    if (token.kind === 'number') return wholeOne(token);
    if (token.kind === 'open') return group(token, depth);
    if (token.kind !== 'symbol') return give(misplaced(token, text));
    const pair = composites.get(token.text);
    if (pair) return powered({ above: factorOf(pair[0]), below: factorOf(pair[1]) });
    const symbol = symbolOfText(token.text.replace(/^(?:deg|°)\s+/, '°'));
    if (!symbol) return give(unknownSymbol(token.text, token.from, token.to, text));
    return powered({ above: [{ symbol, exponent: oneR }], below: [] });
  }

  function wholeOne(token: Token): Quotient | undefined {
    const { kind } = peek();
    const alone = next === 1 || tokens[next - 2]?.kind === 'open';
    if (token.text === '1' && alone && (kind === 'over' || kind === 'end' || kind === 'close')) return empty;
    const hint = tokens[next - 2]?.kind === 'over' && tokens[next - 3]?.kind === 'exponent' ? ' (the root of m is m^(1/2))' : '';
    const message = `${quote(token.text)} stands inside the unit ${quote(text)}, and a unit holds no number but 1: write the number before the unit${hint}.`;
    return give(fail('unit-number', message, token.from, token.to));
  }

  function group(open: Token, depth: number): Quotient | undefined {
    if (depth >= deepest)
      return give(fail('unit-parentheses', `Parentheses in a unit nest to ${deepest} levels at most.`, open.from, open.to));
    const inner = unit(depth + 1);
    if (!inner || failure) return undefined;
    if (take().kind !== 'close')
      return give(fail('unit-parentheses', `A parenthesis is not closed in the unit ${quote(text)}.`, open.from, open.to));
    return powered(inner);
  }

  function powered(base: Quotient): Quotient | undefined {
    const token = peek();
    if (token.kind !== 'exponent') return base;
    take();
    const { exponent } = token;
    if (!exponent || isZeroR(exponent)) {
      const message = `${quote(token.text)} is no exponent of a unit: write one such as ^2, ^-1 or ^(1/2).`;
      return give(fail('unit-exponent', message, token.from, token.to));
    }
    // A negative exponent of one symbol stays as typed: s⁻¹ is not rewritten as 1/s.
    const single = base.above.length === 1 && base.below.length === 0;
    const result = single
      ? { above: base.above.map((each) => ({ ...each, exponent: mulR(each.exponent, exponent) })), below: [] }
      : raise(base, exponent);
    const excess = [...result.above, ...result.below].some(
      (each) => Math.abs(each.exponent.n) > greatestExponent || each.exponent.d > greatestRoot,
    );
    if (!excess) return result;
    return give(
      fail('unit-exponent', `Exponents of units go to ${greatestExponent} and to sixth roots at most.`, token.from, token.to),
    );
  }

  /** a/b·c and a/b/c: both readings, where the rest is as simple as that. */
  function ambiguous(from: number, left: Quotient, divisor: Quotient, depth: number): undefined {
    let rest = empty;
    let solidi = 1;
    while (peek().kind === 'times' || peek().kind === 'over') {
      if (take().kind === 'over') solidi++;
      const other = factor(depth);
      if (!other) return undefined;
      rest = times(rest, other);
    }
    const to = peek().from;
    const what = solidi > 1 ? 'more than one solidus' : 'a product after the solidus';
    const readings = [times(left, inverse(times(divisor, rest))), times(times(left, rest), inverse(divisor))].map(merged);
    const simple = solidi === 1 || (solidi === 2 && rest.above.length === 1 && rest.below.length === 0);
    const advice = simple ? `write ${readings.join(' or ')}` : 'set parentheses';
    const typed = text.slice(from, to).trim();
    return give(
      fail(
        'ambiguous-unit',
        `The unit ${quote(typed)} has ${what} and can be read in two ways: ${advice}.`,
        from,
        from + typed.length,
        simple ? readings : [],
      ),
    );
  }

  const whole = unit(0);
  if (failure) return failure;
  const rest = peek();
  if (!whole || rest.kind !== 'end') return misplaced(rest, text);
  return done(whole);
}

/** Text of a reading that is proposed: equal symbols joined, "m/s²" rather than "m/(s·s)". */
function merged({ above, below }: Quotient): string {
  const exponents = new Map<string, Factor>();
  const add = (factor: Factor, sign: number) => {
    const known = exponents.get(factor.symbol.text);
    const own = mulR(factor.exponent, rational(sign));
    exponents.set(factor.symbol.text, { symbol: factor.symbol, exponent: known ? addR(known.exponent, own) : own });
  };
  for (const each of above) add(each, 1);
  for (const each of below) add(each, -1);
  const all = [...exponents.values()];
  const up = all.filter(({ exponent }) => exponent.n > 0);
  const down = all.filter(({ exponent }) => exponent.n < 0);
  return textOfFactors(
    up,
    down.map((each) => ({ ...each, exponent: mulR(each.exponent, rational(-1)) })),
  );
}

const productSigns = new Set(['.', '×', '-', '−', '–', '‐', '•', 'x', ',']);

/** A token where none of its kind can stand. */
function misplaced(token: Token, text: string): Failure {
  const { from, to, kind } = token;
  const unit = quote(text);
  if (kind === 'end') return fail('unit-form', `The unit ${unit} ends too early: a unit must follow its last sign.`, from, to);
  if (kind === 'close')
    return fail('unit-parentheses', `A parenthesis is closed that was not opened in the unit ${unit}.`, from, to);
  if (token.text === "'" || token.text === '’') {
    return fail('ambiguous-unit', 'The sign ′ can stand for feet or for minutes of angle: write ft or arcmin.', from, to, [
      'ft',
      'arcmin',
    ]);
  }
  if (token.text === '"' || token.text === '”') {
    return fail('ambiguous-unit', 'The sign ″ can stand for inches or for seconds of angle: write in or arcsec.', from, to, [
      'in',
      'arcsec',
    ]);
  }
  const hyphen = /^(\p{L}+)[-−–‐](\p{L}+)$/u.exec(text.trim());
  if (hyphen && kind === 'other') {
    // ft-lb in a torque means the pound-force; lb alone is the mass.
    const [left = '', right = ''] = hyphen.slice(1).map((each) => (each === 'lb' || each === 'lbs' ? 'lbf' : each));
    const fix = `${left}·${right}`;
    return fail(
      'unit-sign',
      `${quote(token.text)} does not multiply units: write ${fix}.`,
      text.indexOf(hyphen[0]),
      text.indexOf(hyphen[0]) + hyphen[0].length,
      [fix],
    );
  }
  if (kind === 'other' && productSigns.has(token.text) && from > 0) {
    return fail('unit-sign', `${quote(token.text)} does not multiply units in ${unit}: write · or a space.`, from, to, ['·']);
  }
  if (kind === 'times' && text[from - 1] === '*') {
    return fail('unit-sign', `A power is written with ^ or a raised digit in ${unit}: write m^2 or m².`, from - 1, to, ['^']);
  }
  const remark = kind === 'open' && token.attached ? /^\([\p{L}.]{1,6}\)$/u.exec(text.slice(from).trim()) : null;
  if (remark) {
    const message = `${quote(remark[0])} is added to the unit in ${unit}: what it tells belongs to the name of the quantity. Write ${text.slice(0, from).trim()}.`;
    return fail('unit-annotation', message, from, text.length, ['']);
  }
  if (token.attached && (kind === 'open' || kind === 'symbol')) {
    const fix = `·${token.text}`;
    return fail(
      'unit-sign',
      `Something is missing before ${quote(token.text)} in the unit ${unit}: write a product as N·m, a quotient as W/(m²·K).`,
      from,
      to,
      [fix],
    );
  }
  return fail(
    'unit-sign',
    `${quote(token.text)} cannot stand there in the unit ${unit}: write units such as N·m, N/mm² or W/(m²·K).`,
    from,
    to,
  );
}
