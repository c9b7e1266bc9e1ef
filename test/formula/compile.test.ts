// Compiled columns against the exact walk of one case, on random formulas; and the shape of programs.

import fc from 'fast-check';
import { describe, expect, it } from 'vitest';
import {
  allFinite,
  compileFormulas,
  type Expr,
  evaluateTree,
  explain,
  type Lookup,
  makeMemory,
  ProgramBuilder,
  run,
  type TableData,
} from '../../src/formula/index.ts';
import { readUnit } from '../../src/quantity/index.ts';
import { functions } from './formulas.ts';
import { formulaOf } from './scope.ts';

const unit = (text: string) => {
  const read = readUnit(text);
  if (!read.ok) throw new Error(text);
  return read.value;
};

const belts: TableData = {
  name: 'belts',
  columns: [
    { name: 'length', unit: unit('m'), numbers: Float64Array.of(-2, -0.5, 0, 1, 3.5), texts: ['-2', '-0.5', '0', '1', '3.5'] },
    { name: 'mass', unit: unit('kg'), numbers: Float64Array.of(1, 1.5, Number.NaN, 4, 9), texts: ['1', '1.5', '', '4', '9'] },
    { name: 'falling', unit: unit('kg'), numbers: Float64Array.of(5, 4, 3, 2, 1), texts: ['5', '4', '3', '2', '1'] },
    { name: 'grade', texts: ['A', 'A', 'B', 'B', 'C'] },
  ],
  rows: 5,
};
const surfaces: TableData = {
  name: 'surfaces',
  columns: [
    { name: 'surface', texts: ['leather', 'rubber', 'steel', 'rubber'] },
    { name: 'mu', unit: unit('1'), numbers: Float64Array.of(0.3, 0.5, 0.15, 99), texts: ['0.30', '0.50', '0.15', '99'] },
  ],
  rows: 4,
};
const tables = new Map([belts, surfaces].map((table) => [table.name, table]));

const names = ['a', 'b', 'c', 'd'];
const texts = ['s', 't'];
const at = [0, 0] as const;

const number = (value: number): Expr => ({ kind: 'number', text: String(value), value, at });

