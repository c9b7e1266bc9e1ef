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

export function digestOfText(text: string): string {
  return bytesToHex(sha256(utf8ToBytes(text)));
}
