// A record checked from outside: calculator lines evaluated by a program that is not ours, printed numbers against true ones.
//
// 1. The evaluator is the full mathjs library, given the line as text; only `ln` is told to it (its own name is log).
// 2. Printed texts are read here by a reader of their own, not by the one of the product.

import { all, create } from 'mathjs';
import type { Step, StepCase } from '../../src/record/index.ts';

const math = create(all ?? {});
const scope = new Map<string, unknown>([['ln', (x: number) => Math.log(x)]]);

export function evaluateOutside(line: string): number {
  return Number(math.evaluate(line, scope as never));
}

export interface Read {
  readonly value: number;
  /** Weight of the last digit. */
  readonly unit: number;
}

/** '1 526', '−0.3012', '1.376 × 10⁴', '1.376e+4', with or without a unit behind. */
export function readNumeral(text: string): Read {
  const superscripts = '⁰¹²³⁴⁵⁶⁷⁸⁹';
  const plain = text.replaceAll('\u202f', '').replaceAll('\u2212', '-');
  const match = /^(-?)(\d+)(?:\.(\d+))?(?:(?:\u00a0|\s)?×(?:\u00a0|\s)?10([⁻⁰¹²³⁴⁵⁶⁷⁸⁹]+)|e([+-]?\d+))?/u.exec(plain);
  if (!match) throw new Error(`no numeral at the start of “${text}”`);
  const [, sign, whole, decimals = '', raised, typed] = match;
  const exponent =
    raised === undefined
      ? Number(typed ?? 0)
      : Number([...raised].map((c) => (c === '⁻' ? '-' : superscripts.indexOf(c))).join(''));
  return { value: Number(`${sign}${whole}.${decimals || '0'}e${exponent}`), unit: 10 ** (exponent - decimals.length) };
}

/** Half a unit of the last digit, and what a double at this size can't tell apart. */
function isRounded(value: number, printed: Read): boolean {
  return Math.abs(value - printed.value) <= printed.unit / 2 + 4 * Number.EPSILON * Math.abs(value);
}

/** What is wrong with one step in one case; '' where nothing is. `si` and `shown` are the true value in SI and in the unit of the step. */
export function fault(step: Step, one: StepCase, si: number, shown: number): string {
  const where = `${step.number} ${step.name ?? step.cell} in ${one.case}`;
  if (one.calculatorLine === null || one.calculatorResult === null || one.result === null)
    return `${where}: no calculator line or result`;
  if (!one.closes)
    return `${where}: does not close (${one.reason ?? 'no reason'}): ${one.calculatorLine} -> ${one.calculatorResult}`;
  const wanted = readNumeral(one.calculatorResult);
  const found = evaluateOutside(one.calculatorLine);
  if (!(Math.abs(found - wanted.value) <= wanted.unit * (1 + 1e-9))) {
    return `${where}: ${one.calculatorLine} = ${found}, not ${one.calculatorResult}`;
  }
  if (!isRounded(si, wanted)) return `${where}: ${one.calculatorResult} is not ${si} rounded`;
  return isRounded(shown, readNumeral(one.result)) ? '' : `${where}: ${one.result} is not ${shown} rounded`;
}
