// The printed numbers of one case: every quantity with its digits, every line with its verdict.
//
// 1. In a case a quantity has one numeral everywhere; inside exponents an angle stands in rad, with the same digits
//    (a typed angle, which has no digits in rad, gets them from the closing).
// 2. A line is evaluated with the doubles of the printed numerals, along the branches and rows that the true values take.
// 3. It closes when that comes within one unit of the last digit of the printed result, in the declared unit and in SI.
// 4. What stayed as it was in the print of before is taken over (memory.ts).
// Not here: raising digits (closing.ts), TeX (steps.ts), the criterion's own numbers (criterion-numbers.ts).

import { canonicalName, type Formula, type Taken } from '../formula/index.ts';
import { isAngleUnit, type Numeral, one, unitOf } from '../quantity/index.ts';
import type { Calculation, CriterionState, DerivedState } from '../sheet/index.ts';
import { type ClosingItem, type ClosingStep, closeSteps, type OpenReason, type Verdict } from './closing.ts';
import { comesOut, lastUnit } from './comes-out.ts';
import { type CriterionNumbers, criterionNumbers, type OwnSide, type PrintedVerdict } from './criterion-numbers.ts';
import { type Line, type Operand, readLine } from './line.ts';
import { type CaseMemory, remembered, takeOver } from './memory.ts';
import { calculatorNumeral, computedNumber, type Printed, type PrintedNumber, typedNumber } from './numerals.ts';
import { type ComputedState, stepOrder } from './step-order.ts';
import { holds } from './verdict.ts';

export interface CasePrint {
  readonly index: number;
  /** Undefined for a quantity without a value in this case. */
  printed(name: string, inExponent?: boolean): Printed | undefined;
  taken(formula: Formula): Taken | undefined;
  open(cell: string): OpenReason | undefined;
  verdict(cell: string): PrintedVerdict | undefined;
}

/** Each case of `memories` holds what the print of before may leave to this one. */
export function printCases(calculation: Calculation, memories: readonly CaseMemory[]): readonly CasePrint[] {
  const order = stepOrder(calculation);
  return memories.map((memory, index) => printCase(calculation, index, order, memory));
}

/** A number on a line; typed ones have no item (-1), their digits are fixed. */
interface Slot {
  readonly number: PrintedNumber;
  readonly item: number;
}

const radian = unitOf('rad');

