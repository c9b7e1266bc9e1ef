// Temperatures: readings (°C, °F alone), differences of readings, and kelvin, which may be either.
//
// 1. A reading is a point on a scale: only differences and shifts of it have a meaning.
// 2. A difference is definite when it comes from reading − reading; kelvin ('none') passes as a difference or as absolute.
// Not here: sentences (messages.ts), dimensions (infer.ts): both sides are temperatures already.

export type TemperatureKind = 'none' | 'reading' | 'difference';
export type TemperatureFault =
  | 'reading + reading'
  | 'difference - reading'
  | 'reading and difference'
  | 'reading against difference'
  | 'difference against reading'
  | 'a temperature reading cannot be used here';

/** `zero` marks the literal 0: it is no temperature, so it stands beside no reading. */
export interface TemperatureOperand {
  readonly kind: TemperatureKind;
  readonly zero: boolean;
}

export function sumOfTemperatures(
  operator: '+' | '-',
  left: TemperatureOperand,
  right: TemperatureOperand,
): TemperatureKind | TemperatureFault {
  const leftReads = left.kind === 'reading';
  const rightReads = right.kind === 'reading';
  if (leftReads && rightReads) return operator === '-' ? 'difference' : 'reading + reading';
  if (leftReads || rightReads) {
    if (left.zero || right.zero) return 'reading and difference';
    return rightReads && operator === '-' ? 'difference - reading' : 'reading';
  }
  return alikeOrNone(left, right);
}

/** min, max, comparison, both branches of a choice. */
export function likeTemperatures(operands: readonly TemperatureOperand[]): TemperatureKind | TemperatureFault {
  const readings = operands.filter((operand) => operand.kind === 'reading').length;
  if (readings > 0) return readings === operands.length ? 'reading' : 'reading and difference';
  return operands.every((operand) => operand.kind === 'difference' || operand.zero) && !operands.every((operand) => operand.zero)
    ? 'difference'
    : 'none';
}

function alikeOrNone(left: TemperatureOperand, right: TemperatureOperand): TemperatureKind {
  const differences = (left.kind === 'difference' ? 1 : 0) + (right.kind === 'difference' ? 1 : 0);
  if (differences === 2) return 'difference';
  return differences === 1 && (left.zero || right.zero) ? 'difference' : 'none';
}

const kinds: ReadonlySet<string> = new Set<TemperatureKind>(['none', 'reading', 'difference']);
export function isTemperatureKind(outcome: TemperatureKind | TemperatureFault): outcome is TemperatureKind {
  return kinds.has(outcome);
}

/** A result against its declared unit: `reads` where that is °C or °F alone. */
export function temperatureAgainst(operand: TemperatureOperand, reads: boolean): TemperatureFault | undefined {
  if (!reads) return operand.kind === 'reading' ? 'reading against difference' : undefined;
  if (operand.zero) return 'reading and difference';
  return operand.kind === 'difference' ? 'difference against reading' : undefined;
}
