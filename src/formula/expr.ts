// The syntax tree of a formula, after the whitelist: what a formula of a sheet can say, and nothing else.
//
// 1. Every node knows its half-open span in the text as typed.
// 2. Names are canonical Latin names (`mu_1`), whatever alphabet they were typed in.
// 3. A quoted text is kept as typed; whether it is a quantity or a text is decided by where it stands (infer.ts).
// Not here: meaning, units, numbers computed from it.

export type Span = readonly [from: number, to: number];

export type BinaryOperator = '+' | '-' | '*' | '/' | '^';
export type CompareOperator = '<' | '<=' | '>' | '>=' | '==' | '!=';

export type FunctionName =
  | 'exp'
  | 'ln'
  | 'log10'
  | 'sqrt'
  | 'cbrt'
  | 'abs'
  | 'sign'
  | 'min'
  | 'max'
  | 'sin'
  | 'cos'
  | 'tan'
  | 'asin'
  | 'acos'
  | 'atan'
  | 'atan2'
  | 'sinh'
  | 'cosh'
  | 'tanh'
  | 'floor'
  | 'ceil'
  | 'round'
  | 'hypot';

export type Expr =
  | { readonly kind: 'number'; readonly text: string; readonly value: number; readonly at: Span }
  | { readonly kind: 'constant'; readonly name: 'pi' | 'e'; readonly at: Span }
  | { readonly kind: 'quoted'; readonly text: string; readonly at: Span }
  | { readonly kind: 'name'; readonly name: string; readonly at: Span }
  | { readonly kind: 'parens'; readonly inner: Expr; readonly at: Span }
  | { readonly kind: 'minus'; readonly inner: Expr; readonly at: Span }
  | { readonly kind: 'not'; readonly inner: Expr; readonly at: Span }
  | {
      readonly kind: 'binary';
      readonly operator: BinaryOperator;
      readonly implicit: boolean;
      readonly left: Expr;
      readonly right: Expr;
      readonly at: Span;
    }
  | {
      readonly kind: 'compare';
      readonly operators: readonly CompareOperator[];
      readonly sides: readonly Expr[];
      readonly at: Span;
    }
  | { readonly kind: 'logic'; readonly operator: 'and' | 'or'; readonly left: Expr; readonly right: Expr; readonly at: Span }
  | { readonly kind: 'choose'; readonly test: Expr; readonly then: Expr; readonly otherwise: Expr; readonly at: Span }
  | { readonly kind: 'call'; readonly name: FunctionName; readonly args: readonly Expr[]; readonly at: Span }
  // `table` and `column` are the words as typed: tables and columns have their own name spaces.
  | {
      readonly kind: 'table';
      readonly name: 'interpolate' | 'entry';
      readonly table: string;
      readonly column: string;
      readonly key: Expr;
      readonly at: Span;
    };
