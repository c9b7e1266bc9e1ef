// Help at the caret: what could be written here, each with what it is.
//
// 1. In a formula: quantities with title and printed value, functions with their arguments, π and e; inside quotation marks units, or
//    the texts that can stand there; inside interpolate and entry the tables and columns of the sheet.
// 2. Found by the beginning of a name, in whatever alphabet it is typed, then by the words of its title. Order: nearest first.
// 3. Nothing is offered where nothing was begun, unless it is asked for.
// Not here: what is wrong with the text (src/sheet/draft.ts), the list on the screen (code-mirror.ts, suggest.ts).

import { canonicalName, functionNames, plainName, type Token, tokenize } from '../../formula/index.ts';
import { equalD, kindName, printValue, type Unit, unitNames, unitOf } from '../../quantity/index.ts';
import { type Calculation, type QuantityState, quantityNames, tableNames } from '../../sheet/index.ts';
import type { Entry, PartRole } from './entry.ts';
import { printSi } from './print-live.ts';

export type ProposalKind = 'quantity' | 'function' | 'constant' | 'unit' | 'table' | 'column' | 'text';

export interface Proposal {
  readonly kind: ProposalKind;
  /** As shown, and as written where `write` is absent. */
  readonly label: string;
  readonly write?: string;
  /** Place of the caret within what is written; its end where absent. */
  readonly caret?: number;
  /** 'Belt speed · 15.18 m/s' */
  readonly detail: string;
}

export interface Proposals {
  /** The span that a proposal replaces. */
  readonly from: number;
  readonly to: number;
  readonly list: readonly Proposal[];
}

export const mostProposals = 60;

const functionHelp: ReadonlyMap<string, readonly [args: string, does: string]> = new Map([
  ['exp', ['x', 'e to the power x']],
  ['ln', ['x', 'natural logarithm']],
  ['log10', ['x', 'logarithm to base 10']],
  ['sqrt', ['x', 'square root']],
  ['cbrt', ['x', 'cube root']],
  ['abs', ['x', 'magnitude']],
  ['sign', ['x', '−1, 0 or 1']],
  ['min', ['a, b, …', 'the least']],
  ['max', ['a, b, …', 'the greatest']],
  ['sin', ['angle', 'sine']],
  ['cos', ['angle', 'cosine']],
  ['tan', ['angle', 'tangent']],
  ['asin', ['x', 'angle whose sine is x']],
  ['acos', ['x', 'angle whose cosine is x']],
  ['atan', ['x', 'angle whose tangent is x']],
  ['atan2', ['y, x', 'angle of the point (x, y)']],
  ['sinh', ['x', 'hyperbolic sine']],
  ['cosh', ['x', 'hyperbolic cosine']],
  ['tanh', ['x', 'hyperbolic tangent']],
  ['floor', ['x', 'next whole number below']],
  ['ceil', ['x', 'next whole number above']],
  ['round', ['x', 'nearest whole number, ties to even']],
  ['hypot', ['a, b, …', 'root of the sum of squares']],
  ['interpolate', ['table, column, x', 'between the rows of a table']],
  ['entry', ['table, column, key', 'a row of a table']],
]);

interface Where {
  readonly calculation: Calculation;
  /** The quantity that the line defines: not offered to itself. */
  readonly own?: string;
  readonly asked: boolean;
}

/** What could stand at the caret of a formula. `asked`: the list was called for, so that nothing need be begun. */
export function proposeInFormula(text: string, caret: number, where: Where): Proposals | undefined {
  const tokens = tokenize(text);
  const at = tokens.findIndex((token) => token.from < caret && caret <= token.to && token.to > token.from);
  const token = tokens[at];
  const call = tableCallAt(tokens, caret);
  const quote = quoteAt(text, token, caret);
  if (quote !== undefined) return inQuotes(text, quote, { ...where, call, before: tokens.slice(0, Math.max(at, 0)) });
  const isWord = token?.kind === 'name' || (token?.kind === 'operator' && /^[a-z]+$/u.test(token.text));
  // Within a number, or right behind a value, a name cannot begin.
  if (token !== undefined && !isWord && token.kind !== 'operator' && token.kind !== 'open' && token.kind !== 'comma')
    return undefined;
  const from = isWord ? token.from : caret;
  const to = isWord ? token.to : caret;
  const begun = text.slice(from, caret);
  if (call !== undefined && call.argument < 2) return inTable(call, begun, from, to, where.calculation);
  if (begun === '' && !where.asked) return undefined;
  const list = [...quantities(begun, where), ...functions(begun, text, to), ...constants(begun)];
  // What stands there complete need not be offered alone.
  if (!where.asked && list.length === 1 && list[0]?.label === canonicalName(begun) && list[0].write === undefined)
    return undefined;
  return found(from, to, list);
}

