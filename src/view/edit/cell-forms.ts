// The fields of a cell, by its kind: what each is called, how it is typed, how it is read from the cell and put back.
//
// 1. Taking a text out and putting the same text back gives an equal cell; an optional field that is emptied leaves no key behind.
// 2. Keys are those of the file; `byCase.start` is the value of one case, `uses.driver` a part of a drawing, `show` names with commas.
// 3. A value that is changed here keeps its basis and source: both stand beside it and can be changed in the same go.
// Not here: tables (../table/), what is wrong with a field (field-checks.ts).

import { canonicalName } from '../../formula/index.ts';
import type { Calculation, Cell } from '../../sheet/index.ts';

export type FieldInput = 'text' | 'area' | 'prose' | 'value' | 'unit' | 'formula' | 'choice' | 'check';

export interface FieldOption {
  readonly value: string;
  readonly label: string;
}

export interface CellField {
  readonly key: string;
  readonly label: string;
  readonly input: FieldInput;
  readonly options?: readonly FieldOption[];
  /** A short word on what belongs here. */
  readonly hint?: string;
  /** The key stays even where the text is empty. */
  readonly needed?: boolean;
}

const text = (key: string, label: string, more: Partial<CellField> = {}): CellField => ({ key, label, input: 'text', ...more });
const options = (none: string | undefined, ...values: readonly string[]): FieldOption[] => [
  ...(none === undefined ? [] : [{ value: '', label: none }]),
  ...values.map((value) => ({ value, label: value })),
];

const name = text('name', 'Name', { needed: true, hint: 'as in d_1 or mu' });
const title = text('title', 'Title');
const source: CellField = { key: 'source', label: 'Source', input: 'area', hint: '[R1] 5.2 points to a reference of the sheet' };
const unit: CellField = { key: 'unit', label: 'Unit', input: 'unit' };
const toConfirm = text('toConfirm', 'To be confirmed', { hint: 'tracking number while it awaits confirmation' });

export function fieldsOf(cell: Cell, calculation: Calculation): readonly CellField[] {
  switch (cell.kind) {
    case 'heading':
      return [
        text('text', 'Heading', { needed: true }),
        { key: 'level', label: 'Rank', input: 'choice', options: options('1', '2', '3') },
      ];
    case 'note':
      return [
        {
          key: 'text',
          label: 'Text',
          input: 'prose',
          needed: true,
          hint: '**strong**, *emphasis*, lists with -, values as {F_1}',
        },
        { key: 'role', label: 'Role', input: 'choice', options: options('plain note', 'assumption', 'limit', 'caution') },
        source,
        toConfirm,
      ];
    case 'given':
      return givenFields(cell, calculation);
    case 'derived':
      return [name, title, { key: 'formula', label: 'Formula', input: 'formula', needed: true }, unit, source];
    case 'criterion':
      return [
        title,
        { key: 'left', label: 'Left side', input: 'formula', needed: true },
        { key: 'relation', label: 'Relation', input: 'choice', options: options(undefined, '<', '<=', '>', '>='), needed: true },
        { key: 'right', label: 'Right side', input: 'formula', needed: true },
        { ...unit, label: 'Unit of both sides' },
        source,
        { key: 'justification', label: 'Justification', input: 'area', hint: 'why it may stand where it is not met; printed' },
        { key: 'ifNotMet', label: 'Where it is not met', input: 'area', hint: 'what the reader must know then' },
      ];
    case 'sought':
      return [
        name,
        title,
        unit,
        {
          key: 'instead',
          label: 'Given to vary',
          input: 'choice',
          options: options('the quantity itself', ...givenNames(calculation)),
        },
        { key: 'where', label: 'Equation', input: 'formula', needed: true },
        text('between', 'Look between', { input: 'value', needed: true, hint: 'as in 10 N to 20 kN' }),
        source,
      ];
    case 'table':
      return [name, title, source];
    case 'drawing':
      return [
        title,
        text('layout', 'Layout', { needed: true }),
        ...Object.keys(cell.uses).map((part) =>
          text(`uses.${part}`, `Part ${part}`, { needed: true, hint: 'name of a quantity' }),
        ),
      ];
    case 'chart':
      return [
        title,
        text('vary', 'Given to vary', { needed: true }),
        text('from', 'From', { input: 'value', needed: true }),
        text('to', 'To', { input: 'value', needed: true }),
        text('show', 'Show', { needed: true, hint: 'names of quantities, with commas between them' }),
      ];
    case 'figure':
      return [title, source];
  }
}

