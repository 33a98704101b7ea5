import { parseA1Ref, parseR1C1Ref } from '@borgar/fx';
import { EngineError } from '../../EngineError';
import { placeArea } from '../evaluate';
import type { Bound, RelativeArea } from '../expression';
import type { Run } from '../run';
import type { Area } from '../value';

/** What the parsers give: 0-based bounds, null where open. */
interface Parsed {
  readonly context: readonly string[];
  readonly range: Readonly<Record<string, number | boolean | string | null>>;
}

/**
 * The area that a text means, as INDIRECT reads it; undefined where it means none: no such sheet, beyond the edge, or no
 * reference at all. Names, tables, spills and other workbooks, which a text may mean too, are refused.
 */
export function areaInText(run: Run, text: string, a1: boolean): Area | undefined {
  const parsed = (a1 ? parseA1Ref(text, { allowNamed: false }) : parseR1C1Ref(capitals(text), { allowNamed: false })) as Parsed | undefined;
  if (!parsed || parsed.context.length > 1 || parsed.range.trim) {
    if (parsed?.range.trim || mayMeanMore(text)) throw new EngineError('refused', `hands INDIRECT the text "${text}", which cannot be followed`);
    return undefined;
  }
  const [name] = parsed.context;
  const sheet = name === undefined ? run.sheet : run.sheetNamed(name);
  if (sheet === undefined) return undefined;
  return placeArea(a1 ? fromA1(parsed) : fromR1C1(parsed), sheet, run.row, run.col);
}

/** True for what may be a name or a table, or is made of more than one reference. */
function mayMeanMore(text: string): boolean {
  const bare = text.slice(text.lastIndexOf('!') + 1);
  return /[[#(), @]/.test(bare) || text.includes('[') || text.split('!').length > 2 || /^[\p{L}_\\][\p{L}\p{N}_.?\\]*$/u.test(bare);
}

/** The reference in capitals, as the parser wants it; the name of a sheet stays. */
function capitals(text: string): string {
  const at = text.lastIndexOf('!') + 1;
  return text.slice(0, at) + text.slice(at).toUpperCase();
}

function fromA1({ range }: Parsed): RelativeArea {
  const bound = (key: string): Bound | null => (typeof range[key] === 'number' ? { at: range[key] + 1, absolute: true } : null);
  return { r1: bound('top'), c1: bound('left'), r2: bound('bottom'), c2: bound('right') };
}

function fromR1C1({ range }: Parsed): RelativeArea {
  const bound = (key: string): Bound | null => {
    const at = range[key];
    return typeof at === 'number' ? { at: at + (range[`$${key}`] ? 1 : 0), absolute: Boolean(range[`$${key}`]) } : null;
  };
  return { r1: bound('r0'), c1: bound('c0'), r2: bound('r1'), c2: bound('c1') };
}
