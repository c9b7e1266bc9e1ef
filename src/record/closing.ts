// How many digits each printed number of a case needs, so that every step can be followed with the printed numbers alone.
//
// 1. An item is a printed number whose digits may grow: a derived quantity, an angle given in degrees where it prints in
//    rad, a side of a criterion. All items start at the digits of the sheet and never exceed the cap.
// 2. From the last step backwards, all items that an open step prints are raised by one digit until it closes; that may
//    open other steps, the item's own among them, so passes repeat until nothing changes.
// 3. A step that stays open at the cap is given up with its reason, and what was raised for it alone goes back.
// 4. An item that is exact at its digits is not raised: more digits would only be zeros.
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
}

export interface Closing {
  /** Digits of each item. */
  readonly digits: Uint8Array;
  /** The steps that stay open, by index. */
  readonly open: ReadonlyMap<number, OpenReason>;
}

/** Most significant digits that a number is printed with: every decimal of 15 digits survives the way through a double. */
export const mostDigits = 15;

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
      while (verdict !== 'closed' && raise(step.operands, items, digits, cap)) verdict = step.judge(digits);
      if (verdict === 'closed') {
        raisedFor[i] = 1;
        changed = true;
        step.operands.forEach((item, k) => {
          if (digits[item] === before[k]) return;
          for (const other of touching[item] ?? []) if (other !== i) dirty[other] = 1;
        });
        continue;
      }
      open.set(i, verdict);
      if (raisedFor[i] === 0 || restarts >= mostRestarts) {
        // Nobody has seen these digits yet: taking them back is the same as never having tried.
        step.operands.forEach((item, k) => {
          digits[item] = before[k] ?? first;
        });
      } else {
        restarts += 1;
        digits.fill(first);
        dirty.fill(1);
        raisedFor.fill(0);
        changed = true;
        break;
      }
    }
  }
  return { digits, open };
}

function raise(operands: readonly number[], items: readonly ClosingItem[], digits: Uint8Array, cap: number): boolean {
  let raised = false;
  for (const item of operands) {
    const now = digits[item] ?? cap;
    if (now >= cap || items[item]?.exactAt(now) === true) continue;
    digits[item] = now + 1;
    raised = true;
  }
  return raised;
}

function stepsByItem(count: number, steps: readonly ClosingStep[]): readonly (readonly number[])[] {
  const touching: number[][] = Array.from({ length: count }, () => []);
  steps.forEach((step, i) => {
    for (const item of step.operands) touching[item]?.push(i);
    if (step.result >= 0) touching[step.result]?.push(i);
  });
  return touching;
}
