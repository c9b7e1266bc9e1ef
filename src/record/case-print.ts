// The printed numbers of one case: every quantity with its digits, every line with its verdict.
//
// 1. In a case a quantity has one numeral everywhere; inside exponents an angle stands in rad, with the same digits
//    (a typed angle, which has no digits in rad, gets them from the closing).
// 2. A line is evaluated with the doubles of the printed numerals, along the branches and rows that the true values take.
// 3. It closes when that comes within one unit of the last digit of the printed result, in the declared unit and in SI.
// Not here: raising digits (closing.ts), TeX (steps.ts), the criterion's own numbers (verdict.ts).

import { canonicalName, type Formula, type Taken } from '../formula/index.ts';
import { isAngleUnit, type Numeral, one, type Unit, unitOf } from '../quantity/index.ts';
import type { Calculation, CriterionState, DerivedState } from '../sheet/index.ts';
import { type ClosingItem, type ClosingStep, closeSteps, type OpenReason, type Verdict } from './closing.ts';
import { comesOut, lastUnit } from './comes-out.ts';
import { type Line, type Operand, readLine } from './line.ts';
import { calculatorNumeral, computedNumber, type PrintedNumber, typedNumber } from './numerals.ts';
import { type ComputedState, stepOrder } from './step-order.ts';
import { demandIsLeft, holds, room, utilisationNumeral } from './verdict.ts';

export interface Printed {
  readonly numeral: Numeral;
  readonly unit: Unit;
  /** Coherent SI of the numeral, as it enters a line. */
  readonly si: number;
}

/** What a criterion prints: its sides, and its utilisation or the room that is left. */
export interface PrintedVerdict {
  readonly sides: readonly [Printed, Printed];
  readonly result: Printed;
  readonly calculator: Numeral;
  readonly isUtilisation: boolean;
  readonly met: boolean;
  /** True where no printed digits can show which side is greater. */
  readonly tooClose: boolean;
}

export interface CasePrint {
  readonly index: number;
  /** Undefined for a quantity without a value in this case. */
  printed(name: string, inExponent?: boolean): Printed | undefined;
  taken(formula: Formula): Taken | undefined;
  open(cell: string): OpenReason | undefined;
  verdict(cell: string): PrintedVerdict | undefined;
}

export function printCases(calculation: Calculation): readonly CasePrint[] {
  const order = stepOrder(calculation);
  return calculation.cases.map((_, index) => printCase(calculation, index, order));
}

/** A number on a line; typed ones have no item (-1), their digits are fixed. */
interface Slot {
  readonly number: PrintedNumber;
  readonly item: number;
}

const radian = unitOf('rad');
const kelvin = unitOf('K');

