// Sheets of every shape that the schema allows, for properties that hold of all of them.

import fc from 'fast-check';
import type { Cell, LoadCase, Sheet } from '../../src/sheet/document.ts';

/** A fixed seed, printed by fast-check with the counterexample when a property fails. */
export const seeded = { seed: 20261201, numRuns: 150 };

const text = fc
  .oneof(
    fc.string({ maxLength: 12 }),
    fc.string({ unit: 'grapheme', maxLength: 6 }),
    fc.constantFrom('', '200 mm', '0.30 ± 0.05', 'μ_1', 'a\nb', '"', '\\', '\u2028', '1'),
  )
  .map((each) => each.replace(/[\p{Surrogate}\u0000-\u0008\u000b\u000c\u000e-\u001f]/gu, ''));
const id = fc.stringMatching(/^[A-Za-z0-9][A-Za-z0-9._-]{0,6}$/).filter((each) => each !== 'constructor' && each !== 'prototype');

/** Optional keys come and go. */
function keys<T extends object, O extends object>(
  must: { [K in keyof T]: fc.Arbitrary<T[K]> },
  may: { [K in keyof O]: fc.Arbitrary<O[K]> },
): fc.Arbitrary<T & Partial<O>> {
  return fc.record({ ...must, ...may } as never, { requiredKeys: Object.keys(must) as never }) as fc.Arbitrary<T & Partial<O>>;
}

const name = fc.oneof(fc.constantFrom('d_1', 'd_2', 'F_1', 'mu', 'μ', 'x', 'K_A', 'constructor'), text);
const formula = fc.oneof(
  fc.constantFrom(
    'd_1 + d_2',
    'exp(mu*x)',
    'entry(d_1, F_1, x)',
    'F_1 > "2 N" ? F_1 : d_1',
    'μ·d_1',
    'F_10 + F_1',
    '(((',
    'x^2*interpolate(x, mu, x) + x',
  ),
  text,
);
const byCase = fc.dictionary(id, text, { maxKeys: 3, noNullPrototype: true });
const title = { title: text };
const source = { source: text };

export function aCell(cellId: fc.Arbitrary<string>): fc.Arbitrary<Cell> {
  const one = (kind: Cell['kind'], must: object, may: object): fc.Arbitrary<Cell> =>
    keys({ id: cellId, kind: fc.constant(kind), ...must } as never, may as never) as unknown as fc.Arbitrary<Cell>;
  return fc.oneof(
    one('heading', { text }, { level: fc.constantFrom(1, 2, 3) }),
    one(
      'note',
      { text: fc.oneof(text, fc.constantFrom('runs at {d_1}', '{mu} {x}{')) },
      { role: fc.constantFrom('assumption', 'limit', 'caution'), ...source, toConfirm: text },
    ),
    one(
      'given',
      { name, value: text },
      {
        ...title,
        byCase,
        unit: text,
        choices: text,
        distribution: fc.constantFrom('rectangular', 'triangular', 'normal'),
        basis: fc.constantFrom('specified', 'measured', 'tabulated', 'assumed'),
        ...source,
        range: text,
        toConfirm: text,
        carriedOver: fc.boolean(),
      },
    ),
    one('derived', { name, formula }, { ...title, unit: text, ...source }),
    one(
      'criterion',
      { left: formula, relation: fc.constantFrom('<', '<=', '>', '>='), right: formula },
      { ...title, unit: text, ...source, justification: text, ifNotMet: text },
    ),
    one(
      'sought',
      { name, where: fc.constantFrom('F_1 = d_1', 'mu*x = 2', '='), between: text },
      { ...title, unit: text, instead: name, ...source },
    ),
    one(
      'table',
      {
        name,
        columns: fc.array(keys({ name: text }, { title: text, unit: text }), { maxLength: 3 }),
        rows: fc.array(fc.array(text, { maxLength: 3 }), { maxLength: 3 }),
      },
      { ...title, ...source },
    ),
    one(
      'drawing',
      { layout: text, uses: fc.dictionary(fc.constantFrom('driver', 'driven', 'centres'), name, { noNullPrototype: true }) },
      title,
    ),
    one('chart', { vary: name, from: text, to: text, show: fc.array(name, { maxLength: 3 }) }, title),
    one(
      'figure',
      { image: fc.constantFrom('data:image/png;base64,AAAA', 'data:image/jpeg;base64,AA==') },
      { ...title, ...source },
    ),
  );
}

const json = fc.json({ maxDepth: 3 }).map((each) => JSON.parse(each) as unknown);
const plain = fc.array(
  json.filter(
    (each) => !/"(?:__proto__|constructor|prototype)":|\\u|[\p{Surrogate}]/u.test(JSON.stringify(each)) && each !== undefined,
  ),
  { maxLength: 3 },
);
const cases: fc.Arbitrary<readonly LoadCase[]> = fc.uniqueArray(keys({ id }, { title: text }), {
  selector: (each) => each.id,
  minLength: 1,
  maxLength: 3,
});

export const aSheet: fc.Arbitrary<Sheet> = keys(
  {
    format: fc.constant('tightside-sheet/1'),
    title: text,
    cells: fc.uniqueArray(aCell(id), { selector: (cell) => cell.id, maxLength: 8 }),
  },
  {
    templateInfo: keys(
      { id, version: fc.integer({ min: 1, max: 9 }), job: text, limits: fc.array(text, { maxLength: 2 }), caution: text },
      {},
    ),
    purpose: text,
    method: text,
    status: fc.constantFrom('in preparation', 'for checking', 'checked', 'approved', 'issued', 'superseded'),
    references: fc.uniqueArray(keys({ id, document: text }, { edition: text, title: text }), {
      selector: (each) => each.id,
      maxLength: 2,
    }),
    titleBlock: keys({}, { organisation: text, client: text, project: text, date: text, approvedBy: text }),
    settings: keys(
      {},
      { digits: fc.integer({ min: 1, max: 15 }), decimalSign: fc.constantFrom('.', ','), paper: fc.constantFrom('A4', 'Letter') },
    ),
    template: keys({ id, version: fc.integer({ min: 1, max: 9 }) }, {}),
    carriedFrom: keys({ title: text }, { documentNumber: text, revision: text }),
    cases,
    conclusion: text,
    marks: plain,
    revisions: plain,
    log: plain,
  },
) as unknown as fc.Arbitrary<Sheet>;
