// Running a program: the same instructions for one case, several cases or a million samples.
//
// 1. Nothing is allocated while running.
// 2. Up to `few` entries are computed entry by entry, which spares the loop of each kernel; more by one kernel an instruction.
// 3. Both branches of a choice are computed and one is selected. A result that is not finite means that the formula has no value
//    there; why, tells explain.ts. What an infinite operand could hide is made NaN as kernels.ts says.

import { roundEven } from './arithmetic.ts';
import { entryOfText, kernels } from './kernels.ts';
import { op, stride } from './opcode.ts';
import type { Program, ProgramTable } from './program.ts';
import { interpolateAt, rowOfNumber } from './table.ts';

const few = 4;

/** Computes the first `count` entries (at most `width`) of the destinations of the instructions [start, end). */
export function run(
  program: Program,
  memory: Float64Array,
  width: number,
  count: number,
  start = 0,
  end = program.code.length,
): void {
  // Kernels take two entries a turn: an odd one is left.
  const even = count <= few ? 0 : count - (count % 2);
  if (even > 0) runMany(program.code, program.tables, memory, width, even, start, end);
  for (let entry = even; entry < count; entry++) runOne(program.code, program.tables, memory, width, entry, start, end);
}

/**
 * Computes `count` entries, an even number, of the whole program, the column of each slot lying anywhere in the memory:
 * from starts[slot] on. So results can be written where they are wanted.
 */
export function runAt(program: Program, memory: Float64Array, starts: Int32Array, count: number): void {
  const { code, tables } = program;
  for (let at = 0; at < code.length; at += stride) {
    const operation = code[at]!;
    const b = code[at + 3]!;
    kernels[operation]!(
      memory,
      starts[code[at + 1]!]!,
      starts[code[at + 2]!]!,
      isLookup(operation) ? b : starts[b]!,
      starts[code[at + 4]!]!,
      count,
      tables,
    );
  }
}

function isLookup(operation: number): boolean {
  return operation >= op.interpolate && operation <= op.entryOfText;
}

function runMany(
  code: Int32Array,
  tables: readonly ProgramTable[],
  m: Float64Array,
  width: number,
  count: number,
  start: number,
  end: number,
): void {
  for (let at = start; at < end; at += stride) {
    const operation = code[at]!;
    const b = code[at + 3]!;
    kernels[operation]!(
      m,
      code[at + 1]! * width,
      code[at + 2]! * width,
      isLookup(operation) ? b : b * width,
      code[at + 4]! * width,
      count,
      tables,
    );
  }
}

