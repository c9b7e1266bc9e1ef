// What can be done with the chosen line, as words at the line itself: for the pointer, for a finger, and for who does not know the keys.
//
// 1. Each button asks by the event `line-command`; the paper does it as it does it for the key.
// 2. Left and right move between the words, Escape leads back to the line.
// Not here: what the commands do (line-commands.ts), keys (keys.ts).

import { html, nothing, type TemplateResult } from 'lit';
import type { LineCommand } from './line-commands.ts';

interface Action {
  readonly command: LineCommand;
  readonly word: string;
  readonly keys: string;
}

const actions: readonly (readonly Action[])[] = [
  [
    { command: 'edit', word: 'Edit', keys: 'Enter' },
    { command: 'edit-all', word: 'All fields', keys: 'Shift+Enter' },
    { command: 'line-below', word: 'New line below', keys: 'Alt+Enter' },
    { command: 'put-in', word: 'Put in a template …', keys: 'A block behind this section' },
  ],
  [
    { command: 'extend-up', word: 'Choose the line above too', keys: 'Shift+↑' },
    { command: 'extend-down', word: 'Choose the line below too', keys: 'Shift+↓' },
  ],
  [
    { command: 'duplicate', word: 'Once more', keys: 'Ctrl+Shift+Enter' },
    { command: 'copy', word: 'Copy', keys: 'Ctrl+C' },
    { command: 'cut', word: 'Cut', keys: 'Ctrl+X' },
    { command: 'paste', word: 'Paste below', keys: 'Ctrl+V' },
  ],
  [
    { command: 'move-up', word: 'Move up', keys: 'Alt+↑' },
    { command: 'move-down', word: 'Move down', keys: 'Alt+↓' },
    { command: 'remove', word: 'Remove', keys: 'Ctrl+Delete' },
  ],
];

const ask = (event: Event, command: LineCommand) =>
  event.target?.dispatchEvent(new CustomEvent('line-command', { detail: command, bubbles: true }));

/** The words that stand at the chosen line all the time. */
export function lineWords(open: boolean): TemplateResult {
  return html`<span class="line-words"><button type="button" class="word edit-all" title="All fields of the line: Shift+Enter" @click=${(event: Event) => ask(event, 'edit-all')}>All fields</button>
    <button type="button" class="word" aria-expanded=${open} title="Copy, move, remove and more: Shift+F10" @click=${(event: Event) => ask(event, 'line-menu')}>Line …</button></span>`;
}

/** `count`: how many lines are chosen. */
export function lineActions(count: number): TemplateResult {
  const onKey = (event: KeyboardEvent) => {
    const buttons = [...(event.currentTarget as Element).querySelectorAll('button')];
    const at = buttons.indexOf(event.target as HTMLButtonElement);
    const step =
      event.key === 'ArrowRight' || event.key === 'ArrowDown' ? 1 : event.key === 'ArrowLeft' || event.key === 'ArrowUp' ? -1 : 0;
    if (event.key !== 'Escape' && event.key !== 'Tab') event.stopPropagation();
    if (step === 0 || event.ctrlKey || event.metaKey || event.altKey) return;
    event.preventDefault();
    buttons[(at + step + buttons.length) % buttons.length]?.focus();
  };
  return html`<div class="line-actions" role="toolbar" aria-label=${count > 1 ? `The ${count} chosen lines` : 'The chosen line'} @keydown=${onKey}>
    ${count > 1 ? html`<span class="count">${count} lines:</span>` : nothing}${actions.map(
      (group) =>
        html`<span class="group">${group.map(({ command, word, keys }) => html`<button type="button" class="word" title=${keys} data-command=${command} @click=${(event: Event) => ask(event, command)}>${word}</button>`)}</span>`,
    )}</div>`;
}

/** Words about what was done, under the line where it was done. */
export const toldRow = (words: string) =>
  html`<div role="row" class="row told"><div role="gridcell" class="source"></div><div role="gridcell" class="calculation across"><p class="remark">${words}</p></div></div>`;
