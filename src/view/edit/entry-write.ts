// The line that a cell could have been typed as: what copying, pasting and typing share.
//
// 1. What writeEntry writes, readEntry reads back as the same cell, in any sheet of the same decimal sign.
// 2. What a line cannot hold (values by case, basis and range, a second paragraph, rows of a table, drawings) has no line: undefined.
// Not here: the forms of lines (entry.ts).

import { canonicalName, isName, parseFormula, tokenize } from '../../formula/index.ts';
import { readUnit, readValue } from '../../quantity/index.ts';
import type { Cell } from '../../sheet/index.ts';
import { type CellDraft, openSigns, relations, roleWords, tableLine, type Words, wordsInARow } from './entry.ts';

/** The line that reads back as this cell; undefined where a line cannot hold all of it. */
export function writeEntry(cell: Cell | CellDraft, decimalSign: '.' | ',' = '.'): string | undefined {
  const line = writeKind(cell, decimalSign);
  return line === undefined || /[\n\r\u2028\u2029]/u.test(line) || line !== line.trim() ? undefined : line;
}

function writeKind(cell: Cell | CellDraft, decimalSign: '.' | ','): string | undefined {
  switch (cell.kind) {
    case 'heading':
      return isPlain(cell.text) ? `${'#'.repeat(cell.level ?? 1)} ${cell.text}` : undefined;
    case 'note':
      return writeNote(cell);
    case 'given':
      return writeGiven(cell, decimalSign);
    case 'derived':
      if (!isFormulaText(cell.formula)) return undefined;
      // A text that begins as a value does could be taken for one.
      return withHead(cell, `${likeAValue.test(cell.formula) ? ':=' : '='} ${cell.formula}`);
    case 'criterion': {
      const { left, relation, right, justification, ifNotMet } = cell;
      if (justification !== undefined || ifNotMet !== undefined || !isSide(left) || !isSide(right)) return undefined;
      return behind(`${left}${bracket(cell.unit)} ${relation} ${right}`, cell, cell.unit);
    }
    case 'sought': {
      const { where, between, instead } = cell;
      if (
        !isFormulaText(where) ||
        !isFormulaText(between) ||
        / between /u.test(` ${where} ${between}`) ||
        /^(where|instead)\b/u.test(where)
      )
        return undefined;
      if (instead !== undefined && (!isName(instead) || instead !== canonicalName(instead))) return undefined;
      return withHead(cell, `= ?${instead === undefined ? '' : ` instead ${instead}`} where ${where} between ${between}`);
    }
    case 'table':
      return cell.rows.length > 0 ? undefined : writeTable(cell);
    default:
      return undefined;
  }
}

const likeAValue = /^[(+\-−–\s]*[.,]?\d|±|\+\s?\/\s?[-−–]|^\?/u;
const columnText = /^[A-Za-z]\w*\.[^\d\s]\w*$/u;
const isPlain = (text: string) => text !== '' && text === text.trim();
const bracket = (unit: string | undefined) => (unit === undefined ? '' : ` [${unit}]`);
/** Nothing in it ends the brackets, or the line's first part. */
const isUnitText = (unit: string | undefined) =>
  unit === undefined || (isPlain(unit) && !/[[\]{};=<>≤≥⩽⩾"'“”„‟«»‘’‚‛]/u.test(unit) && isBalanced(unit));

const isBalanced = (text: string) => text.split('(').length === text.split(')').length && !/^[^(]*\)/u.test(text);

/** Title and source behind their signs; undefined where a title holds a `;` of its own. */
function behind(line: string, { title, source }: Words, unit?: string): string | undefined {
  if (!isUnitText(unit)) return undefined;
  if (title !== undefined && (!isPlain(title) || title.includes(';'))) return undefined;
  if (source !== undefined && !isPlain(source)) return undefined;
  if (title === undefined && source === undefined) return line;
  return `${line} ;${title === undefined ? '' : ` ${title}`}${source === undefined ? '' : ` ; ${source}`}`;
}

function withHead(
  cell: Words & { readonly name: string; readonly unit?: string },
  rest: string,
  isChoice = false,
): string | undefined {
  if (!isName(cell.name) || cell.name !== canonicalName(cell.name)) return undefined;
  // A unit that looks like the column of a table would make a choice of it.
  if (!isChoice && cell.unit !== undefined && /^[A-Za-z]\w*\.\D/u.test(cell.unit)) return undefined;
  return behind(`${cell.name}${bracket(cell.unit)} ${rest}`, cell, cell.unit);
}

/** Nothing in it ends the formula before its end. */
function isFormulaText(text: string): boolean {
  return isPlain(text) && tokenize(text).every((token) => token.kind !== 'unknown' && token.text !== ';');
}

function isSide(text: string): boolean {
  if (!isFormulaText(text) || /[[\]]/u.test(text) || !parseFormula(text).ok || wordsInARow(text)) return false;
  return openSigns(text, { from: 0, to: text.length }).every(
    (token) => !relations.has(token.text) && token.text !== '?' && token.text !== '=' && token.text !== ':=',
  );
}

function writeGiven(cell: Extract<Cell | CellDraft, { readonly kind: 'given' }>, decimalSign: '.' | ','): string | undefined {
  const { byCase, distribution, basis, range, toConfirm, carriedOver, choices, unit, value } = cell;
  if ([byCase, distribution, basis, range, toConfirm, carriedOver].some((more) => more !== undefined)) return undefined;
  if (choices !== undefined) {
    if (unit !== undefined || !columnText.test(choices) || readUnit(choices).ok) return undefined;
    if (!isPlain(value) || value.includes('"')) return undefined;
    return withHead({ ...cell, unit: choices }, `= "${value}"`, true);
  }
  if (value === '') return withHead(cell, '=');
  if (!isPlain(value) || value.includes(';') || !readValue(value, { decimalSign }).ok) return undefined;
  return withHead(cell, `= ${value}`);
}

function writeNote(cell: Extract<Cell | CellDraft, { readonly kind: 'note' }>): string | undefined {
  if (!isPlain(cell.text) || cell.source !== undefined || cell.toConfirm !== undefined) return undefined;
  if (cell.role !== undefined) return `${cell.role}: ${cell.text}`;
  const isOther = /[=<>≤≥⩽⩾]|^#/u.test(cell.text) || roleWords.test(cell.text) || tableLine.test(cell.text);
  return isOther ? `note: ${cell.text}` : cell.text;
}

function writeTable(cell: Extract<Cell | CellDraft, { readonly kind: 'table' }>): string | undefined {
  if (!/^[A-Za-z]\w*$/u.test(cell.name) || cell.columns.length === 0) return undefined;
  const columns: string[] = [];
  for (const { name, title, unit } of cell.columns) {
    if (title !== undefined || !isPlain(name) || /[[\],;"'“”„‟«»‘’‚‛]/u.test(name) || !isUnitText(unit) || unit?.includes(','))
      return undefined;
    columns.push(`${name}${bracket(unit)}`);
  }
  return behind(`table ${cell.name}: ${columns.join(', ')}`, cell);
}
