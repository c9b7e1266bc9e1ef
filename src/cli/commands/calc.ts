// `tightside calc`: a sheet recalculated, as a listing or as JSON.
//
// 1. Printed numbers are those of the record: one numeral for a quantity in a case, everywhere.
// 2. `values` are in the unit of the quantity, unrounded; `si` in coherent SI; null where a case has none.
// 3. Errors go to standard error; where they leave no value the listing has a dash and the JSON null.
// Not here: the layout of the listing (listing.ts).

import { fingerprints } from '../../check/index.ts';
import { canonicalName } from '../../formula/index.ts';
import { fromSI, type Unit } from '../../quantity/index.ts';
import { makeRecord, printedValues } from '../../record/index.ts';
import { type Calculation, calculate, type QuantityState, type TemplateComparison } from '../../sheet/index.ts';
import { solver } from '../../study/index.ts';
import type { Io } from '../io.ts';
import { listing } from '../listing.ts';
import { comparison, loadSheet, withValues } from '../load.ts';
import { stateExit, writeProblems } from '../outcome.ts';
import { tellOnce } from '../report.ts';
import { readArguments } from '../usage.ts';

export async function calc(argv: readonly string[], io: Io): Promise<number> {
  const args = readArguments('calc', argv, ['set', 'case', 'json', 'template'], ['FILE']);
  const path = args.positionals[0]!;
  const calculation = calculate(withValues(await loadSheet(io, path), args.assignments, path), solver);
  const template = await comparison(io, calculation.sheet, args.texts.template);
  io.out(
    args.json
      ? `${JSON.stringify(calculationJson(calculation, template), null, 2)}\n`
      : listing(path, calculation, makeRecord(calculation, template === undefined ? {} : { template }), template),
  );
  writeProblems(io, path, calculation);
  return stateExit(calculation);
}

interface CalculationJson {
  readonly title: string;
  readonly fingerprint: string;
  readonly cases: readonly string[];
  readonly quantities: Readonly<Record<string, QuantityJson>>;
  readonly criteria: readonly {
    readonly id: string;
    readonly title: string;
    readonly met: readonly (boolean | null)[];
    readonly utilisation: readonly (number | null)[];
  }[];
  readonly problems: readonly {
    readonly cell: string;
    readonly severity: string;
    readonly code: string;
    readonly message: string;
  }[];
  /** Where the template that the sheet came from is at hand. */
  readonly template?: TemplateJson;
}
interface TemplateJson {
  readonly id: string;
  readonly version: number;
  readonly untouched: number;
  readonly changed: readonly { readonly cell: string; readonly name: string; readonly was: string; readonly now: string }[];
  readonly added: readonly string[];
  readonly removed: readonly string[];
}
interface QuantityJson {
  readonly unit: string;
  readonly values: readonly (number | null)[];
  readonly si: readonly (number | null)[];
  readonly printed: readonly (string | null)[];
}

function calculationJson(calculation: Calculation, template: TemplateComparison | undefined): CalculationJson {
  const printed = printedValues(calculation);
  const quantities = new Map<string, QuantityJson>();
  const criteria: CalculationJson['criteria'][number][] = [];
  for (const cell of calculation.sheet.cells) {
    const state = calculation.state(cell.id);
    if (state?.kind === 'criterion') {
      criteria.push({ id: cell.id, title: state.cell.title ?? '', met: state.met, utilisation: state.utilisation.map(number) });
    } else if (state?.kind === 'given' || state?.kind === 'derived' || state?.kind === 'sought') {
      const name = canonicalName(state.cell.name);
      if (!quantities.has(name)) quantities.set(name, quantityJson(state, printed.get(cell.id) ?? []));
    }
  }
  return {
    title: calculation.sheet.title,
    fingerprint: fingerprints(calculation).sheet,
    cases: calculation.cases.map(({ id }) => id),
    quantities: Object.fromEntries(quantities),
    criteria,
    problems: tellOnce(calculation).map(({ cell, severity, code, message, cases }) => ({
      cell,
      severity,
      code,
      message: cases === '' ? message : `${cases}: ${message}`,
    })),
    ...(template === undefined ? {} : { template: templateJson(template) }),
  };
}

function templateJson({ id, version, cells, removed }: TemplateComparison): TemplateJson {
  return {
    id,
    version,
    untouched: cells.filter(({ state }) => state === 'untouched').length,
    changed: cells.flatMap(({ cell, name = '', state, was = '', now = '' }) =>
      state === 'changed' ? [{ cell, name, was, now }] : [],
    ),
    added: cells.flatMap(({ cell, state }) => (state === 'added' ? [cell] : [])),
    removed: removed.map(({ name, title }) => name ?? title),
  };
}

function quantityJson(state: QuantityState, printed: readonly (string | null)[]): QuantityJson {
  const { unit } = state;
  const si = Array.from(state.si, number);
  return {
    unit: state.cell.kind === 'given' && state.cell.choices !== undefined ? '' : (state.cell.unit ?? typedUnit(unit)),
    values: unit === undefined ? si.map(() => null) : si.map((value) => inUnit(value, unit)),
    si,
    printed: si.map((_, i) => printed[i] ?? null),
  };
}

/** Units as programs write them: the signs that stand close behind a number have names. */
const named: ReadonlyMap<string, string> = new Map([
  ['°', 'deg'],
  ['′', 'arcmin'],
  ['″', 'arcsec'],
  ['°C', 'degC'],
  ['°F', 'degF'],
]);

function typedUnit(unit: Unit | undefined): string {
  return unit === undefined ? '' : (named.get(unit.text) ?? unit.text);
}

function inUnit(si: number | null, unit: Unit): number | null {
  return si === null ? null : number(fromSI(si, unit));
}

function number(value: number | null): number | null {
  return value === null || !Number.isFinite(value) ? null : value;
}
