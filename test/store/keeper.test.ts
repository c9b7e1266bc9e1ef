// An open sheet as it is kept: durable when it says so, undo across reloads, one writer, followers, and every trouble.

import fc from 'fast-check';
import { beforeEach, describe, expect, it } from 'vitest';
import { type History, perform, redo, type Sheet, undo } from '../../src/sheet/index.ts';
import type { Backend } from '../../src/store/backend.ts';
import { newRow } from '../../src/store/head.ts';
import { locksOf } from '../../src/store/holder.ts';
import { openSheet } from '../../src/store/keeper.ts';
import { StoreFault, storeProblem } from '../../src/store/problem.ts';
import { openShelf } from '../../src/store/shelf.ts';
import { memoryStore, type Store } from '../../src/store/store.ts';
import { fakeLocks, given, newBrowser, next, opened, set, sheet, tab, valueOf } from './notation.ts';

beforeEach(newBrowser);

const onShelf = async (store: Store, what: Sheet = sheet('Drive', given('F_0', '900 N'), given('d', '200 mm'))) =>
  (await openShelf(store).add(what)).id;

describe('what is handed over', () => {
  it('is in the database when the state says kept, with the step that takes it back', async () => {
    const store = await tab();
    const keeper = await opened(store, await onShelf(store));
    expect(keeper.state.kind).toBe('kept');
    set(keeper, 'F_0', '950 N');
    expect(keeper.state.kind).toBe('keeping');
    expect(await keeper.kept()).toBe(true);
    expect(keeper.state.kind).toBe('kept');
    // Asked of the database by another connection, without closing anything.
    const row = await (await tab()).backend.read(keeper.id);
    expect(row?.text).toContain('950 N');
    expect(row?.position).toBe(1);
  });

  it('is written by itself, without anybody asking', async () => {
    const store = await tab();
    const keeper = await opened(store, await onShelf(store));
    set(keeper, 'F_0', '950 N');
    await expect.poll(() => keeper.state.kind).toBe('kept');
    expect((await store.backend.read(keeper.id))?.text).toContain('950 N');
  });

  it('many edits in a moment make one write', async () => {
    const store = await tab();
    let writes = 0;
    const counting: Backend = {
      ...store.backend,
      write(change) {
        writes += 1;
        return store.backend.write(change);
      },
    };
    const keeper = await opened({ ...store, backend: counting }, await onShelf(store), 40);
    for (let n = 0; n < 50; n += 1) set(keeper, 'F_0', `${n} N`);
    await expect.poll(() => keeper.state.kind).toBe('kept');
    expect(writes).toBe(1);
    expect(valueOf(keeper.sheet, 'F_0')).toBe('49 N');
  });

  it('undo and redo go on after a reload, exactly where they stood', async () => {
    const store = await tab();
    const id = await onShelf(store);
    let keeper = await opened(store, id);
    for (const value of ['1 N', '2 N', '3 N', '4 N']) set(keeper, 'F_0', value);
    for (let n = 0; n < 2; n += 1) {
      const back = undo(keeper.sheet, keeper.history)!;
      keeper.keep(back.sheet, back.history);
    }
    await keeper.close();
    keeper = await opened(store, id);
    expect(valueOf(keeper.sheet, 'F_0')).toBe('2 N');
    expect(keeper.history.past.map((step) => step.label)).toEqual(['value of F_0', 'value of F_0']);
    expect(valueOf(redo(keeper.sheet, keeper.history)!.sheet, 'F_0')).toBe('3 N');
    expect(valueOf(undo(keeper.sheet, keeper.history)!.sheet, 'F_0')).toBe('1 N');
  });

  it('a text that is being typed is kept as a draft and gone when it is finished', async () => {
    const store = await tab();
    const id = await onShelf(store);
    let keeper = await opened(store, id);
    keeper.keepDraft({ cell: 'g-F_0', text: '95' });
    await keeper.close();
    keeper = await opened(store, id);
    expect(keeper.draft).toEqual({ cell: 'g-F_0', text: '95' });
    keeper.keepDraft(null);
    await keeper.close();
    expect((await opened(store, id)).draft).toBeNull();
  });

  it('a pasted control character or half a surrogate pair does not make the sheet unreadable', async () => {
    const store = await tab();
    const id = await onShelf(store);
    const keeper = await opened(store, id);
    set(keeper, 'F_0', 'a\u0000b\ud800c');
    await keeper.close();
    expect(valueOf((await opened(store, id)).sheet, 'F_0')).toBe('a\uFFFDb\uFFFDc');
  });

  it('random editing, undoing, failing writes and reloads end in the sheet and the history that stood on the screen', async () => {
    const act = fc.oneof(
      {
        weight: 6,
        arbitrary: fc.record({ do: fc.constant('set'), at: fc.integer({ min: 0, max: 2 }), value: fc.string({ maxLength: 8 }) }),
      },
      { weight: 3, arbitrary: fc.record({ do: fc.constantFrom('undo', 'redo') }) },
      { weight: 2, arbitrary: fc.record({ do: fc.constantFrom('kept', 'wait', 'reload', 'fail') }) },
    );
    let failing = 0;
    await fc.assert(
      fc.asyncProperty(fc.array(act, { minLength: 1, maxLength: 40 }), async (acts) => {
        newBrowser();
        const store = await tab();
        const flaky: Backend = {
          ...store.backend,
          async write(change) {
            if (failing > 0) {
              failing -= 1;
              throw new StoreFault(storeProblem('full'));
            }
            return store.backend.write(change);
          },
        };
        const id = await onShelf(store, sheet('x', given('a', '1'), given('b', '2'), given('c', '3')));
        let keeper = await opened({ ...store, backend: flaky }, id, 1);
        let now: { sheet: Sheet; history: History } = { sheet: keeper.sheet, history: keeper.history };
        failing = 0;
        const reload = async () => {
          failing = 0;
          expect(await keeper.kept()).toBe(true);
          await keeper.close();
          keeper = await opened({ ...store, backend: flaky }, id, 1);
          expect(keeper.sheet).toEqual(now.sheet);
          expect(keeper.history).toEqual(now.history);
          now = { sheet: keeper.sheet, history: keeper.history };
        };
        for (const one of acts) {
          if (one.do === 'set' && 'value' in one) {
            const value = one.value.replace(/[\p{Cc}\p{Surrogate}]/gu, '');
            const cell = given('abc'[one.at]!, value);
            now = perform(now.sheet, now.history, { kind: 'set-cell', cell }, { key: cell.id, time: Date.now() });
          } else if (one.do === 'undo') now = undo(now.sheet, now.history) ?? now;
          else if (one.do === 'redo') now = redo(now.sheet, now.history) ?? now;
          else if (one.do === 'kept') await keeper.kept();
          else if (one.do === 'wait') await new Promise((done) => setTimeout(done, 3));
          else if (one.do === 'fail') failing = 1;
          else await reload();
          keeper.keep(now.sheet, now.history);
        }
        await reload();
        await keeper.close();
      }),
      { seed: 20260301, numRuns: 60 },
    );
  });

  it('steps of long ago are dropped at opening, those of two days and the last two hundred are not', async () => {
    const store = await tab();
    const id = await onShelf(store);
    const keeper = await opened(store, id);
    for (let n = 0; n < 260; n += 1) set(keeper, 'F_0', `${n} N`);
    await keeper.close();
    const day = 24 * 60 * 60 * 1000;
    const rows = (before: number) => store.backend.claim(id, 'test', { before, least: 200, most: 5000 });
    expect((await rows(Date.now() - 2 * day))?.steps.length).toBe(260);
    expect((await rows(Date.now() + day))?.steps.length).toBe(200);
    const again = await opened(store, id);
    expect(again.history.past.length).toBe(200);
    let now = { sheet: again.sheet, history: again.history };
    while (now.history.past.length > 0) now = undo(now.sheet, now.history)!;
    expect(valueOf(now.sheet, 'F_0')).toBe('59 N');
  });
});

