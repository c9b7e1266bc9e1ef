// The nearest known word to one that is not known: for proposals in messages.
//
// The distance counts insertions, deletions, replacements and exchanges of neighbours; capitals and `_` count little.
// The cost is bounded: at most `mostCandidates` are compared, long words not at all.
// Not here: units (the unit catalogue has its own).

const mostCandidates = 4000;
const longestName = 64;
const mostProposals = 3;

/** Up to three candidates that are near enough to be meant, nearest first. */
export function nearestNames(name: string, candidates: Iterable<string>): string[] {
  if (name.length === 0 || name.length > longestName) return [];
  const wanted = fold(name);
  let limit = name.length <= 2 ? 1 : name.length <= 5 ? 2 : 3;
  const longest = limit;
  const best: { readonly candidate: string; readonly distance: number }[] = [];
  let seen = 0;
  for (const candidate of candidates) {
    if (++seen > mostCandidates) break;
    if (candidate === name || Math.abs(candidate.length - name.length) > longest) continue;
    const folded = fold(candidate);
    // Words that differ by capitals or by `_` alone are nearest of all.
    const distance = folded === wanted ? 0 : editDistance(wanted, folded, limit);
    // Half of a word exchanged is another word.
    if (distance > limit || distance * 2 > Math.max(folded.length, wanted.length)) continue;
    const place = best.findIndex((each) => each.distance > distance);
    best.splice(place < 0 ? best.length : place, 0, { candidate, distance });
    if (best.length > mostProposals) best.pop();
    // With enough proposals only a nearer one counts.
    if (best.length === mostProposals) limit = Math.min(limit, (best.at(-1)?.distance ?? 0) - 1);
    if (limit < 0) break;
  }
  return best.map((each) => each.candidate);
}

function fold(name: string): string {
  return name.toLowerCase().replaceAll('_', '');
}

// Three rows of the table of distances, used again and again: a proposal must not cost more than the reading of a sheet.
const width = longestName + 8;
const rows = [new Uint8Array(width), new Uint8Array(width), new Uint8Array(width)];

/** Restricted Damerau–Levenshtein distance within a band; anything beyond `limit` is limit + 1. */
function editDistance(a: string, b: string, limit: number): number {
  const beyond = limit + 1;
  if (Math.abs(a.length - b.length) > limit) return beyond;
  let [beforeLast, last, row] = rows as [Uint8Array, Uint8Array, Uint8Array];
  for (let j = 0; j <= b.length; j++) last[j] = Math.min(j, beyond);
  for (let i = 1; i <= a.length; i++) {
    const from = Math.max(1, i - limit);
    const to = Math.min(b.length, i + limit);
    row[from - 1] = from === 1 ? Math.min(i, beyond) : beyond;
    if (to < b.length) row[to + 1] = beyond;
    let least = row[from - 1]!;
    const c = a.charCodeAt(i - 1);
    for (let j = from; j <= to; j++) {
      const same = c === b.charCodeAt(j - 1);
      let d = Math.min(last[j]! + 1, row[j - 1]! + 1, last[j - 1]! + (same ? 0 : 1), beyond);
      if (i > 1 && j > 1 && c === b.charCodeAt(j - 2) && a.charCodeAt(i - 2) === b.charCodeAt(j - 1))
        d = Math.min(d, beforeLast[j - 2]! + 1);
      row[j] = d;
      if (d < least) least = d;
    }
    if (least > limit) return beyond;
    [beforeLast, last, row] = [last, row, beforeLast];
  }
  return last[b.length]!;
}
