// Fingerprints of cells and of the sheet: what a check mark covered.
//
// 1. The meaning of a cell is all that its numbers come from: its own texts, and the meanings of the cells it uses. A change of
//    meaning is one that could change a number; it reaches everything downstream and nothing else.
// 2. The cover of a cell is its meaning and its wording: title, source, the references it cites. A change of wording stays there.
// 3. Texts count as typed. `rules` names how they are read and computed; it is raised only when a number could change.
// 4. Within a sought cell's own loop the unknown stands as "self": its meaning does not hang on a value that it replaces. A loop of
//    definitions, which has no value, has "self" for each of its own members.
// 5. No recursion: meanings are made in the order of the graph, one digest a cell.
// Not here: marks bound to a cover.

import { canonicalName, tokenize } from '../formula/index.ts';
import { badCharacters, buildGraph, type Calculation, type Cell, type Reference } from '../sheet/index.ts';
import { canonicalJson, digestOfText, plainJson } from './digest.ts';

/** The version of the rules of reading and computing. */
export const rules = 'tightside-rules/1';

export interface Fingerprints {
  readonly sheet: string;
  /** By cell id; undefined where the sheet has no such cell. */
  meaning(cell: string): string | undefined;
  cover(cell: string): string | undefined;
}

export function fingerprints(calculation: Calculation): Fingerprints {
  const { sheet } = calculation;
  const meanings = allMeanings(calculation);
  const references = new Map((sheet.references ?? []).map((reference) => [reference.id, reference]));
  const covers = sheet.cells.map((cell, i) => coverOf(cell, meanings[i]!, references));
  const index = new Map(sheet.cells.map((cell, i) => [cell.id, i]));
  return {
    sheet: asWritten({ format: sheet.format, title: sheet.title, settings: sheet.settings, cells: covers }),
    meaning: (cell) => meanings[index.get(cell) ?? -1],
    cover: (cell) => covers[index.get(cell) ?? -1],
  };
}

const self = 'self';

/** What was digested of a cell object last, and from what beside it: after an edit only what it moved is digested anew. */
const keptMeanings = new WeakMap<Cell, { readonly from: string; readonly value: string }>();
const keptCovers = new WeakMap<Cell, { readonly from: string; readonly cites: readonly Reference[]; readonly value: string }>();

function coverOf(cell: Cell, meaning: string, references: ReadonlyMap<string, Reference>): string {
  const cites = cited(cell, references);
  const kept = keptCovers.get(cell);
  if (kept?.from === meaning && kept.cites.length === cites.length && cites.every((reference, i) => reference === kept.cites[i]))
    return kept.value;
  const value = asWritten({ meaning, ...wording(cell), cites });
  keptCovers.set(cell, { from: meaning, cites, value });
  return value;
}

function allMeanings(calculation: Calculation): string[] {
  const { cells } = calculation.sheet;
  const index = new Map(cells.map((cell, i) => [cell.id, i]));
  const uses = cells.map((cell) => calculation.origin(cell.id).flatMap((id) => index.get(id) ?? []));
  const graph = buildGraph(uses);
  const meanings: string[] = new Array(cells.length);
  const common = {
    rules,
    decimalSign: calculation.style.decimalSign,
    cases: calculation.cases.map(({ id }) => id),
  };
  const context = JSON.stringify(common);
  const meaningOf = (node: number, of: (used: number) => string): string => {
    const cell = cells[node]!;
    const origin = `${context} ${uses[node]!.map((used) => `${of(used)} ${cells[used]!.kind}`).join(' ')}`;
    const kept = keptMeanings.get(cell);
    if (kept?.from === origin) return kept.value;
    const value = asWritten({ ...common, cell: computing(cell), uses: named(cells, node, uses[node]!, of) });
    keptMeanings.set(cell, { from: origin, value });
    return value;
  };
  const made = (used: number): string => meanings[used]!;

  const members = new Map<number, number[]>();
  for (const node of graph.order) {
    const loop = graph.loopOf[node]!;
    if (loop < 0) continue;
    const known = members.get(loop);
    if (known) known.push(node);
    else members.set(loop, [node]);
  }
  for (const node of graph.order) {
    if (meanings[node] !== undefined) continue;
    const cell = cells[node]!;
    const loop = graph.loopOf[node]!;
    if (loop >= 0) {
      meaningsOfLoop(members.get(loop)!, cells, uses, meanings, meaningOf);
    } else if (cell.kind === 'sought' && cell.instead !== undefined) {
      const unknown = cells.findIndex(
        (other) => other.kind === 'given' && canonicalName(other.name) === canonicalName(cell.instead ?? ''),
      );
      const varied = variedMeanings(node, unknown, uses, graph.place, made, meaningOf);
      meanings[node] = meaningOf(node, (used) => varied.get(used) ?? made(used));
    } else {
      meanings[node] = meaningOf(node, made);
    }
  }
  return meanings;
}

