// Text as authors type it.

import { expect, test } from 'vitest';
import { rankedItems, readProse, readSpans } from '../../src/record/prose.ts';

const text = (value: string) => ({ style: 'text', text: value });

test('blank lines part paragraphs, lines of one paragraph run on', () => {
  expect(readProse('one\ntwo\n\nthree')).toEqual([
    { kind: 'paragraph', spans: [text('one two')] },
    { kind: 'paragraph', spans: [text('three')] },
  ]);
});

test('lists of both kinds, with lines that run on', () => {
  expect(readProse('Left out:\n- shock\n  loads\n- heat\n1. first\n2) second')).toEqual([
    { kind: 'paragraph', spans: [text('Left out:')] },
    { kind: 'list', ordered: false, items: [[text('shock loads')], [text('heat')]] },
    { kind: 'list', ordered: true, items: [[text('first')], [text('second')]] },
  ]);
});

test('strong, emphasis and code; a product keeps its stars', () => {
  expect(readSpans('a **b c** *d* `e*f*` 2 * 3 * 4')).toEqual([
    text('a '),
    { style: 'strong', text: 'b c' },
    text(' '),
    { style: 'emphasis', text: 'd' },
    text(' '),
    { style: 'code', text: 'e*f*' },
    text(' 2 * 3 * 4'),
  ]);
});

test('markup stays text, and a text of a megabyte is read in linear time', () => {
  expect(readSpans('<b>x</b> [a](javascript:b)')).toEqual([text('<b>x</b> [a](javascript:b)')]);
  const started = performance.now();
  for (const piece of ['*', '`', '**', '* ', '*a ', '- ', '1. ', '[', '\n']) readProse(piece.repeat(100_000));
  expect(performance.now() - started).toBeLessThan(2000);
});

test('a second rank stands below the item before it, numbered or not; a first one begins nothing below', () => {
  const [list] = readProse('- first\n  - below\n  - more\n  1. numbered\n- second\n  runs on');
  if (list?.kind !== 'list') throw new Error('no list');
  expect(list.items).toHaveLength(5);
  expect(rankedItems(list)).toEqual([
    {
      spans: [text('first')],
      below: [
        { ordered: false, items: [[text('below')], [text('more')]] },
        { ordered: true, items: [[text('numbered')]] },
      ],
    },
    { spans: [text('second runs on')], below: [] },
  ]);
  expect(readProse('  - alone')).toEqual([{ kind: 'list', ordered: false, items: [[text('alone')]] }]);
});

test('two spaces or a backslash at the end begin a new line; at the very end they do not', () => {
  const lines = [text('one'), { style: 'break', text: '\n' }, text('two'), { style: 'break', text: '\n' }, text('three')];
  expect(readProse('one  \ntwo\\\nthree  ')).toEqual([{ kind: 'paragraph', spans: lines }]);
});

test('a link is its text and its address; a citation before parentheses stays one, any other scheme stays as typed', () => {
  expect(readSpans('see [the maker](https://example.org/a_b) now')).toEqual([
    text('see '),
    text('the maker (https://example.org/a_b)'),
    text(' now'),
  ]);
  expect(readSpans('[https://example.org](https://example.org)')).toEqual([text('https://example.org')]);
  for (const typed of ['[R1](5.2)', '[x](javascript:alert(1))', '[x](data:text/html,y)'])
    expect(readSpans(typed)).toEqual([text(typed)]);
});

test('a megabyte of links, breaks and ranks is read in linear time', () => {
  const started = performance.now();
  for (const piece of ['[a](https://', '[a', '](', '  - ', 'a  \n', 'a\\\n', '\t- a\n', '[[a]]((https://'])
    readProse(piece.repeat(100_000));
  expect(performance.now() - started).toBeLessThan(4000);
});
