// The functions of the formula language, and the words that people write for them elsewhere.
//
// Not here: what they compute (run.ts, explain.ts), what units they take (infer.ts).

import type { FunctionName } from './expr.ts';

/** Least and greatest number of arguments. */
export const arity: ReadonlyMap<string, readonly [least: number, greatest: number]> = new Map<
  FunctionName,
  readonly [number, number]
>([
  ['exp', [1, 1]],
  ['ln', [1, 1]],
  ['log10', [1, 1]],
  ['sqrt', [1, 1]],
  ['cbrt', [1, 1]],
  ['abs', [1, 1]],
  ['sign', [1, 1]],
  ['min', [2, Infinity]],
  ['max', [2, Infinity]],
  ['sin', [1, 1]],
  ['cos', [1, 1]],
  ['tan', [1, 1]],
  ['asin', [1, 1]],
  ['acos', [1, 1]],
  ['atan', [1, 1]],
  ['atan2', [2, 2]],
  ['sinh', [1, 1]],
  ['cosh', [1, 1]],
  ['tanh', [1, 1]],
  ['floor', [1, 1]],
  ['ceil', [1, 1]],
  ['round', [1, 1]],
  ['hypot', [2, Infinity]],
]);

export const functionNames: readonly FunctionName[] = [...arity.keys()] as FunctionName[];
export const tableFunctions = ['interpolate', 'entry'] as const;

const functionSet: ReadonlySet<string> = new Set(functionNames);
const tableSet: ReadonlySet<string> = new Set(tableFunctions);
export function isFunctionName(name: string): name is FunctionName {
  return functionSet.has(name);
}
export function isTableFunction(name: string): name is 'interpolate' | 'entry' {
  return tableSet.has(name);
}

/** `$1`, `$2` are the arguments as typed, `$(1)` the same with parentheses where they are needed. */
interface Instead {
  readonly arguments: number;
  readonly write: string;
}

/** Functions that the language does not have, with what says the same in it. */
export const otherFunctions: ReadonlyMap<string, readonly Instead[]> = new Map<string, readonly Instead[]>([
  [
    'log',
    [
      { arguments: 1, write: 'ln($1)' },
      { arguments: 1, write: 'log10($1)' },
      { arguments: 2, write: 'ln($1)/ln($2)' },
    ],
  ],
  ['log2', [{ arguments: 1, write: 'ln($1)/ln(2)' }]],
  ['ld', [{ arguments: 1, write: 'ln($1)/ln(2)' }]],
  ['lg', [{ arguments: 1, write: 'log10($1)' }]],
  ['log1p', [{ arguments: 1, write: 'ln(1 + $(1))' }]],
  ['expm1', [{ arguments: 1, write: 'exp($1) - 1' }]],
  ['pow', [{ arguments: 2, write: '$(1)^$(2)' }]],
  ['power', [{ arguments: 2, write: '$(1)^$(2)' }]],
  ['square', [{ arguments: 1, write: '$(1)^2' }]],
  ['cube', [{ arguments: 1, write: '$(1)^3' }]],
  [
    'root',
    [
      { arguments: 2, write: '$(1)^(1/$(2))' },
      { arguments: 1, write: 'sqrt($1)' },
    ],
  ],
  [
    'nthRoot',
    [
      { arguments: 2, write: '$(1)^(1/$(2))' },
      { arguments: 1, write: 'sqrt($1)' },
    ],
  ],
  ['arcsin', [{ arguments: 1, write: 'asin($1)' }]],
  ['arccos', [{ arguments: 1, write: 'acos($1)' }]],
  ['arctan', [{ arguments: 1, write: 'atan($1)' }]],
  ['arctan2', [{ arguments: 2, write: 'atan2($1, $2)' }]],
  ['tg', [{ arguments: 1, write: 'tan($1)' }]],
  ['arctg', [{ arguments: 1, write: 'atan($1)' }]],
  ['cot', [{ arguments: 1, write: '1/tan($1)' }]],
  ['ctg', [{ arguments: 1, write: '1/tan($1)' }]],
  ['sec', [{ arguments: 1, write: '1/cos($1)' }]],
  ['csc', [{ arguments: 1, write: '1/sin($1)' }]],
  ['sh', [{ arguments: 1, write: 'sinh($1)' }]],
  ['ch', [{ arguments: 1, write: 'cosh($1)' }]],
  ['th', [{ arguments: 1, write: 'tanh($1)' }]],
  ['asinh', [{ arguments: 1, write: 'ln($1 + sqrt($(1)^2 + 1))' }]],
  ['acosh', [{ arguments: 1, write: 'ln($1 + sqrt($(1)^2 - 1))' }]],
  ['atanh', [{ arguments: 1, write: 'ln((1 + $(1))/(1 - $(1)))/2' }]],
  ['mod', [{ arguments: 2, write: '$(1) - $(2)*floor($(1)/$(2))' }]],
  ['sgn', [{ arguments: 1, write: 'sign($1)' }]],
  ['int', [{ arguments: 1, write: 'floor($1)' }]],
  ['trunc', [{ arguments: 1, write: 'sign($1)*floor(abs($1))' }]],
  ['fix', [{ arguments: 1, write: 'sign($1)*floor(abs($1))' }]],
  ['ceiling', [{ arguments: 1, write: 'ceil($1)' }]],
  ['roundup', [{ arguments: 1, write: 'ceil($1)' }]],
  ['rounddown', [{ arguments: 1, write: 'floor($1)' }]],
  [
    'sqr',
    [
      { arguments: 1, write: '$(1)^2' },
      { arguments: 1, write: 'sqrt($1)' },
    ],
  ],
  ['sum', [{ arguments: 2, write: '$1 + $2' }]],
  ['mean', [{ arguments: 2, write: '($1 + $2)/2' }]],
  ['average', [{ arguments: 2, write: '($1 + $2)/2' }]],
  ['if', [{ arguments: 3, write: '$(1) ? $2 : $3' }]],
  ['lookup', [{ arguments: 3, write: 'entry($1, $2, $3)' }]],
]);