const { value: values, truth: truths } = fc.letrec<{ value: Expr; truth: Expr }>((tie) => ({
  value: fc.oneof(
    { depthSize: 'small', withCrossShrink: true },
    fc.constantFrom(...names).map((name): Expr => ({ kind: 'name', name, at })),
    fc.constantFrom(0, 1, 2, 3, 0.5, 4, 10, 1e200).map(number),
    fc.constantFrom<Expr>(
      { kind: 'constant', name: 'pi', at },
      { kind: 'constant', name: 'e', at },
      { kind: 'quoted', text: '250 mm', at },
    ),
    fc.record({
      kind: fc.constant('binary' as const),
      operator: fc.constantFrom('+' as const, '-' as const, '*' as const, '/' as const, '^' as const),
      implicit: fc.constant(false),
      left: tie('value'),
      right: tie('value'),
      at: fc.constant(at),
    }),
    fc.record({
      kind: fc.constant('binary' as const),
      operator: fc.constantFrom('+' as const, '-' as const, '*' as const, '/' as const),
      implicit: fc.constant(false),
      left: tie('value'),
      right: tie('value'),
      at: fc.constant(at),
    }),
    fc.tuple(tie('value'), fc.constantFrom(2, 3, 4, -1, -2, 0.5, 1, 0, 1.5)).map(
      ([left, power]): Expr => ({
        kind: 'binary',
        operator: '^',
        implicit: false,
        left,
        right: power < 0 ? { kind: 'minus', inner: number(-power), at } : number(power),
        at,
      }),
    ),
    tie('value').map((inner): Expr => ({ kind: 'parens', inner, at })),
    tie('value').map((inner): Expr => ({ kind: 'minus', inner, at })),
    fc
      .tuple(fc.constantFrom(...functions), tie('value'))
      .map(([name, argument]): Expr => ({ kind: 'call', name, args: [argument], at })),
    fc
      .tuple(fc.constantFrom('min' as const, 'max' as const), fc.array(tie('value'), { minLength: 1, maxLength: 4 }))
      .map(([name, args]): Expr => ({ kind: 'call', name, args, at })),
    fc.array(tie('value'), { minLength: 2, maxLength: 5 }).map((args): Expr => ({ kind: 'call', name: 'hypot', args, at })),
    fc.tuple(tie('value'), tie('value')).map(([y, x]): Expr => ({ kind: 'call', name: 'atan2', args: [y, x], at })),
    // Parts that stand twice.
    tie('value').map(
      (part): Expr => ({
        kind: 'binary',
        operator: '*',
        implicit: false,
        left: part,
        right: { kind: 'binary', operator: '-', implicit: false, left: number(1), right: part, at },
        at,
      }),
    ),
    fc.record({
      kind: fc.constant('choose' as const),
      test: tie('truth'),
      then: tie('value'),
      otherwise: tie('value'),
      at: fc.constant(at),
    }),
    fc
      .tuple(fc.constantFrom('interpolate' as const, 'entry' as const), fc.constantFrom('mass', 'falling'), tie('value'))
      .map(([name, column, key]): Expr => ({ kind: 'table', name, table: 'belts', column, key, at })),
    fc
      .constantFrom<Expr>(
        { kind: 'name', name: 's', at },
        { kind: 'name', name: 't', at },
        { kind: 'quoted', text: 'steel', at },
        { kind: 'quoted', text: 'none', at },
      )
      .map((key): Expr => ({ kind: 'table', name: 'entry', table: 'surfaces', column: 'mu', key, at })),
  ),
  truth: fc.oneof(
    { depthSize: 'small', withCrossShrink: true },
    fc
      .tuple(
        fc.array(fc.constantFrom('<' as const, '<=' as const, '>' as const, '>=' as const, '==' as const, '!=' as const), {
          minLength: 1,
          maxLength: 3,
        }),
        fc.array(tie('value'), { minLength: 4, maxLength: 4 }),
      )
      .map(([operators, sides]): Expr => ({ kind: 'compare', operators, sides: sides.slice(0, operators.length + 1), at })),
    fc
      .tuple(
        fc.constantFrom('==' as const, '!=' as const),
        fc.constantFrom(...texts),
        fc.constantFrom<Expr>(
          { kind: 'quoted', text: 'rubber', at },
          { kind: 'name', name: 't', at },
          { kind: 'table', name: 'entry', table: 'belts', column: 'grade', key: number(1), at },
        ),
      )
      .map(
        ([operator, text, other]): Expr => ({
          kind: 'compare',
          operators: [operator],
          sides: [{ kind: 'name', name: text, at }, other],
          at,
        }),
      ),
    fc.record({
      kind: fc.constant('logic' as const),
      operator: fc.constantFrom('and' as const, 'or' as const),
      left: tie('truth'),
      right: tie('truth'),
      at: fc.constant(at),
    }),
    tie('truth').map((inner): Expr => ({ kind: 'not', inner, at })),
  ),
}));

const doubles = fc.oneof(
  fc.constantFrom(0, -0, 1, -1, 0.5, 2, 2.5, 3.5, 1e-300, 1e300, -1e300, Math.PI),
  fc.double({ min: -10, max: 10, noNaN: true }),
  fc.double({ noNaN: true, noDefaultInfinity: true }),
);
const entry = fc.record({
  numbers: fc.tuple(doubles, doubles, doubles, doubles),
  texts: fc.tuple(fc.constantFrom('leather', 'rubber', 'B'), fc.constantFrom('steel', 'rubber', 'unheard of')),
});
type Entry = { readonly numbers: readonly number[]; readonly texts: readonly string[] };

const lookupOf = (of: Entry, more: ReadonlyMap<string, number> = new Map()): Lookup => ({
  value: (name) => more.get(name) ?? of.numbers[names.indexOf(name)] ?? Number.NaN,
  text: (name) => of.texts[texts.indexOf(name)],
  table: (name) => tables.get(name),
});
const known = { isText: (name: string) => texts.includes(name), table: (name: string) => tables.get(name) };

