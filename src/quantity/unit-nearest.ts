// What to propose for a unit that is not known.
//
// 1. A proposal is never taken by itself: 'KW' is refused, and kW offered.
// 2. Order: what the trade writes instead of it, the same letters in other cases, two symbols run together, its name in words,
//    then the fewest changed letters. Three proposals at most.
// Not here: the catalogue (catalogue.ts).

import { allSpellings, misusedPrefix, symbolOfText, unitRows, usualSymbols } from './catalogue.ts';
import { equalD } from './dimension.ts';
import type { Failure } from './problem.ts';
import { either, fail, quote } from './problem.ts';
import { prefixes } from './unit-row.ts';

const most = 3;
const longestCompared = 24;

/** Spellings in use that are no symbols, or not safely one, and what to write. */
const instead: ReadonlyMap<string, readonly string[]> = new Map([
  ['Nm', ['N·m']],
  ['mph', ['mi/h']],
  ['kph', ['km/h']],
  ['kmh', ['km/h']],
  ['kmph', ['km/h']],
  ['mps', ['m/s']],
  ['fps', ['ft/s']],
  ['fpm', ['ft/min']],
  ['cfm', ['ft³/min']],
  ['gpm', ['gal/min']],
  ['lpm', ['L/min']],
  ['rps', ['r/s']],
  ['cc', ['cm³']],
  ['ccm', ['cm³']],
  ['cbm', ['m³']],
  ['sqm', ['m²']],
  ['sqmm', ['mm²']],
  ['qmm', ['mm²']],
  ['sqft', ['ft²']],
  ['sqin', ['in²']],
  ['cuft', ['ft³']],
  ['cuin', ['in³']],
  ['psf', ['lbf/ft²']],
  ['ksf', ['kip/ft²']],
  ['plf', ['lbf/ft']],
  ['klf', ['kip/ft']],
  ['pli', ['lbf/in']],
  ['pcf', ['lb/ft³']],
  ['pci', ['lb/in³']],
  ['ton', ['ton_short', 'ton_long', 't']],
  ['tons', ['ton_short', 'ton_long', 't']],
  ['short', ['ton_short']],
  ['long', ['ton_long']],
  ['gr', ['g', 'grain']],
  ['grs', ['g', 'grain']],
  ['gms', ['g']],
  ['gm', ['g']],
  ['mtr', ['m']],
  ['mtrs', ['m']],
  ['metric', ['t']],
  ['turn', ['r']],
  ['turns', ['r']],
  ['revs', ['r']],
  ['U', ['r']],
  ['upm', ['r/min']],
  ['grad', ['gon', '°']],
  ['degrees', ['°']],
  ['percent', ['%']],
  ['pct', ['%']],
  ['pound', ['lb', 'lbf']],
  ['pounds', ['lb', 'lbf']],
  ['ounces', ['oz', 'ozf']],
  ['feet', ['ft']],
  ['inches', ['in']],
  ['R', ['°R', 'r']],
  ['Ra', ['°R']],
  ['centigrade', ['°C']],
  ['celsius', ['°C']],
  ['fahrenheit', ['°F']],
  ['ata', ['at']],
  ['atü', ['at']],
  ['barg', ['bar']],
  ['bara', ['bar']],
  ['psig', ['psi']],
  ['psia', ['psi']],
  ['Nm3', ['m³']],
  ['Sm3', ['m³']],
  ['VA', ['V·A']],
  ['kVA', ['kV·A']],
  ['CV', ['hp_metric']],
  ['cv', ['hp_metric']],
  ['tonf', ['kip']],
  ['micron', ['µm']],
  ['microns', ['µm']],
  ['Nw', ['N']],
  ['secs', ['s']],
  ['hour', ['h']],
  ['hours', ['h']],
  ['minutes', ['min', 'arcmin']],
  ['days', ['d']],
  ['Kelvin', ['K']],
  ['amp', ['A']],
  ['amps', ['A']],
]);