describe('what a closing page put down', () => {
  /** Leaves the sheet as a page does that sees no answer any more. */
  const leftBehind = async (store: Store, id: string, force: string) => {
    const dead: Backend = { ...store.backend, write: () => new Promise(() => undefined) };
    const keeper = await opened({ ...store, backend: dead }, id, 60_000);
    set(keeper, 'F_0', force);
    const { head } = keeper;
    const change = newRow(keeper.sheet, { id, history: keeper.history, draft: 'typed' });
    await store.backend.leave({ ...change, sheet: id, writer: head.writer, rev: head.rev, head });
    return keeper;
  };

  it('is part of the sheet when it is opened next, with its step and its draft, once', async () => {
    const store = await tab();
    const id = await onShelf(store);
    await leftBehind(store, id, '5 N');
    const keeper = await opened(store, id);
    expect(valueOf(keeper.sheet, 'F_0')).toBe('5 N');
    expect(keeper.draft).toBe('typed');
    expect(valueOf(undo(keeper.sheet, keeper.history)!.sheet, 'F_0')).toBe('900 N');
    set(keeper, 'F_0', '6 N');
    await keeper.close();
    expect(valueOf((await opened(store, id)).sheet, 'F_0')).toBe('6 N');
  });

  it('gives way to the ordinary write where that came through', async () => {
    const store = await tab();
    const id = await onShelf(store);
    const keeper = await opened(store, id, 60_000);
    const before = keeper.head;
    set(keeper, 'F_0', '6 N');
    expect(await keeper.kept()).toBe(true);
    const old = newRow({ ...keeper.sheet, title: 'old' }, { id });
    await store.backend.leave({ ...old, sheet: id, writer: before.writer, rev: before.rev, head: { ...before, title: 'old' } });
    const again = await opened(store, id);
    expect([again.sheet.title, valueOf(again.sheet, 'F_0')]).toEqual(['Drive', '6 N']);
  });

  it('becomes a sheet of its own where another tab had taken over already', async () => {
    const store = await tab();
    const id = await onShelf(store);
    const late = await leftBehind(store, id, '5 N');
    const { head } = late;
    const other = await opened(store, id);
    set(other, 'F_0', '7 N');
    await other.close();
    const change = newRow(late.sheet, { id, history: late.history });
    await store.backend.leave({ ...change, sheet: id, writer: head.writer, rev: head.rev, head });
    const done = await openSheet(store, id);
    if (!done.ok) throw new Error(done.problem.message);
    expect(valueOf(done.keeper.sheet, 'F_0')).toBe('7 N');
    expect(done.note).toBe('What a closed tab had not kept yet is now the sheet “Drive (changes not kept)”.');
    const copies = await openShelf(store).list('changes not kept');
    expect(copies.map((one) => one.copyOf)).toEqual([id]);
    expect(valueOf((await opened(store, copies[0]!.id)).sheet, 'F_0')).toBe('5 N');
    await done.keeper.close();
    await opened(store, id);
    expect((await openShelf(store).list('changes not kept')).length).toBe(1);
  });
});

