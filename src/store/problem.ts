// Trouble of the store, in words with a way out.
//
// 1. Whatever goes wrong while keeping, opening or saving becomes one of these codes; a bare error of the browser never reaches the page.
// 2. Every message says what happened, what became of the work, and what to do next; `wayOut` names the acts that the page offers.
// 3. The reason is read from the transaction first: a failed request only says that its transaction was given up.
// Not here: problems of a file's text (src/sheet).

import type { Problem } from '../quantity/index.ts';

export type StoreCode =
  | 'full'
  | 'blocked'
  | 'slow'
  | 'newer'
  | 'gone'
  | 'not-here'
  | 'overtaken'
  | 'unavailable'
  | 'not-upgraded'
  | 'unreadable'
  | 'lost'
  | 'newer-sheet'
  | 'newer-file'
  | 'changed-file'
  | 'no-file'
  | 'refused-file'
  | 'not-kept';

export type WayOut =
  | 'save as a file'
  | 'try again'
  | 'reload'
  | 'close the other tabs'
  | 'keep as a new sheet'
  | 'download the text'
  | 'export everything'
  | 'save under another name'
  | 'overwrite the file'
  | 'go on without keeping';

export interface StoreProblem extends Problem {
  readonly code: StoreCode;
  readonly wayOut: readonly WayOut[];
  /** What the browser said, for a report of a fault. */
  readonly cause?: string;
}

const table: Readonly<Record<StoreCode, readonly [string, readonly WayOut[]]>> = {
  full: [
    'The browser has no more room for this sheet: the last changes are on the screen only. Save the sheet as a file, then make room by removing sheets from the shelf or freeing space on the disk.',
    ['save as a file', 'export everything', 'try again'],
  ],
  blocked: [
    'Another tab still runs an earlier version of this page and holds the sheets. Close the other tabs of this page; this one goes on by itself.',
    ['close the other tabs', 'go on without keeping'],
  ],
  slow: [
    'The browser does not answer when asked for the sheets. Wait a little, or reload the page; if that does not help, close the browser and start it again.',
    ['reload', 'go on without keeping'],
  ],
  newer: [
    'A later version of this page has been in use in this browser, and this one is too old for its sheets. Reload the page to get the later version. Changes that are not kept yet can be saved as a file first.',
    ['reload', 'save as a file'],
  ],
  gone: [
    'This sheet is no longer among those kept in this browser: it was removed in another tab, or the data of this site were cleared. What is on the screen is complete. Keep it as a new sheet, or save it as a file.',
    ['keep as a new sheet', 'save as a file'],
  ],
  'not-here': [
    'This sheet is not among those kept in this browser: it was removed, or it belongs to another browser. Look among the removed sheets of the shelf, or open its file.',
    [],
  ],
  overtaken: [
    'Another tab has taken over this sheet and has changed it since. Nothing of it was overwritten; what this tab had not kept yet was set aside as a sheet of its own.',
    ['reload'],
  ],
  unavailable: [
    'This browser keeps nothing for this page: private windows and some settings forbid it. You can work, but everything is gone when the tab closes: save the sheet as a file.',
    ['save as a file'],
  ],
  'not-upgraded': [
    'The sheets in this browser could not be brought into the form that this version needs. They are unchanged. Reload the page; until it works, nothing you write here is kept: save the sheet as a file.',
    ['reload', 'save as a file'],
  ],
  unreadable: [
    'The text of this sheet cannot be read. It is kept as it is, and nothing will overwrite it. Download the text to look at it or to mend it.',
    ['download the text'],
  ],
  lost: [
    'There were sheets in this browser, and they are gone: the browser or a cleaning program has removed the data of this site. Open your files or import an exported bundle.',
    [],
  ],
  'newer-sheet': [
    'This sheet was written by a later version of this page. Reload the page to get that version. The sheet is kept as it is.',
    ['reload', 'download the text'],
  ],
  'newer-file': [
    'The file on the disk was written by a later version of this page, so it was not overwritten. Save under another name, or reload the page to get the later version.',
    ['save under another name', 'reload'],
  ],
  'changed-file': [
    'The file on the disk has been changed by somebody else since it was last opened or saved here, so it was not overwritten. Save under another name and compare the two, or overwrite it knowingly.',
    ['save under another name', 'overwrite the file'],
  ],
  'no-file': [
    'The file is no longer where it was: it has been moved, renamed or removed. The sheet is kept in this browser. Save it under another name.',
    ['save under another name'],
  ],
  'refused-file': [
    'The browser was not allowed to write the file. The sheet is kept in this browser. Save again and allow it, or save under another name.',
    ['try again', 'save under another name'],
  ],
  'not-kept': [
    'The last changes could not be kept in this browser. They are on the screen only: save the sheet as a file, then try again.',
    ['save as a file', 'try again'],
  ],
};

export function storeProblem(code: StoreCode, about: { readonly detail?: string; readonly cause?: unknown } = {}): StoreProblem {
  const [message, wayOut] = table[code];
  return {
    code,
    severity: 'error',
    message: about.detail === undefined ? message : `${message} ${about.detail}`,
    wayOut,
    ...(about.cause === undefined ? {} : { cause: wordsOf(about.cause) }),
  };
}

/** A trouble on its way through code that throws; `problem` is what the user is told. */
export class StoreFault extends Error {
  override readonly name = 'StoreFault';
  readonly problem: StoreProblem;
  constructor(problem: StoreProblem) {
    super(problem.message);
    this.problem = problem;
  }
}

const named = (cause: unknown): string =>
  typeof cause === 'object' && cause !== null && 'name' in cause ? String(cause.name) : '';

/** What an error of the database means. `transaction` is asked first for its own reason. */
export function problemOf(cause: unknown, transaction?: { readonly error: DOMException | null }): StoreProblem {
  if (cause instanceof StoreFault) return cause.problem;
  const reason = transaction?.error ?? cause;
  switch (named(reason)) {
    case 'QuotaExceededError':
      return storeProblem('full', { cause: reason });
    case 'VersionError':
      return storeProblem('newer', { cause: reason });
    default:
      return storeProblem('not-kept', { cause: reason });
  }
}

function wordsOf(cause: unknown): string {
  const name = named(cause);
  const text = typeof cause === 'object' && cause !== null && 'message' in cause ? String(cause.message) : String(cause);
  return name === '' ? text : `${name}: ${text}`;
}
