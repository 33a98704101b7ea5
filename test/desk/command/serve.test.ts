import { spawn } from 'node:child_process';
import { mkdtempSync, rmSync, writeFileSync } from 'node:fs';
import { request } from 'node:http';
import type { Server } from 'node:http';
import type { AddressInfo } from 'node:net';
import { tmpdir } from 'node:os';
import { join } from 'node:path';
import { afterAll, beforeAll, describe, expect, it } from 'vitest';
import { servePage } from '../../../addin/desk/command/servePage';
import { distFolder } from '../../tools/buildIfStale.js';
import { smallBook } from '../sheet/smallBook';

const folder = mkdtempSync(join(tmpdir(), 'serve-'));
const book = join(folder, 'mein Buch.xlsx');
let server: Server;
let port: number;

beforeAll(async () => {
  writeFileSync(book, smallBook({ S: { A1: 1 } }));
  server = await servePage(distFolder, book, 0);
  port = (server.address() as AddressInfo).port;
});
afterAll(async () => {
  await new Promise((closed) => { server.close(closed); server.closeAllConnections(); });
  rmSync(folder, { recursive: true });
});

const ask = (path: string, options: { host?: string; method?: string } = {}): Promise<{ status: number; headers: Record<string, unknown>; body: string }> =>
  new Promise((resolve, reject) => {
    const sent = request({ host: '127.0.0.1', port, path, method: options.method ?? 'GET', headers: { host: options.host ?? `localhost:${port}` } }, (response) => {
      let body = '';
      response.setEncoding('latin1').on('data', (part: string) => { body += part; }).on('end', () => resolve({ status: response.statusCode!, headers: response.headers, body }));
    });
    sent.on('error', reject).end();
  });

describe('the server of the page', () => {
  it('gives the page under a policy that lets nothing in or out', async () => {
    const { status, headers, body } = await ask('/');
    expect([status, headers['content-type']]).toEqual([200, 'text/html; charset=utf-8']);
    expect(headers['content-security-policy']).toContain("default-src 'none'; script-src 'self'");
    expect(headers['content-security-policy']).not.toMatch(/unsafe|https?:|\*/);
    expect(body).toContain('desk.js');
  });

  it('gives the workbook with its name, and the files of the build', async () => {
    const { status, headers, body } = await ask('/book');
    expect([status, headers['x-book-name'], body.slice(0, 2)]).toEqual([200, 'mein%20Buch.xlsx', 'PK']);
    for (const path of ['/desk.js', '/functions.json', '/icons/rootsum-32.png', '/reference.html']) expect((await ask(path)).status, path).toBe(200);
  });

  it.each(['/../package.json', '/..%2fpackage.json', '/%2e%2e/package.json', '/icons/../../package.json', '/etc/passwd', '/.building', '/nothing.js', '/%00', '/icons/'])('%s is not found', async (path) =>
    expect((await ask(path)).status).toBe(404));

  it('answers to this machine by name alone, so that no other site can read the workbook through a name of its own', async () => {
    expect((await ask('/book', { host: 'attacker.example' })).status).toBe(403);
    expect((await ask('/book', { method: 'POST' })).status).toBe(405);
    expect((server.address() as AddressInfo).address).toBe('127.0.0.1');
  });
});

describe('rootsum serve', () => {
  const run = (args: string[], until: RegExp): Promise<string> => new Promise((resolve, reject) => {
    const child = spawn(process.execPath, [join(distFolder, 'rootsum.cjs'), 'serve', ...args]);
    let text = '';
    const hear = (part: Buffer): void => {
      text += part.toString();
      if (until.test(text)) child.kill();
    };
    child.stdout.on('data', hear);
    child.stderr.on('data', hear);
    child.on('close', (code) => resolve(`${code ?? 'ended'} ${text}`));
    child.on('error', reject);
  });

  it('says where the page is', async () => expect(await run([book, '--port', '0'], /Ctrl\+C/)).toMatch(/^ended The desk is at http:\/\/localhost:\d+\/ \(this machine only; Ctrl\+C ends it\)/));
  it('refuses a workbook that cannot be read, a port that is taken, and wrong use', async () => {
    const bad = join(folder, 'bad.xlsx');
    writeFileSync(bad, 'no workbook');
    expect(await run([bad], /$^/)).toMatch(/^1 .*bad\.xlsx: the file is not a zip archive/);
    expect(await run(['--port', String(port)], /$^/)).toBe(`1 port ${port} is in use: choose another with --port\n`);
    expect(await run([join(folder, 'none.xlsx')], /$^/)).toMatch(/^2 rootsum: .*none\.xlsx: there is no such file/);
    expect(await run(['--port', 'x'], /$^/)).toMatch(/^2 rootsum: --port needs a number from 0 to 65535, got x/);
  });
});
