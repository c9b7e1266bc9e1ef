// The shelf: listing, searching, new sheets, removing with undo, templates, files and the bundle of everything.

import { beforeEach, describe, expect, it } from 'vitest';
import { perform, readSheet, type Sheet, writeSheet } from '../../src/sheet/index.ts';
import { readBundle } from '../../src/store/bundle.ts';
import { openShelf, type Shelf, sheetFileName } from '../../src/store/shelf.ts';
import { memoryStore, type Store } from '../../src/store/store.ts';
import { given, newBrowser, opened, set, sheet, tab } from './notation.ts';

beforeEach(newBrowser);

const drive: Sheet = {
  ...sheet('Mixer drive', given('F_0', '900 N'), { id: 'n1', kind: 'note', text: 'x', toConfirm: '7' }),
  status: 'issued',
  titleBlock: { documentNumber: 'CS-014', project: 'Pilot plant', preparedBy: 'A. B.' },
};
const file = (name: string, text: string) => ({ name, text: async () => text });

describe.each([
  ['in the database', () => tab()],
  ['in memory', async () => memoryStore()],
] as const)('the shelf %s', (_where, open: () => Promise<Store>) => {
  let store: Store;
  let shelf: Shelf;
  beforeEach(async () => {
    store = await open();
    shelf = openShelf(store);
  });

  it('lists the newest first and finds by every word of title, number, project and status', async () => {
    await shelf.add(drive);
    await new Promise((done) => setTimeout(done, 3));
    await shelf.add(sheet('Rope drum'));
    expect((await shelf.list()).map((head) => head.title)).toEqual(['Rope drum', 'Mixer drive']);
    for (const search of ['mixer', 'PILOT drive', 'cs-014', 'issued  mix'])
      expect(
        (await shelf.list(search)).map((head) => head.title),
        search,
      ).toEqual(['Mixer drive']);
    expect(await shelf.list('mixer rope')).toEqual([]);
    expect((await shelf.list('rope'))[0]).toMatchObject({ status: 'in preparation', cells: 0 });
  });

  it('makes a new job from a sheet with every value carried over, and an exact copy that says so', async () => {
    const { id } = await shelf.add(drive);
    const job = await opened(store, (await shelf.newFromSheet(id, 'ab'.repeat(32))).id);
    expect(job.sheet).toMatchObject({
      status: 'in preparation',
      carriedFrom: { title: 'Mixer drive', documentNumber: 'CS-014' },
    });
    expect(job.sheet.cells[0]).toMatchObject({ value: '900 N', carriedOver: true });
    expect(job.sheet.titleBlock?.preparedBy).toBeUndefined();
    const copy = await opened(store, (await shelf.copy(id)).id);
    expect(copy.sheet).toEqual({ ...drive, title: 'Mixer drive (copy)', status: 'in preparation' });
  });

  it('removes and restores with the steps to undo, and empties the trash for good', async () => {
    const { id } = await shelf.add(drive);
    const keeper = await opened(store, id);
    set(keeper, 'F_0', '950 N');
    await keeper.close();
    expect((await shelf.remove(id))?.head.title).toBe('Mixer drive');
    expect(await shelf.list()).toEqual([]);
    expect((await shelf.trash()).map((row) => row.id)).toEqual([id]);
    expect((await shelf.restore(id))?.id).toBe(id);
    expect(await shelf.trash()).toEqual([]);
    expect((await opened(store, id)).history.past.map((step) => step.label)).toEqual(['value of F_0']);
    await shelf.remove(id);
    expect(await shelf.emptyTrash()).toBe(1);
    expect(await shelf.restore(id)).toBeUndefined();
    await expect(shelf.textOf(id)).rejects.toMatchObject({ problem: { code: 'not-here' } });
  });

  it('keeps own templates in versions, without what belongs to the job', async () => {
    const about = { id: 'mixer', job: 'mixer drives', limits: [], caution: 'Checked by a licensed engineer.' };
    const first = await shelf.keepTemplate({ ...drive, cells: [{ ...given('F_0', '9 N'), carriedOver: true }] }, about);
    const again = await shelf.keepTemplate(drive, about);
    expect([first.version, again.version]).toEqual([1, 2]);
    expect((await shelf.templates()).length).toBe(1);
    const read = readSheet(first.text);
    if (!read.ok) throw new Error(read.problems[0]?.message);
    expect(read.value).toMatchObject({ templateInfo: { ...about, version: 1 } });
    // The caution of the template stands in its sheets as a note; the value is carried over into them.
    expect(read.value.cells).toEqual([
      { id: 'n1', kind: 'note', text: about.caution, role: 'caution' },
      { ...given('F_0', '9 N'), carriedOver: true },
    ]);
    expect(read.value.titleBlock?.preparedBy).toBeUndefined();
    const made = await opened(store, (await shelf.newFromTemplate(read.value)).id);
    expect(made.sheet.template).toEqual({ id: 'mixer', version: 1 });
    expect((await shelf.removeTemplate('mixer'))?.version).toBe(2);
    expect(await shelf.templates()).toEqual([]);
  });

  it('takes files in by their content, each by itself, and returns what is wrong with the others', async () => {
    const template: Sheet = {
      ...sheet('T'),
      templateInfo: { id: 't', version: 1, job: 'j', limits: [], caution: 'c' },
    };
    const done = await shelf.importFiles([
      file('good.json', writeSheet(drive)),
      file('bad.json', '{"format":"tightside-sheet/1","title":1,"cells":[],"more":2}'),
      file('later.json', '{"format":"tightside-sheet/9","title":"x","cells":[]}'),
      file('t.json', writeSheet(template)),
    ]);
    expect(done.sheets.map((head) => head.title)).toEqual(['Mixer drive']);
    expect(done.templates.map((row) => row.id)).toEqual(['t']);
    expect(done.refused.map((one) => one.name)).toEqual(['bad.json', 'later.json']);
    expect(done.refused[0]?.problems.map((problem) => problem.code).sort()).toEqual(['unknown-key', 'wrong-type']);
    expect(done.refused[0]?.message).toContain('bad.json: ');
    expect(done.refused[1]?.problems[0]?.code).toBe('newer-format');
  });

  it('everything goes out as one file and comes back the same, character for character; what is here is never overwritten', async () => {
    const { id } = await shelf.add(drive);
    await shelf.add(sheet('Rope drum ∅ “x” \u2028', given('d', '1 500 mm')));
    await shelf.keepTemplate(drive, { id: 'mixer', job: 'mixer drives', limits: ['a'], caution: 'c' });
    const out = await shelf.exportAll();
    expect(out.name).toMatch(/^Tightside, all sheets, \d{4}-\d\d-\d\d\.json$/u);

    newBrowser();
    const other = await open();
    const there = openShelf(other);
    const taken = await there.importFiles([file('all.json', out.text)]);
    expect([taken.sheets.length, taken.templates.length, taken.same, taken.refused]).toEqual([2, 1, 0, []]);
    expect((await there.exportAll()).text).toBe(out.text);
    expect(await there.importFiles([file('all.json', out.text)])).toMatchObject({ sheets: [], templates: [], same: 3 });
    expect((await there.exportAll()).text).toBe(out.text);

    // The same id with another text: both stay.
    const keeper = await opened(other, id);
    const done = perform(keeper.sheet, keeper.history, { kind: 'set-head', key: 'title', value: 'Changed here' });
    keeper.keep(done.sheet, done.history);
    await keeper.close();
    await there.importFiles([file('all.json', out.text)]);
    expect((await there.list('mixer')).length).toBe(1);
    expect((await there.list('changed')).map((head) => head.id)).toEqual([id]);
  });

  it.each([
    ['a torn bundle', '{"format":"tightside-bundle/1","sheets":[{"id":"a","ma', 'it was cut off'],
    ['a later bundle', '{"format":"tightside-bundle/2","sheets":[]}', 'Reload the page to get the later version'],
    ['another key', '{"format":"tightside-bundle/1","sheets":[],"templates":[],"x":1}', 'damaged at x'],
    [
      'a bad id',
      '{"format":"tightside-bundle/1","sheets":[{"id":"../x","made":1,"changed":1,"text":""}],"templates":[]}',
      'sheets.0.id',
    ],
    [
      'a bad time',
      '{"format":"tightside-bundle/1","sheets":[{"id":"x","made":-1,"changed":1,"text":""}],"templates":[]}',
      'sheets.0.made',
    ],
  ])('refuses %s in one sentence and changes nothing', async (_what, text, words) => {
    const done = await shelf.importFiles([file('all.json', text)]);
    expect(done.refused[0]?.message).toContain(words);
    expect([done.sheets, done.templates]).toEqual([[], []]);
    expect(await shelf.list()).toEqual([]);
  });

  it('takes the readable sheets of a bundle and names the others', async () => {
    const text = JSON.stringify({
      format: 'tightside-bundle/1',
      sheets: [
        { id: 'a', made: 1, changed: 1, text: '{"torn' },
        { id: 'b', made: 1, changed: 1, text: writeSheet(drive) },
      ],
      templates: [{ id: 't', changed: 1, text: writeSheet(drive) }],
    });
    const done = await shelf.importFiles([file('all.json', text)]);
    expect(done.sheets.map((head) => head.id)).toEqual(['b']);
    expect(done.refused.map((one) => one.name)).toEqual(['all.json, sheet a', 'all.json, template t']);
  });
});

