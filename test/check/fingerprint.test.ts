// What moves a fingerprint, and how far: wording stays in its cell, numbers go downstream, and nothing else moves.

import { createHash } from 'node:crypto';
import fc from 'fast-check';
import { describe, expect, it } from 'vitest';
import { digest } from '../../src/check/digest.ts';
import { fingerprints, rules } from '../../src/check/index.ts';
import { applyEdit, type Cell, calculate, type Edit, readSheet, type Sheet, writeSheet } from '../../src/sheet/index.ts';

const cells: readonly Cell[] = [
  { id: 'h', kind: 'heading', text: 'Tensions' },
  { id: 'mu', kind: 'given', name: 'mu', value: '0.3', unit: '1', title: 'Friction', source: '[R1] table 2', basis: 'tabulated' },
  { id: 'th', kind: 'given', name: 'theta', value: '180°', source: 'drawing' },
  { id: 'F', kind: 'given', name: 'F_2', value: '100 N', byCase: { b: '200 N' } },
  { id: 'k', kind: 'derived', name: 'k', formula: 'exp(mu*theta)', unit: '1' },
  { id: 'F1', kind: 'derived', name: 'F_1', formula: 'F_2*k', unit: 'N', title: 'Tight side' },
  { id: 'ok', kind: 'criterion', left: 'F_1', relation: '<=', right: '"500 N"' },
  { id: 'g', kind: 'given', name: 'g', value: '9.81 m/s²' },
  { id: 'm', kind: 'derived', name: 'm', formula: 'F_2/g', unit: 'kg' },
  {
    id: 't',
    kind: 'table',
    name: 'tab',
    columns: [{ name: 'key' }, { name: 'x', unit: '1' }],
    rows: [
      ['a', '1'],
      ['b', '2'],
    ],
  },
  { id: 'e', kind: 'derived', name: 'e_1', formula: 'entry(tab, x, "a")', unit: '1' },
  { id: 'n', kind: 'note', text: 'pulls {F_1}' },
];
const sheet: Sheet = {
  format: 'tightside-sheet/1',
  title: 'T',
  references: [
    { id: 'R1', document: 'Handbook', edition: '2001' },
    { id: 'R2', document: 'Other' },
  ],
  cases: [{ id: 'a' }, { id: 'b' }],
  cells,
};
const change = (id: string, keys: object): Edit => ({
  kind: 'set-cell',
  cell: { ...cells.find((cell) => cell.id === id), ...keys } as Cell,
});

/** Ids of the cells whose meaning and cover an edit moves, and whether the sheet's moves. */
function moved(edit: Edit): { meaning: string; cover: string; sheet: boolean } {
  const before = fingerprints(calculate(sheet));
  const next = applyEdit(sheet, edit).sheet;
  const after = fingerprints(calculate(next));
  const those = (one: 'meaning' | 'cover') =>
    next.cells
      .map(({ id }) => id)
      .filter((id) => before[one](id) !== after[one](id))
      .join(' ');
  return { meaning: those('meaning'), cover: those('cover'), sheet: before.sheet !== after.sheet };
}