type MeaningOf = (node: number, of: (used: number) => string) => string;

/** A loop through one sought cell is an equation to be solved; any other is a loop of definitions. */
function meaningsOfLoop(
  loop: readonly number[],
  cells: readonly Cell[],
  uses: readonly (readonly number[])[],
  meanings: string[],
  meaningOf: MeaningOf,
): void {
  const inside = new Map(loop.map((node, i) => [node, i]));
  const soughts = loop.filter((node) => cells[node]!.kind === 'sought');
  const [sought] = soughts;
  const opened = buildGraph(
    loop.map((node) => (node === sought ? [] : uses[node]!.flatMap((used) => (used === sought ? [] : (inside.get(used) ?? []))))),
  );
  if (sought === undefined || soughts.length > 1 || opened.loops.length > 0) {
    for (const node of loop) meanings[node] = meaningOf(node, (used) => (inside.has(used) ? self : meanings[used]!));
    return;
  }
  const others = [...opened.order].map((i) => loop[i]!).filter((node) => node !== sought);
  const open = new Map<number, string>([[sought, self]]);
  for (const node of others)
    open.set(
      node,
      meaningOf(node, (used) => open.get(used) ?? meanings[used]!),
    );
  meanings[sought] = meaningOf(sought, (used) => open.get(used) ?? meanings[used]!);
  for (const node of others) meanings[node] = meaningOf(node, (used) => meanings[used]!);
}

/** Meanings, with the varied given as "self", of the cells between it and the equation of a sought cell. */
function variedMeanings(
  sought: number,
  unknown: number,
  uses: readonly (readonly number[])[],
  place: Int32Array,
  known: (used: number) => string,
  meaningOf: MeaningOf,
): ReadonlyMap<number, string> {
  const varied = new Map<number, string>([[unknown, self]]);
  const upstream = new Set<number>();
  const waiting = [...uses[sought]!];
  for (let node = waiting.pop(); node !== undefined; node = waiting.pop()) {
    if (upstream.has(node)) continue;
    upstream.add(node);
    for (const used of uses[node]!) waiting.push(used);
  }
  for (const node of [...upstream].sort((a, b) => place[a]! - place[b]!)) {
    if (node !== unknown && uses[node]!.some((used) => varied.has(used)))
      varied.set(
        node,
        meaningOf(node, (used) => varied.get(used) ?? known(used)),
      );
  }
  return varied;
}

