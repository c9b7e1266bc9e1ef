// The schema, the hand-written types and the published JSON Schema say the same.

import { toJsonSchema } from '@valibot/to-json-schema';
import { describe, expect, it } from 'vitest';
import type { Sheet } from '../../src/sheet/document.ts';
import { type SheetOfSchema, sheetSchema } from '../../src/sheet/schema.ts';

type Deep<T> = T extends readonly (infer Item)[]
  ? readonly Deep<Item>[]
  : T extends object
    ? { readonly [Key in keyof T]: Deep<T[Key]> }
    : T;
type Same<A, B> = (<T>() => T extends A ? 1 : 2) extends <T>() => T extends B ? 1 : 2 ? true : false;
/** Alike in every key, which may be left out, and in every value; `format` is any text in the type and this version's in the schema. */
type Alike<A extends { format: string }, B extends { format: string }> = Same<Deep<Omit<A, 'format'>>, Deep<Omit<B, 'format'>>>;

describe('schema', () => {
  it('lets through exactly what the type Sheet says (held by the compiler)', () => {
    const alike: Alike<SheetOfSchema, Sheet> = true;
    // @ts-expect-error a key more is another type: the comparison can fail
    const other: Alike<SheetOfSchema & { cells: readonly { extra: 1 }[] }, Sheet> = true;
    expect([alike, other]).toEqual([true, true]);
  });

  const json = toJsonSchema(sheetSchema, { target: 'draft-2020-12' });

  it('is published with every object closed, but for the plain JSON of marks, revisions and log', () => {
    const open: string[] = [];
    let closed = 0;
    const visit = (node: unknown, path: string): void => {
      if (typeof node !== 'object' || node === null) return;
      const { type, additionalProperties } = node as { type?: string; additionalProperties?: unknown };
      if (type === 'object' && additionalProperties !== false) open.push(path);
      if (type === 'object' && additionalProperties === false) closed += 1;
      for (const [key, child] of Object.entries(node)) visit(child, `${path}/${key}`);
    };
    visit(json, '');
    // Values by case, and the parts of a drawing: texts by name.
    expect(open.map((path) => path.split('/').at(-1))).toEqual(['byCase', 'uses']);
    expect(closed).toBe(1 + 10 + 1 + 7); // the sheet, ten kinds of cell, columns, and the blocks of the head
  });

  it('requires format, title and cells, and of a cell what makes it one', () => {
    expect(json.required).toEqual(['format', 'title', 'cells']);
    const cells = (json.properties!['cells'] as { items: { anyOf?: object[]; oneOf?: object[] } }).items;
    const options = (cells.oneOf ?? cells.anyOf ?? []) as { properties: { kind: { const: string } }; required: string[] }[];
    expect(Object.fromEntries(options.map(({ properties, required }) => [properties.kind.const, required.slice(2)]))).toEqual({
      heading: ['text'],
      note: ['text'],
      given: ['name', 'value'],
      derived: ['name', 'formula'],
      criterion: ['left', 'relation', 'right'],
      sought: ['name', 'where', 'between'],
      table: ['name', 'columns', 'rows'],
      drawing: ['layout', 'uses'],
      chart: ['vary', 'from', 'to', 'show'],
      figure: ['image'],
    });
  });
});
