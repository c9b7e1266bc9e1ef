// The record of a sheet as a whole: numbers of lines, notes, lists at the head, what fails, what is not numeric.

import { describe, expect, test } from 'vitest';
import { criteriaWords, recordJson } from '../../src/record/index.ts';
import { plain, recordOf, stepNamed } from './sheets.ts';

const references = [
  { id: 'R1', document: 'EN 1992-1-1', edition: '2004', title: 'Concrete' },
  { id: 'R2', document: 'Not used' },
];

describe('lines', () => {
  test('are numbered by section, deeper headings without a number', () => {
    const record = recordOf(['a = 1', '# One', 'b = 2', '## Part', 'c := 2*b', '# Two', 'd = 3']);
    expect(
      record.lines.map((line) =>
        line.kind === 'heading' ? `${line.number}|${line.text}` : line.kind === 'step' ? line.step.number : '',
      ),
    ).toEqual(['0.1', '1|One', '1.1', '|Part', '1.2', '2|Two', '2.1']);
  });

  test('a quantity used above its line says where it is', () => {
    const record = recordOf(['# S', 'b := 2*a', 'a = 3']);
    expect(stepNamed(record, 'b').notes).toEqual(['see 1.2 below']);
    expect(stepNamed(record, 'b').cases[0]?.result).toBe('6.000');
  });

  test('live values take the printed form, one a case where cases differ', () => {
    const record = recordOf(
      [
        { kind: 'given', name: 'v', value: '15.2 m/s', byCase: { start: '3 m/s' }, source: 'x' },
        'w := 2*v [m/s]',
        'g = 9.81 m/s^2',
        'It runs at {v}, twice that is {w}, g is {g}; {nobody} and {a b} stay.',
      ],
      {
        cases: [
          { id: 'run', title: 'Steady running' },
          { id: 'start', title: 'Start-up' },
        ],
      },
    );
    const note = record.lines.find((line) => line.kind === 'note');
    expect(plain(note?.kind === 'note' ? note.text : '')).toBe(
      'It runs at 15.2 m/s (Steady running), 3 m/s (Start-up), twice that is 30.40 m/s (Steady running), 6.000 m/s (Start-up), g is 9.81 m/s²; {nobody} and {a b} stay.',
    );
  });

  test('tables keep the digits as typed, heads say quantity and unit', () => {
    const record = recordOf([
      {
        kind: 'table',
        name: 'belts',
        title: 'Belts',
        columns: [{ name: 'kind' }, { name: 'sigma', title: 'Stress', unit: 'N/mm^2' }, { name: 'mu', unit: '1' }],
        rows: [
          ['leather', '4.0', '0.30'],
          ['12345', '12345', '-0.1'],
        ],
        source: 'R9',
      },
    ]);
    const table = record.lines[0];
    if (table?.kind !== 'table') throw new Error('no table');
    expect(table.heads).toEqual([
      { title: 'kind', unit: '', numeric: false },
      { title: 'Stress', unit: 'N/mm²', numeric: true },
      { title: 'mu', unit: '', numeric: true },
    ]);
    expect(table.rows.map((row) => row.map(plain))).toEqual([
      ['leather', '4.0', '0.30'],
      ['12345', '12 345', '−0.1'],
    ]);
  });

  test('drawings, charts, figures and sought cells have their line and an honest word', () => {
    const record = recordOf([
      'F_0 = 100 N',
      { kind: 'drawing', layout: 'two pulleys', uses: { d: 'F_0' } },
      { kind: 'chart', vary: 'F_0', from: '1 N', to: '2 N', show: ['F_0'] },
      { kind: 'figure', title: 'Photo', image: 'data:image/svg+xml;base64,AAAA' },
      { kind: 'sought', name: 'F_x', unit: 'N', instead: 'F_0', where: 'F_0 = 5', between: '1 N to 2 N', source: 'x' },
    ]);
    expect(record.lines.map((line) => line.kind)).toEqual(['step', 'other', 'other', 'other', 'step']);
    expect(record.lines[1]).toMatchObject({ what: 'drawing', text: expect.stringContaining('not drawn') });
    expect(stepNamed(record, 'F_x').cases[0]?.result).toBeNull();
  });
});

