// The server of `npm start`: right types and headers, this machine only, and nothing from outside its folder.

import { mkdirSync, mkdtempSync, rmSync, symlinkSync, writeFileSync } from 'node:fs';
import { request } from 'node:http';
import { tmpdir } from 'node:os';
import { join } from 'node:path';
import { afterAll, beforeAll, describe, expect, it } from 'vitest';
// @ts-expect-error plain JavaScript: it runs before anything is installed
import { serve } from '../../src/cli/serve.mjs';

interface Answer {
  readonly status: number;
  readonly headers: Record<string, string | string[] | undefined>;
  readonly body: string;
}

const base = mkdtempSync(join(tmpdir(), 'serve-'));
let server: { url: string; port: number; close(): Promise<void> };

// The raw path is sent as it stands: a URL object would tidy `..` away before the server sees it.
const ask = (path: string, method = 'GET') =>
  new Promise<Answer>((done, failed) => {
    const asking = request({ host: '127.0.0.1', port: server.port, path, method }, (response) => {
      let body = '';
      response.setEncoding('utf8');
      response.on('data', (part: string) => {
        body += part;
      });
      response.on('end', () => done({ status: response.statusCode ?? 0, headers: response.headers, body }));
    });
    asking.on('error', failed);
    asking.end();
  });

beforeAll(async () => {
  mkdirSync(join(base, 'page/assets'), { recursive: true });
  mkdirSync(join(base, 'page-else'));
  writeFileSync(join(base, 'secret.txt'), 'secret');
  writeFileSync(join(base, 'page-else/secret.txt'), 'secret');
  writeFileSync(join(base, 'page/index.html'), '<!doctype html><title>page</title>');
  writeFileSync(join(base, 'page/assets/a b.js'), 'export {};');
  writeFileSync(join(base, 'page/font.woff2'), 'x');
  symlinkSync(join(base, 'secret.txt'), join(base, 'page/link.txt'));
  server = await serve(join(base, 'page'));
});
afterAll(async () => {
  await server.close();
  rmSync(base, { recursive: true });
});

describe('the server', () => {
  it('gives the page with its policy and the right types', async () => {
    const page = await ask('/');
    expect(page.status).toBe(200);
    expect(page.body).toContain('<title>page</title>');
    expect(page.headers['content-type']).toBe('text/html; charset=utf-8');
    expect(page.headers['content-security-policy']).toContain("script-src 'self'");
    expect(page.headers['content-security-policy']).not.toContain('unsafe');
    expect(page.headers['x-content-type-options']).toBe('nosniff');
    expect((await ask('/assets/a%20b.js')).headers['content-type']).toBe('text/javascript; charset=utf-8');
    expect((await ask('/font.woff2?v=1')).headers['content-type']).toBe('font/woff2');
    expect((await ask('/', 'HEAD')).body).toBe('');
  });

  it.each([
    '/../secret.txt',
    '/..%2fsecret.txt',
    '/%2e%2e/secret.txt',
    '/assets/../../secret.txt',
    '/..%5csecret.txt',
    '/../page-else/secret.txt',
    '/link.txt',
    '/%00',
    '/%',
    '//etc/passwd',
    '/nothing',
  ])('gives nothing for %s', async (path) => {
    const answer = await ask(path);
    expect(answer.status).toBe(404);
    expect(answer.body).not.toContain('secret');
  });

  it('only reads', async () => {
    for (const method of ['POST', 'PUT', 'DELETE', 'OPTIONS']) expect((await ask('/', method)).status).toBe(405);
  });

  it('takes the next port where that is allowed and says so where it is not', async () => {
    const second = await serve(join(base, 'page'), { port: server.port, orNext: true });
    expect(second.port).toBeGreaterThan(server.port);
    await second.close();
    await expect(serve(join(base, 'page'), { port: server.port })).rejects.toThrow(/EADDRINUSE/);
  });
});
