// What other rooms may use of the studies. Only exports stand here.

export { findRoot, type Root, type RootFailure } from './root.ts';
export { solver } from './solver.ts';