function compiledValues(
  formulas: readonly { key: string; expr: Expr }[],
  entries: readonly Entry[],
  width: number,
  constant: (name: string) => number | undefined = () => undefined,
): Float64Array[] {
  const compiled = compileFormulas(formulas, [...names, ...texts], { ...known, constant });
  const memory = makeMemory(compiled.program, width);
  for (const [index, of] of entries.entries()) {
    for (const [at, name] of names.entries()) memory[compiled.slot(name) * width + index] = of.numbers[at]!;
    for (const [at, name] of texts.entries()) memory[compiled.slot(name) * width + index] = compiled.textNumber(of.texts[at]!);
  }
  run(compiled.program, memory, width, entries.length);
  return formulas.map(({ key }) => memory.slice(compiled.slot(key) * width, compiled.slot(key) * width + entries.length));
}

const checks = { numRuns: 1500, seed: 20261201 };

describe('compiled columns', () => {
  it('give what the exact walk gives, bit for bit, and no value exactly where it finds a problem', () => {
    fc.assert(
      fc.property(
        fc.oneof(values, truths),
        fc.array(entry, { minLength: 1, maxLength: 9 }),
        fc.nat(3),
        (expr, entries, spare) => {
          const [column] = compiledValues([{ key: 'x', expr }], entries, entries.length + spare);
          for (const [index, of] of entries.entries()) {
            const walked = explain(expr, lookupOf(of));
            const computed = column![index]!;
            if (walked.ok) expect(computed).toBe(walked.value);
            else expect(Number.isFinite(computed)).toBe(false);
          }
        },
      ),
      checks,
    );
  }, 60_000);

  it('compute several formulas together as each alone', () => {
    fc.assert(
      fc.property(
        fc.array(values, { minLength: 2, maxLength: 4 }),
        fc.array(entry, { minLength: 1, maxLength: 7 }),
        (exprs, entries) => {
          const formulas = exprs.map((expr, index) => ({ key: `x${index}`, expr }));
          const last: Expr = {
            kind: 'binary',
            operator: '+',
            implicit: false,
            left: { kind: 'name', name: 'x0', at },
            right: exprs[1]!,
            at,
          };
          const together = compiledValues([...formulas, { key: 'y', expr: last }], entries, entries.length);
          for (const [index, formula] of formulas.entries()) {
            expect(together[index]).toEqual(compiledValues([formula], entries, entries.length)[0]);
          }
          for (const [index, of] of entries.entries()) {
            const x0 = together[0]![index]!;
            const y = explain(last, lookupOf(of, new Map([['x0', x0]])));
            if (y.ok) expect(together.at(-1)![index]).toBe(y.value);
            else expect(Number.isFinite(together.at(-1)![index])).toBe(false);
          }
        },
      ),
      { ...checks, numRuns: 500 },
    );
  }, 60_000);

  it('compute the same where quantities that do not vary are compiled in', () => {
    fc.assert(
      fc.property(values, fc.array(entry, { minLength: 1, maxLength: 6 }), (expr, entries) => {
        const same = entries.map((of) => ({ ...of, numbers: [entries[0]!.numbers[0]!, ...of.numbers.slice(1)] }));
        const plain = compiledValues([{ key: 'x', expr }], same, same.length);
        const builtIn = compiledValues([{ key: 'x', expr }], same, same.length, (name) =>
          name === 'a' ? same[0]!.numbers[0]! : undefined,
        );
        for (const [index, value] of plain[0]!.entries()) {
          if (Number.isFinite(value)) expect(builtIn[0]![index]).toBe(value);
          else expect(Number.isFinite(builtIn[0]![index])).toBe(false);
        }
      }),
      { ...checks, numRuns: 500 },
    );
  }, 60_000);

  it('keep columns when a program grows and is built again', () => {
    const builder = new ProgramBuilder();
    const all = { ...known, slot: (name: string) => builder.slotOf(name) };
    const first = builder.add(formulaOf('a*b + c').expr, builder.slotOf('x'), all);
    const before = builder.build();
    const second = builder.add(formulaOf('(x + 1)*(x + 1) - sqrt(a^2 + b^2)*2').expr, builder.slotOf('y'), all);
    const after = builder.build();
    expect(builder.slotOf('x')).toBe(first.dest);
    for (const program of [before, after]) {
      const memory = makeMemory(program, 1);
      for (const [name, value] of [
        ['a', 3],
        ['b', 4],
        ['c', 5],
      ] as const)
        memory[builder.slotOf(name)] = value;
      run(program, memory, 1, 1, first.start, first.end);
      expect(memory[first.dest]).toBe(17);
      if (program === before) continue;
      run(program, memory, 1, 1, second.start, second.end);
      expect(memory[second.dest]).toBe(18 * 18 - 10);
    }
  });

  it('leave the entries beyond the count and all other columns alone', () => {
    const compiled = compileFormulas([{ key: 'x', expr: formulaOf('a*b + c/d - (a + b)').expr }], names, known);
    const width = 8;
    for (const count of [1, 4, 5, 6, 7, 8]) {
      const memory = makeMemory(compiled.program, width);
      for (let index = 0; index < names.length * width; index++) memory[index] = index + 1;
      const x = compiled.slot('x');
      memory.fill(-7, x * width, (x + 1) * width);
      const inputs = memory.slice(0, names.length * width);
      run(compiled.program, memory, width, count);
      expect(memory.slice(0, names.length * width)).toEqual(inputs);
      expect([...memory.slice(x * width + count, (x + 1) * width)]).toEqual(new Array(width - count).fill(-7));
      expect(allFinite(memory, width, count, x, x + 1)).toBe(true);
    }
  });

  it('compute a part that stands twice once', () => {
    const expr = formulaOf('sqrt((a - b)^2 + (c - d)^2 - 2*(a - b)*(c - d)*cos(a))').expr;
    const { program } = compileFormulas([{ key: 'x', expr }], names, known);
    // Two differences, two squares, then seven steps of which two pairs are one instruction each.
    expect(program.code.length / 5).toBeLessThanOrEqual(9);
  });

  it('find any entry that is not finite', () => {
    const memory = Float64Array.of(1, 2, 3, 4, 5, 6);
    expect(allFinite(memory, 2, 2, 0, 3)).toBe(true);
    for (const wrong of [Number.NaN, Infinity, -Infinity]) {
      const changed = memory.slice();
      changed[5] = wrong;
      expect(allFinite(changed, 2, 2, 0, 3)).toBe(false);
      expect(allFinite(changed, 2, 1, 0, 3)).toBe(true);
      expect(allFinite(changed, 2, 2, 0, 2)).toBe(true);
    }
  });
});

