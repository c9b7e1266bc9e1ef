// The equation of a step: symbols, then the numbers of the case that is read, in one line where they fit, else under each other.
//
// 1. What stands before the relation comes first; everything from the relation on may break into the next line, at the relation.
// 2. On paper every case has its numbers; on the screen the one that is read, so that a row keeps its height.
// Not here: the TeX itself (src/formula, src/record).

import { html, nothing, type TemplateResult } from 'lit';
import type { RecordCase, Step, StepCase } from '../record/index.ts';

const math = (tex: string) => html`<ts-math .tex=${tex}></ts-math>`;

export function equation(step: Step, reading: number, cases: readonly RecordCase[], all: boolean): TemplateResult {
  if (step.kind === 'given') return html`<span class="equation">${math(step.symbols)}</span>`;
  const [head, right] = parts(step);
  const read = step.cases[reading];
  const different = new Set(step.cases.map((each) => numbersOf(step, each).join('\n'))).size > 1;
  const numbers = all && different ? [] : read === undefined ? [] : numbersOf(step, read);
  return html`<span class="equation">${math(head)}<span class="relation">${[...right, ...numbers].map(math)}</span></span>
    ${
      all && different
        ? step.cases.map((each, index) => {
            const tex = numbersOf(step, each);
            return tex.length === 0
              ? nothing
              : html`<span class="equation"><span class="case">${cases[index]?.title ?? each.case}</span><span class="relation">${tex.map(math)}</span></span>`;
          })
        : nothing
    }`;
}

/** The symbol, and the right-hand side from its relation on. */
function parts(step: Step): [string, string[]] {
  const { symbols, symbol } = step;
  if (symbol !== undefined && symbols.startsWith(`${symbol} `) && symbols.length > symbol.length + 1)
    return [symbol, [rest(symbols.slice(symbol.length))]];
  if (step.kind === 'sought' && symbol !== undefined && symbols.startsWith(`${symbol}:`))
    return [`${symbol}{:}`, [`{}${symbols.slice(symbol.length + 1)}`]];
  return [symbols, []];
}

function numbersOf(step: Step, each: StepCase): string[] {
  if (step.kind === 'criterion') return each.sides === undefined ? [] : [each.sides];
  if (each.substituted === '') return [];
  // Both sides of the equation with the value put back: no continuation of it.
  return [step.kind === 'sought' ? `\\quad\\text{put back:}\\;${each.substituted}` : rest(`= ${each.substituted}`)];
}

/** A right-hand side that begins with its relation, and does not break behind it. */
const rest = (tex: string) => `{}${tex.replace(/^\s*=/u, '= \\nobreak')}`;