describe('between tabs', () => {
  it('a change of the shelf is seen in the other one', async () => {
    const [one, other] = [openShelf(await tab()), openShelf(await tab())];
    let told = 0;
    other.subscribe(() => {
      told += 1;
    });
    const { id } = await one.add(drive);
    await expect.poll(() => told).toBe(1);
    await one.remove(id);
    await expect.poll(() => told).toBe(2);
    await one.restore(id);
    await expect.poll(() => told).toBe(3);
  });
});

describe('names of files', () => {
  it.each([
    [drive, 'CS-014 Mixer drive.sheet.json'],
    [sheet('a/b\\c: "d" <e>|?*\u0000.. '), 'a b c d e.sheet.json'],
    [sheet(''), 'sheet.sheet.json'],
    [sheet('x'.repeat(500)), `${'x'.repeat(100)}.sheet.json`],
  ])('hold no sign that a file system refuses', (what, name) => {
    expect(sheetFileName(what)).toBe(name);
  });
});

describe('a bundle', () => {
  it('with keys of objects as names is plain data', () => {
    const read = readBundle('{"format":"tightside-bundle/1","sheets":[],"templates":[],"__proto__":{"x":1}}');
    expect(read.ok).toBe(false);
    expect(({} as { x?: number }).x).toBeUndefined();
  });
});
