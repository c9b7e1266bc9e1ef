// What lies at the right of the paper: origin and use of the chosen line, and what is still open in the sheet.
//
// 1. Origin goes up to two steps back: what the line uses, and what that uses; a line met twice is shown once.
// 2. Up and down move in the lists, Enter goes to the line, Escape back to the paper.
// Not here: following a jump (page.ts).

import { html, nothing } from 'lit';
import type { Line, Step } from '../record/index.ts';
import type { Desk } from './desk.ts';
import { quantity, words } from './text.ts';
import { countLines } from './waiting.ts';

export type GoTo = (cell: string) => void;

interface Entry {
  readonly cell: string;
  readonly depth: number;
}

/** `deep`: how many steps back the origin goes. */
export function originAndUse(desk: Desk, goTo: GoTo, deep: 1 | 2) {
  const { chosen, drawn: model } = desk;
  const steps = new Map(model.steps.map((step) => [step.cell, step]));
  const line = chosen === null ? undefined : model.lines.find((one) => one.kind !== 'step' && one.cell === chosen);
  const step = chosen === null ? undefined : steps.get(chosen);
  const what = step?.number ?? (line?.kind === 'table' ? line.title : undefined);
  const origin = chosen === null ? [] : originOf(desk, chosen, deep);
  const use = chosen === null ? [] : desk.calculation.use(chosen).map((cell) => ({ cell, depth: 0 }));
  const list = (entries: readonly Entry[]) =>
    html`<ul>${entries.map((entry) => html`<li>${item(desk, steps, entry, goTo)}</li>`)}</ul>`;
  return html`
    ${
      what === undefined
        ? html`<section><h2>Origin and use</h2><p class="quiet">Choose a line: here is where its numbers come from, and what they feed.</p></section>`
        : html`<section id="origin" aria-labelledby="origin-title"><h2 id="origin-title">Origin of ${what}</h2>
            ${step?.symbol === undefined ? nothing : html`<p class="symbol"><ts-math .tex=${step.symbol}></ts-math></p>`}
            ${origin.length === 0 ? html`<p class="quiet">${step === undefined ? 'A table of the sheet.' : given(step)}</p>` : list(origin)}</section>
          <section id="use" aria-labelledby="use-title"><h2 id="use-title">Use</h2>
            ${use.length === 0 ? html`<p class="quiet">Nothing in this sheet uses it.</p>` : list(use)}</section>`
    }`;
}

const given = (step: Step) =>
  step.kind === 'given' ? (step.source === '' ? 'Given here, without a source.' : step.source) : 'It uses no other line.';

function originOf(desk: Desk, cell: string, deep: 1 | 2): readonly Entry[] {
  const seen = new Set([cell]);
  const entries: Entry[] = [];
  for (const first of desk.calculation.origin(cell)) {
    if (seen.has(first)) continue;
    seen.add(first);
    entries.push({ cell: first, depth: 0 });
    if (deep === 1) continue;
    for (const second of desk.calculation.origin(first)) {
      if (seen.has(second) || desk.calculation.origin(cell).includes(second)) continue;
      seen.add(second);
      entries.push({ cell: second, depth: 1 });
    }
  }
  return entries;
}

function item(desk: Desk, steps: ReadonlyMap<string, Step>, { cell, depth }: Entry, goTo: GoTo) {
  const step = steps.get(cell);
  if (step === undefined) {
    const line = desk.drawn.lines.find((one): one is Exclude<Line, { kind: 'step' }> => one.kind !== 'step' && one.cell === cell);
    const title = line?.kind === 'table' || line?.kind === 'other' ? line.title : (line?.text ?? cell);
    return html`<button type="button" class="depth-${depth} plain" @click=${() => goTo(cell)}><span class="name">${line?.kind === 'table' ? 'table: ' : ''}${title}</span></button>`;
  }
  const shown = step.cases[desk.reading]?.result ?? 'no value';
  if (step.symbol === undefined) {
    return html`<button type="button" class="depth-${depth} plain" @click=${() => goTo(cell)}><span class="number">${step.number}</span> <span class="name">${step.title}</span></button>`;
  }
  return html`<button type="button" class="depth-${depth}" title=${step.title} @click=${() => goTo(cell)}>
    <span class="symbol" aria-hidden="true"><ts-math .tex=${step.symbol}></ts-math></span><span class="unseen">${step.title} </span>
    <span class="value">${quantity(shown)}</span><span class="number">${step.number}</span></button>`;
}

export function openPoints({ drawn: model }: Desk, goTo: GoTo) {
  const { wrong: lines, waiting } = countLines(model.problems);
  const wrong = new Set(lines);
  const warnings = model.problems.filter((problem) => problem.severity === 'warning');
  const numbers = new Map(model.steps.map((step) => [step.cell, step.number]));
  const open = [
    ...model.openPoints
      .filter((point) => point.kind !== 'problem' || wrong.has(point.cell))
      .map((point) => ({ ...point, kind: point.kind === 'problem' ? 'error' : point.kind })),
    ...warnings.map((problem) => ({
      kind: 'warning',
      text: problem.message,
      cell: problem.cell,
      number: numbers.get(problem.cell) ?? '',
    })),
  ];
  return html`<section id="open-points" aria-labelledby="open-title"><h2 id="open-title">Open points</h2>
    ${
      open.length === 0
        ? html`<p class="quiet">None.</p>`
        : html`<p class="quiet">${words(open.length, 'point', 'points')}, in the order of the sheet${waiting === 0 ? '' : `; ${words(waiting, 'more line waits', 'more lines wait')} for a value`}</p><ul class="open">${open.map(
            (point) => html`<li><button type="button" class="plain" @click=${() => goTo(point.cell)}>
              <span class="kind ${point.kind === 'not met' || point.kind === 'error' ? 'not-met' : ''}">${point.number} ${point.kind}</span> <span class="name">${point.text}</span></button></li>`,
          )}</ul>`
    }</section>`;
}