function found(from: number, to: number, list: readonly Proposal[]): Proposals | undefined {
  return list.length === 0 ? undefined : { from, to, list: list.slice(0, mostProposals) };
}

/** 0 begins so exactly, 1 but for capitals and `_`, 2 within the title or the name; undefined: not at all. */
function nearness(begun: string, name: string, title: string): number | undefined {
  if (begun === '') return 1;
  const typed = canonicalName(begun);
  if (name.startsWith(typed)) return 0;
  const fold = (text: string) => text.toLowerCase().replaceAll('_', '');
  const folded = fold(typed);
  if (folded !== '' && fold(name).startsWith(folded)) return 1;
  if (begun.length < 2) return undefined;
  const words = title.toLowerCase();
  return words.split(/[\s,;()/-]+/u).some((word) => word.startsWith(begun.toLowerCase())) ||
    (folded.length > 1 && fold(name).includes(folded))
    ? 2
    : undefined;
}

function quantities(begun: string, { calculation, own }: Where): Proposal[] {
  const self = own === undefined ? undefined : canonicalName(own);
  const ranked: { readonly rank: number; readonly proposal: Proposal }[] = [];
  for (const name of new Set(quantityNames(calculation))) {
    const state = name === self ? undefined : calculation.named(name);
    if (state === undefined) continue;
    const rank = nearness(begun, name, state.cell.title ?? '');
    if (rank === undefined) continue;
    ranked.push({ rank, proposal: { kind: 'quantity', label: name, detail: describe(state, calculation) } });
  }
  return ranked.sort((a, b) => a.rank - b.rank).map((one) => one.proposal);
}

/** 'Belt speed · 15.18 m/s'; by case where the values differ. */
export function describe(state: QuantityState, calculation: Calculation): string {
  const symbol = plainName(canonicalName(state.cell.name));
  const title = state.cell.title ?? (symbol === state.cell.name ? '' : symbol);
  return [title, describeValues(state, calculation)].filter((part) => part !== '').join(' · ');
}

/** '15.18 m/s', or one after the other where the cases differ. */
export function describeValues(state: QuantityState, calculation: Calculation): string {
  const values =
    state.kind === 'given' && state.texts !== undefined
      ? state.texts.map((text) => text ?? '')
      : [...state.si].map((si, index) => {
          const typed = state.kind === 'given' ? state.values[index] : undefined;
          return typed === undefined ? printSi(si, state.unit, calculation) : printValue(typed, calculation.style);
        });
  const different = [...new Set(values)];
  return different.length > 3 ? `${different.slice(0, 3).join(', ')} …` : different.join(', ');
}

function functions(begun: string, text: string, to: number): Proposal[] {
  if (begun === '') return [];
  const opened = text.slice(to).trimStart().startsWith('(');
  return [...functionNames, 'interpolate', 'entry']
    .filter((name) => name.startsWith(begun.toLowerCase()))
    .map((name) => {
      const [args, does] = functionHelp.get(name) ?? ['x', ''];
      const written = opened ? {} : { write: `${name}()`, caret: name.length + 1 };
      return { kind: 'function' as const, label: name, ...written, detail: `${name}(${args}) · ${does}` };
    });
}

function constants(begun: string): Proposal[] {
  const list: Proposal[] = [{ kind: 'constant', label: 'pi', detail: 'π = 3.141 592 65…' }];
  return begun === '' ? list : list.filter(({ label }) => label.startsWith(canonicalName(begun).toLowerCase()));
}

interface TableCall {
  readonly name: string;
  /** 0 table, 1 column, 2 key. */
  readonly argument: number;
  readonly table: string;
}

