// The keys of the page and the texts that print carries: plain functions, tested without a page.

import { describe, expect, it } from 'vitest';
import { commandOf, isWriting, keyTable } from '../../src/view/keys.ts';
import { cssString } from '../../src/view/print.ts';

const press = (key: string, with_: Partial<{ ctrlKey: boolean; metaKey: boolean; altKey: boolean; shiftKey: boolean }> = {}) => ({
  key,
  ctrlKey: false,
  metaKey: false,
  altKey: false,
  shiftKey: false,
  ...with_,
});

describe('keys', () => {
  it.each([
    ['ArrowUp', {}, 'up'],
    ['Home', { ctrlKey: true }, 'sheet-start'],
    ['End', { metaKey: true }, 'sheet-end'],
    ['F2', {}, 'edit'],
    ['<', {}, 'origin'],
    ['>', { shiftKey: true }, 'use'],
    ['z', { ctrlKey: true }, 'undo'],
    ['Z', { ctrlKey: true, shiftKey: true }, 'redo'],
    ['y', { metaKey: true }, 'redo'],
    ['z', {}, undefined],
    ['ArrowLeft', { altKey: true }, undefined],
    ['ArrowUp', { shiftKey: true }, 'extend-up'],
    ['Enter', { altKey: true }, 'line-below'],
    ['Enter', { ctrlKey: true, shiftKey: true }, 'duplicate'],
    ['F10', { shiftKey: true }, 'line-menu'],
    ['?', { shiftKey: true }, 'keys'],
    ['c', { ctrlKey: true }, undefined],
    ['a', { ctrlKey: true }, undefined],
  ] as const)('%s %j means %s', (key, held, command) => {
    expect(commandOf(press(key, held))).toBe(command);
  });

  it('begin a value with what writes a character, and with nothing else', () => {
    for (const key of ['1', '-', 'é', '.', '±']) expect(isWriting(press(key))).toBe(true);
    for (const key of ['Tab', 'F5', 'Escape', ' ', 'Dead']) expect(isWriting(press(key))).toBe(false);
    expect(isWriting(press('1', { ctrlKey: true }))).toBe(false);
  });

  it('are each bound once, and every line of the list says what it does', () => {
    const keys = keyTable.flatMap(({ binds }) => binds.flatMap(([, ...bound]) => bound));
    expect(new Set(keys).size).toBe(keys.length);
    for (const { shown, does } of keyTable) expect([shown, does].every((text) => text.length > 0)).toBe(true);
  });
});

describe('texts in the margins of a print', () => {
  it.each([
    ['Drive', '"Drive"'],
    ['5" pulley \\ rim', '"5\\22  pulley \\5c  rim"'],
    ['a\nb', '"a\\a b"'],
  ])('%j is written as a string of the style sheet', (text, css) => {
    expect(cssString(text)).toBe(css);
  });
});
