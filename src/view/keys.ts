// The keys of the page: one table that binds them and lists them.
//
// 1. In the rows the keys of an ARIA grid hold; while something is typed, only Enter and Escape mean anything of ours.
// 2. `Mod` is Control, and Command where the keyboard has it.
// 3. Copy, cut and paste come as events of the clipboard, whatever keys the system has for them: listed here, bound by the browser.
// Not here: what a command does (paper.ts, page.ts), the list on the page (key-list.ts).

export type Command =
  | 'left'
  | 'right'
  | 'up'
  | 'down'
  | 'row-start'
  | 'row-end'
  | 'sheet-start'
  | 'sheet-end'
  | 'page-up'
  | 'page-down'
  | 'extend-up'
  | 'extend-down'
  | 'edit'
  | 'edit-all'
  | 'new-line'
  | 'line-below'
  | 'duplicate'
  | 'remove'
  | 'move-up'
  | 'move-down'
  | 'put-in'
  | 'origin'
  | 'use'
  | 'back'
  | 'line-menu'
  | 'keys'
  | 'undo'
  | 'redo';

export type KeyGroup = 'Moving' | 'Writing' | 'Lines' | 'Reading' | 'Sheet';

export interface KeyLine {
  readonly group: KeyGroup;
  /** How the keys are written for the reader. */
  readonly shown: string;
  readonly does: string;
  /** What is bound; empty where the browser or the field binds it. */
  readonly binds: readonly (readonly [command: Command, ...keys: string[]])[];
}

const line = (group: KeyGroup, shown: string, does: string, ...binds: KeyLine['binds'][number][]): KeyLine => ({
  group,
  shown,
  does,
  binds,
});

export const keyTable: readonly KeyLine[] = [
  line(
    'Moving',
    '← → ↑ ↓',
    'from cell to cell',
    ['left', 'ArrowLeft'],
    ['right', 'ArrowRight'],
    ['up', 'ArrowUp'],
    ['down', 'ArrowDown'],
  ),
  line('Moving', 'Home, End', 'to the beginning, the end of the line', ['row-start', 'Home'], ['row-end', 'End']),
  line('Moving', 'Page ↑, Page ↓', 'eight lines up, down', ['page-up', 'PageUp'], ['page-down', 'PageDown']),
  line('Moving', 'Ctrl+Home, Ctrl+End', 'to the first, the last line', ['sheet-start', 'Mod+Home'], ['sheet-end', 'Mod+End']),
  line('Writing', 'Enter or F2', 'type a value, a source, a formula, a heading, a note', ['edit', 'Enter', 'F2']),
  line('Writing', 'any character', 'a new value in the place of the old one'),
  line('Writing', 'Enter, Escape', 'while typing: keep it, take it back'),
  line('Writing', 'Shift+Enter', 'all fields of the line', ['edit-all', 'Shift+Enter']),
  line('Writing', 'Alt+Enter', 'a new line directly below; while typing: the first correction', [
    'line-below',
    'Alt+Enter',
    'Insert',
  ]),
  line('Writing', 'Ctrl+Enter', 'a new line at the foot of the section', ['new-line', 'Mod+Enter']),
  line(
    'Lines',
    'Shift+↑, Shift+↓',
    'choose more lines, or fewer',
    ['extend-up', 'Shift+ArrowUp'],
    ['extend-down', 'Shift+ArrowDown'],
  ),
  line('Lines', 'Ctrl+C, Ctrl+X, Ctrl+V', 'copy, cut, paste below'),
  line('Lines', 'Ctrl+Shift+Enter', 'once more below, under free names', ['duplicate', 'Mod+Shift+Enter']),
  line('Lines', 'Alt+↑, Alt+↓', 'move up, down', ['move-up', 'Alt+ArrowUp'], ['move-down', 'Alt+ArrowDown']),
  line('Lines', 'Ctrl+Delete', 'remove', ['remove', 'Mod+Delete', 'Mod+Backspace']),
  line('Lines', 'Shift+F10', 'the commands of the line', ['line-menu', 'Shift+F10', 'ContextMenu']),
  line('Reading', '<', 'to the origin of the line', ['origin', '<']),
  line('Reading', '>', 'to the use of the line', ['use', '>']),
  line('Reading', 'Backspace', 'back to the line before', ['back', 'Backspace']),
  line('Sheet', 'Ctrl+Z', 'undo', ['undo', 'Mod+z']),
  line('Sheet', 'Ctrl+Y', 'do again', ['redo', 'Mod+y', 'Mod+Shift+z']),
  line('Sheet', '?', 'this list', ['keys', '?']),
];

const byKey: ReadonlyMap<string, Command> = new Map(
  keyTable.flatMap(({ binds }) => binds.flatMap(([command, ...keys]) => keys.map((key) => [key, command] as const))),
);

export interface KeyPress {
  readonly key: string;
  readonly ctrlKey: boolean;
  readonly metaKey: boolean;
  readonly altKey: boolean;
  readonly shiftKey: boolean;
}

export function commandOf(press: KeyPress): Command | undefined {
  const mod = `${press.ctrlKey || press.metaKey ? 'Mod+' : ''}${press.altKey ? 'Alt+' : ''}`;
  const key = press.key.length === 1 ? press.key.toLowerCase() : press.key;
  // A sign needs no Shift of its own: where it stands on the keyboard is the keyboard's business.
  const shift = press.shiftKey && (mod !== '' || press.key.length > 1) ? 'Shift+' : '';
  return byKey.get(`${mod}${shift}${key}`);
}

/** A key that writes a character. */
export const isWriting = (press: KeyPress) =>
  [...press.key].length === 1 && !press.ctrlKey && !press.metaKey && !press.altKey && press.key !== ' ';
