// Sheet files that are damaged, foreign, hostile or newer: each is refused with sentences that begin with the place.

import fc from 'fast-check';
import { describe, expect, it } from 'vitest';
import type { Cell, Sheet } from '../../src/sheet/document.ts';
import { readSheet, writeSheet } from '../../src/sheet/file.ts';
import { aSheet, seeded } from './any-sheet.ts';

const head = '"format": "tightside-sheet/1", "title": "T"';
const withCells = (...cells: string[]) => `{${head}, "cells": [${cells.join(', ')}]}`;
const given = (more = '') => `{"id": "g1", "kind": "given", "name": "mu_1", "value": "0.3"${more}}`;

function refusals(text: string): string[] {
  const read = readSheet(text);
  return read.ok ? [] : read.problems.map((problem) => `${problem.code} | ${problem.message}`);
}

describe('a refusal names the place, what is there and what should be', () => {
  const table: readonly (readonly [string, string, string])[] = [
    // name, text, the one problem
    [
      'unknown key of a cell',
      withCells(given(), given(', "valeu": "1"').replace('g1', 'g2')),
      'unknown-key | cells[1] (given mu_1): unknown key `valeu`; did you mean `value`?',
    ],
    [
      'unknown key of the sheet',
      `{${head}, "cells": [], "casez": []}`,
      'unknown-key | unknown key `casez`; did you mean `cases`?',
    ],
    [
      'unknown key of the title block',
      `{${head}, "titleBlock": {"projekt": "x"}, "cells": []}`,
      'unknown-key | titleBlock: unknown key `projekt`; did you mean `project`?',
    ],
    [
      'unknown key that is like none',
      withCells(given(', "zzzzzzzz": 1')),
      'unknown-key | cells[0] (given mu_1): unknown key `zzzzzzzz`; remove it, no such key is known here',
    ],
    [
      '__proto__ in a cell',
      withCells(given(', "__proto__": {}')),
      'unknown-key | cells[0] (given mu_1): unknown key `__proto__` (line 1, column 119); remove it',
    ],
    [
      'constructor as a case',
      withCells(given(', "byCase": {"constructor": "1"}')),
      'unknown-key | cells[0] (given mu_1).byCase: unknown key `constructor` (line 1, column 130); remove it',
    ],
    [
      'toString in the sheet',
      `{${head}, "cells": [], "toString": 1}`,
      'unknown-key | unknown key `toString`; remove it, no such key is known here',
    ],
    [
      'missing key',
      withCells('{"id": "g1", "kind": "given", "name": "x"}'),
      'missing-key | cells[0] (given x): the key `value` is missing',
    ],
    [
      'missing kind',
      withCells('{"id": "g1"}'),
      'missing-key | cells[0] (g1): the key `kind` is missing; it is one of heading, note, given, derived, criterion, sought, table, drawing, chart, figure',
    ],
    [
      'unknown kind',
      withCells('{"id": "g1", "kind": "gvien", "name": "x"}'),
      'bad-value | cells[0] (gvien x): unknown kind `gvien`; did you mean `given`?',
    ],
    [
      'wrong type',
      withCells(given().replace('"0.3"', '0.3')),
      'wrong-type | cells[0] (given mu_1).value: must be a text in double quotes, but is the number 0.3',
    ],
    [
      'null',
      withCells(given(', "source": null')),
      'wrong-type | cells[0] (given mu_1).source: must be a text in double quotes, but is null',
    ],
    ['a list for an object', `{${head}, "titleBlock": [], "cells": []}`, ''],
    [
      'a list for a cell',
      withCells('[]'),
      'missing-key | cells[0]: the key `kind` is missing; it is one of heading, note, given, derived, criterion, sought, table, drawing, chart, figure',
    ],
    ['a text for a cell', withCells('"x"'), 'wrong-type | cells[0]: must be an object in braces, but is a text'],
    ['cells that are no list', `{${head}, "cells": {}}`, 'wrong-type | cells: must be a list in brackets, but is an object'],
    [
      'a choice of words',
      withCells(given(', "basis": "guessed"')),
      'bad-value | cells[0] (given mu_1).basis: must be one of "specified", "measured", "tabulated", "assumed", but is "guessed"',
    ],
    [
      'a level',
      withCells('{"id": "h", "kind": "heading", "level": 4, "text": ""}'),
      'bad-value | cells[0] (heading h).level: must be one of 1, 2, 3, but is the number 4',
    ],
    [
      'digits',
      `{${head}, "settings": {"digits": 99}, "cells": []}`,
      'bad-value | settings.digits: must be a whole number from 1 to 15, but is 99',
    ],
    [
      'digits beyond doubles',
      `{${head}, "settings": {"digits": 1e999}, "cells": []}`,
      'bad-value | settings.digits: must be a whole number from 1 to 15, but is Infinity',
    ],
    [
      'an id with spaces',
      withCells(given().replace('g1', 'g 1')),
      'bad-value | cells[0] (given mu_1).id: "g 1" cannot be an id; an id has 1 to 64 Latin letters, digits, . _ or -, and begins with a letter or a digit',
    ],
    [
      'a case id with a colon',
      withCells(given(', "byCase": {"a:b": "1"}')),
      'bad-value | cells[0] (given mu_1).byCase: `a:b` cannot be an id; an id has 1 to 64 Latin letters, digits, . _ or -, and begins with a letter or a digit',
    ],
    [
      'a picture from the network',
      withCells('{"id": "p", "kind": "figure", "image": "https://example.org/a.png"}'),
      'bad-value | cells[0] (figure p).image: must be a PNG or JPEG picture as a data: address in base64',
    ],
    [
      'a picture with script',
      withCells('{"id": "p", "kind": "figure", "image": "data:image/svg+xml;base64,PHN2Zz4="}'),
      'bad-value | cells[0] (figure p).image: must be a PNG or JPEG picture as a data: address in base64',
    ],
    [
      'an id twice',
      withCells(given(), given()),
      'duplicate-id | cells[1] (given mu_1): the id `g1` is already that of cells[0]; give this one another',
    ],
    [
      'a case twice',
      `{${head}, "cases": [{"id": "a"}, {"id": "a"}], "cells": []}`,
      'duplicate-id | cases[1]: the id `a` is already that of cases[0]; give this one another',
    ],
    [
      'a key twice',
      withCells(given(', "value": "0.4"')),
      'duplicate-key | cells[0] (given mu_1): the key `value` stands there twice (line 1, column 119); keep one',
    ],
    [
      'NUL',
      withCells(given(', "title": "a\\u0000b"')),
      'bad-character | cells[0] (given mu_1).title: the text holds the control character (U+0000) (line 1, column 128); remove it',
    ],
    [
      'half a surrogate pair',
      withCells(given(', "title": "\\ud83e"')),
      'bad-character | cells[0] (given mu_1).title: the text holds half of a surrogate pair (U+D83E) (line 1, column 128); remove it',
    ],
    [
      'a newer format',
      '{"format": "tightside-sheet/2", "title": "T", "cells": [], "new": 1}',
      'newer-format | format: the sheet was written in format "tightside-sheet/2"; this version of the program knows "tightside-sheet/1". Open it with a newer version; it was left as it is',
    ],
    [
      'another format',
      '{"format": "other/1"}',
      'not-a-sheet | format: "other/1" is not the format of a sheet, which is "tightside-sheet/1"',
    ],
    ['no format', '{"title": "T"}', 'not-a-sheet | this is no sheet: the key `format` with "tightside-sheet/1" is missing'],
    ['a list', '[]', 'not-a-sheet | a sheet is an object in braces; this file holds a list'],
    ['a number', '17', 'not-a-sheet | a sheet is an object in braces; this file holds the number 17'],
    [
      'nothing',
      '',
      'syntax | line 1, column 1: expected a value: a text in double quotes, a number, true, false, null, { or [, but the file ends',
    ],
    [
      'a comma too many',
      '{"a": 1,\n}',
      'syntax | line 2, column 1: expected another key (no comma before a closing brace), but } stands there',
    ],
    [
      'a comma too many in a list',
      '{"a": [1,\n 2,]}',
      'syntax | line 2, column 4: expected another entry (no comma before a closing bracket), but ] stands there',
    ],
    [
      'a missing comma',
      '{"a": 1\n  "b": 2}',
      'syntax | line 2, column 3: expected a comma or a closing brace }, but " stands there',
    ],
    ['a missing colon', '{"a" 1}', 'syntax | line 1, column 6: expected a colon after the key, but 1 stands there'],
    ['a key without quotes', '{a: 1}', 'syntax | line 1, column 2: expected a key in double quotes, but a stands there'],
    ['single quotes', "{'a': 1}", "syntax | line 1, column 2: expected a key in double quotes, but ' stands there"],
    ['an open text', '{"a": "b', 'syntax | line 1, column 9: expected a closing quote, but the file ends'],
    [
      'a text over two lines',
      '{"a": "b\nc"}',
      'syntax | line 1, column 9: expected a closing quote before the end of the line, but the line ends',
    ],
    [
      'a bad escape',
      '{"a": "\\x"}',
      'syntax | line 1, column 9: expected one of " \\ / b f n r t u after a backslash, but x stands there',
    ],
    [
      'a number with a leading zero',
      '{"a": 012}',
      'syntax | line 1, column 8: expected a value that ends here, but 12 stands there',
    ],
    [
      'a cut file',
      '{"format": "tightside-sheet/1", "title": "T", "cells": [{"id": "g',
      'syntax | line 1, column 66: expected a closing quote, but the file ends',
    ],
    [
      'text behind the sheet',
      '{"format": "tightside-sheet/1"} x',
      'syntax | line 1, column 33: expected the end of the file, but x stands there',
    ],
    ['a comment', '{"a": 1 // b\n}', 'syntax | line 1, column 9: expected a comma or a closing brace }, but / stands there'],
    [
      'columns behind pictograms',
      '{"🧮🧮": }',
      'syntax | line 1, column 8: expected a value: a text in double quotes, a number, true, false, null, { or [, but } stands there',
    ],
  ];
  it.each(table.filter(([, , problem]) => problem !== ''))('%s', (_name, text, problem) => {
    expect(refusals(text)).toEqual([problem]);
  });

  it('takes an object that is a list for what it is', () => {
    expect(refusals(`{${head}, "template": ["a"], "cells": []}`)).toContain(
      'wrong-type | template: must be an object in braces, but is a list',
    );
  });

  it('lists several problems, each once, and at most twenty', () => {
    const cells = Array.from({ length: 30 }, (_, i) => `{"id": "g${i}", "kind": "given", "name": "x", "vlaue": "1"}`);
    const read = refusals(withCells(...cells));
    expect(read).toHaveLength(21);
    expect(read[0]).toBe('missing-key | cells[0] (given x): the key `value` is missing');
    expect(read[1]).toBe('unknown-key | cells[0] (given x): unknown key `vlaue`; did you mean `value`?');
    expect(read[20]).toBe('more | and 40 more problems of this kind');
  });

  it('gives the cell of a problem, so that a page can lead there', () => {
    const read = readSheet(withCells(given(', "valeu": ""')));
    expect(!read.ok && read.problems[0]).toMatchObject({ path: 'cells[0] (given mu_1)', cell: 'g1' });
  });
});

