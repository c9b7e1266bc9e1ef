// Text as authors type it (a small, safe part of Markdown) read into blocks, so that every form of the record lays it out alike.
//
// 1. Paragraphs, lists (-, *, 1.), **strong**, *emphasis*, `code`; all else is text and stays as typed, markup included.
// 2. Linear in the length of the text; no nesting beyond a span within a block.
// Not here: live values (live.ts), escaping for a form (html.ts).

export interface ProseSpan {
  readonly style: 'text' | 'strong' | 'emphasis' | 'code';
  readonly text: string;
}

export type ProseBlock =
  | { readonly kind: 'paragraph'; readonly spans: readonly ProseSpan[] }
  | { readonly kind: 'list'; readonly ordered: boolean; readonly items: readonly (readonly ProseSpan[])[] };

const bullet = /^\s{0,3}[-*]\s+(.*)$/u;
const numbered = /^\s{0,3}\d{1,3}[.)]\s+(.*)$/u;

export function readProse(text: string): readonly ProseBlock[] {
  const blocks: ProseBlock[] = [];
  let lines: string[] = [];
  let list: { ordered: boolean; items: string[] } | undefined;
  const closeParagraph = () => {
    if (lines.length > 0) blocks.push({ kind: 'paragraph', spans: readSpans(lines.join(' ')) });
    lines = [];
  };
  const closeList = () => {
    if (list) blocks.push({ kind: 'list', ordered: list.ordered, items: list.items.map(readSpans) });
    list = undefined;
  };
  for (const line of text.split(/\r\n|\r|\n/u)) {
    const plain = line.trim();
    const item = bullet.exec(line) ?? numbered.exec(line);
    if (plain === '') {
      closeParagraph();
      closeList();
    } else if (item) {
      closeParagraph();
      const ordered = !bullet.test(line);
      if (list && list.ordered !== ordered) closeList();
      list ??= { ordered, items: [] };
      list.items.push(item[1]?.trim() ?? '');
    } else if (list && /^\s/u.test(line)) {
      const last = list.items.length - 1;
      list.items[last] = `${list.items[last] ?? ''} ${plain}`;
    } else {
      closeList();
      lines.push(plain);
    }
  }
  closeParagraph();
  closeList();
  return blocks;
}

// Emphasis opens before and closes after a character that is no space, so that 2 * 3 * 4 stays a product.
const styled = /`([^`]+)`|\*\*(?=\S)([^*]*[^*\s])\*\*|\*(?=[^\s*])([^*]*[^*\s])\*/gu;

export function readSpans(text: string): readonly ProseSpan[] {
  const spans: ProseSpan[] = [];
  let end = 0;
  for (const match of text.matchAll(styled)) {
    if (match.index > end) spans.push({ style: 'text', text: text.slice(end, match.index) });
    const [, code, strong, emphasis] = match;
    if (code !== undefined) spans.push({ style: 'code', text: code });
    else if (strong !== undefined) spans.push({ style: 'strong', text: strong });
    else spans.push({ style: 'emphasis', text: emphasis ?? '' });
    end = match.index + match[0].length;
  }
  if (end < text.length) spans.push({ style: 'text', text: text.slice(end) });
  return spans;
}