/** The interpolate or entry whose arguments the caret is among. */
function tableCallAt(tokens: readonly Token[], caret: number): TableCall | undefined {
  const open: { readonly name: string; argument: number; table: string }[] = [];
  for (const [index, token] of tokens.entries()) {
    if (token.from >= caret) break;
    const before = tokens[index - 1];
    if (token.kind === 'open') open.push({ name: before?.kind === 'name' ? before.text : '', argument: 0, table: '' });
    else if (token.kind === 'close' && token.to <= caret) open.pop();
    const call = open.at(-1);
    if (call === undefined) continue;
    if (token.kind === 'comma') call.argument += 1;
    else if (token.kind === 'name' && call.argument === 0) call.table = token.text;
  }
  const call = open.at(-1);
  return call !== undefined && (call.name === 'interpolate' || call.name === 'entry') ? call : undefined;
}

function inTable(call: TableCall, begun: string, from: number, to: number, calculation: Calculation): Proposals | undefined {
  const fits = (name: string) => name.toLowerCase().startsWith(begun.toLowerCase());
  if (call.argument === 0) {
    const names = [...tableNames(calculation)].filter(fits);
    const proposals = names.map((name): Proposal => {
      const cell = calculation.table(name)?.cell;
      const columns = cell?.columns.map((column) => column.name).join(', ') ?? '';
      return {
        kind: 'table',
        label: name,
        write: `${name}, `,
        detail: [cell?.title ?? '', columns].filter((part) => part !== '').join(' · '),
      };
    });
    return found(from, to, proposals);
  }
  const columns = calculation.table(call.table)?.cell.columns ?? [];
  return found(
    from,
    to,
    columns
      .filter(({ name }) => fits(name))
      .map(({ name, title, unit }) => ({
        kind: 'column',
        label: name,
        write: `${name}, `,
        detail: [title ?? '', unit ?? 'text'].filter((part) => part !== '').join(' · '),
      })),
  );
}

