// The grammar: the parser of mathjs, wired to node classes of our own, without any evaluating code of that library.
//
// 1. Its input is a text of placeholders (parse.ts): names are `_12`, numbers and strings the place of their token.
//    What a user typed never reaches the library, and every leaf knows where it stood.
// 2. The trees are those of the full library; a contract test compares them.
// 3. Throws SyntaxError with `char` (1-based), RangeError where the nesting is too deep.
// Not here: what of the grammar a formula may use (walk.ts).

import { createParse } from 'mathjs/number';

declare module 'mathjs/number' {
  // Exported at run time, missing in the library's own types.
  export function createParse(parts: Readonly<Record<string, unknown>>): (text: string) => Node;
}

export type Node =
  | SymbolNode
  | ConstantNode
  | ParenthesisNode
  | OperatorNode
  | FunctionNode
  | ConditionalNode
  | RelationalNode
  | OtherNode;

abstract class Base {
  declare readonly isNode: true;
}
(Base.prototype as { isNode: boolean }).isNode = true;

class SymbolNode extends Base {
  readonly type = 'SymbolNode';
  readonly isSymbolNode = true;
  readonly name: string;
  constructor(name: string) {
    super();
    this.name = name;
  }
}

class ConstantNode extends Base {
  readonly type = 'ConstantNode';
  readonly isConstantNode = true;
  /** A numeral as RawNumber, a string as string; anything else is a word like `true`. */
  readonly value: unknown;
  constructor(value: unknown) {
    super();
    this.value = value;
  }
}

class ParenthesisNode extends Base {
  readonly type = 'ParenthesisNode';
  readonly isParenthesisNode = true;
  readonly content: Node;
  constructor(content: Node) {
    super();
    this.content = content;
  }
}

export class OperatorNode extends Base {
  readonly type = 'OperatorNode';
  readonly isOperatorNode = true;
  readonly op: string;
  readonly fn: string;
  readonly args: readonly Node[];
  readonly implicit: boolean;
  readonly isPercentage: boolean;
  constructor(op: string, fn: string, args: readonly Node[], implicit?: boolean, isPercentage?: boolean) {
    super();
    this.op = op;
    this.fn = fn;
    this.args = args;
    this.implicit = implicit === true;
    this.isPercentage = isPercentage === true;
  }
}

class FunctionNode extends Base {
  readonly type = 'FunctionNode';
  readonly isFunctionNode = true;
  readonly fn: Node;
  readonly args: readonly Node[];
  readonly optional: boolean;
  constructor(fn: Node, args: readonly Node[], optional?: boolean) {
    super();
    this.fn = fn;
    this.args = args;
    this.optional = optional === true;
  }
}

class ConditionalNode extends Base {
  readonly type = 'ConditionalNode';
  readonly isConditionalNode = true;
  readonly condition: Node;
  readonly trueExpr: Node;
  readonly falseExpr: Node;
  constructor(condition: Node, trueExpr: Node, falseExpr: Node) {
    super();
    this.condition = condition;
    this.trueExpr = trueExpr;
    this.falseExpr = falseExpr;
  }
}

class RelationalNode extends Base {
  readonly type = 'RelationalNode';
  readonly isRelationalNode = true;
  readonly conditionals: readonly string[];
  readonly params: readonly Node[];
  constructor(conditionals: readonly string[], params: readonly Node[]) {
    super();
    this.conditionals = conditionals;
    this.params = params;
  }
}

type OtherType =
  | 'AccessorNode'
  | 'ArrayNode'
  | 'AssignmentNode'
  | 'BlockNode'
  | 'FunctionAssignmentNode'
  | 'IndexNode'
  | 'ObjectNode'
  | 'RangeNode';

/** A node that no formula may hold: matrices, ranges, assignments, blocks, members. Its parts are not kept. */
abstract class OtherNode extends Base {
  abstract readonly type: OtherType;
  readonly optionalChaining: boolean = false;
}

// The parser asks nodes of these two kinds what they are, and reads `items` of a row.
class AccessorNode extends OtherNode {
  readonly type = 'AccessorNode';
  readonly isAccessorNode = true;
  readonly object: unknown;
  readonly index: unknown;
  constructor(object: unknown, index: unknown) {
    super();
    this.object = object;
    this.index = index;
  }
}
class ArrayNode extends OtherNode {
  readonly type = 'ArrayNode';
  readonly isArrayNode = true;
  readonly items: readonly Node[];
  constructor(items: readonly Node[]) {
    super();
    this.items = items;
  }
}

/** A numeral as it was written: the library would make it a double. */
export interface RawNumber {
  readonly raw: string;
}

type Signatures = Readonly<Record<string, (text: string) => Node>>;
const typed = Object.assign((_name: string, signatures: Signatures) => signatures.string, { addConversion: (): void => {} });

const named = (type: OtherType) =>
  class extends OtherNode {
    readonly type = type;
  };

/** Parses a text of the grammar into raw nodes. */
export const parseNodes: (text: string) => Node = createParse({
  typed,
  numeric: (text: string): RawNumber => ({ raw: text }),
  config: { number: 'number' },
  SymbolNode,
  ConstantNode,
  ParenthesisNode,
  OperatorNode,
  FunctionNode,
  ConditionalNode,
  RelationalNode,
  AccessorNode,
  ArrayNode,
  AssignmentNode: named('AssignmentNode'),
  BlockNode: named('BlockNode'),
  FunctionAssignmentNode: named('FunctionAssignmentNode'),
  IndexNode: named('IndexNode'),
  ObjectNode: named('ObjectNode'),
  RangeNode: named('RangeNode'),
});
