// The grammar against the full library: our nodes and the library's own must make the same trees.
// Source of the expectation: `parse` of mathjs itself, every node written out in the same way on both sides.

import { parse } from 'mathjs';
import { describe, expect, test } from 'vitest';
import type { Node, RawNumber } from '../../src/formula/parser.ts';
import { parseNodes } from '../../src/formula/parser.ts';

// Three spaces stand between two of them.
const expressions = `
  a + b - c   a - b - c   a*b/c   a/b/c   a/b*c   a^b^c   -a^2   (-a)^2   2^-3   -2^-3   a*-b   a - -b
  +a   a + +b   --a   2 x   2x   x 2   a b   a b c   2(3 + 4)   (a)(b)   (a) b   (a)2   2 (a) b   a/b c
  a/2 c   1/2 x   2/3 (a)   -1/2 x   a b/c   1/2/3 x   a^2 b   a^b c   2 a^2/b   sqrt(2)(1 + 2)   sin x
  sin(x)   sin(x)^2   max(a, b, c)   f()   a (b + c)   f(x)(y)   atan2(y, x)*2   a < b   a <= b   a > b
  a >= b   a == b   a != b   a < b < c   a < b == c   a + b < c*d   a and b or c   a or b and c   not a
  not a < b   not (a < b)   a and not b   a < b and c > d   a ? b : c   a ? b : c ? d : e
  a < b ? c + 1 : d/2   (a ? b : c)*2   a ?.3:.7   1   1.20   .5   5.   1e3   2.5E-7   1e
  9007199254740993   "10 m/s"   mu/(1 + v/"10 m/s")   "a" b   'text'   pi   e^(mu*theta)   exp(-x)
  _12 + _3   constructor   ((a))   a!   a'   a.b   a[1]   [1, 2; 3, 4]   {a: 1}   1:10   a = 3
  f(x) = x^2   a; b   a xor b   a mod b   a % b   10%   a to b   a in b   10 in   a & b   a | b   ~a
  a << 2   a .* b   a ?? b   a?.b   true   NaN
`
  .split(/ {3}|\n/)
  .map((text) => text.trim());

// Nodes that no formula may hold are compared by their kind alone: nothing reads their parts.
const closed = new Set(
  'AccessorNode ArrayNode AssignmentNode BlockNode FunctionAssignmentNode IndexNode ObjectNode RangeNode'.split(' '),
);

interface LibraryNode {
  readonly type: string;
  readonly [key: string]: unknown;
}

function outline(node: LibraryNode): string {
  const list = (nodes: unknown): string => (nodes as readonly LibraryNode[]).map(outline).join(' ');
  if (closed.has(node.type)) return node.type;
  switch (node.type) {
    case 'SymbolNode':
      return `name:${node.name}`;
    case 'ConstantNode': {
      const value = node.value as RawNumber | string | number | boolean | null | undefined;
      const plain = typeof value === 'object' && value !== null ? Number(value.raw) : value;
      return `${typeof plain}:${String(plain)}`;
    }
    case 'ParenthesisNode':
      return `(parens ${outline(node.content as LibraryNode)})`;
    case 'OperatorNode':
      return `(${node.fn} ${node.op}${node.implicit ? ' implicit' : ''}${node.isPercentage ? ' percent' : ''} ${list(node.args)})`;
    case 'FunctionNode':
      return `(call${node.optional ? '?' : ''} ${outline(node.fn as LibraryNode)} ${list(node.args)})`;
    case 'ConditionalNode':
      return `(choose ${list([node.condition, node.trueExpr, node.falseExpr])})`;
    case 'RelationalNode':
      return `(chain ${(node.conditionals as readonly string[]).join(' ')} ${list(node.params)})`;
    default:
      throw new Error(`no outline for ${node.type}`);
  }
}

const ours = (text: string): string => outline(parseNodes(text) as Node as unknown as LibraryNode);
const theirs = (text: string): string => outline(parse(text) as unknown as LibraryNode);

describe('the grammar is that of the full library', () => {
  test.each([...new Set(expressions)])('%j makes the same tree', (text) => {
    expect(ours(text)).toBe(theirs(text));
  });

  test('there are more than 100 expressions, the empty one among them', () => {
    expect(expressions).toContain('');
    expect(new Set(expressions).size).toBeGreaterThan(100);
  });

  const unfinished = '1 +   (a   a ? b   a "b"   * a   a , b   2 3   x^2 3   1..2   a ? : b   a ? b ? c : d : e   "open'.split(
    '   ',
  );
  test.each(unfinished)('%j is refused at the same place', (text) => {
    const place = (parser: (text: string) => unknown): number | undefined => {
      try {
        parser(text);
      } catch (error) {
        return (error as { char?: number }).char;
      }
      return undefined;
    };
    const expected = place(parse);
    expect(expected).toBeTypeOf('number');
    expect(place(parseNodes)).toBe(expected);
  });

  test('numerals are kept as written, where the library makes them doubles', () => {
    for (const text of ['9007199254740993', '1.20', '1e400', '1e-400', '0.1000000000000000055511151231257827']) {
      const node = parseNodes(text);
      expect(node.type === 'ConstantNode' && node.value).toEqual({ raw: text });
    }
  });
});
