// Compiling formulas into a flat list of instructions over columns.
//
// 1. Each formula becomes one contiguous range; ranges run in any order that respects what they read.
// 2. Only formulas that have passed the inference are compiled; anything else is our own fault and throws.
// 3. Parts of constants are computed here with the arithmetic of the run, unless they come out infinite or NaN.
// 4. What stands twice in a formula is computed once, and kept. All other scratch is a stack that every range begins anew.
// 5. A sum, product, difference or quotient of which one side is another of them becomes one instruction for both.
// Not here: what the instructions do (opcode.ts, kernels.ts), lazy evaluation (explain.ts).

import { apply, constantOf, isE, type PowerForm, power, powerForm } from './arithmetic.ts';
import type { BinaryOperator, Expr } from './expr.ts';
import { readLiteral } from './literal.ts';
import { compareOp, functionOp, innerFirst, innerLast, op } from './opcode.ts';
import type { Program, ProgramTable, Range } from './program.ts';
import { Shared } from './shared.ts';
import { columnOf, directionOf, type TableData } from './table.ts';

export interface Names {
  /** The slot of a quantity; for a choice the column of its text numbers (textNumber). */
  slot(name: string): number;
  /** True for a given whose value is a text. */
  isText(name: string): boolean;
  table(name: string): TableData | undefined;
  /** The value of a quantity that is the same in all entries: it is compiled in as a literal would be. */
  constant?(name: string): number | undefined;
  /** How numerals in quoted quantities are written; '.' where absent. */
  readonly decimalSign?: '.' | ',';
}

/** A slot, or scratch: −1 − 2k the kept column k, −2 − 2k the stack column k. */
type Operand = number;
type Binary = Extract<Expr, { kind: 'binary' }>;
type Basic = Exclude<BinaryOperator, '^'>;
const kept = (k: number): Operand => -1 - 2 * k;
const stacked = (k: number): Operand => -2 - 2 * k;
/** Where a result is to go: a slot, the next kept column, or the stack. */
type Place = number | 'kept' | 'stack';

