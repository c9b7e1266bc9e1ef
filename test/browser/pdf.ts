// Reads the text of a printed page out of a PDF as browsers write them: enough to see what stands on which page, nothing more.
//
// Objects in plain sight, streams in Flate, glyphs told by each font's own table of characters (ISO 32000-1, 7.3, 7.4.4, 9.10.3).

import { inflateSync } from 'node:zlib';

interface PdfObject {
  readonly head: string;
  readonly stream?: Buffer;
}

export interface PdfText {
  readonly pages: number;
  readonly of: string[];
  /** Width and height of the first page in points, whole. */
  readonly size: [number, number];
}

export function readPdf(pdf: Buffer): PdfText {
  const objects = objectsOf(pdf);
  const pages = pagesOf(objects);
  const box = /\/MediaBox\s*\[\s*[\d.]+\s+[\d.]+\s+([\d.]+)\s+([\d.]+)/u.exec(pages[0]?.head ?? '');
  return {
    pages: pages.length,
    of: pages.map((page) => textOfPage(page, objects)),
    size: [Math.round(Number(box?.[1])), Math.round(Number(box?.[2]))],
  };
}

function objectsOf(pdf: Buffer): Map<string, PdfObject> {
  const text = pdf.toString('latin1');
  const objects = new Map<string, PdfObject>();
  for (const match of text.matchAll(/(?:^|[\r\n])(\d+) 0 obj\s/gu)) {
    const from = match.index + match[0].length;
    const end = text.indexOf('endobj', from);
    const stream = text.indexOf('stream', from);
    if (stream < 0 || stream > end) {
      objects.set(match[1] ?? '', { head: text.slice(from, end) });
      continue;
    }
    const head = text.slice(from, stream);
    const begin = stream + (text.startsWith('\r\n', stream + 6) ? 8 : 7);
    const length = Number(/\/Length (\d+)/u.exec(head)?.[1] ?? 0);
    const raw = pdf.subarray(begin, begin + length);
    objects.set(match[1] ?? '', { head, stream: head.includes('/FlateDecode') ? inflateSync(raw) : raw });
  }
  return objects;
}

/** In the order of the tree of pages. */
function pagesOf(objects: ReadonlyMap<string, PdfObject>): PdfObject[] {
  const walk = (node: PdfObject | undefined): PdfObject[] => {
    if (node === undefined) return [];
    const kids = /\/Kids\s*\[([^\]]*)\]/u.exec(node.head)?.[1];
    if (kids === undefined) return /\/Type\s*\/Page\b/u.test(node.head) ? [node] : [];
    return [...kids.matchAll(/(\d+) 0 R/gu)].flatMap((kid) => walk(objects.get(kid[1] ?? '')));
  };
  const root = [...objects.values()].find(({ head }) => /\/Type\s*\/Catalog/u.test(head));
  return walk(objects.get(/\/Pages (\d+) 0 R/u.exec(root?.head ?? '')?.[1] ?? ''));
}

function textOfPage(page: PdfObject, objects: ReadonlyMap<string, PdfObject>): string {
  const at = (reference: string | undefined) => objects.get(reference ?? '');
  const resources = /\/Resources (\d+) 0 R/u.exec(page.head)?.[1];
  const head = resources === undefined ? page.head : (at(resources)?.head ?? '');
  const fontList = /\/Font\s*<<([^>]*)>>/u.exec(head)?.[1] ?? at(/\/Font (\d+) 0 R/u.exec(head)?.[1])?.head ?? '';
  const fonts = new Map(
    [...fontList.matchAll(/\/(\w+) (\d+) 0 R/gu)].map((font) => [font[1] ?? '', fontOf(at(font[2]), objects)]),
  );
  const contents = [...(/\/Contents\s*(\[[^\]]*\]|\d+ 0 R)/u.exec(page.head)?.[1]?.matchAll(/(\d+) 0 R/gu) ?? [])];
  const code = contents.map((one) => at(one[1])?.stream?.toString('latin1') ?? '').join('\n');
  let font: Font = { characters: new Map(), digits: 4 };
  let text = '';
  for (const token of code.matchAll(/\/(\w+) -?[\d.]+ Tf|<([0-9A-Fa-f]+)>|\b(ET|BDC|Tm)\b/gu)) {
    if (token[1] !== undefined) font = fonts.get(token[1]) ?? font;
    else if (token[2] !== undefined) text += decode(token[2], font);
    else if (token[3] === 'ET') text += '\n';
  }
  return text.replace(/[\s\u00a0]+/gu, ' ').trim();
}

interface Font {
  /** By number of glyph. */
  readonly characters: ReadonlyMap<number, string>;
  /** Hexadecimal digits of a glyph: two where the font holds its own drawings (as a variable one does), else four. */
  readonly digits: 2 | 4;
}

function decode(hex: string, { characters, digits }: Font): string {
  let text = '';
  for (let at = 0; at + digits <= hex.length; at += digits)
    text += characters.get(Number.parseInt(hex.slice(at, at + digits), 16)) ?? '';
  return text;
}

/** From the table of characters that comes with a font. */
function fontOf(font: PdfObject | undefined, objects: ReadonlyMap<string, PdfObject>): Font {
  const table = objects.get(/\/ToUnicode (\d+) 0 R/u.exec(font?.head ?? '')?.[1] ?? '')?.stream?.toString('latin1') ?? '';
  const characters = new Map<number, string>();
  const text = (hex: string) => Buffer.from(hex, 'hex').swap16().toString('utf16le');
  for (const block of table.matchAll(/beginbfchar([\s\S]*?)endbfchar/gu)) {
    for (const pair of (block[1] ?? '').matchAll(/<([0-9A-Fa-f]+)>\s*<([0-9A-Fa-f]+)>/gu))
      characters.set(Number.parseInt(pair[1] ?? '', 16), text(pair[2] ?? ''));
  }
  for (const block of table.matchAll(/beginbfrange([\s\S]*?)endbfrange/gu)) {
    for (const range of (block[1] ?? '').matchAll(/<([0-9A-Fa-f]+)>\s*<([0-9A-Fa-f]+)>\s*<([0-9A-Fa-f]+)>/gu)) {
      const [from, to, first] = [range[1], range[2], range[3]].map((hex) => Number.parseInt(hex ?? '', 16)) as [
        number,
        number,
        number,
      ];
      for (let glyph = from; glyph <= to; glyph += 1) characters.set(glyph, String.fromCodePoint(first + glyph - from));
    }
  }
  return { characters, digits: /\/Subtype\s*\/Type3/u.test(font?.head ?? '') ? 2 : 4 };
}
