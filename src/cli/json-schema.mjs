// Writes dist/sheet.schema.json, the description of a sheet file for other programs (JSON Schema, draft 2020-12), from src/sheet/schema.ts.

import { mkdirSync, writeFileSync } from 'node:fs';
import { fileURLToPath } from 'node:url';
import { toJsonSchema } from '@valibot/to-json-schema';
import { runnerImport } from 'vite';

const root = fileURLToPath(new URL('../../', import.meta.url));
const { module } = await runnerImport(`${root}src/sheet/schema.ts`, { root, configFile: false, logLevel: 'error' });
const { $schema, ...rest } = toJsonSchema(module.sheetSchema, { target: 'draft-2020-12' });
mkdirSync(`${root}dist`, { recursive: true });
writeFileSync(`${root}dist/sheet.schema.json`, `${JSON.stringify({ $schema, title: 'Tightside sheet', ...rest }, null, 2)}\n`);
