// The writes of one open sheet: what is handed over is durable within a second, and "kept" means that the transaction has completed.
//
// 1. The first change after a quiet moment starts a clock of `delay`; when it has run, everything handed over by then is written at once.
// 2. `hurry` does not wait, not even for an answer: a page that is being closed sees none. What it puts down becomes part of the sheet when
//    it is opened next, unless the ordinary write came through.
// 3. Writes follow each other by rev. After one has failed, the next writes the whole line of steps anew: nothing is built on what is not there.
// 4. A write that failed for want of room, or for no reason that we know, is tried again by itself, with growing pauses, and on every change.
// Not here: who may write (keeper.ts).

import { emptyHistory, type History, type Sheet } from '../sheet/index.ts';
import type { Backend, KeptWithSteps } from './backend.ts';
import { headOf } from './head.ts';
import { problemOf, type StoreProblem } from './problem.ts';
import type { Draft, SheetHead } from './rows.ts';
import { keptText } from './sheet-text.ts';
import { historyOf, type KeptLine, lineChange, noLine } from './steps.ts';

export interface Work {
  readonly sheet: Sheet;
  readonly history: History;
  readonly draft: Draft | null;
}
export interface Queue {
  readonly work: Work;
  readonly head: SheetHead;
  /** True while something handed over is not durable yet. */
  readonly behind: boolean;
  readonly problem: StoreProblem | null;
  put(work: Work): void;
  /** Puts down at once what is not durable yet, and starts writing it: the page may be gone in a moment. */
  hurry(): void;
  /** True when all that was handed over until now is durable, false when it could not be kept. */
  kept(): Promise<boolean>;
  /** Stops writing; resolves when no write is under way. */
  stop(): Promise<void>;
  fail(problem: StoreProblem): void;
  tryAgain(): void;
}
export interface QueueOptions {
  readonly backend: Backend;
  readonly sheet: Sheet;
  readonly row: KeptWithSteps;
  readonly delay: number;
  readonly onChange: () => void;
  readonly onKept: (rev: number) => void;
  readonly onFail: (problem: StoreProblem) => void;
}

const pauses = [2000, 4000, 8000, 15_000, 30_000];
const worthTrying: ReadonlySet<string> = new Set(['full', 'not-kept']);

export function startQueue(options: QueueOptions): Queue {
  const { backend, row, delay } = options;
  const there = historyOf(row.steps, row.position);
  let work: Work = { sheet: options.sheet, history: there?.history ?? emptyHistory, draft: row.draft };
  let head = row.head;
  // What the next write builds on; null: it writes everything.
  let base: { readonly rev: number; readonly line: KeptLine } | null =
    there === undefined ? null : { rev: head.rev, line: there.line };
  let handed = 0;
  let issued = 0;
  let durable = 0;
  let under = 0;
  let failures = 0;
  let stopped = false;
  let problem: StoreProblem | null = null;
  let clock: ReturnType<typeof setTimeout> | undefined;
  const waiting: { readonly until: number; readonly done: (kept: boolean) => void }[] = [];
  const quiet: (() => void)[] = [];

  const answer = (kept: boolean) => {
    for (const one of waiting.splice(0)) {
      if (!kept || one.until <= durable) one.done(kept);
      else waiting.push(one);
    }
  };
  const start = (after: number) => {
    if (stopped) return;
    clock ??= setTimeout(() => {
      clock = undefined;
      if (under === 0) issue();
    }, after);
  };

  const issue = () => {
    clearTimeout(clock);
    clock = undefined;
    const mine = handed;
    issued = mine;
    under += 1;
    const now = Date.now();
    const { sheet, history, draft } = work;
    const { first } = base?.line ?? noLine(0).line;
    const change = lineChange(head.id, base?.line ?? { first, steps: [] }, history, now);
    const expected = base?.rev ?? null;
    if (base !== null) base = { rev: base.rev + 1, line: change.line };
    const next = headOf(sheet, { ...head, changed: now });
    backend
      .write({
        head: next,
        expected,
        text: keptText(sheet),
        position: change.position,
        draft,
        dropFrom: expected === null ? 0 : change.dropFrom,
        put: change.put,
      })
      .then((rev) => succeeded(rev, mine, next, change.line))
      .catch((cause) => failed(problemOf(cause)))
      .finally(() => {
        under -= 1;
        if (under === 0) for (const done of quiet.splice(0)) done();
        if (under === 0 && handed > durable && problem === null) start(delay);
      });
  };
  const putDown = () => {
    const { sheet, history, draft } = work;
    const now = Date.now();
    const whole = lineChange(head.id, { first: base?.line.first ?? 1, steps: [] }, history, now);
    // Writes under way may or may not come through: it builds on whatever of this writer is there in the end.
    const rev = under > 0 || base === null ? null : base.rev;
    backend
      .leave({
        writer: head.writer,
        sheet: head.id,
        rev,
        head: headOf(sheet, { ...head, changed: now }),
        text: keptText(sheet),
        position: whole.position,
        draft,
        steps: whole.put,
      })
      .catch(() => undefined);
  };
  const succeeded = (rev: number, mine: number, next: SheetHead, line: KeptLine) => {
    durable = Math.max(durable, mine);
    head = { ...next, rev };
    if (base === null && issued === mine) base = { rev, line };
    problem = null;
    failures = 0;
    answer(true);
    options.onKept(rev);
    options.onChange();
  };
  const failed = (why: StoreProblem) => {
    base = null;
    problem = why;
    answer(false);
    if (worthTrying.has(why.code)) start(pauses[Math.min(failures, pauses.length - 1)]!);
    failures += 1;
    options.onFail(why);
    options.onChange();
  };

  return {
    get work() {
      return work;
    },
    get head() {
      return head;
    },
    get behind() {
      return handed > durable;
    },
    get problem() {
      return problem;
    },
    put(next) {
      work = next;
      handed += 1;
      if (problem !== null) {
        clearTimeout(clock);
        clock = undefined;
      }
      if (problem === null || worthTrying.has(problem.code)) start(delay);
      options.onChange();
    },
    hurry() {
      if (stopped || handed <= durable) return;
      putDown();
      if (handed > issued || (problem !== null && under === 0)) issue();
    },
    kept() {
      if (handed <= durable) return Promise.resolve(true);
      if (stopped) return Promise.resolve(false);
      if (handed > issued || (problem !== null && under === 0)) issue();
      return new Promise((done) => waiting.push({ until: handed, done }));
    },
    stop() {
      stopped = true;
      clearTimeout(clock);
      clock = undefined;
      return under === 0 ? Promise.resolve() : new Promise((done) => quiet.push(done));
    },
    fail(why) {
      problem = why;
      answer(false);
      options.onChange();
    },
    tryAgain() {
      if (stopped) return;
      problem = null;
      if (handed > durable) issue();
      options.onChange();
    },
  };
}