describe('a change moves', () => {
  const table: readonly (readonly [string, Edit, string, string])[] = [
    // what, the edit, meanings that move, covers that move
    ['the cover alone, of a title', change('mu', { title: 'Friction, dry' }), '', 'mu'],
    ['the cover alone, of a source', change('th', { source: 'drawing B' }), '', 'th'],
    ['the cover alone, of a basis', change('mu', { basis: 'assumed' }), '', 'mu'],
    ['the cover alone, of a range', change('mu', { range: '0.1 to 0.5' }), '', 'mu'],
    ['the cover alone, of a distribution', change('mu', { distribution: 'normal' }), '', 'mu'],
    ['the cover alone, of a justification', change('ok', { justification: 'trial' }), '', 'ok'],
    ['the cover alone, of the text of a heading', change('h', { text: 'Forces' }), '', 'h'],
    [
      'the cover of what cites a reference, of its edition',
      { kind: 'set-head', key: 'references', value: [{ id: 'R1', document: 'Handbook', edition: '2019' }] },
      '',
      'mu',
    ],
    [
      'nothing, of a reference that nobody cites',
      { kind: 'set-head', key: 'references', value: [...sheet.references!.slice(0, 1)] },
      '',
      '',
    ],
    ['everything downstream, of a value', change('mu', { value: '0.31' }), 'mu k F1 ok n', 'mu k F1 ok n'],
    ['everything downstream, of a tolerance', change('mu', { value: '0.3 ± 0.1' }), 'mu k F1 ok n', 'mu k F1 ok n'],
    ['everything downstream, of a value in one case', change('F', { byCase: { b: '201 N' } }), 'F F1 ok m n', 'F F1 ok m n'],
    ['everything downstream, of a formula', change('k', { formula: 'exp(theta*mu)' }), 'k F1 ok n', 'k F1 ok n'],
    ['everything downstream, of a unit', change('F1', { unit: 'kN' }), 'F1 ok n', 'F1 ok n'],
    ['the criterion, of its relation', change('ok', { relation: '<' }), 'ok', 'ok'],
    [
      'table and lookup, of an entry',
      change('t', {
        rows: [
          ['a', '1'],
          ['b', '3'],
        ],
      }),
      't e',
      't e',
    ],
    [
      'the cover of the table, of a heading of a column',
      change('t', {
        columns: [
          { name: 'key', title: 'Key' },
          { name: 'x', unit: '1' },
        ],
      }),
      '',
      't',
    ],
    [
      'every cell, of the cases',
      { kind: 'move-case', id: 'b', to: 0 },
      'h mu th F k F1 ok g m t e n',
      'h mu th F k F1 ok g m t e n',
    ],
    ['nothing, of a confirmation', change('mu', { carriedOver: true, toConfirm: 'Q-1' }), '', ''],
  ];
  it.each(table)('%s', (_what, edit, meaning, cover) => {
    const by = moved(edit);
    expect({ meaning: by.meaning, cover: by.cover }).toEqual({ meaning, cover });
    expect(by.sheet).toBe(cover !== '');
  });

  it('the sheet alone, of its title, its settings and its order; nothing, of its conclusion', () => {
    expect(moved({ kind: 'set-head', key: 'title', value: 'U' })).toEqual({ meaning: '', cover: '', sheet: true });
    expect(moved({ kind: 'set-head', key: 'settings', value: { digits: 5 } })).toEqual({ meaning: '', cover: '', sheet: true });
    expect(moved({ kind: 'move-cell', id: 'g', to: 0 })).toEqual({ meaning: '', cover: '', sheet: true });
    expect(moved({ kind: 'set-head', key: 'conclusion', value: 'fine' })).toEqual({ meaning: '', cover: '', sheet: false });
  });
});

describe('the shape of a fingerprint', () => {
  // Canonical JSON written by hand, digested by another library.
  const hash = (text: string) => createHash('sha256').update(text, 'utf8').digest('hex');
  const small: Sheet = {
    format: 'tightside-sheet/1',
    title: 'S',
    references: [{ id: 'R1', document: 'D' }],
    cells: [
      { id: 'a', kind: 'given', name: 'μ', value: '0.3', title: 'Reibung', source: '[R1] 3' },
      { id: 'b', kind: 'derived', name: 'y', formula: '2*μ', unit: '1' },
    ],
  };
  const a = hash(
    `{"cases":["base"],"cell":{"kind":"given","name":"μ","value":"0.3"},"decimalSign":".","rules":"${rules}","uses":{}}`,
  );
  const b = hash(
    `{"cases":["base"],"cell":{"formula":"2*μ","kind":"derived","name":"y","unit":"1"},"decimalSign":".","rules":"${rules}","uses":{"mu":"${a}"}}`,
  );
  const coverA = hash(`{"cites":[{"document":"D","id":"R1"}],"meaning":"${a}","source":"[R1] 3","title":"Reibung"}`);
  const coverB = hash(`{"cites":[],"meaning":"${b}"}`);

  it('is that of the contract, byte for byte', () => {
    const made = fingerprints(calculate(small));
    expect([made.meaning('a'), made.meaning('b')]).toEqual([a, b]);
    expect([made.cover('a'), made.cover('b')]).toEqual([coverA, coverB]);
    expect(made.sheet).toBe(hash(`{"cells":["${coverA}","${coverB}"],"format":"tightside-sheet/1","title":"S"}`));
    expect(made.meaning('nowhere')).toBeUndefined();
  });
});

