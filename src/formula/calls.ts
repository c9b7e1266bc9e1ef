// Calls: functions of the formula language with the right number of arguments, table calls, and everything else that
// looks like a call and is refused with what to write instead.
// Not here: the list of functions (functions.ts).

import type { Fix, Problem } from '../quantity/index.ts';
import type { Expr, Span } from './expr.ts';
import { arity, functionNames, isFunctionName, isTableFunction, otherFunctions, tableFunctions } from './functions.ts';
import { nearestNames } from './nearest.ts';
import type { Node } from './parser.ts';
import { excerpt, operand, refusal, writeInstead } from './refusal.ts';
import type { Token } from './tokens.ts';
import type { Walk } from './walking.ts';
import { refuse, spanOf, tokenIndex } from './walking.ts';

const words = ['none', 'one', 'two', 'three', 'four', 'five'];

export function readCall(walk: Walk, callee: Node, argumentNodes: readonly Node[]): Expr {
  const first = tokenIndex(callee);
  const name = first === undefined ? undefined : walk.tokens[first];
  if (first === undefined || name === undefined) {
    return refuse(
      walk,
      refusal(
        'not-in-formulas',
        'Only a function can be called: write the function before the parentheses, or * for a product.',
        [0, walk.source.length],
      ),
    );
  }
  const last = walk.closing.get(first + 1) ?? first + 1;
  const at = spanOf(walk, first, last);
  if (isTableFunction(name.text)) return tableCall(walk, name.text, argumentNodes, first, last, at);
  const args = argumentNodes.map((node) => walk.read(node));
  walk.first = first;
  walk.last = last;
  if (!isFunctionName(name.text)) {
    return walk.problem ? refuse(walk, walk.problem) : refuse(walk, noSuchFunction(walk, name, first, args, at));
  }
  const [least, greatest] = arity.get(name.text) as readonly [number, number];
  if (args.length < least || args.length > greatest) return refuse(walk, wrongCount(walk, name.text, args, at));
  return { kind: 'call', name: name.text, args, at };
}

function given(count: number): string {
  return `${words[count] ?? String(count)} ${count < 2 ? 'is' : 'are'} given`;
}

function wrongCount(walk: Walk, name: string, args: readonly Expr[], at: Span): Problem {
  const [least, greatest] = arity.get(name) as readonly [number, number];
  const here = given(args.length);
  const typed = excerpt(walk.source.slice(...at));
  const fixes: Fix[] = [];
  let more = `write ${name}(${least === 1 ? 'x' : name === 'atan2' ? 'y, x' : 'a, b'})`;
  const [a, b] = args;
  if (least === 1 && a?.kind === 'number' && b?.kind === 'number' && args.length === 2 && b.at[0] - a.at[1] === 1) {
    const instead = `${a.text}.${b.text}`;
    more = `in a formula the decimal sign is a point, write ${name}(${instead})`;
    fixes.push(writeInstead([a.at[0], b.at[1]], instead));
  }
  const takes = `${greatest === Infinity ? 'at least ' : ''}${words[least]} argument${least === 1 ? '' : 's'}`;
  return refusal('wrong-arguments', `“${typed}”: ${name} takes ${takes}, ${here}; ${more}.`, at, fixes);
}

