import { execFile, spawnSync } from 'node:child_process';
import { existsSync, linkSync, mkdirSync, mkdtempSync, readdirSync, readFileSync, rmSync, symlinkSync, writeFileSync } from 'node:fs';
import { tmpdir } from 'node:os';
import { join } from 'node:path';
import { promisify } from 'node:util';
import { afterAll, beforeEach, describe, expect, it } from 'vitest';
import { parseCell } from '../../../addin/desk/book/area';
import { openBook } from '../../../addin/desk/book/openBook';
import { distFolder } from '../../tools/buildIfStale.js';
import { smallBook } from '../sheet/smallBook';
import type { SmallCell } from '../sheet/smallBook';

const run = promisify(execFile);
const root = mkdtempSync(join(tmpdir(), 'rootsum-'));
let folder = root;
let count = 0;

beforeEach(() => {
  folder = join(root, String(++count));
  mkdirSync(folder);
});
afterAll(() => rmSync(root, { recursive: true }));

interface Outcome { status: number; out: string; err: string }

/** The built command in a folder of its own, its streams piped. */
async function rootsum(...args: string[]): Promise<Outcome> {
  try {
    const { stdout, stderr } = await run(process.execPath, [join(distFolder, 'rootsum.cjs'), ...args], { cwd: folder });
    return { status: 0, out: stdout, err: stderr };
  } catch (problem) {
    const { code, stdout, stderr } = problem as { code: number; stdout: string; stderr: string };
    return { status: code, out: stdout, err: stderr };
  }
}

const path = (name: string): string => join(folder, name);
const put = (name: string, cells: Record<string, SmallCell>): void => writeFileSync(path(name), smallBook({ S: cells }));
const putPlan = (...columns: object[]): void => writeFileSync(path('plan.json'), JSON.stringify({ columns }));
function value(name: string, address: string): unknown {
  const { row, col } = parseCell(address)!;
  return openBook(readFileSync(path(name))).cell(0, row, col)?.value;
}

const column = { sheet: 'S', anchor: 'B1', header: 'u', formula: '=ROOTSUM.STDU_FROM_TOL(A2)', mode: 'perRow', rows: '2:3' };
// u of a rectangular half-width a is a/√3 (JCGM 100:2008, 4.3.7).
const near = (x: number): unknown => expect.closeTo(x, 12);
const ROOT3 = Math.sqrt(3);

describe('rootsum recalc', () => {
  it('writes the computed workbook, leaves the one given alone, and ends with 0', async () => {
    put('in.xlsx', { A1: 3, B1: { f: '_xldudf_ROOTSUM_STDU_FROM_TOL(A1)' } });
    const before = readFileSync(path('in.xlsx'));
    expect(await rootsum('recalc', 'in.xlsx', '--out', 'new/out.xlsx')).toEqual({ status: 0, out: 'new/out.xlsx: 1 cells computed, 0 refused\n', err: '' });
    expect(value('new/out.xlsx', 'B1')).toEqual(near(ROOT3));
    expect(readFileSync(path('in.xlsx')).equals(before)).toBe(true);
    expect(readdirSync(path('new'))).toEqual(['out.xlsx']);
  });

  it('ends with 1 where a cell was refused, names it with the words of Excel, and does the rest', async () => {
    put('in.xlsx', { A1: -3, A2: 3, B1: { f: '_xldudf_ROOTSUM_STDU_FROM_TOL(A1)' }, B2: { f: '_xldudf_ROOTSUM_STDU_FROM_TOL(A2)' } });
    const { status, err } = await rootsum('recalc', 'in.xlsx', '--out', 'out.xlsx');
    expect([status, err]).toEqual([1, 'S!B1: #VALUE!: STDU_FROM_TOL: tolerance must be a number > 0, got -3 in cell A1\n']);
    expect(value('out.xlsx', 'B2')).toEqual(near(ROOT3));
  });

  it('names neighbours with the same words in one line', async () => {
    put('in.xlsx', { A1: { f: 'BESSELJ(1,2)' }, A2: { f: 'A1' }, B2: { f: 'A1' }, A3: { f: 'A1' }, B3: { f: 'A1' } });
    const { err } = await rootsum('recalc', 'in.xlsx', '--out', 'out.xlsx');
    expect(err.split('\n')).toEqual([
      'S!A1: left without a result: cell A1 uses BESSELJ, which cannot be followed',
      'S!A2:B3: left without a result: cell A1 uses BESSELJ, which cannot be followed',
      '',
    ]);
  });

  it('ends with 1 where the workbook cannot be read, and writes nothing', async () => {
    writeFileSync(path('in.xlsx'), 'no workbook');
    const { status, err } = await rootsum('recalc', 'in.xlsx', '--out', 'out.xlsx');
    expect(status).toBe(1);
    expect(err).toMatch(/^in\.xlsx: .+\n$/);
    expect(existsSync(path('out.xlsx'))).toBe(false);
    expect(await rootsum('recalc', 'none.xlsx', '--out', 'out.xlsx')).toEqual({ status: 1, out: '', err: 'none.xlsx: there is no such file\n' });
  });

  it('never writes over the workbook that is given, through a link either', async () => {
    put('in.xlsx', { A1: 3 });
    symlinkSync('in.xlsx', path('soft.xlsx'));
    linkSync(path('in.xlsx'), path('hard.xlsx'));
    for (const out of ['in.xlsx', './in.xlsx', 'soft.xlsx', 'hard.xlsx']) {
      const { status, err } = await rootsum('recalc', 'in.xlsx', '--out', out);
      expect([status, err.split('\n')[0]]).toEqual([2, 'rootsum: --out needs another file than in.xlsx: a workbook that is given is never changed']);
    }
  });
});

