// Running a program for one entry of the columns: one case of the switch for each operation.
//
// 1. The labels are the numbers of opcode.ts, written as literals: then the engine jumps to the case at once, where it would
//    otherwise ask case by case.
// 2. Each case does exactly what its kernel does (kernels.ts, kernels-fused.ts), bit for bit; a test holds them together.
// Not here: what the operations mean (opcode.ts), whole columns (run.ts).

import { roundEven } from './arithmetic.ts';
import { entryOfText } from './kernels.ts';
import { stride } from './opcode.ts';
import type { ProgramTable } from './program.ts';
import { interpolateAt, rowOfNumber } from './table.ts';

export function runOne(
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
      // copy
      case 0:
        m[d] = x;
        break;
      // minus
      case 1:
        m[d] = -x;
        break;
      // add, addK
      case 2:
      case 49:
        m[d] = x + m[b * width + entry]!;
        break;
      // subtract, subtractK, subtractFromK
      case 3:
      case 50:
      case 53:
        m[d] = x - m[b * width + entry]!;
        break;
      // multiply, multiplyK
      case 4:
      case 51:
        m[d] = x * m[b * width + entry]!;
        break;
      // divide, divideK, divideIntoK
      case 5:
      case 52:
      case 54: {
        const y = m[b * width + entry]!;
        m[d] = x / y - (y - y);
        break;
      }
      // power
      case 6: {
        const y = m[b * width + entry]!;
        m[d] = x ** y - (x - x) - (y - y);
        break;
      }
      // square
      case 7:
        m[d] = x * x;
        break;
      // cube
      case 8:
        m[d] = x * x * x;
        break;
      // fourth
      case 9: {
        const square = x * x;
        m[d] = square * square;
        break;
      }
      // inverse
      case 10:
        m[d] = 1 / x - (x - x);
        break;
      // inverseSquare
      case 11:
        m[d] = 1 / (x * x) - (x - x);
        break;
      // exp
      case 12:
        m[d] = Math.exp(x) - (x - x);
        break;
      // ln
      case 13:
        m[d] = Math.log(x);
        break;
      // log10
      case 14:
        m[d] = Math.log10(x);
        break;
      // sqrt
      case 15:
        m[d] = Math.sqrt(x);
        break;
      // cbrt
      case 16:
        m[d] = Math.cbrt(x);
        break;
      // abs
      case 17:
        m[d] = Math.abs(x);
        break;
      // sign
      case 18:
        m[d] = Math.sign(x) - (x - x);
        break;
      // sin
      case 19:
        m[d] = Math.sin(x);
        break;
      // cos
      case 20:
        m[d] = Math.cos(x);
        break;
      // tan
      case 21:
        m[d] = Math.tan(x);
        break;
      // asin
      case 22:
        m[d] = Math.asin(x);
        break;
      // acos
      case 23:
        m[d] = Math.acos(x);
        break;
      // atan
      case 24:
        m[d] = Math.atan(x) - (x - x);
        break;
      // sinh
      case 25:
        m[d] = Math.sinh(x);
        break;
      // cosh
      case 26:
        m[d] = Math.cosh(x);
        break;
      // tanh
      case 27:
        m[d] = Math.tanh(x) - (x - x);
        break;
      // floor
      case 28:
        m[d] = Math.floor(x);
        break;
      // ceil
      case 29:
        m[d] = Math.ceil(x);
        break;
      // round
      case 30:
        m[d] = roundEven(x);
        break;
      // min
      case 31: {
        const y = m[b * width + entry]!;
        m[d] = Math.min(x, y) - (x - x) - (y - y);
        break;
      }
      // max
      case 32: {
        const y = m[b * width + entry]!;
        m[d] = Math.max(x, y) - (x - x) - (y - y);
        break;
      }
      // hypot
      case 33:
        m[d] = Math.hypot(x, m[b * width + entry]!);
        break;
      // hypot3
      case 34:
        m[d] = Math.hypot(x, m[b * width + entry]!, m[code[at + 4]! * width + entry]!);
        break;
      // atan2
      case 35: {
        const y = m[b * width + entry]!;
        m[d] = Math.atan2(x, y) - (x - x) - (y - y);
        break;
      }
      // less
      case 36: {
        const y = m[b * width + entry]!;
        m[d] = (x < y ? 1 : 0) - (x - x) - (y - y);
        break;
      }
      // lessEqual
      case 37: {
        const y = m[b * width + entry]!;
        m[d] = (x <= y ? 1 : 0) - (x - x) - (y - y);
        break;
      }
      // greater
      case 38: {
        const y = m[b * width + entry]!;
        m[d] = (x > y ? 1 : 0) - (x - x) - (y - y);
        break;
      }
      // greaterEqual
      case 39: {
        const y = m[b * width + entry]!;
        m[d] = (x >= y ? 1 : 0) - (x - x) - (y - y);
        break;
      }
      // equal
      case 40: {
        const y = m[b * width + entry]!;
        m[d] = (x === y ? 1 : 0) - (x - x) - (y - y);
        break;
      }
      // unequal
      case 41: {
        const y = m[b * width + entry]!;
        m[d] = (x !== y ? 1 : 0) - (x - x) - (y - y);
        break;
      }
      // not
      case 44:
        m[d] = 1 - x;
        break;
      // and
      case 42:
        m[d] = x === 0 ? 0 : m[b * width + entry]! - (x - x);
        break;
      // or
      case 43:
        m[d] = x === 0 ? m[b * width + entry]! : x;
        break;
      // choose
      case 45:
        m[d] = x === 0 ? m[code[at + 4]! * width + entry]! : m[b * width + entry]! - (x - x);
        break;
      // interpolate
      case 46: {
        const { keys, values, direction } = tables[b]!;
        m[d] = direction === 0 ? Number.NaN : interpolateAt(keys, values, direction, x);
        break;
      }
      // entryOfNumber
      case 47: {
        const { keys, values } = tables[b]!;
        const row = rowOfNumber(keys, x);
        m[d] = row < 0 ? Number.NaN : values[row]!;
        break;
      }
      // entryOfText
      case 48:
        m[d] = entryOfText(tables[b]!.values, x);
        break;
      // addAdd
      case 55:
        m[d] = x + m[b * width + entry]! + m[code[at + 4]! * width + entry]!;
        break;
      // addSubtract
      case 56:
        m[d] = x + m[b * width + entry]! - m[code[at + 4]! * width + entry]!;
        break;
      // addMultiply
      case 57:
        m[d] = (x + m[b * width + entry]!) * m[code[at + 4]! * width + entry]!;
        break;
      // addDivide
      case 58: {
        const z = m[code[at + 4]! * width + entry]!;
        m[d] = (x + m[b * width + entry]!) / z - (z - z);
        break;
      }
      // subtractAdd
      case 59:
        m[d] = x - m[b * width + entry]! + m[code[at + 4]! * width + entry]!;
        break;
      // subtractSubtract
      case 60:
        m[d] = x - m[b * width + entry]! - m[code[at + 4]! * width + entry]!;
        break;
      // subtractMultiply
      case 61:
        m[d] = (x - m[b * width + entry]!) * m[code[at + 4]! * width + entry]!;
        break;
      // subtractDivide
      case 62: {
        const z = m[code[at + 4]! * width + entry]!;
        m[d] = (x - m[b * width + entry]!) / z - (z - z);
        break;
      }
      // multiplyAdd
      case 63:
        m[d] = x * m[b * width + entry]! + m[code[at + 4]! * width + entry]!;
        break;
      // multiplySubtract
      case 64:
        m[d] = x * m[b * width + entry]! - m[code[at + 4]! * width + entry]!;
        break;
      // multiplyMultiply
      case 65:
        m[d] = x * m[b * width + entry]! * m[code[at + 4]! * width + entry]!;
        break;
      // multiplyDivide
      case 66: {
        const z = m[code[at + 4]! * width + entry]!;
        m[d] = (x * m[b * width + entry]!) / z - (z - z);
        break;
      }
      // divideAdd
      case 67: {
        const y = m[b * width + entry]!;
        m[d] = x / y + m[code[at + 4]! * width + entry]! - (y - y);
        break;
      }
      // divideSubtract
      case 68: {
        const y = m[b * width + entry]!;
        m[d] = x / y - m[code[at + 4]! * width + entry]! - (y - y);
        break;
      }
      // divideMultiply
      case 69: {
        const y = m[b * width + entry]!;
        m[d] = (x / y) * m[code[at + 4]! * width + entry]! - (y - y);
        break;
      }
      // divideDivide
      case 70: {
        const y = m[b * width + entry]!;
        const z = m[code[at + 4]! * width + entry]!;
        m[d] = x / y / z - (y - y) - (z - z);
        break;
      }
      // subtractByAdd
      case 71:
        m[d] = m[code[at + 4]! * width + entry]! - (x + m[b * width + entry]!);
        break;
      // subtractBySubtract
      case 72:
        m[d] = m[code[at + 4]! * width + entry]! - (x - m[b * width + entry]!);
        break;
      // subtractByMultiply
      case 73:
        m[d] = m[code[at + 4]! * width + entry]! - x * m[b * width + entry]!;
        break;
      // subtractByDivide
      case 74: {
        const y = m[b * width + entry]!;
        m[d] = m[code[at + 4]! * width + entry]! - x / y - (y - y);
        break;
      }
      // divideByAdd
      case 75: {
        const divisor = x + m[b * width + entry]!;
        m[d] = m[code[at + 4]! * width + entry]! / divisor - (divisor - divisor);
        break;
      }
      // divideBySubtract
      case 76: {
        const divisor = x - m[b * width + entry]!;
        m[d] = m[code[at + 4]! * width + entry]! / divisor - (divisor - divisor);
        break;
      }
      // divideByMultiply
      case 77: {
        const divisor = x * m[b * width + entry]!;
        m[d] = m[code[at + 4]! * width + entry]! / divisor - (divisor - divisor);
        break;
      }
      // divideByDivide
      case 78: {
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