const powerOp: { readonly [form in Exclude<PowerForm, 'self' | 'general'>]: number } = {
  square: op.square,
  cube: op.cube,
  fourth: op.fourth,
  inverse: op.inverse,
  'inverse square': op.inverseSquare,
  root: op.sqrt,
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
  readonly #shareAcross: boolean;
  #shared = new Shared();
  #keptOf = new Map<number, Operand>();
  #slotCount = 0;
  #kept = 0;
  #mostKept = 0;
  #stacked = 0;
  #mostStacked = 0;

  /** With `shareAcross`, what stands in several formulas is computed once: then all ranges must run, in the order of adding. */
  constructor(shareAcross = false) {
    this.#shareAcross = shareAcross;
  }

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
    if (!this.#shareAcross) {
      this.#shared = new Shared();
      this.#keptOf = new Map();
      this.#kept = 0;
    }
    this.#shared.count(expr, !this.#shareAcross);
    return this.#append(expr, dest, names);
  }

  /** Appends several formulas; what stands in more than one of them is computed once where the builder shares across. */
  addAll(formulas: readonly { readonly expr: Expr; readonly dest: number }[], names: Names): Range[] {
    if (!this.#shareAcross) return formulas.map(({ expr, dest }) => this.add(expr, dest, names));
    for (const { expr } of formulas) this.#shared.count(expr);
    return formulas.map(({ expr, dest }) => this.#append(expr, dest, names));
  }

  #append(expr: Expr, dest: number, names: Names): Range {
    const start = this.#code.length;
    this.#stacked = 0;
    this.#emit(expr, names, dest);
    return { start, end: this.#code.length, dest };
  }

  /** The program so far. More may be added afterwards and built again: slots of keys and constants stay, ranges too. */
  build(): Program {
    const columns = this.#slotCount;
    const stackBase = columns + this.#mostKept;
    const code = new Int32Array(this.#code.length);
    for (let at = 0; at < code.length; at++) {
      const word = this.#code[at]!;
      if (word >= 0) code[at] = word;
      else code[at] = word % 2 === 0 ? stackBase + (-2 - word) / 2 : columns + (-1 - word) / 2;
    }
    return { code, slots: stackBase + this.#mostStacked, columns, constants: [...this.#constants], tables: [...this.#tables] };
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
  #folded(value: number, place: Place): Operand | undefined {
    return Number.isFinite(value) ? this.#moved(this.#constant(value), place) : undefined;
  }

  #moved(operand: Operand, place: Place): Operand {
    return typeof place === 'number' ? this.#instruction(op.copy, place, operand) : operand;
  }

  #instruction(operation: number, place: Place, a: Operand, b = 0, c = 0): Operand {
    const dest = typeof place === 'number' ? place : place === 'kept' ? kept(this.#kept++) : stacked(this.#stacked++);
    this.#mostKept = Math.max(this.#mostKept, this.#kept);
    this.#mostStacked = Math.max(this.#mostStacked, this.#stacked);
    this.#code.push(operation, dest, a, b, c);
    return dest;
  }

  /** Computes `expr`; what stands more than once goes to a kept column, and from there to where it is wanted. */
  #emit(expr: Expr, names: Names, place: Place = 'stack'): Operand {
    const number = this.#shared.repeated(expr);
    if (number === undefined) return this.#compute(expr, names, place);
    const known = this.#keptOf.get(number);
    if (known !== undefined) return this.#moved(known, place);
    const mark = this.#stacked;
    const operand = this.#compute(expr, names, typeof place === 'number' ? place : 'kept');
    this.#stacked = mark;
    this.#keptOf.set(number, operand);
    return operand;
  }

  #compute(expr: Expr, names: Names, place: Place): Operand {
    switch (expr.kind) {
      case 'number':
        return this.#moved(this.#constant(expr.value), place);
      case 'constant':
        return this.#moved(this.#constant(expr.name === 'pi' ? Math.PI : Math.E), place);
      case 'quoted': {
        const read = readLiteral(expr.text, names.decimalSign ?? '.');
        if (!read.ok) throw new Error(`a formula with an unreadable literal was compiled: ${read.problem.message}`);
        return this.#moved(this.#constant(read.value.si), place);
      }
      case 'name': {
        const constant = names.constant?.(expr.name);
        const known = constant !== undefined && Number.isFinite(constant);
        return this.#moved(known ? this.#constant(constant) : names.slot(expr.name), place);
      }
      case 'parens':
        return this.#compute(expr.inner, names, place);
      case 'minus':
        return this.#unary(op.minus, (x) => -x, expr.inner, names, place);
      case 'not':
        return this.#unary(op.not, (x) => 1 - x, expr.inner, names, place);
      case 'logic': {
        const mark = this.#stacked;
        const left = this.#emit(expr.left, names);
        const right = this.#emit(expr.right, names);
        this.#stacked = mark;
        return this.#instruction(expr.operator === 'and' ? op.and : op.or, place, left, right);
      }
      case 'binary':
        return expr.operator === '^' ? this.#power(expr, names, place) : this.#basic(expr, expr.operator, names, place);
      case 'compare':
        return this.#compare(expr, names, place);
      case 'choose': {
        const mark = this.#stacked;
        const test = this.#emit(expr.test, names);
        const then = this.#emit(expr.then, names);
        const otherwise = this.#emit(expr.otherwise, names);
        this.#stacked = mark;
        return this.#instruction(op.choose, place, test, then, otherwise);
      }
      case 'call':
        return this.#call(expr, names, place);
      case 'table':
        return this.#lookUp(expr, names, place);
    }
  }

  #unary(operation: number, compute: (x: number) => number, inner: Expr, names: Names, place: Place): Operand {
    const mark = this.#stacked;
    const a = this.#emit(inner, names);
    this.#stacked = mark;
    const constant = this.#constantOfSlot.get(a);
    const folded = constant === undefined ? undefined : this.#folded(compute(constant), place);
    return folded ?? this.#instruction(operation, place, a);
  }

  #power(expr: Binary, names: Names, place: Place): Operand {
    if (isE(expr.left)) return this.#unary(op.exp, Math.exp, expr.right, names, place);
    const form = powerForm(constantOf(expr.right));
    if (form === 'self') return this.#emit(expr.left, names, place);
    if (form !== 'general') return this.#unary(powerOp[form], (x) => power(x, 0, form), expr.left, names, place);
    const mark = this.#stacked;
    const a = this.#emit(expr.left, names);
    const b = this.#emit(expr.right, names);
    this.#stacked = mark;
    const x = this.#constantOfSlot.get(a);
    const y = this.#constantOfSlot.get(b);
    const folded = x === undefined || y === undefined ? undefined : this.#folded(x ** y, place);
    return folded ?? this.#instruction(op.power, place, a, b);
  }

  #basic(expr: Binary, operator: Basic, names: Names, place: Place): Operand {
    const mark = this.#stacked;
    const left = this.#inner(expr.left);
    const right = left ? undefined : this.#inner(expr.right);
    const inner = left ?? right;
    if (inner) {
      const outside = left ? expr.right : expr.left;
      const a = this.#emit(inner.left, names);
      const b = this.#emit(inner.right, names);
      const c = this.#emit(outside, names);
      this.#stacked = mark;
      const x = this.#constantOfSlot.get(a);
      const y = this.#constantOfSlot.get(b);
      // Constants inside are folded; then there is only one step left.
      if (x !== undefined && y !== undefined && Number.isFinite(apply2(inner.operator, x, y))) {
        const d = this.#constant(apply2(inner.operator, x, y));
        return left ? this.#step(operator, d, c, place) : this.#step(operator, c, d, place);
      }
      return this.#instruction((left ? innerFirst : innerLast)[inner.operator][operator], place, a, b, c);
    }
    const a = this.#emit(expr.left, names);
    const b = this.#emit(expr.right, names);
    this.#stacked = mark;
    return this.#step(operator, a, b, place);
  }

  /** The side of a sum or product as a sum or product itself, where it can become one instruction with it. */
  #inner(side: Expr): (Binary & { readonly operator: Basic }) | undefined {
    const expr = side.kind === 'parens' ? side.inner : side;
    if (expr.kind === 'parens') return this.#inner(expr);
    if (expr.kind !== 'binary' || expr.operator === '^') return undefined;
    if (this.#shared.repeated(expr) !== undefined || constantOf(expr) !== undefined) return undefined;
    return expr as Binary & { readonly operator: Basic };
  }

  #step(operator: Basic, a: Operand, b: Operand, place: Place): Operand {
    const x = this.#constantOfSlot.get(a);
    const y = this.#constantOfSlot.get(b);
    if (x !== undefined && y !== undefined) {
      const folded = this.#folded(apply2(operator, x, y), place);
      if (folded !== undefined) return folded;
    }
    if (y !== undefined) return this.#instruction(rightConstantOp[operator], place, a, b);
    if (x === undefined) return this.#instruction(basicOp[operator], place, a, b);
    // Sums and products are the same either way round: the constant goes to the right.
    return operator === '+' || operator === '*'
      ? this.#instruction(rightConstantOp[operator], place, b, a)
      : this.#instruction(operator === '-' ? op.subtractFromK : op.divideIntoK, place, a, b);
  }

  #compare(expr: Extract<Expr, { kind: 'compare' }>, names: Names, place: Place): Operand {
    const text = expr.sides.some((side) => isText(side, names));
    const mark = this.#stacked;
    const sides = expr.sides.map((side) => (text ? this.#text(side, names) : this.#emit(side, names)));
    const pair = (index: number, to: Place): Operand =>
      this.#instruction(compareOp[expr.operators[index]!], to, sides[index]!, sides[index + 1]!);
    const last = expr.operators.length - 1;
    let all: Operand | undefined;
    for (let index = 0; index < last; index++) {
      const next = pair(index, 'stack');
      // All pairs count, as all sides must have a value: the product keeps what a plain `and` would skip.
      all = all === undefined ? next : this.#instruction(op.multiply, 'stack', all, next);
    }
    const final = all === undefined ? undefined : pair(last, 'stack');
    this.#stacked = mark;
    return final === undefined ? pair(last, place) : this.#instruction(op.multiply, place, all!, final);
  }

  /** The column or constant of a text's number. */
  #text(expr: Expr, names: Names): Operand {
    if (expr.kind === 'parens') return this.#text(expr.inner, names);
    return expr.kind === 'quoted' ? this.#constant(this.textNumber(expr.text)) : this.#emit(expr, names);
  }

  #call(expr: Extract<Expr, { kind: 'call' }>, names: Names, place: Place): Operand {
    const { name, args } = expr;
    if (name !== 'min' && name !== 'max' && name !== 'hypot' && name !== 'atan2') {
      return this.#unary(functionOp[name], (x) => apply(name, x), args[0]!, names, place);
    }
    const mark = this.#stacked;
    const operands = args.map((argument) => this.#emit(argument, names));
    if (operands.length === 1) return this.#moved(operands[0]!, place);
    const operation = { min: op.min, max: op.max, atan2: op.atan2, hypot: op.hypot }[name];
    // ((a, b), c), …; hypot takes three at once, as the library function does.
    let from = 1;
    let result = operands[0]!;
    if (name === 'hypot' && operands.length > 2) {
      from = 3;
      if (operands.length === 3) this.#stacked = mark;
      result = this.#instruction(op.hypot3, operands.length === 3 ? place : 'stack', operands[0]!, operands[1]!, operands[2]!);
    }
    for (let index = from; index < operands.length; index++) {
      const last = index === operands.length - 1;
      if (last) this.#stacked = mark;
      result = this.#instruction(operation, last ? place : 'stack', result, operands[index]!);
    }
    return result;
  }

  #lookUp(expr: Extract<Expr, { kind: 'table' }>, names: Names, place: Place): Operand {
    const table = names.table(expr.table);
    if (table === undefined) throw new Error(`a formula with an unknown table was compiled: ${expr.table}`);
    const number = this.#tableNumber(table, expr);
    const mark = this.#stacked;
    const byText = table.columns[0]?.numbers === undefined;
    const key = byText ? this.#text(expr.key, names) : this.#emit(expr.key, names);
    this.#stacked = mark;
    const operation = expr.name === 'interpolate' ? op.interpolate : byText ? op.entryOfText : op.entryOfNumber;
    return this.#instruction(operation, place, key, number);
  }

  #tableNumber(table: TableData, expr: Extract<Expr, { kind: 'table' }>): number {
    const of = this.#tableNumbers.get(table) ?? new Map<string, number>();
    this.#tableNumbers.set(table, of);
    const use = `${expr.name} ${expr.column}`;
    const known = of.get(use);
    if (known !== undefined) return known;
    const keyColumn = table.columns[0];
    const column = columnOf(table, expr.column);
    if (keyColumn === undefined || column === undefined)
      throw new Error(`a formula with an unknown column was compiled: ${expr.column}`);
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