const usual = new Set(usualSymbols);

let spelledAlike: Map<string, string[]> | undefined;

/** Symbols that differ from the text in the case of letters alone, the most alike first. */
function otherCase(text: string): readonly string[] {
  if (!spelledAlike) {
    spelledAlike = new Map();
    for (const [spelling, symbol] of allSpellings()) {
      const key = spelling.toLowerCase();
      const known = spelledAlike.get(key);
      if (!known) spelledAlike.set(key, [symbol]);
      else if (!known.includes(symbol)) known.push(symbol);
    }
  }
  const rank = (symbol: string) =>
    (usual.has(symbol) ? 0 : 10) + [...symbol].filter((char, place) => char !== text[place]).length;
  const all = spelledAlike.get(text.toLowerCase()) ?? [];
  return [...all].sort((a, b) => rank(a) - rank(b));
}

/** "Nm" → "N·m", "kWh" → "kW·h": two symbols that stand together without a sign, each with a usual spelling. */
function runTogether(text: string): readonly string[] {
  const pairs: string[] = [];
  for (let cut = 1; cut < text.length; cut++) {
    const [left, right] = [symbolOfText(text.slice(0, cut)), symbolOfText(text.slice(cut))];
    // kN·N is nobody's unit: a letter too many is likelier than a force times a force.
    if (left && right && equalD(left.dimension, right.dimension)) continue;
    if (left && right && usual.has(left.text) && usual.has(right.text)) pairs.push(`${left.text}·${right.text}`);
  }
  return pairs;
}

const rowByName = new Map(unitRows.map((row) => [row.name.toLowerCase(), row]));

function byName(text: string): readonly string[] {
  const word = text.toLowerCase().replace('meter', 'metre').replace('liter', 'litre').replace('gramme', 'gram');
  const singular = word.replace(/(?<=[a-z]{3})s$/, '');
  for (const each of [word, singular]) {
    const row = rowByName.get(each);
    if (row) return [row.symbol];
    const prefix = prefixes.find(({ name }) => each.startsWith(name) && each.length > name.length);
    const unit = prefix && rowByName.get(each.slice(prefix.name.length));
    const symbol = unit && symbolOfText(prefix.symbol + unit.symbol);
    if (symbol) return [symbol.text];
  }
  return [];
}

/** Changed, missing, added or swapped letters between two texts; limit + 1 where they are more. */
function editDistance(a: string, b: string, limit: number): number {
  let same = 0;
  while (same < a.length && same < b.length && a[same] === b[same]) same++;
  const [left, right] = [a.slice(same), b.slice(same)];
  if (left === '' || right === '') return Math.min(left.length + right.length, limit + 1);
  if (limit === 0) return 1;
  const rest = (x: string, y: string) => 1 + editDistance(x, y, limit - 1);
  const swapped = left[0] === right[1] && left[1] === right[0] && left.length > 1;
  return Math.min(
    rest(left.slice(1), right.slice(1)),
    rest(left.slice(1), right),
    rest(left, right.slice(1)),
    swapped ? rest(left.slice(2), right.slice(2)) : limit + 1,
  );
}

function byLetters(text: string): readonly string[] {
  const limit = text.length <= 5 ? 1 : 2;
  const lower = text.toLowerCase();
  const ranked: { symbol: string; distance: number }[] = [];
  for (const symbol of usualSymbols) {
    if (symbol.length < 2 || Math.abs(symbol.length - text.length) > limit) continue;
    const distance = editDistance(lower, symbol.toLowerCase(), limit);
    // Of two equally near, the one with the same capitals; of two such, the one that stands first in the catalogue.
    if (distance <= limit) ranked.push({ symbol, distance: distance + editDistance(text, symbol, limit) / 10 });
  }
  return ranked.sort((a, b) => a.distance - b.distance).map(({ symbol }) => symbol);
}

