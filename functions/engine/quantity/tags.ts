import { EngineError } from '../EngineError';

/** How the sources of an input are named: none said, `each` said, or shares of named sources. */
export type Tags = { readonly k: 'none' } | { readonly k: 'each' } | { readonly k: 'shared'; readonly weights: readonly Weight[] };

export interface Weight {
  /** Name of the tag as written, without outer blanks; two that differ in case only are the same. */
  readonly tag: string;
  /** Share of the standard uncertainty in this source, in [-1, 1], not 0. */
  readonly weight: number;
}

/**
 * Reads a tag column: empty, `each`, one tag, or weighted tags `T1:0.8; T2:0.6`. Case and outer blanks do not matter.
 *
 * @throws EngineError "text" if a weight cannot be read or a tag stands twice; "domain" if the squares of the weights sum to more than 1.
 */
export function readTags(text: string): Tags {
  const trimmed = text.trim();
  if (trimmed === '') return { k: 'none' };
  if (trimmed.toLowerCase() === 'each') return { k: 'each' };
  const weights = trimmed
    .split(';')
    .map((part) => part.trim())
    .filter((part) => part !== '')
    .map((part) => readWeight(part, text));
  const names = new Set(weights.map((w) => w.tag.toLowerCase()));
  if (names.size !== weights.length) throw new EngineError('text', `a tag stands twice in "${text.trim()}"`);
  const sum = weights.reduce((s, w) => s + w.weight ** 2, 0);
  if (sum > 1 + 1e-9) throw new EngineError('domain', `the squares of the weights in "${text.trim()}" need to sum to at most 1, got ${sum}`);
  return { k: 'shared', weights };
}

function readWeight(part: string, all: string): Weight {
  const colon = part.lastIndexOf(':');
  if (colon < 0) {
    if (all.includes(';')) throw new EngineError('text', `several tags need weights, as in "T1:0.8; T2:0.6", got "${all.trim()}"`);
    return { tag: part, weight: 1 };
  }
  const tag = part.slice(0, colon).trim();
  const weight = Number(part.slice(colon + 1).trim().replace(',', '.'));
  if (tag === '' || part.slice(colon + 1).trim() === '' || !(Math.abs(weight) <= 1) || weight === 0) {
    throw new EngineError('text', `a weighted tag needs the form "T1:0.8" with a weight from -1 to 1, got "${part}"`);
  }
  return { tag, weight };
}
