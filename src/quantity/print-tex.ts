// The same numerals, units and quantities as print.ts, for the typesetting library.
//
// Units stand upright in one \mathrm; digit groups and the unit are set off by thin spaces. µ and ‰ stand in \text: the library
// has only an italic \mu and takes the upright sign from the font of the page (strict mode must allow 'unknownSymbol').
// Not here: quantity symbols and formulas.

import type { Numeral } from './numeral.ts';
import { firstPlace, isZeroNumeral, partsOf, scientificPartsOf } from './numeral.ts';
import type { Style } from './print.ts';
import { groupDecimals, groupWhole, isScientific, standsClose } from './print.ts';
import type { Unit } from './unit.ts';

const thin = '\\,';

export function texNumeral(a: Numeral, style: Style): string {
  const scientific = isScientific(a);
  const { whole, decimals } = scientific
    ? scientificPartsOf(a)
    : partsOf(isZeroNumeral(a) && a.exponent > 0 ? { ...a, exponent: 0 } : a);
  const mark = style.decimalSign === ',' ? '{,}' : '.';
  const fraction = decimals === '' ? '' : mark + groupDecimals(decimals, thin);
  const text = `${a.negative ? '-' : ''}${groupWhole(whole, thin)}${fraction}`;
  return scientific ? `${text}\\times 10^{${firstPlace(a)}}` : text;
}

const lowered: ReadonlyMap<string, string> = new Map([...'⁻⁰¹²³⁴⁵⁶⁷⁸⁹'].map((char, place) => [char, '-0123456789'[place] ?? '']));
const pieces = /[⁻⁰¹²³⁴⁵⁶⁷⁸⁹]+|\^\([^)]*\)|_[A-Za-z]+|\d|[°′″%‰·µΩÅ]|[^⁻⁰¹²³⁴⁵⁶⁷⁸⁹^_\d°′″%‰·µΩÅ]+/g;
const signs: ReadonlyMap<string, string> = new Map([
  ['°', '{}^{\\circ}'],
  ['′', '{}^{\\prime}'],
  ['″', '{}^{\\prime\\prime}'],
  ['%', '\\%'],
  ['‰', '\\text{‰}'],
  ['·', '{\\cdot}'],
  ['µ', '\\text{µ}'],
  ['Ω', '\\Omega '],
  ['Å', '\\text{Å}'],
]);

/** '\mathrm{kg/m}', '\mathrm{W/(m^{2}{\cdot}K)}', '{}^{\circ}'. */
export function texUnit(unit: Unit): string {
  const single = signs.get(unit.text);
  if (single !== undefined) return single;
  const inner = unit.text.replace(pieces, (piece) => {
    const sign = signs.get(piece);
    if (sign !== undefined) return sign;
    if (lowered.has(piece[0] ?? '')) return `^{${[...piece].map((char) => lowered.get(char)).join('')}}`;
    if (piece.startsWith('^(')) return `^{${piece.slice(2, -1)}}`;
    if (piece.startsWith('_')) return `_{${piece.slice(1)}}`;
    // The 2 of inH2O is a subscript; the 1 of 1/s stands before the solidus.
    return /^\d$/.test(piece) && unit.text !== '1' && !unit.text.startsWith(`${piece}/`) ? `_{${piece}}` : piece;
  });
  return `\\mathrm{${inner}}`;
}

export function texQuantity(a: Numeral, unit: Unit, style: Style): string {
  const number = texNumeral(a, style);
  if (unit.text === '1') return number;
  return `${number}${standsClose(unit) ? '' : thin}${texUnit(unit)}`;
}
