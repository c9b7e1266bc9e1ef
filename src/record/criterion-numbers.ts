// The printed numbers of a criterion in one case: its own sides where they are no quantity's, and its utilisation or room.
//
// Not here: the numerals of quantities and how many digits anything has (case-print.ts), the rounding of verdicts (verdict.ts).

import { type Numeral, one, type Unit, unitOf } from '../quantity/index.ts';
import type { CriterionState } from '../sheet/index.ts';
import type { Line } from './line.ts';
import { calculatorNumeral, computedNumber, type Printed, type PrintedNumber, typedNumber } from './numerals.ts';
import { demandIsLeft, room, utilisationNumeral } from './verdict.ts';

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

/** A side that prints as the quantity of this name does, if that stands in the unit of the criterion or none is declared. */
export interface OwnSide {
  readonly name?: string;
  /** Its number otherwise. */
  readonly number: PrintedNumber;
  /** The number is typed: its digits are fixed. */
  readonly typed: boolean;
}

export interface CriterionNumbers {
  readonly sides: readonly [OwnSide, OwnSide];
  readonly unit: Unit;
  readonly declared: boolean;
  readonly result: PrintedNumber;
  readonly resultUnit: Unit;
  readonly calculator: Numeral;
  readonly isUtilisation: boolean;
  readonly met: boolean;
  /** What the line comes to with these sides: demand over capacity, or the room between them. */
  readonly lineResult: (left: number, right: number) => number;
}

const kelvin = unitOf('K');

/** `index`: the case. Both sides have a value there, and the criterion a verdict. */
export function criterionNumbers(
  state: CriterionState,
  index: number,
  lines: readonly [Line, Line],
  start: number,
): CriterionNumbers {
  const { cell } = state;
  const left = state.leftSi[index] ?? Number.NaN;
  const right = state.rightSi[index] ?? Number.NaN;
  const met = state.met[index] === true;
  const unit = state.unit ?? one;
  const declared = cell.unit !== undefined;
  const utilisation = unit.reading === undefined ? (state.utilisation[index] ?? null) : null;
  const resultUnit = utilisation !== null ? one : unit.reading === undefined ? unit : kelvin;
  const trueResult = utilisation ?? room(left, cell.relation, right);
  const result =
    utilisation !== null
      ? typedNumber(utilisationNumeral(utilisation, cell.relation, met), one)
      : computedNumber(trueResult, resultUnit, false, 'down');
  return {
    sides: [ownSide(lines[0], left, unit, declared), ownSide(lines[1], right, unit, declared)],
    unit,
    declared,
    result,
    resultUnit,
    calculator:
      utilisation !== null ? result.numeral(start) : calculatorNumeral(trueResult, result.numeral(start), resultUnit, 'down'),
    isUtilisation: utilisation !== null,
    met,
    lineResult: (a, b) => (utilisation === null ? room(a, cell.relation, b) : demandIsLeft(cell.relation) ? a / b : b / a),
  };
}

function ownSide({ alone }: Line, si: number, unit: Unit, declared: boolean): OwnSide {
  // The literal 0 fits every unit: 0 N is printed beside newtons.
  if (alone?.kind === 'number' && (alone.unit.text === unit.text || (!declared && si !== 0)))
    return { number: typedNumber(alone.numeral, alone.unit), typed: true };
  const name = alone?.kind === 'name' ? { name: alone.name } : {};
  return { ...name, number: computedNumber(si, unit), typed: false };
}