describe('arithmetic', () => {
  const one = (text: string, numbers: Readonly<Record<string, number>> = {}): number =>
    evaluateTree(formulaOf(text).expr, {
      value: (name) => numbers[name] ?? Number.NaN,
      text: () => undefined,
      table: () => undefined,
    });

  // IEEE 754-2019, 5.9 roundToIntegralTiesToEven; ISO 80000-1:2009 annex B rule A.
  it.each([
    [0.5, 0],
    [1.5, 2],
    [2.5, 2],
    [-0.5, 0],
    [-1.5, -2],
    [-2.5, -2],
    [2.4999999, 2],
    [2.5000001, 3],
    [2251799813685249.5, 2251799813685250],
    [0.49999999999999994, 0],
  ])('rounds %d to %d', (x, whole) => {
    expect(one('round(x)', { x })).toBe(whole);
  });

  it('has powers of fixed form as exact as products', () => {
    fc.assert(
      fc.property(fc.double({ min: -1e50, max: 1e50, noNaN: true }), (x) => {
        expect(one('x^2', { x })).toBe(x * x);
        expect(one('x^2', { x })).toBe(x ** 2);
        if (Math.abs(x) > 1e-300) expect(one('x^(-1)', { x })).toBe(1 / x);
        if (x >= 0) expect(one('x^0.5', { x })).toBe(Math.sqrt(x));
      }),
      checks,
    );
  });

  it('computes e^x as the exponential', () => {
    expect(one('e^(m*t)', { m: 0.3, t: Math.PI })).toBe(Math.exp(0.3 * Math.PI));
  });
});