describe('what is a problem of a cell is no problem of the file', () => {
  const cells: readonly (readonly [string, string])[] = [
    ['a name that is no name', given().replace('mu_1', '2 x!')],
    ['the name of a property of every object', given().replace('mu_1', '__proto__')],
    ['a value that is no value', given().replace('0.3', 'quite a lot')],
    ['a value for a case that is not there', given(', "byCase": {"nowhere": "1"}')],
    ['a formula of a megabyte', `{"id": "d1", "kind": "derived", "name": "x", "formula": "${'1+'.repeat(500_000)}1"}`],
    ['a ragged table', '{"id": "t1", "kind": "table", "name": "t", "columns": [{"name": "a"}], "rows": [["1", "2"], []]}'],
    ['a range that is none', given(', "range": "about"')],
  ];
  it.each(cells)('%s', (_name, cell) => {
    expect(refusals(withCells(cell))).toEqual([]);
  });
});

/** Processor time since `start`: a busy machine makes nobody wait for the reader's sake. */
function seconds(start: NodeJS.CpuUsage): number {
  const { user, system } = process.cpuUsage(start);
  return (user + system) / 1e6;
}

describe('hostile files end at once', () => {
  it('10^5 nested brackets', () => {
    const start = process.cpuUsage();
    expect(refusals(`{${head}, "marks": ${'['.repeat(100_000)}`)).toEqual([
      'too-deep | line 1, column 119: nested deeper than a sheet can be (at most 64 levels)',
    ]);
    expect(seconds(start)).toBeLessThan(2);
  });
  it('a text beyond the limit', () => {
    expect(refusals(' '.repeat(64 * 1024 * 1024 + 1))).toEqual([
      'too-large | the file has more than 64 million characters; a sheet is text, keep pictures small',
    ]);
  });
  it('a million keys', () => {
    const keys = Array.from({ length: 1_000_000 }, (_, i) => `"k${i}":1`).join(',');
    const start = process.cpuUsage();
    expect(refusals(`{${head}, "cells": [], ${keys}}`)).toEqual([
      'too-many | line 1, column 98920: an object with more keys than a sheet can have (at most 10000 keys)',
    ]);
    expect(seconds(start)).toBeLessThan(2);
  });
  it('a table of a million numbers', () => {
    const start = process.cpuUsage();
    const cell = `{"id": "t1", "kind": "table", "name": "t", "columns": [], "rows": [[${'1,'.repeat(1_000_000)}1]]}`;
    expect(refusals(withCells(cell))).toEqual([
      'wrong-type | cells[0] (table t).rows[0][0]: must be a text in double quotes, but is the number 1',
    ]);
    expect(seconds(start)).toBeLessThan(2);
  });
  it('an own __proto__ changes no object', () => {
    refusals(`{${head}, "__proto__": {"polluted": true}, "cells": []}`);
    expect(({} as { polluted?: boolean }).polluted).toBeUndefined();
  });
  it('a byte order mark is passed over', () => {
    expect(refusals(`\uFEFF{${head}, "cells": []}`)).toEqual([]);
  });
});