function printCase(calculation: Calculation, index: number, order: readonly ComputedState[]): CasePrint {
  const items: ClosingItem[] = [];
  /** The numerals that share a counter of digits: the one in the unit and, for an angle in an exponent, the one in rad. */
  const allForms: PrintedNumber[][] = [];
  const steps: ClosingStep[] = [];
  const owners: { readonly cell: string; readonly about: 'line' | 'decisions' | 'relation' }[] = [];
  const lines = new Map<Formula, Line>();
  const slots = new Map<string, Slot | undefined>();
  const exponents = new Map<string, Slot | undefined>();
  const verdicts = new Map<string, (digits: ArrayLike<number>) => Omit<PrintedVerdict, 'tooClose'>>();
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
    const read = readLine(formula.expr, lookup, calculation.style.decimalSign);
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
      return value && { number: typedNumber(value.numeral, value.unit), item: -1 };
    }
    const whole = state.kind === 'derived' && state.formula !== undefined && line(state.formula)?.whole === true;
    return newSlot(computedNumber(si, state.unit ?? one, whole));
  };
  /** The form inside exponents: angles in rad. A derived angle keeps its counter of digits, a typed one gets its own. */
  const exponentSlot = (name: string): Slot | undefined => {
    if (exponents.has(name)) return exponents.get(name);
    let slot = slotOf(name);
    const si = calculation.named(name)?.si[index];
    if (slot !== undefined && si !== undefined && isAngleUnit(slot.number.unit) && slot.number.unit.text !== radian.text) {
      const number = computedNumber(si, radian);
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
  const printedAt = (slot: Slot, digits: ArrayLike<number>): Printed => {
    const d = at(slot, digits);
    return { numeral: slot.number.numeral(d), unit: slot.number.unit, si: slot.number.si(d) };
  };
  const itemsOf = (operands: readonly Operand[]): readonly number[] => {
    const found = new Set<number>();
    for (const { name, inExponent } of operands) {
      const item = (inExponent ? exponentSlot(name) : slotOf(name))?.item ?? -1;
      if (item >= 0) found.add(item);
    }
    return [...found];
  };
  const addStep = (cell: string, about: 'line' | 'decisions' | 'relation', step: ClosingStep) => {
    owners.push({ cell, about });
    steps.push(step);
  };
  /** A reader with the printed numbers must take the same branches and come to the same whole numbers. */
  const addDecisions = (cell: string, own: Line) => {
    if (own.decisive.length === 0) return;
    addStep(cell, 'decisions', {
      operands: itemsOf(own.decisive),
      result: -1,
      judge: (digits) => (own.sameWay(numbers(digits)) ? 'closed' : 'jump'),
    });
  };

  const addDerived = (state: DerivedState) => {
    const si = state.si[index];
    const slot = slotOf(canonicalName(state.cell.name));
    if (state.formula === undefined || si === undefined || slot === undefined) return;
    const own = line(state.formula);
    if (own === undefined) return;
    const calculators: (Numeral | undefined)[] = [];
    const calculatorAt = (d: number) => (calculators[d] ??= calculatorNumeral(si, slot.number.numeral(d), slot.number.unit));
    addStep(state.cell.id, 'line', {
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
    });
    addDecisions(state.cell.id, own);
  };

  const sideSlot = (own: Line, si: number, unit: Unit, declared: boolean): Slot => {
    if (own.alone?.kind === 'name') {
      const slot = slotOf(own.alone.name);
      if (slot !== undefined && (!declared || slot.number.unit.text === unit.text)) return slot;
    }
    // The literal 0 fits every unit: 0 N is printed beside newtons.
    if (own.alone?.kind === 'number' && own.alone.unit.text === unit.text) {
      return { number: typedNumber(own.alone.numeral, own.alone.unit), item: -1 };
    }
    const alone = own.alone?.kind === 'number' && !declared && si !== 0 ? own.alone : undefined;
    if (alone) return { number: typedNumber(alone.numeral, alone.unit), item: -1 };
    return newSlot(computedNumber(si, unit));
  };

  const addCriterion = (state: CriterionState) => {
    const { left, right, cell } = state;
    const leftSi = state.leftSi[index] ?? Number.NaN;
    const rightSi = state.rightSi[index] ?? Number.NaN;
    const met = state.met[index] ?? null;
    const leftLine = left && line(left);
    const rightLine = right && line(right);
    if (left === undefined || right === undefined || leftLine === undefined || rightLine === undefined || met === null) return;
    const unit = state.unit ?? one;
    const declared = cell.unit !== undefined;
    const sides = [sideSlot(leftLine, leftSi, unit, declared), sideSlot(rightLine, rightSi, unit, declared)] as const;
    const utilisation = unit.reading === undefined ? (state.utilisation[index] ?? null) : null;
    const resultUnit = utilisation !== null ? one : unit.reading === undefined ? unit : kelvin;
    const trueResult = utilisation ?? room(leftSi, cell.relation, rightSi);
    const result =
      utilisation !== null
        ? typedNumber(utilisationNumeral(utilisation, cell.relation, met), one)
        : computedNumber(trueResult, resultUnit, false, 'down');
    const calculator =
      utilisation !== null ? result.numeral(start) : calculatorNumeral(trueResult, result.numeral(start), resultUnit, 'down');
    const lineResult = (a: number, b: number) =>
      utilisation === null ? room(a, cell.relation, b) : demandIsLeft(cell.relation) ? a / b : b / a;
    const operands = itemsOf([...leftLine.operands, ...rightLine.operands]);
    addStep(cell.id, 'line', {
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
    });
    addStep(cell.id, 'relation', {
      operands: [...new Set([...operands, ...sides.flatMap((side) => (side.item < 0 ? [] : [side.item]))])],
      result: -1,
      judge: (digits): Verdict => {
        const values = numbers(digits);
        const [a, b] = sides.map((side) => printedAt(side, digits).si) as [number, number];
        const shown =
          holds(a, cell.relation, b) === met && holds(leftLine.value(values), cell.relation, rightLine.value(values)) === met;
        return shown ? 'closed' : 'cancellation';
      },
    });
    addDecisions(cell.id, leftLine);
    addDecisions(cell.id, rightLine);
    verdicts.set(cell.id, (digits) => ({
      sides: [printedAt(sides[0], digits), printedAt(sides[1], digits)],
      result: { numeral: result.numeral(start), unit: resultUnit, si: result.si(start) },
      calculator,
      isUtilisation: utilisation !== null,
      met,
    }));
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
    verdict: (cell) => {
      const verdict = verdicts.get(cell)?.(closing.digits);
      return verdict && { ...verdict, tooClose: tooClose.has(cell) };
    },
  };
}