describe('rootsum apply', () => {
  it('applies a plan to several workbooks, refuses one by name, and does the rest', async () => {
    putPlan(column);
    put('a.xlsx', { A1: 'tolerance', A2: 3, A3: 6 });
    writeFileSync(path('b.xlsx'), 'no workbook');
    put('c.xlsx', { A1: 'tolerance', A2: 3, A3: 6, B3: 'mine' });
    const { status, out, err } = await rootsum('apply', 'plan.json', 'a.xlsx', 'b.xlsx', 'c.xlsx', '--out-dir', 'new');
    expect(status).toBe(1);
    expect(out.split('\n')).toEqual([
      'new/a.xlsx: 1 entries: 1 added; 0 cells refused', 'new/c.xlsx: 1 entries: 1 refused; 0 cells refused',
      '3 workbooks: 2 written, 1 of them with refusals; 1 refused', '',
    ]);
    expect(err).toMatch(/^b\.xlsx: .+\nc\.xlsx: entry 1 \(sheet S, anchor B1\): B3 is occupied \(it holds "mine"\)\n$/);
    expect([value('new/a.xlsx', 'B2'), value('new/a.xlsx', 'B3'), value('new/c.xlsx', 'B3')]).toEqual([near(ROOT3), near(2 * ROOT3), 'mine']);
    expect(readdirSync(path('new')).sort()).toEqual(['a.xlsx', 'c.xlsx']);
  });

  it('applied to its own result says so and adds nothing', async () => {
    putPlan(column);
    put('a.xlsx', { A2: 3, A3: 6 });
    expect((await rootsum('apply', 'plan.json', 'a.xlsx', '--out-dir', 'one')).status).toBe(0);
    const again = await rootsum('apply', 'plan.json', 'one/a.xlsx', '--out-dir', 'two');
    expect(again).toEqual({ status: 0, out: 'two/a.xlsx: 1 entries: 1 already there; 0 cells refused\n', err: '' });
    expect(readFileSync(path('two/a.xlsx')).equals(readFileSync(path('one/a.xlsx')))).toBe(true);
  });

  it('refuses a folder where a workbook that is given lies, and two workbooks of one name', async () => {
    putPlan(column);
    mkdirSync(path('x'));
    put('a.xlsx', { A2: 3, A3: 6 });
    put('x/a.xlsx', { A2: 3, A3: 6 });
    const over = await rootsum('apply', 'plan.json', 'a.xlsx', '--out-dir', '.');
    expect([over.status, over.err]).toEqual([1, 'a.xlsx: a.xlsx is a workbook that was given, which is never changed\n']);
    const twice = await rootsum('apply', 'plan.json', 'a.xlsx', 'x/a.xlsx', '--out-dir', 'new');
    expect([twice.status, twice.err]).toEqual([1, 'x/a.xlsx: a.xlsx has the same name and was written to new/a.xlsx\n']);
  });

  it('takes a plan with a mistake for wrong usage, and names the mistake', async () => {
    putPlan({ ...column, mode: 'row' });
    put('a.xlsx', { A2: 3 });
    const { status, err } = await rootsum('apply', 'plan.json', 'a.xlsx', '--out-dir', 'new');
    expect([status, err.split('\n')[0]]).toEqual([2, 'rootsum: plan.json: entry 1 (sheet S, anchor B1): mode needs "spill" or "perRow", got "row"']);
    expect(existsSync(path('new'))).toBe(false);
  });
});

describe('rootsum audit', () => {
  const good = { A1: 2, B1: { f: 'A1*2', v: 4 } };

  it('prints an object with --json, words on standard error, and ends with 0 where all agree', async () => {
    put('good.xlsx', good);
    const { status, out, err } = await rootsum('audit', 'good.xlsx', '--json');
    expect(status).toBe(0);
    expect(JSON.parse(out)).toMatchObject({ book: 'good.xlsx', formulas: 1, agree: 1, differ: [], unsupported: [], volatile: 0 });
    expect(err).toContain('good.xlsx: 1 formula cells, 1 agree');
  });

  it('prints a list for several, and ends with 1 where something differs or cannot be read', async () => {
    put('good.xlsx', good);
    put('bad.xlsx', { A1: 2, B1: { f: 'A1*2', v: 5 }, C1: { f: 'BAHTTEXT(A1)', v: 'x' } });
    const { status, out } = await rootsum('audit', 'good.xlsx', 'bad.xlsx', '--json');
    expect(status).toBe(1);
    expect((JSON.parse(out) as { book: string }[]).map((b) => b.book)).toEqual(['good.xlsx', 'bad.xlsx']);
    const person = await rootsum('audit', 'bad.xlsx', 'none.xlsx');
    expect([person.status, person.out.split('\n')[0], person.err.trim()]).toEqual([
      1, 'bad.xlsx: 2 formula cells, 0 agree, 1 differ, 1 not followed', 'none.xlsx: there is no such file',
    ]);
    expect(person.out).toContain('S!B1  stored 5, computed 4  =A1*2');
  });
});

