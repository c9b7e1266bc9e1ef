// The quiet line under what is typed: what is wrong and what would put it right, or else that all is well.
//
// 1. One error at a time, the first of the text; warnings where there is no error.
// 2. Corrections are buttons in the order of the page: Tab reaches them, and the arrow down from the line. The arrows move between
//    them, the arrow up from the first and Escape lead back.
// Not here: what a correction does to the text (the owner applies it).

import { html, nothing, type TemplateResult } from 'lit';
import type { Fix, Problem } from '../../quantity/index.ts';

export interface ProblemLine {
  readonly problems: readonly Problem[];
  /** What stands there where there is no error. */
  readonly good: TemplateResult | string;
  readonly apply: (fix: Fix) => void;
  /** Back to the field. */
  readonly back: () => void;
  readonly id?: string;
}

export function problemLine({ problems, good, apply, back, id }: ProblemLine): TemplateResult {
  const [error] = problems.filter((problem) => problem.severity === 'error');
  const told = error === undefined ? problems : [error];
  return html`<div class="edit-note" id=${id ?? nothing} @keydown=${(event: KeyboardEvent) => keys(event, back)}>
    <div class="edit-words" aria-live="polite">${error === undefined ? html`<span class="edit-good">${good}</span>` : nothing}${told.map((problem) => sentence(problem))}</div>
    ${told.flatMap((problem) => problem.fixes ?? []).length === 0 ? nothing : fixes(told, apply)}
  </div>`;
}

const sentence = ({ severity, message }: Problem) =>
  html`<p class="problem ${severity}"><b>${severity === 'error' ? 'Error' : 'Warning'}</b>: ${message}</p>`;

function fixes(told: readonly Problem[], apply: (fix: Fix) => void) {
  const all = told.flatMap((problem) => problem.fixes ?? []);
  return html`<p class="edit-fixes"><span>Correction${all.length > 1 ? 's' : ''}:</span> ${all.map(
    (fix, index) =>
      html`<button type="button" class="word" @click=${() => apply(fix)}>${fix.label}</button>${index === 0 ? html` <kbd>Alt+Enter</kbd>` : nothing} `,
  )}</p>`;
}

/** Puts the focus on the first correction; false where there is none. */
export function focusFixes(owner: HTMLElement): boolean {
  const button = owner.querySelector<HTMLElement>('.edit-fixes button');
  button?.focus();
  return button !== null;
}

function keys(event: KeyboardEvent, back: () => void) {
  const button = (event.target as Element).closest('button');
  if (button === null || event.ctrlKey || event.metaKey || event.altKey) return;
  const all = [...(event.currentTarget as Element).querySelectorAll('button')];
  const at = all.indexOf(button);
  if (event.key === 'ArrowRight' || event.key === 'ArrowDown') all[Math.min(at + 1, all.length - 1)]?.focus();
  else if (event.key === 'ArrowLeft' && at > 0) all[at - 1]?.focus();
  else if (event.key === 'ArrowUp' || event.key === 'Escape') back();
  // A button takes Enter and Space itself; the sheet around must not.
  else if (event.key !== 'Enter' && event.key !== ' ') return;
  else {
    event.stopPropagation();
    return;
  }
  event.preventDefault();
  event.stopPropagation();
}
