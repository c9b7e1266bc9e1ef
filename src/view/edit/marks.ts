// The pieces of a typed line told apart, for the eye: names that the sheet knows and those it does not, functions, numbers, quotes.
//
// Pieces lie in the order of the text and do not overlap. Signs and parentheses carry no mark of their own.
// Not here: how a piece looks (code-theme.ts), what is wrong with the text.

import { functionNames, tokenize } from '../../formula/index.ts';
import type { Entry, PartRole } from './entry.ts';

export type MarkKind =
  | 'name'
  | 'unknown'
  | 'function'
  | 'constant'
  | 'number'
  | 'quoted'
  | 'table'
  | 'unit'
  | 'value'
  | 'title'
  | 'mark';

export interface Mark {
  readonly kind: MarkKind;
  readonly from: number;
  readonly to: number;
}

const functions: ReadonlySet<string> = new Set<string>([...functionNames, 'interpolate', 'entry']);

/** Marks of a formula; `knows`: whether a canonical name is that of a quantity. */
export function marksOfFormula(text: string, knows: (name: string) => boolean, by = 0): Mark[] {
  const marks: Mark[] = [];
  const open: { readonly table: boolean; argument: number }[] = [];
  const tokens = tokenize(text);
  for (const [index, token] of tokens.entries()) {
    const before = tokens[index - 1];
    const call = open.at(-1);
    const add = (kind: MarkKind) => marks.push({ kind, from: token.from + by, to: token.to + by });
    if (token.kind === 'open')
      open.push({ table: before?.kind === 'name' && (before.text === 'interpolate' || before.text === 'entry'), argument: 0 });
    else if (token.kind === 'close') open.pop();
    else if (token.kind === 'comma' && call !== undefined) call.argument += 1;
    else if (token.kind === 'number') add('number');
    else if (token.kind === 'string') add('quoted');
    else if (token.kind === 'unknown') add('unknown');
    else if (token.kind === 'name') {
      if (call?.table && call.argument < 2) add('table');
      else if (functions.has(token.text)) add('function');
      else if (token.text === 'pi' || token.text === 'e') add('constant');
      else add(knows(token.text) ? 'name' : 'unknown');
    }
  }
  return marks.filter(({ from, to }) => from < to);
}

const plainRoles: ReadonlyMap<PartRole, MarkKind> = new Map<PartRole, MarkKind>([
  ['unit', 'unit'],
  ['value', 'value'],
  ['between', 'value'],
  ['title', 'title'],
  ['source', 'title'],
  ['instead', 'name'],
]);

/** Marks of the empty line: its formulas piece by piece, the rest whole. */
export function marksOfEntry(entry: Entry, knows: (name: string) => boolean): Mark[] {
  return entry.parts.flatMap(({ role, from, to }): Mark[] => {
    if (role === 'formula' || role === 'left' || role === 'right' || role === 'where')
      return marksOfFormula(entry.text.slice(from, to), knows, from);
    const kind = plainRoles.get(role);
    return kind === undefined || from === to ? [] : [{ kind, from, to }];
  });
}
