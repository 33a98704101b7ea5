/** A replacement in a text: [start, end) becomes `text`. */
export interface Splice {
  start: number;
  end: number;
  text: string;
}

/** Applies replacements that do not overlap; insertions at one place keep the order in which they are given. */
export function applySplices(text: string, splices: readonly Splice[]): string {
  const sorted = splices.map((splice, i) => ({ splice, i })).sort((a, b) => a.splice.start - b.splice.start || a.i - b.i);
  const pieces: string[] = [];
  let at = 0;
  for (const { splice } of sorted) {
    if (splice.start < at || splice.end < splice.start) throw new RangeError(`splices overlap at ${splice.start}`);
    pieces.push(text.slice(at, splice.start), splice.text);
    at = splice.end;
  }
  pieces.push(text.slice(at));
  return pieces.join('');
}
