// What is wrong with one field of a cell as it stands typed, with places and corrections in the text of that field; and what it means.
//
// Not here: problems between cells that only the whole sheet shows (Calculation.problems).

import { canonicalName } from '../../formula/index.ts';
import {
  describeUnit,
  equalD,
  type Problem,
  printValue,
  readRange,
  readUnit,
  readValue,
  turnsAgainstAngle,
  type Unit,
  withArticle,
} from '../../quantity/index.ts';
import { type Calculation, type Cell, nameFault } from '../../sheet/index.ts';
import { type Proposals, proposeInFormula, proposeUnits } from './assist.ts';
import { type CellField, fieldText } from './cell-forms.ts';
import { live, splitComparison } from './live.ts';
import { moved } from './print-live.ts';

export interface FieldCheck {
  readonly problems: readonly Problem[];
  /** What the text means: 'a length (mm)', 'force = force + force, units agree'. */
  readonly good: string;
}

const nothing: FieldCheck = { problems: [], good: '' };
const error = (code: string, message: string): FieldCheck => ({ problems: [{ code, severity: 'error', message }], good: '' });

export function checkField(cell: Cell, field: CellField, calculation: Calculation): FieldCheck {
  const text = fieldText(cell, field.key);
  const { style } = calculation;
  if (field.key === 'name' && cell.kind !== 'table') {
    const message = nameFault(calculation.sheet, text, cell.id);
    return message === undefined ? nothing : error('bad-name', message);
  }
  if (field.key === 'name') {
    if (!/^[A-Za-z]\w*$/u.test(text)) return error('bad-name', 'a name is a letter, then letters, digits or _, as in surfaces');
    const other = calculation.sheet.cells.some((one) => one.kind === 'table' && one.id !== cell.id && one.name === text);
    return other ? error('name-twice', `there is a table ${text} already; take another name`) : nothing;
  }
  if (field.key === 'range' || field.key === 'between')
    return text.trim() === '' && !field.needed ? nothing : checkRange(text, style);
  if (field.input === 'value') return text.trim() === '' && !field.needed ? nothing : checkValue(text, cell, calculation);
  if (field.input === 'unit') return checkUnit(text);
  if (field.input === 'formula') return checkFormulaField(text, cell, field, calculation);
  if (field.key.startsWith('uses.') || field.key === 'vary' || field.key === 'show') {
    const missing = text
      .split(',')
      .map((part) => part.trim())
      .find((part) => calculation.named(canonicalName(part)) === undefined);
    return missing === undefined
      ? nothing
      : error('unknown-name', `no quantity of this sheet is called ${missing === '' ? 'so' : missing}`);
  }
  return field.needed && text.trim() === '' && field.input !== 'choice' ? error('empty', 'there is nothing here yet') : nothing;
}

function checkValue(text: string, cell: Cell, { style }: Calculation): FieldCheck {
  if (text.trim() === '') return error('no-value', 'no value yet: type a number with its unit, as in 200 mm');
  const read = readValue(text, style);
  if (!read.ok) return { problems: [read.problem], good: '' };
  const declared = unitOfCell(cell);
  if (
    declared !== undefined &&
    (!equalD(declared.dimension, read.value.unit.dimension) || turnsAgainstAngle(declared, read.value.unit))
  )
    return error(
      'unlike-value',
      `${text.trim()} is ${withArticle(read.value.unit)}, this quantity is ${withArticle(declared)}; change one of the two`,
    );
  return { problems: [], good: `${describeUnit(read.value.unit)}, ${printValue(read.value, style)}` };
}

function checkRange(text: string, style: Calculation['style']): FieldCheck {
  const read = readRange(text, style);
  return read.ok ? { problems: [], good: describeUnit(read.value.to.unit) } : { problems: [read.problem], good: '' };
}

function checkUnit(text: string): FieldCheck {
  if (text.trim() === '') return nothing;
  const read = readUnit(text);
  return read.ok ? { problems: [], good: describeUnit(read.value) } : { problems: [read.problem], good: '' };
}

function checkFormulaField(text: string, cell: Cell, field: CellField, calculation: Calculation): FieldCheck {
  const unit = fieldText(cell, 'unit');
  const place = { reading: 0, cell: cell.id, ...('name' in cell ? { name: cell.name } : {}), ...(unit === '' ? {} : { unit }) };
  if (cell.kind === 'derived') {
    const now = live('formula', text, calculation, place);
    return { problems: now.problems, good: now.words };
  }
  if (cell.kind === 'sought') {
    const now = live('equation', text, calculation, place);
    return { problems: now.problems, good: now.words };
  }
  if (cell.kind !== 'criterion') return nothing;
  // Both sides are judged together; each field tells what concerns its own side.
  const left = `${cell.left} `;
  const both = `${left}${cell.relation} ${cell.right}`;
  const cut = splitComparison(both);
  if (cut === undefined || cut.left !== cell.left.trim()) {
    const alone = live('formula', text, calculation, { reading: 0, cell: cell.id });
    return { problems: alone.problems, good: '' };
  }
  const now = live('comparison', both, calculation, place);
  const rightAt = left.length + cell.relation.length + 1;
  const isRight = field.key === 'right';
  const problems = now.problems
    .filter((problem) => (problem.at === undefined ? !isRight : problem.at[0] >= rightAt === isRight))
    .map((problem) => (isRight ? moved(problem, -rightAt) : problem));
  return { problems, good: isRight ? now.words : '' };
}

function unitOfCell(cell: Cell): Unit | undefined {
  const text = fieldText(cell, 'unit');
  if (text.trim() === '') return undefined;
  const read = readUnit(text);
  return read.ok ? read.value : undefined;
}

/** What could be written at the caret of the field. */
export function proposeInField(
  cell: Cell,
  field: CellField,
  text: string,
  caret: number,
  calculation: Calculation,
): Proposals | undefined {
  const like = unitOfCell(cell) ?? ('name' in cell && cell.kind !== 'table' ? calculation.named(cell.name)?.unit : undefined);
  const wish = { asked: false, ...(like === undefined ? {} : { like }) };
  if (field.input === 'value') return proposeUnits(text, caret, wish);
  if (field.input === 'unit') return proposeUnits(text, caret, { ...wish, alone: true });
  if (field.input !== 'formula') return undefined;
  return proposeInFormula(text, caret, { calculation, asked: false, ...('name' in cell ? { own: cell.name } : {}) });
}
