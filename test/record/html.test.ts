// The HTML form: complete, self-contained, and deaf to whatever a hostile sheet says.

import { readFileSync } from 'node:fs';
import { describe, expect, test } from 'vitest';
import { makeRecord, type RecordAssets, recordHtml } from '../../src/record/index.ts';
import { calculate } from '../../src/sheet/calculation.ts';
import { cellsOf, recordOf, sheetOf } from './sheets.ts';

const assets: RecordAssets = {
  formulaStyle: readFileSync(new URL('../../node_modules/katex/dist/katex.min.css', import.meta.url), 'utf8'),
  faces: [{ family: 'KaTeX_Main', style: 'normal', weight: '400', url: 'data:font/woff2;base64,AAAA' }],
};

const lines = [
  '# Forces',
  'F_u = 592.7 N',
  'k = 2.281',
  'F_1 := F_u*k/(k - 1) [N]',
  'F_1 <= "1320 N"',
  'The pull is {F_u}; F_1 must hold.',
];

describe('the document', () => {
  const html = recordHtml(
    recordOf(lines, {
      title: 'Mixer drive',
      titleBlock: { documentNumber: 'CS-014', revision: 'P1', preparedBy: 'A. Author' },
      status: 'for checking',
    }),
    assets,
  );

  test('needs nothing from outside: no script, no link, no url but data:', () => {
    expect(html).not.toMatch(/<script|<link|<iframe|<object|@import/iu);
    for (const [, url] of html.matchAll(/url\(([^)]*)\)/gu)) expect(url).toMatch(/^data:/u);
    for (const [, target] of html.matchAll(/\s(?:src|href)="([^"]*)"/gu)) expect(target).toMatch(/^(?:#step-|data:image\/)/u);
    expect(html).toContain("default-src 'none'");
  });

  test('each page says which sheet of which document in which state it is', () => {
    expect(html).toMatch(/@page\{size:A4/u);
    expect(html).toContain('counter(page) " of " counter(pages)');
    expect(html).toMatch(/@bottom-left\{content:"CS\\2d 014 rev P1 \\b7\s+for checking"/u);
    const issued = recordHtml(recordOf(lines, { status: 'issued', settings: { paper: 'Letter' } }), assets);
    expect(issued).toMatch(/@page\{size:Letter/u);
    expect(/@bottom-left\{content:"([^"]*)"/u.exec(issued)?.[1]).not.toContain('issued');
  });

  test('has symbols, numbers, result, verdict and the names of quantities in their symbols', () => {
    expect(html).toContain('id="step-1.3"');
    expect(html).toContain('<annotation encoding="application/x-tex">');
    expect(html).toContain('>met</span>');
    // The note names F_1 in a text: set as a formula there.
    expect(/class="prose"><p>The pull is [^<]*; <span class="katex">/u.test(html)).toBe(true);
    expect(html).not.toContain('katex-error');
  });

  test('a formula style brings no faces of its own', () => {
    expect(html).not.toMatch(/url\(fonts\//u);
    expect(html.match(/@font-face/gu)?.length).toBe(1);
  });
});

describe('cases', () => {
  const given = { kind: 'given', name: 'a', value: '1 m', byCase: { c2: '2 m' }, source: 'x' } as const;
  const columns = (count: number) => {
    const cases = Array.from({ length: count }, (_, k) => ({ id: `c${k + 1}`, title: `Case number ${k + 1}` }));
    return recordHtml(recordOf([given, 'b := 3*a [m]', 'b <= "5 m"'], { cases }), assets);
  };

  test('up to three stand in columns, more in lines, each with its mark', () => {
    expect(columns(3).match(/<th scope="col" class="res">/gu)?.length).toBe(3);
    const five = columns(5);
    expect(five.match(/<th scope="col" class="res">/gu)?.length).toBe(1);
    expect(five).toContain('class="legend"');
    // a: 1 m in A, C, D, E and 2 m in B.
    expect(five).toContain('<b class="case">A, C, D, E</b>');
    expect(five).toContain('<b class="case">B</b>');
  });
});

describe('a hostile sheet', () => {
  const evil = `</style></title></td><script>alert(1)</script><img src=x onerror="alert(2)">'"&\u0000\ud800{F_u}\\href{javascript:alert(3)}{x}`;
  const sheet = sheetOf(
    cellsOf(
      { kind: 'heading', level: 1, text: evil },
      {
        kind: 'given',
        name: 'F_u',
        title: evil,
        value: '5 N',
        source: evil,
        toConfirm: evil,
        carriedOver: true,
        basis: 'assumed',
      },
      { kind: 'derived', name: 'x', title: evil, formula: `"${evil.replaceAll('"', '')}" + 1`, source: evil },
      {
        kind: 'criterion',
        title: evil,
        left: 'F_u',
        relation: '<',
        right: '"1 N"',
        source: evil,
        justification: evil,
        ifNotMet: evil,
      },
      { kind: 'note', text: evil, role: 'limit', source: evil },
      {
        kind: 'table',
        name: evil,
        title: evil,
        columns: [
          { name: evil, title: evil },
          { name: 'n', title: evil, unit: evil },
        ],
        rows: [[evil, evil]],
        source: evil,
      },
      { kind: 'drawing', title: evil, layout: evil, uses: { a: evil } },
      { kind: 'chart', title: evil, vary: evil, from: evil, to: evil, show: [evil] },
      { kind: 'figure', title: evil, image: `data:image/png;base64,AAAA" onerror="alert(4)`, source: evil },
      { kind: 'given', name: evil, value: evil, unit: evil, choices: evil },
    ),
    {
      title: evil,
      purpose: evil,
      method: evil,
      conclusion: evil,
      references: [{ id: evil, document: evil, edition: evil, title: evil }],
      titleBlock: {
        documentNumber: evil,
        revision: evil,
        organisation: evil,
        language: evil,
        documentType: evil,
        preparedBy: evil,
        date: evil,
      },
      cases: [
        { id: 'a', title: evil },
        { id: evil, title: evil },
      ],
      template: { id: evil, version: 1 },
      carriedFrom: { title: evil, documentNumber: evil },
    },
  );

  test('has no say in the markup', () => {
    const html = recordHtml(makeRecord(calculate(sheet)), assets);
    expect(html).not.toMatch(/<script/iu);
    expect(html).not.toMatch(/<img/iu);
    expect(html).not.toMatch(/<[a-z][^>]*\son\w+=/iu);
    expect(html).not.toMatch(/href="(?!#step-)/u);
    // One style, one title, and nothing of the sheet has closed them.
    expect(html.match(/<\/style>/gu)?.length).toBe(1);
    expect(html.match(/<\/title>/gu)?.length).toBe(1);
    expect(html).not.toContain('\u0000');
    expect(html).not.toMatch(/\p{Surrogate}/u);
    expect(html).toContain('&lt;script&gt;');
    const style = html.slice(html.indexOf('<style>') + '<style>'.length, html.indexOf('</style>'));
    expect(style.includes('<')).toBe(false);
  });
});
