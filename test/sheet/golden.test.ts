// Sheets that every later version must open: one file for each thing that a sheet can hold.

import { readdirSync, readFileSync } from 'node:fs';
import { describe, expect, it } from 'vitest';
import { readSheet, writeSheet } from '../../src/sheet/file.ts';

const folder = new URL('./golden/', import.meta.url);
const files = readdirSync(folder).filter((name) => name.endsWith('.sheet.json'));

describe('golden files', () => {
  it('are all there', () => {
    expect(files.sort()).toEqual(
      ['all-kinds', 'decimal-comma', 'minimal', 'mixer-drive', 'one-case', 'unicode-names'].map((name) => `${name}.sheet.json`),
    );
  });

  it.each(files)('%s is read and written again byte for byte', (name) => {
    const text = readFileSync(new URL(name, folder), 'utf8');
    const read = readSheet(text);
    expect(read.ok ? [] : read.problems).toEqual([]);
    if (read.ok) expect(writeSheet(read.value)).toBe(text);
  });

  it.each(files)('%s keeps every text as typed', (name) => {
    const text = readFileSync(new URL(name, folder), 'utf8');
    const read = readSheet(text);
    expect(read.ok && read.value).toEqual(JSON.parse(text));
  });
});
