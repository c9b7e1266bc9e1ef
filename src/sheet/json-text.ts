// The text of a JSON file looked at before it becomes values (RFC 8259).
//
// 1. `JSON.parse` decides nothing here: its messages differ from engine to engine, it keeps the last of two equal keys without a
//    word, and it follows any depth. This scan names line, column and what was expected, finds equal keys, and stops at a depth.
// 2. A text that passes is one that `JSON.parse` reads.
// 3. The first fault of grammar ends the scan; equal keys and refused keys are collected.
// Not here: what the keys mean (schema.ts).

export type JsonPath = readonly (string | number)[];

export interface JsonFault {
  readonly code: 'syntax' | 'too-deep' | 'too-many' | 'duplicate-key' | 'unknown-key' | 'bad-character';
  readonly path: JsonPath;
  /** From 1; the column counts characters as an editor does. */
  readonly line: number;
  readonly column: number;
  /** Syntax: what is expected and what is there. Keys: the key. */
  readonly expected: string;
  readonly found: string;
  readonly at: number;
}

/** Deeper than any sheet: marks and log nest a few levels, a sheet four. */
const deepest = 64;
/** More keys than any object of a sheet has: values by case are the most. */
const mostKeys = 10_000;
const mostFaults = 20;
/** Keys that mean something to objects of the language: never a key of a sheet. */
const refusedKeys: ReadonlySet<string> = new Set(['__proto__', 'constructor', 'prototype']);

class Stop extends Error {
  readonly fault: JsonFault;
  constructor(fault: JsonFault) {
    super(fault.expected);
    this.fault = fault;
  }
}

export function scanJson(text: string): readonly JsonFault[] {
  const faults: JsonFault[] = [];
  const path: (string | number)[] = [];
  let at = 0;

  const faultAt = (code: JsonFault['code'], place: number, expected: string, found: string): JsonFault => ({
    code,
    path: [...path],
    ...lineAndColumn(text, place),
    expected,
    found,
    at: place,
  });
  const stop = (expected: string, place = at): never => {
    throw new Stop(faultAt('syntax', place, expected, foundAt(text, place)));
  };
  const space = (): void => {
    for (;;) {
      const c = text.charCodeAt(at);
      if (c !== 32 && c !== 10 && c !== 13 && c !== 9) return;
      at += 1;
    }
  };

  // Moves past a string and returns its content; `at` is on the opening quote.
  const string = (): string => {
    const from = at;
    let plain = true;
    at += 1;
    for (;;) {
      const c = text.charCodeAt(at);
      if (c === 34) break;
      if (c === 92) {
        plain = false;
        const escaped = text.charCodeAt(at + 1);
        if (escaped === 117) {
          if (!/^[0-9A-Fa-f]{4}$/.test(text.slice(at + 2, at + 6))) stop('four hexadecimal digits after \\u');
          at += 6;
        } else if (Number.isNaN(escaped) || !'"\\/bfnrt'.includes(text[at + 1]!))
          stop('one of " \\ / b f n r t u after a backslash', at + 1);
        else at += 2;
      } else if (Number.isNaN(c)) stop('a closing quote', text.length);
      else if (c < 32)
        stop(
          c === 10 || c === 13
            ? 'a closing quote before the end of the line'
            : 'an escape such as \\t instead of a control character',
        );
      else at += 1;
    }
    at += 1;
    return plain ? text.slice(from + 1, at - 1) : (JSON.parse(text.slice(from, at)) as string);
  };
  const checkCharacters = (content: string, from: number): void => {
    const bad = badCharacter(content);
    if (bad && faults.length < mostFaults) faults.push(faultAt('bad-character', from, bad, content));
  };

  const object = (depth: number): void => {
    at += 1;
    space();
    if (text[at] === '}') {
      at += 1;
      return;
    }
    const keys = new Set<string>();
    for (;;) {
      if (text[at] !== '"')
        stop(keys.size > 0 && text[at] === '}' ? 'another key (no comma before a closing brace)' : 'a key in double quotes');
      const keyAt = at;
      const key = string();
      path.push(key);
      if (faults.length < mostFaults) {
        if (keys.has(key)) faults.push(faultAt('duplicate-key', keyAt, 'each key once', key));
        else if (refusedKeys.has(key)) faults.push(faultAt('unknown-key', keyAt, 'a key of a sheet', key));
      }
      keys.add(key);
      if (keys.size > mostKeys) throw new Stop(faultAt('too-many', keyAt, `at most ${mostKeys} keys`, key));
      checkCharacters(key, keyAt);
      space();
      if (text[at] !== ':') stop('a colon after the key');
      at += 1;
      value(depth);
      path.pop();
      if (text[at] === '}') break;
      if (text[at] !== ',') stop('a comma or a closing brace }');
      at += 1;
      space();
    }
    at += 1;
  };
  const list = (depth: number): void => {
    at += 1;
    space();
    if (text[at] === ']') {
      at += 1;
      return;
    }
    for (let i = 0; ; i += 1) {
      path.push(i);
      if (i > 0) {
        space();
        if (text[at] === ']') stop('another entry (no comma before a closing bracket)');
      }
      value(depth);
      path.pop();
      if (text[at] === ']') break;
      if (text[at] !== ',') stop('a comma or a closing bracket ]');
      at += 1;
    }
    at += 1;
  };
  const word = /true|false|null|-?(?:0|[1-9]\d*)(?:\.\d+)?(?:[eE][+-]?\d+)?/y;
  const value = (depth: number): void => {
    space();
    const c = text[at];
    if (c === '"') {
      const from = at;
      checkCharacters(string(), from);
    } else if (c === '{' || c === '[') {
      if (depth >= deepest) throw new Stop(faultAt('too-deep', at, `at most ${deepest} levels`, ''));
      if (c === '{') object(depth + 1);
      else list(depth + 1);
    } else {
      word.lastIndex = at;
      const match = word.exec(text);
      if (!match) stop('a value: a text in double quotes, a number, true, false, null, { or [');
      else at += match[0].length;
      if (/[\w.+-]/.test(text[at] ?? '')) stop('a value that ends here');
    }
    space();
  };

  try {
    value(0);
    if (at < text.length) stop('the end of the file');
  } catch (thrown) {
    if (!(thrown instanceof Stop)) throw thrown;
    return [thrown.fault];
  }
  return faults;
}

