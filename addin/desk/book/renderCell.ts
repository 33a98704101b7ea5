import { areaName, cellName } from './area';
import type { CellValue } from './BookCell';
import type { CellChange } from './CellChange';
import { escapeXml } from './xmlText';
import { encodeXstring } from './xstring';

/** How the new XML of a sheet is written. */
export interface RenderOptions {
  /** `x:` or nothing. */
  prefix: string;
  /** The `cm` index that marks a spill. */
  dynamicMark: number;
}

/** Errors that every version reads; a newer one (#SPILL!, #CALC! …) is stored as #VALUE!, as its fallback is by Excel itself. */
const STORED_ERRORS = ['#NULL!', '#DIV/0!', '#VALUE!', '#REF!', '#NAME?', '#NUM!', '#N/A'];

/** A whole cell element, for a cell that is new or overwritten. */
export function renderCell(row: number, col: number, style: number, content: CellChange['content'], options: RenderOptions): string {
  const { prefix } = options;
  const mark = content?.kind === 'formula' && content.spill ? ` cm="${options.dynamicMark}"` : '';
  const { type, xml } = renderContent(content, prefix);
  const head = `<${prefix}c r="${cellName(row, col)}"${style === 0 ? '' : ` s="${style}"`}${type === undefined ? '' : ` t="${type}"`}${mark}`;
  return xml === '' ? `${head}/>` : `${head}>${xml}</${prefix}c>`;
}

/** The stored result of a formula: text as `t="str"`. */
export function renderResult(value: CellValue, prefix: string): { type: string | undefined; xml: string } {
  const [type, text] = typeof value === 'number' ? [undefined, numberText(value)]
    : typeof value === 'string' ? ['str', escapeXml(encodeXstring(value))]
      : typeof value === 'boolean' ? ['b', value ? '1' : '0']
        : ['e', STORED_ERRORS.includes(value.error) ? value.error : '#VALUE!'];
  return { type, xml: `<${prefix}v>${text}</${prefix}v>` };
}

/** The formula element of a cell that belongs, or belonged, to a shared formula. */
export function renderShared({ formula, owner }: NonNullable<CellChange['shared']>, prefix: string): string {
  const head = owner ? ` t="shared" ref="${areaName(owner.ref)}" si="${escapeXml(owner.si)}"` : '';
  return renderFormula(formula, head, prefix);
}

function renderContent(content: CellChange['content'], prefix: string): { type?: string; xml: string } {
  if (content === undefined || content.kind === 'clear' || (content.kind === 'result' && content.value === null)) return { xml: '' };
  if (content.kind === 'constant' && typeof content.value === 'string') {
    const space = /^\s|\s$/.test(content.value) ? ' xml:space="preserve"' : '';
    return { type: 'inlineStr', xml: `<${prefix}is><${prefix}t${space}>${escapeXml(encodeXstring(content.value))}</${prefix}t></${prefix}is>` };
  }
  const result = content.value === undefined || content.value === null ? { type: undefined, xml: '' } : renderResult(content.value, prefix);
  if (content.kind !== 'formula') return result;
  const head = content.spill ? ` t="array" ref="${areaName(content.spill)}"` : '';
  return { type: result.type, xml: renderFormula(content.formula, head, prefix) + result.xml };
}

function renderFormula(formula: string, head: string, prefix: string): string {
  return `<${prefix}f${head}>${escapeXml(encodeXstring(formula))}</${prefix}f>`;
}

/** The shortest text that reads back as the same number; -0 as 0. */
function numberText(value: number): string {
  return String(value === 0 ? 0 : value).replace('e', 'E');
}
