import { readFileSync } from 'node:fs';
import { createServer } from 'node:http';
import type { Server } from 'node:http';
import { basename, extname, join } from 'node:path';

const TYPES: Readonly<Record<string, string>> = {
  '.html': 'text/html; charset=utf-8', '.js': 'text/javascript; charset=utf-8', '.json': 'application/json', '.css': 'text/css; charset=utf-8', '.png': 'image/png',
  '.xlsx': 'application/vnd.openxmlformats-officedocument.spreadsheetml.sheet',
};

/** What the page may load, and from where: its own files only. */
const POLICY = "default-src 'none'; script-src 'self'; style-src 'self'; img-src 'self' data:; connect-src 'self'; base-uri 'none'; form-action 'none'; frame-ancestors 'none'";

/**
 * Serves the built pages to this machine alone.
 *
 * @param folder  The built files.
 * @param book    Path of the workbook to open; without one the page opens the demo.
 * @param port    0 for any free one.
 * @returns the running server.
 */
export function servePage(folder: string, book: string | undefined, port: number): Promise<Server> {
  const server = createServer((request, response) => {
    const path = decodeURIComponent(new URL(request.url ?? '/', 'http://localhost').pathname);
    const answer = (status: number, type: string, body: string | Buffer, more: Record<string, string> = {}): void => {
      response.writeHead(status, { 'content-type': type, 'content-security-policy': POLICY, 'x-content-type-options': 'nosniff', 'referrer-policy': 'no-referrer', 'cache-control': 'no-store', ...more });
      response.end(request.method === 'HEAD' ? undefined : body);
    };
    if (request.method !== 'GET' && request.method !== 'HEAD') return answer(405, 'text/plain', 'only GET');
    // a page of another site must not read the workbook through a name that points here
    const host = (request.headers.host ?? '').replace(/:\d+$/, '');
    if (host !== 'localhost' && host !== '127.0.0.1') return answer(403, 'text/plain', 'only from this machine');
    try {
      if (path === '/book') return book === undefined ? answer(404, 'text/plain', 'no book') : answer(200, TYPES['.xlsx'], readFileSync(book), { 'x-book-name': encodeURIComponent(basename(book)) });
      const name = path === '/' ? 'index.html' : path.slice(1);
      if (!/^(icons\/)?[\w.-]+$/.test(name) || name.startsWith('.')) return answer(404, 'text/plain', 'not found');
      return answer(200, TYPES[extname(name)] ?? 'application/octet-stream', readFileSync(join(folder, name)));
    } catch {
      return answer(404, 'text/plain', 'not found');
    }
  });
  return new Promise((resolve, reject) => {
    server.once('error', reject);
    server.listen(port, '127.0.0.1', () => resolve(server));
  });
}
