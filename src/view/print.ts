// What the pages of a print carry around the sheet: its name at the head, state and page number at the foot.
//
// The boxes in the margins take their text from properties of the document; the paper's size from a style sheet of our own.

import type { RecordModel } from '../record/index.ts';

let size: CSSStyleSheet | undefined;
let last = '';

export function preparePrint(model: RecordModel) {
  const { titleBlock, title, status, settings } = model;
  // A style of the document that is set anew, even to what it was, has every element styled anew.
  const now = JSON.stringify([titleBlock, title, status, settings.paper]);
  if (now === last) return;
  last = now;
  const { documentNumber, revision, organisation } = titleBlock;
  const set = (name: string, text: string) => document.documentElement.style.setProperty(name, cssString(text));
  set('--print-document', [documentNumber, revision ? `rev ${revision}` : ''].filter(Boolean).join(' '));
  set('--print-title', model.title);
  set('--print-status', model.status === 'issued' ? '' : model.status);
  set('--print-organisation', organisation ?? '');
  size ??= new CSSStyleSheet();
  size.replaceSync(`@page { size: ${model.settings.paper === 'Letter' ? 'letter' : 'A4'} portrait; }`);
  if (!document.adoptedStyleSheets.includes(size)) document.adoptedStyleSheets.push(size);
}

/** A text as a CSS string: quotes, backslashes and line ends written out. */
export const cssString = (text: string) =>
  `"${[...text].map((sign) => (/["\\\p{Cc}]/u.test(sign) ? `\\${sign.codePointAt(0)?.toString(16)} ` : sign)).join('')}"`;
