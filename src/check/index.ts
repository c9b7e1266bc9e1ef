export * from './fingerprint.ts';
export * from './template.ts';