export const badCharacters = /[\p{Surrogate}\u0000-\u0008\u000b\u000c\u000e-\u001f]/gu;

/** The first character that no file may hold, in words: half of a pair, NUL or another control character but tab and line ends. */
export function badCharacter(content: string): string | undefined {
  const at = content.search(badCharacters);
  if (at < 0) return undefined;
  const code = content.charCodeAt(at);
  return `${code < 32 ? 'the control character' : 'half of a surrogate pair'} (U+${code.toString(16).toUpperCase().padStart(4, '0')})`;
}

function foundAt(text: string, at: number): string {
  if (at >= text.length) return 'the file ends';
  const c = text[at]!;
  if (c === '\n' || c === '\r') return 'the line ends';
  const run = /^[\w.+-]+/.exec(text.slice(at, at + 20));
  if (run) return `${run[0]} stands there`;
  const point = text.codePointAt(at)!;
  const shown = String.fromCodePoint(point);
  // Spaces, controls, halves of pairs and what prints as nothing are named by number.
  return `${/^[\p{L}\p{N}\p{P}\p{S}]$/u.test(shown) ? shown : `U+${point.toString(16).toUpperCase().padStart(4, '0')}`} stands there`;
}

function lineAndColumn(text: string, at: number): { readonly line: number; readonly column: number } {
  let line = 1;
  let start = 0;
  for (let end = text.indexOf('\n'); end !== -1 && end < at; end = text.indexOf('\n', end + 1)) {
    line += 1;
    start = end + 1;
  }
  // Beyond a screenful nobody counts: code units will do.
  return { line, column: (at - start < 10_000 ? [...text.slice(start, at)].length : at - start) + 1 };
}
