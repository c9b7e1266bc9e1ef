// The form of a new sheet: what is filled is what `--set` and `--case` would set, what is wrong is told with its correction; and every
// template of the house stands under a kind of job.

import { readdirSync, readFileSync } from 'node:fs';
import { describe, expect, it } from 'vitest';
import { casesOf, type GivenCell, newFromTemplate, readSheet, type Sheet, setValues } from '../../src/sheet/index.ts';
import { builtIns, kindsFound } from '../../src/view/shelf/built-in.ts';
import { assignmentsOf, checkPlace, placesOf } from '../../src/view/shelf/fill-values.ts';

const folder = new URL('../../templates/', import.meta.url);
function template(id: string): Sheet {
  const read = readSheet(readFileSync(new URL(`${id}.sheet.json`, folder), 'utf8'));
  if (!read.ok) throw new Error(id);
  return newFromTemplate(read.value);
}
const capstan = template('capstan');
const given = (sheet: Sheet, name: string) =>
  sheet.cells.find((cell): cell is GivenCell => cell.kind === 'given' && cell.name === name)!;
const none: ReadonlySet<string> = new Set();
const places = (name: string, split = none) => placesOf(given(capstan, name), casesOf(capstan), split);
const first = (name: string) => places(name)[0]!;

describe('what is filled', () => {
  const mu = given(capstan, 'mu').id;
  const load = given(capstan, 'F_load').id;
  it.each([
    ['one value for all cases', 'F_load', none, { [load]: ' 8 kN ' }, [{ name: 'F_load', value: '8 kN' }]],
    ['nothing', 'F_load', none, { [load]: ' ' }, []],
    ['one case of two', 'mu', none, { [`${mu}/high`]: '0.4' }, [{ name: 'mu', value: '0.4', case: 'high' }]],
    [
      'both cases',
      'mu',
      none,
      { [`${mu}/low`]: '0.1', [`${mu}/high`]: '0.4' },
      [
        { name: 'mu', value: '0.1' },
        { name: 'mu', value: '0.4', case: 'high' },
      ],
    ],
    ['both cases alike', 'mu', none, { [`${mu}/low`]: '0.2', [`${mu}/high`]: '0.2' }, [{ name: 'mu', value: '0.2' }]],
    [
      'a case of a given that has one value in the template',
      'F_load',
      new Set([load]),
      { [`${load}/high`]: '9 kN' },
      [{ name: 'F_load', value: '9 kN', case: 'high' }],
    ],
  ] as const)('%s', (_what, name, split, filled, expected) => {
    expect(assignmentsOf(places(name, split), new Map(Object.entries(filled)))).toEqual(expected);
  });

  it('in every case confirms the given, in one it stays carried over', () => {
    const set = (filled: Record<string, string>) => {
      const done = setValues(capstan, assignmentsOf(places('mu'), new Map(Object.entries(filled))));
      if (!done.ok) throw new Error(done.problems[0]?.message);
      return given(done.value, 'mu');
    };
    expect(set({ [`${mu}/low`]: '0.1', [`${mu}/high`]: '0.4' })).toMatchObject({ value: '0.1', byCase: { high: '0.4' } });
    expect(set({ [`${mu}/low`]: '0.1', [`${mu}/high`]: '0.4' }).carriedOver).toBeUndefined();
    expect(set({ [`${mu}/high`]: '0.4' }).carriedOver).toBe(true);
  });
});

describe('what is wrong', () => {
  const apply = (name: string, text: string): readonly string[] =>
    checkPlace(capstan, first(name), text).flatMap((problem) =>
      (problem.fixes ?? []).map((fix) => text.slice(0, fix.from) + fix.text + text.slice(fix.to)),
    );
  it.each([
    ['F_load', '8', 'unlike-value', ['8 kN', '8 N']],
    ['F_load', ' 8  ', 'unlike-value', [' 8 kN', ' 8 N']],
    ['F_load', '8 m', 'unlike-value', []],
    ['N', '3 m', 'unlike-value', []],
  ])('%s: “%s” is told as %s, with %j', (name, text, code, fixes) => {
    expect(checkPlace(capstan, first(name), text).map((problem) => [problem.code, problem.severity])).toEqual([[code, 'error']]);
    expect(apply(name, text)).toEqual(fixes);
  });
  it('a bare number in the place of an angle or of per cent warns with the unit that may be meant', () => {
    const [told] = checkPlace(capstan, first('alpha'), '40');
    expect(told).toMatchObject({ code: 'bare-angle', severity: 'warning', message: expect.stringContaining('an angle in rad') });
    expect(apply('alpha', '40')).toEqual(['40°', '40 rad']);
    const creep = template('belt-creep');
    const [share] = placesOf(given(creep, 's_max'), casesOf(creep), none);
    expect(checkPlace(creep, share!, '2')[0]?.fixes).toMatchObject([{ text: ' %' }]);
    // A plain number where the template has one is nothing to be told.
    expect(checkPlace(capstan, first('N'), '2')).toEqual([]);
  });
  it('a misspelt unit has its correction in the text of the field', () => {
    expect(apply('F_load', '8 Kn')).toContain('8 kN');
  });
  it('a value outside the range of the template warns and can be taken', () => {
    expect(checkPlace(capstan, first('F_load'), '900 kN')).toMatchObject([{ code: 'outside-range', severity: 'warning' }]);
  });
  it('a right value and an empty field have nothing against them', () => {
    expect([checkPlace(capstan, first('F_load'), '8 kN'), checkPlace(capstan, first('F_load'), '')]).toEqual([[], []]);
  });
});

describe('the templates of the house', () => {
  it('stand each under one kind of job', () => {
    const ids = readdirSync(folder).map((file) => file.replace('.sheet.json', ''));
    const kinds = kindsFound('');
    expect(kinds.map((kind) => kind.title)).not.toContain('Other jobs');
    expect(kinds.flatMap((kind) => kind.templates.map((one) => one.id)).sort()).toEqual(ids.sort());
    expect([...builtIns().keys()].sort()).toEqual(ids.sort());
  });
  it.each([
    ['mooring', ['capstan']],
    ['VEE BELT', ['v-belt']],
    ['hoist', ['band-brake-simple', 'drum-dead-turns', 'traction-sheave']],
    ['no such word', []],
  ])('are found by the words of the trade: %s', (search, ids) => {
    const found = kindsFound(search).flatMap((kind) => kind.templates.map((one) => one.id));
    expect(found).toEqual(expect.arrayContaining([...ids]));
    if (ids.length < 2) expect(found).toEqual(ids);
  });
});
