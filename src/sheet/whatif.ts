// What if a given were another: samples of some givens, what follows from them, the sheet itself untouched.
//
// 1. Only cells between what is varied and what is wanted are computed; all other numbers are those of the sheet's case.
// 2. The program is compiled once; quantities that do not vary are compiled in.
// 3. A sample in which a cell has no value gives NaN, also where the trouble would vanish on the way (1/(a/0) is no 0).
// 4. Only cells that no later one always reads are looked over: trouble in the others shows there.
// Not here: the loop over the samples (sampler.ts), choosing samples, statistics (src/study).

import { alwaysRead, compileFormulas, explain, type Formula, type Lookup, markTrouble } from '../formula/index.ts';
import type { Columns } from './columns.ts';
import type { Graph } from './graph.ts';
import type { Names } from './names.ts';
import { computedFormulas, type Node } from './node.ts';
import { makeSampler } from './sampler.ts';

export interface WhatIfRequest {
  /** Names of the quantities to vary: givens, or derived quantities taken as given. */
  readonly vary: readonly string[];
  /** Names of quantities; 'ID left' and 'ID right' for the sides of the criterion with that cell id. */
  readonly want: readonly string[];
  readonly caseIndex: number;
  /** Further formulas to compute from what is varied, wanted under their keys. */
  readonly formulas?: readonly { readonly key: string; readonly formula: Formula }[];
  /** The cells to compute, where the caller knows them: in a circle that an equation closes, the order of the sheet does not tell. */
  readonly between?: readonly Node[];
}

export interface WhatIf {
  /** Cells that each run computes, in order. */
  readonly computes: readonly string[];
  /**
   * `samples[i]` holds at least `count` values of `vary[i]` in coherent SI. Returns one column a wanted quantity, coherent SI,
   * NaN where a sample has no value; the columns are used again by the next run.
   */
  run(samples: readonly Float64Array[], count: number): readonly Float64Array[];
}

export interface Surface {
  readonly nodes: readonly Node[];
  readonly names: Names;
  readonly graph: Graph;
  readonly columns: Columns;
  readonly byId: ReadonlyMap<string, Node>;
  readonly style: { readonly decimalSign: '.' | ',' };
  lookup(caseIndex: number): Lookup;
}

interface Step {
  readonly key: string;
  readonly formula: Formula;
  /** None for a formula that belongs to no cell of the way. */
  readonly node?: Node;
}

export function prepareWhatIf(request: WhatIfRequest, sheet: Surface): WhatIf {
  const varied = new Set(request.vary.map((name) => known(sheet, name)));
  const own = new Set(request.formulas?.map((formula) => formula.key));
  const wanted: readonly Wanted[] = request.want.map((want) => (own.has(want) ? { key: want } : wantedOf(sheet, want)));
  const way = request.between?.flatMap(formulasOf) ?? stepsBetween(varied, wanted, sheet);
  const steps: readonly Step[] = [...way, ...(request.formulas ?? [])];
  const isStep = new Set(steps.map((step) => step.node));
  const inputs = request.vary.map((name) => known(sheet, name).name!);
  const constants = new Set<string>();
  for (const step of steps) {
    for (const name of step.formula.names) {
      const node = sheet.names.quantities.get(name);
      if (node !== undefined && !varied.has(node) && !isStep.has(node)) constants.add(name);
    }
  }
  for (const { node, side, key } of wanted) {
    if (node !== undefined && side === undefined && !varied.has(node) && !isStep.has(node)) constants.add(key);
  }
  const compiled = compileFormulas(
    steps.map((step) => ({ key: step.key, expr: step.formula.expr })),
    [...inputs, ...constants],
    {
      isText: (name) => sheet.names.quantities.get(name)?.texts !== undefined,
      table: (name) => sheet.names.tables.get(name)?.table,
      constant: (name) => (constants.has(name) ? numberOf(name) : undefined),
      ...(sheet.nodes[0] === undefined ? {} : { decimalSign: sheet.nodes[0].reading.decimalSign }),
    },
  );
  /** The value of a quantity that does not vary; undefined for a text. */
  function numberOf(name: string): number | undefined {
    const node = sheet.names.quantities.get(name)!;
    return node.texts === undefined ? sheet.columns.read(node, 0, request.caseIndex) : undefined;
  }
  const textNumberOf = (name: string): number => {
    const text = sheet.names.quantities.get(name)?.texts?.[request.caseIndex];
    return text === undefined ? Number.NaN : compiled.textNumber(text);
  };
  const { program, ranges } = compiled;

  /** Entries of a cell that are not in order: told apart one by one, as explain finds trouble that an infinity would hide. */
  const settle = (memory: Float64Array, width: number, at: number, count: number): void => {
    const flags = new Uint8Array(count);
    markTrouble(memory, width, count, ranges[at]!, flags);
    const base = sheet.lookup(request.caseIndex);
    for (let entry = 0; entry < count; entry += 1) {
      if (flags[entry] === 0) continue;
      const result = explain(steps[at]!.formula.expr, {
        ...base,
        value: (name) => memory[compiled.slot(name) * width + entry]!,
      });
      memory[ranges[at]!.dest * width + entry] = result.ok ? result.value : Number.NaN;
    }
  };

  return {
    computes: [...new Set(way.flatMap((step) => (step.node === undefined ? [] : [step.node.cell.id])))],
    run: makeSampler({
      program,
      ranges,
      inputs: inputs.map((name) => compiled.slot(name)),
      outputs: wanted.map((want) => compiled.slot(want.key)),
      checked: unread(steps).map((at) => ranges[at]!.dest),
      constants: [...constants].map((name) => ({ slot: compiled.slot(name), value: numberOf(name) ?? textNumberOf(name) })),
      settle,
    }),
  };
}

