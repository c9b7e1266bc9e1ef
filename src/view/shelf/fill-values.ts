// The givens of a template as a form: what is typed for this job becomes values that are set, and what is wrong with a text is told.
//
// 1. What is filled is set as `setValues` sets it: confirmed, basis and source gone. What is left empty stays carried over.
// 2. A given that differs by case has a text a case: with all of them filled, the first holds for all cases and the others for theirs.
// 3. Corrections count in the text of the field.
// Not here: how the form looks (fill.ts).

import { canonicalName } from '../../formula/index.ts';
import { type Fix, isAngleUnit, type Problem, readUnit, readValue } from '../../quantity/index.ts';
import { type Assignment, calculate, type GivenCell, type LoadCase, type Sheet, setValues } from '../../sheet/index.ts';

/** One field of the form. */
export interface Place {
  readonly cell: GivenCell;
  /** Null: for all cases. */
  readonly case: LoadCase | null;
  readonly key: string;
  /** What stands there until it is filled. */
  readonly carried: string;
}
/** What is typed, by the key of the field. */
export type Filled = ReadonlyMap<string, string>;

/** `split`: ids of givens that are to have a value a case although the template has one for all. */
export function placesOf(cell: GivenCell, cases: readonly LoadCase[], split: ReadonlySet<string>): readonly Place[] {
  const byCase = cases.length > 1 && (cell.byCase !== undefined || split.has(cell.id));
  if (!byCase) return [{ cell, case: null, key: cell.id, carried: cell.value }];
  return cases.map((each) => {
    const own = new Map(Object.entries(cell.byCase ?? {})).get(each.id);
    return { cell, case: each, key: `${cell.id}/${each.id}`, carried: own ?? cell.value };
  });
}

export function assignmentsOf(places: readonly Place[], filled: Filled): readonly Assignment[] {
  const texts = places.map(({ key }) => filled.get(key)?.trim() ?? '');
  const all = texts.every((text) => text !== '');
  return places.flatMap((place, index): Assignment[] => {
    const value = texts[index]!;
    if (value === '') return [];
    const name = canonicalName(place.cell.name);
    if (place.case === null || (all && index === 0)) return [{ name, value }];
    // The same for this case as for all needs no value of its own.
    return all && value === texts[0] ? [] : [{ name, value, case: place.case.id }];
  });
}

/** What is wrong with the text in its field; none where it is empty. `begun` is the sheet before anything is filled in. */
export function checkPlace(begun: Sheet, place: Place, text: string): readonly Problem[] {
  if (text.trim() === '') return [];
  const name = canonicalName(place.cell.name);
  const assigned = setValues(begun, [{ name, value: text, ...(place.case === null ? {} : { case: place.case.id }) }]);
  const plain = (problem: Problem): Problem => ({
    ...problem,
    message: problem.message.startsWith(`${name}: `) ? problem.message.slice(name.length + 2) : problem.message,
  });
  if (!assigned.ok) return assigned.problems.map((problem) => withUnit(begun, place, text, plain(problem)));
  const field = place.case === null ? 'value' : `byCase.${place.case.id}`;
  const problems = calculate(assigned.value).state(place.cell.id)?.problems ?? [];
  const warnings = problems
    .filter((problem) => problem.severity === 'warning' && (problem.field === field || problem.field === 'value'))
    .map(plain);
  if (warnings.some((problem) => problem.code === 'bare-angle')) return warnings;
  return [...bareNumber(begun, place, text), ...warnings];
}

/** A bare number is an angle in radians, or a whole where the template has per cent: right as it stands, and seldom meant. */
function bareNumber(sheet: Sheet, { cell, carried }: Place, text: string): readonly Problem[] {
  const decimalSign = sheet.settings?.decimalSign ?? '.';
  const [read, held] = [readValue(text, { decimalSign }), readValue(carried, { decimalSign })];
  if (cell.choices !== undefined || !read.ok || read.value.unit.parts.length > 0) return [];
  if (!held.ok || held.value.unit.parts.length === 0 || read.value.si === 0) return [];
  const { unit } = held.value;
  const is = isAngleUnit(unit) ? 'is an angle in rad' : 'is a plain number';
  const message = `${text.trim()} without a unit ${is}; the value carried over is in ${unit.text}`;
  return [{ code: 'bare-number', severity: 'warning', message, fixes: unitFixes(text, [unit.text]) }];
}

/** A bare number where a unit is due: the unit of the given is offered. */
function withUnit(sheet: Sheet, { cell, carried }: Place, text: string, problem: Problem): Problem {
  const decimalSign = sheet.settings?.decimalSign ?? '.';
  const read = readValue(text, { decimalSign });
  if (problem.code !== 'unlike-value' || !read.ok || read.value.unit.parts.length > 0) return problem;
  const held = readValue(carried, { decimalSign });
  const units = [held.ok ? held.value.unit.text : '', cell.unit ?? ''].filter(
    (unit) => unit !== '' && unit !== '1' && readUnit(unit).ok,
  );
  const fixes = unitFixes(text, units);
  return fixes.length === 0 ? problem : { ...problem, fixes };
}

/** The text with each of the units behind it. */
function unitFixes(text: string, units: readonly string[]): readonly Fix[] {
  const from = text.trimEnd().length;
  const signs = /^[°′″]$/u;
  return [...new Set(units)].map((unit): Fix => {
    const written = signs.test(unit) ? unit : ` ${unit}`;
    return { from, to: text.length, text: written, label: `write ${text.trim()}${written}` };
  });
}
