// Compiling formulas into a flat list of instructions over columns.
//
// 1. Each formula becomes one contiguous range; ranges run in any order that respects what they read.
// 2. Only formulas that have passed the inference are compiled; anything else is our own fault and throws.
// 3. Parts of constants are computed here with the arithmetic of the run, unless they come out infinite or NaN.
// 4. Scratch is a stack that every range begins anew. Operands in which trouble could vanish get scratch of their own.
// Not here: what the instructions do (opcode.ts, kernels.ts), lazy evaluation (explain.ts).

import { apply, constantOf, isE, power, powerForm, type PowerForm } from './arithmetic.ts';
import type { BinaryOperator, Expr } from './expr.ts';
import { readLiteral } from './literal.ts';
import { compareOp, functionOp, hiding, op } from './opcode.ts';
import type { Program, ProgramTable, Range } from './program.ts';
import { columnOf, directionOf, type TableData } from './table.ts';

export interface Names {
  /** The slot of a quantity; for a choice the column of its text numbers (textNumber). */
  slot(name: string): number;
  /** True for a given whose value is a text. */
  isText(name: string): boolean;
  table(name: string): TableData | undefined;
  /** How numerals in quoted quantities are written; '.' where absent. */
  readonly decimalSign?: '.' | ',';
}

/** A slot, or scratch: −1 − 2k the watched column k, −2 − 2k the stack column k. */
type Operand = number;
const watched = (k: number): Operand => -1 - 2 * k;
const stacked = (k: number): Operand => -2 - 2 * k;

const powerOp: { readonly [form in Exclude<PowerForm, 'self' | 'general'>]: number } = {
  square: op.square, cube: op.cube, fourth: op.fourth, inverse: op.inverse, 'inverse square': op.inverseSquare, root: op.sqrt,
};

export class ProgramBuilder {
  readonly #code: number[] = [];
  readonly #slots = new Map<string, number>();
  readonly #constantSlots = new Map<string, number>();
  readonly #constants: { readonly slot: number; readonly value: number }[] = [];
  readonly #constantOfSlot = new Map<number, number>();
  readonly #texts = new Map<string, number>();
  readonly #tables: ProgramTable[] = [];
  readonly #tableNumbers = new Map<TableData, Map<string, number>>();
  #slotCount = 0;
  #mostWatched = 0;
  #mostStacked = 0;
  #watched = 0;
  #stacked = 0;

  /** The column of a key, a new one where the key is new. */
  slotOf(key: string): number {
    const known = this.#slots.get(key);
    if (known !== undefined) return known;
    const slot = this.#slotCount++;
    this.#slots.set(key, slot);
    return slot;
  }

  /** The number by which columns hold a text. */
  textNumber(text: string): number {
    const known = this.#texts.get(text);
    if (known !== undefined) return known;
    const number = this.#texts.size;
    this.#texts.set(text, number);
    return number;
  }

  /** Appends the instructions that compute `expr` into the column `dest`. */
  add(expr: Expr, dest: number, names: Names): Range {
    const start = this.#code.length;
    this.#watched = 0;
    this.#stacked = 0;
    this.#emit(expr, names, dest);
    this.#mostWatched = Math.max(this.#mostWatched, this.#watched);
    return { start, end: this.#code.length, dest, watched: this.#watched };
  }

  /** The program so far. More may be added afterwards and built again: slots of keys and constants stay, ranges too. */
  build(): Program {
    const watchBase = this.#slotCount;
    const stackBase = watchBase + this.#mostWatched;
    const code = new Int32Array(this.#code.length);
    for (let at = 0; at < code.length; at++) {
      const word = this.#code[at]!;
      if (word >= 0) code[at] = word;
      else code[at] = word % 2 === 0 ? stackBase + (-2 - word) / 2 : watchBase + (-1 - word) / 2;
    }
    return { code, slots: stackBase + this.#mostStacked, watchBase, constants: [...this.#constants], tables: [...this.#tables] };
  }

  #constant(value: number): Operand {
    const key = Object.is(value, -0) ? '-0' : String(value);
    const known = this.#constantSlots.get(key);
    if (known !== undefined) return known;
    const slot = this.#slotCount++;
    this.#constantSlots.set(key, slot);
    this.#constantOfSlot.set(slot, value);
    this.#constants.push({ slot, value });
    return slot;
  }

  /** The constant to use instead of an operation on constants, if its value is an ordinary number. */
  #folded(value: number, dest: number | undefined): Operand | undefined {
    return Number.isFinite(value) ? this.#moved(this.#constant(value), dest) : undefined;
  }

  #moved(operand: Operand, dest: number | undefined): Operand {
    if (dest === undefined) return operand;
    this.#code.push(op.copy, dest, operand, 0, 0);
    return dest;
  }

