// The calculation record as data: numbered lines in the order of the sheet, every number as it prints, every form laid out from it.
//
// 1. Texts are plain text as they print (SI spaces, U+2212), formulas are TeX; nothing is escaped for a form.
// 2. A step has one entry per case of the sheet, in its order. What has no value is null, and the rest goes on.
// 3. States are words here ("assumed", "not met"); a form may add a shape or a colour, never in place of the word.
// Not here: how it is made (make.ts), what it looks like (html.ts, json.ts).

import type { Basis, CellProblem, Relation, Settings, Status, TitleBlock } from '../sheet/index.ts';
import type { OpenReason } from './closing.ts';
import type { ProseBlock } from './prose.ts';

export interface RecordCase {
  readonly id: string;
  /** '' for the one case of a sheet without cases. */
  readonly title: string;
}

export interface StepCase {
  readonly case: string;
  /** TeX of the right-hand side with numbers; '' for a given and where there is no value. */
  readonly substituted: string;
  /** Printed: '1 201 N'; the utilisation of a criterion, or its room with a unit; the text of a choice. */
  readonly result: string | null;
  readonly resultTex: string | null;
  /** A pure-number expression in coherent SI, and the plain number it comes to. */
  readonly calculatorLine: string | null;
  readonly calculatorResult: string | null;
  readonly closes: boolean;
  readonly reason?: OpenReason;
  /** Criterion: the verdict on the unrounded sides, and demand over capacity (null where there is none). */
  readonly met?: boolean | null;
  readonly utilisation?: number | null;
  /** Criterion: both sides as they print, '1\,201\,\mathrm{N} \le 1\,320\,\mathrm{N}'. */
  readonly sides?: string;
  readonly problem?: CellProblem;
}

export type StepKind = 'given' | 'derived' | 'criterion' | 'sought';

export interface Step {
  readonly number: string;
  readonly cell: string;
  readonly kind: StepKind;
  readonly name?: string;
  readonly title: string;
  readonly source: string;
  readonly basis?: Basis;
  /** TeX: 'F_{\mathrm{c}} = m\,v^{2}', a criterion 'F_{1} \le F_{\mathrm{max}}', a given its symbol. */
  readonly symbols: string;
  /** The symbol alone. */
  readonly symbol?: string;
  readonly unit: string;
  readonly relation?: Relation;
  /** What a reader must know: 'see 3.2 below', 'assumed', 'carried over, not confirmed', 'no source' … */
  readonly notes: readonly string[];
  /** Beside the template that the sheet came from, where the record was made with it. */
  readonly template?: 'untouched' | 'changed' | 'added';
  /** Why a criterion that is not met may stand. */
  readonly justification?: string;
  /** False for a choice of texts and for a truth: there is nothing to calculate. */
  readonly numeric: boolean;
  readonly cases: readonly StepCase[];
}

export interface TableColumnHead {
  readonly title: string;
  /** The unit alone, '' for texts and numbers of unit one. */
  readonly unit: string;
  readonly numeric: boolean;
}

/** A row of a table that the calculation uses, and which lines use it how. */
export interface TableMark {
  readonly row: number;
  /** By a choice, by a lookup, or as one of the two rows that a value lies between. */
  readonly how: 'chosen' | 'read' | 'between';
  readonly by: readonly { readonly cell: string; readonly number: string }[];
  /** Ids of the cases in which it holds; none: in every case. */
  readonly cases: readonly string[];
}

export type Line =
  | { readonly kind: 'heading'; readonly cell: string; readonly number: string; readonly level: 1 | 2 | 3; readonly text: string }
  | { readonly kind: 'step'; readonly step: Step }
  | {
      readonly kind: 'note';
      readonly cell: string;
      readonly role?: 'assumption' | 'limit' | 'caution';
      readonly text: string;
      readonly blocks: readonly ProseBlock[];
      readonly notes: readonly string[];
      readonly source: string;
    }
  | {
      readonly kind: 'table';
      readonly cell: string;
      readonly title: string;
      readonly name: string;
      readonly source: string;
      readonly heads: readonly TableColumnHead[];
      readonly rows: readonly (readonly string[])[];
      /** In the order of the rows. */
      readonly marks: readonly TableMark[];
      readonly notes: readonly string[];
    }
  | {
      readonly kind: 'other';
      readonly cell: string;
      readonly what: 'drawing' | 'chart' | 'figure';
      readonly title: string;
      readonly source: string;
      /** A picture as a data: URL (PNG or JPEG). */
      readonly image?: string;
      /** What stands in its place where there is nothing to show. */
      readonly text: string;
    };

export interface CriterionSummary {
  readonly number: string;
  readonly cell: string;
  readonly title: string;
  readonly symbols: string;
  readonly cases: readonly {
    readonly case: string;
    readonly met: boolean | null;
    readonly utilisation: number | null;
    /** The utilisation as printed, or the room with its unit; null where there is no verdict. */
    readonly printed: string | null;
  }[];
  /** The case in which the criterion is worst off; null where no case has a verdict. */
  readonly governing: string | null;
  readonly justification: string;
}

export interface Assumption {
  /** Step number; '' for a note. */
  readonly number: string;
  readonly cell: string;
  readonly text: string;
  readonly symbol: string;
  /** Printed value, per case where they differ. */
  readonly value: string;
  readonly source: string;
  readonly toConfirm: string;
}

export interface RecordReference {
  readonly id: string;
  readonly document: string;
  readonly edition: string;
  readonly title: string;
  /** Numbers of the steps, and titles of the tables, that cite it. */
  readonly citedBy: readonly string[];
}

export interface OpenPoint {
  readonly number: string;
  readonly cell: string;
  readonly kind: 'carried over' | 'to confirm' | 'no source' | 'not met' | 'does not close' | 'problem';
  readonly text: string;
}

/** The formulas of a sheet beside those of the template that it came from. */
export interface BesideTemplate {
  /** 'Formulas as in template flat-belt-open, version 1, except:' */
  readonly words: string;
  /** In the order of the sheet, what was left out at the end. */
  readonly differences: readonly TemplateDifference[];
}
export interface TemplateDifference {
  readonly what: 'changed' | 'added' | 'left out';
  /** '' for what the sheet does not have. */
  readonly number: string;
  readonly cell: string;
  readonly name: string;
  readonly title: string;
  /** As typed in the template, and here; '' where there is none. */
  readonly was: string;
  readonly now: string;
}

export interface RecordModel {
  readonly title: string;
  readonly titleBlock: TitleBlock;
  readonly settings: Settings;
  readonly status: Status;
  readonly purpose: readonly ProseBlock[];
  readonly method: readonly ProseBlock[];
  readonly conclusion: readonly ProseBlock[];
  /** 'template flat-belt-open, version 1'; '' for a sheet begun from nothing. */
  readonly origin: string;
  /** Null for a sheet that was not made from a template. */
  readonly beside: BesideTemplate | null;
  /** Limits of validity and caution that a template states of itself. */
  readonly limits: readonly string[];
  readonly caution: string;
  readonly cases: readonly RecordCase[];
  readonly summary: readonly CriterionSummary[];
  readonly assumptions: readonly Assumption[];
  readonly references: readonly RecordReference[];
  readonly openPoints: readonly OpenPoint[];
  readonly lines: readonly Line[];
  readonly steps: readonly Step[];
  readonly problems: readonly CellProblem[];
}
