// One plain value, one digest: lower-case hexadecimal SHA-256 (FIPS 180-4) of its canonical JSON (RFC 8785).
//
// Equal values have equal digests, whatever the order of their keys; what JSON cannot hold (NaN, half a surrogate pair) throws.
// Not here: what is digested of a sheet (fingerprint.ts).

import { sha256 } from '@noble/hashes/sha2.js';
import { bytesToHex, utf8ToBytes } from '@noble/hashes/utils.js';
import serialize from 'canonicalize';

export function digest(value: unknown): string {
  return digestOfText(canonicalJson(value));
}

export function canonicalJson(value: unknown): string {
  const text = serialize(value);
  if (text === undefined) throw new TypeError('nothing that JSON can hold');
  return text;
}

/**
 * The same text, several times as fast, for what a sheet holds: texts, whole and decimal numbers, lists and plain objects. Half a surrogate
 * pair does not throw; it shows as an escape.
 */
export function plainJson(value: unknown): string {
  if (typeof value === 'string') return JSON.stringify(value);
  if (Array.isArray(value)) return `[${value.map((item) => (item === undefined ? 'null' : plainJson(item))).join(',')}]`;
  if (typeof value === 'object' && value !== null) {
    let text = '{';
    for (const key of Object.keys(value).sort()) {
      const entry = (value as Record<string, unknown>)[key];
      if (entry !== undefined) text += `${text === '{' ? '' : ','}${JSON.stringify(key)}:${plainJson(entry)}`;
    }
    return `${text}}`;
  }
  if (typeof value === 'number' && !Number.isFinite(value)) throw new TypeError('nothing that JSON can hold');
  return JSON.stringify(value);
}

export function digestOfText(text: string): string {
  return bytesToHex(sha256(utf8ToBytes(text)));
}