describe('a second tab', () => {
  const two = async () => {
    const manager = fakeLocks();
    const locked = async () => ({ ...(await tab()), locks: locksOf(manager) });
    const [one, other] = [await locked(), await locked()];
    const id = await onShelf(one);
    return { one, other, id, third: locked };
  };

  it('follows what the first one writes, and shares the cells that did not change', async () => {
    const { one, other, id } = await two();
    const writer = await opened(one, id);
    const follower = await opened(other, id);
    expect([writer.role, follower.role]).toEqual(['writer', 'follower']);
    expect(follower.state.kind).toBe('following');
    const untouched = follower.sheet.cells[1];
    const followed = next(follower, 'followed');
    set(writer, 'F_0', '950 N');
    await followed;
    await expect.poll(() => valueOf(follower.sheet, 'F_0')).toBe('950 N');
    expect(follower.sheet.cells[1]).toBe(untouched);
    expect(set(follower, 'F_0', '1 N')).toBe(false);
    expect(valueOf(follower.sheet, 'F_0')).toBe('950 N');
  });

  it('takes over when asked: the first hands in what is typed, is told, and follows; nothing is lost', async () => {
    const { one, other, id } = await two();
    const writer = await opened(one, id, 10_000);
    const follower = await opened(other, id);
    set(writer, 'F_0', '950 N');
    const asked = next(writer, 'hand-in').then(() => set(writer, 'd', '250 mm'));
    const told = next(writer, 'follower');
    expect(await follower.takeOver()).toBe(true);
    expect(await asked).toBe(true);
    expect((await told).message).toContain('Another tab has taken over this sheet. Everything you wrote is in it.');
    expect([writer.role, follower.role]).toEqual(['follower', 'writer']);
    expect(valueOf(follower.sheet, 'F_0')).toBe('950 N');
    expect(valueOf(follower.sheet, 'd')).toBe('250 mm');
    expect(follower.history.past.length).toBe(2);
    set(follower, 'F_0', '960 N');
    await expect.poll(() => valueOf(writer.sheet, 'F_0')).toBe('960 N');
    expect((await openShelf(one).list()).length).toBe(1);
    // And back again.
    expect(await writer.takeOver()).toBe(true);
    expect([writer.role, follower.role]).toEqual(['writer', 'follower']);
    expect(valueOf(writer.sheet, 'F_0')).toBe('960 N');
  });

  it('writes by itself once the first is closed', async () => {
    const { one, other, id } = await two();
    const writer = await opened(one, id);
    const follower = await opened(other, id);
    set(writer, 'F_0', '950 N');
    const told = next(follower, 'writer');
    await writer.close();
    expect((await told).message).toContain('you can write here now');
    expect(valueOf(follower.sheet, 'F_0')).toBe('950 N');
    expect(set(follower, 'F_0', '970 N')).toBe(true);
    expect(await follower.kept()).toBe(true);
  });

  it('takes over from a tab that does not answer; what that one had not kept becomes a sheet of its own', async () => {
    const { one, other, id } = await two();
    const deaf: Store = { ...one, hub: { post() {}, subscribe: () => () => undefined, close() {} } };
    const writer = await opened(deaf, id, 10_000);
    const follower = await opened(other, id);
    set(writer, 'F_0', '955 N');
    writer.keepDraft({ text: 'half' });
    const told = next(writer, 'follower');
    expect(await follower.takeOver()).toBe(true);
    set(follower, 'F_0', '960 N');
    expect(await follower.kept()).toBe(true);
    const { message, copy } = await told;
    expect(message).toContain('What this tab had not kept yet is now the sheet “Drive (changes not kept)”.');
    expect(copy?.copyOf).toBe(id);
    const rescued = await opened(other, copy!.id);
    expect(valueOf(rescued.sheet, 'F_0')).toBe('955 N');
    expect(rescued.draft).toEqual({ text: 'half' });
    expect(rescued.history.past.length).toBe(1);
    expect(valueOf(follower.sheet, 'F_0')).toBe('960 N');
    expect(set(writer, 'F_0', '1 N')).toBe(false);
  });

  it('that asked and vanished leaves the first one writing', async () => {
    const { one, other, id } = await two();
    const writer = await opened(one, id);
    other.hub.post({ kind: 'ask', sheet: id, tab: 'gone by now' });
    await next(writer, 'follower');
    expect(writer.role).toBe('follower');
    await next(writer, 'writer');
    expect(set(writer, 'F_0', '980 N')).toBe(true);
    expect(await writer.kept()).toBe(true);
  });

  it('where the browser has no locks, the later one writes and the earlier one is told with its work set aside', async () => {
    const [one, other] = [await tab(), await tab()];
    const id = await onShelf(one);
    const early = await opened(one, id, 10_000);
    set(early, 'F_0', '955 N');
    const told = next(early, 'follower');
    const late = await opened(other, id);
    expect((await told).copy?.title).toBe('Drive (changes not kept)');
    expect([early.role, late.role]).toEqual(['follower', 'writer']);
    expect(set(late, 'F_0', '960 N')).toBe(true);
    expect(await late.kept()).toBe(true);
  });
});

