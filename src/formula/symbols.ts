// How the name of a quantity looks and sounds: typeset, as plain text, read aloud.
//
// 1. By ISO 80000-1: the symbol italic, its subscript upright unless it is a running index; Greek by its letter.
// 2. Two different names never have the same TeX: a second `_` is a comma, digits without `_` stay in the symbol.
// 3. Whatever the name or text, the TeX passes KaTeX at `strict: 'error'`, `trust: false`.
// Not here: which texts are names (names.ts), units (the quantity room).

import { canonicalName, greekLetter, isWord } from './names.ts';

const slantedCapitals = new Set(['Gamma', 'Delta', 'Theta', 'Lambda', 'Xi', 'Pi', 'Sigma', 'Upsilon', 'Phi', 'Psi', 'Omega']);
const longestGreek = 7;
const cache = new Map<string, string>();
const cacheSize = 5000;

/** A canonical name as TeX: 'F_1min' → `F_{1\,\mathrm{min}}`, 'theta_1' → `\theta_{1}`, 'DeltaT' → `\Delta T`. */
export function texName(name: string): string {
  const known = cache.get(name);
  if (known !== undefined) return known;
  const [head, subscript] = split(name);
  const tex = !isWord(name)
    ? texText(name)
    : subscript === undefined
      ? texHead(head)
      : `${texHead(head)}_{${subscript.split('_').map(texPiece).join(',\\,')}}`;
  if (cache.size >= cacheSize) cache.clear();
  cache.set(name, tex);
  return tex;
}

/** A canonical name as plain text, Greek by its letters: 'mu_1' → 'μ_1'. */
export function plainName(name: string): string {
  const [head, subscript] = split(name);
  const shown = symbolParts(head)
    .map((part) => greekLetter(part) ?? (part === 'ell' ? 'ℓ' : part))
    .join('');
  if (subscript === undefined) return shown;
  return `${shown}_${subscript.replace(/[A-Za-z]+/g, (word) => greekLetter(word) ?? word)}`;
}

/** A canonical name as it is read aloud: 'F_1min' → 'F sub 1 min', 'DeltaT' → 'Delta T'. */
export function speakName(name: string): string {
  const [head, subscript] = split(name);
  const symbol = symbolParts(head).join(' ');
  return subscript === undefined ? symbol : `${symbol} sub ${subscript.split('_').flatMap(runs).join(' ')}`.trim();
}

function split(name: string): readonly [head: string, subscript: string | undefined] {
  const at = name.indexOf('_');
  return at < 0 ? [name, undefined] : [name.slice(0, at), name.slice(at + 1)];
}

/** The parts of a symbol: Greek letters by their names, a change (Delta, delta) or differential before what it is of. */
function symbolParts(head: string): readonly string[] {
  if (head.length < 2) return [head];
  const all = greekParts(head);
  if (all !== undefined) return all;
  const change = /^(Delta|delta)(.+)$/.exec(head);
  if (change) return [change[1] as string, ...symbolParts(change[2] as string)];
  const differential = head.startsWith('d') ? greekParts(head.slice(1)) : undefined;
  return differential === undefined ? [head] : ['d', ...differential];
}

/** A head that is nothing but names of Greek letters, cut into them, longest first. */
function greekParts(head: string): readonly string[] | undefined {
  if (head === '') return [];
  for (let n = Math.min(longestGreek, head.length); n >= 2; n--) {
    const word = head.slice(0, n);
    if (greekLetter(word) === undefined) continue;
    const rest = greekParts(head.slice(n));
    if (rest !== undefined) return [word, ...rest];
  }
  return undefined;
}

function texHead(head: string): string {
  const parts = symbolParts(head);
  // An increment is an operator and upright; the same letter alone is a quantity.
  return parts.map((part, i) => (part === 'Delta' && parts.length > i + 1 ? '\\Delta' : texSymbol(part))).join(' ');
}

function texSymbol(part: string): string {
  if (part.length === 1 && part < '\u007f') return part;
  if (part === 'ell') return '\\ell';
  // A capital is italic as any other quantity.
  if (slantedCapitals.has(part)) return `\\var${part}`;
  if (greekLetter(part) !== undefined) return texGreek(part);
  return /^[A-Za-z0-9]+$/.test(part) ? `\\mathit{${part}}` : `\\textit{${part}}`;
}

/** ε and φ in their curly forms, the usual ones in print. */
function texGreek(word: string): string {
  return word === 'epsilon' || word === 'phi' ? `\\var${word}` : `\\${word}`;
}

function runs(piece: string): readonly string[] {
  return piece.match(/[0-9]+|[^0-9]+[0-9]*/g) ?? [];
}

function texPiece(piece: string): string {
  if (piece === '') return '\\_';
  return runs(piece)
    .map((run) => {
      if (/^[0-9]+$/.test(run) || /^[ijk]$/.test(run)) return run;
      const word = run.replace(/[0-9]+$/, '');
      if (greekLetter(word) !== undefined) return `${texGreek(word)} ${run.slice(word.length)}`.trim();
      return /^[A-Za-z0-9]+$/.test(run) ? `\\mathrm{${run}}` : `\\text{${run}}`;
    })
    .join('\\,');
}

const escapes: ReadonlyMap<string, string> = new Map([
  ['\\', '\\textbackslash{}'],
  ['{', '\\{'],
  ['}', '\\}'],
  ['$', '\\$'],
  ['&', '\\&'],
  ['#', '\\#'],
  ['%', '\\%'],
  ['_', '\\_'],
  ['^', '\\textasciicircum{}'],
  ['~', '\\textasciitilde{}'],
]);
/** Signs that KaTeX has in mathematics only. */
const signs: ReadonlyMap<string, string> = new Map([
  ['×', '\\times'],
  ['÷', '\\div'],
  ['±', '\\pm'],
  ['−', '-'],
  ['≤', '\\le'],
  ['≥', '\\ge'],
  ['≠', '\\ne'],
  ['≈', '\\approx'],
  ['µ', '\\mu'],
  ['²', '{}^2'],
  ['³', '{}^3'],
  ['½', '\\tfrac12'],
  ['¼', '\\tfrac14'],
  ['¾', '\\tfrac34'],
  ['∞', '\\infty'],
  ['√', '\\surd'],
  ['⌀', '\\varnothing'],
  ['→', '\\to'],
]);
const textCharacter =
  /[ -~£¥©®°·\u00c0-\u00d6\u00d8-\u00f6\u00f8-\u024f\u0400-\u0481\u048a-\u04ff–—‘’“”…\u3040-\u30ff\u4e00-\u9faf\uac00-\ud7a3]/;

/** Any text as upright TeX. A character that the faces lack is shown as `?`. */
export function texText(text: string): string {
  let tex = '';
  let open = false;
  for (const character of text.normalize('NFC').replace(/[\s\u00a0\u202f]+/g, ' ')) {
    const greek = /[\u0370-\u03ff]/.test(character) ? canonicalName(character) : '';
    const inMath = signs.get(character) ?? (greekLetter(greek) === undefined ? undefined : texGreek(greek));
    if (inMath !== undefined) {
      tex += `${open ? '}' : ''}${inMath} `;
      open = false;
      continue;
    }
    if (!open) tex += '\\text{';
    open = true;
    tex += escapes.get(character) ?? (textCharacter.test(character) ? character : '?');
  }
  return open ? `${tex}}` : tex;
}
