// How many digits each printed number of a case needs, so that every step can be followed with the printed numbers alone.
//
// 1. An item is a printed number whose digits may grow: a derived quantity, an angle given in degrees where it prints in
//    rad, a side of a criterion. All items start at the digits of the sheet and never exceed the cap.
// 2. From the last step backwards, the items that an open step prints are raised by one digit until it closes; that may
//    open other steps, the item's own among them, so passes repeat until nothing changes.
// 3. Not raised is what could not help: an item that is exact at its digits, and one whose rounding moves the line by less
//    than a tenth of the last digit while that of others moves it by more.
// 4. A step that stays open at the cap is given up with its reason, and what was raised for it alone goes back. Where a step
//    would close with its result at the digits of the sheet, the one that asked more of that result is given up instead.
// Not here: what a number or a step is (numerals.ts, lines.ts). This file knows counters and verdicts only.

/** Why a step cannot be made to close. */
export type OpenReason = 'cancellation' | 'jump';

/** 'jump': a step of floor, ceil, round, a comparison, a branch or a table row goes another way with the printed numbers. */
export type Verdict = 'closed' | OpenReason;

export interface ClosingItem {
  /** True when its numeral at this many digits is its full value. */
  readonly exactAt: (digits: number) => boolean;
}

export interface ClosingStep {
  /** The items that its line prints, each once. */
  readonly operands: readonly number[];
  /** The item that its result prints as; -1 when the result is no item. */
  readonly result: number;
  /** Judges the line with the digits (indexed by item) as they stand. */
  readonly judge: (digits: ArrayLike<number>) => Verdict;
  /** The line's value in units of the last digit of its result; missing where the step is about more than one number. */
  readonly scaled?: (digits: ArrayLike<number>) => number;
}

export interface Closing {
  /** Digits of each item. */
  readonly digits: Uint8Array;
  /** The steps that stay open, by index. */
  readonly open: ReadonlyMap<number, OpenReason>;
}

/** Most significant digits that a number is printed with: every decimal of 15 digits survives the way through a double. */
export const mostDigits = 15;

/** As good as the true value: a numeral of this many digits reads back as the same double. */
const allDigits = 17;
const negligible = 0.1;

/** A sheet made to begin anew without end keeps, from here on, some digits that nobody needs. */
const mostRestarts = 100;

/**
 * Finds the digits of all items. `steps` stand in an order in which every step comes after those whose results it prints
 * (the order of the sheet, where nothing is used above its definition).
 */
export function closeSteps(
  items: readonly ClosingItem[],
  steps: readonly ClosingStep[],
  start: number,
  cap = mostDigits,
): Closing {
  const first = Math.min(start, cap);
  const digits = new Uint8Array(items.length).fill(first);
  const open = new Map<number, OpenReason>();
  const dirty = new Uint8Array(steps.length).fill(1);
  const raisedFor = new Uint8Array(steps.length);
  const touching = stepsByItem(items.length, steps);

  let restarts = 0;
  for (let changed = true; changed; ) {
    changed = false;
    for (let i = steps.length - 1; i >= 0; i--) {
      const step = steps[i];
      if (step === undefined || dirty[i] === 0 || open.has(i)) continue;
      dirty[i] = 0;
      let verdict = step.judge(digits);
      if (verdict === 'closed') continue;
      const before = step.operands.map((item) => digits[item] ?? first);
      while (verdict !== 'closed' && raise(step, items, digits, cap)) verdict = step.judge(digits);
      if (verdict === 'closed') {
        raisedFor[i] = 1;
        changed = true;
        step.operands.forEach((item, k) => {
          if (digits[item] === before[k]) return;
          for (const other of touching[item] ?? []) if (other !== i) dirty[other] = 1;
        });
        continue;
      }
      step.operands.forEach((item, k) => {
        digits[item] = before[k] ?? first;
      });
      const asker = restarts < mostRestarts ? askerOf(i) : -1;
      open.set(asker < 0 ? i : asker, verdict);
      // Nobody has seen digits of a step that never closed: they are back already. Otherwise all begins anew without it.
      if ((asker < 0 && raisedFor[i] === 0) || restarts >= mostRestarts) continue;
      restarts += 1;
      digits.fill(first);
      dirty.fill(1);
      raisedFor.fill(0);
      changed = true;
      break;
    }
  }
  return { digits, open };

  /** The step for which the result of step i has more digits than i can serve; -1 where i fails by itself. */
  function askerOf(i: number): number {
    const step = steps[i];
    const now = step === undefined ? first : (digits[step.result] ?? first);
    if (step === undefined || now <= first) return -1;
    const before = step.operands.map((item) => digits[item] ?? first);
    digits[step.result] = first;
    let verdict = step.judge(digits);
    while (verdict !== 'closed' && raise(step, items, digits, cap)) verdict = step.judge(digits);
    step.operands.forEach((item, k) => {
      digits[item] = before[k] ?? first;
    });
    digits[step.result] = now - 1;
    const askers = (touching[step.result] ?? []).filter(
      (k) => k !== i && raisedFor[k] === 1 && steps[k]?.judge(digits) !== 'closed',
    );
    digits[step.result] = now;
    return verdict === 'closed' ? (askers.at(-1) ?? -1) : -1;
  }
}

function raise(step: ClosingStep, items: readonly ClosingItem[], digits: Uint8Array, cap: number): boolean {
  const able = step.operands.filter((item) => (digits[item] ?? cap) < cap && items[item]?.exactAt(digits[item] ?? cap) !== true);
  const chosen = able.length > 1 ? telling(step, able, digits) : able;
  for (const item of chosen) digits[item] = (digits[item] ?? 0) + 1;
  return chosen.length > 0;
}

/** Those whose rounding can be seen in the result; all where none stands out. */
function telling(step: ClosingStep, able: readonly number[], digits: Uint8Array): readonly number[] {
  const { scaled } = step;
  if (scaled === undefined) return able;
  const here = scaled(digits);
  const seen = able.filter((item) => {
    const now = digits[item] ?? 0;
    digits[item] = allDigits;
    const moved = Math.abs(scaled(digits) - here);
    digits[item] = now;
    return !(moved < negligible);
  });
  return seen.length > 0 ? seen : able;
}

function stepsByItem(count: number, steps: readonly ClosingStep[]): readonly (readonly number[])[] {
  const touching: number[][] = Array.from({ length: count }, () => []);
  steps.forEach((step, i) => {
    for (const item of step.operands) touching[item]?.push(i);
    if (step.result >= 0) touching[step.result]?.push(i);
  });
  return touching;
}
