// Quantities and tables get other names: their cells, and every place that names them.
//
// 1. Formulas are rewritten by their tokens: `F_1` in `F_10`, in a quoted literal or as a table or column is left alone.
// 2. A name is found in whatever alphabet it was typed (μ_1, mu_1) and replaced by the new one as typed.
// 3. Everything else in a text stays as it stands, spaces included.
// 4. All names of a renaming are replaced at once: two may change places.
// Not here: whether the new name may be taken (nameFault says so; edit.ts does what it is told).

import { canonicalName, isName, reserved, tokenize } from '../formula/index.ts';
import type { Cell, NoteCell, Sheet } from './document.ts';
import { liveNames } from './reading.ts';

/** What keeps a name from being that of a quantity of the sheet, in words; `own`: the cell that is to have it. */
export function nameFault(sheet: Sheet, typed: string, own?: string): string | undefined {
  const name = canonicalName(typed.trim());
  if (reserved.has(name)) return `“${name}” has a fixed meaning in formulas; take another name, as in ${name}_1`;
  if (!isName(name)) return `“${typed.slice(0, 60)}” is no name; a name is a letter, then letters, digits or _, as in F_1`;
  for (const cell of sheet.cells) {
    if (cell.id !== own && definesName(cell) && canonicalName(cell.name) === name)
      return `${name} is already defined; names are unique in a sheet`;
  }
  return undefined;
}

type Naming = Extract<Cell, { readonly kind: 'given' | 'derived' | 'sought' }>;

function definesName(cell: Cell): cell is Naming {
  return cell.kind === 'given' || cell.kind === 'derived' || cell.kind === 'sought';
}

/** What quantities and tables are called instead; undefined where a name stays. Quantities are asked for by canonical name. */
export interface Renaming {
  quantity(name: string): string | undefined;
  table(name: string): string | undefined;
}

/** The cells that change when quantity `from` becomes `to`. */
export function renamedCells(sheet: Sheet, from: string, to: string): Cell[] {
  const name = canonicalName(from);
  const renaming: Renaming = { quantity: (known) => (known === name ? to : undefined), table: () => undefined };
  const cells: Cell[] = [];
  for (const cell of sheet.cells) {
    const next = renamedCell(cell, renaming);
    if (next !== cell) cells.push(next);
  }
  return cells;
}

/** The cell with all names replaced at once; itself where nothing is called otherwise. */
export function renamedCell(cell: Cell, renaming: Renaming): Cell {
  const inText = (text: string): string => renameInFormula(text, renaming);
  const whole = (text: string): string => renaming.quantity(canonicalName(text.trim())) ?? text;
  switch (cell.kind) {
    case 'given':
      return changed(cell, {
        name: whole(cell.name),
        ...(cell.choices === undefined ? {} : { choices: renameInChoices(cell.choices, renaming) }),
      });
    case 'derived':
      return changed(cell, { name: whole(cell.name), formula: inText(cell.formula) });
    case 'criterion':
      return changed(cell, { left: inText(cell.left), right: inText(cell.right) });
    case 'sought':
      return changed(cell, {
        name: whole(cell.name),
        where: inText(cell.where),
        ...(cell.instead === undefined ? {} : { instead: whole(cell.instead) }),
      });
    case 'table':
      return changed(cell, { name: renaming.table(cell.name) ?? cell.name });
    case 'note':
      return changed(cell, { text: renameInNote(cell, renaming) });
    case 'drawing': {
      const uses = Object.entries(cell.uses).map(([part, name]) => [part, whole(name)] as const);
      return uses.every(([part, name]) => cell.uses[part] === name) ? cell : { ...cell, uses: Object.fromEntries(uses) };
    }
    case 'chart': {
      const show = cell.show.map(whole);
      const next = changed(cell, { vary: whole(cell.vary) });
      return show.every((name, i) => name === cell.show[i]) ? next : { ...next, show };
    }
    default:
      return cell;
  }
}

/** The cell itself where no text differs. */
function changed<Kind extends Cell>(cell: Kind, texts: Partial<Record<keyof Kind, string>>): Kind {
  const differs = Object.entries(texts).some(([key, text]) => cell[key as keyof Kind] !== text);
  return differs ? { ...cell, ...texts } : cell;
}

function renameInChoices(choices: string, renaming: Renaming): string {
  const dot = choices.indexOf('.');
  const table = dot > 0 ? renaming.table(choices.slice(0, dot)) : undefined;
  return table === undefined ? choices : table + choices.slice(dot);
}

/** Arguments of a table function that are no quantities: the table, then the column. */
const namesTable = 2;

function renameInFormula(text: string, renaming: Renaming): string {
  const tokens = tokenize(text);
  let result = '';
  let copied = 0;
  // Open brackets; for those of a table function, how many arguments still name a table or a column.
  const brackets: number[] = [];
  for (const [i, token] of tokens.entries()) {
    if (token.kind === 'open') {
      const before = tokens[i - 1];
      brackets.push(before?.kind === 'name' && (before.text === 'entry' || before.text === 'interpolate') ? namesTable : 0);
    } else if (token.kind === 'close') {
      brackets.pop();
    } else if (token.kind === 'comma') {
      const left = brackets.pop();
      if (left !== undefined) brackets.push(Math.max(0, left - 1));
    } else if (token.kind === 'name') {
      const left = brackets.at(-1) ?? 0;
      const to = left === 0 ? renaming.quantity(token.text) : left === namesTable ? renaming.table(token.text) : undefined;
      if (to === undefined) continue;
      result += text.slice(copied, token.from) + to;
      copied = token.to;
    }
  }
  return result + text.slice(copied);
}

function renameInNote(cell: NoteCell, renaming: Renaming): string {
  let result = '';
  let copied = 0;
  for (const live of liveNames(cell)) {
    const to = renaming.quantity(live.name);
    if (to === undefined) continue;
    result += `${cell.text.slice(copied, live.from)}{${to}}`;
    copied = live.to;
  }
  return result + cell.text.slice(copied);
}
