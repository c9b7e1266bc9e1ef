// Scopes for the tests of the inference: names with the unit they are given in.

import type { Formula, Type } from '../../src/formula/index.ts';
import { parseFormula, type Scope, type TableData, typeOfUnit } from '../../src/formula/index.ts';
import { readUnit, type Unit } from '../../src/quantity/index.ts';

export function unitOf(text: string): Unit {
  const read = readUnit(text);
  if (!read.ok) throw new Error(`the test names an unknown unit: ${text}: ${read.problem.message}`);
  return read.value;
}

export function formulaOf(text: string): Formula {
  const read = parseFormula(text);
  if (!read.ok) throw new Error(`the test holds an unreadable formula: ${text}: ${read.problem.message}`);
  return read.value;
}

/** A unit text for each name; a type or 'failed' where a unit is not enough. */
export function scopeOf(
  units: Readonly<Record<string, string | Type>>,
  tables: readonly TableData[] = [],
  decimalSign: '.' | ',' = '.',
): Scope {
  const types = new Map(
    Object.entries(units).map(
      ([name, unit]) => [name, unit === 'failed' || typeof unit !== 'string' ? unit : typeOfUnit(unitOf(unit))] as const,
    ),
  );
  return {
    typeOf: (name) => (types.get(name) as Type | 'failed' | undefined) ?? 'unknown-name',
    table: (name) => tables.find((table) => table.name === name),
    names: () => types.keys(),
    tableNames: () => tables.map((table) => table.name),
    decimalSign,
  };
}