/** Start of the quoted text at the caret, where the caret stands within its marks. */
function quoteAt(
  text: string,
  token: Token | undefined,
  caret: number,
): { readonly from: number; readonly to: number } | undefined {
  if (token === undefined || !/["“”„‟«»'‘’‚‛]/u.test(text[token.from] ?? '')) return undefined;
  if (token.kind === 'string' && caret < token.to) return { from: token.from + 1, to: token.to - 1 };
  return token.kind === 'unknown' && caret > token.from ? { from: token.from + 1, to: token.to } : undefined;
}

function inQuotes(
  text: string,
  { from, to }: { readonly from: number; readonly to: number },
  { calculation, call, before, asked }: Where & { readonly call: TableCall | undefined; readonly before: readonly Token[] },
): Proposals | undefined {
  const inside = text.slice(from, to);
  const texts = call?.argument === 2 ? textsOf(calculation, call.table) : comparedTexts(calculation, before);
  if (texts !== undefined) {
    const close = /["“”„‟«»'‘’‚‛]/u.test(text[to] ?? '') ? '' : '"';
    const list = [...new Set(texts)]
      .filter((one) => one.toLowerCase().includes(inside.toLowerCase()) || asked)
      .map((one): Proposal => ({ kind: 'text', label: one, write: one + close, detail: '' }));
    return found(from, to, list);
  }
  const units = proposeUnits(inside, inside.length, { asked });
  return units && { from: units.from + from, to: units.to + from, list: units.list };
}

/** The keys of a table whose first column is text. */
function textsOf(calculation: Calculation, table: string): readonly string[] | undefined {
  const [keys] = calculation.table(table)?.data?.columns ?? [];
  return keys !== undefined && keys.numbers === undefined ? keys.texts : undefined;
}

/** `surface == "…"`: the texts that the choice on the other side can have. */
function comparedTexts(calculation: Calculation, before: readonly Token[]): readonly string[] | undefined {
  const [name, sign] = before.slice(-2);
  if (sign?.kind !== 'operator' || (sign.text !== '==' && sign.text !== '!=') || name?.kind !== 'name') return undefined;
  const type = calculation.named(name.text)?.type;
  if (type?.kind !== 'text') return undefined;
  return calculation.table(type.table)?.data?.columns.find((column) => column.name === type.column)?.texts;
}

interface UnitWish {
  readonly asked: boolean;
  /** Units of this one's kind come first, and alone where nothing is typed. */
  readonly like?: Unit;
  /** The whole text is a unit: a field of its own. */
  readonly alone?: boolean;
}

/** Units at the caret of a value (`200 m|`) or of a unit text. */
export function proposeUnits(text: string, caret: number, { asked, like, alone = false }: UnitWish): Proposals | undefined {
  const before = text.slice(0, caret);
  const begun = /[^\s\d.,+\-−±()]*(?:[*/·^][^\s]*)?$/u.exec(before)?.[0] ?? '';
  const from = caret - begun.length;
  if (!alone && !/\d/u.test(before.slice(0, from))) return undefined;
  if (begun === '' && !asked) return undefined;
  // A name of an exponent or a number's own e: `1e`.
  if (!alone && /\d$/u.test(before.slice(0, from)) && /^[eE]$/u.test(begun)) return undefined;
  const typed = typedUnit(begun);
  const hasSigns = /[*^]/u.test(typed);
  const ranked = allUnits().flatMap((unit) => {
    const isLike = like !== undefined && equalD(unit.dimension, like.dimension);
    if (typed === '') return like === undefined || isLike ? [{ unit, rank: 0 }] : [];
    const form = hasSigns ? unit.typed : unit.plain;
    if (form === typed) return [{ unit, rank: isLike ? 0 : 1 }];
    if (form.startsWith(typed)) return [{ unit, rank: isLike ? 2 : 3 }];
    return form.toLowerCase().startsWith(typed.toLowerCase()) ? [{ unit, rank: isLike ? 4 : 5 }] : [];
  });
  ranked.sort((a, b) => a.rank - b.rank);
  const space = !alone && /\d$/u.test(before.slice(0, from)) ? ' ' : '';
  const list = ranked.map(
    ({ unit }): Proposal => ({ kind: 'unit', label: unit.text, write: space + unit.text, detail: unit.kind }),
  );
  // What is complete already need not be offered alone.
  if (list.length === 1 && list[0]?.label === begun && !asked) return undefined;
  return found(from, caret, list);
}

interface KnownUnit {
  readonly text: string;
  /** As typed with its signs, and without them: `mm^2`, `mm2`. */
  readonly typed: string;
  readonly plain: string;
  readonly kind: string;
  readonly dimension: Unit['dimension'];
}
let known: readonly KnownUnit[] | undefined;

function allUnits(): readonly KnownUnit[] {
  known ??= [...new Set(unitNames())].map((text) => {
    const unit = unitOf(text);
    return {
      text,
      typed: typedUnit(text),
      plain: withoutSigns(typedUnit(text)),
      kind: kindName(unit.dimension, text),
      dimension: unit.dimension,
    };
  });
  return known;
}

const withoutSigns = (text: string) => text.replace(/[*^]/gu, '');

/** As one types it: mm^2 for mm², N*m for N·m, um for µm. */
function typedUnit(text: string): string {
  const raised = '⁰¹²³⁴⁵⁶⁷⁸⁹';
  return text
    .replace(/[⁰¹²³⁴⁵⁶⁷⁸⁹]+/gu, (signs) => `^${[...signs].map((sign) => raised.indexOf(sign)).join('')}`)
    .replace(/[µμ]/gu, 'u')
    .replace(/[·⋅]/gu, '*')
    .replace(/\s/gu, '');
}

/** What could stand at the caret of the empty line, by what the piece at the caret is. */
export function proposeInEntry(entry: Entry, caret: number, where: Where): Proposals | undefined {
  const part = entry.parts.findLast((one) => one.from <= caret && caret <= one.to && roles.has(one.role));
  if (part === undefined) return undefined;
  const text = entry.text.slice(part.from, part.to);
  const at = caret - part.from;
  const name = entry.draft !== undefined && 'name' in entry.draft ? entry.draft.name : undefined;
  const inside =
    part.role === 'value'
      ? proposeUnits(text, at, { asked: where.asked })
      : part.role === 'unit'
        ? proposeUnits(text, at, { asked: where.asked, alone: true })
        : proposeInFormula(text, at, { ...where, ...(name === undefined ? {} : { own: name }) });
  return inside && { from: inside.from + part.from, to: inside.to + part.from, list: inside.list };
}

const roles: ReadonlySet<PartRole> = new Set<PartRole>([
  'value',
  'unit',
  'formula',
  'left',
  'right',
  'where',
  'between',
  'instead',
]);
