// The keys of the page: one table that binds them and lists them.
//
// 1. In the rows the keys of an ARIA grid hold; while something is typed, only Enter and Escape mean anything of ours.
// 2. `Mod` is Control, and Command where the keyboard has it.
// Not here: what a command does (paper.ts, page.ts).

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
  | 'edit'
  | 'edit-all'
  | 'new-line'
  | 'remove'
  | 'move-up'
  | 'move-down'
  | 'origin'
  | 'use'
  | 'back'
  | 'undo'
  | 'redo';

interface Binding {
  readonly keys: readonly string[];
  readonly command: Command;
}

const bindings: readonly Binding[] = [
  { keys: ['ArrowLeft'], command: 'left' },
  { keys: ['ArrowRight'], command: 'right' },
  { keys: ['ArrowUp'], command: 'up' },
  { keys: ['ArrowDown'], command: 'down' },
  { keys: ['Home'], command: 'row-start' },
  { keys: ['End'], command: 'row-end' },
  { keys: ['Mod+Home'], command: 'sheet-start' },
  { keys: ['Mod+End'], command: 'sheet-end' },
  { keys: ['PageUp'], command: 'page-up' },
  { keys: ['PageDown'], command: 'page-down' },
  { keys: ['Enter', 'F2'], command: 'edit' },
  { keys: ['Shift+Enter'], command: 'edit-all' },
  { keys: ['Mod+Enter'], command: 'new-line' },
  { keys: ['Mod+Delete'], command: 'remove' },
  { keys: ['Alt+ArrowUp'], command: 'move-up' },
  { keys: ['Alt+ArrowDown'], command: 'move-down' },
  { keys: ['<'], command: 'origin' },
  { keys: ['>'], command: 'use' },
  { keys: ['Backspace'], command: 'back' },
  { keys: ['Mod+z'], command: 'undo' },
  { keys: ['Mod+y', 'Mod+Shift+z'], command: 'redo' },
];

/** The list for the reader: keys, what they do. */
export const keyList: readonly (readonly [keys: string, does: string])[] = [
  ['arrows, Home, End', 'move in the sheet'],
  ['Enter or F2', 'type a value, a formula or a source; any character begins a new value'],
  ['Enter, Escape', 'while typing: keep it, take it back'],
  ['Shift+Enter', 'everything of the line as a form'],
  ['Ctrl+Enter', 'a new line at the foot of the section'],
  ['Ctrl+Delete', 'remove the line'],
  ['Alt+↑, Alt+↓', 'move the line up, down'],
  ['<', 'to the origin of the line'],
  ['>', 'to the use of the line'],
  ['Backspace', 'back to the line before'],
  ['Ctrl+Z, Ctrl+Y', 'undo, redo'],
];

export interface KeyPress {
  readonly key: string;
  readonly ctrlKey: boolean;
  readonly metaKey: boolean;
  readonly altKey: boolean;
  readonly shiftKey: boolean;
}

const byKey = new Map(bindings.flatMap(({ keys, command }) => keys.map((key) => [key, command] as const)));

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
