import { buildIfStale } from './buildIfStale.js';

/** Runs once before the tests: some of them run what is built. */
export default async function buildOnce(): Promise<void> {
  await buildIfStale((line) => console.log(line));
}