/** The nearest known units to a text that is not one; [] where none is near. */
export function nearestUnits(text: string): string[] {
  const word = text.trim();
  if (word === '' || word.length > longestCompared) return [];
  const written = instead.get(word) ?? instead.get(word.toLowerCase());
  if (written) return [...written];
  const prefixed = misusedPrefix(word)?.instead ?? [];
  const alike = otherCase(word);
  const inUse = alike.filter((symbol) => usual.has(symbol));
  for (const found of [[...prefixed, ...inUse], runTogether(word), byName(word), alike]) {
    if (found.length > 0) return [...new Set(found)].slice(0, most);
  }
  return [...new Set(byLetters(word))].slice(0, most);
}

const annotation = /^(.+?)_[\p{L}\d]+$/u;
const attachedAnnotation = /^(.+?)(?:el|th|mech|rms|eff|max|min|DC|AC|pk|abs|g|a)$/u;
const pressureAnnotation = /^((?:m|k)?bar|psi|[kM]?Pa)(?:g|a|abs|gauge)$/;

/** The unit before what was added to it: "kW" of "kW_el"; undefined where nothing was. */
function annotated(text: string): string | undefined {
  const base = annotation.exec(text)?.[1];
  if (base !== undefined) return symbolOfText(base)?.text;
  const pressure = pressureAnnotation.exec(text)?.[1];
  if (pressure !== undefined) return pressure;
  const attached = /^k?[VAW]/.test(text) || /^M?W/.test(text) ? attachedAnnotation.exec(text)?.[1] : undefined;
  return attached === undefined || symbolOfText(text) ? undefined : symbolOfText(attached)?.text;
}

/** Words that people set behind a unit. */
const annotations = new Set([
  'el',
  'th',
  'mech',
  'rms',
  'eff',
  'DC',
  'AC',
  'pk',
  'abs',
  'gauge',
  'nom',
  'peak',
  'dry',
  'wet',
  'net',
  'gross',
]);

/** The failure for a symbol at [from, to) of a unit text. */
export function unknownSymbol(word: string, from: number, to: number, text: string): Failure {
  const before = text.slice(0, from).trim();
  if (annotations.has(word) && before !== '' && text.slice(to).trim() === '') {
    const message = `${quote(word)} is no unit: what it tells belongs to the name of the quantity. Write ${before}.`;
    return fail('unit-annotation', message, text.slice(0, from).trimEnd().length, to, ['']);
  }
  const base = annotated(word);
  if (base !== undefined) {
    const message = `${quote(word)} adds something to the unit ${base}: what it tells belongs to the name of the quantity. Write ${base}.`;
    return fail('unit-annotation', message, from, to, [base]);
  }
  const power = /^(sq|square|cu|cub|cubic)$/.exec(word);
  const raised = power && /^\s*\.?\s*([\p{L}]+)/u.exec(text.slice(to));
  const powered = raised && symbolOfText(raised[1] ?? '');
  if (raised && powered) {
    const fix = `${powered.text}${word.startsWith('s') ? '²' : '³'}`;
    return fail('unknown-unit', `${quote(word + raised[0])} is written as ${fix}.`, from, to + raised[0].length, [fix]);
  }
  const prefix = misusedPrefix(word);
  const written = instead.has(word);
  if (prefix && !written) {
    const advice = prefix.instead.length > 0 ? `: write ${either(prefix.instead)}` : '';
    return fail('unit-prefix', `In the unit ${quote(text)}, ${prefix.message}${advice}.`, from, to, prefix.instead);
  }
  const near = nearestUnits(word);
  const inside = word === text.trim() ? '' : ` in ${quote(text)}`;
  if (near.length > 0)
    return fail('unknown-unit', `The unit ${quote(word)}${inside} is not known: write ${either(near)}.`, from, to, near);
  const message = `The unit ${quote(word)}${inside} is not known, and none is near to it: write a unit such as N, mm, kW, lbf or psi.`;
  return fail('unknown-unit', message, from, to);
}