describe('notes and lists', () => {
  const record = recordOf(
    [
      {
        kind: 'given',
        name: 'mu',
        title: 'Friction',
        value: '0.30',
        basis: 'assumed',
        source: '[R1] 5.10.5.2',
        toConfirm: 'TBC-3',
        carriedOver: true,
      },
      { kind: 'given', name: 'd', title: 'Diameter', value: '200 mm', basis: 'measured' },
      { kind: 'derived', name: 'x', formula: 'mu*2', source: '[R1]; [R7] page 3' },
      { kind: 'note', text: 'The shafts are parallel.', role: 'assumption', toConfirm: 'TBC-4', source: '[R1]' },
      {
        kind: 'criterion',
        title: 'Friction at most',
        left: 'mu',
        relation: '<=',
        right: '"0.2"',
        source: 'common practice',
        justification: 'A test stands behind it.',
        ifNotMet: 'Then mu is no design value.',
      },
    ],
    { references, method: 'As in [R1].', carriedFrom: { title: 'Old mixer', documentNumber: 'CS-009' } },
  );

  test('a given says what a reader must know', () => {
    expect(stepNamed(record, 'mu').notes).toEqual([
      'assumed',
      'to be confirmed: TBC-3',
      'carried over from CS-009, not confirmed',
    ]);
    expect(stepNamed(record, 'd').notes).toEqual(['measured', 'no source']);
    expect(stepNamed(record, 'x').notes).toEqual(['[R7] is not in the list of sources']);
  });

  test('assumptions, sources with who cites them, open points', () => {
    expect(record.assumptions.map((each) => [each.number, each.text, each.value, each.toConfirm])).toEqual([
      ['', 'The shafts are parallel.', '', 'TBC-4'],
      ['1', 'Friction', '0.30', 'TBC-3'],
    ]);
    expect(record.references.map((each) => [each.id, each.citedBy])).toEqual([
      ['R1', ['1', '3', 'assumption', 'method']],
      ['R2', []],
    ]);
    expect(record.openPoints.map((each) => [each.number, each.kind, each.text])).toEqual([
      ['1', 'to confirm', 'TBC-3: Friction'],
      ['1', 'carried over', 'Friction'],
      ['2', 'no source', 'Diameter'],
      ['', 'to confirm', 'TBC-4: The shafts are parallel.'],
      ['4', 'not met', 'Friction at most (justified: A test stands behind it.)'],
    ]);
  });

  test('a criterion that is not met shows what that means and why it may stand', () => {
    const step = stepNamed(record, '4');
    expect(step.justification).toBe('A test stands behind it.');
    expect(step.notes).toContain('Then mu is no design value.');
    expect(criteriaWords(record.summary)).toBe('1 of 1 criteria not met: 4.');
  });
});

describe('what fails', () => {
  const record = recordOf(['a = 1', 'b := 1/(a - 1)', 'c := b + 1', 'd := 2*a', 'e := nobody + 1', 'b <= 5'], {});

  test('has its line with the problem and nulls, and the rest goes on', () => {
    for (const name of ['b', 'c', 'e']) {
      const one = stepNamed(record, name).cases[0];
      expect(one).toMatchObject({ result: null, calculatorLine: null, calculatorResult: null, closes: false });
      expect(one?.problem?.message).toBeTruthy();
    }
    expect(stepNamed(record, 'd').cases[0]?.result).toBe('2.000');
    expect(stepNamed(record, 'e').symbols).toContain('=');
  });

  test('a criterion without sides has no verdict', () => {
    expect(stepNamed(record, '6').cases[0]).toMatchObject({ result: null, met: null, utilisation: null });
    expect(record.summary[0]).toMatchObject({ governing: null, cases: [{ met: null, printed: null }] });
    expect(criteriaWords(record.summary)).toContain('without a verdict: 6');
  });

  test('of two lines with one name the second has no value, and the record stands', () => {
    const twice = recordOf(['a = 1', 'b := 2*a', { kind: 'derived', name: 'b', formula: '3*a', source: 'x' }, 'c := 4*b']);
    const results = twice.steps.map((step) => step.cases[0]?.result);
    expect(results[0]).toBe('1');
    expect(results[2]).toBeNull();
    expect(twice.steps[2]?.cases[0]?.problem?.message).toBeTruthy();
  });

  test('fails in one case only', () => {
    const two = recordOf([{ kind: 'given', name: 'a', value: '1', byCase: { y: '3' }, source: 'x' }, 'b := 1/(a - 1)'], {
      cases: [{ id: 'x' }, { id: 'y' }],
    });
    expect(stepNamed(two, 'b').cases.map((each) => each.result)).toEqual([null, '0.5000']);
    expect(stepNamed(two, 'b').cases.map((each) => each.problem === undefined)).toEqual([false, true]);
  });
});

describe('json', () => {
  test('has the shape that outside programs rely on', () => {
    const record = recordOf(
      [
        {
          kind: 'table',
          name: 'pairs',
          columns: [{ name: 'pair' }, { name: 'mu', unit: '1' }],
          rows: [['leather', '0.30']],
          source: 'x',
        },
        { kind: 'given', name: 'pair', value: 'leather', choices: 'pairs.pair', source: 'x' },
        'F = 2140 N',
        'G = 912.3 N',
        'M := 0.5*(F + G) [N]',
        'mu := entry(pairs, mu, pair)',
        'M <= "2 kN"',
      ],
      { title: 'Half' },
    );
    const json = recordJson(record, 'ab12');
    expect(json).toMatchObject({ title: 'Half', cases: ['base'], fingerprint: 'ab12' });
    expect(json.steps.map((step) => step.name)).toEqual(['F', 'G', 'M', 'mu', null]);
    // 0.5·(2140 + 912.3) = 1526.15
    expect(json.steps[2]).toMatchObject({
      number: '4',
      cell: 'c5',
      symbols: 'M = 0.5\\,(F + G)',
      cases: [
        {
          case: 'base',
          substituted: '0.5 \\times (2\\,140\\,\\mathrm{N} + 912.3\\,\\mathrm{N})',
          result: '1\u202f526\u00a0N',
          calculatorLine: '0.5*(2140 + 912.3)',
          calculatorResult: '1526',
          closes: true,
        },
      ],
    });
    expect(json.steps[4]?.cases[0]).toMatchObject({ calculatorLine: '(1526)/(2000)', calculatorResult: '0.77', met: true });
    expect(json.choices).toEqual([{ number: '1', cell: 'c2', name: 'pair', values: ['leather'] }]);
    expect(JSON.parse(JSON.stringify(json))).toEqual(json);
  });
});
