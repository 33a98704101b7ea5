import { createHash } from 'node:crypto';
import { existsSync, mkdirSync, readFileSync, readdirSync, renameSync, rmSync } from 'node:fs';
import { join } from 'node:path';
import { fileURLToPath } from 'node:url';
import webpack from 'webpack';
import type { Configuration } from 'webpack';
import config from '../../webpack.config.js';

const root = fileURLToPath(new URL('../..', import.meta.url));

export interface Bundle {
  readonly source: string;
  readonly metadata: string;
}

/** The functions bundle and its metadata as the build makes them of the present sources; built once for each state of the sources. */
export const bundle = (): Promise<Bundle> => (made ??= make());

let made: Promise<Bundle> | undefined;

async function make(): Promise<Bundle> {
  const dir = join(root, 'out', 'bundles', hashOfSources());
  if (!existsSync(dir)) {
    const building = `${dir}.${process.pid}`;
    await build(building);
    try {
      renameSync(building, dir);
    } catch {
      rmSync(building, { recursive: true }); // another test file was first
    }
  }
  return { source: readFileSync(join(dir, 'functions.js'), 'utf8'), metadata: readFileSync(join(dir, 'functions.json'), 'utf8') };
}

/** Runs the build of the functions bundle into a folder. */
export async function build(dir: string): Promise<void> {
  mkdirSync(dir, { recursive: true });
  const functions = (config as Configuration[]).find(({ name }) => name === 'functions');
  await new Promise<void>((resolve, reject) => {
    webpack({ ...functions, output: { ...functions?.output, path: dir } }, (error, stats) => {
      if (error) reject(error);
      else if (stats?.hasErrors()) reject(new Error(stats.toString('errors-only')));
      else resolve();
    });
  });
}

function hashOfSources(): string {
  const hash = createHash('sha256');
  const files = readdirSync(join(root, 'functions'), { recursive: true, withFileTypes: true })
    .filter((entry) => entry.isFile())
    .map((entry) => join(entry.parentPath, entry.name))
    .sort();
  for (const file of [...files, join(root, 'webpack.config.js'), join(root, 'package.json')]) hash.update(file).update(readFileSync(file));
  return hash.digest('hex').slice(0, 16);
}