  /** Where a result goes: the destination, a watched column, or the stack. */
  #place(dest: number | undefined, watch: boolean): Operand {
    if (dest !== undefined) return dest;
    if (watch) return watched(this.#watched++);
    const place = this.#stacked++;
    this.#mostStacked = Math.max(this.#mostStacked, this.#stacked);
    return stacked(place);
  }

  #instruction(operation: number, dest: number | undefined, watch: boolean, a: Operand, b = 0, c = 0): Operand {
    const place = this.#place(dest, watch);
    this.#code.push(operation, place, a, b, c);
    return place;
  }

  #emit(expr: Expr, names: Names, dest?: number, watch = false): Operand {
    switch (expr.kind) {
      case 'number':
        return this.#moved(this.#constant(expr.value), dest);
      case 'constant':
        return this.#moved(this.#constant(expr.name === 'pi' ? Math.PI : Math.E), dest);
      case 'quoted': {
        const read = readLiteral(expr.text, names.decimalSign ?? '.');
        if (!read.ok) throw new Error(`a formula with an unreadable literal was compiled: ${read.problem.message}`);
        return this.#moved(this.#constant(read.value.si), dest);
      }
      case 'name':
        return this.#moved(names.slot(expr.name), dest);
      case 'parens':
        return this.#emit(expr.inner, names, dest, watch);
      case 'minus':
        return this.#unary(op.minus, (x) => -x, expr.inner, names, dest, watch);
      case 'not':
        return this.#unary(op.not, (x) => 1 - x, expr.inner, names, dest, watch);
      case 'logic': {
        const mark = this.#stacked;
        const left = this.#emit(expr.left, names);
        const right = this.#emit(expr.right, names);
        this.#stacked = mark;
        return this.#instruction(expr.operator === 'and' ? op.and : op.or, dest, watch, left, right);
      }
      case 'binary':
        return this.#binary(expr, names, dest, watch);
      case 'compare':
        return this.#compare(expr, names, dest, watch);
      case 'choose': {
        const mark = this.#stacked;
        const test = this.#emit(expr.test, names);
        const then = this.#emit(expr.then, names);
        const otherwise = this.#emit(expr.otherwise, names);
        this.#stacked = mark;
        return this.#instruction(op.choose, dest, watch, test, then, otherwise);
      }
      case 'call':
        return this.#call(expr, names, dest, watch);
      case 'table':
        return this.#lookUp(expr, names, dest, watch);
    }
  }

  #unary(operation: number, compute: (x: number) => number, inner: Expr, names: Names, dest: number | undefined, watch: boolean): Operand {
    const mark = this.#stacked;
    const a = this.#emit(inner, names, undefined, hides(operation, 1));
    this.#stacked = mark;
    const constant = this.#constantOfSlot.get(a);
    const folded = constant === undefined ? undefined : this.#folded(compute(constant), dest);
    return folded ?? this.#instruction(operation, dest, watch, a);
  }

  #binary(expr: Extract<Expr, { kind: 'binary' }>, names: Names, dest: number | undefined, watch: boolean): Operand {
    if (expr.operator === '^') {
      if (isE(expr.left)) return this.#unary(op.exp, Math.exp, expr.right, names, dest, watch);
      const form = powerForm(constantOf(expr.right));
      if (form === 'self') return this.#emit(expr.left, names, dest, watch);
      if (form !== 'general') return this.#unary(powerOp[form], (x) => power(x, 0, form), expr.left, names, dest, watch);
    }
    const operation = generalOp[expr.operator];
    const mark = this.#stacked;
    const a = this.#emit(expr.left, names, undefined, hides(operation, 1));
    const b = this.#emit(expr.right, names, undefined, hides(operation, 2));
    this.#stacked = mark;
    const x = this.#constantOfSlot.get(a);
    const y = this.#constantOfSlot.get(b);
    if (x !== undefined && y !== undefined) {
      const folded = this.#folded(compute(expr.operator, x, y), dest);
      if (folded !== undefined) return folded;
    }
    // Sums and products are the same either way round: the constant goes to the right.
    if (y !== undefined) return this.#instruction(rightConstantOp[operation] ?? operation, dest, watch, a, b);
    if (x !== undefined) {
      if (operation === op.add || operation === op.multiply) return this.#instruction(rightConstantOp[operation]!, dest, watch, b, a);
      return this.#instruction(leftConstantOp[operation] ?? operation, dest, watch, a, b);
    }
    return this.#instruction(operation, dest, watch, a, b);
  }

  #compare(expr: Extract<Expr, { kind: 'compare' }>, names: Names, dest: number | undefined, watch: boolean): Operand {
    const text = expr.sides.some((side) => isText(side, names));
    const mark = this.#stacked;
    const sides = expr.sides.map((side) => (text ? this.#text(side, names) : this.#emit(side, names, undefined, true)));
    let all: Operand | undefined;
    for (const [index, operator] of expr.operators.entries()) {
      const last = index === expr.operators.length - 1;
      const alone = last && all === undefined;
      const one = this.#instruction(compareOp[operator], alone ? dest : undefined, alone && watch, sides[index]!, sides[index + 1]!);
      if (all !== undefined) {
        this.#stacked = mark;
        all = this.#instruction(op.and, last ? dest : undefined, last && watch, all, one);
      } else {
        all = one;
      }
    }
    if (dest === undefined && !watch) this.#stacked = mark + 1;
    else this.#stacked = mark;
    return all!;
  }

  /** The column or constant of a text's number. */
  #text(expr: Expr, names: Names): Operand {
    if (expr.kind === 'parens') return this.#text(expr.inner, names);
    return expr.kind === 'quoted' ? this.#constant(this.textNumber(expr.text)) : this.#emit(expr, names, undefined, true);
  }

  #call(expr: Extract<Expr, { kind: 'call' }>, names: Names, dest: number | undefined, watch: boolean): Operand {
    const { name, args } = expr;
    if (name !== 'min' && name !== 'max' && name !== 'hypot' && name !== 'atan2') {
      return this.#unary(functionOp[name], (x) => apply(name, x), args[0]!, names, dest, watch);
    }
    const mark = this.#stacked;
    const operands = args.map((argument) => this.#emit(argument, names, undefined, name !== 'hypot'));
    this.#stacked = mark;
    if (operands.length === 1) return this.#moved(operands[0]!, dest);
    if (name === 'hypot' && operands.length > 2) return this.#hypot(operands, dest, watch);
    const operation = name === 'min' ? op.min : name === 'max' ? op.max : name === 'atan2' ? op.atan2 : op.hypot;
    return this.#chain(operation, operands, dest, watch);
  }

  /** ((a, b), c), … : the last result goes to its place, those before to the stack above the operands. */
  #chain(operation: number, operands: readonly Operand[], dest: number | undefined, watch: boolean): Operand {
    let result = operands[0]!;
    const mark = this.#stacked;
    for (let index = 1; index < operands.length; index++) {
      const last = index === operands.length - 1;
      this.#stacked = mark + (last ? 0 : stackedAmong(operands));
      result = this.#instruction(operation, last ? dest : undefined, last && watch, result, operands[index]!);
    }
    return result;
  }

  #hypot(operands: readonly Operand[], dest: number | undefined, watch: boolean): Operand {
    const mark = this.#stacked;
    const more = operands.length > 3;
    this.#stacked = mark + (more ? stackedAmong(operands) : 0);
    const first = this.#instruction(op.hypot3, more ? undefined : dest, !more && watch, operands[0]!, operands[1]!, operands[2]!);
    if (!more) return first;
    let result = first;
    for (let index = 3; index < operands.length; index++) {
      const last = index === operands.length - 1;
      this.#stacked = mark + (last ? 0 : stackedAmong(operands));
      result = this.#instruction(op.hypot, last ? dest : undefined, last && watch, result, operands[index]!);
    }
    return result;
  }

  #lookUp(expr: Extract<Expr, { kind: 'table' }>, names: Names, dest: number | undefined, watch: boolean): Operand {
    const table = names.table(expr.table);
    if (table === undefined) throw new Error(`a formula with an unknown table was compiled: ${expr.table}`);
    const number = this.#tableNumber(table, expr);
    const mark = this.#stacked;
    const byText = table.columns[0]?.numbers === undefined;
    const key = byText ? this.#text(expr.key, names) : this.#emit(expr.key, names);
    this.#stacked = mark;
    const operation = expr.name === 'interpolate' ? op.interpolate : byText ? op.entryOfText : op.entryOfNumber;
    return this.#instruction(operation, dest, watch, key, number);
  }

  #tableNumber(table: TableData, expr: Extract<Expr, { kind: 'table' }>): number {
    const of = this.#tableNumbers.get(table) ?? new Map<string, number>();
    this.#tableNumbers.set(table, of);
    const use = `${expr.name} ${expr.column}`;
    const known = of.get(use);
    if (known !== undefined) return known;
    const keyColumn = table.columns[0];
    const column = columnOf(table, expr.column);
    if (keyColumn === undefined || column === undefined) throw new Error(`a formula with an unknown column was compiled: ${expr.column}`);
    const values = column.numbers ?? Float64Array.from(column.texts, (text) => this.textNumber(text));
    const number = this.#tables.length;
    if (keyColumn.numbers === undefined) {
      this.#tables.push({ keys: values, values: this.#valuesByText(keyColumn.texts, values), direction: 0 });
    } else {
      this.#tables.push({ keys: keyColumn.numbers, values, direction: directionOf(keyColumn.numbers) });
    }
    of.set(use, number);
    return number;
  }

  /** The first row of a text counts. */
  #valuesByText(keys: readonly string[], values: Float64Array): Float64Array {
    const numbers = keys.map((text) => this.textNumber(text));
    const byText = new Float64Array(Math.max(-1, ...numbers) + 1).fill(Number.NaN);
    for (let row = keys.length - 1; row >= 0; row--) byText[numbers[row]!] = values[row]!;
    return byText;
  }
}