function noSuchFunction(walk: Walk, name: Token, first: number, args: readonly Expr[], at: Span): Problem {
  const typedName = walk.source.slice(name.from, name.to);
  const nameAt: Span = [name.from, name.to];
  const typed = excerpt(walk.source.slice(...at));
  const texts = args.map((a) => walk.source.slice(...a.at));
  const small = name.text.toLowerCase();
  if (small !== name.text && (isFunctionName(small) || isTableFunction(small))) {
    return refusal('small-letters', `“${typedName}”: functions are written in small letters; write ${small}.`, nameAt, [
      writeInstead(nameAt, small),
    ]);
  }
  const others = (otherFunctions.get(name.text) ?? otherFunctions.get(small))?.filter((o) => o.arguments === texts.length);
  if (others && others.length > 0) {
    const whole = at[0] === 0 && at[1] === walk.source.length;
    const ways = others.map((o) => fill(o.write, texts));
    const fixes = ways.map((way) => writeInstead(at, whole || isOneCall(way) ? way : `(${way})`));
    const why =
      name.text === 'log' && texts.length === 1
        ? `“${typedName}” does not say which logarithm`
        : `There is no function “${typedName}”`;
    return refusal('unknown-function', `${why}: write ${ways.map((w) => excerpt(w)).join(' or ')}.`, at, fixes);
  }
  const near = nearestNames(name.text, [...functionNames, ...tableFunctions])[0];
  const nearFix = near === undefined ? [] : [writeInstead(nameAt, near)];
  if (args.length === 1) {
    const open = walk.tokens[first + 1] as Token;
    const instead = `${typedName}*${walk.source.slice(open.from, at[1])}`;
    const product: Fix = { from: name.to, to: open.from, text: '*', label: `write ${excerpt(instead)}` };
    const orNear = near === undefined ? '' : `, or ${near}${excerpt(walk.source.slice(open.from, at[1]))} for the function`;
    return refusal(
      'unknown-function',
      `“${typed}” reads as a call of a function “${typedName}”, which does not exist: write ${excerpt(instead)} for the product${orNear}.`,
      at,
      [product, ...nearFix],
    );
  }
  const hint = near === undefined ? 'leave it out or write the formula itself' : `write ${near}`;
  return refusal('unknown-function', `There is no function “${excerpt(typedName)}”: ${hint}.`, nameAt, nearFix);
}

function fill(pattern: string, texts: readonly string[]): string {
  return pattern.replace(/\$(?:\((\d)\)|(\d))/g, (_, wrapped: string | undefined, bare: string | undefined) => {
    const text = texts[Number(wrapped ?? bare) - 1] ?? '';
    return wrapped === undefined ? text : operand(text);
  });
}

/** Whether a text is one call from end to end and needs no parentheses where it stands. */
function isOneCall(text: string): boolean {
  return /^[a-z0-9]+\(/.test(text) && operand(text.slice(text.indexOf('('))) === text.slice(text.indexOf('('));
}

function tableCall(
  walk: Walk,
  name: 'interpolate' | 'entry',
  nodes: readonly Node[],
  first: number,
  last: number,
  at: Span,
): Expr {
  const shape = `${name}(table, column, ${name === 'entry' ? 'key' : 'x'})`;
  const [table, column, keyNode] = nodes;
  if (table === undefined || column === undefined || keyNode === undefined || nodes.length !== 3) {
    return refuse(
      walk,
      refusal(
        'wrong-arguments',
        `“${excerpt(walk.source.slice(...at))}”: ${name} takes three arguments, ${given(nodes.length)}; write ${shape}.`,
        at,
      ),
    );
  }
  const spelled: string[] = [];
  for (const [node, what] of [
    [table, 'table'],
    [column, 'column'],
  ] as const) {
    const index = tokenIndex(node);
    const token = index === undefined ? undefined : walk.tokens[index];
    if (token === undefined) return refuse(walk, notAWord(walk, node, what, first, at, shape));
    spelled.push(walk.source.slice(token.from, token.to).normalize('NFC'));
  }
  const key = walk.read(keyNode);
  walk.first = first;
  walk.last = last;
  walk.tables.add(spelled[0] as string);
  return { kind: 'table', name, table: spelled[0] as string, column: spelled[1] as string, key, at };
}

function notAWord(walk: Walk, node: Node, what: 'table' | 'column', first: number, at: Span, shape: string): Problem {
  const value = node.type === 'ConstantNode' ? node.value : undefined;
  const token = typeof value === 'string' ? walk.tokens[Number(value)] : undefined;
  if (token && /^[\p{L}][\p{L}\p{N}_]*$/u.test(token.text)) {
    const span: Span = [token.from, token.to];
    return refusal(
      'wrong-arguments',
      `“${excerpt(walk.source.slice(...span))}”: the name of a ${what} stands without quotation marks; write ${token.text}.`,
      span,
      [writeInstead(span, token.text)],
    );
  }
  const name = walk.tokens[first]?.text ?? '';
  return refusal(
    'wrong-arguments',
    `“${excerpt(walk.source.slice(...at))}”: the ${what} in ${name} is a plain word; write ${shape}.`,
    at,
  );
}
