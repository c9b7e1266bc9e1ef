// The editing pieces of the page: what is mounted where something is typed. Only exports and the names of the elements stand here.
//
// <ts-formula-editor>, <ts-entry-line>, <ts-value-field>, <ts-cell-fields>,
// <ts-text-editor>; <ts-line-editor> is a part of the first two. <ts-math> has
// to be defined beside them. The editor of formulas itself is loaded when the first line is typed into.

import { TableEditorElement } from '../table/editor.ts';
import { TableImportElement } from '../table/import.ts';
import { CellFieldsElement } from './cell-fields.ts';
import { EntryLineElement } from './entry-line.ts';
import { FormulaEditorElement } from './formula-editor.ts';
import { LineEditorElement } from './line-editor.ts';
import { TextEditorElement } from './text-editor.ts';
import { ValueFieldElement } from './value-field.ts';

export type { CellDetail, CellFieldsElement } from './cell-fields.ts';
export { type CellDraft, type Entry, readEntry } from './entry.ts';
export { entryExamples, entryScope, helpEntry } from './entry-help.ts';
export type { EntryDetail, EntryLineElement } from './entry-line.ts';
export { writeEntry } from './entry-write.ts';
export type { FormulaDetail, FormulaEditorElement } from './formula-editor.ts';
export type { LineKeys } from './live.ts';
export type { TextDetail, TextEditorElement } from './text-editor.ts';
export type { ValueFieldElement } from './value-field.ts';

export function defineEditing() {
  customElements.define('ts-line-editor', LineEditorElement);
  customElements.define('ts-formula-editor', FormulaEditorElement);
  customElements.define('ts-entry-line', EntryLineElement);
  customElements.define('ts-value-field', ValueFieldElement);
  customElements.define('ts-table-editor', TableEditorElement);
  customElements.define('ts-table-import', TableImportElement);
  customElements.define('ts-cell-fields', CellFieldsElement);
  customElements.define('ts-text-editor', TextEditorElement);
}
