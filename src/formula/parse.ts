// Reading a formula: from typed text to a syntax tree, or to one sentence that says what is wrong with it.
//
// 1. Never throws, and takes time in proportion to a bounded length whatever the text: the limits stand in front.
// 2. The library's parser sees placeholders, not the text: names as `_12`, numbers and strings as the place of their
//    token. So its trees are positions, and nothing that a user types has a meaning to it.
// Not here: what names and units mean (infer.ts).

import type { Problem, Result } from '../quantity/index.ts';
import type { Expr } from './expr.ts';
import { operatorMissing } from './neighbours.ts';
import type { Node } from './parser.ts';
import { parseNodes } from './parser.ts';
import type { Typed } from './refusal.ts';
import { refusal } from './refusal.ts';
import { checkTokens, deepestNesting } from './refusals.ts';
import type { Token } from './tokens.ts';
import { tokenize } from './tokens.ts';
import { readNode } from './walk.ts';
import type { Walk } from './walking.ts';
import { nodeBudget } from './walking.ts';

export const longestFormula = 2000;
const mostTokens = 500;

export interface Formula {
  /** As typed. */
  readonly text: string;
  readonly expr: Expr;
  /** Canonical names of the quantities used, each once, in the order of the text. */
  readonly names: readonly string[];
  /** Names of the tables used. */
  readonly tables: readonly string[];
}

interface ReadingOptions {
  /** The sheet's decimal sign. A formula has the point; its quoted quantities, read elsewhere, have this one. */
  readonly decimalSign?: '.' | ',';
}

/** Reads a formula. The problem of a refusal has its place in `text` and, where there is one, what to write instead. */
export function parseFormula(text: string, options: ReadingOptions = {}): Result<Formula> {
  if (text.length > longestFormula) {
    return refused(
      refusal(
        'formula-too-long',
        `The formula has ${text.length} characters, more than ${longestFormula}: split it into quantities of their own.`,
        [0, text.length],
      ),
    );
  }
  const tokens = tokenize(text);
  if (tokens.length === 0) {
    return refused(
      refusal('formula-empty', 'The formula is empty: write the right-hand side, such as F_1 - F_2.', [0, text.length]),
    );
  }
  if (tokens.length > mostTokens) {
    return refused(
      refusal(
        'formula-too-long',
        `The formula has ${tokens.length} words and signs, more than ${mostTokens}: split it into quantities of their own.`,
        [0, text.length],
      ),
    );
  }
  const input: Typed = { source: text, tokens, decimalSign: options.decimalSign ?? '.' };
  const checked = checkTokens(input);
  if (checked.problem) return refused(checked.problem);
  const nodes = parsePlaceholders(input);
  if (!nodes.ok) return nodes;
  const walk: Walk = {
    read: (node) => readNode(walk, node),
    source: text,
    tokens,
    closing: checked.closing,
    names: new Set(),
    tables: new Set(),
    budget: nodeBudget,
    problem: undefined,
    first: 0,
    last: 0,
  };
  const expr = readNode(walk, nodes.value);
  if (walk.problem) return refused(walk.problem);
  return { ok: true, value: { text, expr, names: [...walk.names], tables: [...walk.tables] } };
}

function refused(problem: Problem): { readonly ok: false; readonly problem: Problem } {
  return { ok: false, problem };
}

function placeholder(token: Token, index: number): string {
  switch (token.kind) {
    case 'name':
      return `_${index}`;
    case 'number':
      return String(index);
    case 'string':
      return `"${index}"`;
    default:
      return token.text;
  }
}

function parsePlaceholders(input: Typed): Result<Node> {
  const { source, tokens } = input;
  const starts: number[] = [];
  let text = '';
  tokens.forEach((token, i) => {
    starts.push(text.length);
    text += `${placeholder(token, i)} `;
  });
  try {
    return { ok: true, value: parseNodes(text) };
  } catch (error) {
    if (error instanceof RangeError) {
      return refused(
        refusal(
          'formula-too-deep',
          `The formula is nested too deeply (parentheses at most ${deepestNesting} deep): split it into quantities of their own.`,
          [0, source.length],
        ),
      );
    }
    if (error instanceof SyntaxError) return refused(syntaxProblem(input, starts, error));
    throw error;
  }
}

/** Token checks leave to the grammar: choices without their colon or within one another, and a number after a power. */
function syntaxProblem(input: Typed, starts: readonly number[], error: SyntaxError): Problem {
  const { source, tokens } = input;
  const offset = ((error as { char?: number }).char ?? 1) - 1;
  let index = starts.findLastIndex((start) => start <= offset);
  const token = tokens[index];
  if (/conditional/.test(error.message)) {
    while (index >= 0 && tokens[index]?.text !== '?') index--;
    const mark = tokens[index] ?? tokens[0];
    const count = (sign: string): number => tokens.filter((t) => t.kind === 'operator' && t.text === sign).length;
    if (count('?') === count(':')) {
      return refusal(
        'choice-in-choice',
        'A choice before the “:” of another stands in parentheses: write test ? (test ? this : that) : other.',
        [mark?.from ?? 0, source.length],
      );
    }
    return refusal('choice-unfinished', 'This “?” begins a choice that has no “:”: write test ? this : that.', [
      mark?.from ?? 0,
      mark?.to ?? source.length,
    ]);
  }
  if (token?.kind === 'operator' && token.text === ':') {
    return refusal('stray-colon', 'A “:” stands only in a choice: write test ? this : that.', [token.from, token.to]);
  }
  if (token && index > 0 && token.kind !== 'operator' && token.kind !== 'close') return operatorMissing(input, index);
  return refusal('unreadable', 'The formula cannot be read from here on: check the signs before this place.', [
    token?.from ?? 0,
    source.length,
  ]);
}
