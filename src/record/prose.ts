// Text as authors type it (a small, safe part of Markdown) read into blocks, so that every form of the record lays it out alike.
//
// 1. Paragraphs, lists (-, *, 1.) with a second rank behind two spaces, **strong**, *emphasis*, `code`; all else is text and stays as
//    typed, markup included.
// 2. A link is printed as its text with its address behind it: on paper nobody can follow it otherwise.
// 3. Two spaces or a backslash at the end of a line begin a new line of the paragraph.
// 4. Linear in the length of the text; no nesting beyond a span within a block.
// Not here: live values (make.ts), escaping for a form (html.ts).

export interface ProseSpan {
  /** `break`: the line ends here; its text is a line end. */
  readonly style: 'text' | 'strong' | 'emphasis' | 'code' | 'break';
  readonly text: string;
}

/** Where an item of a list stands: in the list itself, or in a list below the item before it. */
export type ItemRank = 'first' | 'bulleted below' | 'numbered below';

export type ProseBlock =
  | { readonly kind: 'paragraph'; readonly spans: readonly ProseSpan[] }
  | {
      readonly kind: 'list';
      readonly ordered: boolean;
      readonly items: readonly (readonly ProseSpan[])[];
      /** One an item; absent where all are of the first rank. */
      readonly ranks?: readonly ItemRank[];
    };

const bullet = /^\s{0,7}[-*]\s+(.*)$/u;
const numbered = /^\s{0,7}\d{1,3}[.)]\s+(.*)$/u;
const indented = /^(?: {2}|\s*\t)/u;

interface Item {
  text: string;
  readonly rank: ItemRank;
}

export function readProse(text: string): readonly ProseBlock[] {
  const blocks: ProseBlock[] = [];
  let lines: string[] = [];
  let list: { readonly ordered: boolean; readonly items: Item[] } | undefined;
  const closeParagraph = () => {
    if (lines.length > 0) blocks.push({ kind: 'paragraph', spans: readSpans(joined(lines)) });
    lines = [];
  };
  const closeList = () => {
    if (list) blocks.push(listBlock(list));
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
      const rank = list && indented.test(line) ? (ordered ? 'numbered below' : 'bulleted below') : 'first';
      if (list && rank === 'first' && list.ordered !== ordered) closeList();
      list ??= { ordered, items: [] };
      list.items.push({ text: item[1]?.trim() ?? '', rank });
    } else if (list && /^\s/u.test(line)) {
      const last = list.items.at(-1);
      if (last) last.text = `${last.text} ${plain}`;
    } else {
      closeList();
      lines.push(line.trimStart());
    }
  }
  closeParagraph();
  closeList();
  return blocks;
}

function listBlock({ ordered, items }: { readonly ordered: boolean; readonly items: readonly Item[] }): ProseBlock {
  const ranks = items.map(({ rank }) => rank);
  return {
    kind: 'list',
    ordered,
    items: items.map((item) => readSpans(item.text)),
    ...(ranks.every((rank) => rank === 'first') ? {} : { ranks }),
  };
}

/** Lines of a paragraph as one text: a line end stands for a break, else for a space. */
function joined(lines: readonly string[]): string {
  return lines
    .map((line, index) => {
      const plain = line.trimEnd();
      if (index === lines.length - 1) return plain;
      if (plain.endsWith('\\')) return `${plain.slice(0, -1).trimEnd()}\n`;
      return line.endsWith('  ') ? `${plain}\n` : `${plain} `;
    })
    .join('');
}

// Emphasis opens before and closes after a character that is no space, so that 2 * 3 * 4 stays a product.
const styled =
  /`([^`\n]+)`|\*\*(?=\S)([^*\n]*[^*\s])\*\*|\*(?=[^\s*])([^*\n]*[^*\s])\*|\[([^[\]\n]{1,200})\]\(((?:https?:\/\/|mailto:|www\.)[^()\s]{1,500})\)|\n/gu;

export function readSpans(text: string): readonly ProseSpan[] {
  const spans: ProseSpan[] = [];
  let end = 0;
  const add = (style: ProseSpan['style'], written: string) => spans.push({ style, text: written });
  for (const match of text.matchAll(styled)) {
    if (match.index > end) add('text', text.slice(end, match.index));
    const [whole, code, strong, emphasis, words, address] = match;
    if (code !== undefined) add('code', code);
    else if (strong !== undefined) add('strong', strong);
    else if (emphasis !== undefined) add('emphasis', emphasis);
    else if (words !== undefined && address !== undefined)
      add('text', words.trim() === address ? address : `${words} (${address})`);
    else add('break', whole);
    end = match.index + match[0].length;
  }
  if (end < text.length) add('text', text.slice(end));
  return spans;
}

export interface RankedItem {
  readonly spans: readonly ProseSpan[];
  /** Items of the second rank below it, in runs of one kind. */
  readonly below: readonly { readonly ordered: boolean; readonly items: readonly (readonly ProseSpan[])[] }[];
}

/** The items of a list, each with the lists below it. */
export function rankedItems(block: Extract<ProseBlock, { kind: 'list' }>): readonly RankedItem[] {
  const found: { spans: readonly ProseSpan[]; below: { ordered: boolean; items: (readonly ProseSpan[])[] }[] }[] = [];
  block.items.forEach((spans, index) => {
    const rank = block.ranks?.[index] ?? 'first';
    const owner = found.at(-1);
    if (rank === 'first' || owner === undefined) {
      found.push({ spans, below: [] });
      return;
    }
    const ordered = rank === 'numbered below';
    const last = owner.below.at(-1);
    if (last?.ordered === ordered) last.items.push(spans);
    else owner.below.push({ ordered, items: [spans] });
  });
  return found;
}
