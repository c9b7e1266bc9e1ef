// What is wrong with a text of the user: data with a stable code, a sentence and, where one is known, a correction.
//
// 1. A problem is returned, never thrown; only our own faults throw.
// 2. `at` and the fixes count UTF-16 units in the very text that was handed in, as half-open spans.
// 3. A message quotes at most a clipped piece of the user's text: a megabyte of input gives one line of output.
// Not here: which cell or file the text belongs to; the caller adds that.

/** A correction: `text` replaces [from, to) of the text the problem is about. */
export interface Fix {
  readonly from: number;
  readonly to: number;
  readonly text: string;
  /** What the correction does, for a button: "write kW". */
  readonly label: string;
}

export interface Problem {
  /** Stable, kebab-case. */
  readonly code: string;
  readonly severity: 'error' | 'warning';
  /** One sentence or two: what, both sides, what to do. */
  readonly message: string;
  readonly at?: readonly [number, number];
  readonly fixes?: readonly Fix[];
}

export interface Failure {
  readonly ok: false;
  readonly problem: Problem;
}
export type Result<T> = { readonly ok: true; readonly value: T } | Failure;

export const done = <T>(value: T): Result<T> => ({ ok: true, value });

/** An error about [from, to); each replacement text becomes a fix of that span. */
export function fail(code: string, message: string, from: number, to: number, replacements: readonly string[] = []): Failure {
  return failWith(
    code,
    message,
    from,
    to,
    replacements.map((text) => fixOf(from, to, text)),
  );
}

export function failWith(code: string, message: string, from: number, to: number, fixes: readonly Fix[]): Failure {
  const at: readonly [number, number] = [from, to];
  const problem: Problem = { code, severity: 'error', message, at };
  return { ok: false, problem: fixes.length > 0 ? { ...problem, fixes } : problem };
}

export const fixOf = (from: number, to: number, text: string): Fix => ({
  from,
  to,
  text,
  label: text === '' ? 'leave it out' : `write ${text}`,
});

/** The same problem, about a text in which the one read here begins at `by`. */
export function shifted(failure: Failure, by: number): Failure {
  const { at, fixes, ...rest } = failure.problem;
  return {
    ok: false,
    problem: {
      ...rest,
      ...(at && { at: [at[0] + by, at[1] + by] as const }),
      ...(fixes && { fixes: fixes.map((fix) => ({ ...fix, from: fix.from + by, to: fix.to + by })) }),
    },
  };
}

const longestQuote = 40;

/** The user's text in quotation marks, clipped, without control characters. */
export function quote(text: string): string {
  const points = [...text.slice(0, 2 * longestQuote).trim()];
  const clipped = points.length > longestQuote || text.length > 2 * longestQuote;
  const shown = (clipped ? `${points.slice(0, longestQuote - 1).join('')}…` : points.join('')).replace(/\p{Cc}/gu, ' ');
  return `“${shown}”`;
}

/** "a", "a or b", "a, b or c". */
export function either(words: readonly string[]): string {
  if (words.length < 2) return words[0] ?? '';
  return `${words.slice(0, -1).join(', ')} or ${words[words.length - 1]}`;
}
