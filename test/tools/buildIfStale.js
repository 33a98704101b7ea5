import { execFileSync } from 'node:child_process';
import { existsSync, mkdirSync, readdirSync, renameSync, rmSync, statSync, utimesSync } from 'node:fs';
import { join } from 'node:path';
import { setTimeout } from 'node:timers/promises';
import { fileURLToPath } from 'node:url';

const root = fileURLToPath(new URL('../..', import.meta.url));

/** What everything built is made from. */
const SOURCES = ['addin', 'functions', 'manifest', 'reference', 'package.json', 'webpack.config.js'];

/** What a build must leave behind. */
const OUTPUTS = ['functions.js', 'functions.json', 'rootsum.cjs', 'desk.js', 'excel.js', 'index.html', 'demo.xlsx', 'reference.html', 'manifest.xml'];

/** The folder that holds what is built. */
export const distFolder = join(root, 'dist');

/**
 * Builds if a source is newer than what is built, or something is missing. Built aside and moved in file by file, so that who reads
 * meanwhile finds whole files. Of two at once, the second waits for the first.
 *
 * @param {(line: string) => void} [say]   Told in a line what is being done; not called where nothing is.
 */
export async function buildIfStale(say = () => {}) {
  if (isFresh()) return;
  mkdirSync(distFolder, { recursive: true });
  const lock = join(distFolder, '.building');
  while (!tryLock(lock)) {
    await setTimeout(250);
    if (isFresh()) return;
  }
  try {
    if (isFresh()) return;
    say('Building ...');
    const begun = new Date();
    const webpack = join(root, 'node_modules', 'webpack', 'bin', 'webpack.js');
    execFileSync(process.execPath, [webpack, '--config', 'webpack.config.js', '--output-path', lock], { cwd: root, stdio: ['ignore', 'ignore', 'inherit'] });
    const tsx = join(root, 'node_modules', 'tsx', 'dist', 'cli.mjs');
    for (const script of ['manifest/writeManifest.ts', 'reference/writeReference.ts', 'addin/desk/writeStatic.ts'])
      execFileSync(process.execPath, [tsx, script, lock], { cwd: root, stdio: ['ignore', 'ignore', 'inherit'] });
    for (const name of readdirSync(lock, { recursive: true, encoding: 'utf8' })) {
      if (statSync(join(lock, name)).isDirectory()) mkdirSync(join(distFolder, name), { recursive: true });
      else {
        // A source that changes during the build must count as newer.
        utimesSync(join(lock, name), begun, begun);
        renameSync(join(lock, name), join(distFolder, name));
      }
    }
  } finally {
    rmSync(lock, { recursive: true, force: true });
  }
}

function isFresh() {
  const outputs = OUTPUTS.map((name) => join(distFolder, name));
  if (!outputs.every((path) => existsSync(path))) return false;
  const oldest = Math.min(...outputs.map((path) => statSync(path).mtimeMs));
  return SOURCES.every((name) => newest(join(root, name)) <= oldest);
}

function newest(path) {
  if (!existsSync(path)) return 0;
  const { mtimeMs } = statSync(path);
  if (!statSync(path).isDirectory()) return mtimeMs;
  return readdirSync(path, { withFileTypes: true }).reduce((latest, entry) => Math.max(latest, newest(join(path, entry.name))), 0);
}

/** A lock that was left by a build that died is taken over after two minutes. */
function tryLock(lock) {
  try {
    mkdirSync(lock);
    return true;
  } catch (problem) {
    if (problem.code !== 'EEXIST') throw problem;
    const held = statSync(lock, { throwIfNoEntry: false });
    if (held && Date.now() - held.mtimeMs > 120_000) rmSync(lock, { recursive: true, force: true });
    return false;
  }
}
