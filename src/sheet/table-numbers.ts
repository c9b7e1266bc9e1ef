// Numbers in a pasted table: which decimal sign they are written with, and the same numbers with the sign of the sheet.
//
// 1. Digits are changed in no number; only the decimal sign moves and group signs go.
// 2. What one sign cannot settle (1,234 alone) is left to the caller.

import { readValue } from '../quantity/index.ts';
import type { DecimalSign } from './reading.ts';

const grouped = {
  '.': /^([+\-−–]?\d{1,3}(?:[,'’]\d{3})+)(?=\.|$|[^\d.,'’])/u,
  ',': /^([+\-−–]?\d{1,3}(?:[.'’]\d{3})+)(?=,|$|[^\d.,'’])/u,
} as const;

function ungrouped(text: string, sign: DecimalSign): string {
  return text.replace(grouped[sign], (run) => run.replace(/[.,'’]/gu, ''));
}

export function isNumber(text: string, sign: DecimalSign): boolean {
  return text !== '' && readValue(ungrouped(text, sign), { decimalSign: sign }).ok;
}

/** The entry with the decimal sign `to`; anything that is no number stays as it is. */
export function withSign(text: string, from: DecimalSign, to: DecimalSign): string {
  const plain = ungrouped(text, from);
  if (!readValue(plain, { decimalSign: from }).ok) return text;
  return from === to ? plain : plain.replace(/[.,]/gu, (mark) => (mark === from ? to : mark));
}

/** The sign that the numbers show; undefined where they fit both; `usual` where none of them has a sign. */
export function decimalSignOf(entries: readonly string[], usual: DecimalSign): DecimalSign | undefined {
  let both = false;
  let signs = 0;
  for (const entry of entries) {
    const run = /^[+\-−–]?[\d.,'’]*\d/u.exec(entry)?.[0] ?? '';
    const last = run.match(/[.,](?=\d*$)/u)?.[0] as DecimalSign | undefined;
    if (last === undefined) continue;
    signs += 1;
    const other = run.includes(last === '.' ? ',' : '.');
    const groups = /^[+\-−–]?\d{1,3}(?:([.,])\d{3})(?:\1\d{3})*$/u.test(run) && !/^[+\-−–]?0/u.test(run);
    const several = run.split(last).length > 2;
    if (other || !groups) return last;
    if (several) return last === '.' ? ',' : '.';
    both = true;
  }
  return both && signs > 0 ? undefined : usual;
}