function runOne(
  code: Int32Array,
  tables: readonly ProgramTable[],
  m: Float64Array,
  width: number,
  entry: number,
  start: number,
  end: number,
): void {
  for (let at = start; at < end; at += stride) {
    const d = code[at + 1]! * width + entry;
    const x = m[code[at + 2]! * width + entry]!;
    const b = code[at + 3]!;
    switch (code[at]) {
      case op.copy:
        m[d] = x;
        break;
      case op.minus:
        m[d] = -x;
        break;
      case op.add:
      case op.addK:
        m[d] = x + m[b * width + entry]!;
        break;
      case op.subtract:
      case op.subtractK:
      case op.subtractFromK:
        m[d] = x - m[b * width + entry]!;
        break;
      case op.multiply:
      case op.multiplyK:
        m[d] = x * m[b * width + entry]!;
        break;
      case op.divide:
      case op.divideK:
      case op.divideIntoK: {
        const y = m[b * width + entry]!;
        m[d] = x / y - (y - y);
        break;
      }
      case op.power: {
        const y = m[b * width + entry]!;
        m[d] = x ** y - (x - x) - (y - y);
        break;
      }
      case op.square:
        m[d] = x * x;
        break;
      case op.cube:
        m[d] = x * x * x;
        break;
      case op.fourth: {
        const square = x * x;
        m[d] = square * square;
        break;
      }
      case op.inverse:
        m[d] = 1 / x - (x - x);
        break;
      case op.inverseSquare:
        m[d] = 1 / (x * x) - (x - x);
        break;
      case op.exp:
        m[d] = Math.exp(x) - (x - x);
        break;
      case op.ln:
        m[d] = Math.log(x);
        break;
      case op.log10:
        m[d] = Math.log10(x);
        break;
      case op.sqrt:
        m[d] = Math.sqrt(x);
        break;
      case op.cbrt:
        m[d] = Math.cbrt(x);
        break;
      case op.abs:
        m[d] = Math.abs(x);
        break;
      case op.sign:
        m[d] = Math.sign(x) - (x - x);
        break;
      case op.sin:
        m[d] = Math.sin(x);
        break;
      case op.cos:
        m[d] = Math.cos(x);
        break;
      case op.tan:
        m[d] = Math.tan(x);
        break;
      case op.asin:
        m[d] = Math.asin(x);
        break;
      case op.acos:
        m[d] = Math.acos(x);
        break;
      case op.atan:
        m[d] = Math.atan(x) - (x - x);
        break;
      case op.sinh:
        m[d] = Math.sinh(x);
        break;
      case op.cosh:
        m[d] = Math.cosh(x);
        break;
      case op.tanh:
        m[d] = Math.tanh(x) - (x - x);
        break;
      case op.floor:
        m[d] = Math.floor(x);
        break;
      case op.ceil:
        m[d] = Math.ceil(x);
        break;
      case op.round:
        m[d] = roundEven(x);
        break;
      case op.min: {
        const y = m[b * width + entry]!;
        m[d] = Math.min(x, y) - (x - x) - (y - y);
        break;
      }
      case op.max: {
        const y = m[b * width + entry]!;
        m[d] = Math.max(x, y) - (x - x) - (y - y);
        break;
      }
      case op.hypot:
        m[d] = Math.hypot(x, m[b * width + entry]!);
        break;
      case op.hypot3:
        m[d] = Math.hypot(x, m[b * width + entry]!, m[code[at + 4]! * width + entry]!);
        break;
      case op.atan2: {
        const y = m[b * width + entry]!;
        m[d] = Math.atan2(x, y) - (x - x) - (y - y);
        break;
      }
      case op.less: {
        const y = m[b * width + entry]!;
        m[d] = (x < y ? 1 : 0) - (x - x) - (y - y);
        break;
      }
      case op.lessEqual: {
        const y = m[b * width + entry]!;
        m[d] = (x <= y ? 1 : 0) - (x - x) - (y - y);
        break;
      }
      case op.greater: {
        const y = m[b * width + entry]!;
        m[d] = (x > y ? 1 : 0) - (x - x) - (y - y);
        break;
      }
      case op.greaterEqual: {
        const y = m[b * width + entry]!;
        m[d] = (x >= y ? 1 : 0) - (x - x) - (y - y);
        break;
      }
      case op.equal: {
        const y = m[b * width + entry]!;
        m[d] = (x === y ? 1 : 0) - (x - x) - (y - y);
        break;
      }
      case op.unequal: {
        const y = m[b * width + entry]!;
        m[d] = (x !== y ? 1 : 0) - (x - x) - (y - y);
        break;
      }
      case op.not:
        m[d] = 1 - x;
        break;
      case op.and:
        m[d] = x === 0 ? 0 : m[b * width + entry]! - (x - x);
        break;
      case op.or:
        m[d] = x === 0 ? m[b * width + entry]! : x;
        break;
      case op.choose:
        m[d] = x === 0 ? m[code[at + 4]! * width + entry]! : m[b * width + entry]! - (x - x);
        break;
      case op.interpolate: {
        const { keys, values, direction } = tables[b]!;
        m[d] = direction === 0 ? Number.NaN : interpolateAt(keys, values, direction, x);
        break;
      }
      case op.entryOfNumber: {
        const { keys, values } = tables[b]!;
        const row = rowOfNumber(keys, x);
        m[d] = row < 0 ? Number.NaN : values[row]!;
        break;
      }
      case op.entryOfText:
        m[d] = entryOfText(tables[b]!.values, x);
        break;
      case op.addAdd:
        m[d] = x + m[b * width + entry]! + m[code[at + 4]! * width + entry]!;
        break;
      case op.addSubtract:
        m[d] = x + m[b * width + entry]! - m[code[at + 4]! * width + entry]!;
        break;
      case op.addMultiply:
        m[d] = (x + m[b * width + entry]!) * m[code[at + 4]! * width + entry]!;
        break;
      case op.addDivide: {
        const z = m[code[at + 4]! * width + entry]!;
        m[d] = (x + m[b * width + entry]!) / z - (z - z);
        break;
      }
      case op.subtractAdd:
        m[d] = x - m[b * width + entry]! + m[code[at + 4]! * width + entry]!;
        break;
      case op.subtractSubtract:
        m[d] = x - m[b * width + entry]! - m[code[at + 4]! * width + entry]!;
        break;
      case op.subtractMultiply:
        m[d] = (x - m[b * width + entry]!) * m[code[at + 4]! * width + entry]!;
        break;
      case op.subtractDivide: {
        const z = m[code[at + 4]! * width + entry]!;
        m[d] = (x - m[b * width + entry]!) / z - (z - z);
        break;
      }
      case op.multiplyAdd:
        m[d] = x * m[b * width + entry]! + m[code[at + 4]! * width + entry]!;
        break;
      case op.multiplySubtract:
        m[d] = x * m[b * width + entry]! - m[code[at + 4]! * width + entry]!;
        break;
      case op.multiplyMultiply:
        m[d] = x * m[b * width + entry]! * m[code[at + 4]! * width + entry]!;
        break;
      case op.multiplyDivide: {
        const z = m[code[at + 4]! * width + entry]!;
        m[d] = (x * m[b * width + entry]!) / z - (z - z);
        break;
      }
      case op.divideAdd: {
        const y = m[b * width + entry]!;
        m[d] = x / y + m[code[at + 4]! * width + entry]! - (y - y);
        break;
      }
      case op.divideSubtract: {
        const y = m[b * width + entry]!;
        m[d] = x / y - m[code[at + 4]! * width + entry]! - (y - y);
        break;
      }
      case op.divideMultiply: {
        const y = m[b * width + entry]!;
        m[d] = (x / y) * m[code[at + 4]! * width + entry]! - (y - y);
        break;
      }
      case op.divideDivide: {
        const y = m[b * width + entry]!;
        const z = m[code[at + 4]! * width + entry]!;
        m[d] = x / y / z - (y - y) - (z - z);
        break;
      }
      case op.subtractByAdd:
        m[d] = m[code[at + 4]! * width + entry]! - (x + m[b * width + entry]!);
        break;
      case op.subtractBySubtract:
        m[d] = m[code[at + 4]! * width + entry]! - (x - m[b * width + entry]!);
        break;
      case op.subtractByMultiply:
        m[d] = m[code[at + 4]! * width + entry]! - x * m[b * width + entry]!;
        break;
      case op.subtractByDivide: {
        const y = m[b * width + entry]!;
        m[d] = m[code[at + 4]! * width + entry]! - x / y - (y - y);
        break;
      }
      case op.divideByAdd: {
        const divisor = x + m[b * width + entry]!;
        m[d] = m[code[at + 4]! * width + entry]! / divisor - (divisor - divisor);
        break;
      }
      case op.divideBySubtract: {
        const divisor = x - m[b * width + entry]!;
        m[d] = m[code[at + 4]! * width + entry]! / divisor - (divisor - divisor);
        break;
      }
      case op.divideByMultiply: {
        const divisor = x * m[b * width + entry]!;
        m[d] = m[code[at + 4]! * width + entry]! / divisor - (divisor - divisor);
        break;
      }
      case op.divideByDivide: {
        const y = m[b * width + entry]!;
        const divisor = x / y - (y - y);
        m[d] = m[code[at + 4]! * width + entry]! / divisor - (divisor - divisor);
        break;
      }
      default:
        throw new Error(`no operation has the number ${code[at]}`);
    }
  }
}
