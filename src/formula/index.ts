// What other rooms may use of the formulas. Only exports stand here.

export { calculate } from './calculate.ts';
export { calculatorLine, evaluateWith, lineNumber } from './calculator.ts';
export { type CompiledFormulas, compileFormulas, type Names, ProgramBuilder } from './compile.ts';
export { type Explained, evaluateTree, explain, type Lookup } from './explain.ts';
export type { BinaryOperator, CompareOperator, Expr, FunctionName, Span } from './expr.ts';
export { functionNames, tableFunctions } from './functions.ts';
export { type ComparedTypes, type Inferred, inferComparison, inferFormula } from './infer.ts';
export { readLiteral } from './literal.ts';
export { canonicalName, greekLetter, isName, reserved } from './names.ts';
export { nearestNames } from './nearest.ts';
export { type Formula, longestFormula, parseFormula } from './parse.ts';
export { allFinite, fillConstants, finiteFrom, inOrder, makeMemory, markTrouble, type Program, type Range } from './program.ts';
export { alwaysRead } from './reads.ts';
export { run, runAt } from './run.ts';
export { speakFormula } from './speak.ts';
export { plainName, speakName, texName, texText } from './symbols.ts';
export { columnOf, type TableColumnData, type TableData } from './table.ts';
export { nothingTaken, type Taken, type TakenRow } from './taken.ts';
export { type Scope, typeOfResult, typeOfUnit } from './term.ts';
export { type Token, type TokenKind, tokenize } from './tokens.ts';
export type { ColumnType, FormulaCounts, TableType, Type } from './type.ts';
export { type Substitution, texSubstituted, texSymbols } from './typeset.ts';