function givenFields(cell: Extract<Cell, { kind: 'given' }>, calculation: Calculation): CellField[] {
  const texts = choicesOf(cell, calculation);
  const value = (key: string, label: string, needed: boolean): CellField =>
    texts === undefined
      ? { key, label, input: 'value', needed }
      : { key, label, input: 'choice', options: options(needed ? undefined : 'as for all cases', ...texts), needed };
  const several = calculation.cases.length > 1;
  return [
    name,
    title,
    value('value', several ? 'Value for all cases' : 'Value', true),
    ...(several
      ? calculation.cases.map(({ id, title: called }) => value(`byCase.${id}`, `Only for ${called ?? id}`, false))
      : []),
    ...(texts === undefined ? [unit] : []),
    {
      key: 'basis',
      label: 'Basis',
      input: 'choice',
      options: options('not stated', 'specified', 'measured', 'tabulated', 'assumed'),
    },
    source,
    ...(texts === undefined
      ? [
          text('range', 'Range', { input: 'value', hint: 'as in 0.1 to 0.8; the sheet warns outside it' }),
          {
            key: 'distribution',
            label: 'Distribution of ±',
            input: 'choice' as const,
            options: options('rectangular unless stated', 'rectangular', 'triangular', 'normal'),
          },
        ]
      : []),
    text('choices', 'Chosen from', { hint: 'a column of a table, as in surfaces.surface' }),
    toConfirm,
    { key: 'carriedOver', label: 'Carried over, not yet confirmed', input: 'check' },
  ];
}

function choicesOf(cell: Extract<Cell, { kind: 'given' }>, calculation: Calculation): readonly string[] | undefined {
  if (cell.choices === undefined) return undefined;
  const [table = '', column] = cell.choices.split('.');
  return calculation.table(table)?.data?.columns.find((one) => one.name === column)?.texts;
}

function givenNames(calculation: Calculation): string[] {
  return calculation.sheet.cells.flatMap((cell) =>
    cell.kind === 'given' && cell.choices === undefined ? [canonicalName(cell.name)] : [],
  );
}

/** The text of a field as it is typed; '' where the cell has none. */
export function fieldText(cell: Cell, key: string): string {
  const [outer = '', inner] = splitKey(key);
  const value = new Map(Object.entries(cell)).get(outer);
  if (inner !== undefined) return String(new Map(Object.entries((value ?? {}) as object)).get(inner) ?? '');
  if (Array.isArray(value)) return value.join(', ');
  return value === undefined ? '' : String(value);
}

function splitKey(key: string): readonly [string, string?] {
  const dot = key.indexOf('.');
  return dot < 0 ? [key] : [key.slice(0, dot), key.slice(dot + 1)];
}

/** The cell with the text put into the field. */
export function withFieldText(cell: Cell, field: CellField, typed: string): Cell {
  const [outer = '', inner] = splitKey(field.key);
  const entries = new Map<string, unknown>(Object.entries(cell));
  if (inner !== undefined) {
    const parts = new Map(Object.entries((entries.get(outer) ?? {}) as Record<string, string>));
    if (typed.trim() === '' && !field.needed) parts.delete(inner);
    else parts.set(inner, typed);
    if (parts.size === 0 && outer === 'byCase') entries.delete(outer);
    else entries.set(outer, Object.fromEntries(parts));
  } else if (field.input === 'check') {
    if (typed === 'true') entries.set(outer, true);
    else entries.delete(outer);
  } else if (outer === 'level') {
    if (typed === '') entries.delete(outer);
    else entries.set(outer, Number(typed));
  } else if (outer === 'show') {
    entries.set(
      outer,
      typed
        .split(',')
        .map((part) => part.trim())
        .filter((part) => part !== ''),
    );
  } else if (typed.trim() === '' && !field.needed) entries.delete(outer);
  else entries.set(outer, outer === 'name' ? canonicalName(typed) : typed);
  return Object.fromEntries(entries) as unknown as Cell;
}