const hides = (operation: number, bit: 1 | 2): boolean => ((hiding.get(operation) ?? 0) & bit) !== 0;

/** How much of the stack the operands hold. */
function stackedAmong(operands: readonly Operand[]): number {
  return operands.filter((operand) => operand < 0 && operand % 2 === 0).length;
}

const generalOp: { readonly [operator in BinaryOperator]: number } = {
  '+': op.add, '-': op.subtract, '*': op.multiply, '/': op.divide, '^': op.power,
};
const rightConstantOp: { readonly [operation: number]: number } = {
  [op.add]: op.addK, [op.subtract]: op.subtractK, [op.multiply]: op.multiplyK, [op.divide]: op.divideK,
};
const leftConstantOp: { readonly [operation: number]: number } = {
  [op.subtract]: op.subtractFromK, [op.divide]: op.divideIntoK,
};

function compute(operator: BinaryOperator, x: number, y: number): number {
  switch (operator) {
    case '+':
      return x + y;
    case '-':
      return x - y;
    case '*':
      return x * y;
    case '/':
      return x / y;
    case '^':
      return x ** y;
  }
}

/** The parens-free kernel of "is this side a text": a choice, or an entry of a text column. */
function isText(expr: Expr, names: Names): boolean {
  switch (expr.kind) {
    case 'parens':
      return isText(expr.inner, names);
    case 'name':
      return names.isText(expr.name);
    case 'table': {
      const table = names.table(expr.table);
      const column = table && columnOf(table, expr.column);
      return column !== undefined && column.numbers === undefined;
    }
    default:
      return false;
  }
}

export interface CompiledFormulas {
  readonly program: Program;
  readonly ranges: readonly Range[];
  /** The column of an input or a result. */
  slot(key: string): number;
  textNumber(text: string): number;
}

/** Formulas in an order in which each reads only inputs and results before it, compiled into one program. */
export function compileFormulas(
  formulas: readonly { readonly key: string; readonly expr: Expr }[],
  inputs: readonly string[],
  names: Omit<Names, 'slot'>,
): CompiledFormulas {
  const builder = new ProgramBuilder();
  for (const input of inputs) builder.slotOf(input);
  const all: Names = {
    slot: (name) => builder.slotOf(name),
    isText: (name) => names.isText(name),
    table: (name) => names.table(name),
    ...(names.decimalSign && { decimalSign: names.decimalSign }),
  };
  const ranges = formulas.map(({ key, expr }) => builder.add(expr, builder.slotOf(key), all));
  return { program: builder.build(), ranges, slot: (key) => builder.slotOf(key), textNumber: (text) => builder.textNumber(text) };
}
