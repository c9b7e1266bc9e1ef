export { type Calculation, type Changed, calculate } from './calculation.ts';
export * from './cases.ts';
export * from './criterion.ts';
export * from './document.ts';
export {
  type ComparisonDraft,
  checkComparison,
  checkEquation,
  checkFormula,
  type DraftCase,
  type DraftPlace,
  type DraftVerdict,
  type FormulaDraft,
  quantityNames,
  type TwoSides,
  tableNames,
} from './draft.ts';
export * from './edit.ts';
export { type FileProblem, type ReadSheet, readSheet, writeSheet } from './file.ts';
export { buildGraph, type Graph } from './graph.ts';
export * from './head-edits.ts';
export * from './history.ts';
export { type BlockOptions, type Connection, freeSuffix, type InsertedBlock, insertBlock } from './insert-block.ts';
export { badCharacters } from './json-text.ts';
export { type KeepInfo, templateOf } from './keep.ts';
export * from './numbering.ts';
export * from './paste-lines.ts';
export type { DecimalSign } from './reading.ts';
export { nameFault } from './rename.ts';
export { idPattern } from './schema.ts';
export type { FoundRoot, Search, Solver } from './sought.ts';
export * from './state.ts';
export { readTable, unsortedAxis } from './table.ts';
export * from './table-text.ts';
export * from './template.ts';
export * from './template-compare.ts';
export type { WhatIf, WhatIfRequest } from './whatif.ts';