/** Used cells by name. A table that shares its name with a quantity used beside it stands under `table NAME`. */
function named(
  cells: readonly Cell[],
  node: number,
  used: readonly number[],
  of: (used: number) => string,
): Record<string, string> {
  const result = new Map<string, string>();
  for (const other of used) {
    const cell = cells[other]!;
    if ('name' in cell && cell.kind !== 'table') result.set(canonicalName(cell.name), of(other));
  }
  for (const other of used) {
    const cell = cells[other]!;
    if (cell.kind === 'table') result.set(result.has(cell.name) ? `table ${cell.name}` : cell.name, of(other));
  }
  const cell = cells[node]!;
  // The equation of a sought cell may name the unknown itself, which is no use of another cell.
  if (cell.kind === 'sought' && cell.instead === undefined) {
    const name = canonicalName(cell.name);
    if (tokenize(cell.where).some((token) => token.kind === 'name' && token.text === name)) result.set(name, self);
  }
  return Object.fromEntries(result);
}

/** What computing reads of a cell. */
function computing(cell: Cell): Readonly<Record<string, unknown>> {
  const { kind } = cell;
  switch (kind) {
    case 'given':
      return { kind, name: cell.name, value: cell.value, byCase: cell.byCase, unit: cell.unit, choices: cell.choices };
    case 'derived':
      return { kind, name: cell.name, formula: cell.formula, unit: cell.unit };
    case 'criterion':
      return { kind, left: cell.left, relation: cell.relation, right: cell.right, unit: cell.unit };
    case 'sought':
      return { kind, name: cell.name, unit: cell.unit, instead: cell.instead, where: cell.where, between: cell.between };
    case 'table':
      return { kind, name: cell.name, columns: cell.columns.map(({ name, unit }) => ({ name, unit })), rows: cell.rows };
    case 'drawing':
      return { kind, layout: cell.layout, uses: cell.uses };
    case 'chart':
      return { kind, vary: cell.vary, from: cell.from, to: cell.to, show: cell.show };
    default:
      return { kind };
  }
}

/** What a cell says beside its numbers. Whether it is confirmed or tracked is an act, not a wording: it moves no mark. */
function wording(cell: Cell): Readonly<Record<string, unknown>> {
  switch (cell.kind) {
    case 'heading':
      return { text: cell.text, level: cell.level };
    case 'note':
      return { text: cell.text, role: cell.role, source: cell.source };
    case 'given':
      return { title: cell.title, source: cell.source, basis: cell.basis, range: cell.range, distribution: cell.distribution };
    case 'criterion':
      return { title: cell.title, source: cell.source, justification: cell.justification, ifNotMet: cell.ifNotMet };
    case 'table':
      return {
        title: cell.title,
        source: cell.source,
        titles: cell.columns.some((c) => c.title !== undefined) ? cell.columns.map((c) => c.title ?? '') : undefined,
      };
    case 'figure':
      return { title: cell.title, source: cell.source, image: cell.image };
    case 'derived':
    case 'sought':
      return { title: cell.title, source: cell.source };
    default:
      return { title: cell.title };
  }
}

/** Reference objects that the source cites as `[R1]`, each once, in the order of the text. */
function cited(cell: Cell, references: ReadonlyMap<string, Reference>): readonly Reference[] {
  const source = 'source' in cell ? (cell.source ?? '') : '';
  const ids = new Set([...source.matchAll(/\[([^\][]{1,64})\]/g)].map((match) => match[1]!.trim()));
  return [...ids].flatMap((id) => references.get(id) ?? []);
}

/**
 * The digest of a part of the sheet as it stands in the file: half a surrogate pair and control characters, which are written
 * as U+FFFD, count as that, so that a sheet has one fingerprint before it is written and after it is read.
 */
function asWritten(value: unknown): string {
  const text = plainJson(value);
  // Half a pair and control characters show as escapes; those of a tab and of the ends of lines are others.
  return digestOfText(/\\[ubf]/.test(text) ? canonicalJson(clean(value)) : text);
}

function clean(value: unknown): unknown {
  if (typeof value === 'string') return value.replace(badCharacters, '\uFFFD');
  if (Array.isArray(value)) return value.map(clean);
  if (typeof value !== 'object' || value === null) return value;
  return Object.fromEntries(Object.entries(value).map(([key, entry]) => [key.replace(badCharacters, '\uFFFD'), clean(entry)]));
}
