/** One place of a pattern: a character to be met, `?` (any one) or `*` (any run, also none). */
type Place = { readonly any: 'one' | 'run' } | { readonly character: string };

/** A compiled wildcard pattern; case-blind. */
export interface Pattern {
  /** True if the whole text follows the pattern. */
  matches(text: string): boolean;
  /** The first 0-based place at or after `from` where some run of characters follows the pattern; -1 if none. */
  find(text: string, from: number): number;
}

/** True if a text holds a character that stands for something else where wildcards are read. */
export const hasWildcards = (text: string): boolean => /[*?~]/.test(text);

/**
 * Reads `?` as any one character and `*` as any run of characters; a `~` before `?`, `*` or `~` takes that character as it is.
 * Matching takes at most (length of the text) × (length of the pattern) steps, whatever the pattern.
 */
export function wildcards(pattern: string): Pattern {
  const places = placesOf(pattern.toLowerCase());
  const open = [...places, { any: 'run' } as const];
  return {
    matches: (text) => follows(text.toLowerCase(), 0, places),
    find: (text, from) => {
      const low = text.toLowerCase();
      for (let i = from; i <= low.length; i++) if (follows(low, i, open)) return i;
      return -1;
    },
  };
}

function placesOf(pattern: string): Place[] {
  const places: Place[] = [];
  for (let i = 0; i < pattern.length; i++) {
    const c = pattern[i];
    if (c === '~' && '?*~'.includes(pattern[i + 1] ?? ' ')) places.push({ character: pattern[++i] });
    else if (c === '?') places.push({ any: 'one' });
    else if (c === '*') places.push({ any: 'run' });
    else places.push({ character: c });
  }
  return places;
}

/** Whether `text` from `start` to its end follows the places; on a mismatch only the last run is tried longer. */
function follows(text: string, start: number, places: readonly Place[]): boolean {
  let i = start;
  let p = 0;
  let runAt = -1;
  let runFrom = 0;
  while (i < text.length) {
    const place = places[p];
    if (place && 'any' in place && place.any === 'run') {
      runAt = p++;
      runFrom = i;
    } else if (place && ('any' in place || place.character === text[i])) {
      p++;
      i++;
    } else if (runAt >= 0) {
      p = runAt + 1;
      i = ++runFrom;
    } else {
      return false;
    }
  }
  return places.slice(p).every((place) => 'any' in place && place.any === 'run');
}