describe('trouble', () => {
  it('a sheet removed in another tab is told; it is kept as a new one, or goes on when it is restored', async () => {
    const [one, other] = [await tab(), await tab()];
    const id = await onShelf(one);
    const keeper = await opened(one, id);
    set(keeper, 'F_0', '950 N');
    await keeper.kept();
    await openShelf(other).remove(id);
    await expect.poll(() => keeper.state.kind).toBe('trouble');
    set(keeper, 'F_0', '951 N');
    expect(await keeper.kept()).toBe(false);
    const state = keeper.state;
    if (state.kind !== 'trouble') throw new Error('no trouble');
    expect(state.problem.code).toBe('gone');
    expect(state.problem.message).toContain('What is on the screen is complete.');
    expect(state.problem.wayOut).toEqual(['keep as a new sheet', 'save as a file']);
    const fresh = await keeper.keepAsNew();
    const saved = await opened(other, fresh.id);
    expect(valueOf(saved.sheet, 'F_0')).toBe('951 N');
    expect(saved.history.past.length).toBe(2);
    await openShelf(other).restore(id);
    await expect.poll(() => keeper.state.kind).toBe('kept');
    expect((await one.backend.read(id))?.text).toContain('951 N');
  });

  it('no room: the sheet stays on the screen, the words say so, and it is kept as soon as there is room', async () => {
    const store = await tab();
    let full = true;
    const small: Backend = {
      ...store.backend,
      write: (change) => (full ? Promise.reject(new StoreFault(storeProblem('full'))) : store.backend.write(change)),
    };
    const keeper = await opened({ ...store, backend: small }, await onShelf(store));
    set(keeper, 'F_0', '950 N');
    expect(await keeper.kept()).toBe(false);
    expect(keeper.state).toMatchObject({
      kind: 'trouble',
      problem: { code: 'full', wayOut: ['save as a file', 'export everything', 'try again'] },
    });
    expect(await keeper.close()).toBe(false);
    full = false;
    keeper.tryAgain();
    await expect.poll(() => keeper.state.kind).toBe('kept');
    expect((await store.backend.read(keeper.id))?.position).toBe(1);
  });

  it('an unreadable text is kept as it is and handed out; a sheet of a later version too, with other words', async () => {
    const store = await tab();
    const shelf = openShelf(store);
    const put = async (text: string) => {
      const id = await onShelf(store);
      const { head, position, draft } = (await store.backend.claim(id, 'test', { before: 0, least: 1, most: 1 }))!;
      await store.backend.write({ head, expected: head.rev, text, position, draft, dropFrom: null, put: [] });
      return id;
    };
    const torn = await put('{"format":"tightside-sheet/1","title":"Dri');
    const refused = await openSheet(store, torn);
    expect(refused).toMatchObject({ ok: false, problem: { code: 'unreadable', wayOut: ['download the text'] } });
    expect((await shelf.textOf(torn)).text).toBe('{"format":"tightside-sheet/1","title":"Dri');
    expect((await shelf.list()).find((head) => head.id === torn)?.unreadable).toContain('line 1');
    const later = await put('{"format":"tightside-sheet/2","title":"Drive","cells":[]}');
    expect(await openSheet(store, later)).toMatchObject({ ok: false, problem: { code: 'newer-sheet' } });
    expect((await shelf.list()).find((head) => head.id === later)?.unreadable).toBeUndefined();
    expect(await openSheet(store, 'nowhere')).toMatchObject({ ok: false, problem: { code: 'not-here' } });
  });

  it('a broken line of steps costs the steps only', async () => {
    const store = await tab();
    const id = await onShelf(store);
    const keeper = await opened(store, id);
    for (const value of ['1 N', '2 N', '3 N']) set(keeper, 'F_0', value);
    await keeper.close();
    const { head, text } = (await store.backend.claim(id, 'test', { before: 0, least: 9, most: 9 }))!;
    await store.backend.write({ head, expected: null, text, position: 7, draft: null, dropFrom: 2, put: [] });
    const done = await openSheet(store, id, { delay: 1 });
    if (!done.ok) throw new Error(done.problem.message);
    expect(done.note).toContain('the sheet itself is complete');
    expect(valueOf(done.keeper.sheet, 'F_0')).toBe('3 N');
    expect(done.keeper.history.past).toEqual([]);
    set(done.keeper, 'F_0', '5 N');
    await done.keeper.close();
    const again = await opened(store, id);
    expect(again.history.past.length).toBe(1);
    expect(valueOf(undo(again.sheet, again.history)!.sheet, 'F_0')).toBe('3 N');
  });

  it('a browser that keeps nothing: work goes on in the memory of the tab, and the words say so', async () => {
    const store = memoryStore();
    expect(store.problem?.code).toBe('unavailable');
    expect(store.problem?.message).toContain('save the sheet as a file');
    const keeper = await opened(store, await onShelf(store));
    set(keeper, 'F_0', '950 N');
    expect(await keeper.kept()).toBe(true);
    await keeper.close();
    expect((await opened(store, keeper.id)).history.past.length).toBe(1);
  });
});
