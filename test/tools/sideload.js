import { spawnSync } from 'node:child_process';
import { readFileSync } from 'node:fs';
import { createServer } from 'node:https';
import { homedir } from 'node:os';
import { extname, join } from 'node:path';
import { distFolder } from './buildIfStale.js';

/*
 * npm run sideload, on a machine with Excel: makes a certificate for localhost with the vendor's tool, serves what is built at
 * https://localhost:3000, and starts Excel with the manifest. The vendor's tools are fetched by npx; nothing of this runs anywhere else.
 * Not run by the tests, for no Excel runs there.
 */
const npx = (...args) => spawnSync('npx', ['--yes', ...args], { stdio: 'inherit', shell: process.platform === 'win32' }).status === 0;

if (!npx('office-addin-dev-certs', 'install')) throw new Error('no certificate could be made');
const certificates = join(homedir(), '.office-addin-dev-certs');
const types = { '.html': 'text/html', '.js': 'text/javascript', '.json': 'application/json', '.css': 'text/css', '.png': 'image/png', '.xml': 'application/xml' };
createServer({ key: readFileSync(join(certificates, 'localhost.key')), cert: readFileSync(join(certificates, 'localhost.crt')) }, (request, response) => {
  const name = new URL(request.url, 'https://localhost').pathname.slice(1);
  try {
    if (!/^(icons\/)?[\w.-]+$/.test(name)) throw new Error('no such file');
    const body = readFileSync(join(distFolder, name));
    response.writeHead(200, { 'content-type': types[extname(name)] ?? 'application/octet-stream', 'cache-control': 'no-store', 'access-control-allow-origin': '*' });
    response.end(body);
  } catch {
    response.writeHead(404).end();
  }
}).listen(3000, () => npx('office-addin-debugging', 'start', join(distFolder, 'manifest.xml'), 'desktop', '--no-debug'));