function printCase(calculation: Calculation, index: number, order: readonly ComputedState[], memory: CaseMemory): CasePrint {
  const items: ClosingItem[] = [];
  /** The numerals that share a counter of digits: the one in the unit and, for an angle in an exponent, the one in rad. */
  const allForms: PrintedNumber[][] = [];
  const steps: ClosingStep[] = [];
  const owners: { readonly cell: string; readonly about: 'line' | 'decisions' | 'relation' }[] = [];
  const lines = new Map<Formula, Line>();
  const slots = new Map<string, Slot | undefined>();
  const exponents = new Map<string, Slot | undefined>();
  const verdicts = new Map<string, (digits: ArrayLike<number>, tooClose: boolean) => PrintedVerdict>();
  const lookup = calculation.lookup(index);
  const start = calculation.digits;

  const newSlot = (number: PrintedNumber): Slot => {
    const forms = [number];
    allForms.push(forms);
    return { number, item: items.push({ exactAt: (digits) => forms.every((form) => form.exactAt(digits)) }) - 1 };
  };

  const line = (formula: Formula): Line | undefined => {
    const known = lines.get(formula);
    if (known) return known;
    const reasons = [
      ...formula.names.map((name) => calculation.named(name)),
      ...formula.tables.map((name) => calculation.table(name)),
    ];
    const read = takeOver(memory.lines, formula, reasons, () => readLine(formula.expr, lookup, calculation.style.decimalSign));
    if (read) lines.set(formula, read);
    return read;
  };

  const slotOf = (name: string): Slot | undefined => {
    if (slots.has(name)) return slots.get(name);
    const slot = makeSlot(name);
    slots.set(name, slot);
    return slot;
  };
  const makeSlot = (name: string): Slot | undefined => {
    const state = calculation.named(name);
    const si = state?.si[index];
    if (state === undefined || si === undefined || !Number.isFinite(si)) return undefined;
    if (state.kind === 'given') {
      const value = state.values[index];
      const number = takeOver(memory.numbers, name, [state], () => value && typedNumber(value.numeral, value.unit));
      return number && { number, item: -1 };
    }
    const whole = state.kind === 'derived' && state.formula !== undefined && line(state.formula)?.whole === true;
    const number = takeOver(memory.numbers, name, [state, whole], () => computedNumber(si, state.unit ?? one, whole));
    return number && newSlot(number);
  };
  /** The form inside exponents: angles in rad. A derived angle keeps its counter of digits, a typed one gets its own. */
  const exponentSlot = (name: string): Slot | undefined => {
    if (exponents.has(name)) return exponents.get(name);
    let slot = slotOf(name);
    const si = calculation.named(name)?.si[index];
    if (slot !== undefined && si !== undefined && isAngleUnit(slot.number.unit) && slot.number.unit.text !== radian.text) {
      const number = takeOver(memory.radians, name, [slot.number], () => computedNumber(si, radian));
      allForms[slot.item]?.push(number);
      slot = slot.item >= 0 ? { number, item: slot.item } : newSlot(number);
    }
    exponents.set(name, slot);
    return slot;
  };
  const at = (slot: Slot, digits: ArrayLike<number>) => (slot.item < 0 ? 0 : (digits[slot.item] ?? start));
  const numbers = (digits: ArrayLike<number>) => (name: string, inExponent: boolean) => {
    const slot = inExponent ? exponentSlot(name) : slotOf(name);
    return slot === undefined ? Number.NaN : slot.number.si(at(slot, digits));
  };
  const printedAt = (slot: Slot, digits: ArrayLike<number>): Printed => slot.number.printed(at(slot, digits));
  const itemsOf = (operands: readonly Operand[]): readonly number[] => {
    const found = new Set<number>();
    for (const { name, inExponent } of operands) {
      const item = (inExponent ? exponentSlot(name) : slotOf(name))?.item ?? -1;
      if (item >= 0) found.add(item);
    }
    return [...found];
  };
  /** `reasons`: all that the verdict depends on beside the numbers that the line looks at and their digits. */
  const addStep = (
    cell: string,
    about: 'line' | 'decisions' | 'relation',
    step: ClosingStep,
    reasons: readonly unknown[],
    looks: readonly Slot[],
  ) => {
    const key = `${about} ${owners.at(-1)?.about === about && owners.at(-1)?.cell === cell ? 'again ' : ''}${cell}`;
    const judged = takeOver(memory.judged, key, [...reasons, ...looks.map((slot) => slot.number)], () => ({
      verdicts: new Map(),
      scaled: new Map(),
    }));
    owners.push({ cell, about });
    steps.push(remembered(step, [...new Set(looks.map((slot) => slot.item).filter((item) => item >= 0))], judged));
  };
  const slotsOf = (operands: readonly Operand[]): readonly Slot[] =>
    operands.flatMap(({ name, inExponent }) => (inExponent ? exponentSlot(name) : slotOf(name)) ?? []);
  /** A reader with the printed numbers must take the same branches and come to the same whole numbers. */
  const addDecisions = (cell: string, own: Line) => {
    if (own.decisive.length === 0) return;
    addStep(
      cell,
      'decisions',
      {
        operands: itemsOf(own.decisive),
        result: -1,
        judge: (digits) => (own.sameWay(numbers(digits)) ? 'closed' : 'jump'),
      },
      [own],
      slotsOf(own.decisive),
    );
  };

  const addDerived = (state: DerivedState) => {
    const si = state.si[index];
    const slot = slotOf(canonicalName(state.cell.name));
    // A second line of the same name has no value, though the name has one.
    if (state.formula === undefined || si === undefined || !Number.isFinite(si) || slot === undefined) return;
    const own = line(state.formula);
    if (own === undefined) return;
    const calculators: (Numeral | undefined)[] = [];
    const calculatorAt = (d: number) => (calculators[d] ??= calculatorNumeral(si, slot.number.numeral(d), slot.number.unit));
    const step: ClosingStep = {
      operands: itemsOf(own.operands),
      result: slot.item,
      judge: (digits): Verdict => {
        const values = numbers(digits);
        const d = at(slot, digits);
        const numeral = slot.number.numeral(d);
        const { unit } = slot.number;
        if (comesOut(own.value(values), numeral, calculatorAt(d), unit, own.whole, start)) return 'closed';
        return own.sameWay(values) ? 'cancellation' : 'jump';
      },
      scaled: (digits) => own.value(numbers(digits)) / lastUnit(calculatorAt(at(slot, digits))),
    };
    addStep(state.cell.id, 'line', step, [state, own], [slot, ...slotsOf(own.operands), ...slotsOf(own.decisive)]);
    addDecisions(state.cell.id, own);
  };

  const sideSlot = (own: OwnSide, { declared, unit }: CriterionNumbers): Slot => {
    if (own.name !== undefined) {
      const slot = slotOf(own.name);
      if (slot !== undefined && (!declared || slot.number.unit.text === unit.text)) return slot;
    }
    return own.typed ? { number: own.number, item: -1 } : newSlot(own.number);
  };

  const addCriterion = (state: CriterionState) => {
    const { left, right, cell } = state;
    const leftLine = left && line(left);
    const rightLine = right && line(right);
    if (leftLine === undefined || rightLine === undefined || state.met[index] == null) return;
    const own = takeOver(memory.criteria, cell.id, [state, leftLine, rightLine], () =>
      criterionNumbers(state, index, [leftLine, rightLine], start),
    );
    const { result, calculator, resultUnit, met, lineResult } = own;
    const sides = [sideSlot(own.sides[0], own), sideSlot(own.sides[1], own)] as const;
    const operands = itemsOf([...leftLine.operands, ...rightLine.operands]);
    const looks = [leftLine, rightLine].flatMap((each) => [...slotsOf(each.operands), ...slotsOf(each.decisive)]);
    const comes: ClosingStep = {
      operands,
      result: -1,
      judge: (digits): Verdict => {
        const values = numbers(digits);
        const value = lineResult(leftLine.value(values), rightLine.value(values));
        if (comesOut(value, result.numeral(start), calculator, resultUnit, false, start)) return 'closed';
        return leftLine.sameWay(values) && rightLine.sameWay(values) ? 'cancellation' : 'jump';
      },
      scaled: (digits) => {
        const values = numbers(digits);
        return lineResult(leftLine.value(values), rightLine.value(values)) / lastUnit(calculator);
      },
    };
    const relation: ClosingStep = {
      operands: [...new Set([...operands, ...sides.flatMap((side) => (side.item < 0 ? [] : [side.item]))])],
      result: -1,
      judge: (digits): Verdict => {
        const values = numbers(digits);
        const [a, b] = sides.map((side) => printedAt(side, digits).si) as [number, number];
        const shown =
          holds(a, cell.relation, b) === met && holds(leftLine.value(values), cell.relation, rightLine.value(values)) === met;
        return shown ? 'closed' : 'cancellation';
      },
    };
    addStep(cell.id, 'line', comes, [own], looks);
    addStep(cell.id, 'relation', relation, [own], [...looks, ...sides]);
    addDecisions(cell.id, leftLine);
    addDecisions(cell.id, rightLine);
    verdicts.set(cell.id, (digits, tooClose) => {
      const shown = [printedAt(sides[0], digits), printedAt(sides[1], digits)] as const;
      return takeOver(memory.verdicts, cell.id, [own, ...shown, tooClose], () => ({
        sides: shown,
        result: result.printed(start),
        calculator,
        isUtilisation: own.isUtilisation,
        met,
        tooClose,
      }));
    });
  };

  for (const state of order) {
    if (state.kind === 'derived') addDerived(state);
    else addCriterion(state);
  }
  const closing = closeSteps(items, steps, start);
  const open = new Map<string, OpenReason>();
  const tooClose = new Set<string>();
  for (const [step, reason] of closing.open) {
    const owner = owners[step];
    if (owner === undefined) continue;
    if (owner.about === 'relation') tooClose.add(owner.cell);
    else open.set(owner.cell, reason);
  }
  return {
    index,
    printed: (name, inExponent = false) => {
      const slot = inExponent ? exponentSlot(name) : slotOf(name);
      return slot && printedAt(slot, closing.digits);
    },
    taken: (formula) => line(formula)?.taken,
    open: (cell) => open.get(cell),
    verdict: (cell) => verdicts.get(cell)?.(closing.digits, tooClose.has(cell)),
  };
}
