import { mkdirSync, mkdtempSync, rmSync, writeFileSync } from 'node:fs';
import { request } from 'node:http';
import { tmpdir } from 'node:os';
import { join } from 'node:path';
import { afterAll, beforeAll, expect, test } from 'vitest';
import { type Served, serveFolder } from '../../src/replay/serve.ts';

let folder = '';
let served: Served;

beforeAll(async () => {
  folder = mkdtempSync(join(tmpdir(), 'standfast-serve-'));
  mkdirSync(join(folder, 'dist', 'inner'), { recursive: true });
  writeFileSync(join(folder, 'dist', 'index.html'), '<!doctype html>page');
  writeFileSync(join(folder, 'secret.txt'), 'outside');
  served = await serveFolder(join(folder, 'dist'), 0);
});

afterAll(async () => {
  await served.close();
  rmSync(folder, { recursive: true });
});

/** Sends the path as it is, which `fetch` would tidy first. */
function get(path: string, method = 'GET'): Promise<{ status: number; text: string }> {
  const { hostname, port } = new URL(served.address);
  return new Promise((done, fail) => {
    request({ hostname, port, path, method }, (response) => {
      let text = '';
      response.on('data', (chunk) => {
        text += String(chunk);
      });
      response.on('end', () => done({ status: response.statusCode ?? 0, text }));
    })
      .on('error', fail)
      .end();
  });
}

test('by hand: the address serves index.html as HTML', async () => {
  const response = await fetch(served.address);
  expect(response.headers.get('content-type')).toBe('text/html; charset=utf-8');
  expect(await response.text()).toBe('<!doctype html>page');
});

test.each(['/../secret.txt', '/%2e%2e/secret.txt', '/inner', '/nothing', '/%ff', '/..%2fsecret.txt'])(
  'refuses: %s is not served',
  async (path) => {
    expect((await get(path)).status).toBe(404);
  },
);

test('refuses: a request that would change something', async () => {
  expect((await get('/', 'POST')).status).toBe(404);
});

test('degenerate: a port that is taken is passed over', async () => {
  const taken = Number(new URL(served.address).port);
  const second = await serveFolder(join(folder, 'dist'), taken);
  expect(Number(new URL(second.address).port)).toBeGreaterThan(taken);
  await second.close();
});
