// What one record of a sheet leaves for the next: parts whose reasons stayed the same are taken over instead of made again.
//
// 1. A part is kept with everything it was made from; it is taken over only where all of that is the same object or number again. So a
//    record made with a memory equals one made without.
// 2. What the last record did not use is forgotten: a memory never holds more than one sheet.
// Not here: the parts (case-print.ts, make.ts).

import type { Calculation, Sheet } from '../sheet/index.ts';
import type { CasePrint } from './case-print.ts';
import type { ClosingStep, Verdict } from './closing.ts';
import type { CriterionNumbers, PrintedVerdict } from './criterion-numbers.ts';
import type { Line } from './line.ts';
import type { Line as RecordLine } from './model.ts';
import type { Printed, PrintedNumber } from './numerals.ts';

/** A part and what it was made from. */
interface Part<V, R> {
  readonly reasons: R;
  readonly value: V;
}

export class Kept<V, R = readonly unknown[]> {
  #last = new Map<unknown, Part<V, R>>();
  #next = new Map<unknown, Part<V, R>>();

  /** What the record before the last one left is forgotten. */
  turn(): void {
    this.#last = this.#next;
    this.#next = new Map();
  }

  /** The part of this key, made anew where what it was made from does not hold any more. */
  take(key: unknown, holds: (reasons: R) => boolean, make: () => Part<V, R>): V {
    const now = this.#next.get(key);
    if (now !== undefined && holds(now.reasons)) return now.value;
    const last = this.#last.get(key);
    const part = last !== undefined && holds(last.reasons) ? last : make();
    this.#next.set(key, part);
    return part.value;
  }

  /** The part of before whatever has become of its reasons, which are looked at again next time; undefined where there is none. */
  leave(key: unknown): V | undefined {
    const part = this.#next.get(key) ?? this.#last.get(key);
    if (part !== undefined) this.#next.set(key, part);
    return part?.value;
  }
}

/** The part of this key, made anew where one of its reasons is another than last time. */
export function takeOver<V>(kept: Kept<V>, key: unknown, reasons: readonly unknown[], make: () => V): V {
  return kept.take(
    key,
    (before) => same(before, reasons),
    () => ({ reasons, value: make() }),
  );
}

export function same(one: readonly unknown[], other: readonly unknown[]): boolean {
  if (one.length !== other.length) return false;
  for (let k = 0; k < one.length; k += 1) if (!Object.is(one[k], other[k])) return false;
  return true;
}

/** What a line was found to come to, by the digits of the numbers in it. */
export interface Judged {
  readonly verdicts: Map<string, Verdict>;
  readonly scaled: Map<string, number>;
}

export interface CaseMemory {
  readonly lines: Kept<Line | undefined>;
  readonly numbers: Kept<PrintedNumber | undefined>;
  readonly radians: Kept<PrintedNumber>;
  readonly criteria: Kept<CriterionNumbers>;
  readonly verdicts: Kept<PrintedVerdict>;
  readonly judged: Kept<Judged>;
}

export interface Memory {
  readonly cases: readonly CaseMemory[];
  readonly lines: Kept<RecordLine, LineReasons>;
  /** The printed numbers, and the sheet that they are those of. */
  prints: { readonly of: Sheet; readonly cases: readonly CasePrint[] } | undefined;
}

const newCase = (): CaseMemory => ({
  lines: new Kept(),
  numbers: new Kept(),
  radians: new Kept(),
  criteria: new Kept(),
  verdicts: new Kept(),
  judged: new Kept(),
});

/** Memory for the records of one calculation after the other; what every part depends on clears it. */
export function newMemory(): (calculation: Calculation) => Memory {
  let memory: Memory | undefined;
  let grounds: readonly unknown[] = [];
  return (calculation) => {
    const { sheet, style, digits, cases } = calculation;
    const now = [
      calculation,
      style.decimalSign,
      digits,
      cases.length,
      sheet.cases,
      sheet.references,
      sheet.carriedFrom,
      sheet.template,
    ];
    if (memory === undefined || !same(grounds, now)) memory = { cases: cases.map(newCase), lines: new Kept(), prints: undefined };
    grounds = now;
    memory.lines.turn();
    if (memory.prints?.of === sheet) return memory;
    memory.prints = undefined;
    for (const each of memory.cases) for (const kept of Object.values(each) as { turn(): void }[]) kept.turn();
    return memory;
  };
}

/** `step` with its verdicts remembered; `looks` are the items whose digits it may look at. */
export function remembered(step: ClosingStep, looks: readonly number[], { verdicts, scaled }: Judged): ClosingStep {
  const keyOf = (digits: ArrayLike<number>): string => {
    let key = '';
    for (const item of looks) key += String.fromCharCode(digits[item] ?? 0);
    return key;
  };
  const kept = <V>(known: Map<string, V>, find: (digits: ArrayLike<number>) => V) => {
    return (digits: ArrayLike<number>): V => {
      const key = keyOf(digits);
      const value = known.get(key) ?? find(digits);
      known.set(key, value);
      return value;
    };
  };
  return {
    ...step,
    judge: kept(verdicts, step.judge),
    ...(step.scaled === undefined ? {} : { scaled: kept(scaled, step.scaled) }),
  };
}

/** What a line of the record asked of the printed numbers of a case, and the answer. */
export interface Heard {
  readonly index: number;
  readonly name: string;
  readonly inExponent: boolean;
  readonly answer: Printed | undefined;
}

export interface LineReasons {
  readonly reasons: readonly unknown[];
  readonly heard: readonly Heard[];
}