describe('writing', () => {
  it('what is written is read as it was, and written again is the same, for any sheet', () => {
    fc.assert(
      fc.property(aSheet, (sheet) => {
        const text = writeSheet(sheet);
        const read = readSheet(text);
        expect(read.ok ? read.value : read.problems).toEqual(sheet);
        if (read.ok) expect(writeSheet(read.value)).toBe(text);
      }),
      seeded,
    );
  }, 60_000);
  it('puts keys in the order of the schema, whatever order they were made in', () => {
    const cell = { value: '1', name: 'x', kind: 'given', id: 'g1' } as Cell;
    const sheet: Sheet = { cells: [cell], title: 'T', format: 'tightside-sheet/1' };
    expect(writeSheet(sheet)).toBe(
      '{\n  "format": "tightside-sheet/1",\n  "title": "T",\n  "cells": [\n    {\n      "id": "g1",\n      "kind": "given",\n      "name": "x",\n      "value": "1"\n    }\n  ]\n}\n',
    );
  });
  it('keeps the rows of a table on one line each', () => {
    const sheet: Sheet = {
      format: 'tightside-sheet/1',
      title: 'T',
      cells: [
        {
          id: 't',
          kind: 'table',
          name: 't',
          columns: [{ name: 'a' }, { name: 'b' }],
          rows: [
            ['leather on iron', '0.30'],
            ['long'.repeat(40), ''],
          ],
        },
      ],
    };
    const lines = writeSheet(sheet).split('\n');
    expect(lines).toContain('        ["leather on iron", "0.30"],');
    expect(lines).toContain(`          "${'long'.repeat(40)}",`);
  });
  it('reaches the disk whatever was pasted: half a pair and control characters become U+FFFD', () => {
    const sheet: Sheet = { format: 'tightside-sheet/1', title: 'a\ud83eb\u0000c', cells: [] };
    const read = readSheet(writeSheet(sheet));
    expect(read.ok && read.value.title).toBe('a\uFFFDb\uFFFDc');
  });
});
