// Quoted quantities of a formula, read once: the same text is printed and computed many times.
// Not here: whether the text is a quantity at all, which its place decides (infer.ts).

import type { Result, Value } from '../quantity/index.ts';
import { readValue } from '../quantity/index.ts';

const caches: Readonly<Record<'.' | ',', Map<string, Result<Value>>>> = { '.': new Map(), ',': new Map() };
const cacheSize = 2000;

export function readLiteral(text: string, decimalSign: '.' | ','): Result<Value> {
  const cache = caches[decimalSign];
  const known = cache.get(text);
  if (known !== undefined) return known;
  const value = readValue(text, { decimalSign });
  if (cache.size >= cacheSize) cache.clear();
  cache.set(text, value);
  return value;
}
