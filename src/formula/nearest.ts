// The nearest known word to one that is not known: for proposals in messages.
//
// The distance counts insertions, deletions, replacements and exchanges of neighbours; capitals and `_` count little.
// The cost is bounded: at most `mostCandidates` are compared, long words not at all.
// Not here: units (the unit catalogue has its own).

const mostCandidates = 5000;
const longestName = 64;

/** Up to three candidates that are near enough to be meant, nearest first. */
export function nearestNames(name: string, candidates: Iterable<string>): string[] {
  if (name.length === 0 || name.length > longestName) return [];
  const wanted = fold(name);
  const limit = name.length <= 2 ? 1 : name.length <= 5 ? 2 : 3;
  const found: { readonly candidate: string; readonly distance: number; readonly order: number }[] = [];
  let order = 0;
  for (const candidate of candidates) {
    if (++order > mostCandidates) break;
    if (candidate === name || Math.abs(candidate.length - name.length) > limit) continue;
    const folded = fold(candidate);
    // Words that differ by capitals or by `_` alone are nearest of all.
    const distance = folded === wanted ? 0 : editDistance(wanted, folded, limit);
    // Half of a word exchanged is another word.
    if (distance <= limit && distance * 2 <= Math.max(folded.length, wanted.length)) found.push({ candidate, distance, order });
  }
  found.sort((a, b) => a.distance - b.distance || a.order - b.order);
  return found.slice(0, 3).map((f) => f.candidate);
}

function fold(name: string): string {
  return name.toLowerCase().replaceAll('_', '');
}

/** Restricted Damerau–Levenshtein distance; anything beyond `limit` is limit + 1. */
function editDistance(a: string, b: string, limit: number): number {
  if (Math.abs(a.length - b.length) > limit) return limit + 1;
  let beforeLast: number[] = [];
  let last = Array.from({ length: b.length + 1 }, (_, i) => i);
  for (let i = 1; i <= a.length; i++) {
    const row = [i];
    let least = i;
    for (let j = 1; j <= b.length; j++) {
      const same = a[i - 1] === b[j - 1];
      let d = Math.min((last[j] ?? 0) + 1, (row[j - 1] ?? 0) + 1, (last[j - 1] ?? 0) + (same ? 0 : 1));
      if (i > 1 && j > 1 && a[i - 1] === b[j - 2] && a[i - 2] === b[j - 1]) d = Math.min(d, (beforeLast[j - 2] ?? 0) + 1);
      row.push(d);
      if (d < least) least = d;
    }
    if (least > limit) return limit + 1;
    beforeLast = last;
    last = row;
  }
  return last[b.length] ?? limit + 1;
}
