// From a unit text to its unit, with a cache: the same few texts stand in thousands of cells.
//
// 1. Texts are kept up to a number, and only short ones: a hostile file cannot fill the memory.
// 2. Equal canonical texts give the same object, so that units can be told apart by identity first.
// Not here: the grammar (unit-grammar.ts).

import { usualSymbols } from './catalogue.ts';
import type { Result } from './problem.ts';
import { done, fail } from './problem.ts';
import type { Unit } from './unit.ts';
import { one, unitOfFactors } from './unit.ts';
import { readQuotient } from './unit-grammar.ts';

const longestUnit = 100;
const mostKept = 2000;
const known = new Map<string, Result<Unit>>();
/** Refused texts: a wrong unit may stand in a whole column, and what to propose for it takes a while. */
const refused = new Map<string, Result<Unit>>();
const mostRefused = 200;

/** Reads a unit text; '' and '1' are the number one. Spans of problems count in `text`. */
export function readUnit(text: string): Result<Unit> {
  return known.get(text) ?? refused.get(text) ?? readNew(text);
}

function readNew(text: string): Result<Unit> {
  if (text.length > longestUnit) {
    return fail('text-too-long', `This unit has ${text.length} characters; ${longestUnit} are the most.`, 0, text.length);
  }
  const typed = text.trim();
  if (typed === '' || typed === '1') return keep(text, done(one));
  if (/^[-–—−]$/.test(typed)) {
    const from = text.indexOf(typed);
    return fail('unknown-unit', 'A number has the unit 1: write 1, or nothing.', from, from + 1, ['1']);
  }
  const quotient = readQuotient(text);
  if (!quotient.ok) {
    if (refused.size >= mostRefused) refused.clear();
    refused.set(text, quotient);
    return quotient;
  }
  const unit = unitOfFactors(quotient.value.above, quotient.value.below);
  return keep(text, known.get(unit.text) ?? keep(unit.text, done(unit)));
}

function keep(text: string, unit: Result<Unit>): Result<Unit> {
  if (known.size >= mostKept) known.clear();
  known.set(text, unit);
  return unit;
}

/** The unit of a text that is known to be one. Throws for any other: our own fault. */
export function unitOf(text: string): Unit {
  const unit = readUnit(text);
  if (!unit.ok) throw new Error(`no unit: ${unit.problem.message}`);
  return unit.value;
}

/** Compound units in common use, for completion. */
const usualCompounds = [
  'N·m',
  'kN·m',
  'N·mm',
  'N/mm²',
  'N/mm',
  'N/m',
  'kN/m',
  'kg/m',
  'kg/m³',
  'kg·m²',
  'mm²',
  'cm²',
  'm²',
  'mm³',
  'cm³',
  'm³',
  'mm⁴',
  'cm⁴',
  'm/s',
  'm/min',
  'km/h',
  'm/s²',
  'rad/s',
  'rad/s²',
  'r/min',
  'r/s',
  '1/s',
  '1/K',
  '1/m',
  'J/(kg·K)',
  'W/(m²·K)',
  'W/(m·K)',
  'W/m²',
  'kW·h',
  'Pa·s',
  'mm²/s',
  'L/min',
  'm³/s',
  'm³/h',
  'kg/s',
  'kg/h',
  'lbf·ft',
  'lbf·in',
  'ft·lbf',
  'lbf/ft',
  'lbf/in',
  'lbf/ft²',
  'lb/ft',
  'lb/ft³',
  'in²',
  'ft²',
  'in³',
  'ft³',
  'in⁴',
  'ft/s',
  'ft/min',
  'mi/h',
  'ft/s²',
  'gal/min',
  'ft³/min',
  'Btu/h',
];

/** Unit texts to choose from: every unit of the catalogue, its usual prefixed forms, common compounds. */
export const unitNames = (): readonly string[] => [...usualSymbols, ...usualCompounds];