/** Steps that no later one reads in every entry: where all of these are finite, all steps are. */
function unread(steps: readonly Step[]): number[] {
  const read = new Set<string>();
  const found: number[] = [];
  for (let at = steps.length - 1; at >= 0; at -= 1) {
    const { key, formula } = steps[at]!;
    if (!read.has(key)) found.push(at);
    for (const name of alwaysRead(formula.expr)) read.add(name);
  }
  return found;
}

function known(sheet: Surface, name: string): Node {
  const node = sheet.names.quantities.get(name);
  if (node === undefined) throw new Error(`no quantity ${name} to vary or to show`);
  return node;
}

interface Wanted {
  readonly key: string;
  readonly node?: Node;
  readonly side?: number;
}

function wantedOf(sheet: Surface, want: string): Wanted {
  const side = /^(.*) (left|right)$/u.exec(want);
  const node = side ? sheet.byId.get(side[1]!) : undefined;
  if (node !== undefined && side) return { node, key: want, side: side[2] === 'left' ? 0 : 1 };
  return { node: known(sheet, want), key: known(sheet, want).name! };
}

/** The formulas to compute, in order: downstream of what is varied, upstream of what is wanted, varied cells left out. */
function stepsBetween(varied: ReadonlySet<Node>, wanted: readonly Wanted[], sheet: Surface): Step[] {
  const ends = wanted.flatMap((want) => (want.node === undefined ? [] : [want.node]));
  const upstream = new Set<Node>();
  const queue = [...ends];
  while (queue.length > 0) {
    const node = queue.pop()!;
    if (upstream.has(node) || varied.has(node)) continue;
    upstream.add(node);
    queue.push(...node.uses);
  }
  const moving = new Set<Node>(varied);
  const steps: Step[] = [];
  for (const index of sheet.graph.order) {
    const node = sheet.nodes[index]!;
    if (!upstream.has(node) || !node.uses.some((used) => moving.has(used))) {
      // The sides of a criterion that does not move are wanted all the same.
      if (!(node.cell.kind === 'criterion' && ends.includes(node))) continue;
    }
    moving.add(node);
    steps.push(...formulasOf(node));
  }
  return steps;
}

function formulasOf(node: Node): Step[] {
  if (node.broken) return [];
  return computedFormulas(node).flatMap((formula, side) => {
    if (formula === undefined) return [];
    const key = node.cell.kind === 'criterion' ? `${node.cell.id} ${side === 0 ? 'left' : 'right'}` : node.name!;
    return [{ key, formula, node }];
  });
}
