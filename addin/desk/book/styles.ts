import { BUILT_IN_FORMATS } from './builtInFormats';
import { isTrue } from './namespaces';
import { attribute, childOf, childrenOf, parseXml } from './xmlTree';
import type { XmlElement } from './xmlTree';
import { decodeXstring } from './xstring';

/** What the desk needs of a cell style, by index into `cellXfs`. */
export interface CellStyles {
  formats: string[];
  /** Formula hidden once the sheet is protected. */
  hidden: boolean[];
  bold: boolean[];
}

export const NO_STYLES: CellStyles = { formats: ['General'], hidden: [false], bold: [false] };

export function readStyles(text: string, part: string): CellStyles {
  const root = parseXml(text, part);
  const custom = new Map<number, string>();
  for (const format of childrenOf(childOf(root, 'numFmts'), 'numFmt')) {
    custom.set(Number(attribute(format, 'numFmtId')), decodeXstring(attribute(format, 'formatCode') ?? ''));
  }
  const named = childrenOf(childOf(root, 'cellStyleXfs'), 'xf');
  const formats: string[] = [];
  const hidden: boolean[] = [];
  const bold: boolean[] = [];
  const fonts = childrenOf(childOf(root, 'fonts'), 'font').map((font) => {
    const b = childOf(font, 'b');
    return b !== undefined && (attribute(b, 'val') === undefined || isTrue(attribute(b, 'val')));
  });
  for (const xf of childrenOf(childOf(root, 'cellXfs'), 'xf')) {
    const id = Number(attribute(xf, 'numFmtId') ?? 0);
    formats.push(custom.get(id) ?? BUILT_IN_FORMATS.get(id) ?? 'General');
    hidden.push(isHidden(xf) ?? (isTrue(attribute(xf, 'applyProtection')) ? false : isHidden(named[Number(attribute(xf, 'xfId'))]) ?? false));
    bold.push(fonts[Number(attribute(xf, 'fontId') ?? 0)] ?? false);
  }
  return { formats, hidden, bold };
}

function isHidden(xf: XmlElement | undefined): boolean | undefined {
  const protection = childOf(xf, 'protection');
  return protection && isTrue(attribute(protection, 'hidden'));
}
