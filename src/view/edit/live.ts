// What a line of formulas shows while it is typed: the keys of its cell, the problems, the line as it will print, one quiet sentence.
//
// Three forms: `formula` (a derived quantity), `comparison` (a criterion: two formulas and their relation), `equation` (of a sought
// quantity: two formulas and one `=`). Not here: the elements (formula-editor.ts).

import { texName, texSymbols } from '../../formula/index.ts';
import type { Problem } from '../../quantity/index.ts';
import {
  type Calculation,
  type ComparisonDraft,
  checkComparison,
  checkEquation,
  checkFormula,
  type DraftPlace,
  type Relation,
} from '../../sheet/index.ts';
import { openSigns, relations } from './entry.ts';
import { equalSign, valuesText } from './entry-help.ts';
import { liveLine, printSi } from './print-live.ts';

export type LineForm = 'formula' | 'comparison' | 'equation';

export type LineKeys =
  | { readonly formula: string }
  | { readonly left: string; readonly relation: Relation; readonly right: string }
  | { readonly where: string };

export interface LivePlace extends DraftPlace {
  /** Index of the case whose numbers stand in the line. */
  readonly reading: number;
}

export interface Live {
  /** Undefined where the text cannot be split into what its cell has. */
  readonly keys?: LineKeys;
  readonly problems: readonly Problem[];
  /** About the declared unit, which is typed elsewhere. */
  readonly unitProblem?: Problem;
  /** The line as it will print; '' where it cannot be read. */
  readonly tex: string;
  /** 'force = force + force × number, units agree · closes with the printed digits' */
  readonly words: string;
  /** Printed results, one a case: '1 201 N', 'met'. */
  readonly results: readonly string[];
}

const texRelations: ReadonlyMap<Relation, string> = new Map([
  ['<', '<'],
  ['<=', '\\le'],
  ['>', '>'],
  ['>=', '\\ge'],
]);

export function live(form: LineForm, text: string, calculation: Calculation, place: LivePlace): Live {
  if (form === 'formula') return liveFormula(text, calculation, place);
  return form === 'comparison' ? liveComparison(text, calculation, place) : liveEquation(text, calculation, place);
}

function liveFormula(text: string, calculation: Calculation, place: LivePlace): Live {
  const draft = checkFormula(calculation, text, place);
  const head = place.name === undefined || place.name === '' ? '' : `${texName(place.name)} = `;
  const results = draft.cases.map((one) => printSi(one.value, draft.unit, calculation));
  const line = draft.formula && liveLine(calculation, draft.formula, draft.unit, draft.cases[place.reading], place.reading);
  const numbers = line === undefined || line.substituted === '' ? '' : ` = ${line.substituted}`;
  const result = line === undefined || line.resultTex === '' ? '' : ` = ${line.resultTex}`;
  const closing =
    line?.closes === undefined
      ? ''
      : line.closes
        ? ' · closes with the printed digits'
        : ' · does not close with the printed digits';
  return {
    keys: { formula: text.trim() },
    problems: draft.problems,
    ...(draft.unitProblem && { unitProblem: draft.unitProblem }),
    tex: line === undefined ? '' : `${head}${line.symbols}${numbers}${result}`,
    words: draft.words === undefined ? '' : `${draft.words}${draft.problems.some(isError) ? '' : closing}`,
    results,
  };
}

/** The text of a criterion cut at its relation; undefined where it has none, or more than one. */
export function splitComparison(text: string):
  | {
      readonly left: string;
      readonly relation: Relation;
      readonly right: string;
      readonly rightAt: number;
      readonly leftAt: number;
    }
  | undefined {
  const signs = openSigns(text, { from: 0, to: text.length });
  const found = signs.filter((token) => relations.has(token.text));
  // Of several the one that is no test of a choice: it stands before the `?`, or there is no choice.
  const [sign] = found;
  if (sign === undefined || found.length > 1 || signs.some((token) => token.text === '?')) return undefined;
  const left = text.slice(0, sign.from);
  const right = text.slice(sign.to);
  return {
    left: left.trim(),
    leftAt: left.length - left.trimStart().length,
    relation: relations.get(sign.text) ?? '<=',
    right: right.trim(),
    rightAt: sign.to + (right.length - right.trimStart().length),
  };
}

function liveComparison(text: string, calculation: Calculation, place: LivePlace): Live {
  const sides = splitComparison(text);
  if (sides === undefined) {
    const message =
      'a criterion compares two formulas by one of < <= > >=, as in sigma <= sigma_allow; a choice inside it stands in parentheses';
    return { problems: [{ code: 'no-relation', severity: 'error', message }], tex: '', words: '', results: [] };
  }
  const { left, relation, right, leftAt, rightAt } = sides;
  const draft = checkComparison(calculation, { left, right, leftAt, rightAt }, relation, place);
  const verdicts = draft.cases.map(({ met }) => (met === null ? 'no verdict' : met ? 'met' : 'not met'));
  return {
    keys: { left, relation, right },
    problems: draft.problems,
    ...(draft.unitProblem && { unitProblem: draft.unitProblem }),
    tex: comparisonTex(draft, relation, calculation, place.reading),
    words: draft.words === undefined ? '' : `${draft.words}${valuesText(verdicts)}`,
    results: verdicts,
  };
}

function comparisonTex(draft: ComparisonDraft, relation: Relation, calculation: Calculation, reading: number): string {
  if (!draft.left || !draft.right) return '';
  const sign = texRelations.get(relation) ?? '\\le';
  const each = draft.cases[reading];
  const [left, right] = [
    liveLine(calculation, draft.left, draft.unit, each?.left, reading),
    liveLine(calculation, draft.right, draft.unit, each?.right, reading),
  ];
  const numbers =
    left.resultTex === '' || right.resultTex === '' ? '' : `\\ :\\quad ${left.resultTex} ${sign} ${right.resultTex}`;
  return `${left.symbols} ${sign} ${right.symbols}${numbers}`;
}

function liveEquation(text: string, calculation: Calculation, place: LivePlace): Live {
  const sign = equalSign(text);
  if (sign < 0) {
    const message = 'an equation is two formulas with exactly one = between them, as in S_slip = S_req';
    return { problems: [{ code: 'no-equation', severity: 'error', message }], tex: '', words: '', results: [] };
  }
  const sides = { left: text.slice(0, sign), right: text.slice(sign + 1), rightAt: sign + 1 };
  const draft = checkEquation(calculation, sides, place);
  const tex =
    draft.left && draft.right
      ? `${texSymbols(draft.left.expr, calculation.style)} = ${texSymbols(draft.right.expr, calculation.style)}`
      : '';
  return { keys: { where: text.trim() }, problems: draft.problems, tex, words: draft.words ?? '', results: [] };
}

const isError = (problem: Problem) => problem.severity === 'error';