const basicOp: { readonly [operator in Basic]: number } = { '+': op.add, '-': op.subtract, '*': op.multiply, '/': op.divide };
const rightConstantOp: { readonly [operator in Basic]: number } = {
  '+': op.addK,
  '-': op.subtractK,
  '*': op.multiplyK,
  '/': op.divideK,
};

function apply2(operator: Basic, x: number, y: number): number {
  switch (operator) {
    case '+':
      return x + y;
    case '-':
      return x - y;
    case '*':
      return x * y;
    case '/':
      return x / y;
  }
}

/** True for a choice, and for an entry of a column of texts. */
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

/** Formulas in an order in which each reads only inputs and results before it, compiled into one program that is run as a whole. */
export function compileFormulas(
  formulas: readonly { readonly key: string; readonly expr: Expr }[],
  inputs: readonly string[],
  names: Omit<Names, 'slot'>,
): CompiledFormulas {
  const builder = new ProgramBuilder(true);
  for (const input of inputs) builder.slotOf(input);
  const all: Names = {
    slot: (name) => builder.slotOf(name),
    isText: (name) => names.isText(name),
    table: (name) => names.table(name),
    ...(names.constant && { constant: (name: string) => names.constant?.(name) }),
    ...(names.decimalSign && { decimalSign: names.decimalSign }),
  };
  const ranges = builder.addAll(
    formulas.map(({ key, expr }) => ({ expr, dest: builder.slotOf(key) })),
    all,
  );
  return { program: builder.build(), ranges, slot: (key) => builder.slotOf(key), textNumber: (text) => builder.textNumber(text) };
}
