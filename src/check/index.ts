export * from './fingerprint.ts';
