import { execFile, spawn } from 'node:child_process';
import { chmodSync, cpSync, mkdirSync, mkdtempSync, readFileSync, readdirSync, rmSync, writeFileSync } from 'node:fs';
import { tmpdir } from 'node:os';
import { join } from 'node:path';
import { promisify } from 'node:util';
import { afterAll, beforeAll, describe, expect, it } from 'vitest';
import { openBook } from '../../../addin/desk/book/openBook';
import { reasonOf } from '../../../addin/desk/command/openDesk';
import { saveFile } from '../../../addin/desk/command/saveFile';
import { buildDemoBook } from '../../../addin/desk/demo/buildDemoBook';
import { distFolder } from '../../tools/buildIfStale.js';

const run = promisify(execFile);
const root = mkdtempSync(join(tmpdir(), 'saving-'));
const command = join(root, 'dist', 'rootsum.cjs');
const book = join(root, 'book.xlsx');
const plan = join(root, 'plan.json');

beforeAll(() => {
  chmodSync(root, 0o755);
  cpSync(distFolder, join(root, 'dist'), { recursive: true });
  writeFileSync(book, buildDemoBook());
  cpSync(new URL('../../../addin/desk/demo/demoPlan.json', import.meta.url), plan);
});
afterAll(() => rmSync(root, { recursive: true }));

async function apply(outDir: string, options: object = {}): Promise<{ status: number; err: string }> {
  try {
    const { stderr } = await run(process.execPath, [command, 'apply', plan, book, '--out-dir', outDir], options);
    return { status: 0, err: stderr };
  } catch (problem) {
    const { code, stderr } = problem as { code: number; stderr: string };
    return { status: code, err: stderr };
  }
}

const folder = (name: string): string => {
  mkdirSync(join(root, name));
  return join(root, name);
};

describe('a new workbook', () => {
  it('is not written into a folder that may not be written, which one line says', async () => {
    const out = folder('closed');
    chmodSync(out, 0o555);
    // a superuser may write anywhere, so another user runs the command then
    const { status, err } = await apply(out, process.getuid?.() === 0 ? { uid: 65534, gid: 65534 } : {});
    expect(err.trim().split('\n')).toEqual([`${book}: ${join(out, 'book.xlsx')} was not written: it may not be read or written`]);
    expect([status, readdirSync(out)]).toEqual([1, []]);
  });

  it('is never half there: a run that dies while it writes leaves what stood there', async () => {
    const out = folder('killed');
    writeFileSync(join(out, 'book.xlsx'), 'before');
    // the system ends a process that writes more than it may
    const { status } = await run('bash', ['-c', `ulimit -f 8; exec "${process.execPath}" "${command}" apply "${plan}" "${book}" --out-dir "${out}"`])
      .then(() => ({ status: 0 }), () => ({ status: 1 }));
    expect([status, readFileSync(join(out, 'book.xlsx'), 'utf8')]).toEqual([1, 'before']);
  });

  it('is never half there at any moment of a run that is killed', async () => {
    const out = folder('stopped');
    for (const delay of [200, 600, 1000, 1400]) {
      const child = spawn(process.execPath, [command, 'apply', plan, book, '--out-dir', out], { stdio: 'ignore' });
      const ended = new Promise((done) => child.on('exit', done));
      setTimeout(() => child.kill('SIGKILL'), delay);
      await ended;
      for (const name of readdirSync(out)) if (!name.startsWith('.')) expect(openBook(readFileSync(join(out, name))).sheets.length).toBe(8);
    }
  });

  it('is whole when two runs write it at once', async () => {
    const out = folder('both');
    const [a, b] = await Promise.all([apply(out), apply(out)]);
    expect([a.status, b.status]).toEqual([0, 0]);
    expect(readdirSync(out)).toEqual(['book.xlsx']);
    const alone = folder('alone');
    await apply(alone);
    expect(readFileSync(join(out, 'book.xlsx')).equals(readFileSync(join(alone, 'book.xlsx')))).toBe(true);
  });

  it('leaves nothing beside it, also where it fails', () => {
    const out = folder('clean');
    saveFile(join(out, 'deep', 'a.xlsx'), new Uint8Array([1]));
    expect(readdirSync(join(out, 'deep'))).toEqual(['a.xlsx']);
    mkdirSync(join(out, 'taken.xlsx'));
    writeFileSync(join(out, 'taken.xlsx', 'x'), '');
    expect(() => saveFile(join(out, 'taken.xlsx'), new Uint8Array([1]))).toThrow(/taken\.xlsx was not written: it is a folder/);
    expect(readdirSync(out)).toEqual(['deep', 'taken.xlsx']);
    expect(() => saveFile(join(out, 'deep', 'a.xlsx', 'b.xlsx'), new Uint8Array([1]))).toThrow('was not written: ');
  });
});

it('a full disk has words', () => expect(reasonOf(Object.assign(new Error('ENOSPC: no space left on device, write'), { code: 'ENOSPC' }))).toBe('the disk is full'));