describe('loops', () => {
  const of = (...list: Cell[]) => fingerprints(calculate({ format: 'tightside-sheet/1', title: 'T', cells: list }));
  const derived = (id: string, formula: string): Cell => ({ id, kind: 'derived', name: id, formula });
  const given = (id: string, value: string): Cell => ({ id, kind: 'given', name: id, value });

  it('a loop of definitions ends, and what hangs on it moves with it', () => {
    const one = of(derived('a', 'b + 1'), derived('b', 'a*2'), derived('c', 'a'));
    const other = of(derived('a', 'b + 2'), derived('b', 'a*2'), derived('c', 'a'));
    expect(one.meaning('c')).toMatch(/^[0-9a-f]{64}$/);
    expect(one.meaning('a')).not.toBe(other.meaning('a'));
    expect(one.meaning('c')).not.toBe(other.meaning('c'));
  });
  it('a quantity that uses itself ends', () => {
    expect(of(derived('a', 'a + 1')).meaning('a')).toMatch(/^[0-9a-f]{64}$/);
  });

  const equation = (where: string, x = 'y*y'): Cell[] => [
    given('w', '2'),
    { id: 's', kind: 'sought', name: 's', where, between: '0 to 9' },
    derived('y', 's + 1'),
    derived('x', x),
    derived('z', 's*3'),
  ];
  it('an unknown hangs on its equation and on what stands between, and its users on it', () => {
    const one = of(...equation('x = w'));
    const other = of(...equation('x = w', 'y*y*y'));
    expect(['w', 's', 'y', 'x', 'z'].filter((id) => one.meaning(id) !== other.meaning(id))).toEqual(['s', 'y', 'x', 'z']);
    const third = of(...equation('x = 2*w'));
    expect(['w', 's', 'y', 'x', 'z'].filter((id) => one.meaning(id) !== third.meaning(id))).toEqual(['s', 'y', 'x', 'z']);
  });
  it('a given that is varied in the place of its value does not move what is sought, all else does', () => {
    const varied = (value: string, other: string): Cell[] => [
      given('F_0', value),
      given('w', other),
      derived('S', 'F_0/w'),
      { id: 'q', kind: 'sought', name: 'q', instead: 'F_0', where: 'S = w', between: '1 to 9' },
    ];
    const one = of(...varied('1', '2'));
    const two = of(...varied('3', '2'));
    const three = of(...varied('1', '4'));
    expect(['F_0', 'S', 'q'].filter((id) => one.meaning(id) !== two.meaning(id))).toEqual(['F_0', 'S']);
    expect(one.meaning('q')).not.toBe(three.meaning('q'));
  });
});

describe('size', () => {
  it('a chain of 50 000 definitions takes no longer than its 100 000 digests do, within a factor of three', () => {
    const chain: Cell[] = [{ id: 'c0', kind: 'given', name: 'x_0', value: '1' }];
    for (let i = 1; i < 50_000; i += 1) chain.push({ id: `c${i}`, kind: 'derived', name: `x_${i}`, formula: `x_${i - 1} + 1` });
    const calculation = calculate({ format: 'tightside-sheet/1', title: 'T', cells: chain });
    const timed = (work: () => void): number => {
      const start = process.cpuUsage();
      work();
      const { user, system } = process.cpuUsage(start);
      return user + system;
    };
    const plain = timed(() => {
      for (const cell of chain.slice(0, 10_000))
        digest({
          rules,
          decimalSign: '.',
          cases: ['base'],
          cell: { ...cell },
          uses: { x: 'e3b0c44298fc1c149afbf4c8996fb92427ae41e4649b934ca495991b7852b855' },
        });
    });
    let last: string | undefined;
    const ours = timed(() => {
      last = fingerprints(calculation).meaning('c49999');
    });
    expect(last).toMatch(/^[0-9a-f]{64}$/);
    expect(ours / (10 * plain)).toBeLessThan(3);
  }, 120_000);
  it('a sheet has one fingerprint before it is written and after it is read, whatever was pasted into it', () => {
    const odd: Sheet = {
      format: 'tightside-sheet/1',
      title: 'a\ud83e',
      cells: [{ id: 'n', kind: 'note', text: '\udc00\u0007\t\\u' }],
    };
    const read = readSheet(writeSheet(odd));
    expect(read.ok && fingerprints(calculate(read.value)).sheet).toBe(fingerprints(calculate(odd)).sheet);
  });
  it('after an edit the fingerprints are those made from nothing', () => {
    const first = calculate(sheet);
    fingerprints(first);
    const next = applyEdit(sheet, change('mu', { value: '0.4' })).sheet;
    first.update(next);
    const fresh = fingerprints(calculate(JSON.parse(JSON.stringify(next)) as Sheet));
    const kept = fingerprints(first);
    for (const { id } of cells) expect([kept.meaning(id), kept.cover(id)]).toEqual([fresh.meaning(id), fresh.cover(id)]);
    expect(kept.sheet).toBe(fresh.sheet);
  });
  it('equal sheets have equal fingerprints whatever the order of their keys', () => {
    fc.assert(
      fc.property(fc.shuffledSubarray(Object.keys(cells[1]!), { minLength: Object.keys(cells[1]!).length }), (keys) => {
        const source = new Map(Object.entries(cells[1]!));
        const shuffled = Object.fromEntries(keys.map((key) => [key, source.get(key)])) as unknown as Cell;
        expect(fingerprints(calculate({ ...sheet, cells: cells.with(1, shuffled) })).sheet).toBe(
          fingerprints(calculate(sheet)).sheet,
        );
      }),
      { seed: 7, numRuns: 10 },
    );
  }, 60_000);
});
