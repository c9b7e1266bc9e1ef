// Text as authors type it.

import { expect, test } from 'vitest';
import { readProse, readSpans } from '../../src/record/prose.ts';

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
