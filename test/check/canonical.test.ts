// Canonical JSON and SHA-256 as the fingerprints use them, against the published test data of both.

import { sha256 } from '@noble/hashes/sha2.js';
import { bytesToHex, hexToBytes, utf8ToBytes } from '@noble/hashes/utils.js';
import serialize from 'canonicalize';
import fc from 'fast-check';
import { describe, expect, it } from 'vitest';
import { digest, plainJson } from '../../src/check/digest.ts';
import published from './rfc8785.json';

function doubleOf(ieee: string): number {
  return new DataView(hexToBytes(ieee.padStart(16, '0')).buffer).getFloat64(0);
}
function ieeeOf(value: number): string {
  const view = new DataView(new ArrayBuffer(8));
  view.setFloat64(0, value);
  return view.getBigUint64(0).toString(16);
}

describe('canonical JSON (RFC 8785)', () => {
  it.each(published.numbers)('writes the double $ieee as $text', ({ ieee, text }) => {
    expect(serialize(doubleOf(ieee))).toBe(text);
  });

  it.each(Object.entries(published.objects))(
    'writes the object “%s” byte for byte',
    (_name, { inputText, outputHex, sha256: hash }) => {
      const value: unknown = JSON.parse(inputText);
      expect(bytesToHex(utf8ToBytes(serialize(value)!))).toBe(outputHex);
      expect(digest(value)).toBe(hash);
      expect(bytesToHex(utf8ToBytes(plainJson(value)))).toBe(outputHex);
    },
  );

  it('is written alike by the fast writer, for any value that JSON holds and for keys that are left out', () => {
    fc.assert(
      fc.property(fc.jsonValue({ stringUnit: 'grapheme' }), fc.string({ unit: 'grapheme' }), (value, key) => {
        expect(plainJson(value)).toBe(serialize(value));
        expect(plainJson({ [key]: value, 10: 1, 9: undefined, b: [value] })).toBe(serialize({ [key]: value, 10: 1, b: [value] }));
      }),
      { numRuns: 500, seed: 20_261_201 },
    );
  });

  it.each([
    ['NaN', Number.NaN],
    ['Infinity', Number.POSITIVE_INFINITY],
    ['-Infinity', Number.NEGATIVE_INFINITY],
    ['half a surrogate pair', '\ud83e'],
  ])('refuses %s', (_name, value) => {
    expect(() => digest({ value })).toThrow();
  });

  it('writes the published sequence of 100 000 doubles as its digests say', () => {
    const hash = sha256.create();
    let block: Uint8Array = new Uint8Array(32);
    let count = 0;
    const digests: Record<string, string> = {};
    const take = (value: number): void => {
      hash.update(utf8ToBytes(`${ieeeOf(value)},${serialize(value)}\n`));
      count += 1;
      if (count === 1000 || count === 10_000 || count === 100_000) digests[String(count)] = bytesToHex(hash.clone().digest());
    };
    for (const ieee of published.sequence.first) take(doubleOf(ieee));
    for (let i = 0n; i < 2000n; i += 1n) take(doubleOf((0x0010000000000000n + i).toString(16)));
    while (count < 100_000) {
      block = sha256(block);
      const view = new DataView(block.buffer, block.byteOffset, 32);
      for (let at = 0; at < 32 && count < 100_000; at += 8) {
        const value = view.getFloat64(at, true);
        if (value !== 0 && Number.isFinite(value)) take(value);
      }
    }
    expect(digests).toEqual(published.sequence.sha256);
  }, 60_000);
});

describe('SHA-256 (FIPS 180-4; messages and digests of its example papers, padding lengths recomputed)', () => {
  const a = (length: number) => 'a'.repeat(length);
  it.each([
    ['', 'e3b0c44298fc1c149afbf4c8996fb92427ae41e4649b934ca495991b7852b855'],
    ['abc', 'ba7816bf8f01cfea414140de5dae2223b00361a396177a9cb410ff61f20015ad'],
    [
      'abcdbcdecdefdefgefghfghighijhijkijkljklmklmnlmnomnopnopq',
      '248d6a61d20638b8e5c026930c3e6039a33ce45964ff2167f6ecedd419db06c1',
    ],
    [
      'abcdefghbcdefghicdefghijdefghijkefghijklfghijklmghijklmnhijklmnoijklmnopjklmnopqklmnopqrlmnopqrsmnopqrstnopqrstu',
      'cf5b16a778af8380036ce59e7b0492370b249b11e8f07a51afac45037afee9d1',
    ],
    [a(1_000_000), 'cdc76e5c9914fb9281a1c7e284d73e67f1809a48a497200e046d39ccc7112cd0'],
    // One byte to either side of where the padding takes another block.
    [a(55), '9f4390f8d30c2dd92ec9f095b65e2b9ae9b0a925a5258e241c9f1e910f734318'],
    [a(56), 'b35439a4ac6f0948b6d6f9e3c6af0f5f590ce20f1bde7090ef7970686ec6738a'],
    [a(63), '7d3e74a05d7db15bce4ad9ec0658ea98e3f06eeecf16b4c6fff2da457ddc2f34'],
    [a(64), 'ffe054fe7ae0cb6dc65c3af9b61d5209f439851db43d0ba5997337df154668eb'],
    [a(65), '635361c48bb9eab14198e76ea8ab7f1a41685d6ad62aa9146d301d4f17eb0ae0'],
    [a(119), '31eba51c313a5c08226adf18d4a359cfdfd8d2e816b13f4af952f7ea6584dcfb'],
    [a(120), '2f3d335432c70b580af0e8e1b3674a7c020d683aa5f73aaaedfdc55af904c21c'],
  ])('message %#', (message, hash) => {
    expect(bytesToHex(sha256(utf8ToBytes(message)))).toBe(hash);
  });
});
