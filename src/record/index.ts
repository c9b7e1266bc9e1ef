// What other rooms may use of the record. Only exports stand here.

export type { OpenReason } from './closing.ts';
export { comparisonWords, templateWords } from './from-template.ts';
export { criteriaWords, footerCaution, recordHtml } from './html.ts';
export type { Face, RecordAssets } from './html-style.ts';
export { type JsonRecord, type JsonStep, type JsonStepCase, recordJson } from './json.ts';
export { loadRecordAssets } from './load-assets.ts';
export { type MakeRecord, makeRecord, printedValues, type RecordOptions, recordMaker } from './make.ts';
export type {
  Assumption,
  BesideTemplate,
  CriterionSummary,
  Line,
  OpenPoint,
  RecordCase,
  RecordModel,
  RecordReference,
  Step,
  StepCase,
  StepKind,
  TableColumnHead,
  TableMark,
  TemplateDifference,
} from './model.ts';
export { type ProseBlock, type ProseSpan, rankedItems, readProse } from './prose.ts';
export { marksByRow, markWords } from './table-marks.ts';
