// The sheet as it is kept: plain immutable data, strings as the author typed them. One sheet, one file.
//
// 1. Nothing here is computed; nothing is rounded; keys stand in the order of the schema (schema.ts).
// 2. An edit makes a new document that shares every cell it did not touch: identity of a cell object means "unchanged".
// Not here: reading of values and formulas (calculation.ts), the file (file.ts), steps of editing (edit.ts).

export const currentFormat = 'tightside-sheet/1';

export type Basis = 'specified' | 'measured' | 'tabulated' | 'assumed';
export type Relation = '<' | '<=' | '>' | '>=';
export type Distribution = 'rectangular' | 'triangular' | 'normal';
export type Status = 'in preparation' | 'for checking' | 'checked' | 'approved' | 'issued' | 'superseded';

interface CellBase {
  readonly id: string;
}
export interface HeadingCell extends CellBase {
  readonly kind: 'heading';
  readonly level?: 1 | 2 | 3;
  readonly text: string;
}
export interface NoteCell extends CellBase {
  readonly kind: 'note';
  /** Markdown with live values in braces: "the belt runs at {v}". */
  readonly text: string;
  /** What the note is for in the record; none: a plain note. */
  readonly role?: 'assumption' | 'limit' | 'caution';
  /** Where an assumption comes from. */
  readonly source?: string;
  /** Tracking number of an assumption while it awaits confirmation. */
  readonly toConfirm?: string;
}
export interface GivenCell extends CellBase {
  readonly kind: 'given';
  readonly name: string;
  readonly title?: string;
  readonly value: string;
  readonly byCase?: Readonly<Record<string, string>>;
  readonly unit?: string;
  /** `table.column`: the value is a text of that column. */
  readonly choices?: string;
  readonly distribution?: Distribution;
  readonly basis?: Basis;
  readonly source?: string;
  /** `0.1 to 0.8`: outside it the sheet warns. */
  readonly range?: string;
  /** Tracking number while the value awaits confirmation. */
  readonly toConfirm?: string;
  readonly carriedOver?: boolean;
}
export interface DerivedCell extends CellBase {
  readonly kind: 'derived';
  readonly name: string;
  readonly title?: string;
  readonly formula: string;
  readonly unit?: string;
  readonly source?: string;
}
export interface CriterionCell extends CellBase {
  readonly kind: 'criterion';
  readonly title?: string;
  readonly left: string;
  readonly relation: Relation;
  readonly right: string;
  /** Unit in which both sides are printed. */
  readonly unit?: string;
  readonly source?: string;
  /** Lets a criterion that is not met stand; printed. */
  readonly justification?: string;
  /** What the reader must know while it is not met: "F_1 and F_2 are then no running values." */
  readonly ifNotMet?: string;
}
export interface SoughtCell extends CellBase {
  readonly kind: 'sought';
  readonly name: string;
  readonly title?: string;
  readonly unit?: string;
  readonly instead?: string;
  readonly where: string;
  readonly between: string;
  readonly source?: string;
}
export interface TableColumn {
  readonly name: string;
  readonly title?: string;
  readonly unit?: string;
}
export interface TableCell extends CellBase {
  readonly kind: 'table';
  readonly name: string;
  readonly title?: string;
  readonly columns: readonly TableColumn[];
  readonly rows: readonly (readonly string[])[];
  readonly source?: string;
}
export interface DrawingCell extends CellBase {
  readonly kind: 'drawing';
  readonly title?: string;
  readonly layout: string;
  readonly uses: Readonly<Record<string, string>>;
}
export interface ChartCell extends CellBase {
  readonly kind: 'chart';
  readonly title?: string;
  readonly vary: string;
  readonly from: string;
  readonly to: string;
  readonly show: readonly string[];
}
export interface FigureCell extends CellBase {
  readonly kind: 'figure';
  readonly title?: string;
  /** A picture as data: URL (PNG or JPEG). */
  readonly image: string;
  readonly source?: string;
}
export type Cell =
  | HeadingCell
  | NoteCell
  | GivenCell
  | DerivedCell
  | CriterionCell
  | SoughtCell
  | TableCell
  | DrawingCell
  | ChartCell
  | FigureCell;

export interface Reference {
  readonly id: string;
  readonly document: string;
  readonly edition?: string;
  readonly title?: string;
}
/** The data fields of ISO 7200; title, status, sheet number and paper come from the sheet itself. */
export interface TitleBlock {
  readonly organisation?: string;
  readonly department?: string;
  readonly technicalReference?: string;
  readonly documentType?: string;
  readonly supplementaryTitle?: string;
  readonly classification?: string;
  readonly language?: string;
  readonly client?: string;
  readonly project?: string;
  readonly documentNumber?: string;
  readonly revision?: string;
  readonly date?: string;
  readonly preparedBy?: string;
  readonly checkedBy?: string;
  readonly approvedBy?: string;
}
export interface Settings {
  readonly digits?: number;
  readonly decimalSign?: '.' | ',';
  readonly paper?: 'A4' | 'Letter';
}
export interface LoadCase {
  readonly id: string;
  readonly title?: string;
}
export interface TemplateInfo {
  readonly id: string;
  readonly version: number;
  readonly job: string;
  readonly limits: readonly string[];
  readonly caution: string;
}
/** The template that a sheet was made from; the fingerprint tells whether a formula still is the template's. */
export interface TemplateOrigin {
  readonly id: string;
  readonly version: number;
  readonly fingerprint?: string;
}
/** The earlier sheet that this one was made from: what its carried-over values stem from. */
export interface EarlierSheet {
  readonly title: string;
  readonly documentNumber?: string;
  readonly revision?: string;
  readonly fingerprint?: string;
}
export interface Sheet {
  readonly format: string;
  readonly title: string;
  readonly templateInfo?: TemplateInfo;
  readonly purpose?: string;
  readonly method?: string;
  readonly status?: Status;
  readonly references?: readonly Reference[];
  readonly titleBlock?: TitleBlock;
  readonly settings?: Settings;
  readonly template?: TemplateOrigin;
  readonly carriedFrom?: EarlierSheet;
  readonly cases?: readonly LoadCase[];
  readonly cells: readonly Cell[];
  readonly conclusion?: string;
  /** Kept as they are until the checking desk has its life. */
  readonly marks?: readonly unknown[];
  readonly revisions?: readonly unknown[];
  readonly log?: readonly unknown[];
}
