// The record as JSON: the steps with their calculator lines, for programs that check a sheet from outside.
//
// 1. The shape is that of the command line's contract: { title, cases, fingerprint?, steps, … }; keys are never left out, null says "none".
// 2. `steps` holds what is a number: givens, derived quantities, criteria. Choices of texts stand beside it.
// 3. A sought quantity stands among the steps; one without a value in some case is listed under `unsolved` as well.

import type { RecordModel, Step } from './model.ts';

export interface JsonStepCase {
  readonly case: string;
  readonly substituted: string;
  readonly result: string | null;
  readonly calculatorLine: string | null;
  readonly calculatorResult: string | null;
  readonly closes: boolean;
  readonly reason?: string;
  readonly met?: boolean | null;
  readonly utilisation?: number | null;
  readonly problem?: string;
}

export interface JsonStep {
  readonly number: string;
  readonly cell: string;
  readonly kind: string;
  readonly name: string | null;
  readonly title: string;
  readonly symbols: string;
  readonly unit: string;
  readonly source: string;
  readonly notes: readonly string[];
  /** Beside the template; null where the record was made without one. */
  readonly template: 'untouched' | 'changed' | 'added' | null;
  readonly cases: readonly JsonStepCase[];
}

export interface JsonRecord {
  readonly title: string;
  readonly cases: readonly string[];
  readonly fingerprint?: string;
  readonly status: string;
  readonly steps: readonly JsonStep[];
  readonly choices: readonly {
    readonly number: string;
    readonly cell: string;
    readonly name: string;
    readonly values: readonly (string | null)[];
  }[];
  readonly unsolved: readonly { readonly number: string; readonly cell: string; readonly name: string }[];
  readonly summary: readonly {
    readonly number: string;
    readonly cell: string;
    readonly title: string;
    readonly governing: string | null;
  }[];
  readonly assumptions: readonly {
    readonly number: string;
    readonly text: string;
    readonly value: string;
    readonly source: string;
    readonly toConfirm: string;
  }[];
  readonly openPoints: readonly {
    readonly number: string;
    readonly cell: string;
    readonly kind: string;
    readonly text: string;
  }[];
  readonly references: readonly {
    readonly id: string;
    readonly document: string;
    readonly edition: string;
    readonly title: string;
    readonly citedBy: readonly string[];
  }[];
  readonly problems: readonly {
    readonly cell: string;
    readonly severity: string;
    readonly code: string;
    readonly message: string;
  }[];
}

export function recordJson(model: RecordModel, fingerprint?: string): JsonRecord {
  return {
    title: model.title,
    cases: model.cases.map((each) => each.id),
    ...(fingerprint === undefined ? {} : { fingerprint }),
    status: model.status,
    steps: model.steps.filter((step) => step.numeric).map(jsonStep),
    choices: model.steps
      .filter((step) => !step.numeric)
      .map((step) => ({
        number: step.number,
        cell: step.cell,
        name: step.name ?? '',
        values: step.cases.map((each) => each.result),
      })),
    unsolved: model.steps
      .filter((step) => step.kind === 'sought' && step.cases.some((each) => each.result === null))
      .map((step) => ({ number: step.number, cell: step.cell, name: step.name ?? '' })),
    summary: model.summary.map(({ number, cell, title, governing }) => ({ number, cell, title, governing })),
    assumptions: model.assumptions.map(({ number, text, value, source, toConfirm }) => ({
      number,
      text,
      value,
      source,
      toConfirm,
    })),
    openPoints: model.openPoints,
    references: model.references,
    problems: model.problems.map(({ cell, severity, code, message }) => ({ cell, severity, code, message })),
  };
}

function jsonStep(step: Step): JsonStep {
  return {
    number: step.number,
    cell: step.cell,
    kind: step.kind,
    name: step.name ?? null,
    title: step.title,
    symbols: step.symbols,
    unit: step.unit,
    source: step.source,
    notes: step.notes,
    template: step.template ?? null,
    cases: step.cases.map((each) => ({
      case: each.case,
      substituted: each.substituted,
      result: each.result,
      calculatorLine: each.calculatorLine,
      calculatorResult: each.calculatorResult,
      closes: each.closes,
      ...(each.reason === undefined ? {} : { reason: each.reason }),
      ...(each.met === undefined ? {} : { met: each.met }),
      ...(each.utilisation === undefined ? {} : { utilisation: each.utilisation }),
      ...(each.problem === undefined ? {} : { problem: each.problem.message }),
    })),
  };
}
