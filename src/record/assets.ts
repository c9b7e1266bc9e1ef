// What a record carries along so that it looks the same on a machine with no network: faces as data: URLs, the style of formulas.
//
// Only the bundler resolves these imports; html.ts takes them as an argument and knows no file.

import textExtended from '@fontsource-variable/atkinson-hyperlegible-next/files/atkinson-hyperlegible-next-latin-ext-wght-normal.woff2?inline';
import text from '@fontsource-variable/atkinson-hyperlegible-next/files/atkinson-hyperlegible-next-latin-wght-normal.woff2?inline';
import mainItalic from 'katex/dist/fonts/KaTeX_Main-Italic.woff2?inline';
import main from 'katex/dist/fonts/KaTeX_Main-Regular.woff2?inline';
import mathItalic from 'katex/dist/fonts/KaTeX_Math-Italic.woff2?inline';
import size1 from 'katex/dist/fonts/KaTeX_Size1-Regular.woff2?inline';
import size2 from 'katex/dist/fonts/KaTeX_Size2-Regular.woff2?inline';
import size3 from 'katex/dist/fonts/KaTeX_Size3-Regular.woff2?inline';
import size4 from 'katex/dist/fonts/KaTeX_Size4-Regular.woff2?inline';
import formulaStyle from 'katex/dist/katex.min.css?raw';
import type { RecordAssets } from './html-style.ts';

export const recordAssets: RecordAssets = {
  formulaStyle,
  faces: [
    {
      family: 'Atkinson Hyperlegible Next',
      style: 'normal',
      weight: '200 800',
      url: text,
      range: 'U+0000-00FF,U+0131,U+0152-0153,U+02BB-02DC,U+2000-206F,U+20AC,U+2122,U+2190-2193,U+2212',
    },
    {
      family: 'Atkinson Hyperlegible Next',
      style: 'normal',
      weight: '200 800',
      url: textExtended,
      range: 'U+0100-02BA,U+02BD-02C5,U+1E00-1E9F,U+1EF2-1EFF,U+2020,U+20A0-20AB',
    },
    { family: 'KaTeX_Main', style: 'normal', weight: '400', url: main },
    { family: 'KaTeX_Main', style: 'italic', weight: '400', url: mainItalic },
    { family: 'KaTeX_Math', style: 'italic', weight: '400', url: mathItalic },
    { family: 'KaTeX_Size1', style: 'normal', weight: '400', url: size1 },
    { family: 'KaTeX_Size2', style: 'normal', weight: '400', url: size2 },
    { family: 'KaTeX_Size3', style: 'normal', weight: '400', url: size3 },
    { family: 'KaTeX_Size4', style: 'normal', weight: '400', url: size4 },
  ],
};
