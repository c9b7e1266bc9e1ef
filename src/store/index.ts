export { bundleFormat } from './bundle.ts';
export * from './keeper.ts';
export * from './persistence.ts';
export type { StoreCode, StoreProblem, WayOut } from './problem.ts';
export { StoreFault } from './problem.ts';
export type { Draft, SheetHead, TemplateRow, TrashRow } from './rows.ts';
export * from './shelf.ts';
export { memoryStore, openStore, type Store, type StoreOptions } from './store.ts';
