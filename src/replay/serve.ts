import { createReadStream, existsSync, statSync } from 'node:fs';
import { createServer, type IncomingMessage, type Server, type ServerResponse } from 'node:http';
import type { AddressInfo } from 'node:net';
import { extname, join, normalize, resolve, sep } from 'node:path';

const types: Readonly<Record<string, string>> = {
  '.html': 'text/html; charset=utf-8',
  '.md': 'text/plain; charset=utf-8',
  '.json': 'application/json',
  '.csv': 'text/csv; charset=utf-8',
};

export interface Served {
  /** "http://127.0.0.1:4173/". */
  readonly address: string;
  close(): Promise<void>;
}

/** The file of a request inside the folder; null where there is none or the path leaves the folder. */
function fileOf(folder: string, url: string): string | null {
  const path = decodeURIComponent(new URL(url, 'http://localhost').pathname);
  const file = normalize(join(folder, path.endsWith('/') ? `${path}index.html` : path));
  if (!file.startsWith(folder + sep)) return null;
  return existsSync(file) && statSync(file).isFile() ? file : null;
}

function answer(folder: string, request: IncomingMessage, response: ServerResponse): void {
  let file: string | null = null;
  try {
    file = fileOf(folder, request.url ?? '/');
  } catch {
    // A path that does not decode has no file.
  }
  if (file === null || (request.method !== 'GET' && request.method !== 'HEAD')) {
    response.writeHead(404, { 'content-type': 'text/plain' }).end('There is no such file here.\n');
    return;
  }
  response.writeHead(200, {
    'content-type': types[extname(file)] ?? 'application/octet-stream',
    'cache-control': 'no-cache',
    'x-content-type-options': 'nosniff',
    'referrer-policy': 'no-referrer',
  });
  if (request.method === 'HEAD') response.end();
  else createReadStream(file).pipe(response);
}

function listen(server: Server, port: number): Promise<number> {
  return new Promise((done, fail) => {
    server.once('error', fail);
    server.listen(port, '127.0.0.1', () => {
      server.off('error', fail);
      done((server.address() as AddressInfo).port);
    });
  });
}

/** The first free port from `port` upward; 0 takes any. */
async function listenNear(server: Server, port: number): Promise<number> {
  for (let next = port; ; next++) {
    try {
      return await listen(server, next);
    } catch (error) {
      if ((error as NodeJS.ErrnoException).code !== 'EADDRINUSE' || next >= port + 50) throw error;
    }
  }
}

/** Serves a folder of built files to this computer only; the policy is in the page itself. */
export async function serveFolder(folder: string, port: number): Promise<Served> {
  const whole = resolve(folder);
  const server = createServer((request, response) => answer(whole, request, response));
  const taken = await listenNear(server, port);
  return {
    address: `http://127.0.0.1:${taken}/`,
    close: () =>
      new Promise((done) => {
        server.close(() => done());
        server.closeAllConnections();
      }),
  };
}

/** `npm start`: serves dist/ until it is interrupted. */
export async function main(argv: readonly string[]): Promise<number> {
  const folder = argv[0] ?? 'dist';
  const served = await serveFolder(folder, 4173);
  process.stdout.write(`Standfast is open at ${served.address}\nStop it with Ctrl+C.\n`);
  await new Promise<void>((done) => {
    process.once('SIGINT', done);
    process.once('SIGTERM', done);
  });
  await served.close();
  return 0;
}
