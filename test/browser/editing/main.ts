// A page of its own for the editing pieces: a small sheet, one line of each kind in edit, and what they tell.

import 'katex/dist/katex.min.css';
import '../../../src/view/page.css';
import '../../../src/view/sheet.css';
import '../../../src/view/edit/edit.css';
import { type Cell, calculate, newCellId, type Sheet } from '../../../src/sheet/index.ts';
import {
  type CellFieldsElement,
  defineEditing,
  type EntryLineElement,
  type FormulaEditorElement,
} from '../../../src/view/edit/index.ts';
import { MathElement } from '../../../src/view/math.ts';

customElements.define('ts-math', MathElement);
defineEditing();

const given = (id: string, name: string, value: string, title: string): Cell => ({ id, kind: 'given', name, title, value });
const sheet: Sheet = {
  format: 'tightside-sheet/1',
  title: 'A drive',
  cases: [
    { id: 'run', title: 'Steady running' },
    { id: 'start', title: 'Start-up' },
  ],
  cells: [
    { id: 'h1', kind: 'heading', level: 1, text: 'Belt forces' },
    given('g1', 'd_1', '200 mm', 'Diameter of the driving pulley'),
    given('g2', 'n_1', '1450 r/min', 'Speed of the driving pulley'),
    { id: 'g3', kind: 'given', name: 'F_1', title: 'Tight side', value: '900 N', byCase: { start: '1350 N' }, basis: 'assumed' },
    given('g4', 'F_2', '300 N', 'Slack side'),
    given('g5', 'mu_1', '0.30', 'Coefficient of friction'),
    {
      id: 't1',
      kind: 'table',
      name: 'surfaces',
      title: 'Surfaces',
      columns: [{ name: 'surface' }, { name: 'mu_dry', unit: '1' }],
      rows: [
        ['leather on iron', '0.30'],
        ['rubber on steel', '0.50'],
      ],
    },
    { id: 'd1', kind: 'derived', name: 'F_u', title: 'Effective pull', formula: 'F_1 - F_2', unit: 'N' },
    { id: 'k1', kind: 'criterion', title: 'Pull', left: 'F_u', relation: '<=', right: 'F_1' },
    { id: 'n1', kind: 'note', text: 'The belt pulls **{F_u}**.' },
  ],
};

interface Told {
  readonly name: string;
  readonly detail: unknown;
}
const told: Told[] = [];
let current = sheet;
const calculation = calculate(current);
const main = document.querySelector('main');
if (main === null) throw new Error('no main');

function show(label: string, element: HTMLElement) {
  const section = document.createElement('section');
  section.className = 'section';
  section.setAttribute('aria-label', label);
  section.append(element);
  main?.append(section);
  for (const name of ['draft', 'commit', 'cancel', 'entry'])
    element.addEventListener(name, (event) => told.push({ name: `${label} ${name}`, detail: (event as CustomEvent).detail }));
}

function formulaEditor(properties: Partial<FormulaEditorElement>) {
  const element = document.createElement('ts-formula-editor') as FormulaEditorElement;
  return Object.assign(element, { calculation, ...properties });
}
show('formula', formulaEditor({ text: 'F_1 - F_2', name: 'F_u', unit: 'N', cell: 'd1', label: 'Formula of F_u' }));
show('criterion', formulaEditor({ form: 'comparison', text: 'F_u <= F_1', cell: 'k1', label: 'Criterion Pull' }));

const entry = document.createElement('ts-entry-line') as EntryLineElement;
entry.calculation = calculation;
show('entry', entry);
entry.addEventListener('entry', (event) => {
  const { draft } = (event as CustomEvent<{ draft: Omit<Cell, 'id'> & { kind: Cell['kind'] } }>).detail;
  current = { ...current, cells: [...current.cells, { ...draft, id: newCellId(current, draft.kind) } as Cell] };
  calculation.update(current);
  entry.requestUpdate();
});

for (const id of ['g3', 'n1', 't1']) {
  const fields = document.createElement('ts-cell-fields') as CellFieldsElement;
  fields.calculation = calculation;
  fields.cell = sheet.cells.find((cell) => cell.id === id) as Cell;
  show(`fields ${id}`, fields);
}
Object.assign(globalThis, { told, sheetNow: () => current });
