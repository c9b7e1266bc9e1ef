// Names of quantities: how a typed name becomes the one name that the sheet knows, and which words are no names.
//
// 1. A canonical name is Latin: Greek letters become their names (`μ_1` is `mu_1`), whatever alphabet was typed.
// 2. canonicalName is idempotent and never throws; what cannot be a name stays as it is and fails isName.
// 3. Letters are those that can be typeset: Latin up to U+024F and the Greek alphabet.
// Not here: how a name looks in print (symbols.ts), names of units.

import { functionNames, tableFunctions } from './functions.ts';

const lower =
  'alpha beta gamma delta epsilon zeta eta theta iota kappa lambda mu nu xi omicron pi rho sigma tau upsilon phi chi psi omega';
const letters = 'αβγδεζηθικλμνξοπρστυφχψω';

const greekWords = lower.split(' ');
const greekToWord = new Map<string, string>();
const wordToGreek = new Map<string, string>();
greekWords.forEach((word, i) => {
  const letter = letters[i] as string;
  const capital = word[0]?.toUpperCase() + word.slice(1);
  greekToWord.set(letter, word).set(letter.toUpperCase(), capital);
  wordToGreek.set(word, letter).set(capital, letter.toUpperCase());
});
// Letter forms that stand for the same letter: micro sign, final sigma, the symbol forms, the increment sign.
const variants: readonly (readonly [string, string])[] = [
  ['\u00b5', 'mu'],
  ['ς', 'sigma'],
  ['ϑ', 'theta'],
  ['ϕ', 'phi'],
  ['ϵ', 'epsilon'],
  ['ϰ', 'kappa'],
  ['ϱ', 'rho'],
  ['\u2206', 'Delta'],
  ['ℓ', 'ell'],
];
for (const [letter, word] of variants) greekToWord.set(letter, word);

/** 'mu' → 'μ', 'Delta' → 'Δ'; undefined for anything else. */
export function greekLetter(word: string): string | undefined {
  return wordToGreek.get(word);
}

/** One character that may begin a typed name; digits and `_` may follow. */
export const nameLetter =
  /[A-Za-z\u00c0-\u00d6\u00d8-\u00f6\u00f8-\u01ba\u01bc-\u01bf\u01cd-\u01f0\u01f4-\u024f\u00b5\u2126\u212a\u212b\u2206ℓΑ-ΡΣ-Ϋά-ώϑϕϵϰϱΆΈ-ΊΌΎΏΐΰ]/;

const canonical =
  /^[A-Za-z\u00c0-\u00d6\u00d8-\u00f6\u00f8-\u01ba\u01bc-\u01bf\u01cd-\u01f0\u01f4-\u024f][A-Za-z\u00c0-\u00d6\u00d8-\u00f6\u00f8-\u01ba\u01bc-\u01bf\u01cd-\u01f0\u01f4-\u024f0-9_]*$/;
const plainAscii = /^[A-Za-z0-9_]*$/;
const subscriptDigits = '₀₁₂₃₄₅₆₇₈₉';

/** The name under which the sheet knows what was typed: 'μ_1' → 'mu_1', 'F₁' → 'F_1', 'ΔT' → 'DeltaT'. */
export function canonicalName(text: string): string {
  const trimmed = text.trim();
  if (plainAscii.test(trimmed)) return trimmed;
  let name = '';
  for (const typed of trimmed.normalize('NFC')) {
    const digit = subscriptDigits.indexOf(typed);
    if (digit >= 0) {
      name += name.includes('_') ? String(digit) : `_${digit}`;
      continue;
    }
    // An accent on a Greek letter does not make another quantity.
    const bare = typed >= '\u0370' && typed <= '\u03ff' ? (typed.normalize('NFD')[0] as string) : typed;
    name += greekToWord.get(bare) ?? typed;
  }
  return name;
}

/** Words that a formula uses itself, in any spelling of the language behind it. */
export const reserved: ReadonlySet<string> = new Set([
  ...functionNames,
  ...tableFunctions,
  'pi',
  'e',
  'and',
  'or',
  'not',
  'in',
  'to',
  'mod',
  'xor',
  'true',
  'false',
  'null',
  'undefined',
  'NaN',
  'Infinity',
  'end',
]);

/** Whether a canonical text is a letter, then letters, digits, `_`: a name, if it is not reserved. */
export function isWord(text: string): boolean {
  return canonical.test(text);
}

/** Whether a text, in canonical form, can name a quantity: a letter, then letters, digits, `_`; not reserved. */
export function isName(text: string): boolean {
  const name = canonicalName(text);
  return isWord(name) && !reserved.has(name);
}