describe('rootsum functions', () => {
  it('lists every function of functions.json, or gives that file', async () => {
    const json = readFileSync(join(distFolder, 'functions.json'), 'utf8');
    const { functions } = JSON.parse(json) as { functions: { name: string }[] };
    const listed = await rootsum('functions');
    for (const { name } of functions) expect(listed.out).toContain(`ROOTSUM.${name}(`);
    expect((await rootsum('functions', '--json')).out).toBe(json);
  });
});

describe('usage', () => {
  it.each([[['--help']], [['recalc', '--help']], [['apply', '-h']], [['functions', '--help']]])('%j prints help and ends with 0', async (args) => {
    const { status, out, err } = await rootsum(...args);
    expect([status, err]).toEqual([0, '']);
    expect(out).toMatch(/^rootsum/);
  });

  it.each([
    [[], 'a command is needed: recalc, apply, audit, functions or serve'],
    [['fly'], 'there is no command fly: use recalc, apply, audit, functions or serve'],
    [['recalc'], 'recalc needs one workbook, got 0'],
    [['recalc', 'a.xlsx'], 'recalc needs --out with the name of the new file'],
    [['recalc', 'a.xlsx', '--fast'], "Unknown option '--fast'"],
    [['apply', 'plan.json'], 'apply needs a plan and at least one workbook'],
    [['apply', 'plan.json', 'a.xlsx'], 'apply needs --out-dir with the folder for the new files'],
    [['apply', 'none.json', 'a.xlsx', '--out-dir', 'x'], 'none.json: there is no such file'],
    [['functions', 'extra'], 'functions takes no further arguments, got extra'],
  ])('%j ends with 2: %s', async (args, message) => {
    const { status, out, err } = await rootsum(...args);
    expect([status, out, err.split('\n')[0]]).toEqual([2, '', `rootsum: ${message}`]);
  });
});

describe('npm start', () => {
  const start = new URL('../../tools/start.js', import.meta.url).pathname;

  it('shows the demo: every result with its uncertainty, a budget, what was taken as exact, and both workbooks', () => {
    const { status, stdout, stderr } = spawnSync(process.execPath, [start, '--once', '--out-dir', path('out')], { cwd: folder, encoding: 'utf8', env: { ...process.env, INIT_CWD: folder } });
    expect([status, stderr]).toEqual([0, '']);
    expect(stdout).toMatch(/DW-H-001 {2}.*\d ± \d/);
    expect(stdout).toMatch(/DW-C-001 {2}.*\d ± \d/);
    expect(stdout).toMatch(/█+·* \d+\.\d %/);
    expect(stdout).toContain('Taken as exact');
    expect(stdout).toContain(path('out/demo.xlsx'));
    const [before, after] = ['out/demo-before.xlsx', 'out/demo.xlsx'].map((name) => openBook(readFileSync(path(name))));
    expect(after.sheets.map(({ name }) => name)).toEqual(before.sheets.map(({ name }) => name));
  });

  it('with a workbook and a plan of one\'s own reports the results, and says where the new workbook is', () => {
    putPlan(
      { ...column, formula: '=ROOTSUM.UNC_REPORT(C2:C2,,D2,E2)', anchor: 'F1', header: ['value', 'u', 'dof', 'k', 'p', 'U', 'result', 'exact', 'notes'], mode: 'spill', rows: '2:2' },
      { ...column, formula: '=ROOTSUM.UNC_BUDGET(C2,,D2,E2)', anchor: 'A4', header: 'Budget of c', mode: 'spill', rows: '5:20' },
    );
    // c = V m, V = 4 exactly, m = 2 with u = 0.3: u(c) = 1.2 (JCGM 100:2008, 5.1.3), U = 2.4, c = 8.0
    put('own.xlsx', { A2: 'sample 1', B2: 4, D2: 2, E2: 0.3, C2: { f: 'B2*D2', v: 8 } });
    const args = [start, '--once', 'own.xlsx', 'plan.json', '--out-dir', path('out')];
    const { status, stdout } = spawnSync(process.execPath, args, { cwd: folder, encoding: 'utf8', env: { ...process.env, INIT_CWD: folder } });
    expect(status).toBe(0);
    expect(stdout).toMatch(/sample 1 {2}8\.0 ± 2\.4/);
    expect(stdout).toMatch(/\(D2\) +1\.2 {2}█{30} 100\.0 %/);
    expect(stdout).toMatch(/Taken as exact\n.*\(B2\)/);
    expect(stdout).toContain(`The workbook with the new columns: ${path('out/own.xlsx')}`);
    expect(value('out/own.xlsx', 'G2')).toEqual(near(1.2));
  });
});
